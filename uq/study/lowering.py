"""The texts of a study as nodes of one graph, with their units; every mistake noted at its place in the text.

A name whose own declaration is wrong is `broken`: what uses it is checked for its names and left alone otherwise, so that one slip
gives one message. A text is parsed once; where it repeats, it is lowered for every entry of its indices.
"""

from __future__ import annotations

from collections.abc import Callable, Mapping, Sequence
from dataclasses import dataclass, field, replace
from typing import TypeVar

from uq.errors import ExpressionError, ValueMistake, suggest
from uq.lang.graph import Graph, Node
from uq.lang.lower import Scope, TableUnits, TakeResult, Typed, in_unit, lower, lower_take, require_truth
from uq.lang.parser import parse
from uq.lang.part import require_number
from uq.lang.reduce import written_out
from uq.lang.scope import Index, Repeated
from uq.lang.tree import Tree, names, parts
from uq.lang.words import COURSES, COURSES_LATER, FUNCTION_NAMES, REDUCTIONS
from uq.study.index import count_of, places_of
from uq.study.locate import Path
from uq.study.notes import Notes
from uq.units import Unit, Units, parse_quantity

T = TypeVar("T")

_FUNCTIONS = (*FUNCTION_NAMES, *REDUCTIONS, *COURSES, *COURSES_LATER)
_ENDS = ("mirror", "wrap")
# Parts of expressions with every entry and every sum written out: what this costs is bounded whatever a study says (about a minute).
MOST_PARTS = 500_000


@dataclass(frozen=True)
class Edge:
    """The value beyond the ends of what repeats, as long as it is a text: where it stands, and the unit that it must come to."""

    path: Path
    text: str
    unit: Unit


@dataclass(frozen=True)
class Wanted:
    """The unit that a number must come to, where that is known, and for what, as in 'for the rate of `T`'."""

    unit: Unit | None
    what: str


@dataclass
class Lowering:
    """One graph, the names known so far with node and unit, what repeats, and what every text uses.

    `declared` are all names of the study with their paths, `later` those of tables that this version does not read; `fixed` the leaves that
    stay the same for a member; `edges` the values beyond ends that are not lowered yet.
    """

    notes: Notes
    declared: Mapping[str, Path]
    later: set[str]
    unitless: bool
    time_unit: Unit
    own: Units
    indices: Mapping[str, Index]
    graph: Graph = field(default_factory=Graph)
    known: dict[str, tuple[Node, Unit]] = field(default_factory=dict)
    repeated: dict[str, Repeated] = field(default_factory=dict)
    broken: set[str] = field(default_factory=set)
    fixed: set[str] = field(default_factory=set)
    tables: dict[str, TableUnits] = field(default_factory=dict)
    trees: dict[Path, Tree | None] = field(default_factory=dict)
    edges: dict[str, Edge] = field(default_factory=dict)
    edge_paths: dict[str, Path] = field(default_factory=dict)
    written: int = 0

    def tree(self, path: Path, text: str) -> Tree | None:
        """The tree of a text with known names only, or None; what is wrong is noted once."""
        if path not in self.trees:
            self.trees[path] = self._parsed(path, text)
        return self.trees[path]

    def _parsed(self, path: Path, text: str) -> Tree | None:
        try:
            tree = parse(f"'{text.strip()}'" if "'" not in text and parse_quantity(text, self.own) else text)
        except ValueMistake as mistake:
            self.notes.refused(path, mistake)
            return None
        known = True
        for part in parts(tree):
            if part.op == "call" and part.name in COURSES_LATER:
                found = f"`{part.name}( )`, which is not available yet"
                self.notes.refused(path, ExpressionError(part.start, len(part.name), found, "one of " + ", ".join(COURSES)))
                known = False
            known = known and not (part.op == "call" and part.name in self.later)
        for name, offset in names(tree):
            if name in self.later:
                known = False
            elif name not in self.declared and name != "time" and name not in _FUNCTIONS:
                near = suggest(name, [*self.declared, "time", "pi", *(_ENDS if path[-1] == "edge" else ())])
                self.notes.refused(path, ExpressionError(offset, len(name), f"the unknown name `{name}`", "a name of this study", near))
                known = False
        return tree if known else None

    def used(self, path: Path) -> tuple[str, ...]:
        """The names in the text at `path`, tables among them, and those in the values beyond the ends of what has its neighbours used."""
        found: dict[str, None] = {}
        waiting, seen = [path], set()
        while waiting:
            path = waiting.pop()
            tree = self.trees.get(path)
            if tree is None or path in seen:
                continue
            seen.add(path)
            called = (part.name for part in parts(tree) if part.op == "call" and self.declared.get(part.name, ("",))[0] == "tables")
            found |= dict.fromkeys([*(name for name, _ in names(tree)), *called])
            waiting += [self.edge_paths[name] for name in _neighbours(tree) if name in self.edge_paths]
        return tuple(found)

    def scope(self, fixed_only: bool = False) -> Scope:
        """What names mean; `fixed_only` bars all that changes during a member, for the start of a state."""
        fixed = frozenset(self.fixed)
        whole = Scope(self.known, self.unitless, {}, self.time_unit, fixed, self.own, self.tables, self.indices, self.repeated)
        if not fixed_only:
            return whole
        still = {name: typed for name, typed in self.known.items() if self.graph.leaves(typed[0]) <= fixed}
        same = {name: given for name, given in self.repeated.items() if all(self.graph.leaves(node) <= fixed for node in given.nodes)}
        moving = [name for name in (*self.known, *self.repeated) if name not in still and name not in same]
        return replace(whole, names=still, repeated=same, barred=dict.fromkeys(moving, "a start is made of parameters and numbers"))

    def stands(self, name: str, node: Node, unit: Unit) -> None:
        """A name of a single value."""
        self.known[name] = (node, unit)

    def repeats(self, name: str, given: Repeated, edge: object, path: Path) -> None:
        """A name that has a value for every entry; an edge that is a text is lowered when it is needed first."""
        if isinstance(edge, float):
            given = replace(given, edge=Typed(self.graph.number(edge), given.unit))
        elif isinstance(edge, str) and edge not in _ENDS:
            self.edges[name] = Edge((*path, "edge"), edge, given.unit)
        elif isinstance(edge, str):
            given = replace(given, edge=edge)
        self.repeated[name] = given

    def edge_text(self, name: str, path: Path, edge: object) -> None:
        """The text of an edge, parsed ahead, so that it is known which names it uses."""
        if isinstance(edge, str) and edge not in _ENDS:
            self.edge_paths[name] = (*path, "edge")
            self.tree((*path, "edge"), edge)

    def lower_edges(self, wanted: Sequence[str]) -> bool:
        """Lower the texts of these edges, as far as they are not; whether all of them are sound."""
        right = True
        for name in wanted:
            given = self.edges.pop(name, None)
            if given is not None:
                made = self.number(given.path, given.text, Wanted(given.unit, f"beyond the ends of `{name}`"))
                if made is None:
                    self.edge_paths.pop(name, None)
                    self.broken.add(f"edge of {name}")
                else:
                    self.repeated[name] = replace(self.repeated[name], edge=made[0])
            right = right and f"edge of {name}" not in self.broken
        return right

    def _sound(self, path: Path, text: str) -> Tree | None:
        tree = self.tree(path, text)
        if tree is None or self.broken & set(self.used(path)):
            return None
        return tree if self.lower_edges([name for name in _neighbours(tree) if name in self.repeated]) else None

    def _every(
        self, path: Path, text: str, over: Sequence[Index], one: Callable[[Tree, Scope], T], fixed_only: bool = False
    ) -> list[T] | None:
        """What a text comes to for every entry, or None; what is wrong is noted once."""
        tree = self._sound(path, text)
        if tree is None:
            return None
        try:
            scope = self.scope(fixed_only)
            self._affordable(tree, scope, over)
            return [one(tree, scope.standing(at)) for at in places_of(over)]
        except ValueMistake as mistake:
            self.notes.refused(path, mistake)
            return None

    def _affordable(self, tree: Tree, scope: Scope, over: Sequence[Index]) -> None:
        written = self.written + written_out(tree, scope) * count_of(over)
        if written > MOST_PARTS:
            found = f"an expression by which the study comes to more than {MOST_PARTS} parts, every sum written out for every entry"
            raise ExpressionError(
                tree.start, tree.stop - tree.start, found, "a smaller study", "name a sum that is the same for all in [terms]"
            )
        self.written = written

    def typed(self, path: Path, text: str, over: Sequence[Index] = ()) -> list[Typed] | None:
        """Node and unit of an expression for every entry, or None."""
        return self._every(path, text, over, lambda tree, scope: lower(tree, scope, self.graph))

    def number(self, path: Path, text: str, wanted: Wanted, over: Sequence[Index] = (), fixed_only: bool = False) -> list[Typed] | None:
        """An expression that must come out as a number for every entry, in the unit wanted where that is known, or None."""

        def one(tree: Tree, scope: Scope) -> Typed:
            typed = lower(tree, scope, self.graph)
            require_number(tree, typed)
            return typed if wanted.unit is None else in_unit(tree, typed, wanted.unit, self.graph, wanted.what)

        return self._every(path, text, over, one, fixed_only)

    def condition(self, path: Path, text: str, over: Sequence[Index] = ()) -> list[Node] | None:
        """The nodes of an expression that must be true or false, or None."""

        def one(tree: Tree, scope: Scope) -> Node:
            typed = lower(tree, scope, self.graph)
            require_truth(tree, typed)
            return typed.node

        return self._every(path, text, over, one)

    def take(self, path: Path, text: str, wanted: Wanted, first: int, over: Sequence[Index] = ()) -> list[TakeResult] | None:
        """What is taken from courses, numbered from `first`, as a number in the unit wanted where that is given; or None."""
        before = first

        def one(tree: Tree, scope: Scope) -> TakeResult:
            nonlocal before
            taken = lower_take(tree, scope, self.graph, before)
            before += len(taken.courses)
            if wanted.unit is not None:
                typed = in_unit(tree, Typed(taken.node, taken.unit), wanted.unit, self.graph, wanted.what)
                taken = replace(taken, node=typed.node, unit=typed.unit)
            return taken

        return self._every(path, text, over, one)


def _neighbours(tree: Tree) -> tuple[str, ...]:
    """The names of which a neighbour is used, as in C[cell-1]."""
    return tuple(part.name for part in parts(tree) if part.op == "entry" and any(at.name and at.shift for at in part.at))

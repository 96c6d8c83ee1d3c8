"""The texts of a study as nodes of one graph, with their units; every mistake noted at its place in the text.

A name whose own declaration is wrong is `broken`: what uses it is checked for its names and left alone otherwise, so that one slip
gives one message.
"""

from __future__ import annotations

from collections.abc import Mapping
from dataclasses import dataclass, field, replace

from uq.errors import ExpressionError, ValueMistake, suggest
from uq.lang.graph import Graph, Node
from uq.lang.lower import Scope, TableUnits, TakeResult, Typed, in_unit, lower, lower_take, require_truth
from uq.lang.parser import parse
from uq.lang.part import require_number
from uq.lang.tree import Tree, names, parts
from uq.lang.words import COURSES, COURSES_LATER, FUNCTION_NAMES
from uq.study.locate import Path
from uq.study.notes import Notes
from uq.units import Unit, Units, parse_quantity

_FUNCTIONS = (*FUNCTION_NAMES, *COURSES, *COURSES_LATER)


@dataclass
class Lowering:
    """One graph, the names known so far with node and unit, and what every text uses.

    `declared` are all names of the study with their paths, `later` those of tables that this version does not read; `fixed` the leaves that
    stay the same for a member.
    """

    notes: Notes
    declared: Mapping[str, Path]
    later: set[str]
    unitless: bool
    time_unit: Unit
    own: Units
    graph: Graph = field(default_factory=Graph)
    known: dict[str, tuple[Node, Unit]] = field(default_factory=dict)
    broken: set[str] = field(default_factory=set)
    fixed: set[str] = field(default_factory=set)
    tables: dict[str, TableUnits] = field(default_factory=dict)
    trees: dict[Path, Tree | None] = field(default_factory=dict)

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
                near = suggest(name, [*self.declared, "time", "pi"])
                self.notes.refused(path, ExpressionError(offset, len(name), f"the unknown name `{name}`", "a name of this study", near))
                known = False
        return tree if known else None

    def used(self, path: Path) -> tuple[str, ...]:
        """The names in the text at `path`, tables among them."""
        tree = self.trees.get(path)
        if tree is None:
            return ()
        called = (part.name for part in parts(tree) if part.op == "call" and self.declared.get(part.name, ("",))[0] == "tables")
        return tuple(dict.fromkeys([*(name for name, _ in names(tree)), *called]))

    def scope(self, fixed_only: bool = False) -> Scope:
        """What names mean; `fixed_only` bars all that changes during a member, for the start of a state."""
        whole = Scope(self.known, self.unitless, {}, self.time_unit, frozenset(self.fixed), self.own, self.tables)
        if not fixed_only:
            return whole
        still = {name: typed for name, typed in self.known.items() if self.graph.leaves(typed[0]) <= self.fixed}
        barred = {name: "a start is made of parameters and numbers" for name in self.known if name not in still}
        return replace(whole, names=still, barred=barred)

    def _sound(self, path: Path, text: str) -> Tree | None:
        tree = self.tree(path, text)
        return None if tree is None or self.broken & set(self.used(path)) else tree

    def typed(self, path: Path, text: str) -> Typed | None:
        """Node and unit of an expression, or None."""
        tree = self._sound(path, text)
        try:
            return None if tree is None else lower(tree, self.scope(), self.graph)
        except ValueMistake as mistake:
            self.notes.refused(path, mistake)
            return None

    def number(self, path: Path, text: str, unit: Unit | None, what: str, fixed_only: bool = False) -> Typed | None:
        """An expression that must come out as a number, converted to `unit` where that is known, or None."""
        tree = self._sound(path, text)
        try:
            if tree is None:
                return None
            typed = lower(tree, self.scope(fixed_only), self.graph)
            require_number(tree, typed)
            if unit is not None:
                typed = in_unit(tree, typed, unit, self.graph, what)
        except ValueMistake as mistake:
            self.notes.refused(path, mistake)
            return None
        return typed

    def condition(self, path: Path, text: str) -> Node | None:
        """The node of an expression that must be true or false, or None."""
        tree = self._sound(path, text)
        try:
            if tree is None:
                return None
            typed = lower(tree, self.scope(), self.graph)
            require_truth(tree, typed)
        except ValueMistake as mistake:
            self.notes.refused(path, mistake)
            return None
        return typed.node

    def take(self, path: Path, text: str, unit: Unit | None, what: str, first: int) -> TakeResult | None:
        """What is taken from courses, numbered from `first`, as a number in `unit` where that is given; or None."""
        tree = self._sound(path, text)
        try:
            if tree is None:
                return None
            taken = lower_take(tree, self.scope(), self.graph, first)
            if unit is not None:
                typed = in_unit(tree, Typed(taken.node, taken.unit), unit, self.graph, what)
                taken = replace(taken, node=typed.node, unit=typed.unit)
        except ValueMistake as mistake:
            self.notes.refused(path, mistake)
            return None
        return taken

"""What is taken from the course of a member: an expression with functions of whole courses in it.

In: a tree, a scope, a graph. Out: a node over the leaves `course:0`, `course:1`, ..., and what each of them is.
Must not know: how a course is computed.

Until courses are followed on the continuous solution, they are worked out on the output times.
"""

from __future__ import annotations

from dataclasses import dataclass

from uq.errors import ExpressionError
from uq.lang.graph import Graph, Node
from uq.lang.measure import mistake, multiplied, require
from uq.lang.part import brought, check_count, lower_part, require_number
from uq.lang.reduce import reduced_over, unrolled
from uq.lang.scope import Scope, Typed
from uq.lang.tree import Tree
from uq.lang.words import COURSES, COURSES_LATER
from uq.units import Unit


@dataclass(frozen=True, slots=True)
class CourseAsked:
    """A number asked of the course of `argument` within [start, stop], in the study's time unit; None: from its start, to its stop.

    `value_at` has start = stop. `tree` is the call, for messages about its window.
    """

    kind: str
    argument: Node
    start: float | None
    stop: float | None
    tree: Tree


@dataclass(frozen=True, slots=True)
class TakeResult:
    """An outcome: its node, unit and the courses that its leaves `course:i` stand for."""

    node: Node
    unit: Unit
    courses: tuple[CourseAsked, ...]


def lower_take(tree: Tree, scope: Scope, graph: Graph, first: int = 0) -> TakeResult:
    """The node of a `take` with its unit and courses, numbered from `first`; raises ExpressionError at the first mistake.

    Outside of the courses only what does not change over time may stand.
    """
    taking = _Taking(scope, graph, first, _inside(tree, scope))
    typed = unrolled(tree, scope, graph, taking.step)
    require_number(tree, typed)
    return TakeResult(typed.node, typed.unit, tuple(taking.courses))


def _inside(tree: Tree, scope: Scope) -> frozenset[int]:
    """Which parts (by identity) stand inside a course; raises ExpressionError for a course within a course."""
    inside: set[int] = set()
    waiting = [(tree, False)]
    while waiting:
        part, within = waiting.pop()
        course = part.op == "call" and part.name in (*COURSES, *COURSES_LATER) and reduced_over(part, scope) is None
        if course and within:
            raise mistake(part, f"`{part.name}( )` within another course", "a value at one time", "name it in an outcome of its own")
        if within:
            inside.add(id(part))
        waiting.extend((arg, within or course) for arg in part.args)
    return frozenset(inside)


class _Taking:
    """One `take` being lowered."""

    def __init__(self, scope: Scope, graph: Graph, first: int, inside: frozenset[int]) -> None:
        self.scope, self.graph, self.first, self.inside = scope, graph, first, inside
        self.courses: list[CourseAsked] = []

    def step(self, part: Tree, args: tuple[Typed, ...], scope: Scope) -> Typed:
        if part.op == "call" and part.name in COURSES:
            return self.course(part, args)
        typed = lower_part(part, args, scope, self.graph)
        if part.op in ("name", "entry") and id(part) not in self.inside and not self.graph.leaves(typed.node) <= self.scope.fixed:
            wanted = "a number, a parameter or a function of its course"
            raise mistake(part, f"`{part.text}`, which changes over time", wanted, f"as in final({part.text}) or highest({part.text})")
        return typed

    def course(self, part: Tree, args: tuple[Typed, ...]) -> Typed:
        start, stop = self.window(part, args)
        observed = args[0]
        require_number(part.args[0], observed)
        unit = observed.unit
        if part.name == "integral":
            time = Typed(self.graph.number(1.0), self.scope.time_unit)
            unit = multiplied(Tree("*", part.source, part.start, part.stop), ((part.args[0], observed), (part, time))).unit
        asked = CourseAsked(part.name, observed.node, start, stop, part)
        for place, known in enumerate(self.courses):
            if (known.kind, known.argument, known.start, known.stop) == (asked.kind, asked.argument, start, stop):
                return self.leaf(place, unit)
        self.courses.append(asked)
        return self.leaf(len(self.courses) - 1, unit)

    def leaf(self, place: int, unit: Unit) -> Typed:
        return Typed(self.graph.name(f"course:{self.first + place}"), unit)

    def window(self, part: Tree, args: tuple[Typed, ...]) -> tuple[float | None, float | None]:
        if part.name == "value_at":
            check_count(part, 2, 2)
            time = self.time(part.args[1], args[1])
            return time, time
        if len(args) == 1:
            return None, None
        if len(args) == 2:
            found = f"half a window in {part.name}( )"
            raise mistake(part.args[1], found, f"{part.name}(x) or {part.name}(x, from, to)")
        check_count(part, 1, 3)
        start, stop = (self.time(tree, typed) for tree, typed in zip(part.args[1:], args[1:], strict=True))
        if not start < stop:
            place, length = part.args[1].start, part.args[2].stop - part.args[1].start
            raise ExpressionError(place, length, f"a window from {start:g} to {stop:g}", "a window that ends after it begins")
        return start, stop

    def time(self, part: Tree, typed: Typed) -> float:
        """A time in the study's unit: a plain number is in it already, what has a unit is converted."""
        require_number(part, typed)
        node = typed.node
        if isinstance(node.value, float) and not typed.unit.is_none:
            require(part, typed, self.scope.time_unit, " for a time")
            node = brought(part, typed, self.scope.time_unit, self.graph)
        if not isinstance(node.value, float):
            raise mistake(part, f"`{part.text}`, which depends on names", "a time that is a number or a quantity")
        return node.value

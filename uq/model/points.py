"""A function over one lane group in the making: where its names find their values.

Everything that the written functions share: equations, slot numbers, which nodes are worked out once per member.
"""

from __future__ import annotations

from collections.abc import Callable, Iterable
from dataclasses import dataclass
from functools import cache

from uq.lang.graph import Node
from uq.model.code import Equations, Moments
from uq.model.columns import Column, Form, Looped, Readable, WrittenOut, form_for
from uq.model.expressions import Expressions, is_truth, needed
from uq.model.jacobian import SLOPE
from uq.model.layout import Head, Layout, Setting
from uq.model.moments import driven_by_time, moments_of
from uq.model.pair import Pair
from uq.model.stiff import Stiff
from uq.model.writer import ZERO, M, V, Writer, constant

LANES_POINTER, SETTINGS_POINTER = "%lanes", "%settings"
# Step lengths below this many rounding units of the time cannot be told from nothing.
SHORTEST_IN_ULPS = 16 * 2.0**-52


@dataclass(frozen=True)
class Plan:
    """What is to be written: equations, pair, slots, the hoisted nodes in the order of their slots, how to go over the states, at which
    moments rates turn, whether steps are bounded by a part of the whole time, how many hoisted nodes the rates and what is observed need
    (the others are those of the Jacobian), what stiff steps work with (None: all steps are explicit), and whether there are no others.
    """

    equations: Equations
    pair: Pair
    layout: Layout
    hoisted: tuple[Node, ...]
    form: Form
    moments: Moments
    bounded: bool
    plain_hoisted: int
    stiff: Stiff | None = None
    only_stiff: bool = False

    @classmethod
    def of(cls, equations: Equations, pair: Pair, stiff: Stiff | None = None, only_stiff: bool = False) -> Plan:
        """Find what depends on inputs alone, number all slots, choose the form."""
        plain, moments = hoistable(equations, (*equations.rates, *equations.observed, *equations.conditions)), moments_of(equations)
        held = {node.id for node in plain}
        more = hoistable(equations, stiff.jacobian.nodes) if stiff else ()
        hoisted = (*plain, *(node for node in more if node.id not in held))
        extra, parts = (1 if pair.extra else 0), 4 + len(pair.d)
        layout = Layout(
            len(equations.inputs),
            len(hoisted),
            len(equations.states),
            len(equations.forcings),
            len(equations.observed),
            len(equations.conditions),
            smooth=sum(forcing.interpolation == "smooth" for forcing in equations.forcings),
            inner=2 if moments.turns else 0,
            curve_parts=parts if not stiff else max(parts, stiff.curve_parts),
            spare_columns=pair.all_stages + extra,
            **(stiff.sizes if stiff else {}),
        )
        form = form_for(layout.states, operations_of(equations, plain), pair)
        return cls(equations, pair, layout, hoisted, form, moments, driven_by_time(equations), len(plain), stiff, only_stiff)

    @property
    def switching(self) -> bool:
        """Whether members go from explicit to stiff steps and back."""
        return self.stiff is not None and not self.only_stiff

    def over(self, w: Writer) -> WrittenOut | Looped:
        """The way over the states in a function."""
        return self.form(w, self.layout.states, lambda time, state: rates_at(self, w, time, state))


def operations_of(equations: Equations, hoisted: tuple[Node, ...]) -> int:
    """Operations in all rates."""
    return len([node for node in needed(equations.rates, {node.id: node for node in hoisted}) if node.args])


def hoistable(equations: Equations, roots: tuple[Node, ...]) -> tuple[Node, ...]:
    """The largest subexpressions of inputs or numbers alone in the roots; truths and bare leaves are left out."""
    inputs = frozenset(equations.inputs)

    def once(node: Node) -> bool:
        return not is_truth(node) and node.op not in ("number", "name") and equations.graph.leaves(node) <= inputs

    tops = {node.id: node for node in needed(roots, {}) if once(node)}
    return tuple(node for node in needed(roots, tops) if node.id in tops)


class Point:
    """Values at one time and state of all lanes; `time` and `state` are only asked for what an expression needs."""

    def __init__(self, plan: Plan, w: Writer, time: Callable[[], str], state: Callable[[int], str]) -> None:
        self._plan, self._w, self._time, self._state = plan, w, time, state
        equations, first = plan.equations, plan.layout.first_hoisted
        known = {node.id: (lambda slot=first + k: w.load(LANES_POINTER, slot)) for k, node in enumerate(plan.hoisted)}
        self._places = {name: k for k, name in enumerate(equations.inputs)}
        self._states = {name: i for i, name in enumerate(equations.states)}
        self._expressions = Expressions(w, self._leaf, known)

    def values(self, nodes: Iterable[Node]) -> list[str]:
        """The values of nodes here; what they share is written once."""
        return self._expressions.values(nodes)

    def number(self, node: Node) -> str:
        """A node whose value is written, as a number; not a number where a truth is unknown."""
        return self._expressions.number(node)

    def truth(self, node: Node) -> tuple[str, str | None]:
        """Where a node whose value is written is true, and where it is unknown (None: nowhere)."""
        return self._expressions.truth(node)

    def _leaf(self, name: str) -> str:
        layout, w = self._plan.layout, self._w
        if name in self._states:
            return self._state(self._states[name])
        if name in self._places:
            return w.load(LANES_POINTER, layout.first_input + self._places[name])
        if name == "time":
            return self._time()
        forcings = [forcing.name for forcing in self._plan.equations.forcings]
        if name.startswith(SLOPE):
            return self._slope(forcings.index(name.removeprefix(SLOPE)))
        return self._forcing(forcings.index(name))

    def _forcing(self, k: int) -> str:
        """The value of a forcing, from its coefficients within the segment."""
        w = self._w
        since, slope, curved = self._course(k)
        if curved is not None:
            second, third = curved
            slope = w.fma(w.fma(third, since, second), since, slope)
        return w.fma(slope, since, w.load(LANES_POINTER, self._plan.layout.first_base + k))

    def _slope(self, k: int) -> str:
        """How fast a forcing changes."""
        w = self._w
        since, slope, curved = self._course(k)
        if curved is None:
            return slope
        second, third = curved
        return w.fma(w.fma(w.times(constant(3.0), third), since, w.plus(second, second)), since, slope)

    def _course(self, k: int) -> tuple[str, str, tuple[str, str] | None]:
        """Time since the start of the segment, slope there, and of a smooth forcing the second and third coefficients."""
        layout, w, forcings = self._plan.layout, self._w, self._plan.equations.forcings
        since = w.minus(self._time(), head(w, Head.segment_from))
        slope = w.load(LANES_POINTER, layout.first_slope + k)
        if forcings[k].interpolation != "smooth":
            return since, slope, None
        place = sum(forcing.interpolation == "smooth" for forcing in forcings[:k])
        second, third = (w.load(LANES_POINTER, first + place) for first in (layout.first_second, layout.first_third))
        return since, slope, (second, third)


def rates_at(plan: Plan, w: Writer, time: Callable[[], str], state: Callable[[int], str]) -> list[str]:
    """The rates of all states at a time (see `within_segment`)."""
    return within_segment(plan, w, time, state).values(plan.equations.rates)


def within_segment(plan: Plan, w: Writer, time: Callable[[], str], state: Callable[[int], str]) -> Point:
    """Values at a time; where rates turn at moments of time, at a time strictly inside the segment.

    Then a rate that jumps at an end of the segment has the values of this segment, at its ends too.
    """

    @cache
    def inside() -> str:
        first = plan.layout.first_inner
        return w.smaller(w.larger(time(), w.load(LANES_POINTER, first)), w.load(LANES_POINTER, first + 1))

    return Point(plan, w, inside if plan.layout.inner else time, state)


def head(w: Writer, slot: Head) -> str:
    """A head slot as it was when the function began."""
    return w.load(LANES_POINTER, slot)


def shortest_step(w: Writer, time: str) -> str:
    """The shortest step that can be told from nothing at a time."""
    return w.fma(constant(SHORTEST_IN_ULPS), w.size(time), w.load(SETTINGS_POINTER, Setting.shortest))


def alive(w: Writer) -> str:
    """The lanes that have a member."""
    return w.compare("ogt", head(w, Head.alive), ZERO)


def finite_part(over: WrittenOut | Looped, w: Writer, columns: Iterable[Column]) -> str:
    """0 where all values of the columns are finite, else not a number: 0 * inf and 0 * nan are not numbers, and stay so."""
    columns = tuple(columns)

    def add(i: int | str, total: str) -> str:
        for column in columns:
            total = w.fma(column.get(i), ZERO, total)
        return total

    return over.fold(V, ZERO, add)


def outside_range(plan: Plan, w: Writer, states: Readable) -> str:
    """The lanes in which any state is below its lowest or above its highest valid value."""
    over, layout = plan.over(w), plan.layout
    lowest, highest = over.stored(SETTINGS_POINTER, layout.first_lowest), over.stored(SETTINGS_POINTER, layout.first_highest)

    def check(i: int | str, found: str) -> str:
        x = states.get(i)
        found = w.either(found, w.compare("olt", x, lowest.get(i)))
        return w.either(found, w.compare("ogt", x, highest.get(i)))

    return over.fold(M, "zeroinitializer", check)


def function(w: Writer, name: str, attributes: str = "#0") -> str:
    """The whole text of a function over a lane group whose body, return included, is in `w`."""
    return "\n".join(
        [f"define i64 @{name}(ptr noalias %lanes, ptr noalias readonly %settings) {attributes} {{", "entry:", *w.lines, "}", ""]
    )


def write_system(plan: Plan) -> tuple[str, set[str]]:
    """The text of `@uq_system`, which looped functions call: the rates at %time and %states, left at %rates."""
    w = Writer()
    for i, rate in enumerate(rates_at(plan, w, lambda: "%time", lambda i: w.load("%states", i))):
        w.store("%rates", i, rate)
    w.plain("ret void")
    pointers = f"ptr readonly %lanes, {V} %time, ptr readonly %states, ptr %rates"
    return "\n".join([f"define internal void @uq_system({pointers}) #0 {{", "entry:", *w.lines, "}", ""]), w.called

"""A function over one lane group in the making: where its names find their values.

Everything that the written functions share: equations, slot numbers, which nodes are worked out once per member.
"""

from __future__ import annotations

from collections.abc import Callable, Iterable
from dataclasses import dataclass

from uq.lang.graph import Node
from uq.model.code import Equations
from uq.model.columns import Column, Form, Looped, WrittenOut, form_for
from uq.model.expressions import Expressions, is_truth, needed
from uq.model.layout import Head, Layout
from uq.model.tableau import Pair
from uq.model.writer import ZERO, M, V, Writer

LANES_POINTER, SETTINGS_POINTER = "%lanes", "%settings"


@dataclass(frozen=True)
class Plan:
    """What is to be written: equations, pair, slots, the hoisted nodes in the order of their slots, and how to go over the states."""

    equations: Equations
    pair: Pair
    layout: Layout
    hoisted: tuple[Node, ...]
    form: Form

    @classmethod
    def of(cls, equations: Equations, pair: Pair) -> Plan:
        """Find what depends on inputs alone, number all slots, choose the form."""
        hoisted = hoistable(equations)
        layout = Layout(
            len(equations.inputs),
            len(hoisted),
            len(equations.states),
            len(equations.forcings),
            len(equations.observed),
            len(equations.conditions),
        )
        operations = [node for node in needed(equations.rates, {node.id: node for node in hoisted}) if node.args]
        return cls(equations, pair, layout, hoisted, form_for(layout.states, len(operations)))

    def over(self, w: Writer) -> WrittenOut | Looped:
        """The way over the states in a function."""
        return self.form(w, self.layout.states, lambda time, state: Point(self, w, time, state).values(self.equations.rates))


def hoistable(equations: Equations) -> tuple[Node, ...]:
    """The largest subexpressions of inputs or numbers alone in rates, observed values, conditions; truths and bare leaves are left out."""
    roots = (*equations.rates, *equations.observed, *equations.conditions)
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

    def _leaf(self, name: str) -> str:
        layout, w = self._plan.layout, self._w
        if name in self._states:
            return self._state(self._states[name])
        if name in self._places:
            return w.load(LANES_POINTER, layout.first_input + self._places[name])
        if name == "time":
            return self._time()
        k = [forcing.name for forcing in self._plan.equations.forcings].index(name)
        since = w.minus(self._time(), head(w, Head.segment_from))
        return w.fma(w.load(LANES_POINTER, layout.first_slope + k), since, w.load(LANES_POINTER, layout.first_base + k))


def head(w: Writer, slot: Head) -> str:
    """A head slot as it was when the function began."""
    return w.load(LANES_POINTER, slot)


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


def outside_range(plan: Plan, w: Writer, states: Column) -> str:
    """The lanes in which any state is below its lowest or above its highest valid value."""
    over, layout = plan.over(w), plan.layout
    lowest, highest = over.stored(SETTINGS_POINTER, layout.first_lowest), over.stored(SETTINGS_POINTER, layout.first_highest)

    def check(i: int | str, found: str) -> str:
        x = states.get(i)
        found = w.either(found, w.compare("olt", x, lowest.get(i)))
        return w.either(found, w.compare("ogt", x, highest.get(i)))

    return over.fold(M, "zeroinitializer", check)


def function(w: Writer, name: str) -> str:
    """The whole text of a function over a lane group whose body, return included, is in `w`."""
    return "\n".join([f"define i64 @{name}(ptr noalias %lanes, ptr noalias readonly %settings) #0 {{", "entry:", *w.lines, "}", ""])


def write_system(plan: Plan) -> tuple[str, set[str]]:
    """The text of `@uq_system`, which looped functions call: the rates at %time and %states, left at %rates."""
    w = Writer()
    rates = Point(plan, w, lambda: "%time", lambda i: w.load("%states", i)).values(plan.equations.rates)
    for i, rate in enumerate(rates):
        w.store("%rates", i, rate)
    w.plain("ret void")
    pointers = f"ptr readonly %lanes, {V} %time, ptr readonly %states, ptr %rates"
    return "\n".join([f"define internal void @uq_system({pointers}) #0 {{", "entry:", *w.lines, "}", ""]), w.called

"""Where rates turn at moments of time: comparisons that no state and no input has a part in.

In: equations. Out: `Moments`, a small program of time and forcings, and which expressions it cannot hold. Must not know: when it is run.
"""

from __future__ import annotations

from collections.abc import Iterable

from uq.lang.graph import COMPARISONS, TABLES, Graph, Node
from uq.model.code import Equations, Moments, Operation, Table

# What has another branch on either side of a moment.
TURNING = frozenset((*COMPARISONS, *TABLES, "min", "max", "abs", "mod"))


def moments_of(equations: Equations) -> Moments:
    """The program of what turns in the rates with time and forcings alone; `solve` lands on its moments (see `uq.solve.moments`)."""
    graph, clock = equations.graph, _clock(equations)
    turning = [node for node in graph.order(equations.rates) if node.op in TURNING and graph.leaves(node) and graph.leaves(node) <= clock]
    parts = graph.order(turning)
    places = {node.id: place for place, node in enumerate(parts)}
    tables = {table.name: table for table in equations.tables}
    forcings = {forcing.name: k for k, forcing in enumerate(equations.forcings)}
    operations = []
    for node in parts:
        value: float | int | Table | None = None
        op = node.op
        if op == "number" and isinstance(node.value, float):
            value = node.value
        elif op in TABLES:
            value = tables[str(node.value)]
        elif op == "name" and node.value != "time":
            op, value = "forcing", forcings[str(node.value)]
        elif op == "name":
            op = "time"
        operations.append(Operation(op, tuple(places[arg.id] for arg in node.args), value))
    return Moments(tuple(operations), tuple(places[node.id] for node in turning))


def driven_by_time(equations: Equations) -> bool:
    """Whether a pulse in time could lie between two stages unseen, so that steps are kept short.

    It can where time enters a rate otherwise than through forcings and the moments that are landed on, or where time or a forcing is
    compared with what depends on inputs.
    """
    graph, clock = equations.graph, _clock(equations)
    landed = {node.id for node in graph.order(equations.rates) if node.truth and graph.leaves(node) <= clock}
    waiting, seen = list(equations.rates), set[int]()
    while waiting:
        node = waiting.pop()
        if node.id in seen or node.id in landed:
            continue
        seen.add(node.id)
        if (node.op == "name" and node.value == "time") or (node.op in COMPARISONS and _by_inputs(graph, node, clock, equations.states)):
            return True
        waiting.extend(node.args)
    return False


def not_landed_on(graph: Graph, rate: Node, states: Iterable[str], fixed: Iterable[str]) -> tuple[str, ...]:
    """The names of the inputs (among `fixed`), sorted, that the moments of a pulse in a rate depend on: those are not landed on.

    A pulse needs two comparisons, or two of min, max and abs, or a mod. What changes once and for all is not missed: the step after it is
    found too long. `states` are the names of all states: a comparison in which one of them has a part is one of the state.
    """
    inputs, changing = frozenset(fixed), frozenset(states)
    turning = [node for node in graph.order((rate,)) if node.op in TURNING and "time" in graph.leaves(node)]
    by_inputs = [node for node in turning if graph.leaves(node) & inputs and not graph.leaves(node) & changing]
    jumps = sum(2 if node.op == "mod" else node.truth for node in by_inputs)
    kinks = sum(not node.truth for node in by_inputs)
    if max(jumps, kinks) < 2:
        return ()
    return tuple(sorted(frozenset().union(*(graph.leaves(node) & inputs for node in by_inputs))))


def _clock(equations: Equations) -> frozenset[str]:
    return frozenset(("time", *(forcing.name for forcing in equations.forcings)))


def _by_inputs(graph: Graph, node: Node, clock: frozenset[str], states: tuple[str, ...]) -> bool:
    leaves = graph.leaves(node)
    return bool(leaves & clock) and not leaves & set(states)

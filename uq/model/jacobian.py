"""The Jacobian of a model's rates and their change with time, as nodes of its graph."""

from __future__ import annotations

from dataclasses import dataclass
from functools import cached_property

from uq.lang.derivative import Derivatives
from uq.lang.graph import Node
from uq.model.code import Equations

# The leaf that stands for how fast a forcing changes: no name of a study has a colon in it.
SLOPE = "slope:"


@dataclass(frozen=True)
class Jacobian:
    """entries: (row, column, d rate_row / d state_column), row by row, only those that are not 0 everywhere; drift: (row, d rate_row / dt
    at fixed states), forcings with their slopes counted, which are the leaves `SLOPE` + name."""

    size: int
    entries: tuple[tuple[int, int, Node], ...]
    drift: tuple[tuple[int, Node], ...]

    @classmethod
    def of(cls, equations: Equations, most: int = 10**9) -> Jacobian | None:
        """Differentiate the rates; None where there are more than `most` distinct entries."""
        graph, states = equations.graph, equations.states
        column = {name: j for j, name in enumerate(states)}
        by_state = [Derivatives(graph, name) for name in states]
        moving = {forcing.name: graph.name(SLOPE + forcing.name) for forcing in equations.forcings}
        by_time = Derivatives(graph, {**moving, "time": graph.number(1.0)})
        entries, drift, distinct = [], [], set[int]()
        for i, rate in enumerate(equations.rates):
            for j in sorted(column[name] for name in graph.leaves(rate) if name in column):
                found = by_state[j].part(rate)
                if found is not None and not _is_zero(found):
                    entries.append((i, j, found))
                    distinct.add(found.id)
            if len(distinct) > most:
                return None
            change = by_time.part(rate)
            if change is not None and not _is_zero(change):
                drift.append((i, change))
        return cls(len(states), tuple(entries), tuple(drift))

    @cached_property
    def places(self) -> tuple[tuple[int, int], ...]:
        """Rows and columns of the entries, and of the whole diagonal."""
        return tuple(sorted({(i, j) for i, j, _ in self.entries} | {(i, i) for i in range(self.size)}))

    @cached_property
    def values(self) -> tuple[Node, ...]:
        """The distinct entries: many of a large model are the same."""
        return tuple({node.id: node for _, _, node in self.entries}.values())

    @cached_property
    def value_of(self) -> tuple[int, ...]:
        """For every entry the number of its value."""
        number = {node.id: k for k, node in enumerate(self.values)}
        return tuple(number[node.id] for _, _, node in self.entries)

    @property
    def nodes(self) -> tuple[Node, ...]:
        """All that must be worked out."""
        return (*self.values, *(node for _, node in self.drift))


def _is_zero(node: Node) -> bool:
    return node.op == "number" and node.value == 0.0

"""Small models for the tests of the model and solve rooms, written with operators instead of texts."""

from __future__ import annotations

from collections.abc import Sequence
from dataclasses import dataclass

import numpy as np

from uq.lang.graph import Graph, Node
from uq.model.build import build
from uq.model.code import Course, Equations, Forcing, Table
from uq.solve.batch import Batch, Settings
from uq.solve.compile import Compiled, compile_code
from uq.solve.solve import solve


@dataclass(frozen=True)
class Ex:
    """A node with operators."""

    graph: Graph
    node: Node

    def of(self, op: str, *others: object, swap: bool = False) -> Ex:
        nodes = [self.node, *(o.node if isinstance(o, Ex) else self.graph.number(float(o)) for o in others)]  # type: ignore[arg-type]
        return Ex(self.graph, self.graph.apply(op, *(reversed(nodes) if swap else nodes)))

    def __add__(self, o):
        return self.of("+", o)

    def __radd__(self, o):
        return self.of("+", o, swap=True)

    def __sub__(self, o):
        return self.of("-", o)

    def __rsub__(self, o):
        return self.of("-", o, swap=True)

    def __mul__(self, o):
        return self.of("*", o)

    def __rmul__(self, o):
        return self.of("*", o, swap=True)

    def __truediv__(self, o):
        return self.of("/", o)

    def __rtruediv__(self, o):
        return self.of("/", o, swap=True)

    def __pow__(self, o):
        return self.of("**", o)

    def __neg__(self):
        return self.of("neg")

    def __lt__(self, o):
        return self.of("<", o)

    def __gt__(self, o):
        return self.of(">", o)

    def __ge__(self, o):
        return self.of(">=", o)

    def __le__(self, o):
        return self.of("<=", o)

    def __and__(self, o):
        return self.of("and", o)

    def __or__(self, o):
        return self.of("or", o)

    def __invert__(self):
        return self.of("not")

    def __getattr__(self, op):
        return lambda *others: self.of(op, *others)


def names(text: str, graph: Graph | None = None) -> list[Ex]:
    """The leaves of the given names in one graph."""
    graph = graph or Graph()
    return [Ex(graph, graph.name(name)) for name in text.split()]


def number(like: Ex, value: float) -> Ex:
    """A number in the same graph."""
    return Ex(like.graph, like.graph.number(value))


def table(name: str, at: Ex) -> Ex:
    """The value of a table."""
    return Ex(at.graph, at.graph.table(name, at.node))


def table_slope(name: str, at: Ex) -> Ex:
    """The derivative of a table."""
    return Ex(at.graph, at.graph.table_slope(name, at.node))


@dataclass(frozen=True)
class Parts:
    """What `equations` takes besides starts and rates."""

    observed: Sequence[Ex] | None = None
    conditions: Sequence[Ex] = ()
    forcings: Sequence[Forcing] = ()
    courses: Sequence[Course] = ()
    outcomes: Sequence[Ex] = ()
    tables: Sequence[Table] = ()


def equations(inputs: str, states: str, starts: Sequence[Ex], rates: Sequence[Ex], parts: Parts = Parts()) -> Equations:
    """Equations with every state observed unless said otherwise."""
    graph = rates[0].graph
    seen = [Ex(graph, graph.name(s)) for s in states.split()] if parts.observed is None else parts.observed
    return Equations(
        graph,
        tuple(inputs.split()),
        tuple(states.split()),
        tuple(e.node for e in starts),
        tuple(e.node for e in rates),
        tuple(parts.forcings),
        tuple(e.node for e in seen),
        tuple(e.node for e in parts.conditions),
        tuple(parts.courses),
        tuple(e.node for e in parts.outcomes),
        tuple(parts.tables),
    )


def settings(states: int, accuracy: float = 1e-6, **changes: object) -> Settings:
    """Settings with scales 1 and no valid ranges unless said otherwise."""
    given = {"scales": np.ones(states), "lowest": np.full(states, -np.inf), "highest": np.full(states, np.inf), **changes}
    return Settings(accuracy, **{k: v if k == "max_steps" else np.asarray(v, float) for k, v in given.items()})  # type: ignore[arg-type]


def solved(
    eq: Equations, x: object, times: object, accuracy: float = 1e-6, start: float = 0.0, method: str = "explicit54", **changes: object
) -> Batch:
    """Build, compile and solve."""
    rows = np.atleast_2d(np.asarray(x, float))
    return solve(compiled(eq, method), rows, np.asarray(times, float), start, settings(len(eq.states), accuracy, **changes))


def compiled(eq: Equations, method: str = "explicit54") -> Compiled:
    """Machine code of equations."""
    return compile_code(build(eq, method))


def predator_prey() -> Equations:
    """x' = a x - b x y, y' = -c y + d x y."""
    a, b, c, d, x0, y0, x, y = names("a b c d x0 y0 x y")
    return equations("a b c d x0 y0", "x y", [x0, y0], [a * x - b * x * y, -c * y + d * x * y])


def predator_prey_inputs(members: int, seed: int = 1) -> np.ndarray:
    """Random inputs of `predator_prey`, in a range in which populations swing once or twice in 20 units of time."""
    low, high = np.array([0.8, 0.08, 1.2, 0.06, 8.0, 4.0]), np.array([1.2, 0.12, 1.8, 0.09, 12.0, 6.0])
    return low + (high - low) * np.random.default_rng(seed).random((members, 6))


def one_state(rate, start=None, **parts: object) -> Equations:
    """x' = rate(x, k, time) from x0; inputs k and x0."""
    k, x0, x, time = names("k x0 x time")
    return equations("k x0", "x", [x0 if start is None else start(x0)], [rate(x, k, time)], Parts(**parts))  # type: ignore[arg-type]

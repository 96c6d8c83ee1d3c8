"""The slow oracle: every expression, evaluated plainly with many digits.

Compiled code, derivatives and vector functions are held against it. It knows no signed zero and no rounding: arithmetic is mpmath's at
`digits` digits, domain errors give nan, poles an infinity, and what is beyond 2**(10**6) counts as infinite. What compares a nan is neither
true nor false (None) unless `and` or `or` decides all the same (Kleene's logic); `where` of it is nan.
"""

from __future__ import annotations

from collections.abc import Callable, Iterable, Mapping
from dataclasses import dataclass
from typing import Protocol

from mpmath import mp, mpc, mpf

from uq.lang.graph import Graph, Node

Value = mpf | bool | None

_FAR = 10**6


class Table(Protocol):
    """A function given by points, as numbers."""

    def value(self, x: mpf) -> mpf: ...
    def slope(self, x: mpf) -> mpf: ...


@dataclass(frozen=True)
class LinearTable:
    """Straight lines between points; nan outside. At a point the slope is that of the line behind it (of the last: before it)."""

    points: tuple[float, ...]
    values: tuple[float, ...]

    def value(self, x: mpf) -> mpf:
        place = self._line(x)
        return mp.nan if place is None else mpf(self.values[place]) + self.slope(x) * (x - mpf(self.points[place]))

    def slope(self, x: mpf) -> mpf:
        place = self._line(x)
        if place is None:
            return mp.nan
        rise = mpf(self.values[place + 1]) - mpf(self.values[place])
        return rise / (mpf(self.points[place + 1]) - mpf(self.points[place]))

    def _line(self, x: mpf) -> int | None:
        if not self.points[0] <= x <= self.points[-1]:
            return None
        return min(sum(point <= x for point in self.points), len(self.points) - 1) - 1


NO_TABLES: Mapping[str, Table] = {}


def evaluate(graph: Graph, node: Node, values: Mapping[str, object], digits: int = 50, tables: Mapping[str, Table] = NO_TABLES) -> Value:
    """The value of one node, where `values` gives a number for every name that it depends on, and `tables` every table."""
    return evaluate_all(graph, (node,), values, digits, tables)[0]


def evaluate_all(
    graph: Graph, nodes: Iterable[Node], values: Mapping[str, object], digits: int = 50, tables: Mapping[str, Table] = NO_TABLES
) -> list[Value]:
    """The values of several nodes of one graph, each shared part worked out once."""
    nodes = tuple(nodes)
    with mp.workdps(digits):
        known: dict[int, Value] = {}
        for node in graph.order(nodes):
            if node.op in ("number", "name"):
                known[node.id] = mpf(node.value if node.op == "number" else values[str(node.value)])
            elif node.op in ("table", "table_slope"):
                table, x = tables[str(node.value)], known[node.args[0].id]
                known[node.id] = mp.nan if mp.isnan(x) else table.value(x) if node.op == "table" else table.slope(x)
            else:
                known[node.id] = _applied(node.op, [known[arg.id] for arg in node.args])
        return [known[node.id] for node in nodes]


def _applied(op: str, args: list[Value]) -> Value:
    if op not in ("and", "or", "not", "where") and any(mp.isnan(arg) for arg in args):
        return None if op in ("<", "<=", ">", ">=") else mp.nan
    try:
        value = _MEANINGS[op](*args)
    except ZeroDivisionError:
        value = mp.nan
    if value is None or isinstance(value, bool):
        return value
    if isinstance(value, mpc):
        return value.real if value.imag == 0 else mp.nan
    if mp.isfinite(value) and value != 0 and abs(mp.mag(value)) > _FAR:
        return mpf(0) if mp.mag(value) < 0 else mp.inf * mp.sign(value)
    return value


def _both(a: bool | None, b: bool | None) -> bool | None:
    return False if a is False or b is False else None if a is None or b is None else True


def _not(a: bool | None) -> bool | None:
    return None if a is None else not a


def _divide(a: mpf, b: mpf) -> mpf:
    if b == 0:
        return mp.nan if a == 0 else mp.inf * mp.sign(a)
    return mp.nan if mp.isinf(a) and mp.isinf(b) else a / b


def _power(a: mpf, b: mpf) -> mpf:
    if b == 0 or a == 1:
        return mpf(1)
    if a == 0:
        return mpf(0) if b > 0 else mp.inf
    if a < 0 and b != mp.floor(b):
        return mp.nan
    if a > 0 and abs(b * mp.log(a, 2)) > 2 * _FAR:
        return mp.inf if (b > 0) == (a > 1) else mpf(0)
    return mp.power(a, b)


def _exponential(a: mpf) -> mpf:
    return mp.exp(a) if abs(a) < _FAR else mp.inf if a > 0 else mpf(0)


def _hyperbolic_sine(a: mpf) -> mpf:
    return mp.sinh(a) if abs(a) < _FAR else mp.inf * mp.sign(a)


def _logarithm(a: mpf) -> mpf:
    return mp.ln(a) if a > 0 else -mp.inf if a == 0 else mp.nan


def _tangent_hyperbolic(a: mpf) -> mpf:
    return mp.tanh(a) if abs(a) < _FAR else mp.sign(a)


def _remainder(a: mpf, b: mpf) -> mpf:
    if b == 0 or mp.isinf(a):
        return mp.nan
    if mp.isinf(b):
        return a if a == 0 or mp.sign(a) == mp.sign(b) else b
    return a - b * mp.floor(a / b)


def _periodic(function: Callable[[mpf], mpf]) -> Callable[[mpf], mpf]:
    return lambda a: mp.nan if mp.isinf(a) else function(a)


def _inverse(function: Callable[[mpf], mpf]) -> Callable[[mpf], mpf]:
    return lambda a: function(a) if -1 <= a <= 1 else mp.nan


_MEANINGS: dict[str, Callable[..., Value]] = {
    "+": lambda a, b: a + b,
    "-": lambda a, b: a - b,
    "*": lambda a, b: mp.nan if 0 in (a, b) and (mp.isinf(a) or mp.isinf(b)) else a * b,
    "/": _divide,
    "**": _power,
    "neg": lambda a: -a,
    "<": lambda a, b: bool(a < b),
    "<=": lambda a, b: bool(a <= b),
    ">": lambda a, b: bool(a > b),
    ">=": lambda a, b: bool(a >= b),
    "and": _both,
    "or": lambda a, b: _not(_both(_not(a), _not(b))),
    "not": _not,
    "where": lambda condition, a, b: mp.nan if condition is None else a if condition else b,
    "exp": _exponential,
    "ln": _logarithm,
    "log10": lambda a: _logarithm(a) / mp.ln(10),
    "sqrt": lambda a: mp.sqrt(a) if a >= 0 else mp.nan,
    "sin": _periodic(mp.sin),
    "cos": _periodic(mp.cos),
    "tan": _periodic(mp.tan),
    "asin": _inverse(mp.asin),
    "acos": _inverse(mp.acos),
    "atan": mp.atan,
    "atan2": mp.atan2,
    "sinh": _hyperbolic_sine,
    "cosh": lambda a: mp.cosh(a) if abs(a) < _FAR else mp.inf,
    "tanh": _tangent_hyperbolic,
    "erf": mp.erf,
    "abs": abs,
    "min": min,
    "max": max,
    "mod": _remainder,
}

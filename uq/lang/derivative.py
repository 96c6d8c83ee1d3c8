"""Derivatives of nodes, by the chain rule, node by node.

In: a graph, a node, a name. Out: the node of the derivative. Must not know: texts, units, what the derivative is for.

Each node is differentiated once, so sixteen nested terms cost sixteen small steps. At a kink the derivative is that of the branch taken.
"""

from __future__ import annotations

import math
from collections.abc import Callable, Mapping

from uq.lang.graph import Graph, Node


def derivative(graph: Graph, node: Node, wrt: str) -> Node:
    """The derivative of `node` by the name `wrt`, as a node of the same graph (the number 0 where it does not depend on it)."""
    return Derivatives(graph, wrt).of(node)


class Derivatives:
    """Derivatives by one name, or along a direction in which names change at the given rates; remembered, so that several nodes share
    what they have in common."""

    def __init__(self, graph: Graph, along: str | Mapping[str, Node]) -> None:
        self._graph = graph
        self._along = {along: graph.number(1.0)} if isinstance(along, str) else dict(along)
        self._known: dict[int, Node | None] = {}

    def of(self, node: Node) -> Node:
        """The derivative of a node; the number 0 where there is none."""
        known = self.part(node)
        return self._graph.number(0.0) if known is None else known

    def part(self, node: Node) -> Node | None:
        """The derivative of a node; None where there is none. Goes only where the names have a part: a long sum costs its path to them."""
        waiting = [node]
        while waiting:
            part = waiting[-1]
            if part.id not in self._known and self._graph.has_part(part, self._along):
                missing = [arg for arg in part.args if arg.id not in self._known]
                if missing:
                    waiting.extend(missing)
                    continue
                self._known[part.id] = self._one(part)
            self._known.setdefault(part.id)
            waiting.pop()
        return self._known[node.id]

    def _one(self, node: Node) -> Node | None:
        """The derivative of a node whose arguments have theirs; None stands for a 0 that is dropped wherever it is multiplied or added."""
        if node.op == "name":
            return self._along.get(str(node.value))
        inner = tuple(self._known[arg.id] for arg in node.args)
        if node.truth or all(part is None for part in inner):
            return None
        if node.op == "where":
            return self._branch(node.args[0], inner[1], inner[2])
        if node.op == "table":
            return _Step(self._graph, node).times(self._graph.table_slope(str(node.value), node.args[0]), inner[0])
        if node.op == "table_slope":
            raise ValueError(f"the slope of the table {node.value} has no derivative")
        return _RULES[node.op](_Step(self._graph, node), inner)

    def _branch(self, condition: Node, left: Node | None, right: Node | None) -> Node | None:
        return _Step(self._graph, condition).branch(condition, left, right)


class _Step:
    """A node and the small arithmetic of its rule, where None is a 0 that costs nothing."""

    def __init__(self, graph: Graph, node: Node) -> None:
        self.graph, self.node, self.args = graph, node, node.args

    def do(self, op: str, *args: Node) -> Node:
        return self.graph.apply(op, *args)

    def number(self, value: float) -> Node:
        return self.graph.number(value)

    def times(self, factor: Node, inner: Node | None) -> Node | None:
        return None if inner is None else self.do("*", factor, inner)

    def per(self, inner: Node | None, divisor: Node) -> Node | None:
        return None if inner is None else self.do("/", inner, divisor)

    def minus(self, inner: Node | None) -> Node | None:
        return None if inner is None else self.do("neg", inner)

    def plus(self, left: Node | None, right: Node | None) -> Node | None:
        if left is None or right is None:
            return right if left is None else left
        return self.do("+", left, right)

    def less(self, left: Node | None, right: Node | None) -> Node | None:
        if left is None or right is None:
            return self.minus(right) if left is None else left
        return self.do("-", left, right)

    def branch(self, condition: Node, left: Node | None, right: Node | None) -> Node | None:
        if left is right:
            return left
        zero = self.number(0.0)
        return self.do("where", condition, zero if left is None else left, zero if right is None else right)


Inner = tuple[Node | None, ...]


def _product(s: _Step, inner: Inner) -> Node | None:
    return s.plus(s.times(s.args[1], inner[0]), s.times(s.args[0], inner[1]))


def _quotient(s: _Step, inner: Inner) -> Node | None:
    # (a' - (a/b) b') / b, which uses the quotient that is there already and overflows later than b squared
    return s.per(s.less(inner[0], s.times(s.node, inner[1])), s.args[1])


def _power(s: _Step, inner: Inner) -> Node | None:
    base, exponent = s.args
    by_base = by_exponent = None
    if inner[0] is not None:
        if exponent.op == "number" and isinstance(exponent.value, float):
            by_base = s.times(_lowered_power(s, base, exponent.value), inner[0]) if exponent.value else None
        else:
            by_base = s.times(s.do("*", exponent, s.do("**", base, s.do("-", exponent, s.number(1.0)))), inner[0])
    if inner[1] is not None:
        # 0**b stays 0 when b > 0 changes a little; a negative base has made the power nan already
        zero = s.number(0.0)
        logarithm = s.do("where", s.do(">", base, zero), s.do("ln", base), zero)
        by_exponent = s.times(s.do("*", s.node, logarithm), inner[1])
    return s.plus(by_base, by_exponent)


def _lowered_power(s: _Step, base: Node, exponent: float) -> Node:
    """n * base**(n-1), without a power where none is needed."""
    if exponent == 1.0:
        return s.number(1.0)
    if exponent == 0.5:
        return s.do("/", s.number(0.5), s.node)
    lowered = base if exponent == 2.0 else s.do("**", base, s.number(exponent - 1.0))
    return s.do("*", s.number(exponent), lowered)


def _arc_tangent(s: _Step, inner: Inner) -> Node | None:
    y, x = s.args
    size = s.do("+", s.do("*", x, x), s.do("*", y, y))
    return s.per(s.less(s.times(x, inner[0]), s.times(y, inner[1])), size)


def _remainder(s: _Step, inner: Inner) -> Node | None:
    a, b = s.args
    whole = s.do("/", s.do("-", a, s.node), b)
    return s.less(inner[0], s.times(whole, inner[1]))


def _one_minus_square(s: _Step, x: Node) -> Node:
    one = s.number(1.0)
    return s.do("*", s.do("-", one, x), s.do("+", one, x))


def _one_plus_square(s: _Step, x: Node) -> Node:
    return s.do("+", s.number(1.0), s.do("*", x, x))


def _bell(s: _Step) -> Node:
    x = s.args[0]
    return s.do("*", s.number(2.0 / math.sqrt(math.pi)), s.do("exp", s.do("neg", s.do("*", x, x))))


_RULES: dict[str, Callable[[_Step, Inner], Node | None]] = {
    "+": lambda s, d: s.plus(d[0], d[1]),
    "-": lambda s, d: s.less(d[0], d[1]),
    "*": _product,
    "/": _quotient,
    "**": _power,
    "neg": lambda s, d: s.minus(d[0]),
    "exp": lambda s, d: s.times(s.node, d[0]),
    "ln": lambda s, d: s.per(d[0], s.args[0]),
    "log10": lambda s, d: s.per(s.times(s.number(1.0 / math.log(10.0)), d[0]), s.args[0]),
    "sqrt": lambda s, d: s.per(s.times(s.number(0.5), d[0]), s.node),
    "sin": lambda s, d: s.times(s.do("cos", s.args[0]), d[0]),
    "cos": lambda s, d: s.minus(s.times(s.do("sin", s.args[0]), d[0])),
    "tan": lambda s, d: s.times(_one_plus_square(s, s.node), d[0]),
    "asin": lambda s, d: s.per(d[0], s.do("sqrt", _one_minus_square(s, s.args[0]))),
    "acos": lambda s, d: s.minus(s.per(d[0], s.do("sqrt", _one_minus_square(s, s.args[0])))),
    "atan": lambda s, d: s.per(d[0], _one_plus_square(s, s.args[0])),
    "atan2": _arc_tangent,
    "sinh": lambda s, d: s.times(s.do("cosh", s.args[0]), d[0]),
    "cosh": lambda s, d: s.times(s.do("sinh", s.args[0]), d[0]),
    "tanh": lambda s, d: s.times(_one_minus_square(s, s.node), d[0]),
    "erf": lambda s, d: s.times(_bell(s), d[0]),
    "abs": lambda s, d: s.branch(s.do("<", s.args[0], s.number(0.0)), s.minus(d[0]), d[0]),
    "min": lambda s, d: s.branch(s.do("<=", s.args[0], s.args[1]), d[0], d[1]),
    "max": lambda s, d: s.branch(s.do(">=", s.args[0], s.args[1]), d[0], d[1]),
    "mod": _remainder,
}

"""The expression graph: one node for every distinct subexpression.

In: operators and nodes. Out: shared nodes in topological order. Must not know: texts, units, how anything is computed.

The order of operations is the user's. Only what gives the very same bits on the machine is simplified.
"""

from __future__ import annotations

import functools
import math
from collections.abc import Iterable

#: every operator and function with the number of its arguments
ARITY: dict[str, int] = {
    "+": 2,
    "-": 2,
    "*": 2,
    "/": 2,
    "**": 2,
    "neg": 1,
    "<": 2,
    "<=": 2,
    ">": 2,
    ">=": 2,
    "and": 2,
    "or": 2,
    "not": 1,
    "where": 3,
    "exp": 1,
    "ln": 1,
    "log10": 1,
    "sqrt": 1,
    "sin": 1,
    "cos": 1,
    "tan": 1,
    "asin": 1,
    "acos": 1,
    "atan": 1,
    "atan2": 2,
    "sinh": 1,
    "cosh": 1,
    "tanh": 1,
    "erf": 1,
    "abs": 1,
    "min": 2,
    "max": 2,
    "mod": 2,
}
COMPARISONS = ("<", "<=", ">", ">=")
#: a function given by points, and its slope, each of one argument
TABLES = ("table", "table_slope")
#: operators whose value is true or false
TRUTHS = frozenset((*COMPARISONS, "and", "or", "not"))


class Node:
    """One distinct subexpression; made by a `Graph` only, equal to itself only.

    `op` is "number" (`value` a finite float), "name" (`value` the name), one of `TABLES` (`value` the name of the table) or a key of
    `ARITY`. Arguments have smaller ids.
    """

    __slots__ = ("args", "id", "op", "value")

    def __init__(self, id: int, op: str, args: tuple[Node, ...], value: float | str | None) -> None:
        self.id, self.op, self.args, self.value = id, op, args, value

    @property
    def truth(self) -> bool:
        """Whether the value is true or false rather than a number."""
        return self.op in TRUTHS

    def __repr__(self) -> str:
        inside = ", ".join(([] if self.value is None else [repr(self.value)]) + [f"#{a.id}" for a in self.args])
        return f"#{self.id}={self.op}({inside})"


class Graph:
    """Makes nodes and keeps one of each kind."""

    def __init__(self) -> None:
        self._nodes: list[Node] = []
        self._leaves: list[int] = []  # bit i: depends on the i-th name; a set per node would grow with the square of a long sum
        self._names: list[str] = []
        self._numbers: dict[str, int] = {}
        self._known: dict[tuple[object, ...], Node] = {}

    @property
    def nodes(self) -> tuple[Node, ...]:
        """All nodes made so far, arguments before what uses them."""
        return tuple(self._nodes)

    def number(self, value: float) -> Node:
        """The node of a finite number; 0.0 and -0.0 are two numbers."""
        value = float(value)
        if not math.isfinite(value):
            raise ValueError(f"a graph holds finite numbers only, not {value}")
        return self._node(("number", value.hex()), "number", (), value)

    def name(self, name: str) -> Node:
        """The leaf that stands for a named value."""
        return self._node(("name", name), "name", (), name)

    def table(self, name: str, argument: Node) -> Node:
        """The value of the table `name` at its argument."""
        self._own((argument,))
        return self._node(("table", name, argument.id), "table", (argument,), name)

    def table_slope(self, name: str, argument: Node) -> Node:
        """The slope of the table `name` at its argument, in the numbers of its points; at a corner that of either side."""
        self._own((argument,))
        return self._node(("table_slope", name, argument.id), "table_slope", (argument,), name)

    def apply(self, op: str, *args: Node) -> Node:
        """The node of an operator or function of `args`; `min` and `max` of more than two are folded from the left.

        On two numbers + - * / and neg are worked out when the result is finite; x*1, 1*x, x/1, x-0, x+(-0) and neg(neg(x)) are x.
        """
        if op in ("min", "max") and len(args) > 2:
            return functools.reduce(lambda left, right: self.apply(op, left, right), args)
        if ARITY[op] != len(args):
            raise ValueError(f"{op} takes {ARITY[op]} arguments, not {len(args)}")
        self._own(args)
        simpler = self._simpler(op, args)
        if simpler is not None:
            return simpler
        return self._node((op, *(arg.id for arg in args)), op, args, None)

    def leaves(self, node: Node) -> frozenset[str]:
        """The names that the value of a node depends on."""
        bits = self._leaves[node.id]
        return frozenset(name for i, name in enumerate(self._names) if bits >> i & 1)

    def has_part(self, node: Node, names: Iterable[str]) -> bool:
        """Whether the value of a node depends on any of the names."""
        bits = self._leaves[node.id]
        return any(bits >> self._numbers[name] & 1 for name in names if name in self._numbers)

    def order(self, nodes: Iterable[Node]) -> tuple[Node, ...]:
        """The given nodes and all that they are made of, each once, arguments first."""
        seen: dict[int, Node] = {}
        waiting = list(nodes)
        while waiting:
            node = waiting.pop()
            if node.id not in seen:
                seen[node.id] = node
                waiting.extend(node.args)
        return tuple(seen[id] for id in sorted(seen))

    def _own(self, args: tuple[Node, ...]) -> None:
        for arg in args:
            if arg.id >= len(self._nodes) or self._nodes[arg.id] is not arg:
                raise ValueError(f"{arg!r} belongs to another graph")

    def _node(self, key: tuple[object, ...], op: str, args: tuple[Node, ...], value: float | str | None) -> Node:
        node = self._known.get(key)
        if node is None:
            node = self._known[key] = Node(len(self._nodes), op, args, value)
            self._nodes.append(node)
            if op == "name":
                self._leaves.append(1 << len(self._names))
                self._numbers[str(value)] = len(self._names)
                self._names.append(str(value))
            else:
                self._leaves.append(functools.reduce(lambda bits, arg: bits | self._leaves[arg.id], args, 0))
        return node

    def _simpler(self, op: str, args: tuple[Node, ...]) -> Node | None:
        if op == "neg":
            (x,) = args
            return self.number(-float(x.value)) if x.op == "number" and isinstance(x.value, float) else x.args[0] if x.op == "neg" else None
        if op not in ("+", "-", "*", "/"):
            return None
        left, right = (arg.value if arg.op == "number" and isinstance(arg.value, float) else None for arg in args)
        if left is not None and right is not None:
            result = _folded(op, left, right)
            return self.number(result) if math.isfinite(result) else None
        if op == "*" and left == 1.0:
            return args[1]
        if op == "+" and left is not None and _is_negative_zero(left):
            return args[1]
        if right is None:
            return None
        # x - (+0) and x + (-0) are x for every x; x + (+0) would turn -0 into +0 and is kept
        neutral = (op in ("*", "/") and right == 1.0) or (right == 0.0 and (op == "-") != _is_negative_zero(right) and op in ("+", "-"))
        return args[0] if neutral else None


def _is_negative_zero(value: float) -> bool:
    return value == 0.0 and math.copysign(1.0, value) < 0.0


def _folded(op: str, left: float, right: float) -> float:
    """What the machine makes of two numbers; not finite where it is to be left to the machine."""
    if op == "+":
        return left + right
    if op == "-":
        return left - right
    if op == "*":
        return left * right
    return left / right if right != 0.0 else math.nan

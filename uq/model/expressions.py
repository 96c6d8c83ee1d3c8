"""Writes nodes of the expression graph as vector instructions.

The order of operations is the user's; a sum with a product that nothing else needs becomes one fma. Small whole powers are written as
multiplications, powers of one half as square roots. Truths are vectors of i1, numbers vectors of doubles.
"""

from __future__ import annotations

from collections import Counter
from collections.abc import Callable, Iterable, Mapping

from uq.lang.graph import Node
from uq.model.writer import ONE, ZERO, M, Writer, constant

TRUTHS = {"<": "olt", "<=": "ole", ">": "ogt", ">=": "oge"}
LOGIC = ("and", "or", "not")
PLAIN = {"+": "fadd", "-": "fsub", "*": "fmul", "/": "fdiv"}
# Up to here multiplications stay within 2 ulp (x*x*x*x as (x*x)*(x*x): 1.5 ulp); beyond, they are less exact than the general power.
LARGEST_WRITTEN_POWER = 4


def needed(roots: Iterable[Node], known: Mapping[int, object]) -> list[Node]:
    """The nodes that `roots` are made of, arguments first, without what lies below nodes whose id is in `known`."""
    seen: dict[int, Node] = {}
    waiting = list(roots)
    while waiting:
        node = waiting.pop()
        if node.id not in seen:
            seen[node.id] = node
            if node.id not in known:
                waiting.extend(node.args)
    return [seen[number] for number in sorted(seen)]


class Expressions:
    """Values of nodes at one point (a stage, an output time) within one function.

    `leaf` gives the value of a name; `known` the values that are already there, by node id.
    """

    def __init__(self, writer: Writer, leaf: Callable[[str], str], known: Mapping[int, Callable[[], str]]) -> None:
        self.w, self._leaf, self._known = writer, leaf, known
        self._values: dict[int, str] = {}
        self._uses: Counter[int] = Counter()

    def values(self, roots: Iterable[Node]) -> list[str]:
        """The values of the roots, in their order; what they share is written once."""
        roots = list(roots)
        nodes = needed(roots, self._known)
        self._uses.update(root.id for root in roots)
        self._uses.update(arg.id for node in nodes if node.id not in self._known for arg in node.args)
        pending = self._fused(nodes)
        for node in nodes:
            if node.id not in self._values and node.id not in pending:
                self._values[node.id] = self._write(node)
        return [self._values[root.id] for root in roots]

    def _fused(self, nodes: list[Node]) -> set[int]:
        """Products that are written within the one sum that needs them."""
        found = set()
        for node in nodes:
            product = self._product(node) if node.id not in self._known else None
            if product is not None:
                found.add(product.id)
        return found

    def _product(self, node: Node) -> Node | None:
        """The product that a sum takes up: the right one if there are two."""
        if node.op not in ("+", "-"):
            return None
        for arg in reversed(node.args):
            if arg.op == "*" and self._uses[arg.id] == 1 and arg.id not in self._known and arg.id not in self._values:
                return arg
        return None

    def _write(self, node: Node) -> str:
        if node.id in self._known:
            return self._known[node.id]()
        if node.op == "number":
            return constant(node.value if isinstance(node.value, float) else 0.0)
        if node.op == "name":
            return self._leaf(str(node.value))
        product = self._product(node)
        if product is not None:
            return self._sum(node, product)
        if node.op == "**":
            return self._power(node)
        return self._operation(node.op, [self._values[arg.id] for arg in node.args])

    def _sum(self, node: Node, product: Node) -> str:
        w = self.w
        left, right = (self._values[arg.id] for arg in product.args)
        if product is node.args[1]:
            other = self._values[node.args[0].id]
            return w.fma(left if node.op == "+" else w.negative(left), right, other)
        other = self._values[node.args[1].id]
        return w.fma(left, right, other if node.op == "+" else w.negative(other))

    def _operation(self, op: str, args: list[str]) -> str:
        w = self.w
        if op in PLAIN:
            return w.binary(PLAIN[op], *args)
        if op in TRUTHS:
            return w.compare(TRUTHS[op], *args)
        if op in ("and", "or"):
            return w.logic(op, *args)
        if op in ("min", "max"):
            return self._extreme("olt" if op == "min" else "ogt", *args)
        one = {"neg": w.negative, "abs": w.size, "sqrt": w.root, "not": w.opposite}
        if op in one:
            return one[op](*args)
        return w.select(*args) if op == "where" else w.call(f"uq_{op}", *args)

    def _extreme(self, how: str, a: str, b: str) -> str:
        """min or max; not a number where either is not."""
        w = self.w
        either = w.select(w.compare(how, a, b), a, b)
        return w.select(w.compare("uno", a, a), a, either)

    def _power(self, node: Node) -> str:
        w = self.w
        base, exponent = (self._values[arg.id] for arg in node.args)
        value = node.args[1].value if node.args[1].op == "number" else None
        if not isinstance(value, float):
            return w.call("uq_pow", base, exponent)
        if value == 0.0:
            return ONE
        if value.is_integer() and abs(value) <= LARGEST_WRITTEN_POWER:
            whole = whole_power(w, base, int(abs(value)))
            return whole if value > 0 else w.over(ONE, whole)
        if value in (0.5, -0.5, 1.5):
            root = w.root(base)
            return {0.5: lambda: root, -0.5: lambda: w.over(ONE, root), 1.5: lambda: w.times(base, root)}[value]()
        return w.call("uq_pow", base, exponent)


def whole_power(w: Writer, base: str, exponent: int) -> str:
    """base ** exponent for 1 <= exponent <= 4 by squaring."""
    if exponent == 1:
        return base
    square = w.times(base, base)
    return {2: lambda: square, 3: lambda: w.times(square, base), 4: lambda: w.times(square, square)}[exponent]()


def as_number(w: Writer, truth: str) -> str:
    """1 where it is true, else 0."""
    return w.select(truth, ONE, ZERO)


def is_truth(node: Node) -> bool:
    """Whether a node's value is a truth rather than a number."""
    return node.op in TRUTHS or node.op in LOGIC


__all__ = ["Expressions", "M", "as_number", "is_truth", "needed", "whole_power"]

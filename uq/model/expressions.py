"""Writes nodes of the expression graph as vector instructions.

The order of operations is the user's; a sum with a product that nothing else needs becomes one fma. Small whole powers are written as
multiplications, powers of one half as square roots. Numbers are vectors of doubles, truths are vectors of i1.

Truths have three values (Kleene, Introduction to Metamathematics, 1952, section 64): true, false, and unknown where a number that is
compared is not one. `not unknown` is unknown; `and` is false where either side is false, `or` is true where either side is true, else
unknown where either side is unknown. `where` of an unknown condition is not a number. So what is not known never counts as false.
"""

from __future__ import annotations

from collections import Counter
from collections.abc import Callable, Iterable, Mapping

from uq.lang.graph import Node
from uq.model.tables import KINDS as TABLE_KINDS
from uq.model.tables import function_name
from uq.model.writer import ONE, ZERO, Writer, constant

TRUTHS = {"<": "olt", "<=": "ole", ">": "ogt", ">=": "oge"}
LOGIC = ("and", "or", "not")
NAN = constant(float("nan"))
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
        self._unknown: dict[int, str] = {}  # of truths that can be unknown, where they are
        self._uses: Counter[int] = Counter()

    def values(self, roots: Iterable[Node]) -> list[str]:
        """The values of the roots, in their order; what they share is written once. Of a truth where it is true."""
        roots = list(roots)
        nodes = needed(roots, self._known)
        self._uses.update(root.id for root in roots)
        self._uses.update(arg.id for node in nodes if node.id not in self._known for arg in node.args)
        pending = self._fused(nodes)
        for node in nodes:
            if node.id not in self._values and node.id not in pending:
                self._values[node.id] = self._write(node)
        return [self._values[root.id] for root in roots]

    def number(self, node: Node) -> str:
        """A node whose value is written, as a number: a truth is 1 or 0, not a number where it is unknown."""
        value, unknown = self._values[node.id], self._unknown.get(node.id)
        number = self.w.select(value, ONE, ZERO) if is_truth(node) else value
        return number if unknown is None else self.w.select(unknown, NAN, number)

    def truth(self, node: Node) -> tuple[str, str | None]:
        """Where a node whose value is written is true and where it is unknown (None: nowhere); a number is true where it is not 0."""
        value = self._values[node.id]
        if is_truth(node):
            return value, self._unknown.get(node.id)
        return self.w.compare("one", value, ZERO), self.w.compare("uno", value, value)

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
        if node.op in TABLE_KINDS:
            return self.w.call(function_name(node.op, str(node.value)), self._values[node.args[0].id])
        product = self._product(node)
        if product is not None:
            return self._sum(node, product)
        if node.op == "**":
            return self._power(node)
        if is_truth(node):
            return self._truth(node)
        if node.op == "where":
            return self._where(node)
        return self._operation(node.op, [self._values[arg.id] for arg in node.args])

    def _truth(self, node: Node) -> str:
        """Where a truth is true; notes where it is unknown."""
        w, args = self.w, [self._values[arg.id] for arg in node.args]
        if node.op in TRUTHS:
            doubtful = [value for arg, value in zip(node.args, args, strict=True) if not surely_number(arg)]
            if doubtful:
                self._unknown[node.id] = w.compare("uno", doubtful[0], doubtful[-1])
            return w.compare(TRUTHS[node.op], *args)
        unknowns = [self._unknown[arg.id] for arg in node.args if arg.id in self._unknown]
        unknown = w.either(*unknowns) if len(unknowns) == 2 else unknowns[0] if unknowns else None
        if node.op == "not":
            if unknown is not None:
                self._unknown[node.id] = unknown
            return w.opposite(args[0] if unknown is None else w.either(args[0], unknown))
        value = w.logic(node.op, *args)
        if unknown is not None:
            self._unknown[node.id] = self._undecided(node, args, unknown, value)
        return value

    def _undecided(self, node: Node, args: list[str], unknown: str, value: str) -> str:
        """Where an `and` or `or` with an unknown side is not decided by the other one."""
        w = self.w
        if node.op == "or":
            return w.both(unknown, w.opposite(value))
        possible = [w.either(v, self._unknown[arg.id]) if arg.id in self._unknown else v for arg, v in zip(node.args, args, strict=True)]
        return w.both(unknown, w.both(*possible))

    def _where(self, node: Node) -> str:
        value = self.w.select(*(self._values[arg.id] for arg in node.args))
        unknown = self._unknown.get(node.args[0].id)
        return value if unknown is None else self.w.select(unknown, NAN, value)

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
        if op in ("min", "max"):
            return self._extreme("olt" if op == "min" else "ogt", *args)
        one = {"neg": w.negative, "abs": w.size, "sqrt": w.root}
        return one[op](*args) if op in one else w.call(f"uq_{op}", *args)

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


def is_truth(node: Node) -> bool:
    """Whether a node's value is a truth rather than a number."""
    return node.op in TRUTHS or node.op in LOGIC


def surely_number(node: Node) -> bool:
    """Whether a node is never anything but a number, whatever happens: the time, or a number that stands there."""
    return node.op == "number" or (node.op == "name" and node.value == "time")


__all__ = ["Expressions", "is_truth", "needed", "surely_number", "whole_power"]

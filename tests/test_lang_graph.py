"""The graph: one node per distinct subexpression, and nothing simplified that would change a bit."""

from __future__ import annotations

import math
import struct

import pytest
from hypothesis import given
from hypothesis import strategies as st

from uq.lang.graph import ARITY, TRUTHS, Graph, Node
from uq.lang.words import FUNCTION_NAMES

FINITE = st.floats(allow_nan=False, allow_infinity=False)


def bits(value: float) -> bytes:
    return struct.pack("<d", value)


def machine(op: str, a: float, b: float) -> float:
    if op == "/" and b == 0.0:
        return math.nan if a == 0.0 or math.isnan(a) else math.copysign(math.inf, a) * math.copysign(1.0, b)
    return {"+": lambda: a + b, "-": lambda: a - b, "*": lambda: a * b, "/": lambda: a / b}[op]()


def run(node: Node, x: float) -> float:
    """A node of x and numbers as the machine works it out."""
    if node.op == "name":
        return x
    if node.op == "number":
        assert isinstance(node.value, float)
        return node.value
    if node.op == "neg":
        return -run(node.args[0], x)
    return machine(node.op, run(node.args[0], x), run(node.args[1], x))


def test_equal_parts_are_one_node() -> None:
    graph = Graph()
    x, y = graph.name("x"), graph.name("y")
    assert graph.name("x") is x
    assert graph.number(2) is graph.number(2.0)
    assert graph.apply("+", x, y) is graph.apply("+", x, y)
    assert graph.apply("+", x, y) is not graph.apply("+", y, x)
    assert graph.number(0.0) is not graph.number(-0.0)


def test_nested_sharing_costs_one_node_a_level() -> None:
    graph = Graph()
    node = graph.name("x")
    for _ in range(60):
        node = graph.apply("+", graph.apply("exp", node), graph.apply("exp", node))
    assert len(graph.order((node,))) == 121


def test_order_puts_arguments_first() -> None:
    graph = Graph()
    x, y = graph.name("x"), graph.name("y")
    product = graph.apply("*", x, y)
    graph.apply("exp", y)
    total = graph.apply("+", product, x)
    assert graph.order((total, x)) == (x, y, product, total)
    assert graph.nodes[-1] is total


def test_leaves_are_what_a_value_depends_on() -> None:
    graph = Graph()
    node = graph.apply("where", graph.apply("<", graph.name("a"), graph.number(1)), graph.name("b"), graph.number(0))
    assert graph.leaves(node) == {"a", "b"}
    assert graph.leaves(graph.number(3)) == set()
    assert node.truth is False
    assert node.args[0].truth is True


@given(st.sampled_from("+-*/"), FINITE, FINITE)
def test_folding_two_numbers_is_what_the_machine_does(op: str, a: float, b: float) -> None:
    graph = Graph()
    node = graph.apply(op, graph.number(a), graph.number(b))
    assert bits(run(node, math.nan)) == bits(machine(op, a, b)) or math.isnan(machine(op, a, b))
    assert (node.op == "number") == math.isfinite(machine(op, a, b))


@given(
    st.sampled_from("+-*/"),
    st.sampled_from([0.0, -0.0, 1.0, -1.0, 2.0]),
    st.booleans(),
    st.one_of(FINITE, st.sampled_from([0.0, -0.0, math.inf, -math.inf, 5e-324])),
)
def test_simplifying_changes_no_bit(op: str, number: float, first: bool, x: float) -> None:
    graph = Graph()
    name, constant = graph.name("x"), graph.number(number)
    node = graph.apply(op, constant, name) if first else graph.apply(op, name, constant)
    plain = machine(op, number, x) if first else machine(op, x, number)
    assert bits(run(node, x)) == bits(plain) or (math.isnan(plain) and math.isnan(run(node, x)))


def test_simplifies_what_is_exact_and_nothing_else() -> None:
    graph = Graph()
    x, zero, minus_zero, one = graph.name("x"), graph.number(0.0), graph.number(-0.0), graph.number(1.0)
    for node in (
        graph.apply("*", x, one),
        graph.apply("*", one, x),
        graph.apply("/", x, one),
        graph.apply("-", x, zero),
        graph.apply("+", x, minus_zero),
        graph.apply("+", minus_zero, x),
        graph.apply("neg", graph.apply("neg", x)),
    ):
        assert node is x
    for op, args in (
        ("*", (x, zero)),
        ("+", (x, zero)),
        ("-", (x, minus_zero)),
        ("-", (zero, x)),
        ("-", (x, x)),
        ("/", (x, x)),
        ("**", (x, one)),
    ):
        assert graph.apply(op, *args).op == op
    assert graph.apply("**", graph.number(2), graph.number(3)).op == "**"


def test_the_order_of_operations_is_the_users() -> None:
    graph = Graph()
    x, big = graph.name("x"), graph.number(1e20)
    node = graph.apply("-", graph.apply("+", x, big), big)
    assert run(node, 1.0) == 0.0


def test_minimum_of_many_is_folded_from_the_left() -> None:
    graph = Graph()
    a, b, c = (graph.name(name) for name in "abc")
    assert graph.apply("min", a, b, c) is graph.apply("min", graph.apply("min", a, b), c)
    many = graph.apply("max", *(graph.name(f"x{i}") for i in range(3000)))
    assert len(graph.leaves(many)) == 3000


def test_misuse_is_our_defect() -> None:
    graph, other = Graph(), Graph()
    for wrong in (math.nan, math.inf):
        with pytest.raises(ValueError, match="finite"):
            graph.number(wrong)
    with pytest.raises(ValueError, match="takes 1"):
        graph.apply("exp", graph.name("x"), graph.name("y"))
    with pytest.raises(ValueError, match="another graph"):
        graph.apply("exp", other.name("x"))
    with pytest.raises(KeyError):
        graph.apply("gamma", graph.name("x"))


def test_the_tables_of_words_agree() -> None:
    assert set(FUNCTION_NAMES) | {"+", "-", "*", "/", "**", "neg"} | TRUTHS == set(ARITY)


def test_a_table_is_known_by_its_name_and_argument() -> None:
    graph = Graph()
    x, y = graph.name("x"), graph.name("y")
    node = graph.table("head", x)
    assert graph.table("head", x) is node
    assert (node.op, node.value, node.args) == ("table", "head", (x,))
    assert len({node, graph.table("head", y), graph.table("other", x), graph.table_slope("head", x)}) == 4
    assert graph.leaves(graph.apply("+", node, y)) == {"x", "y"}
    assert repr(node) == "#2=table('head', #0)"
    with pytest.raises(ValueError, match="another graph"):
        graph.table("head", Graph().name("z"))

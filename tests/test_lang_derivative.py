"""Derivatives against differences at many digits, and their cost."""

from __future__ import annotations

import math

import pytest
from hypothesis import assume, given, settings
from hypothesis import strategies as st
from mpmath import mp, mpf

from tests.oracle import LinearTable, evaluate
from uq.lang.derivative import Derivatives, derivative
from uq.lang.graph import Graph, Node
from uq.lang.lower import Scope, lower
from uq.lang.parser import parse
from uq.units import NONE

ONE = ("exp", "ln", "log10", "sqrt", "sin", "cos", "tan", "asin", "acos", "atan", "sinh", "cosh", "tanh", "erf", "abs")
VALUES = {"x": mpf("0.7"), "y": mpf("1.3")}
STEP = mpf(10) ** -20


def made(text: str) -> tuple[Graph, Node]:
    graph = Graph()
    scope = Scope({name: (graph.name(name), NONE) for name in ("x", "y")})
    return graph, lower(parse(text), scope, graph).node


def difference(graph: Graph, node: Node, x: mpf) -> mpf:
    """The central difference at 90 digits; its error is of the order of the squared step, 1e-40."""
    with mp.workdps(90):
        up, down = (evaluate(graph, node, VALUES | {"x": x + sign * STEP}, digits=90) for sign in (1, -1))
        return (up - down) / (2 * STEP)


def close(one: mpf, other: mpf) -> bool:
    # constants of the rules such as 1/ln 10 are rounded to doubles
    return bool(abs(one - other) <= mpf("1e-12") * (1 + abs(other)))


@st.composite
def texts(draw: st.DrawFn, depth: int = 4) -> str:
    if depth == 0 or draw(st.integers(0, 4)) == 0:
        return draw(st.sampled_from(["x", "x", "y", "0.5", "2", "3.25", "pi"]))
    inner = [draw(texts(depth=depth - 1)) for _ in range(3)]
    family = draw(st.sampled_from(["arithmetic", "function", "function", "other"]))
    if family == "arithmetic":
        return f"({inner[0]} {draw(st.sampled_from('+-*/'))} {inner[1]})"
    if family == "function":
        # within the domain of each, or wherever the argument may be
        return draw(st.sampled_from(ONE)) + draw(st.sampled_from(["(0.9 * sin({0}))", "(0.3 + 0.2 * cos({0}))", "({0})"])).format(inner[0])
    forms = [
        f"({{0}}) ** {draw(st.sampled_from(['2', '3', '0.5', '1', '0', '(-1)', '1.5']))}",
        "(0.5 + ({0}) ** 2) ** ({1})",
        "-({0})",
        "atan2({0}, {1})",
        f"{draw(st.sampled_from(['min', 'max']))}({{0}}, {{1}})",
        "mod({0}, 0.75)",
        "where({0} < {1}, {2}, {0})",
        "where(not {0} >= {1} and {1} > 0.2 or {2} <= 1, {2}, {1})",
    ]
    return draw(st.sampled_from(forms)).format(*inner)


@settings(max_examples=200)
@given(texts())
def test_agrees_with_differences(text: str) -> None:
    graph, node = made(text)
    slope = derivative(graph, node, "x")
    left, right, here = (difference(graph, node, VALUES["x"] + shift * 4 * STEP) for shift in (-1, 1, 0))
    exact = evaluate(graph, slope, VALUES, digits=90)
    assume(all(mp.isfinite(value) and abs(value) < mpf(10) ** 12 for value in (left, right, here)))
    # next to a kink or a jump no difference tells the derivative
    assume(close(left, here) and close(right, here))
    assert close(exact, here), text


@pytest.mark.parametrize("name", ONE)
@pytest.mark.parametrize("x", ["-0.6", "0.2", "0.8", "2.5"])
def test_every_function_of_one(name: str, x: str) -> None:
    graph, node = made(f"{name}(x)")
    expected = difference(graph, node, mpf(x))
    if mp.isfinite(expected):
        assert close(evaluate(graph, derivative(graph, node, "x"), {"x": mpf(x)}), expected)
    else:
        assert mp.isnan(evaluate(graph, node, {"x": mpf(x)}))


@pytest.mark.parametrize(
    ("text", "x", "expected"),
    [
        ("abs(x)", 0.0, 1.0),
        ("abs(x)", -2.0, -1.0),
        ("max(x, 0)", 0.0, 1.0),
        ("max(x, 0)", -1.0, 0.0),
        ("min(x, 1)", 2.0, 0.0),
        ("min(x, 2 * x)", 1.0, 1.0),
        ("where(x < 1, x, 3 * x)", 1.0, 3.0),
        ("mod(x, 3)", 7.0, 1.0),
        ("mod(7, x)", 3.0, -2.0),
        ("x ** 2", 0.0, 0.0),
        ("x ** 3", 0.0, 0.0),
        ("x ** 1", 0.0, 1.0),
        ("x ** 0", 0.0, 0.0),
        ("0 ** x", 2.0, 0.0),
        ("2 ** x", 0.0, math.log(2.0)),
        ("y + 3", 1.0, 0.0),
    ],
)
def test_kinks_and_borders(text: str, x: float, expected: float) -> None:
    graph, node = made(text)
    value = evaluate(graph, derivative(graph, node, "x"), {"x": x, "y": 1})
    assert float(value) == pytest.approx(expected, abs=1e-15)


def test_what_does_not_depend_leaves_no_trace() -> None:
    graph, node = made("y * exp(-y) + where(x < 1, y, y) + max(y, 2)")
    assert derivative(graph, node, "x") is graph.number(0.0)
    graph, node = made("x + y * exp(y)")
    assert derivative(graph, node, "x") is graph.number(1.0)
    graph, node = made("y * x")
    assert derivative(graph, node, "x") is graph.name("y")


def test_shared_parts_are_differentiated_once() -> None:
    graph, node = made("exp(sin(x) * y) + exp(sin(x) * y) ** 2")
    slopes = Derivatives(graph, "x")
    first = slopes.of(node)
    count = len(graph.nodes)
    assert slopes.of(node) is first
    assert slopes.of(node.args[0]) is not first
    assert len(graph.nodes) == count


def test_sixteen_nested_terms_cost_nothing() -> None:
    graph = Graph()
    node = graph.name("x")
    for _ in range(16):
        node = graph.apply("*", graph.apply("exp", graph.apply("neg", node)), graph.apply("+", node, graph.apply("sin", node)))
    before = len(graph.nodes)
    slope = derivative(graph, node, "x")
    assert len(graph.nodes) - before < 400
    assert len(graph.order((slope,))) < 400
    assert close(evaluate(graph, slope, VALUES, digits=60), difference(graph, node, VALUES["x"]))


def test_a_long_flat_sum_is_differentiated() -> None:
    graph, node = made(" + ".join(f"{i} * x" for i in range(1, 1001)))
    assert derivative(graph, node, "x") is graph.number(500_500.0)


def test_the_derivative_of_a_table_is_its_slope_times_that_of_its_argument() -> None:
    graph, inner = made("x * y + 1")
    node = graph.apply("*", graph.table("head", inner), graph.name("x"))
    slope = derivative(graph, node, "x")
    assert {part.op for part in graph.order((slope,))} >= {"table", "table_slope"}
    tables = {"head": LinearTable((0.0, 1.5, 4.0), (78.0, 74.0, 62.0))}
    with mp.workdps(60):
        up, down = (evaluate(graph, node, VALUES | {"x": VALUES["x"] + shift}, 60, tables) for shift in (STEP, -STEP))
        assert close(evaluate(graph, slope, VALUES, 60, tables), (up - down) / (2 * STEP))
    assert derivative(graph, graph.table("head", graph.name("y")), "x") is graph.number(0.0)
    with pytest.raises(ValueError, match="the slope of the table head has no derivative"):
        derivative(graph, slope, "x")

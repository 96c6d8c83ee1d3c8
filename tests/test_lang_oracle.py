"""The oracle itself, against Python's own floating-point functions and a few published values."""

from __future__ import annotations

import math
import random

import pytest
from mpmath import mp

from tests.oracle import LinearTable, evaluate
from uq.lang.graph import ARITY, Graph
from uq.lang.words import FUNCTION_NAMES

ONE = {
    "exp": math.exp,
    "ln": math.log,
    "log10": math.log10,
    "sqrt": math.sqrt,
    "sin": math.sin,
    "cos": math.cos,
    "tan": math.tan,
    "asin": math.asin,
    "acos": math.acos,
    "atan": math.atan,
    "sinh": math.sinh,
    "cosh": math.cosh,
    "tanh": math.tanh,
    "erf": math.erf,
    "abs": abs,
    "neg": lambda x: -x,
}
TWO = {
    "+": lambda x, y: x + y,
    "-": lambda x, y: x - y,
    "*": lambda x, y: x * y,
    "/": lambda x, y: x / y,
    "**": lambda x, y: x**y,
    "atan2": math.atan2,
    "min": min,
    "max": max,
    "mod": lambda x, y: x % y,
}


@pytest.mark.parametrize("name", [*ONE, *TWO])
def test_agrees_with_the_machine(name: str) -> None:
    graph, draw = Graph(), random.Random(7)
    x, y = graph.name("x"), graph.name("y")
    for _ in range(20):
        a, b = draw.uniform(0.05, 0.95), draw.uniform(-3, 3)
        node = graph.apply(name, x) if name in ONE else graph.apply(name, x, y)
        expected = ONE[name](a) if name in ONE else TWO[name](a, b)
        assert float(evaluate(graph, node, {"x": a, "y": b})) == pytest.approx(expected, rel=1e-14)


def test_every_operator_has_a_meaning() -> None:
    graph = Graph()
    x, y, z = (graph.name(name) for name in "xyz")
    condition = graph.apply("<", x, y)
    values = {"x": 0.25, "y": 0.5, "z": 2}
    for op, count in ARITY.items():
        truths = (condition, condition) if op in ("and", "or", "not") else (condition, y, z) if op == "where" else (x, y, z)
        evaluate(graph, graph.apply(op, *truths[:count]), values)
    assert set(FUNCTION_NAMES) <= set(ARITY)


@pytest.mark.parametrize(
    ("op", "args", "expected"),
    [
        ("/", (1, 0), math.inf),
        ("/", (-1, 0), -math.inf),
        ("ln", (0,), -math.inf),
        ("**", (0, 0), 1.0),
        ("**", (0, -1), math.inf),
        ("mod", (-1, 3), 2.0),
        ("mod", (1, -3), -2.0),
        ("mod", (-7.5, 2), 0.5),
        ("erf", (1,), 0.84270079294971487),  # erf 1 from memory, as in tables of the error function
        ("exp", (1e300,), math.inf),
        ("tanh", (1e300,), 1.0),
    ],
)
def test_borders(op: str, args: tuple[float, ...], expected: float) -> None:
    graph = Graph()
    names = [graph.name(name) for name in "xy"[: len(args)]]
    assert float(evaluate(graph, graph.apply(op, *names), dict(zip("xy", args, strict=False)))) == expected


@pytest.mark.parametrize(
    ("op", "args"), [("/", (0, 0)), ("ln", (-1,)), ("sqrt", (-1,)), ("asin", (1.5,)), ("**", (-1, 0.5)), ("mod", (1, 0))]
)
def test_undefined_is_nan(op: str, args: tuple[float, ...]) -> None:
    graph = Graph()
    names = [graph.name(name) for name in "xy"[: len(args)]]
    assert mp.isnan(evaluate(graph, graph.apply(op, *names), dict(zip("xy", args, strict=False))))


@pytest.mark.parametrize(
    ("x", "value", "slope"), [(0, 1, 2), (0.5, 2, 2), (1, 3, -1), (3, 1, -1), (2.5, 1.5, -1), (-1, None, None), (4, None, None)]
)
def test_a_table_of_straight_lines(x: float, value: float | None, slope: float | None) -> None:
    graph, tables = Graph(), {"t": LinearTable((0.0, 1.0, 3.0), (1.0, 3.0, 1.0))}
    for node, expected in ((graph.table("t", graph.name("x")), value), (graph.table_slope("t", graph.name("x")), slope)):
        found = evaluate(graph, node, {"x": x}, tables=tables)
        assert mp.isnan(found) if expected is None else found == expected

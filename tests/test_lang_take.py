"""What may be taken from a course, and how the leaves of its courses are numbered."""

from __future__ import annotations

import pytest

from uq.errors import ExpressionError
from uq.lang.graph import Graph
from uq.lang.lower import Scope, TakeResult, lower_take
from uq.lang.parser import parse
from uq.units import parse_unit

UNITS = {"T": "K", "Tc": "degC", "heat": "kJ/min", "alarm": "K", "time": "min", "x": "1", "L": "m"}
GRAPH = Graph()
SCOPE = Scope(
    {name: (GRAPH.name(name), parse_unit(unit)) for name, unit in UNITS.items()},
    time_unit=parse_unit("min"),
    fixed=frozenset({"alarm"}),
)


def take(text: str, first: int = 0) -> TakeResult:
    return lower_take(parse(text), SCOPE, GRAPH, first)


def told(text: str) -> list[tuple[str, float | None, float | None]]:
    return [(course.kind, course.start, course.stop) for course in take(text).courses]


@pytest.mark.parametrize(
    ("text", "unit"),
    [
        ("highest(T)", "K"),
        ("alarm - lowest(T)", "K"),
        ("integral(heat)", "kJ"),
        ("average(heat, 0, 60)", "kJ/min"),
        ("final(x) * 100", "1"),
        ("value_at(Tc, '1 h')", "degC"),
        ("highest(Tc) - lowest(Tc)", "K"),
        ("highest(T - alarm) / '1 K'", "1"),
        ("highest(T) - lowest(Tc)", "K"),
        ("integral(heat) + '3 J'", "kJ"),
        ("integral(where(T > alarm, 1, 0))", "min"),
        ("alarm * 2", "K"),
    ],
)
def test_units(text: str, unit: str) -> None:
    assert take(text).unit.same(parse_unit(unit))


def test_courses_become_leaves_in_the_order_of_the_text() -> None:
    result = take("highest(T) - 2 * lowest(T) + highest(T) - alarm", first=3)
    assert [(course.kind, course.argument) for course in result.courses] == [("highest", GRAPH.name("T")), ("lowest", GRAPH.name("T"))]
    assert GRAPH.leaves(result.node) == {"course:3", "course:4", "alarm"}
    assert take("highest(T)", first=7).node is GRAPH.name("course:7")


def test_windows_are_in_the_studys_time_unit() -> None:
    assert told("highest(T)") == [("highest", None, None)]
    assert told('highest(T, "0 h", "24 h")') == [("highest", 0.0, 1440.0)]
    assert told("average(T, 10, 2 * 30)") == [("average", 10.0, 60.0)]
    assert told("value_at(T, '30 s')") == [("value_at", 0.5, 0.5)]
    assert told("value_at(T, '1 h' + '90 s')") == [("value_at", 61.5, 61.5)]
    assert told("value_at(T, 15) + value_at(T, '15 min') + value_at(T, 20)") == [("value_at", 15.0, 15.0), ("value_at", 20.0, 20.0)]


@pytest.mark.parametrize(
    ("text", "offset", "found", "remedy"),
    [
        ("T", 0, "`T`, which changes over time", "final(T)"),
        ("highest(T) - T", 13, "`T`, which changes over time", "highest(T)"),
        ("highest(T) + '1 K' * time / '1 min'", 21, "`time`, which changes", ""),
        ("highest(final(T))", 8, "`final( )` within another course", "outcome of its own"),
        ("highest(T > alarm)", 8, "the condition", ""),
        ("highest(T) > alarm", 0, "the condition", ""),
        ("time_of_highest(T)", 0, "`time_of_highest( )`", "not available yet"),
        ("highest(T, 0)", 11, "half a window", ""),
        ("highest(T, 0, 1, 2)", 0, "4 arguments", ""),
        ("value_at(T)", 0, "1 argument", ""),
        ("highest(T, 60, 0)", 11, "a window from 60 to 0", ""),
        ("highest(T, 5, '5 min')", 11, "a window from 5 to 5", ""),
        ("value_at(T, alarm)", 12, "`alarm`, which depends on names", ""),
        ("value_at(T, '3 kJ')", 12, "in kJ", ""),
        ("value_at(T, x)", 12, "depends on names", ""),
        ("integral(Tc)", 9, "`Tc` in degC", "use K"),
        ("highest(T) + 1", 13, "`1` without unit", "'1 K'"),
        ("highest(T) + heat * highest(L)", 13, "`heat`, which changes", ""),
        ("highest(T) + integral(heat)", 13, "`integral(heat)` in kJ", ""),
        ("highest()", 8, "`)`", ""),
    ],
)
def test_mistakes(text: str, offset: int, found: str, remedy: str) -> None:
    with pytest.raises(ExpressionError) as caught:
        take(text)
    assert caught.value.offset == offset
    assert found in caught.value.found
    assert remedy in caught.value.remedy

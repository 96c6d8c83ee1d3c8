"""Conversion of units inside the graph: what node it gives, and that no unit changes what an expression means."""

from __future__ import annotations

import random
from fractions import Fraction

import pytest
from mpmath import mp, mpf

from tests.oracle import evaluate
from uq.errors import ExpressionError
from uq.lang.graph import Graph, Node
from uq.lang.lower import Scope, TableUnits, Typed, in_unit, lower
from uq.lang.parser import parse
from uq.units import Unit, Units, parse_unit

GRAPH = Graph()


def scope(units: dict[str, str], **more: object) -> Scope:
    return Scope({name: (GRAPH.name(name), parse_unit(unit)) for name, unit in units.items()}, time_unit=parse_unit("min"), **more)


MIXED = scope({"kilo": "kJ", "joule": "J", "hours": "h", "minutes": "min", "T": "K", "Tc": "degC", "Tf": "degF", "a": "deg", "share": "%"})


def low(text: str, where: Scope = MIXED) -> Typed:
    return lower(parse(text), where, GRAPH)


def name(text: str) -> Node:
    return GRAPH.name(text)


def times(node: Node, factor: float) -> Node:
    return GRAPH.apply("*", node, GRAPH.number(factor))


def test_one_multiplication_by_the_double_nearest_to_the_exact_factor() -> None:
    assert low("joule + kilo").node is GRAPH.apply("+", name("joule"), times(name("kilo"), 1000.0))
    assert low("hours + minutes").node is GRAPH.apply("+", name("hours"), times(name("minutes"), 1 / 60))
    assert low("sin(a)").node is GRAPH.apply("sin", times(name("a"), mp.pi / 180))
    assert low("1 - share").node is GRAPH.apply("-", GRAPH.number(1.0), times(name("share"), 0.01))


def test_a_point_on_a_scale_is_scaled_and_shifted() -> None:
    assert low("T - Tc").node is GRAPH.apply("-", name("T"), GRAPH.apply("+", name("Tc"), GRAPH.number(273.15)))
    shifted = GRAPH.apply("+", times(name("Tf"), 5 / 9), GRAPH.number(float(Fraction(-160, 9))))
    assert low("max(Tc, Tf)").node is GRAPH.apply("max", name("Tc"), shifted)
    assert low("Tc + '9 delta_degF'").node is GRAPH.apply("+", name("Tc"), GRAPH.number(5.0))


def test_numbers_are_converted_exactly_and_rounded_once() -> None:
    assert low("T > '75 degC'").node is GRAPH.apply(">", name("T"), GRAPH.number(348.15))
    assert low("'75 degC' < T").node is GRAPH.apply("<", GRAPH.number(348.15), name("T"))
    assert low("joule + '0.1 kJ'").node is GRAPH.apply("+", name("joule"), GRAPH.number(100.0))
    assert low("minutes < '1 d' - '30 s'").node is GRAPH.apply("<", name("minutes"), GRAPH.number(1439.5))


def test_equal_factors_need_no_node() -> None:
    alike = scope({"x": "kJ/kg/K", "y": "J/g/delta_degC", "z": "kW s/(kg K)"})
    assert low("x + y + z", alike).node is GRAPH.apply("+", GRAPH.apply("+", name("x"), name("y")), name("z"))
    assert in_unit(parse("x"), low("x", alike), parse_unit("J/g/K"), GRAPH).node is name("x")


def test_a_shared_conversion_is_one_node() -> None:
    first, second = low("joule + kilo").node, low("min(joule, kilo)").node
    assert first.args[1] is second.args[1]


def test_a_whole_is_brought_to_the_unit_that_is_declared() -> None:
    tree = parse("kilo / hours")
    rate = in_unit(tree, low("kilo / hours"), parse_unit("J/min"), GRAPH)
    assert rate.node is times(low("kilo / hours").node, 1000 / 60)
    assert rate.unit.text == "J/min"
    rise = in_unit(parse("Tc - Tf"), low("Tc - Tf"), parse_unit("K"), GRAPH)
    assert rise.unit.temperature == "difference"
    with pytest.raises(ExpressionError, match="a difference, expected a temperature in degC"):
        in_unit(parse("Tc - Tf"), low("Tc - Tf"), parse_unit("degC"), GRAPH)
    with pytest.raises(ExpressionError, match="a temperature, expected a difference in delta_degC"):
        in_unit(parse("Tc"), low("Tc"), parse_unit("delta_degC"), GRAPH)
    assert in_unit(parse("Tc"), low("Tc"), parse_unit("K"), GRAPH).node is GRAPH.apply("+", name("Tc"), GRAPH.number(273.15))


def test_a_number_that_becomes_too_large_is_a_mistake() -> None:
    tiny = scope({"x": "1/Qm3"})
    with pytest.raises(ExpressionError, match="a finite number in") as caught:
        low("x + '1e300 1/qm3'", tiny)
    assert caught.value.offset == 4


HEAD = {"head": TableUnits(parse_unit("m3/s"), parse_unit("m")), "vapour": TableUnits(parse_unit("degC"), parse_unit("kPa"))}
PUMP = scope({"Q": "m3/s", "flow": "L/min", "T": "K", "width": "ft", "head_loss": "m"}, tables=HEAD)


def test_a_table_takes_its_argument_in_the_unit_of_its_points() -> None:
    typed = low("head(Q)", PUMP)
    assert typed.node is GRAPH.table("head", name("Q"))
    assert (typed.node.op, typed.node.value, typed.unit.text) == ("table", "head", "m")
    assert low("head(flow)", PUMP).node is GRAPH.table("head", times(name("flow"), 1 / 60_000))
    assert low("head('60 L/s')", PUMP).node is GRAPH.table("head", GRAPH.number(0.06))
    assert low("vapour(T)", PUMP).node is GRAPH.table("vapour", GRAPH.apply("+", name("T"), GRAPH.number(-273.15)))
    assert low("width - head(Q) / 2", PUMP).unit.text == "ft"


@pytest.mark.parametrize(
    ("text", "offset", "found", "expected", "remedy"),
    [
        ("head(width)", 5, "`width` in ft", "m3/s, in which the table `head` is given", ""),
        ("head(0.1)", 5, "`0.1` without unit", "m3/s", "'0.1 m3/s'"),
        ("2 * head", 4, "the table `head` without brackets", "a value", "head(x)"),
        ("head(Q, Q)", 0, "2 arguments in head( )", "1", ""),
        ("head(Q > '1 m3/s')", 5, "the condition", "a number", ""),
        ("haed(Q)", 0, "the unknown function `haed`", "a function", "did you mean `head`?"),
    ],
)
def test_mistakes_in_calls_of_tables(text: str, offset: int, found: str, expected: str, remedy: str) -> None:
    with pytest.raises(ExpressionError) as caught:
        low(text, PUMP)
    assert caught.value.offset == offset
    assert found in caught.value.found
    assert expected in caught.value.expected
    assert remedy in caught.value.remedy


OWN = Units(("person", "bed"))
WARD = Scope(
    {key: (GRAPH.name(key), parse_unit(unit, OWN)) for key, unit in {"ill": "person", "beds": "bed", "beta": "1/person/d"}.items()}, own=OWN
)


def test_counts_of_ones_own() -> None:
    assert low("ill + '3 persons'", WARD).unit.text == "person"
    assert low("beta * ill ** 2", WARD).unit.same(parse_unit("person/d", OWN))
    for text, remedy in (("ill > beds", ""), ("exp(ill)", "/ '1 person'"), ("ill + beta", "")):
        with pytest.raises(ExpressionError) as caught:
            low(text, WARD)
        assert remedy in caught.value.remedy
    with pytest.raises(ExpressionError) as caught:
        low("'1 1/d' * ill + beta * ill", WARD)
    assert caught.value.remedy == "is a factor missing, a number of person?"


# name -> value in SI, unit in SI, awkward unit
POOL = {
    "energy": {"E1": (5.2e4, "J", "kJ"), "E2": (7.1e4, "J", "kWh"), "E3": (3.3e4, "J", "cal")},
    "mass": {"m1": (2.5, "kg", "lb"), "m2": (3.75, "kg", "g")},
    "length": {"L1": (1.25, "m", "ft"), "L2": (2.75, "m", "mm"), "L3": (1.9, "m", "mi")},
    "time": {"t1": (4000.0, "s", "min"), "t2": (2500.0, "s", "d"), "t3": (6000.0, "s", "week")},
    "pressure": {"p1": (2.0e5, "Pa", "bar"), "p2": (1.4e5, "Pa", "psi"), "p3": (1.7e5, "Pa", "mmHg")},
    "none": {"x1": (0.37, "1", "%"), "x2": (0.21, "1", "ppm"), "angle": (0.5, "rad", "deg")},
    "flow": {"Q1": (2e-3, "m3/s", "L/h"), "Q2": (3e-3, "m3/s", "m3/min"), "Q3": (5e-3, "m3/s", "ft3/min")},
}
LITERALS = {
    "energy": ["'12 kJ'", "'0.02 kWh'"],
    "mass": ["'3 lb'", "'0.5 kg'"],
    "length": ["'7 in'", "'130 cm'"],
    "time": ["'1 h'", "'0.3 d'"],
    "pressure": ["'1 atm'", "'30 psi'"],
    "none": ["0.25", "'30 %'", "'20 deg'"],
    "flow": ["'150 L/min'", "'1.5e-3 m3/s'"],
}
SAME = [
    "({a}) + ({b})",
    "({a}) - 0.3 * min({a}, {b})",
    "max({a}, {b})",
    "where(({a}) > 0.61 * ({b}), {a}, {b})",
    "mod({a}, 9 * ({a}) + ({b}))",
]
SAME += ["abs(-({a}))", "({a}) * (1 + ({n}))", "({a}) / (1 + ({n}))", "sqrt(({a}) * ({b}))", "(({a}) ** 2 + ({b}) ** 2) / (({a}) + ({b}))"]
OTHER = {
    "energy": ["({mass}) * (({length}) / ({time})) ** 2", "({pressure}) * ({flow}) * ({time})", "({pressure}) * ({length}) ** 3"],
    "mass": ["({energy}) / (({length}) / ({time})) ** 2"],
    "length": ["sqrt(({flow}) * ({time}) / ({length}))", "(({flow}) * ({time})) ** (1 / 3)"],
    "time": ["({length}) ** 3 / ({flow})", "({energy}) / (({pressure}) * ({flow}))"],
    "pressure": ["({energy}) / ({length}) ** 3"],
    "none": [
        *("exp(-(({energy}) / (({energy}) + ({energy}))))", "sin(0.1 * ({none}) / (1 + ({none})))", "ln(2 + ({mass}) / ({mass}))"),
        *("atan2({length}, {length})", "(1 + ({none})) ** (1 / (1 + ({none})))", "tanh(({time}) / ({time}))", "({energy}) / ({energy})"),
    ],
    "flow": ["({length}) ** 3 / ({time})", "({energy}) / (({pressure}) * ({time}))"],
}


def text_of(draw: random.Random, kind: str, depth: int) -> str:
    """A random expression of one dimension, positive and without heavy cancellation."""
    if depth == 0 or draw.random() < 0.1:
        return draw.choice([*POOL[kind], *LITERALS[kind]])
    form = draw.choice(SAME) if draw.random() < 0.6 else draw.choice(OTHER[kind])
    inner = {key: text_of(draw, key, depth - 1) for key in POOL if "{" + key + "}" in form}
    return form.format(a=text_of(draw, kind, depth - 1), b=text_of(draw, kind, depth - 1), n=text_of(draw, "none", depth - 1), **inner)


ALL = {key: entry for pool in POOL.values() for key, entry in pool.items()}
PLAIN = scope({key: unit for key, (_, unit, _) in ALL.items()})
AWKWARD = scope({key: unit for key, (_, _, unit) in ALL.items()})
SI_UNIT = {"energy": "J", "mass": "kg", "length": "m", "time": "s", "pressure": "Pa", "none": "1", "flow": "m3/s"}


def exactly(value: float, unit: str, into: str) -> mpf:
    one, other = parse_unit(unit), parse_unit(into)
    exact = (Fraction(value) * one.factor + one.offset - other.offset) / other.factor
    return mpf(exact.numerator) / exact.denominator


@pytest.mark.parametrize("seed", range(20))
@pytest.mark.parametrize("kind", sorted(POOL))
def test_awkward_units_change_nothing(kind: str, seed: int) -> None:
    """140 expressions, each in SI and in awkward units: equal to 1e-12, at 50 digits, so that only the factors are rounded."""
    draw = random.Random(f"{kind} {seed}")
    with mp.workdps(50):
        si = {key: mpf(value) for key, (value, _, _) in ALL.items()}
        odd = {key: exactly(*entry) for key, entry in ALL.items()}
        text = text_of(draw, kind, 4)
        tree, unit = parse(text), parse_unit(SI_UNIT[kind])
        here, there = (in_unit(tree, low(text, where), unit, GRAPH).node for where in (PLAIN, AWKWARD))
        one, other = evaluate(GRAPH, here, si), evaluate(GRAPH, there, odd)
        assert mp.isfinite(one)
        assert one != 0
        assert abs(one - other) <= mpf("1e-12") * abs(one), text


TEMPERATURES = {"A": 350.0, "B": 320.5, "D": 12.5, "c": 2.1}
SCALES = [
    {"A": "degC", "B": "degF", "D": "delta_degF", "c": "kJ/kg/degF"},
    {"A": "degF", "B": "K", "D": "delta_degC", "c": "cal/g/degC"},
    {"A": "K", "B": "degC", "D": "delta_degF", "c": "J/kg/K"},
    {"A": "mK", "B": "degF", "D": "delta_degF", "c": "kJ/kg/K"},
]
THERMAL = [
    ("c * (A - B)", "kJ/kg"),
    ("c * (A - B - D)", "kJ/kg"),
    ("c * (A - (B + D))", "kJ/kg"),
    ("A - D", "K"),
    ("A + (A - B)", "K"),
    ("max(A, B) - min(A, B)", "K"),
    ("where(A > B, A - D, B)", "K"),
    ("where(A - B > D, c, 2 * c)", "kJ/kg/K"),
    ("where(B < '50 degC', D, '3 delta_degF')", "K"),
    ("min(A, '170 degF', '355 K') + D", "K"),
    ("exp(-(A - B) / D)", "1"),
]


@pytest.mark.parametrize("units", SCALES, ids=lambda units: units["A"] + " " + units["B"])
@pytest.mark.parametrize(("text", "unit"), THERMAL)
def test_temperatures_mean_the_same_on_any_scale(text: str, unit: str, units: dict[str, str]) -> None:
    plain = {"A": "K", "B": "K", "D": "delta_degC", "c": "kJ/kg/K"}
    with mp.workdps(50):
        si = {key: mpf(value) for key, value in TEMPERATURES.items()}
        odd = {key: exactly(value, plain[key], units[key]) for key, value in TEMPERATURES.items()}
        tree = parse(text)
        here, there = (in_unit(tree, low(text, scope(given)), parse_unit(unit), GRAPH).node for given in (plain, units))
        one, other = evaluate(GRAPH, here, si), evaluate(GRAPH, there, odd)
        assert abs(one - other) <= mpf("1e-12") * (abs(one) + 300), text  # shifts of some 300 K are rounded


def test_the_exact_unit_of_every_accepted_whole() -> None:
    units: list[Unit] = [low(text, AWKWARD).unit for text in ("E1 + E2", "E2 + E1", "E1 * m1", "Q1 * t1 + L1 ** 3")]
    assert [unit.text for unit in units] == ["kJ", "kWh", "kJ lb", "L min/h"]

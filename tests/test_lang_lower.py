"""Names, kinds and units of expressions: what is accepted with which unit, and how each mistake is told."""

from __future__ import annotations

from fractions import Fraction

import pytest
from hypothesis import given
from hypothesis import strategies as st
from mpmath import mp, mpf

from tests.oracle import evaluate
from uq.errors import ExpressionError
from uq.lang.graph import Graph
from uq.lang.lower import Scope, Typed, in_unit, lower, require_truth
from uq.lang.parser import parse
from uq.units import NONE, Unit, parse_unit

UNITS = {
    "T": "K",
    "cold": "K",
    "Tc": "degC",
    "Tc2": "degC",
    "Tf": "degF",
    "dT": "K",
    "dF": "delta_degF",
    "mass": "kg",
    "cp": "kJ/kg/K",
    "q": "kJ/kg",
    "E": "J",
    "heat": "kJ/min",
    "k0": "1/min",
    "activation": "kJ/mol",
    "gas": "kJ/mol/K",
    "x": "1",
    "share": "%",
    "angle": "deg",
    "phi": "rad",
    "L": "m",
    "width": "ft",
    "time": "min",
}
GRAPH = Graph()
SCOPE = Scope(
    {name: (GRAPH.name(name), parse_unit(unit)) for name, unit in UNITS.items()},
    barred={"level": "a start may use parameters only"},
    time_unit=parse_unit("min"),
)
PLAIN = Scope({name: (GRAPH.name(name), NONE) for name in UNITS}, unitless=True)


def low(text: str, scope: Scope = SCOPE) -> Typed:
    return lower(parse(text), scope, GRAPH)


@pytest.mark.parametrize(
    ("text", "unit"),
    [
        ("k0 * exp(-activation / (gas * T))", "1/min"),
        ("mass * cp * (T - cold)", "kJ"),
        ("mass * q * k0 * (1 - x)", "kJ/min"),
        ("heat / (mass * cp)", "K/min"),
        ("T - '273.15 K'", "K"),
        ("'12 kJ/kg' * mass", "kJ"),
        ("Tc - Tc2", "K"),
        ("Tc + dT", "degC"),
        ("dT + Tc", "degC"),
        ("Tc - '5 delta_degC'", "degC"),
        ("Tc + 0", "degC"),
        ("Tf - Tf", "delta_degF"),
        ("Tf - dF", "degF"),
        ("(Tc - Tc2) * cp * mass", "kJ"),
        ("max(Tc, Tc2, '20 degC')", "degC"),
        ("where(Tc > '75 degC', Tc, Tc2)", "degC"),
        ("where(x > 0, T, 0)", "K"),
        ("min(0, heat)", "kJ/min"),
        ("0 + 0 - T", "K"),
        ("abs(-T)", "K"),
        ("L ** 2", "m2"),
        ("L ** 0.5 * sqrt(L)", "m"),
        ("L ** (1 / 3)", "m**(1/3)"),
        ("sqrt(L ** 2 + L * L) ** 3", "m3"),
        ("L ** -1.5", "1/m**(3/2)"),
        ("x ** x", "1"),
        ("(T / cold) ** x", "1"),
        ("atan2(L, '2 m')", "1"),
        ("sin(phi) + cos(2 * pi * x)", "1"),
        ("angle * '0.017453292519943295 rad/deg'", "rad"),
        ("mod(time, '1440 min')", "min"),
        ("share / '100 %'", "1"),
        ("mass * q + E", "kJ"),
        ("E - mass * q", "J"),
        ("'5 h' + time", "h"),
        ("1 + share", "1"),
        ("share - 1", "%"),
        ("min(width, L)", "ft"),
        ("where(x > 0, 0, max(0, L, width))", "m"),
        ("mod(time, '1 d')", "min"),
        ("x ** share", "1"),
        ("share ** x", "1"),
        ("L ** '200 %'", "m2"),
        ("atan2(width, L)", "1"),
        ("sin(angle) + exp(-E / (mass * q)) + tanh(share)", "1"),
        ("Tc - Tf", "K"),
        ("Tf - Tc", "delta_degF"),
        ("T - Tc", "K"),
        ("Tc + dF", "degC"),
        ("dF + Tc", "degC"),
        ("Tc - dF", "degC"),
        ("Tc - dT", "K"),
        ("k0 * (Tc - cold)", "K/min"),
        ("Tc - (T - cold)", "K"),
        ("Tc - (Tc - Tc2) / 2", "degC"),
        ("Tc - (Tf - Tc) * x", "degC"),
        ("max(Tc, T, Tf)", "degC"),
        ("min(T, Tf)", "K"),
        ("'1000 L' / '1 m3'", "L/m3"),
        ("pi * L ** 2", "m2"),
    ],
)
def test_units_follow_from_what_it_is_made_of(text: str, unit: str) -> None:
    typed = low(text)
    assert typed.unit.same(parse_unit(unit))
    assert not typed.truth


@pytest.mark.parametrize(
    "text",
    ["T > cold", "Tc <= '75 degC'", "T > 0", "0 < L and not (x >= 1 or 2 < 3)", "Tc - Tc2 < dT", "Tc > T", "'75 degC' < T", "T - Tf > dF"],
)
def test_conditions_are_truth_values_without_unit(text: str) -> None:
    typed = low(text)
    assert typed.truth
    assert typed.unit.is_none


MISTAKES = [
    # text, offset, length, parts of found, of expected, of the remedy
    ("mass * q + heat", 11, 4, "`heat` in kJ/min", "kJ, as `mass * q` has", "is a factor missing, a time?"),
    ("E - q", 4, 1, "`q` in kJ/kg", "J, as `E` has", "is a factor missing, a mass?"),
    ("heat - mass * q", 7, 8, "`mass * q` in kJ", "kJ/min, as `heat` has", "is it to be divided by a time?"),
    ("E + activation", 4, 10, "`activation` in kJ/mol", "J, as `E` has", "an amount of substance?"),
    ("L + x", 4, 1, "`x` without unit", "m, as `L` has", "is a factor missing, a length?"),
    ("exp(-activation / T)", 4, 15, "in kJ/mol/K", "no unit in exp( )", "is it to be divided by a gas constant? or divide it"),
    ("sin(L)", 4, 1, "`L` in m", "no unit in sin( )", "/ '1 m'"),
    ("E + 1 + T", 4, 1, "`1` without unit", "J, as `E` has", "write '1 J' in quotes"),
    ("T - 273.15", 4, 6, "`273.15` without unit", "K", "'273.15 K'"),
    ("exp(T)", 4, 1, "`T` in K", "no unit in exp( )", "/ '1 K'"),
    ("ln(k0)", 3, 2, "`k0` in 1/min", "no unit in ln( )", "/ '1 1/min'"),
    ("share + L", 8, 1, "`L` in m", "% (a factor of 0.01), as `share` has", "/ '1 m'"),
    ("min(x, L)", 7, 1, "`L` in m", "no unit, as `x` has", "/ '1 m'"),
    ("L < T", 4, 1, "`T` in K", "m, as `L` has", ""),
    ("where(x > 0, L, T)", 16, 1, "`T` in K", "m, as `L` has", ""),
    ("atan2(L, x)", 9, 1, "`x` without unit", "m", "a length?"),
    ("mod(time, 24)", 10, 2, "`24` without unit", "min", "'24 min'"),
    ("'5 h' + L", 8, 1, "`L` in m", "h, as `'5 h'` has", "is it to be divided by a velocity?"),
    ("x ** L", 5, 1, "the exponent `L` in m", "without unit", "/ '1 m'"),
    ("L ** x", 0, 1, "`L` in m", "a base without unit", "/ '1 m'"),
    ("L ** 0.123456789", 5, 11, "the exponent", "simple fraction", ""),
    ("L ** 1e6", 5, 3, "the exponent", "at most 100", ""),
    ("(((L ** 100) ** 100) ** 100) ** 100", 1, 19, "beyond all measure", "powers up to", ""),
    ("Tc * 2", 0, 2, "`Tc` in degC", "a temperature in K", "use K"),
    ("-Tc", 1, 2, "`Tc` in degC", "in K", "use K"),
    ("exp(Tc)", 4, 2, "`Tc` in degC", "in K", "use K"),
    ("Tc ** 2", 0, 2, "`Tc` in degC", "in K", "use K"),
    ("Tc / Tc2", 0, 2, "`Tc` in degC", "in K", "use K"),
    ("Tc + Tc2", 0, 8, "a sum of two temperatures", "a difference", "use K"),
    ("dF - Tc", 0, 7, "a difference minus a temperature", "first", "use K"),
    ("0 - Tc", 0, 6, "a difference minus a temperature", "first", "use K"),
    ("(T - cold) - Tc", 0, 15, "a difference minus a temperature", "first", "use K"),
    ("Tc > Tc2 - dT", 5, 8, "`Tc2 - dT` in K, a temperature or a difference", "a temperature in degC", "write delta_degC"),
    ("Tc + E", 5, 1, "`E` in J", "K, the difference by which", ""),
    ("Tc > dF", 5, 2, "`dF` in delta_degF, a difference", "a temperature in degC, as `Tc` has", "use K"),
    ("Tc > T - cold", 5, 8, "in K, a temperature or a difference", "a temperature in degC, as `Tc` has", "use K"),
    ("Tc - Tc2 > Tc", 11, 2, "`Tc` in degC, a temperature", "a difference in K, as `Tc - Tc2` has", ""),
    ("Tc > E", 5, 1, "`E` in J", "degC, as `Tc` has", ""),
    ("'5 K' < L", 0, 5, "`'5 K'` in K", "m, as `L` has", ""),
    ("Tc - Tc2 + E", 11, 1, "`E` in J", "K, as `Tc - Tc2` has", ""),
    ("Tc + 5", 5, 1, "`5` without unit", "K, the difference", "'5 K'"),
    ("2 * '3 C'", 4, 5, "`C`", "a unit", "degC"),
    ("2 * '3 persn'", 4, 9, "the unknown unit `persn`", "a unit", ""),
    ("tempreature + 1", 0, 11, "the unknown name `tempreature`", "a name", ""),
    ("2 * actvation", 4, 9, "the unknown name `actvation`", "a name", "did you mean `activation`?"),
    ("level * 2", 0, 5, "`level`", "may stand here", "parameters only"),
    ("leve * 2", 0, 4, "the unknown name `leve`", "a name", "did you mean `level`?"),
    ("true", 0, 4, "the unknown name `true`", "a name", "write 1 > 0"),
    ("exp", 0, 3, "function `exp` without brackets", "a value", "exp(x)"),
    ("sine(x)", 0, 4, "unknown function `sine`", "a function", "did you mean `sin`?"),
    ("zeta(x)", 0, 4, "unknown function `zeta`", "a function", "exp, ln"),
    ("k0(x)", 0, 2, "`k0` before a bracket", "a function", "k0 * ( )"),
    ("min(T)", 0, 3, "1 argument in min( )", "2 or more", ""),
    ("exp(x, x)", 0, 3, "2 arguments in exp( )", "1", ""),
    ("where(x, 1)", 0, 5, "2 arguments in where( )", "3", ""),
    ("1 + highest(T)", 4, 7, "`highest( )`", "at one time", "`take`"),
    ("first_time(x > 1)", 0, 10, "`first_time( )`", "built", "not available yet"),
    ("where(x, 1, 2)", 6, 1, "the number `x`", "a condition first in where", "x > 0"),
    ("x > 0 and T", 10, 1, "the number `T`", "a condition beside `and`", ""),
    ("not x", 4, 1, "the number `x`", "a condition", ""),
    ("(x < 1) + 1", 0, 7, "the condition `(x < 1)`", "a number", "where(condition, 1, 0)"),
    ("(x < 1) < 2", 0, 7, "the condition", "a number", "a < b and b < c"),
    ("exp(x < 1)", 4, 5, "the condition", "a number", ""),
    ("where(x > 0, x > 1, 1)", 13, 5, "the condition", "a number", ""),
]


@pytest.mark.parametrize(("text", "offset", "length", "found", "expected", "remedy"), MISTAKES)
def test_mistakes(text: str, offset: int, length: int, found: str, expected: str, remedy: str) -> None:
    with pytest.raises(ExpressionError) as caught:
        low(text)
    mistake = caught.value
    assert (mistake.offset, mistake.length) == (offset, length)
    assert found in mistake.found
    assert expected in mistake.expected
    assert remedy in mistake.remedy


def test_in_unit_names_the_term_and_what_it_is_for() -> None:
    tree = parse("mass * q")
    with pytest.raises(ExpressionError, match=r"`mass \* q` in kJ, expected K/min for the rate of `T`"):
        in_unit(tree, low("mass * q"), parse_unit("K/min"), GRAPH, "for the rate of `T`")
    assert in_unit(parse("0"), low("0"), parse_unit("K/min"), GRAPH).node is GRAPH.number(0.0)
    assert in_unit(tree, low("mass * q"), parse_unit("kJ"), GRAPH).node is low("mass * q").node
    with pytest.raises(ExpressionError, match="a number"):
        in_unit(parse("x > 0"), low("x > 0"), NONE, GRAPH)
    with pytest.raises(ExpressionError, match="a condition for a limit"):
        require_truth(tree, low("mass * q"), "for a limit")


def test_a_study_without_units_takes_plain_numbers_only() -> None:
    typed = low("exp(T) + E - 273.15 > Tc * 2", PLAIN)
    assert typed.truth
    with pytest.raises(ExpressionError, match="states no unit anywhere"):
        low("T - '273.15 K'", PLAIN)


def test_the_node_is_the_users_expression() -> None:
    assert low("T - cold").node is GRAPH.apply("-", GRAPH.name("T"), GRAPH.name("cold"))
    assert low("'3 kJ'").node is GRAPH.number(3.0)
    assert low("pi").node.value == pytest.approx(3.141592653589793, abs=0)
    assert low("max(x, 1, 2)").node is GRAPH.apply("max", GRAPH.name("x"), GRAPH.number(1), GRAPH.number(2))


def test_long_flat_sums_are_lowered() -> None:
    typed = low("-".join(["T"] * 5000))
    assert typed.unit.text == "K"
    assert len(GRAPH.order((typed.node,))) == 5000
    with pytest.raises(ExpressionError) as caught:
        low("+".join(["T"] * 4990) + "+E")
    assert caught.value.offset == 9980


BASES = ("K", "kg", "m", "mol", "s")
MEASURED = ("T", "cold", "mass", "cp", "q", "E", "heat", "k0", "activation", "gas", "x", "L", "time")


@st.composite
def sized(draw: st.DrawFn, depth: int = 4) -> str:
    if depth == 0 or draw(st.integers(0, 4)) == 0:
        return draw(st.sampled_from(MEASURED))
    a, b = draw(sized(depth=depth - 1)), draw(sized(depth=depth - 1))
    form = draw(
        st.sampled_from(
            [
                "({a}) * ({b})",
                "({a}) / ({b})",
                "sqrt(abs({a}))",
                "({a}) ** (2 / 3)",
                "({a}) ** -2",
                "({a}) + 2 * ({a})",
                "({a}) * ({b}) - ({b}) * ({a}) / 3",
                "exp(({a}) / (3 * ({a})))",
                "({a}) * ln(2 + T / cold) ** x",
                "where(({a}) > 0, {a}, 0)",
                "max({a}, 0, -({a}))",
                "mod({a}, 2 * ({a}))",
                "({a}) + ({b})",
            ]
        )
    )
    return form.format(a=a, b=b)


@given(sized(), st.tuples(*(st.integers(2, 9) for _ in BASES)))
def test_an_accepted_expression_means_the_same_in_any_base_units(text: str, scales: tuple[int, ...]) -> None:
    """Measured in base units that are `scales` times smaller, every value grows by its dimension, and so must the result."""
    try:
        typed = low(text)
    except ExpressionError:
        return

    def growth(unit: Unit) -> mpf:
        powers = dict(unit.dimension)
        product = mpf(1)
        for base, scale in zip(BASES, scales, strict=True):
            power = powers.get(base, Fraction(0))
            product *= mpf(scale) ** (mpf(power.numerator) / power.denominator)
        return product

    values = {name: mpf(3 + place) / 4 for place, name in enumerate(MEASURED)}
    with mp.workdps(50):
        here = evaluate(GRAPH, typed.node, values)
        there = evaluate(GRAPH, typed.node, {name: value * growth(SCOPE.names[name][1]) for name, value in values.items()})
        if mp.isfinite(here) and mp.isfinite(there):
            # the exponent 2/3 is rounded to a double, so that a large power of a scale shows
            assert abs(there - here * growth(typed.unit)) <= abs(there) * mpf("1e-11")

"""Forty-odd mistakes of dimension, each told at the right term, and thirty mixtures of units that mean the right number.

Each row is one line of a study: what is declared, an expression, and the unit that stands where it is used.
"""

from __future__ import annotations

import pytest
from mpmath import mpf

from tests.oracle import LinearTable, evaluate
from uq.errors import ExpressionError
from uq.lang.graph import Graph
from uq.lang.lower import Scope, TableUnits, Typed, in_unit, lower
from uq.lang.parser import parse
from uq.units import Units, parse_quantity, parse_unit

GRAPH = Graph()
OWN = Units(("person", "mite", "leaf"))
TABLES = {"head": TableUnits(parse_unit("m3/s"), parse_unit("m"))}
HEAD = {"head": LinearTable((0.0, 0.1, 0.2), (78.0, 74.0, 62.0))}


def read(declared: str) -> tuple[Scope, dict[str, mpf]]:
    """'T = 300 K, m = 2 kg' as a scope and the values of its names."""
    names, values = {}, {}
    for each in declared.split(", "):
        name, _, text = each.partition(" = ")
        quantity = parse_quantity(text, OWN)
        assert quantity is not None, text
        names[name], values[name] = (GRAPH.name(name), quantity[1]), mpf(repr(quantity[0]))
    return Scope(names, own=OWN, tables=TABLES, time_unit=parse_unit("min")), values


def whole(declared: str, text: str, needed: str) -> tuple[Typed, dict[str, mpf]]:
    scope, values = read(declared)
    tree = parse(text)
    typed = lower(tree, scope, GRAPH)
    return (typed if needed == "condition" else in_unit(tree, typed, parse_unit(needed, OWN), GRAPH, "here")), values


HEATER = "T = 300 K, ambient = 290 K, mass = 4 t, cp = 2.1 kJ/kg/K, power = 5 kW, UA = 40 W/K"
TANK = "h = 2 m, A = 3 m2, Q = 10 L/min, g = 9.81 m/s2, d = 5 cm, rho = 1000 kg/m3"
REACTOR = "c = 50 mol/m3, k1 = 0.1 1/s, k2 = 0.2 L/mol/s, E = 50 kJ/mol, T = 300 K, R = 8.314 J/mol/K, V = 2 m3, Q = 3 L/s"
HERD = "N = 200 mite, S = 900 person, I = 12 person, beta = 0.4 1/d, contact = 3 1/person/d, area = 2 ha"
LOAD = "x = 1 m, v = 2 m/s, a = 3 m/s2, m = 5 kg, F = 20 N, stiff = 30 N/m, damp = 4 kg/s, phi = 20 deg, L = 8 m, g = 9.81 m/s2"

MISTAKES = [
    # declared, expression, unit needed, the term that is named, the unit that is told as needed, what the remedy says
    (HEATER, "power - UA * (T - ambient)", "K/min", "power - UA * (T - ambient)", "K/min", "divided by a heat capacity"),
    (HEATER, "(power - UA * (T - ambient)) / cp", "K/min", "(power - UA * (T - ambient)) / cp", "K/min", "divided by a mass"),
    (HEATER, "(power - UA * (T - ambient)) / mass", "K/min", "(power - UA * (T - ambient)) / mass", "K/min", "by a specific heat"),
    (HEATER, "(power - UA * T - ambient) / (mass * cp)", "K/min", "ambient", "kW, as `power` has", ""),
    (HEATER, "(power - UA) / (mass * cp)", "K/min", "UA", "kW, as `power` has", "a temperature"),
    (HEATER, "power / (mass * cp) * T", "K/min", "power / (mass * cp) * T", "K/min", "divided by a temperature"),
    (HEATER, "T - ambient", "K/min", "T - ambient", "K/min", "divided by a time"),
    (HEATER, "T > 350", "condition", "350", "K, as `T` has", "'350 K'"),
    (HEATER, "T > '350 s'", "condition", "'350 s'", "K, as `T` has", ""),
    (HEATER, "exp((T - ambient) * cp)", "1", "(T - ambient) * cp", "no unit in exp( )", "divided by a specific energy"),
    (HEATER, "mass * cp", "kJ", "mass * cp", "kJ", "is a factor missing, a temperature?"),
    (HEATER, "cp * (T - ambient)", "kJ", "cp * (T - ambient)", "kJ", "is a factor missing, a mass?"),
    (TANK, "-A * sqrt(2 * g * h) / A", "m3/h", "-A * sqrt(2 * g * h) / A", "m3/h", "is a factor missing, an area?"),
    (TANK, "Q / A - sqrt(g * h) * d", "m/min", "sqrt(g * h) * d", "L/min/m2, as `Q / A` has", "divided by a length"),
    (TANK, "sqrt(2 * g)", "m/s", "sqrt(2 * g)", "m/s", ""),
    (TANK, "Q - d ** 2 * sqrt(g)", "L/min", "d ** 2 * sqrt(g)", "L/min, as `Q` has", ""),
    (TANK, "rho * g * h + g", "bar", "g", "kg/m/s2, as `rho * g * h` has", ""),
    (TANK, "max(h, A)", "m", "A", "m, as `h` has", "divided by a length"),
    (TANK, "min(Q, '3 kg/s')", "L/s", "'3 kg/s'", "L/min, as `Q` has", "divided by a density"),
    (TANK, "head(h)", "m", "h", "m3/s, in which the table `head` is given", ""),
    (TANK, "head(Q) + Q", "m", "Q", "m, as `head(Q)` has", ""),
    (TANK, "where(h > d, Q, h)", "L/min", "h", "L/min, as `Q` has", ""),
    (REACTOR, "-k1 * c ** 2", "mol/m3/s", "-k1 * c ** 2", "mol/m3/s", "divided by a concentration"),
    (REACTOR, "-k2 * c", "mol/m3/s", "-k2 * c", "mol/m3/s", "is a factor missing, a concentration?"),
    (REACTOR, "-k1 * exp(-E / T) * c", "mol/m3/s", "-E / T", "no unit in exp( )", "divided by a gas constant"),
    (REACTOR, "-k1 * exp(-E / R) * c", "mol/m3/s", "-E / R", "no unit in exp( )", "/ '1 "),
    (REACTOR, "k1 * ln(c)", "1/s", "c", "no unit in ln( )", "/ '1 mol/m3'"),
    (REACTOR, "Q * c - k1 * c", "mol/s", "k1 * c", "L mol/s/m3, as `Q * c` has", "is a factor missing, a volume?"),
    (REACTOR, "c * V", "mol/m3", "c * V", "mol/m3", "divided by a volume"),
    (REACTOR, "2 ** T", "1", "T", "an exponent without unit", "/ '1 K'"),
    (REACTOR, "c ** (T / '300 K')", "mol/m3", "c", "a base without unit", "/ '1 mol/m3'"),
    (HERD, "beta * S * I", "person/d", "beta * S * I", "person/d", "divided by a number of person"),
    (HERD, "contact * S", "person/d", "contact * S", "person/d", "a number of person"),
    (HERD, "I > 30", "condition", "30", "person, as `I` has", "'30 person'"),
    (HERD, "N + I", "mite", "I", "mite, as `N` has", ""),
    (HERD, "N / area", "mite", "N / area", "mite", "is a factor missing, an area?"),
    (LOAD, "v + a", "m/s", "a", "m/s, as `v` has", "is a factor missing, a time?"),
    (LOAD, "x", "m/s", "x", "m/s", "divided by a time"),
    (LOAD, "-(stiff * x + damp * v)", "m/s2", "-(stiff * x + damp * v)", "m/s2", "divided by a mass"),
    (LOAD, "(F - stiff * x - damp * x) / m", "m/s2", "damp * x", "N, as `F` has", "divided by a time"),
    (LOAD, "-(g / L) * sin(x)", "1/s2", "x", "no unit in sin( )", "/ '1 m'"),
    (LOAD, "m * v ** 2 / 2 + m * a", "J", "m * a", "kg m2/s2, as `m * v ** 2 / 2` has", "is a factor missing, a length?"),
    (LOAD, "atan2(x, v)", "deg", "v", "m, as `x` has", "is a factor missing, a time?"),
    (LOAD, "x < v", "condition", "v", "m, as `x` has", "is a factor missing, a time?"),
    (LOAD, "F * v + F * x", "W", "F * x", "N m/s, as `F * v` has", "divided by a time"),
]


@pytest.mark.parametrize(("declared", "text", "needed", "term", "told", "remedy"), MISTAKES, ids=[row[1] for row in MISTAKES])
def test_the_right_term_is_named(declared: str, text: str, needed: str, term: str, told: str, remedy: str) -> None:
    with pytest.raises(ExpressionError) as caught:
        whole(declared, text, needed)
    mistake = caught.value
    assert text[mistake.offset : mistake.offset + mistake.length] == term
    assert f"`{term}`" in mistake.found
    assert mistake.expected.startswith(told)
    assert remedy in mistake.remedy
    assert bool(remedy) == bool(mistake.remedy)


def test_there_are_forty_mistakes_and_twenty_mixtures() -> None:
    assert len(MISTAKES) >= 40
    assert len(ACCEPTED) >= 20


ACCEPTED = [
    # declared, expression, unit needed, value in it
    (HEATER, "(power - UA * (T - ambient)) / (mass * cp)", "K/min", 4600 * 60 / 8.4e6),
    (HEATER, "power + UA * (T - ambient)", "kJ/h", 5400 * 3.6),
    (HEATER, "UA * (T - '20 degC')", "W", 40 * 6.85),
    (HEATER, "T > '26 degC'", "condition", True),
    (HEATER, "max(T, '100 degF')", "degC", 340 / 9),
    (HEATER, "mass * cp * '3 delta_degF'", "MJ", 14.0),
    ("T = 80 degC, ambient = 68 degF, k = 0.5 1/h", "-k * (T - ambient)", "K/min", -0.5),
    ("T = 80 degC, ambient = 293.15 K, k = 0.5 1/h", "-k * (T - ambient)", "degC/min", -0.5),
    (TANK, "Q / A - d / '1 min'", "mm/s", (1 / 6000 / 3 - 0.05 / 60) * 1000),
    (TANK, "rho * g * h + '1 atm'", "bar", (19620 + 101325) / 1e5),
    (TANK, "sqrt(2 * g * h) + '3 km/h'", "m/s", 39.24**0.5 + 3 / 3.6),
    (TANK, "head('6000 L/min') - h", "ft", 72 / 0.3048),
    (TANK, "head(Q) / (h + d)", "1", (78 - 4 / 600) / 2.05),
    (TANK, "min(h, d, '1 in')", "cm", 2.54),
    (TANK, "Q * '2 h' - A * d", "L", 1050.0),
    (REACTOR, "-k2 * c ** 2", "mol/m3/s", -0.5),
    (REACTOR, "-k2 * c ** 2 + Q / V * c", "mol/L/h", (-0.5 + 0.075) * 3.6),
    (REACTOR, "k1 * c + k2 * c ** 2", "mmol/L/min", 5.5 * 60),
    (REACTOR, "ln(c / '1 mol/L')", "1", -2.995732273553991),
    (REACTOR, "E / (R * T)", "%", 50000 / (8.314 * 300) * 100),
    (HERD, "beta * S * I / (S + I)", "person/h", 0.4 * 900 * 12 / 912 / 24),
    (HERD, "N / area", "mite/m2", 0.01),
    (HERD, "contact * S * I * '1 week'", "person", 3 * 900 * 12 * 7.0),
    (HERD, "(1 + '5 %') * I > '12.5 persons'", "condition", True),
    (LOAD, "x + v * '1 min' + a * '1 h' ** 2 / 2", "km", (1 + 120 + 1.5 * 3600**2) / 1000),
    (LOAD, "-(g / L) * sin(phi) - damp / m * '1 1/min'", "1/s2", -9.81 / 8 * 0.3420201433256687 - 0.8 / 60),
    (LOAD, "atan2(x, '1000 mm')", "deg", 45.0),
    (LOAD, "phi + '0.1 rad'", "deg", 20 + 5.729577951308232),
    (LOAD, "F * v + m * g * v", "hPa L/ms", (40 + 98.1) / 100),
    (LOAD, "where(x < '3 ft', stiff * x, F)", "kgf", 20 / 9.80665),
]


@pytest.mark.parametrize(("declared", "text", "needed", "value"), ACCEPTED, ids=[row[1] for row in ACCEPTED])
def test_mixed_units_are_converted(declared: str, text: str, needed: str, value: float | bool) -> None:
    typed, values = whole(declared, text, needed)
    found = evaluate(GRAPH, typed.node, values, tables=HEAD)
    assert found is value if isinstance(value, bool) else float(found) == pytest.approx(value, rel=1e-12)

"""Units in whole studies: forty mistakes told at the right term, twenty mixtures that give the right number, and SI against awkward units.

Numbers come out of compiled solving at a relative tolerance of 1e-12; those expected are closed forms, worked out here in SI units.
"""

from __future__ import annotations

import math
from dataclasses import replace
from typing import NamedTuple

import numpy as np
import pytest

from tests.small_studies import mistakes
from uq.model.build import build
from uq.solve.batch import Settings, Status
from uq.solve.compile import compile_code
from uq.solve.scales import pilot_scales
from uq.solve.solve import solve
from uq.study.read import parse_study
from uq.study.study import Study
from uq.units import parse_unit

# `factor` is an uncertain number without unit whose median is 1: a study needs one.
OPENING = 'schema = 1\n[parameters.factor]\nunit = "1"\nuniform = { low = 0.5, high = 1.5 }\n'


def study_of(time: str, states: str, parameters: str = "", more: str = "") -> str:
    """A study of `name | unit | start | rate` and `name = quantity` lines."""
    unit, stop = time.split("|")
    text = OPENING + f'[time]\nunit = "{unit.strip()}"\nstop = {stop.strip()}\npoints = 3\n'
    for line in parameters.split(","):
        name, _, value = line.partition("=")
        text += f'[parameters.{name.strip()}]\nvalue = {value.split()[0]}\nunit = "{" ".join(value.split()[1:])}"\n' if name.strip() else ""
    for line in states.strip().split("\n"):
        name, own, start, rate = (part.strip() for part in line.split("|"))
        text += f'[states.{name}]\nunit = "{own}"\nstart = {start}\nrate = "{rate}"\n'
    return text + more


def solved(study: Study) -> tuple[np.ndarray, np.ndarray, np.ndarray]:
    """Watched values at the stop, outcomes, and whether each limit is passed at the stop, all inputs at their median."""
    settings = Settings(1e-12, np.full(len(study.states), 1.0), study.lowest, study.highest)
    batch = solve(compile_code(build(study.equations)), study.inputs.medians(), study.times.solved, study.time.start, settings)
    assert Status(int(batch.status[0])) == Status.ok
    return batch.values[0, :, -1], batch.outcomes[0], batch.conditions[0, :, -1]


class Mixture(NamedTuple):
    """A study with mixed units, and what its first state (or outcome) comes to in `unit`."""

    what: str
    text: str
    value: float
    unit: str


POUND, GALLON, POUND_FORCE, PSI = 0.45359237, 3.785411784e-3, 4.4482216152605, 6894.757293168361
MIXTURES = (
    Mixture("flows of L/h and m3/min", study_of("h | 2", "V | m3 | 1 | fill - drain", "fill = 300 L/h, drain = 0.001 m3/min"), 1.48, "m3"),
    Mixture(
        "gallons into liters",
        study_of("min | 10", 'V | L | "20 US_liquid_gallon" | fill', "fill = 1 US_liquid_gallon/min"),
        30e3 * GALLON,
        "L",
    ),
    Mixture(
        "kW against kcal and pounds",
        study_of("min | 30", "T | K | 290 | heat / (mass * cp)", "heat = 2 kW, mass = 10 lb, cp = 1 kcal/kg/K"),
        290 + 2000 * 1800 / (10 * POUND * 4184),
        "K",
    ),
    Mixture("a sum of J and kJ", study_of("s | 10", "E | kJ | 0 | a + b", "a = 200 J/s, b = 3 kW"), 32.0, "kJ"),
    Mixture(
        "degC state, K room",
        study_of("h | 1", "T | degC | 80 | -cooling * (T - room)", "cooling = 0.02 1/min, room = 293.15 K"),
        20 + 60 * math.exp(-1.2),
        "degC",
    ),
    Mixture(
        "degF state, degC room",
        study_of("h | 1", "T | degF | 176 | -cooling * (T - room)", "cooling = 0.02 1/min, room = 20 degC"),
        68 + 108 * math.exp(-1.2),
        "degF",
    ),
    Mixture("a half-life in days", study_of("h | 36", "N | 1 | 1 | -N * ln(2) / half", "half = 1.5 day"), 0.5, "1"),
    Mixture("pressure of psi and bar", study_of("min | 5", "p | bar | 1 | leak", "leak = 0.2 psi/s"), 1 + 60e-5 * PSI, "bar"),
    Mixture(
        "a force of lbf on a mass in g",
        study_of("s | 2", "v | m/s | 0 | pull / mass", "pull = 1 lbf, mass = 500 g"),
        4 * POUND_FORCE,
        "m/s",
    ),
    Mixture("speed of km/h, way of miles", study_of("min | 30", "x | mile | 0 | speed", "speed = 100 km/h"), 50 / 1.609344, "mile"),
    Mixture("growth of % per year", study_of("day | 365.25", "N | 1 | 100 | rate * N", "rate = 5 %/yr"), 100 * math.exp(0.05), "1"),
    Mixture("a course of mg/L over m3/h", study_of("h | 3", "m | g | 0 | flow * content", "flow = 2 m3/h, content = 30 mg/L"), 180.0, "g"),
    Mixture(
        "angles of degrees",
        study_of("s | 1", "x | m | 0 | speed * sin(slope * '0.017453292519943295 rad/deg')", "speed = 4 m/s, slope = 30 deg"),
        2.0,
        "m",
    ),
    Mixture(
        "a table of L/s asked in m3/h",
        study_of(
            "s | 10",
            "h | m | 0 | head(flow) / wait",
            "flow = 0.36 m3/h, wait = 1 min",
            '[tables.head]\nof = { unit = "L/s" }\nunit = "cm"\nrows = [[0, 0], [1, 600]]\n',
        ),
        0.1,
        "m",
    ),
    Mixture(
        "a forcing of degF",
        study_of(
            "h | 2",
            "Q | kWh | 0 | UA * (warm - '0 degC')",
            "UA = 1 kW/K",
            '[forcings.warm]\nunit = "degF"\nrows = [[0, 50], ["120 min", 50]]\n',
        ),
        20.0,
        "kWh",
    ),
    Mixture("the larger of bar and kPa", study_of("s | 1", "p | Pa | 0 | max(high, low) / '1 s'", "high = 1 bar, low = 99 kPa"), 1e5, "Pa"),
    Mixture("a start of other units", study_of("s | 1", 'E | kJ | "mass * speed ** 2" | 0', "mass = 2 t, speed = 36 km/h"), 200.0, "kJ"),
    Mixture(
        "people of one's own",
        study_of("week | 2", "I | person | 10 | contacts * I * share", "contacts = 0.5 1/day, share = 20 %", '[units]\nperson = "new"\n'),
        10 * math.exp(1.4),
        "1",
    ),
    Mixture(
        "where one branch is in ft",
        study_of("min | 1", "x | m | 0 | where(time > '30 s', fast, slow)", "fast = 600 ft/min, slow = 0 m/s"),
        91.44,
        "m",
    ),
    Mixture(
        "modulo of hours and minutes",
        study_of("min | 60", "x | s | 0 | mod(shift, day_) / day_ * '1 s/min'", "shift = 90 min, day_ = 1 h"),
        30.0,
        "s",
    ),
    Mixture(
        "a resistance and a capacity",
        study_of("ms | 5", "U | V | 10 | -U / (R * C)", "R = 2 kohm, C = 2.5 microfarad"),
        10 * math.exp(-1),
        "V",
    ),
)


@pytest.mark.parametrize("case", MIXTURES, ids=[case.what for case in MIXTURES])
def test_mixed_units_give_the_right_number(case: Mixture) -> None:
    study = parse_study(case.text)
    values, _, _ = solved(study)
    own = parse_unit(study.watched[0].unit, study.own_units)
    found = values[0] if study.own_units.names else own.convert(float(values[0]), parse_unit(case.unit))
    assert found == pytest.approx(case.value, rel=1e-9)


def test_there_are_twenty_mixtures_and_forty_mistakes() -> None:
    assert len(MIXTURES) >= 20
    assert len(MISTAKES) >= 40


SI = """
schema = 1
[time]
unit = "s"
stop = 43200
every = 3600
[states.T]
unit = "K"
start = { normal = { mean = 303.0, sd = 1.5 } }
rate = "(heat - loss) / (mass * cp)"
[states.x]
unit = "1"
start = 0
rate = "k * (1 - x)"
[parameters]
mass = "4000 kg"
cp = "2100 J/kg/K"
gas = "8.314462618 J/mol/K"
q = { unit = "J/kg", normal = { mean = 190000, sd = 9500 } }
k0 = { unit = "1/s", lognormal = { median = 1.2e11, gsd = 1.3 } }
activation = { unit = "J/mol", normal = { mean = 98000, sd = 1200 } }
UA = { unit = "W/K", triangular = { low = 36, mode = 66, high = 150 } }
inflow = "1e-6 m3/s"
[terms]
k = "k0 * exp(-activation / (gas * T))"
heat = { value = "mass * q * k * (1 - x)", unit = "W" }
loss = "UA * (T - air) + flowing(inflow) * (T - air)"
[forcings.air]
unit = "K"
rows = [[0, 291.15], [14400, 297.15], [43200, 288.15]]
[tables.flowing]
of = { unit = "m3/s" }
unit = "W/K"
rows = [[0, 0], [2e-6, 12]]
[outcomes.peak]
unit = "K"
take = "highest(T)"
[outcomes.lost]
unit = "J"
take = "integral(loss, 3600, 36000) + heat_once * final(x)"
[parameters.heat_once]
unit = "J"
value = 1.8e6
[limits.hot]
when = "T > 318.15 * kelvin or heat > 3000 * watt"
[parameters.kelvin]
unit = "K"
value = 1
[parameters.watt]
unit = "W"
value = 1
[plan]
watch = ["T", "x", "heat", "loss"]
"""
AWKWARD = """
schema = 1
[time]
unit = "h"
stop = "720 min"
every = 1
[states.T]
unit = "degF"
start = { normal = { mean = "303.0 K", sd = "1.5 K" } }
rate = "(heat - loss) / (mass * cp)"
[states.x]
unit = "%"
start = 0
rate = "k * (1 - x)"
[parameters]
mass = "4 t"
cp = { unit = "kcal/lb/delta_degF", value = "2.1 kJ/kg/K" }
gas = { unit = "cal/mol/K", value = "8.314462618e-3 kJ/mol/K" }
q = { unit = "BTU/lb", normal = { mean = "190 kJ/kg", sd = "9.5 MJ/t" } }
k0 = { unit = "1/min", lognormal = { median = "1.2e11 1/s", gsd = 1.3 } }
activation = { unit = "kcal/mol", normal = { mean = "98 kJ/mol", sd = "1.2 kJ/mol" } }
UA = { unit = "kJ/min/delta_degF", triangular = { low = "36 W/K", mode = "66 W/K", high = "150 W/K" } }
inflow = "3.6 L/h"
[terms]
k = "k0 * exp(-activation / (gas * absolute))"
absolute = { value = "T", unit = "K" }
heat = { value = "mass * q * k * (1 - x)", unit = "kcal/min" }
loss = "UA * (T - air) + flowing(inflow) * (absolute - air)"
[forcings.air]
unit = "degC"
rows = [[0, 18], ["4 h", 24], ["43200 s", "288.15 K"]]
[tables.flowing]
of = { unit = "mL/min" }
unit = "kcal/h/K"
rows = [[0, 0], ["2e-6 m3/s", "12 W/K"]]
[outcomes.peak]
unit = "degC"
take = "highest(T)"
[outcomes.lost]
unit = "kWh"
take = "integral(loss, '60 min', 10) + heat_once * final(x)"
[parameters.heat_once]
unit = "kWh"
value = "1800 kJ"
[limits.hot]
when = "T > '45 degC' or heat > '180 kJ/min'"
[plan]
watch = ["T", "x", "heat", "loss"]
"""


def test_a_study_in_si_units_and_the_same_in_awkward_ones_agree() -> None:
    plain, awkward = parse_study(SI), parse_study(AWKWARD)
    found = []
    u = np.random.default_rng(20261201).uniform(size=(16, len(plain.inputs.items)))
    for study in (plain, awkward):
        settings = Settings(1e-11, np.ones(2), study.lowest, study.highest)
        batch = solve(compile_code(build(study.equations)), study.inputs.values(u), study.times.solved, study.time.start, settings)
        assert np.all(batch.status == Status.ok)
        values = batch.values[:, :4]
        for place, quantity in enumerate((*study.watched, *study.outcome_quantities)):
            unit, wanted = parse_unit(quantity.unit), parse_unit((*plain.watched, *plain.outcome_quantities)[place].unit)
            factor, shift = unit.conversion(wanted)
            (values[:, place] if place < 4 else batch.outcomes[:, place - 4])[...] *= factor
            (values[:, place] if place < 4 else batch.outcomes[:, place - 4])[...] += shift
        found.append((values, batch.outcomes, batch.conditions))
    assert awkward.inputs.names == plain.inputs.names
    scale = np.max(np.abs(found[0][0]), axis=(0, 2))[None, :, None]
    assert np.max(np.abs(found[0][0] - found[1][0]) / scale) < 1e-9
    np.testing.assert_allclose(found[1][1], found[0][1], rtol=1e-9)
    np.testing.assert_array_equal(found[1][2], found[0][2])
    assert 0 < np.mean(found[0][2]) < 1


@pytest.mark.parametrize(("unit", "bound"), [("K", 1e-9), ("degF", 1e-6)])
def test_at_the_usual_accuracy_they_agree_too(unit: str, bound: float) -> None:
    """The steps are the same in all units that differ by a factor, that of the time among them. Where a state is counted from another zero
    (degF) they are not: the absolute tolerance is accuracy x the size of a state; there the two agree to the accuracy asked."""
    awkward = AWKWARD.replace('unit = "degF"', f'unit = "{unit}"', 1)
    found = []
    u = np.random.default_rng(20261202).uniform(size=(16, len(parse_study(SI).inputs.items)))
    for study in (parse_study(SI), parse_study(awkward)):
        compiled, x = compile_code(build(study.equations)), study.inputs.values(u)
        settings = Settings(1e-6, np.ones(2), study.lowest, study.highest)
        scales, _ = pilot_scales(compiled, x, study.times.solved, study.time.start, settings)
        batch = solve(compiled, x, study.times.solved, study.time.start, replace(settings, scales=scales))
        factor, shift = parse_unit(study.watched[0].unit).conversion(parse_unit(parse_study(SI).watched[0].unit))
        found.append(batch.values[:, 0] * factor + shift)
    assert np.max(np.abs(found[0] - found[1])) < bound * np.max(np.abs(found[0]))


TANK = study_of(
    "min | 60",
    "T | K | 320 | (heat - UA * (T - air)) / (mass * cp)\nh | m | 2 | (inflow - outflow) / area",
    "heat = 2 kW, UA = 40 W/K, air = 290 K, mass = 400 kg, cp = 2.1 kJ/kg/K, "
    "inflow = 3 L/min, outflow = 0.1 m3/h, area = 2 m2, limit = 350 K",
    '[outcomes.peak]\nunit = "K"\ntake = "highest(T)"\n[limits.hot]\nwhen = "T > limit"\nby = [30, 60]\n'
    '[terms]\nlevel = { value = "h / \'1 m\'", unit = "1" }\n',
)
#: what is written in place of what, the term and the units that the message must name
MISTAKES: tuple[tuple[str, str, tuple[str, ...]], ...] = (
    ("(heat - UA * (T - air)) / (mass * cp)", "heat - UA * (T - air)", ("`heat - UA * (T - air)` in kW", "K/min")),
    ("(heat - UA * (T - air)) / (mass * cp)", "(heat - UA * (T - air)) / cp", ("a mass",)),
    ("(heat - UA * (T - air)) / (mass * cp)", "(heat - UA * (T - air)) / mass", ("a specific heat",)),
    ("heat - UA * (T - air)", "heat - UA", ("`UA` in W/K", "kW, as `heat` has")),
    ("heat - UA * (T - air)", "heat - UA * T - air", ("`air` in K", "kW, as `heat` has")),
    ("heat - UA * (T - air)", "heat - (T - air)", ("`(T - air)` in K", "kW")),
    ("UA * (T - air)", "UA * (T - time)", ("`time` in min", "K, as `T` has")),
    ("UA * (T - air)", "UA * (T - 290)", ("`290` without unit", "'290 K'")),
    ("UA * (T - air)", "UA * (T - '290 s')", ("'290 s'", "K, as `T` has")),
    ("UA * (T - air)", "UA * exp(T - air)", ("`T - air` in K", "no unit in exp( )")),
    ("UA * (T - air)", "UA * ln(T / '1 s')", ("no unit in ln( )",)),
    ("UA * (T - air)", "UA * sqrt(T - air)", ("`UA * sqrt(T - air)`",)),
    ("UA * (T - air)", "UA * sin(h)", ("`h` in m", "no unit in sin( )")),
    ("UA * (T - air)", "max(UA, heat)", ("`heat` in kW", "W/K, as `UA` has")),
    ("UA * (T - air)", "min(heat, mass)", ("`mass` in kg", "kW, as `heat` has")),
    ("UA * (T - air)", "where(T > air, heat, UA)", ("`UA` in W/K", "kW, as `heat` has")),
    ("UA * (T - air)", "where(T > heat, heat, heat)", ("`heat` in kW", "K, as `T` has")),
    ("UA * (T - air)", "heat ** h", ("`h` in m", "an exponent without unit")),
    ("UA * (T - air)", "heat ** (h / area)", ("an exponent without unit",)),
    ("UA * (T - air)", "UA * atan2(h, T)", ("`T` in K", "m, as `h` has")),
    ("UA * (T - air)", "mod(heat, T)", ("`T` in K", "kW, as `heat` has")),
    ("(inflow - outflow) / area", "inflow - outflow", ("`inflow - outflow` in L/min", "m/min", "an area")),
    ("(inflow - outflow) / area", "inflow - outflow / area", ("`outflow / area`", "L/min, as `inflow` has")),
    ("(inflow - outflow) / area", "(inflow - mass) / area", ("`mass` in kg", "L/min, as `inflow` has")),
    ("(inflow - outflow) / area", "(inflow - outflow) * area", ("`(inflow - outflow) * area`",)),
    ("(inflow - outflow) / area", "area / time", ("`area / time`", "m/min")),
    ("(inflow - outflow) / area", "h", ("`h` in m", "a time")),
    ("(inflow - outflow) / area", "1", ("`1` without unit", "m/min")),
    ('take = "highest(T)"', 'take = "highest(h)"', ("`highest(h)` in m", "K as its `unit` says for the outcome `peak`")),
    ('take = "highest(T)"', 'take = "integral(T)"', ("`integral(T)` in K min", "a time")),
    ('take = "highest(T)"', 'take = "highest(T) - final(h)"', ("`final(h)` in m", "K, as `highest(T)` has")),
    ('take = "highest(T)"', "take = \"highest(T, '1 m', 60)\"", ("'1 m'", "min for a time")),
    ('when = "T > limit"', 'when = "T > mass"', ("`mass` in kg", "K, as `T` has")),
    ('when = "T > limit"', 'when = "T > limit or h > air"', ("`air` in K", "m, as `h` has")),
    ('when = "T > limit"', 'when = "T > 350"', ("`350` without unit", "'350 K'")),
    ("h / '1 m'", "h", ("`h` in m", "no unit")),
    ("h / '1 m'", "h / '1 C'", ("C", "degC")),
    ("h / '1 m'", "h / '1 bar(g)'", ("bar(g)", "absolute")),
    ("by = [30, 60]", 'by = [30, "60 m"]', ('"60 m", a quantity in m', "min")),
    ("start = 320", 'start = "2 kW"', ('"2 kW", a quantity in kW', "K")),
    ("start = 320", 'start = "air * 2 + mass"', ("`mass` in kg", "K, as `air * 2` has")),
    ("start = 320", 'start = "heat / UA * time"', ("`time`", "a start is made of parameters")),
    ("stop = 60", 'stop = "60 K"', ('"60 K", a quantity in K', "min")),
    ('unit = "kJ/kg/K"', 'unit = "kJ/kg K"', ("kJ/kg K", "reads in one way only")),
    ('unit = "K"\nstart', 'unit = "C"\nstart', ("`C`", "degC")),
)


@pytest.mark.parametrize(("old", "new", "named"), MISTAKES, ids=[new for _, new, _ in MISTAKES])
def test_mistakes_of_units_are_told_at_the_right_term(old: str, new: str, named: tuple[str, ...]) -> None:
    assert old in TANK
    found = mistakes(text=TANK.replace(old, new, 1))
    assert len(found) == 1
    assert all(word in found[0] for word in named), found[0]


def test_the_study_of_the_mistakes_has_none() -> None:
    assert parse_study(TANK).warnings == ("nothing uses the parameter `factor`", "nothing uses the term `level`")

"""Units: how they are written, that every factor is right, and what is refused with which remedy."""

from __future__ import annotations

import contextlib
import functools
import math
import subprocess
import sys
from fractions import Fraction

import pint
import pytest
from hypothesis import given
from hypothesis import strategies as st

from uq.errors import ValueMistake
from uq.units import NONE, Unit, Units, parse_quantity, parse_unit
from uq.units.rare import rare
from uq.units.table import HINTS, KNOWN, PREFIXES, SCALES, Known

SYMBOLS = [known.symbol for known in KNOWN]
# spelled differently there
IN_PINT = {"ohm": "ohm", "deg": "degree", "a": "year", "P": "poise", "St": "stokes", "M": "molar", "t": "metric_ton", "d": "day"}
PINT_PREFIX = dict(
    zip(
        PREFIXES,
        (
            *("quetta", "ronna", "yotta", "zetta", "exa", "peta", "tera", "giga", "mega", "kilo", "hecto", "deca"),
            *("deci", "centi", "milli", "micro", "nano", "pico", "femto", "atto", "zepto", "yocto", "ronto", "quecto"),
        ),
        strict=True,
    )
)


def value(unit: Unit) -> tuple[float, dict[str, Fraction]]:
    return float(unit.factor), dict(unit.dimension)


@pytest.mark.parametrize(
    ("text", "factor", "dimension"),
    [
        ("1", 1, {}),
        ("m3", 1, {"m": 3}),
        ("m**3", 1, {"m": 3}),
        ("m ** 3", 1, {"m": 3}),
        ("kJ/kg/K", 1e3, {"m": 2, "s": -2, "K": -1}),
        ("kJ kg-1 K-1", 1e3, {"m": 2, "s": -2, "K": -1}),
        ("kJ/(kg K)", 1e3, {"m": 2, "s": -2, "K": -1}),
        ("kJ*kg**-1*K**(-1)", 1e3, {"m": 2, "s": -2, "K": -1}),
        ("1/min", 1 / 60, {"s": -1}),
        ("min-1", 1 / 60, {"s": -1}),
        ("L/h", 1e-3 / 3600, {"m": 3, "s": -1}),
        ("%", 0.01, {}),
        ("mg/L", 1e-3, {"kg": 1, "m": -3}),
        ("W/m2/degC", 1, {"kg": 1, "s": -3, "K": -1}),
        ("degF/h", 5 / 9 / 3600, {"K": 1, "s": -1}),
        ("m**0.5", 1, {"m": Fraction(1, 2)}),
        ("m**(1/3)", 1, {"m": Fraction(1, 3)}),
        ("ug/m3", 1e-9, {"kg": 1, "m": -3}),
        ("µg/m3", 1e-9, {"kg": 1, "m": -3}),
        ("\u03bcg/m3", 1e-9, {"kg": 1, "m": -3}),
        ("hours", 3600, {"s": 1}),
        ("kWh", 3.6e6, {"kg": 1, "m": 2, "s": -2}),
        ("cP", 1e-3, {"kg": 1, "m": -1, "s": -1}),
        ("furlong", 201.168402336804672, {"m": 1}),
        ("kilogram", 1, {"kg": 1}),
    ],
)
def test_as_engineers_write_them(text: str, factor: float, dimension: dict[str, Fraction]) -> None:
    unit = parse_unit(text)
    assert unit.text == text
    assert float(unit.factor) == pytest.approx(factor, rel=1e-14)
    assert dict(unit.dimension) == dimension


@functools.cache
def registry_of_pint() -> pint.UnitRegistry[float]:
    return pint.UnitRegistry()


@pytest.mark.parametrize("line", KNOWN, ids=lambda line: line.symbol)
def test_every_line_of_the_table_against_pint(line: Known) -> None:
    registry = registry_of_pint()
    if line.symbol == "ppb":
        assert parse_unit("ppb").factor == parse_unit("ppm").factor / 1000  # not in pint
        return
    if line.symbol == "mmHg":
        assert float(parse_unit("mmHg").factor) == registry.Quantity(1, "millimeter_Hg").to_base_units().magnitude
        return
    prefixes = list(PREFIXES) if line.prefixes == "all" else line.prefixes.split()
    names = [(line.symbol, IN_PINT.get(line.symbol, line.symbol)), *((word, word) for word in line.words.split())]
    # pint's own short forms are not all clear (it takes mcd for a micro-day), its long names are
    long = registry.parse_unit_name(IN_PINT.get(line.symbol, line.symbol))[0][1]
    names += [(prefix + line.symbol, PINT_PREFIX[prefix] + long) for prefix in prefixes]
    for ours, theirs in names:
        if ours in SYMBOLS and ours != line.symbol:
            continue  # min, cd, Pa, ... are units of their own
        quantity = registry.Quantity(1.0, theirs).to_base_units()
        powers = {key.strip("[]"): power for key, power in quantity.dimensionality.items()}
        base = {"kg": "mass", "m": "length", "s": "time", "A": "current", "K": "temperature", "mol": "substance", "cd": "luminosity"}
        assert float(parse_unit(ours).factor) == pytest.approx(quantity.magnitude, rel=1e-13), ours
        assert {base[key]: float(power) for key, power in parse_unit(ours).dimension} == powers, ours


def test_ordinary_units_load_neither_pint_nor_dask() -> None:
    program = (
        "import sys; from uq.units import parse_unit, parse_quantity; parse_unit('kJ/kg/K'); parse_unit('degC'); parse_quantity('12 h');"
        "assert not {'pint', 'dask', 'numpy'} & set(sys.modules), sorted(sys.modules)"
    )
    subprocess.run([sys.executable, "-c", program], check=True, timeout=60)


REFUSED = [
    ("C", "degC"),
    ("F", "degF"),
    ("°C", "degC"),
    ("bar(g)", "absolute pressure"),
    ("barg", "absolute pressure"),
    ("", "write 1"),
    ("none", "write 1"),
    ("kJ/kg K", "kJ/(kg K)"),
    ("J/mol*K", "brackets"),
    ("m^3", "m3 or m**3"),
    ("m²", "**2"),
    ("m·s", "write *"),
    ("W/°C", "degC"),
    ("10 min", "write it with the value"),
    ("1000", "write it with the value"),
    ("2.5 m", "write it with the value"),
    ("person", "has the unit 1"),
    ("mites/m2", "has the unit 1"),
    ("KJ", "`kJ`"),
    ("Kg", "`kg`"),
    ("kpa", "`kPa`"),
    ("mpa", "`MPa` or `mPa`"),
    ("kJs", "`kJ s`"),
    ("celcius", "`celsius`"),
    ("mintues", "`minutes`"),
    ("Nm", "N m"),
    ("gal", "imperial_gallon"),
    ("ton", "short_ton"),
    ("rpm", "rad/s"),
    ("cfm", "ft3/min"),
    ("gravity", ""),
    ("k", "`K`"),
    ("dB", "logarithmic"),
    ("degRe", ""),
    ("m/", ""),
    ("/m", ""),
    ("(m", ""),
    ("m)", ""),
    ("m//s", ""),
    ("m0", ""),
    ("m**1000", ""),
    ("m**(1/0)", ""),
    ("((((((((((((m", ""),
    ("m" * 300, ""),
    ("a$", ""),
]


@pytest.mark.parametrize(("text", "remedy"), REFUSED)
def test_refused_with_a_remedy(text: str, remedy: str) -> None:
    with pytest.raises(ValueMistake) as caught:
        parse_unit(text)
    assert remedy in caught.value.remedy
    assert caught.value.found
    assert caught.value.expected


@given(st.text(alphabet="mkgJs1230/* -()^.%°²degC", max_size=20))
def test_any_text_gives_a_unit_or_a_mistake(text: str) -> None:
    try:
        unit = parse_unit(text)
    except ValueMistake:
        return
    assert unit.same(parse_unit(text))


def test_hints_and_units_do_not_overlap() -> None:
    assert not set(HINTS) & {form for known in KNOWN for form in (known.symbol, *known.words.split())}
    assert not set(HINTS) & set(SCALES)
    assert len(SYMBOLS) == len(set(SYMBOLS))


UNITS = st.sampled_from(["m", "kJ/kg/K", "1/min", "%", "bar", "m**(1/2)", "deg", "L/h", "degC/h", "1", "ppm", "mol m-3", "psi"]).map(
    parse_unit
)


@given(UNITS, UNITS, st.sampled_from([Fraction(2), Fraction(-1), Fraction(1, 2), Fraction(3, 2)]))
def test_arithmetic(one: Unit, other: Unit, power: Fraction) -> None:
    assert ((one * other) / other).same(one)
    assert (one / one).is_none
    assert (one * NONE).same(one)
    assert ((one**power) ** (1 / power)).same(one)
    assert ((one * other) ** power).same(one**power * other**power)
    for made in (one * other, one / other, one**power):
        assert parse_unit(made.text).same(made)


def test_composed_texts_read_well() -> None:
    heat = parse_unit("kJ/kg/K") * parse_unit("kg") * parse_unit("K") / parse_unit("min")
    assert heat.text == "kJ/min"
    assert (parse_unit("1") / parse_unit("s")).text == "1/s"
    assert (parse_unit("kJ") / parse_unit("J")).text == "kJ/J"
    assert (parse_unit("m") ** Fraction(1, 2)).text == "m**(1/2)"
    assert str(parse_unit("K") / parse_unit("K")) == "1"


def test_sameness_needs_dimension_factor_and_scale() -> None:
    assert parse_unit("kJ/kg/K").same(parse_unit("J/g/K"))
    assert parse_unit("kJ").same(parse_unit("kW s"))
    assert not parse_unit("kJ").same(parse_unit("J"))
    assert parse_unit("kJ").same_dimension(parse_unit("J"))
    assert not parse_unit("degC").same(parse_unit("K"))
    assert not parse_unit("degC").same(parse_unit("degF"))
    assert parse_unit("degC").difference().same(parse_unit("K"))
    assert parse_unit("degF").difference().same(parse_unit("delta_degF"))
    assert parse_unit("kJ").difference() is parse_unit("kJ")
    assert parse_unit("rad").is_none
    assert not parse_unit("deg").is_none
    assert not parse_unit("%").is_none


def test_a_temperature_scale_does_not_multiply() -> None:
    scale = parse_unit("degC")
    for wrong in (lambda: scale * NONE, lambda: NONE / scale, lambda: scale**2):
        with pytest.raises(ValueMistake, match="use K"):
            wrong()
    assert (scale.difference() / parse_unit("min")).same(parse_unit("K/min"))


@pytest.mark.parametrize(
    ("number", "unit", "into", "expected"),
    [
        (12, "h", "min", 720.0),
        (75, "degC", "K", 348.15),
        (348.15, "K", "degC", 75.0),
        (32, "degF", "degC", 0.0),
        (212, "degF", "K", 373.15),
        (2.5, "kJ/kg", "J/g", 2.5),
        (50, "%", "1", 0.5),
        (1, "atm", "bar", 1.01325),
        (0.1, "m3", "L", 100.0),
        (180, "deg", "rad", math.pi),
    ],
)
def test_conversion_is_rounded_once(number: float, unit: str, into: str, expected: float) -> None:
    assert parse_unit(unit).convert(number, parse_unit(into)) == expected
    assert parse_unit(into).convert(expected, parse_unit(unit)) == pytest.approx(number, rel=1e-15, abs=1e-13)


def test_conversion_needs_the_dimension() -> None:
    with pytest.raises(ValueMistake, match="one in kg"):
        parse_unit("K").convert(1.0, parse_unit("kg"))
    with pytest.raises(ValueMistake, match="one in kg"):
        parse_unit("K").conversion(parse_unit("kg"))


@pytest.mark.parametrize(
    ("unit", "into", "factor", "shift"),
    [
        ("kJ", "J", 1000.0, 0.0),
        ("min", "h", 1 / 60, 0.0),
        ("deg", "rad", math.pi / 180, 0.0),
        ("L/h", "m3/min", 1 / 60_000, 0.0),
        ("degC", "K", 1.0, 273.15),
        ("K", "degC", 1.0, -273.15),
        ("degF", "K", 5 / 9, float(Fraction("459.67") * 5 / 9)),
        ("K", "degF", 1.8, -459.67),
        ("degF", "degC", 5 / 9, float(Fraction(-160, 9))),
        ("delta_degF", "K", 5 / 9, 0.0),
    ],
)
def test_factor_and_shift_are_the_doubles_nearest_to_the_exact_ones(unit: str, into: str, factor: float, shift: float) -> None:
    assert parse_unit(unit).conversion(parse_unit(into)) == (factor, shift)


OWN = Units(("person", "mite", "leaf", "virus"))


@pytest.mark.parametrize(
    ("text", "dimension", "udunits"),
    [
        ("person", {"person": 1}, "1"),
        ("persons/km2", {"person": 1, "m": -2}, "km-2"),
        ("mites/leaf", {"mite": 1, "leaf": -1}, "1"),
        ("1/(person d)", {"person": -1, "s": -1}, "d-1"),
        ("viruses/furlong", {"virus": 1, "m": -1}, "0.004970959595959596 m-1"),
    ],
)
def test_counting_units_of_ones_own(text: str, dimension: dict[str, int], udunits: str) -> None:
    unit = parse_unit(text, OWN)
    assert dict(unit.dimension) == dimension
    assert unit.udunits == udunits
    assert (unit / unit).is_none
    with pytest.raises(ValueMistake, match="a count has the unit 1, or one of its own"):
        parse_unit(text)


def test_quantities_in_units_of_ones_own() -> None:
    assert parse_quantity("12 persons", OWN) == (12.0, parse_unit("persons", OWN))
    assert parse_unit("persons", OWN).same(parse_unit("person", OWN))
    assert not parse_unit("mite", OWN).same_dimension(parse_unit("person", OWN))
    with pytest.raises(ValueMistake, match="did you mean `person`"):
        parse_unit("persn", OWN)


@pytest.mark.parametrize("name", ["m", "kg", "day", "kPa", "C", "degC", "my unit", "m2", "person/m", "", "ton", "1"])
def test_a_name_that_has_a_meaning_is_no_unit_of_ones_own(name: str) -> None:
    with pytest.raises(ValueMistake) as caught:
        Units(("person", name))
    assert caught.value.key == name


def test_temperatures_points_and_differences() -> None:
    assert [parse_unit(text).temperature for text in ("K", "degC", "delta_degC", "delta_degF", "degC/min", "mK")] == [
        *("none", "scale", "difference", "difference", "none", "none"),
    ]
    assert parse_unit("degC").difference().temperature == "difference"
    assert parse_unit("K").same(parse_unit("delta_degC"))


@pytest.mark.parametrize(
    ("text", "number", "unit"),
    [
        ("75 degC", 75.0, "degC"),
        ("-5 degC", -5.0, "degC"),
        ("8.314462618e-3 kJ/mol/K", 8.314462618e-3, "kJ/mol/K"),
        ("1_000 kg", 1000.0, "kg"),
        ("  2   h ", 2.0, "h"),
        ("5 1/min", 5.0, "1/min"),
        ("30 %", 30.0, "%"),
        ("4 1", 4.0, "1"),
    ],
)
def test_quantities(text: str, number: float, unit: str) -> None:
    found = parse_quantity(text)
    assert found is not None
    assert found == (number, parse_unit(unit))


@pytest.mark.parametrize(
    "text", ["alarm", "2 * x", "2", "3 - x", "1 / 2", "2 < 3 and x > 1", "2 and x", "", "x 3", "12h", "(3 kg)", "2 ** 3"]
)
def test_texts_that_are_no_quantities(text: str) -> None:
    assert parse_quantity(text) is None


@pytest.mark.parametrize("text", ["75 C", "3 bar(g)", "20 °C", "3 persn", "2 kJ/kg K", "1e999 K"])
def test_quantities_gone_wrong(text: str) -> None:
    with pytest.raises(ValueMistake):
        parse_quantity(text)


@pytest.mark.parametrize(
    ("text", "udunits"),
    [
        ("1", "1"),
        ("K", "K"),
        ("degC", "degC"),
        ("kJ/kg/K", "kJ kg-1 K-1"),
        ("m**3/s", "m3 s-1"),
        ("1/min", "min-1"),
        ("L/h", "L h-1"),
        ("%", "%"),
        ("days", "d"),
        ("µm", "um"),
        ("deg", "degree"),
        ("delta_degC/min", "K min-1"),
        ("ppm", "1e-06"),
        ("furlong", "201.16840233680466 m"),
        ("week", "604800 s"),
        ("kJ/furlong", "4.970959595959596 kg m s-2"),
        ("m**0.5", "m**0.5"),
        ("rad/s", "rad s-1"),
    ],
)
def test_text_for_netcdf(text: str, udunits: str) -> None:
    assert parse_unit(text).udunits == udunits


def test_text_for_netcdf_of_what_cancels() -> None:
    assert (parse_unit("K") / parse_unit("K")).udunits == "1"
    assert (parse_unit("kJ") / parse_unit("J")).udunits == "kJ J-1"
    assert parse_unit("degF").difference().udunits == "0.5555555555555556 K"


@pytest.mark.parametrize("text", ["Qm", "qm", "km", "psi", "deg", "furlong"])
@pytest.mark.parametrize("power", [Fraction(1000), Fraction(-1000), Fraction(99), Fraction(-7, 2), Fraction(1001)])
def test_no_power_breaks_the_arithmetic(text: str, power: Fraction) -> None:
    unit = parse_unit(text)
    with contextlib.suppress(ValueMistake):
        for _ in range(4):
            unit = unit**power
    assert unit.conversion(unit) == (1.0, 0.0)
    assert 0.0 < float(unit.factor) < math.inf
    assert unit.udunits


def test_a_power_beyond_all_measure_is_refused() -> None:
    with pytest.raises(ValueMistake, match="beyond all measure"):
        parse_unit("km") ** 99


def test_pint_is_asked_for_whole_names_only() -> None:
    assert rare("pa") is None
    assert rare("U") is None
    assert rare("boltzmann_constant") is None
    assert rare("nonsense") is None
    assert rare("lbs") is not None

"""The units that engineers write most, with exact factors.

In: a symbol or a word. Out: its dimension and exact factor to SI base units. Must not know: how units are put together.

Kept beside pint for three reasons: the factors are exact fractions, an ordinary study loads in no time (pint takes about 0.35 s and brings
dask with it where that is installed), and suggestions come from what is likely. A test holds every line against pint, with every prefix.
Sources: SI brochure, 9th edition (2019), tables 4 to 8; NIST SP 811 (2008), appendix B, for inch, foot, pound and mmHg.
"""

from __future__ import annotations

from fractions import Fraction
from typing import NamedTuple

PREFIXES: dict[str, Fraction] = {
    symbol: Fraction(10) ** power
    for symbol, power in zip(
        ("Q", "R", "Y", "Z", "E", "P", "T", "G", "M", "k", "h", "da", "d", "c", "m", "u", "n", "p", "f", "a", "z", "y", "r", "q"),
        (30, 27, 24, 21, 18, 15, 12, 9, 6, 3, 2, 1, -1, -2, -3, -6, -9, -12, -15, -18, -21, -24, -27, -30),
        strict=True,
    )
}


class Known(NamedTuple):
    """One unit: its symbol, the words for it (a plural s may follow), factor to SI base units, dimension, prefixes that it takes
    ("all", or the ones listed), and how UDUNITS writes it ("" where that is not sure: base units with a factor are written then)."""

    symbol: str
    words: str
    factor: str
    dimension: str
    prefixes: str = ""
    udunits: str = ""


KNOWN: tuple[Known, ...] = (
    Known("m", "metre meter", "1", "m", "all", "m"),
    Known("g", "gram", "1e-3", "kg", "all", "g"),
    Known("s", "second sec", "1", "s", "all", "s"),
    Known("A", "ampere amp", "1", "A", "all", "A"),
    Known("K", "kelvin", "1", "K", "all", "K"),
    Known("mol", "mole", "1", "mol", "all", "mol"),
    Known("cd", "candela", "1", "cd", "all", "cd"),
    Known("min", "minute", "60", "s", "", "min"),
    Known("h", "hour hr", "3600", "s", "", "h"),
    Known("d", "day", "86400", "s", "", "d"),
    Known("week", "week", "604800", "s"),
    Known("a", "year yr", "31557600", "s"),
    Known("delta_degC", "", "1", "K", "", "K"),
    Known("delta_degF", "", "5/9", "K"),
    Known("Hz", "hertz", "1", "s-1", "all", "Hz"),
    Known("N", "newton", "1", "kg m s-2", "all", "N"),
    Known("Pa", "pascal", "1", "kg m-1 s-2", "all", "Pa"),
    Known("bar", "", "1e5", "kg m-1 s-2", "k m u", "bar"),
    Known("atm", "atmosphere", "101325", "kg m-1 s-2"),
    Known("mmHg", "", "133.322387415", "kg m-1 s-2"),
    Known("psi", "", "4.4482216152605/0.0254/0.0254", "kg m-1 s-2"),
    Known("J", "joule", "1", "kg m2 s-2", "all", "J"),
    Known("cal", "calorie", "4.184", "kg m2 s-2", "k M"),
    Known("eV", "", "1.602176634e-19", "kg m2 s-2", "k M G m"),
    Known("W", "watt", "1", "kg m2 s-3", "all", "W"),
    Known("Wh", "", "3600", "kg m2 s-2", "k M G T m"),
    Known("V", "volt", "1", "kg m2 s-3 A-1", "all", "V"),
    Known("ohm", "", "1", "kg m2 s-3 A-2", "all", "ohm"),
    Known("S", "siemens", "1", "kg-1 m-2 s3 A2", "all", "S"),
    Known("H", "henry", "1", "kg m2 s-2 A-2", "m u n", "H"),
    Known("T", "tesla", "1", "kg s-2 A-1", "all", "T"),
    Known("Wb", "weber", "1", "kg m2 s-2 A-1", "all", "Wb"),
    Known("coulomb", "", "1", "s A", "", "coulomb"),
    Known("farad", "", "1", "kg-1 m-2 s4 A2", "", "farad"),
    Known("Ah", "", "3600", "s A", "k m"),
    Known("L", "litre liter", "1e-3", "m3", "all", "L"),
    Known("l", "", "1e-3", "m3", "all", "l"),
    Known("ha", "hectare", "1e4", "m2", "", "ha"),
    Known("t", "tonne", "1e3", "kg", "k M G", "t"),
    Known("M", "molar", "1e3", "mol m-3", "m u n p"),
    Known("P", "poise", "0.1", "kg m-1 s-1", "c m u"),
    Known("St", "", "1e-4", "m2 s-1", "c m"),
    Known("Bq", "becquerel", "1", "s-1", "all", "Bq"),
    Known("Gy", "gray", "1", "m2 s-2", "all", "Gy"),
    Known("Sv", "sievert", "1", "m2 s-2", "all", "Sv"),
    Known("kat", "katal", "1", "mol s-1", "all", "kat"),
    Known("rad", "radian", "1", "", "m u", "rad"),
    Known("sr", "steradian", "1", "", "", "sr"),
    Known("deg", "degree", "3.14159265358979323846/180", "", "", "degree"),
    Known("%", "percent", "1e-2", "", "", "%"),
    Known("ppm", "", "1e-6", ""),
    Known("ppb", "", "1e-9", ""),
    Known("in", "inch", "0.0254", "m"),
    Known("ft", "foot feet", "0.3048", "m"),
    Known("yd", "yard", "0.9144", "m"),
    Known("mi", "mile", "1609.344", "m"),
    Known("lb", "pound", "0.45359237", "kg"),
    Known("lbf", "", "4.4482216152605", "kg m s-2"),
)

#: points on a scale with an offset: symbol -> (difference unit, offset in kelvin)
SCALES: dict[str, tuple[str, Fraction]] = {
    "degC": ("delta_degC", Fraction("273.15")),
    "degF": ("delta_degF", Fraction("459.67") * 5 / 9),
}

_ABSOLUTE = "write an absolute pressure, in bar or Pa"
_CELSIUS, _FAHRENHEIT = "write degC (or K), coulomb for a charge", "write degF (or K), farad for a capacitance"
_GALLON = "write US_liquid_gallon or imperial_gallon"

#: texts that are not clear, or not units: what to write
HINTS: dict[str, str] = {
    "C": _CELSIUS,
    "°C": "write degC",
    "℃": "write degC",
    "Celsius": "write degC",
    "celsius": "write degC",
    "F": _FAHRENHEIT,
    "°F": "write degF",
    "℉": "write degF",
    "Fahrenheit": "write degF",
    "fahrenheit": "write degF",
    "°K": "write K",
    "°": "write deg",
    "Ω": "write ohm",
    "‰": "write 1e-3 in the number, and 1 here",
    "bar(g)": _ABSOLUTE,
    "barg": _ABSOLUTE,
    "barG": _ABSOLUTE,
    "psig": "write an absolute pressure, in psi or Pa",
    "psi(g)": "write an absolute pressure, in psi or Pa",
    "bar(a)": "write bar",
    "bara": "write bar",
    "psia": "write psi",
    "ton": "write t (1000 kg), short_ton or long_ton",
    "tons": "write t (1000 kg), short_ton or long_ton",
    "gal": _GALLON,
    "gallon": _GALLON,
    "gallons": _GALLON,
    "gpm": _GALLON + ", as in US_liquid_gallon/min",
    "cfm": "write ft3/min",
    "bbl": "write oil_bbl (42 US gallons)",
    "barrel": "write oil_bbl (42 US gallons)",
    "Nm": "write N m for a torque",
    "rpm": "write 1/min for turns, rad/s for an angular velocity",
    "Nm3": "write m3, and state the conditions in the label",
    "dB": "a logarithmic unit is not available; write the ratio",
    "pH": "write 1",
    "none": "write 1",
    "dimensionless": "write 1",
    "-": "write 1",
    "": "write 1 for none",
}

"""Units as a NetCDF file states them."""

from __future__ import annotations

from fractions import Fraction
from functools import lru_cache

from uq.errors import ValueMistake
from uq.units import Unit, Units, parse_unit

KELVIN = "K"
PLAIN_KELVIN = ((KELVIN, Fraction(1)),)
NO_OWN = Units()


@lru_cache(maxsize=1024)
def units_attributes(text: str, deviation: bool, own: Units = NO_OWN) -> dict[str, str]:
    """`units` as UDUNITS reads it, `unit` as the user wrote it where that differs, `units_metadata` where temperature is in it.

    `deviation`: the number is a width, so that degC stands for a difference. An empty text means that the unit differs from entry to entry
    and is stated beside the numbers: then there is no attribute. `own`: counting units of the study, of which UDUNITS knows nothing: it
    counts without a unit.
    """
    if not text:
        return {}
    try:
        unit = parse_unit(text, own)
    except ValueMistake:  # no unit that we know; a reader that understands UDUNITS must not stumble over it
        return {"units": "1", "unit": text}
    told = {"units": (unit.difference() if deviation else unit).udunits}
    if told["units"] != text:
        told["unit"] = text
    if any(base == KELVIN for base, _ in unit.dimension):
        told["units_metadata"] = f"temperature: {_temperature(unit, deviation)}"
    return told


def _temperature(unit: Unit, deviation: bool) -> str:
    """What a number with temperature in its unit is: CF-1.11, section 3.1.2 (from memory).

    degC and degF are points on their scale. Of a plain kelvin nobody has said whether it is a temperature or a difference of two, and CF
    has a word for that. In a product or a power it is a difference.
    """
    if unit.temperature == "scale" and not deviation:
        return "on_scale"
    if unit.parts == PLAIN_KELVIN and not deviation:
        return "unknown"
    return "difference"

"""What a temperature in an expression is: a point on a scale, a difference, or a K of which nobody can say.

In: units of terms. Out: the kind of a sum, and words. Must not know: graphs, trees.

degC and degF are points. delta_degC and delta_degF, and degC - degC, are differences. K says neither: beside a scale it is taken as a
point where only a point makes sense (T_K > T_C, T_K - T_C) and as a difference where only a difference does (T_C + x_K). T_C - x_K and
T_K - x_K are a difference if x is a temperature, and a temperature if x is a shift: the number in K is the same, so it may go wherever a
K may, but where it would meet a scale it is refused rather than guessed.
"""

from __future__ import annotations

from uq.units import Unit, parse_unit
from uq.units.unit import Temperature

_KELVIN = parse_unit("K").dimension
#: how a sentence calls what a value of each kind is
WORDS: dict[Temperature, str] = {
    "none": "a temperature",
    "scale": "a temperature",
    "difference": "a difference",
    "unclear": "a temperature or a difference",
}
CLEAR = "write delta_degC for the unit of a difference, or use K for all temperatures"


def is_temperature(unit: Unit) -> bool:
    """Whether values in it are temperatures or their differences."""
    return unit.dimension == _KELVIN


def clash(one: Unit, other: Unit) -> bool:
    """Whether one is a point on a scale and the other may be a difference."""
    kinds = {one.temperature, other.temperature}
    return "scale" in kinds and bool(kinds & {"difference", "unclear"})


def of_choice(unit: Unit, kinds: set[Temperature]) -> Unit:
    """The unit of one of several values, as of max( )."""
    kinds = {"none" if kind == "scale" else kind for kind in kinds}
    return _of_kind(unit, kinds.pop() if len(kinds) == 1 else "unclear")


def of_sum(unit: Unit, op: str, left: Temperature, right: Temperature) -> Unit:
    """The unit of a sum or difference of two values that are on no scale."""
    if left == right == "difference":
        return _of_kind(unit, "difference")
    if op == "-":
        return _of_kind(unit, "none" if (left, right) == ("none", "difference") else "unclear")
    return _of_kind(unit, "unclear" if "unclear" in (left, right) else "none")


def of_product(unit: Unit, factors: tuple[Unit, ...]) -> Unit:
    """The unit of a product of `factors`: a multiple of a difference is a difference."""
    if not is_temperature(unit):
        return unit
    kinds = [factor.temperature for factor in factors if is_temperature(factor)]
    return _of_kind(unit, kinds[0]) if len(kinds) == 1 else unit


def _of_kind(unit: Unit, kind: Temperature) -> Unit:
    if unit.temperature in ("scale", kind) or not is_temperature(unit):
        return unit
    return unit.of_kind(kind)

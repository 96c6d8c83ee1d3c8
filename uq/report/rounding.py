"""How many digits a number deserves: as many as its interval leaves standing.

JCGM 100:2008 (the GUM), 7.2.6: an uncertainty is given to at most two significant digits, the estimate to the same decimal place, and
it can be right to round the uncertainty up. Here half the width of the interval takes the part of the uncertainty; its ends are rounded
outwards.
"""

from __future__ import annotations

import math
from dataclasses import dataclass
from decimal import ROUND_CEILING, ROUND_FLOOR, ROUND_HALF_EVEN, Context, Decimal

MISSING = "missing"
# A double carries 15 to 17 digits: the last ones are not ours to print, nor to round upon.
CARRIED = 14
WIDE = Context(prec=800)
# Without an interval: enough to recognise the number, too few to look exact.
DIGITS_ALONE = 6
# Of a number whose interval has no end on either side even these are a courtesy.
DIGITS_UNBOUNDED = 3
FINEST = -400
# Between these powers of ten a number is written out.
SMALLEST_PLAIN, LARGEST_PLAIN = -4, 7


UNBOUNDED = "unbounded"


@dataclass(frozen=True)
class Rounded:
    """An estimate and the ends of its interval as texts, all to one decimal place; an end that is not there is empty.

    unbounded: both ends are known to be infinite.
    """

    value: str
    low: str = ""
    high: str = ""
    unbounded: bool = False

    @property
    def interval(self) -> str:
        """The interval in words: "1.2 to 1.4", "at least 1.2", "at most 1.4", "unbounded"; empty where there is none."""
        if self.low and self.high:
            return f"{self.low} to {self.high}"
        if self.low:
            return f"at least {self.low}"
        return f"at most {self.high}" if self.high else UNBOUNDED if self.unbounded else ""


def rounded(value: float, low: float = math.nan, high: float = math.nan, finest: int = FINEST) -> Rounded:
    """The estimate and its interval (in one unit), rounded as JCGM 100 7.2.6 says; ends that are nan or infinite are left out.

    finest: no decimal place below this power of ten, where more digits would serve nobody.
    """
    found = place_by(value, low, high, finest)
    if found and _all_but_one(value, low, found[0]):
        below = written(1 - 10.0 ** found[0], found[0], -1)
        return Rounded(f"> {below}", below)
    if found is None:
        unbounded = math.isinf(low) and math.isinf(high)
        text = alone(value, DIGITS_UNBOUNDED if unbounded else DIGITS_ALONE)
        ends = [alone(end) if math.isfinite(end) else "" for end in (low, high)]
        return Rounded(text, ends[0], ends[1], unbounded)
    return Rounded(
        written(value, *found),
        written(low, *found, ROUND_FLOOR) if math.isfinite(low) else "",
        written(high, *found, ROUND_CEILING) if math.isfinite(high) else "",
    )


def place_by(value: float, low: float, high: float, finest: int = FINEST) -> tuple[int, int] | None:
    """The decimal place that an interval leaves standing, and the power of ten that goes with it; None where it settles none."""
    ends = [end for end in (low, high) if math.isfinite(end)]
    half = high / 2 - low / 2 if len(ends) == 2 else max((abs(end - value) for end in ends), default=0.0)
    if not math.isfinite(value) or not half > 0:
        return None
    largest = max((value, *ends), key=abs)
    return max(place_of(half, largest), finest), power_of(largest)


def _all_but_one(value: float, low: float, place: int) -> bool:
    """Whether a number below 1 would look as if it were 1, and is surely within the last place of it."""
    return place < 0 and 1 - 10.0**place < low <= value < 1


def finest_of(value: float, spread: float) -> int:
    """The last decimal place that serves a reader of a quantity whose members spread so far (from 5 to 95 %): a thousandth of the spread,
    though two digits of the number itself, and no more than four digits unless they are needed to tell hundredths of the spread apart.
    """
    if not (math.isfinite(value) and math.isfinite(spread) and spread > 0):
        return FINEST
    wide, power = power_of(spread), power_of(value) if value else power_of(spread)
    return max(min(wide - 3, power - 1), min(wide - 2, power - 3))


def place_of(half: float, value: float, digits: int = 2) -> int:
    """The decimal place, as a power of ten, of the last of so many significant digits of a half-width (of 9.96: 0, since it rounds to 10).

    Never beyond the digits that a double carries for the value.
    """
    place = power_of(float(f"{half:.{digits - 1}e}")) - digits + 1
    return max(place, power_of(value) - CARRIED + 1) if value else place


def alone(value: float, digits: int = DIGITS_ALONE) -> str:
    """A number that has no interval, to a few significant digits and without zeros at its end."""
    if math.isnan(value):
        return MISSING
    if math.isinf(value):
        return "inf" if value > 0 else "-inf"
    power = power_of(float(f"{value:.{digits - 1}e}"))
    text, e, exponent = written(value, power - digits + 1, power).partition("e")
    return (text.rstrip("0").rstrip(".") if "." in text else text) + e + exponent


def at_most(bound: float) -> str:
    """An upper bound above 0, rounded up to two significant digits."""
    return written(bound, place_of(bound, bound), power_of(bound), ROUND_CEILING)


def power_of(value: float) -> int:
    """The power of ten of the first significant digit; 0 for 0."""
    return Decimal(repr(float(value))).adjusted() if value else 0


def written(value: float, place: int, power: int, direction: str = ROUND_HALF_EVEN) -> str:
    """A number cut at a decimal place; far from 1 as 1.234e-12, with the given power, so that an estimate and its ends share one."""
    carried = Decimal(f"{value:.{CARRIED - 1}e}")
    cut = carried.quantize(Decimal(1).scaleb(place, WIDE), rounding=direction, context=WIDE)
    if not cut:
        cut = cut.copy_abs()  # no minus before a nought
    if SMALLEST_PLAIN <= power <= LARGEST_PLAIN:
        return f"{cut:f}"
    return f"{cut.scaleb(-power, WIDE):f}e{power:+d}" if cut else "0"

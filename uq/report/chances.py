"""Probabilities in words: never a bare 0 or 1, and never more digits than the interval leaves standing."""

from __future__ import annotations

import math
from dataclasses import dataclass

from uq.report.answers import Estimate
from uq.report.rounding import FINEST, MISSING, Rounded, at_most, rounded

# Below this a probability is said as "1 in 70"; above, two digits of such a count are too coarse.
RARE = 0.05


@dataclass(frozen=True)
class Chance:
    """A probability as texts: the number, and what its interval says ("0.0026 to 0.0037", "at most 0.00012, 1 in 8700")."""

    value: str
    interval: str


def chance(estimate: Estimate, members: int, unknown: int = 0) -> Chance:
    """The texts for a probability of which so many members are the sample, and of so many of these it is not known."""
    value, low, high = estimate.value, estimate.low, estimate.high
    if math.isnan(value):
        return Chance(MISSING, "")
    if value == 0:
        return Chance(f"0 {f'to {unknown} ' if unknown else ''}of {members} members", f"at most {_upper(high)}" if high < 1 else "")
    if value == 1:
        count = f"{members - unknown} to {members} of {members}" if unknown else f"all {members}"
        return Chance(f"{count} members", f"at least {_lower(low)}" if low > 0 else "")
    texts = rounded(value, max(low, 0.0), min(high, 1.0))
    return Chance(texts.value, texts.interval)


def in_per_cent(estimate: Estimate, finest: int = FINEST) -> Rounded:
    """A share and its interval in per cent, within 0 and 100 (an estimate of a share may lie beyond); finest: as in `rounded`."""
    return rounded(100 * min(max(estimate.value, 0.0), 1.0), 100 * max(estimate.low, 0.0), 100 * min(estimate.high, 1.0), finest)


def one_in(estimate: Estimate) -> tuple[str, str]:
    """A rare probability as a count: the N of "1 in N", and its interval; both from the digits that are printed beside them.

    The low end must be above 0; where its digits are not, the interval has an upper end only.
    """
    texts = rounded(estimate.value, max(estimate.low, 0.0), min(estimate.high, 1.0))
    value, low, high = (float(text) for text in (texts.value, texts.low, texts.high))
    most = f"1 in {down(1 / high)}"
    return two_digits(1 / value), f"between 1 in {up(1 / low)} and {most}" if low > 0 else f"at most {most}"


def two_digits(number: float) -> str:
    """A count to two significant digits, written out."""
    return f"{float(f'{number:.1e}'):.0f}"


def _upper(high: float) -> str:
    """An upper end with its "1 in N", both rounded to the safe side: the share up, N down."""
    text = at_most(high)
    return f"{text}, 1 in {down(1 / high)}" if 0 < high < 0.1 else text


def _lower(low: float) -> str:
    """A lower end near 1: its distance from 1 is rounded up to two digits."""
    digits = max(2, 1 - math.floor(math.log10(1 - low))) if low < 1 else 1
    return f"{math.floor(low * 10**digits) / 10**digits:.{digits}f}"


def down(number: float) -> str:
    """A count of at least 1 cut to two significant digits."""
    unit = 10 ** max(0, math.floor(math.log10(number)) - 1)
    return str(math.floor(number / unit) * unit)


def up(number: float) -> str:
    """A count of at least 1 raised to two significant digits."""
    unit = 10 ** max(0, math.floor(math.log10(number)) - 1)
    return str(math.ceil(number / unit) * unit)

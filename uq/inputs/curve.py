"""A smooth rising curve through given points of a quantile function, from end to end.

In: normal scores and values, ends where there are any. Out: values at scores and scores of values. Must not know: arguments, percentiles.
"""

from __future__ import annotations

import math
from dataclasses import dataclass
from functools import cached_property

import numpy as np
from numpy.typing import NDArray

Floats = NDArray[np.float64]

INFINITE = math.inf


@dataclass(frozen=True, eq=False)
class Curve:
    """Values that rise with the normal score z, through `heights` at `scores`, between `low` and `high` (-inf, inf: no end).

    Works on the height y of a value x: x itself without ends, ln(x - low) with a lower end, -ln(high - x) with an upper one,
    ln((x - low) / (high - x)) with both (the four systems of Johnson 1949, doi:10.1093/biomet/36.1-2.149, normal in y).
    Between the points y(z) is a monotone cubic with the slopes of Fritsch and Butland 1984 (doi:10.1137/0905021); beyond the outermost
    points it is straight, with the slope from the outermost two: the tails are those of a normal (in y) distribution through these.
    Through two points the whole is straight.
    """

    scores: Floats
    heights: Floats
    low: float = -INFINITE
    high: float = INFINITE

    @cached_property
    def slopes(self) -> Floats:
        """dy/dz at the points; all above 0."""
        steps = np.diff(self.scores)
        secants = np.diff(self.heights) / steps
        slopes = np.empty(len(self.scores))
        slopes[0], slopes[-1] = secants[0], secants[-1]
        w, v = 2 * steps[1:] + steps[:-1], steps[1:] + 2 * steps[:-1]
        slopes[1:-1] = (w + v) / (w / secants[:-1] + v / secants[1:])
        return slopes

    def value(self, z: Floats) -> Floats:
        """x at the scores z."""
        return value_of(self.height(z), self.low, self.high)

    def height(self, z: Floats) -> Floats:
        """y at the scores z."""
        z = np.asarray(z, dtype=np.float64)
        place = np.clip(np.searchsorted(self.scores, z, side="right") - 1, 0, len(self.scores) - 2)
        step = self.scores[place + 1] - self.scores[place]
        t = (np.clip(z, self.scores[0], self.scores[-1]) - self.scores[place]) / step
        rise = self.heights[place + 1] - self.heights[place]
        left, right = step * self.slopes[place], step * self.slopes[place + 1]
        # Cubic of Hermite: start + t (left + t ((3 rise - 2 left - right) + t (left + right - 2 rise))).
        y = self.heights[place] + t * (left + t * ((3 * rise - 2 * left - right) + t * (left + right - 2 * rise)))
        below, above = np.minimum(z - self.scores[0], 0.0), np.maximum(z - self.scores[-1], 0.0)
        return np.asarray(y + self.slopes[0] * below + self.slopes[-1] * above)

    def score(self, x: float) -> float:
        """The score at which the value is x: -inf at and below the lower end, inf at and above the upper one."""
        if x <= self.low or x >= self.high:
            return -math.inf if x <= self.low else math.inf
        y = float(height_of(np.array(x), self.low, self.high))
        if y <= self.heights[0]:
            return float(self.scores[0] + (y - self.heights[0]) / self.slopes[0])
        if y >= self.heights[-1]:
            return float(self.scores[-1] + (y - self.heights[-1]) / self.slopes[-1])
        place = int(np.searchsorted(self.heights, y, side="right")) - 1
        below, above = float(self.scores[place]), float(self.scores[place + 1])
        while below < (middle := below + (above - below) / 2) < above:
            below, above = (middle, above) if float(self.height(np.array(middle))) <= y else (below, middle)
        return below


def height_of(x: Floats, low: float, high: float) -> Floats:
    """y of the values x; see `Curve`."""
    if low == -INFINITE and high == INFINITE:
        return np.asarray(x, dtype=np.float64)
    if high == INFINITE:
        return np.log(x - low)
    if low == -INFINITE:
        return -np.log(high - x)
    return np.log((x - low) / (high - x))


def value_of(y: Floats, low: float, high: float) -> Floats:
    """x of the heights y; see `Curve`."""
    if low == -INFINITE and high == INFINITE:
        return y
    if high == INFINITE:
        return low + np.exp(y)
    if low == -INFINITE:
        return high - np.exp(-y)
    # From the nearer end, so that neither tail is rounded to it.
    reach = (high - low) / (1 + np.exp(np.abs(y)))
    return np.where(y < 0, low + reach, high - reach)

"""Fits of a shape to percentiles.

In: levels, values, ends. Out: the parameters of the shape. Must not know: arguments, words.
"""

from __future__ import annotations

import math

import numpy as np
from numpy.typing import NDArray

from uq.inputs.bell import Normal
from uq.inputs.truncated import Truncated

Floats = NDArray[np.float64]

# The mean of a cut normal may lie outside its ends by so many standard deviations, and its sd be so many times the range of the
# percentiles: beyond, the shape between the ends hardly changes.
_OUTSIDE = 4.0
_WIDEST = 100.0


def straight_fit(scores: Floats, heights: Floats) -> tuple[float, float]:
    """Mean and sd of the normal distribution whose quantiles m + s z come nearest to the heights, in least squares: through both of two.

    (Ordinary least squares of the heights on the normal scores.)
    """
    middle, offset = float(np.mean(scores)), float(heights[0])
    z, y = scores - middle, heights - offset
    slope = float(np.sum(z * (y - np.mean(y))) / np.sum(z * z))
    return offset + (float(np.mean(y)) - slope * middle), slope


def cut_normal_fit(levels: Floats, values: Floats, low: float, high: float) -> Truncated:
    """The normal distribution cut to `low` and `high` (-inf, inf: no end) whose quantiles come nearest to the values, in least squares.

    Two percentiles are met exactly wherever a cut normal distribution can. By scipy.optimize's trust region reflective method (Branch,
    Coleman, Li 1999, doi:10.1137/S1064827595289108), from the fit without ends.
    """
    from scipy.optimize import least_squares
    from scipy.special import ndtri

    mean, sd = straight_fit(ndtri(levels), values)
    width = float(values[-1] - values[0])

    def made(place: Floats) -> Truncated:
        return _between(values, low, high, (float(place[0]), width * math.exp(float(place[1]))))

    def miss(place: Floats) -> Floats:
        return (made(place).quantile(levels) - values) / width

    first, last = _reach(values, low, high, sd)
    start = [min(max((mean - first) / (last - first), 0.01), 0.99), min(math.log(sd / width), 2.0)]
    bounds = ([0.0, -20.0], [1.0, math.log(_WIDEST)])
    found = least_squares(miss, start, bounds=bounds, xtol=1e-15, ftol=1e-15, gtol=1e-15, max_nfev=500)
    return made(found.x)


def _between(values: Floats, low: float, high: float, place: tuple[float, float]) -> Truncated:
    """The cut normal distribution whose mean stands at a share of its reach."""
    share, sd = place
    first, last = _reach(values, low, high, sd)
    mean = first + share * (last - first)
    # An open end is one beyond every draw.
    return Truncated(Normal(mean=mean, sd=sd), max(low, mean - 60 * sd), min(high, mean + 60 * sd))


def _reach(values: Floats, low: float, high: float, sd: float) -> tuple[float, float]:
    """From where to where the mean may lie."""
    return max(low, float(values[0]) - sd) - _OUTSIDE * sd, min(high, float(values[-1]) + sd) + _OUTSIDE * sd

"""Means and standard deviations over replicates with intervals that allow for skewed errors.

Student's t over 16 replicates takes their errors to be symmetrical. Where a quantity is skewed they are not, and most often the replicates
have missed what lies far out, so that both the estimate and its spread are too small. So each end of the interval is the farther one of
two: that of Student's t, and that of t after Hall's transformation, which takes out the skewness (Hall 1992,
doi:10.1111/j.2517-6161.1992.tb01876.x): with T = (estimate - truth)/se, a = skewness/sqrt(replicates),
g(T) = T + a T^2/3 + a^2 T^3/27 + a/6 is taken to be distributed as t. (Of both, because errors of well-spread points may be symmetrical and
heavy-tailed, where the skewness that few replicates show is chance and Hall's interval alone covers 88 to 93 %.)

Measured for 21 quantities (tests/skewed_models.py: normal, uniform, exponential, products, indicators, two humps, a power law, lognormal
with sigma 0.6 to 3) at 16, 64 and 256 rows, 2000 seeds each: means 93 to 97.5 % (up to 100 % of smooth quantities of one input) but for
sigma 3 (81 to 90 %; t alone 55 to 67 %), standard deviations 92 to 97.5 % up to lognormal with sigma sqrt(2) (t alone 65 to 95 %); beyond,
`uq.analysis.few` says that they rest on few members.
"""

from __future__ import annotations

from dataclasses import dataclass

import numpy as np

from uq.analysis.ask import Floats
from uq.analysis.estimate import Estimate, Numbers, t_quantile

# Replicates show too little skewness: 16 values of an exponential law (skewness 2) 1.21 on average, 8 of them 0.84, 32 of them 1.50. This
# factor brings the exponential law's out right: 1 + 10/replicates.
_HIDDEN = 10.0
# An end lies at most so many times as far away as by t: beyond, the transformation tells more than a handful of replicates can.
_FARTHEST = 3.0
_SYMMETRICAL = 1e-6


@dataclass(frozen=True, eq=False)
class Errors:
    """What the replicates tell of an estimate's error: its standard error and its skewness (third cumulant over se^3), [..] each."""

    se: Floats
    skewness: Floats

    @classmethod
    def of(cls, away: Floats) -> Errors:
        """From how far each replicate's value, or its part in the estimate (jackknife), lies from their mean [replicate, ..]."""
        replicates = len(away)
        with np.errstate(invalid="ignore", divide="ignore", over="ignore"):
            # By a power of two, exactly, so that squares and cubes of very small and very large numbers stay within a double's range.
            unit = power_of_two(np.abs(away).max(axis=0))
            part = away / unit
            square = part * part
            second, third = square.mean(axis=0), (square * part).mean(axis=0)
            skewness = (1 + _HIDDEN / replicates) * third / (second * np.sqrt(second)) / np.sqrt(replicates)
            se = np.sqrt(second / (replicates - 1)) if replicates > 1 else np.full_like(second, np.nan)
            return cls(np.asarray(se * unit), np.asarray(np.where(second > 0, skewness, 0.0)))

    def less(self, other: Errors) -> Errors:
        """Of the difference of two independent estimates, this one less the other."""
        with np.errstate(invalid="ignore", divide="ignore"):
            se = np.hypot(self.se, other.se)
            parts = ((each.se / se) ** 3 * each.skewness for each in (self, other))
            here, there = parts
            return Errors(se, np.where(se > 0, here - there, 0.0))

    def ends(self, factor: Floats | float) -> tuple[Floats, Floats]:
        """How far the interval reaches below and above the estimate; factor: Student's t."""
        with np.errstate(invalid="ignore"):
            return self.se * _reach(self.skewness, factor), self.se * _reach(-self.skewness, factor)


def _reach(skewness: Floats, factor: Floats | float) -> Floats:
    """The farther of t and of the solution T of g(T) = t, at most three times t."""
    with np.errstate(invalid="ignore", divide="ignore"):
        solved = 3 / skewness * (np.cbrt(1 + skewness * (factor - skewness / 6)) - 1)
    solved = np.where(np.abs(skewness) < _SYMMETRICAL, factor, solved)
    return np.asarray(np.clip(solved, factor, _FARTHEST * np.asarray(factor)))


def power_of_two(size: Floats) -> Floats:
    """The power of two at or above each size that is a positive finite number, not below 2^-1000; 1 for all others."""
    usable = np.isfinite(size) & (size > 0)
    exponent = np.frexp(np.where(usable, size, 0.5))[1]
    return np.asarray(np.ldexp(1.0, np.clip(exponent, -1000, 1000)))


def around(value: Floats, away: Floats, confidence: float) -> Estimate:
    """A value with its interval from the replicates' errors [replicate, ..]."""
    below, above = Errors.of(away).ends(t_quantile(confidence, len(away)))
    return Estimate(value, value - below, value + above)


def mean(total: Floats, counted: Numbers, confidence: float) -> Estimate:
    """The mean of all values from their sums over `counted` values [replicate, ..]; nan where there are none.

    A ratio of sums, by its residuals (Cochran, Sampling Techniques, 3rd ed., 6.3, from memory); the interval as the module says.
    """
    with np.errstate(invalid="ignore", divide="ignore"):
        many = counted.mean(axis=0)
        value = np.asarray(total.mean(axis=0) / many)
        return around(value, (total - value * counted) / many, confidence)


def variances(first: Floats, second: Floats, counted: Numbers) -> tuple[Floats, Floats]:
    """The variance of all values [..], and without each replicate [replicate, ..], from sums of shifted values and of their squares.

    mean(y^2) - mean(y)^2 + V, where V is the variance of the mean as the spread over replicates shows it: E[mean(y)^2] is the square of the
    true mean plus V. So it has no bias; the divisor N - 1 supposes the V of independent values, and would be 1/N too much for well-spread
    points, more than the interval of a smooth quantity is wide. (Of equally large replicates it is mean(y^2) less the mean product of
    values of different replicates, Hoeffding's U-statistic, 1948, doi:10.1214/aoms/1177730196.) A single replicate has the divisor N - 1.
    """
    counted = np.asarray(counted, dtype=np.float64)
    sums = (first, second, counted, first**2, first * counted, counted**2)
    whole = [each.sum(axis=0) for each in sums]
    without = [total - each for total, each in zip(whole, sums, strict=True)]
    return _variance(whole, len(first)), _variance(without, len(first) - 1)


def _variance(sums: list[Floats], replicates: int) -> Floats:
    """Of the sums of S, of squares, of counts n, and of S^2, S n and n^2, where S and n are of one replicate."""
    first, second, counted, own, across, pairs = sums
    with np.errstate(invalid="ignore", divide="ignore", over="ignore"):
        mean = first / counted
        if replicates == 1:
            return np.asarray(np.maximum(second - first * mean, 0.0) / (counted - 1))
        of_mean = (own - 2 * mean * across + mean**2 * pairs) / counted**2 * (replicates / (replicates - 1))
        # What rounding leaves of a constant is nothing.
        return np.asarray(np.maximum(second / counted - mean**2 + np.maximum(of_mean, 0.0), 0.0))


def standard_deviation(first: Floats, second: Floats, counted: Numbers, confidence: float) -> Estimate:
    """The standard deviation of all values, from sums of shifted values and of their squares [replicate, ..] over `counted` values each.

    Interval: delete-one-replicate jackknife (Efron and Stein 1981, doi:10.1214/aos/1176345462) of its logarithm, transformed back, as the
    module says; of the deviation itself where it is 0 without one of the replicates. Never below 0.
    """
    variance, without = variances(first, second, counted)
    value, others = np.sqrt(variance), np.sqrt(without)
    factor = t_quantile(confidence, len(first))
    with np.errstate(invalid="ignore", divide="ignore", over="ignore"):
        positive = (variance > 0) & (without > 0).all(axis=0)
        down, up = Errors.of(leverage(np.log(np.where(positive, others / value, 1.0)))).ends(factor)
        low, high = value * np.exp(-down), value * np.exp(up)
        if not positive.all():
            below, above = Errors.of(leverage(others)).ends(factor)
            low = np.where(positive, low, np.maximum(value - below, 0.0))
            high = np.where(positive, high, value + above)
        return Estimate(value, low, high)


def leverage(without: Floats) -> Floats:
    """What each replicate adds to an estimate, from the estimates without each [replicate, ..]: jackknife's values less their mean."""
    with np.errstate(invalid="ignore"):
        return np.asarray((len(without) - 1) * (without.mean(axis=0) - without))

"""An estimate with its interval, and the estimates from independent replicates that every question uses.

A replicate is one independently scrambled point set: values within it depend on each other, replicates do not. So the spread of a
statistic over replicates is what its error is judged by (Owen, Monte Carlo theory, methods and examples, section 17; from memory).
"""

from __future__ import annotations

from dataclasses import dataclass

import numpy as np
from numpy.typing import NDArray
from scipy.special import stdtrit

from uq.analysis.ask import Floats

Numbers = NDArray[np.float64] | NDArray[np.int64]


@dataclass(frozen=True, eq=False)
class Estimate:
    """A value and the ends of its interval, arrays of one shape."""

    value: Floats
    low: Floats
    high: Floats

    def where(self, known: NDArray[np.bool_]) -> Estimate:
        """The same, nan where not `known`."""
        return Estimate(*(np.where(known, end, np.nan) for end in (self.value, self.low, self.high)))

    def times(self, unit: Floats) -> Estimate:
        """The same in another unit: each number times that many."""
        with np.errstate(over="ignore", invalid="ignore"):
            return Estimate(self.value * unit, self.low * unit, self.high * unit)


def about(value: Floats, half: Floats) -> Estimate:
    """A value with the interval value - half .. value + half."""
    return Estimate(value, value - half, value + half)


def t_quantile(confidence: float, replicates: int) -> float:
    """The factor of a two-sided interval from the spread of so many replicates: Student's t with replicates - 1; nan for one."""
    return float(stdtrit(replicates - 1, 0.5 + confidence / 2)) if replicates > 1 else float("nan")


def ratio(numerator: Numbers, denominator: Numbers, confidence: float, least_sd: Numbers | float = 0.0) -> Estimate:
    """The ratio of two sums over replicates [replicate, ..], with its interval from the residuals N_r - ratio D_r by Student's t.

    Mean, share and Sobol' index are all of this form. Ratio estimator and its variance: Cochran, Sampling Techniques, 3rd ed., 6.3
    (from memory).
    `least_sd`: a residual's standard deviation is taken to be at least this (of one replicate, in units of the ratio).
    """
    replicates = len(numerator)
    with np.errstate(invalid="ignore", divide="ignore", over="ignore"):
        mean = denominator.mean(axis=0)
        value = numerator.mean(axis=0) / mean
        residual = (numerator - value * denominator) / mean
        deviation = np.sqrt((residual**2).sum(axis=0) / (replicates - 1)) if replicates > 1 else np.full_like(value, np.nan)
        half = t_quantile(confidence, replicates) * np.maximum(deviation, least_sd) / np.sqrt(replicates)
        return about(value, half)


def rounding_sd(counted: Numbers) -> Floats:
    """Standard deviation of rounding a share to a multiple of 1/counted: (1/counted)/sqrt(12).

    With well-spread points all replicates may show the very same share; a spread of 0 says no more than that the error is below that.
    """
    with np.errstate(divide="ignore"):
        return np.asarray(1 / (np.sqrt(12.0) * counted.mean(axis=0)))

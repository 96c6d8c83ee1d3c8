"""Sobol' indices from sums over base rows, replicate by replicate.

Notation: a, b outputs of a row's A and B member, m that of A with one column from B; a and b independent, m shares one input with b.
"""

from __future__ import annotations

import numpy as np

from uq.analysis.ask import Floats
from uq.analysis.estimate import Estimate, Numbers, ratio


def first_numerator(product: Numbers, difference: Numbers, mean: Floats, rows: Numbers) -> Floats:
    """mean(b (m - a)) with the exact mean taken off b: from their sums over `rows` rows and the mean of all outputs.

    product: sum of b (m - a); difference: sum of m - a. Saltelli et al. 2010, table 2 (b),
    doi:10.1016/j.cpc.2009.09.018. Without taking the mean off, the interval widens with the offset.
    """
    return np.asarray((product - mean * difference) / rows)


def total_numerator(squares: Numbers, rows: Numbers) -> Floats:
    """mean((a - m)^2) / 2 from the sum of (a - m)^2 over `rows` rows.

    Jansen 1999, doi:10.1016/S0010-4655(98)00154-4; Saltelli et al. 2010, table 2 (f).
    """
    return np.asarray(squares / (2 * rows))


def variance(first: Numbers, second: Numbers, mean: Floats, rows: Numbers) -> Floats:
    """Variance of the outputs of A and B about the given mean: from the sums of a + b and of a^2 + b^2 over `rows` rows."""
    return np.asarray(second / (2 * rows) - mean * first / rows + mean**2)


def index(numerators: Floats, variances: Floats, confidence: float) -> Estimate:
    """Sobol' index as the sum of numerators over the sum of variances, over all replicates.

    numerators [replicate, input, ..], variances [replicate, ..]; returns [input, ..], no unit. Interval from the residuals N_r - S V_r.
    """
    return ratio(numerators, variances[:, None], confidence)


def over_time(courses: Floats, times: Floats) -> Floats:
    """The integral over time, the last axis, by trapezoids; at a single time the value there.

    Numerators and variances are integrated each, so that the overall index is weighted by variance
    (Gamboa et al. 2014, doi:10.1214/14-EJS895).
    """
    return courses[..., 0] if len(times) == 1 else np.asarray(np.trapezoid(courses, times, axis=-1))

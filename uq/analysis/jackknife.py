"""Estimates with the same estimates without each replicate, and differences of two of them with intervals.

Delete-one-replicate jackknife (Efron and Stein 1981, doi:10.1214/aos/1176345462) with Student's t, for means and deviations allowing for
skewed errors (`uq.analysis.skewed`). Where both use the same draws, what is left out of one is left out of the other, and the error that
both share cancels; where they do not, their variances add and the degrees of freedom are those of Welch 1947,
doi:10.1093/biomet/34.1-2.28.
"""

from __future__ import annotations

from collections.abc import Callable
from dataclasses import dataclass

import numpy as np
from scipy.special import stdtrit

from uq.analysis.ask import Counts, Floats
from uq.analysis.estimate import Estimate, Numbers, t_quantile
from uq.analysis.probabilities import FEW_PER_REPLICATE, clopper_pearson, probability
from uq.analysis.skewed import Errors, around, leverage, power_of_two, variances


@dataclass(frozen=True, eq=False)
class Jackknifed:
    """An estimate [..] and the same without each replicate [replicate, ..]; `least`: its standard error is at least that."""

    value: Floats
    without: Floats
    least: Floats | float = 0.0

    def error(self) -> Floats:
        """The jackknife's standard error of the value."""
        return np.maximum(spread(self.without), self.least)

    def times(self, unit: Floats) -> Jackknifed:
        """The same in another unit: each number times that many."""
        with np.errstate(over="ignore", invalid="ignore"):
            return Jackknifed(self.value * unit, self.without * unit, self.least * unit)

    def plus(self, shift: Floats) -> Jackknifed:
        """The same with something certain added."""
        return Jackknifed(self.value + shift, self.without + shift, self.least)


def spread(without: Floats) -> Floats:
    """Standard error of an estimate from its values without each replicate [replicate, ..]."""
    return Errors.of(leverage(without)).se


# How two estimates are subtracted (the second less the first) with an interval of some confidence.
Way = Callable[[Jackknifed, Jackknifed, float], Estimate]


def paired(one: Jackknifed, other: Jackknifed, confidence: float) -> Estimate:
    """Other less one, both from the same draws."""
    with np.errstate(invalid="ignore"):
        away = other.without - one.without
        error = np.maximum(spread(away), np.hypot(one.least, other.least))
        return _about(other.value - one.value, t_quantile(confidence, len(away)) * error)


def unpaired(one: Jackknifed, other: Jackknifed, confidence: float) -> Estimate:
    """Other less one, from draws of their own (Welch)."""
    here, there = one.error(), other.error()
    factor = welch((here, len(one.without)), (there, len(other.without)), confidence)
    with np.errstate(invalid="ignore"):
        error = np.hypot(here, there)
        return _about(other.value - one.value, np.where(error > 0, factor, 0.0) * error)


def paired_moments(one: Jackknifed, other: Jackknifed, confidence: float) -> Estimate:
    """Other less one, both from the same draws, of means or deviations: the interval allows for skewness (`skewed`)."""
    with np.errstate(invalid="ignore"):
        return _open(around(other.value - one.value, leverage(other.without - one.without), confidence))


def unpaired_moments(one: Jackknifed, other: Jackknifed, confidence: float) -> Estimate:
    """Other less one, from draws of their own (Welch), of means or deviations: the interval allows for skewness (`skewed`)."""
    here, there = (Errors.of(leverage(each.without)) for each in (one, other))
    factor = welch((here.se, len(one.without)), (there.se, len(other.without)), confidence)
    below, above = there.less(here).ends(factor)
    with np.errstate(invalid="ignore"):
        value = other.value - one.value
        return _open(Estimate(value, value - below, value + above))


def welch(one: tuple[Floats, int], other: tuple[Floats, int], confidence: float) -> Floats:
    """Student's t for the difference of two independent estimates, from the standard error and the replicates of each."""
    largest = power_of_two(np.fmax(one[0], other[0]))
    with np.errstate(invalid="ignore", divide="ignore"):
        parts = [((each / largest) ** 2, replicates - 1) for each, replicates in (one, other)]
        total = parts[0][0] + parts[1][0]
        freedom = total**2 / sum(variance**2 / each for variance, each in parts)
        return np.asarray(stdtrit(np.where(freedom > 0, freedom, 1.0), 0.5 + confidence / 2))


def _open(found: Estimate) -> Estimate:
    """Ends that are no numbers are infinite."""
    known = ~np.isnan(found.value)
    low, high = (np.where(np.isnan(end) & known, far, end) for end, far in ((found.low, -np.inf), (found.high, np.inf)))
    return Estimate(found.value, low, high)


def _about(value: Floats, half: Floats) -> Estimate:
    """Ends that are no numbers (an estimate without a replicate is infinite) are infinite."""
    half = np.where(np.isnan(half) & ~np.isnan(value), np.inf, half)
    return Estimate(value, value - half, value + half)


def ratio_of(numerator: Numbers, denominator: Numbers) -> Jackknifed:
    """The ratio of two sums over replicates [replicate, ..]."""
    top, bottom = numerator.sum(axis=0), denominator.sum(axis=0)
    with np.errstate(invalid="ignore", divide="ignore"):
        return Jackknifed(np.asarray(top / bottom), np.asarray((top - numerator) / (bottom - denominator)))


def deviation_of(first: Floats, second: Floats, counted: Numbers) -> Jackknifed:
    """The standard deviation of all values, from sums of shifted values and of their squares over `counted` values [replicate, ..]."""
    variance, without = variances(first, second, counted)
    return Jackknifed(np.sqrt(variance), np.sqrt(without))


@dataclass(frozen=True, eq=False)
class Passed:
    """Passings and members by replicate [replicate, ..]."""

    hits: Counts
    counted: Counts

    def share(self) -> Jackknifed:
        """The share that passed."""
        return ratio_of(self.hits, self.counted)


def paired_shares(one: Passed, other: Passed, confidence: float) -> Estimate:
    """Other's share less one's, from the same draws.

    What passes in one only decides; of it the net numbers per replicate are known. Where they come to fewer than 5 per replicate, exact
    binomial ends for the net gains and for the net losses are taken as well (as for single shares), so that no width is zero.
    """
    found = paired(one.share(), other.share(), confidence)
    gained = other.hits - one.hits
    if one.counted.shape != other.counted.shape or (one.counted != other.counted).any():
        return _mover(one, other, found, confidence)
    members = one.counted.sum(axis=0)
    gains, losses = np.maximum(gained, 0).sum(axis=0), np.maximum(-gained, 0).sum(axis=0)
    up, down = clopper_pearson(gains, members, confidence), clopper_pearson(losses, members, confidence)
    few = gains + losses < FEW_PER_REPLICATE * len(gained)
    low = np.where(few, np.minimum(found.low, up.low - down.high), found.low)
    high = np.where(few, np.maximum(found.high, up.high - down.low), found.high)
    return Estimate(found.value, np.maximum(low, -1.0), np.minimum(high, 1.0))


def unpaired_shares(one: Passed, other: Passed, confidence: float) -> Estimate:
    """Other's share less one's, from draws of their own."""
    return _mover(one, other, unpaired(one.share(), other.share(), confidence), confidence)


def _mover(one: Passed, other: Passed, found: Estimate, confidence: float) -> Estimate:
    """The interval, but where either has few passings or others that of both single intervals put together.

    Newcombe 1998, method 10, doi:10.1002/(SICI)1097-0258(19980430)17:8<873::AID-SIM779>3.0.CO;2-I: distances of ends add in square.
    """
    a, b = (probability(each.hits, each.counted, confidence) for each in (one, other))
    low = found.value - np.hypot(b.value - b.low, a.high - a.value)
    high = found.value + np.hypot(b.high - b.value, a.value - a.low)
    few = np.zeros(found.value.shape, dtype=np.bool_)
    for each in (one, other):
        hits, total = each.hits.sum(axis=0), each.counted.sum(axis=0)
        few |= np.minimum(hits, total - hits) < FEW_PER_REPLICATE * len(each.hits)
    # Where both replicates' spreads are zero by chance the single intervals still are not.
    few |= ~(found.high > found.low)
    return Estimate(found.value, np.where(few, np.maximum(low, -1.0), found.low), np.where(few, np.minimum(high, 1.0), found.high))

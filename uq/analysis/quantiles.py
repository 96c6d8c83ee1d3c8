"""Quantiles of pooled members, with intervals by inverting the spread of the distribution function over replicates.

The quantile at p is the smallest value whose share at or below reaches p.
"""

from __future__ import annotations

from collections.abc import Sequence
from dataclasses import dataclass

import numpy as np

from uq.analysis.ask import Counts, Floats
from uq.analysis.estimate import Estimate, ratio, rounding_sd
from uq.analysis.ordered import Ordered, Places
from uq.analysis.policy import Counted

# The interval is about 2.1 standard deviations of a replicate over the root of their number, and some ranks for rounding.
_WIDER = 3.0
_MORE = 8


@dataclass(frozen=True)
class Levels:
    """The levels of quantiles, and the confidence of their intervals."""

    shares: tuple[float, ...]
    confidence: float


def rank(shares: Floats, counted: Counts) -> Counts:
    """The rank, from 1, of the quantile at each share of so many values: share x counted rounded up.

    A product within a few units in the last place above a whole number is that number: 0.07 x 100 is not 7.000000000000001.
    """
    return np.maximum(np.ceil(shares * counted * (1 - 4 * np.finfo(float).eps)), 1).astype(np.int64)


def quantiles(values: Floats, levels: Levels, absent: Counts | None = None, spare: Places | None = None) -> Counted:
    """Quantiles of each cell from values [cell, replicate, value], nan where a member failed: estimates [cell, level].

    absent [cell, replicate]: how many of the nan are of members that did not fail but have no value; they are left out. spare: memory
    for whole numbers, of the shape of the values. Interval: with F the pooled distribution function at the estimate and h Student's t
    times its standard error over replicates, the quantiles at p - h and p + h (Woodruff 1952, doi:10.1080/01621459.1952.10483443);
    infinite where the sample ends before.
    """
    # A sum is nan wherever a value is (or infinities cancel), and costs a quarter of looking at each.
    with np.errstate(invalid="ignore"):
        whole = not np.isnan(values.sum()) or not np.isnan(values).any()
    missing = np.zeros(values.shape[:2], dtype=np.int64) if whole else np.isnan(values).sum(axis=2)
    absent = np.zeros_like(missing) if absent is None else absent
    failed = missing - absent
    lost = failed.any(axis=1)
    filled = values if whole else np.where(np.isnan(values), np.inf, values)
    ordered = Ordered(filled, spare)
    none = np.zeros_like(missing)
    some = np.less(missing.min(axis=1), values.shape[2]).reshape(-1, 1)
    success = _woodruff(ordered, none, missing, levels).where(some)
    if not lost.any():
        return Counted.complete(success)
    if_low, if_high = _woodruff(ordered, failed, absent, levels), _woodruff(ordered, none, absent, levels)
    return Counted(success, if_low, if_high, np.broadcast_to(np.reshape(lost, (-1, 1)), success.value.shape))


def _woodruff(ordered: Ordered, below: Counts, left_out: Counts, levels: Levels) -> Estimate:
    """Quantiles with `below` members [cell, replicate] put before the values, and `left_out` of the infinite ones not counted."""
    size = ordered.values.shape[2]
    shares = np.asarray(levels.shares)
    counted = size - left_out
    total = counted.sum(axis=1)[:, None]
    shift = below.sum(axis=1)[:, None]

    def at(ranks: Counts) -> Floats:
        return np.where(ranks > total, np.inf, ordered.at(ranks - shift))

    ranks = rank(shares, total)
    # A little more than the interval will turn out to need.
    around = (_WIDER * ordered.spread_over_bins(ranks - shift) * np.sqrt(ordered.values.shape[1]) + _MORE).astype(np.int64)
    ordered.look(ranks - shift - around, ranks - shift + around)
    value = at(ranks)
    hits = _at_or_below(ordered, ranks - shift, value) + below[:, :, None]
    columns = counted[:, :, None]
    by_replicate = np.moveaxis(hits, 1, 0), np.moveaxis(np.broadcast_to(columns, hits.shape), 1, 0)
    spread = ratio(*by_replicate, levels.confidence, rounding_sd(by_replicate[1]))
    half = (spread.high - spread.low) / 2
    half = np.where(np.isnan(half), 1.0, half)
    ends = np.concatenate([np.ceil((shares - half) * total), np.floor((shares + half) * total) + 1], axis=1)
    low, high = np.split(at(ends.astype(np.int64)), 2, axis=1)
    return _unless_constant(ordered, total, Estimate(value, np.minimum(low, value), np.maximum(high, value)), shift)


def _at_or_below(ordered: Ordered, ranks: Counts, value: Floats) -> Counts:
    """Values of each replicate at or below the estimates; at an infinite one what can vary is the share of finite values."""
    if np.isfinite(value).all():
        return ordered.at_or_below(ranks, value)
    limits = np.minimum(value, np.finfo(np.float64).max)[:, None, None, :]
    return np.asarray((ordered.values[..., None] <= limits).sum(axis=2))


def _unless_constant(ordered: Ordered, total: Counts, found: Estimate, shift: Counts) -> Estimate:
    """Where all values of a cell are equal, an end beyond the sample is that value too."""
    if np.isfinite(found.low).all() and np.isfinite(found.high).all():
        return found
    ends = ordered.at(np.concatenate([np.ones_like(total), total], axis=1))
    constant = (ends[:, :1] == ends[:, 1:]) & (shift == 0) & np.isfinite(ends[:, :1])
    return Estimate(found.value, np.where(constant, found.value, found.low), np.where(constant, found.value, found.high))


def weighted_quantiles(counts: Counts, places: Floats, levels: Levels) -> Estimate:
    """Quantiles of values that only fall on `places` [place], ascending, from counts by replicate [replicate, place]: estimates [level].

    The same definition and interval; ends stay within the places that occur, nan where nothing is counted.
    """
    reached = counts.cumsum(axis=1)
    pooled = reached.sum(axis=0)
    total = pooled[-1]
    if total == 0:
        return Estimate(*(np.full(len(levels.shares), np.nan) for _ in range(3)))
    shares = np.asarray(levels.shares)

    def at(ranks: Counts) -> np.ndarray[tuple[int, ...], np.dtype[np.intp]]:
        return np.searchsorted(pooled, np.clip(ranks, 1, total), side="left")

    found = at(rank(shares, total))
    counted = reached[:, -1:]
    spread = ratio(reached[:, found], counted, levels.confidence, rounding_sd(counted))
    half = np.nan_to_num((spread.high - spread.low) / 2, nan=1.0)
    low = at(np.ceil((shares - half) * total).astype(np.int64))
    high = at(np.floor((shares + half) * total).astype(np.int64) + 1)
    return Estimate(places[found], places[np.minimum(low, found)], places[np.maximum(high, found)])


def outermost(shares: Sequence[float]) -> float:
    """The share between the outermost quantiles; 0 where there is one only."""
    return max(shares) - min(shares)

"""Quantiles of pooled members, with intervals by inverting the spread of the distribution function over replicates.

The quantile at p is the smallest value whose share at or below reaches p.
"""

from __future__ import annotations

from collections.abc import Sequence
from dataclasses import dataclass

import numpy as np

from uq.analysis.ask import Counts, Floats
from uq.analysis.estimate import Estimate, ratio, rounding_sd, t_quantile
from uq.analysis.policy import Counted


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


def quantiles(values: Floats, levels: Levels, absent: Counts | None = None) -> Counted:
    """Quantiles of each cell from values [cell, replicate, value], nan where a member failed: estimates [cell, level].

    absent [cell, replicate]: how many of the nan are of members that did not fail but have no value; they are left out. Interval: with F
    the pooled distribution function at the estimate and h Student's t times its standard error over replicates, the quantiles at p - h
    and p + h (Woodruff 1952, doi:10.1080/01621459.1952.10483443); infinite where the sample ends before.
    """
    cells, replicates, _ = values.shape
    absent = np.zeros((cells, replicates), dtype=np.int64) if absent is None else absent
    return quantiles_of_pieces([values.reshape(cells, -1)], 0, absent, levels)


def quantiles_of_pieces(pieces: Sequence[Floats], first: int, absent: Counts, levels: Levels) -> Counted:
    """The same of the cells from `first` on, as many as `absent` [cell, replicate] has, from pieces [cell, member].

    The members of one replicate stand after those of another, as many of each. Releases the GIL.
    """
    from uq.analysis.selection import quantiles_1

    pieces = [np.ascontiguousarray(piece, dtype=np.float64) for piece in pieces]
    table = np.array([(piece.ctypes.data, piece.shape[1]) for piece in pieces], dtype=np.int64).reshape(len(pieces), 2)
    cells, replicates = absent.shape
    found, lost = np.empty((cells, 3, 3, len(levels.shares))), np.empty(cells, dtype=np.bool_)
    shares, factor = np.array(levels.shares, dtype=np.float64), t_quantile(levels.confidence, replicates)
    quantiles_1(table, first, np.array(absent, dtype=np.int64, order="C"), shares, factor, found, lost)
    success, if_low, if_high = (Estimate(*(found[:, way, end] for end in range(3))) for way in range(3))
    return Counted(success, if_low, if_high, np.repeat(lost[:, None], len(shares), axis=1))


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

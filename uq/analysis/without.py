"""Quantiles without each replicate, of values that were kept and of values counted into bins: for differences of quantiles.

Leaving out a replicate moves the share at or below the quantile, and that moves the quantile along the distribution function, whose slope
is taken over the same width as in the interval of a quantile (Woodruff). To find the quantiles without each replicate among the values
themselves covered 88 % where this covers 94 %: well-spread points move them by one or two values only, whose distances are anything.
"""

from __future__ import annotations

from collections.abc import Callable
from dataclasses import dataclass
from typing import NamedTuple

import numpy as np

from uq.analysis.ask import Counts, Floats
from uq.analysis.estimate import ratio, rounding_sd
from uq.analysis.histograms import Histograms, Places
from uq.analysis.jackknife import Jackknifed, ratio_of, spread
from uq.analysis.kept import Kept
from uq.analysis.quantiles import Levels, rank

# Values at ranks, from 1, among all that there are [level]: infinite beyond both ends.
At = Callable[[Counts], Floats]


class Members(NamedTuple):
    """Of every replicate how many members count, and how many of them lie below all values: [replicate]."""

    counted: Counts
    below: Counts


class Ways(NamedTuple):
    """How a cell is looked up: the value at a rank, the lower and the upper edge of what it may be, values of a replicate at or below."""

    value: At
    low: At
    high: At
    hits: Callable[[Floats], Counts]


@dataclass(frozen=True, eq=False)
class Cell:
    """The values of one cell of all replicates: missing [replicate], how they are looked up, what a value at a level may be off by bins."""

    missing: Counts
    size: int
    ways: Ways
    error: Callable[[Floats], Floats] | None = None

    def quantiles(self, levels: Levels, members: Members) -> Jackknifed:
        """Quantiles [level] and those without each replicate [replicate, level]."""
        shares, counted, below = np.asarray(levels.shares), members.counted, members.below
        total, shift = int(counted.sum()), int(below.sum())

        def at(find: At, ranks: Counts) -> Floats:
            return np.where(ranks > total, np.inf, find(ranks - shift))

        value = at(self.ways.value, rank(shares, np.array(total)))
        hits = self.ways.hits(value) + below[:, None]
        columns = np.broadcast_to(counted[:, None], hits.shape)
        rounding = rounding_sd(columns)
        found = ratio(hits, columns, levels.confidence, rounding)
        half = np.nan_to_num((found.high - found.low) / 2, nan=1.0)
        low = at(self.ways.low, np.ceil((shares - half) * total).astype(np.int64))
        high = at(self.ways.high, np.floor((shares + half) * total).astype(np.int64) + 1)
        share = ratio_of(hits, columns)
        with np.errstate(invalid="ignore", divide="ignore"):
            slope = (np.maximum(high, value) - np.minimum(low, value)) / (2 * half)
            moved = value - (share.without - share.without.mean(axis=0)) * slope
            # Where replicates agree to less than one value what remains is that they are whole.
            whole = spread(share.without) * np.sqrt(len(counted)) < rounding
            least = np.where(whole, rounding * slope / np.sqrt(len(counted)), 0.0)
        return Jackknifed(value, moved, least)


def kept_cell(kept: Kept, cell: int) -> Cell:
    """A cell of values that were kept."""
    pieces = [kept.pieces[key][cell] for key in sorted(kept.pieces)]
    values = np.concatenate(pieces).reshape(kept.replicates, -1)
    missing = np.isnan(values).sum(axis=1)
    ordered = np.sort(values, axis=None)
    there = len(ordered) - int(missing.sum())

    def at(ranks: Counts) -> Floats:
        found = ordered[np.clip(ranks, 1, max(there, 1)) - 1]
        return np.where(ranks < 1, -np.inf, np.where(ranks > there, np.inf, found))

    def hits(value: Floats) -> Counts:
        # At an infinite value what can vary is the share of finite ones.
        largest = np.minimum(value, np.finfo(np.float64).max)
        return np.stack([(values <= each).sum(axis=1) for each in largest], axis=1)

    return Cell(missing, values.shape[1], Ways(at, at, at, hits))


def same_values(one: tuple[Kept | Histograms, int], other: tuple[Kept | Histograms, int]) -> bool:
    """Whether two cells are known to have the same value in every member; never where a member has none, which may have been anything."""
    here, there = (_by_row(held, cell) if isinstance(held, Kept) else None for held, cell in (one, other))
    return here is not None and there is not None and np.array_equal(here, there)


def _by_row(kept: Kept, cell: int) -> Floats:
    """The values of a cell [A or B, replicate and row], whatever the blocks: a piece has its A members, then its B members."""
    return np.concatenate([kept.pieces[key][cell].reshape(2, -1) for key in sorted(kept.pieces)], axis=1)


def binned_cell(histograms: Histograms, cell: int) -> Cell:
    """A cell of values counted into bins: a value is the middle of its bin, the ends of an interval are outer edges."""
    bins = [histograms.held[replicate] for replicate in sorted(histograms.held)]
    places = Places.of(bins, cell, histograms.scale)
    reached = places.counts.cumsum(axis=1)
    pooled, last = reached.sum(axis=0), len(places.low) - 1
    there = int(pooled[-1])

    def place(ranks: Counts) -> Counts:
        return np.searchsorted(pooled, np.clip(ranks, 1, max(there, 1)), side="left").clip(max=last)

    def among(edges: Floats) -> At:
        return lambda ranks: np.where(ranks < 1, -np.inf, np.where(ranks > there, np.inf, edges[place(ranks)]))

    middle = places.middle

    def hits(value: Floats) -> Counts:
        upto = np.searchsorted(middle[1:-1], np.minimum(value, np.finfo(np.float64).max), side="right")
        return np.asarray(reached[:, upto])

    size = int(places.counts[0].sum() + places.missing[0])
    return Cell(places.missing, size, Ways(among(middle), among(places.low), among(places.high), hits), places.error)

"""The values of A and B rows counted into bins, where there are too many to keep; and quantiles from the counts.

One histogram per replicate and cell, on a map that the pilot fixed (`counting`): counts add up exactly in any order, and memory does not
grow with members. A quantile is the middle of its bin; half the bin is what it may be off, and is stated.
"""

from __future__ import annotations

from collections.abc import Mapping
from dataclasses import dataclass

import numpy as np

from uq.analysis.ask import Ask, Counts, Floats, Scale
from uq.analysis.estimate import Estimate, ratio, rounding_sd
from uq.analysis.kept import Courses, Kept
from uq.analysis.pieces import Array
from uq.analysis.policy import Counted, stacked
from uq.analysis.quantiles import Levels, rank
from uq.analysis.sample import Sample

# The counts of a cell in order: minus infinity, beyond the lowest bin, the bins below the centre, the centre itself, ...
_BEFORE = 2
_PARTS = ("counts", "begin", "offset", "special", "ends")
_NONE, _NO_SIZES = np.zeros(0), np.zeros((0, 0))


@dataclass(frozen=True, eq=False)
class Bins:
    """The histograms of one replicate, all cells one after another.

    counts: those of a cell stand from offset [cell] to the next, its bins from begin [cell] on; special [cell, 6]: what is in no bin
    (`counting`); ends [cell, 2]: lowest and highest finite value (inf, -inf where there is none).
    """

    counts: Array
    begin: Counts
    offset: Counts
    special: Counts
    ends: Floats

    @classmethod
    def of(cls, a: Floats, b: Floats, scale: Scale, per_half_width: Floats = _NONE, sizes: Floats = _NO_SIZES) -> Bins:
        """From A and B values [row, cell, ..], C order; per_half_width, sizes: see `count_2`."""
        from uq.analysis.counting import count_2

        cells = len(scale.centre)
        # Machine code is made for arrays of one kind.
        a, b, centre = (np.require(part, np.float64, ["C", "W"]) for part in (a, b, scale.centre))
        begin, offset = np.empty(cells, dtype=np.int64), np.empty(cells + 1, dtype=np.int64)
        special, ends = np.empty((cells, 6), dtype=np.int64), np.empty((cells, 2))
        counts = count_2(a, b, centre, 1 / scale.width, special, ends, begin, offset, per_half_width, sizes)
        return cls(counts, begin, offset, special, ends)

    def merge(self, other: Bins) -> Bins:
        """Both together."""
        from uq.analysis.counting import add_counts_1

        # A cell without any value in a bin begins behind the last one.
        begin = np.minimum(self.begin, other.begin)
        stop = np.maximum(*(np.where(np.diff(each.offset) > 0, each.begin + np.diff(each.offset), 0) for each in (self, other)))
        offset = np.concatenate([[0], np.cumsum(np.maximum(stop - begin, 0))])
        counts = np.empty(offset[-1], dtype=np.int32)
        parts = (self.counts, self.begin, self.offset, other.counts, other.begin, other.offset)
        add_counts_1(*parts, begin, offset, counts)
        low, high = np.minimum(self.ends[:, 0], other.ends[:, 0]), np.maximum(self.ends[:, 1], other.ends[:, 1])
        return Bins(counts, begin, offset, self.special + other.special, np.stack([low, high], axis=1))


@dataclass(frozen=True, eq=False)
class Histograms:
    """Histograms by replicate, on the map given by a centre and a width for each cell."""

    scale: Scale
    held: Mapping[int, Bins]

    def merge(self, other: Histograms) -> Histograms:
        """Both together."""
        held = dict(self.held)
        for replicate, bins in other.held.items():
            held[replicate] = held[replicate].merge(bins) if replicate in held else bins
        return Histograms(self.scale, held)

    def arrays(self) -> dict[str, Array]:
        """The map, and the histograms of each replicate."""
        own = {"centre": self.scale.centre, "width": self.scale.width}
        return own | {f"{replicate}/{name}": getattr(bins, name) for replicate, bins in self.held.items() for name in _PARTS}

    @classmethod
    def of_arrays(cls, arrays: Mapping[str, Array]) -> Histograms:
        """The histograms that `arrays` tells of."""
        replicates = {int(path.split("/")[0]) for path in arrays if "/" in path}
        names = ("counts", "begin", "offset", "special", "ends")
        held = {
            replicate: Bins(*(np.require(arrays[f"{replicate}/{name}"], None, ["C", "W"]) for name in names)) for replicate in replicates
        }
        return cls(Scale(arrays["centre"], arrays["width"]), held)

    def quantiles(self, first: int, stop: int, levels: Levels, absent: Counts | None = None) -> Counted:
        """Quantiles of the cells from `first` to `stop` [cell, level]; absent [cell, replicate]: see `quantiles.quantiles`."""
        bins = [self.held[replicate] for replicate in sorted(self.held)]
        none = np.zeros(len(bins), dtype=np.int64)
        return stacked([self._cell(bins, cell, levels, none if absent is None else absent[cell - first]) for cell in range(first, stop)])

    def _cell(self, bins: list[Bins], cell: int, levels: Levels, absent: Counts) -> Counted:
        places = Places.of(bins, cell, self.scale)
        failed = places.missing - absent
        none = np.zeros_like(failed)
        success = woodruff(places, none, places.missing, levels)
        if not places.counts.any():
            success = success.where(np.zeros(len(levels.shares), dtype=np.bool_))
        error = places.error(success.value)
        with np.errstate(invalid="ignore", divide="ignore"):
            share = np.where(error > 0, error / places.width, 0.0)
        lost = np.full((1, len(levels.shares)), failed.any())
        if_low, if_high = success, success
        if failed.any():
            if_low, if_high = woodruff(places, failed, absent, levels), woodruff(places, none, absent, levels)
        return Counted(success, if_low, if_high, lost[0], error, share).map(lambda array: array[None])


@dataclass(frozen=True, eq=False)
class Places:
    """All that a cell's values may be, in order: low and high edge of each place, counts [replicate, place]; missing [replicate]."""

    low: Floats
    high: Floats
    counts: Counts
    missing: Counts

    @classmethod
    def of(cls, bins: list[Bins], cell: int, scale: Scale) -> Places:
        """Of one cell of all replicates: minus infinity, below the bins, bins below, the centre, bins above, above them, infinity."""
        from uq.analysis.counting import ABOVE, BELOW, CENTRE, MINUS, MISSING, PLUS, SIDE

        begin = min(SIDE, min(int(each.begin[cell]) for each in bins))
        stop = max(SIDE, max(int(each.begin[cell] + each.offset[cell + 1] - each.offset[cell]) for each in bins))
        stop = min(stop, 2 * SIDE)
        below, wide = SIDE - begin, stop - begin
        counts = np.zeros((len(bins), wide + 5), dtype=np.int64)
        for row, each in zip(counts, bins, strict=True):
            inside = np.zeros(wide, dtype=np.int64)
            here = each.counts[each.offset[cell] : each.offset[cell + 1]]
            inside[each.begin[cell] - begin : each.begin[cell] - begin + len(here)] = here
            row[_BEFORE : _BEFORE + below], row[_BEFORE + below + 1 : -2] = inside[:below], inside[below:]
            special = each.special[cell]
            row[0], row[1], row[_BEFORE + below], row[-2], row[-1] = (special[kind] for kind in (MINUS, BELOW, CENTRE, ABOVE, PLUS))
        centre, width = scale.centre[cell], scale.width[cell]
        lower, upper = centre - width * distances(below)[::-1], centre + width * distances(wide - below)
        lowest, highest = min(each.ends[cell, 0] for each in bins), max(each.ends[cell, 1] for each in bins)
        lowest, highest = (lowest, highest) if lowest <= highest else (centre, centre)
        low = np.concatenate([[-np.inf, lowest], lower[:-1], [centre], upper[:-1], [upper[-1], np.inf]])
        high = np.concatenate([[-np.inf, lower[0]], lower[1:], [centre], upper[1:], [highest, np.inf]])
        finite = slice(1, -1)
        low[finite], high[finite] = np.clip(low[finite], lowest, highest), np.clip(high[finite], lowest, highest)
        return cls(low, high, counts, np.array([each.special[cell, MISSING] for each in bins]))

    @property
    def middle(self) -> Floats:
        """The middle of each place."""
        with np.errstate(invalid="ignore"):
            return np.where(np.isinf(self.low), self.low, self.low + (self.high - self.low) / 2)

    @property
    def width(self) -> float:
        """From the 5 % to the 95 % quantile of the values that are there."""
        pooled = self.counts.sum(axis=0).cumsum()
        low, high = self.middle[np.searchsorted(pooled, rank(np.array([0.05, 0.95]), pooled[-1])).clip(max=len(pooled) - 1)]
        return float(high - low)

    def error(self, values: Floats) -> Floats:
        """Half the width of the place in whose middle each value is; 0 for values that are in none."""
        finite = slice(1, -1)
        middle = self.middle[finite]
        order = np.argsort(middle, kind="stable")
        place = np.clip(np.searchsorted(middle[order], values), 0, len(middle) - 1)
        half = (self.high[finite] - self.low[finite])[order][place] / 2
        return np.where(middle[order][place] == values, half, 0.0)


def distances(bins: int) -> Floats:
    """The edges of the first bins on one side of the centre, in widths, from 0 on [bin + 1]."""
    from uq.analysis.counting import FAR_DIGITS, NEAR, NEAR_DIGITS, START

    number = np.arange(bins + 1)
    near, start = number / 2**NEAR_DIGITS, NEAR << NEAR_DIGITS
    far = NEAR + (number - start) / 2**FAR_DIGITS
    doublings = np.where(number < start, near, far)
    whole = np.floor(doublings)
    return np.asarray(START * ((1 + doublings - whole) * 2.0**whole - 1))


def woodruff(places: Places, below: Counts, left_out: Counts, levels: Levels) -> Estimate:
    """Quantiles [level] with `below` members [replicate] put before the values, and `left_out` not counted: see `quantiles.quantiles`.

    The estimate is the middle of its place, the ends of the interval are the outer edges of theirs.
    """
    counted = places.counts.sum(axis=1) + places.missing - left_out
    total, shift, shares = int(counted.sum()), int(below.sum()), np.array(levels.shares)
    reached = places.counts.cumsum(axis=1)
    pooled = reached.sum(axis=0)
    valid = int(pooled[-1])

    def at(ranks: Counts, edges: Floats) -> Floats:
        found = edges[np.searchsorted(pooled, np.clip(ranks - shift, 1, max(valid, 1)), side="left").clip(max=len(edges) - 1)]
        return np.where((ranks > total) | (ranks - shift > valid), np.inf, np.where(ranks - shift < 1, -np.inf, found))

    ranks = rank(shares, np.array(total))
    value = at(ranks, places.middle)
    place = np.searchsorted(pooled, np.clip(ranks - shift, 1, max(valid, 1)), side="left").clip(max=len(pooled) - 1)
    # At an infinite value what can vary is the share of finite ones.
    place = np.where(value == np.inf, len(pooled) - 2, np.where(value == -np.inf, 0, place))
    hits = reached[:, place] + below[:, None]
    columns = np.broadcast_to(counted[:, None], hits.shape)
    spread = ratio(hits, columns, levels.confidence, rounding_sd(columns))
    half = np.nan_to_num((spread.high - spread.low) / 2, nan=1.0)
    low = np.minimum(at(np.ceil((shares - half) * total).astype(np.int64), places.low), value)
    high = np.maximum(at(np.floor((shares + half) * total).astype(np.int64) + 1, places.high), value)
    if shift == 0 and total == valid and places.low[1] == places.high[-2] and not places.counts[:, [0, -1]].any():
        return Estimate(value, value, value)
    return Estimate(value, low, high)


@dataclass(frozen=True, eq=False)
class BinnedCourses:
    """Of the watched quantities: histograms of values, a cell is a (watched, output time); and of deviations (`kept.Courses`) [watched]."""

    values: Histograms
    deviations: Histograms

    @classmethod
    def of(cls, ask: Ask, sample: Sample) -> BinnedCourses:
        """Those of one block."""
        replicate, sizes = sample.block.replicate, np.zeros((len(ask.watched), 2 * sample.rows))
        values = Bins.of(sample.courses.a, sample.courses.b, ask.value_scale, 1 / ask.half_width.reshape(-1), sizes)
        deviations = Bins.of(sizes.T, sizes.T[:0], ask.deviation_scale)
        return cls(Histograms(ask.value_scale, {replicate: values}), Histograms(ask.deviation_scale, {replicate: deviations}))

    @classmethod
    def of_kept(cls, ask: Ask, courses: Courses) -> BinnedCourses:
        """From values that were kept."""
        return cls(of_kept(courses.values, ask.value_scale), of_kept(courses.deviations, ask.deviation_scale))

    def merge(self, other: BinnedCourses) -> BinnedCourses:
        """Both together."""
        return BinnedCourses(self.values.merge(other.values), self.deviations.merge(other.deviations))


def binned_outcomes(ask: Ask, sample: Sample) -> Histograms:
    """The outcomes; a cell is an outcome."""
    return Histograms(ask.outcome_scale, {sample.block.replicate: Bins.of(sample.outcomes.a, sample.outcomes.b, ask.outcome_scale)})


def binned_kept_outcomes(ask: Ask, kept: Kept) -> Histograms:
    """The outcomes, from values that were kept."""
    return of_kept(kept, ask.outcome_scale)


def of_kept(kept: Kept, scale: Scale) -> Histograms:
    """The histograms of kept values, as if they had been counted at once."""
    found = Histograms(scale, {})
    for (replicate, _), piece in kept.pieces.items():
        rows = np.ascontiguousarray(piece.T)
        found = found.merge(Histograms(scale, {replicate: Bins.of(rows, rows[:0], scale)}))
    return found

# mypy: disable-error-code="untyped-decorator"
"""Order statistics of many values without sorting them, and Woodruff's intervals from them, as machine code.

In: values kept cell by cell. Out: quantiles of each cell. Must not know: what the numbers mean. A cell's values are counted into bins,
replicate by replicate; only bins that hold a wanted rank are looked into. The bins decide the speed, never the result. (Per value about
2 ns; numpy's own selection takes 20, its sort 7 to 45.) Kernels and what they call are in this one file: see `compiled`.
"""

from __future__ import annotations

from typing import Any, NamedTuple

import numpy as np
from numba import carray, njit, types
from numba.extending import intrinsic

from uq.solve.cached import kernel

# Of a cell up to so many values are looked at to lay out its bins, which hold about so many each.
_LOOKED_AT = 256
_PER_BIN = 64
_FEWEST_BINS = 16
_MOST_BINS = 4096
# The interval of a quantile is about 2.1 standard deviations of a replicate over the root of their number, and some ranks for rounding.
_WIDER = 3.0
_MORE = 8
# Bins are logarithmic where the middle half of the values is so many times narrower than nearly all.
_CLOSER = 16.0
_ONE = 1023 << 52  # the bits of the number 1
_LARGEST = float(np.finfo(np.float64).max)
_JUST_BELOW_ONE = 1 - 4 * float(np.finfo(np.float64).eps)


class Bins(NamedTuple):
    """The values of a cell in bins: of each value its bin; up to the end of each bin the values of every replicate and of all; which bins
    are looked into and where their values stand among those picked out."""

    bin_of: np.ndarray
    reached: np.ndarray
    rising: np.ndarray
    marked: np.ndarray
    offset: np.ndarray


class Known(NamedTuple):
    """Places from `first` to `last` of the picked values that stand where a sort puts them, all equal; `many` [1] such runs."""

    first: np.ndarray
    last: np.ndarray
    many: np.ndarray


@njit(error_model="numpy")
def _select(values, first, stop, place):  # type: ignore[no-untyped-def]
    """Move the value that a sort of values[first:stop] would put there to `place`; returns from where to where its equals stand.

    Three-way partition about a middle value (Dijkstra 1976, A discipline of programming), so that equal values cost no more than others.
    """
    while True:
        low, middle, high = values[first], values[(first + stop) // 2], values[stop - 1]
        pivot = max(min(low, middle), min(max(low, middle), high))
        less, i, more = first, first, stop
        while i < more:
            value = values[i]
            if value < pivot:
                values[i] = values[less]
                values[less] = value
                less += 1
                i += 1
            elif value > pivot:
                more -= 1
                values[i] = values[more]
                values[more] = value
            else:
                i += 1
        if place < less:
            stop = less
        elif place >= more:
            first = more
        else:
            return less, more - 1


@njit(error_model="numpy")
def _sort(values, count):  # type: ignore[no-untyped-def]
    """Sort the first `count` values, a few hundred (Shell 1959, doi:10.1145/368370.368387, with the gaps of Ciura 2001)."""
    for gap in (57, 23, 10, 4, 1):
        for i in range(gap, count):
            value, j = values[i], i
            while j >= gap and values[j - gap] > value:
                values[j] = values[j - gap]
                j -= gap
            values[j] = value


@njit(error_model="numpy")
def _bin_map(values, many):  # type: ignore[no-untyped-def]
    """How a cell's values [value] are sent to `many` bins, from a few of them; any choice is right, a good one is fast.

    Returns start, number per unit and, where most of the values stand much closer together than all, the digits to be left out of
    logarithmic bins, else 0. The few lowest and highest go into the first and the last bin, whatever they are.
    """
    many_looked_at = min(_LOOKED_AT, max(values.size // _PER_BIN, 32))
    sample, count = np.empty(_LOOKED_AT), 0
    for i in range(0, values.size, max(1, values.size // many_looked_at)):
        if count < _LOOKED_AT and np.isfinite(values[i]):
            sample[count] = values[i]
            count += 1
    if count < 2:
        return 0.0, 1.0, 0
    _sort(sample, count)
    low, middle, high = sample[count // 64], sample[count // 2], sample[count - 1 - count // 64]
    scale = many / (high - low)
    if not (np.isfinite(scale) and scale > 0):
        return low, 1.0, 0
    if (sample[count - 1 - count // 4] - sample[count // 4]) * _CLOSER > high - low:
        return low, scale, 0
    centre = low if (middle - low) * _CLOSER < high - middle else high if (high - middle) * _CLOSER < middle - low else middle
    near = max(abs(sample[count // 8] - centre), abs(sample[count - 1 - count // 8] - centre))
    for i in range(count):
        # The smallest distance that an eighth of the values keep within, on the side where they are.
        near = min(near, max(abs(sample[i] - centre), abs(sample[min(i + count // 8, count - 1)] - centre)))
    buffer = np.empty(1)
    buffer[0] = 1.0 + max(centre - low, high - centre) / near
    if not (near > 0 and np.isfinite(buffer[0])):
        return low, scale, 0
    digits, words = 1, buffer.view(np.int64)
    while (words[0] - _ONE) >> digits > many // 2 - 2:
        digits += 1
    return centre, 1.0 / near, digits


@njit(error_model="numpy")
def _find_bins(row, of, start, scale, digits, many):  # type: ignore[no-untyped-def]
    """The bin of each value of a replicate [value]; those that are no number go behind the last.

    Monotone in the value, so that bins never overlap: subtract, multiply and cut keep the order, and so do the leading digits of 1 + x,
    which lie evenly in x up to 1 and nearly so in its logarithm beyond.
    """
    last, half = float(many - 1), many // 2
    if digits == 0:
        for i in range(row.size):
            place = (row[i] - start) * scale
            place = 0.0 if place < 0.0 else place
            place = last if place > last else place
            of[i] = np.int32(place) if place == place else np.int32(many)
        return
    buffer = np.empty(row.size)
    words = buffer.view(np.int64)
    for i in range(row.size):
        buffer[i] = 1.0 + abs(row[i] - start) * scale
    for i in range(row.size):
        place = min((words[i] - _ONE) >> digits, half - 1)
        place = half - 1 - place if row[i] < start else half + place
        of[i] = place if row[i] == row[i] else many


@njit(error_model="numpy")
def _fill_bins(values, bins):  # type: ignore[no-untyped-def]
    """Count the values of a cell [replicate, value] into bins."""
    replicates, each = values.shape
    many = bins.rising.size
    start, scale, digits = _bin_map(values.reshape(replicates * each), many)
    for b in range(many):
        bins.rising[b] = 0
    bins.marked[:] = False
    for r in range(replicates):
        of, counts = bins.bin_of[r * each : (r + 1) * each], bins.reached[r]
        _find_bins(values[r], of, start, scale, digits, many)
        for b in range(many + 1):
            counts[b] = 0
        for i in range(each):
            counts[of[i]] += 1
        for b in range(1, many):
            counts[b] += counts[b - 1]
        for b in range(many):
            bins.rising[b] += counts[b]


@njit(error_model="numpy")
def _bin_at(rising, rank):  # type: ignore[no-untyped-def]
    """The bin that holds a rank, the first one from 1; ranks beyond the values are taken as the first and the last."""
    rank = min(max(rank, 1), rising[-1])
    low, high = 0, rising.size - 1
    while low < high:
        middle = (low + high) // 2
        if rising[middle] >= rank:
            high = middle
        else:
            low = middle + 1
    return low


@njit(error_model="numpy")
def _pick(values, bins, known):  # type: ignore[no-untyped-def]
    """The values of all marked bins, bin after bin, each in the order of `values` [value]; and a copy to be put in order."""
    total, before = 0, 0
    place = np.empty(bins.rising.size, dtype=np.int64)
    for b in range(bins.rising.size):
        bins.offset[b] = place[b] = total
        total += bins.rising[b] - before if bins.marked[b] else 0
        before = bins.rising[b]
    # Every value is noted at the next place, which moves on where its bin is marked: no branch that could be guessed wrong.
    chosen, count = np.empty(total + 1, dtype=np.int64), 0
    for i in range(values.size):
        chosen[count] = i
        count += bins.marked[bins.bin_of[i]]
    picked = np.empty(total)
    for k in range(total):
        b = bins.bin_of[chosen[k]]
        picked[place[b]] = values[chosen[k]]
        place[b] += 1
    known.many[0] = 0
    return picked, picked.copy()


@njit(error_model="numpy")
def _at(rank, bins, ordered, known):  # type: ignore[no-untyped-def]
    """The value at a rank, in a marked bin; -inf below 1, inf beyond the number of values."""
    if rank < 1:
        return -np.inf
    if rank > bins.rising[-1]:
        return np.inf
    b = _bin_at(bins.rising, rank)
    before = bins.rising[b - 1] if b > 0 else 0
    place = bins.offset[b] + rank - 1 - before
    # What is known stands between lower and higher values: it narrows the search.
    first, stop = bins.offset[b], bins.offset[b] + bins.rising[b] - before
    for i in range(known.many[0]):
        if known.last[i] < place:
            first = max(first, known.last[i] + 1)
        elif known.first[i] > place:
            stop = min(stop, known.first[i])
        else:
            return ordered[place] + 0.0
    known.first[known.many[0]], known.last[known.many[0]] = _select(ordered, first, stop, place)
    known.many[0] += 1
    return ordered[place] + 0.0  # one zero, not two


@njit(error_model="numpy")
def _hits(values, value, rank, bins, picked, hits):  # type: ignore[no-untyped-def]
    """How many values of each replicate are at or below the value at a rank; below an infinite one all that are finite."""
    replicates, each = values.shape
    if not np.isfinite(value):
        for r in range(replicates):
            count = 0
            for i in range(each):
                count += values[r, i] <= min(value, _LARGEST)
            hits[r] = count
        return
    b = _bin_at(bins.rising, rank)
    start = bins.offset[b]
    for r in range(replicates):
        before = bins.reached[r, b - 1] if b > 0 else 0
        stop = start + bins.reached[r, b] - before
        count = 0
        for i in range(start, stop):
            count += picked[i] <= value
        hits[r] = before + count
        start = stop


@njit(error_model="numpy")
def _half_width(hits, below, counted, factor):  # type: ignore[no-untyped-def]
    """Half the width of the interval of a share, sum of hits over sum of counted; see `estimate.ratio`; 1 where it cannot be told."""
    replicates, all_hits, total, squares = hits.size, 0, 0, 0.0
    for r in range(replicates):
        all_hits += hits[r] + below[r]
        total += counted[r]
    mean, share = total / replicates, all_hits / total
    for r in range(replicates):
        residual = (hits[r] + below[r] - share * counted[r]) / mean
        squares += residual * residual
    spread = max(np.sqrt(squares / (replicates - 1)), 1.0 / (np.sqrt(12.0) * mean)) if replicates > 1 else np.nan
    half = factor * spread / np.sqrt(replicates)
    return half if half == half else 1.0


@njit(error_model="numpy")
def _guess(ranks, bins):  # type: ignore[no-untyped-def]
    """Mark the bins between ranks that are a little farther out than the ends of the intervals will turn out to be."""
    replicates = bins.reached.shape[0]
    for rank in ranks:
        b, squares = _bin_at(bins.rising, rank), 0.0
        for r in range(replicates):
            squares += (bins.reached[r, b] - bins.rising[b] / replicates) ** 2
        around = int(_WIDER * np.sqrt(squares)) + _MORE
        for b in range(_bin_at(bins.rising, rank - around), _bin_at(bins.rising, rank + around) + 1):
            bins.marked[b] = True


@njit(error_model="numpy")
def _constant(values, total):  # type: ignore[no-untyped-def]
    """Whether all of so many values [value] are there, finite and equal."""
    low, high, count = np.inf, -np.inf, 0
    for i in range(values.size):
        if values[i] == values[i]:
            low, high, count = min(low, values[i]), max(high, values[i]), count + 1
    return count == total and low == high and np.isfinite(low)


@njit(error_model="numpy")
def _woodruff(values, below, left_out, shares, factor, bins, found):  # type: ignore[no-untyped-def]
    """Quantiles of a cell and their intervals into found [value, low, high; level]; see `quantiles.quantiles`."""
    replicates, each = values.shape
    flat, levels = values.reshape(replicates * each), shares.size
    ranks, ends = np.empty(levels, dtype=np.int64), np.empty(2 * levels, dtype=np.int64)
    counted, hits = np.empty(replicates, dtype=np.int64), np.empty(replicates, dtype=np.int64)
    known = Known(np.empty(3 * levels, dtype=np.int64), np.empty(3 * levels, dtype=np.int64), np.zeros(1, dtype=np.int64))
    total, shift = 0, 0
    for r in range(replicates):
        counted[r] = each - left_out[r]
        total += counted[r]
        shift += below[r]
    for level in range(levels):
        ranks[level] = max(int(np.ceil(shares[level] * total * _JUST_BELOW_ONE)), 1) - shift
    _guess(ranks, bins)
    picked, ordered = _pick(flat, bins, known)
    for level in range(levels):
        value = np.inf if ranks[level] + shift > total else _at(ranks[level], bins, ordered, known)
        _hits(values, value, ranks[level], bins, picked, hits)
        half = _half_width(hits, below, counted, factor)
        found[0, level] = value
        ends[level] = int(np.ceil((shares[level] - half) * total)) - shift
        ends[levels + level] = int(np.floor((shares[level] + half) * total)) + 1 - shift
    more = False
    for end in ends:
        b = _bin_at(bins.rising, end)
        more = more or not bins.marked[b]
        bins.marked[b] = True
    if more:
        picked, ordered = _pick(flat, bins, known)
    beyond = False
    for place in range(2 * levels):
        value = found[0, place % levels]
        end = np.inf if ends[place] + shift > total else _at(ends[place], bins, ordered, known)
        end = min(value, end) if place < levels else max(value, end)
        found[1 + place // levels, place % levels] = end
        beyond = beyond or not np.isfinite(end)
    if beyond and shift == 0 and _constant(flat, total):
        for level in range(levels):
            found[1, level] = found[2, level] = found[0, level]


@intrinsic
def _pointer(typingctx: Any, address: Any) -> Any:
    """An address as a pointer."""

    def generate(context: Any, builder: Any, signature: Any, args: Any) -> Any:
        return builder.inttoptr(args[0], context.get_value_type(types.voidptr))

    return types.voidptr(types.int64), generate


@njit(error_model="numpy")
def _gather(pieces, cell, values):  # type: ignore[no-untyped-def]
    """The values of one cell from all pieces [cell, member], given as [address, members], one piece after another."""
    start = 0
    for piece in range(pieces.shape[0]):
        members = pieces[piece, 1]
        row = carray(_pointer(pieces[piece, 0] + 8 * cell * members), (members,), np.float64)
        for i in range(members):
            values[start + i] = row[i]
        start += members


@kernel
def quantiles_1(pieces, first, absent, shares, factor, found, lost):  # type: ignore[no-untyped-def]
    """Quantiles of the cells from `first` on, nan where a value is missing; see `quantiles.quantiles`.

    pieces [address, members] of arrays [cell, member], the members of one replicate after those of another; absent [cell, replicate];
    shares [level]; factor: Student's t; found [cell; success, if low, if high; value, low, high; level]; lost [cell].
    """
    cells, replicates, size = lost.size, absent.shape[1], 0
    for piece in range(pieces.shape[0]):
        size += pieces[piece, 1]
    each, many = size // replicates, min(max(size // _PER_BIN, _FEWEST_BINS), _MOST_BINS)
    flat = np.empty(size)
    values = flat.reshape(replicates, each)
    reached, rising, offset = np.empty((replicates, many + 1), np.int64), np.empty(many, np.int64), np.empty(many, np.int64)
    bins = Bins(np.empty(size, np.uint16), reached, rising, np.empty(many + 1, np.bool_), offset)
    none, failed, missing = np.zeros(replicates, np.int64), np.empty(replicates, np.int64), np.empty(replicates, np.int64)
    for cell in range(cells):
        _gather(pieces, first + cell, flat)
        _fill_bins(values, bins)
        lost[cell], anybody = False, False
        for r in range(replicates):
            missing[r] = bins.reached[r, many]
            failed[r] = missing[r] - absent[cell, r]
            lost[cell] = lost[cell] or failed[r] != 0
            anybody = anybody or missing[r] != each
        for way, below, left_out in ((0, none, missing), (1, failed, absent[cell]), (2, none, absent[cell])):
            if way > 0 and not lost[cell]:
                break
            _woodruff(values, below, left_out, shares, factor, bins, found[cell, way])
        for k in range(3 * shares.size):
            end, level = k // shares.size, k % shares.size
            if not lost[cell]:
                found[cell, 1, end, level] = found[cell, 2, end, level] = found[cell, 0, end, level]
            if not anybody:
                found[cell, 0, end, level] = np.nan

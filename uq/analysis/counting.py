# mypy: disable-error-code="untyped-decorator"
"""Values counted into fixed bins, as machine code.

In: values of a block, a centre and a scale for each cell. Out: counts. Must not know: what the numbers mean. Kernels and what they call are
in this one file: see `compiled`.

With z = |x - centre| / scale, a bin is given by the leading binary digits of 4 + z: bins of 1/256 of the scale up to z = 4, twice as wide
up to 12, four times up to 28, and so on, on either side of the centre: even first, then nearly even in log z, without a logarithm. From
z = 28 on they are eight times as wide again (about 1/128 of the distance), so that twelve decades cost little memory. With a scale of a
quarter of the width from 5 to 95 %, half a bin is at most a thousandth of that width, or of the distance from the centre up to z = 28.
"""

from __future__ import annotations

import numpy as np
from numba import njit

from uq.solve.cached import kernel

# Binary digits of START + z that tell bins apart, near and far; its doublings that are near, and far.
NEAR_DIGITS, FAR_DIGITS = 10, 7
NEAR, FAR = 3, 28
START = 4.0
_FROM = NEAR << NEAR_DIGITS
# Bins on one side of the centre.
SIDE = _FROM + (FAR << FAR_DIGITS)
# What is in no bin: minus infinity, beyond the lowest bin, exactly the centre, beyond the highest bin, infinity, no number.
MINUS, BELOW, CENTRE, ABOVE, PLUS, MISSING = 0, 1, 2, 3, 4, 5
_START_WORD = np.uint64(1025 << 52)  # the bits of START
_NEAR_SHIFT, _FAR_SHIFT, _NEAR_WORDS = np.uint64(52 - NEAR_DIGITS), np.uint64(52 - FAR_DIGITS), np.uint64(NEAR << 52)
_LARGEST = float(np.finfo(np.float64).max)
# Cells and rows taken together, so that each cell's bins are in the first-level cache while its values are counted; rows of a step.
_CELLS, _MANY, _ROWS = 16, 512, 64


@njit(error_model="numpy")
def _places(values, shift, factor, words, numbers, places):  # type: ignore[no-untyped-def]
    """Where each of some values is counted: its bin, or behind the bins what it is instead. words, numbers: the same memory."""
    for r in range(values.size):
        numbers[r] = START + abs(values[r] - shift) * factor
    # No branch but choices, and few arrays: that becomes vector code.
    for r in range(values.size):
        digits = words[r] - _START_WORD
        near, far = np.int64(digits >> _NEAR_SHIFT), _FROM + np.int64((digits - _NEAR_WORDS) >> _FAR_SHIFT)
        places[r] = far if near >= _FROM else near
    for r in range(values.size):
        value, place = values[r], places[r]
        up, down = SIDE + place, SIDE - 1 - place
        up = 2 * SIDE + ABOVE if place >= SIDE else up
        down = 2 * SIDE + BELOW if place >= SIDE else down
        up = 2 * SIDE + PLUS if value > _LARGEST else up
        down = 2 * SIDE + MINUS if value < -_LARGEST else down
        place = up if value > shift else down
        place = 2 * SIDE + CENTRE if value == shift else place
        places[r] = 2 * SIDE + MISSING if value != value else place


@njit(error_model="numpy")
def _widen(values, low, high):  # type: ignore[no-untyped-def]
    """The lowest and the highest finite value so far, lane by lane."""
    for r in range(values.size):
        value = values[r] if abs(values[r]) <= _LARGEST else np.nan
        low[r] = value if value < low[r] else low[r]
        high[r] = value if value > high[r] else high[r]


@njit(error_model="numpy")
def _largest(values, shift, factor, sizes):  # type: ignore[no-untyped-def]
    """The larger of each size and |value - shift| factor; what is no number stays."""
    for r in range(values.size):
        size = abs((values[r] - shift) * factor)
        # Nothing is larger than what is no number.
        larger = size if size > sizes[r] else sizes[r]
        sizes[r] = size if size != size else larger


@njit(error_model="numpy")
def _first_and_wide(low, high, shift, factor, words, numbers, places):  # type: ignore[no-untyped-def]
    """The first bin between the bins of two values, and how many there are; none where the values are not in order."""
    if not low <= high:
        return 2 * SIDE, 0
    ends = np.array([low, high])
    _places(ends, shift, factor, words, numbers, places)
    for end in range(2):
        if places[end] >= 2 * SIDE:
            places[end] = SIDE if places[end] == 2 * SIDE + CENTRE else 0 if ends[end] < shift else 2 * SIDE - 1
    return places[0], places[1] - places[0] + 1


@njit(error_model="numpy")
def _turn(source, first, many, values):  # type: ignore[no-untyped-def]
    """Some cells of all rows, cell by cell."""
    for start in range(0, source.shape[0], _ROWS):
        for c in range(many):
            for r in range(start, min(start + _ROWS, source.shape[0])):
                values[c, r] = source[r, first + c]


@njit(error_model="numpy")
def _take_out(bins, first, found):  # type: ignore[no-untyped-def]
    """Move counts out of bins, which are 0 then."""
    for i in range(found.size):
        found[i] = bins[first + i]
        bins[first + i] = 0


@kernel
def count_1(a, b, centre, inverse, special, ends, begin, offset, per_half_width, sizes):  # type: ignore[no-untyped-def]
    """Count values of A and B rows [row, cell, ..] into special [cell, 6] and bins; ends [cell, 2]: lowest and highest finite value.

    sizes [quantity, A and B member], from 0: each member's largest |value - centre| per_half_width over the cells of a quantity, nan where
    one is no number; not worked out where there is no quantity. Returns the counts of all cells one after another, each from bin
    begin [cell] on; those of a cell stand from offset [cell] to the next.
    """
    cells = centre.size
    # Memory that is never touched costs nothing.
    scratch, found = np.zeros((_CELLS, 2 * SIDE + 6), dtype=np.int32), np.empty(cells * 2 * SIDE, dtype=np.int32)
    values, low, high = np.empty((_CELLS, _MANY + 8)), np.empty((_CELLS, _ROWS)), np.empty((_CELLS, _ROWS))
    numbers, places = np.empty(_ROWS), np.empty(_ROWS, dtype=np.int64)
    words = numbers.view(np.uint64)
    offset[0] = 0
    for strip in range(0, cells, _CELLS):
        many = min(_CELLS, cells - strip)
        for c in range(_CELLS):
            for r in range(_ROWS):
                low[c, r], high[c, r] = np.inf, -np.inf
        for outputs, member in ((a, 0), (b, a.shape[0])):
            for row in range(0, outputs.shape[0], _MANY):
                source = outputs[row : row + _MANY]
                _turn(source, strip, many, values)
                for c in range(many):
                    bins = scratch[c]
                    for start in range(0, source.shape[0], _ROWS):
                        column = values[c, start : min(start + _ROWS, source.shape[0])]
                        _places(column, centre[strip + c], inverse[strip + c], words, numbers, places)
                        _widen(column, low[c], high[c])
                        for r in range(column.size):
                            bins[places[r]] += 1
                        if sizes.shape[0] > 0:
                            place, at = (strip + c) // (cells // sizes.shape[0]), member + row + start
                            _largest(column, centre[strip + c], per_half_width[strip + c], sizes[place, at : at + column.size])
        for c in range(many):
            cell = strip + c
            ends[cell, 0], ends[cell, 1] = low[c].min(), high[c].max()
            first, wide = _first_and_wide(ends[cell, 0], ends[cell, 1], centre[cell], inverse[cell], words, numbers, places)
            begin[cell], offset[cell + 1] = first, offset[cell] + wide
            _take_out(scratch[c], first, found[offset[cell] : offset[cell + 1]])
            _take_out(scratch[c], 2 * SIDE, special[cell])
    # As long as it is needed, and no longer: what is held by a tally for a while must not hold the rest.
    return found[: offset[cells]].copy()


@kernel
def add_counts_1(left, left_begin, left_offset, right, right_begin, right_offset, begin, offset, counts):  # type: ignore[no-untyped-def]
    """Add the counts of all cells, of two histograms, into one whose bins hold theirs."""
    for cell in range(begin.size):
        here = counts[offset[cell] : offset[cell + 1]]
        first, start, stop = left_begin[cell] - begin[cell], left_offset[cell], left_offset[cell + 1]
        for i in range(here.size):
            here[i] = 0
        target = here[first : first + stop - start]
        for i in range(stop - start):
            target[i] = left[start + i]
        first, start, stop = right_begin[cell] - begin[cell], right_offset[cell], right_offset[cell + 1]
        target = here[first : first + stop - start]
        for i in range(stop - start):
            target[i] += right[start + i]

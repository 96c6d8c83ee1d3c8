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

from typing import Any, NamedTuple

import numpy as np
from numba import njit, types
from numba.extending import intrinsic

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
_NEAR_SHIFT, _FAR_SHIFT = 52 - NEAR_DIGITS, 52 - FAR_DIGITS
_LARGEST = float(np.finfo(np.float64).max)
# Cells and rows taken together, so that each cell's bins are in a near cache while its values are counted.
_CELLS, _MANY = 16, 256
# As many bins as a cell usually has, and more.
_USUAL = 3072
_LINE = 64  # bytes that memory sends at once
_START_BITS, _NEAR_BITS = np.int64(1025 << 52), np.int64(NEAR << 52)
_KEYS = np.int64(2**63 - 1)  # all bits but the sign
_INFINITE = np.int64(2047 << 52)  # the bits of infinity; those of what is no number are more
_BEYOND = START * 2.0 ** (NEAR + FAR)  # START + z from which a value is in no bin


@intrinsic
def _fetch(typingctx: Any, address: Any) -> Any:
    """Have what stands at an address brought near, for it is needed soon; any address is harmless."""

    def generate(context: Any, builder: Any, signature: Any, args: Any) -> Any:
        from llvmlite import ir

        pointer, number = builder.inttoptr(args[0], ir.IntType(8).as_pointer()), ir.IntType(32)
        kind = ir.FunctionType(ir.VoidType(), [pointer.type, number, number, number])
        function = builder.module.declare_intrinsic("llvm.prefetch", [pointer.type], kind)
        builder.call(function, [pointer, number(0), number(3), number(1)])
        return context.get_dummy_value()

    return types.void(types.int64), generate


@njit(error_model="numpy")
def _special(value, shift, number):  # type: ignore[no-untyped-def]
    """What a value is that has no bin, behind all bins; -1 where it has one. number: as in `_look`."""
    if value != value:
        return 2 * SIDE + MISSING
    if abs(value) > _LARGEST:
        return 2 * SIDE + (PLUS if value > 0 else MINUS)
    if value == shift:
        return 2 * SIDE + CENTRE
    if not number < _BEYOND:
        return 2 * SIDE + (ABOVE if value > shift else BELOW)
    return -1


@njit(error_model="numpy")
def _look(values, shift, factor, away, numbers):  # type: ignore[no-untyped-def]
    """How many of some values are within the bins, how many are the centre; away: values - shift; numbers: START + |away| factor."""
    for r in range(values.size):
        distance = values[r] - shift
        away[r] = distance
        numbers[r] = START + abs(distance) * factor
    inside, centres = 0, 0
    for r in range(values.size):
        inside += numbers[r] < _BEYOND
        centres += away[r] == 0.0
    return inside, centres


@njit(error_model="numpy")
def _put(away, places):  # type: ignore[no-untyped-def]
    """The places of values that are the centre or no number; returns how many are no number."""
    missing = 0
    for r in range(away.size):
        place = np.uint32(2 * SIDE + CENTRE) if away[r] == 0.0 else places[r]
        places[r] = np.uint32(2 * SIDE + MISSING) if away[r] != away[r] else place
        missing += away[r] != away[r]
    return missing


@njit(error_model="numpy")
def _bins(away_bits, number_bits, places):  # type: ignore[no-untyped-def]
    """The bins of values, whatever they are; what has none gets any number."""
    for r in range(places.size):
        digits = number_bits[r] - _START_BITS
        place = min(digits >> _NEAR_SHIFT, _FROM + ((digits - _NEAR_BITS) >> _FAR_SHIFT))
        # The sign's bit, all over: ~place is -1 - place.
        places[r] = SIDE + (place ^ (away_bits[r] >> 63))


@njit(error_model="numpy")
def _widen(bits, keys):  # type: ignore[no-untyped-def]
    """The lowest and the highest key of some finite values and of those so far; keys rise with the values, as whole numbers."""
    low, high = keys[0], keys[1]
    for r in range(bits.size):
        key = bits[r] ^ ((bits[r] >> 63) & _KEYS)
        low, high = min(low, key), max(high, key)
    keys[0], keys[1] = low, high


@njit(error_model="numpy")
def _widen_finite(bits, keys):  # type: ignore[no-untyped-def]
    """The same of those among the values that are finite."""
    for r in range(bits.size):
        key = bits[r] ^ ((bits[r] >> 63) & _KEYS)
        if (bits[r] & _KEYS) < _INFINITE:
            keys[0], keys[1] = min(keys[0], key), max(keys[1], key)


@njit(error_model="numpy")
def _ends(keys, ends):  # type: ignore[no-untyped-def]
    """The values of the lowest and the highest key; inf and -inf where there was no value."""
    bits, none = ends.view(np.int64), keys[0] > keys[1]
    for end in range(2):
        bits[end] = keys[end] ^ ((keys[end] >> 63) & _KEYS)
        # One zero, not two.
        ends[end] += 0.0
    if none:
        ends[0], ends[1] = np.inf, -np.inf


@njit(error_model="numpy")
def _largest(values, shift, factor, sizes):  # type: ignore[no-untyped-def]
    """The larger of each size and |value - shift| factor; what is no number stays."""
    for r in range(values.size):
        size = abs((values[r] - shift) * factor)
        # Nothing is larger than what is no number.
        larger = size if size > sizes[r] else sizes[r]
        sizes[r] = size if size != size else larger


@njit(error_model="numpy")
def _largest_numbers(away, factor, sizes):  # type: ignore[no-untyped-def]
    """The same where every value is a number."""
    for r in range(away.size):
        size = abs(away[r] * factor)
        sizes[r] = size if size > sizes[r] else sizes[r]


@njit(error_model="numpy")
def _first_and_wide(ends, shift, factor, step):  # type: ignore[no-untyped-def]
    """The first bin between the bins of two values, and how many there are; none where the values are not in order."""
    if not ends[0] <= ends[1]:
        return 2 * SIDE, 0
    _look(ends, shift, factor, step.away[:2], step.numbers[:2])
    _bins(step.away_bits, step.number_bits, step.places[:2])
    for end in range(2):
        if _special(ends[end], shift, step.numbers[end]) >= 0:
            step.places[end] = SIDE if ends[end] == shift else 0 if ends[end] < shift else 2 * SIDE - 1
    first, last = np.int64(step.places[0]), np.int64(step.places[1])
    return first, last - first + 1


@njit(error_model="numpy")
def _turn(source, first, many, values):  # type: ignore[no-untyped-def]
    """Some cells of all rows, cell by cell."""
    for r in range(source.shape[0]):
        row = source[r, first : first + many]
        for c in range(many):
            values[c, r] = row[c]


@njit(error_model="numpy")
def _fetch_rows(source):  # type: ignore[no-untyped-def]
    """Have rows brought near."""
    for r in range(source.shape[0]):
        address, wide = source[r].ctypes.data, 8 * source.shape[1]
        for at in range(0, wide, _LINE):
            _fetch(address + at)
        _fetch(address + wide - 1)


@njit(error_model="numpy")
def _take_out(bins, first, found):  # type: ignore[no-untyped-def]
    """Move counts out of bins, which are 0 then."""
    for i in range(found.size):
        found[i] = bins[first + i]
        bins[first + i] = 0


@njit(error_model="numpy")
def _count(values, bits, shift, factor, per_half_width, bins, keys, sizes, step):  # type: ignore[no-untyped-def]
    """Count some values of one cell, whose bits those are; step: memory for as many of them."""
    away, numbers, places = step.away[: values.size], step.numbers[: values.size], step.places[: values.size]
    inside, centres = _look(values, shift, factor, away, numbers)
    _bins(step.away_bits, step.number_bits, places)
    missing = _put(away, places) if centres or inside < values.size else 0
    if inside + missing < values.size:
        for r in range(values.size):
            place = _special(values[r], shift, numbers[r])
            places[r] = place if place >= 0 else places[r]
    if inside == values.size:
        _widen(bits, keys)
    else:
        _widen_finite(bits, keys)
    for r in range(values.size):
        bins[places[r]] += 1
    if sizes.size and centres + missing == 0:
        _largest_numbers(away, per_half_width, sizes)
    elif sizes.size:
        _largest(values, shift, per_half_width, sizes)


@njit(error_model="numpy")
def _room(found, used, more):  # type: ignore[no-untyped-def]
    """The same counts with room for more behind those used."""
    if used + more <= found.size:
        return found
    larger = np.empty(max(2 * found.size, used + more), dtype=np.int32)
    larger[:used] = found[:used]
    return larger


class Step(NamedTuple):
    """Memory for some values of a cell: see `_look`; the same bits as whole numbers; places in bins."""

    away: np.ndarray
    numbers: np.ndarray
    away_bits: np.ndarray
    number_bits: np.ndarray
    places: np.ndarray


@kernel
def count_2(a, b, centre, inverse, special, ends, begin, offset, per_half_width, sizes):  # type: ignore[no-untyped-def]
    """Count values of A and B rows [row, cell, ..] into special [cell, 6] and bins; ends [cell, 2]: lowest and highest finite value.

    sizes [quantity, A and B member], from 0: each member's largest |value - centre| per_half_width over the cells of a quantity, nan where
    one is no number; not worked out where there is no quantity. Returns the counts of all cells one after another, each from bin
    begin [cell] on; those of a cell stand from offset [cell] to the next.
    """
    cells, quantities = centre.size, sizes.shape[0]
    scratch, found = np.zeros((_CELLS, 2 * SIDE + 6), dtype=np.int32), np.empty(cells * _USUAL, dtype=np.int32)
    values, away, numbers = np.empty((_CELLS, _MANY + 8)), np.empty(_MANY), np.empty(_MANY)
    step = Step(away, numbers, away.view(np.int64), numbers.view(np.int64), np.empty(_MANY, dtype=np.uint32))
    bits, keys, no_sizes = values.view(np.int64), np.empty((_CELLS, 2), dtype=np.int64), np.empty(0)
    offset[0] = 0
    for strip in range(0, cells, _CELLS):
        many = min(_CELLS, cells - strip)
        keys[:, 0], keys[:, 1] = _KEYS, -_KEYS
        for outputs, member in ((a, 0), (b, a.shape[0])):
            for row in range(0, outputs.shape[0], _MANY):
                source, ahead = outputs[row : row + _MANY], outputs[row + _MANY : row + 2 * _MANY]
                rows, coming = source.shape[0], ahead.shape[0]
                _turn(source, strip, many, values)
                for c in range(many):
                    cell, first = strip + c, member + row
                    # While these values are counted the next ones come.
                    _fetch_rows(ahead[c * coming // many : (c + 1) * coming // many, strip : strip + many])
                    place, per = (cell * quantities // cells, per_half_width[cell]) if quantities else (0, 0.0)
                    size = sizes[place, first : first + rows] if quantities else no_sizes
                    _count(values[c, :rows], bits[c, :rows], centre[cell], inverse[cell], per, scratch[c], keys[c], size, step)
        for c in range(many):
            cell = strip + c
            _ends(keys[c], ends[cell])
            begin[cell], wide = _first_and_wide(ends[cell], centre[cell], inverse[cell], step)
            offset[cell + 1] = offset[cell] + wide
            found = _room(found, offset[cell], wide)
            _take_out(scratch[c], begin[cell], found[offset[cell] : offset[cell + 1]])
            _take_out(scratch[c], 2 * SIDE, special[cell])
    # What is held by a tally for a while must not hold much else.
    return found[: offset[cells]] if 2 * offset[cells] > found.size else found[: offset[cells]].copy()


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

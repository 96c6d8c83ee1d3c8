# mypy: disable-error-code="untyped-decorator"
"""What is done to every value of a block, as machine code; and whether all of the room's machine code is at hand.

In: plain arrays, C order. Out: filled arrays. Must not know: what the numbers mean. This, `selection` and `counting` are the room's door to
numba; they are imported inside functions. numba's cache does not see edits of other files, so a kernel and all it calls are in one file:
raise the number in its name whenever either changes.

Sums are along the binary tree over rows, lane by lane and without reassociation: their bits depend on the rows alone.
"""

from __future__ import annotations

import numpy as np
from numba import njit

from uq.analysis.selection import quantiles_1
from uq.solve.cached import at_hand, kernel

# Cells worked on at once: the partial sums of all levels of the tree stay in the first-level cache.
_STRIP = 128
# Rows that are turned into columns at once.
_ROWS = 64


@njit(inline="always")
def _climb(stack, row, numbers, cells):  # type: ignore[no-untyped-def]
    """Add one row's numbers to the sums: with the sum of its left neighbour, then with that of the pair's, as far as they are complete."""
    level = 0
    while row >> level & 1:
        for c in range(cells):
            numbers[c] = stack[level, c] + numbers[c]
        level += 1
    for c in range(cells):
        stack[level, c] = numbers[c]


@kernel
def base_sums_1(a, b, centre, lost, first, second):  # type: ignore[no-untyped-def]
    """Sums over rows of a + b and of a^2 + b^2, less the centre. a, b [row, cell, ..]; centre [cell]; lost [row, cell] or [0, cell]."""
    rows, top = a.shape[0], 0
    while 1 << top < rows:
        top += 1
    sums, squares = np.empty((top + 1, _STRIP)), np.empty((top + 1, _STRIP))
    x, y, masked = np.empty(_STRIP), np.empty(_STRIP), lost.shape[0] > 0
    for start in range(0, centre.size, _STRIP):
        cells = min(_STRIP, centre.size - start)
        shift = centre[start : start + cells]
        for row in range(rows):
            a_row, b_row = a[row, start : start + cells], b[row, start : start + cells]
            # Short loops over few arrays: only those become vector code.
            for c in range(cells):
                x[c] = a_row[c] - shift[c]
            for c in range(cells):
                y[c] = b_row[c] - shift[c]
            if masked:
                for c in range(cells):
                    if lost[row, start + c]:
                        x[c] = 0.0
                        y[c] = 0.0
            for c in range(cells):
                total = x[c] + y[c]
                y[c] = x[c] * x[c] + y[c] * y[c]
                x[c] = total
            _climb(sums, row, x, cells)
            _climb(squares, row, y, cells)
        for c in range(cells):
            first[start + c], second[start + c] = sums[top, c], squares[top, c]


@kernel
def mixed_sums_1(a, b, m, centre, lost, difference, product, square):  # type: ignore[no-untyped-def]
    """Sums over rows of m - a, of (b less the centre)(m - a) and of (m - a)^2. a, b, m [row, cell, ..]; the sums [cell]."""
    rows, top = a.shape[0], 0
    while 1 << top < rows:
        top += 1
    differences, products, squares = np.empty((top + 1, _STRIP)), np.empty((top + 1, _STRIP)), np.empty((top + 1, _STRIP))
    x, y, masked = np.empty(_STRIP), np.empty(_STRIP), lost.shape[0] > 0
    for start in range(0, centre.size, _STRIP):
        cells = min(_STRIP, centre.size - start)
        shift = centre[start : start + cells]
        for row in range(rows):
            a_row, b_row, m_row = a[row, start : start + cells], b[row, start : start + cells], m[row, start : start + cells]
            for c in range(cells):
                x[c] = m_row[c] - a_row[c]
            if masked:
                for c in range(cells):
                    if lost[row, start + c]:
                        x[c] = 0.0
            for c in range(cells):
                y[c] = b_row[c] - shift[c]
            if masked:
                for c in range(cells):
                    if lost[row, start + c]:
                        y[c] = 0.0
            for c in range(cells):
                y[c] = x[c] * y[c]
            _climb(products, row, y, cells)
            for c in range(cells):
                y[c] = x[c] * x[c]
            _climb(squares, row, y, cells)
            _climb(differences, row, x, cells)
        for c in range(cells):
            difference[start + c], product[start + c], square[start + c] = differences[top, c], products[top, c], squares[top, c]


@kernel
def lost_rows_1(outputs, lost):  # type: ignore[no-untyped-def]
    """Mark the cells of rows that are not finite. outputs [row, cell, ..]; lost [row, cell]."""
    for row in range(lost.shape[0]):
        for c in range(lost.shape[1]):
            if not np.isfinite(outputs[row, c]):
                lost[row, c] = True


@njit(error_model="numpy")
def _largest(values, first, stop, at, centre, inverse, largest):  # type: ignore[no-untyped-def]
    """The largest |value - centre| inverse of members from `at` on over cells from `first` to `stop`, nan where one is no number.

    values [cell, member]; centre, inverse [cell]; largest [member].
    """
    total = np.zeros(largest.size)
    for r in range(largest.size):
        largest[r] = 0.0
    for c in range(first, stop):
        column, shift, factor = values[c, at : at + largest.size], centre[c], inverse[c]
        for r in range(largest.size):
            size = abs((column[r] - shift) * factor)
            largest[r] = size if size > largest[r] else largest[r]
            # A size that is no number is never larger, but makes the total no number.
            total[r] += size
    for r in range(largest.size):
        largest[r] = largest[r] if total[r] == total[r] else total[r]


@kernel
def keep_1(outputs, first, centre, inverse, values, deviations):  # type: ignore[no-untyped-def]
    """Rows into columns `first`, .. of values [cell, member], and each member's largest |value - centre| inverse into deviations.

    outputs [row, cell, ..]; centre, inverse [cell]; deviations [watched, member]; the cells of one quantity stand together.
    """
    rows, each = outputs.shape[0], centre.size // deviations.shape[0]
    for start in range(0, rows, _ROWS):
        count, at = min(_ROWS, rows - start), first + start
        source = outputs[start : start + count]
        for c in range(centre.size):
            target = values[c, at : at + count]
            for r in range(count):
                target[r] = source[r, c]
        for place in range(deviations.shape[0]):
            _largest(values, place * each, (place + 1) * each, at, centre, inverse, deviations[place, at : at + count])


@kernel
def first_true_2(conditions, judged, first, lost, now, unsure):  # type: ignore[no-untyped-def]
    """The first of the judged times at which each condition is true, and the first at which it is unknown: whichever comes earlier, the
    other one their number, as both are where there is none. And how many are true and how many unknown at each time.

    conditions [row, limit, solved], bytes as of `solve.batch.Truth`; judged [judged]: places among the solved times; first, lost
    [row, limit]; now, unsure [limit, judged] are added to.
    """
    never = judged.size
    whole = never == conditions.shape[2]
    for row in range(conditions.shape[0]):
        for limit in range(conditions.shape[1]):
            course, counts, place, gone, bits = conditions[row, limit], now[limit], never, never, 0
            # Most courses pass hardly any limit: to look at all of them at once is faster than to look for the first.
            for j in range(course.size):
                bits |= course[j]
            if bits == 1 and whole:
                for j in range(never):
                    counts[j] += course[j]
            elif bits == 1:
                for j in range(never):
                    counts[j] += course[judged[j]]
            elif bits > 1:
                for j in range(never):
                    counts[j] += course[judged[j]] == 1
                    unsure[limit, j] += course[judged[j]] == 2
            if bits > 0:
                for j in range(never):
                    if course[judged[j]] == 1:
                        place = j
                        break
                    if course[judged[j]] == 2:
                        gone = j
                        break
            first[row, limit], lost[row, limit] = place, gone


KERNELS = (base_sums_1, mixed_sums_1, lost_rows_1, keep_1, first_true_2, quantiles_1)


def ready() -> bool:
    """Whether a run has made machine code here before: in this process, or in numba's cache on disk (newer than its file).

    Not whether all of it is there: most runs need only some of it (rows are rarely lost, not all is ranked), and would never be ready. That
    of `counting`, for runs beyond what is kept, takes some five seconds more the first time.
    """
    return any(at_hand(each) for each in KERNELS)

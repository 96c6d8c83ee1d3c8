"""Which entries of a sparse matrix its elimination touches: orders that keep zeros zero, and the plan of the work.

In: the pattern of a square matrix, its diagonal always in it. Out: `Elimination` (entry by entry) or `Envelope` (row by row). Must not
know: numbers. Pivots are those of the diagonal, in an order found from the pattern alone; no row is exchanged for another one.
"""

from __future__ import annotations

from collections.abc import Iterable
from dataclasses import dataclass

Place = tuple[int, int]


@dataclass(frozen=True)
class Elimination:
    """W = L U with the pivots in `order`; L has ones on its diagonal.

    lower: for every pivot p in order, the rows i with an entry (i, p) of L, and upper: the columns j with an entry (p, j) of U, each in
    the order of the pivots. What is filled in is among them.
    """

    order: tuple[int, ...]
    lower: tuple[tuple[int, ...], ...]
    upper: tuple[tuple[int, ...], ...]

    @property
    def entries(self) -> int:
        """Entries of L and U, the diagonal counted once."""
        return len(self.order) + sum(map(len, self.lower)) + sum(map(len, self.upper))

    @property
    def operations(self) -> int:
        """Multiplications of the elimination."""
        return sum(len(rows) * (1 + len(columns)) for rows, columns in zip(self.lower, self.upper, strict=True))


def elimination(size: int, places: Iterable[Place], most: int) -> Elimination | None:
    """The elimination of least fill that is easily found; None where it takes more than `most` multiplications.

    places: (row, column) of the entries. Every pivot is the one with the least (r - 1)(c - 1), where r and c count the entries left in its
    row and column (Markowitz, Management Science 3 (1957) 255-269; of a symmetric pattern this is the minimum degree); the first one of
    equals.
    """
    rows, columns = _rows_and_columns(size, places)
    left, order, lower, upper, spent = set(range(size)), [], [], [], 0
    while left:
        pivot = min(left, key=lambda i: (len(rows[i]) * len(columns[i]), i))
        left.remove(pivot)
        below, right = columns[pivot], rows[pivot]
        spent += len(below) * (1 + len(right))
        if spent > most:
            return None
        for i in below:
            rows[i] |= right
            rows[i] -= {i, pivot}
        for j in right:
            columns[j] |= below
            columns[j] -= {j, pivot}
        order.append(pivot)
        lower.append(below)
        upper.append(right)
    rank = {pivot: k for k, pivot in enumerate(order)}
    sorted_ = [tuple(tuple(sorted(part, key=rank.__getitem__)) for part in parts) for parts in (lower, upper)]
    return Elimination(tuple(order), *sorted_)


def _rows_and_columns(size: int, places: Iterable[Place]) -> tuple[list[set[int]], list[set[int]]]:
    """Of every row the columns and of every column the rows with an entry, those of the diagonal left out."""
    rows: list[set[int]] = [set() for _ in range(size)]
    columns: list[set[int]] = [set() for _ in range(size)]
    for i, j in places:
        if i != j:
            rows[i].add(j)
            columns[j].add(i)
    return rows, columns


@dataclass(frozen=True)
class Envelope:
    """W = L U with the pivots in `order`, row by row, each from its first to its last column that can be other than 0.

    first, last [row]: those columns, in the order of the pivots; base [row]: (row, column) lies at base + column in the room of all rows.
    """

    order: tuple[int, ...]
    first: tuple[int, ...]
    last: tuple[int, ...]

    @property
    def base(self) -> tuple[int, ...]:
        """Where rows begin, less their first column."""
        found, begin = [], 0
        for first, last in zip(self.first, self.last, strict=True):
            found.append(begin - first)
            begin += last - first + 1
        return tuple(found)

    @property
    def entries(self) -> int:
        """Room of all rows."""
        return sum(last - first + 1 for first, last in zip(self.first, self.last, strict=True))

    @property
    def operations(self) -> int:
        """Multiplications of the elimination."""
        return sum(1 + self.last[k] - k for row, first in enumerate(self.first) for k in range(first, row))


def envelope(size: int, places: Iterable[Place]) -> Envelope:
    """The envelope in reverse Cuthill-McKee order, or in the order of the rows as they are where that takes less work.

    (Cuthill and McKee, Proc. 24th Nat. Conf. ACM (1969) 157-172; reversed as George 1971 found.)
    """
    given = frozenset(places)
    found = [_enveloped(order, given) for order in (tuple(range(size)), _reverse_cuthill_mckee(size, given))]
    return min(found, key=lambda each: (each.operations, each.entries))


def _enveloped(order: tuple[int, ...], places: frozenset[Place]) -> Envelope:
    rank = {pivot: k for k, pivot in enumerate(order)}
    first, last = list(range(len(order))), list(range(len(order)))
    for i, j in places:
        row, column = rank[i], rank[j]
        first[row], last[row] = min(first[row], column), max(last[row], column)
    for row in range(len(order)):
        last[row] = max((last[row], *last[first[row] : row]))
    return Envelope(order, tuple(first), tuple(last))


def _reverse_cuthill_mckee(size: int, places: frozenset[Place]) -> tuple[int, ...]:
    rows, columns = _rows_and_columns(size, places)
    near = [rows[i] | columns[i] for i in range(size)]
    found: list[int] = []
    seen: set[int] = set()
    for begin in sorted(range(size), key=lambda i: (len(near[i]), i)):
        if begin in seen:
            continue
        end = _farthest(begin, near)
        line = [end]
        seen.add(end)
        for node in line:
            fresh = sorted(near[node] - seen, key=lambda i: (len(near[i]), i))
            seen.update(fresh)
            line.extend(fresh)
        found.extend(line)
    return tuple(reversed(found))


def _farthest(begin: int, near: list[set[int]]) -> int:
    """A node from which the others lie in many levels (George, Liu, Computer Solution of Large Sparse ... Systems, 4.3)."""
    depth = -1
    while True:
        levels = [[begin]]
        seen = {begin}
        while levels[-1]:
            beyond = {i for node in levels[-1] for i in near[node]} - seen
            seen |= beyond
            levels.append(sorted(beyond))
        if len(levels) <= depth:
            return begin
        depth = len(levels)
        begin = min(levels[-2], key=lambda i: (len(near[i]), i))

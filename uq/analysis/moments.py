"""Sums of outputs, their squares and the pick-freeze products over base rows: what means, deviations and Sobol' indices are made of.

Outputs are shifted by the pilot's centre, so that squares keep their digits. A base row that lost a member at a cell (its value is not
finite there, mixed members counted with their row) adds nothing at that cell and is counted as lost.
"""

from __future__ import annotations

from dataclasses import dataclass

import numpy as np

from uq.analysis.ask import Ask, Floats
from uq.analysis.pieces import Array, Pieces, add_along_tree, reversed_rows, tree_sum
from uq.analysis.sample import Sample
from uq.design.blocks import Parts

# Numbers in one array of a chunk of rows: three or four such arrays stay in the second-level cache.
_CHUNK = 65536


@dataclass(frozen=True, eq=False)
class Moments:
    """Sums by replicate of one kind of output; cells are (watched, output time) or outcomes.

    lost [cell] (rows); first: sum of a + b; second: of a^2 + b^2 [cell]; difference: of m - a; product: of b (m - a);
    square: of (m - a)^2 [input, cell]. All of outputs less the centre.
    """

    pieces: Pieces

    @classmethod
    def of(cls, sample: Sample, outputs: Parts, centre: Floats, grid: Array | None, ranked: bool) -> Moments:
        """The sums of one block. outputs: a, b [row, ..], mixed [input, row, ..]; grid: the places picked out of the last axis."""
        rows = sample.rows
        chunk = min(rows, max(1, 1 << (_CHUNK // max(1, centre.size)).bit_length() - 1))
        outputs = Parts(outputs.a, outputs.b, outputs.mixed if ranked else outputs.mixed[:0])
        worker = _Worker(outputs, centre, grid, chunk)
        with np.errstate(over="ignore", invalid="ignore"):
            sums = [worker.sums(start) for start in range(0, rows, chunk)]
        return cls(Pieces.of(sample.block, add_along_tree(sums)))

    def merge(self, other: Moments) -> Moments:
        """Both together."""
        return Moments(self.pieces.merge(other.pieces))


def watched_moments(ask: Ask, sample: Sample) -> Moments:
    """The sums of the watched quantities at the output times."""
    grid = None if ask.grid_is_all else ask.grid
    return Moments.of(sample, sample.values, ask.centre.reshape(-1), grid, ask.asks("ranking"))


def outcome_moments(ask: Ask, sample: Sample) -> Moments:
    """The sums of the outcomes."""
    return Moments.of(sample, sample.outcomes, ask.outcome_centre, None, ask.asks("ranking"))


class _Worker:
    """Sums a block chunk by chunk, in arrays [row, cell] that are used again: fresh memory costs more than the sums."""

    def __init__(self, outputs: Parts, centre: Floats, grid: Array | None, rows: int) -> None:
        self.outputs, self.grid = outputs, grid
        self.order = reversed_rows(rows)
        self.shape = (rows, len(centre))
        # A row for every row: numpy subtracts whole arrays twice as fast as one row from each of many.
        self.centre = np.tile(centre, (rows, 1))
        self.a, self.b, self.m, self.spare = (np.empty(self.shape) for _ in range(4))

    def sums(self, start: int) -> dict[str, Array]:
        """Over the chunk at `start`: as if nobody failed, and again with the lost rows left out if that gave anything not finite."""
        found = self._summed(start, None)
        if all(np.isfinite(sums).all() for sums in found.values()):
            return {"lost": np.zeros(self.shape[1], dtype=np.int64), **found}
        lost = np.zeros(self.shape, dtype=np.bool_)
        for part in (self.outputs.a, self.outputs.b, *self.outputs.mixed):
            lost |= ~np.isfinite(self._read(part, start, self.m))
        return {"lost": lost.sum(axis=0, dtype=np.int64), **self._summed(start, lost)}

    def _summed(self, start: int, lost: Array | None) -> dict[str, Array]:
        a, b = self._read(self.outputs.a, start, self.a), self._read(self.outputs.b, start, self.b)
        b -= self.centre
        shifted = np.subtract(a, self.centre, out=self.m)
        if lost is not None:
            shifted[lost] = 0.0
            b[lost] = 0.0
        first = tree_sum(np.add(shifted, b, out=self.spare))
        shifted *= shifted
        shifted += np.multiply(b, b, out=self.spare)
        second = tree_sum(shifted)
        shape = (len(self.outputs.mixed), self.shape[1])
        difference, product, square = np.empty(shape), np.empty(shape), np.empty(shape)
        for place, mixed in enumerate(self.outputs.mixed):
            m = self._read(mixed, start, self.m)
            m -= a
            if lost is not None:
                m[lost] = 0.0
            product[place] = tree_sum(np.multiply(m, b, out=self.spare))
            square[place] = tree_sum(np.multiply(m, m, out=self.spare))
            difference[place] = tree_sum(m)
        return {"first": first, "second": second, "difference": difference, "product": product, "square": square}

    def _read(self, outputs: Array, start: int, into: Floats) -> Floats:
        """The chunk's rows of outputs [row, ..], in the order of the tree."""
        chunk = outputs[start : start + len(self.order)]
        if self.grid is None and chunk.flags.c_contiguous:
            return np.take(chunk.reshape(self.shape), self.order, axis=0, out=into, mode="clip")
        chosen = chunk[self.order]
        into[:] = (chosen if self.grid is None else chosen[..., self.grid]).reshape(self.shape)
        return into

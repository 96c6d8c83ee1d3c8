"""The values of A and B rows, kept for exact quantiles.

Pieces are stored cell by cell, so that a finding copies one tile of cells at a time and never the whole.
"""

from __future__ import annotations

from collections.abc import Mapping
from dataclasses import dataclass

import numpy as np

from uq.analysis.ask import Ask, Floats
from uq.analysis.sample import Sample

_ROWS = 128
_CELLS = 16


@dataclass(frozen=True, eq=False)
class Kept:
    """Values [cell, member] of the A and B members of blocks, by (replicate, first row); merging copies nothing."""

    pieces: Mapping[tuple[int, int], Floats]

    def merge(self, other: Kept) -> Kept:
        """Both together."""
        if self.pieces.keys() & other.pieces.keys():
            raise ValueError("rows are kept twice")
        return Kept({**self.pieces, **other.pieces})

    @property
    def replicates(self) -> int:
        """How many replicates have values."""
        return len({replicate for replicate, _ in self.pieces})

    @property
    def members(self) -> int:
        """How many members have values."""
        return sum(piece.shape[1] for piece in self.pieces.values())

    def cells(self, start: int, stop: int, out: Floats | None = None) -> Floats:
        """The values of cells `start` to `stop`: [cell, replicate, member], contiguous; into `out` if given."""
        ordered = [self.pieces[key][start:stop] for key in sorted(self.pieces)]
        flat = None if out is None else out.reshape(stop - start, -1)
        return np.concatenate(ordered, axis=1, out=flat).reshape(stop - start, self.replicates, -1)


@dataclass(frozen=True, eq=False)
class Courses:
    """Of the watched quantities: values, a cell is a (watched, output time); and deviations.

    deviations [watched, member]: the largest deviation of each member from the pilot's centre over the output times, in half-widths of
    the pilot; nan where the member has no value at some time.
    """

    values: Kept
    deviations: Kept

    @classmethod
    def of(cls, ask: Ask, sample: Sample) -> Courses:
        """Those of one block."""
        key = (sample.block.replicate, sample.block.first)
        values = _by_cell(ask, sample)
        return cls(Kept({key: values}), Kept({key: _deviations(ask, values)}))

    def merge(self, other: Courses) -> Courses:
        """Both together."""
        return Courses(self.values.merge(other.values), self.deviations.merge(other.deviations))


def kept_outcomes(ask: Ask, sample: Sample) -> Kept:
    """The outcomes; a cell is an outcome."""
    found = np.concatenate([sample.outcomes.a, sample.outcomes.b]).T.copy()
    return Kept({(sample.block.replicate, sample.block.first): found})


def _by_cell(ask: Ask, sample: Sample) -> Floats:
    """The watched quantities at the output times [cell, member], A members before B members."""
    rows = sample.rows
    found = np.empty((len(ask.watched) * len(ask.grid), 2 * rows))
    for offset, part in ((0, sample.values.a), (rows, sample.values.b)):
        for start in range(0, rows, _ROWS):
            chosen = part[start : start + _ROWS]
            chosen = chosen if ask.grid_is_all else chosen[..., ask.grid]
            found[:, offset + start : offset + start + len(chosen)] = chosen.reshape(len(chosen), -1).T
    return found


def _deviations(ask: Ask, values: Floats) -> Floats:
    times, many = len(ask.grid), len(ask.watched)
    found = np.zeros((many, values.shape[1]))
    inverse = 1 / ask.half_width
    for place in range(many):
        course = values[place * times : (place + 1) * times]
        for start in range(0, times, _CELLS):
            tile = course[start : start + _CELLS] - ask.centre[place, start : start + _CELLS, None]
            tile *= inverse[place, start : start + _CELLS, None]
            np.abs(tile, out=tile)
            np.maximum(found[place], np.maximum.reduce(tile, axis=0), out=found[place])
    return found


def kept_bytes(ask: Ask, members: int) -> int:
    """Bytes needed to keep the values of so many A and B members."""
    bands = len(ask.watched) * (len(ask.grid) + 1) if ask.asks("bands") else 0
    return 8 * members * (bands + (len(ask.outcomes) if ask.asks("outcomes") else 0))

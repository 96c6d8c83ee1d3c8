"""The values of A and B rows, kept for exact quantiles.

Pieces are stored cell by cell, so that a finding copies one cell at a time and never the whole.
"""

from __future__ import annotations

from collections.abc import Mapping
from dataclasses import dataclass

import numpy as np

from uq.analysis.ask import Ask, Counts, Floats, kept_bytes
from uq.analysis.policy import Counted
from uq.analysis.quantiles import Levels, quantiles_of_pieces
from uq.analysis.sample import Sample

__all__ = ["Courses", "Kept", "kept_bytes", "kept_outcomes"]


@dataclass(frozen=True, eq=False)
class Kept:
    """Values [cell, member] of the A and B members of blocks, by (replicate, first row); merging copies nothing."""

    pieces: Mapping[tuple[int, int], Floats]

    def merge(self, other: Kept) -> Kept:
        """Both together."""
        if self.pieces.keys() & other.pieces.keys():
            raise ValueError("rows are kept twice")
        return Kept({**self.pieces, **other.pieces})

    def arrays(self) -> dict[str, Floats]:
        """Each piece as it is, by "replicate-first row"; nothing is copied."""
        return {f"{replicate}-{first}": piece for (replicate, first), piece in self.pieces.items()}

    @classmethod
    def of_arrays(cls, arrays: Mapping[str, Floats]) -> Kept:
        """The pieces that `arrays` tells of."""
        places = {name: name.split("-") for name in arrays}
        return cls({(int(place[0]), int(place[1])): np.ascontiguousarray(arrays[name]) for name, place in places.items()})

    @property
    def replicates(self) -> int:
        """How many replicates have values."""
        return len({replicate for replicate, _ in self.pieces})

    @property
    def members(self) -> int:
        """How many members have values."""
        return sum(piece.shape[1] for piece in self.pieces.values())

    def quantiles(self, first: int, stop: int, levels: Levels, absent: Counts | None = None) -> Counted:
        """Quantiles of the cells from `first` to `stop` [cell, level]; absent [cell, replicate]: see `quantiles.quantiles`."""
        absent = np.zeros((stop - first, self.replicates), dtype=np.int64) if absent is None else absent
        return quantiles_of_pieces([self.pieces[key] for key in sorted(self.pieces)], first, absent, levels)


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
        from uq.analysis.compiled import keep_1

        key, rows = (sample.block.replicate, sample.block.first), sample.rows
        # Machine code is made for arrays of one kind.
        centre, inverse = np.require(ask.centre.reshape(-1), np.float64, ["C", "W"]), 1 / ask.half_width.reshape(-1)
        values, deviations = np.empty((len(centre), 2 * rows)), np.empty((len(ask.watched), 2 * rows))
        for part, at in ((sample.courses.a, 0), (sample.courses.b, rows)):
            keep_1(np.require(part, np.float64, ["C", "W"]), at, centre, inverse, values, deviations)
        return cls(Kept({key: values}), Kept({key: deviations}))

    def merge(self, other: Courses) -> Courses:
        """Both together."""
        return Courses(self.values.merge(other.values), self.deviations.merge(other.deviations))


def kept_outcomes(ask: Ask, sample: Sample) -> Kept:
    """The outcomes; a cell is an outcome."""
    found = np.concatenate([sample.outcomes.a, sample.outcomes.b]).T.copy()
    return Kept({(sample.block.replicate, sample.block.first): found})

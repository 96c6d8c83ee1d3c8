"""Sums of outputs, their squares and the pick-freeze products over base rows: what means, deviations and Sobol' indices are made of.

Outputs are shifted by the pilot's centre, so that squares keep their digits. A base row that lost a member at a cell (its value is not
finite there, mixed members counted with their row) adds nothing at that cell and is counted as lost.
"""

from __future__ import annotations

from dataclasses import dataclass

import numpy as np

from uq.analysis.ask import Ask, Floats
from uq.analysis.pieces import Array, Pieces
from uq.analysis.sample import Sample
from uq.design.blocks import Parts


@dataclass(frozen=True, eq=False)
class Moments:
    """Sums by replicate of one kind of output; cells are (watched, output time) or outcomes.

    lost [cell] (rows); first: sum of a + b; second: of a^2 + b^2 [cell]; difference: of m - a; product: of b (m - a);
    square: of (m - a)^2 [input, cell]. All of outputs less the centre.
    """

    pieces: Pieces

    @classmethod
    def of(cls, sample: Sample, outputs: Parts, centre: Floats, ranked: bool) -> Moments:
        """The sums of one block. outputs: a, b [row, cell, ..], mixed [input, row, cell, ..], C order; centre [cell]."""
        # Machine code is made for arrays of one kind.
        a, b = (np.require(each, np.float64, ["C", "W"]) for each in (outputs.a, outputs.b))
        outputs = Parts(a, b, outputs.mixed if ranked else outputs.mixed[:0])
        centre = np.require(centre, np.float64, ["C", "W"])
        none = np.zeros((0, len(centre)), dtype=np.bool_)
        found = {"lost": np.zeros(len(centre), dtype=np.int64), **_summed(outputs, centre, none)}
        # As if nobody failed, and again with the lost rows left out if that gave anything not finite.
        if not all(np.isfinite(sums).all() for sums in found.values()):
            lost = _lost(outputs, len(centre))
            found = {"lost": lost.sum(axis=0, dtype=np.int64), **_summed(outputs, centre, lost)}
        return cls(Pieces.of(sample.block, found))

    def merge(self, other: Moments) -> Moments:
        """Both together."""
        return Moments(self.pieces.merge(other.pieces))


def watched_moments(ask: Ask, sample: Sample) -> Moments:
    """The sums of the watched quantities at the output times."""
    return Moments.of(sample, sample.courses, ask.centre.reshape(-1), ask.asks("ranking"))


def outcome_moments(ask: Ask, sample: Sample) -> Moments:
    """The sums of the outcomes."""
    return Moments.of(sample, sample.outcomes, ask.outcome_centre, ask.asks("ranking"))


def _summed(outputs: Parts, centre: Floats, lost: Array) -> dict[str, Array]:
    """Along the tree over the block's rows; what is lost [row, cell] adds 0."""
    from uq.analysis.compiled import base_sums_1, mixed_sums_1

    first, second = np.empty_like(centre), np.empty_like(centre)
    base_sums_1(outputs.a, outputs.b, centre, lost, first, second)
    difference, product, square = (np.empty((len(outputs.mixed), len(centre))) for _ in range(3))
    for place, mixed in enumerate(np.require(outputs.mixed, np.float64, ["C", "W"])):
        mixed_sums_1(outputs.a, outputs.b, mixed, centre, lost, difference[place], product[place], square[place])
    return {"first": first, "second": second, "difference": difference, "product": product, "square": square}


def _lost(outputs: Parts, cells: int) -> Array:
    """Which cells of each row lost a member [row, cell]."""
    from uq.analysis.compiled import lost_rows_1

    lost = np.zeros((len(outputs.a), cells), dtype=np.bool_)
    for part in (outputs.a, outputs.b, *outputs.mixed):
        lost_rows_1(part, lost)
    return lost

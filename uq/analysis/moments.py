"""Sums of outputs, their squares and the pick-freeze products over base rows: what means, deviations and Sobol' indices are made of.

Outputs are shifted by the pilot's centre, so that squares keep their digits, and where they are so large or so small that squares would
leave the range of a double they are divided by a power of two, which is exact: the unit of the sums. A base row that lost a member at a
cell (its value is not finite there, mixed members counted with their row) adds nothing at that cell and is counted as lost.
"""

from __future__ import annotations

from dataclasses import dataclass

import numpy as np

from uq.analysis.ask import Ask, Floats
from uq.analysis.pieces import Array, Pieces
from uq.analysis.sample import Sample
from uq.analysis.skewed import power_of_two
from uq.design.blocks import Parts

BASE, MIXED = ("lost", "first", "second"), ("difference", "product", "square")

# Half-widths in between are left alone: their squares, and those of values a hundred decades away, are within a double's range.
_PLAIN = 2.0**-340, 2.0**340


@dataclass(frozen=True, eq=False)
class InUnits:
    """What outputs are shifted by, and the power of two they are divided by [cell]."""

    centre: Floats
    unit: Floats

    @classmethod
    def of(cls, centre: Floats, size: Floats) -> InUnits:
        """For outputs about a centre [cell], of a size [cell]: their width in the pilot."""
        plain = (size >= _PLAIN[0]) & (size <= _PLAIN[1])
        return cls(centre, np.where(plain, 1.0, power_of_two(size)))

    def divided(self, outputs: Parts) -> tuple[Parts, Floats]:
        """The outputs and the centre, divided; as they are where all units are 1."""
        if (self.unit == 1.0).all():
            return outputs, self.centre
        cells = len(self.unit)
        return Parts(*(part[..., :cells] / self.unit for part in (outputs.a, outputs.b, outputs.mixed))), self.centre / self.unit


def watched_units(ask: Ask) -> InUnits:
    """Of the watched quantities at the output times: one unit for the whole course of each, so that it may be integrated."""
    size = ask.half_width.max(axis=1, initial=0.0)
    return InUnits.of(ask.centre.reshape(-1), np.repeat(size, len(ask.grid)))


def outcome_units(ask: Ask) -> InUnits:
    """Of the outcomes."""
    return InUnits.of(ask.outcome_centre, ask.outcome_scale.width)


@dataclass(frozen=True, eq=False)
class Moments:
    """Sums by replicate of one kind of output; cells are (watched, output time) or outcomes.

    lost [cell] (rows); first: sum of a + b; second: of a^2 + b^2 [cell]; difference: of m - a; product: of b (m - a);
    square: of (m - a)^2 [input, cell], this one alone where inputs depend on each other. All of outputs less the centre, in `unit` [cell],
    a power of two (1 as a rule).
    """

    pieces: Pieces
    unit: Floats

    @classmethod
    def of(cls, sample: Sample, outputs: Parts, scale: InUnits, sums: tuple[str, ...]) -> Moments:
        """The sums of one block. outputs: a, b [row, cell, ..], mixed [input, row, cell, ..], C order; sums: which of the mixed rows."""
        outputs, centre = scale.divided(Parts(outputs.a, outputs.b, outputs.mixed if sums else outputs.mixed[:0]))
        # Machine code is made for arrays of one kind.
        a, b = (np.require(each, np.float64, ["C", "W"]) for each in (outputs.a, outputs.b))
        outputs = Parts(a, b, outputs.mixed)
        centre = np.require(centre, np.float64, ["C", "W"])
        none = np.zeros((0, len(centre)), dtype=np.bool_)
        found = {"lost": np.zeros(len(centre), dtype=np.int64), **_summed(outputs, centre, none)}
        # As if nobody failed, and again with the lost rows left out if that gave anything not finite.
        if not all(np.isfinite(sums).all() for sums in found.values()):
            lost = _lost(outputs, len(centre))
            found = {"lost": lost.sum(axis=0, dtype=np.int64), **_summed(outputs, centre, lost)}
        return cls(Pieces.of(sample.block, {name: found[name] for name in (*BASE, *(sums or MIXED))}), scale.unit)

    def merge(self, other: Moments) -> Moments:
        """Both together."""
        return Moments(self.pieces.merge(other.pieces), self.unit)


def watched_moments(ask: Ask, sample: Sample) -> Moments:
    """The sums of the watched quantities at the output times."""
    return Moments.of(sample, sample.courses, watched_units(ask), _needed(ask))


def outcome_moments(ask: Ask, sample: Sample) -> Moments:
    """The sums of the outcomes."""
    return Moments.of(sample, sample.outcomes, outcome_units(ask), _needed(ask))


def _needed(ask: Ask) -> tuple[str, ...]:
    """Which sums of the mixed rows: with dependence only what Shapley effects are made of, as there may be many thousand sets."""
    return () if not ask.asks("ranking") else ("square",) if ask.dependent else MIXED


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

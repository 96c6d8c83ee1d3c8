"""Which means and standard deviations rest on few members, said beside them.

A mean or a deviation of a very skewed quantity is made by what lies far out, and where that is rarer than one member in all there are, no
interval made of these members can know of it. It shows in this: one member alone makes a large share of the sum of squares about the mean.
(A published rule of the kind: the largest term's share in the sum, Embrechts, Klueppelberg and Mikosch, Modelling Extremal Events, 1997,
6.2.6, from memory; there it tends to 0 where the moment is finite.)

Measured as in `uq.analysis.skewed`, at 16, 64 and 256 rows, the median of that share, and how often the intervals of the deviation and
of the mean hold the truth: lognormal with sigma 0.6 0.07 to 0.01, 95 and 95 to 96 %; 1 0.16 to 0.05, 95 and 96 %; sqrt(2) 0.27 to 0.12,
92 to 93 and 95 %; sqrt(3) 0.36 to 0.20, 90 to 91 and 94 %; 2 0.43 to 0.26, 83 to 87 and 93 to 95 %; 3 0.62 to 0.50, 46 to 52 and 81 to
90 %; of light-tailed quantities below 0.02, 96 %. So a deviation is said to rest on few members from a tenth on, a mean from a fifth on.
"""

from __future__ import annotations

from collections.abc import Mapping
from dataclasses import dataclass, replace

import numpy as np

from uq.analysis.ask import Floats
from uq.analysis.estimate import Estimate
from uq.analysis.finding import Variable
from uq.analysis.histograms import Histograms
from uq.analysis.kept import Kept
from uq.analysis.moments import Moments

# The share of one member in the sum of squares from which on it is said.
OF_MEAN, OF_DEVIATION = 0.2, 0.1
# A deviation known better than this (half-width over itself) cannot rest on one member for a tenth: no member need be looked at.
_SURE = 0.04
_MOST = {"mean": OF_MEAN, "sd": OF_DEVIATION}


CAUTION = (
    "rests on few members{times}: one member alone makes up to {share:.0f} % of the variance, so that rarer and farther values may be "
    "missing and the interval may be too narrow"
)


@dataclass(frozen=True, eq=False)
class Looked:
    """Values to look at, their sums, and the pilot's centre [cell]."""

    values: Kept | Histograms
    moments: Moments
    centre: Floats

    def largest_shares(self, deviation: Estimate) -> Floats:
        """The largest share of one member in the sum of squares about the mean [cell]; 0 where the deviation is known well, or missing."""
        with np.errstate(invalid="ignore"):
            doubtful = np.flatnonzero(deviation.high - deviation.value > _SURE * deviation.value)
        found = np.zeros(len(self.centre))
        if not len(doubtful):
            return found
        sums = self.moments.pieces.by_replicate()
        first, second = (sums[name].sum(axis=0)[doubtful] for name in ("first", "second"))
        counted = 2 * (self.moments.pieces.rows - sums["lost"]).sum(axis=0)[doubtful]
        with np.errstate(invalid="ignore", divide="ignore", over="ignore"):
            away = (_ends(self.values, doubtful) - self.centre[doubtful]) / self.moments.unit[doubtful] - first / counted
            shares = (away**2).max(axis=0) / (second - first**2 / counted)
        # Members that are infinite, or whose row is lost, are in no sum.
        found[doubtful] = np.clip(np.nan_to_num(shares, nan=0.0, posinf=0.0, neginf=0.0), 0.0, 1.0)
        return found


def _ends(values: Kept | Histograms, cells: np.ndarray) -> Floats:
    """The lowest and the highest value of some cells [2, cell]."""
    if isinstance(values, Histograms):
        ends = np.stack([bins.ends[cells] for bins in values.held.values()])
        return np.stack([ends[..., 0].min(axis=0), ends[..., 1].max(axis=0)])
    low, high = np.full(len(cells), np.inf), np.full(len(cells), -np.inf)
    for piece in values.pieces.values():
        held = piece[cells]
        low, high = np.fmin(low, np.fmin.reduce(held, axis=1)), np.fmax(high, np.fmax.reduce(held, axis=1))
    return np.stack([low, high])


def told(variables: Mapping[str, Variable], shares: Floats) -> dict[str, Variable]:
    """The variables mean and sd, with `largest_share` of one member and a `caution` where that is large; shares [..]: of their numbers."""
    found = dict(variables)
    for name, most in _MOST.items():
        variable = found[name]
        known = np.isfinite(variable.data)
        share = float(np.max(np.where(known, shares, 0.0), initial=0.0))
        if share >= most:
            many = int(np.sum(known & (shares >= most)))
            times = f" at {many} of {known.size} times" if known.ndim else ""
            said = {"largest_share": float(f"{share:.3g}"), "caution": CAUTION.format(times=times, share=100 * share)}
            found[name] = replace(variable, attributes={**variable.attributes, **said})
    return found

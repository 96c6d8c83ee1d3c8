"""Observations of a watched quantity beside its band: where in the forecast each lies, and the share of them inside the band.

Observation times are solved times, so nothing is interpolated. An observation with standard deviation s is compared with what a member
would have been measured as: its share at or below the observation is the mean over members of the normal distribution function at
(observation - member)/s, or plainly of members at or below it where s is 0. It lies inside the band between the outermost quantiles where
that share lies between their levels (the probability integral transform, Dawid 1984, doi:10.2307/2981683).
"""

from __future__ import annotations

from dataclasses import dataclass

import numpy as np
from numpy.typing import NDArray
from scipy.special import ndtr

from uq.analysis.ask import Ask, Counts, Floats
from uq.analysis.ask import Measured as Observed
from uq.analysis.estimate import Estimate, ratio, rounding_sd
from uq.analysis.finding import Finding, Variable
from uq.analysis.pieces import Pieces, reversed_rows, tree_sum
from uq.analysis.policy import WITHHELD, Counted, Named
from uq.analysis.probabilities import clopper_pearson
from uq.analysis.quantiles import outermost
from uq.analysis.sample import Sample

Flags = NDArray[np.bool_]


@dataclass(frozen=True, eq=False)
class Measured:
    """Sums by replicate over A and B members, all observations one after another: below [observation], lost [observation]."""

    pieces: Pieces

    @classmethod
    def of(cls, ask: Ask, sample: Sample) -> Measured:
        """Those of one block."""
        sums = [_below(ask, sample, each) for each in ask.measured]
        below = np.concatenate([each[0] for each in sums], axis=1)[reversed_rows(sample.rows)]
        lost = np.concatenate([each[1] for each in sums])
        return cls(Pieces.of(sample.block, {"below": tree_sum(below), "lost": lost}))

    def merge(self, other: Measured) -> Measured:
        """Both together."""
        return Measured(self.pieces.merge(other.pieces))


def _below(ask: Ask, sample: Sample, observed: Observed) -> tuple[Floats, Counts]:
    """Sum over the A and the B member of every row of the share at or below each observation [row, observation]; members lost at each."""
    places = [ask.place(time) for time in observed.times]
    values, sd = np.array(observed.values), np.array(observed.sd)
    total, lost = np.zeros((sample.rows, len(places))), np.zeros(len(places), dtype=np.int64)
    for part in (sample.values.a, sample.values.b):
        away = values - part[:, observed.watched][:, places]
        known = ~np.isnan(away)
        with np.errstate(invalid="ignore", divide="ignore"):
            share = np.where(sd > 0, ndtr(away / sd), away >= 0)
        total += np.where(known, share, 0.0)
        lost += (~known).sum(axis=0)
    return total, lost


def findings(ask: Ask, tally: Measured) -> tuple[Finding, ...]:
    """One group measured/W for every watched quantity that was measured."""
    sums = tally.pieces.by_replicate()
    members = 2 * tally.pieces.rows
    exact = np.array([sd == 0 for observed in ask.measured for sd in observed.sd])
    counted = np.stack([sums["lost"], np.full_like(sums["lost"], members)])
    found, groups, start = _shares(sums["below"], counted, exact, ask.confidence), [], 0
    for observed in ask.measured:
        here = slice(start, start + len(observed.times))
        groups.append(_finding(ask, observed, found.map(lambda array, here=here: array[here])))  # type: ignore[misc]
        start = here.stop
    return tuple(groups)


def _shares(below: Floats, members: Counts, exact: Flags, confidence: float) -> Counted:
    """Shares at or below [observation], with the lost members left out, counted above and counted below every observation.

    members [2, replicate, observation]: those lost, and all. exact [observation]: the shares are of whole members, and round.
    """
    lost, everybody = members

    def share(hits: Floats, counted: Counts) -> Estimate:
        found = ratio(hits, counted, confidence, np.where(exact, rounding_sd(counted), 0.0))
        return Estimate(found.value, *(np.clip(end, 0.0, 1.0) for end in (found.low, found.high)))

    success = share(below, everybody - lost)
    gone = np.asarray(lost.any(axis=0))
    if not gone.any():
        return Counted.complete(success)
    return Counted(success, share(below, everybody), share(below + lost, everybody), gone)


def _finding(ask: Ask, observed: Observed, found: Counted) -> Finding:
    quantity = ask.watched[observed.watched]
    label, shown = quantity.label or quantity.name, ("observation",)
    difference = quantity.difference_unit or quantity.unit
    variables = {
        "value": Variable(shown, np.array(observed.values, dtype=np.float64), f"measured: {label}", quantity.unit),
        "time_measured": Variable(shown, np.array(observed.times, dtype=np.float64), "when it was measured", ask.time_unit),
        "sd": Variable(shown, np.array(observed.sd, dtype=np.float64), "standard deviation of the measurement", difference),
    }
    words = f"share of members whose measurement would have been at or below that: {label}"
    variables |= Named("below", shown, words).counted(found, ask.failures)
    low, high = min(ask.quantiles), max(ask.quantiles)
    ends = Estimate(*(variables[f"below{end}"].data for end in ("", "_low", "_high")))
    inside = _share_of((ends.value >= low) & (ends.value <= high), ends.value, ask.confidence)
    surely = _share_of((ends.low >= low) & (ends.high <= high), ends.value, ask.confidence)
    perhaps = _share_of((ends.high >= low) & (ends.low <= high), ends.value, ask.confidence)
    inside = Estimate(inside.value, surely.low, perhaps.high)
    share = float(f"{outermost(ask.quantiles):.9g}")
    words = f"share of the observations between the outermost quantiles of the forecast, measurement error included: {label}"
    reason = WITHHELD if ask.failures == "refuse" and found.lost.any() else ""
    comment = "interval: exact binomial, as if observations were independent; those that may lie inside or not count to either side"
    variables |= Named("share_inside", (), words, "1", {"share": share, "comment": comment}).variables(inside, reason)
    return Finding(f"measured/{quantity.name}", variables)


def _share_of(flags: Flags, known: Floats, confidence: float) -> Estimate:
    """The share of true ones among observations, with the exact binomial interval; nan where not all are known."""
    if np.isnan(known).any() or not len(known):
        return Estimate(*(np.array(np.nan) for _ in range(3)))
    return clopper_pearson(np.array(int(flags.sum())), np.array(len(flags)), confidence)

"""What to expect of every outcome: quantiles, mean, deviation, and the share of members without a value."""

from __future__ import annotations

from dataclasses import dataclass

import numpy as np

from uq.analysis.ask import Ask, Counts
from uq.analysis.bands import Moment, mean_and_deviation, moment_variables
from uq.analysis.few import Looked, told
from uq.analysis.finding import Finding
from uq.analysis.histograms import Histograms
from uq.analysis.kept import Kept
from uq.analysis.moments import Moments
from uq.analysis.pieces import Pieces
from uq.analysis.policy import Named
from uq.analysis.probabilities import probability_both_ways
from uq.analysis.quantiles import Levels
from uq.analysis.sample import Sample, failed


@dataclass(frozen=True, eq=False)
class Absent:
    """Counts by replicate of A and B members: `without` a value though they did not fail [outcome], and `failed`."""

    pieces: Pieces

    @classmethod
    def of(cls, ask: Ask, sample: Sample) -> Absent:
        """Those of one block."""
        without = np.zeros(sample.outcomes.a.shape[1], dtype=np.int64)
        lost = 0
        for outcomes, status in ((sample.outcomes.a, sample.status.a), (sample.outcomes.b, sample.status.b)):
            gone = failed(status)
            lost += int(np.count_nonzero(gone))
            # A sum is nan wherever a value is, and costs less than a look at each.
            with np.errstate(invalid="ignore"):
                whole = not np.isnan(outcomes.sum())
            if not whole:
                without += np.count_nonzero(np.isnan(outcomes) & ~gone[:, None], axis=0)
        return cls(Pieces.of(sample.block, {"without": without, "failed": np.array(lost)}))

    def merge(self, other: Absent) -> Absent:
        """Both together."""
        return Absent(self.pieces.merge(other.pieces))


@dataclass(frozen=True, eq=False)
class Taken:
    """The tallies that the findings are made of."""

    kept: Kept | Histograms
    moments: Moments
    absent: Absent


def findings(ask: Ask, tallies: Taken) -> tuple[Finding, ...]:
    """One group outcomes/O for every outcome."""
    counts = tallies.absent.pieces.by_replicate()
    members = 2 * tallies.absent.pieces.rows
    without: Counts = counts["without"]
    gone: Counts = np.broadcast_to(counts["failed"][:, None], without.shape)
    found = tallies.kept.quantiles(0, len(ask.outcomes), Levels(ask.quantiles, ask.confidence), without.T)
    moment = mean_and_deviation(tallies.moments, ask.outcome_centre, ask.confidence)
    shares = Looked(tallies.kept, tallies.moments, ask.outcome_centre).largest_shares(moment.deviation)
    missing = probability_both_ways(without, gone, members, ask.confidence)
    groups = []
    for place, quantity in enumerate(ask.outcomes):
        label = quantity.label or quantity.name
        here = found.at(place)
        variables = Named("quantiles", ("quantile",), f"quantiles of {label}", quantity.unit).counted(here, ask.failures)
        withheld = np.asarray(here.lost.any() and ask.failures == "refuse")
        variables |= told(moment_variables(Moment(quantity, ()), moment, place, withheld), shares[place])
        variables |= Named("missing", (), f"share of members without a value of {label}").counted(missing.at(place), ask.failures)
        groups.append(Finding(f"outcomes/{quantity.name}", variables))
    return tuple(groups)

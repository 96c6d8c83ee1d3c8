"""What drives the uncertainty: first-order and total Sobol' indices over time and overall, of quantities, outcomes and limits.

Formulas: `uq.analysis.sobol`. An index is missing, never 0, where the variance is within the noise of the solver.
"""

from __future__ import annotations

from dataclasses import dataclass

import numpy as np
from numpy.typing import NDArray

from uq.analysis.ask import Ask, Counts, Floats
from uq.analysis.estimate import Estimate
from uq.analysis.finding import Finding, Variable
from uq.analysis.moments import Moments
from uq.analysis.passings import Passings
from uq.analysis.pieces import Array
from uq.analysis.policy import LARGEST_LOSS, TOO_MANY_LOST, Named
from uq.analysis.sobol import first_numerator, index, over_time, total_numerator, variance

FEWEST = 500
NOISE = "the variance is within the noise of the solver"
TOO_FEW = f"ranking a limit needs {FEWEST} members that passed and {FEWEST} that did not"

KINDS = (("first", "first-order index"), ("total", "total index"))
Flags = NDArray[np.bool_]


@dataclass(frozen=True, eq=False)
class Shares:
    """Numerators [kind, replicate, input, cell] and variances [replicate, cell] of indices; lost: cells with too many rows lost."""

    numerators: Floats
    variances: Floats
    lost: Flags

    @classmethod
    def of(cls, moments: Moments) -> Shares:
        """From the sums of outputs; cells are those of the moments."""
        sums = moments.pieces.by_replicate()
        asked = moments.pieces.rows
        rows = asked - sums["lost"]
        with np.errstate(invalid="ignore", divide="ignore", over="ignore"):
            mean = sums["first"].sum(axis=0) / (2 * rows.sum(axis=0))
            first = first_numerator(sums["product"], sums["difference"], mean, rows[:, None])
            numerators = np.stack([first, total_numerator(sums["square"], rows[:, None])])
            variances = variance(sums["first"], sums["second"], mean, rows)
        return cls(numerators, variances, _too_many(sums["lost"], asked))

    def cells(self, here: slice | NDArray[np.intp]) -> Shares:
        """Some of the cells."""
        return Shares(self.numerators[..., here], self.variances[..., here], self.lost[..., here])

    def indices(self, kind: int, confidence: float) -> Estimate:
        """First-order or total indices [input, cell]."""
        return index(self.numerators[kind], self.variances, confidence)

    def overall(self, times: Floats) -> Shares:
        """Integrated over time, one cell; lost where any time is."""
        lost = np.asarray(self.lost.any(keepdims=True))
        return Shares(over_time(self.numerators, times)[..., None], over_time(self.variances, times)[..., None], lost)

    def noise(self, floor: float) -> Flags:
        """Cells whose variance is at or below the square of the floor, or is no number."""
        return np.asarray(~(self.variances.mean(axis=0) > floor**2))


def _too_many(lost: Counts, rows: int) -> Flags:
    return np.asarray(lost.sum(axis=0) > LARGEST_LOSS * rows * len(lost))


def watched_findings(ask: Ask, moments: Moments) -> tuple[Finding, ...]:
    """One group ranking/W for every watched quantity: over time, and overall."""
    shares = Shares.of(moments)
    times = len(ask.grid)
    groups = []
    for place, quantity in enumerate(ask.watched):
        here = shares.cells(slice(place * times, (place + 1) * times))
        label = quantity.label or quantity.name
        variables = _variables(ask, here, here.noise(ask.floor[place]), _Words(label, "", ("input", "time")))
        overall = here.overall(ask.times)
        length = ask.times[-1] - ask.times[0] if len(ask.times) > 1 else 1.0
        quiet = overall.noise(ask.floor[place] * float(np.sqrt(length)))
        variables |= _variables(ask, overall, quiet, _Words(f"{label}, variance-weighted over time", "_overall", ("input",)))
        groups.append(Finding(f"ranking/{quantity.name}", variables))
    return tuple(groups)


def outcome_findings(ask: Ask, moments: Moments) -> tuple[Finding, ...]:
    """One group ranking/O for every outcome."""
    shares = Shares.of(moments)
    groups = []
    for place, quantity in enumerate(ask.outcomes):
        here = shares.cells(slice(place, place + 1))
        words = _Words(quantity.label or quantity.name, "", ("input",))
        groups.append(Finding(f"ranking/{quantity.name}", _variables(ask, here, here.noise(ask.outcome_floor[place]), words)))
    return tuple(groups)


def limit_findings(ask: Ask, passings: Passings) -> tuple[Finding, ...]:
    """One group ranking/L for every limit: of the indicator 'true by then', at the output times and at its `by` times."""
    counts = passings.pieces.by_replicate()
    grid = np.searchsorted(ask.judged, ask.grid)
    groups = []
    for place, limit in enumerate(ask.limits):
        shares, few = _of_limit({name: counts[name][:, place] for name in _INDICATOR}, passings.pieces.rows)
        by = np.searchsorted(ask.judged, np.array([ask.place(time) for time in limit.by], dtype=np.intp))
        label = f"having been true by then: {limit.label or limit.name}"
        variables = _variables(ask, shares.cells(grid), few[grid], _Words(label, "", ("input", "time"), TOO_FEW))
        variables["by"] = Variable(("by",), np.asarray(limit.by, dtype=np.float64), "time by which", ask.time_unit)
        variables |= _variables(ask, shares.cells(by), few[by], _Words(label, "_by", ("input", "by"), TOO_FEW))
        groups.append(Finding(f"ranking/{limit.name}", variables))
    return tuple(groups)


_INDICATOR = ("lost", "a", "b", "both", "m", "a_and_m", "b_and_m")


def _of_limit(counts: dict[str, Array], asked: int) -> tuple[Shares, Flags]:
    """Shares of the indicator, and where too few members passed or did not, from counts of places [replicate, (input), place]."""
    by_then = {name: array.cumsum(axis=-1)[..., :-1] for name, array in counts.items()}
    lost, a, b = (by_then[name] for name in ("lost", "a", "b"))
    rows = asked - lost
    with np.errstate(invalid="ignore", divide="ignore"):
        mean = (a + b).sum(axis=0) / (2 * rows.sum(axis=0))
        product = by_then["b_and_m"] - by_then["both"][:, None]
        difference = by_then["m"] - a[:, None]
        # (a - m)^2 is 1 where exactly one of them passed.
        square = a[:, None] + by_then["m"] - 2 * by_then["a_and_m"]
        first = first_numerator(product, difference, mean, rows[:, None])
        numerators = np.stack([first, total_numerator(square, rows[:, None])])
        variances = variance(a + b, a + b, mean, rows)
    passed, members = (a + b).sum(axis=0), 2 * rows.sum(axis=0)
    few = np.minimum(passed, members - passed) < FEWEST
    return Shares(numerators, variances, _too_many(lost, asked)), np.asarray(few)


@dataclass(frozen=True)
class _Words:
    """Of what, the ending of the name, dimensions, and the reason why quiet cells are missing."""

    label: str
    ending: str
    dims: tuple[str, ...]
    reason: str = NOISE


def _variables(ask: Ask, shares: Shares, quiet: Flags, words: _Words) -> dict[str, Variable]:
    """Both kinds of index, nan where quiet or lost, with the reason."""
    known = ~quiet & ~shares.lost
    reasons = [text for text, flags in ((TOO_MANY_LOST, shares.lost), (words.reason, quiet & ~shares.lost)) if flags.any()]
    variables: dict[str, Variable] = {}
    for kind, (name, called) in enumerate(KINDS):
        found = shares.indices(kind, ask.confidence).where(known)
        if len(words.dims) == 1:
            found = Estimate(found.value[:, 0], found.low[:, 0], found.high[:, 0])
        variables |= Named(name + words.ending, words.dims, f"{called} of {words.label}").variables(found, "; ".join(reasons))
    return variables

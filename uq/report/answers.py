"""The answers of a result as values: what the summary and the machine form are both made of."""

from __future__ import annotations

import math
from collections.abc import Mapping
from dataclasses import dataclass
from typing import Any

from uq.report.spoken import Clock


@dataclass(frozen=True)
class Estimate:
    """A number and the ends of its interval; if_low, if_high: with the failed members counted both ways. nan where there is none."""

    value: float = math.nan
    low: float = math.nan
    high: float = math.nan
    if_low: float = math.nan
    if_high: float = math.nan

    @property
    def missing(self) -> bool:
        """Whether there is no number."""
        return math.isnan(self.value)

    @property
    def both_ways(self) -> bool:
        """Whether it makes a difference how the failed members are counted."""
        return not math.isnan(self.if_low) and self.if_low != self.if_high


@dataclass(frozen=True)
class InputRow:
    """What is known of one uncertain input, as texts of the study; evidence is None where it is not stated."""

    name: str
    label: str
    unit: str
    distribution: str
    source: str
    kind: str
    evidence: int | None
    group: str = ""


@dataclass(frozen=True)
class LimitAnswer:
    """Of one limit: probability at every `by`, the verdict, when it comes true first (level, time) where it does.

    ever: at every output time the upper end of the probability that it has been true by then. given: whether members of whom it is not
    known are left out.
    """

    name: str
    label: str
    when: str
    accept: float | None
    verdict: str
    by: tuple[tuple[float, Estimate], ...]
    first_time: tuple[tuple[float, Estimate], ...]
    reason: str
    ever: tuple[tuple[float, float], ...] = ()
    given: bool = False


@dataclass(frozen=True)
class QuantityAnswer:
    """Of one watched quantity at its last time, or of one outcome (time is nan): quantiles by level, mean, deviation, the nominal run.

    cautions: what is said of a mean or a deviation that rests on few members.
    """

    name: str
    label: str
    unit: str
    time: float
    quantiles: tuple[tuple[float, Estimate], ...]
    mean: Estimate
    sd: Estimate
    nominal: float
    missing: Estimate
    reason: str
    cautions: tuple[str, ...] = ()

    @property
    def spread(self) -> float:
        """How far the members spread: between the outermost quantiles."""
        return self.quantiles[-1][1].value - self.quantiles[0][1].value if self.quantiles else math.nan


@dataclass(frozen=True)
class Shares:
    """Shares in the variance of something: by itself (first), with its interactions (total), or with dependence its Shapley effect."""

    first: Estimate
    total: Estimate
    shapley: Estimate = Estimate()

    @property
    def share(self) -> Estimate:
        """What inputs are ranked by: the total share, with dependence the Shapley effect."""
        return self.total if self.shapley.missing else self.shapley


@dataclass(frozen=True)
class Driver:
    """An input and its shares; or inputs that are drawn together (`members`), under one name."""

    input: InputRow
    shares: Shares
    members: tuple[InputRow, ...] = ()

    @property
    def rows(self) -> tuple[InputRow, ...]:
        """The inputs behind it."""
        return self.members or (self.input,)


@dataclass(frozen=True)
class RankingAnswer:
    """What drives one thing: `of` is bands (overall), outcomes or limits (at `time`, the last `by`); drivers in the order of the study.

    places: what has a place in the order: the inputs, or in place of those drawn together what they are together. groups: the shares of
    other inputs taken together, by the name of the group. shapley: whether shares are Shapley effects; then `no_total` says why there is no
    total share.
    """

    name: str
    label: str
    of: str
    time: float
    drivers: tuple[Driver, ...]
    reason: str
    groups: tuple[tuple[str, Shares], ...] = ()
    shapley: bool = False
    no_total: str = ""
    places: tuple[Driver, ...] = ()


@dataclass(frozen=True)
class Pair:
    """Two inputs that go together: their rank correlation as asked, and as it came out (nan where nobody looked)."""

    one: InputRow
    other: InputRow
    asked: float
    achieved: float


@dataclass(frozen=True)
class MeasuredAnswer:
    """Observations of one quantity: how many, the share of them between the outermost quantiles, and the share expected there.

    widened: whether the measurement's own deviation is added to the members before, so that the band is wider than theirs.
    """

    name: str
    label: str
    unit: str
    observations: int
    share_inside: Estimate
    expected: float
    reason: str
    widened: bool = False


@dataclass(frozen=True)
class BinnedAnswer:
    """A quantity whose values were counted into bins: by level what its quantiles may be off at most, at any time, as a share of the width
    from 5 to 95 %."""

    label: str
    shares: tuple[tuple[float, float], ...]


@dataclass(frozen=True)
class Answers:
    """What is answered of limits, watched quantities and outcomes: of a study, of a scenario, or of what a scenario changes."""

    limits: tuple[LimitAnswer, ...]
    watched: tuple[QuantityAnswer, ...]
    outcomes: tuple[QuantityAnswer, ...]


@dataclass(frozen=True)
class ScenarioAnswer:
    """A scenario: what it changes, its answers, and the differences from the study with how their intervals are worked out."""

    name: str
    label: str
    change: tuple[str, ...]
    facts: Mapping[str, Any]
    answers: Answers
    differences: Answers
    intervals: str


@dataclass(frozen=True)
class KindReached:
    """Of one kind of number (quantiles, probabilities, indices): the half-width wanted, the widest reached, how many numbers there are, how
    many are precise enough, how many will never have a number, and where the widest is."""

    kind: str
    wanted: float
    widest: float
    numbers: int
    precise: int
    undefined: int
    where: str


@dataclass(frozen=True)
class PrecisionAnswer:
    """What came of the precision asked: by kind, whether all of it was reached, else what ended the run and what it would take.

    solves_allowed: those that it might spend, all scenarios counted.
    """

    reached: bool
    stopped: str
    solves_needed: float
    unknown: str
    rounds: int
    solves_allowed: int | None
    kinds: tuple[KindReached, ...]


@dataclass(frozen=True)
class SettledAnswer:
    """What the shares settle: of so many rankings in how many the first place and the whole order; inputs that may be dropped, and of
    which it is open (None where nothing is ranked). Of inputs that are drawn together this holds of all of them at once."""

    rankings: int
    first: int
    whole: int
    may: tuple[Driver, ...]
    open: tuple[Driver, ...]


@dataclass(frozen=True)
class Work:
    """What all solves took: accepted and rejected steps, changes between explicit and stiff steps, the share of solves with stiff ones."""

    steps: int
    rejections: int
    switches: int
    stiff_share: float


@dataclass(frozen=True)
class Headline:
    """Everything that the summary and the machine form are made of.

    times: the output times. watched: at the last of them; widest: at the time where the members spread most, where that is another.
    """

    facts: Mapping[str, Any]
    clock: Clock
    times: tuple[float, ...]
    limits: tuple[LimitAnswer, ...]
    watched: tuple[QuantityAnswer, ...]
    outcomes: tuple[QuantityAnswer, ...]
    rankings: tuple[RankingAnswer, ...]
    inputs: tuple[InputRow, ...]
    failed: tuple[tuple[str, int], ...]
    warnings: tuple[str, ...]
    fell_back: tuple[str, ...]
    work: Work | None = None
    pairs: tuple[Pair, ...] = ()
    dependence: tuple[str, ...] = ()
    scenarios: tuple[ScenarioAnswer, ...] = ()
    measured: tuple[MeasuredAnswer, ...] = ()
    precision: PrecisionAnswer | None = None
    settled: SettledAnswer | None = None
    widest: tuple[QuantityAnswer, ...] = ()
    binned: tuple[BinnedAnswer, ...] = ()

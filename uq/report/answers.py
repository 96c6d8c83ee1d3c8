"""The answers of a result as values: what the summary and the machine form are both made of."""

from __future__ import annotations

import math
from collections.abc import Mapping
from dataclasses import dataclass
from typing import Any


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


@dataclass(frozen=True)
class LimitAnswer:
    """Of one limit: probability at every `by`, the verdict, when it comes true first (level, time) where it does."""

    name: str
    label: str
    when: str
    accept: float | None
    verdict: str
    by: tuple[tuple[float, Estimate], ...]
    first_time: tuple[tuple[float, Estimate], ...]
    reason: str


@dataclass(frozen=True)
class QuantityAnswer:
    """Of one watched quantity at its last time, or of one outcome (time is nan): quantiles by level, mean, deviation, the nominal run."""

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


@dataclass(frozen=True)
class Driver:
    """The shares of one input in the variance of something: by itself (first), and with its interactions (total)."""

    input: InputRow
    first: Estimate
    total: Estimate


@dataclass(frozen=True)
class RankingAnswer:
    """What drives one thing: `of` is bands (overall), outcomes or limits (at `time`, the last `by`); drivers in the order of the study."""

    name: str
    label: str
    of: str
    time: float
    drivers: tuple[Driver, ...]
    reason: str


@dataclass(frozen=True)
class Headline:
    """Everything that the summary and the machine form are made of."""

    facts: Mapping[str, Any]
    time_unit: str
    last_time: float
    limits: tuple[LimitAnswer, ...]
    watched: tuple[QuantityAnswer, ...]
    outcomes: tuple[QuantityAnswer, ...]
    rankings: tuple[RankingAnswer, ...]
    inputs: tuple[InputRow, ...]
    failed: tuple[tuple[str, int], ...]
    warnings: tuple[str, ...]
    fell_back: tuple[str, ...]

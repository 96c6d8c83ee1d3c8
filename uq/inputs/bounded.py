"""Distributions between two ends: uniform, triangular, pert and beta."""

from __future__ import annotations

import math
from dataclasses import dataclass
from functools import cached_property
from typing import ClassVar

import numpy as np

from uq.inputs.arguments import Arguments
from uq.inputs.distribution import Distribution, Floats, Moments
from uq.inputs.inverse import TwoTails


@dataclass(frozen=True)
class Uniform(Distribution):
    """The uniform distribution from `low` to `high`; sd = (high - low) / sqrt(12)."""

    low: float
    high: float

    key: ClassVar[str] = "uniform"
    forms: ClassVar[tuple[tuple[str, ...], ...]] = (("low", "high"),)

    @classmethod
    def relations(cls, arguments: Arguments) -> None:
        arguments.rising("low", "high")

    def moments(self) -> Moments:
        return Moments(self.low + (self.high - self.low) / 2, (self.high - self.low) / math.sqrt(12))

    def quantile(self, u: Floats) -> Floats:
        u = np.asarray(u, dtype=np.float64)
        width = self.high - self.low
        # From the nearer end, so that neither tail is rounded to its end.
        return np.where(u < 0.5, self.low + width * u, self.high - width * (1 - u))

    def share_below(self, x: float) -> float:
        return min(max((x - self.low) / (self.high - self.low), 0.0), 1.0)


@dataclass(frozen=True)
class Triangular(Distribution):
    """The triangular distribution from `low` over its peak `mode` to `high`.

    With a = mode - low, b = high - mode, w = a + b: quantile low + sqrt(u w a) up to u = a / w, high - sqrt((1 - u) w b) beyond;
    mean = (low + mode + high) / 3, variance = (a^2 + a b + b^2) / 18 (Kotz, van Dorp, Beyond Beta, 2004, chapter 1).
    """

    low: float
    mode: float
    high: float

    key: ClassVar[str] = "triangular"
    forms: ClassVar[tuple[tuple[str, ...], ...]] = (("low", "mode", "high"),)

    @classmethod
    def relations(cls, arguments: Arguments) -> None:
        arguments.rising("low", "high")
        arguments.inside("mode", "low", "high")

    def moments(self) -> Moments:
        rise, fall = self.mode - self.low, self.high - self.mode
        width = self.high - self.low
        # Relative to the width, so that no square overflows.
        a, b = rise / width, fall / width
        return Moments(self.low + (width / 3) * (1 + a), width * math.sqrt((a * a + a * b + b * b) / 18))

    def quantile(self, u: Floats) -> Floats:
        u = np.asarray(u, dtype=np.float64)
        rise, fall = self.mode - self.low, self.high - self.mode
        width = self.high - self.low
        a, b = rise / width, fall / width
        return np.where(u <= a, self.low + width * np.sqrt(u * a), self.high - width * np.sqrt((1 - u) * b))

    def share_below(self, x: float) -> float:
        if x <= self.low or x >= self.high:
            return float(x > self.low)
        width = self.high - self.low
        left, right = (x - self.low) / width, (self.high - x) / width
        return (
            left * (left / ((self.mode - self.low) / width)) if x < self.mode else 1 - right * (right / ((self.high - self.mode) / width))
        )


class _BetaShaped(Distribution):
    """Shared by beta and pert: a beta distribution with exponents `_shape` stretched from `low` to `high`.

    Mean a / (a + b), variance a b / ((a + b)^2 (a + b + 1)) on (0, 1) (Johnson, Kotz, Balakrishnan, Continuous Univariate Distributions 2,
    1995, chapter 25); quantiles are the inverse of the incomplete beta function.
    """

    low: float
    high: float

    @property
    def _shape(self) -> tuple[float, float]:
        raise NotImplementedError

    @cached_property
    def _share(self) -> TwoTails:
        """The share of the range up to the quantile, seen from the nearer end."""
        from scipy.special import betaincinv

        a, b = self._shape
        return TwoTails(lambda p: betaincinv(a, b, p), lambda p: betaincinv(b, a, p))

    def moments(self) -> Moments:
        a, b = self._shape
        share, width = a / (a + b), self.high - self.low
        return Moments(self.low + width * share, width * math.sqrt(share * (b / (a + b)) / (a + b + 1)))

    def quantile(self, u: Floats) -> Floats:
        u = np.asarray(u, dtype=np.float64)
        reach = (self.high - self.low) * self._share(u)
        return np.where(u < 0.5, self.low + reach, self.high - reach)

    def share_below(self, x: float) -> float:
        from scipy.special import betainc

        share = (x - self.low) / (self.high - self.low)
        return float(betainc(*self._shape, min(max(share, 0.0), 1.0)))


@dataclass(frozen=True)
class Pert(_BetaShaped):
    """The pert distribution from `low` over `mode` to `high`: a beta distribution whose mean is (low + 4 mode + high) / 6.

    Exponents 1 + 4 (mode - low) / (high - low) and 1 + 4 (high - mode) / (high - low) (Malcolm, Roseboom, Clark, Fazar 1959,
    doi:10.1287/opre.7.5.646; weight 4 made exact as in Clark 1962, doi:10.1287/opre.10.3.405).
    """

    low: float
    mode: float
    high: float

    key: ClassVar[str] = "pert"
    forms: ClassVar[tuple[tuple[str, ...], ...]] = (("low", "mode", "high"),)

    @classmethod
    def relations(cls, arguments: Arguments) -> None:
        arguments.rising("low", "high")
        arguments.inside("mode", "low", "high")

    @property
    def _shape(self) -> tuple[float, float]:
        width = self.high - self.low
        return 1 + 4 * ((self.mode - self.low) / width), 1 + 4 * ((self.high - self.mode) / width)


@dataclass(frozen=True)
class Beta(_BetaShaped):
    """The beta distribution with exponents `a` and `b` from `low` (default 0) to `high` (default 1)."""

    a: float
    b: float
    low: float = 0.0
    high: float = 1.0

    key: ClassVar[str] = "beta"
    forms: ClassVar[tuple[tuple[str, ...], ...]] = (("a", "b"),)
    optional: ClassVar[tuple[str, ...]] = ("low", "high")

    @classmethod
    def relations(cls, arguments: Arguments) -> None:
        arguments.positive("a", "b")
        for name, default in (("low", 0.0), ("high", 1.0)):
            if name not in arguments.given:
                arguments.numbers[name] = default
        arguments.rising("low", "high")

    @property
    def _shape(self) -> tuple[float, float]:
        return float(self.a), float(self.b)

"""Distributions between two ends with closed forms: uniform, loguniform, triangular, arcsine, trapezoid."""

from __future__ import annotations

import math
from dataclasses import dataclass
from typing import ClassVar

import numpy as np

from uq.inputs.arguments import Arguments
from uq.inputs.distribution import Distribution, Floats, Moments


@dataclass(frozen=True)
class Uniform(Distribution):
    """The uniform distribution from `low` to `high`; sd = (high - low) / sqrt(12)."""

    low: float
    high: float

    key: ClassVar[str] = "uniform"
    forms: ClassVar[tuple[tuple[str, ...], ...]] = (("low", "high"),)
    points: ClassVar[tuple[str, ...]] = ("low", "high")

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

    def from_above(self, p: Floats) -> Floats:
        p = np.asarray(p, dtype=np.float64)
        width = self.high - self.low
        return np.where(p <= 0.5, self.high - width * p, self.low + width * (1 - p))

    def share_below(self, x: float) -> float:
        return min(max((x - self.low) / (self.high - self.low), 0.0), 1.0)

    def share_above(self, x: float) -> float:
        return min(max((self.high - x) / (self.high - self.low), 0.0), 1.0)


@dataclass(frozen=True)
class Loguniform(Distribution):
    """The loguniform (reciprocal) distribution: the logarithm is uniform from ln `low` to ln `high`, both above 0.

    With l = ln(high / low): quantile low (high / low)^u, mean = (high - low) / l, variance = mean ((high + low) / 2 - mean), since the
    second moment is (high^2 - low^2) / (2 l).
    """

    low: float
    high: float

    key: ClassVar[str] = "loguniform"
    forms: ClassVar[tuple[tuple[str, ...], ...]] = (("low", "high"),)
    points: ClassVar[tuple[str, ...]] = ("low", "high")
    multiplying: ClassVar[tuple[str, ...]] = ("low", "high")

    @classmethod
    def relations(cls, arguments: Arguments) -> None:
        arguments.positive("low", "high")
        arguments.rising("low", "high")

    @property
    def _length(self) -> float:
        """ln(high / low), without loss where they are close and without overflow where they are far apart."""
        if self.high < 2 * self.low:
            return math.log1p((self.high - self.low) / self.low)
        return math.log(self.high) - math.log(self.low)

    def moments(self) -> Moments:
        half = self._length / 2
        mean = (self.high - self.low) / (2 * half)
        if half > 1:
            return Moments(mean, math.sqrt(mean) * math.sqrt(self.low + (self.high - self.low) / 2 - mean))
        # (high + low) / 2 - mean = sqrt(low high) (cosh h - sinh h / h) with h = l / 2, and that as a sum of positive terms.
        rest = sum(2 * n / math.factorial(2 * n + 1) * half ** (2 * n) for n in range(1, 12))
        return Moments(mean, math.sqrt(mean) * math.sqrt(math.sqrt(self.low) * math.sqrt(self.high) * rest))

    def quantile(self, u: Floats) -> Floats:
        return self._at(np.asarray(u, dtype=np.float64), 1 - np.asarray(u, dtype=np.float64))

    def from_above(self, p: Floats) -> Floats:
        return self._at(1 - np.asarray(p, dtype=np.float64), np.asarray(p, dtype=np.float64))

    def _at(self, u: Floats, p: Floats) -> Floats:
        from_low, from_high = self.low * np.exp(self._length * np.minimum(u, 0.5)), self.high * np.exp(-self._length * np.minimum(p, 0.5))
        return np.clip(np.where(u < 0.5, from_low, from_high), self.low, self.high)

    def share_below(self, x: float) -> float:
        if x <= self.low or x >= self.high:
            return float(x > self.low)
        return min(Loguniform(self.low, x)._length / self._length, 1.0)

    def share_above(self, x: float) -> float:
        if x <= self.low or x >= self.high:
            return float(x < self.high)
        return min(Loguniform(x, self.high)._length / self._length, 1.0)


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
    points: ClassVar[tuple[str, ...]] = ("low", "mode", "high")

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

    def from_above(self, p: Floats) -> Floats:
        p = np.asarray(p, dtype=np.float64)
        width = self.high - self.low
        a, b = (self.mode - self.low) / width, (self.high - self.mode) / width
        return np.where(p <= b, self.high - width * np.sqrt(p * b), self.low + width * np.sqrt((1 - p) * a))

    def share_below(self, x: float) -> float:
        if x <= self.low or x >= self.high:
            return float(x > self.low)
        width = self.high - self.low
        left, right = (x - self.low) / width, (self.high - x) / width
        return (
            left * (left / ((self.mode - self.low) / width)) if x < self.mode else 1 - right * (right / ((self.high - self.mode) / width))
        )

    def share_above(self, x: float) -> float:
        mirrored = Triangular(-self.high, -self.mode, -self.low)
        return mirrored.share_below(-x)

    def kinks(self) -> tuple[float, ...]:
        return ((self.mode - self.low) / (self.high - self.low),)


@dataclass(frozen=True)
class Arcsine(Distribution):
    """The arcsine distribution from `low` to `high`: of a quantity that swings sinusoidally between them.

    With width w: quantile low + w sin^2(pi u / 2), sd = w / sqrt(8) (JCGM 101:2008, 6.4.6).
    """

    low: float
    high: float

    key: ClassVar[str] = "arcsine"
    forms: ClassVar[tuple[tuple[str, ...], ...]] = (("low", "high"),)
    points: ClassVar[tuple[str, ...]] = ("low", "high")

    @classmethod
    def relations(cls, arguments: Arguments) -> None:
        arguments.rising("low", "high")

    def moments(self) -> Moments:
        return Moments(self.low + (self.high - self.low) / 2, (self.high - self.low) / math.sqrt(8))

    def quantile(self, u: Floats) -> Floats:
        u = np.asarray(u, dtype=np.float64)
        return np.where(u < 0.5, self.low + self._reach(u), self.high - self._reach(1 - u))

    def from_above(self, p: Floats) -> Floats:
        p = np.asarray(p, dtype=np.float64)
        return np.where(p <= 0.5, self.high - self._reach(p), self.low + self._reach(1 - p))

    def _reach(self, share: Floats) -> Floats:
        return np.asarray((self.high - self.low) * np.sin(0.5 * np.pi * share) ** 2)

    def share_below(self, x: float) -> float:
        return _arcsine_share(x - self.low, self.high - x)

    def share_above(self, x: float) -> float:
        return _arcsine_share(self.high - x, x - self.low)


def _arcsine_share(near: float, far: float) -> float:
    """The share between a value and an end, from the distances to this end and to the other."""
    return 2 / math.pi * math.atan2(math.sqrt(max(near, 0.0)), math.sqrt(max(far, 0.0)))

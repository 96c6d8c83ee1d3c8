"""The trapezoidal distribution."""

from __future__ import annotations

import math
from dataclasses import dataclass
from typing import ClassVar

import numpy as np

from uq.inputs.arguments import Arguments
from uq.inputs.distribution import Distribution, Floats, Moments


@dataclass(frozen=True)
class Trapezoid(Distribution):
    """The trapezoidal distribution: density rising from `low` to `low_shoulder`, level to `high_shoulder`, falling to `high`.

    A mixture of a rising triangle, a rectangle and a falling triangle of one height h = 2 / (high + high_shoulder - low_shoulder - low)
    (van Dorp, Kotz 2003, doi:10.1007/s001840200230; symmetrical: JCGM 101:2008, 6.4.4). Shoulders may fall together or on the ends.
    """

    low: float
    low_shoulder: float
    high_shoulder: float
    high: float

    key: ClassVar[str] = "trapezoid"
    forms: ClassVar[tuple[tuple[str, ...], ...]] = (("low", "low_shoulder", "high_shoulder", "high"),)
    points: ClassVar[tuple[str, ...]] = ("low", "low_shoulder", "high_shoulder", "high")

    @classmethod
    def relations(cls, arguments: Arguments) -> None:
        arguments.rising("low", "high")
        arguments.inside("low_shoulder", "low", "high")
        arguments.inside("high_shoulder", "low", "high")
        arguments.inside("high_shoulder", "low_shoulder", "high")

    @property
    def _sides(self) -> tuple[float, float, float, float]:
        """Rise, level and fall in widths from `low` to `high`, and the height there."""
        width = self.high - self.low
        rise, level = (self.low_shoulder - self.low) / width, (self.high_shoulder - self.low_shoulder) / width
        fall = (self.high - self.high_shoulder) / width
        return rise, level, fall, 2 / (1 + level)

    def moments(self) -> Moments:
        rise, level, fall, height = self._sides
        # Of each piece: its share, its mean in widths from `low`, its variance.
        pieces = (
            (height * rise / 2, 2 * rise / 3, rise * rise / 18),
            (height * level, rise + level / 2, level * level / 12),
            (height * fall / 2, 1 - 2 * fall / 3, fall * fall / 18),
        )
        mean = sum(share * middle for share, middle, _ in pieces)
        variance = sum(share * (own + (middle - mean) ** 2) for share, middle, own in pieces)
        width = self.high - self.low
        return Moments(self.low + width * mean, width * math.sqrt(variance))

    def quantile(self, u: Floats) -> Floats:
        u = np.asarray(u, dtype=np.float64)
        return self._at(u, 1 - u)

    def from_above(self, p: Floats) -> Floats:
        p = np.asarray(p, dtype=np.float64)
        return self._at(1 - p, p)

    def _at(self, u: Floats, p: Floats) -> Floats:
        rise, _, fall, height = self._sides
        width = self.high - self.low
        left = np.where(u <= height * rise / 2, np.sqrt(2 * rise * u / height), rise / 2 + u / height)
        right = np.where(p <= height * fall / 2, np.sqrt(2 * fall * p / height), fall / 2 + p / height)
        from_low = (u <= 0.5) & (p > height * fall / 2) | (u <= height * rise / 2)
        return np.where(from_low, self.low + width * left, self.high - width * right)

    def share_below(self, x: float) -> float:
        rise, _, fall, height = self._sides
        return _share(min(max((x - self.low) / (self.high - self.low), 0.0), 1.0), rise, fall, height)

    def share_above(self, x: float) -> float:
        rise, _, fall, height = self._sides
        return _share(min(max((self.high - x) / (self.high - self.low), 0.0), 1.0), fall, rise, height)

    def kinks(self) -> tuple[float, ...]:
        rise, _, fall, height = self._sides
        return (height * rise / 2, 1 - height * fall / 2)


def _share(reach: float, near: float, far: float, height: float) -> float:
    """The share within `reach` of an end, in widths; `near` and `far` are the slopes' lengths at this end and at the other."""
    if reach < near:
        return height * reach * (reach / near) / 2
    if reach <= 1 - far:
        return height * (reach - near / 2)
    rest = 1 - reach
    return 1 - (height * rest * (rest / far) / 2 if rest > 0 else 0.0)

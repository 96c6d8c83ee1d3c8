"""Beta distributions between two ends: beta and pert."""

from __future__ import annotations

import math
from dataclasses import dataclass
from functools import cached_property
from typing import ClassVar

import numpy as np
from numpy.typing import NDArray

from uq.inputs.arguments import Arguments
from uq.inputs.distribution import Distribution, Floats, Moments
from uq.inputs.inverse import TwoTails

# Beyond this share of the range the rest has lost more than two digits. (The functions used there are slow.)
_FAR = 0.99


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
        return self._placed(self._share(u), u >= 0.5, (u, 1 - u))

    def from_above(self, p: Floats) -> Floats:
        p = np.asarray(p, dtype=np.float64)
        return self._placed(self._share.from_above(p), p <= 0.5, (1 - p, p))

    def _placed(self, share: Floats, from_high: NDArray[np.bool_], sides: tuple[Floats, Floats]) -> Floats:
        """The quantile from the share of the range that lies between it and `high` or `low`; sides: probabilities below and above it.

        Of a share near 1 the rest, which may be tiny, has no digits left: it is worked out anew, from the other end.
        """
        from scipy.special import betainccinv

        (below, above), (a, b), width = sides, self._shape, self.high - self.low
        found = np.where(from_high, self.high - width * share, self.low + width * share)
        far = share > _FAR
        low, high = far & from_high, far & ~from_high
        if low.any():
            found[low] = self.low + width * betainccinv(a, b, above[low])
        if high.any():
            found[high] = self.high - width * betainccinv(b, a, below[high])
        return found

    def share_below(self, x: float) -> float:
        return self._share_of(self._shape, (x - self.low, self.high - x))

    def share_above(self, x: float) -> float:
        return self._share_of(self._shape[::-1], (self.high - x, x - self.low))

    def _share_of(self, shape: tuple[float, float], distances: tuple[float, float]) -> float:
        """The share between x and an end, from the distances to this end and to the other; reckoned from the nearer one."""
        from scipy.special import betainc, betaincc

        (near, far), (a, b), width = distances, shape, self.high - self.low
        if near <= 0 or far <= 0:
            return float(far <= 0)
        return float(betainc(a, b, near / width) if near < far else betaincc(b, a, far / width))


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
    points: ClassVar[tuple[str, ...]] = ("low", "mode", "high")

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
    points: ClassVar[tuple[str, ...]] = ("low", "high")

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

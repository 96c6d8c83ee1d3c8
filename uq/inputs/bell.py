"""Distributions made from the normal one: normal and lognormal."""

from __future__ import annotations

import math
from dataclasses import dataclass
from typing import ClassVar

import numpy as np

from uq.inputs.arguments import FARTHEST_SCORE, LARGEST_LOGARITHM, Arguments
from uq.inputs.distribution import Distribution, Floats, Moments


@dataclass(frozen=True)
class Normal(Distribution):
    """The normal distribution.

    Given by `mean` and `sd`; by `mean` and `cv`, sd = cv |mean|; or as on a calibration certificate by `value`, the expanded uncertainty
    `expanded` and its `coverage` factor, sd = U / k (JCGM 100:2008, 4.3.3 and 6.2.1).
    """

    mean: float | None = None
    sd: float | None = None
    cv: float | None = None
    value: float | None = None
    expanded: float | None = None
    coverage: float | None = None

    key: ClassVar[str] = "normal"
    forms: ClassVar[tuple[tuple[str, ...], ...]] = (("mean", "sd"), ("mean", "cv"), ("value", "expanded", "coverage"))
    points: ClassVar[tuple[str, ...]] = ("mean", "value")
    differences: ClassVar[tuple[str, ...]] = ("sd", "expanded")
    multiplying: ClassVar[tuple[str, ...]] = ("cv",)

    @classmethod
    def relations(cls, arguments: Arguments) -> None:
        arguments.positive("sd", "cv", "expanded", "coverage")
        if "cv" in arguments.given and arguments.numbers.get("mean") == 0:
            arguments.refuse("mean", "a number other than 0 beside `cv`", "give `sd` instead of `cv`")
        numbers = arguments.numbers
        if any(set(form) <= numbers.keys() for form in cls.forms):
            centre, spread = _normal_parameters(**numbers)
            if not math.isfinite(abs(centre) + FARTHEST_SCORE * spread):
                widest = next(name for name in ("sd", "cv", "expanded") if name in numbers)
                arguments.refuse(widest, "a spread that leaves every draw finite")

    def moments(self) -> Moments:
        return Moments(*_normal_parameters(**self.arguments()))

    def quantile(self, u: Floats) -> Floats:
        from scipy.special import ndtri

        centre, spread = self.moments()
        scores: Floats = ndtri(u)
        return centre + spread * scores

    def from_above(self, p: Floats) -> Floats:
        from scipy.special import ndtri

        return self.at_score(-ndtri(p))

    def at_score(self, z: Floats) -> Floats:
        centre, spread = self.moments()
        return centre + spread * z

    def share_below(self, x: float) -> float:
        from scipy.special import ndtr

        centre, spread = self.moments()
        return float(ndtr((x - centre) / spread))

    def share_above(self, x: float) -> float:
        from scipy.special import ndtr

        centre, spread = self.moments()
        return float(ndtr((centre - x) / spread))


def _normal_parameters(**given: float) -> tuple[float, float]:
    """Mean and standard deviation from any of the forms of `Normal`."""
    if "value" in given:
        return float(given["value"]), given["expanded"] / given["coverage"]
    return float(given["mean"]), float(given["sd"]) if "sd" in given else given["cv"] * abs(given["mean"])


@dataclass(frozen=True)
class Lognormal(Distribution):
    """The lognormal distribution: the logarithm is normal with mean m and standard deviation s.

    m = ln median; s = ln gsd (geometric standard deviation, a factor above 1), or s^2 = ln(1 + cv^2) with cv = sd / mean;
    mean = median exp(s^2 / 2), cv^2 = exp(s^2) - 1 (Johnson, Kotz, Balakrishnan, Continuous Univariate Distributions 1, 1994, chapter 14).
    """

    median: float | None = None
    gsd: float | None = None
    mean: float | None = None
    sd: float | None = None
    cv: float | None = None

    key: ClassVar[str] = "lognormal"
    forms: ClassVar[tuple[tuple[str, ...], ...]] = (("median", "gsd"), ("median", "cv"), ("mean", "sd"), ("mean", "cv"))
    points: ClassVar[tuple[str, ...]] = ("median", "mean")
    differences: ClassVar[tuple[str, ...]] = ("sd",)
    multiplying: ClassVar[tuple[str, ...]] = ("median", "mean")

    @classmethod
    def relations(cls, arguments: Arguments) -> None:
        arguments.positive("median", "mean", "sd", "cv")
        if "gsd" in arguments.numbers and arguments.numbers["gsd"] <= 1:
            arguments.refuse("gsd", "a factor above 1", "1.3 is a factor of 1.3 up and down; a relative deviation is `cv`")
        numbers = arguments.numbers
        if any(set(form) <= numbers.keys() for form in cls.forms):
            middle, spread = _logarithmic_parameters(**numbers)
            reach = abs(middle) + spread * (FARTHEST_SCORE + spread)
            if not (reach < LARGEST_LOGARITHM and spread > 0):
                widest = next(name for name in ("gsd", "cv", "sd") if name in numbers)
                arguments.refuse(widest, "a spread that leaves every draw a finite number above 0")

    def moments(self) -> Moments:
        middle, spread = self._logarithmic()
        mean = float(self.mean) if self.mean is not None else math.exp(middle + spread**2 / 2)
        if self.sd is not None:
            return Moments(mean, float(self.sd))
        return Moments(mean, mean * (self.cv if self.cv is not None else math.sqrt(math.expm1(spread**2))))

    def quantile(self, u: Floats) -> Floats:
        from scipy.special import ndtri

        return self.at_score(ndtri(u))

    def from_above(self, p: Floats) -> Floats:
        from scipy.special import ndtri

        return self.at_score(-ndtri(p))

    def at_score(self, z: Floats) -> Floats:
        # median x exp(s z), not exp(m + s z): the median is then met exactly, and the error does not grow with |m|.
        middle, spread = self._logarithmic()
        median = float(self.median) if self.median is not None else math.exp(middle)
        factors: Floats = np.exp(spread * z)
        return median * factors

    def share_below(self, x: float) -> float:
        from scipy.special import ndtr

        middle, spread = self._logarithmic()
        return float(ndtr((math.log(x) - middle) / spread)) if x > 0 else 0.0

    def share_above(self, x: float) -> float:
        from scipy.special import ndtr

        middle, spread = self._logarithmic()
        return float(ndtr((middle - math.log(x)) / spread)) if x > 0 else 1.0

    def _logarithmic(self) -> tuple[float, float]:
        return _logarithmic_parameters(**self.arguments())


def _logarithmic_parameters(**given: float) -> tuple[float, float]:
    """Mean and standard deviation of the logarithm from any of the forms of `Lognormal`."""
    if "gsd" in given:
        return math.log(given["median"]), math.log(given["gsd"])
    cv = given["cv"] if "cv" in given else given["sd"] / given["mean"]
    # ln(1 + cv^2) without overflow of the square.
    squared = math.log1p(cv * cv) if cv < 1e150 else 2 * math.log(cv)
    middle = math.log(given["median"]) if "median" in given else math.log(given["mean"]) - squared / 2
    return middle, math.sqrt(squared)

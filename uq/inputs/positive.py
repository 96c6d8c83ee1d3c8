"""Distributions above zero that are not made from the normal one: gamma, weibull, exponential."""

from __future__ import annotations

import math
from dataclasses import dataclass
from functools import cached_property
from typing import ClassVar

import numpy as np

from uq.inputs.arguments import Arguments, plain
from uq.inputs.distribution import Distribution, Floats, Moments
from uq.inputs.inverse import TwoTails
from uq.inputs.large_gamma import LARGE, LargeGamma

# Of weibull: below, the spread between draws is beyond 400 decades; above, it is below the rounding of the draws.
LEAST_SHAPE = 0.02
MOST_SHAPE = 1e12


@dataclass(frozen=True)
class Gamma(Distribution):
    """The gamma distribution, given by `shape` and `scale`, or by `mean` and `sd`.

    mean = shape scale, variance = shape scale^2, so shape = (mean / sd)^2 and scale = sd^2 / mean (Johnson, Kotz, Balakrishnan, Continuous
    Univariate Distributions 1, 1994, chapter 17).
    """

    shape: float | None = None
    scale: float | None = None
    mean: float | None = None
    sd: float | None = None

    key: ClassVar[str] = "gamma"
    forms: ClassVar[tuple[tuple[str, ...], ...]] = (("shape", "scale"), ("mean", "sd"))
    points: ClassVar[tuple[str, ...]] = ("mean",)
    differences: ClassVar[tuple[str, ...]] = ("scale", "sd")
    multiplying: ClassVar[tuple[str, ...]] = ("scale", "mean")

    @classmethod
    def relations(cls, arguments: Arguments) -> None:
        arguments.positive("shape", "scale", "mean", "sd")
        numbers = arguments.numbers
        if any(set(form) <= numbers.keys() for form in cls.forms):
            shape, scale = _shape_and_scale(**numbers)
            # The largest draw lies below scale (shape + 9 sqrt(shape) + 40): 2^-53 is left beyond it.
            largest = scale * (shape + 9 * math.sqrt(shape) + 40)
            if not (min(shape, scale) > 0 and math.isfinite(largest)):
                arguments.refuse("shape" if "shape" in numbers else "sd", "a spread that leaves every draw a finite number")

    def moments(self) -> Moments:
        shape, scale = _shape_and_scale(**self.arguments())
        if self.mean is not None and self.sd is not None:
            return Moments(float(self.mean), float(self.sd))
        return Moments(shape * scale, math.sqrt(shape) * scale)

    @cached_property
    def _multiple(self) -> TwoTails | LargeGamma:
        """The quantile in multiples of the scale."""
        from scipy.special import gammainccinv, gammaincinv

        shape, _ = _shape_and_scale(**self.arguments())
        if shape >= LARGE:
            return LargeGamma(shape)
        return TwoTails(lambda p: gammaincinv(shape, p), lambda p: gammainccinv(shape, p))

    def quantile(self, u: Floats) -> Floats:
        return _shape_and_scale(**self.arguments())[1] * self._multiple(u)

    def from_above(self, p: Floats) -> Floats:
        return _shape_and_scale(**self.arguments())[1] * self._multiple.from_above(p)

    def share_below(self, x: float) -> float:
        from scipy.special import gammainc

        shape, scale = _shape_and_scale(**self.arguments())
        multiple, large = max(x, 0.0) / scale, self._multiple
        return large.share_below(multiple) if isinstance(large, LargeGamma) else float(gammainc(shape, multiple))

    def share_above(self, x: float) -> float:
        from scipy.special import gammaincc

        shape, scale = _shape_and_scale(**self.arguments())
        multiple, large = max(x, 0.0) / scale, self._multiple
        return large.share_above(multiple) if isinstance(large, LargeGamma) else float(gammaincc(shape, multiple))


def _shape_and_scale(**given: float) -> tuple[float, float]:
    """Shape and scale from any of the forms of `Gamma`."""
    if "shape" in given:
        return float(given["shape"]), float(given["scale"])
    ratio = given["mean"] / given["sd"]
    return ratio * ratio, given["sd"] / ratio if ratio > 0 else math.inf


@dataclass(frozen=True)
class Weibull(Distribution):
    """The Weibull distribution above 0 with exponent `shape`: 63.2 % of the values lie below `scale`.

    With k = shape: quantile scale (-ln(1 - u))^(1/k), mean = scale G(1 + 1/k), variance = scale^2 (G(1 + 2/k) - G(1 + 1/k)^2) (Johnson,
    Kotz, Balakrishnan, Continuous Univariate Distributions 1, 1994, chapter 21).
    """

    shape: float
    scale: float

    key: ClassVar[str] = "weibull"
    forms: ClassVar[tuple[tuple[str, ...], ...]] = (("shape", "scale"),)
    differences: ClassVar[tuple[str, ...]] = ("scale",)
    multiplying: ClassVar[tuple[str, ...]] = ("scale",)

    @classmethod
    def relations(cls, arguments: Arguments) -> None:
        arguments.positive("shape", "scale")
        shape, scale = (arguments.numbers.get(name) for name in ("shape", "scale"))
        if shape is not None and scale is not None and not (LEAST_SHAPE <= shape <= MOST_SHAPE):
            arguments.refuse("shape", f"a number from {plain(LEAST_SHAPE)} to {plain(MOST_SHAPE)}")
        elif shape is not None and scale is not None and not math.isfinite(scale * 40.0 ** (1 / shape) * math.gamma(1 + 2 / shape)):
            arguments.refuse("scale", "a scale that leaves every draw a finite number")

    def moments(self) -> Moments:
        mean = math.gamma(1 + 1 / self.shape)
        return Moments(self.scale * mean, self.scale * mean * math.sqrt(math.expm1(_gamma_ratio(1 / self.shape))))

    def quantile(self, u: Floats) -> Floats:
        u = np.asarray(u, dtype=np.float64)
        return self.scale * _hazard(u) ** (1 / self.shape)

    def from_above(self, p: Floats) -> Floats:
        return self.scale * _hazard_above(np.asarray(p, dtype=np.float64)) ** (1 / self.shape)

    def share_below(self, x: float) -> float:
        return -math.expm1(-self._hazard_at(x))

    def share_above(self, x: float) -> float:
        return math.exp(-self._hazard_at(x))

    def _hazard_at(self, x: float) -> float:
        if x <= 0:
            return 0.0
        logarithm = self.shape * (math.log(x) - math.log(self.scale))
        return math.exp(logarithm) if logarithm < 700 else math.inf


@dataclass(frozen=True)
class Exponential(Distribution):
    """The exponential distribution above 0: of waiting times without memory; its standard deviation is its mean."""

    mean: float

    key: ClassVar[str] = "exponential"
    forms: ClassVar[tuple[tuple[str, ...], ...]] = (("mean",),)
    points: ClassVar[tuple[str, ...]] = ("mean",)
    multiplying: ClassVar[tuple[str, ...]] = ("mean",)

    @classmethod
    def relations(cls, arguments: Arguments) -> None:
        arguments.positive("mean")
        if not math.isfinite(arguments.numbers.get("mean", 1.0) * 40):
            arguments.refuse("mean", "a mean that leaves every draw a finite number")

    def moments(self) -> Moments:
        return Moments(float(self.mean), float(self.mean))

    def quantile(self, u: Floats) -> Floats:
        return self.mean * _hazard(np.asarray(u, dtype=np.float64))

    def from_above(self, p: Floats) -> Floats:
        return self.mean * _hazard_above(np.asarray(p, dtype=np.float64))

    def share_below(self, x: float) -> float:
        return -math.expm1(-max(x, 0.0) / self.mean)

    def share_above(self, x: float) -> float:
        return math.exp(-max(x, 0.0) / self.mean)


def _hazard(u: Floats) -> Floats:
    """-ln(1 - u), exact in both tails."""
    return np.asarray(-np.log1p(-u))


def _hazard_above(p: Floats) -> Floats:
    """-ln p, exact in both tails: near 1 as that of the share below."""
    return np.asarray(np.where(p < 0.5, -np.log(p), -np.log1p(np.maximum(p, 0.5) - 1)))


def _gamma_ratio(x: float) -> float:
    """ln(G(1 + 2 x) / G(1 + x)^2); for small x by the series of ln G(1 + x), whose n-th term is zeta(n) (-x)^n / n from n = 2 on.

    (Abramowitz, Stegun, Handbook of Mathematical Functions, 1964, 6.1.33.)
    """
    from scipy.special import gammaln, zeta

    if x > 0.1:
        return float(gammaln(1 + 2 * x) - 2 * gammaln(1 + x))
    return sum(float(zeta(n)) * (-x) ** n * (2.0**n - 2) / n for n in range(2, 40))

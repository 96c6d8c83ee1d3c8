"""Distributions above zero that are not made from the normal one: gamma."""

from __future__ import annotations

import math
from dataclasses import dataclass
from functools import cached_property
from typing import ClassVar

from uq.inputs.arguments import Arguments
from uq.inputs.distribution import Distribution, Floats, Moments
from uq.inputs.inverse import TwoTails


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
    def _multiple(self) -> TwoTails:
        """The quantile in multiples of the scale."""
        from scipy.special import gammainccinv, gammaincinv

        shape, _ = _shape_and_scale(**self.arguments())
        return TwoTails(lambda p: gammaincinv(shape, p), lambda p: gammainccinv(shape, p))

    def quantile(self, u: Floats) -> Floats:
        return _shape_and_scale(**self.arguments())[1] * self._multiple(u)

    def share_below(self, x: float) -> float:
        from scipy.special import gammainc

        shape, scale = _shape_and_scale(**self.arguments())
        return float(gammainc(shape, max(x, 0.0) / scale))


def _shape_and_scale(**given: float) -> tuple[float, float]:
    """Shape and scale from any of the forms of `Gamma`."""
    if "shape" in given:
        return float(given["shape"]), float(given["scale"])
    ratio = given["mean"] / given["sd"]
    return ratio * ratio, given["sd"] / ratio if ratio > 0 else math.inf

"""A distribution given by some of its percentiles."""

from __future__ import annotations

import math
import re
from collections.abc import Mapping
from dataclasses import dataclass
from functools import cached_property
from itertools import pairwise
from typing import Any, ClassVar

import numpy as np

from uq.errors import ValueMistake, suggest
from uq.inputs.arguments import FARTHEST_SCORE, LARGEST_LOGARITHM, Arguments, plain
from uq.inputs.bell import Lognormal, Normal
from uq.inputs.curve import Curve, height_of
from uq.inputs.distribution import Distribution, Floats, Moments
from uq.inputs.fits import cut_normal_fit, straight_fit
from uq.inputs.quadrature import moments_between
from uq.inputs.truncated import Truncated

PERCENTILES = tuple(f"p{level:02d}" for level in range(1, 100))
SHAPES = ("normal", "lognormal")
# A percentile that is met to this share of the distance between the outermost ones is met; percentiles are given with two or three digits.
MET = 1e-3
# The steepest height per score beside a logarithm: a geometric standard deviation of 1.2e6. Moments beyond have no number of a double.
STEEPEST = 14.0
Made = Normal | Lognormal | Truncated | Curve
_EXPECTED = "two or more of `p01` to `p99`"


@dataclass(frozen=True, init=False)
class Percentiles(Distribution):
    """The distribution with these percentiles: `p05 = 2` says that 5 % of the values lie below 2.

    Without `shape`: a smooth quantile function through all of them, with normal tails (`uq.inputs.curve`); within `low` and `high` where
    given. With shape "normal": the normal distribution, cut to `low` and `high` where given, whose quantiles come nearest in least squares.
    With shape "lognormal": likewise for ln(x - low), low = 0 where not given, or with `high` for ln((x - low) / (high - x)).
    Two percentiles are met exactly (a cut normal may fail to); for more, `misfit()` tells what is missed.
    """

    given: tuple[tuple[str, float], ...]
    shape: str | None
    low: float | None
    high: float | None

    key: ClassVar[str] = "percentiles"
    forms: ClassVar[tuple[tuple[str, ...], ...]] = (PERCENTILES,)
    optional: ClassVar[tuple[str, ...]] = ("shape", "low", "high")
    points: ClassVar[tuple[str, ...]] = (*PERCENTILES, "low", "high")

    def __init__(self, *, shape: str | None = None, low: float | None = None, high: float | None = None, **given: float) -> None:
        for name, value in (("given", tuple(sorted(given.items()))), ("shape", shape), ("low", low), ("high", high)):
            object.__setattr__(self, name, value)
        self.__post_init__()

    @classmethod
    def usage(cls) -> str:
        return "`p05`, `p50`, `p95` (any of `p01` to `p99`, two or more); optionally `shape` (normal, lognormal), `low`, `high`"

    @classmethod
    def check(cls, given: Mapping[str, object]) -> tuple[ValueMistake, ...]:
        arguments = Arguments({name: value for name, value in given.items() if name != "shape"})
        known = (*PERCENTILES, *cls.optional)
        for name in arguments.given:
            if name not in known:
                near = re.fullmatch(r"p(\d)", name)
                remedy = f"did you mean `p0{near[1]}`?" if near else suggest(name, known)
                expected = f"{_EXPECTED}, `shape`, `low`, `high`"
                arguments.mistakes.append(ValueMistake(f"the unknown key `{name}`", expected, remedy, name))
        levels = sorted(name for name in arguments.given if name in PERCENTILES)
        if len(levels) < 2:
            found = f"only `{levels[0]}`" if levels else "no percentile"
            arguments.mistakes.append(ValueMistake(found, _EXPECTED))
        shape = given.get("shape")
        if shape is not None and shape not in SHAPES:
            arguments.given["shape"] = shape
            arguments.refuse("shape", 'the text "normal" or "lognormal"', suggest(str(shape), SHAPES).replace("`", '"'))
            del arguments.given["shape"]
        arguments.read_numbers()
        _relations(arguments, levels, shape)
        return tuple(arguments.mistakes)

    def arguments(self) -> dict[str, Any]:
        others = {"shape": self.shape, "low": self.low, "high": self.high}
        return dict(self.given) | {name: value for name, value in others.items() if value is not None}

    def moments(self) -> Moments:
        return self._moments

    @cached_property
    def _moments(self) -> Moments:
        made = self._made
        if not isinstance(made, Curve):
            moments = made.moments()
            shift = self.low if self.low is not None and isinstance(made, Lognormal) else 0.0
            return Moments(moments.mean + shift, moments.sd)
        return Moments(*moments_between(-math.inf, math.inf, made.scores.tolist(), self.at_score))

    def quantile(self, u: Floats) -> Floats:
        from scipy.special import ndtri

        return self.at_score(ndtri(u)) if isinstance(self._made, Curve) else self._within(self._made.quantile(u))

    def from_above(self, p: Floats) -> Floats:
        from scipy.special import ndtri

        return self.at_score(-ndtri(p)) if isinstance(self._made, Curve) else self._within(self._made.from_above(p))

    def at_score(self, z: Floats) -> Floats:
        made = self._made
        return self._within(made.value(z) if isinstance(made, Curve) else made.at_score(z))

    def _within(self, x: Floats) -> Floats:
        """x, shifted where it is lognormal, and not beyond an end by rounding."""
        if isinstance(self._made, Lognormal) and self.low is not None:
            x = x + self.low
        return np.clip(x, self.low, self.high) if self.low is not None or self.high is not None else x

    def share_below(self, x: float) -> float:
        from scipy.special import ndtr

        if isinstance(self._made, Curve):
            return float(ndtr(self._made.score(x)))
        return self._made.share_below(self._unshifted(x))

    def share_above(self, x: float) -> float:
        from scipy.special import ndtr

        if isinstance(self._made, Curve):
            return float(ndtr(-self._made.score(x)))
        return self._made.share_above(self._unshifted(x))

    def _unshifted(self, x: float) -> float:
        return x - self.low if isinstance(self._made, Lognormal) and self.low is not None else x

    def kinks(self) -> tuple[float, ...]:
        return tuple(self._levels.tolist()) if isinstance(self._made, Curve) else ()

    def misfit(self) -> str:
        asked = self._values
        missed = self.quantile(self._levels) - asked
        worst = int(np.argmax(np.abs(missed)))
        share = abs(missed[worst]) / (asked[-1] - asked[0])
        if self.shape is None or share < MET:
            return ""
        name, got = self.given[worst][0], float(asked[worst] + missed[worst])
        other = f", {100 * share:.2g} % of the distance from {self.given[0][0]} to {self.given[-1][0]}"
        return f"the {self.shape} shape cannot meet all percentiles: {name} is {got:.4g} instead of {plain(float(asked[worst]))}{other}"

    def stated(self) -> str:
        numbers = [f"{name} {plain(float(value))}" for name, value in self.given]
        ends = [f"{name} {plain(float(end))}" for name, end in (("low", self.low), ("high", self.high)) if end is not None]
        how = f"shape {self.shape}" if self.shape else "smooth through all"
        if self.shape is None and len(ends) < 2:
            how += " with normal tails" if not ends else " with a normal tail on the open side"
        return ", ".join(["percentiles", *numbers, *ends, how])

    @property
    def _levels(self) -> Floats:
        return np.array([int(name[1:]) / 100 for name, _ in self.given])

    @property
    def _values(self) -> Floats:
        return np.array([value for _, value in self.given], dtype=np.float64)

    @cached_property
    def _made(self) -> Made:
        """What it comes to: a distribution (a lognormal one is to be shifted by `low`), or a curve of its own."""
        return _made(self._levels, self._values, self.shape, (self.low, self.high))


def _relations(arguments: Arguments, levels: list[str], shape: object) -> None:
    """Percentiles rise, lie within the ends, and leave every draw finite."""
    numbers = arguments.numbers
    for below, above in pairwise(levels):
        arguments.rising(below, above)
    if "low" not in arguments.given and shape == "lognormal":
        for name in levels[:1]:
            if numbers.get(name, 1.0) <= 0:
                arguments.refuse(name, "a number above 0 for a lognormal", "give `low`, from where it begins")
    if levels:
        for low, high in (("low", levels[0]), (levels[-1], "high")):
            if low in arguments.given and high in arguments.given:
                arguments.rising(low, high)
    if len(levels) < 2 or arguments.mistakes:
        return
    from scipy.special import ndtri

    places = np.array([int(name[1:]) / 100 for name in levels])
    heights = height_of(np.array([numbers[name] for name in levels]), *_ends(shape, numbers.get("low"), numbers.get("high")))
    steepest = float(np.max(np.diff(heights) / np.diff(ndtri(places))))
    farthest = float(np.abs(heights).max()) + steepest * FARTHEST_SCORE
    plain_heights = shape != "lognormal" and "low" not in numbers and "high" not in numbers
    most = math.inf if plain_heights else STEEPEST
    if not (np.isfinite(farthest) and steepest <= most and (plain_heights or farthest + steepest**2 < LARGEST_LOGARITHM)):
        arguments.refuse(levels[-1], "percentiles that leave every draw and the standard deviation finite")
    elif not (np.diff(heights) > 0).all():
        arguments.refuse(levels[-1], "percentiles that differ by more than rounding, seen from the ends")


def _ends(shape: object, low: float | None, high: float | None) -> tuple[float, float]:
    """The ends of the height: a lognormal begins at 0 unless told otherwise; a normal has none, it is cut."""
    if shape == "normal":
        return -math.inf, math.inf
    start = 0.0 if shape == "lognormal" else -math.inf
    return float(low) if low is not None else start, float(high) if high is not None else math.inf


def _made(levels: Floats, values: Floats, shape: str | None, given: tuple[float | None, float | None]) -> Made:
    from scipy.special import ndtri

    scores, (low, high) = ndtri(levels), _ends(shape, *given)
    if shape == "normal" and given != (None, None):
        first, last = (end if end is not None else side for end, side in zip(given, (-math.inf, math.inf), strict=True))
        return cut_normal_fit(levels, values, float(first), float(last))
    heights = height_of(values, low, high)
    if shape is None:
        return Curve(scores, heights, low, high)
    mean, sd = straight_fit(scores, heights)
    if shape == "normal":
        return Normal(mean=mean, sd=sd)
    if high == math.inf:
        return Lognormal(median=math.exp(mean), gsd=math.exp(sd))
    return Curve(np.array([-1.0, 1.0]), np.array([mean - sd, mean + sd]), low, high)

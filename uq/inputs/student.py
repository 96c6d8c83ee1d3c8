"""Student's t distribution."""

from __future__ import annotations

import math
from dataclasses import dataclass
from functools import cached_property
from typing import ClassVar

import numpy as np

from uq.inputs.arguments import FARTHEST_SCORE, Arguments, plain
from uq.inputs.distribution import Distribution, Floats, Moments
from uq.inputs.inverse import TwoTails

LEAST_DOF = 0.1
# Natural logarithm of the reciprocal of the smallest share, with room: the farthest draw lies within exp(FARTHEST / dof) + FARTHEST_SCORE.
FARTHEST = 37.0


@dataclass(frozen=True)
class Student(Distribution):
    """Student's t distribution with `dof` degrees of freedom about `mean`, stretched by `scale`: a mean of few readings.

    For n readings with mean m and deviation s: mean = m, scale = s / sqrt(n), dof = n - 1 (JCGM 101:2008, 6.4.9).
    sd = scale sqrt(dof / (dof - 2)) for dof > 2. It is infinite for dof from above 1 to 2; up to 1 neither mean nor sd exists (nan).
    """

    mean: float
    scale: float
    dof: float

    key: ClassVar[str] = "student"
    forms: ClassVar[tuple[tuple[str, ...], ...]] = (("mean", "scale", "dof"),)
    points: ClassVar[tuple[str, ...]] = ("mean",)
    differences: ClassVar[tuple[str, ...]] = ("scale",)

    @classmethod
    def relations(cls, arguments: Arguments) -> None:
        arguments.positive("scale", "dof")
        numbers = arguments.numbers
        if numbers.get("dof", LEAST_DOF) < LEAST_DOF:
            arguments.refuse("dof", f"a number from {plain(LEAST_DOF)} on")
        if {"mean", "scale", "dof"} <= numbers.keys():
            reach = FARTHEST_SCORE + math.exp(FARTHEST / numbers["dof"])
            if not math.isfinite(abs(numbers["mean"]) + numbers["scale"] * reach):
                arguments.refuse("scale", "a spread that leaves every draw finite")

    def moments(self) -> Moments:
        if self.dof <= 1:
            return Moments(math.nan, math.nan)
        return Moments(float(self.mean), self.scale * math.sqrt(self.dof / (self.dof - 2)) if self.dof > 2 else math.inf)

    def quantile(self, u: Floats) -> Floats:
        from scipy.special import ndtri

        return np.asarray(self.mean + self.scale * (ndtri(u) * self._stretch(u)))

    def from_above(self, p: Floats) -> Floats:
        from scipy.special import ndtri

        return np.asarray(self.mean - self.scale * (ndtri(p) * self._stretch(p)))

    @cached_property
    def _stretch(self) -> TwoTails:
        """Student's quantile as a multiple of the normal one: smooth and above 0 from the median out to both tails."""
        from scipy.special import ndtri, stdtrit

        def stretch(p: Floats) -> Floats:
            with np.errstate(invalid="ignore"):
                # At the median itself the quantile is 0, whatever the stretch.
                return np.where(p == 0.5, 1.0, stdtrit(self.dof, p) / ndtri(p))

        return TwoTails(stretch, stretch)

    def share_below(self, x: float) -> float:
        from scipy.special import stdtr

        return float(stdtr(self.dof, (x - self.mean) / self.scale))

    def share_above(self, x: float) -> float:
        from scipy.special import stdtr

        return float(stdtr(self.dof, (self.mean - x) / self.scale))

    def words(self) -> str:
        if self.dof > 2:
            return self.stated()
        lacking = "no mean and no standard deviation" if self.dof <= 1 else "no finite standard deviation"
        return f"{self.stated()} ({lacking})"

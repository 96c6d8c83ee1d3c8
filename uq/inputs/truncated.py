"""A distribution cut to a range: `truncate = [low, high]` beside any of the keys."""

from __future__ import annotations

import math
from collections.abc import Mapping
from dataclasses import dataclass
from functools import cached_property
from typing import Any

import numpy as np

from uq.errors import ValueMistake
from uq.inputs.arguments import Mistakes, as_number, plain, shown
from uq.inputs.atoms import Atoms
from uq.inputs.data import Data
from uq.inputs.distribution import Distribution, Floats, Moments
from uq.inputs.quadrature import moments_between, score_of

# The least share of the draws that a cut must keep: mean, sd and quantiles of what is kept hold to about 1e-16 / share.
LEAST_KEPT = 1e-6
EXPECTED = "two numbers, [low, high], the first below the second"


@dataclass(frozen=True)
class Window:
    """What a cut takes away: the shares below and above, and the share kept."""

    below: float
    above: float
    kept: float

    @classmethod
    def of(cls, distribution: Distribution, low: float, high: float) -> Window:
        """Of a continuous distribution; the share kept is taken from the nearer tail, so that a cut far out keeps its digits."""
        below, above = distribution.share_below(low), distribution.share_above(high)
        if below > 0.5:
            return cls(below, above, distribution.share_above(low) - above)
        if above > 0.5:
            return cls(below, above, distribution.share_below(high) - below)
        return cls(below, above, 1 - below - above)

    def inside(self, distribution: Distribution, u: Floats, p: Floats) -> Floats:
        """The quantile of what is kept at u = 1 - p, from the nearer tail of the whole."""
        shape = np.shape(u)
        from_below, from_above = np.ravel(self.below + self.kept * u), np.ravel(self.above + self.kept * p)
        lower = from_below < 0.5
        x = np.empty(lower.shape)
        x[lower] = distribution.quantile(from_below[lower])
        x[~lower] = distribution.from_above(from_above[~lower])
        return x.reshape(shape)


@dataclass(frozen=True)
class Truncated(Distribution):
    """`distribution` given that the value lies from `low` to `high`, the ends included.

    The quantile is that of the whole at the share below the cut plus u times the share kept, exact in both tails. Mean and sd are
    integrated over the normal score of the share (`uq.inputs.quadrature`), relative error below 1e-10; for atoms they are sums.
    """

    distribution: Distribution
    low: float
    high: float

    def __post_init__(self) -> None:
        object.__setattr__(self, "key", self.distribution.key)
        mistakes = _ends_mistakes((self.low, self.high)) or _share_mistakes(self)
        if mistakes:
            raise Mistakes(mistakes)

    @classmethod
    def check(cls, given: Mapping[str, object]) -> tuple[ValueMistake, ...]:
        return _ends_mistakes((given.get("low"), given.get("high")))

    @property
    def kept(self) -> float:
        """The share of the draws of the whole that the cut keeps."""
        whole = self.distribution.atoms()
        if whole is not None:
            return float(self._atoms.weights.sum() / whole.weights.sum())
        return self._window.kept

    def with_values(self, values: Floats) -> Truncated:
        """The same with the values of `data` handed in."""
        whole = self.distribution
        return Truncated(whole.with_values(values) if isinstance(whole, Data) else whole, self.low, self.high)

    def quantile(self, u: Floats) -> Floats:
        u = np.asarray(u, dtype=np.float64)
        if self.atoms() is not None:
            return self._atoms.quantile(u)
        return np.clip(self._window.inside(self.distribution, u, 1 - u), self.low, self.high)

    def from_above(self, p: Floats) -> Floats:
        p = np.asarray(p, dtype=np.float64)
        if self.atoms() is not None:
            return self._atoms.from_above(p)
        return np.clip(self._window.inside(self.distribution, 1 - p, p), self.low, self.high)

    def moments(self) -> Moments:
        return self._moments

    @cached_property
    def _moments(self) -> Moments:
        if self.atoms() is not None:
            return Moments(*self._atoms.moments())
        from scipy.special import ndtri

        whole, window = self.distribution, self._window
        if not (window.below > 0 or window.above > 0):
            return whole.moments()
        lowest = score_of(window.below, 1 - window.below if window.below < 0.5 else window.kept + window.above)
        highest = score_of(1 - window.above if window.above < 0.5 else window.kept + window.below, window.above)
        kinks = [float(ndtri(kink)) for kink in whole.kinks() if 0 < kink < 1]
        return Moments(*moments_between(lowest, highest, kinks, whole.at_score))

    def share_below(self, x: float) -> float:
        if self.atoms() is not None:
            return self._atoms.share_below(x)
        if x <= self.low or x >= self.high:
            return float(x > self.low)
        window = self._window
        if window.below > 0.5:
            return 1 - self.share_above(x)
        return min(max((self.distribution.share_below(x) - window.below) / window.kept, 0.0), 1.0)

    def share_above(self, x: float) -> float:
        if self.atoms() is not None:
            return self._atoms.share_above(x)
        if x <= self.low or x >= self.high:
            return float(x < self.high)
        window = self._window
        if window.above > 0.5:
            return 1 - self.share_below(x)
        return min(max((self.distribution.share_above(x) - window.above) / window.kept, 0.0), 1.0)

    def kinks(self) -> tuple[float, ...]:
        window = self._window
        return tuple((kink - window.below) / window.kept for kink in self.distribution.kinks())

    def atoms(self) -> Atoms | None:
        return None if self.distribution.atoms() is None else self._atoms

    def misfit(self) -> str:
        return self.distribution.misfit()

    def arguments(self) -> dict[str, Any]:
        return {"distribution": self.distribution, "low": self.low, "high": self.high}

    def stated(self) -> str:
        return f"{self.distribution.stated()}, cut to {plain(self.low)} to {plain(self.high)}"

    @cached_property
    def _window(self) -> Window:
        return Window.of(self.distribution, self.low, self.high)

    @cached_property
    def _atoms(self) -> Atoms:
        whole = self.distribution.atoms()
        return (whole or Atoms(np.empty(0), np.empty(0))).within(self.low, self.high)


def cut(distribution: Distribution, truncate: object) -> tuple[Distribution | None, tuple[ValueMistake, ...]]:
    """The distribution cut as `truncate` says, or every mistake in that; all of them have the key "truncate"."""
    if not isinstance(truncate, (list, tuple)) or len(truncate) != 2:
        return None, (ValueMistake(shown(truncate), EXPECTED, key="truncate"),)
    if mistakes := _ends_mistakes(tuple(truncate)):
        return None, mistakes
    try:
        return Truncated(distribution, float(truncate[0]), float(truncate[1])), ()
    except Mistakes as found:
        return None, found.every


def _ends_mistakes(ends: tuple[object, ...]) -> tuple[ValueMistake, ...]:
    """What is wrong with the two ends alone."""
    low, high = (as_number(value) for value in ends)
    if low is None or high is None:
        wrong = ends[0] if low is None else ends[1]
        infinite = isinstance(wrong, float) and math.isinf(wrong)
        remedy = "where one side is open, write a number beyond every draw" if infinite else ""
        return (ValueMistake(shown(wrong), EXPECTED, remedy, "truncate"),)
    if low >= high:
        remedy = "the two may be swapped" if low > high else ""
        return (ValueMistake(f"[{plain(low)}, {plain(high)}]", EXPECTED, remedy, "truncate"),)
    return ()


def _share_mistakes(cut_: Truncated) -> tuple[ValueMistake, ...]:
    """What is wrong with the ends for this distribution; nothing as long as `data` has no values."""
    whole, between = cut_.distribution, f"from {plain(cut_.low)} to {plain(cut_.high)}"
    if isinstance(whole, Data) and not whole.values.size:
        return ()
    left = whole.atoms()
    if left is not None:
        count = len(np.unique(left.within(cut_.low, cut_.high).values))
        if count < 2:
            found = "no value" if count == 0 else "one value only"
            return (ValueMistake(f"{found} {between}", "a cut that leaves two or more different values", key="truncate"),)
        return ()
    if not cut_.kept >= LEAST_KEPT:
        found = f"a cut that keeps {max(cut_.kept, 0.0):.2g} of the draws"
        remedy = "so far out the shape of a distribution is not known: state one for the range itself"
        return (ValueMistake(found, f"a share of at least {plain(LEAST_KEPT)}", remedy, "truncate"),)
    return ()

"""Values that have a probability of their own."""

from __future__ import annotations

from dataclasses import dataclass

import numpy as np
from numpy.typing import NDArray

Floats = NDArray[np.float64]

# A share is a sum of weights and rounded; u may reach it from this far (relative), so that 0.3 reaches 0.1 + 0.2.
_ROUNDING = 1e-14


@dataclass(frozen=True, eq=False)
class Atoms:
    """Values in ascending order, each with a weight; the weights need not add up to 1.

    The quantile at u is the smallest value whose share at or below reaches u. Mean and sd are those of the distribution drawn from.
    """

    values: Floats
    weights: Floats

    @classmethod
    def of(cls, values: object, weights: object) -> Atoms:
        """From values in any order; equal ones are taken together, those without weight left out."""
        raw, heavy = np.asarray(values, dtype=np.float64).ravel(), np.asarray(weights, dtype=np.float64).ravel()
        distinct, place = np.unique(raw[heavy > 0], return_inverse=True)
        # Relative to the largest, so that no sum overflows.
        relative = heavy[heavy > 0] / heavy.max(initial=1e-300)
        summed: Floats = np.bincount(place, weights=relative, minlength=len(distinct)).astype(np.float64)
        return cls(distinct, summed)

    def within(self, low: float, high: float) -> Atoms:
        """Those from `low` to `high`, the ends included."""
        kept = (self.values >= low) & (self.values <= high)
        return Atoms(self.values[kept], self.weights[kept])

    def quantile(self, u: Floats) -> Floats:
        """The values at the shares u."""
        shares = np.cumsum(self.weights) / np.sum(self.weights)
        place = np.searchsorted(shares * (1 + _ROUNDING), u, side="left")
        return self.values[np.minimum(place, len(self.values) - 1)]

    def from_above(self, p: Floats) -> Floats:
        """The values at the shares 1 - p."""
        beyond = np.cumsum(self.weights[::-1])[::-1] / np.sum(self.weights)
        # Of the value at place i a share beyond[i + 1] lies above: the first with at most p above.
        rising = np.append(beyond[1:], 0.0)[::-1]
        place = len(self.values) - np.searchsorted(rising * (1 - _ROUNDING), p, side="right")
        return self.values[np.clip(place, 0, len(self.values) - 1)]

    def moments(self) -> tuple[float, float]:
        """Mean and standard deviation, from a value in the middle so that a large offset costs no digits."""
        share = self.weights / np.sum(self.weights)
        offset = float(self.values[len(self.values) // 2])
        shift = self.values - offset
        mean = float(np.sum(share * shift))
        return offset + mean, float(np.sqrt(np.sum(share * (shift - mean) ** 2)))

    def share_below(self, x: float) -> float:
        """The share of the values below x."""
        return float(np.sum(self.weights[self.values < x]) / np.sum(self.weights))

    def share_above(self, x: float) -> float:
        """The share of the values above x."""
        return float(np.sum(self.weights[self.values > x]) / np.sum(self.weights))

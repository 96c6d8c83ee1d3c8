"""The gamma distribution with a large shape: nearly normal, by its expansion around that.

In: shape, points of the unit interval. Out: quantiles and shares in multiples of the scale. Must not know: mean, sd, units.
scipy's inverse is off by 1e-9 standard deviations at a shape of 1e6 in the lower tail, and by a tenth at 1e8.
"""

from __future__ import annotations

import math
from dataclasses import dataclass

import numpy as np

from uq.inputs.distribution import Floats

# From here on the expansion is exact to 1e-13 standard deviations out to the last draw (against mpmath), and scipy begins to lose digits.
LARGE = 1e5
# No draw, and no share that is not 0 or 1, lies further out than this normal score.
FARTHEST = 38.0


@dataclass(frozen=True)
class LargeGamma:
    """Quantiles and shares for one shape of at least LARGE.

    x = k + sqrt(k) z + (z^2 - 1)/3 + (z^3 - 7z)/(36 sqrt(k)) - (3z^4 + 7z^2 - 16)/(810 k) + (9z^5 + 256z^3 - 433z)/(38880 k^(3/2)) + ...
    for the normal score z of x (the expansion of Cornish and Fisher, written for chi-square, of 2k degrees of freedom and twice the size,
    by Goldberg and Levine, Ann. Math. Stat. 17, 1946, 216-225; coefficients from memory, held against mpmath).
    """

    shape: float

    def at_score(self, z: Floats) -> Floats:
        """The quantile at a normal score."""
        root = math.sqrt(self.shape)
        terms = (
            z,
            (z**2 - 1) / 3,
            (z**3 - 7 * z) / 36,
            -(3 * z**4 + 7 * z**2 - 16) / 810,
            (9 * z**5 + 256 * z**3 - 433 * z) / 38880,
            (12 * z**6 - 243 * z**4 - 923 * z**2 + 1472) / 204120,
        )
        total = np.zeros(np.shape(z))
        for term in reversed(terms):
            total = total / root + term
        return np.asarray(self.shape + root * total)

    def __call__(self, u: Floats) -> Floats:
        """The quantile at u in (0, 1)."""
        from scipy.special import ndtri

        return self.at_score(np.asarray(ndtri(np.asarray(u, dtype=np.float64))))

    def from_above(self, p: Floats) -> Floats:
        """The quantile with the share p above it."""
        from scipy.special import ndtri

        return self.at_score(-np.asarray(ndtri(np.asarray(p, dtype=np.float64))))

    def share_below(self, x: float) -> float:
        """The share of values below x."""
        from scipy.special import ndtr

        return float(ndtr(self._score(x)))

    def share_above(self, x: float) -> float:
        """The share of values above x."""
        from scipy.special import ndtr

        return float(ndtr(-self._score(x)))

    def _score(self, x: float) -> float:
        """The normal score of x, by halving: the expansion rises all the way."""
        low, high = -FARTHEST, FARTHEST
        if not self.at_score(np.array(low)) < x < self.at_score(np.array(high)):
            return math.copysign(math.inf, x - self.shape)
        while (middle := (low + high) / 2) not in (low, high):
            low, high = (middle, high) if float(self.at_score(np.array(middle))) < x else (low, middle)
        return high

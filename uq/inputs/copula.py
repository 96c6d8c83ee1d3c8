"""A Gaussian copula: inputs whose normal scores are correlated.

In: points u of A and B, distributions, a correlation matrix. Out: columns of x, drawn together or redrawn given some of them.
Must not know: designs, names, where the matrix comes from.
"""

from __future__ import annotations

from collections.abc import Sequence
from dataclasses import dataclass, field
from functools import cached_property

import numpy as np
from numpy.typing import NDArray

from uq.inputs.arguments import FARTHEST_SCORE
from uq.inputs.distribution import Distribution
from uq.inputs.matrix import combined, sound_triangle, weights_given

Floats = NDArray[np.float64]
Flags = NDArray[np.bool_]
Sets = tuple[tuple[int, ...], ...]


@dataclass(frozen=True, eq=False)
class Copula:
    """Inputs that go together: `places` ascending, their distributions, `matrix` the correlation of their normal scores.

    In the order of the inputs each score is a sum of its own independent score and those before it: z = L e, L L' = matrix. So the first
    keeps the draws that it would have alone, and an input added behind changes none before it.
    """

    places: tuple[int, ...]
    distributions: tuple[Distribution, ...]
    matrix: Floats
    _plans: dict[Sets, Plan] = field(default_factory=dict, init=False, repr=False)

    def fill(self, x: Floats, u: Floats) -> None:
        """The columns of x [row, input] at the points u [row, input]."""
        for number, z in enumerate(self._correlated(u)):
            alone = not self._lower[number, :number].any()
            x[:, self.places[number]] = self._alone(number, u) if alone else self._at(number, z)

    def fill_mixed(self, mixed: Floats, u: Floats, x: Floats, sets: Sets) -> None:
        """The columns of `mixed` [set, row, input]: those in the set redrawn from the B rows, given the others as in the A rows.

        u, x: A rows, then B rows. Given the scores z_k of those kept the others are normal with mean W z_k and covariance L_rr L_rr'
        (Anderson, An Introduction to Multivariate Statistical Analysis, 2003, 2.5.1).
        """
        count, plan = len(u) // 2, self._plan(sets)
        scores = [*self._correlated(u[:count]), *self._scores(u[count:])]
        for number, place in enumerate(self.places):
            kept, alone = ~plan.redrawn[:, number], plan.alone[:, number]
            mixed[kept, :, place] = x[:count, place]
            if alone.any():
                mixed[alone, :, place] = self._alone(number, u[count:])
            if plan.given[number].size:
                weights = plan.weights[number]
                z = np.zeros((len(weights), count))
                # Score by score, in one order, for all sets at once: no entry knows how many rows or sets there are.
                for weight, score in zip(weights.T, scores, strict=True):
                    if weight.any():
                        z += weight[:, np.newaxis] * score
                mixed[plan.given[number], :, place] = self._at(number, z)

    def _alone(self, number: int, u: Floats) -> Floats:
        """An input in whose draw nothing but its own u plays a part: to the same bits as if it were independent."""
        return self.distributions[number].quantile(np.ascontiguousarray(u[:, self.places[number]]))

    def _at(self, number: int, z: Floats) -> Floats:
        """An input at its scores, which stay where every distribution has finite draws."""
        return self.distributions[number].at_score(np.clip(z, -FARTHEST_SCORE, FARTHEST_SCORE))

    def _correlated(self, u: Floats) -> list[Floats]:
        """z = L e, an array for every input."""
        e = self._scores(u)
        return [combined(self._lower[row, : row + 1], e[: row + 1]) for row in range(len(e))]

    def _scores(self, u: Floats) -> list[Floats]:
        from scipy.special import ndtri

        return [ndtri(np.ascontiguousarray(u[:, place])) for place in self.places]

    @cached_property
    def _lower(self) -> Floats:
        return sound_triangle(self.matrix)

    def _plan(self, sets: Sets) -> Plan:
        """How each set is redrawn; worked out once. (Two threads may both work it out: they find the same.)"""
        if sets not in self._plans:
            self._plans[sets] = plan_of(self.matrix, [[place in taken for place in self.places] for taken in sets])
        return self._plans[sets]


@dataclass(frozen=True, eq=False)
class Plan:
    """How the inputs of a copula are redrawn for every set.

    redrawn, alone [set, input]: whether redrawn at all, and whether by its own u only. Of every input: `given`, the sets in which other
    scores count, and `weights` there [set, score], of the correlated scores of A, then the independent ones of B.
    """

    redrawn: Flags
    alone: Flags
    given: list[NDArray[np.intp]]
    weights: list[Floats]


def plan_of(matrix: Floats, redrawn: Sequence[Sequence[bool]]) -> Plan:
    """The plan for a correlation matrix and which inputs every set redraws, [set][input]."""
    size = len(matrix)
    flags = np.array(redrawn, dtype=np.bool_).reshape(len(redrawn), size)
    weights = np.zeros((len(flags), size, 2 * size))
    for chosen, rows in zip(flags, weights, strict=True):
        kept, taken = np.flatnonzero(~chosen), np.flatnonzero(chosen)
        order = np.concatenate([kept, taken])
        lower = sound_triangle(matrix[np.ix_(order, order)])
        rows[np.ix_(taken, kept)] = weights_given(lower, len(kept))
        rows[np.ix_(taken, size + taken)] = lower[len(kept) :, len(kept) :]
    own = weights[:, range(size), range(size, 2 * size)]
    alone = flags & (np.count_nonzero(weights, axis=2) == 1) & (own == 1.0)
    given = [np.flatnonzero(flags[:, number] & ~alone[:, number]) for number in range(size)]
    return Plan(flags, alone, given, [weights[sets, number] for number, sets in enumerate(given)])

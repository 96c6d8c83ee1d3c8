"""The uncertain inputs of a study: each with its distribution, together a map from the unit cube to numbers for the model."""

from __future__ import annotations

from dataclasses import dataclass

import numpy as np
from numpy.typing import NDArray

from uq.inputs.distribution import Distribution

Floats = NDArray[np.float64]


@dataclass(frozen=True)
class Input:
    """One uncertain input: name, label, unit text of its values and of their differences, distribution, and where it comes from.

    kind: "knowledge" (could be reduced), "variability" (cannot) or "" (not stated). evidence: 0 a guess to 4 measured here repeatedly, None
    where not stated. group: label for a common ranking, or "".
    """

    name: str
    label: str
    unit: str
    distribution: Distribution
    source: str = ""
    kind: str = ""
    evidence: int | None = None
    group: str = ""
    difference_unit: str = ""

    def mean(self) -> float:
        """The expectation, in the input's unit."""
        return self.distribution.moments().mean

    def sd(self) -> float:
        """The standard deviation, in the unit of a difference."""
        return self.distribution.moments().sd


@dataclass(frozen=True)
class Inputs:
    """All uncertain inputs in their order: parameters as in the file, then uncertain starts in the order of the states."""

    items: tuple[Input, ...]

    @property
    def names(self) -> tuple[str, ...]:
        """The names, in order."""
        return tuple(item.name for item in self.items)

    def values(self, u: Floats) -> Floats:
        """The inputs at points u in the open unit cube: u [row, input] to x [row, input], each column in its input's unit.

        Every column is x = quantile(u) of its own: an entry of x depends on its u and on nothing else.
        """
        x = np.empty(u.shape)
        for place, item in enumerate(self.items):
            x[:, place] = item.distribution.quantile(np.ascontiguousarray(u[:, place]))
        return x

    def medians(self) -> Floats:
        """The median of every input [input]: where the nominal run stands."""
        return self.values(np.full((1, len(self.items)), 0.5)).ravel()

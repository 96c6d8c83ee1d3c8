"""Inputs that are drawn together as rows of a joint sample."""

from __future__ import annotations

from collections.abc import Sequence
from dataclasses import dataclass

import numpy as np
from numpy.typing import NDArray

from uq.inputs.data import Data
from uq.inputs.dependence import JointSample

Floats = NDArray[np.float64]


@dataclass(frozen=True, eq=False)
class JointRows:
    """Rows `values` [row, input] of a joint sample, drawn as a whole; `places` ascending, in the order of the columns of `values`.

    The u of the first input chooses the row, among the rows in ascending order of that input: it has the draws of `data` of its column.
    """

    places: tuple[int, ...]
    values: Floats

    @classmethod
    def of(cls, sample: JointSample, names: Sequence[str]) -> JointRows:
        """The rows of a sample for the inputs of these names."""
        column = {name: place for place, name in enumerate(sample.columns)}
        inside = [(place, column[name]) for place, name in enumerate(names) if name in column]
        values = sample.values[:, [each for _, each in inside]]
        # By the first input, ties by the next, and so on: whatever the order of the rows in the file.
        return cls(tuple(place for place, _ in inside), np.ascontiguousarray(values[np.lexsort(values.T[::-1])]))

    def fill(self, x: Floats, u: Floats) -> None:
        """The columns of x [row, input] at the points u [row, input]."""
        count = len(self.values)
        # As in `Data.quantile`.
        ranks = np.ceil(u[:, self.places[0]] * count).astype(np.intp)
        x[:, self.places] = self.values[np.clip(ranks, 1, count) - 1]

    def fill_mixed(self, mixed: Floats, u: Floats, x: Floats, sets: Sequence[tuple[int, ...]]) -> None:
        """The columns of `mixed` [set, row, input]: those of the B rows where they are in the set, else of the A rows.

        u, x: A rows, then B rows. ValueError where a set parts the inputs of the sample.
        """
        count = len(u) // 2
        for taken, rows in zip(sets, mixed, strict=True):
            inside = set(taken).intersection(self.places)
            if inside and len(inside) < len(self.places):
                raise ValueError("a joint sample is kept or redrawn as a whole")
            rows[:, self.places] = x[count:, self.places] if inside else x[:count, self.places]


def columns_of(sample: JointSample) -> dict[str, Data]:
    """The distribution of each input of a sample by itself."""
    return {name: Data(sample.file, column, values) for (name, column), values in zip(sample.columns.items(), sample.values.T, strict=True)}

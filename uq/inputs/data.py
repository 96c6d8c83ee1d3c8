"""The empirical distribution of values that were handed in."""

from __future__ import annotations

from collections.abc import Mapping
from dataclasses import dataclass, field
from typing import Any, ClassVar

import numpy as np

from uq.errors import ValueMistake
from uq.inputs.arguments import Arguments, Mistakes
from uq.inputs.atoms import Atoms
from uq.inputs.distribution import Distribution, Floats, Moments


@dataclass(frozen=True, eq=False)
class Data(Distribution):
    """Each of the values in a column of a file with the same probability.

    `values` are read by whoever knows files, and handed in; they are kept in ascending order. The quantile at u is the smallest value
    whose share at or below reaches u: of n values the ceil(n u)-th. Mean and sd are those of the distribution drawn from (divisor n).
    """

    file: str
    column: str
    values: Floats = field(repr=False, default_factory=lambda: np.empty(0))

    key: ClassVar[str] = "data"
    forms: ClassVar[tuple[tuple[str, ...], ...]] = (("file", "column"),)

    def __post_init__(self) -> None:
        object.__setattr__(self, "values", _sorted(self.values))
        mistakes = (*self.check({"file": self.file, "column": self.column}), *_value_mistakes(self.values))
        if mistakes:
            raise Mistakes(mistakes)

    @classmethod
    def check(cls, given: Mapping[str, object]) -> tuple[ValueMistake, ...]:
        arguments = Arguments(given)
        arguments.choose_form(cls.forms)
        for name in ("file", "column"):
            value = arguments.given.get(name, "-")
            if not isinstance(value, str) or not value.strip():
                arguments.refuse(name, f"the name of a {name}")
        return tuple(arguments.mistakes)

    def with_values(self, values: Floats) -> Data:
        """The same with its values handed in; raises `Mistakes` where they are no distribution."""
        if np.size(values) == 0:
            raise ValueMistake("no values", "two or more different values", key="column")
        return Data(self.file, self.column, values)

    def moments(self) -> Moments:
        # From a value in the middle, so that neither a large offset nor a large count costs digits.
        offset = float(self.values[len(self.values) // 2])
        return Moments(offset + float(np.mean(self.values - offset)), float(np.std(self.values - offset)))

    def quantile(self, u: Floats) -> Floats:
        # n u is rounded to the nearest double, so that 0.05 of 20 values means the first, though 0.05 as a double is a little larger.
        count = len(self.values)
        ranks = np.ceil(np.asarray(u, dtype=np.float64) * count).astype(np.intp)
        return self.values[np.clip(ranks, 1, count) - 1]

    def from_above(self, p: Floats) -> Floats:
        count = len(self.values)
        beyond = np.floor(np.asarray(p, dtype=np.float64) * count).astype(np.intp)
        return self.values[np.clip(count - 1 - beyond, 0, count - 1)]

    def share_below(self, x: float) -> float:
        return float(np.searchsorted(self.values, x, side="left")) / len(self.values)

    def share_above(self, x: float) -> float:
        return float(len(self.values) - np.searchsorted(self.values, x, side="right")) / len(self.values)

    def atoms(self) -> Atoms:
        return Atoms(self.values, np.ones(len(self.values)))

    def arguments(self) -> dict[str, Any]:
        return {"file": self.file, "column": self.column, "values": self.values}

    def stated(self) -> str:
        return f"data, column {self.column} of {self.file}, {len(self.values)} values"


def _sorted(values: object) -> Floats:
    """The values in ascending order, as a constant copy of its own."""
    ordered: Floats = np.sort(np.array(values, dtype=np.float64).ravel())
    ordered.flags.writeable = False
    return ordered


def _value_mistakes(values: Floats) -> tuple[ValueMistake, ...]:
    """What is wrong with values that were handed in; none yet is no mistake."""
    if values.size == 0:
        return ()
    wrong = int(np.count_nonzero(~np.isfinite(values)))
    if wrong:
        return (ValueMistake(f"{wrong} of {values.size} values not finite", "finite numbers only", key="column"),)
    if values.min() == values.max():
        found = "one value" if values.size == 1 else f"{values.size} equal values"
        return (ValueMistake(found, "two or more different values", "give a fixed number instead", "column"),)
    if not np.isfinite(values.max() - values.min()):
        return (ValueMistake("values too far apart for a double", "a finite range", key="column"),)
    return ()

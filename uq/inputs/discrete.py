"""A handful of values, each with its probability."""

from __future__ import annotations

from collections.abc import Mapping, Sequence
from dataclasses import dataclass
from functools import cached_property
from typing import ClassVar

import numpy as np

from uq.errors import ValueMistake
from uq.inputs.arguments import Arguments, as_number, plain, shown
from uq.inputs.atoms import Atoms
from uq.inputs.distribution import Distribution, Floats, Moments

# Up to so many values are told one by one.
TOLD = 6


@dataclass(frozen=True)
class Discrete(Distribution):
    """Each of the `values` with a probability in proportion to its entry in `weights`; the weights need not add up to 1.

    The quantile at u is the smallest value whose share at or below reaches u; sd is that of the distribution.
    """

    values: Sequence[float]
    weights: Sequence[float]

    key: ClassVar[str] = "discrete"
    forms: ClassVar[tuple[tuple[str, ...], ...]] = (("values", "weights"),)
    points: ClassVar[tuple[str, ...]] = ("values",)

    def __post_init__(self) -> None:
        super().__post_init__()
        for name in ("values", "weights"):
            object.__setattr__(self, name, tuple(float(each) for each in getattr(self, name)))

    @classmethod
    def check(cls, given: Mapping[str, object]) -> tuple[ValueMistake, ...]:
        arguments = Arguments(given)
        arguments.choose_form(cls.forms)
        values, weights = (_numbers(arguments, name) for name in ("values", "weights"))
        if weights is not None and min(weights, default=0.0) < 0:
            arguments.mistakes.append(ValueMistake(f"the weight {plain(min(weights))}", "weights of 0 or more", key="weights"))
            weights = None
        if values is not None and weights is not None:
            arguments.mistakes += _pair_mistakes(values, weights)
        return tuple(arguments.mistakes)

    @cached_property
    def _atoms(self) -> Atoms:
        return Atoms.of(self.values, self.weights)

    def moments(self) -> Moments:
        return Moments(*self._atoms.moments())

    def quantile(self, u: Floats) -> Floats:
        return self._atoms.quantile(u)

    def from_above(self, p: Floats) -> Floats:
        return self._atoms.from_above(p)

    def share_below(self, x: float) -> float:
        return self._atoms.share_below(x)

    def share_above(self, x: float) -> float:
        return self._atoms.share_above(x)

    def atoms(self) -> Atoms:
        return self._atoms

    def stated(self) -> str:
        values, shares = self._atoms.values, self._atoms.weights / self._atoms.weights.sum()
        if len(values) > TOLD:
            return f"discrete, {len(values)} values from {plain(float(values[0]))} to {plain(float(values[-1]))}"
        told = (f"{plain(float(value))} ({100 * share:.3g} %)" for value, share in zip(values, shares, strict=True))
        return ", ".join(["discrete", *told])


def _numbers(arguments: Arguments, name: str) -> list[float] | None:
    """The list `name` as finite numbers; None, and a mistake, where it is not one."""
    if name not in arguments.given:
        return None
    given = arguments.given[name]
    if not isinstance(given, (list, tuple)):
        arguments.refuse(name, "a list of numbers, [ ... ]")
        return None
    numbers = [as_number(each) for each in given]
    wrong = [place for place, number in enumerate(numbers) if number is None]
    if wrong:
        arguments.mistakes.append(ValueMistake(f"{shown(given[wrong[0]])} as number {wrong[0] + 1}", "finite numbers", key=name))
        return None
    return [number for number in numbers if number is not None]


def _pair_mistakes(values: list[float], weights: list[float]) -> list[ValueMistake]:
    """What is wrong between values and weights."""
    if len(values) != len(weights):
        return [ValueMistake(f"{len(weights)} weights for {len(values)} values", "one weight for every value", key="weights")]
    left = {value for value, weight in zip(values, weights, strict=True) if weight > 0}
    if len(left) < 2:
        found = "no value" if not left else "one value"
        return [ValueMistake(f"{found} with a weight above 0", "two or more different values", "give a fixed number instead", "values")]
    if not np.isfinite(max(left) - min(left)):
        return [ValueMistake("values too far apart for a double", "a finite range", key="values")]
    return []

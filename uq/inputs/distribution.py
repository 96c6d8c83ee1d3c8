"""What every distribution is: a frozen class whose fields are the TOML keys, that checks itself and knows its quantiles and moments."""

from __future__ import annotations

from abc import ABC, abstractmethod
from collections.abc import Mapping
from dataclasses import fields
from typing import Any, ClassVar, NamedTuple

import numpy as np
from numpy.typing import NDArray

from uq.errors import ValueMistake
from uq.inputs.arguments import Arguments, Mistakes, plain

Floats = NDArray[np.float64]


class Moments(NamedTuple):
    """Expectation, in the unit of the quantity, and standard deviation, in the unit of its differences."""

    mean: float
    sd: float


class Distribution(ABC):
    """A distribution of one uncertain number, in the unit of the quantity.

    key: the TOML key. forms: the sets of arguments it may be given by; optional: arguments that may stand beside any of them.
    Construction raises `Mistakes`, a `ValueMistake` that holds every mistake at once with the argument as key.
    """

    key: ClassVar[str]
    forms: ClassVar[tuple[tuple[str, ...], ...]]
    optional: ClassVar[tuple[str, ...]] = ()

    def __post_init__(self) -> None:
        mistakes = self.check(self.arguments())
        if mistakes:
            raise Mistakes(mistakes)

    @classmethod
    def check(cls, given: Mapping[str, object]) -> tuple[ValueMistake, ...]:
        """Every mistake in a table of arguments."""
        arguments = Arguments(given)
        arguments.choose_form(cls.forms, cls.optional)
        arguments.read_numbers()
        cls.relations(arguments)
        return tuple(arguments.mistakes)

    @classmethod
    @abstractmethod
    def relations(cls, arguments: Arguments) -> None:
        """Check what the arguments must hold, alone and among each other."""

    @abstractmethod
    def moments(self) -> Moments:
        """Mean and standard deviation, exact. (Not `mean()`: `mean` is an argument of several distributions.)"""

    @abstractmethod
    def quantile(self, u: Floats) -> Floats:
        """The smallest value whose share at or below reaches u; u in (0, 1) of any shape, the result of the same shape."""

    @abstractmethod
    def share_below(self, x: float) -> float:
        """The probability of a value below x."""

    def arguments(self) -> dict[str, Any]:
        """The arguments it was given by, in the order of the fields."""
        return {f.name: value for f in fields(self) if (value := getattr(self, f.name)) is not None}  # type: ignore[arg-type]

    def words(self) -> str:
        """The distribution in words: key and arguments, "normal, mean 98, sd 1.2"."""
        return ", ".join([self.key, *(f"{name} {plain(float(value))}" for name, value in self.arguments().items())])

"""What every distribution is: a frozen class whose fields are the TOML keys, that checks itself and knows its quantiles and moments."""

from __future__ import annotations

from abc import ABC, abstractmethod
from collections.abc import Mapping
from dataclasses import fields
from typing import Any, ClassVar, NamedTuple

import numpy as np
from numpy.typing import NDArray

from uq.errors import ValueMistake
from uq.inputs.arguments import Arguments, Mistakes, listed, plain
from uq.inputs.atoms import Atoms

Floats = NDArray[np.float64]


class Moments(NamedTuple):
    """Expectation, in the unit of the quantity, and standard deviation, in the unit of its differences; inf or nan where there is none."""

    mean: float
    sd: float


class Distribution(ABC):
    """A distribution of one uncertain number, in the unit of the quantity.

    key: the TOML key. forms: the sets of arguments it may be given by; optional: arguments that may stand beside any of them.
    points: arguments that are values of the quantity; differences: arguments that are differences of such values; all others are plain
    numbers or texts. multiplying: arguments that mean nothing on a scale whose zero is a convention (degC, degF).
    Construction raises `Mistakes`, a `ValueMistake` that holds every mistake at once with the argument as key.
    """

    key: ClassVar[str]
    forms: ClassVar[tuple[tuple[str, ...], ...]]
    optional: ClassVar[tuple[str, ...]] = ()
    points: ClassVar[tuple[str, ...]] = ()
    differences: ClassVar[tuple[str, ...]] = ()
    multiplying: ClassVar[tuple[str, ...]] = ()

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
    def known(cls) -> tuple[str, ...]:
        """Every argument it may have."""
        return tuple(dict.fromkeys(name for form in (*cls.forms, cls.optional) for name in form))

    @classmethod
    def usage(cls) -> str:
        """Its arguments as a line of documentation."""
        text = "; or ".join(listed(form) for form in cls.forms)
        return text + (f"; optionally {listed(cls.optional)}" if cls.optional else "")

    @classmethod
    def relations(cls, arguments: Arguments) -> None:
        """Check what the arguments must hold, alone and among each other."""
        raise NotImplementedError

    @abstractmethod
    def moments(self) -> Moments:
        """Mean and standard deviation, exact. (Not `mean()`: `mean` is an argument of several distributions.)"""

    @abstractmethod
    def quantile(self, u: Floats) -> Floats:
        """The smallest value whose share at or below reaches u; u in (0, 1) of any shape, the result of the same shape."""

    @abstractmethod
    def from_above(self, p: Floats) -> Floats:
        """The quantile at 1 - p, exact to the last digits also where 1 - p is no double; p in (0, 1) of any shape."""

    @abstractmethod
    def share_below(self, x: float) -> float:
        """The probability of a value below x."""

    @abstractmethod
    def share_above(self, x: float) -> float:
        """The probability of a value above x, exact to the last digits where it is small."""

    def at_score(self, z: Floats) -> Floats:
        """The quantile at the share of a normal score: quantile(ndtr(z)), from the nearer tail; z of any shape."""
        from scipy.special import ndtr

        flat = np.ravel(z)
        x = np.empty_like(flat)
        below = flat < 0
        x[below] = self.quantile(ndtr(flat[below]))
        x[~below] = self.from_above(ndtr(-flat[~below]))
        return x.reshape(np.shape(z))

    def kinks(self) -> tuple[float, ...]:
        """Shares at which the quantile function is not smooth."""
        return ()

    def atoms(self) -> Atoms | None:
        """The values that have a probability of their own, where all have; None for a continuous distribution."""
        return None

    def misfit(self) -> str:
        """How far the distribution misses what it was given by, as a sentence; empty where it does not."""
        return ""

    def arguments(self) -> dict[str, Any]:
        """The arguments it was given by, in the order of the fields."""
        return {f.name: value for f in fields(self) if (value := getattr(self, f.name)) is not None}  # type: ignore[arg-type]

    def words(self) -> str:
        """The distribution in words: key and arguments, "normal, mean 98, sd 1.2", and what it has not."""
        return self.stated()

    def stated(self) -> str:
        """Key and arguments in words."""
        return ", ".join([self.key, *(f"{name} {plain(float(value))}" for name, value in self.arguments().items())])

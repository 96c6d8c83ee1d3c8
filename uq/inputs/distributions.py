"""All distributions in the order of the study format, and the one way in from a table of arguments."""

from __future__ import annotations

from collections.abc import Mapping

from uq.errors import ValueMistake, suggest
from uq.inputs.arguments import Mistakes, one_of, shown
from uq.inputs.bell import Lognormal, Normal
from uq.inputs.bounded import Beta, Pert, Triangular, Uniform
from uq.inputs.data import Data
from uq.inputs.distribution import Distribution, Moments
from uq.inputs.positive import Gamma

__all__ = [
    "DISTRIBUTIONS", "NOT_YET", "Beta", "Data", "Distribution", "Gamma", "Lognormal", "Mistakes", "Moments", "Normal", "Pert", "Triangular",
    "Uniform", "read_distribution",
]  # fmt: skip

DISTRIBUTIONS: tuple[type[Distribution], ...] = (Normal, Lognormal, Uniform, Triangular, Pert, Beta, Gamma, Data)

# Known to the format, not built yet.
NOT_YET: tuple[str, ...] = ("loguniform", "weibull", "exponential", "student", "arcsine", "trapezoid", "percentiles", "discrete")


def read_distribution(key: str, table: object) -> tuple[Distribution | None, tuple[ValueMistake, ...]]:
    """The distribution with this key and these arguments, or None and every mistake in them.

    table: a mapping of arguments, numbers in the unit of the quantity; `data` has file and column instead, and its values are handed in
    afterwards with `Data.with_values`.
    A mistake's `key` is the argument it is about, "" where it is about the table as a whole.
    """
    kinds = {kind.key: kind for kind in DISTRIBUTIONS}
    if key not in kinds:
        ready = "not available yet" if key in NOT_YET else suggest(key, (*kinds, *NOT_YET))
        return None, (ValueMistake(f"`{key}`", one_of(tuple(kinds)), ready),)
    kind = kinds[key]
    if not isinstance(table, Mapping):
        return None, (ValueMistake(shown(table), "a table of arguments, { ... }"),)
    mistakes = kind.check(table)
    return (None, mistakes) if mistakes else (kind(**table), ())

"""All distributions in the order of the study format, and the one way in from a table of arguments."""

from __future__ import annotations

from collections.abc import Mapping

from uq.errors import ValueMistake, suggest
from uq.inputs.arguments import Mistakes, one_of, shown
from uq.inputs.bell import Lognormal, Normal
from uq.inputs.beta import Beta, Pert
from uq.inputs.bounded import Arcsine, Loguniform, Triangular, Uniform
from uq.inputs.data import Data
from uq.inputs.discrete import Discrete
from uq.inputs.distribution import Distribution, Moments
from uq.inputs.percentiles import Percentiles
from uq.inputs.positive import Exponential, Gamma, Weibull
from uq.inputs.student import Student
from uq.inputs.trapezoid import Trapezoid
from uq.inputs.truncated import EXPECTED as ENDS
from uq.inputs.truncated import Truncated, cut

__all__ = [
    "DISTRIBUTIONS", "Arcsine", "Beta", "Data", "Discrete", "Distribution", "Exponential", "Gamma", "Lognormal", "Loguniform",
    "Mistakes", "Moments", "Normal", "Percentiles", "Pert", "Student", "Trapezoid", "Triangular", "Truncated", "Uniform", "Weibull", "cut",
    "read_distribution",
]  # fmt: skip

DISTRIBUTIONS: tuple[type[Distribution], ...] = (
    Normal, Lognormal, Uniform, Loguniform, Triangular, Pert, Beta, Gamma, Weibull, Exponential, Student, Arcsine, Trapezoid, Percentiles,
    Discrete, Data,
)  # fmt: skip


def read_distribution(key: str, table: object, truncate: object = None) -> tuple[Distribution | None, tuple[ValueMistake, ...]]:
    """The distribution with this key and these arguments, cut where `truncate` is given; or None and every mistake in them.

    table: a mapping of arguments, numbers in the unit of the quantity; `data` has file and column instead, and its values are handed in
    afterwards with `with_values`, of a cut one as well. truncate: [low, high] in the unit of the quantity.
    A mistake's `key` is the argument it is about, "" where it is about the table as a whole, "truncate" where it is about the cut.
    """
    kinds = {kind.key: kind for kind in DISTRIBUTIONS}
    if key not in kinds:
        return None, (ValueMistake(f"`{key}`", one_of(tuple(kinds)), suggest(key, kinds)),)
    kind = kinds[key]
    if not isinstance(table, Mapping):
        return None, (ValueMistake(shown(table), "a table of arguments, { ... }"),)
    mistakes = kind.check(table)
    if truncate is None:
        return (None, mistakes) if mistakes else (kind(**table), ())
    made = None if mistakes else kind(**table)
    # With arguments that do not stand, the ends are still judged by themselves.
    whole, more = cut(made or Normal(mean=0, sd=1), truncate)
    if made is None:
        return None, (*mistakes, *(mistake for mistake in more if mistake.expected == ENDS))
    return whole, more

"""What is said about inputs that go together: correlations, and joint samples from a file; each checks itself.

In: the tables of `[[dependence]]`. Out: pairs with their correlations, samples, or every mistake. Must not know: distributions, designs.
"""

from __future__ import annotations

import math
from collections.abc import Mapping, Sequence
from dataclasses import dataclass, field
from itertools import combinations
from typing import Any

import numpy as np
from numpy.typing import NDArray

from uq.errors import ValueMistake, suggest
from uq.inputs.arguments import Mistakes, as_number, listed, one_of, plain, shown

Floats = NDArray[np.float64]

CORRELATIONS = ("rank_correlation", "normal_correlation")
SAMPLE = ("file", "columns")


def normal_of_rank(rank: float) -> float:
    """The correlation of the normal scores of a Gaussian copula with this rank (Spearman) correlation: 2 sin(pi r / 6) (Pearson 1907)."""
    return 2 * math.sin(math.pi * rank / 6)


def rank_of_normal(normal: float) -> float:
    """The rank (Spearman) correlation of a Gaussian copula whose normal scores have this correlation: 6 asin(r / 2) / pi (Pearson 1907)."""
    return 6 * math.asin(normal / 2) / math.pi


@dataclass(frozen=True)
class Dependence:
    """A correlation between two inputs, or between each two of several: numbers in the order ab, ac, ..., bc, ... (upper triangle by rows).

    Exactly one of `rank_correlation` (Spearman) and `normal_correlation` (of the normal scores; for lognormals of the logarithms).
    """

    between: Sequence[str]
    rank_correlation: float | Sequence[float] | None = None
    normal_correlation: float | Sequence[float] | None = None

    def __post_init__(self) -> None:
        given = {"between": self.between, **{name: value for name in CORRELATIONS if (value := getattr(self, name)) is not None}}
        if mistakes := self.check(given):
            raise Mistakes(mistakes)
        object.__setattr__(self, "between", tuple(self.between))
        for name in CORRELATIONS:
            if isinstance(value := getattr(self, name), list):
                object.__setattr__(self, name, tuple(value))

    @classmethod
    def check(cls, given: Mapping[str, object]) -> tuple[ValueMistake, ...]:
        """Every mistake in a table of arguments."""
        mistakes = _unknown(given, ("between", *CORRELATIONS))
        between = given.get("between")
        names = _names(between)
        if "between" not in given or names is None:
            found = "no `between`" if "between" not in given else shown(between)
            mistakes.append(ValueMistake(found, "a list of two or more different inputs", key="between" if "between" in given else ""))
        elif twice := [name for place, name in enumerate(names) if name in names[:place]]:
            mistakes.append(ValueMistake(f"{listed(twice[:1])} twice", "a list of two or more different inputs", key="between"))
        kinds = [name for name in CORRELATIONS if name in given]
        if len(kinds) != 1:
            found = f"{listed(kinds)} together" if kinds else "no correlation"
            mistakes.append(ValueMistake(found, f"one of {listed(CORRELATIONS)}"))
        for kind in kinds:
            mistakes += _correlation_mistakes(kind, given[kind], None if names is None else len(names))
        return tuple(mistakes)

    @property
    def kind(self) -> str:
        """Which of the two correlations was given."""
        return CORRELATIONS[0] if self.rank_correlation is not None else CORRELATIONS[1]

    def pairs(self) -> tuple[tuple[str, str, float], ...]:
        """Every pair with the number given for it."""
        given = getattr(self, self.kind)
        numbers = [float(each) for each in (given if isinstance(given, tuple) else (given,))]
        return tuple((a, b, number) for (a, b), number in zip(combinations(self.between, 2), numbers, strict=True))

    def normal(self) -> tuple[tuple[str, str, float], ...]:
        """Every pair with the correlation of its normal scores."""
        convert = normal_of_rank if self.rank_correlation is not None else float
        return tuple((a, b, convert(number)) for a, b, number in self.pairs())


@dataclass(frozen=True, eq=False)
class JointSample:
    """Inputs that are drawn together: rows of a file, each with the same probability. `columns`: input to column of the file.

    `values` [row, input] are read by whoever knows files, in the order of `columns`, and handed in with `with_values`.
    """

    file: str
    columns: Mapping[str, str]
    values: Floats = field(repr=False, default_factory=lambda: np.empty((0, 0)))

    def __post_init__(self) -> None:
        mistakes = self.check({"file": self.file, "columns": self.columns})
        values = np.array(self.values, dtype=np.float64)
        if not mistakes and values.size:
            mistakes = _value_mistakes(tuple(self.columns), values)
        if mistakes:
            raise Mistakes(mistakes)
        values.flags.writeable = False
        object.__setattr__(self, "values", values)
        object.__setattr__(self, "columns", dict(self.columns))

    @classmethod
    def check(cls, given: Mapping[str, object]) -> tuple[ValueMistake, ...]:
        """Every mistake in a table of arguments."""
        mistakes = _unknown(given, SAMPLE)
        file, columns = given.get("file"), given.get("columns")
        if not isinstance(file, str) or not file.strip():
            found = shown(file) if "file" in given else "no `file`"
            mistakes.append(ValueMistake(found, "the name of a file", key="file" if "file" in given else ""))
        expected = 'two or more inputs with their columns, { k0 = "k0", ... }'
        if not isinstance(columns, Mapping) or len(columns) < 2:
            found = shown(columns) if "columns" in given else "no `columns`"
            mistakes.append(ValueMistake(found, expected, key="columns" if "columns" in given else ""))
            return tuple(mistakes)
        for name, column in columns.items():
            if not isinstance(column, str) or not column.strip():
                mistakes.append(ValueMistake(f"{shown(column)} for `{name}`", "the name of a column", key="columns"))
        return tuple(mistakes)

    @property
    def between(self) -> tuple[str, ...]:
        """The inputs that go together."""
        return tuple(self.columns)

    def with_values(self, values: Floats) -> JointSample:
        """The same with its values [row, input] handed in; raises `Mistakes` where they cannot be drawn from."""
        if np.size(values) == 0:
            raise ValueMistake("no rows", "two or more different rows", key="file")
        return JointSample(self.file, self.columns, values)


Dependences = Dependence | JointSample


def read_dependence(table: object) -> tuple[Dependences | None, tuple[ValueMistake, ...]]:
    """One entry of `[[dependence]]`, or None and every mistake in it; a mistake's `key` is the argument, "" the entry as a whole.

    A joint sample comes without its values: they are handed in afterwards with `with_values`.
    """
    if not isinstance(table, Mapping):
        return None, (ValueMistake(shown(table), "a table"),)
    kind: type[Dependence] | type[JointSample] = JointSample if any(name in table for name in SAMPLE) else Dependence
    if kind is JointSample and any(name in table for name in ("between", *CORRELATIONS)):
        found = listed(name for name in table if name in ("between", *CORRELATIONS, *SAMPLE)) + " together"
        return None, (ValueMistake(found, f"either {listed(SAMPLE)}, or `between` with {one_of(CORRELATIONS)}"),)
    mistakes = kind.check(table)
    return (None, mistakes) if mistakes else (kind(**table), ())


def _unknown(given: Mapping[str, object], known: tuple[str, ...]) -> list[ValueMistake]:
    every = ("between", *CORRELATIONS, *SAMPLE)
    return [ValueMistake(f"the unknown key `{name}`", one_of(known), suggest(name, every), name) for name in given if name not in known]


def _names(between: Any) -> list[str] | None:
    """The names of `between`, or None where it is no list of two or more texts."""
    if not isinstance(between, (list, tuple)) or len(between) < 2 or not all(isinstance(name, str) for name in between):
        return None
    return list(between)


def _correlation_mistakes(kind: str, given: object, inputs: int | None) -> list[ValueMistake]:
    """What is wrong with the numbers of a correlation."""
    several = isinstance(given, (list, tuple))
    each = list(given) if isinstance(given, (list, tuple)) else [given]
    numbers = [as_number(value) for value in each]
    for place, (value, number) in enumerate(zip(each, numbers, strict=True)):
        if number is None or not -1 < number < 1:
            where = f" as number {place + 1}" if several else ""
            remedy = "for one that follows from another write a term" if number is not None and abs(number) == 1 else ""
            return [ValueMistake(shown(value) + where, "a number between -1 and 1", remedy, kind)]
    needed = None if inputs is None else inputs * (inputs - 1) // 2
    if needed is not None and len(each) != needed:
        found = f"{len(each)} numbers" if len(each) != 1 else "1 number"
        expected = f"{needed} numbers, one for every pair" if needed > 1 else "1 number"
        remedy = "in the order ab, ac, ..., bc, ..." if needed > 1 else ""
        return [ValueMistake(f"{found} for {inputs} inputs", expected, remedy, kind)]
    return []


def _value_mistakes(names: tuple[str, ...], values: Floats) -> tuple[ValueMistake, ...]:
    """What is wrong with the values of a joint sample."""
    if values.ndim != 2 or values.shape[1] != len(names):
        raise ValueError(f"values of shape {values.shape} for {len(names)} inputs")
    wrong = int(np.count_nonzero(~np.isfinite(values).all(axis=1)))
    if wrong:
        return (ValueMistake(f"{wrong} of {len(values)} rows with a value that is not finite", "finite numbers only", key="file"),)
    alike = [name for name, column in zip(names, values.T, strict=True) if column.min() == column.max()]
    if alike:
        found = f"one value only for {listed(alike[:1])}, {plain(float(values[0, names.index(alike[0])]))}"
        return (ValueMistake(found, "two or more different values", "give a fixed number instead", "columns"),)
    return ()

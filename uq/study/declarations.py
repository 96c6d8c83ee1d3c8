"""The declarations of the model and of what is answered: states, parameters, terms, outcomes, limits."""

from __future__ import annotations

from dataclasses import dataclass
from typing import Any

from uq.errors import ValueMistake
from uq.inputs.distributions import Distribution
from uq.lang.scope import Index
from uq.study import index
from uq.study import values as read
from uq.study.fields import entry, one_of, refuse, unit_entry
from uq.study.notes import KeyMistake
from uq.study.plan import Found
from uq.study.uncertain import DISTRIBUTION_FIELD, DISTRIBUTION_KEYS, KINDS, Uncertain, distribution, evidence, start
from uq.study.values import Frame


def valid_range(value: object, frame: Frame) -> tuple[float, float]:
    """Lowest and highest value that a state may take."""
    if not isinstance(value, list) or len(value) != 2:
        raise ValueMistake(read.show(value), "a pair [lowest, highest]")
    low, high = read.listed(read.quantity, "numbers")(value, frame)
    if low >= high:
        raise ValueMistake(f"[{low:g}, {high:g}]", "a pair [lowest, highest] with the lowest first")
    return low, high


Over = tuple[Index | None, ...]
EDGE = 'what a neighbour beyond an end is: "mirror" (the end itself), "wrap" (the other end), or a value'


def over() -> Any:
    """The key `over`."""
    return entry(index.OVER, index.over, (), "no index")


@dataclass(frozen=True, kw_only=True)
class State:
    """`[states.NAME]`: a quantity that the equations carry forward."""

    name: str
    label: str = entry("how it is called in reports", read.text, "", "the name")
    unit: str = unit_entry('its unit, "1" for none', read.unit)
    over: Over = over()  # noqa: RUF009
    start: float | str | Uncertain | tuple[Any, ...] = entry(  # noqa: RUF009
        "value at the start: a number, a quantity, an expression of parameters, or a distribution; with `over` also a list", start
    )
    rate: str = entry("expression of its change per time", read.expression)
    valid: tuple[float, float] | None = entry(
        "[lowest, highest]; a member that leaves it stops with the status out_of_range", valid_range, None, "no bounds"
    )
    negligible: float | None = entry(
        "changes below this do not matter: the solver's absolute tolerance", read.deviation, None, "accuracy x its usual size"
    )
    edge: float | str | None = entry(EDGE, index.edge, None, "a mistake")

    def __post_init__(self) -> None:
        refuse((*index.shape_mistakes("start", self.start, self.over), *repeating(self)))


@dataclass(frozen=True, kw_only=True)
class Parameter:
    """`[parameters]`: a fixed number (`value`) or an uncertain one (exactly one distribution)."""

    name: str
    label: str = entry("how it is called in reports", read.text, "", "the name")
    unit: str = unit_entry('its unit, "1" for none', read.unit)
    over: Over = over()  # noqa: RUF009
    value: index.Values | None = entry("the number, where it is fixed; with `over` also a list, or a list of rows", index.numbers, None, "")  # noqa: RUF009
    distribution: Distribution | None = one_of("the distribution, where it is uncertain", distribution, DISTRIBUTION_FIELD)  # noqa: RUF009
    source: str = entry("where the numbers come from", read.text, "", 'shown as "not stated"')
    kind: str = entry('"knowledge" (could be reduced) or "variability" (cannot)', read.choice(KINDS), "", "not stated")
    evidence: int | None = entry("0 a guess to 4 measured here, repeatedly", evidence, None, "not stated")
    group: str = entry("label of a group of inputs", read.text, "", "no group")
    edge: float | str | None = entry(EDGE, index.edge_of_number, None, "a mistake")

    def __post_init__(self) -> None:
        refuse(self.mistakes())

    def mistakes(self) -> Found:
        """What cannot stand in this table."""
        if self.value is None and self.distribution is None:
            yield (), KeyMistake("neither a value nor a distribution", "`value` or one of " + ", ".join(DISTRIBUTION_KEYS))
        elif self.value is not None and self.distribution is not None:
            yield (self.distribution.key,), KeyMistake(f"`{self.distribution.key}` beside `value`", "one of the two")
        yield from index.shape_mistakes("value", self.value, self.over)
        yield from index.edge_mistakes(self.edge, self.over)


@dataclass(frozen=True, kw_only=True)
class Term:
    """`[terms]`: a named expression; either just its text or a table with these keys."""

    name: str
    value: str = entry("the expression", read.expression)
    label: str = entry("how it is called in reports", read.text, "", "the name")
    unit: str = entry("the unit it must come out in", read.unit, "", "follows from the expression")
    over: Over = over()  # noqa: RUF009
    edge: float | str | None = entry(EDGE, index.edge, None, "a mistake")

    def __post_init__(self) -> None:
        refuse(repeating(self))


@dataclass(frozen=True, kw_only=True)
class Outcome:
    """`[outcomes.NAME]`: one number per member, taken from courses as they stand at the solved times.

    A peak between two of these is missed; following the solver's continuous solution comes in a later version.
    """

    name: str
    label: str = entry("how it is called in reports", read.text, "", "the name")
    unit: str = entry("the unit it must come out in", read.unit, "", "follows from the expression")
    take: str = entry("expression of highest, lowest, average, integral, final, value_at, of parameters and numbers", read.expression)
    over: Over = over()  # noqa: RUF009

    def __post_init__(self) -> None:
        refuse(index.twice_mistakes(self.over))


@dataclass(frozen=True, kw_only=True)
class Limit:
    """`[limits.NAME]`: a condition that should not (or should) come true, judged at the solved times: output times and `by`.

    A passing between two of these that ends before the next is missed; following the continuous solution comes in a later version.
    """

    name: str
    label: str = entry("how it is called in reports", read.text, "", "the name")
    when: str = entry("the condition", read.expression)
    by: tuple[float, ...] = entry("times at which the probability is quoted", read.one_or_more(read.moment, "times"), (), "the stop")
    accept: float | None = entry(
        "accepted probability by the last of them", read.between(0, 1, "a probability above 0, at most 1"), None, "no verdict"
    )
    over: Over = over()  # noqa: RUF009

    later = ("lasting", "during")

    def __post_init__(self) -> None:
        refuse(index.twice_mistakes(self.over))


def repeating(declared: State | Term) -> Found:
    """What cannot stand in a table that repeats."""
    yield from index.twice_mistakes(declared.over)
    yield from index.edge_mistakes(declared.edge, declared.over)

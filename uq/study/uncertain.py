"""Uncertain numbers: a distribution with where it comes from, in a parameter or at the start of a state."""

from __future__ import annotations

from collections.abc import Mapping
from dataclasses import dataclass
from typing import Any

from uq.errors import ValueMistake
from uq.inputs.distributions import DISTRIBUTIONS, Data, Distribution, Truncated, read_distribution
from uq.study import values as read
from uq.study.fields import entry, one_of, read_table
from uq.study.index import numbers
from uq.study.locate import Path
from uq.study.notes import KeyMistake, Refused
from uq.study.values import Frame

DISTRIBUTION_KEYS = tuple(kind.key for kind in DISTRIBUTIONS)
CUT = "truncate"
# All keys that together are a distribution.
DISTRIBUTION_FIELD = (*DISTRIBUTION_KEYS, CUT)
KINDS = ("knowledge", "variability")
_KINDS = {kind.key: kind for kind in DISTRIBUTIONS}


def evidence(value: object, frame: Frame) -> int:
    """A whole number from 0 to 4."""
    level: int = read.whole(0)(value, frame)
    if level > 4:
        raise ValueMistake(read.show(value), "a whole number from 0 (a guess) to 4 (measured here, repeatedly)")
    return level


def distribution(table: Any, frame: Frame) -> Distribution:
    """The distribution among the keys of `table`, of which there must be exactly one, cut by `truncate`; every mistake at once."""
    table = dict(table)
    cut = table.pop(CUT, None)
    if not table:
        raise Refused([((CUT,), KeyMistake(f"`{CUT}` without a distribution", "one of " + ", ".join(DISTRIBUTION_KEYS)))])
    first, *more = table
    wrong: list[tuple[Path, ValueMistake]] = [((key,), KeyMistake(f"`{key}` beside `{first}`", "exactly one distribution")) for key in more]
    arguments = table[first]
    made = None
    if isinstance(arguments, Mapping):
        plain, failed = _arguments(_KINDS[first], arguments, frame)
        wrong += [((first, key), mistake) for key, mistake in failed.items()]
    else:
        plain, failed = arguments, {}
    ends, unread = _ends(cut, frame)
    wrong += unread
    made, mistakes = read_distribution(first, plain) if ends is None else read_distribution(first, plain, ends)
    for mistake in mistakes:
        if mistake.key not in failed:
            wrong.append(_placed(first, mistake, arguments))
    if isinstance(made, Data | Truncated) and not wrong:
        made, wrong = _with_values(made, frame)
    if made is None or wrong:
        raise Refused(wrong)
    return made


def _ends(cut: object, frame: Frame) -> tuple[object, list[tuple[Path, ValueMistake]]]:
    """Where a distribution is cut, with quantities converted to the unit, and what is wrong with those."""
    wrong: list[tuple[Path, ValueMistake]] = []
    if not isinstance(cut, list):
        return cut, wrong
    ends = []
    for index, value in enumerate(cut):
        try:
            ends.append(_in_unit(value, frame, difference=False))
        except ValueMistake as mistake:
            wrong.append(((CUT, index), mistake))
    return (None if wrong else ends), wrong


def _arguments(kind: type[Distribution], arguments: Mapping[str, Any], frame: Frame) -> tuple[dict[str, Any], dict[str, ValueMistake]]:
    """The arguments with quantities converted to the unit, and what is wrong with those."""
    plain, unit = dict(arguments), frame.unit
    wrong: dict[str, ValueMistake] = {}
    for name, value in arguments.items():
        try:
            if name in (*kind.points, *kind.differences):
                plain[name] = _in_unit(value, frame, difference=name in kind.differences)
        except ValueMistake as mistake:
            wrong[name] = mistake
    if unit is not None and unit.temperature == "scale":
        found = f"a {kind.key} with a relative spread in {unit.text}, whose zero is a convention"
        names = [name for name in arguments if name in kind.multiplying or arguments[name] == "lognormal"]
        wrong |= {name: ValueMistake(found, "`sd` as a difference, or the temperature in K") for name in names[:1]}
    return plain, wrong


def _in_unit(value: object, frame: Frame, difference: bool) -> object:
    """A quantity, or a list with some among its numbers, in the unit; anything else as it is."""
    if isinstance(value, list):
        return [_in_unit(item, frame, difference) for item in value]
    return read.quantity_in(value, frame.unit, frame, difference) if isinstance(value, str) else value


def _placed(key: str, mistake: ValueMistake, arguments: object) -> tuple[Path, ValueMistake]:
    """A mistake of the distribution `key` with its path; one about an argument's name points at the name."""
    if not mistake.key:
        return (key,), mistake
    if mistake.key == CUT:
        return (CUT,), ValueMistake(mistake.found, mistake.expected, mistake.remedy)
    told = ValueMistake if mistake.key in _KINDS[key].known() else KeyMistake
    return (key, mistake.key), told(mistake.found, mistake.expected, mistake.remedy)


def _with_values(made: Data | Truncated, frame: Frame) -> tuple[Distribution | None, list[tuple[Path, ValueMistake]]]:
    """The distribution with the numbers of its column where it is made from data, or what is wrong with them."""
    data = made.distribution if isinstance(made, Truncated) else made
    if not isinstance(data, Data):
        return made, []
    try:
        return made.with_values(frame.files.column(data.file, data.column)), []
    except ValueMistake as mistake:
        path = (CUT,) if mistake.key == CUT else (data.key, mistake.key or "file")
        return None, [(path, ValueMistake(mistake.found, mistake.expected, mistake.remedy))]


@dataclass(frozen=True, kw_only=True)
class Uncertain:
    """The uncertain start of a state: exactly one distribution and where it comes from."""

    distribution: Distribution | None = one_of("the distribution", distribution, DISTRIBUTION_FIELD)  # noqa: RUF009
    source: str = entry("where the numbers come from", read.text, "", 'shown as "not stated"')
    kind: str = entry('"knowledge" (could be reduced) or "variability" (cannot)', read.choice(KINDS), "", "not stated")
    evidence: int | None = entry("0 a guess to 4 measured here, repeatedly", evidence, None, "not stated")
    group: str = entry("label of a group of inputs", read.text, "", "no group")


def drawn_jointly(name: str, table: Mapping[str, Any], frame: Frame) -> dict[str, Any]:
    """The table of an input, with its column of a joint sample as its distribution where it is drawn from one.

    Raises KeyMistake where it states a distribution of its own. A joint sample that is wrong leaves the table as it is.
    """
    place = frame.joint.get(name)
    own = next((key for key in table if key in DISTRIBUTION_KEYS), None)
    if name not in frame.joint:
        return dict(table)
    if own is not None:
        found = f"`{own}` beside the joint sample of [[dependence]] that draws `{name}`"
        raise KeyMistake(found, "one of the two", "the column of the sample is its distribution", key=own)
    return {**table, "data": {"file": place[0], "column": place[1]}} if place else dict(table)


def start(value: object, frame: Frame) -> float | str | Uncertain | tuple[Any, ...]:
    """The start of a state: a number, a quantity, an expression of parameters, a table with a distribution, or a list of numbers."""
    if isinstance(value, list):
        values: tuple[Any, ...] = numbers(value, frame)  # type: ignore[assignment]
        return values
    if isinstance(value, Mapping):
        sheet = read_table(Uncertain, value, frame)
        if sheet.whole is None:
            raise Refused(sheet.mistakes)
        if sheet.whole.distribution is None:
            raise Refused([((), KeyMistake("no distribution", "one of " + ", ".join(DISTRIBUTION_KEYS), "a fixed start is just a number"))])
        return sheet.whole
    if isinstance(value, str) and frame.quantity_of(value) is None:
        text: str = read.expression(value, frame)
        return text
    return read.quantity(value, frame)

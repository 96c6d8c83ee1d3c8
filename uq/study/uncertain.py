"""Uncertain numbers: a distribution with where it comes from, in a parameter or at the start of a state."""

from __future__ import annotations

from collections.abc import Mapping
from dataclasses import dataclass
from typing import Any

import numpy as np

from uq.errors import ValueMistake
from uq.inputs.distributions import DISTRIBUTIONS, NOT_YET, Data, Distribution, read_distribution
from uq.study import values as read
from uq.study.fields import entry, one_of, read_table
from uq.study.locate import Path
from uq.study.notes import KeyMistake, Refused
from uq.study.values import Frame
from uq.units import Unit

DISTRIBUTION_KEYS = tuple(kind.key for kind in DISTRIBUTIONS)
LATER_KEYS = (*NOT_YET, "truncate")
KINDS = ("knowledge", "variability")

# What the arguments are measured in; all others are numbers without a unit.
_POINTS = ("mean", "median", "low", "mode", "high", "value")
_DIFFERENCES = ("sd", "expanded", "scale")
# Arguments and shapes that multiply: they mean nothing on a scale whose zero is a convention.
_MULTIPLYING = ("cv", "gsd", "scale")


def evidence(value: object, frame: Frame) -> int:
    """A whole number from 0 to 4."""
    level: int = read.whole(0)(value, frame)
    if level > 4:
        raise ValueMistake(read.show(value), "a whole number from 0 (a guess) to 4 (measured here, repeatedly)")
    return level


def distribution(table: Any, frame: Frame) -> Distribution:
    """The distribution among the keys of `table`, of which there must be exactly one; every mistake in its arguments at once."""
    first, *more = table
    wrong: list[tuple[Path, ValueMistake]] = [((key,), KeyMistake(f"`{key}` beside `{first}`", "exactly one distribution")) for key in more]
    arguments = table[first]
    made = None
    if isinstance(arguments, Mapping):
        plain, unread = _arguments(first, arguments, frame.unit)
        wrong += [((first, key), mistake) for key, mistake in unread]
        failed = {key for key, _ in unread}
    else:
        plain, failed = arguments, set()
    made, mistakes = read_distribution(first, plain)
    for mistake in mistakes:
        if mistake.key not in failed:
            wrong.append(_placed(first, mistake, arguments))
    if isinstance(made, Data) and not wrong:
        made, wrong = _with_values(made, frame)
    if made is None or wrong:
        raise Refused(wrong)
    return made


def _arguments(key: str, arguments: Mapping[str, Any], unit: Unit | None) -> tuple[dict[str, Any], list[tuple[str, ValueMistake]]]:
    """The arguments with quantities converted to the unit, and what is wrong with those."""
    plain, wrong = dict(arguments), []
    for name, value in arguments.items():
        try:
            if isinstance(value, str) and name in (*_POINTS, *_DIFFERENCES):
                plain[name] = read.quantity_in(value, unit, difference=name in _DIFFERENCES)
        except ValueMistake as mistake:
            wrong.append((name, mistake))
    if unit is not None and unit.temperature == "scale":
        relative = ("median", "mean") if key == "lognormal" else _MULTIPLYING
        found = f"a {key} with a relative spread in {unit.text}, whose zero is a convention"
        names = [name for name in arguments if name in relative]
        wrong += [(name, ValueMistake(found, "`sd` as a difference, or the temperature in K")) for name in names[:1]]
    return plain, wrong


def _placed(key: str, mistake: ValueMistake, arguments: object) -> tuple[Path, ValueMistake]:
    """A mistake of the distribution `key` with its path; one about an argument's name points at the name."""
    if not mistake.key:
        return (key,), mistake
    kind = next(kind for kind in DISTRIBUTIONS if kind.key == key)
    known = {*kind.optional, *(name for form in kind.forms for name in form)}
    told = ValueMistake if mistake.key in known else KeyMistake
    return (key, mistake.key), told(mistake.found, mistake.expected, mistake.remedy)


def _with_values(data: Data, frame: Frame) -> tuple[Data | None, list[tuple[Path, ValueMistake]]]:
    """Data with the numbers of its column, or what is wrong with them."""
    try:
        return data.with_values(np.array(frame.files.column(data.file, data.column))), []
    except ValueMistake as mistake:
        return None, [((data.key, mistake.key or "file"), ValueMistake(mistake.found, mistake.expected, mistake.remedy))]


@dataclass(frozen=True, kw_only=True)
class Uncertain:
    """The uncertain start of a state: exactly one distribution and where it comes from."""

    distribution: Distribution | None = one_of("the distribution", distribution, DISTRIBUTION_KEYS, LATER_KEYS)  # noqa: RUF009
    source: str = entry("where the numbers come from", read.text, "", 'shown as "not stated"')
    kind: str = entry('"knowledge" (could be reduced) or "variability" (cannot)', read.choice(KINDS), "", "not stated")
    evidence: int | None = entry("0 a guess to 4 measured here, repeatedly", evidence, None, "not stated")
    group: str = entry("label of a group of inputs", read.text, "", "no group")


def start(value: object, frame: Frame) -> float | str | Uncertain:
    """The start of a state: a number, a quantity, an expression of parameters, or a table with a distribution."""
    if isinstance(value, Mapping):
        sheet = read_table(Uncertain, value, frame)
        if sheet.whole is None:
            raise Refused(sheet.mistakes)
        if sheet.whole.distribution is None:
            raise Refused([((), KeyMistake("no distribution", "one of " + ", ".join(DISTRIBUTION_KEYS), "a fixed start is just a number"))])
        return sheet.whole
    if isinstance(value, str) and read.split_quantity(value) is None:
        text: str = read.expression(value, frame)
        return text
    return read.quantity(value, frame)

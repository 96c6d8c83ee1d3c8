"""How the values of a study are read: one small reader per kind of value, each raises `ValueMistake` or `Refused`.

A reader takes the value as tomllib gave it and the `Frame` it stands in, and returns what the declaration keeps. Numbers are in the
unit of their table; a text of a number, a blank and a unit is converted to it.
"""

from __future__ import annotations

import math
import re
from collections.abc import Callable, Iterator, Mapping, Sequence
from dataclasses import dataclass, field, replace
from typing import Any

from uq.errors import ValueMistake, suggest
from uq.lang.scope import Index
from uq.study.columns import Files
from uq.study.locate import Path
from uq.study.notes import Refused
from uq.units import Unit, Units, parse_quantity, parse_unit

NO_OWN = Units()
Reader = Callable[[object, "Frame"], Any]

_SIZE = re.compile(r"\s*(\d+(?:\.\d+)?)\s*(B|kB|MB|GB|TB|KiB|MiB|GiB|TiB)\s*")
_SIZES = {"B": 1, "kB": 10**3, "MB": 10**6, "GB": 10**9, "TB": 10**12, "KiB": 2**10, "MiB": 2**20, "GiB": 2**30, "TiB": 2**40}
_CONTROL = re.compile(r"[\x00-\x08\x0b-\x1f\x7f-\x9f]")


@dataclass(frozen=True)
class Frame:
    """What the numbers around are measured in; `unit` and `time` are None where missing or wrong (numbers then pass as they are).

    `own` are the study's own counting units, `indices` its indices, None where one is wrong. `joint` has the inputs that a joint sample
    draws: file and column, None where that is wrong.
    """

    unit: Unit | None
    time: Unit | None
    unitless: bool
    files: Files
    own: Units = NO_OWN
    joint: Mapping[str, tuple[str, str] | None] = field(default_factory=dict)
    indices: Mapping[str, Index | None] = field(default_factory=dict)

    def within(self, unit: Unit | None) -> Frame:
        """The same for a table with a unit of its own."""
        return replace(self, unit=unit)

    def unit_of(self, text: str) -> Unit:
        """The unit of a text."""
        return parse_unit(text, self.own)

    def quantity_of(self, text: str) -> tuple[float, Unit] | None:
        """Number and unit of a text like "75 degC"; None where it is none. One without a known unit is a mistake."""
        return parse_quantity(text, self.own)


def show(value: object) -> str:
    """A value as the user would recognise it, shortened."""
    if isinstance(value, bool):
        return f"the truth value {str(value).lower()}"
    if isinstance(value, str):
        return '"' + (value if len(value) <= 60 else value[:57] + "...") + '"'
    if isinstance(value, int | float):
        return repr(value) if abs(value) < 10**15 else f"{value:.6g}" if isinstance(value, float) else "a very large number"
    kinds = ((Mapping, "a table"), (list, "a list" if value else "an empty list"))
    return next((word for kind, word in kinds if isinstance(value, kind)), "a date or time")


def number(value: object, frame: Frame | None = None) -> float:
    """A finite number; a truth value is none."""
    if isinstance(value, bool) or not isinstance(value, int | float):
        raise ValueMistake(show(value), "a number", number_remedy(value))
    try:
        plain = float(value)
    except OverflowError:
        plain = math.inf
    if not math.isfinite(plain):
        raise ValueMistake(show(value), "a finite number")
    return plain


def number_remedy(value: object) -> str:
    if isinstance(value, str):
        try:
            return f"write {float(value)!r} without the quotes" if math.isfinite(float(value)) else ""
        except ValueError:
            return ""
    return ""


def whole(lowest: int) -> Reader:
    """A whole number from `lowest` up (2000 or 2e3)."""

    def read(value: object, frame: Frame) -> int:
        plain = number(value)
        if plain != math.floor(plain) or plain < lowest:
            raise ValueMistake(show(value), f"a whole number, {lowest} or more")
        return int(value) if isinstance(value, int) else int(plain)

    return read


def between(low: float, high: float, words: str) -> Reader:
    """A number in (low, high]; `words` says so."""

    def read(value: object, frame: Frame) -> float:
        plain = number(value)
        if not low < plain <= high:
            raise ValueMistake(show(value), words, f"{plain:g} % is {plain / 100:g}" if high == 1 < plain <= 100 else "")
        return plain

    return read


def text(value: object, frame: Frame | None = None) -> str:
    """Plain Unicode text without control characters."""
    if not isinstance(value, str):
        raise ValueMistake(show(value), "a text in quotes")
    if _CONTROL.search(value):
        raise ValueMistake("a control character", "plain text")
    return value


def choice(words: Sequence[str], later: Sequence[str] = ()) -> Reader:
    """One of some words; `later` are words which this version knows and cannot do."""
    expected = "one of " + ", ".join(f'"{word}"' for word in words) if len(words) > 1 else f'"{words[0]}"'

    def read(value: object, frame: Frame) -> str:
        if value in later:
            raise ValueMistake(f"{show(value)}, which is not available yet", expected)
        if not isinstance(value, str) or value not in words:
            raise ValueMistake(show(value), expected, suggest(value, words) if isinstance(value, str) else "")
        return value

    return read


def listed(reader: Reader, what: str) -> Reader:
    """A list of values, each read by `reader`; all its mistakes at once."""

    def read(value: object, frame: Frame) -> tuple[Any, ...]:
        if not isinstance(value, list):
            raise ValueMistake(show(value), f"a list of {what}")
        found: list[Any] = []
        wrong: list[tuple[Path, ValueMistake]] = []
        for index, item in enumerate(value):
            try:
                found.append(reader(item, frame))
            except ValueMistake as mistake:
                wrong.append(((index,), mistake))
            except Refused as refused:
                wrong += [((index, *path), mistake) for path, mistake in refused.mistakes]
        if wrong:
            raise Refused(wrong)
        return tuple(found)

    return read


def one_or_more(reader: Reader, what: str) -> Reader:
    """A list, or a single value that stands for a list of one."""
    several = listed(reader, what)

    def read(value: object, frame: Frame) -> tuple[Any, ...]:
        found: tuple[Any, ...] = several(value if isinstance(value, list) else [value], frame)
        return found

    return read


def unit(value: object, frame: Frame) -> str:
    """The text of a unit, "1" for none."""
    plain = text(value)
    frame.unit_of(plain)
    return plain


def size(value: object, frame: Frame) -> int:
    """An amount of memory such as "512 MB", in bytes."""
    match = _SIZE.fullmatch(value) if isinstance(value, str) else None
    if match is None or float(match.group(1)) <= 0:
        raise ValueMistake(show(value), 'an amount of memory such as "512 MB"')
    return int(float(match.group(1)) * _SIZES[match.group(2)])


def expression(value: object, frame: Frame) -> str:
    """The text of an expression; a plain number is one too."""
    if isinstance(value, str):
        if not value.strip():
            raise ValueMistake("an empty text", "an expression")
        return value
    plain = number(value) if not isinstance(value, dict | list) else None
    if plain is None:
        raise ValueMistake(show(value), "an expression in quotes")
    return repr(plain)


def quantity_in(value: object, unit: Unit | None, frame: Frame, difference: bool = False) -> float:
    """A number, or a quantity converted to `unit`; `difference` says that an offset of the scale does not count (a deviation of degC)."""
    if not isinstance(value, str):
        return number(value)
    found = frame.quantity_of(value)
    if found is None:
        example = f' or a quantity such as "75 {unit.text}"' if unit is not None and not unit.is_none else ""
        raise ValueMistake(show(value), f"a number{example}", number_remedy(value))
    plain, own = found
    if unit is None:
        return plain
    if difference:
        own, unit = own.difference(), unit.difference()
    if not own.same_dimension(unit):
        expected = f"a number, or a quantity in {unit.text} or a unit that converts to it"
        raise ValueMistake(f"{show(value)}, a quantity in {own.text}", expected)
    return own.convert(plain, unit)


def quantity(value: object, frame: Frame) -> float:
    """A number in the unit of the table, or a quantity that is converted to it."""
    return quantity_in(value, frame.unit, frame)


def deviation(value: object, frame: Frame) -> float:
    """A deviation above 0 in the unit of the table; of a temperature it is a difference."""
    plain = quantity_in(value, frame.unit, frame, difference=True)
    if plain <= 0:
        raise ValueMistake(show(value), "a number above 0")
    return plain


def moment(value: object, frame: Frame) -> float:
    """A time: a number in the study's time unit, or a quantity that is converted to it."""
    return quantity_in(value, frame.time, frame)


def rows(value: object, frame: Frame) -> tuple[tuple[float, float], ...]:
    """Pairs of a time and a value."""

    def pair(item: object, frame: Frame) -> tuple[float, float]:
        if not isinstance(item, list) or len(item) != 2:
            raise ValueMistake(show(item), "a pair [time, value]")
        return (moment(item[0], frame), quantity(item[1], frame))

    found: tuple[tuple[float, float], ...] = listed(pair, "pairs [time, value]")(value, frame)
    return found


def ascending(values: Sequence[float]) -> Iterator[int]:
    """Indices of values that are not above the one before."""
    return (i for i in range(1, len(values)) if values[i] <= values[i - 1])

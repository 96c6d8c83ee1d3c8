"""The arguments of a distribution under check: every mistake is collected, none stops the check.

In: a table of arguments and the forms a distribution allows. Out: sound numbers and `ValueMistake`s with the argument as key; key "" is the
distribution's own table. Must not know: which distribution it is.
"""

from __future__ import annotations

import difflib
import math
from collections.abc import Iterable, Mapping

from uq.errors import ValueMistake, suggest

# The outermost points of a design (see uq.design.points): every argument must give finite draws out to them.
LOWEST_U = 2.0**-53
HIGHEST_U = 1.0 - 2.0**-53
# Normal scores of these points lie within +-8.21; a little beyond, so that rounding never matters.
FARTHEST_SCORE = 8.3
# Logarithms of draws must stay well inside the normal numbers of a double (about -708 to 709).
LARGEST_LOGARITHM = 700.0


class Mistakes(ValueMistake):
    """All mistakes of one declaration at once: reads like the first of them, `every` holds them all."""

    def __init__(self, every: tuple[ValueMistake, ...]) -> None:
        first = every[0]
        super().__init__(first.found, first.expected, first.remedy, first.key)
        self.every = every

    def __str__(self) -> str:
        return "; ".join((f"{m.key}: " if m.key else "") + ValueMistake.__str__(m) for m in self.every)


class Arguments:
    """A table of arguments: `numbers` holds those that are finite numbers, `mistakes` what was wrong so far.

    A relation is only judged where all its arguments are sound, so that one slip gives one message.
    """

    def __init__(self, given: Mapping[str, object]) -> None:
        self.given = dict(given)
        self.numbers: dict[str, float] = {}
        self.mistakes: list[ValueMistake] = []

    def read_numbers(self) -> None:
        """Sort the given values into numbers and mistakes."""
        for name, value in self.given.items():
            number = as_number(value)
            if number is None:
                remedy = "write it without quotes" if isinstance(value, str) and _reads_as_number(value) else ""
                self.refuse(name, "a finite number", remedy)
            else:
                self.numbers[name] = number

    def choose_form(self, forms: tuple[tuple[str, ...], ...], optional: tuple[str, ...] = ()) -> None:
        """Hold that the given names are one of `forms`, with any of `optional`; report unknown, missing and superfluous ones."""
        known = tuple(dict.fromkeys(name for form in (*forms, optional) for name in form))
        meant: set[str] = set()
        for name in self.given:
            near = [name] if name in known else difflib.get_close_matches(name, known, n=1, cutoff=0.6)
            meant.update(near)
            if name not in known:
                self.mistakes.append(ValueMistake(f"the unknown key `{name}`", one_of(known), suggest(name, known), name))
        asked = meant - set(optional)
        if any(asked == set(form) for form in forms):
            return
        if any(asked < set(form) for form in forms):
            found = f"only {listed(n for n in known if n in asked)}" if asked else "no arguments"
            missing = "; or ".join(listed(n for n in form if n not in asked) for form in forms if asked < set(form))
            self.mistakes.append(ValueMistake(found, _forms_text(forms, optional), f"add {missing}" if asked else ""))
        else:
            found = f"{listed(n for n in known if n in asked)} together"
            self.mistakes.append(ValueMistake(found, _forms_text(forms, optional)))

    def refuse(self, name: str, expected: str, remedy: str = "") -> None:
        """Report the argument `name`, as it was given; it counts as unsound from here on."""
        self.numbers.pop(name, None)
        self.mistakes.append(ValueMistake(shown(self.given[name]), expected, remedy, name))

    def positive(self, *names: str) -> None:
        """Each of these that is given must be above 0."""
        for name in names:
            if name in self.numbers and self.numbers[name] <= 0:
                self.refuse(name, "a number above 0")

    def rising(self, low: str, high: str) -> None:
        """`low` must be below `high`, with a finite distance."""
        if low not in self.numbers or high not in self.numbers:
            return
        below, above = self.numbers[low], self.numbers[high]
        if below >= above:
            name, other, word = (high, low, "above") if high in self.given else (low, high, "below")
            swapped = f"{low} and {high} may be swapped" if below > above and high in self.given and low in self.given else ""
            self.refuse(name, f"a number {word} `{other}` ({plain(self.numbers[other])})", swapped)
        elif not math.isfinite(above - below):
            self.refuse(high, f"a finite distance from `{low}`")

    def inside(self, name: str, low: str, high: str) -> None:
        """`name` must lie from `low` to `high`, the ends allowed."""
        if not {name, low, high} <= self.numbers.keys():
            return
        below, value, above = (self.numbers[n] for n in (low, name, high))
        if not below <= value <= above:
            self.refuse(name, f"a number from `{low}` to `{high}` ({plain(below)} to {plain(above)})")


def as_number(value: object) -> float | None:
    """The value as a finite float, or None; a truth value is not a number."""
    if isinstance(value, bool) or not isinstance(value, (int, float)):
        return None
    try:
        number = float(value)
    except OverflowError:
        return None
    return number if math.isfinite(number) else None


def shown(value: object) -> str:
    """A value as a TOML file would show it, shortened."""
    if isinstance(value, bool):
        return f"the truth value {str(value).lower()}"
    if isinstance(value, str):
        return f'the text "{value if len(value) <= 40 else value[:37] + "..."}"'
    if isinstance(value, (int, float)):
        return plain(float(value)) if as_number(value) is not None else str(value)[:40]
    if isinstance(value, Mapping):
        return "a table"
    return "a list" if isinstance(value, (list, tuple)) else f"a {type(value).__name__}"


def plain(value: float) -> str:
    """A number as short as it can be without loss: 98, 0.05, 6e12."""
    short = next((text for text in (f"{value:g}", f"{value:.15g}") if float(text) == value), repr(value))
    digits, mark, exponent = short.partition("e")
    return f"{digits}e{int(exponent)}" if mark else digits


def listed(names: Iterable[str]) -> str:
    """Names as `a`, `b`."""
    return ", ".join(f"`{name}`" for name in names)


def one_of(names: tuple[str, ...]) -> str:
    """Names as one of `a`, `b`, for an expectation."""
    return listed(names) if len(names) == 1 else f"one of {listed(names)}"


def _forms_text(forms: tuple[tuple[str, ...], ...], optional: tuple[str, ...]) -> str:
    text = "; or ".join(listed(form) for form in forms)
    return text + (f", optionally {listed(optional)}" if optional else "")


def _reads_as_number(text: str) -> bool:
    try:
        return math.isfinite(float(text))
    except ValueError:
        return False

"""The mistakes of one study as they are found, each with its place in the file."""

from __future__ import annotations

import re
from collections.abc import Iterable
from dataclasses import dataclass, field

from uq.errors import ExpressionError, Mistake, UqError, ValueMistake
from uq.study.locate import Path, Places

_PLAIN_KEY = re.compile(r"[A-Za-z0-9_-]+")


class KeyMistake(ValueMistake):
    """A mistake about a key itself: unknown, missing, not available yet."""


class Refused(UqError):
    """Several mistakes of one value at once, each with the path of its place below that value."""

    def __init__(self, mistakes: Iterable[tuple[Path, ValueMistake]]) -> None:
        self.mistakes = tuple(mistakes)
        super().__init__("; ".join(f"{dotted(path)}: {m}" if path else str(m) for path, m in self.mistakes))


def dotted(path: Path) -> str:
    """A path as it is written: `limits.alarm.by[1]`; a key that is no bare word stands in quotes."""
    text = ""
    for part in path:
        if isinstance(part, int):
            text += f"[{part}]"
        else:
            word = part if _PLAIN_KEY.fullmatch(part) else '"' + part.replace('"', '\\"') + '"'
            text += f".{word}" if text else word
    return text


@dataclass
class Notes:
    """What is wrong so far; `changed` are the paths that do not come from the file (their mistakes have no line), `what` the file is."""

    file: str
    places: Places
    changed: tuple[Path, ...] = ()
    mistakes: list[Mistake] = field(default_factory=list)
    what: str = "study"

    def at_key(self, path: Path, found: str, expected: str, remedy: str = "") -> None:
        """A mistake about a key: unknown, missing, misnamed."""
        self._add(path, self.places.of_key(path), found, expected, remedy)

    def at_value(self, path: Path, found: str, expected: str, remedy: str = "") -> None:
        """A mistake about a value."""
        self._add(path, self.places.of_value(path), found, expected, remedy)

    def at_offset(self, path: Path, offset: int, found: str, expected: str, remedy: str = "") -> None:
        """A mistake at an offset of the file."""
        self._add(path, self.places.line_column(offset), found, expected, remedy)

    def at_line(self, line: int, column: int, found: str, expected: str, remedy: str = "") -> None:
        """A mistake of the file as a whole."""
        self._add((), (line, column), found, expected, remedy)

    def refused(self, path: Path, error: ValueMistake | Refused) -> None:
        """Mistakes which an inner part raised about the value at `path`."""
        if isinstance(error, Refused):
            for below, mistake in error.mistakes:
                self.refused((*path, *below), mistake)
        elif isinstance(error, ExpressionError):
            self._add(path, self.places.inside(path, error.offset), error.found, error.expected, error.remedy)
        else:
            place = (*path, error.key) if error.key else path
            say = self.at_key if isinstance(error, KeyMistake) else self.at_value
            say(place, error.found, error.expected, error.remedy)

    def _add(self, path: Path, place: tuple[int, int], found: str, expected: str, remedy: str) -> None:
        file = self.file
        if any(path[:2] == change[:2] for change in self.changed):
            file = f"{file} (as changed)"
        if any(path[: len(change)] == change for change in self.changed):
            place = (0, 0)
        mistake = Mistake(file, *place, dotted(path) or self.what, found, expected, remedy)
        if mistake not in self.mistakes:
            self.mistakes.append(mistake)

    def in_order(self) -> tuple[Mistake, ...]:
        """All mistakes in the order of the file."""
        return tuple(sorted(self.mistakes, key=lambda m: (m.line, m.column)))

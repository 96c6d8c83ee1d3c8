"""The words in which a user's mistake is told.

In: what was found, what was expected. Out: exceptions with place, value, expectation and remedy. Must not know: anything else.
An inner room raises `ExpressionError` or `ValueMistake` without knowing files; the study room adds file, line and key.
"""

from __future__ import annotations

import difflib
from collections.abc import Iterable
from dataclasses import dataclass

EXIT_DEFECT = 1
EXIT_USAGE = 2
EXIT_STUDY = 3
EXIT_WITHHELD = 4
EXIT_PRECISION = 5
EXIT_INTERRUPTED = 6
EXIT_STORAGE = 7
EXIT_SERVICE = 8


class UqError(Exception):
    """A mistake or a circumstance that the user can mend; its text is shown as it stands."""

    exit_code = EXIT_DEFECT


class ValueMistake(UqError):
    """A value that cannot stand: what was found, what was expected and, where there is one, the remedy."""

    exit_code = EXIT_STUDY

    def __init__(self, found: str, expected: str, remedy: str = "", key: str = "") -> None:
        super().__init__(f"found {found}, expected {expected}" + (f" ({remedy})" if remedy else ""))
        self.found, self.expected, self.remedy, self.key = found, expected, remedy, key


class UseMistake(ValueMistake):
    """An argument that cannot stand: as typed, or as handed to a function."""

    exit_code = EXIT_USAGE


class ExpressionError(ValueMistake):
    """A mistake within the text of an expression, with the offset and length of the place in characters."""

    def __init__(self, offset: int, length: int, found: str, expected: str, remedy: str = "") -> None:
        super().__init__(found, expected, remedy)
        self.offset, self.length = offset, length


@dataclass(frozen=True)
class Mistake:
    """One mistake in a study, with its place; `line` and `column` count from 1, 0 where there is none."""

    file: str
    line: int
    column: int
    key: str
    found: str
    expected: str
    remedy: str = ""

    def __str__(self) -> str:
        place = ":".join([self.file, *(str(n) for n in (self.line, self.column) if n)])
        text = f"{place}  {self.key}: found {self.found}; expected {self.expected}"
        return text + (f" ({self.remedy})" if self.remedy else "")


class StudyError(UqError):
    """Every mistake of a study at once."""

    exit_code = EXIT_STUDY

    def __init__(self, mistakes: Iterable[Mistake]) -> None:
        self.mistakes = tuple(mistakes)
        count = len(self.mistakes)
        head = "1 mistake" if count == 1 else f"{count} mistakes"
        super().__init__("\n".join([head + ":", *(f"  {m}" for m in self.mistakes)]))


class StorageError(UqError):
    """A file or folder that cannot be written or read."""

    exit_code = EXIT_STORAGE


class Interrupted(UqError):
    """The run was stopped by the user."""

    exit_code = EXIT_INTERRUPTED


class ClusterError(UqError):
    """A cluster that cannot be reached, or was lost on the way; what was done is kept, and the same command goes on from there."""

    exit_code = EXIT_INTERRUPTED


class NoClusterError(ClusterError):
    """A cluster that was not there when it was needed; what waits for it is kept as it is."""

    exit_code = EXIT_SERVICE


class FatalMemberError(UqError):
    """A member whose solving ends the process that does it, again and again: a defect of ours, or of the machine.

    block, member: where it stands in the design, in words.
    """

    exit_code = EXIT_DEFECT

    def __init__(self, text: str, block: str = "", member: str = "") -> None:
        super().__init__(text)
        self.block, self.member = block, member


def suggest(name: str, known: Iterable[str]) -> str:
    """The likely intention behind an unknown name as 'did you mean `x`?', or an empty text."""
    near = difflib.get_close_matches(name, list(known), n=1, cutoff=0.6)
    return f"did you mean `{near[0]}`?" if near else ""

"""From a batch file to the studies in it, each with its changes and when it shall run, or every mistake in all of them at once."""

from __future__ import annotations

import itertools
import math
import os
from collections.abc import Callable, Iterator, Mapping, Sequence
from dataclasses import dataclass
from datetime import datetime, time
from pathlib import Path as FilePath
from typing import Any, TypeVar

from uq.clock import EXAMPLES, When, Window, time_of_day, zone_of
from uq.errors import Mistake, StudyError, ValueMistake, suggest
from uq.study import values as read
from uq.study.columns import Files
from uq.study.fields import Sheet, entry, keys_of, read_part, read_table, refuse, unknown
from uq.study.locate import Path, locate
from uq.study.notes import KeyMistake, Notes, Refused
from uq.study.plan import Found
from uq.study.read import file_text, read_study
from uq.study.relay import relay
from uq.study.sheets import schema
from uq.study.study import Study
from uq.study.toml import read_toml
from uq.study.values import Frame
from uq.units import NONE

MOST_STUDIES = 10_000
RETRIES = 3
T = TypeVar("T")


def priority(value: object, frame: Frame) -> int:
    """A whole number, which may be negative."""
    plain = read.number(value)
    if plain != math.floor(plain) or abs(plain) > 10**9:
        raise ValueMistake(read.show(value), "a whole number between -1e9 and 1e9")
    return int(plain)


def when(value: object, frame: Frame) -> When:
    """A time of day or a date and time, as a text or as TOML writes them."""
    if isinstance(value, datetime):
        return When(value.replace(microsecond=0).isoformat(" "))
    if isinstance(value, time) and value.second == value.microsecond == 0:
        return When(value.isoformat("minutes"))
    if not isinstance(value, str):
        raise ValueMistake(read.show(value), EXAMPLES)
    return When(value)


def _checked(check: Callable[[str], object]) -> read.Reader:
    def text(value: object, frame: Frame) -> str:
        plain = read.text(value)
        check(plain)
        return plain

    return text


def choices(value: object, frame: Frame) -> Mapping[str, tuple[Any, ...]]:
    """`[run.change]`: every dotted key with the values that it shall have; a single one is a list of one."""
    if not isinstance(value, Mapping):
        raise ValueMistake(read.show(value), 'a table { "parameters.a" = [3, 4] }')
    wrong: list[tuple[Path, ValueMistake]] = []
    for key, given in value.items():
        if "." not in key:
            found = f"a change of `{key}`"
            wrong.append(((key,), KeyMistake(found, 'a dotted key in quotes, as in "parameters.a"', 'write "parameters.a" = [3, 4]')))
        elif given == []:
            wrong.append(((key,), ValueMistake("an empty list", "one value or more")))
    if wrong:
        raise Refused(wrong)
    return {key: tuple(given) if isinstance(given, list) else (given,) for key, given in value.items()}


@dataclass(frozen=True, kw_only=True)
class WindowTable:
    """`[window]`: runs start and go on only inside it; what is not finished by its end goes on when it opens again."""

    opens: str = entry('time of day at which it opens, "22:00"', _checked(time_of_day))
    closes: str = entry("time of day at which it closes, which may be past midnight", _checked(time_of_day))
    timezone: str = entry('the time zone of all times of the batch, "Europe/Athens"', _checked(zone_of), "", "that of the machine")

    def __post_init__(self) -> None:
        self.window()

    def window(self) -> Window:
        """The window itself."""
        return Window(self.opens, self.closes, self.timezone)


@dataclass(frozen=True, kw_only=True)
class RunTable:
    """`[[run]]`: one study, or with `change` one for every combination of the values in it."""

    study: str = entry("the study file, seen from the folder of the batch", read.text)
    priority: int = entry("larger first", priority, 0)
    not_before: When | None = entry('hold until then: "22:30", the next such time, or "2030-01-31 22:30"', when, None, "at once")  # noqa: RUF009
    deadline: When | None = entry("the answer so far is given then; as above, seen from when the run may start", when, None, "none")  # noqa: RUF009
    retries: int = entry("attempts that may come to grief without getting further, until it fails", read.whole(0), RETRIES)
    change: Mapping[str, tuple[Any, ...]] = entry('{ "parameters.a" = [3, 4], ... }: every combination', choices, None, "the study itself")

    def __post_init__(self) -> None:
        refuse(self.mistakes())

    def mistakes(self) -> Found:
        """What cannot stand in this table."""
        if self.not_before and self.deadline and self.not_before.dated and self.deadline.dated:
            first, last = (datetime.fromisoformat(each.text) for each in (self.not_before, self.deadline))
            if (first.tzinfo is None) == (last.tzinfo is None) and last <= first:
                yield ("deadline",), ValueMistake(f'"{self.deadline.text}"', f'a time after `not_before`, "{self.not_before.text}"')

    def combinations(self) -> Iterator[tuple[dict[str, Any], dict[str, int]]]:
        """Every combination of what is changed, with the place of each value in its list."""
        change = self.change or {}
        for picked in itertools.product(*(enumerate(values) for values in change.values())):
            yield (
                {key: value for key, (_, value) in zip(change, picked, strict=True)},
                {key: place for key, (place, _) in zip(change, picked, strict=True)},
            )


@dataclass(frozen=True, kw_only=True)
class BatchHead:
    """The keys at the top of a batch."""

    schema: int = entry("version of the format, 1", schema)
    title: str = entry("what the batch is called", read.text, "", "the name of the file")
    window: WindowTable | None = entry("table of the time of day in which runs may start", read_part(WindowTable), None, "any")  # noqa: RUF009


@dataclass(frozen=True, eq=False)
class Planned:
    """A study of a batch with what the batch changes in it, and when it shall run."""

    study: Study
    changed: Mapping[str, object]
    priority: int
    not_before: When | None
    deadline: When | None
    retries: int


@dataclass(frozen=True, eq=False)
class Batch:
    """A batch that has been checked in full with all its studies; `window` is None where they may run at any time."""

    name: str
    title: str
    window: Window | None
    planned: tuple[Planned, ...]


def is_batch(path: str | os.PathLike[str]) -> bool:
    """Whether a file is a batch rather than a study: it has a table [[run]]. False where it cannot be read."""
    try:
        text = FilePath(path).read_text(encoding="utf-8")
    except (OSError, UnicodeDecodeError):
        return False
    return ("run",) in locate(text.removeprefix("\ufeff").replace("\r\n", "\n")).keys


def read_batch(path: str | os.PathLike[str]) -> Batch:
    """The batch in a file with all its studies, checked in full; raises StudyError with every mistake in any of them."""
    place = FilePath(path)
    document, notes = read_toml(file_text(path, "batch"), str(path), "batch")
    if not document:
        if not notes.mistakes:
            notes.at_key((), "an empty file", "tables [[run]]")
        raise StudyError(notes.in_order())
    frame = Frame(NONE, NONE, True, Files(None))
    head = _head(document, frame, notes)
    runs = _runs(document, frame, notes)
    too_many = _too_many(runs, notes)
    broken: list[Mistake] = []
    planned: list[Planned] = []
    for index, sheet in enumerate(runs):
        study = _study(index, sheet.values.get("study"), place.parent, notes, broken)
        if study is not None and sheet.whole is not None and not too_many:
            planned += _planned(index, sheet.whole, study, notes)
    if notes.mistakes or broken or head is None:
        raise StudyError([*notes.in_order(), *dict.fromkeys(broken)])
    return Batch(place.stem, head.title or place.stem, head.window.window() if head.window else None, tuple(planned))


def _head(document: Mapping[str, Any], frame: Frame, notes: Notes) -> BatchHead | None:
    """The keys at the top, and the window."""
    known = keys_of(BatchHead)
    for key in document:
        if key not in (*known, "run"):
            notes.refused((key,), unknown(key, (*known, "run"), ()))
    return _noted(read_table(BatchHead, {key: document[key] for key in document if key in known}, frame), (), notes).whole


def _runs(document: Mapping[str, Any], frame: Frame, notes: Notes) -> list[Sheet[RunTable]]:
    """The runs as far as they can be read."""
    tables = document.get("run")
    if not isinstance(tables, list) or not tables:
        found = "no [[run]]" if tables is None else read.show(tables)
        notes.at_key(("run",), found, "one table [[run]] or more", "with two brackets on either side")
        return []
    return [_noted(read_table(RunTable, table, frame), ("run", index), notes) for index, table in enumerate(tables)]


def _noted(sheet: Sheet[T], path: Path, notes: Notes) -> Sheet[T]:
    for below, mistake in sheet.mistakes:
        notes.refused((*path, *below), mistake)
    return sheet


def _too_many(runs: Sequence[Sheet[RunTable]], notes: Notes) -> bool:
    """Whether there are more studies than a batch may have, which is noted at the largest run."""
    counts = [math.prod(len(values) for values in (sheet.values.get("change") or {}).values()) for sheet in runs]
    if sum(counts) <= MOST_STUDIES:
        return False
    found = f"{max(counts)} combinations" if sum(counts) == max(counts) else f"{max(counts)} combinations, of {sum(counts)} in all"
    notes.at_key(("run", counts.index(max(counts)), "change"), found, f"at most {MOST_STUDIES} studies in a batch")
    return True


def _study(index: int, name: str | None, folder: FilePath, notes: Notes, broken: list[Mistake]) -> Study | None:
    """The study of one run as it is; None where there is none. That it is no file is noted, its own mistakes go to `broken`."""
    if name is None:
        return None
    file = folder / name
    if not file.is_file():
        around = file.parent if file.parent.is_dir() else folder
        near = suggest(file.name, (each.name for each in around.glob("*.toml")))
        notes.at_value(("run", index, "study"), f'"{name}", which is no file', "a study file, seen from the folder of the batch", near)
        return None
    try:
        return read_study(file)
    except StudyError as error:
        broken += error.mistakes
        return None


def _planned(index: int, table: RunTable, study: Study, notes: Notes) -> Iterator[Planned]:
    """The studies of one run; mistakes that a change brings are noted at that change, and each once."""
    path: Path = ("run", index, "change")
    told: set[tuple[str, str, str]] = set()
    for changed, places in table.combinations():
        try:
            made = study.with_changes(changed) if changed else study
        except StudyError as error:
            news = [each for each in error.mistakes if (each.key, each.found, each.expected) not in told]
            told.update((each.key, each.found, each.expected) for each in news)
            relay(path, {key: _place(notes, (*path, key, place)) for key, place in places.items()}, news, notes)
            continue
        yield Planned(made, changed, table.priority, table.not_before, table.deadline, table.retries)


def _place(notes: Notes, path: Path) -> Path:
    """The path of a value in its list, or of the key itself where a single value stands there."""
    return path if path in notes.places.values else path[:-1]

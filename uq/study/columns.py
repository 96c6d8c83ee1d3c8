"""The data files that a study names: read once, kept as bytes, columns taken as numbers.

UTF-8, comma or semicolon separated (found, and said), decimal point, one header line, `#` comments; a gap is a mistake.
"""

from __future__ import annotations

import csv
import io
import math
import stat
from array import array
from collections.abc import Iterator, Mapping, Sequence
from dataclasses import dataclass, field
from pathlib import Path, PurePosixPath

import numpy as np
from numpy.typing import NDArray

from uq.errors import ValueMistake, suggest

LARGEST = 200 * 10**6
_MARKS = {",": "comma", ";": "semicolon"}


@dataclass(frozen=True, eq=False)
class Rows:
    """Columns of a file that were asked for: `values` [column, row], and the line of every row."""

    file: str
    values: NDArray[np.float64]
    lines: NDArray[np.int64]

    def place(self, row: int) -> str:
        """Where a row stands, in words."""
        return f"{self.file}, line {self.lines[row]}"


@dataclass
class Files:
    """The files of one study: those at hand by name, the others from its folder; `used` are the bytes of all that were asked for.

    said: how they were read, in words; told: of which columns that was said already, by file.
    """

    folder: Path | None
    at_hand: Mapping[str, bytes] = field(default_factory=dict)
    used: dict[str, bytes] = field(default_factory=dict)
    said: list[str] = field(default_factory=list)
    told: dict[str, list[set[str]]] = field(default_factory=dict)

    def bytes_of(self, name: str) -> bytes:
        """The content of a file in the study's folder or below."""
        pure = PurePosixPath(name)
        if not name or pure.is_absolute() or ".." in pure.parts or "\\" in name or "\0" in name:
            raise ValueMistake(f'"{name}"', "a file in the study's folder or below, with / between the parts")
        if name in self.used:
            return self.used[name]
        content = self.at_hand.get(name)
        if content is None:
            content = self._from_folder(name)
        self.used[name] = content
        return content

    def _from_folder(self, name: str) -> bytes:
        if self.folder is None:
            raise ValueMistake(f'"{name}"', "no file: this study was not read from a folder")
        place, most = self.folder / name, f"a file of at most {LARGEST // 10**6} MB"
        try:
            if place.is_dir():
                raise ValueMistake(f'"{name}", which is a folder', most)
            if not stat.S_ISREG(place.stat().st_mode):
                raise ValueMistake(f'"{name}", which is a device or a pipe, not a file', most)
            if place.stat().st_size > LARGEST:
                raise ValueMistake(f'"{name}", of {place.stat().st_size / 10**6:.0f} MB', most)
            with place.open("rb") as file:
                # Files of the system may say that they are empty and have no end.
                content = file.read(LARGEST + 1)
            if len(content) > LARGEST:
                raise ValueMistake(f'"{name}", of more than {LARGEST // 10**6} MB', most)
            return content
        except OSError as error:
            near = suggest(name, (p.name for p in self.folder.glob("*") if p.is_file()))
            raise ValueMistake(f'"{name}", which cannot be read ({error.strerror})', "a file in the study's folder", near) from None

    def column(self, name: str, column: str) -> NDArray[np.float64]:
        """The numbers of one column of a file."""
        self.place_of(name, column)
        values: NDArray[np.float64] = self.rows(name, (column,)).values[0]
        return values

    def place_of(self, name: str, column: str) -> int:
        """Which column of a file has this name; raises ValueMistake with the key `column` where none has."""
        header = _lines(name, self.bytes_of(name))[1]
        if header.count(column) != 1:
            if column in header:
                twice = f'the column "{column}" {header.count(column)} times in {name}'
                raise ValueMistake(twice, "columns of different names", "rename one of them in its header line", key="column")
            known = dict.fromkeys(header)
            raise ValueMistake(f'no column "{column}" in {name}', "one of " + ", ".join(known), suggest(column, known), key="column")
        return header.index(column)

    def rows(self, name: str, columns: Sequence[str]) -> Rows:
        """The numbers of some columns of a file."""
        places = [self.place_of(name, column) for column in columns]
        mark, header, lines = _lines(name, self.bytes_of(name))
        numbers, numbered = array("d"), array("q")
        for line, cells in lines:
            if any(cell.strip() for cell in cells[len(header) :]):
                remedy = "numbers have a decimal point" if mark == "," else ""
                raise ValueMistake(f"{len(cells)} cells in {name}, line {line}", f"{len(header)}, as in its header line", remedy)
            numbers.extend(_number(name, line, cells, place) for place in places)
            numbered.append(line)
        if not numbered:
            raise ValueMistake(f"{name} without numbers", "one number per line below the header line")
        self._say(name, columns, len(numbered), mark)
        return Rows(name, np.array(numbers).reshape(-1, len(places)).T.copy(), np.array(numbered))

    def _say(self, name: str, columns: Sequence[str], count: int, mark: str) -> None:
        if any(set(columns) <= others for others in self.told.get(name, ())):
            return
        self.told.setdefault(name, []).append(set(columns))
        named = " and ".join(f'"{column}"' for column in columns)
        what = f"numbers of column {named}" if len(columns) == 1 else f"rows of columns {named}"
        told = f"{name}: {count} {what}, {_MARKS[mark]} separated"
        if told not in self.said:
            self.said.append(told)


def _lines(name: str, content: bytes) -> tuple[str, list[str], Iterator[tuple[int, list[str]]]]:
    """Separator, header, and the cells of every line below with its number; comments and empty lines left out."""
    try:
        content.decode("utf-8-sig")
    except UnicodeDecodeError as error:
        raise ValueMistake(f"{name}, which is not UTF-8 (byte {error.start})", "a text file in UTF-8") from None
    text = io.TextIOWrapper(io.BytesIO(content), encoding="utf-8-sig")
    rows = ((i, row) for i, row in enumerate(text, 1) if row.strip() and not row.lstrip().startswith("#"))
    first = next(rows, None)
    if first is None:
        raise ValueMistake(f"{name} without a header line", "a header line and one number per line below it")
    mark = ";" if ";" in first[1] else ","
    return mark, [cell.strip() for cell in _split(name, mark, *first)], ((i, _split(name, mark, i, row)) for i, row in rows)


def _split(name: str, mark: str, line: int, row: str) -> list[str]:
    try:
        return next(csv.reader([row.rstrip("\n")], delimiter=mark, skipinitialspace=True))
    except csv.Error as error:
        raise ValueMistake(f"{name}, line {line}: {error}", "cells separated by one kind of mark") from None


def _number(name: str, line: int, cells: list[str], place: int) -> float:
    cell = cells[place].strip() if place < len(cells) else ""
    try:
        value = math.nan if "_" in cell else float(cell)
    except ValueError:
        value = math.nan
    if not math.isfinite(value):
        found = f'"{cell[:60]}"' if cell else "a gap"
        remedy = "numbers have a decimal point" if "," in cell else "" if cell else "gaps are not filled in"
        raise ValueMistake(f"{found} in {name}, line {line}", "a finite number", remedy)
    return value

"""The data files that a study names: read once, kept as bytes, a column taken as numbers.

UTF-8, comma or semicolon separated (found, and said), decimal point, one header line, `#` comments; a gap is a mistake.
"""

from __future__ import annotations

import csv
import math
from collections.abc import Iterator, Mapping
from dataclasses import dataclass, field
from pathlib import Path, PurePosixPath

from uq.errors import ValueMistake, suggest

LARGEST = 200 * 10**6


@dataclass
class Files:
    """The files of one study: those at hand by name, the others from its folder; `used` are the bytes of all that were asked for."""

    folder: Path | None
    at_hand: Mapping[str, bytes] = field(default_factory=dict)
    used: dict[str, bytes] = field(default_factory=dict)
    said: list[str] = field(default_factory=list)

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
        try:
            if (self.folder / name).stat().st_size > LARGEST:
                raise ValueMistake(f'"{name}", larger than {LARGEST // 10**6} MB', "a smaller file")
            return (self.folder / name).read_bytes()
        except OSError as error:
            near = suggest(name, (p.name for p in self.folder.glob("*") if p.is_file()))
            raise ValueMistake(f'"{name}", which cannot be read ({error.strerror})', "a file in the study's folder", near) from None

    def column(self, name: str, column: str) -> tuple[float, ...]:
        """The numbers of one column of a file."""
        mark, lines = _lines(name, self.bytes_of(name))
        if not lines:
            raise ValueMistake(f"{name} without a header line", "a header line and one number per line below it")
        header = [cell.strip() for cell in lines[0][1]]
        if header.count(column) != 1:
            found = f'no column "{column}"' if column not in header else f'the column "{column}" more than once'
            raise ValueMistake(f"{found} in {name}", "one of " + ", ".join(header), suggest(column, header), key="column")
        place = header.index(column)
        values = tuple(_number(name, line, cells, place) for line, cells in lines[1:])
        if not values:
            raise ValueMistake(f"{name} without numbers", "one number per line below the header line")
        word = "comma" if mark == "," else "semicolon"
        self.said.append(f'{name}: {len(values)} numbers of column "{column}", {word} separated')
        return values


def _lines(name: str, content: bytes) -> tuple[str, list[tuple[int, list[str]]]]:
    """Separator, and the cells of every line with its number; comments and empty lines left out."""
    try:
        text = content.decode("utf-8-sig")
    except UnicodeDecodeError as error:
        raise ValueMistake(f"{name}, which is not UTF-8 (byte {error.start})", "a text file in UTF-8") from None
    rows = [(i, row) for i, row in enumerate(text.splitlines(), 1) if row.strip() and not row.lstrip().startswith("#")]
    if not rows:
        return ",", []
    mark = ";" if ";" in rows[0][1] else ","
    return mark, list(_cells(name, mark, rows))


def _cells(name: str, mark: str, rows: list[tuple[int, str]]) -> Iterator[tuple[int, list[str]]]:
    for line, row in rows:
        try:
            yield line, next(csv.reader([row], delimiter=mark, skipinitialspace=True))
        except csv.Error as error:
            raise ValueMistake(f"{name}, line {line}: {error}", "cells separated by one kind of mark") from None


def _number(name: str, line: int, cells: list[str], place: int) -> float:
    cell = cells[place].strip() if place < len(cells) else ""
    try:
        value = float(cell)
    except ValueError:
        value = math.nan
    if not math.isfinite(value):
        found = f'"{cell}"' if cell else "a gap"
        remedy = "numbers have a decimal point" if "," in cell else "" if cell else "gaps are not filled in"
        raise ValueMistake(f"{found} in {name}, line {line}", "a finite number", remedy)
    return value

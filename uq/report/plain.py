"""Texts of the user made safe and fitting for a terminal: no sign in them acts, long ones wrap, wide tables fold."""

from __future__ import annotations

import re
import unicodedata
from collections.abc import Iterable, Sequence
from dataclasses import dataclass

WIDTH = 100
# No page is laid out narrower than this.
NARROWEST_PAGE = 60
# The first column of a table gives way down to this.
NARROWEST = 20
BETWEEN = " to "
# Where a line may break; a number keeps its per cent.
BLANK = re.compile(r"\s+(?!%)")
# Signs that turn the direction of reading: a label with one could make a line say something else than is written.
TURNING = frozenset("\u061c\u200e\u200f\u202a\u202b\u202c\u202d\u202e\u2066\u2067\u2068\u2069")


def plain(text: str) -> str:
    """A text on one line in which nothing acts on a terminal: white space becomes one blank, control signs are written out (\\x1b)."""
    line = " ".join(text.split())
    # Most texts have nothing to be shown, and a list of jobs has very many of them.
    return line if line.isascii() and line.isprintable() else "".join(_shown(sign) for sign in line)


def _shown(sign: str) -> str:
    if unicodedata.category(sign) in ("Cc", "Cs", "Zl", "Zp") or sign in TURNING or sign == "\ufeff":
        return f"\\x{ord(sign):02x}" if ord(sign) < 256 else f"\\u{ord(sign):04x}"
    return sign


def paragraphs(text: str) -> list[str]:
    """The paragraphs of a longer text, each on one line and plain; empty lines part them."""
    parts = text.replace("\r\n", "\n").split("\n\n")
    return [each for part in parts if (each := plain(part))]


def width(text: str) -> int:
    """Columns that a text takes on a terminal (Unicode's East Asian width; signs that sit on others take none)."""
    if text.isascii():
        return len(text)
    return sum(0 if unicodedata.combining(sign) else 2 if unicodedata.east_asian_width(sign) in "WF" else 1 for sign in text)


def wrapped(text: str, indent: str = "", further: str | None = None, columns: int = WIDTH) -> list[str]:
    """A line broken at blanks; `further` is what lines after the first begin with. A word that is too long is cut."""
    further = indent if further is None else further
    lines, line, empty = [], indent, True
    room = columns - max(width(indent), width(further))
    for word in (piece for long in BLANK.split(text.strip()) for piece in _pieces(long, room)):
        if not empty and width(line) + 1 + width(word) > columns:
            lines.append(line)
            line, empty = further, True
        line, empty = line + ("" if empty else " ") + word, False
    return [*lines, line] if not empty or not lines else lines


def _pieces(word: str, columns: int) -> Iterable[str]:
    piece = ""
    for sign in word:
        if piece and width(piece + sign) > columns:
            yield piece
            piece = ""
        piece += sign
    yield piece


def padded(text: str, columns: int, right: bool = False) -> str:
    """A text filled up with blanks, at its end, or at its front where it belongs to the right."""
    blanks = " " * max(0, columns - width(text))
    return blanks + text if right else text + blanks


@dataclass(frozen=True)
class Text:
    """A line that wraps; `further` is what lines after the first begin with, by default the same as `indent`."""

    text: str
    indent: str = ""
    further: str | None = None


@dataclass(frozen=True)
class Table:
    """Rows of cells; one of a single cell is a line across all columns. intervals: columns that hold the interval of the column before
    them, and that go below it where lines would be too long."""

    rows: Sequence[Sequence[str]]
    intervals: tuple[int, ...] = ()


# Part of a page; a plain text is a line that is left as it is.
Part = str | Text | Table


def laid(parts: Iterable[Part], columns: int = WIDTH) -> list[str]:
    """The lines of a page so many columns wide."""
    lines: list[str] = []
    for part in parts:
        if isinstance(part, Text):
            lines += wrapped(part.text, part.indent, part.further, columns)
        elif isinstance(part, Table):
            lines += table(_folded(part, columns), columns=columns)
        else:
            lines.append(part)
    return lines


def table(rows: Sequence[Sequence[str]], numbers: Iterable[int] = (), indent: str = "  ", columns: int = WIDTH) -> list[str]:
    """Rows in columns two blanks apart; `numbers` stand to the right. A row of one cell is a line across all columns.

    Where lines would be too long, the first column wraps. Blanks at the front of a first cell are kept, also in the lines it goes on with.
    """
    widths = _widths([row for row in rows if len(row) > 1], columns - width(indent))
    right = set(numbers)
    lines = []
    for row in rows:
        front = row[0][: len(row[0]) - len(row[0].lstrip())]
        if len(row) == 1:
            lines += wrapped(row[0], indent + front, indent + front + "  ", columns)
            continue
        first, *below = [row[0]] if width(row[0]) <= widths[0] else wrapped(row[0], front, front + "  ", widths[0])
        cells = [padded(cell, wide, place in right) for place, (cell, wide) in enumerate(zip((first, *row[1:]), widths, strict=True))]
        lines += [(indent + line).rstrip() for line in ("  ".join(cells), *below)]
    return lines


def _widths(rows: Sequence[Sequence[str]], columns: int) -> list[int]:
    """The width of every column; the first gives way, though not below a few signs."""
    if not rows:
        return []
    widths = [max(width(row[place]) for row in rows) for place in range(len(rows[0]))]
    widths[0] = max(min(widths[0], columns - sum(widths[1:]) - 2 * (len(widths) - 1)), min(widths[0], NARROWEST))
    return widths


def _folded(part: Table, columns: int) -> Sequence[Sequence[str]]:
    """Rows that fit: as they are, else with intervals below their numbers, else with first cells on lines of their own too, else with
    the ends of intervals in two lines."""
    rows: Sequence[Sequence[str]] = part.rows
    least = NARROWEST
    for fold in (_intervals_below, _first_apart, _ends_apart):
        if _needed(rows, least) <= columns:
            break
        rows = fold(rows, part.intervals)
        # A first cell that wraps would come between a number and its interval.
        least = columns
    return rows


def _needed(rows: Sequence[Sequence[str]], least: int) -> int:
    """The columns that rows need where the first cells wrap to no fewer than so many."""
    widths = [max(map(width, cells)) for cells in zip(*(row for row in rows if len(row) > 1), strict=True)]
    return sum([min(least, *widths[:1]), *widths[1:]]) + 2 * len(widths) if widths else 0


def _intervals_below(rows: Sequence[Sequence[str]], intervals: tuple[int, ...]) -> list[Sequence[str]]:
    """Every interval in a line of its own, below its number."""
    folded: list[Sequence[str]] = []
    for row in rows:
        kept = [place for place in range(len(row)) if len(row) == 1 or place not in intervals]
        folded.append([row[place] for place in kept])
        if len(row) > 1 and any(row[place] for place in intervals):
            folded.append(["", *(row[place + 1] if place + 1 in intervals else "" for place in kept[1:])])
    return folded


def _ends_apart(rows: Sequence[Sequence[str]], _: tuple[int, ...]) -> list[Sequence[str]]:
    """The two ends of every interval in two lines."""
    folded: list[Sequence[str]] = []
    for row in rows:
        pairs = [cell.partition(BETWEEN) for cell in row[1:]]
        if not any(between for _, between, _ in pairs):
            folded.append(row)
            continue
        folded.append([row[0], *(f"from {low}" if between else low for low, between, _ in pairs)])
        folded.append(["", *(f"to {high}" if between else "" for _, between, high in pairs)])
    return folded


def _first_apart(rows: Sequence[Sequence[str]], _: tuple[int, ...]) -> list[Sequence[str]]:
    """First cells in lines of their own, the others moved in below them."""
    folded: list[Sequence[str]] = []
    for row in rows:
        if len(row) == 1:
            folded.append(row)
            continue
        front = row[0][: len(row[0]) - len(row[0].lstrip())]
        folded += [[row[0]]] if row[0].strip() else []
        folded += [[f"{front}  ", *row[1:]]] if any(row[1:]) else []
    return folded

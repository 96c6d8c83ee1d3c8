"""Texts of the user made safe and fitting for a terminal: no sign in them acts, long ones wrap."""

from __future__ import annotations

import re
import unicodedata
from collections.abc import Iterable, Sequence

WIDTH = 100
NARROWEST = 16
# Where a line may break; a number keeps its per cent.
BLANK = re.compile(r"\s+(?!%)")
# Signs that turn the direction of reading: a label with one could make a line say something else than is written.
TURNING = frozenset("\u061c\u200e\u200f\u202a\u202b\u202c\u202d\u202e\u2066\u2067\u2068\u2069")


def plain(text: str) -> str:
    """A text on one line in which nothing acts on a terminal: white space becomes one blank, control signs are written out (\\x1b)."""
    return "".join(_shown(sign) for sign in " ".join(text.split()))


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

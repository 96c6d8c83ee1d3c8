"""Where every key and value of a TOML text stands.

In: a text. Out: lines and columns by key path. Must not know: what the keys mean.
`tomllib` says what a text holds but not where; this walk over the same grammar says where, and it does not check: that is
tomllib's part. On a text that is no TOML it stops where it is lost and keeps what it found until there.
"""

from __future__ import annotations

import re
from bisect import bisect_right
from contextlib import suppress
from dataclasses import dataclass, field

Path = tuple[str | int, ...]

_BLANK = re.compile(r"[ \t]*")
_SPACE = re.compile(r"(?:[ \t\n]|#[^\n]*)*")
_BARE = re.compile(r"[A-Za-z0-9_-]+")
_PLAIN = re.compile(r"[^,\]}#\n]*")
_STRING = re.compile(r'"""(?:\\.|[^\\])*?"{3,5}|"(?:\\.|[^"\\\n])*"|\'\'\'.*?\'{3,5}|\'[^\'\n]*\'', re.DOTALL)
_ESCAPE = re.compile(r"\\(?:u[0-9A-Fa-f]{4}|U[0-9A-Fa-f]{8}|[ \t]*\n[ \t\n]*|.)", re.DOTALL)
_DEEPEST = 60


@dataclass(frozen=True)
class Repeated:
    """A key or table given twice: its path, the offset of both keys, and the span to cut so that the first remains."""

    path: Path
    first: int
    second: int
    span: tuple[int, int]


@dataclass
class Places:
    """Offsets of the keys and values of one text by path; a path is a tuple of key names and indices of arrays."""

    text: str
    keys: dict[Path, int] = field(default_factory=dict)
    values: dict[Path, tuple[int, int]] = field(default_factory=dict)
    repeated: list[Repeated] = field(default_factory=list)
    unclosed: int | None = None

    def __post_init__(self) -> None:
        self._lines = [0, *(m.end() for m in re.finditer("\n", self.text))]

    def line_column(self, offset: int) -> tuple[int, int]:
        """Line and column of an offset, both from 1."""
        line = bisect_right(self._lines, offset)
        return line, offset - self._lines[line - 1] + 1

    def of_key(self, path: Path) -> tuple[int, int]:
        """Line and column of the key, or of the nearest table around it; (0, 0) where nothing is known of it."""
        for length in range(len(path), 0, -1):
            head = path[:length]
            if head in self.keys:
                return self.line_column(self.keys[head])
            if head in self.values:
                return self.line_column(self.values[head][0])
        return 0, 0

    def of_value(self, path: Path) -> tuple[int, int]:
        """Line and column of the value, or of the nearest thing around it."""
        if path in self.values:
            return self.line_column(self.values[path][0])
        return self.of_key(path)

    def inside(self, path: Path, offset: int) -> tuple[int, int]:
        """Line and column of the character `offset` of the text value at `path`, escapes and line breaks counted."""
        if path not in self.values:
            return self.of_key(path)
        start, stop = self.values[path]
        if self.text[start] not in "\"'":
            return self.line_column(start)
        characters = _characters(self.text, start, stop)
        return self.line_column(characters[min(max(offset, 0), len(characters) - 1)])


def _characters(text: str, start: int, stop: int) -> list[int]:
    """Offset in the file of every character of a TOML string's value, and of its closing quote."""
    quote = text[start]
    width = 3 if text.startswith(quote * 3, start) and stop - start >= 6 else 1
    at, end = start + width, stop - width
    if width == 3 and text.startswith("\n", at):
        at += 1
    found = []
    while at < end:
        escape = _ESCAPE.match(text, at) if quote == '"' else None
        if escape is None:
            found.append(at)
            at += 1
            continue
        if "\n" not in escape.group():
            found.append(at)
        at = escape.end()
    return [*found, end]


class _Lost(Exception):
    """The text is not TOML here."""


class _Walk:
    """One pass over a text; `at` is the place reached."""

    def __init__(self, text: str) -> None:
        self.text, self.at, self.depth = text, 0, 0
        self.places = Places(text)
        self.base: Path = ()
        self.arrays: dict[Path, int] = {}
        self.tables: dict[Path, int] = {}
        self.open: Repeated | None = None
        self.brackets: list[int] = []

    def run(self) -> None:
        while self.skip(_SPACE) < len(self.text):
            if self.text[self.at] == "[":
                self.header()
            else:
                self.pair(self.base, self.at)
        self.close()

    def skip(self, pattern: re.Pattern[str]) -> int:
        match = pattern.match(self.text, self.at)
        self.at = match.end() if match else self.at
        return self.at

    def expect(self, mark: str) -> None:
        if not self.text.startswith(mark, self.at):
            raise _Lost
        self.at += len(mark)

    def key(self) -> list[tuple[str, int]]:
        """A dotted key as (part, offset) each."""
        parts = []
        while True:
            self.skip(_BLANK)
            match = _BARE.match(self.text, self.at) or _STRING.match(self.text, self.at)
            if not match:
                raise _Lost
            parts.append((_plain_key(match.group()), self.at))
            self.at = match.end()
            self.skip(_BLANK)
            if not self.text.startswith(".", self.at):
                return parts
            self.at += 1

    def header(self) -> None:
        self.close()
        start = self.at
        double = self.text.startswith("[[", self.at)
        self.at += 2 if double else 1
        parts = self.key()
        self.expect("]]" if double else "]")
        path: Path = ()
        for name, offset in parts[:-1]:
            path = (*path, name)
            self.places.keys.setdefault(path, offset)
            if path in self.arrays:
                path = (*path, self.arrays[path] - 1)
        name, offset = parts[-1]
        path = (*path, name)
        if double:
            self.arrays[path] = self.arrays.get(path, 0) + 1
            self.places.keys.setdefault(path, offset)
            path = (*path, self.arrays[path] - 1)
        elif path in self.tables:
            self.open = Repeated(path, self.tables[path], offset, (start, start))
        else:
            self.tables[path] = offset
        self.base = path
        self.places.keys.setdefault(path, offset)

    def close(self) -> None:
        """The end of a table that was declared twice: all of it is to be cut."""
        if self.open is not None:
            start = self.open.span[0]
            self.places.repeated.append(Repeated(self.open.path, self.open.first, self.open.second, (start, self.at)))
            self.open = None

    def pair(self, base: Path, cut_from: int) -> None:
        """`key = value`; `cut_from` is where the cut begins should this key be there already."""
        path = base
        parts = self.key()
        for name, offset in parts:
            path = (*path, name)
            self.places.keys.setdefault(path, offset)
        self.expect("=")
        self.skip(_BLANK)
        known = path in self.places.values and self.open is None
        self.value(path)
        if known:
            self.places.repeated.append(Repeated(path, self.places.keys[path], parts[-1][1], (cut_from, self.at)))

    def value(self, path: Path) -> None:
        start = self.at
        self.depth += 1
        if self.depth > _DEEPEST:
            raise _Lost
        match = _STRING.match(self.text, self.at)
        if match:
            self.at = match.end()
        elif self.text.startswith(("[", "{"), self.at):
            self.brackets.append(start)
            (self.array if self.text[start] == "[" else self.inline)(path)
            self.brackets.pop()
        else:
            self.skip(_PLAIN)
        self.depth -= 1
        self.places.values[path] = (start, self.at)

    def array(self, path: Path) -> None:
        self.at += 1
        index = 0
        while True:
            self.skip(_SPACE)
            if self.text.startswith("]", self.at):
                self.at += 1
                return
            self.value((*path, index))
            index += 1
            self.skip(_SPACE)
            if not self.text.startswith("]", self.at):
                self.expect(",")

    def inline(self, path: Path) -> None:
        self.at += 1
        cut_from = self.at
        while True:
            self.skip(_SPACE)
            if self.text.startswith("}", self.at):
                self.at += 1
                return
            self.pair(path, cut_from)
            self.skip(_SPACE)
            cut_from = self.at
            if not self.text.startswith("}", self.at):
                self.expect(",")


def _plain_key(raw: str) -> str:
    """The name behind a bare or quoted key."""
    if raw[0] not in "\"'":
        return raw
    if raw[0] == "'" or "\\" not in raw:
        return raw[1:-1]
    return _ESCAPE.sub(lambda m: _unescape(m.group()), raw[1:-1])


def _unescape(escape: str) -> str:
    plain = {"b": "\b", "t": "\t", "n": "\n", "f": "\f", "r": "\r"}
    if escape[1] in "uU":
        return chr(min(int(escape[2:], 16), 0x10FFFF))
    return plain.get(escape[1], escape[1])


def locate(text: str) -> Places:
    """The places of all keys and values of a TOML text (line breaks as `\\n`)."""
    walk = _Walk(text)
    with suppress(_Lost):
        walk.run()
    walk.places.unclosed = walk.brackets[-1] if walk.brackets else None
    return walk.places

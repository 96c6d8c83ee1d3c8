"""From the text of a TOML file to a document with places; the one door to tomllib.

A key or table that stands twice is noted and the second cut out, so that all other mistakes can be told with it.
"""

from __future__ import annotations

import re
import tomllib
from dataclasses import replace
from functools import lru_cache
from typing import Any

from uq.study.locate import Repeated, locate
from uq.study.notes import Notes

_PLACE = re.compile(r"\s*\(at (?:line (\d+), column (\d+)|end of document)\)\s*$")
_HINTS = (
    ("Unclosed array", "a list ends with ]"),
    ("Unclosed inline table", "an inline table { ... } stands on one line and ends with }"),
    ("Expected newline or end of document", 'one key per line; a text or a quantity stands in quotes: "60 min"'),
    ("Invalid value", 'a text stands in quotes; a number has a decimal point and no unit, or is a text with its unit: "75 degC"'),
    ("Illegal character '\\n'", "a text ends on its line, with the quote it began with"),
    ("Expected '='", "a key and its value are joined by =; the decimal sign is a point"),
    ("Unescaped '\\'", "a backslash in a text is written \\\\"),
    ("Invalid initial character for a key part", "a key is a word"),
)


def read_toml(text: str, file: str, what: str = "study") -> tuple[dict[str, Any], Notes]:
    """The document, as far as it could be read, and the mistakes of its syntax; what: the file is. The document is not to be changed."""
    document, notes = _read(text, file, what)
    return document, replace(notes, mistakes=list(notes.mistakes))


# A batch reads one text once for each combination of its changes.
@lru_cache(maxsize=4)
def _read(text: str, file: str, what: str) -> tuple[dict[str, Any], Notes]:
    plain = text.removeprefix("\ufeff").replace("\r\n", "\n")
    places = locate(plain)
    notes = Notes(file, places, what=what)
    if places.repeated:
        cut = plain
        for repeated in places.repeated:
            _note_repeated(notes, repeated)
            start, stop = repeated.span
            cut = cut[:start] + "".join(c if c == "\n" else " " for c in cut[start:stop]) + cut[stop:]
        notes.places = locate(cut)
        plain = cut
    document = _loaded(plain, notes)
    return document, notes


def _note_repeated(notes: Notes, repeated: Repeated) -> None:
    places = notes.places
    line, column = places.line_column(repeated.first)
    what = f"`{repeated.path[-1]}` once more"
    notes.at_offset(repeated.path, repeated.second, what, "every key once", f"it stands already at {line}:{column}")


def _loaded(text: str, notes: Notes) -> dict[str, Any]:
    try:
        return tomllib.loads(text)
    except tomllib.TOMLDecodeError as error:
        message = str(error)
        match = _PLACE.search(message)
        line, column = (int(match.group(1)), int(match.group(2))) if match and match.group(1) else notes.places.line_column(len(text))
        said = _PLACE.sub("", message)
        if said.startswith("Unclosed") and notes.places.unclosed is not None:
            line, column = notes.places.line_column(notes.places.unclosed)
        remedy = next((hint for words, hint in _HINTS if said.startswith(words)), "")
        notes.at_line(line, column, f"what TOML does not allow: {said[:1].lower()}{said[1:]}", "a TOML file", remedy)
    except RecursionError:
        notes.at_line(0, 0, "lists or tables nested too deeply", "a plain study file")
    except ValueError as error:
        notes.at_line(0, 0, f"a value that cannot be read: {error}", "numbers and dates as TOML has them")
    return {}

"""A document as the text of a TOML file: what `read_toml` gives, written so that it reads back the same."""

from __future__ import annotations

import json
import re
from collections.abc import Iterator, Mapping
from datetime import date, datetime, time
from typing import Any

_PLAIN_KEY = re.compile(r"[A-Za-z0-9_-]+")


def toml_text(document: Mapping[str, Any]) -> str:
    """The text; tables stand under their headings, whatever lies within lists stands on one line."""
    return "\n".join(_table(document, ())) + "\n"


def _table(table: Mapping[str, Any], path: tuple[str, ...]) -> Iterator[str]:
    """First the keys with values, then the tables below."""
    plain = {key: value for key, value in table.items() if not _is_table(value)}
    if path and (plain or not table):
        yield f"\n[{'.'.join(map(_key, path))}]"
    for key, value in plain.items():
        yield f"{_key(key)} = {_value(value)}"
    for key, value in table.items():
        if _is_table(value):
            yield from _table(value, (*path, key))


def _is_table(value: object) -> bool:
    return isinstance(value, Mapping)


def _key(key: str) -> str:
    return key if _PLAIN_KEY.fullmatch(key) else _text(key)


def _text(text: str) -> str:
    # A text of JSON is one of TOML, but for the delete sign, which TOML wants escaped, and halves of a pair, which it does not allow.
    return json.dumps(text, ensure_ascii=False).replace("\x7f", "\\u007f")


def _value(value: object) -> str:
    if isinstance(value, bool):
        return str(value).lower()
    if isinstance(value, str):
        return _text(value)
    if isinstance(value, int | float):
        return repr(value)
    if isinstance(value, datetime | date | time):
        return value.isoformat()
    if isinstance(value, Mapping):
        return "{ " + ", ".join(f"{_key(key)} = {_value(each)}" for key, each in value.items()) + " }"
    if isinstance(value, list | tuple):
        return "[" + ", ".join(map(_value, value)) + "]"
    raise TypeError(f"{type(value).__name__} has no place in a TOML file")

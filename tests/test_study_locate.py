"""Lines and columns of keys and values, and of characters inside texts."""

from __future__ import annotations

import tomllib
from typing import Any

from hypothesis import given, settings
from hypothesis import strategies as st

from uq.study.locate import Path, locate

TEXT = '''schema = 1  # first
[states.T]
unit = "K"
start = { normal = { mean = 1, sd = "2 K" }, source = """a
b""" }
rate = "a\\t + \\u00e4b"
"quoted \\"key" . b.'c d' = [1, [2, "x#]"], { a = 1 , b = 2}]
[[events]]
at = [0,
  "8 h", # a comment, with ] and "
]
[[events]]
name = 'x'
[events.sub]
k=1
'''


def at(path: Path) -> tuple[int, int]:
    return locate(TEXT).of_value(path)


def test_values_in_tables_lists_and_inline_tables() -> None:
    assert at(("schema",)) == (1, 10)
    assert at(("states", "T", "unit")) == (3, 8)
    assert at(("states", "T", "start", "normal", "sd")) == (4, 37)
    assert at(("states", "T", "start", "source")) == (4, 55)
    assert at(("states", "T", 'quoted "key', "b", "c d", 1, 1)) == (7, 36)
    assert at(("states", "T", 'quoted "key', "b", "c d", 2, "b")) == (7, 58)
    assert at(("events", 0, "at", 1)) == (10, 3)
    assert at(("events", 1, "name")) == (13, 8)
    assert at(("events", 1, "sub", "k")) == (15, 3)


def test_keys_and_what_is_not_there() -> None:
    places = locate(TEXT)
    assert places.of_key(("states", "T", "start", "normal", "mean")) == (4, 22)
    assert places.of_key(("states", "T")) == (2, 9)
    assert places.of_key(("states", "T", "missing")) == (2, 9)
    assert places.of_key(("events", 1)) == (12, 3)
    assert places.of_key(("nothing",)) == (0, 0)


def test_characters_inside_a_text_count_escapes_and_line_breaks() -> None:
    places = locate('a = "x\\ty\\u00e4z"\nb = """\nfirst\n  second \\\n   third"""\nc = \'\'\'\none\'\'\'\nd = 3\n')
    assert [places.inside(("a",), i) for i in range(6)] == [(1, 6), (1, 7), (1, 9), (1, 10), (1, 16), (1, 17)]
    assert places.inside(("b",), 0) == (3, 1)
    assert places.inside(("b",), 8) == (4, 3)
    assert places.inside(("b",), 15) == (5, 4)
    assert places.inside(("c",), 1) == (7, 2)
    assert places.inside(("d",), 7) == (8, 5)


def test_what_stands_twice_is_found_with_both_places() -> None:
    text = "[a]\nx = 1\nx = 2\n[b]\ny = { p = 1, p = 2 }\n[a]\nz = 1\n[c]\n"
    repeated = locate(text).repeated
    assert [r.path for r in repeated] == [("a", "x"), ("b", "y", "p"), ("a",)]
    assert [text[slice(*r.span)] for r in repeated] == ["x = 2", ", p = 2 ", "[a]\nz = 1\n"]


def _paths(value: Any, path: Path = ()) -> list[Path]:
    inner: list[Path] = []
    if isinstance(value, dict):
        inner = [p for key, item in value.items() for p in _paths(item, (*path, key))]
    elif isinstance(value, list):
        inner = [p for index, item in enumerate(value) for p in _paths(item, (*path, index))]
    return [path, *inner] if path else inner


def test_every_path_of_a_document_has_a_place() -> None:
    places = locate(TEXT)
    for path in _paths(tomllib.loads(TEXT)):
        assert path in places.values or path in places.keys, path


@given(st.text(alphabet="ab.=[]{}\"',\\\n #1", max_size=60))
@settings(max_examples=300)
def test_no_text_makes_it_fail_and_what_tomllib_reads_it_places(text: str) -> None:
    places = locate(text)
    try:
        document = tomllib.loads(text)
    except tomllib.TOMLDecodeError:
        return
    for path in _paths(document):
        assert path in places.values or path in places.keys, path

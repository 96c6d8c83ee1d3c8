"""Texts of the user on a terminal: nothing in them acts, everything fits."""

from __future__ import annotations

import unicodedata

import pytest
from hypothesis import given
from hypothesis import strategies as st

from uq.report.plain import padded, paragraphs, plain, table, width, wrapped


@pytest.mark.parametrize(
    ("text", "shown"),
    [
        ("Tank temperature", "Tank temperature"),
        ("  two\n lines\t", "two lines"),
        ("\x1b[2J\x1b]0;title\x07", "\\x1b[2J\\x1b]0;title\\x07"),
        ("a\x00b\x7f\x9b31m", "a\\x00b\\x7f\\x9b31m"),
        ("limit\u202e derroc", "limit\\u202e derroc"),
        ("\ufeffΔT, °C, 温度", "\\ufeffΔT, °C, 温度"),
        ("x\u2028y\u0085z\rw", "x y z w"),
        ("family 👨\u200d👩", "family 👨\u200d👩"),
        ("", ""),
    ],
)
def test_nothing_acts(text: str, shown: str) -> None:
    assert plain(text) == shown


@given(st.text())
def test_no_control_sign_is_left(text: str) -> None:
    assert not [sign for sign in plain(text) if unicodedata.category(sign) in ("Cc", "Cs", "Zl", "Zp")]
    assert plain(plain(text)) == plain(text)


def test_paragraphs() -> None:
    assert paragraphs("one\ntwo\r\n\r\nthree\x1b") == ["one two", "three\\x1b"]
    assert paragraphs("") == []


@given(st.text(), st.integers(10, 60))
def test_wrapped_lines_fit_and_lose_nothing(text: str, columns: int) -> None:
    lines = wrapped(plain(text), "  ", "    ", columns)
    assert all(width(line) <= columns for line in lines)
    assert "".join("".join(lines).split()) == "".join(plain(text).split())


def test_widths() -> None:
    assert width("abc") == 3
    assert width("温度") == 4
    assert width("e\u0301") == 1
    assert padded("温度", 6) == "温度  "
    assert padded("7", 3, right=True) == "  7"


def test_a_table_stands_in_columns_and_its_first_wraps() -> None:
    rows = [("", "mean", "unit"), ("  a label that is far too long for the column", "1.5", "K"), ("a line across",), ("b", "22.5", "kJ")]
    assert table(rows, numbers=(1,), columns=40) == [
        "                              mean  unit",
        "    a label that is far too    1.5  K",
        "      long for the column",
        "  a line across",
        "  b                           22.5  kJ",
    ]
    assert table([]) == []

"""The brackets behind a name: which entry of what goes over an index is meant.

In: words of an expression from an opening bracket on. Out: places, or an ExpressionError. Must not know: which indices there are.

A place is a whole number, a label, an index, or an index plus or minus a whole number: `C[3]`, `C[cell-1]`, `contact[age, adult]`.
"""

from __future__ import annotations

from collections.abc import Sequence

from uq.errors import ExpressionError
from uq.lang.tokens import Token
from uq.lang.tree import Subscript

_PLACE = "an entry such as 3, an index such as cell, or cell-1"


def subscripts(words: Sequence[Token], first: int) -> tuple[tuple[Subscript, ...], int]:
    """The places in the brackets that open at the word `first`, and how many words these take with both brackets."""
    found: list[Subscript] = []
    place = first + 1
    while True:
        subscript, place = _one(words, place)
        found.append(subscript)
        closing = words[place]
        if closing.text == "]":
            return tuple(found), place + 1 - first
        if closing.text != ",":
            raise _mistake(closing, "`]` or a comma", "a place is a number, an index, or an index plus or minus a whole number")
        place += 1


def _one(words: Sequence[Token], place: int) -> tuple[Subscript, int]:
    """One place, and the word behind it."""
    word = words[place]
    if word.kind == "number":
        return Subscript("", _whole(word), word.start, word.stop), place + 1
    if word.kind != "name":
        remedy = "entries are counted from 0; a neighbour is cell-1, with the index in front" if word.text == "-" else ""
        raise _mistake(word, _PLACE, remedy)
    if words[place + 1].text not in ("+", "-"):
        return Subscript(word.text, 0, word.start, word.stop), place + 1
    number = words[place + 2]
    if number.kind != "number":
        raise _mistake(number, "a whole number", "a place is a number, an index, or an index plus or minus a whole number")
    shift = _whole(number) * (-1 if words[place + 1].text == "-" else 1)
    return Subscript(word.text, shift, word.start, number.stop), place + 3


def _whole(word: Token) -> int:
    if not word.text.isdigit() or len(word.text) > 9:
        raise _mistake(word, "a whole number", "entries are counted from 0")
    return int(word.text)


def _mistake(word: Token, expected: str, remedy: str = "") -> ExpressionError:
    found = "the end of the text" if word.kind == "end" else f"`{word.text}`"
    return ExpressionError(word.start, max(word.stop - word.start, 1), found, expected, remedy)

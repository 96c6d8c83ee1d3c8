"""The words of an expression with their places.

In: text. Out: tokens, or an ExpressionError. Must not know: grammar, units.
"""

from __future__ import annotations

import math
import re
from dataclasses import dataclass
from typing import Literal

from uq.errors import ExpressionError
from uq.units.letters import called, plain

MAX_LENGTH = 10_000

Kind = Literal["number", "name", "quantity", "operator", "end"]

_BLANK = " \t\r\n"
_NUMBER = re.compile(r"[0-9]+(?:_[0-9]+)*(?:\.[0-9]+(?:_[0-9]+)*)?(?:[eE][+-]?[0-9]+)?")
_LIKE_A_NUMBER = re.compile(r"[0-9_]*\.?[0-9_]*")
_NAME = re.compile(r"[A-Za-z][A-Za-z0-9_]*")
_OPERATOR = re.compile(r"\*\*|<=|>=|[-+*/<>(),\[\]]")
_QUANTITY = re.compile(r"\s*([+-]?)\s*(\S+)\s+(\S.*?)\s*", re.DOTALL)
_OPERATORS = "an operator of this language"
_WORDS = ("and", "or", "not")

#: what people write out of habit, longest first, with what to write here
_REFUSED = (
    ("===", "a computed number is hardly ever equal to another; compare with < or >"),
    ("!==", "a computed number is hardly ever equal to another; compare with < or >"),
    ("==", "a computed number is hardly ever equal to another; compare with < or >"),
    ("!=", "a computed number is hardly ever equal to another; compare with < or >"),
    ("<>", "a computed number is hardly ever equal to another; compare with < or >"),
    ("=<", "write <="),
    ("=>", "write >="),
    ("=", "an expression sets nothing; compare with < <= > >="),
    ("&&", "write and"),
    ("&", "write and"),
    ("||", "write or"),
    ("|", "write or, or abs( ) for the size"),
    ("!", "write not"),
    ("~", "write not"),
    ("^", "write **"),
    ("%", "write mod(a, b) for a remainder, x / 100 for per cent"),
    ("{", "write round brackets"),
    ("}", "write round brackets"),
    (";", "arguments are separated by a comma"),
    (":", "write where(condition, a, b) for a choice"),
    ("?", "write where(condition, a, b) for a choice"),
    ("_", "a name begins with a letter"),
    ("#", "an expression holds no comments; put it after the closing quote"),
    ("`", "a quantity stands in plain quotes: '273.15 K'"),
)


@dataclass(frozen=True, slots=True)
class Token:
    """One word at `start`; `value` is a number's or a quantity's, `unit` the text of a quantity's unit."""

    kind: Kind
    text: str
    start: int
    stop: int
    value: float = 0.0
    unit: str = ""


def tokens(text: str) -> tuple[Token, ...]:
    """All words of a text and an "end" behind them; raises ExpressionError at the first character that fits nothing."""
    if len(text) > MAX_LENGTH:
        found = f"an expression of {len(text)} characters"
        raise ExpressionError(MAX_LENGTH, len(text) - MAX_LENGTH, found, f"at most {MAX_LENGTH}", "split it into [terms]")
    words: list[Token] = []
    place = 0
    while place < len(text):
        if text[place] in _BLANK:
            place += 1
            continue
        token = _word(text, place)
        words.append(token)
        place = token.stop
    return (*words, Token("end", "", len(text), len(text)))


def _word(text: str, place: int) -> Token:
    character = text[place]
    if character in "'\"":
        return _quantity(text, place)
    if character in "0123456789.":
        return _number(text, place)
    name = _NAME.match(text, place)
    if name:
        return Token("operator" if name.group() in _WORDS else "name", name.group(), place, name.end())
    refused = next(((sign, remedy) for sign, remedy in _REFUSED if text.startswith(sign, place)), None)
    if refused:
        sign, remedy = refused
        raise ExpressionError(place, len(sign), f"`{sign}`", _OPERATORS, remedy)
    operator = _OPERATOR.match(text, place)
    if operator is None:
        remedy = "" if character.isascii() else plain(character)
        raise ExpressionError(place, 1, called(character), "a number, a name or an operator", remedy)
    return _joined_operator(text, Token("operator", operator.group(), place, operator.end()))


def _joined_operator(text: str, token: Token) -> Token:
    """Refuses what reads as two operators although it is meant as one."""
    if token.text == "/" and text.startswith("/", token.stop):
        raise ExpressionError(token.start, 2, "`//`", _OPERATORS, "write a / b; for whole parts, (a - mod(a, b)) / b")
    if text.startswith("=", token.stop) and token.text not in ("<=", ">="):
        raise ExpressionError(token.start, len(token.text) + 1, f"`{token.text}=`", _OPERATORS, "an expression sets nothing")
    return token


def _number(text: str, place: int) -> Token:
    match = _NUMBER.match(text, place)
    if match is None or text.startswith((".", "_"), match.end()):
        # `.5`, `1.`, `1__0`, `1.2.3`
        loose = _LIKE_A_NUMBER.match(text, place)
        stop = max(loose.end() if loose else place, place + 1)
        written = text[place:stop]
        raise ExpressionError(place, stop - place, f"`{written}`", "a number such as 0.5, 1e-3 or 10_000", _mended(written))
    value = float(match.group().replace("_", ""))
    nothing = value == 0.0 and bool(re.search(r"[1-9]", re.split("[eE]", match.group())[0]))
    if nothing or not math.isfinite(value):
        raise ExpressionError(place, match.end() - place, f"`{match.group()}`", "a number between 1e-307 and 1e308 in size")
    return Token("number", match.group(), place, match.end(), value)


def _mended(written: str) -> str:
    digits = written.replace("_", "")
    if digits.startswith(".") and digits[1:].isdigit():
        return f"write 0{digits}"
    if digits.endswith(".") and digits[:-1].isdigit():
        return f"write {digits}0"
    if written == ".":
        return "a name holds no point"
    return "underscores stand between digits only" if "_" in written else ""


def _quantity(text: str, place: int) -> Token:
    quote = text[place]
    stop = text.find(quote, place + 1)
    if stop < 0:
        raise ExpressionError(place, 1, f"an opening {quote} without its partner", f"a closing {quote} behind the unit", "as in '273.15 K'")
    inside = text[place + 1 : stop]
    match = _QUANTITY.fullmatch(inside)
    number = _NUMBER.fullmatch(match.group(2)) if match else None
    if match is None or number is None:
        remedy = "write the name without quotes" if _NAME.fullmatch(inside.strip()) else "as in '273.15 K'"
        raise ExpressionError(place, stop + 1 - place, f"{quote}{inside}{quote}", "a number, a blank and a unit in the quotes", remedy)
    value = float((match.group(1) + number.group()).replace("_", ""))
    if not math.isfinite(value):
        raise ExpressionError(place, stop + 1 - place, f"{quote}{inside}{quote}", "a finite number")
    return Token("quantity", text[place : stop + 1], place, stop + 1, value, match.group(3))

"""The tree of a parsed expression, with the place of every part in its text.

In: parts with offsets. Out: trees, their names, their text. Must not know: units, graphs, what a name stands for.

A flat sum of thousands of terms is a deep tree: everything here walks with its own stack, nothing recurses.
"""

from __future__ import annotations

from collections.abc import Callable, Iterator
from dataclasses import dataclass
from typing import TypeVar

T = TypeVar("T")

BINARY = ("or", "and", "<", "<=", ">", ">=", "+", "-", "*", "/", "**")
#: how tightly an operator binds, as in Python; `**` binds tighter than a minus before it, and from the right
BINDING: dict[str, int] = {
    "or": 1,
    "and": 2,
    "not": 3,
    "<": 4,
    "<=": 4,
    ">": 4,
    ">=": 4,
    "+": 5,
    "-": 5,
    "*": 6,
    "/": 6,
    "neg": 7,
    "**": 8,
}
_TIGHTEST = 9


@dataclass(frozen=True, slots=True)
class Subscript:
    """One place in the brackets behind a name: an index or a label (`name`) with what is added to it, or a plain place (no name)."""

    name: str
    shift: int
    start: int
    stop: int

    def written(self) -> str:
        """The place as it is written."""
        return f"{self.name}{self.shift:+d}" if self.name and self.shift else self.name or str(self.shift)


@dataclass(frozen=True, slots=True, eq=False, repr=False)
class Tree:
    """One part of an expression: `source[start:stop]` is its text.

    `op`: "number" (`value`), "quantity" (`value` and its unit's text in `name`), "name" (`name`), "entry" (`name[at, ...]`), "call"
    (function `name`, `args`), "neg", "not" or an operator of `BINARY`.
    """

    op: str
    source: str
    start: int
    stop: int
    args: tuple[Tree, ...] = ()
    name: str = ""
    value: float = 0.0
    at: tuple[Subscript, ...] = ()

    @property
    def text(self) -> str:
        """The part as the user wrote it, on one line; a long one is shortened in the middle."""
        text = " ".join(self.source[self.start : self.stop].split())
        return text if len(text) <= 60 else f"{text[:40]} ... {text[-15:]}"

    def __repr__(self) -> str:
        return f"Tree({self.op!r}, {self.text!r})"


def _never(part: Tree) -> bool:
    return False


def parts(tree: Tree, closed: Callable[[Tree], bool] = _never) -> Iterator[Tree]:
    """Every part of a tree, arguments before what is made of them, from left to right; nothing from within a part that is closed."""
    waiting: list[tuple[Tree, bool]] = [(tree, False)]
    while waiting:
        part, opened = waiting.pop()
        if opened or not part.args or closed(part):
            yield part
        else:
            waiting.append((part, True))
            waiting.extend((arg, False) for arg in reversed(part.args))


def fold(tree: Tree, step: Callable[[Tree, tuple[T, ...]], T], closed: Callable[[Tree], bool] = _never) -> T:
    """The value of a tree, where `step` makes a part's value from the values of its arguments; a closed part gets none of these."""
    values: list[T] = []
    for part in parts(tree, closed):
        first = len(values) - (0 if closed(part) else len(part.args))
        arguments = tuple(values[first:])
        del values[first:]
        values.append(step(part, arguments))
    return values[0]


def names(tree: Tree) -> tuple[tuple[str, int], ...]:
    """Every name that stands for a value, with its offset, in the order of the text; not functions, `pi` and what is in brackets."""
    return tuple((part.name, part.start) for part in parts(tree) if part.op in ("name", "entry") and part.name != "pi")


def to_text(tree: Tree) -> str:
    """The text of a tree with no more brackets than it needs; parsing it gives the same tree."""
    return fold(tree, _written)[0]


def same_tree(one: Tree, other: Tree) -> bool:
    """Whether two trees say the same, wherever and however they are written."""

    def told(tree: Tree) -> list[tuple[object, ...]]:
        return [(part.op, part.name, part.value.hex(), len(part.args), *(each.written() for each in part.at)) for part in parts(tree)]

    return told(one) == told(other)


def _written(part: Tree, args: tuple[tuple[str, int], ...]) -> tuple[str, int]:
    """A part's text and how tightly it binds."""
    if part.op == "name":
        return part.name, _TIGHTEST
    if part.op == "entry":
        return f"{part.name}[{', '.join(each.written() for each in part.at)}]", _TIGHTEST
    if part.op in ("number", "quantity"):
        number = repr(part.value).removesuffix(".0")
        return (number if part.op == "number" else f"'{number} {part.name}'"), _TIGHTEST
    if part.op == "call":
        return f"{part.name}({', '.join(text for text, _ in args)})", _TIGHTEST
    own = BINDING[part.op]
    if part.op in ("neg", "not"):
        return ("-" if part.op == "neg" else "not ") + _within(args[0], own), own
    # the left side of `**` and both sides of a comparison need brackets already when they bind alike; a power's right side may be a minus
    left = own + 1 if part.op == "**" or own == BINDING["<"] else own
    right = BINDING["neg"] if part.op == "**" else own + 1
    return f"{_within(args[0], left)} {part.op} {_within(args[1], right)}", own


def _within(written: tuple[str, int], least: int) -> str:
    text, binding = written
    return text if binding >= least else f"({text})"

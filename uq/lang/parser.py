"""From text to tree: a security border, where text of strangers is read and never evaluated.

In: text. Out: a tree, or an ExpressionError with offset, found, expected and remedy. Must not know: what names stand for.

Operator precedence with two stacks of its own instead of recursion, so that no text can exhaust Python's stack.
Python's keywords are plain names (`lambda` is the trade's commonest rate); the language's own words are and, or, not.
"""

from __future__ import annotations

from dataclasses import dataclass, replace

from uq.errors import ExpressionError
from uq.lang.subscripts import subscripts
from uq.lang.tokens import Token, tokens
from uq.lang.tree import BINARY, BINDING, Tree
from uq.lang.words import RESERVED

__all__ = ["MAX_DEPTH", "REFUSED_CALLS", "RESERVED", "parse"]

MAX_DEPTH = 100

#: functions that people call by a name which is not clear, or not ours
REFUSED_CALLS = {
    "log": "write ln for the natural logarithm, log10 for the decimal one",
    "log2": "write ln(x) / ln(2)",
    "pow": "write a ** b",
    "if": "write where(condition, a, b)",
    "arcsin": "write asin",
    "arccos": "write acos",
    "arctan": "write atan",
    "arctan2": "write atan2",
}

_OPERAND = "a number, a name, a quantity or `(`"
_BEHIND = "an operator or the end"
_COMPARISON = BINDING["<"]


def parse(text: str) -> Tree:
    """The tree of an expression; raises ExpressionError at the first mistake.

    At most 10 000 characters, and brackets, calls, prefixes and powers at most 100 deep; a flat sum may be as long as the text may.
    """
    return _Parser(text).run()


@dataclass(frozen=True, slots=True)
class _Pending:
    """An operator that waits for its right side, or an open bracket; `first` is its call's place among the operands."""

    op: str
    start: int
    binding: int = 0
    function: str = ""
    first: int = 0

    @property
    def nests(self) -> bool:
        """Whether it goes one deeper; a sum or product waits for one term only, however long it is."""
        return self.op in ("(", "neg", "not", "**")


class _Parser:
    def __init__(self, text: str) -> None:
        self.text = text
        self.words = tokens(text)
        self.operands: list[Tree] = []
        self.pending: list[_Pending] = []
        self.depth = 0

    def push(self, pending: _Pending) -> None:
        self.pending.append(pending)
        self.depth += pending.nests
        if self.depth > MAX_DEPTH:
            found = f"more than {MAX_DEPTH} brackets, signs or powers within each other"
            raise ExpressionError(pending.start, 1, found, f"at most {MAX_DEPTH}", "split it into [terms]")

    def pop(self) -> _Pending:
        self.depth -= self.pending[-1].nests
        return self.pending.pop()

    def run(self) -> Tree:
        if len(self.words) == 1:
            raise ExpressionError(0, max(len(self.text), 1), "nothing", "an expression")
        place, wants_operand = 0, True
        while True:
            word = self.words[place]
            if wants_operand:
                taken, wants_operand = self.operand(word, place)
                place += taken
            elif word.kind == "end":
                return self.finish()
            else:
                wants_operand = self.operator(word)
                place += 1

    def operand(self, word: Token, place: int) -> tuple[int, bool]:
        """Takes the word(s) at a place where a value must begin: how many, and whether a value must follow still."""
        after = self.words[min(place + 1, len(self.words) - 1)]
        if word.kind == "name" and after.text == "[":
            at, taken = subscripts(self.words, place + 1)
            stop = self.words[place + taken].stop
            self.operands.append(Tree("entry", self.text, word.start, stop, name=word.text, at=at))
            return 1 + taken, False
        if word.kind == "name" and after.text == "(":
            if word.text in REFUSED_CALLS:
                raise ExpressionError(word.start, len(word.text), f"`{word.text}`", "a function of this language", REFUSED_CALLS[word.text])
            self.push(_Pending("(", word.start, function=word.text, first=len(self.operands)))
            return 2, True
        if word.kind in ("number", "name", "quantity"):
            name = word.unit if word.kind == "quantity" else word.text if word.kind == "name" else ""
            self.operands.append(Tree(word.kind, self.text, word.start, word.stop, name=name, value=word.value))
            return 1, False
        if word.text == "(":
            self.push(_Pending("(", word.start, first=len(self.operands)))
        elif word.text in ("-", "not"):
            op = "neg" if word.text == "-" else "not"
            self.push(_Pending(op, word.start, BINDING[op]))
        else:
            raise self.no_operand(word)
        return 1, True

    def no_operand(self, word: Token) -> ExpressionError:
        last = self.pending[-1] if self.pending else None
        remedy = ""
        if word.text == "+":
            remedy = "leave the sign away"
        elif word.text == "[":
            remedy = "[ ] stand behind the name of what goes over an index, as in C[cell-1]"
        elif word.text == ")" and last is not None and last.op == "(":
            empty = self.text[last.start : word.start].rstrip().endswith("(")
            remedy = "there is nothing in the brackets" if empty else "leave the comma away"
        found = "the end of the text" if word.kind == "end" else f"`{word.text}`"
        return ExpressionError(word.start, max(len(word.text), 1), found, _OPERAND, remedy)

    def operator(self, word: Token) -> bool:
        """Takes the word at a place where a value has ended; returns whether a value must follow."""
        if word.text in BINARY:
            self.binary(word)
            return True
        if word.text == ")":
            self.close(word)
            return False
        if word.text == ",":
            self.reduce(0)
            if not self.pending or not self.pending[-1].function:
                remedy = "a decimal sign is a point; a comma separates arguments"
                raise ExpressionError(word.start, 1, "`,`", _BEHIND, remedy)
            return True
        raise self.no_operator(word)

    def no_operator(self, word: Token) -> ExpressionError:
        left = self.operands[-1]
        remedy = f"write {left.text} * {word.text}" if len(left.text) + len(word.text) < 40 else "write * for a product"
        if word.text == "(":
            remedy = "write * for a product"
        elif word.text in ("[", "]"):
            remedy = "[ ] stand behind the name of what goes over an index, as in C[cell-1]"
        elif word.text == "not":
            remedy = ""
        elif left.op == "number" and word.kind == "name":
            remedy += f", or '{left.text} {word.text}' in quotes for a quantity"
        elif word.kind == "quantity":
            remedy = "write * for a product; a quantity holds its number: '273.15 K'"
        elif word.text in ("if", "else", "is", "in"):
            remedy = "write where(condition, a, b) for a choice"
        return ExpressionError(word.start, len(word.text), f"`{word.text}` behind `{left.text}`", _BEHIND, remedy)

    def binary(self, word: Token) -> None:
        binding = BINDING[word.text]
        # what binds alike is taken from the left, powers from the right
        self.reduce(binding + 1 if word.text == "**" else binding, word)
        self.push(_Pending(word.text, word.start, binding))

    def reduce(self, least: int, word: Token | None = None) -> None:
        """Finishes every waiting operator that binds at least so tightly, down to the last open bracket."""
        while self.pending and self.pending[-1].op != "(" and self.pending[-1].binding >= least:
            done = self.pop()
            if done.binding == _COMPARISON == least and word is not None:
                found = f"a second comparison `{word.text}`"
                raise ExpressionError(word.start, len(word.text), found, "one comparison", "write a < b and b < c, with and between")
            count = 1 if done.op in ("neg", "not") else 2
            args = tuple(self.operands[-count:])
            del self.operands[-count:]
            start = done.start if count == 1 else args[0].start
            self.operands.append(Tree(done.op, self.text, start, args[-1].stop, args))

    def close(self, word: Token) -> None:
        self.reduce(0)
        if not self.pending:
            remedy = "a `(` is missing before, or this is one too many"
            raise ExpressionError(word.start, 1, "`)` without its partner", _BEHIND, remedy)
        opened = self.pop()
        args = tuple(self.operands[opened.first :])
        if opened.function:
            del self.operands[opened.first :]
            self.operands.append(Tree("call", self.text, opened.start, word.stop, args, name=opened.function))
        else:
            self.operands[-1] = replace(args[0], start=opened.start, stop=word.stop)

    def finish(self) -> Tree:
        self.reduce(0)
        if self.pending:
            opened = self.pending[-1]
            raise ExpressionError(opened.start, len(opened.function) + 1, f"`{opened.function}(` without its partner", "a closing `)`")
        return self.operands[0]

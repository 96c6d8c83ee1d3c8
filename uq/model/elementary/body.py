"""Writes the body of one vector function as LLVM text, from Python expressions on `Value`.

A `Value` is one line of static single assignment: eight doubles, eight 64-bit integers, or eight truth values. Plain numbers beside a
`Value` become constants in every lane. A line that was written before is not written twice. Needs the `splat` constants of LLVM 19.
"""

from __future__ import annotations

import struct
from collections.abc import Sequence
from dataclasses import dataclass, field

LANES = 8
DOUBLE, INTEGER, TRUTH = f"<{LANES} x double>", f"<{LANES} x i64>", f"<{LANES} x i1>"

# Intrinsics that become instructions (or short in-line sequences of them) on x86-64-v3, AVX-512 and aarch64.
INTRINSICS = {
    "llvm.fma.v8f64": (DOUBLE, (DOUBLE, DOUBLE, DOUBLE)),
    "llvm.fabs.v8f64": (DOUBLE, (DOUBLE,)),
    "llvm.copysign.v8f64": (DOUBLE, (DOUBLE, DOUBLE)),
    "llvm.floor.v8f64": (DOUBLE, (DOUBLE,)),
    "llvm.sqrt.v8f64": (DOUBLE, (DOUBLE,)),
}


def double_word(number: float) -> int:
    """The 64 bits of a double as an integer."""
    return int(struct.unpack("<Q", struct.pack("<d", number))[0])


@dataclass
class Body:
    """The lines of one function, and the intrinsics that they call."""

    lines: list[str] = field(default_factory=list)
    intrinsics: set[str] = field(default_factory=set)
    written: dict[str, Value] = field(default_factory=dict)

    def line(self, kind: str, text: str) -> Value:
        """The value of an instruction, written once."""
        if text not in self.written:
            name = f"%v{len(self.lines)}"
            self.lines.append(f"  {name} = {text}")
            self.written[text] = Value(self, kind, name)
        return self.written[text]

    def constant(self, kind: str, number: float) -> Value:
        """The same number in every lane; a double is written as its bits."""
        text = f"splat (double 0x{double_word(number):016X})" if kind == DOUBLE else f"splat (i64 {int(number)})"
        return Value(self, kind, text)

    def call(self, intrinsic: str, *arguments: Value) -> Value:
        """The value of an intrinsic of INTRINSICS."""
        result, kinds = INTRINSICS[intrinsic]
        self.intrinsics.add(intrinsic)
        listed = ", ".join(f"{kind} {argument.name}" for kind, argument in zip(kinds, arguments, strict=True))
        return self.line(result, f"call {result} @{intrinsic}({listed})")


@dataclass(frozen=True, eq=False)
class Value:
    """One named value of a body; operators write instructions (on doubles never with a fast-math flag)."""

    body: Body
    kind: str
    name: str

    def _with(self, other: Value | float) -> Value:
        return other if isinstance(other, Value) else self.body.constant(self.kind, other)

    def _binary(self, instruction: str, other: Value | float) -> Value:
        return self.body.line(self.kind, f"{instruction} {self.kind} {self.name}, {self._with(other).name}")

    def _arithmetic(self, name: str, other: Value | float) -> Value:
        return self._binary(f"f{name}" if self.kind == DOUBLE else name, other)

    def compare(self, condition: str, other: Value | float) -> Value:
        """Truth values of an ordered comparison of doubles: false where one is nan ("oeq", "olt", ..., "uno" for unordered)."""
        return self.body.line(TRUTH, f"fcmp {condition} {self.kind} {self.name}, {self._with(other).name}")

    def __add__(self, other: Value | float) -> Value:
        return self._arithmetic("add", other)

    def __radd__(self, other: float) -> Value:
        return self._with(other)._arithmetic("add", self)

    def __sub__(self, other: Value | float) -> Value:
        return self._arithmetic("sub", other)

    def __rsub__(self, other: float) -> Value:
        return self._with(other)._arithmetic("sub", self)

    def __mul__(self, other: Value | float) -> Value:
        return self._binary("fmul", other)

    def __rmul__(self, other: float) -> Value:
        return self._with(other)._binary("fmul", self)

    def __truediv__(self, other: Value | float) -> Value:
        return self._binary("fdiv", other)

    def __rtruediv__(self, other: float) -> Value:
        return self._with(other)._binary("fdiv", self)

    def __neg__(self) -> Value:
        return self.body.line(self.kind, f"fneg {self.kind} {self.name}")

    def __lt__(self, other: Value | float) -> Value:
        return self.compare("olt", other)

    def __le__(self, other: Value | float) -> Value:
        return self.compare("ole", other)

    def __gt__(self, other: Value | float) -> Value:
        return self.compare("ogt", other)

    def __ge__(self, other: Value | float) -> Value:
        return self.compare("oge", other)

    def __and__(self, other: Value | int) -> Value:
        return self._binary("and", other)

    def __or__(self, other: Value | int) -> Value:
        return self._binary("or", other)

    def __xor__(self, other: Value | int) -> Value:
        return self._binary("xor", other)

    def __invert__(self) -> Value:
        return self.body.line(self.kind, f"xor {self.kind} {self.name}, splat (i1 true)")

    def __lshift__(self, count: int) -> Value:
        return self._binary("shl", count)

    def __rshift__(self, count: int) -> Value:
        return self._binary("lshr", count)


def equal(a: Value, b: Value | float) -> Value:
    """Truth of a == b; false where one is nan, true for 0 and -0."""
    return a.compare("oeq", b)


def is_nan(a: Value) -> Value:
    """Truth of "a is not a number"."""
    return is_unordered(a, a)


def is_unordered(a: Value, b: Value) -> Value:
    """Truth of "a or b is not a number"."""
    return a.compare("uno", b)


def is_negative(a: Value) -> Value:
    """The sign bit as a truth value: true for -0."""
    return a.body.line(TRUTH, f"icmp slt {INTEGER} {bits(a).name}, zeroinitializer")


def is_truth(word: Value, bit: int) -> Value:
    """One bit of an integer as a truth value."""
    return word.body.line(TRUTH, f"icmp ne {INTEGER} {(word & (1 << bit)).name}, zeroinitializer")


def where(condition: Value, yes: Value | float, no: Value | float) -> Value:
    """Lane by lane `yes` where the condition holds, else `no`; plain numbers become doubles beside a plain number."""
    body = condition.body
    kind = next((v.kind for v in (yes, no) if isinstance(v, Value)), DOUBLE)
    first, second = (v if isinstance(v, Value) else body.constant(kind, v) for v in (yes, no))
    return body.line(kind, f"select {TRUTH} {condition.name}, {kind} {first.name}, {kind} {second.name}")


def fma(a: Value | float, b: Value | float, c: Value | float) -> Value:
    """a * b + c, rounded once."""
    body = next(v.body for v in (a, b, c) if isinstance(v, Value))
    return body.call("llvm.fma.v8f64", *(v if isinstance(v, Value) else body.constant(DOUBLE, v) for v in (a, b, c)))


def magnitude(a: Value) -> Value:
    """|a|, also of nan and -0."""
    return a.body.call("llvm.fabs.v8f64", a)


def with_sign(a: Value | float, sign: Value) -> Value:
    """|a| with the sign bit of `sign`."""
    return sign.body.call("llvm.copysign.v8f64", a if isinstance(a, Value) else sign.body.constant(DOUBLE, a), sign)


def floor(a: Value) -> Value:
    """The greatest whole number that is not above a."""
    return a.body.call("llvm.floor.v8f64", a)


def square_root(a: Value) -> Value:
    """The square root, correctly rounded."""
    return a.body.call("llvm.sqrt.v8f64", a)


def bits(a: Value) -> Value:
    """The doubles as integers, bit by bit."""
    return a.body.line(INTEGER, f"bitcast {DOUBLE} {a.name} to {INTEGER}")


def from_bits(a: Value) -> Value:
    """Integers as the doubles with these bits."""
    return a.body.line(DOUBLE, f"bitcast {INTEGER} {a.name} to {DOUBLE}")


def at_most(a: Value, limit: Value | float) -> Value:
    """The smaller of a and a limit that is not nan; nan where a is nan (one instruction on x86-64)."""
    return where(a._with(limit) < a, limit, a)


def at_least(a: Value, limit: Value | float) -> Value:
    """The greater of a and a limit that is not nan; nan where a is nan (one instruction on x86-64)."""
    return where(a._with(limit) > a, limit, a)


def estrin(x: Value, coefficients: Sequence[float]) -> Value:
    """Value of the polynomial, lowest power first, by pairs (G. Estrin 1960).

    A few multiplications more than by a chain, but the shortest wait: the stages of a step wait for each other.
    """
    terms: list[Value | float] = list(coefficients)
    while len(terms) > 1:
        pairs = [fma(high, x, low) for low, high in zip(terms[::2], terms[1::2], strict=False)]
        terms = [*pairs, *terms[len(terms) - len(terms) % 2 :]]
        x = x * x if len(terms) > 1 else x
    assert isinstance(terms[0], Value)
    return terms[0]


def divided(above: Value, above_rest: Value, below: Value, below_rest: Value) -> Value:
    """(above + above_rest) / (below + below_rest), nearly rounded once."""
    a = above + above_rest
    a_rest = (above - a) + above_rest
    b = below + below_rest
    b_rest = (below - b) + below_rest
    inverse = 1.0 / b
    first = a * inverse
    return fma(fma(-first, b, a) + fma(-first, b_rest, a_rest), inverse, first)

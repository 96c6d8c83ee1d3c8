"""Writes one function of LLVM text, value by value.

In: operations on names of values. Out: lines of text in static single assignment form. Must not know: what the values mean.
No fast-math flag is ever written; sums of products are explicit fma, so the bits are the same on every processor that has it.
"""

from __future__ import annotations

import struct
from collections.abc import Callable

V = "<8 x double>"
I = "<8 x i64>"  # noqa: E741
M = "<8 x i1>"
INTRINSICS = {
    "fma": f"declare {V} @llvm.fma.v8f64({V}, {V}, {V})",
    "fabs": f"declare {V} @llvm.fabs.v8f64({V})",
    "sqrt": f"declare {V} @llvm.sqrt.v8f64({V})",
}


def constant(value: float) -> str:
    """A number in all lanes, bit by bit."""
    return f"splat (double 0x{struct.unpack('>Q', struct.pack('>d', value))[0]:016X})"


ZERO, ONE = constant(0.0), constant(1.0)


class Writer:
    """The body of one function in the making. Values are texts: `%v7` or a constant."""

    def __init__(self) -> None:
        self.lines: list[str] = []
        self.called: set[str] = set()
        self._count = 0
        self.block = "entry"
        self._loaded: dict[tuple[str, int], str] = {}
        self._outside: dict[tuple[str, int], str] = {}

    def add(self, text: str) -> str:
        """Append an instruction that makes a value; returns its name."""
        self._count += 1
        name = f"%v{self._count}"
        self.lines.append(f"  {name} = {text}")
        return name

    def say(self, text: str) -> None:
        """Append a comment."""
        self.lines.append(f"  ; {text}")

    def plain(self, text: str) -> None:
        """Append an instruction that makes no value, or a label."""
        label = text.endswith(":")
        self.lines.append(text if label else f"  {text}")
        if label:
            self.block = text[:-1]

    def load(self, pointer: str, slot: int) -> str:
        """The value in a slot as it was when the function began; loaded once."""
        key = (pointer, slot)
        if key not in self._loaded:
            place = self.add(f"getelementptr inbounds {V}, ptr {pointer}, i64 {slot}")
            self._loaded[key] = self.add(f"load {V}, ptr {place}, align 64")
        return self._loaded[key]

    def load_words(self, pointer: str, slot: int) -> str:
        """A slot of 64-bit integers."""
        place = self.add(f"getelementptr inbounds {I}, ptr {pointer}, i64 {slot}")
        return self.add(f"load {I}, ptr {place}, align 64")

    def store_words(self, pointer: str, slot: int, value: str) -> None:
        """Put 64-bit integers into a slot."""
        place = self.add(f"getelementptr inbounds {I}, ptr {pointer}, i64 {slot}")
        self.plain(f"store {I} {value}, ptr {place}, align 64")

    def add_words(self, a: str, b: str) -> str:
        """a + b of integers."""
        return self.add(f"add {I} {a}, {b}")

    def select_words(self, truth: str, a: str, b: str) -> str:
        """The integers a where it is true, else b."""
        return self.add(f"select {M} {truth}, {I} {a}, {I} {b}")

    def pointers(self, addresses: str) -> list[str]:
        """The eight addresses one by one."""
        words = [self.add(f"extractelement {I} {addresses}, i64 {lane}") for lane in range(8)]
        return [self.add(f"inttoptr i64 {word} to ptr") for word in words]

    def scatter(self, addresses: str, value: str) -> None:
        """Put the eight numbers to eight addresses."""
        for lane, pointer in enumerate(self.pointers(addresses)):
            one = self.add(f"extractelement {V} {value}, i64 {lane}")
            self.plain(f"store double {one}, ptr {pointer}, align 8")

    def scatter_truth(self, addresses: str, truth: str, unknown: str | None) -> None:
        """Put the eight truths to eight addresses, as bytes: 1 true, 0 false, 2 unknown."""
        bytes_ = self.add(f"zext {M} {truth} to <8 x i8>")
        if unknown is not None:
            bytes_ = self.add(f"select {M} {unknown}, <8 x i8> splat (i8 2), <8 x i8> {bytes_}")
        for lane, pointer in enumerate(self.pointers(addresses)):
            one = self.add(f"extractelement <8 x i8> {bytes_}, i64 {lane}")
            self.plain(f"store i8 {one}, ptr {pointer}, align 1")

    def gather(self, addresses: str) -> str:
        """The eight numbers at eight addresses."""
        value = "poison"
        for lane, pointer in enumerate(self.pointers(addresses)):
            one = self.add(f"load double, ptr {pointer}, align 8")
            value = self.add(f"insertelement {V} {value}, double {one}, i64 {lane}")
        return value

    def remember(self, pointer: str, slot: int, value: str) -> None:
        """Let later loads of a slot give a value that was just put there."""
        self._loaded[pointer, slot] = value

    def store(self, pointer: str, slot: int, value: str) -> None:
        """Put a value into a slot."""
        place = self.add(f"getelementptr inbounds {V}, ptr {pointer}, i64 {slot}")
        self.plain(f"store {V} {value}, ptr {place}, align 64")

    def binary(self, op: str, a: str, b: str) -> str:
        """fadd, fsub, fmul, fdiv."""
        return self.add(f"{op} {V} {a}, {b}")

    def plus(self, a: str, b: str) -> str:
        """a + b."""
        return self.binary("fadd", a, b)

    def minus(self, a: str, b: str) -> str:
        """a - b."""
        return self.binary("fsub", a, b)

    def times(self, a: str, b: str) -> str:
        """a * b."""
        return self.binary("fmul", a, b)

    def over(self, a: str, b: str) -> str:
        """a / b."""
        return self.binary("fdiv", a, b)

    def negative(self, a: str) -> str:
        """-a."""
        return self.add(f"fneg {V} {a}")

    def call(self, function: str, *args: str) -> str:
        """A vector function of vectors, by its name in the text without the leading @."""
        self.called.add(function)
        return self.add(f"call {V} @{function}({', '.join(f'{V} {a}' for a in args)})")

    def fma(self, a: str, b: str, c: str) -> str:
        """a * b + c, rounded once."""
        return self.call("llvm.fma.v8f64", a, b, c)

    def size(self, a: str) -> str:
        """|a|."""
        return self.call("llvm.fabs.v8f64", a)

    def root(self, a: str) -> str:
        """Square root, correctly rounded."""
        return self.call("llvm.sqrt.v8f64", a)

    def compare(self, how: str, a: str, b: str) -> str:
        """A truth per lane; `how` is olt, ole, ogt, oge, uno, ..."""
        return self.add(f"fcmp {how} {V} {a}, {b}")

    def logic(self, op: str, a: str, b: str) -> str:
        """and, or, xor of truths."""
        return self.add(f"{op} {M} {a}, {b}")

    def both(self, a: str, b: str) -> str:
        """a and b."""
        return self.logic("and", a, b)

    def either(self, a: str, b: str) -> str:
        """a or b."""
        return self.logic("or", a, b)

    def opposite(self, a: str) -> str:
        """not a."""
        return self.logic("xor", a, "splat (i1 true)")

    def select(self, truth: str, a: str, b: str) -> str:
        """a where it is true, else b."""
        return self.add(f"select {M} {truth}, {V} {a}, {V} {b}")

    def select_truth(self, truth: str, a: str, b: str) -> str:
        """The truth a where it is true, else the truth b."""
        return self.add(f"select {M} {truth}, {M} {a}, {M} {b}")

    def larger(self, a: str, b: str) -> str:
        """The larger one; b where either is not a number."""
        return self.select(self.compare("ogt", a, b), a, b)

    def smaller(self, a: str, b: str) -> str:
        """The smaller one; b where either is not a number."""
        return self.select(self.compare("olt", a, b), a, b)

    def set_if(self, pointer: str, slot: int, truth: str, value: str) -> None:
        """Put a value into a slot in the lanes where `truth` holds."""
        self.store(pointer, slot, self.select(truth, value, self.load(pointer, slot)))

    def mask(self, truth: str) -> str:
        """The eight truths as an i64, lane 0 in the lowest bit."""
        byte = self.add(f"bitcast {M} {truth} to i8")
        return self.add(f"zext i8 {byte} to i64")

    def lanes_of(self, mask: str) -> str:
        """The truths of an i64 as `mask` makes it."""
        byte = self.add(f"trunc i64 {mask} to i8")
        return self.add(f"bitcast i8 {byte} to {M}")

    def any(self, truth: str) -> str:
        """Whether it holds in any lane, as an i1."""
        byte = self.add(f"bitcast {M} {truth} to i8")
        return self.add(f"icmp ne i8 {byte}, 0")

    def loop(self, count: int, body: Callable[[str], None]) -> None:
        """Repeat `body` with the index from 0 to count - 1 (at least once)."""

        def once(index: str, carried: str) -> str:
            body(index)
            return carried

        self.loop_carrying(count, "i1", "false", once)

    def loop_carrying(self, count: int, kind: str, start: str, body: Callable[[str, str], str]) -> str:
        """Repeat `body` with the index from 0 to count - 1 (at least once) and a value from one turn to the next; returns the last value.

        The body must be one block, and what it makes may be used afterwards.
        """
        self._count += 1
        name, before = f"loop{self._count}", self.block
        self.plain(f"br label %{name}")
        self.plain(f"{name}:")
        self.plain(f"%{name}.i = phi i64 [ 0, %{before} ], [ %{name}.next, %{name} ]")
        place = len(self.lines)
        value = body(f"%{name}.i", f"%{name}.carried")
        self.lines.insert(place, f"  %{name}.carried = phi {kind} [ {start}, %{before} ], [ {value}, %{name} ]")
        self.plain(f"%{name}.next = add nuw nsw i64 %{name}.i, 1")
        more = self.add(f"icmp ult i64 %{name}.next, {count}")
        self.plain(f"br i1 {more}, label %{name}, label %{name}.end")
        self.plain(f"{name}.end:")
        return value

    def span(self, first: str, stop: str, start: str, body: Callable[[str, str], str]) -> str:
        """Repeat `body` with the index from `first` to `stop` - 1 (maybe never) and numbers carried along; spans may lie within spans."""
        self._count += 1
        name, before, outside = f"span{self._count}", self.block, dict(self._loaded)
        some = self.add(f"icmp slt i64 {first}, {stop}")
        self.plain(f"br i1 {some}, label %{name}, label %{name}.end")
        self.plain(f"{name}:")
        place = len(self.lines)
        value = body(f"%{name}.i", f"%{name}.carried")
        end = self.block
        phis = [
            f"  %{name}.i = phi i64 [ {first}, %{before} ], [ %{name}.next, %{end} ]",
            f"  %{name}.carried = phi {V} [ {start}, %{before} ], [ {value}, %{end} ]",
        ]
        self.lines[place:place] = phis
        self.plain(f"%{name}.next = add nsw i64 %{name}.i, 1")
        more = self.add(f"icmp slt i64 %{name}.next, {stop}")
        self.plain(f"br i1 {more}, label %{name}, label %{name}.end")
        self.plain(f"{name}.end:")
        self._loaded = outside
        return self.add(f"phi {V} [ {start}, %{before} ], [ {value}, %{end} ]")

    def whole(self, table: str, index: str) -> str:
        """The entry of a constant table of 64-bit integers."""
        place = self.add(f"getelementptr inbounds i64, ptr @{table}, i64 {index}")
        return self.add(f"load i64, ptr {place}, align 8")

    def branch(self, condition: str, then: str, after: str) -> None:
        """Go to label `then` if the i1 holds, else to `after`; the block `then` begins."""
        self._outside = dict(self._loaded)
        self.plain(f"br i1 {condition}, label %{then}, label %{after}")
        self.plain(f"{then}:")

    def join(self, label: str) -> None:
        """End a block that was branched to: go on at `label`. Values made within it must not be used beyond it."""
        self.plain(f"br label %{label}")
        self.plain(f"{label}:")
        self._loaded = self._outside

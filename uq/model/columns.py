"""How a written function goes over the states: instruction by instruction, or in a loop.

Written out, every state has its own instructions and values stay in registers. Looped, values lie in memory and each part of a step is a
short loop; the rates are a function of their own, written once. Both do the same operations in the same order, so the bits are the same.
"""

from __future__ import annotations

from collections.abc import Callable
from typing import Protocol

from uq.model.pair import Pair
from uq.model.writer import V, Writer

Index = int | str
Rates = Callable[[Callable[[], str], Callable[[int], str]], list[str]]


class Readable(Protocol):
    """One value per state, to read."""

    def get(self, i: Index) -> str:
        """The value of state i."""


class Column(Readable, Protocol):
    """One value per state."""

    def put(self, i: Index, value: str) -> None:
        """Set the value of state i."""


class Values:
    """A column in registers."""

    def __init__(self, values: dict[Index, str] | None = None) -> None:
        self._values = values or {}

    def get(self, i: Index) -> str:
        """The value of state i."""
        return self._values[i]

    def put(self, i: Index, value: str) -> None:
        """Set the value of state i."""
        self._values[i] = value


class Slots:
    """A column in slots of a group, each read and written by its own instructions; reading gives what was there when the function began."""

    def __init__(self, w: Writer, pointer: str, first: int) -> None:
        self._w, self._pointer, self._first = w, pointer, first

    def get(self, i: Index) -> str:
        """The value of state i."""
        return self._w.load(self._pointer, self._first + int(i))

    def put(self, i: Index, value: str) -> None:
        """Set the value of state i."""
        self._w.store(self._pointer, self._first + int(i), value)


class Memory:
    """A column in slots of a group, as it is at the moment of reading."""

    def __init__(self, w: Writer, pointer: str, first: int) -> None:
        self._w, self._pointer, self._first = w, pointer, first

    def get(self, i: Index) -> str:
        """The value of state i."""
        return self._w.add(f"load {V}, ptr {self.address(i)}, align 64")

    def put(self, i: Index, value: str) -> None:
        """Set the value of state i."""
        place = self.address(i)
        self._w.plain(f"store {V} {value}, ptr {place}, align 64")

    def address(self, i: Index = 0) -> str:
        """Where the value of state i lies."""
        slot = str(self._first + i) if isinstance(i, int) else self._w.add(f"add i64 {i}, {self._first}")
        return self._w.add(f"getelementptr inbounds {V}, ptr {self._pointer}, i64 {slot}")


class WrittenOut:
    """Goes over the states instruction by instruction."""

    def __init__(self, w: Writer, states: int, rates: Rates) -> None:
        self._w, self._states, self._rates = w, states, rates

    def stored(self, pointer: str, first: int) -> Column:
        """A column of a group."""
        return Slots(self._w, pointer, first)

    def temporary(self, pointer: str, first: int) -> Column:
        """A column that is needed within the function only."""
        return Values()

    def each(self, body: Callable[[Index], None]) -> None:
        """Do something for every state."""
        for i in range(self._states):
            body(i)

    def fold(self, kind: str, start: str, body: Callable[[Index, str], str]) -> str:
        """Carry a value from state to state."""
        total = start
        for i in range(self._states):
            total = body(i, total)
        return total

    def rates(self, time: Callable[[], str], states: Column, into: Column) -> Column:
        """The rates of all states at a time."""
        for i, rate in enumerate(self._rates(time, states.get)):
            into.put(i, rate)
        return into


class Looped:
    """Goes over the states in loops."""

    def __init__(self, w: Writer, states: int, rates: Rates) -> None:
        self._w, self._states = w, states

    def stored(self, pointer: str, first: int) -> Column:
        """A column of a group."""
        return Memory(self._w, pointer, first)

    def temporary(self, pointer: str, first: int) -> Column:
        """A column that is needed within the function only; it lies in the group's room for such."""
        return Memory(self._w, pointer, first)

    def each(self, body: Callable[[Index], None]) -> None:
        """Do something for every state."""
        self._w.loop(self._states, body)

    def fold(self, kind: str, start: str, body: Callable[[Index, str], str]) -> str:
        """Carry a value from state to state."""
        return self._w.loop_carrying(self._states, kind, start, body)

    def rates(self, time: Callable[[], str], states: Column, into: Column) -> Column:
        """The rates of all states at a time, by `@uq_system`."""
        if not isinstance(states, Memory) or not isinstance(into, Memory):
            raise TypeError("looped columns lie in memory")
        args = f"ptr %lanes, {V} {time()}, ptr {states.address()}, ptr {into.address()}"
        self._w.plain(f"call void @uq_system({args})")
        return into


Form = type[WrittenOut] | type[Looped]
# Beyond about this many operations in a step, loops are written. Measured on chains of states with an exponential each (9 operations): at
# 2 states loops are a quarter slower, at 10 as fast, from 20 on faster by a tenth; 10, 20, 50, 100 states compile in 0.07, 0.13, 0.37,
# 0.93 s written out (AVX2: 0.15, 0.28, 0.96, 3.4 s), in 0.04, 0.04, 0.08, 0.15 s looped.
LARGEST_WRITTEN_OUT = 1500


def form_for(states: int, operations: int, pair: Pair) -> Form:
    """Written out or looped, by the number of states and of operations in all their rates."""
    combinations = sum(1 for row in (*pair.a, *pair.extra, *pair.e, *pair.d) for weight in row if weight)
    in_a_step = (pair.all_stages - 1) * operations + (combinations + 28) * states
    return WrittenOut if in_a_step <= LARGEST_WRITTEN_OUT else Looped

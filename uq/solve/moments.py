"""When rates turn with time and forcings alone: times that the kernel lands on, as on the rows of forcings.

In: `Moments` of a model, its forcings between breaks. Out: times, rising. Must not know: states, inputs, steps.

What is made of time, numbers, linear and step forcings by + - * / min max abs mod where and linear tables is straight between its own
turning points, so that no moment is missed. What is not (a sine of the time) is looked at in many places: a pulse between two of them is
missed. Each moment is found to the last bit by bisection.
"""

from __future__ import annotations

from collections.abc import Callable, Mapping
from dataclasses import dataclass
from functools import cached_property
from typing import Any

import numpy as np
from numpy.typing import NDArray

from uq.errors import ValueMistake
from uq.model.code import Moments, Operation, Table
from uq.model.tables import pieces

Floats = NDArray[np.float64]
Values = NDArray[Any]
Course = Callable[[Floats], Values]
# Every moment is landed on, in every member, and a member may take 100000 steps in all.
MOST_MOMENTS = 50_000
# Places at which what is not straight is looked at, over the whole time.
PLACES = 4096
# Halving an interval of doubles ends after about 60 turns, or where it begins at 0 and the moment is near that, after as many as there are
# powers of two.
MOST_HALVINGS = 1100
# Near enough to the machine's own functions: a last bit more or less does not matter (see `uq.solve.breaks`).
MEANINGS: Mapping[str, Callable[..., Values]] = {
    "+": np.add,
    "-": np.subtract,
    "*": np.multiply,
    "/": np.divide,
    "**": np.power,
    "neg": np.negative,
    "<": np.less,
    "<=": np.less_equal,
    ">": np.greater,
    ">=": np.greater_equal,
    "and": np.logical_and,
    "or": np.logical_or,
    "not": np.logical_not,
    "where": np.where,
    "exp": np.exp,
    "ln": np.log,
    "log10": np.log10,
    "sqrt": np.sqrt,
    "sin": np.sin,
    "cos": np.cos,
    "tan": np.tan,
    "asin": np.arcsin,
    "acos": np.arccos,
    "atan": np.arctan,
    "atan2": np.arctan2,
    "sinh": np.sinh,
    "cosh": np.cosh,
    "tanh": np.tanh,
    "abs": np.abs,
    "min": np.minimum,
    "max": np.maximum,
    "mod": np.mod,
}
STRAIGHT = frozenset(("time", "+", "-", "neg", "min", "max", "abs", "where", "<", "<=", ">", ">=", "and", "or", "not"))


@dataclass(frozen=True)
class Clock:
    """The operations of a model's moments; its forcings as functions of time, and whether each is straight between the breaks."""

    operations: tuple[Operation, ...]
    forcings: tuple[Course, ...] = ()
    straight_forcings: tuple[bool, ...] = ()

    def value(self, place: int) -> Course:
        """One operation as a function of times [time]."""
        needed = self._needed(place)

        def course(times: Floats) -> Values:
            known: dict[int, Values] = {}
            for k in needed:
                known[k] = self._worked_out(self.operations[k], [known[arg] for arg in self.operations[k].args], times)
            return known[place]

        return course

    @cached_property
    def moving(self) -> tuple[bool, ...]:
        """Whether each operation depends on time at all."""
        found: list[bool] = []
        for operation in self.operations:
            found.append(operation.op in ("time", "forcing") or any(found[arg] for arg in operation.args))
        return tuple(found)

    @cached_property
    def straight(self) -> tuple[bool, ...]:
        """Whether each operation is straight in time between the moments at which it or an argument turns."""
        found: list[bool] = []
        for place, operation in enumerate(self.operations):
            of_straight = all(found[arg] for arg in operation.args)
            found.append(not self.moving[place] or (of_straight and self._keeps_straight(operation)))
        return tuple(found)

    def _keeps_straight(self, operation: Operation) -> bool:
        if operation.op == "forcing" and isinstance(operation.value, int):
            return self.straight_forcings[operation.value]
        if isinstance(operation.value, Table):
            return operation.value.interpolation == "linear"
        if operation.op in ("/", "mod"):
            return not self.moving[operation.args[1]]
        if operation.op == "*":
            return not all(self.moving[arg] for arg in operation.args)
        return operation.op in STRAIGHT

    def _needed(self, place: int) -> list[int]:
        seen, waiting = set[int](), [place]
        while waiting:
            k = waiting.pop()
            if k not in seen:
                seen.add(k)
                waiting.extend(self.operations[k].args)
        return sorted(seen)

    def _worked_out(self, operation: Operation, args: list[Values], times: Floats) -> Values:
        if operation.op == "time":
            return times
        if operation.op == "number":
            return np.full(times.shape, operation.value, dtype=np.float64)
        if operation.op == "forcing" and isinstance(operation.value, int):
            return self.forcings[operation.value](times)
        if isinstance(operation.value, Table):
            return _looked_up(operation.op, operation.value, args[0])
        if operation.op == "erf":
            from scipy.special import erf

            return np.asarray(erf(args[0]))
        return MEANINGS[operation.op](*args)


def turning_times(moments: Moments, clock: Clock, breaks: Floats) -> Floats:
    """The times between the first and the last of the rising `breaks` at which a rate turns, rising. ValueMistake if there are too many."""
    corners = breaks
    with np.errstate(all="ignore"):
        for place in moments.turns:
            corners = np.unique(np.concatenate([corners, _turns(clock, place, corners)]))
            if len(corners) - len(breaks) > MOST_MOMENTS:
                raise _too_many(f"more than {MOST_MOMENTS} moments", breaks)
    return corners[~np.isin(corners, breaks)]


def _too_many(what: str, breaks: Floats) -> ValueMistake:
    found = f"{what} between {breaks[0]:g} and {breaks[-1]:g} at which rates turn with time"
    return ValueMistake(found, f"at most {MOST_MOMENTS}, as every one is landed on", "a longer period, or a shorter time", key="states")


def _turns(clock: Clock, place: int, corners: Floats) -> Floats:
    """Where one operation turns; its arguments turn at corners only."""
    operation = clock.operations[place]
    args = [clock.value(arg) for arg in operation.args]
    straight = all(clock.straight[arg] for arg in operation.args)
    if isinstance(operation.value, Table):
        points = np.array(operation.value.points)
        between = (points[1:] + points[:-1]) / 2
        return _changes(lambda t: np.searchsorted(points, args[0](t), side="right"), _places(args[0], corners, straight, between))
    if operation.op == "mod":

        def turned(t: Floats) -> Values:
            return np.asarray(args[0](t) / args[1](t))

        halves = _halves(turned(corners), corners)
        straight = straight and not clock.moving[operation.args[1]]
        return _changes(lambda t: np.floor(turned(t)), _places(turned, corners, straight, halves))
    other = args[1] if len(args) > 1 else np.zeros_like
    return _changes(lambda t: np.sign(args[0](t) - other(t)), _places(args[0], corners, straight, np.empty(0)))


def _halves(turned: Floats, corners: Floats) -> Floats:
    """The numbers of periods, and a half, that lie in the range of some."""
    finite = turned[np.isfinite(turned)]
    if not len(finite):
        return np.empty(0)
    low, high = np.floor(finite.min()), np.ceil(finite.max())
    if high - low > MOST_MOMENTS:
        raise _too_many(f"{high - low:.3g} periods", corners)
    return np.arange(low - 1, high + 1) + 0.5


def _places(course: Course, corners: Floats, straight: bool, levels: Floats) -> Floats:
    """Times, corners among them, with at most one turn between each two: where a straight course is at one of the rising levels."""
    lo, hi = corners[:-1], corners[1:]
    if not straight:
        parts = np.arange(PLACES // len(corners) + 2) / (PLACES // len(corners) + 2)
        return np.unique(np.append(lo[:, None] + parts * (hi - lo)[:, None], corners[-1]))
    a, b = course(np.nextafter(lo, hi)), course(np.nextafter(hi, lo))
    first, stop = (np.searchsorted(levels, ends) for ends in (np.minimum(a, b), np.maximum(a, b)))
    count = np.where(np.isfinite(a) & np.isfinite(b), stop - first, 0)
    which = np.repeat(np.arange(len(lo)), count)
    within = np.arange(len(which)) - np.repeat(np.cumsum(count) - count, count)
    share = (levels[first[which] + within] - a[which]) / (b - a)[which]
    return np.unique(np.concatenate([corners, lo[which] + share * (hi - lo)[which]]))


def _changes(key: Course, places: Floats) -> Floats:
    """The first time of another key between every two places with different keys just inside; a key that is not a number is its own."""

    def known(times: Floats) -> Values:
        found = np.asarray(key(times), dtype=np.float64)
        return np.where(np.isnan(found), np.inf, found)

    lo, hi = np.nextafter(places[:-1], places[1:]), np.nextafter(places[1:], places[:-1])
    before = known(lo)
    differs = (before != known(hi)) & (lo < hi)
    lo, hi, before = lo[differs], hi[differs], before[differs]
    for _ in range(MOST_HALVINGS):
        if np.all(np.nextafter(lo, hi) >= hi):
            break
        middle = lo + (hi - lo) / 2
        same = known(middle) == before
        lo, hi = np.where(same, middle, lo), np.where(same, hi, middle)
    return np.asarray(hi, dtype=np.float64)


def _looked_up(op: str, table: Table, x: Floats) -> Floats:
    """A table's value or slope at x [time], as `uq.model.tables` writes it, but for the last point."""
    points = np.array(table.points)
    rows = np.array(pieces(table))
    held = np.clip(x, points[0], points[-1]) if table.outside == "hold" else np.where((x < points[0]) | (x > points[-1]), np.nan, x)
    place = np.clip(np.searchsorted(points, held, side="right") - 1, 0, len(rows) - 1)
    offset, coefficients = held - points[place], rows[place].T
    if op == "table_slope":
        coefficients = np.array([k * c for k, c in enumerate(coefficients)][1:])
    total = np.zeros(x.shape)
    for c in coefficients[::-1]:
        total = np.asarray(total * offset + c, dtype=np.float64)
    return total

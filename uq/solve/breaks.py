"""Given courses over time become segments between breaks: the agreement with the kernel, which lands on every break.

In: forcings, moments at which rates turn, start and stop. Out: `Segments`. Must not know: states, steps.
"""

from __future__ import annotations

from bisect import bisect_left, bisect_right
from collections.abc import Callable
from dataclasses import dataclass, replace
from functools import cached_property, lru_cache, partial
from itertools import pairwise
from math import floor

import numpy as np
from numpy.typing import NDArray

from uq.errors import ValueMistake
from uq.model.code import Forcing, Moments
from uq.model.monotone import Cubic, cubic, shifted, slopes
from uq.solve.moments import Clock, turning_times

Floats = NDArray[np.float64]

# Every row is landed on, in every member, and a member may take 100000 steps in all.
MOST_REPEATED_ROWS = 50_000
NO_MOMENTS = Moments()
# The same forcings are asked for again with every block of members.
REMEMBERED = 8
# A row nearer to a solved time than this part of the whole time is at that time: 6 * 0.1 h and 36 min differ in their last digits only.
SAME = 1e-9
# Breaks at which rates turn are known to a few rounding units: within so many of another one they are the same, and the rates of a segment
# are asked for at least so far inside of it.
UNSURE = 8 * 2.0**-52


@dataclass(frozen=True)
class Segments:
    """bounds [segment + 1] in the time unit; jumps [segment] (1 where rates may jump at the segment's start); coefficients [segment,
    slot]: within a segment a forcing is base + slope d + second d^2 + third d^3 with d = time - the segment's start. The slots are the
    bases of all forcings, their slopes, the second and then the third coefficients of the smooth ones; with moments also the earliest and
    the latest time at which the rates are asked for. Where a forcing has a row at the last time, a segment without length holds it."""

    bounds: NDArray[np.float64]
    jumps: NDArray[np.uint8]
    coefficients: NDArray[np.float64]


@dataclass(frozen=True)
class Piece:
    """From its start to that of the next piece a forcing is a cubic of the time since the start; `end` is its value there."""

    start: float
    cubic: Cubic
    end: float


@lru_cache(REMEMBERED)
def segments(forcings: tuple[Forcing, ...], start: float, stop: float, moments: Moments = NO_MOMENTS, solved: bytes = b"") -> Segments:
    """Merge the breaks of all forcings and the moments at which rates turn, between start and stop.

    At a break the later piece counts, at the stop too. A row next to a solved time (`solved`: doubles, rising) is at that time.
    ValueMistake if a forcing does not cover the time from start to stop (the last value of a step forcing holds on), or repeats too often;
    or if rates turn too often.
    """
    near = np.unique([start, *np.frombuffer(solved), stop])
    given = _Given(forcings, tuple(_snapped(pieces(forcing, start, stop), near) for forcing in forcings))
    bounds = [start, *(time for time in given.rows if start < time < stop), stop]
    jumping = {time for time in given.rows if given.jumps(time)}
    if moments.turns:
        clock = Clock(moments.operations, given.courses(bounds), tuple(f.interpolation != "smooth" for f in forcings))
        for time in turning_times(moments, clock, np.array(bounds)):
            k = bisect_left(bounds, time)
            same = [bound for bound in bounds[k - 1 : k + 1] if abs(bound - time) <= 2 * UNSURE * abs(bound)]
            jumping.update(same or [time])
            bounds[k:k] = [] if same else [time]
    if stop in jumping and start < stop:
        bounds.append(stop)
    table = given.coefficients(bounds[:-1])
    if moments.turns:
        table = np.concatenate([table, _inner_times(np.array(bounds))], axis=1)
    jumps = [0, *(int(time in jumping and time < stop) for time in bounds[1:-1])]
    return Segments(np.array(bounds), np.array(jumps, dtype=np.uint8), np.ascontiguousarray(table))


@dataclass(frozen=True)
class _Given:
    """Forcings, and the pieces of each."""

    forcings: tuple[Forcing, ...]
    pieces: tuple[list[Piece], ...]

    @cached_property
    def starts(self) -> tuple[list[float], ...]:
        """When the pieces begin."""
        return tuple([piece.start for piece in course] for course in self.pieces)

    @cached_property
    def rows(self) -> list[float]:
        """The times at which any piece begins, rising."""
        return sorted({time for times in self.starts for time in times})

    def coefficients(self, times: list[float]) -> Floats:
        """The coefficients [time, slot] of all forcings from each of the times on."""
        rows = []
        for time in times:
            held = [course[bisect_right(starts, time) - 1] for course, starts in zip(self.pieces, self.starts, strict=True)]
            found = [shifted(piece.cubic, time - piece.start) for piece in held]
            smooth = [c for c, forcing in zip(found, self.forcings, strict=True) if forcing.interpolation == "smooth"]
            rows.append([c[k] for k, some in enumerate((found, found, smooth, smooth)) for c in some])
        return np.array(rows, dtype=np.float64).reshape(len(rows), -1)

    def jumps(self, time: float) -> bool:
        """Whether any forcing has another value after a time than before it."""
        for course, starts in zip(self.pieces, self.starts, strict=True):
            k = bisect_left(starts, time)
            if 0 < k < len(course) and starts[k] == time and course[k - 1].end != course[k].cubic[0]:
                return True
        return False

    def courses(self, bounds: list[float]) -> tuple[Callable[[Floats], Floats], ...]:
        """Every forcing as a function of times [time] between the bounds, which hold all rows."""
        table, begin = self.coefficients(bounds[:-1]), np.array(bounds[:-1])
        many, smooth = len(self.forcings), [k for k, forcing in enumerate(self.forcings) if forcing.interpolation == "smooth"]

        def course(k: int, times: Floats) -> Floats:
            held = np.clip(np.searchsorted(begin, times, side="right") - 1, 0, None)
            since, slope = times - begin[held], table[held, many + k]
            if k in smooth:
                second = 2 * many + smooth.index(k)
                slope = (table[held, second + len(smooth)] * since + table[held, second]) * since + slope
            return np.asarray(slope * since + table[held, k])

        return tuple(partial(course, k) for k in range(many))


def _snapped(course: list[Piece], near: Floats) -> list[Piece]:
    """The pieces, those that begin next to one of the times `near` (but for their rounding, at it) begin there; none is lost by that."""
    starts = np.array([piece.start for piece in course])
    after = np.clip(np.searchsorted(near, starts), 1, len(near) - 1) if len(near) > 1 else np.zeros(len(starts), dtype=np.intp)
    nearest = np.where(starts - near[after - 1] < near[after] - starts, near[after - 1], near[after])
    new = np.where(np.abs(nearest - starts) <= SAME * (near[-1] - near[0]), nearest, starts)
    same = np.flatnonzero((new[1:] == new[:-1]) & (starts[1:] != starts[:-1]))
    for alike in (same, same + 1):
        new[alike] = starts[alike]
    return [replace(piece, start=float(time)) for piece, time in zip(course, new, strict=True)]


def _inner_times(bounds: Floats) -> Floats:
    """The earliest and the latest time [segment, 2] inside each segment at which rates are asked for; the middle one where it is short."""
    margin = UNSURE * np.maximum(np.abs(bounds[:-1]), np.abs(bounds[1:]))
    middle = bounds[:-1] + (bounds[1:] - bounds[:-1]) / 2
    return np.stack([np.minimum(bounds[:-1] + margin, middle), np.maximum(bounds[1:] - margin, middle)], axis=1)


def pieces(forcing: Forcing, start: float, stop: float) -> list[Piece]:
    """The pieces of a forcing that are needed from start to stop; the first begins at the start or before it."""
    first, last = forcing.times[0], forcing.times[-1]
    found = _inside(forcing)
    if forcing.outside == "repeat":
        found = _repeated(forcing, found, start, stop)
    else:
        held = forcing.outside == "hold"
        if (first > start and not held) or (last < stop and not held and forcing.interpolation != "step"):
            rows, expected = f"rows from {first:g} to {last:g}", f"rows that cover the time from {start:g} to {stop:g}"
            raise ValueMistake(rows, expected, 'add rows at the ends, or say outside = "hold"', key=f"forcings.{forcing.name}")
        before = [_constant(start, forcing.values[0])] if first > start else []
        found = [*before, *found, _constant(last, forcing.values[-1])]
    if forcing.interpolation != "step":
        return found
    return [found[0], *(piece for before, piece in pairwise(found) if piece.cubic != before.cubic)]  # only where the value changes


def _constant(start: float, value: float) -> Piece:
    return Piece(start, (value, 0.0, 0.0, 0.0), value)


def _inside(forcing: Forcing) -> list[Piece]:
    """The pieces from row to row; rows at one time are a jump and have none between them."""
    times, values = forcing.times, forcing.values
    if forcing.interpolation == "step":
        return [_constant(a, value) for (a, b), value in zip(pairwise(times), values[:-1], strict=True) if a < b]
    if forcing.interpolation == "smooth":
        return [piece for first, stop in _runs(times) for piece in _smooth(forcing, first, stop)]
    rows = zip(pairwise(times), pairwise(values), strict=True)
    return [Piece(a, (u, (v - u) / (b - a), 0.0, 0.0), v) for (a, b), (u, v) in rows if a < b]


def _runs(times: tuple[float, ...]) -> list[tuple[int, int]]:
    """First row and the row behind the last of every run of rising times."""
    cuts = [0, *(k for k in range(1, len(times)) if times[k] == times[k - 1]), len(times)]
    return [(first, stop) for first, stop in pairwise(cuts) if stop - first > 1]


def _smooth(forcing: Forcing, first: int, stop: int) -> list[Piece]:
    """The cubics of one run of rows. A course that repeats and ends where it began goes on smoothly over the seam."""
    times, values = forcing.times[first:stop], forcing.values[first:stop]
    whole = stop - first == len(forcing.times)
    if forcing.outside == "repeat" and whole and values[0] == values[-1] and len(times) > 2:
        period = times[-1] - times[0]
        around = (times[-2] - period, *times, times[1] + period)
        ends = slopes(around, (values[-2], *values, values[1]))[1:-1]
    else:
        ends = slopes(times, values)
    rows = zip(pairwise(times), pairwise(values), pairwise(ends), strict=True)
    return [Piece(a, cubic(b - a, pair, slope), pair[1]) for (a, b), pair, slope in rows]


def _repeated(forcing: Forcing, once: list[Piece], start: float, stop: float) -> list[Piece]:
    """The pieces of all periods from start to stop; a period lasts from the first row to the last."""
    first, period = forcing.times[0], forcing.times[-1] - forcing.times[0]
    key = f"forcings.{forcing.name}"
    if not period > 0:
        raise ValueMistake("rows at one time only", "a period from the first row to the last", "add rows", key=key)
    lowest, highest = floor((start - first) / period), floor((stop - first) / period)
    if (highest - lowest + 1) * len(once) > MOST_REPEATED_ROWS:
        found = f"{(highest - lowest + 1) * len(once)} rows when repeated from {start:g} to {stop:g}"
        raise ValueMistake(found, f"at most {MOST_REPEATED_ROWS}", "give fewer rows for a period, or a shorter time", key=key)
    turns = range(lowest - 1 if first + lowest * period > start else lowest, highest + 1)
    return [Piece(piece.start + turn * period, piece.cubic, piece.end) for turn in turns for piece in once]

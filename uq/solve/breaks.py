"""Given courses over time become segments between breaks: the agreement with the kernel, which lands on every break.

In: forcings, start and stop. Out: `Segments`. Must not know: states, steps.
"""

from __future__ import annotations

from bisect import bisect_right
from dataclasses import dataclass

import numpy as np
from numpy.typing import NDArray

from uq.errors import ValueMistake
from uq.model.code import Forcing


@dataclass(frozen=True)
class Segments:
    """bounds [segment + 1] in the time unit; jumps [segment] (1 where a forcing jumps at the segment's start); base and slope [segment,
    forcing]: within a segment a forcing is base + slope * (time - the segment's start)."""

    bounds: NDArray[np.float64]
    jumps: NDArray[np.uint8]
    base: NDArray[np.float64]
    slope: NDArray[np.float64]


def segments(forcings: tuple[Forcing, ...], start: float, stop: float) -> Segments:
    """Merge the breaks of all forcings between start and stop.

    At a break the later piece counts. ValueMistake if a forcing does not cover the time from start to stop (the last value of a step
    forcing holds on).
    """
    for forcing in forcings:
        _check(forcing, start, stop)
    inner = {time for forcing in forcings for time in _breaks(forcing) if start < time < stop}
    bounds = [start, *sorted(inner), stop]
    pieces = [[_piece(forcing, time) for forcing in forcings] for time in bounds[:-1]]
    jumps = [0] + [int(any(_left(forcing, time) != _piece(forcing, time)[0] for forcing in forcings)) for time in bounds[1:-1]]
    shape = (len(bounds) - 1, len(forcings), 2)
    table = np.array(pieces, dtype=np.float64).reshape(shape)
    base, slope = np.ascontiguousarray(table[:, :, 0]), np.ascontiguousarray(table[:, :, 1])
    return Segments(np.array(bounds, dtype=np.float64), np.array(jumps, dtype=np.uint8), base, slope)


def _check(forcing: Forcing, start: float, stop: float) -> None:
    first, last = forcing.times[0], forcing.times[-1]
    if first > start or (forcing.interpolation == "linear" and last < stop):
        found, expected = f"rows from {first:g} to {last:g}", f"rows that cover the time from {start:g} to {stop:g}"
        raise ValueMistake(found, expected, "add rows at the ends", key=f"forcings.{forcing.name}")


def _breaks(forcing: Forcing) -> tuple[float, ...]:
    """The times at which something changes; of a step forcing only those at which the value does."""
    if forcing.interpolation == "linear":
        return forcing.times
    pairs = zip(forcing.times[1:], forcing.values[:-1], forcing.values[1:], strict=True)
    return tuple(time for time, before, after in pairs if before != after)


def _piece(forcing: Forcing, time: float) -> tuple[float, float]:
    """Value and slope at a time, of the piece that begins there or holds it."""
    j = bisect_right(forcing.times, time) - 1
    if forcing.interpolation == "step" or j == len(forcing.times) - 1:
        return forcing.values[j], 0.0
    slope = (forcing.values[j + 1] - forcing.values[j]) / (forcing.times[j + 1] - forcing.times[j])
    return forcing.values[j] + slope * (time - forcing.times[j]), slope


def _left(forcing: Forcing, time: float) -> float:
    """The value just before a time. Away from the forcing's own rows it is the value there, by the same arithmetic."""
    if time not in forcing.times:
        return _piece(forcing, time)[0]
    j = forcing.times.index(time)
    return forcing.values[j - 1] if forcing.interpolation == "step" else forcing.values[j]

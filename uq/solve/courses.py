"""Numbers taken from the course of an observed value, on the solved times.

(A later version takes them along the solver's continuous solution.)
"""

from __future__ import annotations

import numpy as np
from numpy.typing import NDArray

from uq.model.code import Course

Floats = NDArray[np.float64]


def take(course: Course, values: Floats, times: Floats) -> Floats:
    """One number per member: `highest`, `lowest`, `average`, `integral`, `final` or `value_at` of an observed value.

    values [member, observed, time] in the units of the observed values, times [time]; returns [member] (an integral in value times time).
    Only solved times within [start, stop] of the course count, so a window's edges should be solved times; nan where there is none in it.
    Average and integral by the trapezoidal rule; `value_at` takes the value at a solved time (ValueError if it is none).
    A later version takes all of them along the continuous solution.
    """
    first, last = np.searchsorted(times, course.start, "left"), np.searchsorted(times, course.stop, "right")
    if course.kind == "value_at" and last - first != 1:
        raise ValueError(f"the time {course.start} is not a solved time")
    if first == last:
        return np.full(len(values), np.nan)
    window = values[:, course.observed, first:last]
    with np.errstate(invalid="ignore", over="ignore"):
        if course.kind == "highest":
            return np.asarray(window.max(axis=1))
        if course.kind == "lowest":
            return np.asarray(window.min(axis=1))
        if course.kind in ("final", "value_at"):
            return np.asarray(window[:, -1])
        area = trapezoids(window, times[first:last])
        if course.kind == "integral":
            return area
        return area / (times[last - 1] - times[first]) if last - first > 1 else np.asarray(window[:, 0])


def trapezoids(window: Floats, times: Floats) -> Floats:
    """Integral of each row by the trapezoidal rule; window [member, time], times [time]; returns [member].

    Every row is a sum of its own over contiguous memory, so that its bits do not depend on how many rows there are.
    """
    parts = 0.5 * (window[:, 1:] + window[:, :-1]) * np.diff(times)
    return np.asarray(np.ascontiguousarray(parts).sum(axis=1))

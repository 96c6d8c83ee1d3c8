"""Times of two runs in one unit, so that what is compared is of one moment."""

from __future__ import annotations

from dataclasses import replace

import numpy as np

from uq.analysis.ask import Ask, Floats
from uq.errors import ValueMistake
from uq.units import parse_unit

# Times nearer to each other than this, relative to the longest, are one: what conversions and sums of steps leave over.
SAME = 1e-9


def in_unit(times: Floats, unit: str, other: str, known: Floats) -> Floats | None:
    """Times in another unit; those that are one with a known time become that time. None where one unit cannot be told in the other."""
    found = times
    if unit != other:
        try:
            factor, _ = parse_unit(unit).conversion(parse_unit(other))
        except ValueMistake:
            return None
        found = times * factor
    if not len(known) or not len(found):
        return found
    nearest = _nearest(found, known)
    return np.asarray(np.where(np.abs(found - nearest) <= SAME * np.abs(known).max(), nearest, found), dtype=np.float64)


def _nearest(times: Floats, known: Floats) -> Floats:
    """Of each time the nearest known one."""
    ordered = np.sort(known)
    after = np.searchsorted(ordered, times).clip(max=len(ordered) - 1)
    before = (after - 1).clip(min=0)
    nearer = np.abs(ordered[before] - times) < np.abs(ordered[after] - times)
    return np.asarray(np.where(nearer, ordered[before], ordered[after]), dtype=np.float64)


def on_clock_of(one: Ask, other: Ask) -> Ask | None:
    """What the other was asked, with its times in the unit of the first; None where that cannot be."""
    known = np.unique(np.concatenate([one.solved_times, *(np.array(limit.by, dtype=np.float64) for limit in one.limits)]))
    solved = in_unit(other.solved_times, other.time_unit, one.time_unit, known)
    if solved is None:
        return None
    limits = []
    for limit in other.limits:
        by = in_unit(np.array(limit.by, dtype=np.float64), other.time_unit, one.time_unit, known)
        limits.append(replace(limit, by=tuple((by if by is not None else np.zeros(0)).tolist())))
    return replace(other, time_unit=one.time_unit, solved_times=solved, limits=tuple(limits))

"""Times, units and levels as they are said."""

from __future__ import annotations

from uq.report.plain import plain
from uq.report.rounding import alone


def moment(time: float, unit: str) -> str:
    """A time with its unit, or with the word where it has none."""
    told = unit_after(unit)
    return f"{alone(time)}{told}" if told else f"time {alone(time)}"


def unit_after(unit: str, before: str = " ") -> str:
    """A unit to be put after a number or a name; nothing where there is none."""
    return f"{before}{plain(unit)}" if unit not in ("", "1") else ""


def per_cent(share: float) -> str:
    """A level as "5 %"."""
    return f"{alone(100 * share)} %"


def threads(count: int) -> str:
    """A number of threads in words."""
    return "1 thread" if count == 1 else f"{count} threads"


def duration(seconds: float) -> str:
    """A time span as a reader says it: "0.4 s", "41 s", "3 min 20 s", "2 h 5 min"."""
    if seconds < 60:
        return f"{alone(seconds, 2)} s"
    whole = round(seconds)
    hours, minutes, rest = whole // 3600, whole // 60 % 60, whole % 60
    return f"{hours} h {minutes} min" if hours else f"{minutes} min {rest} s"

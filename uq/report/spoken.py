"""Times, units and levels as they are said."""

from __future__ import annotations

import math
import re
from collections.abc import Iterable, Mapping, Sequence
from dataclasses import dataclass, field
from itertools import pairwise

from uq.report.plain import plain
from uq.report.rounding import alone

# Units of time as studies write them, in seconds; those that are words have a plural.
SECONDS = {
    "s": 1.0,
    "min": 60.0,
    "h": 3600.0,
    "d": 86400.0,
    "second": 1.0,
    "minute": 60.0,
    "hour": 3600.0,
    "day": 86400.0,
    "week": 604800.0,
}
MOST_LISTED = 8
WORDS = frozenset(("second", "minute", "hour", "day", "week", "month", "year"))
# Lines of a study that name times, and a time in them that has a unit.
NAMED = re.compile(r"^\s*(?:by|stop)\s*=(.*)$", re.MULTILINE)
WRITTEN = re.compile(r"""["'](\d+(?:\.\d+)?) (\w+)["']""")


@dataclass(frozen=True)
class Clock:
    """How times of a result are said: in its unit, or as the study wrote them where it did so in another one."""

    unit: str
    written: Mapping[float, str] = field(default_factory=dict)

    def at(self, time: float) -> str:
        """A moment: "12 h", "30 days", "time 3" where there is no unit."""
        same = (text for known, text in self.written.items() if math.isclose(known, time, rel_tol=1e-9))
        return next(same, moment(time, self.unit))

    def between(self, low: float, high: float) -> str:
        """Two moments: "5.25 and 5.5 h"."""
        return f"{alone(low)} and {moment(high, self.unit).removeprefix('time ')}"

    def apart(self, times: Sequence[float]) -> str:
        """How far apart moments are: "1 day apart", "at most 0.5 h apart"; nothing where there is one only."""
        steps = [later - earlier for earlier, later in pairwise(times)]
        if not steps:
            return ""
        largest = max(steps)
        uneven = "at most " if largest - min(steps) > 1e-6 * largest else ""
        return f"{uneven}{moment(largest, self.unit).removeprefix('time ')} apart"


def clock_of(unit: str, study_text: str) -> Clock:
    """The clock of a result: its unit of time, and the times that its study names in another unit, as in by = "12 h"."""
    found: dict[float, str] = {}
    for line in NAMED.findall(study_text) if unit in SECONDS else ():
        for number, its in WRITTEN.findall(line.partition("#")[0]):
            if its in SECONDS:
                found[float(number) * SECONDS[its] / SECONDS[unit]] = moment(float(number), its)
    return Clock(unit, found)


def moment(time: float, unit: str) -> str:
    """A time with its unit, in the plural where that is a word; with the word "time" where it has none."""
    told = unit_after(unit)
    plural = "s" if unit in WORDS and time != 1 else ""
    return f"{alone(time)}{told}{plural}" if told else f"time {alone(time)}"


def quoted(name: str) -> str:
    """A name that has a comma itself, in quotes, so that what goes on after it is no part of it."""
    return f'"{name}"' if "," in name else name


def listed(texts: Iterable[str], most: int = MOST_LISTED) -> str:
    """Names one after another, in quotes where one has a comma; many are cut short, with their number."""
    every = list(texts)
    if any("," in text for text in every):
        every = [f'"{text}"' for text in every]
    more = f" and {len(every) - most} more" if len(every) > most else ""
    return ", ".join(every[:most]) + more


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
    """A time span as a reader says it: "0.4 s", "41 s", "3 min 20 s", "2 h 5 min", "12 days"."""
    if seconds < 60:
        return f"{alone(seconds, 2)} s"
    whole = round(seconds)
    hours, minutes, rest = whole // 3600, whole // 60 % 60, whole % 60
    if hours >= 96:
        return f"{alone(seconds / 86400, 2)} days"
    return f"{hours} h {minutes} min" if hours else f"{minutes} min {rest} s"


def counted_members(count: int, name: str) -> str:
    """So many of something: "1 failed one" is said as "failed one"."""
    return name if count == 1 else f"{count} {name}s"

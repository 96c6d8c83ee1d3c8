"""Times of day and time zones.

In: times of day, dates and names of time zones, as people write them. Out: moments, in seconds since 1970-01-01 00:00 UTC.
Must not know: what they are for.
Two decisions hold wherever a local time becomes a moment. Where the clocks go forward over it, so that it does not exist, it stands for the
moment at which they do. Where they go back, so that it exists twice, it stands for the first of the two.
"""

from __future__ import annotations

import re
from dataclasses import dataclass
from datetime import date, datetime, time, timedelta, tzinfo
from functools import lru_cache
from zoneinfo import ZoneInfo, ZoneInfoNotFoundError, available_timezones

from uq.errors import ValueMistake, suggest

_OF_DAY = re.compile(r"([01]\d|2[0-3]):([0-5]\d)", re.ASCII)
_DATED = re.compile(r"\d{4}-\d\d-\d\d[T ]\d\d:\d\d(:\d\d)?(Z|[+-]\d\d:\d\d)?", re.ASCII)
EXAMPLES = '"06:00", or a date and a time, "2030-01-31 06:00"'


def time_of_day(text: str) -> time:
    """The time in "22:30"; raises ValueMistake."""
    found = _OF_DAY.fullmatch(text)
    if found is None:
        remedy = 'midnight is "00:00"' if text == "24:00" else ""
        raise ValueMistake(f'"{text}"', 'a time of day from "00:00" to "23:59"', remedy)
    return time(int(found[1]), int(found[2]))


@lru_cache
def zone_of(name: str) -> tzinfo | None:
    """The time zone of this name in the IANA database; None, for an empty name, is the zone of this machine. Raises ValueMistake."""
    if not name:
        return None
    try:
        return ZoneInfo(name)
    except (ZoneInfoNotFoundError, ValueError, OSError):
        expected = 'the name of a time zone, such as "Europe/Athens"'
        raise ValueMistake(f'"{name}"', expected, suggest(name, available_timezones())) from None


def moment(day: date, at: time, zone: tzinfo | None) -> float:
    """When it is this time on this day in this zone."""
    local = datetime.combine(day, at, zone)
    first, second = local.replace(fold=0).timestamp(), local.replace(fold=1).timestamp()
    # Python takes a time that does not exist by the clock before the change for fold=0, by the one after it for fold=1 (PEP 495).
    return first if first <= second else _change(second, first, zone)


def _change(before: float, after: float, zone: tzinfo | None) -> float:
    """The moment between two others, to the second, from which on the offset of the later one holds."""
    low, high = int(before), int(after)
    old = _offset(low, zone)
    while high - low > 1:
        middle = (low + high) // 2
        low, high = (middle, high) if _offset(middle, zone) == old else (low, middle)
    return float(high)


def _offset(at: float, zone: tzinfo | None) -> timedelta | None:
    return datetime.fromtimestamp(at, zone).astimezone(zone).utcoffset()


def following(after: float, at: time, zone: tzinfo | None) -> float:
    """The first moment after another at which it is this time of day."""
    day = datetime.fromtimestamp(after, zone).date()
    return next(found for ahead in range(-1, 4) if (found := moment(day + timedelta(ahead), at, zone)) > after)


@dataclass(frozen=True)
class When:
    """A time as a user states it: a time of day, which means the next such, or one with its date; without an offset it is local."""

    text: str

    def __post_init__(self) -> None:
        if _DATED.fullmatch(self.text) is None:
            if "-" in self.text:
                raise ValueMistake(f'"{self.text}"', EXAMPLES)
            time_of_day(self.text)
            return
        try:
            datetime.fromisoformat(self.text)
        except ValueError:
            raise ValueMistake(f'"{self.text}"', f"a day and a time that exist: {EXAMPLES}") from None

    @property
    def dated(self) -> bool:
        """Whether it says on which day."""
        return "-" in self.text

    def after(self, now: float, zone: tzinfo | None) -> float:
        """The moment meant, seen from `now`; a local time is one of `zone`. One with a date may be over."""
        if not self.dated:
            return following(now, time_of_day(self.text), zone)
        stated = datetime.fromisoformat(self.text)
        return moment(stated.date(), stated.time(), zone) if stated.tzinfo is None else stated.timestamp()


@dataclass(frozen=True)
class Window:
    """The time of day between two times, in one zone: from `opens`, and before `closes`, which may be past midnight.

    On a day on which the clocks jump over all of it, it does not open. Raises ValueMistake, with the key, where it cannot stand.
    """

    opens: str
    closes: str
    timezone: str = ""

    def __post_init__(self) -> None:
        for key, check in (("opens", time_of_day), ("closes", time_of_day), ("timezone", zone_of)):
            try:
                check(getattr(self, key))
            except ValueMistake as mistake:
                raise ValueMistake(mistake.found, mistake.expected, mistake.remedy, key) from None
        if self.opens == self.closes:
            raise ValueMistake(f'"{self.closes}", as `opens`', "another time", "without a window a run may start at any time", "closes")

    def is_open(self, at: float) -> bool:
        """Whether it is open at a moment."""
        return _span(self, at)[0] <= at

    def opening(self, at: float) -> float:
        """The first moment, from `at` on, at which it is open."""
        return max(at, _span(self, at)[0])

    def closing(self, at: float) -> float:
        """When it closes: the span that is open at `at`, or the next one."""
        return _span(self, at)[1]


# Of many jobs with one window each asks for the same moment.
@lru_cache(maxsize=256)
def _span(window: Window, at: float) -> tuple[float, float]:
    """Beginning and end of the first span that is not over at `at`."""
    zone = zone_of(window.timezone)
    opens, closes = time_of_day(window.opens), time_of_day(window.closes)
    overnight = timedelta(1 if closes <= opens else 0)
    today = datetime.fromtimestamp(at, zone).date()
    for ahead in range(-2, 5):
        day = today + timedelta(ahead)
        begin, end = moment(day, opens, zone), moment(day + overnight, closes, zone)
        if begin < end and at < end:
            return begin, end
    raise RuntimeError(f"no span of {window} within days of {at}")

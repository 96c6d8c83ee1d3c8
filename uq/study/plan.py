"""The declarations of what is asked: `[time]` and `[plan]`."""

from __future__ import annotations

import math
from collections.abc import Iterator
from dataclasses import dataclass
from functools import cached_property

import numpy as np
from numpy.typing import NDArray

from uq.design.design import REPLICATES
from uq.design.sobol import MOST_ROWS
from uq.errors import ValueMistake
from uq.model.code import Solver
from uq.study import values as read
from uq.study.fields import entry, read_part, refuse, unit_entry
from uq.study.locate import Path
from uq.study.notes import KeyMistake
from uq.study.values import Frame

Found = Iterator[tuple[Path, ValueMistake]]

SOLVERS: tuple[Solver, ...] = ("auto", "explicit", "stiff")
QUESTIONS = ("bands", "limits", "outcomes", "ranking")
QUESTIONS_LATER = (
    "screening",
    "interactions",
    "shapley",
    "surrogate",
    "given",
    "local",
    "causes",
    "rare",
    "two_level",
    "dimensionless",
)
# Which questions have the numbers whose precision may be asked.
PRECISION_OF = {"quantiles": ("bands", "outcomes"), "probabilities": ("limits",), "indices": ("ranking",)}
MOST_TIMES = 1_000_000
MEMBERS = 16384
# The most that the design has.
MOST_MEMBERS = 2 * REPLICATES * MOST_ROWS


def time_unit(value: object, frame: Frame) -> str:
    """The unit of the time; a rate is divided by it."""
    text: str = read.unit(value, frame)
    if frame.unit_of(text).temperature == "scale":
        raise ValueMistake(f"a temperature in {text}", "a unit of time", "min, s, h, day")
    return text


@dataclass(frozen=True, kw_only=True)
class Time:
    """`[time]`: the span of the forecast and the times of its output."""

    unit: str = unit_entry("unit of all times of the study", time_unit)
    start: float = entry("time of the starts", read.quantity, 0.0, "0")
    stop: float = entry("last time", read.quantity, math.nan, "needed; with `at` the last of these")
    points: int | None = entry("number of output times, evenly spaced, both ends included", read.whole(2), None, "one of the three")
    every: float | None = entry("distance of output times; the last time is always one", read.quantity, None, "one of the three")
    at: tuple[float, ...] | None = entry("output times", read.listed(read.quantity, "times"), None, "one of the three")

    def __post_init__(self) -> None:
        if math.isnan(self.stop) and self.at:
            object.__setattr__(self, "stop", self.at[-1])
        refuse(self.mistakes())

    def mistakes(self) -> Found:
        """What cannot stand in this table."""
        if math.isnan(self.stop):
            yield (), KeyMistake("no `stop`", "a key `stop`, last time")
            return
        given = [key for key in ("points", "every", "at") if getattr(self, key) is not None]
        if not given:
            yield (), KeyMistake("no output times", "one of points, every, at", "for example points = 101")
        for key in given[1:]:
            yield (key,), KeyMistake(f"`{key}` beside `{given[0]}`", "one of points, every, at")
        if self.stop <= self.start:
            yield ("stop",), ValueMistake(f"{self.stop:g}", f"a time after the start, {self.start:g}")
            return
        span = self.stop - self.start
        if self.every is not None and not 0 < self.every <= span:
            yield ("every",), ValueMistake(f"{self.every:g}", f"a distance above 0, at most {span:g}")
        count = self.points or (span / self.every if self.every else 0)
        if count > MOST_TIMES:
            yield ("points" if self.points else "every",), ValueMistake(f"{count:.0f} output times", f"at most {MOST_TIMES}")
        if self.at is not None:
            yield from times_inside(("at",), self.at, self, "output times")

    @property
    def span(self) -> str:
        """Start and stop in words."""
        return f"{self.start:g} and {self.stop:g}" + (f" {self.unit}" if self.unit != "1" else "")

    @cached_property
    def grid(self) -> NDArray[np.float64]:
        """The output times [time], ascending."""
        if self.at is not None:
            return np.array(self.at)
        if self.points is not None:
            return np.linspace(self.start, self.stop, self.points)
        every = self.every or self.stop - self.start
        steps = math.floor((self.stop - self.start) / every * (1 + 1e-12))
        inner: NDArray[np.float64] = self.start + every * np.arange(steps + 1, dtype=np.float64)
        if self.stop - inner[-1] > 1e-9 * every:
            return np.append(inner, self.stop)
        inner[-1] = self.stop
        return inner


def times_inside(path: Path, times: tuple[float, ...], time: Time, what: str) -> Found:
    """Mistakes of a list of times that must ascend within [start, stop]."""
    if not times:
        yield path, ValueMistake("an empty list", f"one or more {what}")
    for index, moment in enumerate(times):
        if not time.start <= moment <= time.stop:
            yield (*path, index), ValueMistake(f"{moment:g}", f"a time between start and stop, {time.span}")
    for index in read.ascending(times):
        yield (*path, index), ValueMistake(f"{times[index]:g} after {times[index - 1]:g}", "times in ascending order, each once")


@dataclass(frozen=True, kw_only=True)
class Precision:
    """`[plan.precision]`: members are added until the intervals of all headline numbers are as narrow as this; each key is for its kind."""

    quantiles: float | None = entry(
        "half-width of the interval as a fraction of the 5-95 % width",
        read.between(0, 1, "a fraction above 0, at most 1"),
        None,
        "not asked",
    )
    probabilities: float | None = entry(
        "half-width of the interval of a probability", read.between(0, 0.5, "a number above 0, at most 0.5"), None, "not asked"
    )
    indices: float | None = entry(
        "half-width of the interval of an index", read.between(0, 1, "a number above 0, at most 1"), None, "not asked"
    )

    def __post_init__(self) -> None:
        if self.quantiles is self.probabilities is self.indices is None:
            raise KeyMistake("a precision of nothing", "one or more of quantiles, probabilities, indices")


@dataclass(frozen=True, kw_only=True)
class AtMost:
    """`[plan.at_most]`: what may be spent on a precision; the answer reached by then is given."""

    solves: int | None = entry("members solved, those of the ranking too", read.whole(1), None, "no bound")
    minutes: float | None = entry("time of the run", read.between(0, 1e6, "a number above 0, at most 1e6"), None, "no bound")

    def __post_init__(self) -> None:
        if self.solves is self.minutes is None:
            raise KeyMistake("a bound on nothing", "one or both of solves, minutes")


PRECISION, AT_MOST = read_part(Precision), read_part(AtMost)


@dataclass(frozen=True, kw_only=True)
class Plan:
    """`[plan]`: what is asked, how many members answer it, and how the answers are given."""

    seed: int = entry("any non-negative whole number; the same seed gives the same draws", read.whole(0), 0)
    ask: tuple[str, ...] = entry(
        "questions to answer: " + ", ".join(QUESTIONS),
        read.listed(read.choice(QUESTIONS, QUESTIONS_LATER), "questions"),
        (),
        "what applies of them",
    )
    watch: tuple[str, ...] = entry("states and terms that get bands", read.listed(read.text, "names"), (), "every state")
    members: int = entry(
        "members behind bands, limits and outcomes; rounded up to a power of two, at least 512; with `precision` the most that may be used",
        read.whole(1),
        0,
        f"{MEMBERS}; with `at_most` no bound",
    )
    confidence: float = entry("confidence of every interval quoted", read.between(0, 1, "a number between 0 and 1"), 0.95)
    quantiles: tuple[float, ...] = entry(
        "levels of the quantiles",
        read.listed(read.between(0, 1, "a level between 0 and 1"), "levels"),
        (0.05, 0.25, 0.5, 0.75, 0.95),
        "[0.05, 0.25, 0.5, 0.75, 0.95]",
    )
    accuracy: float = entry("relative tolerance of the solver", read.between(0, 0.01, "a number above 0, at most 0.01"), 1e-6)
    solver: Solver = entry("explicit or stiff steps only, or by what every member needs", read.choice(SOLVERS), "auto")  # noqa: RUF009
    keep: int = entry("values kept exactly up to here", read.size, 512 * 10**6, '"512 MB"')
    failures: str = entry(
        "what failed members count as: on either side, not at all, or statements are withheld",
        read.choice(("bound", "exclude", "refuse")),
        "bound",
    )
    precision: Precision | None = entry("table of the precision asked, see below", PRECISION, None, "what `members` give")  # noqa: RUF009
    at_most: AtMost | None = entry("table of what may be spent on it, see below", AT_MOST, None, "no bound")  # noqa: RUF009

    def __post_init__(self) -> None:
        bounded = self.members > 0
        refuse(self.mistakes(bounded))
        if not bounded:
            object.__setattr__(self, "members", MEMBERS if self.at_most is None else MOST_MEMBERS)

    @property
    def members_open(self) -> bool:
        """Whether nobody said how many members there may be: what bounds the work is then `at_most`."""
        return self.precision is not None and self.members >= MOST_MEMBERS

    def mistakes(self, bounded: bool = True) -> Found:
        """What cannot stand in this table; `bounded`: the members were stated."""
        if self.precision is not None and self.at_most is None and not bounded:
            found = "a precision without a bound on the work"
            yield ("precision",), KeyMistake(found, "`members` in [plan], the most that may be used, or a table [plan.at_most]")
        if self.at_most is not None and self.precision is None:
            said = "a table [plan.precision] that it bounds"
            yield ("at_most",), KeyMistake("[plan.at_most] without a precision", said, "`members` alone says how many there are")
        if self.confidence >= 1:
            yield ("confidence",), ValueMistake("1", "a number between 0 and 1")
        if self.accuracy < 1e-13:
            yield ("accuracy",), ValueMistake(f"{self.accuracy:g}", "at least 1e-13", "numbers carry about 16 digits")
        if not self.quantiles:
            yield ("quantiles",), ValueMistake("an empty list", "one or more levels")
        for index, level in enumerate(self.quantiles):
            if level >= 1:
                yield ("quantiles", index), ValueMistake(f"{level:g}", "a level between 0 and 1")
        for index in read.ascending(self.quantiles):
            yield ("quantiles", index), ValueMistake(f"{self.quantiles[index]:g}", "levels in ascending order, each once")
        for key in ("ask", "watch"):
            names = getattr(self, key)
            for index, name in enumerate(names):
                if name in names[:index]:
                    yield (key, index), ValueMistake(f"{name} once more", "every name once")

"""What a run has done so far, added up from every block by whichever thread worked on it."""

from __future__ import annotations

import threading
from collections.abc import Callable
from dataclasses import astuple, dataclass

from uq.running.observer import Observer, Progress


@dataclass(frozen=True)
class Count:
    """What was done: solves, those of them that failed, failed ones among the A and B rows, steps of the solver and steps it refused,
    seconds of one core.
    """

    solves: int = 0
    failed: int = 0
    failed_members: int = 0
    steps: int = 0
    rejections: int = 0
    seconds: float = 0.0

    def __add__(self, other: Count) -> Count:
        return Count(*(one + another for one, another in zip(astuple(self), astuple(other), strict=True)))


class Meter:
    """Adds up counts and tells the observer; `total` solves are expected. The clock gives seconds from any beginning."""

    def __init__(self, total: int, observer: Observer, clock: Callable[[], float]) -> None:
        self._total, self._observer, self._clock = total, observer, clock
        self._begin = clock()
        self._lock = threading.Lock()
        self._sofar, self._found = Count(), 0
        self._pace = self._piloted = self._earlier = 0.0

    @property
    def sofar(self) -> Count:
        """Everything done until now, by earlier attempts as well."""
        return self._sofar

    @property
    def total(self) -> int:
        """The solves expected."""
        return self._total

    @property
    def seconds_per_solve(self) -> float:
        """Seconds of one core per solve, as measured so far: on blocks, before there are any on the pilot; 0 where nothing was done."""
        return self._sofar.seconds / self._sofar.solves if self._sofar.solves else self._pace

    @property
    def elapsed(self) -> float:
        """Seconds since the beginning, those of earlier attempts counted."""
        return self._earlier + self._clock() - self._begin

    def all_in(self, threads: int) -> float:
        """Seconds of one core per solve since the pilot, with all that is not solving: what a longer run costs by the solve."""
        return (self.elapsed - self._earlier - self._piloted) * threads / max(self._sofar.solves - self._found, 1)

    def now(self) -> float:
        """The clock's seconds."""
        return self._clock()

    def pace(self, count: Count) -> None:
        """The pilot is done: it does not count but tells how long a solve takes."""
        self._pace = count.seconds / count.solves if count.solves else 0.0
        self._piloted = self.elapsed - self._earlier

    def resume(self, count: Count, seconds: float) -> None:
        """An earlier attempt has done that, in so many seconds."""
        self._sofar += count
        self._found += count.solves
        self._earlier += seconds

    def expect(self, total: int) -> None:
        """So many solves are expected now."""
        self._total = total

    def add(self, count: Count) -> None:
        """One more block is done."""
        with self._lock:
            self._sofar += count
            # What earlier attempts did says nothing of the speed of this one.
            done, seconds = self._sofar.solves - self._found, self.elapsed - self._earlier
            self._observer.progress(Progress(self._sofar.solves, self._total, self._sofar.failed, seconds, done))

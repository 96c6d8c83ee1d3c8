"""The one hole through which a run tells how far it is and hears that it shall stop."""

from __future__ import annotations

from collections.abc import Sequence
from dataclasses import dataclass, field
from typing import Protocol, runtime_checkable

import numpy as np
from numpy.typing import NDArray


@dataclass(frozen=True)
class Progress:
    """How far a run is: solves done of all, those of them that failed, seconds of this attempt and solves done in it (None: all)."""

    done: int
    total: int
    failed: int
    seconds: float
    lately: int | None = None

    @property
    def share(self) -> float:
        """Between 0 and 1."""
        return self.done / self.total if self.total else 1.0

    @property
    def seconds_left(self) -> float | None:
        """At the speed so far; None before anything is done."""
        done = self.done if self.lately is None else self.lately
        return self.seconds * (self.total - self.done) / done if done else None


class Observer(Protocol):
    """Who watches a run. `stop` [1] is looked at within every step of the solver: setting `stop[0] = 1`, from any thread, ends the run.

    `stage` gets a few words when something that may take a moment begins; `progress` is called after every block, from the thread that
    worked on it, one call at a time.
    """

    stop: NDArray[np.uint8]

    def stage(self, words: str) -> None: ...

    def progress(self, progress: Progress) -> None: ...


@dataclass(frozen=True)
class HeadlineAnswer:
    """One headline number: its group and variable in result.nc, the place along its axis in words ("720", "0.95", an input's name, "" where
    there is none), value with the ends of its interval (nan where there is no number), unit, and whether it is as precise as asked (None
    where nothing was asked of its kind)."""

    group: str
    name: str
    place: str
    kind: str
    value: float
    low: float
    high: float
    unit: str
    settled: bool | None


@runtime_checkable
class Listener(Protocol):
    """An observer that also has a method `round` hears at the ends of rounds what is settled so far, from the run's main thread.

    With a precision after every round, as it is worked out anyway. Without one only where all telling together takes at most 2 % of the
    run's time, so not within its first seconds, and not after the last round, which the result itself tells of.
    """

    def round(self, members: int, answers: Sequence[HeadlineAnswer]) -> None: ...


@runtime_checkable
class Placed(Protocol):
    """An observer that also has a method `placed` hears where something has happened: the block, and the member where it is known."""

    def placed(self, words: str, block: str, member: str = "") -> None: ...


def tell_of(observer: Observer, words: str, block: str) -> None:
    """Tells of something that happened to a block."""
    if isinstance(observer, Placed):
        observer.placed(words, block)
    else:
        observer.stage(f"block {block}: {words}")


@dataclass
class Silent:
    """An observer that says nothing; `stop` works."""

    stop: NDArray[np.uint8] = field(default_factory=lambda: np.zeros(1, dtype=np.uint8))

    def stage(self, words: str) -> None:
        return

    def progress(self, progress: Progress) -> None:
        return

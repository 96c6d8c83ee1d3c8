"""The one hole through which a run tells how far it is and hears that it shall stop."""

from __future__ import annotations

from dataclasses import dataclass, field
from typing import Protocol

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


@dataclass
class Silent:
    """An observer that says nothing; `stop` works."""

    stop: NDArray[np.uint8] = field(default_factory=lambda: np.zeros(1, dtype=np.uint8))

    def stage(self, words: str) -> None:
        return

    def progress(self, progress: Progress) -> None:
        return

"""What is kept of a run that is not at its end, so that another process can go on with it.

Progress is a list of parts, each the tallies of the blocks done since the one before; none of them is ever written again. As sums combine
along the binary tree over rows, all of them read in any order give the bits of a run that was never stopped.
"""

from __future__ import annotations

import threading
from collections.abc import Callable, Mapping
from dataclasses import dataclass
from typing import Protocol

from uq.running.part import Gathering, Part, Parts, saved_of, together
from uq.store.saved import Saved

PART, PILOT = "part", "pilot"


class Keeper(Protocol):
    """Where arrays and facts are kept by name; a part that was kept is whole, and is never changed."""

    def keep(self, name: str, saved: Saved) -> None: ...

    def names(self) -> tuple[str, ...]: ...

    def kept(self, name: str) -> Saved | None: ...


class Forgetful:
    """Keeps nothing."""

    def keep(self, name: str, saved: Saved) -> None:
        return

    def names(self) -> tuple[str, ...]:
        return ()

    def kept(self, name: str) -> Saved | None:
        return None


class Alike:
    """A keeper that knows only what was made with the same: versions and processor, on which bits depend besides the study."""

    def __init__(self, keeper: Keeper, made_with: Mapping[str, str]) -> None:
        self._keeper, self._made_with = keeper, dict(made_with)
        self.strange = False

    def keep(self, name: str, saved: Saved) -> None:
        self._keeper.keep(name, Saved(saved.arrays, {**saved.facts, "made_with": self._made_with}))

    def names(self) -> tuple[str, ...]:
        return self._keeper.names()

    def kept(self, name: str) -> Saved | None:
        saved = self._keeper.kept(name)
        if saved is None or saved.facts.get("made_with") == self._made_with:
            return saved
        self.strange = True
        return None


@dataclass(frozen=True)
class Pace:
    """Seconds of work after which progress is kept: `within` at any time, `at_end` at the end of a round.

    A round's end waits longer where much is to be written, so that it costs at most `share` of the work since; bytes are written at about
    `rate` a second (measured with checksum, without waiting for the disk: 1.4 GB).
    """

    at_end: float = 1.0
    within: float = 20.0
    share: float = 0.03
    rate: float = 500e6

    def due(self, since: float, written: int = 0, ended: bool = False) -> bool:
        """Whether to keep what was done, so many seconds after the last time; `written`: bytes that this takes."""
        return since >= self.within or (ended and since >= self.at_end + written / self.rate / self.share)


USUAL = Pace()


class Checkpoints:
    """Gathers the parts of a round as threads bring them, and hands them to the keeper now and then, from the thread that brought one.

    clock: seconds of the run, those of earlier attempts counted.
    """

    def __init__(self, keeper: Keeper, clock: Callable[[], float], pace: Pace = USUAL) -> None:
        self._keeper, self._clock, self._pace = keeper, clock, pace
        self._gathering = Gathering()
        self._writing = threading.Lock()
        self._taken: list[Parts] = []
        self._unkept: list[tuple[int, Parts]] = []
        self._round, self._last = 0, clock()
        numbers = [int(name.partition("-")[0]) for name in keeper.names() if name.partition("-")[0].isdigit()]
        self._number = 1 + max(numbers, default=-1)

    def begin(self, number: int, found: Parts) -> None:
        """A round begins, of which an earlier attempt has done `found`."""
        self._round, self._taken = number, [found]

    def brought(self, name: str, part: Part) -> None:
        """A thread has done one more block of a branch; it may have to write down what was gathered."""
        self._gathering.add(name, part)
        if self._pace.due(self._clock() - self._last) and self._writing.acquire(blocking=False):
            try:
                self._write()
            finally:
                self._writing.release()

    def end(self) -> dict[str, Part]:
        """The round is done: all its parts together."""
        with self._writing:
            self._take()
            if self._pace.due(self._clock() - self._last, sum(part.bytes for _, parts in self._unkept for part in parts.values()), True):
                self._write()
        return together(self._taken)

    def flush(self) -> bool:
        """Writes down all that was gathered; whether anything is kept of this run, now or before."""
        with self._writing:
            self._write()
        return any(name.endswith(PART) for name in self._keeper.names())

    def _take(self) -> None:
        parts = self._gathering.take()
        if parts:
            # Histograms of little work take as much memory as those of much: all that is done in this round is one part.
            self._taken = [together((*self._taken, parts))]
            self._unkept.append((self._round, parts))

    def _write(self) -> None:
        self._take()
        for number, parts in self._unkept:
            self._keeper.keep(f"{self._number:06}-{PART}", saved_of(parts, {"round": number, "seconds": self._clock()}))
            self._number += 1
        self._unkept, self._last = [], self._clock()

"""What a runner hears of the run it makes: kept for the next heartbeat, and logged now and then."""

from __future__ import annotations

from collections.abc import Callable, Mapping, Sequence
from typing import TYPE_CHECKING, Any

from uq.queue.logs import Log
from uq.running.observer import Progress, Silent

if TYPE_CHECKING:
    from uq.running.observer import HeadlineAnswer
    from uq.study.study import Study

# Seconds between two lines of the log that only say how far the run is.
LOGGED_EVERY = 60.0


class Watch(Silent):
    """An observer that remembers. clock: epoch seconds; settled: the headline answers that an earlier attempt has told of."""

    def __init__(self, log: Log, clock: Callable[[], float], settled: Sequence[Mapping[str, Any]] = ()) -> None:
        super().__init__()
        self._log, self._clock = log, clock
        self._stage = "starting"
        self._latest: Progress | None = None
        self.settled: tuple[Mapping[str, Any], ...] = tuple(settled)
        self.study: Study | None = None
        self._logged = clock()

    def stage(self, words: str) -> None:
        self._stage = words
        self._log(words)

    def placed(self, words: str, block: str, member: str = "") -> None:
        self._log(words, block, member)

    def progress(self, progress: Progress) -> None:
        now = self._clock()
        self._latest = progress
        # A clock that was set back must not silence the log.
        if not 0 <= now - self._logged < LOGGED_EVERY:
            self._logged = now
            self._log(f"{progress.done} of {progress.total} solves, {progress.failed} failed")

    def round(self, members: int, answers: Sequence[HeadlineAnswer]) -> None:
        from uq.report.kept import kept_so_far

        if self.study is not None:
            self.settled = tuple(answer.as_json() for answer in kept_so_far(self.study, answers, members))

    def told(self) -> dict[str, Any]:
        """What is kept with the job. stage: what the run is doing; settled: headline answers so far; done, total, failed: solves;
        seconds, lately: of this attempt, and the solves done in it; seconds_left at that speed."""
        told: dict[str, Any] = {"stage": self._stage, "settled": list(self.settled)}
        if (latest := self._latest) is not None:
            told |= {name: getattr(latest, name) for name in ("done", "total", "failed", "seconds", "lately", "seconds_left")}
        return told

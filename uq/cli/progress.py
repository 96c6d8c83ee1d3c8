"""How far a run is, on standard error: a moving line on a terminal, else a plain line now and then."""

from __future__ import annotations

import os
import signal
import sys
import time
from collections.abc import Iterator
from contextlib import contextmanager
from types import FrameType
from typing import TYPE_CHECKING

from uq.cli.say import err
from uq.cli.settings import animated
from uq.running.observer import Observer, Progress, Silent

if TYPE_CHECKING:
    from rich.progress import Progress as Bar
    from rich.progress import TaskID

# Without a terminal the lines end up in a log: rare enough not to fill it.
PLAIN_EVERY = 10.0


@contextmanager
def watching() -> Iterator[Silent]:
    """An observer for one run, drawn on standard error."""
    if not animated(os.environ, sys.stderr.isatty()):
        yield Lines()
        return
    from rich.console import Console
    from rich.progress import BarColumn, MofNCompleteColumn, TextColumn
    from rich.progress import Progress as Bar

    # rich itself honours NO_COLOR.
    columns = (TextColumn("{task.description}"), BarColumn(), MofNCompleteColumn(), TextColumn("{task.fields[left]}"))
    with Bar(*columns, console=Console(stderr=True), transient=True) as bar:
        yield Moving(bar)


@contextmanager
def stopping(observer: Observer) -> Iterator[None]:
    """While this lasts Ctrl-C also sets the observer's stop flag: libraries that call back into Python may swallow the exception."""

    def pressed(number: int, frame: FrameType | None) -> None:
        observer.stop[0] = 1
        signal.default_int_handler(number, frame)

    before = signal.signal(signal.SIGINT, pressed)
    try:
        yield
    finally:
        signal.signal(signal.SIGINT, before)


class Moving(Silent):
    """A bar that moves, with the time left."""

    def __init__(self, bar: Bar) -> None:
        super().__init__()
        self._bar = bar
        self._task: TaskID | None = None

    def stage(self, words: str) -> None:
        if self._task is None:
            self._bar.console.print(f"uq: {words}", highlight=False, markup=False)
        else:
            self._bar.update(self._task, description=words, left="")

    def progress(self, progress: Progress) -> None:
        if self._task is None:
            self._task = self._bar.add_task("solving", total=progress.total, left="")
        # With a precision the total is that of the round.
        self._bar.update(self._task, completed=progress.done, total=progress.total, left=words_of(progress))


class Lines(Silent):
    """A plain line at most every PLAIN_EVERY seconds."""

    _told = 0.0

    def stage(self, words: str) -> None:
        err(f"uq: {words}")

    def progress(self, progress: Progress) -> None:
        now = time.monotonic()
        self._told = self._told or now
        if now - self._told >= PLAIN_EVERY:
            self._told = now
            err(f"uq: {progress.done} of {progress.total} solves, {words_of(progress)}")


def words_of(progress: Progress) -> str:
    """Time left, and failed members where there are any."""
    from uq.report.spoken import duration

    left = progress.seconds_left
    words = "" if left is None else f"{duration(round(left))} left"
    return f"{words}, {progress.failed} failed" if progress.failed else words

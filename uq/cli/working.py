"""`uq work`: the runner, and how signals reach it."""

from __future__ import annotations

import os
import signal
import socket
from collections.abc import Iterator
from contextlib import contextmanager, suppress
from pathlib import Path
from types import FrameType
from typing import TYPE_CHECKING

import typer

from uq.cli.numbers import the_queue
from uq.cli.say import err
from uq.errors import EXIT_INTERRUPTED

if TYPE_CHECKING:
    from uq.queue.bell import Bell


def work_off(cluster: str | None, threads: int, once: bool) -> None:
    """Works off the queue until it is told to end; exit code 6 where a job was given back unfinished."""
    from uq.queue.bell import Bell
    from uq.queue.runner import Means, Runner

    check_cluster(cluster)
    bell = Bell()
    with rung_by_signals(bell):
        runner = Runner(the_queue(), f"{socket.gethostname()}:{os.getpid()}", bell, tell, Means(threads, cluster))
        unfinished = runner.work(once)
    bell.close()
    if unfinished:
        err("uq: ended; the job was given back with what it has done, and the next runner goes on with it")
        raise typer.Exit(EXIT_INTERRUPTED)


def check_cluster(cluster: str | None) -> None:
    """Raises UseMistake or StudyError before any job is begun where a cluster, or its file, cannot stand."""
    from uq.running.named import named

    what = named(cluster)
    if what.kind == "file":
        from uq.running.batch import read_batch_system

        read_batch_system(Path(what.text))


@contextmanager
def rung_by_signals(bell: Bell) -> Iterator[None]:
    """While this lasts SIGTERM and Ctrl-C ring the bell; Ctrl-C pressed again ends at once, as far as libraries allow it."""

    def told(number: int, frame: FrameType | None) -> None:
        if bell.rung and number == signal.SIGINT:
            signal.default_int_handler(number, frame)
        bell.ring()

    before = {number: signal.signal(number, told) for number in (signal.SIGINT, signal.SIGTERM)}
    try:
        yield
    finally:
        for number, handler in before.items():
            signal.signal(number, handler)


def tell(text: str) -> None:
    """A line on standard error; where nobody can read it any more the work goes on."""
    with suppress(OSError, ValueError):
        err(text)

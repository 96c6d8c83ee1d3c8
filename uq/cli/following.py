"""`uq follow`: a job's progress and what is settled of it, until it ends."""

from __future__ import annotations

import time
from typing import TYPE_CHECKING, Any

import typer

from uq.cli.numbers import the_queue
from uq.cli.progress import watching
from uq.cli.running import finished
from uq.cli.say import err
from uq.cli.showing import columns
from uq.errors import EXIT_DEFECT, EXIT_INTERRUPTED, EXIT_PRECISION
from uq.running.observer import Progress, Silent

if TYPE_CHECKING:
    from uq.queue.job import Job

# Seconds between two looks at the queue.
LOOK = 1.0
# A job that stands here goes no further by itself.
AT_REST = frozenset(("done", "partial", "failed", "cancelled", "paused"))


def follow_job(number: int, json: bool) -> None:
    """Tells how far a job is until it ends; then what its result says, with the exit code that `uq run` would have had."""
    queue = the_queue()
    job = queue.job(number)
    try:
        with watching() as observer:
            teller = Teller(observer)
            teller.tell(job)
            while job.state not in AT_REST:
                time.sleep(LOOK)
                job = queue.job(number)
                teller.tell(job)
    except KeyboardInterrupt:
        err(f"uq: no longer followed; job {number} goes on as it was ({job.state})")
        raise typer.Exit(EXIT_INTERRUPTED) from None
    _ended(job, json)


class Teller:
    """Tells what is new of a job: its state, what its run is doing, how far it is, what is settled."""

    def __init__(self, observer: Silent) -> None:
        self._observer = observer
        self._said = self._stage = ""
        self._settled: list[Any] = []

    def tell(self, job: Job) -> None:
        """What is new since the last time."""
        self._state(job)
        if job.state not in ("running", "pausing"):
            return
        told = job.progress
        if stage := str(told.get("stage", "")):
            if stage != self._stage:
                self._observer.stage(stage)
            self._stage = stage
        if told.get("done"):
            self._observer.progress(Progress(*(told[name] for name in ("done", "total", "failed", "seconds", "lately"))))
        if (settled := list(told.get("settled", ()))) != self._settled:
            self._settled = settled
            self._so_far(settled)

    def _state(self, job: Job) -> None:
        from uq.report.jobs import Now, stands

        words = f"job {job.number} ({job.name}) {job.state}"
        if job.state in ("waiting", "held", "paused", "cancelled", "failed"):
            about = stands(job, Now(time.time()))
            words += f": {about}" if about else ": `uq work` takes it up" if job.state == "waiting" else ""
        if words != self._said:
            err(f"uq: {words}")
        self._said = words

    def _so_far(self, settled: list[Any]) -> None:
        from uq.report.batches import settling
        from uq.report.kept import of_json
        from uq.report.plain import laid

        for line in laid(settling(of_json(each) for each in settled), columns()):
            err(line)


def _ended(job: Job, json: bool) -> None:
    """What is said of a job that goes no further; exit codes as of `uq run`, 6 where it can be gone on with."""
    if job.state in ("done", "partial") and job.folder is not None:
        from uq.store.open import open_result

        finished(open_result(job.folder), json)
        if job.state == "partial":
            err(f"uq: {job.reason}")
            raise typer.Exit(EXIT_PRECISION)
        return
    if job.state == "failed":
        raise typer.Exit(int(job.progress.get("exit_code") or EXIT_DEFECT))
    err(f"uq: `uq {'resume' if job.state == 'paused' else 'retry'} {job.number}` goes on with it")
    raise typer.Exit(EXIT_INTERRUPTED)

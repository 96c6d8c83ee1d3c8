"""The queue as the commands open it, and results named by the number of their job."""

from __future__ import annotations

import os
from pathlib import Path
from typing import TYPE_CHECKING

from uq.cli.say import err
from uq.cli.settings import state_folder
from uq.errors import UseMistake

if TYPE_CHECKING:
    from uq.queue.job import Job
    from uq.queue.queue import Queue


def the_queue() -> Queue:
    """The queue of this user."""
    from uq.queue.queue import Queue

    return Queue(state_folder(os.environ))


def is_number(path: Path) -> bool:
    """Whether an argument is the number of a job rather than a path: a file or folder that is there is always a path."""
    return str(path).isdecimal() and not path.exists()


def result_of(path: Path) -> Path:
    """The run folder meant by an argument: the path itself, or that of the job of this number. Raises UseMistake where it has no result."""
    if not is_number(path):
        return path
    job = the_queue().job(int(str(path)))
    if job.state in ("done", "partial") and job.folder is not None:
        return job.folder
    earlier = earlier_answer(job)
    if earlier is None:
        raise UseMistake(
            f"job {job.number}, which is {job.state}", "a job that has a result", f"`uq follow {job.number}` says how far it is"
        )
    err(f"uq: job {job.number} is {job.state}; this is the answer that it gave before, in attempt {earlier.name.rpartition('-')[2]}")
    return earlier


def earlier_answer(job: Job) -> Path | None:
    """The run folder of the last attempt at a job that left a result, as one does that its deadline cut short; None where none did."""
    from uq.store.folder import RESULT

    if job.folder is None:
        return None
    folders = (job.folder.with_name(f"attempt-{attempt}") for attempt in range(job.attempt, 0, -1))
    return next((folder for folder in folders if (folder / RESULT).is_file()), None)

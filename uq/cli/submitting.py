"""`uq submit`: a study, or every run of a batch, into the queue."""

from __future__ import annotations

import time
from collections.abc import Sequence
from dataclasses import dataclass, replace
from pathlib import Path
from typing import TYPE_CHECKING, Any

from uq.cli.numbers import the_queue
from uq.cli.say import err, out
from uq.errors import UseMistake, ValueMistake
from uq.queue.deciding import CUT_SHORT

if TYPE_CHECKING:
    from uq.clock import When
    from uq.queue.job import Job, Submitted
    from uq.study.batch import Batch, Planned

# Of more jobs than this only the first and the last are named.
MOST_NAMED = 20


@dataclass(frozen=True)
class Wishes:
    """What is asked for beside the study; it takes the place of what a batch says. Times as typed, "" where none is."""

    again: bool = False
    priority: int | None = None
    not_before: str = ""
    deadline: str = ""


def submit_file(path: Path, wishes: Wishes, json: bool) -> None:
    """Hands in the study or the batch at `path` and prints the numbers of its jobs."""
    from uq.queue.intake import Terms, intake_of, intakes_of
    from uq.study.batch import is_batch, read_batch
    from uq.study.read import read_study

    now = time.time()
    times = _when("--not-before", wishes.not_before), _when("--deadline", wishes.deadline)
    if is_batch(path):
        intakes = intakes_of(of_batch(read_batch(path), wishes, times), now)
    else:
        study = read_study(path)
        for warning in study.warnings:
            err(f"uq: {warning}")
        intakes = [intake_of(study, now, Terms(priority=wishes.priority, not_before=times[0], deadline=times[1]))]
    if any(each.deadline is not None and each.deadline <= now for each in intakes):
        which = f'the deadline "{wishes.deadline}"' if wishes.deadline else f"a deadline in {path}"
        raise UseMistake(f"{which}, which is over", "a time to come", key="--deadline" if wishes.deadline else "deadline")
    queue = the_queue()
    submitted = queue.submit(intakes, wishes.again)
    if json:
        from json import dumps

        out(dumps({"schema": 1, "jobs": [machine(each) for each in submitted]}, indent=1))
        return
    told(submitted, [queue.job(each.job) for each in submitted], now, intakes[0].batch if intakes else "")


def machine(submitted: Submitted) -> dict[str, Any]:
    """What became of a study that was handed in, for programs."""
    return {"number": submitted.job, "new": submitted.new, "taken_over": list(submitted.taken), "retried": submitted.retried}


def _when(key: str, text: str) -> When | None:
    from uq.clock import When

    try:
        return When(text) if text else None
    except ValueMistake as mistake:
        raise UseMistake(mistake.found, mistake.expected, mistake.remedy or 'or with its day, "2030-01-31 06:00"', key=key) from None


def of_batch(batch: Batch, wishes: Wishes, times: tuple[When | None, When | None]) -> Batch:
    """The batch with what is asked for in place of what its runs say."""
    not_before, deadline = times

    def wished(each: Planned) -> Planned:
        priority = each.priority if wishes.priority is None else wishes.priority
        return replace(each, priority=priority, not_before=not_before or each.not_before, deadline=deadline or each.deadline)

    return replace(batch, planned=tuple(wished(each) for each in batch.planned))


def told(submitted: Sequence[Submitted], jobs: Sequence[Job], now: float, batch: str) -> None:
    """What became of what was handed in, as a batch or "", and what to do next."""
    from uq.report.jobs import Now, called, stands

    lines = []
    for each, job in zip(submitted, jobs, strict=True):
        about = stands(job, Now(now))
        line = f"job {job.number} ({called(job)}) {job.state}" + (f": {about}" if about else "")
        lines.append(line if each.new else f"{line}; {before(each, job)}")
    if len(lines) > MOST_NAMED:
        lines = [*lines[: MOST_NAMED // 2], f"... {len(lines) - MOST_NAMED} more", *lines[-MOST_NAMED // 2 :]]
    if len(submitted) > 1:
        lines.append(f"{len(submitted)} jobs, {sum(each.new for each in submitted)} of them new")
    out("\n".join(lines))
    done = all(job.state == "done" for job in jobs)
    look = f"uq jobs --batch {batch}" if len(jobs) > 1 and batch else f"uq {'show' if done else 'follow'} {jobs[0].number}"
    out(f"Next: {'' if done else 'uq work      '}{look}")


def before(each: Submitted, job: Job) -> str:
    """What is said of a job that was there already."""
    told = ["handed in before"]
    if each.retried:
        told.append("its deadline had cut it short, and it goes on from what is kept")
    if each.taken:
        told.append(
            f"its {' and '.join(name.replace('_', ' ') for name in each.taken)} {'is' if len(each.taken) == 1 else 'are'} now as stated"
        )
    if job.state == "partial":
        deadline = " (or another --deadline)" if job.reason == CUT_SHORT else ""
        told.append(f"`uq retry {job.number}`{deadline} goes on with it")
    if job.state in ("done", "partial"):
        told.append("--again makes a new one")
    return "; ".join(told)

"""`uq jobs`, and what a user may ask of a job: pause, resume, cancel, retry; `uq clean`."""

from __future__ import annotations

import os
import re
import time
from pathlib import Path

from uq.cli.numbers import the_queue
from uq.cli.say import err, out
from uq.cli.showing import columns
from uq.errors import UseMistake

SECONDS = {"s": 1.0, "min": 60.0, "h": 3600.0, "d": 86400.0, "": 86400.0}
SPAN = re.compile(r"(\d+(?:\.\d+)?)\s*(s|min|h|d|)")


def list_jobs(batch: str | None, table: bool, json: bool) -> None:
    """Prints all jobs or those of a batch; table: every batch as a table of answers against what was changed."""
    from uq.report.jobs import Now

    queue, now = the_queue(), Now(time.time())
    known = queue.batches()
    if batch is not None and batch not in known:
        expected = "the name of a batch" + (f", one of {', '.join(known)}" if known else "")
        remedy = "a batch is called as its file, without ending"
        if batch.isdecimal():
            remedy = f"of job {batch} `uq follow {batch}` says how it stands, `uq show {batch}` what came out"
        raise UseMistake(f"`{batch}`", expected, remedy, key="BATCH")
    if json:
        from json import dumps

        from uq.report.jobs import jobs_json

        out(dumps(jobs_json(queue.jobs(batch), now), indent=1, allow_nan=False))
    elif table:
        from uq.report.batches import batches_text

        names = known if batch is None else {batch: known[batch]}
        out(batches_text({(name, title): queue.jobs(name) for name, title in names.items()}, now, columns()))
    else:
        from uq.report.jobs import jobs_text

        out(jobs_text(queue.jobs(batch), now, columns()))


def ask(what: str, numbers: list[int]) -> None:
    """Asks for the same of some jobs; every one that it cannot be asked of is told, the others are done."""
    from uq.report.jobs import Now, stands

    queue = the_queue()
    refused = []
    for number in numbers:
        try:
            job = getattr(queue, what)(number)
        except UseMistake as mistake:
            refused.append(mistake)
            continue
        about = stands(job, Now(time.time()))
        out(f"job {number} ({job.name}) {job.state}" + (f": {about}" if about else ""))
    for each in refused[:-1]:
        err(f"uq: {each}")
    if refused:
        raise refused[-1]


def clean_up(older_than: str, yes: bool) -> None:
    """Says which ended jobs, with their results, ended so long ago, and how much room they take; with `yes` takes them away."""
    from uq.queue.states import ENDED
    from uq.report.jobs import Now, called

    span, queue, now = seconds_in(older_than), the_queue(), Now(time.time())
    old = [job for job in queue.jobs(states=ENDED) if job.ended is not None and job.ended <= now.time - span]
    if yes:
        gone = set(queue.clean(span))
        out(f"{len(gone)} of {len(old)} jobs taken away, with their results")
        return
    every = 0
    for job in old:
        size = size_of(queue.folders.job(job.number))
        every += size
        out(f"job {job.number} ({called(job)}) {job.state}, ended {now.at(job.ended or 0.0)}, {megabytes(size)}")
    out(f"{len(old)} jobs ended more than {older_than} ago and take {megabytes(every)}; nothing was taken away")
    if old:
        out(f"Next: uq clean --older-than {older_than} --yes")


def seconds_in(text: str) -> float:
    """The seconds of a span of time: 30d, 12h, 90min. Raises UseMistake."""
    found = SPAN.fullmatch(text.strip())
    if found is None:
        raise UseMistake(f"`{text}`", "a span of time such as 30d, 12h or 90min", key="--older-than")
    return float(found[1]) * SECONDS[found[2]]


def size_of(folder: Path) -> int:
    """The bytes of all files below a folder; those that go meanwhile do not count."""
    return sum(_size(Path(place, name)) for place, _, names in os.walk(folder) for name in names)


def _size(file: Path) -> int:
    try:
        return file.stat().st_size
    except OSError:
        return 0


def megabytes(size: int) -> str:
    """Bytes as they are told."""
    return f"{size / 1e6:.1f} MB"

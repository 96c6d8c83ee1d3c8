"""The commands on the queue. Each reads its arguments and makes one call; what is heavy is imported inside."""

from __future__ import annotations

from pathlib import Path
from typing import Annotated

import typer

from uq.cli.say import telling

Json = Annotated[bool, typer.Option("--json", help="Print the machine form (JSON) instead of the text.")]
JobNumber = Annotated[int, typer.Argument(metavar="JOB", min=1, help="The number of a job.", show_default=False)]
JobNumbers = Annotated[list[int], typer.Argument(metavar="JOB...", min=1, help="Numbers of jobs.", show_default=False)]
WHEN = '"22:30", or "2030-01-31 06:00"'


def submit(
    study: Annotated[Path, typer.Argument(metavar="STUDY|BATCH", help="A study file, or a batch of them (TOML).", show_default=False)],
    again: Annotated[bool, typer.Option("--again", help="A new job, also where an equal one is there.")] = False,
    priority: Annotated[
        int | None, typer.Option("--priority", metavar="N", help="Larger ones are run first; default 0.", show_default=False)
    ] = None,
    not_before: Annotated[str, typer.Option("--not-before", metavar="T", help=f"Hold the job until then: {WHEN}.")] = "",
    deadline: Annotated[str, typer.Option("--deadline", metavar="T", help=f"Give the answer so far then: {WHEN}.")] = "",
    json: Json = False,
) -> None:
    """Hand in a study, or every run of a batch; it is taken in with the files it names, and later edits change nothing."""
    with telling():
        from uq.cli.submitting import Wishes, submit_file

        submit_file(study, Wishes(again, priority, not_before, deadline), json)


def jobs(
    batch: Annotated[str | None, typer.Argument(metavar="[BATCH]", help="Only those of this batch.", show_default=False)] = None,
    table: Annotated[bool, typer.Option("--batch", help="Every batch as a table: what was changed against what came out.")] = False,
    json: Json = False,
) -> None:
    """List the jobs and how they stand."""
    with telling():
        from uq.cli.asking import list_jobs

        list_jobs(batch, table, json)


def follow(job: JobNumber, json: Json = False) -> None:
    """Follow a job until it ends, then print what its result says; the exit code is that of the run."""
    with telling():
        from uq.cli.following import follow_job

        follow_job(job, json)


def pause(job: JobNumbers) -> None:
    """Stop jobs for now; what is done is kept."""
    with telling():
        from uq.cli.asking import ask

        ask("pause", job)


def resume(job: JobNumbers) -> None:
    """Let paused jobs go on."""
    with telling():
        from uq.cli.asking import ask

        ask("resume", job)


def cancel(job: JobNumbers) -> None:
    """End jobs without a result."""
    with telling():
        from uq.cli.asking import ask

        ask("cancel", job)


def retry(job: JobNumbers) -> None:
    """Let jobs that failed, were cancelled or cut short go on from what is kept."""
    with telling():
        from uq.cli.asking import ask

        ask("retry", job)


def work(
    cluster: Annotated[
        str | None,
        typer.Option("--cluster", metavar="WHERE", help="local[:N], tcp://HOST:PORT or FILE.toml; default: threads.", show_default=False),
    ] = None,
    threads: Annotated[int, typer.Option("--threads", min=0, help="Threads to solve with; 0 takes all cores.")] = 0,
    once: Annotated[bool, typer.Option("--once", help="End when nothing is due any more.")] = False,
) -> None:
    """Work off the queue, until it is told to end (Ctrl-C, SIGTERM); as many may work as one likes."""
    with telling():
        from uq.cli.working import work_off

        work_off(cluster, threads, once)


def clean(
    older_than: Annotated[str, typer.Option("--older-than", metavar="SPAN", help="Such as 30d, 12h.")] = "30d",
    yes: Annotated[bool, typer.Option("--yes", help="Take them away; without it they are only listed.")] = False,
) -> None:
    """Take away jobs that ended long ago, with their results; says first which."""
    with telling():
        from uq.cli.asking import clean_up

        clean_up(older_than, yes)


# In the order in which they are listed.
COMMANDS = (submit, jobs, follow, pause, resume, cancel, retry, work, clean)

"""`uq run`: reads, runs, writes, tells, and keeps the measured speed for later estimates."""

from __future__ import annotations

import os
from pathlib import Path

import typer

from uq.cli import speeds
from uq.cli.progress import stopping, watching
from uq.cli.say import err, out
from uq.cli.settings import state_folder
from uq.cli.showing import told
from uq.errors import EXIT_WITHHELD


def run_study(path: Path, output: Path | None, threads: int, seed: int | None, json: bool) -> None:
    """Runs the study at `path` and prints what the result says; exit code 4 where statements were withheld."""
    from uq.study.read import read_study

    study = read_study(path)
    if seed is not None:
        study = study.with_changes({"plan.seed": seed})
    for warning in study.warnings:
        err(f"uq: {warning}")
    with watching() as observer, stopping(observer):
        from uq.pipeline import run

        result = run(study, output, threads=threads, observer=observer)
    folder = state_folder(os.environ)
    cost = float(result.attributes["seconds_per_solve"])
    speeds.store(folder, speeds.with_measured(speeds.load(folder), speeds.model_of(study), cost))
    out(told(result, json))
    if withheld(result.attributes):
        err("uq: statements were withheld because members failed; the result was written all the same")
        raise typer.Exit(EXIT_WITHHELD)


def withheld(facts: dict[str, object]) -> bool:
    """Whether a result keeps its statements back: failed members under the policy `refuse`."""
    return facts["failures"] == "refuse" and bool(facts["solves_failed"])

"""`uq run`: reads, runs, writes, tells, and keeps the measured speed for later estimates."""

from __future__ import annotations

import os
from collections.abc import Mapping
from pathlib import Path
from typing import TYPE_CHECKING, Any

import typer

from uq.cli import speeds
from uq.cli.progress import stopping, watching
from uq.cli.say import err, out, typed
from uq.cli.settings import state_folder
from uq.cli.showing import told
from uq.errors import EXIT_PRECISION, EXIT_WITHHELD

if TYPE_CHECKING:
    from uq.store.result import Result


def run_study(path: Path, output: Path | None, threads: int, seed: int | None, json: bool) -> None:
    """Runs the study at `path` and prints what the result says; exit code 4 where statements were withheld, 5 where it is not as precise
    as asked."""
    from uq.study.read import read_study

    study = read_study(path)
    if seed is not None:
        study = study.with_changes({"plan.seed": seed})
    for warning in study.warnings:
        err(f"uq: {warning}")
    with watching() as observer, stopping(observer):
        from uq.pipeline import run
        from uq.running.start import Start

        result = run(study, output, threads=threads, observer=observer, start=Start(command=typed()))
    folder = state_folder(os.environ)
    cost = float(result.attributes["seconds_per_solve"])
    speeds.store(folder, speeds.with_measured(speeds.load(folder), speeds.model_of(study), cost))
    finished(result, json)


def finished(result: Result, json: bool) -> None:
    """Prints what a new result says; exit codes 4 and 5 as above."""
    out(told(result, json))
    if withheld(result.attributes):
        err("uq: statements were withheld because members failed; the result was written all the same")
        raise typer.Exit(EXIT_WITHHELD)
    if spent := unreached(result):
        err(f"uq: the precision asked was not reached within the {spent} it may spend; the result was written all the same")
        raise typer.Exit(EXIT_PRECISION)


def withheld(facts: Mapping[str, object]) -> bool:
    """Whether a result keeps its statements back: failed members under the policy `refuse`."""
    return facts["failures"] == "refuse" and bool(facts["solves_failed"])


def unreached(result: Result) -> str:
    """What a run has spent without reaching the precision asked: members, solves or minutes; "" where it reached it, or none was asked."""
    found = result.findings.get("precision")
    facts: Mapping[str, Any] = found.attributes if found else {}
    return "" if facts.get("reached", 1) else str(facts["stopped"])

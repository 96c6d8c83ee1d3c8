"""`uq run`: reads, runs, writes, tells, and keeps the measured speed for later estimates."""

from __future__ import annotations

import os
from dataclasses import dataclass
from pathlib import Path
from typing import TYPE_CHECKING

import typer

from uq.cli import speeds
from uq.cli.progress import stopping, watching
from uq.cli.say import err, out, typed
from uq.cli.settings import state_folder
from uq.cli.showing import told
from uq.errors import EXIT_PRECISION, EXIT_WITHHELD, StorageError, UseMistake

if TYPE_CHECKING:
    from uq.store.result import Result
    from uq.study.study import Study


@dataclass(frozen=True)
class Asked:
    """How a run is asked for: threads or a cluster, a seed of its own, whether to solve again what is done, the machine form."""

    threads: int = 0
    seed: int | None = None
    again: bool = False
    json: bool = False
    cluster: str | None = None


def run_study(path: Path, output: Path | None, asked: Asked) -> None:
    """Runs the study at `path` and prints what the result says; exit code 4 where statements were withheld, 5 where it is not as precise
    as asked or was stopped before it had all its members. A whole result of the same study (seed, members and version of uq too) that is
    there already is shown, and nothing is solved."""
    from uq.study.read import read_study

    study = read_study(path)
    if asked.seed is not None:
        study = study.with_changes({"plan.seed": asked.seed})
    for warning in study.warnings:
        err(f"uq: {warning}")
    if not asked.again and (there := done_already(study, output)):
        err(f"uq: this study is done already, its result is in {there.folder}; nothing was solved (--again solves it once more)")
        finished(there, asked.json)
        return
    with watching() as observer, stopping(observer):
        from uq.pipeline import run
        from uq.running.start import Start

        start = Start(command=typed())
        result = run(study, output, threads=asked.threads, observer=observer, start=start, cluster=asked.cluster)
    if asked.cluster is None:
        folder = state_folder(os.environ)
        cost = float(result.attributes["seconds_per_solve"])
        speeds.store(folder, speeds.with_measured(speeds.load(folder), speeds.model_of(study), cost))
    finished(result, asked.json)


def done_already(study: Study, output: Path | None) -> Result | None:
    """The undamaged result of this very study, with all its members, in the folder where its run would write; None where there is none."""
    from uq.store.folder import RESULT, default_folder
    from uq.store.open import open_result

    folder = output or default_folder(study)
    if not (folder / RESULT).is_file():
        return None
    try:
        there = open_result(folder)
    except StorageError:
        return None
    whole = there.attributes.get("stopped") != "deadline"
    return there if whole and there.attributes["study_fingerprint"] == study.fingerprint else None


def show_script(cluster: str | None) -> None:
    """Prints what would be submitted to the batch system of a cluster file."""
    from uq.running.batch import read_batch_system, script
    from uq.running.named import named

    what = named(cluster)
    if what.kind != "file":
        raise UseMistake("--show-script without a cluster file", "--cluster FILE.toml", key="--show-script")
    out(script(read_batch_system(Path(what.text))))


def finished(result: Result, json: bool) -> None:
    """Prints what a new result says; exit codes 4 and 5 as above."""
    from uq.report.ended import unreached
    from uq.report.headline import headline
    from uq.report.withheld import withheld

    out(told(result, json))
    if withheld(result, headline(result)):
        err("uq: statements were withheld because members failed; the result was written all the same")
        raise typer.Exit(EXIT_WITHHELD)
    if result.attributes.get("stopped") == "deadline":
        facts = result.attributes
        err(f"uq: the run was stopped after {facts['members']} of {facts['members_asked']} members; this is the answer so far")
        raise typer.Exit(EXIT_PRECISION)
    if spent := unreached(result):
        err(f"uq: the precision asked was not reached within the {spent} it may spend; the result was written all the same")
        raise typer.Exit(EXIT_PRECISION)

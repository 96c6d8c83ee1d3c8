"""The whole flow on one page; it has no logic of its own.

In: a study, or results. Out: a run folder, read back as a result; results compared. Must not know: how any step works.
"""

from __future__ import annotations

import os
from collections.abc import Mapping, Sequence
from dataclasses import replace
from pathlib import Path
from typing import TYPE_CHECKING

if TYPE_CHECKING:
    from uq.report.compare import Comparison
    from uq.running.observer import Observer
    from uq.running.rounds import Crew
    from uq.running.start import Start
    from uq.store.result import Result
    from uq.study.study import Study


def run(
    study: Study | str | os.PathLike[str],
    folder: str | os.PathLike[str] | None = None,
    *,
    threads: int = 0,
    observer: Observer | None = None,
    block_rows: int = 0,
    start: Start | None = None,
    cluster: str | os.PathLike[str] | None = None,
) -> Result:
    """Runs a study, writes its run folder and returns the result as `open_result` does.

    study: what `read_study` gave, or the path of a study file. folder: where the result goes, by default results/NAME-FINGERPRINT; where an
    earlier attempt was stopped there, this one goes on. threads: how many to solve with, 0 for all cores. observer: is told how far the run
    is and can stop it. block_rows: rows of a block, a power of two, 0 from the measured cost. start: what else it starts with. cluster: who
    solves instead of threads of this process: "local" or "local:N" worker processes, the address of a dask scheduler ("tcp://host:8786"),
    or a cluster file. The result has the same bits whatever these are.

    A result of the same study that is there already is solved once more and then replaced by its equal (`uq run` shows it instead).

    Raises StorageError where the folder cannot be written or another process works in it, Interrupted where the run was stopped,
    ClusterError where the cluster was lost, FatalMemberError where a member ends every worker: no result is written then, but what was done
    is kept. Where `start.so_far` wants the answer so far, a run that is stopped gives that of its last completed round, and keeps what a
    later one goes on from. With a path it raises as `read_study` does.
    """
    from functools import partial

    from uq.running.culprit import blamed
    from uq.running.named import gathered
    from uq.running.rounds import Spread
    from uq.running.start import Start, crew_for
    from uq.store.folder import check_folder, default_folder
    from uq.store.lock import owned
    from uq.store.open import open_result
    from uq.store.progress import check_progress
    from uq.study.read import read_study

    if isinstance(study, (str, os.PathLike)):
        study = read_study(study)
    start = start or Start()
    crew = crew_for(study, Spread(threads, block_rows), observer, start)
    target = Path(folder) if folder else default_folder(study)
    check_folder(target, study)
    with owned(target):
        check_progress(target, study.fingerprint)
        with gathered(cluster, crew.observer, partial(blamed, study, target)) as hands:
            _run_in(target, study, replace(crew, hands=hands), start)
    return open_result(target)


def _run_in(folder: Path, study: Study, crew: Crew, start: Start) -> None:
    """The run itself, in a folder that is ours."""
    from uq.running.answers import all_findings
    from uq.running.branch import forecasts_of, tell_first_run
    from uq.running.course import to_the_end
    from uq.running.facts import facts_of
    from uq.running.resume import gone_on_with, standing_saved
    from uq.store.folder import write_result
    from uq.store.keeper import FolderKeeper
    from uq.store.progress import clear_progress
    from uq.store.tallies import write_tallies

    tell_first_run(crew.observer)
    running, standing, begun = gone_on_with(study, forecasts_of(study), crew, FolderKeeper(folder, study.fingerprint), start)
    standing = to_the_end(running, standing, begun)
    crew.observer.stage("working out the answers")
    findings = all_findings(running, standing)
    write_tallies(folder, standing_saved(standing, running.branches), study.fingerprint)
    write_result(folder, study, findings, facts_of(study, running, standing, start))
    if not standing.early:
        clear_progress(folder)


def extend(
    path: str | os.PathLike[str],
    members: int | None = None,
    precision: Mapping[str, float] | None = None,
    folder: str | os.PathLike[str] | None = None,
    *,
    threads: int = 0,
    observer: Observer | None = None,
    command: str = "",
) -> Result:
    """Goes on with a finished run until it has so many members, or the precision {"probabilities": 0.001, ...}; every solve is used again.

    path: a run folder or its result.nc, which stays as it is. folder: where the new result goes, by default the one that a fresh run of the
    changed study would have, beside the old one. With `members` alone its arrays are those of that run, and so is its content fingerprint.
    With a precision it is at least as precise as asked; it may rest on more members than a fresh run would have needed, and `precision` has
    its rounds as they were, since rounds once merged are not taken apart. Raises as `run` does, StorageError where the old run
    left no tallies, UseMistake where nothing more is asked, StudyError where the plan does not allow it.
    """
    from uq.running.again import extended, folder_beside, study_of
    from uq.running.start import Start
    from uq.store.open import open_result
    from uq.store.tallies import read_tallies

    old = open_result(path)
    facts = old.attributes
    study = extended(study_of(old), facts["members"], members, precision or {})
    before = read_tallies(old.folder, str(facts["study_fingerprint"]))
    start = Start(before, command, str(facts["history"]))
    return run(study, folder or folder_beside(old, study), threads=threads, observer=observer, start=start)


def compare(paths: Sequence[str | os.PathLike[str]], *, threads: int = 0) -> tuple[Result, list[Comparison]]:
    """The first of some results, and each of the others less it, with intervals from paired replicates where they share draws.

    paths: run folders or their result.nc, two or more. Raises StorageError.
    """
    from time import perf_counter

    from uq.report.compare import Comparison
    from uq.running.again import study_of
    from uq.running.answers import compared, side_of
    from uq.running.meter import Meter
    from uq.running.observer import Silent
    from uq.running.rounds import Crew, Spread
    from uq.store.open import open_result
    from uq.store.tallies import read_tallies

    crew = Crew(Spread(threads), Meter(0, Silent(), perf_counter), Silent())
    results = [open_result(path) for path in paths]
    first, *others = (side_of(study_of(each), read_tallies(each.folder, str(each.attributes["study_fingerprint"]))) for each in results)
    found = [compared(first, other, crew) for other in others]
    return results[0], [Comparison(each, findings, draws) for each, (draws, findings) in zip(results[1:], found, strict=True)]

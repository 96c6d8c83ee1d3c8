"""The whole flow on one page; it has no logic of its own.

In: a study. Out: its run folder, read back as a result. Must not know: how any step works.
"""

from __future__ import annotations

import os
from pathlib import Path
from typing import TYPE_CHECKING

if TYPE_CHECKING:
    from uq.running.observer import Observer
    from uq.store.result import Result
    from uq.study.study import Study

FIRST_RUN = "preparing the solver, once on this machine (some seconds)"


def run(
    study: Study,
    folder: str | os.PathLike[str] | None = None,
    *,
    threads: int = 0,
    observer: Observer | None = None,
    block_rows: int = 0,
) -> Result:
    """Runs a study, writes its run folder and returns the result as `open_result` does.

    folder: where the result goes, by default results/NAME-FINGERPRINT. threads: how many to solve with, 0 for all cores. observer: is told
    how far the run is and can stop it. block_rows: rows of a block, a power of two, 0 from the measured cost. The result has the same bits
    whatever these are. Raises StorageError where the folder cannot be written, ValueMistake where the values do not fit into `keep` of the
    plan, Interrupted where the run was stopped; no result is written then.
    """
    from time import perf_counter

    from uq.model.build import build
    from uq.running.block import Forecast, tallies_of
    from uq.running.facts import facts_of
    from uq.running.meter import Meter
    from uq.running.observer import Silent
    from uq.running.pilot import piloted
    from uq.running.rounds import Spread, answered, fold
    from uq.running.setup import ask_of, design_of, must_fit, settings_of
    from uq.solve.compile import compile_code
    from uq.solve.solve import prepare
    from uq.store.folder import check_folder, default_folder, write_result
    from uq.store.open import open_result

    watcher, spread = observer or Silent(), Spread(threads, block_rows)
    target = Path(folder) if folder else default_folder(study)
    check_folder(target, study)
    must_fit(study)
    if prepare():
        watcher.stage(FIRST_RUN)

    compiled = compile_code(build(study.equations))
    design = design_of(study)
    forecast = Forecast(compiled, study.inputs, design, settings_of(study), study.time.start, ask_of(study))
    meter = Meter(design.solves, watcher, perf_counter)
    pilot = piloted(forecast, meter, watcher)
    watcher.stage(f"solving {design.members} members, {design.solves} solves")
    tallies = fold(design, lambda block: tallies_of(pilot.forecast, block, meter, watcher), forecast.shape, meter, spread, watcher)
    watcher.stage("working out the answers")
    findings = answered(tallies, pilot.forecast.ask, pilot.nominal, spread, watcher)
    write_result(target, study, findings, facts_of(study, pilot, meter, spread))
    return open_result(target)

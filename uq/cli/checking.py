"""`uq check`: everything that can be said of a study without solving it, and with --pilot what a few members tell."""

from __future__ import annotations

import os
from dataclasses import asdict
from math import isfinite
from pathlib import Path
from typing import TYPE_CHECKING, Any

from uq.cli import speeds
from uq.cli.progress import stopping, watching
from uq.cli.say import out
from uq.cli.settings import state_folder
from uq.errors import StudyError

if TYPE_CHECKING:
    from uq.report.check import CheckFacts
    from uq.running.foretell import Foretold
    from uq.study.study import Study

SCHEMA = 1
ECHOED = (0.05, 0.5, 0.95)
# What every run takes before and after its solves: imports, machine code, the pilot, writing. Measured 1.5 to 2 s on two cores.
AROUND_SECONDS = 2.0


def check_study(path: Path, pilot: bool, threads: int, json: bool) -> None:
    """Prints what was understood, what every input looks like and what a run would take; `pilot`: measured on a few members."""
    from json import dumps

    from uq.report.check import check_text
    from uq.study.read import read_study

    try:
        study = read_study(path)
    except StudyError as mistakes:
        if json:
            out(dumps(refused(mistakes), indent=1))
        raise
    folder = state_folder(os.environ)
    known = speeds.load(folder)
    measured = piloted(study, threads) if pilot else None
    if measured is not None:
        known = speeds.with_measured(known, speeds.model_of(study), measured.seconds / measured.solves)
    facts = facts_of(study, known, measured)
    if json:
        out(dumps(machine(study, facts), indent=1, allow_nan=False))
    else:
        out(check_text(study, facts))


def piloted(study: Study, threads: int) -> Foretold:
    """What the pilot of the study says; how far it is goes to standard error."""
    with watching() as observer, stopping(observer):
        from time import perf_counter

        from uq.running.foretell import foretold
        from uq.running.rounds import Spread

        return foretold(study, Spread(threads), observer, perf_counter)


def facts_of(study: Study, known: dict[str, float], measured: Foretold | None = None) -> CheckFacts:
    """What a run would take, by the speeds of earlier ones or of the pilot."""
    from uq.report.check import CheckFacts
    from uq.running.setup import design_of, memory_of, most_rows, scenario_designs, solves_of_row
    from uq.running.threads import all_cores

    design, threads, rows = design_of(study), all_cores(), most_rows(study)
    solves = None if rows is None else rows * solves_of_row([design, *scenario_designs(study)])
    cost = speeds.expected(known, speeds.model_of(study))
    return CheckFacts(
        members=None if rows is None else 2 * design.replicates * rows,
        replicates=design.replicates,
        solves=solves,
        threads=threads,
        memory=memory_of(study, threads),
        seconds=seconds_of(study, None if solves is None or cost is None else AROUND_SECONDS + cost[0] * solves / threads),
        same_model=cost[1] if cost else False,
        pilot=measured,
    )


def seconds_of(study: Study, expected: float | None) -> float | None:
    """What a run takes at most: what is expected of all its solves, or the time that it may take where that is less."""
    minutes = study.plan.at_most.minutes if study.plan.at_most else None
    return min((each for each in (expected, None if minutes is None else 60 * minutes) if each is not None), default=None)


def machine(study: Study, facts: CheckFacts) -> dict[str, Any]:
    """The machine form: numbers of an input in its unit."""
    import numpy as np

    inputs = {
        item.name: {
            "distribution": item.distribution.words(),
            "unit": item.unit,
            "mean": item.mean(),
            "sd": item.sd(),
            "quantiles": dict(zip(map(str, ECHOED), item.distribution.quantile(np.array(ECHOED)).tolist(), strict=True)),
            "source": item.source,
        }
        for item in study.inputs.items
    }
    told = {"schema": SCHEMA, "study": study.name, "fingerprint": study.fingerprint, "warnings": list(study.warnings)}
    return {**told, "inputs": inputs, "run": finite(asdict(facts))}


def refused(error: StudyError) -> dict[str, Any]:
    """The machine form of a study that is refused: every mistake with its place; line and column count from 1, null where there is none."""
    every = [{**asdict(mistake), "line": mistake.line or None, "column": mistake.column or None} for mistake in error.mistakes]
    return {"schema": SCHEMA, "mistakes": every}


def finite(value: Any) -> Any:
    """The same with null for numbers that JSON does not know."""
    if isinstance(value, dict):
        return {key: finite(each) for key, each in value.items()}
    if isinstance(value, list | tuple):
        return [finite(each) for each in value]
    return None if isinstance(value, float) and not isfinite(value) else value

"""`uq check`: everything that can be said of a study without solving it."""

from __future__ import annotations

import os
from dataclasses import asdict
from pathlib import Path
from typing import TYPE_CHECKING, Any

from uq.cli import speeds
from uq.cli.say import out
from uq.cli.settings import state_folder

if TYPE_CHECKING:
    from uq.report.check import CheckFacts
    from uq.study.study import Study

SCHEMA = 1
ECHOED = (0.05, 0.5, 0.95)
# What every run takes before and after its solves: imports, machine code, the pilot, writing. Measured 1.5 to 2 s on two cores.
AROUND_SECONDS = 2.0


def check_study(path: Path, json: bool) -> None:
    """Prints what was understood, what every input looks like and what a run would take; raises where a run would be refused."""
    from uq.report.check import check_text
    from uq.running.setup import must_fit
    from uq.study.read import read_study

    study = read_study(path)
    facts = facts_of(study, speeds.load(state_folder(os.environ)))
    if json:
        from json import dumps

        out(dumps(machine(study, facts), indent=1, allow_nan=False))
    else:
        out(check_text(study, facts))
    must_fit(study)


def facts_of(study: Study, known: dict[str, float]) -> CheckFacts:
    """What a run would take, by the speeds of earlier ones."""
    from uq.report.check import CheckFacts
    from uq.running.setup import design_of, memory_of
    from uq.running.threads import all_cores

    design, threads = design_of(study), all_cores()
    cost = speeds.expected(known, speeds.model_of(study))
    return CheckFacts(
        members=design.members,
        replicates=design.replicates,
        solves=design.solves,
        threads=threads,
        memory=memory_of(study, threads),
        seconds=AROUND_SECONDS + cost[0] * design.solves / threads if cost else None,
        same_model=cost[1] if cost else False,
    )


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
    return {**told, "inputs": inputs, "run": asdict(facts)}

"""What a study asks for, in the words of the rooms that do it; light, so that `uq check` may use it."""

from __future__ import annotations

from typing import Literal, cast

import numpy as np

from uq.analysis.ask import Ask
from uq.analysis.kept import kept_bytes
from uq.design.design import Design
from uq.errors import ValueMistake
from uq.running.pace import BLOCK_BYTES
from uq.solve.batch import Settings
from uq.study.study import Study

# The program itself with all that it imports, before it holds a single value.
PROGRAM_BYTES = 250 * 10**6


def ask_of(study: Study) -> Ask:
    """What the tallies are told, but for what only the pilot can say."""
    return Ask(
        time_unit=study.time.unit,
        solved_times=study.times.solved,
        grid=study.times.grid,
        watched=study.watched,
        outcomes=study.outcome_quantities,
        limits=study.limits_asked,
        inputs=study.inputs.names,
        questions=study.plan.ask,
        quantiles=study.plan.quantiles,
        confidence=study.plan.confidence,
        failures=cast(Literal["bound", "exclude", "refuse"], study.plan.failures),
    )


def settings_of(study: Study) -> Settings:
    """How members are solved, but for the scales, which only the pilot can say."""
    return Settings(study.plan.accuracy, np.ones(len(study.states)), study.lowest, study.highest)


def design_of(study: Study) -> Design:
    """The points at which the study is solved."""
    plan = study.plan
    return Design.for_members(study.inputs.names, plan.seed, plan.members, ranked="ranking" in plan.ask)


def memory_of(study: Study, threads: int) -> int:
    """About how many bytes a run takes: the program, the values kept, and what every thread works on."""
    return PROGRAM_BYTES + kept_bytes(ask_of(study), design_of(study).members) + 4 * threads * BLOCK_BYTES


def must_fit(study: Study) -> None:
    """Raises ValueMistake where the values behind bands and outcomes are more than `plan.keep`."""
    members = design_of(study).members
    needed = kept_bytes(ask_of(study), members)
    if needed > study.plan.keep:
        found = f"{needed / 1e6:.0f} MB of values to keep for {members} members"
        remedy = "histograms are not available yet: raise `keep` or lower `members`"
        raise ValueMistake(found, f"at most {study.plan.keep / 1e6:.0f} MB, the `keep` of [plan]", remedy, key="plan.keep")

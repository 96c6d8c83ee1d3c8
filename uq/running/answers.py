"""Everything a run has to say at its end: of the study, of its scenarios, of their differences, of its precision."""

from __future__ import annotations

from collections.abc import Iterator
from dataclasses import dataclass, replace

import numpy as np

from uq.analysis.ask import Ask
from uq.analysis.clocks import on_clock_of
from uq.analysis.differences import Draws, Run, differences, draws_of
from uq.analysis.finding import Finding
from uq.analysis.precision import precision_findings
from uq.analysis.tallies import Tallies
from uq.design.blocks import Block
from uq.design.design import Design
from uq.running.branch import STUDY, Branch
from uq.running.course import Running, Standing, stopping_keeps
from uq.running.part import below, parts_of
from uq.running.pilot import Found, told
from uq.running.rounds import Crew, answered
from uq.running.setup import ask_of, design_of
from uq.running.threads import threads
from uq.store.described import within
from uq.store.inputs_group import achieved
from uq.store.saved import Saved
from uq.study.study import Study

# Rows of every replicate whose inputs are looked at for what the draws achieved.
_LOOKED_AT = 512


def all_findings(run: Running, standing: Standing) -> tuple[Finding, ...]:
    """The findings of result.nc. Raises Interrupted where the run was stopped; what was done is then kept."""
    run = run.of(standing.rows)
    base, *scenarios = run.branches
    with stopping_keeps(run):
        found = [*(standing.findings or answered(base, standing.parts[STUDY], run.crew)), *drawn(base, standing.rows)]
        for branch in scenarios:
            found += within(f"scenarios/{branch.name}", answered(branch, standing.parts[branch.name], run.crew))
            one, other = (Side(each.forecast.design, each.forecast.ask, standing.parts[each.name].tallies) for each in (base, branch))
            found += within(f"differences/{branch.name}", compared(one, other, run.crew)[1])
    return (*found, *(precision_findings(standing.rounds) if run.aims.precision is not None else ()))


@dataclass(frozen=True, eq=False)
class Side:
    """One side of a comparison: its design, what was asked, its tallies at the end of a round."""

    design: Design
    ask: Ask
    tallies: Tallies


def side_of(study: Study, saved: Saved) -> Side:
    """A side from what a finished run has left."""
    design, rows = design_of(study), int(saved.facts["rows"])
    found = Found.of_arrays(below(saved, f"{STUDY}/pilot/"))
    ask = told(ask_of(study, design), found, study.plan.accuracy, study.inputs, design)
    if study.plan.precision is not None:
        ask = replace(ask, members=2 * design.replicates * rows)
    return Side(design, ask, parts_of(saved, {STUDY: ask})[STUDY].tallies)


def compared(one: Side, other: Side, crew: Crew) -> tuple[Draws, tuple[Finding, ...]]:
    """The second less the first at the times of the first, and whether they share draws.

    What has no time in common is left out; so is all that has times where those of one cannot be told in the unit of the other.
    """
    draws, ask = draws_of(one.design, other.design), on_clock_of(one.ask, other.ask)
    with threads(crew.spread.workers, crew.observer) as pool:
        found = differences(Run(one.ask, one.tallies), Run(ask or other.ask, other.tallies), draws, pool.map)
    return draws, tuple(each for each in found if each.group.startswith("outcomes/") or (ask and _has_times(one.ask, each)))


def _has_times(ask: Ask, finding: Finding) -> bool:
    """Whether the two of a comparison have a time in common: an output time, or one by which a limit is quoted."""
    times, by = finding.variables.get("time"), finding.variables.get("by")
    return (len(ask.times) if times is None else len(times.data)) > 0 or (by is not None and len(by.data) > 0)


def drawn(branch: Branch, rows: int) -> Iterator[Finding]:
    """What the draws achieved, looked at in the first rows of every replicate."""
    forecast = branch.forecast
    if not forecast.inputs.items:
        return
    blocks = (Block(replicate, 0, min(rows, _LOOKED_AT)) for replicate in range(forecast.design.replicates))
    x = np.concatenate([forecast.inputs.values(forecast.design.base(block)) for block in blocks])
    yield achieved(forecast.inputs, forecast.ask.quantiles, x)

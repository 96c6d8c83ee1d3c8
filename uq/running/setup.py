"""What a study asks for, in the words of the rooms that do it; light, so that `uq check` may use it."""

from __future__ import annotations

from collections.abc import Callable, Iterator
from typing import Literal, cast

import numpy as np

from uq.analysis.ask import Ask, InputGroup, Measured, kept_bytes
from uq.design.design import Design
from uq.design.sets import Sets, ShapleySets, one_by_one, shapley_sets
from uq.inputs.inputs import Inputs
from uq.running.meter import Meter
from uq.running.observer import Observer
from uq.running.pace import BLOCK_BYTES
from uq.solve.batch import Settings
from uq.study.study import Study

# The program itself with all that it imports, before it holds a single value.
PROGRAM_BYTES = 250 * 10**6


def ask_of(study: Study, design: Design | None = None) -> Ask:
    """What the tallies are told, but for what only the pilot can say."""
    design = design or design_of(study)
    inputs, shapley = study.inputs, shapley_of(study, study.inputs)
    return Ask(
        time_unit=study.time.unit,
        solved_times=study.times.solved,
        grid=study.times.grid,
        watched=study.watched,
        outcomes=study.outcome_quantities,
        limits=study.limits_asked,
        inputs=design.names,
        questions=study.plan.ask,
        quantiles=study.plan.quantiles,
        confidence=study.plan.confidence,
        failures=cast(Literal["bound", "exclude", "refuse"], study.plan.failures),
        sets=design.mixed_sets,
        groups=tuple(groups_of(inputs)),
        dependent=inputs.dependent,
        units=shapley.units if shapley else None,
        orders=shapley.orders if shapley else (),
        measured=tuple(measured_of(study)),
        keep_bytes=study.plan.keep,
        members=design.members,
    )


def groups_of(inputs: Inputs) -> Iterator[InputGroup]:
    """The groups of inputs, and after them what is drawn together from a file and is no group."""
    known = {}
    for label, places in inputs.groups.items():
        known[tuple(sorted(places))] = label
    for unit in inputs.units:
        if len(unit.places) > 1:
            known.setdefault(tuple(sorted(unit.places)), unit.name)
    return (InputGroup(name, places) for places, name in known.items())


def measured_of(study: Study) -> Iterator[Measured]:
    """The observations; without a standard deviation they are taken as exact."""
    names = [quantity.name for quantity in study.watched]
    for each in study.measured:
        times, values = zip(*each.rows, strict=True)
        yield Measured(names.index(each.name), times, values, (each.sd or 0.0,) * len(each.rows))


def settings_of(study: Study) -> Settings:
    """How members are solved, but for the scales, which only the pilot can say."""
    return Settings(study.plan.accuracy, np.ones(len(study.states)), study.lowest, study.highest, negligible=study.negligible)


def shapley_of(study: Study, inputs: Inputs) -> ShapleySets | None:
    """What Shapley effects need; None where nothing is ranked or inputs are independent."""
    if not inputs.dependent or "ranking" not in study.plan.ask:
        return None
    return shapley_sets([unit.places for unit in inputs.units], study.plan.seed)


def sets_of(study: Study, inputs: Inputs) -> Sets:
    """The mixed rows: one for every input and every group, with dependence those of the Shapley effects, none where nothing is ranked."""
    if "ranking" not in study.plan.ask:
        return ()
    shapley = shapley_of(study, inputs)
    return shapley.sets if shapley else one_by_one(len(inputs.names), inputs.groups.values())


def design_of(study: Study, inputs: Inputs | None = None) -> Design:
    """The points at which the study is solved; with a precision, as many as may be used."""
    inputs = inputs or study.inputs
    return Design.for_members(inputs.names, study.plan.seed, study.plan.members, "ranking" in study.plan.ask, sets_of(study, inputs))


def same_places(base: Inputs, other: Inputs) -> Inputs:
    """The inputs of a scenario where those of the study have them, so that equal names share their draws.

    An input that the scenario fixes keeps its place (nothing takes it); one that only the scenario has comes after all others.
    """
    theirs = {item.name: item for item in other.items}
    kept = tuple(theirs.get(item.name, item) for item in base.items)
    mine = set(base.names)
    return Inputs((*kept, *(item for item in other.items if item.name not in mine)), other.dependence)


def memory_of(study: Study, threads: int) -> int:
    """About how many bytes a run takes: the program, the values kept, and what every thread works on."""
    kept = min(kept_bytes(ask_of(study), design_of(study).members), study.plan.keep)
    return PROGRAM_BYTES + kept * (1 + len(study.scenarios)) + 4 * threads * BLOCK_BYTES


def meter_of(study: Study, observer: Observer, clock: Callable[[], float]) -> Meter:
    """The meter of a run that has all its rounds, scenarios counted."""
    return Meter(design_of(study).solves + sum(scenario_solves(study)), observer, clock)


def scenario_solves(study: Study) -> Iterator[int]:
    """The solves of every scenario."""
    for scenario in study.scenarios:
        yield design_of(scenario.study, same_places(study.inputs, scenario.study.inputs)).solves

"""What a study asks for, in the words of the rooms that do it; light, so that `uq check` may use it."""

from __future__ import annotations

from collections.abc import Callable, Iterable, Iterator, Sequence
from itertools import islice
from typing import Literal, cast

import numpy as np

from uq.analysis.ask import Ask, InputGroup, Measured
from uq.analysis.memory import held_bytes
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


def ask_of(study: Study, design: Design | None = None, inputs: Inputs | None = None) -> Ask:
    """What the tallies are told, but for what only the pilot can say.

    inputs: those of the design, where they are not the study's own (`same_places`): all places of inputs are places among them.
    """
    inputs = inputs or study.inputs
    design, shapley = design or design_of(study, inputs), shapley_of(study, inputs)
    return Ask(
        time_unit=study.time.unit,
        solved_times=study.times.solved,
        grid=study.times.grid,
        watched=study.watched,
        outcomes=study.outcome_quantities,
        limits=study.limits_asked,
        inputs=inputs.names,
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
    return Settings(study.plan.accuracy, np.ones(len(study.equations.states)), study.lowest, study.highest, negligible=study.negligible)


def shapley_of(study: Study, inputs: Inputs) -> ShapleySets | None:
    """What Shapley effects need; None where nothing is ranked or inputs are independent."""
    if not inputs.dependent or "ranking" not in study.plan.ask:
        return None
    return shapley_sets([unit.places for unit in inputs.units], study.plan.seed, inputs.linked)


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
    """About how many bytes a run takes: the program, the tallies of all branches, what every thread works on, and the answers.

    Half to twice what was measured (`tests/test_run_memory.py`).
    """
    designs, asks = zip(*((design, ask_of(of, design, inputs)) for of, design, inputs in every_branch(study)), strict=True)
    held = sum(held_bytes(ask, design.replicates) for design, ask in zip(designs, asks, strict=True))
    if study.plan.precision is not None:
        # Nobody knows where it ends: values are kept first, as many as may be.
        held = max(held, study.plan.keep)
    # The answers are worked out cell by cell, on every thread one, from three arrays as long as there are values of it.
    longest = 3 * 8 * max((ask.members for ask in asks if ask.keeps), default=0)
    return PROGRAM_BYTES + held + threads * max(4 * min(BLOCK_BYTES, longest_block(designs, asks)), longest)


def longest_block(designs: Sequence[Design], asks: Sequence[Ask]) -> int:
    """Bytes of the values of the longest block that a run could have, if it were not too long for the memory near a processor."""
    blocks = zip(designs, asks, strict=True)
    return max(8 * design.parts * design.rows * max(len(ask.watched), 1) * len(ask.solved_times) for design, ask in blocks)


def every_branch(study: Study) -> Iterator[tuple[Study, Design, Inputs]]:
    """The study itself and its scenarios, each with its design and the inputs of that."""
    yield study, design_of(study), study.inputs
    for scenario in study.scenarios:
        inputs = same_places(study.inputs, scenario.study.inputs)
        yield scenario.study, design_of(scenario.study, inputs), inputs


def meter_of(study: Study, observer: Observer, clock: Callable[[], float]) -> Meter:
    """The meter of a run, scenarios counted: of all its rounds, with a precision of the first one, since nobody knows how many follow."""
    designs = [design_of(study), *scenario_designs(study)]
    rows = designs[0].rows if study.plan.precision is None else designs[0].rounds()[0][1]
    return Meter(rows * solves_of_row(designs), observer, clock)


def solves_of_row(designs: Iterable[Design]) -> int:
    """The solves of one row of every replicate, of all designs together."""
    return sum(design.parts * design.replicates for design in designs)


def most_rows(study: Study) -> int | None:
    """The rows of every replicate that members and solves allow at most, at the end of a round; None where nothing but time bounds them.

    The first round is solved whatever it takes.
    """
    plan, designs = study.plan, [design_of(study), *scenario_designs(study)]
    solves = plan.at_most.solves if plan.at_most else None
    if plan.precision is None or solves is None:
        return None if plan.members_open else designs[0].rows
    stops = [stop for _, stop in designs[0].rounds()]
    return max((stop for stop in stops if stop * solves_of_row(designs) <= solves), default=stops[0])


def scenario_designs(study: Study) -> Iterator[Design]:
    """The design of every scenario."""
    return (design for _, design, _ in islice(every_branch(study), 1, None))

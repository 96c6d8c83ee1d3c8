"""What earlier attempts, or the run that is extended, have done: read once, before anything is solved."""

from __future__ import annotations

from collections.abc import Mapping
from dataclasses import dataclass, field

from uq.running.aims import Aims
from uq.running.block import Forecast
from uq.running.branch import Branch
from uq.running.course import Running, Standing
from uq.running.facts import made_with
from uq.running.history import history_arrays, history_of
from uq.running.keeping import PART, PILOT, Alike, Checkpoints, Keeper
from uq.running.meter import Count
from uq.running.part import Parts, below, parts_of, saved_of, together
from uq.running.pilot import Found, completed
from uq.running.rounds import Crew
from uq.running.setup import design_of
from uq.running.start import Start
from uq.running.telling import Telling
from uq.store.saved import Saved
from uq.study.study import Study

STRANGE = "what an earlier attempt did was done with other versions or on another processor: it is done again"


@dataclass(frozen=True, eq=False)
class Progress:
    """Parts of rounds by number, and the seconds they took."""

    rounds: Mapping[int, Parts] = field(default_factory=dict)
    seconds: float = 0.0

    @property
    def count(self) -> Count:
        """Everything that was done."""
        return sum((part.count for parts in self.rounds.values() for part in parts.values()), Count())


def gone_on_with(
    study: Study, forecasts: Mapping[str, Forecast], crew: Crew, keeper: Keeper, start: Start
) -> tuple[Running, Standing, Mapping[int, Parts]]:
    """The run with its pilots, where it stands, and the rounds that were begun.

    keeper: has what earlier attempts did.
    """
    alike = Alike(keeper, made_with())
    branches = branches_of(forecasts, alike, crew, start.before)
    checkpoints = Checkpoints(alike, lambda: crew.meter.elapsed, start.pace)
    telling = Telling(crew.observer, lambda: crew.meter.elapsed)
    running = Running(branches, aims_of(study), crew, checkpoints, telling, start.so_far)
    standing = standing_of(start.before, running) if start.before else Standing()
    progress = progress_of(alike, running)
    done = progress.count + sum((part.count for part in standing.parts.values()), Count())
    if done.solves:
        crew.meter.resume(done, progress.seconds)
    if alike.strange:
        crew.observer.stage(STRANGE)
    crew.observer.stage(begins(study, crew.meter.total, done.solves))
    return running, standing, progress.rounds


def begins(study: Study, total: int, done: int) -> str:
    """What a run says when it begins to solve."""
    words = f"solving {design_of(study).members} members, {total} solves"
    if study.plan.precision is not None:
        words = "solving until the precision asked is reached or what it may spend is spent"
    return f"{words}; {done} solves are done already, going on from there" if done else words


def aims_of(study: Study) -> Aims:
    """What the plan wants, and what may be spent on it."""
    plan = study.plan
    if plan.precision is None:
        return Aims()
    bound = plan.at_most
    minutes = bound.minutes if bound else None
    return Aims(plan.precision, bound.solves if bound else None, None if minutes is None else 60 * minutes)


def branches_of(forecasts: Mapping[str, Forecast], keeper: Keeper, crew: Crew, before: Saved | None = None) -> tuple[Branch, ...]:
    """Every forecast with what the pilot finds, or has found before."""
    found = []
    for place, (name, forecast) in enumerate(forecasts.items()):
        # A scenario may be called anything; a part may not.
        part = f"{PILOT}-{place:04}"
        kept = keeper.kept(part) if part in keeper.names() else None
        arrays = kept.arrays if kept else below(before, f"{name}/pilot/") if before else {}
        if arrays:
            pilot = completed(forecast, Found.of_arrays(arrays))
        else:
            pilot = crew.hands.pilot(name, forecast, crew)
            keeper.keep(part, Saved(pilot.found.arrays()))
        found.append(Branch(name, pilot))
    return tuple(found)


def progress_of(keeper: Keeper, run: Running) -> Progress:
    """What earlier attempts have done. A part that is damaged is left out: its work is done again."""
    by_round: dict[int, list[Parts]] = {}
    seconds = 0.0
    for name in keeper.names():
        kept = keeper.kept(name) if name.endswith(PART) else None
        if kept is not None:
            number = int(kept.facts["round"])
            branches = run.of(run.design.rounds()[number][1]).branches
            by_round.setdefault(number, []).append(parts_of(kept, {branch.name: branch.forecast.ask for branch in branches}))
            seconds = max(seconds, float(kept.facts["seconds"]))
    return Progress({number: together(parts) for number, parts in by_round.items()}, seconds)


def standing_saved(standing: Standing, branches: tuple[Branch, ...]) -> Saved:
    """Where a run stands at its end, with what its pilots found: enough to go on, or to compare."""
    history, words = history_arrays(standing.rounds)
    parts = saved_of(standing.parts, {"rows": standing.rows, "history": words})
    pilots = {f"{branch.name}/pilot/{key}": array for branch in branches for key, array in branch.pilot.found.arrays().items()}
    return Saved({**parts.arrays, **pilots, **history}, parts.facts)


def standing_of(saved: Saved, run: Running) -> Standing:
    """Back from what was kept."""
    rows = int(saved.facts["rows"])
    asks = {branch.name: branch.forecast.ask for branch in run.of(rows).branches}
    return Standing(rows, parts_of(saved, asks), history_of(saved.arrays, saved.facts["history"]))

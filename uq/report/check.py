"""What `uq check` says: the study as it was understood, its inputs, and what running it will take. Nothing is solved."""

from __future__ import annotations

import math
from collections.abc import Iterable, Sequence
from dataclasses import dataclass
from typing import TYPE_CHECKING

import numpy as np

from uq.report.model import model_lines, once
from uq.report.plain import laid, paragraphs, plain, table, wrapped
from uq.report.rounding import alone, place_of, power_of, written
from uq.report.spoken import duration, moment, threads, unit_after
from uq.report.summary import opening
from uq.store.inputs_group import dependence_words
from uq.study.plan import PRECISION_OF

if TYPE_CHECKING:
    from uq.inputs.inputs import Input, Inputs
    from uq.running.foretell import Foretold
    from uq.study.plan import Plan
    from uq.study.study import Study

ECHOED = (0.05, 0.5, 0.95)
# Digits of the deviation that the echo shows: one more than a result would, since these numbers are exact.
DIGITS = 3
WIDTH_OF = {"quantiles": " of the 5-95 % width"}
EXPECTED = {
    "probabilities": "every probability",
    "quantiles": "every quantile, as a fraction of the 5-95 % width,",
    "indices": "every share of the variance",
}


@dataclass(frozen=True)
class CheckFacts:
    """What a run would take, with a precision at most: members (rounded up) and solves of all scenarios (None where only the time bounds
    them), replicates, seconds on so many threads (None where nothing was ever measured; `same_model`: measured on this very model), bytes
    of memory. pilot: what a few members told, where they were solved."""

    members: int | None
    replicates: int
    solves: int | None
    threads: int
    memory: int
    seconds: float | None = None
    same_model: bool = False
    pilot: Foretold | None = None


def check_text(study: Study, facts: CheckFacts) -> str:
    """Title, caution, what is asked, the model as read, inputs with mean, sd and 5, 50, 95 %, warnings, and what a run would take."""
    sections = [
        [*laid(opening(study.title, study.caution)), *(line for text in paragraphs(study.about) for line in wrapped(text))],
        _asked(study),
        ["The model as read", *_indented(model_lines(study))],
        _inputs(once(study, study.inputs.items)),
        _notes(study),
        _cost(study, facts),
        _pilot(study, facts),
    ]
    return "\n\n".join("\n".join(lines) for lines in sections if lines)


def _asked(study: Study) -> list[str]:
    time = study.time
    count = len(study.times.grid)
    lines = [f"From {moment(time.start, time.unit)} to {moment(time.stop, time.unit)}, {count} output times."]
    lines.append(
        f"Questions: {', '.join(study.plan.ask)}; watched: {_named(each.label or each.name for each in once(study, study.watched))}."
    )
    lines += [f"Outcome: {plain(each.label or each.name)}{unit_after(each.unit, ', ')}." for each in once(study, study.outcome_quantities)]
    for limit in once(study, study.limits_asked):
        by = ", ".join(alone(each) for each in limit.by)
        accepted = "" if limit.accept is None else f"; accepted: {alone(limit.accept)} by the last of them"
        name = plain(limit.label or limit.name)
        lines.append(f"Limit: {name}, that is {plain(limit.when)}, by {by}{unit_after(time.unit)}{accepted}.")
    lines += [*_precision(study.plan), *_measured(study), *_scenarios(study)]
    return ["What is asked", *_indented(lines)]


def _precision(plan: Plan) -> Iterable[str]:
    """The precision asked, and what may be spent on it."""
    if plan.precision is None:
        return
    asked = [(kind, getattr(plan.precision, kind)) for kind in PRECISION_OF]
    half = ", ".join(f"{kind} {alone(value)}" + WIDTH_OF.get(kind, "") for kind, value in asked if value is not None)
    yield f"Precision, as half-width of the intervals: {half}."
    bounds = [] if plan.members_open else [f"{plan.members} members"]
    if plan.at_most is not None:
        bounds += [] if plan.at_most.solves is None else [f"{plan.at_most.solves} solves"]
        bounds += [] if plan.at_most.minutes is None else [f"{alone(plan.at_most.minutes)} minutes"]
    yield f"Spent on it at most: {', '.join(bounds)}; the answer so far is then given."


def _measured(study: Study) -> Iterable[str]:
    labels = {each.name: each.label or each.name for each in study.watched}
    for each in study.measured:
        sd = "taken as exact" if each.sd is None else f"standard deviation {alone(each.sd)}"
        yield f"Measured: {plain(labels.get(each.name, each.name))}, {len(each.rows)} observations from {plain(each.file)}, {sd}."


def _scenarios(study: Study) -> Iterable[str]:
    for each in study.scenarios:
        own = {key: value for key, value in each.study.changes.items() if study.changes.get(key) != value}
        change = ", ".join(f"{key} = {value!r}" for key, value in own.items())
        yield f"Scenario: {plain(each.label or each.name)}, which changes {plain(change)}; the same draws otherwise."


def _inputs(items: Sequence[Input]) -> list[str]:
    if not items:
        return ["Uncertain inputs: none. All members will be alike."]
    rows: list[tuple[str, ...]] = [("", "mean", "sd", *(f"{100 * level:g} %" for level in ECHOED), "unit")]
    for item in items:
        rows.append((f"{plain(item.label or item.name)} ({item.name})", *_numbers(item), plain(item.unit)))
        rows.append((f"  {plain(item.distribution.words())}",))
        rows.append((f"  {_evidence(item)}",))
    return ["Uncertain inputs", *table(rows, numbers=range(1, 6))]


def _numbers(item: Input) -> list[str]:
    """Mean, deviation and quantiles, all to one decimal place: the third digit of the deviation."""
    mean, sd = item.mean(), item.sd()
    quantiles = item.distribution.quantile(np.array(ECHOED))
    if not (sd > 0 and math.isfinite(sd) and math.isfinite(mean)):
        return [alone(float(number)) for number in (mean, sd, *quantiles)]
    largest = max(abs(mean), *(abs(float(number)) for number in quantiles))
    place, power = place_of(sd, largest, DIGITS), power_of(mean or largest)
    return [written(float(number), place, power) for number in (mean, sd, *quantiles)]


def _evidence(item: Input) -> str:
    told = [f"source: {plain(item.source)}" if item.source.strip() else "source not stated"]
    told.append(f"evidence {item.evidence}" if item.evidence is not None else "evidence not stated")
    told += [each for each in (item.kind, f"group {plain(item.group)}" if item.group else "") if each]
    return ", ".join(told)


def _notes(study: Study) -> list[str]:
    silent = sum(not item.source.strip() for item in study.inputs.items)
    lines = [f"{silent} of {len(study.inputs.items)} inputs have no stated source."] if silent else []
    lines += [f"Warning: {plain(text)}" for text in study.warnings]
    lines += [plain(text) for text in study.remarks]
    lines += _dependence(study.inputs)
    return ["To be noted", *_indented(lines)] if lines else []


def _dependence(inputs: Inputs) -> list[str]:
    """What the study says of dependence, entry by entry."""
    if len(inputs.items) < 2:
        return []
    if not inputs.dependent:
        return ["All inputs are taken as independent."]
    named = {name for each in inputs.dependence for name in each.between}
    others = "; all others are taken as independent" if len(named) < len(inputs.items) else ""
    return [f"Dependence: {'; '.join(plain(dependence_words(each)) for each in inputs.dependence)}{others}."]


def _cost(study: Study, facts: CheckFacts) -> list[str]:
    at_most = "at most " if study.plan.precision is not None else ""
    count = len(study.scenarios)
    scenarios = f", {count} scenario{'s' if count > 1 else ''} counted" if count else ""
    lines = [f"{at_most}{facts.members} members in {facts.replicates} replicates, {at_most}{facts.solves} solves{scenarios}."]
    if facts.members is None:
        lines = [f"As many members as fit into the time that it may take, in {facts.replicates} replicates; one round in any case."]
    if facts.seconds is None:
        lines.append("Time: not known yet on this machine; the first run measures it.")
    else:
        on = "measured on this model" if facts.same_model else "guessed from another model"
        minutes = study.plan.at_most.minutes if study.plan.at_most else None
        if minutes is not None and facts.seconds >= 60 * minutes:
            on = "what it may take; a round that would take longer is not begun, but the first always is"
        lines.append(f"Time: {at_most or 'about '}{duration(facts.seconds)} on {threads(facts.threads)} ({on}).")
    lines.append(f"Memory: about {_bytes(facts.memory)}.")
    if facts.pilot is None and study.plan.precision is not None:
        lines.append("How much of that the precision takes: uq check --pilot.")
    return ["What a run will take", *_indented(line[:1].upper() + line[1:] for line in lines)]


def _pilot(study: Study, facts: CheckFacts) -> list[str]:
    """What a few members foretell: the half-widths of the run as it is asked, or the solves that the precision takes."""
    pilot = facts.pilot
    if pilot is None:
        return []
    failed = f", {pilot.failed} of them failed" if pilot.failed else ""
    per_solve = pilot.seconds / max(pilot.solves, 1)
    lines = [f"{pilot.members} members, {pilot.solves} solves{failed}; {alone(1000 * per_solve, 2)} ms of one core for each solve."]
    if pilot.needed is not None:
        seconds = pilot.needed.solves * per_solve / facts.threads
        about = f"about {count(pilot.needed.solves)} solves, {duration(seconds)} on {threads(facts.threads)}"
        if pilot.needed.solves > pilot.possible:
            lines.append("The precision asked cannot be reached: it would take more members than a run can have.")
        elif pilot.needed.solves > pilot.solves:
            more = " That is more than the run may use." if pilot.needed.solves > pilot.asked else ""
            lines.append(f"The precision asked is expected after {about}.{more}")
        elif not pilot.needed.unknown:
            lines.append("The pilot by itself is as precise as asked; the run makes sure of it.")
        if pilot.needed.unknown:
            lines.append(f"Nothing can be foretold of {plain(', '.join(pilot.needed.unknown))}.")
    at = f"at {count(pilot.asked)} solves"
    lines += [f"Expected {at}: {EXPECTED[each.kind]} within {alone(each.half_width, 2)} ({each.group})." for each in pilot.expected]
    return ["What the pilot says", *_indented(lines)]


def count(number: float) -> str:
    """A large number of things, to two digits: 1200000."""
    return f"{float(f'{number:.1e}'):.0f}"


def _bytes(count: int) -> str:
    for unit, size in (("GB", 10**9), ("MB", 10**6), ("kB", 10**3)):
        if count >= size:
            return f"{alone(count / size, 2)} {unit}"
    return f"{count} bytes"


def _named(texts: Iterable[str]) -> str:
    return ", ".join(plain(text) for text in texts) or "nothing"


def _indented(lines: Iterable[str]) -> list[str]:
    return [piece for line in lines for piece in wrapped(line, "  ", "    ")]

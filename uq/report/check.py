"""What `uq check` says: the study as it was understood, its inputs, and what running it will take. Nothing is solved."""

from __future__ import annotations

import math
from collections.abc import Iterable, Sequence
from dataclasses import dataclass
from typing import TYPE_CHECKING

import numpy as np

from uq.report.plain import paragraphs, plain, table, wrapped
from uq.report.rounding import alone, place_of, power_of, written
from uq.report.spoken import duration, moment, threads, unit_after
from uq.report.summary import opening

if TYPE_CHECKING:
    from uq.inputs.inputs import Input
    from uq.study.declarations import State
    from uq.study.study import Study

ECHOED = (0.05, 0.5, 0.95)
# Digits of the deviation that the echo shows: one more than a result would, since these numbers are exact.
DIGITS = 3


@dataclass(frozen=True)
class CheckFacts:
    """What a run would take: members (rounded up), replicates, solves, seconds on so many threads (None where nothing was ever measured;
    `same_model`: measured on this very model), bytes of memory."""

    members: int
    replicates: int
    solves: int
    threads: int
    memory: int
    seconds: float | None = None
    same_model: bool = False


def check_text(study: Study, facts: CheckFacts) -> str:
    """Title, caution, what is asked, the model as read, inputs with mean, sd and 5, 50, 95 %, warnings, and what a run would take."""
    sections = [
        [*opening(study.title, study.caution), *(line for text in paragraphs(study.about) for line in wrapped(text))],
        _asked(study),
        _model(study),
        _inputs(study.inputs.items),
        _notes(study),
        _cost(facts),
    ]
    return "\n\n".join("\n".join(lines) for lines in sections if lines)


def _asked(study: Study) -> list[str]:
    time = study.time
    count = len(study.times.grid)
    lines = [f"From {moment(time.start, time.unit)} to {moment(time.stop, time.unit)}, {count} output times."]
    lines.append(f"Questions: {', '.join(study.plan.ask)}; watched: {_named(each.label or each.name for each in study.watched)}.")
    lines += [f"Outcome: {plain(each.label or each.name)}{unit_after(each.unit, ', ')}." for each in study.outcome_quantities]
    for limit in study.limits_asked:
        by = ", ".join(alone(each) for each in limit.by)
        accepted = "" if limit.accept is None else f"; accepted: {alone(limit.accept)} by the last of them"
        name = plain(limit.label or limit.name)
        lines.append(f"Limit: {name}, that is {plain(limit.when)}, by {by}{unit_after(time.unit)}{accepted}.")
    return ["What is asked", *_indented(lines)]


def _model(study: Study) -> list[str]:
    """The model as read, in brief."""
    lines = [_state(study, each) for each in study.states]
    lines += [f"{each.name} = {plain(each.value)}" for each in study.terms]
    for each in study.parameters:
        if each.value is not None:
            lines.append(f"{each.name} = {alone(each.value, 10)}{unit_after(each.unit)}")
    lines += [f"{each.name}: given course, {len(each.rows)} rows, {each.interpolation}" for each in study.forcings]
    return ["The model as read", *_indented(lines)]


def _state(study: Study, state: State) -> str:
    """A state: its rate with unit, and where it starts."""
    unit = "" if study.unitless else f" in {plain(state.unit)}{unit_after(study.time.unit, '/')}"
    if isinstance(state.start, str):
        start = f"starts at {plain(state.start)}"
    elif isinstance(state.start, (int, float)):
        start = f"starts at {alone(state.start, 10)}{unit_after(state.unit)}"
    else:
        start = "has an uncertain start"
    return f"d{state.name}/dt = {plain(state.rate)}{unit}; {state.name} {start}"


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
    lines += ["All inputs are taken as independent."] if len(study.inputs.items) > 1 else []
    return ["To be noted", *_indented(lines)] if lines else []


def _cost(facts: CheckFacts) -> list[str]:
    lines = [f"{facts.members} members in {facts.replicates} replicates, {facts.solves} solves."]
    if facts.seconds is None:
        lines.append("Time: not known yet on this machine; the first run measures it.")
    else:
        on = "measured on this model" if facts.same_model else "guessed from another model"
        lines.append(f"Time: about {duration(facts.seconds)} on {threads(facts.threads)} ({on}).")
    lines.append(f"Memory: about {_bytes(facts.memory)}.")
    return ["What a run will take", *_indented(lines)]


def _bytes(count: int) -> str:
    for unit, size in (("GB", 10**9), ("MB", 10**6), ("kB", 10**3)):
        if count >= size:
            return f"{alone(count / size, 2)} {unit}"
    return f"{count} bytes"


def _named(texts: Iterable[str]) -> str:
    return ", ".join(plain(text) for text in texts) or "nothing"


def _indented(lines: Iterable[str]) -> list[str]:
    return [piece for line in lines for piece in wrapped(line, "  ", "    ")]

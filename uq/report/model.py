"""The model of a study as it was read, in brief, for who checks it; what repeats is told once."""

from __future__ import annotations

from collections.abc import Sequence
from dataclasses import replace
from typing import TypeVar

from uq.analysis.ask import LimitAsked, Quantity
from uq.inputs.inputs import Input
from uq.lang.scope import Index
from uq.report.plain import plain
from uq.report.rounding import alone
from uq.report.spoken import unit_after
from uq.study.declarations import State
from uq.study.given import ForcingCourse, GivenTable
from uq.study.index import Values
from uq.study.study import Study

T = TypeVar("T", Quantity, LimitAsked, Input)


def model_lines(study: Study) -> list[str]:
    """The model as read, in brief."""
    lines = [_state(study, each) for each in study.states]
    lines += [f"{each.name} = {plain(each.value)}{_repeats(each.over)}" for each in study.terms]
    for each in study.parameters:
        if each.value is not None:
            lines.append(f"{each.name} = {_value(each.value)}{unit_after(each.unit)}{_repeats(each.over)}")
    lines += [_forcing(each) for each in study.forcings]
    lines += [_table(each) for each in study.tables]
    return lines


OUTSIDE = {"refuse": "nothing outside them", "hold": "held outside them", "repeat": "repeated outside them"}


def _forcing(each: ForcingCourse) -> str:
    """A given course; where it comes from a file, which columns."""
    rows = f"{len(each.rows)} rows"
    if each.file and each.time and each.value:
        columns = (f"{plain(column.column)}{unit_after(column.unit, ' in ')}" for column in (each.time, each.value))
        rows += f" from {plain(each.file)} ({' and '.join(columns)})"
    return f"{each.name}: given course{unit_after(each.unit, ' in ')}, {rows}, {each.interpolation}, {OUTSIDE[each.outside]}"


def _table(each: GivenTable) -> str:
    units = f"{unit_after(each.unit, ' in ')}, of an argument{unit_after(each.of.unit, ' in ')}" if each.unit or each.of.unit else ""
    return f"{each.name}(): given by {len(each.rows)} points{units}, {each.interpolation}, {OUTSIDE[each.outside]}"


def _state(study: Study, state: State) -> str:
    """A state: its rate with unit, and where it starts."""
    unit = "" if study.unitless else f" in {plain(state.unit)}{unit_after(study.time.unit, '/')}"
    if isinstance(state.start, str):
        start = f"starts at {plain(state.start)}"
    elif isinstance(state.start, (int, float, tuple)):
        start = f"starts at {_value(state.start)}{unit_after(state.unit)}"
    else:
        start = "has an uncertain start"
    return f"d{state.name}/dt = {plain(state.rate)}{unit}; {state.name} {start}{_repeats(state.over)}"


def _value(value: Values) -> str:
    """A number, or the ends of a list of them."""
    if not isinstance(value, tuple):
        return alone(value, 10)
    every = [each for inner in value for each in (inner if isinstance(inner, tuple) else (inner,))]
    return f"{alone(min(every), 10)} to {alone(max(every), 10)} ({len(every)} values)"


def _repeats(over: Sequence[Index | None]) -> str:
    """Over what a line repeats."""
    named = [index.name for index in over if index is not None]
    return f", for every {' and '.join(named)}" if named else ""


def once(study: Study, items: Sequence[T]) -> list[T]:
    """Items of which those that repeat over an index are told once, for all entries."""
    owners = {entry: repeat for repeat in study.repeats for entry in repeat.entries}
    found: dict[str, T] = {}
    for item in items:
        repeat = owners.get(item.name)
        if repeat is None:
            found[item.name] = item
        elif repeat.name not in found:
            named = " and ".join(f"{index.name} {index.told}" for index in repeat.over)
            found[repeat.name] = replace(item, name=repeat.name, label=f"{repeat.label} [{named}]")
    return list(found.values())

"""`[[dependence]]`: which inputs depend on each other, as correlations or as a joint sample from a file."""

from __future__ import annotations

from collections.abc import Collection, Mapping
from dataclasses import dataclass, field
from typing import Any

from uq.errors import ValueMistake, suggest
from uq.inputs.dependence import CORRELATIONS, SAMPLE, Dependence, Dependences, JointSample, read_dependence
from uq.inputs.inputs import Inputs
from uq.study import values as read
from uq.study.columns import Files
from uq.study.locate import Path
from uq.study.notes import KeyMistake, Notes
from uq.study.values import Frame

KEYS = ("between", *CORRELATIONS, *SAMPLE)


@dataclass(frozen=True)
class Statements:
    """All tables [[dependence]] that could be read, each with its place in their list.

    `joint`: the inputs that a joint sample draws with file and column, None where that is wrong.
    """

    read: Mapping[int, Dependences] = field(default_factory=dict)
    joint: Mapping[str, tuple[str, str] | None] = field(default_factory=dict)


def statements(document: Mapping[str, Any], frame: Frame, notes: Notes) -> Statements:
    """Read all tables [[dependence]]; mistakes go to `notes`."""
    given = document.get("dependence", [])
    if not isinstance(given, list):
        notes.at_value(("dependence",), read.show(given), "tables [[dependence]], in double brackets")
        return Statements()
    found: dict[int, Dependences] = {}
    joint: dict[str, tuple[str, str] | None] = {}
    for index, table in enumerate(given):
        made, mistakes = read_dependence(table)
        wrong = [_placed(mistake) for mistake in mistakes]
        if isinstance(made, JointSample):
            made, wrong = _with_values(made, frame.files)
        for below, mistake in wrong:
            notes.refused(("dependence", index, *below), mistake)
        if made is not None:
            found[index] = made
        for name, column in _columns(table).items():
            sound = isinstance(made, JointSample) and name not in joint
            joint[name] = (table["file"], column) if sound else None
    return Statements(found, joint)


def _placed(mistake: ValueMistake) -> tuple[Path, ValueMistake]:
    """A mistake with its path; one about the name of a key points at the name."""
    told = ValueMistake if mistake.key in KEYS else KeyMistake
    return ((mistake.key,) if mistake.key else ()), told(mistake.found, mistake.expected, mistake.remedy)


def _columns(table: object) -> Mapping[str, Any]:
    """The inputs for which a table names columns, whatever else is wrong with it."""
    named = table.get("columns") if isinstance(table, Mapping) else None
    return named if isinstance(named, Mapping) else {}


def _with_values(sample: JointSample, files: Files) -> tuple[JointSample | None, list[tuple[Path, ValueMistake]]]:
    """A joint sample with the numbers of its columns, or what is wrong with them."""
    wrong: list[tuple[Path, ValueMistake]] = []
    for name, column in sample.columns.items():
        try:
            files.place_of(sample.file, column)
        except ValueMistake as mistake:
            path: Path = ("columns", name) if mistake.key else ("file",)
            wrong.append((path, ValueMistake(mistake.found, mistake.expected, mistake.remedy)))
            if not mistake.key:
                break
    if wrong:
        return None, wrong
    try:
        return sample.with_values(files.rows(sample.file, tuple(sample.columns.values())).values.T), []
    except ValueMistake as mistake:
        path = (mistake.key or "file",)
        return None, [(path, ValueMistake(mistake.found, mistake.expected, mistake.remedy))]


def judged(stated: Statements, inputs: tuple[str, ...], unclear: Collection[str], notes: Notes) -> tuple[Dependences, ...]:
    """The statements that hold, each name and the whole checked; `unclear` may be inputs, but their own declarations are wrong."""
    sound: dict[int, Dependences] = {}
    for index, made in stated.read.items():
        strangers = [(place, name) for place, name in enumerate(made.between) if name not in inputs]
        for place, name in strangers:
            where: Path = ("between", place) if isinstance(made, Dependence) else ("columns", name)
            remedy = suggest(name, inputs)
            if f"{name}_start" in inputs:
                remedy = f"the start of the state `{name}` is the input `{name}_start`"
            if name not in unclear:
                notes.at_value(("dependence", index, *where), f"`{name}`", "an uncertain parameter or start", remedy)
        if not strangers:
            sound[index] = made
    wrong = Inputs.check(inputs, tuple(sound.values()))
    for entry, mistake in wrong:
        notes.refused(("dependence", list(sound)[entry]), mistake)
    return () if wrong else tuple(sound.values())

"""From a file to a `Study`, or every mistake in it at once."""

from __future__ import annotations

import os
from collections.abc import Mapping
from dataclasses import dataclass, replace
from functools import partial
from pathlib import Path
from typing import Any

from uq.errors import Mistake, StudyError
from uq.inputs.inputs import Inputs
from uq.study import assemble
from uq.study.changes import changed, fingerprint, paths_of
from uq.study.columns import Files
from uq.study.doubts import remarks, too_large_for_stiff, warnings
from uq.study.names import check_names, check_watch
from uq.study.notes import Notes
from uq.study.observations import Observations, observations
from uq.study.plan import PRECISION_OF, QUESTIONS, Plan
from uq.study.relay import relay, unlike
from uq.study.scenarios import ScenarioTable
from uq.study.sheets import Sheets, read_sheets
from uq.study.study import Scenario, Study
from uq.study.toml import read_toml
from uq.study.work import Work

# What a scenario does not have of its own.
APART = ("scenarios", "measured")


def read_study(path: str | os.PathLike[str], changes: Mapping[str, object] | None = None) -> Study:
    """The study in a file, checked in full, with `changes` by dotted key made to it; raises StudyError with every mistake."""
    place, text = Path(path), file_text(path, "study")
    return parse_study(text, place.parent, place.stem, changes=changes, shown_as=str(path))


def file_text(path: str | os.PathLike[str], what: str) -> str:
    """The text of a file that should be a study or a batch; raises StudyError where it cannot be read as one."""
    try:
        content = Path(path).read_bytes()
    except OSError as error:
        raise StudyError([Mistake(str(path), 0, 0, what, f"a file that cannot be read ({error.strerror})", f"a {what} file")]) from None
    try:
        return content.decode("utf-8")
    except UnicodeDecodeError as error:
        line = content.count(b"\n", 0, error.start) + 1
        column = error.start - (content.rfind(b"\n", 0, error.start) + 1) + 1
        found = f"the byte 0x{content[error.start]:02x}, which is not UTF-8"
        raise StudyError([Mistake(str(path), line, column, what, found, "a text file in UTF-8", "save it as UTF-8")]) from None


def parse_study(
    text: str,
    folder: Path | None = None,
    name: str = "study",
    files: Mapping[str, bytes] | None = None,
    changes: Mapping[str, object] | None = None,
    shown_as: str = "",
) -> Study:
    """The study in a text; raises StudyError with every mistake.

    Data files are taken from `files` by name, else from `folder`. `changes` by dotted key are made before the check. `shown_as` is what
    mistakes call the file.
    """
    return _read(Source(text, folder, name, files or {}, shown_as or f"{name}.toml"), changes or {})


@dataclass(frozen=True)
class Source:
    """Where a study comes from; `without` are tables that are left out, as in the study of a scenario."""

    text: str
    folder: Path | None
    name: str
    files: Mapping[str, bytes]
    shown_as: str
    without: tuple[str, ...] = ()

    def given(self, changes: Mapping[str, object], files: Mapping[str, bytes]) -> dict[str, Any]:
        """What a study keeps of it."""
        return {"name": self.name, "text": self.text, "changes": dict(changes), "again": partial(_read, replace(self, files=files))}


def _read(source: Source, changes: Mapping[str, object]) -> Study:
    document, notes = read_toml(source.text, source.shown_as)
    _raise(notes, unless=bool(document))
    notes.changed = paths_of(changes)
    document = changed({key: table for key, table in document.items() if key not in source.without}, changes, notes)
    data = Files(source.folder, source.files)
    work, plan = _checked(document, data, notes)
    measured = observations(work)
    made = [_scenario(source, changes, work, table) for table in _wholes(work.sheets.scenarios) if table is not None]
    for each in made:
        path = ("scenarios", each.table.name, "change")
        relay(path, {key: (*path, key) for key in each.table.change}, each.work.notes.mistakes, notes)
        data.used.update(each.data.used)
        data.said += [text for text in each.data.said if text not in data.said]
    _raise(notes)
    study = _study(work, plan, data, measured, source.given(changes, data.used))
    scenarios = tuple(each.scenario(source, changes) for each in made)
    more = [f"scenario {each.name}: {text}" for each in scenarios for text in each.study.warnings if text not in study.warnings]
    return replace(study, scenarios=scenarios, warnings=(*study.warnings, *more)) if scenarios else study


def _checked(document: Mapping[str, Any], data: Files, notes: Notes) -> tuple[Work, Plan]:
    """Everything that follows from a document; mistakes go to `notes`."""
    check_names(document, notes)
    sheets = read_sheets(document, data, notes)
    check_watch(sheets.plan.values.get("watch") or sheets.states, document, notes)
    work = Work(document, sheets, notes)
    work.run()
    return work, _plan(sheets, notes)


@dataclass(frozen=True)
class _Made:
    """The study of a scenario, worked out."""

    table: ScenarioTable
    work: Work
    plan: Plan
    data: Files

    def scenario(self, source: Source, changes: Mapping[str, object]) -> Scenario:
        given = replace(source, without=APART).given({**changes, **self.table.change}, self.data.used)
        study = _study(self.work, self.plan, self.data, Observations(), given)
        return Scenario(self.table.name, self.table.label or self.table.name, study)


def _scenario(source: Source, changes: Mapping[str, object], base: Work, table: ScenarioTable) -> _Made:
    """The study with the change of one scenario made; its mistakes are in the notes of its work."""
    notes = Notes(source.shown_as, base.notes.places, changed=(*paths_of(changes), *paths_of(table.change)))
    document = changed({key: each for key, each in base.document.items() if key not in APART}, table.change, notes)
    data = Files(source.folder, {**source.files, **base.sheets.files.used})
    work, plan = _checked(document, data, notes)
    if not base.notes.mistakes and not notes.mistakes:
        for key, found, expected in unlike(base, work):
            notes.at_key(key, found, expected)
    return _Made(table, work, plan, data)


def _raise(notes: Notes, unless: bool = False) -> None:
    """Tell all mistakes, if there are any."""
    if notes.mistakes and not unless:
        raise StudyError(notes.in_order())


def _plan(sheets: Sheets, notes: Notes) -> Plan:
    """The plan with what it leaves open filled in."""
    plan = sheets.plan.whole or Plan()
    answerable = {"bands": True, "limits": bool(sheets.limits), "outcomes": bool(sheets.outcomes), "ranking": True}
    for index, question in enumerate(plan.ask):
        if not answerable[question]:
            notes.at_value(("plan", "ask", index), f'"{question}" in a study without {question}', f"a table [{question}.NAME]")
    ask = plan.ask or tuple(question for question in QUESTIONS if answerable[question])
    for key, answers in PRECISION_OF.items():
        if plan.precision is not None and getattr(plan.precision, key) is not None and not set(answers) & set(ask):
            said = " or ".join(f'"{question}"' for question in answers)
            notes.at_value(("plan", "precision", key), f"a precision of {key} that are not asked for", f"{said} among what is asked")
    return replace(plan, ask=ask, watch=plan.watch or tuple(sheets.states))


def _study(work: Work, plan: Plan, data: Files, observed: Observations, given: Mapping[str, Any]) -> Study:
    """The study of a document without mistakes."""
    from uq import __version__

    sheets = work.sheets
    head, time = sheets.head.whole, sheets.time.whole
    if head is None or time is None:
        raise RuntimeError("a study without mistakes has a head and a time")
    times = assemble.solved_times(work, time, observed.made)
    inputs, equations = Inputs(tuple(work.inputs), work.dependence), assemble.equations(work, times, time)
    return Study(
        **given,
        files=dict(data.used),
        fingerprint=fingerprint(work.document, data.used, __version__),
        unitless=sheets.unitless,
        title=head.title or given["name"],
        about=head.about,
        caution=head.caution,
        time=time,
        states=_wholes(sheets.states),
        parameters=_wholes(sheets.parameters),
        terms=_wholes(sheets.terms),
        forcings=_wholes(sheets.forcings),
        tables=_wholes(sheets.tables),
        outcomes=_wholes(sheets.outcomes),
        limits=_wholes(sheets.limits),
        plan=plan,
        measured=tuple(observed.made),
        own_units=sheets.own,
        warnings=(*warnings(work, inputs, plan.watch), *too_large_for_stiff(equations, plan)),
        remarks=(*data.said, *observed.said, *remarks(inputs, plan)),
        inputs=inputs,
        equations=equations,
        watched=tuple(work.watched),
        outcome_quantities=tuple(work.quantities),
        limits_asked=assemble.limits_asked(work, times, time),
        times=times,
        **_of_states(work),
    )


def _of_states(work: Work) -> dict[str, Any]:
    """What is given for every state, and what repeats."""
    lowest, highest = assemble.valid_values(work)
    told = {"lowest": lowest, "highest": highest, "negligible": assemble.negligible(work)}
    return {**told, "indices": dict(work.low.indices), "repeats": tuple(work.repeats)}


def _wholes(sheets: Mapping[str, Any]) -> tuple[Any, ...]:
    return tuple(sheet.whole for sheet in sheets.values())

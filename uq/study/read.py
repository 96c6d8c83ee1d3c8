"""From a file to a `Study`, or every mistake in it at once."""

from __future__ import annotations

import os
from collections.abc import Mapping
from dataclasses import replace
from functools import partial
from pathlib import Path
from typing import Any

from uq.errors import Mistake, StudyError
from uq.inputs.inputs import Inputs
from uq.study import assemble
from uq.study.changes import changed, fingerprint, paths_of
from uq.study.columns import Files
from uq.study.doubts import warnings
from uq.study.names import check_names, check_watch
from uq.study.notes import Notes
from uq.study.plan import QUESTIONS, Plan
from uq.study.sheets import Sheets, read_sheets
from uq.study.study import Study
from uq.study.toml import read_toml
from uq.study.work import Work


def read_study(path: str | os.PathLike[str], changes: Mapping[str, object] | None = None) -> Study:
    """The study in a file, checked in full, with `changes` by dotted key made to it; raises StudyError with every mistake."""
    place = Path(path)
    try:
        content = place.read_bytes()
    except OSError as error:
        raise StudyError([Mistake(str(path), 0, 0, "study", f"a file that cannot be read ({error.strerror})", "a study file")]) from None
    try:
        text = content.decode("utf-8")
    except UnicodeDecodeError as error:
        line = content.count(b"\n", 0, error.start) + 1
        column = error.start - (content.rfind(b"\n", 0, error.start) + 1) + 1
        found = f"the byte 0x{content[error.start]:02x}, which is not UTF-8"
        raise StudyError([Mistake(str(path), line, column, "study", found, "a text file in UTF-8", "save it as UTF-8")]) from None
    return parse_study(text, place.parent, place.stem, changes=changes, shown_as=str(path))


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
    changes = dict(changes or {})
    document, notes = read_toml(text, shown_as or f"{name}.toml")
    _raise(notes, unless=bool(document))
    notes.changed = paths_of(changes)
    document = changed(document, changes, notes)
    data = Files(folder, files or {})
    check_names(document, notes)
    sheets = read_sheets(document, data, notes)
    check_watch(sheets.plan.values.get("watch") or sheets.states, document, notes)
    work = Work(document, sheets, notes)
    work.run()
    plan = _plan(sheets, notes)
    _raise(notes)
    again = partial(_again, text, folder, name, data.used, shown_as)
    return _study(work, plan, data, {"name": name, "text": text, "changes": changes, "again": again})


def _again(text: str, folder: Path | None, name: str, files: Mapping[str, bytes], shown_as: str, changes: Mapping[str, object]) -> Study:
    return parse_study(text, folder, name, files, changes, shown_as)


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
    return replace(plan, ask=ask, watch=plan.watch or tuple(sheets.states))


def _study(work: Work, plan: Plan, data: Files, given: Mapping[str, Any]) -> Study:
    """The study of a document without mistakes."""
    from uq import __version__

    sheets = work.sheets
    head, time = sheets.head.whole, sheets.time.whole
    if head is None or time is None:
        raise RuntimeError("a study without mistakes has a head and a time")
    times = assemble.solved_times(work, time)
    inputs = Inputs(tuple(work.inputs))
    lowest, highest = assemble.valid_values(work)
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
        outcomes=_wholes(sheets.outcomes),
        limits=_wholes(sheets.limits),
        plan=plan,
        warnings=warnings(work, inputs, plan.watch),
        remarks=tuple(data.said),
        inputs=inputs,
        equations=assemble.equations(work, times, time),
        watched=tuple(work.watched),
        outcome_quantities=tuple(work.quantities),
        limits_asked=assemble.limits_asked(work, times, time),
        times=times,
        lowest=lowest,
        highest=highest,
    )


def _wholes(sheets: Mapping[str, Any]) -> tuple[Any, ...]:
    return tuple(sheet.whole for sheet in sheets.values())

"""A whole document read table by table: every declaration as far as it could be read, every mistake noted."""

from __future__ import annotations

from collections.abc import Callable, Iterator, Mapping
from dataclasses import dataclass, replace
from typing import Any, TypeVar

from uq.errors import ValueMistake
from uq.lang.scope import Index
from uq.study import values as read
from uq.study.columns import Files
from uq.study.counting import own_units
from uq.study.declarations import Limit, Outcome, Parameter, State, Term
from uq.study.dependence import Statements, statements
from uq.study.fields import Sheet, entry, keys_of, read_table, unknown
from uq.study.given import ForcingCourse, GivenTable, Measured
from uq.study.index import read_indices
from uq.study.locate import Path
from uq.study.names import tables
from uq.study.notes import KeyMistake, Notes
from uq.study.plan import Plan, Time
from uq.study.points import forcing, measured, table
from uq.study.scenarios import ScenarioTable
from uq.study.uncertain import drawn_jointly
from uq.study.values import Frame
from uq.units import NONE, Units, parse_quantity

TABLES = (
    *("units", "time", "index", "states", "parameters", "terms", "forcings", "tables", "outcomes", "limits"),
    *("dependence", "plan", "scenarios", "measured"),
)
TABLES_LATER = ("switches", "events", "model", "assumptions", "not_included", "review")
T = TypeVar("T")

# Keys whose texts say something about units; labels and sources are prose.
_PROSE = (
    *("title", "about", "caution", "label", "source", "kind", "group", "interpolation", "outside", "keep", "name"),
    *("file", "column", "columns", "over", "index"),
)


def schema(value: object, frame: Frame) -> int:
    """The version of the format: 1."""
    if isinstance(value, bool) or value != 1:
        raise ValueMistake(read.show(value), "1, the version of the format that this version reads")
    return 1


@dataclass(frozen=True, kw_only=True)
class Head:
    """The keys at the top of a study."""

    schema: int = entry("version of the format, 1", schema)
    title: str = entry("what the study is called", read.text, "", "the name of the file")
    about: str = entry("the question, in a sentence or two", read.text, "")
    caution: str = entry("what must be said before anything else where work can hurt someone", read.text, "")


@dataclass(frozen=True)
class Sheets:
    """All tables of a document."""

    unitless: bool
    own: Units
    files: Files
    head: Sheet[Head]
    time: Sheet[Time]
    plan: Sheet[Plan]
    states: Mapping[str, Sheet[State]]
    parameters: Mapping[str, Sheet[Parameter]]
    terms: Mapping[str, Sheet[Term]]
    forcings: Mapping[str, Sheet[ForcingCourse]]
    tables: Mapping[str, Sheet[GivenTable]]
    outcomes: Mapping[str, Sheet[Outcome]]
    limits: Mapping[str, Sheet[Limit]]
    measured: Mapping[str, Sheet[Measured]]
    scenarios: Mapping[str, Sheet[ScenarioTable]]
    dependence: Statements
    indices: Mapping[str, Index | None]

    def text_path(self, key: str, name: str, document: Mapping[str, Any]) -> Path:
        """Where the expression of a term stands: in its short form the term itself is the text."""
        return (key, name, "value") if isinstance(document[key][name], Mapping) else (key, name)


def read_sheets(document: Mapping[str, Any], files: Files, notes: Notes) -> Sheets:
    """Read every table; mistakes go to `notes`."""
    frame = _frame(document, files, notes)
    head = _head(document, frame, notes)
    if "time" in document:
        time = _noted(read_table(Time, document["time"], frame), ("time",), notes)
    else:
        notes.at_key(("time",), "no [time]", "a table [time]")
        time = Sheet({}, (), None)
    if document.get("states", {}) == {}:
        notes.at_key(("states",), "no state", "one table [states.NAME] or more")
    stated = statements(document, frame, notes)
    frame = replace(frame, time=time.unit, joint=stated.joint)

    def all_of(key: str, one: Callable[[str, Any, Frame], Sheet[Any]]) -> dict[str, Sheet[Any]]:
        if key in document and not isinstance(document[key], Mapping):
            notes.at_value((key,), read.show(document[key]), f"tables [{key}.NAME]")
        return {name: _noted(one(name, value, frame), (key, name), notes) for name, value in tables(document, key).items()}

    return Sheets(
        frame.unitless,
        frame.own,
        files,
        head,
        time,
        _noted(read_table(Plan, document.get("plan", {}), frame), ("plan",), notes),
        all_of("states", state),
        all_of("parameters", parameter),
        all_of("terms", term),
        all_of("forcings", forcing),
        all_of("tables", table),
        all_of("outcomes", lambda name, value, frame: read_table(Outcome, value, frame, name)),
        all_of("limits", lambda name, value, frame: read_table(Limit, value, frame, name)),
        all_of("measured", measured),
        all_of("scenarios", lambda name, value, frame: read_table(ScenarioTable, value, frame, name)),
        stated,
        frame.indices,
    )


def _frame(document: Mapping[str, Any], files: Files, notes: Notes) -> Frame:
    """What all tables are read in: units, indices, files."""
    own, wrong = own_units(document)
    indices, more = read_indices(document)
    for path, mistake in (*wrong, *more):
        notes.refused(path, mistake)
    return Frame(NONE, NONE, not _states_units(document, own), files, own, indices=indices)


def _head(document: Mapping[str, Any], frame: Frame, notes: Notes) -> Sheet[Head]:
    """The keys at the top; tables that nobody knows are noted here too."""
    own = keys_of(Head)
    for key in document:
        if key not in own and key not in TABLES:
            notes.refused((key,), unknown(key, (*own, *TABLES), TABLES_LATER))
    return _noted(read_table(Head, {key: document[key] for key in document if key in own}, frame), (), notes)


def _noted(sheet: Sheet[T], path: Path, notes: Notes) -> Sheet[T]:
    for below, mistake in sheet.mistakes:
        notes.refused((*path, *below), mistake)
    return sheet


def state(name: str, value: object, frame: Frame) -> Sheet[State]:
    """A state; a joint sample of [[dependence]] may draw its start."""
    own = f"{name}_start"
    given = value.get("start", {}) if isinstance(value, Mapping) else None
    if own not in frame.joint or not isinstance(value, Mapping) or not isinstance(given, Mapping):
        return read_table(State, value, frame, name)
    try:
        drawn = drawn_jointly(own, given, frame)
    except KeyMistake as mistake:
        return read_table(State, value, frame, name).refused((("start",), mistake))
    sheet = read_table(State, {**value, "start": drawn}, frame, name)
    return sheet if drawn != given else _waiting(sheet, "start")


def parameter(name: str, value: object, frame: Frame) -> Sheet[Parameter]:
    """A parameter: a table, or in short a quantity, or a plain number where the study has no units."""
    if isinstance(value, Mapping):
        try:
            drawn = value if "value" in value else drawn_jointly(name, value, frame)
        except KeyMistake as mistake:
            return read_table(Parameter, value, frame, name).refused(((), mistake))
        sheet = read_table(Parameter, drawn, frame, name)
        return sheet if drawn != value or name not in frame.joint or "value" in value else _waiting(sheet, "")
    try:
        quantity = frame.quantity_of(value) if isinstance(value, str) else None
        if quantity is not None:
            number, unit = quantity[0], quantity[1].text
        elif isinstance(value, str):
            remedy = read.number_remedy(value) or "an expression belongs into [terms]"
            raise ValueMistake(read.show(value), 'a quantity such as "4000 kg", a number, or a table', remedy)
        else:
            number, unit = read.number(value), "1"
    except ValueMistake as mistake:
        return Sheet({"name": name}, (((), mistake),), None)
    if quantity is None and not frame.unitless:
        said = KeyMistake("a number without a unit", "a quantity", f'{name} = {{ value = {value!r}, unit = "1" }} where it has none')
        return Sheet({"name": name, "value": number}, (((), said),), None)
    whole = Parameter(name=name, value=number, unit=unit)
    return Sheet({"name": name, "value": number, "unit": unit}, (), whole, frame.unit_of(unit))


def _waiting(sheet: Sheet[T], key: str) -> Sheet[T]:
    """The same without a mistake about the distribution that a joint sample, itself wrong, would have given."""
    path = (key,) if key else ()
    return replace(sheet, mistakes=tuple(found for found in sheet.mistakes if found[0] != path), whole=None)


def term(name: str, value: object, frame: Frame) -> Sheet[Term]:
    """A term: a table, or in short the text of its expression."""
    if isinstance(value, Mapping):
        return read_table(Term, value, frame, name)
    sheet = read_table(Term, {"value": value}, frame, name)
    return replace(sheet, mistakes=tuple(((), mistake) for _, mistake in sheet.mistakes))


def _states_units(document: Mapping[str, Any], own: Units) -> bool:
    """Whether any unit is stated anywhere: a key `unit`, a unit of its own, a quantity, or a quantity inside an expression."""
    return bool(own.names) or any(key == "unit" or _has_unit(text, own) for key, text in _texts(document))


def _texts(value: object, key: str = "") -> Iterator[tuple[str, str]]:
    if isinstance(value, Mapping):
        for name, inner in value.items():
            if name not in _PROSE:
                yield from _texts(inner, name)
    elif isinstance(value, list):
        for inner in value:
            yield from _texts(inner, key)
    elif isinstance(value, str):
        yield key, value


def _has_unit(text: str, own: Units) -> bool:
    try:
        return "'" in text or parse_quantity(text, own) is not None
    except ValueMistake:
        return True

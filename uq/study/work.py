"""What follows from the declarations: rates and starts, what is watched and answered; and all mistakes among them."""

from __future__ import annotations

from collections.abc import Mapping
from dataclasses import dataclass, field
from typing import Any

from uq.analysis.ask import Quantity
from uq.errors import ExpressionError, ValueMistake, suggest
from uq.inputs.dependence import Dependences
from uq.lang.graph import Node
from uq.lang.scope import Index
from uq.lang.take import CourseAsked, TakeResult
from uq.study.dependence import judged
from uq.study.fields import Sheet
from uq.study.index import count_of, entries_of, flat
from uq.study.locate import Path
from uq.study.lowering import Wanted
from uq.study.names import WORDS
from uq.study.notes import Notes
from uq.study.plan import times_inside
from uq.study.quantities import Quantities, labels_of, over_of
from uq.study.sheets import Sheets
from uq.study.uncertain import Uncertain
from uq.units import Unit


@dataclass
class Work:
    """The pieces in the order in which they are found; `notes` gets what is wrong.

    What repeats over an index is here entry by entry, in their order: state_names, starts, rates; watched and observed; limit_names,
    limit_labels and conditions; quantities and outcomes.
    """

    document: Mapping[str, Any]
    sheets: Sheets
    notes: Notes
    dependence: tuple[Dependences, ...] = ()
    state_names: list[str] = field(default_factory=list)
    starts: list[Node | None] = field(default_factory=list)
    rates: list[Node | None] = field(default_factory=list)
    watched: list[Quantity] = field(default_factory=list)
    observed: list[Node] = field(default_factory=list)
    conditions: list[Node | None] = field(default_factory=list)
    outcomes: list[Node | None] = field(default_factory=list)
    quantities: list[Quantity] = field(default_factory=list)
    asked: list[CourseAsked] = field(default_factory=list)

    def __post_init__(self) -> None:
        self.found = Quantities(self.document, self.sheets, self.notes)
        self.low, self.inputs, self.repeats = self.found.low, self.found.inputs, self.found.repeats

    def run(self) -> None:
        """Everything in turn."""
        self.found.run()
        self.depend()
        self.rates_and_starts()
        self.watch()
        self.limits()
        self.take()
        self.forcings()
        if not self.inputs and not self.notes.mistakes:
            self.notes.at_key(("parameters",), "no uncertain number", "a distribution in at least one parameter or start")

    def depend(self) -> None:
        """What is said about inputs that depend on each other."""
        sheets = self.sheets
        unclear = [name for name, sheet in sheets.parameters.items() if sheet.whole is None]
        unclear += [f"{name}_start" for name, sheet in sheets.states.items() if sheet.whole is None]
        self.dependence = judged(sheets.dependence, tuple(item.name for item in self.inputs), unclear, self.notes)

    def rates_and_starts(self) -> None:
        """Rates in the unit of the state per time, starts in the unit of the state."""
        time = self.sheets.time.unit
        for name, sheet in self.sheets.states.items():
            unit, values, over = sheet.unit, sheet.values, over_of(sheet)
            nothing: list[Node | None] = [None] * count_of(over or ())
            self.state_names += entries_of(name, over or ())
            rate = None
            if "rate" in values and over is not None:
                wanted = Wanted(self.per_time(name, unit, time), f"for the rate of `{name}`")
                rate = self.low.number(("states", name, "rate"), values["rate"], wanted, over)
            self.rates += nothing if rate is None else [each.node for each in rate]
            self.starts += nothing if over is None or sheet.whole is None else self.start(name, sheet, over) or nothing

    def per_time(self, name: str, unit: Unit | None, time: Unit | None) -> Unit | None:
        """The unit of a rate; None where it is not known."""
        try:
            return unit.difference() / time if unit is not None and time is not None else None
        except ValueMistake as mistake:
            self.notes.refused(("states", name, "unit"), mistake)
            return None

    def start(self, name: str, sheet: Sheet[Any], over: tuple[Index, ...]) -> list[Node | None] | None:
        """The nodes of a state's start."""
        start = sheet.values.get("start")
        if isinstance(start, Uncertain):
            return [self.low.graph.name(entry) for entry in entries_of(f"{name}_start", over)]
        if isinstance(start, float | tuple):
            return [self.low.graph.number(value) for value in flat(start, over)]
        if isinstance(start, str):
            wanted = Wanted(sheet.unit, f"for the start of `{name}`")
            typed = self.low.number(("states", name, "start"), start, wanted, over, fixed_only=True)
            return None if typed is None else [each.node for each in typed]
        return None

    def watch(self) -> None:
        """The quantities that get bands."""
        sheets, low = self.sheets, self.low
        asked = sheets.plan.values.get("watch", ())
        usable = [*sheets.states, *sheets.terms]
        for index, name in enumerate(asked):
            path = ("plan", "watch", index)
            nodes = self.nodes(name)
            if name not in usable:
                found = f"the {WORDS[str(low.declared[name][0])]} `{name}`" if name in low.declared else f"the unknown name `{name}`"
                self.notes.at_value(path, found, "a state or a term", _watch_remedy(name, usable))
            elif nodes and nodes[0].truth:
                self.notes.at_value(path, f"`{name}`, which is true or false", "a number", "write it as a limit, or where(condition, 1, 0)")
        for name in asked or sheets.states:
            if name in usable:
                sheet = sheets.states.get(name) or sheets.terms[name]
                nodes = self.nodes(name)
                self.observed += nodes
                self.watched += _quantities(name, sheet, self.unit(name), over_of(sheet) or ()) if nodes else []

    def nodes(self, name: str) -> tuple[Node, ...]:
        """The nodes of a name, one for every entry; nothing where it is not known."""
        repeated = self.low.repeated.get(name)
        if repeated is not None:
            return repeated.nodes
        return (self.low.known[name][0],) if name in self.low.known else ()

    def unit(self, name: str) -> Unit:
        """The unit of a name that is known."""
        return self.low.repeated[name].unit if name in self.low.repeated else self.low.known[name][1]

    def limits(self) -> None:
        """Conditions of limits and the times at which they are quoted."""
        for name, sheet in self.sheets.limits.items():
            over = over_of(sheet)
            if "when" in sheet.values and over is not None:
                self.conditions += self.low.condition(("limits", name, "when"), sheet.values["when"], over) or [None] * count_of(over)
                self.found.named(name, sheet, over)
            time = self.sheets.time.whole
            if time is not None and sheet.values.get("by"):
                for path, mistake in times_inside(("limits", name, "by"), sheet.values["by"], time, "times"):
                    self.notes.refused(path, mistake)

    def take(self) -> None:
        """Outcomes and the courses they are taken from."""
        for name, sheet in self.sheets.outcomes.items():
            over = over_of(sheet)
            if "take" in sheet.values and self.sheets.time.unit is not None and over is not None:
                path, wanted = ("outcomes", name, "take"), Wanted(sheet.unit, f"as its `unit` says for the outcome `{name}`")
                taken = self.low.take(path, sheet.values["take"], wanted, len(self.asked), over)
                if taken is not None:
                    self.windows(path, taken[0])
                    self.asked += [course for each in taken for course in each.courses]
                    self.outcomes += [each.node for each in taken]
                    self.quantities += _quantities(name, sheet, sheet.unit or taken[0].unit, over)
                    self.found.named(name, sheet, over)

    def windows(self, path: Path, taken: TakeResult) -> None:
        """The windows of courses must lie inside the time of the study."""
        time = self.sheets.time.whole
        if time is None:
            return
        for course in taken.courses:
            for moment, part in zip((course.start, course.stop), course.tree.args[1:], strict=False):
                if moment is not None and not time.start <= moment <= time.stop:
                    said = f"a time between start and stop, {time.span}"
                    self.notes.refused(path, ExpressionError(part.start, part.stop - part.start, f"`{part.text}`", said))

    def forcings(self) -> None:
        """Forcings must cover the whole time, unless they say what holds outside."""
        time = self.sheets.time.whole
        for name, sheet in self.sheets.forcings.items():
            rows = sheet.values.get("rows")
            if time is None or not rows or sheet.values.get("outside", "refuse") != "refuse":
                continue
            file = sheet.values.get("file")
            for edge, row, index in ((time.start, rows[0], 0), (time.stop, rows[-1], len(rows) - 1)):
                short = row[0] > edge if index == 0 else row[0] < edge
                if short or (len(rows) == 1 and row[0] != edge):
                    found = f"{'first' if index == 0 else 'last'} row at {row[0]:g}" + (f" in {file}" if file else "")
                    said = f"rows from the start to the stop, {time.span}"
                    path: Path = ("forcings", name, "file") if file else ("forcings", name, "rows", index)
                    self.notes.at_value(path, found, said, f'add a row at {edge:g}, or say what holds: outside = "hold"')


def _watch_remedy(name: str, usable: list[str]) -> str:
    """What was probably meant: a name nearby, or one entry of what repeats."""
    if "[" in name and name.partition("[")[0] in usable:
        return f'watch all of them, or give this one a name in [terms]: one = "{name}"'
    return suggest(name, usable)


def _quantities(name: str, sheet: Sheet[Any], unit: Unit, over: tuple[Index, ...]) -> list[Quantity]:
    """A quantity that is answered, or one for every entry."""
    text = sheet.values.get("unit") or unit.text
    difference = unit.difference().text if unit.temperature == "scale" else text
    entries = zip(entries_of(name, over), labels_of(sheet.values.get("label") or name, over), strict=True)
    return [Quantity(entry, label, text, difference) for entry, label in entries]

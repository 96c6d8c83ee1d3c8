"""What follows from the declarations: one graph of equations, the inputs, what is watched, the times; and all mistakes among them."""

from __future__ import annotations

from collections.abc import Mapping
from dataclasses import dataclass, field
from typing import Any

from uq.analysis.ask import Quantity
from uq.errors import ExpressionError, ValueMistake, suggest
from uq.inputs.dependence import Dependences
from uq.inputs.inputs import Input
from uq.lang.graph import Node
from uq.lang.scope import TableUnits
from uq.lang.take import CourseAsked, TakeResult
from uq.study.dependence import judged
from uq.study.locate import Path
from uq.study.lowering import Lowering
from uq.study.names import WORDS, declared, later_names
from uq.study.notes import Notes
from uq.study.order import order
from uq.study.plan import times_inside
from uq.study.sheets import Sheets
from uq.study.uncertain import Uncertain
from uq.units import NONE, Unit, parse_unit


@dataclass
class Work:
    """The pieces in the order in which they are found; `notes` gets what is wrong."""

    document: Mapping[str, Any]
    sheets: Sheets
    notes: Notes
    inputs: list[Input] = field(default_factory=list)
    dependence: tuple[Dependences, ...] = ()
    starts: list[Node | None] = field(default_factory=list)
    rates: list[Node | None] = field(default_factory=list)
    watched: list[Quantity] = field(default_factory=list)
    observed: list[Node] = field(default_factory=list)
    conditions: list[Node | None] = field(default_factory=list)
    outcomes: list[Node | None] = field(default_factory=list)
    quantities: list[Quantity] = field(default_factory=list)
    asked: list[CourseAsked] = field(default_factory=list)

    def __post_init__(self) -> None:
        names, later = declared(self.document), later_names(self.document)
        self.low = Lowering(self.notes, names, later, self.sheets.unitless, self.sheets.time.unit or NONE, self.sheets.own)

    def run(self) -> None:
        """Everything in turn."""
        self.leaves()
        self.depend()
        self.terms()
        self.rates_and_starts()
        self.watch()
        self.limits()
        self.take()
        self.forcings()
        if not self.inputs and not self.notes.mistakes:
            self.notes.at_key(("parameters",), "no uncertain number", "a distribution in at least one parameter or start")

    def leaf(self, name: str, unit: Unit | None) -> None:
        """A name of its own in the graph; without a unit it is broken."""
        if unit is None:
            self.low.broken.add(name)
        else:
            self.low.known[name] = (self.low.graph.name(name), unit)

    def leaves(self) -> None:
        """States, forcings, time, parameters and uncertain starts."""
        sheets, low = self.sheets, self.low
        self.leaf("time", sheets.time.unit)
        for name, state in sheets.states.items():
            self.leaf(name, state.unit)
        for name, forcing in sheets.forcings.items():
            self.leaf(name, forcing.unit)
        for name, table in sheets.tables.items():
            argument = table.values.get("of")
            if argument is None or table.unit is None:
                low.broken.add(name)
            else:
                low.tables[name] = TableUnits(parse_unit(argument.unit, sheets.own), table.unit)
        for name, parameter in sheets.parameters.items():
            self.leaf(name, parameter.unit)
            given = parameter.values
            if name in low.known and given.get("value") is not None and given.get("distribution") is None:
                low.known[name] = (low.graph.number(given["value"]), low.known[name][1])
            else:
                low.fixed.add(name)
            if parameter.whole is not None and parameter.whole.distribution is not None:
                self.inputs.append(_input(name, parameter.whole.label or name, parameter.whole, parameter.unit))
        for name, state in sheets.states.items():
            start = state.values.get("start")
            if isinstance(start, Uncertain):
                own = f"{name}_start"
                if own in low.declared:
                    found = f"the name `{own}`, which the uncertain start of `{name}` has as an input"
                    self.notes.at_key(low.declared[own], found, "another name")
                low.fixed.add(own)
                self.inputs.append(_input(own, f"{state.values.get('label') or name}, start", start, state.unit))

    def depend(self) -> None:
        """What is said about inputs that depend on each other."""
        sheets = self.sheets
        unclear = [name for name, sheet in sheets.parameters.items() if sheet.whole is None]
        unclear += [f"{name}_start" for name, sheet in sheets.states.items() if sheet.whole is None]
        self.dependence = judged(sheets.dependence, tuple(item.name for item in self.inputs), unclear, self.notes)

    def terms(self) -> None:
        """Terms, each after those it uses; cycles named in full."""
        low, terms = self.low, self.sheets.terms
        paths = {name: self.sheets.text_path("terms", name, self.document) for name in terms}
        for name, sheet in terms.items():
            if "value" in sheet.values:
                low.tree(paths[name], sheet.values["value"])
        ordered, cycles = order({name: low.used(paths[name]) for name in terms})
        for cycle in cycles:
            low.broken.update(cycle)
            found = f"a cycle among terms: {' -> '.join([*cycle, cycle[0]])}"
            remedy = "what depends on its own past is a state" if len(cycle) == 1 else ""
            self.notes.at_key(("terms", cycle[0]), found, "terms that do not depend on themselves", remedy)
        for name in ordered:
            self.term(name, paths[name])

    def term(self, name: str, path: Path) -> None:
        """One term into the names known."""
        sheet, low = self.sheets.terms[name], self.low
        typed = None
        if "value" in sheet.values and sheet.unit is None:
            typed = low.typed(path, sheet.values["value"])
        elif "value" in sheet.values:
            typed = low.number(path, sheet.values["value"], sheet.unit, f"as its `unit` says for the term `{name}`")
        if typed is None or name in low.known:
            low.broken.add(name)
        else:
            low.known[name] = (typed.node, typed.unit)

    def rates_and_starts(self) -> None:
        """Rates in the unit of the state per time, starts in the unit of the state."""
        time = self.sheets.time.unit
        for name, sheet in self.sheets.states.items():
            unit, values = sheet.unit, sheet.values
            rate = None
            if "rate" in values:
                needed = self.per_time(name, unit, time)
                rate = self.low.number(("states", name, "rate"), values["rate"], needed, f"for the rate of `{name}`")
            self.rates.append(rate.node if rate is not None else None)
            self.starts.append(self.start(name, values.get("start"), unit))

    def per_time(self, name: str, unit: Unit | None, time: Unit | None) -> Unit | None:
        """The unit of a rate; None where it is not known."""
        try:
            return unit.difference() / time if unit is not None and time is not None else None
        except ValueMistake as mistake:
            self.notes.refused(("states", name, "unit"), mistake)
            return None

    def start(self, name: str, start: object, unit: Unit | None) -> Node | None:
        """The node of a state's start."""
        if isinstance(start, Uncertain):
            return self.low.graph.name(f"{name}_start")
        if isinstance(start, float):
            return self.low.graph.number(start)
        if isinstance(start, str):
            typed = self.low.number(("states", name, "start"), start, unit, f"for the start of `{name}`", fixed_only=True)
            return typed.node if typed is not None else None
        return None

    def watch(self) -> None:
        """The quantities that get bands."""
        sheets, low = self.sheets, self.low
        asked = sheets.plan.values.get("watch", ())
        usable = [*sheets.states, *sheets.terms]
        for index, name in enumerate(asked):
            path = ("plan", "watch", index)
            if name not in usable:
                found = f"the {WORDS[str(low.declared[name][0])]} `{name}`" if name in low.declared else f"the unknown name `{name}`"
                self.notes.at_value(path, found, "a state or a term", suggest(name, usable))
            elif name in low.known and low.known[name][0].truth:
                self.notes.at_value(path, f"`{name}`, which is true or false", "a number", "write it as a limit, or where(condition, 1, 0)")
        for name in asked or sheets.states:
            if name in low.known and name in usable:
                node, unit = low.known[name]
                sheet = sheets.states.get(name) or sheets.terms[name]
                self.watched.append(_quantity(name, sheet.values, unit))
                self.observed.append(node)

    def limits(self) -> None:
        """Conditions of limits and the times at which they are quoted."""
        for name, sheet in self.sheets.limits.items():
            if "when" in sheet.values:
                self.conditions.append(self.low.condition(("limits", name, "when"), sheet.values["when"]))
            time = self.sheets.time.whole
            if time is not None and sheet.values.get("by"):
                for path, mistake in times_inside(("limits", name, "by"), sheet.values["by"], time, "times"):
                    self.notes.refused(path, mistake)

    def take(self) -> None:
        """Outcomes and the courses they are taken from."""
        for name, sheet in self.sheets.outcomes.items():
            if "take" in sheet.values and self.sheets.time.unit is not None:
                unit, path, what = sheet.unit, ("outcomes", name, "take"), f"as its `unit` says for the outcome `{name}`"
                taken = self.low.take(path, sheet.values["take"], unit, what, len(self.asked))
                if taken is not None:
                    self.windows(path, taken)
                    self.asked += taken.courses
                    self.outcomes.append(taken.node)
                    self.quantities.append(_quantity(name, sheet.values, unit or taken.unit))

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


def _input(name: str, label: str, given: Any, unit: Unit | None) -> Input:
    unit = unit or NONE
    return Input(
        name,
        label,
        unit.text,
        given.distribution,
        given.source,
        given.kind,
        given.evidence,
        given.group,
        unit.difference().text if unit.temperature == "scale" else unit.text,
    )


def _quantity(name: str, values: Mapping[str, Any], unit: Unit) -> Quantity:
    text = values.get("unit") or unit.text
    return Quantity(name, values.get("label") or name, text, unit.difference().text if unit.temperature == "scale" else text)

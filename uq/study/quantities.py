"""The quantities of a study as nodes of one graph: states, forcings, tables, parameters, terms; and its inputs."""

from __future__ import annotations

from collections.abc import Iterable, Mapping
from dataclasses import dataclass, field
from typing import Any

from uq.inputs.inputs import Input
from uq.lang.scope import Index, Repeated, TableUnits, Typed
from uq.study.fields import Sheet
from uq.study.index import Repeat, entries_of, flat, keys_of_entries, sound
from uq.study.locate import Path
from uq.study.lowering import Lowering, Wanted
from uq.study.names import declared, later_names
from uq.study.notes import Notes
from uq.study.order import order
from uq.study.sheets import Sheets
from uq.study.uncertain import Uncertain
from uq.units import NONE, Unit, parse_unit


def over_of(sheet: Sheet[Any]) -> tuple[Index, ...] | None:
    """Over which indices a table repeats; None where that is wrong."""
    wrong = any(path[:1] == ("over",) for path, _ in sheet.mistakes)
    return None if wrong else sound(sheet.values.get("over", ()))


@dataclass
class Quantities:
    """Names with their nodes in `low`, and the inputs, in the order in which they are found; `notes` gets what is wrong."""

    document: Mapping[str, Any]
    sheets: Sheets
    notes: Notes
    inputs: list[Input] = field(default_factory=list)
    repeats: list[Repeat] = field(default_factory=list)

    def __post_init__(self) -> None:
        names, later, time = declared(self.document), later_names(self.document), self.sheets.time.unit or NONE
        indices = {name: index for name, index in self.sheets.indices.items() if index is not None}
        self.low = Lowering(self.notes, names, later, self.sheets.unitless, time, self.sheets.own, indices)
        self.low.broken.update(name for name in self.sheets.indices if name not in indices)

    def run(self) -> None:
        """Everything in turn."""
        self.leaves()
        self.parameters()
        self.uncertain_starts()
        self.terms()

    def leaf(self, name: str, unit: Unit | None) -> None:
        """A name of its own in the graph; without a unit it is broken."""
        if unit is None:
            self.low.broken.add(name)
        else:
            self.low.stands(name, self.low.graph.name(name), unit)

    def leaves(self) -> None:
        """States, forcings, tables and time."""
        sheets, low = self.sheets, self.low
        self.leaf("time", sheets.time.unit)
        for name, state in sheets.states.items():
            over = over_of(state)
            if over:
                self.repeat(("states", name), state, over, (low.graph.name(entry) for entry in entries_of(name, over)))
            else:
                self.leaf(name, None if over is None else state.unit)
        for name, forcing in sheets.forcings.items():
            self.leaf(name, forcing.unit)
        for name, table in sheets.tables.items():
            argument = table.values.get("of")
            if argument is None or table.unit is None:
                low.broken.add(name)
            else:
                low.tables[name] = TableUnits(parse_unit(argument.unit, sheets.own), table.unit)

    def repeat(self, path: Path, sheet: Sheet[Any], over: tuple[Index, ...], nodes: Iterable[Any]) -> None:
        """What repeats, with its nodes; without a unit it is broken."""
        name, edge = str(path[1]), self.edge_of(str(path[1]), sheet)
        if sheet.unit is None:
            self.low.broken.add(name)
        else:
            self.low.repeats(name, Repeated(over, tuple(nodes), sheet.unit), edge, path)
            self.low.edge_text(name, path, edge)
        self.named(name, sheet, over)

    def edge_of(self, name: str, sheet: Sheet[Any]) -> Any:
        """What stands beyond the ends; where that could not be read, what uses a neighbour is left alone."""
        if any(path[:1] == ("edge",) for path, _ in sheet.mistakes):
            self.low.broken.add(f"edge of {name}")
        return sheet.values.get("edge")

    def named(self, name: str, sheet: Sheet[Any], over: tuple[Index, ...]) -> None:
        """What results stack under one name."""
        if over:
            self.repeats.append(Repeat(name, sheet.values.get("label") or name, over))

    def parameters(self) -> None:
        """Fixed ones as numbers, uncertain ones as names of inputs."""
        low = self.low
        for name, sheet in self.sheets.parameters.items():
            over, given = over_of(sheet), sheet.values
            value = given.get("value") if given.get("distribution") is None else None
            if over is None or (over and sheet.whole is None):
                low.broken.add(name)
                continue
            if over:
                fixed = None if value is None else [low.graph.number(each) for each in flat(value, over)]
                self.repeat(("parameters", name), sheet, over, fixed or map(low.graph.name, entries_of(name, over)))
            else:
                self.leaf(name, sheet.unit)
                if name in low.known and isinstance(value, float):
                    low.stands(name, low.graph.number(value), low.known[name][1])
            if value is None:
                low.fixed.update(entries_of(name, over))
            if sheet.whole is not None and sheet.whole.distribution is not None:
                self.inputs += inputs_of(name, sheet.whole.label or name, sheet.whole, sheet.unit, over)

    def uncertain_starts(self) -> None:
        """The inputs that starts of states are."""
        for name, state in self.sheets.states.items():
            start, own = state.values.get("start"), f"{name}_start"
            if isinstance(start, Uncertain):
                if own in self.low.declared:
                    found = f"the name `{own}`, which the uncertain start of `{name}` has as an input"
                    self.notes.at_key(self.low.declared[own], found, "another name")
                over = over_of(state) or ()
                label = f"{state.values.get('label') or name}, start"
                self.low.fixed.update(entries_of(own, over))
                self.inputs += inputs_of(own, label, start, state.unit, over)
                if over:
                    self.repeats.append(Repeat(own, label, over))

    def terms(self) -> None:
        """Terms, each after those it uses; cycles named in full."""
        low, terms = self.low, self.sheets.terms
        paths = {name: self.sheets.text_path("terms", name, self.document) for name in terms}
        for name, sheet in terms.items():
            if "value" in sheet.values:
                low.tree(paths[name], sheet.values["value"])
            low.edge_text(name, ("terms", name), sheet.values.get("edge"))
        ordered, cycles = order({name: low.used(paths[name]) for name in terms})
        for cycle in cycles:
            low.broken.update(cycle)
            found = f"a cycle among terms: {' -> '.join([*cycle, cycle[0]])}"
            remedy = "what depends on its own past is a state" if len(cycle) == 1 else ""
            self.notes.at_key(("terms", cycle[0]), found, "terms that do not depend on themselves", remedy)
        for name in ordered:
            self.term(name, paths[name])
        low.lower_edges(list(low.edges))

    def term(self, name: str, path: Path) -> None:
        """One term into the names known."""
        sheet, low = self.sheets.terms[name], self.low
        over = over_of(sheet)
        typed: list[Typed] | None = None
        if "value" in sheet.values and over is not None:
            if sheet.unit is None:
                typed = low.typed(path, sheet.values["value"], over)
            else:
                wanted = Wanted(sheet.unit, f"as its `unit` says for the term `{name}`")
                typed = low.number(path, sheet.values["value"], wanted, over)
        if typed is None or over is None or name in low.known or name in low.repeated:
            low.broken.add(name)
        elif over:
            low.repeats(name, Repeated(over, tuple(each.node for each in typed), typed[0].unit), self.edge_of(name, sheet), ("terms", name))
            self.named(name, sheet, over)
        else:
            low.stands(name, typed[0].node, typed[0].unit)


def inputs_of(name: str, label: str, given: Any, unit: Unit | None, over: tuple[Index, ...]) -> list[Input]:
    """The input of an uncertain number; where it repeats, one for every entry, labelled name[3]."""
    unit = unit or NONE
    difference = unit.difference().text if unit.temperature == "scale" else unit.text
    about = (unit.text, given.distribution, given.source, given.kind, given.evidence, given.group, difference)
    entries = zip(entries_of(name, over), labels_of(label, over), strict=True)
    return [Input(entry, told, *about) for entry, told in entries]


def labels_of(label: str, over: tuple[Index, ...]) -> list[str]:
    """What every entry is called in reports: "Cell temperature [3]"."""
    return [f"{label} [{key}]" for key in keys_of_entries(over)] if over else [label]

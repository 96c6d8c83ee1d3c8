"""Measured values of watched quantities, in the units of the study and within its time."""

from __future__ import annotations

from dataclasses import dataclass, field, replace

from uq.errors import ValueMistake, suggest
from uq.lang.scope import Repeated
from uq.study.given import Measured
from uq.study.plan import Time
from uq.study.work import Work
from uq.units import Unit


@dataclass
class Observations:
    """What was measured, and what is to be said of it."""

    made: list[Measured] = field(default_factory=list)
    said: list[str] = field(default_factory=list)


def observations(work: Work) -> Observations:
    """All observations; they must be of watched quantities. Those at other times are left out, and that is said."""
    found = Observations()
    sheets, low, notes = work.sheets, work.low, work.notes
    watched = sheets.plan.values.get("watch") or list(sheets.states)
    for name, sheet in sheets.measured.items():
        if name not in watched:
            known = "which is not watched" if name in low.declared else "which is unknown"
            remedy = suggest(name, watched) or (f'watch = [..., "{name}"] in [plan]' if name in low.declared else "")
            notes.at_key(("measured", name), f"observations of `{name}`, {known}", "a watched quantity", remedy)
        elif name in low.repeated:
            notes.at_key(
                ("measured", name), f"observations of `{name}`, which repeats", "a single quantity", _single(name, low.repeated[name])
            )
        elif sheet.whole is not None and sheets.time.whole is not None and name in low.known and sheet.unit is not None:
            try:
                _take(found, sheet.whole, (sheet.unit, low.known[name][1]), sheets.time.whole)
            except ValueMistake as mistake:
                notes.refused(("measured", name), mistake)
    return found


def _single(name: str, given: Repeated) -> str:
    first = ",".join(index.labels[0] for index in given.over)
    return f'name the one that was measured in [terms], one = "{name}[{first}]", watch it, and write [measured.one]'


def _take(found: Observations, given: Measured, units: tuple[Unit, Unit], time: Time) -> None:
    """The observations of one quantity, from their own unit to that of the quantity; raises ValueMistake with its key."""
    own, unit = units
    if not own.same_dimension(unit):
        said = f"values in {unit.text}, as `{given.name}` has, or a unit that converts to it"
        raise ValueMistake(f"values in {own.text}", said, key="value")
    inside = [row for row in given.rows if time.start <= row[0] <= time.stop]
    if not inside:
        said = f"times between start and stop, {time.span}"
        raise ValueMistake(f"no observation in the time of the study in {given.file}", said, key="time")
    if len(inside) < len(given.rows):
        left = f"{len(given.rows) - len(inside)} of {len(given.rows)} observations of `{given.name}`"
        found.said.append(f"{given.file}: {left} are outside of the time and left out")
    rows = tuple((moment, own.convert(value, unit)) for moment, value in inside)
    sd = None if given.sd is None else own.difference().convert(given.sd, unit.difference())
    found.made.append(replace(given, rows=rows, sd=sd))

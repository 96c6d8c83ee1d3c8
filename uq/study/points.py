"""How the tables of what is given by points are read: rows as they stand, or two columns of a file in the units asked for."""

from __future__ import annotations

from collections.abc import Mapping, Sequence
from dataclasses import replace

import numpy as np
from numpy.typing import NDArray

from uq.errors import ValueMistake
from uq.study.columns import Rows
from uq.study.fields import Sheet, read_table
from uq.study.given import Column, ForcingCourse, GivenTable, Measured, Points, TimeColumn
from uq.study.locate import Path
from uq.study.notes import KeyMistake, Refused
from uq.study.plan import MOST_TIMES
from uq.study.values import Frame
from uq.units import NONE, Unit


def forcing(name: str, value: object, frame: Frame) -> Sheet[ForcingCourse]:
    """A forcing with its rows, wherever they stand."""
    sheet = read_table(ForcingCourse, value, frame, name)
    given = sheet.whole
    if given is None or not given.file or given.time is None or given.value is None:
        return sheet
    if given.rows:
        return sheet.refused((("file",), KeyMistake("`file` beside `rows`", "one of the two")))
    try:
        rows = _from_file(given.file, given.time, given.value, sheet.unit, frame)
    except Refused as refused:
        return sheet.refused(*refused.mistakes)
    return Sheet({**sheet.values, "rows": rows}, (), replace(given, rows=rows), sheet.unit)


def table(name: str, value: object, frame: Frame) -> Sheet[GivenTable]:
    """A table; the first of each pair is in the unit of its argument."""
    return read_table(GivenTable, value, replace(frame, time=_unit_below(value, "of", frame)), name)


def measured(name: str, value: object, frame: Frame) -> Sheet[Measured]:
    """Observations, with their times in the time unit of the study and their values still as in the file."""
    unit = _unit_below(value, "value", frame)
    sheet = read_table(Measured, value, frame.within(unit), name)
    given = sheet.whole
    if given is None:
        return sheet
    try:
        rows = _from_file(given.file, given.time, given.value, unit, frame, repeats=True)
    except Refused as refused:
        return replace(sheet.refused(*refused.mistakes), unit=unit)
    return Sheet({**sheet.values, "rows": rows}, (), replace(given, rows=rows), unit)


def _unit_below(table: object, key: str, frame: Frame) -> Unit | None:
    """The unit of a table within a table, None where it is missing or wrong."""
    inner = table.get(key) if isinstance(table, Mapping) else None
    given = inner.get("unit") if isinstance(inner, Mapping) else None
    if given is None:
        return NONE if frame.unitless else None
    try:
        return frame.unit_of(given) if isinstance(given, str) else None
    except ValueMistake:
        return None


def _from_file(name: str, time: TimeColumn, value: Column, unit: Unit | None, frame: Frame, repeats: bool = False) -> Points:
    """Rows of two columns of a file, times in the time unit of the study, values in `unit`; raises Refused."""
    wrong: list[tuple[Path, ValueMistake]] = []
    for key, column in (("time", time), ("value", value)):
        try:
            frame.files.place_of(name, column.column)
        except ValueMistake as mistake:
            wrong.append(((key, "column") if mistake.key else ("file",), ValueMistake(mistake.found, mistake.expected, mistake.remedy)))
            if not mistake.key:
                break
    for key, column, needed in (("time", time, frame.time), ("value", value, unit)):
        own = frame.unit_of(column.unit)
        if needed is not None and not own.same_dimension(needed):
            wrong.append(((key, "unit"), ValueMistake(f"a column in {own.text}", f"one in {needed.text} or a unit that converts to it")))
    if wrong:
        raise Refused(wrong)
    try:
        found = frame.files.rows(name, (time.column, value.column))
        return _converted(found, (time, value), (frame.time, unit), frame, repeats)
    except ValueMistake as mistake:
        raise Refused([(("file",), mistake)]) from None


def _converted(found: Rows, columns: Sequence[Column], units: Sequence[Unit | None], frame: Frame, repeats: bool) -> Points:
    """The rows of a file in the units asked for; raises ValueMistake where they are too many or not in order."""
    if len(found.lines) > MOST_TIMES:
        raise ValueMistake(f"{len(found.lines)} rows in {found.file}", f"at most {MOST_TIMES}")
    times, values = (
        _in_unit(numbers, frame.unit_of(column.unit), unit) for numbers, column, unit in zip(found.values, columns, units, strict=True)
    )
    steps = np.diff(times)
    for row in np.flatnonzero((steps < 0) if repeats else (steps <= 0))[:1] + 1:
        before, after = found.values[0][row - 1 : row + 1]
        expected = "rows in order of time" + ("" if repeats else ", each time once")
        raise ValueMistake(f"{after:g} after {before:g} in {found.place(row)}", expected)
    return tuple(zip(times, values, strict=True))


def _in_unit(numbers: NDArray[np.float64], own: Unit, unit: Unit | None) -> list[float]:
    """Numbers converted at once; whole factors multiply and divide, so that 3600 s is 60 min to the last digit."""
    if unit is not None and not own.same(unit):
        ratio, shift = own.factor / unit.factor, float((own.offset - unit.offset) / unit.factor)
        whole = max(ratio.numerator, ratio.denominator) < 2**53
        with np.errstate(over="ignore"):
            numbers = numbers * float(ratio.numerator) / float(ratio.denominator) if whole else numbers * float(ratio)
        numbers = numbers + shift if shift else numbers
        if not np.all(np.isfinite(numbers)):
            raise ValueMistake(f"a number in {own.text} that is beyond all measure in {unit.text}", "finite numbers")
    plain: list[float] = numbers.tolist()
    return plain

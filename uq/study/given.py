"""The declarations of what is given by points: courses over time, tables of a state, measured values."""

from __future__ import annotations

from dataclasses import dataclass

from uq.errors import ValueMistake
from uq.model.code import LARGEST_TABLE
from uq.study import values as read
from uq.study.fields import entry, read_part, refuse, unit_entry
from uq.study.notes import KeyMistake
from uq.study.plan import Found, time_unit

Points = tuple[tuple[float, float], ...]


@dataclass(frozen=True, kw_only=True)
class Column:
    """`value = { ... }` of a file: one of its columns."""

    column: str = entry("its name in the header line", read.text)
    unit: str = unit_entry('unit of the numbers in the file, "1" for none', read.unit)


@dataclass(frozen=True, kw_only=True)
class TimeColumn(Column):
    """`time = { ... }` of a file: the column with the times."""

    unit: str = unit_entry("unit of the numbers in the file", time_unit)


@dataclass(frozen=True, kw_only=True)
class Argument:
    """`of = { ... }` of a table: what its argument is measured in."""

    unit: str = unit_entry('its unit, "1" for none', read.unit)


COLUMN, TIME_COLUMN, ARGUMENT = read_part(Column), read_part(TimeColumn), read_part(Argument)


def rising(rows: Points, what: str) -> Found:
    """Mistakes of rows that must be in order."""
    if not rows:
        or_file = ", or a `file` with `time` and `value`" if what == "time" else ""
        yield ("rows",), ValueMistake("no rows", f"rows = [[{what}, value], ...]{or_file}")
    places = [row[0] for row in rows]
    for index in read.ascending(places):
        found = f"{places[index]:g} after {places[index - 1]:g}"
        yield ("rows", index, 0), ValueMistake(found, f"rows in order of {what}, each {what} once")


@dataclass(frozen=True, kw_only=True)
class ForcingCourse:
    """`[forcings.NAME]`: a given course over time, by `rows` or from a `file`; `rows` holds it in either case."""

    name: str
    label: str = entry("how it is called in reports", read.text, "", "the name")
    unit: str = unit_entry('its unit, "1" for none', read.unit)
    rows: Points = entry("[[time, value], ...] in order of time", read.rows, (), "or `file`")  # noqa: RUF009
    file: str = entry("a file with such rows (UTF-8, comma or semicolon separated, header line, decimal point)", read.text, "", "or `rows`")
    time: TimeColumn | None = entry("{ column, unit } of the times in the file", TIME_COLUMN, None, "")  # noqa: RUF009
    value: Column | None = entry("{ column, unit } of the values in the file", COLUMN, None, "")  # noqa: RUF009
    interpolation: str = entry(
        '"linear", "step" (a value holds until the next row) or "smooth" (a monotone cubic)',
        read.choice(("linear", "step", "smooth")),
        "linear",
    )
    outside: str = entry(
        'what holds before the first row and after the last: "refuse" (rows must cover the whole time), "hold" or "repeat"',
        read.choice(("refuse", "hold", "repeat")),
        "refuse",
    )

    def __post_init__(self) -> None:
        refuse(self.mistakes())

    def mistakes(self) -> Found:
        """What cannot stand in this table."""
        if self.file:
            for key in ("time", "value"):
                if getattr(self, key) is None:
                    yield (), KeyMistake(f"`file` without `{key}`", f'{key} = {{ column = "...", unit = "..." }}')
        else:
            for key in ("time", "value"):
                if getattr(self, key) is not None:
                    yield (key,), KeyMistake(f"`{key}` without `file`", "a `file` with this column")
            yield from rising(self.rows, "time")
        if self.outside == "repeat" and len(self.rows) == 1:
            yield ("outside",), ValueMistake('"repeat" of a single row', "two rows or more", 'one value for all times is "hold"')


@dataclass(frozen=True, kw_only=True)
class GivenTable:
    """`[tables.NAME]`: a function given by points, used as NAME(x) in expressions."""

    name: str
    label: str = entry("how it is called in reports", read.text, "", "the name")
    of: Argument = entry("{ unit } of its argument", ARGUMENT)  # noqa: RUF009
    unit: str = unit_entry('unit of its values, "1" for none', read.unit)
    rows: Points = entry("[[argument, value], ...] in order of the argument", read.rows)  # noqa: RUF009
    interpolation: str = entry('"linear" or "smooth" (a monotone cubic)', read.choice(("linear", "smooth")), "linear")
    outside: str = entry(
        'what holds beyond the rows: "refuse" (the member fails) or "hold" the first and last value',
        read.choice(("refuse", "hold")),
        "refuse",
    )

    def __post_init__(self) -> None:
        refuse(self.mistakes())

    def mistakes(self) -> Found:
        """What cannot stand in this table."""
        yield from rising(self.rows, "argument")
        if len(self.rows) == 1 or len(self.rows) > LARGEST_TABLE:
            count = "1 row" if len(self.rows) == 1 else f"{len(self.rows)} rows"
            yield ("rows",), ValueMistake(count, f"at least 2, at most {LARGEST_TABLE}")


@dataclass(frozen=True, kw_only=True)
class Measured:
    """`[measured.NAME]`: observations of a watched quantity; `rows` holds them as (time, value) in the units of the study."""

    name: str
    file: str = entry("the file with the observations (UTF-8, comma or semicolon separated, header line, decimal point)", read.text)
    time: TimeColumn = entry("{ column, unit } of the times in the file", TIME_COLUMN)  # noqa: RUF009
    value: Column = entry("{ column, unit } of the values in the file", COLUMN)  # noqa: RUF009
    sd: float | None = entry("standard deviation of one measurement", read.deviation, None, "not stated")
    rows: Points = ()

"""What a study without mistakes hands to the other rooms: equations, times, limits, valid values."""

from __future__ import annotations

from collections.abc import Iterable
from typing import Any, cast

import numpy as np
from numpy.typing import NDArray

from uq.analysis.ask import LimitAsked
from uq.lang.graph import Node
from uq.model.code import Course, CourseKind, Equations, Forcing, Interpolation, Outside, Table, TableInterpolation, TableOutside
from uq.study.given import ForcingCourse, GivenTable, Measured
from uq.study.index import count_of, entries_of, sound
from uq.study.plan import Time
from uq.study.quantities import labels_of, over_of
from uq.study.times import Times, all_times
from uq.study.work import Work


def equations(work: Work, times: Times, time: Time) -> Equations:
    """The equations of a study without mistakes."""
    observed = list(work.observed)
    courses = []
    for asked in work.asked:
        if asked.argument not in observed:
            observed.append(asked.argument)
        start = times.nearest(time.start if asked.start is None else asked.start)
        stop = times.nearest(time.stop if asked.stop is None else asked.stop)
        courses.append(Course(cast(CourseKind, asked.kind), observed.index(asked.argument), start, stop))
    return Equations(
        graph=work.low.graph,
        inputs=tuple(item.name for item in work.inputs),
        states=tuple(work.state_names),
        starts=_all(work.starts),
        rates=_all(work.rates),
        forcings=tuple(_forcing(sheet.whole) for sheet in work.sheets.forcings.values() if sheet.whole is not None),
        tables=tuple(_table(sheet.whole) for sheet in work.sheets.tables.values() if sheet.whole is not None),
        observed=tuple(observed),
        conditions=_all(work.conditions),
        courses=tuple(courses),
        outcomes=_all(work.outcomes),
    )


def _forcing(given: ForcingCourse) -> Forcing:
    times, values = zip(*given.rows, strict=True)
    return Forcing(given.name, times, values, cast(Interpolation, given.interpolation), cast(Outside, given.outside))


def _table(given: GivenTable) -> Table:
    points, values = zip(*given.rows, strict=True)
    return Table(given.name, points, values, cast(TableInterpolation, given.interpolation), cast(TableOutside, given.outside))


def _all(nodes: list[Node | None]) -> tuple[Node, ...]:
    return tuple(node for node in nodes if node is not None)


def limits_asked(work: Work, times: Times, time: Time) -> tuple[LimitAsked, ...]:
    """The limits with their times as they are solved."""
    found = []
    for sheet in work.sheets.limits.values():
        limit = sheet.whole
        if limit is not None:
            by = tuple(times.nearest(moment) for moment in limit.by or (time.stop,))
            over = sound(limit.over) or ()
            entries = zip(entries_of(limit.name, over), labels_of(limit.label or limit.name, over), strict=True)
            found += [LimitAsked(entry, label, limit.when, by, limit.accept) for entry, label in entries]
    return tuple(found)


def solved_times(work: Work, time: Time, measured: Iterable[Measured]) -> Times:
    """All times at which members must be solved."""
    asked = [moment for course in work.asked for moment in (course.start, course.stop) if moment is not None]
    asked += [moment for sheet in work.sheets.limits.values() for moment in sheet.values.get("by", ())]
    asked += [moment for each in measured for moment, _ in each.rows]
    return all_times(time, asked)


def valid_values(work: Work) -> tuple[NDArray[np.float64], NDArray[np.float64]]:
    """Lowest and highest valid value [state], -inf and inf where none."""
    pairs = [each or (-np.inf, np.inf) for each in _of_states(work, "valid")]
    return np.array([low for low, _ in pairs], dtype=float), np.array([high for _, high in pairs], dtype=float)


def negligible(work: Work) -> NDArray[np.float64]:
    """What does not matter in every state [state], nan where that is not stated."""
    return np.array([np.nan if value is None else value for value in _of_states(work, "negligible")], dtype=float)


def _of_states(work: Work, key: str) -> list[Any]:
    """A value of every state, for every entry where it repeats."""
    return [sheet.values.get(key) for sheet in work.sheets.states.values() for _ in range(count_of(over_of(sheet) or ()))]

"""The `Study`: what a study file says, and what follows from it."""

from __future__ import annotations

from collections.abc import Mapping
from dataclasses import dataclass, field
from typing import Any

import numpy as np
from numpy.typing import NDArray

from uq.analysis.ask import LimitAsked, Quantity
from uq.inputs.inputs import Inputs
from uq.lang.scope import Index
from uq.model.code import Equations
from uq.study.declarations import Limit, Outcome, Parameter, State, Term
from uq.study.given import ForcingCourse, GivenTable, Measured
from uq.study.index import Repeat
from uq.study.plan import Plan, Time
from uq.study.times import Times
from uq.units import Units


@dataclass(frozen=True, eq=False)
class Scenario:
    """The same draws with something changed: a study of its own, in which nothing differs but what the scenario changes."""

    name: str
    label: str
    study: Study


@dataclass(frozen=True, eq=False, kw_only=True)
class Study:
    """A study that has been checked in full; made by `read_study` and `parse_study`.

    Declared: `title`, `about`, `caution`, `time`, `indices` by name, `states`, `parameters`, `terms`, `forcings` and `tables` (with rows,
    wherever these came from), `outcomes`, `limits`, `plan` (with `ask` and `watch` filled in; with a precision, `members` is the most that
    may be used), `measured` (rows in the time unit of the study and the unit of the quantity, their times among the solved ones),
    `own_units`.
    Worked out: `inputs` (uncertain parameters in file order, then uncertain starts in state order) with dependence and groups,
    `scenarios`, `equations`, `watched` and `outcome_quantities` with their units, `limits_asked`, `times`, `lowest` and `highest` [state]
    (valid values, -inf and inf where none), `negligible` [state] (nan where not stated). What repeats over an index stands in all of these
    entry by entry, as T[0], T[1]; `repeats` says what belongs together.
    `text` is the file as read, `files` the bytes of the data files it names, `changes` what was changed by dotted key. `warnings` are
    repeated in the report; `remarks` say how files were read, and what follows from dependent inputs.
    """

    name: str
    text: str
    files: Mapping[str, bytes]
    changes: Mapping[str, object]
    fingerprint: str
    unitless: bool
    title: str
    about: str
    caution: str
    time: Time
    states: tuple[State, ...]
    parameters: tuple[Parameter, ...]
    terms: tuple[Term, ...]
    forcings: tuple[ForcingCourse, ...]
    tables: tuple[GivenTable, ...]
    outcomes: tuple[Outcome, ...]
    limits: tuple[Limit, ...]
    plan: Plan
    measured: tuple[Measured, ...]
    own_units: Units
    warnings: tuple[str, ...]
    remarks: tuple[str, ...]
    inputs: Inputs
    equations: Equations
    watched: tuple[Quantity, ...]
    outcome_quantities: tuple[Quantity, ...]
    limits_asked: tuple[LimitAsked, ...]
    times: Times
    lowest: NDArray[np.float64]
    highest: NDArray[np.float64]
    negligible: NDArray[np.float64]
    indices: Mapping[str, Index]
    repeats: tuple[Repeat, ...]
    scenarios: tuple[Scenario, ...] = ()
    again: Any = field(repr=False)

    @property
    def groups(self) -> Mapping[str, tuple[int, ...]]:
        """The labels of groups of inputs, in the order of their first inputs, each with the places of its inputs."""
        return self.inputs.groups

    def with_changes(self, changes: Mapping[str, object]) -> Study:
        """The same study with some values changed, by dotted key: {"plan.members": 65536, "parameters.UA_off.triangular.mode": 3}.

        A plain number for a parameter fixes it and keeps its unit. Checked as a file is: raises StudyError.
        """
        made: Study = self.again({**self.changes, **changes})
        return made

"""The nominal member of a case, on the way of every study: text, study, equations, code, pilot."""

from __future__ import annotations

from collections.abc import Sequence
from typing import Any

import numpy as np

from tests.reference import Case
from uq.running.branch import forecast_of
from uq.running.meter import Meter
from uq.running.observer import Silent
from uq.running.pilot import piloted
from uq.running.setup import design_of
from uq.solve.batch import Batch
from uq.study.read import parse_study
from uq.study.study import Study


def nominal(case: Case, accuracy: float, solver: str = "auto") -> tuple[Study, Batch]:
    """The study with that accuracy, and its member with every input at its median."""
    text = case.study.replace("ACCURACY", repr(accuracy)).replace("[plan]", f'[plan]\nsolver = "{solver}"')
    study = parse_study(text, name=case.name)
    forecast = forecast_of(study, design_of(study), study.inputs)
    return study, piloted(forecast, Meter(1, Silent(), lambda: 0.0), Silent()).nominal


def errors(case: Case, accuracy: float, solver: str = "auto") -> np.ndarray:
    """The error of every expectation of the case in units of its scale; not a number where the member failed before."""
    study, batch = nominal(case, accuracy, solver)
    names = [quantity.name for quantity in study.watched]
    return np.array([abs(_value(batch, names, study.times.solved, each) - each["value"]) / each["scale"] for each in case.expect])


def _value(batch: Batch, names: Sequence[str], times: Any, expected: dict[str, Any]) -> float:
    return float(batch.values[0, names.index(expected["of"]), int(np.argmin(np.abs(times - expected["at"])))])

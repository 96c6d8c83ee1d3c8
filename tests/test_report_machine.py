"""The machine form: strict JSON with the names of the results format."""

from __future__ import annotations

import json
import math
from collections.abc import Iterator
from dataclasses import replace
from pathlib import Path
from typing import Any

import numpy as np
import pytest

from tests.made_results import INPUTS, failures, made_facts, made_findings, made_result
from uq.analysis.finding import Finding
from uq.report.machine import result_json
from uq.solve.batch import Status


@pytest.fixture
def told(tmp_path: Path) -> dict[str, Any]:
    return result_json(made_result(tmp_path / "result"))


def shape(value: Any) -> Any:
    """Names and kinds, without the numbers; of a list the first entry."""
    if isinstance(value, dict):
        return {name: shape(each) for name, each in value.items()}
    if isinstance(value, list):
        return [shape(value[0])] if value else []
    return "number" if isinstance(value, (int, float)) and not isinstance(value, bool) else type(value).__name__


ESTIMATE = {"value": "number", "low": "number", "high": "number"}
LEVELS = [{"quantile": "number", **ESTIMATE}]
SHARES = [{"input": "str", **ESTIMATE}]


def test_its_names_are_stable(told: dict[str, Any]) -> None:
    """Names are added, never taken away: who changes a line here breaks somebody's program."""
    names = "schema path attributes time_unit limits bands outcomes ranking inputs failures warnings scales_fell_back"
    names += " dependence measured scenarios precision settled"
    assert list(told) == names.split()
    assert told["schema"] == 1
    assert shape(told["limits"]["alarm_passed"]) == {
        "label": "str",
        "when": "str",
        "accept": "number",
        "verdict": "str",
        "ever_by": [{"by": "number", **ESTIMATE}],
        "first_time": LEVELS,
        "reason": "str",
    }
    quantity = {"quantiles": LEVELS, "mean": ESTIMATE, "sd": ESTIMATE, "reason": "str"}
    assert shape(told["bands"]["T"]) == {"label": "str", "unit": "str", "time": "number", "nominal": "number", **quantity}
    assert shape(told["outcomes"]["peak_T"]) == {"label": "str", "unit": "str", "missing": ESTIMATE, **quantity}
    ranking = {"label": "str", "of": "str", "time": "NoneType", "first": SHARES, "total": SHARES, "reason": "str"}
    assert shape(told["ranking"]["T"]) == ranking
    assert shape(told["ranking"]["alarm_passed"]) == {**ranking, "time": "number"}
    each = {"label": "str", "unit": "str", "distribution": "str", "source": "str", "kind": "str", "evidence": "number", "group": "str"}
    assert shape(told["inputs"]["k0"]) == each
    assert list(told["inputs"]) == list(INPUTS.names)


def test_its_numbers_are_those_of_the_file(told: dict[str, Any]) -> None:
    assert told["limits"]["alarm_passed"]["ever_by"][-1] == {"by": 720.0, "value": 0.0148, "low": 0.0138, "high": 0.0158}
    assert told["limits"]["alarm_passed"]["verdict"] == "not met"
    assert [each["value"] for each in told["outcomes"]["peak_T"]["quantiles"]] == [304.1, 310.2, 318.0, 330.4, 349.8]
    assert told["ranking"]["alarm_passed"]["time"] == 720.0
    assert told["ranking"]["T"]["total"][0]["value"] == 0.52
    assert told["attributes"]["seed"] == 11
    assert told["inputs"]["UA_off"]["evidence"] is None
    assert told["failures"] == {}


def numbers(value: Any) -> Iterator[float]:
    if isinstance(value, dict):
        value = list(value.values())
    if isinstance(value, list):
        for each in value:
            yield from numbers(each)
    elif isinstance(value, float):
        yield value


def test_missing_numbers_and_open_ends_are_null(tmp_path: Path) -> None:
    findings = []
    for each in made_findings():
        gone = {
            name: replace(variable, data=np.full(variable.data.shape, np.nan))
            for name, variable in each.variables.items()
            if name.endswith("_low")
        }
        gone |= {
            name: replace(variable, data=np.full(variable.data.shape, np.inf))
            for name, variable in each.variables.items()
            if name.endswith("_high")
        }
        findings.append(Finding(each.group, {**each.variables, **gone}, {}))
    told = result_json(made_result(tmp_path, findings=findings))
    text = json.dumps(told, allow_nan=False)
    assert json.loads(text) == told
    assert all(math.isfinite(each) for each in numbers(told))
    assert told["bands"]["T"]["mean"] == {"value": 320.0, "low": None, "high": None}
    assert told["limits"]["alarm_passed"]["verdict"] is None


def test_failures_by_status(tmp_path: Path) -> None:
    findings = [each for each in made_findings() if each.group != "failures"]
    findings.append(failures({Status.ok: 49000, Status.ended_by_event: 2, Status.blew_up: 150}))
    told = result_json(made_result(tmp_path, findings=findings, facts=made_facts(members_failed=50, solves_failed=150)))
    assert told["failures"] == {"blew_up": 150}


def test_an_empty_result_is_strict_json_too(tmp_path: Path) -> None:
    told = result_json(made_result(tmp_path, findings=[]))
    assert json.loads(json.dumps(told, allow_nan=False)) == told
    assert told["limits"] == {}

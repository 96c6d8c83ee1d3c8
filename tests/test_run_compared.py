"""Results side by side whose studies differ in units: times are converted, and what cannot be compared is named with its reason."""

from __future__ import annotations

import json
from pathlib import Path

import numpy as np
import pytest

import uq
from tests.test_cli_run import uq as command
from uq.analysis.clocks import in_unit
from uq.report.compare import compare_json, compare_text
from uq.store.result import Result
from uq.study.read import parse_study

HOURS = """
schema = 1
[time]
unit = "h"
stop = 2
points = 5
[states.T]
unit = "K"
start = 300
rate = "-k*T"
[parameters]
k = { unit = "1/h", uniform = { low = 0.1, high = 0.3 } }
[outcomes.half]
take = "value_at(T, '1 h')"
[limits.low]
when = "T < '260 K'"
by = [1]
[plan]
members = 1024
ask = ["bands", "limits", "outcomes"]
"""
MINUTES = HOURS.replace('unit = "h"', 'unit = "min"').replace("stop = 2", "stop = 120").replace("by = [1]", "by = [1, 60]")


@pytest.fixture(scope="module")
def results(tmp_path_factory: pytest.TempPathFactory) -> dict[str, Result]:
    folder = tmp_path_factory.mktemp("compared")
    celsius = HOURS.replace('[states.T]\nunit = "K"', '[states.T]\nunit = "degC"').replace("start = 300", 'start = "300 K"')
    unitless = "\n".join(line for line in HOURS.splitlines() if not line.startswith("unit")).replace('unit = "1/h", ', "")
    texts = {
        "hours": HOURS,
        "minutes": MINUTES,
        "longer": MINUTES.replace("stop = 120", "stop = 240").replace("points = 5", "points = 9"),
        "celsius": celsius.replace('"-k*T"', "\"-k*(T - '0 K')\""),
        "levels": HOURS.replace("[plan]", "[plan]\nquantiles = [0.1, 0.5, 0.9]"),
        "unitless": unitless.replace("'260 K'", "260").replace("'1 h'", "1"),
    }
    return {name: uq.run(parse_study(text, name=name), folder / name) for name, text in texts.items()}


def text_of(results: dict[str, Result], *names: str) -> str:
    return " ".join(compare_text(*uq.compare([results[name].folder for name in names])).split())


def test_one_moment_is_compared_whatever_the_unit_of_time(results: dict[str, Result]) -> None:
    first, (other,) = uq.compare([results["hours"].folder, results["minutes"].folder])
    found = {finding.group: finding for finding in other.findings}
    assert found["limits/low"].variables["by"].data.tolist() == [1.0]
    for group, name in (("limits/low", "ever_by"), ("bands/T", "quantiles"), ("bands/T", "mean"), ("outcomes/half", "mean")):
        np.testing.assert_allclose(found[group].variables[name].data, 0, atol=1e-3, err_msg=f"{group} {name}")
    told = text_of(results, "hours", "minutes")
    assert "by 1 h" in told
    assert "T at 2 h" in told
    assert "Not compared: low, by 1 min, which is quoted only here." in told
    assert compare_json(first, [other])["others"][0]["not_compared"] == {"limits/low": "by 1 min, which is quoted only here"}
    assert json.loads(json.dumps(compare_json(first, [other]), allow_nan=False))


def test_the_numbers_beside_a_difference_are_of_the_same_moment(results: dict[str, Result]) -> None:
    """The longer one goes on to 4 h; what is compared is 2 h, where both have the same quantiles."""
    told = text_of(results, "hours", "longer")
    assert "T at 2 h" in told
    median = f"{float(results['hours'].bands['T'].quantiles[2, -1]):.1f}"
    assert f"50 % point {median}" in told


def test_what_is_not_compared_is_named_with_its_reason(results: dict[str, Result]) -> None:
    told = text_of(results, "hours", "celsius")
    assert "Not compared: T, which is in degC here and in K in the first: state one unit in both studies." in told
    told = text_of(results, "hours", "unitless")
    assert "Not compared: low, since times are in no unit here and in h in the first." in told
    assert "Not compared: T, which is in no unit here and in K in the first" in told


def test_levels_that_only_one_was_asked_for(results: dict[str, Result]) -> None:
    told = text_of(results, "hours", "levels")
    assert "5 % point not asked none" in told
    assert "missing" not in told


def test_times_a_rounding_apart_are_one() -> None:
    minutes = np.array([0.0, 6.0, 18.0, 19.0])
    known = np.array([0.0, 0.1, 0.3])
    assert in_unit(minutes, "min", "h", known)[:3].tolist() == known.tolist()  # type: ignore[index]
    assert in_unit(minutes, "min", "h", known)[3] == pytest.approx(19 / 60)  # type: ignore[index]
    assert in_unit(minutes, "min", "K", known) is None
    assert in_unit(minutes, "round", "round", known[:0]) is minutes


def test_the_command_compares_them_too(results: dict[str, Result]) -> None:
    folder = results["hours"].folder
    done = command(Path(folder.parent), "compare", "hours", "minutes")
    assert done.returncode == 0, done.stderr
    assert "Not compared: low, by 1 min" in done.stdout

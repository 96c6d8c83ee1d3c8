"""Scenarios in one run and results side by side: draws are shared where inputs are, and differences have the truth in their intervals."""

from __future__ import annotations

import math
from pathlib import Path

import numpy as np
import pytest

import uq
from tests.test_run_whole import DECAY
from uq.store.result import Result
from uq.study.read import parse_study

SMALL = (
    DECAY.replace("16384", "4096")
    .replace("[parameters]", "[parameters]\npull = { uniform = { low = 0, high = 1 } }\nadded = 0.0")
    .replace('"-lambda * x"', '"-lambda * x + added"')
)
SCENARIOS = """
[scenarios.slower]
label = "Slower decay"
change = { "parameters.lambda.normal.mean" = 0.4 }
[scenarios.fixed]
change = { "parameters.lambda" = 0.5 }
[scenarios.unsure]
change = { "parameters.added" = { uniform = { low = 0, high = 0.2 } } }
"""


@pytest.fixture(scope="module")
def result(tmp_path_factory: pytest.TempPathFactory) -> Result:
    return uq.run(parse_study(SMALL + SCENARIOS, name="s"), tmp_path_factory.mktemp("scenarios") / "r")


def test_a_scenario_that_fixes_an_input_shares_the_draws_of_all_others(result: Result) -> None:
    """`lambda` comes between `pull` and the start, and the start of each member is still the same number."""
    base, fixed = (np.asarray(group["x_start"]) for group in (result.members.inputs, result.scenarios["fixed"].members.inputs))
    np.testing.assert_array_equal(base, fixed)
    start = np.asarray(result.scenarios["fixed"].members.watched["x"][:, -1])
    np.testing.assert_allclose(start, base * math.exp(-0.5 * 4), rtol=1e-4)


def test_a_scenario_may_have_inputs_of_its_own(result: Result) -> None:
    unsure = result.scenarios["unsure"]
    np.testing.assert_array_equal(np.asarray(unsure.members.inputs["lambda"]), np.asarray(result.members.inputs["lambda"]))
    assert float(unsure.members.inputs["added"].max()) <= 0.2
    assert len(unsure.ranking["x"].total_overall) == 4


def test_differences_hold_the_truth_and_are_narrower_than_the_results_themselves(result: Result) -> None:
    """E x(t) = E x0 exp(-m t + (0.05 t)^2 / 2) for lambda normal around m; the shift of lambda is the same for all members."""
    found = result.differences["slower"].bands["x"]
    mean_start = 2 * math.exp(math.log(1.2) ** 2 / 2)
    for place, time in enumerate((0, 1, 2, 4)):
        exact = mean_start * math.exp((0.05 * time) ** 2 / 2) * (math.exp(-0.4 * time) - math.exp(-0.5 * time))
        low, high = float(found.mean_low[place]), float(found.mean_high[place])
        half = (high - low) / 2
        assert abs(float(found.mean[place]) - exact) <= 3 * half + 1e-5 * exact
        own = float(result.bands["x"].mean_high[place] - result.bands["x"].mean_low[place]) / 2
        assert half <= own
    assert found.attributes["draws"] == "paired"
    assert result.scenarios["slower"].attributes["label"] == "Slower decay"
    assert result.scenarios["slower"].attributes["members"] == 4096


def test_the_study_itself_has_the_bits_of_a_run_without_scenarios(result: Result, tmp_path: Path) -> None:
    alone = uq.run(parse_study(SMALL, name="s"), tmp_path / "r")
    for group, finding in alone.findings.items():
        if group.split("/")[0] in ("bands", "limits", "outcomes", "ranking", "members", "failures", "solver"):
            for name, variable in finding.variables.items():
                assert np.array_equal(variable.data, result.findings[group].variables[name].data, equal_nan=variable.data.dtype.kind == "f")
    assert alone.attributes["solves"] == result.attributes["solves"]


def test_a_scenario_has_the_bits_of_its_own_study(result: Result, tmp_path: Path) -> None:
    changed = parse_study(SMALL, name="s").with_changes({"parameters.lambda.normal.mean": 0.4})
    alone = uq.run(changed, tmp_path / "r")
    for name, variable in alone.findings["bands/x"].variables.items():
        np.testing.assert_array_equal(variable.data, result.findings["scenarios/slower/bands/x"].variables[name].data, err_msg=name)
    first, (other,) = uq.compare([result.folder, alone.folder])
    assert first.path == result.path
    assert other.draws.name == "paired"
    there = {finding.group: finding for finding in other.findings}
    for name, variable in there["bands/x"].variables.items():
        np.testing.assert_array_equal(variable.data, result.findings["differences/slower/bands/x"].variables[name].data, err_msg=name)


def test_results_that_share_no_draws_are_compared_unpaired_and_say_so(result: Result, tmp_path: Path) -> None:
    other = uq.run(parse_study(SMALL, name="s").with_changes({"plan.seed": 8}), tmp_path / "r")
    _, (found,) = uq.compare([result.folder, other.folder])
    assert found.draws.name == "unpaired"
    assert "do not share draws" in found.draws.words
    mean = next(finding for finding in found.findings if finding.group == "bands/x").variables
    assert np.all(mean["mean_low"].data <= mean["mean_high"].data)


def test_a_result_is_compared_with_a_longer_one_of_itself(tmp_path: Path) -> None:
    short = uq.run(parse_study(SMALL.replace("4096", "1024") + 'keep = "100 kB"\n', name="s"), tmp_path / "r")
    longer = uq.extend(short.folder, members=4096)
    _, (found,) = uq.compare([short.folder, longer.folder])
    mean = next(finding for finding in found.findings if finding.group == "bands/x").variables
    assert np.all(np.abs(mean["mean"].data) < 0.05)

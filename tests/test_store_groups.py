"""The groups of dependence, scenarios, precision and measurements in result.nc, as other programs read them."""

from __future__ import annotations

from dataclasses import replace
from pathlib import Path
from typing import Any

import numpy as np
import pytest
import xarray

from tests.made_results import (
    INPUTS,
    LEVELS,
    made_facts,
    made_findings,
    made_result,
    made_study,
    measured,
    precision_rounds,
    scenario_findings,
    scenario_study,
    shapley,
)
from uq.analysis.finding import Finding, Variable
from uq.inputs.dependence import Dependence, JointSample
from uq.inputs.distributions import Normal, Uniform
from uq.inputs.inputs import Input, Inputs
from uq.store.facts import Counts, PrecisionReached
from uq.store.inputs_group import achieved, dependence_words
from uq.store.result import Result
from uq.study.plan import Precision
from uq.study.study import Scenario
from uq.units import Units

DEPENDENT = Inputs(INPUTS.items, (Dependence(("k0", "activation"), rank_correlation=0.6),))
ASKED = Precision(quantiles=0.02, probabilities=0.0005)


def everything(folder: Path) -> Result:
    plan = made_study().plan
    plan.precision = ASKED  # type: ignore[misc]
    study = scenario_study(plan=plan, inputs=DEPENDENT)
    u = np.random.default_rng(3).uniform(size=(512, 4))
    facts = made_facts(
        scenarios={"early": Counts(16384, 12, 49152, 30)},
        precision=PrecisionReached(False, "members", 120_000.0, ("ranking/T first_overall",)),
    )
    findings = [each for each in made_findings() if each.group != "ranking/peak_T"]
    findings += [shapley("peak_T", (0.5, 0.3, 0.15, 0.05)), *scenario_findings(), measured(), precision_rounds()]
    findings.append(achieved(DEPENDENT, LEVELS, DEPENDENT.values(u)))
    return made_result(folder, study, findings, facts)


@pytest.fixture(scope="module")
def result(tmp_path_factory: pytest.TempPathFactory) -> Result:
    return everything(tmp_path_factory.mktemp("made") / "all")


def test_correlations_asked_and_achieved(result: Result) -> None:
    group = result.inputs
    assert group.correlation.dims == ("input", "input_other")
    assert list(group.correlation["input_other"].values) == list(INPUTS.names)
    asked = group.correlation.sel(input="activation", input_other="k0").item()
    assert asked == pytest.approx(0.6, abs=1e-12)
    # 512 draws: the standard error of a rank correlation of 0.6 is about 0.03; five of them.
    assert group.correlation_achieved.sel(input="k0", input_other="activation").item() == pytest.approx(0.6, abs=0.15)
    assert np.abs(np.tril(group.correlation.values, -1)).sum() == pytest.approx(0.6)
    assert group.quantiles_achieved.dims == ("input", "quantile")
    assert group.quantiles_achieved.sel(input="T_start", quantile=0.5).item() == pytest.approx(303.0, abs=0.5)
    assert list(group.dependence.values) == ["k0, activation: rank correlation 0.6"]


def test_achieved_quantiles_are_smallest_values_that_reach_the_share() -> None:
    one = Inputs((Input("a", "a", "1", Uniform(low=0, high=1)),))
    found = achieved(one, (0.25, 0.5), np.array([[4.0], [1.0], [3.0], [2.0]])).variables["quantiles_achieved"].data
    np.testing.assert_array_equal(found, [[1.0, 2.0]])


def test_independent_inputs_have_no_correlation(tmp_path: Path) -> None:
    group = made_result(tmp_path).inputs
    np.testing.assert_array_equal(group.correlation.values, np.eye(4))
    assert "dependence" not in group
    assert "correlation_achieved" not in group


def test_dependence_in_words() -> None:
    joint = JointSample("posterior.csv", {"k0": "k0", "activation": "ea"})
    assert dependence_words(joint) == "k0, activation: drawn together, by rows of posterior.csv"
    several = Dependence(("a", "b", "c"), normal_correlation=(0.3, 0.1, 0.5))
    assert dependence_words(several) == "a, b, c: normal correlation 0.3, 0.1, 0.5"


def test_distributions_are_told_after_truncation(tmp_path: Path) -> None:
    from uq.inputs.distributions import cut

    half, mistakes = cut(Normal(mean=0, sd=1), [0, 10])
    assert half is not None
    assert not mistakes
    group = made_result(tmp_path, made_study(inputs=Inputs((Input("a", "a", "m", half),))), []).inputs
    assert group["mean"].item() == pytest.approx(np.sqrt(2 / np.pi), rel=1e-9)
    assert group.quantiles.sel(quantile=0.5).item() == pytest.approx(0.6744897502, rel=1e-6)
    assert "0" in group.distribution.item()
    assert "normal" in group.distribution.item()


def test_a_scenario_has_the_groups_of_a_study(result: Result) -> None:
    early = result.scenarios["early"]
    assert early.attributes["label"] == "Operator in 4 min"
    assert early.attributes["change"] == "parameters.UA_off = 5.5"
    assert early.attributes["members_failed"] == 12
    assert early.attributes["members_solved"] == 16372
    passed = early.limits["alarm_passed"]
    assert passed.attributes["label"] == "Alarm temperature passed"
    assert passed.ever_by.sel(by=720).item() == 0.0128
    assert list(early.ranking["T"].total_overall["input"].values) == list(INPUTS.names)
    assert early.members.watched["T"].dims == ("realization", "time")


def test_differences_say_how_their_intervals_are_made(result: Result) -> None:
    group = result.differences["early"].limits["alarm_passed"]
    assert group.attributes == {"label": "Alarm temperature passed", "draws": "paired", "intervals": "intervals from paired replicates"}
    assert group.ever_by.sel(by=720).item() == -0.0020
    # A difference of temperatures is no temperature.
    assert result.differences["early"].outcomes["peak_T"].quantiles.attrs["units_metadata"] == "temperature: difference"


def test_inputs_that_only_a_scenario_has_stand_along_a_dimension_of_their_own(tmp_path: Path) -> None:
    extra = Input("dead_time", "Dead time", "min", Uniform(low=1, high=2))
    early = made_study(inputs=Inputs((*INPUTS.items[1:], extra)))
    study = made_study(scenarios=(Scenario("early", "", early),))
    total = Variable(("input",), np.arange(5.0), "total")
    result = made_result(tmp_path, study, [Finding("scenarios/early/ranking/peak_T", {"total": total})])
    found = result.scenarios["early"].ranking["peak_T"]
    assert list(found.total["scenario_input"].values) == [*INPUTS.names, "dead_time"]
    with xarray.open_datatree(result.path) as tree:
        assert tree["/scenarios/early/ranking/peak_T"]["total"].dims == ("scenario_input",)


def test_groups_and_shapley_effects(result: Result) -> None:
    group = result.ranking["peak_T"]
    assert group.shapley.sum().item() == pytest.approx(1.0)
    assert np.isnan(group.total.values).all()
    assert "inputs depend on each other" in group.total.attrs["reason"]
    assert group.shapley_group.sel(group="kinetics").item() == pytest.approx(0.8)
    assert group.shapley_group.attrs["ancillary_variables"] == "shapley_group_low shapley_group_high"


def test_precision_by_round(result: Result) -> None:
    assert result.precision.attributes == {
        "quantiles": 0.02,
        "probabilities": 0.0005,
        "reached": 0,
        "stopped": "members",
        "solves_needed": 120_000.0,
        "unknown": "ranking/T first_overall",
    }
    group = result.precision.limits["alarm_passed"]
    assert group.ever_by.dims == ("round", "by")
    assert list(group.members.values) == [8192, 16384]
    assert group.attributes["label"] == "Alarm temperature passed"


def test_measurements(result: Result) -> None:
    group = result.measured["T"]
    assert group.attributes["label"] == "Tank temperature"
    assert group.time_measured.attrs["units"] == "min"
    assert group.share_inside.attrs["share"] == 0.9


def test_xarray_reads_all_of_it(result: Result) -> None:
    with xarray.open_datatree(result.path) as tree:
        paths = {node.path for node in tree.subtree}
        for path in (
            "/scenarios/early/limits/alarm_passed",
            "/differences/early/outcomes/peak_T",
            "/measured/T",
            "/precision/limits/alarm_passed",
        ):
            assert path in paths
        assert tree["/scenarios/early/outcomes/peak_T"]["mean"].attrs["cell_methods"] == "realization: mean"
        for node in tree.subtree:
            for name, variable in node.variables.items():
                assert variable.attrs.get("long_name"), (node.path, name)


@pytest.mark.parametrize(("unit", "units"), [("person", "1"), ("person/m2", "m-2"), ("persons", "1")])
def test_counting_units_of_the_study(tmp_path: Path, unit: str, units: str) -> None:
    peak = Finding("outcomes/peak_T", {"mean": Variable((), np.array(3.0), "mean", unit)})
    result = made_result(tmp_path, made_study(own_units=Units(("person",))), [peak])
    attributes = result.outcomes["peak_T"]["mean"].attrs
    assert (attributes["units"], attributes["unit"]) == (units, unit)
    assert result.findings["outcomes/peak_T"].variables["mean"].unit == unit


def test_the_history_grows(tmp_path: Path) -> None:
    earlier = "2026-12-01T20:00:00+00:00 uq run hold-tank.toml (uq 0.1.0)"
    history = made_result(tmp_path, facts=made_facts(earlier=earlier, command="uq extend old --members 16384")).attributes["history"]
    assert history.splitlines() == [earlier, "2026-12-01T22:41:03+00:00 uq extend old --members 16384 (uq 0.1.0)"]


def test_the_source_names_the_method_in_words(tmp_path: Path) -> None:
    facts: dict[str, Any] = made_result(tmp_path, facts=replace(made_facts(), method="explicit853")).attributes
    assert facts["method"] == "explicit853"
    assert facts["source"].endswith("members solved with the explicit Runge-Kutta pair 8(5,3)")

"""What the summary says of scenarios, dependence, precision and measurements."""

from __future__ import annotations

import json
import math
from dataclasses import replace
from pathlib import Path
from typing import Any

import numpy as np
import pytest

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
from uq.analysis.differences import OWN, SHARED
from uq.analysis.finding import Finding, Variable
from uq.inputs.dependence import Dependence, JointSample
from uq.inputs.inputs import Inputs
from uq.report.compare import Comparison, compare_json, compare_text
from uq.report.machine import result_json
from uq.report.plain import width
from uq.report.summary import summary
from uq.store.facts import Counts, PrecisionReached
from uq.store.inputs_group import achieved
from uq.store.result import Result
from uq.store.saved import Saved
from uq.store.tallies import write_tallies
from uq.study.plan import Precision

DEPENDENT = Inputs(INPUTS.items, (Dependence(("k0", "activation"), rank_correlation=-0.55),))


def words(text: str) -> str:
    return " ".join(text.split())


def with_scenario(folder: Path, difference: float = -0.0020, half: float = 0.0005, **facts: Any) -> Result:
    counts = {"early": Counts(16384, 0, 49152, 0)}
    findings = [*made_findings(), *scenario_findings(difference, half)]
    return made_result(folder, scenario_study(), findings, made_facts(scenarios=counts, **facts))


def test_a_scenario_with_its_difference(tmp_path: Path) -> None:
    text = summary(with_scenario(tmp_path))
    assert all(width(line) <= 100 for line in text.splitlines() if "result.nc" not in line)
    told = words(text)
    assert "Operator in 4 min, which changes parameters.UA_off = 5.5" in told
    assert "by 720 min 0.0128 0.0118 to 0.0138 -0.00200 -0.00250 to -0.00150" in told
    assert "Highest temperature, K 5 % point 304.1" in told
    assert "95 % point 349.8 348.7 to 350.9 -3.10 -3.30 to -2.90" in told
    assert "Differences are the scenario less the study; intervals from paired replicates." in told
    assert 'In the scenario "Operator in 4 min" that probability is 0.00200 (0.00150 to 0.00250) lower; there it is more than' in told
    order = [text.index(head) for head in ("What drives it", "Scenarios", "What is settled", "How far to trust this", "In words")]
    assert order == sorted(order)


def test_a_difference_that_is_not_clear_is_not_claimed(tmp_path: Path) -> None:
    assert "that probability is not clearly another" in words(summary(with_scenario(tmp_path, -0.0004, 0.0005)))


def test_failed_members_of_a_scenario_are_told(tmp_path: Path) -> None:
    findings = [*made_findings(), *scenario_findings()]
    facts = made_facts(scenarios={"early": Counts(16384, 120, 49152, 400)})
    assert "120 of its 16384 members failed" in summary(made_result(tmp_path, scenario_study(), findings, facts))


def test_dependence_asked_and_got(tmp_path: Path) -> None:
    asked = achieved(DEPENDENT, LEVELS, DEPENDENT.values(np.random.default_rng(1).uniform(size=(4096, 4))))
    text = words(summary(made_result(tmp_path, made_study(inputs=DEPENDENT), [*made_findings(), asked])))
    assert "Dependence (rank correlations): Activation energy with Frequency factor, asked -0.55, got -0.5" in text
    assert "; all others are taken as independent." in text
    assert "all inputs are taken as independent" not in text


def test_a_joint_sample_is_told(tmp_path: Path) -> None:
    values = np.random.default_rng(2).normal(size=(50, 2))
    joint = Inputs(INPUTS.items, (JointSample("posterior.csv", {"k0": "k0", "activation": "ea"}).with_values(values),))
    text = words(summary(made_result(tmp_path, made_study(inputs=joint))))
    assert "Dependence as stated: k0, activation: drawn together, by rows of posterior.csv." in text
    assert "asked -0" in text or "asked 0" in text


def test_shapley_effects_say_why(tmp_path: Path) -> None:
    findings = [each for each in made_findings() if not each.group.startswith(("ranking", "limits"))]
    text = words(summary(made_result(tmp_path, made_study(inputs=DEPENDENT), [*findings, shapley("peak_T", (0.5, 0.3, 0.15, 0.05))])))
    assert "`Shapley` shares it out among the inputs so that they add up to 1, since inputs that depend on each other have no total" in text
    assert "Shapley 95 % interval first 95 % interval evidence Highest temperature 1. Activation energy 0.500 0.470 to 0.530 0.450" in text
    assert "group kinetics 0.800 0.770 to 0.830" in text
    assert "has the largest share, a Shapley effect of 50.0 % (47.0 to 53.0 %), in the variance of Highest temperature; if it were" in text


def precise(folder: Path, reached: PrecisionReached, **asked: float) -> Result:
    plan = made_study().plan
    plan.precision = Precision(**asked)  # type: ignore[misc]
    return made_result(folder, made_study(plan=plan), [*made_findings(), precision_rounds()], made_facts(precision=reached))


def test_what_is_settled_and_what_the_rest_would_take(tmp_path: Path) -> None:
    result = precise(tmp_path, PrecisionReached(False, "members", 120_000.0), probabilities=0.0005, quantiles=0.05)
    write_tallies(result.folder, Saved({}), "")
    told = words(summary(result))
    assert "Half-width of intervals wanted widest precise enough probabilities 0.0005 0.001 1 of 3 NOT SETTLED" in told
    assert "quantiles, of the 5-95 % width 0.05 0.024 all 15 settled Widest of the probabilities: Alarm temperature passed." in told
    assert "Order of the inputs: first place settled in 3 of 4 rankings, whole order in none of 4." in told
    assert "May be dropped (share surely below 0.01 in all that is ranked): none." in told
    assert "The precision asked was not reached: it has all the members that it may use." in told
    assert "It is expected after about 120000 solves (49152 so far), which is about 65536 members." in told
    assert f"Next: uq show {result.folder} --json uq extend {result.folder} --members 65536 uq compare {result.folder} OTHER" in told


def test_a_precision_that_was_reached(tmp_path: Path) -> None:
    told = words(summary(precise(tmp_path, PrecisionReached(True, ""), probabilities=0.005)))
    assert "probabilities 0.005 0.001 all 3 settled" in told
    assert "was not reached" not in told
    assert "uq extend" not in told


def test_what_cannot_be_foretold_is_said(tmp_path: Path) -> None:
    reached = PrecisionReached(False, "minutes", math.nan, ("ranking/alarm_passed total_by",))
    told = words(summary(precise(tmp_path, reached, indices=0.01)))
    assert "not reached: another round would have taken longer than the time that is left." in told
    assert "Nothing can be foretold yet of ranking/alarm_passed total_by." in told


# What is judged where a measurement has a deviation of its own: not whether it lies between the quantiles that are printed.
WIDENED = "lie between the outermost quantiles of what would be measured, the deviation of a measurement counted"


@pytest.mark.parametrize(
    ("inside", "low", "high", "said"),
    [
        (
            1.0,
            0.29,
            1.0,
            f"3 of 3 observations of Tank temperature {WIDENED} (as a share 29 to 100 %, were each by itself); 90 % are expected",
        ),
        (1 / 3, 0.01, 0.89, "90 % are expected there. That is fewer than expected: look at the model, its inputs and the measurements."),
        (np.nan, np.nan, np.nan, "of Tank temperature nothing can be said"),
    ],
)
def test_measured_shares(tmp_path: Path, inside: float, low: float, high: float, said: str) -> None:
    result = made_result(tmp_path, findings=[*made_findings(), measured(inside, low, high)])
    told = words(summary(result))
    assert "Measured: " in told
    assert said in told
    assert ("fewer than expected" in told) == (high < 0.9)


def test_the_headline_question_comes_first(tmp_path: Path) -> None:
    text = summary(made_result(tmp_path, made_study(limits_asked=()), [each for each in made_findings() if "alarm" not in each.group]))
    drivers = text.split("What drives it")[1]
    assert drivers.index("Highest temperature") < drivers.index("Tank temperature, over all times")


def test_the_machine_form_has_all_of_it(tmp_path: Path) -> None:
    plan = made_study().plan
    plan.precision = Precision(probabilities=0.0005)  # type: ignore[misc]
    findings = [each for each in made_findings() if each.group != "ranking/peak_T"]
    findings += [shapley("peak_T", (0.5, 0.3, 0.15, 0.05)), *scenario_findings(), measured(), precision_rounds()]
    facts = made_facts(precision=PrecisionReached(False, "members"), scenarios={"early": Counts(16384, 3, 49152, 9)})
    told = result_json(made_result(tmp_path, scenario_study(plan=plan, inputs=DEPENDENT), findings, facts))
    assert json.loads(json.dumps(told, allow_nan=False)) == told
    pair = told["dependence"][0]
    assert (pair["input"], pair["input_other"], pair["achieved"]) == ("activation", "k0", None)
    assert pair["asked"] == pytest.approx(-0.55)
    assert told["scenarios"]["early"]["members_failed"] == 3
    assert told["scenarios"]["early"]["differences"]["limits"]["alarm_passed"]["ever_by"][-1]["value"] == -0.0020
    assert told["precision"]["kinds"]["probabilities"] == {
        "wanted": 0.0005,
        "widest": pytest.approx(0.001),
        "numbers": 3,
        "precise": 1,
        "undefined": 0,
    }
    assert told["precision"]["solves_needed"] is None
    assert told["measured"]["T"]["share_inside"] == {"value": 1.0, "low": 2 / 3, "high": 1.0}
    ranking = told["ranking"]["peak_T"]
    assert [each["value"] for each in ranking["shapley"]] == [0.5, 0.3, 0.15, 0.05]
    assert ranking["shapley_group"][0]["group"] == "kinetics"
    assert ranking["no_total"].startswith("not given because")
    assert told["settled"] == {"rankings": 4, "first": 3, "whole": 1, "may_be_dropped": [], "open": []}


def comparisons(tmp_path: Path) -> tuple[Result, list[Comparison]]:
    first = made_result(tmp_path / "one")
    other = made_result(tmp_path / "two", made_study(title="A colder winter", fingerprint="b2" * 32))
    found = [each for each in scenario_findings() if each.group.startswith("differences")]
    plain = [Finding(each.group.removeprefix("differences/early/"), each.variables, each.attributes) for each in found]
    return first, [Comparison(other, tuple(plain), SHARED), Comparison(other, (), OWN)]


def test_results_compared(tmp_path: Path) -> None:
    first, others = comparisons(tmp_path)
    text = compare_text(first, others)
    assert all(width(line) <= 100 for line in text.splitlines() if str(tmp_path) not in line)
    told = words(text)
    assert told.startswith(f"Compared with {tmp_path / 'one'}: Cooling outage at a hold tank (16384 members, seed 11, study")
    assert f"{tmp_path / 'two'}: A colder winter (16384 members, seed 11, study b2b2b2)" in told
    assert "by 720 min 0.0148 0.0138 to 0.0158 -0.00200 -0.00250 to -0.00150" in told
    assert (
        "Difference: this one less the first; intervals from paired replicates: both use the same draws of the inputs they share." in told
    )
    assert "Nothing can be compared: no limit, outcome or watched quantity has the same name and unit in both." in told


def test_results_compared_as_json(tmp_path: Path) -> None:
    told = compare_json(*comparisons(tmp_path))
    assert json.loads(json.dumps(told, allow_nan=False)) == told
    assert [each["draws"] for each in told["others"]] == ["paired", "unpaired"]
    assert told["others"][0]["differences"]["outcomes"]["peak_T"]["quantiles"][-1]["value"] == -3.1


def test_a_result_of_an_earlier_version_is_read(tmp_path: Path) -> None:
    """Without correlations, groups of inputs, precision: as step 1 wrote it."""
    from uq.store.encode import encode
    from uq.store.folder import with_fingerprint
    from uq.store.layout import contents
    from uq.store.netcdf import write_groups
    from uq.store.open import open_result

    old = []
    for each in contents(made_study(), made_findings(), made_facts()):
        kept = {name: variable for name, variable in each.variables.items() if "correlation" not in name and name != "input_other"}
        old.append(Finding(each.group, kept, each.attributes))
    write_groups(tmp_path / "result.nc", with_fingerprint(encode(old)))
    result = open_result(tmp_path)
    assert "Dependence: all inputs are taken as independent." in summary(result)
    assert result_json(result)["dependence"] == []


def test_noughts_of_an_inert_input_may_be_dropped(tmp_path: Path) -> None:
    findings = [each for each in made_findings() if not each.group.startswith("ranking")]
    total = np.array([0.9, 0.2, 0.0, 0.1])
    half = np.array([0.01, 0.01, 0.0, 0.01])
    ends = {"": total, "_low": total - half, "_high": total + half}
    shares = {f"{kind}{end}": Variable(("input",), values, kind) for kind in ("first", "total") for end, values in ends.items()}
    text = words(summary(made_result(tmp_path, findings=[*findings, Finding("ranking/peak_T", shares)])))
    assert 'May be dropped (share surely below 0.01 in all that is ranked): "Heat loss, cooling off".' in text
    few = made_result(tmp_path / "few", findings=[*findings, Finding("ranking/peak_T", shares)], facts=replace(made_facts(), members=512))
    assert 'Not settled whether they may: "Heat loss, cooling off".' in words(summary(few))

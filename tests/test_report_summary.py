"""What the terminal says after a run: its order, its claims, and the awkward cases."""

from __future__ import annotations

import math
import re
from collections.abc import Sequence
from dataclasses import replace
from pathlib import Path
from typing import Any

import numpy as np
import pytest

from tests.made_results import INPUTS, band, failures, limit, made_facts, made_findings, made_result, made_study, ranking
from uq.analysis.ask import LimitAsked, Quantity
from uq.analysis.finding import Finding, Variable
from uq.analysis.order import ordered
from uq.inputs.distributions import Uniform
from uq.inputs.inputs import Input, Inputs
from uq.report.answers import Driver, Estimate, InputRow, Shares
from uq.report.drivers import share_of
from uq.report.plain import width
from uq.report.summary import summary
from uq.solve.batch import Status


def said(folder: Path, findings: Sequence[Finding] | None = None, facts: Any = None, **study: Any) -> str:
    return summary(made_result(folder / "result", made_study(**study), findings, facts))


def without(*rooms: str) -> list[Finding]:
    return [finding for finding in made_findings() if finding.group.split("/")[0] not in rooms]


def replaced(finding: Finding) -> list[Finding]:
    """The findings with one of them replaced."""
    return [finding if each.group == finding.group else each for each in made_findings()]


def words(text: str) -> str:
    """On one line, so that a sentence can be looked for."""
    return " ".join(text.split())


def test_the_order_is_that_of_the_results_format(tmp_path: Path) -> None:
    text = said(tmp_path)
    heads = [
        "Caution: ",
        "Is a limit passed?",
        "What to expect",
        "What drives it",
        "How far to trust this",
        "In words: ",
        "Folder ",
        "Next: uq show ",
    ]
    places = [text.index(head) for head in heads]
    assert places == sorted(places)
    assert text.startswith("Cooling outage at a hold tank\nCaution: Screening estimate")


def test_lines_fit_and_end_without_blanks(tmp_path: Path) -> None:
    lines = said(tmp_path).splitlines()
    named = [line for line in lines if "result.nc" in line or line.startswith("Next:")]
    assert all(width(line) <= 100 for line in lines if line not in named)
    assert not [line for line in lines if line != line.rstrip()]
    assert "".join(lines).isascii()


def test_a_limit_with_probabilities_intervals_and_verdict(tmp_path: Path) -> None:
    text = words(said(tmp_path))
    assert "Alarm temperature passed, that is T > alarm by 120 min 0.00310 0.00260 to 0.00360 by 360 min" in text
    assert "by 720 min 0.0148 0.0138 to 0.0158 0.01: NOT MET" in text
    assert (
        "the median of the first time is between 300 and 344 min, and 90 % of first times are between 60 and 680 min "
        "(output times being 60 min apart)" in text
    )
    assert "comes true for about 1 member in 68 (between 1 in 73 and 1 in 63), which is more than the accepted 1 in 100" in text


@pytest.mark.parametrize(
    ("verdict", "column", "sentence"),
    [
        ("met", "0.01: met", "which is within the accepted 1 in 100"),
        ("not settled", "0.01: not settled", "whether that is within the accepted 1 in 100 is not settled"),
    ],
)
def test_other_verdicts(tmp_path: Path, verdict: str, column: str, sentence: str) -> None:
    text = words(said(tmp_path, replaced(limit((0.001, 0.002, 0.009), (0.0005, 0.0008, 0.002), verdict))))
    assert column in text
    assert sentence in text


def ever_by(values: Sequence[float], lows: Sequence[float], highs: Sequence[float]) -> Finding:
    finding = limit(values, (0.0, 0.0, 0.0))
    ends = {"ever_by_low": lows, "ever_by_high": highs}
    changed = {name: replace(finding.variables[name], data=np.array(data)) for name, data in ends.items()}
    return Finding(finding.group, {**finding.variables, **changed}, {"verdict": "met"})


def test_nobody_passed_is_told_with_its_upper_end(tmp_path: Path) -> None:
    finding = ever_by((0.0, 0.0, 0.0), (0.0, 0.0, 0.0), (0.000225, 0.000225, 0.000225))
    nan = {name: replace(finding.variables[name], data=np.full(5, np.nan)) for name in ("first_time", "first_time_low", "first_time_high")}
    text = words(said(tmp_path, replaced(Finding(finding.group, {**finding.variables, **nan}, finding.attributes))))
    assert "0 of 16384 members at most 0.00023, 1 in 4400" in text
    assert "comes true for none of 16384 members, a probability of at most 0.00023, 1 in 4400" in text
    assert "first time" not in text


def test_everybody_passed_is_told_with_its_lower_end(tmp_path: Path) -> None:
    text = words(said(tmp_path, replaced(ever_by((0.5, 0.9, 1.0), (0.48, 0.88, 0.999775), (0.52, 0.92, 1.0)))))
    assert "all 16384 members at least 0.99977" in text
    assert "comes true for all 16384 members, a probability of at least 0.99977" in text


def test_quantiles_with_intervals_and_the_nominal_run(tmp_path: Path) -> None:
    text = words(said(tmp_path))
    assert "5 % 50 % 95 % At 720 min Tank temperature, K 306.8 320.0 333.2" in text
    assert "95 % interval 306.6 to 307.0 319.8 to 320.2 333.0 to 333.4" in text
    assert "with every input at its median: 320.4" in text
    assert "Fraction decomposed 0.2178" in text


def test_missing_outcomes_are_counted(tmp_path: Path) -> None:
    peak = next(each for each in made_findings() if each.group == "outcomes/peak_T")
    gone = {
        name: replace(peak.variables[name], data=np.array(data))
        for name, data in {"missing": 0.11, "missing_low": 0.106, "missing_high": 0.114}.items()
    }
    text = words(said(tmp_path, replaced(Finding(peak.group, {**peak.variables, **gone}))))
    assert "no value in 11.00 % (10.60 to 11.40 %) of the members; quantiles among the rest" in text


def test_an_end_that_does_not_exist(tmp_path: Path) -> None:
    finding = band("T", "K", 320.0, 8.0)
    high = finding.variables["quantiles_high"].data.copy()
    high[-1, -1] = np.inf
    changed = {**finding.variables, "quantiles_high": replace(finding.variables["quantiles_high"], data=high)}
    assert "at least 333.0" in said(tmp_path, replaced(Finding(finding.group, changed)))


def test_no_limits_no_ranking_one_watched(tmp_path: Path) -> None:
    text = said(tmp_path, [band("T", "K", 320.0, 8.0)], limits_asked=(), outcome_quantities=(), watched=(Quantity("T", "", "K"),))
    assert "Is a limit passed?" not in text
    assert "What drives it" not in text
    assert "At 720 min T, K" in words(text)
    assert "In words: For 90 % of the members T at 720 min is between 306.8 and 333.2 K." in words(text)


def test_nothing_asked_but_counts(tmp_path: Path) -> None:
    text = said(tmp_path, [])
    assert "How far to trust this" in text
    assert "In words" not in text


def test_no_inputs(tmp_path: Path) -> None:
    text = said(tmp_path, [band("T", "K", 320.0, 0.0)], inputs=Inputs(()), limits_asked=())
    assert "320" in text
    assert "independent" not in text


def test_ranking_says_where_the_order_is_not_settled(tmp_path: Path) -> None:
    text = words(said(tmp_path))
    assert '"Alarm temperature passed" by 720 min 1. Activation energy 0.620 0.570 to 0.670 0.496 0.446 to 0.546 3' in text
    assert "2-3. Frequency factor 0.300" in text
    assert "2-3. Heat loss, cooling off 0.280 0.230 to 0.330 0.224 0.174 to 0.274 not stated order of places 2 and 3 not settled" in text
    assert "if it were known exactly, 49.6 % (44.6 to 54.6 %) of that would be gone on average" in text


def test_no_driver_is_named_where_the_first_place_is_open(tmp_path: Path) -> None:
    text = words(said(tmp_path, replaced(ranking("alarm_passed", (0.40, 0.38, 0.1, 0.1), along="by"))))
    assert "Activation energy and Frequency factor have the largest shares in the uncertainty (variance) about" in text
    assert "their order is not settled." in text
    assert "if it were known" not in text.split("In words")[1]


def test_nothing_is_said_of_drivers_where_no_place_is_settled(tmp_path: Path) -> None:
    text = words(said(tmp_path, replaced(ranking("alarm_passed", (0.3, 0.3, 0.3, 0.3), along="by"))))
    assert 'whether "Alarm temperature passed" comes true by 720 min is not settled.' in text


def test_one_ranking_is_a_table_and_the_others_are_lines(tmp_path: Path) -> None:
    quantities = tuple(Quantity(f"y{place}", f"Outcome {place}", "1") for place in range(12))
    shares = [(0.5, 0.2, 0.1, 0.0)] * 2 + [(0.5, 0.2, 0.1, 0.11), (0.1, 0.5, 0.3, 0.2), (0.1, 0.1, 0.1, 0.1), (0.5, 0.1, 0.2, 0.21)]
    findings = [ranking(each.name, shares[min(place, 5)]) for place, each in enumerate(quantities)]
    text = words(said(tmp_path, findings, outcome_quantities=quantities, limits_asked=()))
    assert text.count("1. Activation energy") == 1
    assert "Outcome 1: the same order Outcome 2: the same first two Outcome 3: first Frequency factor, then" in text
    assert "Outcome 4: the first place is not settled Outcome 5: first Activation energy; the order of the others is not settled" in text
    assert "Not shown here, but in the file: Outcome 9, Outcome 10, Outcome 11" in text


def test_of_an_input_that_varies_nothing_is_promised(tmp_path: Path) -> None:
    text = words(said(tmp_path, replaced(ranking("alarm_passed", (0.1, 0.1, 0.7, 0.1), along="by"))))
    assert '"Heat loss, cooling off" varies, which no better knowledge takes away; it has the largest share' in text


def test_missing_indices_have_their_reason(tmp_path: Path) -> None:
    reason = "ranking a limit needs 500 members that passed and 500 that did not"
    finding = ranking("alarm_passed", (np.nan,) * 4, along="by")
    total = replace(finding.variables["total_by"], attributes={"reason": reason})
    text = words(said(tmp_path, replaced(Finding(finding.group, {**finding.variables, "total_by": total}))))
    assert f"missing: {reason}" in text
    assert "is not settled" not in text.split("In words")[1]


def test_many_inputs_are_summed_up(tmp_path: Path) -> None:
    items = tuple(Input(f"p{place}", f"Parameter {place}", "1", Uniform(low=0, high=1), "made up", "knowledge", 2) for place in range(20))
    total = np.full(20, 0.001)
    total[3] = 0.9
    variables = {
        name: Variable(("input",), values, name)
        for name, values in {"total": total, "total_low": total - 0.0005, "total_high": total + 0.0005}.items()
    }
    variables |= {name.replace("total", "first"): variable for name, variable in variables.items()}
    text = words(said(tmp_path, [*without("ranking", "members"), Finding("ranking/peak_T", variables)], inputs=Inputs(items)))
    assert "1. Parameter 3 0.900 0.899 to 0.901" in text
    assert "19 other inputs, total of each at most 0.0015" in text
    assert "Parameter 4" not in text.split("What is settled")[0]
    assert "May be dropped (share surely below 0.01 in all that is ranked): Parameter 0, Parameter 1" in text


def driver(name: str, value: float, half: float) -> Driver:
    return Driver(InputRow(name, name, "", "", "", "", None), Shares(Estimate(), Estimate(value, value - half, value + half)))


def test_an_order_only_as_fine_as_the_intervals() -> None:
    def names(*drivers: Driver) -> list[str]:
        return [" ".join(sorted(each.input.name for each in group)) for group in ordered(drivers, share_of)]

    assert names(driver("a", 0.1, 0.01), driver("b", 0.5, 0.01), driver("c", 0.3, 0.01)) == ["b", "c", "a"]
    assert names(driver("a", 0.5, 0.2), driver("b", 0.4, 0.2), driver("c", 0.1, 0.05)) == ["a b", "c"]
    # A wide one overlaps everything, so nothing is settled although a and c are apart.
    assert names(driver("a", 0.5, 0.01), driver("b", 0.3, 0.3), driver("c", 0.1, 0.01)) == ["a b c"]
    # Ends that touch do not settle.
    assert names(driver("a", 0.5, 0.125), driver("b", 0.25, 0.125)) == ["a b"]
    assert names(driver("a", 0.5, math.nan), driver("b", 0.25, 0.01)) == ["a b"]
    assert names(driver("a", math.nan, 0.1), driver("b", 0.25, 0.01)) == ["b", "a"]
    assert names() == []


def test_trust_tells_members_sources_evidence_dependence_and_warnings(tmp_path: Path) -> None:
    text = words(said(tmp_path, facts=made_facts(fell_back=("x",))))
    for sentence in (
        "Members: 16384, none failed.",
        "Solver: explicit Runge-Kutta pair 5(4), relative tolerance 1e-6",
        "the pilot gave none for x",
        'Sources: not stated for 2 of 4 inputs: "Frequency factor", "Heat loss, cooling off".',
        "Weak evidence among the influential inputs: Frequency factor (evidence 1).",
        "Dependence: all inputs are taken as independent.",
        "Warning: the parameter `spare` is used by nothing",
    ):
        assert sentence in text


@pytest.mark.parametrize(
    ("policy", "sentence"),
    [
        ("bound", "probabilities and quantiles count them both ways"),
        ("exclude", "every number is given success"),
        ("refuse", "withholds statements where members fail"),
    ],
)
def test_failed_members_are_told_with_cause_share_and_advice(tmp_path: Path, policy: str, sentence: str) -> None:
    plan = made_study().plan
    plan.failures = policy  # type: ignore[misc]
    findings = [each for each in made_findings() if each.group != "failures"]
    findings.append(failures({Status.ok: 48000, Status.blew_up: 1150, Status.not_finite: 1, Status.too_many_steps: 1}))
    text = words(said(tmp_path, findings, made_facts(members_failed=320, solves_failed=1152), plan=plan))
    assert "Members: 16384, of which 320 failed (2 %)." in text
    assert ("What to expect (given success" in text) == (policy == "exclude")
    assert sentence in text
    assert "1150 solves of 49152 ended with blew_up. A state grew beyond all bounds in finite time: look for" in text
    assert "1 solve of 49152 ended with not_finite." in text


def test_the_failed_counted_both_ways_stand_below_the_limit(tmp_path: Path) -> None:
    finding = limit((0.0031, 0.0082, 0.0148), (0.0005, 0.0008, 0.0010))
    both = {
        f"ever_by_if_{end}": Variable(("by",), np.array([0.003, 0.008, value]), "counted")
        for end, value in (("low", 0.0145), ("high", 0.0342))
    }
    text = words(said(tmp_path, replaced(Finding(finding.group, {**finding.variables, **both}, finding.attributes))))
    assert "of the members of whom it is known; with the failed ones counted as not passing 0.0145, as passing 0.0342" in text


def test_withheld_statements_say_so(tmp_path: Path) -> None:
    reason = "withheld because members failed"
    finding = limit((np.nan,) * 3, (np.nan,) * 3)
    told = replace(finding.variables["ever_by"], attributes={"reason": reason})
    text = words(said(tmp_path, replaced(Finding(finding.group, {**finding.variables, "ever_by": told}, {}))))
    assert f"by 720 min missing 0.01: no verdict missing: {reason}" in text
    assert "nan" not in text.lower().replace("finance", "")


EVIL = "\x1b[2J\x1b]0;pwned\x07 all\u202ewell\r\n" + "very " * 40 + "long"


def test_signs_in_texts_of_the_user_do_not_act(tmp_path: Path) -> None:
    items = tuple(replace(item, label=EVIL, source="") for item in INPUTS.items)
    text = said(
        tmp_path,
        title=EVIL,
        caution=EVIL,
        name="evil",
        warnings=(EVIL,),
        inputs=Inputs(items),
        watched=(Quantity("T", EVIL, "K\x1b[31m"), Quantity("x", EVIL, "1")),
        outcome_quantities=(Quantity("peak_T", EVIL, "K"),),
        limits_asked=(LimitAsked("alarm_passed", EVIL, "T > alarm\x1b", (120.0,), 0.01),),
    )
    assert not re.search(r"[\x00-\x09\x0b-\x1f\x7f-\x9f\u202a-\u202e]", text)
    assert "\\x1b[2J" in text
    lines = [line for line in text.splitlines() if "result.nc" not in line and not line.startswith("Next:")]
    assert all(width(line) <= 112 for line in lines)


def test_a_folder_with_blanks_can_be_copied_into_a_shell(tmp_path: Path) -> None:
    text = summary(made_result(tmp_path / "my results"))
    assert f"Next: uq show '{tmp_path / 'my results'}' --json" in text


def test_the_same_file_gives_the_same_text(tmp_path: Path) -> None:
    result = made_result(tmp_path)
    assert summary(result) == summary(result)

"""What is said where members failed: nothing that holds of the others only without saying so."""

from __future__ import annotations

import math
from collections.abc import Sequence
from dataclasses import replace
from pathlib import Path

import numpy as np
import pytest

from tests.made_results import LEVELS, TIMES, made_facts, made_findings, made_result, made_study
from uq.analysis.ask import Quantity
from uq.analysis.finding import Finding, Variable
from uq.report.machine import result_json
from uq.report.summary import summary
from uq.study.study import Study

INF = math.inf
FAILED = made_facts(members=1024, members_asked=1024, members_failed=645, solves=3072, solves_failed=1900)


def bands(values: Sequence[float], ends: Sequence[tuple[float, float]], both: Sequence[tuple[float, float]] = ()) -> Finding:
    """Quantiles at all times alike, with the ends of their intervals, and with the failed counted low and high."""

    def course(each: Sequence[float]) -> Variable:
        return Variable(("quantile", "time"), np.repeat(np.array(each, dtype=float)[:, None], len(TIMES), axis=1), "quantiles", "1")

    found = {"quantiles": course(values)}
    found |= {f"quantiles_{end}": course([pair[place] for pair in ends]) for place, end in enumerate(("low", "high"))}
    if both:
        found |= {f"quantiles_if_{end}": course([pair[place] for pair in both]) for place, end in enumerate(("low", "high"))}
    return Finding("bands/x", found)


def study(failures: str = "bound") -> Study:
    plan = made_study().plan
    plan.failures = failures  # type: ignore[misc]
    return made_study(plan=plan, watched=(Quantity("x", "x", "1"),), outcome_quantities=(), limits_asked=(), time=made_study().time)


def said(folder: Path, finding: Finding, failures: str = "bound") -> str:
    return " ".join(summary(made_result(folder, study(failures), [finding], FAILED)).split())


# 63 % failed: with the failed counted low the 5 % quantile is below everything, counted high the 95 % quantile above everything.
MOST = bands(
    (0.268317, 0.5, 0.9, 2.2, 16.4381),
    ((-INF, 0.42), (-INF, INF), (-INF, INF), (-INF, INF), (5.12, INF)),
    ((-INF, 0.41), (-INF, INF), (-INF, INF), (-INF, INF), (5.23, INF)),
)


def test_no_range_is_claimed_of_all_members_where_most_failed(tmp_path: Path) -> None:
    text = said(tmp_path, MOST)
    sentence = text.split("In words: ")[1]
    assert "Too many members failed (63 %) for a range of x at 720 min that holds for all of them" in sentence
    assert "among those that did not fail, 90 % lie between 0.27 and 16." in sentence
    assert "90 % of the members " not in sentence
    assert "268317" not in text
    assert "16.4381" not in text


def test_the_table_shows_quantiles_without_the_failed_and_with_them_counted_either_way(tmp_path: Path) -> None:
    text = said(tmp_path, MOST)
    assert "5 % 50 % 95 % At 720 min x members that did not fail 0.27 0.9 16" in text
    assert "failed counted low unbounded unbounded 5" in text
    assert "failed counted high 0.41 unbounded unbounded" in text
    assert "95 % interval, either way at most 0.42 unbounded at least 5" in text
    assert "inf" not in text.replace("info", "")


def test_a_range_that_holds_either_way(tmp_path: Path) -> None:
    finding = bands(
        (1.0, 1.5, 2.0, 2.5, 3.0),
        tuple((value - 0.11, value + 0.11) for value in (1.0, 1.5, 2.0, 2.5, 3.0)),
        tuple((value - 0.0414, value + 0.0414) for value in (1.0, 1.5, 2.0, 2.5, 3.0)),
    )
    text = said(tmp_path, finding)
    range_ = "x at 720 min is between 0.95 and 3.05"
    assert f"For at least 90 % of the members, whatever the 645 failed ones would have come to, {range_}." in text
    assert "failed counted low 0.96 1.96 2.96" in text


def test_one_end_that_holds_either_way(tmp_path: Path) -> None:
    ends = ((0.9, 1.1), (1.4, 1.6), (1.9, 2.2), (2.4, INF), (2.9, INF))
    both = ((0.95, 1.02), (1.46, 1.53), (1.95, 2.1), (2.46, 4.0), (2.96, INF))
    text = said(tmp_path, bands((1.0, 1.5, 2.0, 2.5, 3.0), ends, both))
    assert "For at least 95 % of the members, whatever the 645 failed ones would have come to, x at 720 min is at least 0.95;" in text
    assert "among those that did not fail, 90 % lie between 1.00 and 3.00." in text


def test_failures_after_the_last_quoted_time_change_nothing(tmp_path: Path) -> None:
    values = (1.0, 1.5, 2.0, 2.5, 3.0)
    ends = tuple((value - 0.1, value + 0.1) for value in values)
    text = said(tmp_path, bands(values, ends, tuple((value, value) for value in values)))
    assert "For 90 % of the members x at 720 min is between 1.00 and 3.00." in text
    assert "failed counted" not in text


def test_given_success_is_said_in_the_sentence_too(tmp_path: Path) -> None:
    values = (1.0, 1.5, 2.0, 2.5, 3.0)
    text = said(tmp_path, bands(values, tuple((value - 0.1, value + 0.1) for value in values)), "exclude")
    assert "For 90 % of the members that did not fail x at 720 min is between 1.00 and 3.00." in text


def test_a_probability_either_way(tmp_path: Path) -> None:
    finding = next(each for each in made_findings() if each.group == "limits/alarm_passed")
    both = {
        f"ever_by_if_{end}": Variable(("by",), np.array([0.003, 0.008, value]), "counted") for end, value in (("low", 0.13), ("high", 0.34))
    }
    ends = {
        name: replace(finding.variables[name], data=np.array([0.003, 0.008, value]))
        for name, value in (("ever_by", 0.2), ("ever_by_low", 0.128), ("ever_by_high", 0.345))
    }
    told = Finding(finding.group, {**finding.variables, **both, **ends}, finding.attributes)
    text = " ".join(summary(made_result(tmp_path, made_study(), [told], made_facts(members_failed=3440))).split())
    assert 'By 720 min, "Alarm temperature passed" comes true for 13 to 34 % of the members, as the 3440 failed ones' in text
    assert "would not or would have passed (95 % interval 12 to 35 %, either way), which is more than the accepted 1 %" in text
    assert "counted as not passing 0.13, as passing 0.34" in text


@pytest.mark.parametrize(("label", "start"), [("x", "For 90 % of the members x at"), ("k0 ratio", "For 90 % of the members k0 ratio at")])
def test_names_keep_their_letters(tmp_path: Path, label: str, start: str) -> None:
    finding = bands((1.0, 1.5, 2.0, 2.5, 3.0), tuple((value - 0.1, value + 0.1) for value in (1.0, 1.5, 2.0, 2.5, 3.0)))
    named = made_study(watched=(Quantity("x", label, "1"),), outcome_quantities=(), limits_asked=())
    text = " ".join(summary(made_result(tmp_path, named, [finding])).split())
    assert f"In words: {start} 720 min is between" in text


def test_long_numbers_keep_their_columns(tmp_path: Path) -> None:
    values = tuple(0.9999999387 + 1e-8 * step for step in range(5))
    text = summary(made_result(tmp_path, study(), [bands(values, tuple((value - 1e-10, value + 1e-10) for value in values))]))
    assert all(len(line) <= 100 for line in text.splitlines() if "result.nc" not in line and not line.startswith(("Next", "  ")))
    rows = [line for line in text.splitlines() if "interval" in line or line.lstrip().startswith("to ")]
    assert len(rows) == 2
    assert rows[0].split()[:3] == ["95", "%", "interval"]
    assert rows[0].index("from") == rows[1].index("to")
    assert len(LEVELS) == 5


def test_a_probability_that_failures_do_not_touch_is_one_of_all_members(tmp_path: Path) -> None:
    """Whoever failed had passed before."""
    facts = made_facts(members_failed=320)
    text = " ".join(summary(made_result(tmp_path, made_study(), facts=facts)).split())
    assert "comes true for about 1 member in 68 (between" in text
    plan = made_study().plan
    plan.failures = "exclude"  # type: ignore[misc]
    text = " ".join(summary(made_result(tmp_path / "left out", made_study(plan=plan), facts=facts)).split())
    assert "comes true for about 1 member in 68 (between" in text
    found = [given(each) if each.group == "limits/alarm_passed" else each for each in made_findings()]
    text = " ".join(summary(made_result(tmp_path / "given", made_study(plan=plan), found, facts)).split())
    assert "comes true for about 1 in 68 of the members of whom it is known (between" in text


def given(finding: Finding, passed: float = math.nan, low: float = 0.0, high: float = 1.0) -> Finding:
    """A limit whose probabilities are given success; `passed`: all of them are this."""
    changed = {name: replace(each, attributes={"given": "success"}) for name, each in finding.variables.items() if "ever_by" in name}
    if not math.isnan(passed):
        ends = {"ever_by": passed, "ever_by_low": low, "ever_by_high": high}
        changed = {name: replace(each, data=np.full(3, ends[name])) for name, each in changed.items()}
    return Finding(finding.group, {**finding.variables, **changed}, finding.attributes)


def test_nought_and_all_are_counted_among_the_members_that_their_bound_is_about(tmp_path: Path) -> None:
    limit = next(each for each in made_findings() if each.group == "limits/alarm_passed")
    plan = made_study().plan
    plan.failures = "exclude"  # type: ignore[misc]
    facts = made_facts(members_failed=8739)
    for members in (7645, 12000, 16384):
        end = 0.025 ** (1 / members)
        for passed, low, high, told in ((0.0, 0.0, 1 - end, f"0 of {members} members"), (1.0, end, 1.0, f"all {members} members")):
            found = given(limit, passed, low, high)
            text = summary(made_result(tmp_path / f"{members} {passed}", made_study(plan=plan), [found], facts))
            assert text.count(told) >= 3
    both = {f"ever_by_if_{end}": Variable(("by",), np.full(3, value), "counted") for end, value in (("low", 0.0), ("high", 0.25))}
    found = given(limit, 0.0, 0.0, 0.26)
    found = Finding(found.group, {**found.variables, **both}, found.attributes)
    text = " ".join(summary(made_result(tmp_path / "both", made_study(), [found], made_facts(members_failed=4096))).split())
    assert "by 720 min 0 to 4096 of 16384 members at most 0.26" in text


def test_nothing_is_claimed_where_all_failed(tmp_path: Path) -> None:
    facts = made_facts(members_failed=16384, solves_failed=49152)
    text = summary(made_result(tmp_path, facts=facts))
    assert "WARNING: 16384 of 16384 members (100 %) failed." in text
    assert "All members failed, so that nothing can be said of what was asked." in text
    assert not [head for head in ("Is a limit", "What to expect", "What drives", "In words", "0.0148") if head in text]


@pytest.mark.parametrize(("failed", "warned"), [(16, False), (17, True), (8855, True)])
def test_a_warning_stands_below_the_caution(tmp_path: Path, failed: int, warned: bool) -> None:
    text = summary(made_result(tmp_path, facts=made_facts(members_failed=failed)))
    assert ("WARNING: " in text) == warned
    assert ("In words: 8855 of 16384 members (54 %) failed." in text) == (failed == 8855)
    if warned:
        assert text.index("Caution") < text.index("WARNING") < text.index("Is a limit")


def test_what_a_refusing_study_says_covers_no_time_at_which_members_had_failed(tmp_path: Path) -> None:
    """Whoever failed had passed before, so that the file has all probabilities; the bands end at 360 min."""
    plan = made_study().plan
    plan.failures = "refuse"  # type: ignore[misc]
    found = []
    for each in made_findings():
        if each.group.startswith("outcomes"):
            continue
        variables = dict(each.variables)
        if each.group.startswith("bands/"):
            for name in ("quantiles", "quantiles_low", "quantiles_high"):
                variables[name] = replace(variables[name], data=np.where(TIMES < 360, variables[name].data, np.nan))
        found.append(Finding(each.group, variables, each.attributes))
    result = made_result(tmp_path, made_study(plan=plan), found, made_facts(members_failed=40))
    text = " ".join(summary(result).split())
    assert "by 120 min 0.00310 0.00260 to 0.00360 by 360 min missing by 720 min missing 0.01: no verdict" in text
    assert '"Alarm temperature passed" by 720 min' in text
    assert "missing: withheld because members failed" in text
    assert "In words: 40 of 16384 members (0.24 %) failed. 16384" in text
    assert not [claim for claim in ("0.0148", "0.620", "settled", "first time is") if claim in text]
    told = result_json(result)
    assert told["limits"]["alarm_passed"]["verdict"] is None
    assert [each["value"] for each in told["limits"]["alarm_passed"]["ever_by"]] == [0.0031, None, None]

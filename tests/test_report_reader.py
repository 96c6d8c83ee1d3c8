"""What a reader needs who meets a result for the first time: what numbers mean, digits that can be read, a page that fits."""

from __future__ import annotations

import re
from dataclasses import replace
from pathlib import Path

import numpy as np
import pytest

from tests.made_results import (
    INPUTS,
    band,
    limit,
    made_facts,
    made_findings,
    made_result,
    made_study,
    measured,
    ranking,
    scenario_findings,
    scenario_study,
    shapley,
)
from uq.analysis.ask import LimitAsked
from uq.analysis.finding import Finding
from uq.inputs.dependence import Dependence
from uq.inputs.inputs import Input, Inputs
from uq.report.answers import Estimate
from uq.report.chances import one_in
from uq.report.plain import Table, laid, width
from uq.report.rounding import finest_of, rounded
from uq.report.spoken import clock_of, listed, moment
from uq.report.summary import summary
from uq.store.facts import Counts


def words(text: str) -> str:
    return " ".join(text.split())


def with_one(finding: Finding) -> list[Finding]:
    return [finding if each.group == finding.group else each for each in made_findings()]


def test_trust_opens_with_what_intervals_mean_and_where_limits_are_judged(tmp_path: Path) -> None:
    trust = words(summary(made_result(tmp_path)).split("How far to trust this")[1])
    assert trust.startswith(
        "Intervals (95 %) show the effect of the finite number of members only, not errors of the model, of the inputs,"
    )
    assert "Limits and outcomes are judged at 13 output times, 60 min apart; what happens between them is not seen." in trust


def test_inputs_of_one_group_or_source_are_probably_dependent(tmp_path: Path) -> None:
    told = words(summary(made_result(tmp_path / "none")))
    assert "taken as independent. Probably not independent: Activation energy and Frequency factor (group kinetics)." in told
    tied = Inputs(INPUTS.items, (Dependence(("k0", "activation"), rank_correlation=-0.55),))
    assert "Probably not" not in summary(made_result(tmp_path / "stated", made_study(inputs=tied)))
    items = tuple(replace(each, group="", source="The same  Table") for each in INPUTS.items[1:3])
    told = words(summary(made_result(tmp_path / "source", made_study(inputs=Inputs((INPUTS.items[0], *items, INPUTS.items[3]))))))
    assert 'Probably not independent: Frequency factor and "Heat loss, cooling off" (same source, "The same Table").' in told


def test_entries_of_one_declaration_are_not_called_dependent_by_what_is_said_of_all_of_them(tmp_path: Path) -> None:
    def told(folder: str, *items: Input) -> str:
        return words(summary(made_result(tmp_path / folder, made_study(inputs=Inputs((*items, INPUTS.items[3]))))))

    first = INPUTS.items[0]
    entries = [replace(first, name=f"heat[{i}]", label=f"Heat [{i}]", group="", source="Calorimetry") for i in range(3)]
    assert "Calorimetry" not in told("alone", *entries)
    other = replace(first, name="loss", label="Loss", group="", source="Calorimetry")
    assert 'Probably not independent: Heat and Loss (same source, "Calorimetry")' in told("with", *entries[:2], other)


def test_until_when_the_accepted_probability_is_kept(tmp_path: Path) -> None:
    # The upper end of `ever` is the course of the estimate and 0.001: at most 0.01 up to 360 min, where it is 0.0092.
    assert "accepted until 360 min: up to then the upper end" in words(summary(made_result(tmp_path / "until")))
    met = limit((0.001, 0.002, 0.003), (0.0005,) * 3, "met")
    assert "accepted until" not in summary(made_result(tmp_path / "kept", findings=with_one(met)))
    never = limit((0.2, 0.3, 0.4), (0.01,) * 3)
    assert "no output time after the start is known to keep the accepted 0.01" in summary(
        made_result(tmp_path / "never", findings=with_one(never))
    )


def test_first_times_reach_down_one_output_step_and_have_the_digits_of_the_grid(tmp_path: Path) -> None:
    exact = limit((0.0031, 0.0082, 0.0148), (0.0005, 0.0008, 0.0010))
    at = {
        f"first_time{end}": replace(exact.variables["first_time"], data=np.array([60.0, 120, 300, 480, 720]))
        for end in ("", "_low", "_high")
    }
    text = words(summary(made_result(tmp_path, findings=with_one(Finding(exact.group, {**exact.variables, **at}, exact.attributes)))))
    assert "the median of the first time is between 240 and 300 min, and 90 % of first times are between 0 and 720 min" in text


def test_times_are_said_as_the_study_wrote_them() -> None:
    clock = clock_of("min", 'stop = 720\nby = ["4 h", \'90 s\'] # "1 day"\nother = "5 h"')
    assert [clock.at(time) for time in (240.0, 1.5, 300.0, 1440.0)] == ["4 h", "90 s", "300 min", "1440 min"]
    assert [moment(time, "day") for time in (1, 33, 0.5)] == ["1 day", "33 days", "0.5 days"]
    assert clock.apart([0, 5, 10]) == "5 min apart"
    assert clock.apart([0, 5, 15]) == "at most 10 min apart"
    assert clock.apart([0]) == ""
    assert clock_of("", "").between(1, 2) == "1 and 2"


def test_where_a_band_is_widest_is_told_beside_the_last_time(tmp_path: Path) -> None:
    finding = band("T", "K", 320.0, 8.0)
    turned = {
        name: replace(each, data=each.data[..., ::-1].copy()) if "quantiles" in name else each for name, each in finding.variables.items()
    }
    text = words(summary(made_result(tmp_path, findings=with_one(Finding(finding.group, turned, finding.attributes)))))
    assert "When they spread most Tank temperature at 0 min, K 306.8 320.0 333.2" in text
    assert "When they spread most" not in summary(made_result(tmp_path / "not"))


@pytest.mark.parametrize(
    ("numbers", "spread", "told"),
    [
        ((119.74, 118.71, 120.71), 548.0, ("119.7", "118.7", "120.8")),
        ((305.994, 305.948, 306.046), 78.0, ("306.0", "305.9", "306.1")),
        ((0.999999876, 0.999999846, 0.999999905), 0.97, ("> 0.9999", "0.9999", "")),
        ((4.02e-9, 2.83e-9, 5.06e-9), 0.559, ("4.0e-9", "2.8e-9", "5.1e-9")),
        ((0.002651, 0.00244, 0.00285), 0.559, ("0.0027", "0.0024", "0.0029")),
        # Digits that tell the members apart stay.
        ((1000.00123, 1000.00121, 1000.00125), 0.0031, ("1000.00123", "1000.00121", "1000.00125")),
        ((0.0, -0.001, 0.001), 10.0, ("0.00", "-0.01", "0.01")),
        ((3.0, 2.0, 4.0), 0.0, ("3.0", "2.0", "4.0")),
    ],
)
def test_digits_that_serve_a_reader(numbers: tuple[float, float, float], spread: float, told: tuple[str, str, str]) -> None:
    texts = rounded(*numbers, finest_of(numbers[0], spread))
    assert (texts.value, texts.low, texts.high) == told


def test_a_count_goes_with_the_printed_probability() -> None:
    """0.01404 is printed as 0.014, which is 1 in 71."""
    assert one_in(Estimate(0.01404, 0.0091, 0.0189)) == ("71", "between 1 in 110 and 1 in 52")
    assert one_in(Estimate(1e-3, 1e-9, 0.0031)) == ("1000", "at most 1 in 320")


def test_names_with_commas_are_quoted() -> None:
    assert listed(["c", "h, start"]) == '"c", "h, start"'
    assert listed(["c", "h"]) == "c, h"
    assert listed("abcdefghij") == "a, b, c, d, e, f, g, h and 2 more"


def test_a_long_tie_is_named_whole(tmp_path: Path) -> None:
    items = tuple(replace(INPUTS.items[0], name=f"p{place}", label=f"P{place}", group="", evidence=place) for place in range(9))
    shares = (0.9, 0.31, 0.3, 0.3, 0.29, 0.29, 0.28, 0.11, 0.0)
    study = made_study(inputs=Inputs(items), limits_asked=())
    found = [each for each in made_findings() if each.group.split("/")[0] not in ("ranking", "limits", "members")]
    text = words(summary(made_result(tmp_path, study, [*found, ranking("peak_T", shares)])))
    assert "2-7. 6 inputs, order not settled, total 0.28 to 0.31: P1, P2, P3, P4, P5, P6" in text
    assert "2 other inputs, total of each at most 0.14: P7, P8" in text


def test_every_input_that_is_warned_of_stands_in_the_table(tmp_path: Path) -> None:
    items = tuple(
        replace(INPUTS.items[0], name=f"p{place}", label=f"P{place}", group="", evidence=1 if place == 6 else 3) for place in range(8)
    )
    study = made_study(inputs=Inputs(items), limits_asked=())
    found = [each for each in made_findings() if each.group.split("/")[0] not in ("ranking", "limits", "members")]
    main = ranking("peak_T", (0.9, 0.7, 0.5, 0.3, 0.01, 0.01, 0.01, 0.01), half=0.005)
    text = words(summary(made_result(tmp_path, study, [*found, main, ranking("T", (0.1,) * 6 + (0.9, 0.1), along="time")])))
    assert "Weak evidence among the influential inputs: P6 (evidence 1)." in text
    assert "4 other inputs, total of each at most 0.015, among them P6" in text


def test_shares_stay_within_nought_and_one(tmp_path: Path) -> None:
    finding = ranking("alarm_passed", (0.99, 0.001, 0.4, 0.2), along="by")
    section = summary(made_result(tmp_path, findings=with_one(finding))).split("What drives it")[1].split("What is settled")[0]
    assert "0.990  0.960 to 1.000" in section
    assert not re.search(r"-0\.|1\.0[1-9]", section)


def test_a_single_input_is_not_ranked(tmp_path: Path) -> None:
    study = made_study(inputs=Inputs(INPUTS.items[:1]))
    found = [each for each in made_findings() if each.group.split("/")[0] not in ("ranking", "members")]
    text = summary(made_result(tmp_path, study, [*found, ranking("peak_T", (1.0,))]))
    assert "Activation energy is the only uncertain input: there is nothing to rank." in text
    assert "evidence" not in text.split("What drives it")[1].split("How far")[0]


@pytest.mark.parametrize(
    ("probability", "told"),
    [(0.0148, "242 of 16384 passed. Take about 65536 members, or rank an outcome instead"), (0.0, "0 of 16384 passed. Rank")],
)
def test_too_few_passed_for_a_ranking_says_what_helps(tmp_path: Path, probability: float, told: str) -> None:
    finding = ranking("alarm_passed", (np.nan,) * 4, along="by")
    reason = {"reason": "ranking a limit needs 500 members that passed and 500 that did not"}
    lost = Finding(finding.group, {**finding.variables, "total_by": replace(finding.variables["total_by"], attributes=reason)})
    passed = limit((0.0, 0.0, probability), (0.0,) * 3)
    found = [passed if each.group == passed.group else lost if each.group == lost.group else each for each in made_findings()]
    assert told in words(summary(made_result(tmp_path, findings=found)))


@pytest.mark.parametrize("columns", [60, 72, 80, 100, 130])
def test_the_page_folds_to_the_terminal(tmp_path: Path, columns: int) -> None:
    found = [*[each for each in made_findings() if each.group != "ranking/peak_T"], shapley("peak_T", (0.5, 0.3, 0.15, 0.05)), measured()]
    facts = made_facts(scenarios={"early": Counts(16384, 120, 49152, 400)}, members_failed=300)
    text = summary(made_result(tmp_path, scenario_study(), [*found, *scenario_findings()], facts), columns)
    lines = [line for line in text.splitlines() if not line.startswith(("Folder", "Next", "      uq"))]
    assert max(width(line) for line in lines) <= columns
    assert words(text).startswith("Cooling outage at a hold tank Caution: Screening")


def test_narrow_tables_put_intervals_below_their_numbers() -> None:
    part = Table([("", "share", "95 % interval", "note"), ("  a long name of an input", "0.50", "0.48 to 0.52", "yes")], (2,))
    assert laid([part], 60) == [
        "                             share  95 % interval  note",
        "    a long name of an input  0.50   0.48 to 0.52   yes",
    ]
    assert laid([part], 48) == [
        "                             share          note",
        "                             95 % interval",
        "    a long name of an input  0.50           yes",
        "                             0.48 to 0.52",
    ]
    assert laid([part], 40) == [
        "        share          note",
        "        95 % interval",
        "    a long name of an input",
        "        0.50           yes",
        "        0.48 to 0.52",
    ]


def test_a_limit_by_several_hours_is_said_in_hours(tmp_path: Path) -> None:
    study = made_study(
        text='[limits.alarm_passed]\nby = ["2 h", "6 h", "12 h"]\n',
        limits_asked=(LimitAsked("alarm_passed", "Alarm temperature passed", "T > alarm", (120.0, 360.0, 720.0), 0.01),),
    )
    text = words(summary(made_result(tmp_path, study)))
    assert "by 2 h 0.00310" in text
    assert "At 12 h Tank temperature" in text
    assert "accepted until 6 h" in text

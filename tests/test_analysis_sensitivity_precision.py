"""When headline numbers are precise enough, which inputs may be dropped, and how many solves a precision takes."""

from __future__ import annotations

from dataclasses import dataclass, replace

import numpy as np
import pytest

from tests.analysis_models import Model, complete, folded, gaussian, number, tallied
from tests.sensitivity_coverage import group_model, linear_model
from tests.sensitivity_models import Dependent, design_of, linear
from uq.analysis.ask import InputGroup
from uq.analysis.estimate import Estimate
from uq.analysis.finding import Finding, Variable
from uq.analysis.places import dropping, order_of_inputs, ranked_in, singly
from uq.analysis.policy import Named
from uq.analysis.precision import (
    FASTEST,
    Headline,
    Round,
    headline,
    needed,
    precision_findings,
    settled,
)
from uq.analysis.ranking import NOISE, TOO_FEW
from uq.design.design import Design


@dataclass(frozen=True)
class Asked:
    quantiles: float | None = None
    probabilities: float | None = None
    indices: float | None = None


MODEL = Model(("p", "q", "r"), (0.0, 1.0, 2.0), gaussian, threshold=12.0, by=(1.0, 2.0), outcomes=lambda u: u[:, :1], outcome_names=("o",))


def at_rows(model: Model, rows: int, **changes: object) -> tuple[Headline, ...]:
    design = Design(model.inputs, 1, rows)
    ask = complete(model, design, **changes)
    found = folded(tallied(model, design, ask, design.blocks(0, rows, min(rows, 256)))).findings(ask)
    return headline(found, ask, design.members)


def by_name(headlines: tuple[Headline, ...]) -> dict[tuple[str, str], Headline]:
    return {(each.group, each.name): each for each in headlines}


def test_the_headline_numbers_are_those_of_the_contract() -> None:
    found = by_name(at_rows(MODEL, 64))
    assert {key: (each.kind, each.dims, each.value.shape) for key, each in found.items()} == {
        ("limits/hot", "ever_by"): ("probabilities", ("by",), (2,)),
        ("bands/T", "quantiles"): ("quantiles", ("quantile",), (5,)),
        ("outcomes/o", "quantiles"): ("quantiles", ("quantile",), (5,)),
        ("ranking/hot", "first_by"): ("indices", ("input",), (3,)),
        ("ranking/hot", "total_by"): ("indices", ("input",), (3,)),
        ("ranking/T", "first_overall"): ("indices", ("input",), (3,)),
        ("ranking/T", "total_overall"): ("indices", ("input",), (3,)),
        ("ranking/o", "first"): ("indices", ("input",), (3,)),
        ("ranking/o", "total"): ("indices", ("input",), (3,)),
    }
    # Watched quantities at the last time, where T = 10 + z0 + 2 z1.
    band = found["bands/T", "quantiles"]
    assert band.value[2] == pytest.approx(10, abs=0.2)
    assert band.scale[0] == pytest.approx(2 * 1.645 * np.sqrt(5), rel=0.05)
    assert band.half_widths == pytest.approx((band.high - band.low) / 2 / band.scale)


def test_dependent_inputs_and_groups_have_headlines_too() -> None:
    for (model, _), largest, names in (
        (linear_model("two"), "x1", {"first_overall", "shapley_overall"}),
        (group_model(), "x2", {"first_overall", "total_overall", "first_group_overall", "total_group_overall"}),
    ):
        design = design_of(model, 1, 64)
        ask = model.complete(design)
        found = headline(model.tallied(design, ask, design.blocks(0, 64, 64)).findings(ask), ask, design.members)
        assert {each.name for each in found if each.kind == "indices"} == names
        # What is refused does not keep a precision from being reached.
        assert settled(found, Asked(indices=0.5))
        assert order_of_inputs(found, singly(ask.inputs))["ranking/y0"][0] == [largest]


def test_settled_when_every_half_width_is_small_enough() -> None:
    found = at_rows(MODEL, 64)
    widest = max(float(each.half_widths.max()) for each in found if each.kind == "quantiles")
    assert settled(found, Asked(quantiles=widest * 1.001))
    assert not settled(found, Asked(quantiles=widest * 0.999))
    assert not settled(found, Asked(quantiles=widest * 1.001, probabilities=1e-6))


def test_nothing_is_precise_where_there_is_no_number() -> None:
    constant = replace(MODEL, values=lambda u, times: np.full((len(u), 1, 3), 7.0), threshold=None, by=(), outcomes=None, outcome_names=())
    found = at_rows(constant, 64)
    assert all(each.undefined.all() for each in found)
    assert not settled(found, Asked(quantiles=0.5))
    assert not settled(found, Asked(indices=0.5))
    # A probability that no member shows is known to within exact binomial ends, not better.
    rare = at_rows(replace(MODEL, threshold=1000.0), 64)
    half = by_name(rare)["limits/hot", "ever_by"].half_widths
    assert half == pytest.approx((1 - 0.025 ** (1 / 2048)) / 2)
    assert settled(rare, Asked(probabilities=0.005))
    assert not settled(rare, Asked(probabilities=0.0005))
    # A limit with too few passings has no index yet: not reached. A constant has none for ever: left out.
    assert not settled(rare, Asked(indices=0.5))


def test_a_constant_beside_others_does_not_hold_them_up() -> None:
    def values(u: np.ndarray, times: np.ndarray) -> np.ndarray:
        return np.concatenate([gaussian(u, times), np.full((len(u), 1, len(times)), 7.0)], axis=1)

    found = at_rows(replace(MODEL, values=values, watched=("T", "c")), 64)
    assert by_name(found)["bands/c", "quantiles"].undefined.all()
    assert settled(found, Asked(quantiles=0.2))


def test_an_inert_input_is_precise_by_the_rule_of_three() -> None:
    # r does nothing: its index is 0 in every row, which leaves 3/N.
    total = by_name(at_rows(MODEL, 64))["ranking/T", "total_overall"]
    assert total.value[2] == 0.0
    assert total.half_widths[2] == pytest.approx(3 / 1024)


def test_inputs_are_ordered_and_dropped_only_as_far_as_intervals_allow() -> None:
    found = at_rows(MODEL, 256)
    assert order_of_inputs(found, singly(MODEL.inputs))["ranking/T"] == [["q"], ["p"], ["r"]]
    dropped = dropping(found, singly(MODEL.inputs))
    assert dropped.must_not == ("p", "q")
    assert dropped.may == ("r",)
    assert dropped.open == ()
    coarse = at_rows(MODEL, 16)
    assert "r" not in dropping(coarse, singly(MODEL.inputs)).may
    assert dropping((), singly(MODEL.inputs)).open == MODEL.inputs


def index_finding(value: list[float], half: list[float], few: tuple[int, ...] = ()) -> Finding:
    """A ranking; with `few` that of a limit, by as many times, of which all but the last have numbers."""
    v, h = np.array(value), np.array(half)
    variables = {}
    for kind in ("first", "total"):
        if not few:
            variables |= Named(f"{kind}_overall", ("input",), kind).variables(Estimate(v, v - h, v + h))
            continue
        ends = (np.stack([*(np.full(len(v), 0.5) for _ in few[1:]), each], axis=1) for each in (v, v - h, v + h))
        variables |= Named(f"{kind}_by", ("input", "by"), kind).variables(Estimate(*ends), TOO_FEW if any(few) else NOISE)
    if few:
        variables["few_by"] = Variable(("by",), np.array(few, dtype=np.int8), "few")
    return Finding("ranking/T", variables)


ASK = MODEL.ask()


def round_of(solves: int, half: list[float], value: list[float] | None = None, few: tuple[int, ...] = ()) -> Round:
    return Round(solves, solves, headline([index_finding(value or [0.5] * len(half), half, few)], ASK, solves))


def test_solves_needed_are_conservative_until_more_is_measured() -> None:
    one = [round_of(1000, [0.04, 0.01, 0.02])]
    assert needed(one, Asked(indices=0.02)).solves == pytest.approx(4000)
    assert needed(one, Asked(indices=0.05)).solves == 1000
    # Three rounds that halve with every doubling: like solves^-1.
    fast = [round_of(solves, [40.0 / solves] * 3) for solves in (500, 1000, 2000)]
    assert needed(fast, Asked(indices=0.01)).solves == pytest.approx(4000)
    faster = [round_of(solves, [4e4 / solves**2] * 3) for solves in (500, 1000, 2000)]
    assert needed(faster, Asked(indices=0.005)).solves == pytest.approx(2000 * (0.01 / 0.005) ** (1 / FASTEST))
    slow = [round_of(solves, [0.02] * 3) for solves in (500, 1000, 2000)]
    assert needed(slow, Asked(indices=0.01)).solves == pytest.approx(8000)


def test_what_cannot_be_foretold_is_named() -> None:
    few = [round_of(1000, [np.nan] * 3, [np.nan] * 3, (0, 1))]
    found = needed(few, Asked(indices=0.02))
    assert found.unknown == ("ranking/T first_by", "ranking/T total_by")
    assert found.solves == 1000
    noise = [round_of(1000, [np.nan] * 3, [np.nan] * 3)]
    assert needed(noise, Asked(indices=0.02)).unknown == ()
    assert not settled(noise[0].headlines, Asked(indices=0.02))


def test_a_time_before_the_last_that_too_few_passed_holds_nothing_up() -> None:
    """What is missing at the last time for another reason does not come with more members, whatever an earlier time wants."""
    lost = round_of(1000, [np.nan, 0.01, 0.01], [np.nan, 0.5, 0.2], (1, 0))
    assert [each.undefined.tolist() for each in lost.headlines] == [[True, False, False]] * 2
    assert settled(lost.headlines, Asked(indices=0.02))
    assert needed([lost], Asked(indices=0.02)).unknown == ()
    assert not settled(round_of(1000, [np.nan] * 3, [np.nan] * 3, (1, 1)).headlines, Asked(indices=0.02))


def test_dependent_inputs_are_settled_while_an_earlier_time_is_rare() -> None:
    """By t = 0 hardly anybody has passed: no total index is asked for, and none is waited for."""
    model, _ = linear_model("two")
    rare = replace(
        model, values=lambda x, times: (x.sum(axis=1)[:, None] * np.where(times > 0, 1, 0.02))[:, None], threshold=0.3, by=(0.0, 1.0)
    )
    design = design_of(rare, 1, 256)
    ask = rare.complete(design)
    findings = {each.group: each for each in rare.tallied(design, ask, design.blocks(0, 256, 256)).findings(ask)}
    flags = number(findings["ranking/hot"], "few_by").tolist()
    assert flags == [1, 0]
    found = headline([findings["ranking/hot"]], ask, design.members)
    assert {each.name for each in found} == {"first_by", "shapley_by"}
    assert not any(each.undefined.any() for each in found)
    assert settled(found, Asked(indices=0.5))


def test_inputs_drawn_together_have_one_place_in_the_order() -> None:
    """x1 and x2 are one unit: neither has a share, and what they have together is large, so that they must not be dropped."""
    joint = replace(
        Dependent(np.zeros(3), np.eye(3) + 0.5 * np.eye(3)[[1, 0, 2]] * [1, 1, 0], linear([2.0, 1.0, 0.1])),
        units=((0, 1), (2,)),
        groups=(InputGroup("x1+x2", (0, 1)),),
    )
    design = design_of(joint, 1, 256)
    ask = joint.complete(design)
    findings = {each.group: each for each in joint.tallied(design, ask, design.blocks(0, 256, 256)).findings(ask)}
    ranked = ranked_in(findings["ranking/y0"], ask.inputs)
    assert [(each.name, each.inputs) for each in ranked[:2]] == [("x1+x2", ("x1", "x2")), ("x3", ("x3",))]
    found = headline(findings.values(), ask, design.members)
    assert order_of_inputs(found, ranked)["ranking/y0"][0] == ["x1+x2"]
    assert dropping(found, ranked).must_not[0] == "x1+x2"
    assert {"x1", "x2"}.isdisjoint(dropping(found, ranked).open)
    shapley = by_name(found)["ranking/y0", "shapley_overall"]
    assert shapley.undefined.tolist()[:2] == [True, True]


def test_the_estimate_of_a_pilot_is_about_right() -> None:
    rounds = [Round(2048, 5120, at_rows(MODEL, 64))]
    said = needed(rounds, Asked(quantiles=0.008)).solves
    for rows in (128, 256, 512, 1024, 2048):
        if settled(at_rows(MODEL, rows), Asked(quantiles=0.008)):
            break
    # Well-spread points do better than one over the square root; never much worse.
    assert rows * 16 * 5 <= 2 * said


def test_precision_findings_have_a_round_in_front() -> None:
    rounds = [Round(32 * rows, 80 * rows, at_rows(MODEL, rows)) for rows in (64, 128)]
    found = {finding.group: finding for finding in precision_findings(rounds)}
    assert set(found) == {
        f"precision/{group}" for group in ("limits/hot", "bands/T", "outcomes/o", "ranking/hot", "ranking/T", "ranking/o")
    }
    band: Variable = found["precision/bands/T"].variables["quantiles"]
    assert band.dims == ("round", "quantile")
    assert band.unit == "K"
    assert number(found["precision/bands/T"], "members").tolist() == [2048, 4096]
    assert number(found["precision/limits/hot"], "ever_by_low").shape == (2, 2)
    assert band.data[1].tolist() == by_name(rounds[1].headlines)["bands/T", "quantiles"].value.tolist()

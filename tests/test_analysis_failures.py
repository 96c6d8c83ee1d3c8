"""Failed members: bounds, numbers given success, or nothing; never a hole taken for an answer."""

from __future__ import annotations

from dataclasses import replace
from functools import cache

import numpy as np
import pytest

from tests.analysis_models import Model, complete, folded, forecast, gaussian, number, tallied
from uq.analysis.finding import Finding
from uq.analysis.policy import TOO_MANY_LOST, WITHHELD
from uq.design.design import Design
from uq.solve.batch import Batch, Status, Truth

TIMES = (0.0, 1.0, 2.0, 3.0)
LEVELS = (0.05, 0.25, 0.5, 0.75, 0.95)
DESIGN = Design(("p", "q"), 7, 256)


def failing(share: float) -> Model:
    """A linear Gaussian of which the share with the largest p fails at 1.5, in reach of the limit."""
    return Model(
        ("p", "q"),
        TIMES,
        gaussian,
        outcomes=lambda u: gaussian(u, np.array([1.0]))[:, 0],
        outcome_names=("o",),
        threshold=12.0,
        by=(1.0, 3.0),
        accept=0.28,
        fails=lambda u: np.where(u[:, 0] > 1 - share, 1.5, np.inf),
    )


@cache
def found(share: float, policy: str) -> dict[str, Finding]:
    return forecast(failing(share), DESIGN, failures=policy)


@cache
def members() -> tuple[np.ndarray, np.ndarray]:
    """All A and B points, and their values had nobody failed [member, time]."""
    parts = [DESIGN.base(block) for block in DESIGN.blocks(0, 256, 256)]
    u = np.concatenate(parts)
    return u, gaussian(u, np.array(TIMES))[:, 0]


def at_level(values: np.ndarray) -> list[float]:
    return np.sort(values)[[int(np.ceil(level * len(values) - 1e-9)) - 1 for level in LEVELS]].tolist()


def test_bounds_hold_what_would_have_been() -> None:
    band = found(0.05, "bound")["bands/T"]
    u, values = members()
    gone = u[:, 0] > 0.95
    late = number(band, "quantiles")[:, 3]
    assert late.tolist() == at_level(values[~gone, 3])
    assert number(band, "quantiles_if_low")[:, 3].tolist() == at_level(np.where(gone, -np.inf, values[:, 3]))
    assert number(band, "quantiles_if_high")[:, 3].tolist() == at_level(np.where(gone, np.inf, values[:, 3]))
    # The truth, which nobody knows when members fail, is inside; the outer ends are beyond both.
    truth = np.array(at_level(values[:, 3]))
    assert (number(band, "quantiles_low")[:, 3] < truth).all()
    assert (truth < number(band, "quantiles_high")[:, 3]).all()
    assert (number(band, "quantiles_low") <= number(band, "quantiles_if_low")).all()
    assert (number(band, "quantiles_high") >= number(band, "quantiles_if_high")).all()
    # Before the failure nothing is lost.
    assert (number(band, "quantiles_if_low")[:, :2] == number(band, "quantiles")[:, :2]).all()
    assert (number(band, "quantiles_if_high")[:, :2] == number(band, "quantiles")[:, :2]).all()


def test_a_condition_that_cannot_be_told_counts_both_ways_for_this_limit_only() -> None:
    # the same members as if they had failed, but they are whole: all else is known
    doubtful = replace(failing(0.05), fails=None, doubts=lambda u: np.where(u[:, 0] > 0.95, 1.5, np.inf))
    told, whole = forecast(doubtful, DESIGN), found(0.0, "bound")
    lost, unsure = found(0.05, "bound")["limits/hot"], told["limits/hot"]
    for name in ("ever", "now", "ever_by", "first_time"):
        for which in ("", "_low", "_high", "_if_low", "_if_high"):
            assert np.array_equal(number(lost, name + which), number(unsure, name + which)), name + which
    assert unsure.attributes["verdict"] == lost.attributes["verdict"]
    assert number(unsure, "ever_by_low")[-1] < number(whole["limits/hot"], "ever_by")[-1] < number(unsure, "ever_by_high")[-1]
    assert np.array_equal(number(told["ranking/hot"], "first"), number(found(0.05, "bound")["ranking/hot"], "first"), equal_nan=True)
    for group in ("bands/T", "outcomes/o", "ranking/T"):
        for name, variable in whole[group].variables.items():
            assert np.array_equal(number(told[group], name), variable.data, equal_nan=True), (group, name)
    assert number(told["failures"], "count")[1:].sum() == 0


class Blinking(Model):
    """Nobody can tell the condition at time 1."""

    def solve(self, u: np.ndarray) -> Batch:
        batch = super().solve(u)
        batch.conditions[:, :, 1] = Truth.unknown
        return batch


@pytest.mark.parametrize(("threshold", "now", "ever"), [(-1e3, 1.0, [1.0, 1.0]), (1e3, 0.0, [0.0, 1.0])])
def test_a_condition_that_can_be_told_again_is_known_then(threshold: float, now: float, ever: list[float]) -> None:
    # but whether it ever was true is known only where it was so before
    limit = forecast(Blinking(("p", "q"), TIMES, gaussian, threshold=threshold, by=(3.0,)), DESIGN)["limits/hot"]
    assert number(limit, "now_if_low").tolist() == [now, 0.0, now, now]
    assert number(limit, "now_if_high").tolist() == [now, 1.0, now, now]
    known = "ever_if_low" not in limit.variables
    assert [float(number(limit, "ever" if known else name)[-1]) for name in ("ever_if_low", "ever_if_high")] == ever


def test_probabilities_count_the_failed_both_ways_and_an_earlier_passing_stands() -> None:
    limit = found(0.05, "bound")["limits/hot"]
    u, values = members()
    gone = u[:, 0] > 0.95
    before = (values[:, :2] > 12).any(axis=1)
    passed = np.where(gone, before, (values > 12).any(axis=1))
    unknown = gone & ~before
    assert unknown.any()
    assert (gone & before).any()
    assert number(limit, "ever")[3] == pytest.approx(passed.sum() / (~unknown).sum(), rel=1e-12)
    assert number(limit, "ever_if_low")[3] == pytest.approx(passed.mean(), rel=1e-12)
    assert number(limit, "ever_if_high")[3] == pytest.approx((passed | unknown).mean(), rel=1e-12)
    assert number(limit, "now_if_low")[3] == pytest.approx(((values[:, 3] > 12) & ~gone).mean(), rel=1e-12)
    assert number(limit, "now_if_high")[3] == pytest.approx(((values[:, 3] > 12) | gone).mean(), rel=1e-12)
    assert number(limit, "ever_by_low")[1] < number(limit, "ever_by_if_low")[1]
    assert number(limit, "ever_by_high")[1] > number(limit, "ever_by_if_high")[1]
    # 0.27 of all pass: within bounds that reach from below 0.28 to above.
    assert limit.attributes["verdict"] == "not settled"
    assert found(0.05, "exclude")["limits/hot"].attributes["verdict"] == "met"


def test_first_times_are_bounded() -> None:
    limit = found(0.05, "bound")["limits/hot"]
    value, low, high = (number(limit, f"first_time{ending}") for ending in ("", "_if_low", "_if_high"))
    assert (low <= value).all()
    assert (value <= high).all()
    assert (number(limit, "first_time_low") <= low).all()
    assert (number(limit, "first_time_high") >= high).all()


def test_means_deviations_and_indices_are_missing_where_more_than_a_thousandth_is_lost() -> None:
    for policy in ("bound", "exclude"):
        groups = found(0.05, policy)
        for group, name in (("bands/T", "mean"), ("bands/T", "sd"), ("ranking/T", "first"), ("ranking/T", "total")):
            variable = groups[group].variables[name]
            assert np.isfinite(variable.data[..., :2]).all()
            assert np.isnan(variable.data[..., 2:]).all()
            assert variable.attributes["reason"] == TOO_MANY_LOST
            assert np.isnan(number(groups[group], f"{name}_low")[..., 2:]).all()
        for name in ("first_overall", "total_overall"):
            assert np.isnan(number(groups["ranking/T"], name)).all()
        assert np.isnan(number(groups["outcomes/o"], "mean"))
        assert np.isnan(number(groups["ranking/hot"], "first")[:, 3]).all()


def variance_of_replicates(values: np.ndarray, replicate: np.ndarray) -> float:
    """mean(y^2) - mean(y)^2, and the variance of the mean by the spread over replicates put back."""
    mean, many = values.mean(), replicate.max() + 1
    residuals = [(values[replicate == each] - mean).sum() / len(values) for each in range(many)]
    return float(values.var() + np.sum(np.square(residuals)) * many / (many - 1))


def test_up_to_a_thousandth_lost_rows_are_left_out_whole() -> None:
    """0.025 % of p is gone, that is 0.05 % of the rows (A or B, and A's mixed members with them)."""
    share = 0.00025
    groups = forecast(failing(share), DESIGN)
    full = forecast(replace(failing(share), fails=None), DESIGN)
    blocks = DESIGN.blocks(0, 256, 256)
    a, b = (np.concatenate([DESIGN.split(block, DESIGN.points(block))[part] for block in blocks]) for part in (0, 1))
    lost = (a[:, 0] > 1 - share) | (b[:, 0] > 1 - share)
    assert 0 < lost.mean() <= 0.001
    kept_a, kept_b = a[~lost], b[~lost]
    values = np.concatenate([gaussian(kept_a, np.array([3.0])), gaussian(kept_b, np.array([3.0]))])[:, 0, 0]
    assert number(groups["bands/T"], "mean")[3] == pytest.approx(values.mean(), rel=1e-12)
    replicate = np.tile(np.repeat(np.arange(16), 256)[~lost], 2)
    assert number(groups["bands/T"], "sd")[3] == pytest.approx(np.sqrt(variance_of_replicates(values, replicate)), rel=1e-12)
    assert groups["bands/T"].variables["mean"].attributes["given"] == "success"
    mixed = kept_a.copy()
    mixed[:, 0] = kept_b[:, 0]
    ya, yb, ym = (gaussian(rows, np.array([3.0]))[:, 0, 0] for rows in (kept_a, kept_b, mixed))
    # The ratio weighs replicates by rows, the sums over all rows are those of the pooled estimator up to that weight.
    total = ((ya - ym) ** 2).mean() / 2 / values.var()
    assert number(groups["ranking/T"], "total")[0, 3] == pytest.approx(total, rel=2e-3)
    first = (yb * (ym - ya)).mean() - values.mean() * (ym - ya).mean()
    assert number(groups["ranking/T"], "first")[0, 3] == pytest.approx(first / values.var(), rel=1e-2)
    assert number(groups["ranking/T"], "total")[:, :2].tolist() == number(full["ranking/T"], "total")[:, :2].tolist()
    assert np.isfinite(number(groups["ranking/T"], "total_overall")).all()


def test_lost_rows_are_left_out_of_the_indices_of_a_limit_too() -> None:
    """Row by row and time by time: a row counts until one of its members is unknown."""

    # A few that had not passed before.
    def fails(u: np.ndarray) -> np.ndarray:
        return np.where(np.abs(u[:, 0] - 0.1) < 0.00015, 1.5, np.inf)

    model = replace(failing(0.0), fails=fails)
    found_indices = forecast(model, DESIGN)["ranking/hot"]
    numerators, means = [], []
    for block in DESIGN.blocks(0, 256, 256):
        u = DESIGN.points(block)
        passed = np.maximum.accumulate(gaussian(u, np.array(TIMES))[:, 0] > 12, axis=1)
        gone = np.isfinite(fails(u))
        passed[gone, 2:] = passed[gone, 1:2]
        unknown = (gone[:, None] & ~passed)[:, 3]
        a, b, mixed = DESIGN.split(block, passed[:, 3].astype(float))
        parts = DESIGN.split(block, unknown)
        kept = ~(parts.a | parts.b | parts.mixed.any(axis=0))
        numerators.append((a[kept], b[kept], mixed[:, kept]))
        means.append((a[kept].sum() + b[kept].sum(), 2 * kept.sum()))
    assert 1 <= 16 * 256 - sum(len(a) for a, _, _ in numerators) <= 4
    mean = sum(total for total, _ in means) / sum(count for _, count in means)
    first = [((b - mean) * (m - a)).mean(axis=1) for a, b, m in numerators]
    total = [((a - m) ** 2).mean(axis=1) / 2 for a, b, m in numerators]
    variances = [(((a - mean) ** 2).mean() + ((b - mean) ** 2).mean()) / 2 for a, b, _ in numerators]
    assert number(found_indices, "first")[:, 3] == pytest.approx(sum(first) / sum(variances), rel=1e-10)
    assert number(found_indices, "total")[:, 3] == pytest.approx(sum(total) / sum(variances), rel=1e-10)


def test_refuse_withholds_what_failures_touch_and_nothing_else() -> None:
    groups, plain = found(0.05, "refuse"), found(0.0, "bound")
    for group, name in (("bands/T", "quantiles"), ("bands/T", "mean"), ("bands/T", "sd"), ("limits/hot", "ever"), ("limits/hot", "now")):
        for ending in ("", "_low", "_high"):
            data = number(groups[group], name + ending)
            assert np.isnan(data[..., 2:]).all()
            assert data[..., :2].tolist() == number(plain[group], name + ending)[..., :2].tolist()
        assert groups[group].variables[name].attributes["reason"] == WITHHELD
        assert f"{name}_if_low" not in groups[group].variables
    assert "verdict" not in groups["limits/hot"].attributes
    assert groups["limits/hot"].attributes["reason"] == WITHHELD
    for name in ("quantiles", "mean", "sd", "missing"):
        assert np.isnan(number(groups["outcomes/o"], name)).all()
        assert groups["outcomes/o"].variables[name].attributes["reason"] == WITHHELD
    assert np.isnan(number(groups["bands/T"], "simultaneous")).all()
    assert groups["bands/T"].variables["simultaneous"].attributes["reason"] == WITHHELD


def test_exclude_says_given_success() -> None:
    groups, bound = found(0.05, "exclude"), found(0.05, "bound")
    band = groups["bands/T"]
    assert band.variables["quantiles"].attributes["given"] == "success"
    assert "given success" in band.variables["quantiles"].long_name
    assert not any("_if_" in name for finding in groups.values() for name in finding.variables)
    assert number(band, "quantiles").tolist() == number(bound["bands/T"], "quantiles").tolist()
    assert (number(band, "quantiles_low") >= number(bound["bands/T"], "quantiles_low")).all()


def test_without_failures_no_bounds_are_written() -> None:
    assert not any("_if_" in name for finding in found(0.0, "bound").values() for name in finding.variables)


def test_simultaneous_bands_are_bounded() -> None:
    band = found(0.05, "bound")["bands/T"]
    low, value, high = (number(band, name) for name in ("simultaneous_if_low", "simultaneous", "simultaneous_if_high"))
    assert (low < value).all()
    assert (value < high).all()
    assert (number(band, "simultaneous_low") < low).all()
    assert (number(band, "simultaneous_high") > high).all()
    # With more failed than the share may leave out, nothing finite holds.
    wide = found(0.2, "bound")["bands/T"]
    assert number(wide, "simultaneous_low")[0].tolist() == [-np.inf] * 4
    assert number(wide, "simultaneous_high")[1].tolist() == [np.inf] * 4
    assert np.isfinite(number(wide, "simultaneous")).all()


def test_failed_members_are_counted_and_shown() -> None:
    failures = found(0.05, "bound")["failures"]
    blocks = DESIGN.blocks(0, 256, 256)
    u = np.concatenate([DESIGN.points(block) for block in blocks])
    gone = u[:, 0] > 0.95
    count = number(failures, "count")
    assert count[Status.blew_up] == gone.sum()
    assert count[Status.ok] == (~gone).sum()
    assert count.sum() == DESIGN.solves
    assert number(failures, "count_base").sum() == DESIGN.members
    # A and B members only: the mixed ones repeat their inputs.
    base = np.concatenate([DESIGN.base(block) for block in blocks])
    shown = number(failures, "inputs")
    assert shown.shape == ((base[:, 0] > 0.95).sum(), 2)
    assert {tuple(row) for row in shown} == {tuple(row) for row in base[base[:, 0] > 0.95]}
    assert (number(failures, "failure_time") == 1.5).all()
    assert (number(failures, "failure_status") == Status.blew_up).all()
    assert "inputs" not in found(0.0, "bound")["failures"].variables


def test_details_stop_at_a_thousand_whatever_the_blocks() -> None:
    model = failing(0.6)
    ask = complete(model, DESIGN)
    shown = []
    for rows in (32, 256):
        part = folded(tallied(model, DESIGN, ask, DESIGN.blocks(0, 256, rows)))
        shown.append({finding.group: finding for finding in part.findings(ask)}["failures"])
    assert number(shown[0], "inputs").shape == (1000, 2)
    # Spread over all 16 replicates.
    of = {tuple(row): block.replicate for block in DESIGN.blocks(0, 256, 256) for row in DESIGN.base(block)}
    counts = np.bincount([of[tuple(row)] for row in number(shown[0], "inputs")], minlength=16)
    assert counts.min() > 40
    for name in ("inputs", "failure_time", "failure_status"):
        assert np.array_equal(number(shown[0], name), number(shown[1], name))


def test_everybody_failing_is_an_answer_too() -> None:
    model = replace(failing(1.0), fails=lambda u: np.full(len(u), 1.5))
    groups = forecast(model, Design(("p", "q"), 7, 16))
    band = groups["bands/T"]
    assert np.isnan(number(band, "quantiles")[:, 3]).all()
    assert (number(band, "quantiles_low")[:, 3] == -np.inf).all()
    assert (number(band, "quantiles_high")[:, 3] == np.inf).all()
    assert "no member" in band.variables["quantiles"].attributes["reason"]
    limit = groups["limits/hot"]
    # Those that passed before still did.
    assert 0 < number(limit, "ever_low")[3] < number(limit, "ever_if_low")[3]
    assert number(limit, "ever_high")[3] == 1.0
    assert np.isnan(number(groups["outcomes/o"], "quantiles")).all()


def test_a_term_without_a_value_is_counted_like_a_failure_of_that_quantity_alone() -> None:
    model = Model(
        ("p", "q"),
        TIMES,
        lambda u, times: np.where(np.array([[False], [True]]) & (u[:, None, :1] > 0.9), np.nan, gaussian(u, times)),
        watched=("T", "root"),
    )
    groups = forecast(model, Design(("p", "q"), 7, 64))
    assert "quantiles_if_low" not in groups["bands/T"].variables
    assert (number(groups["bands/root"], "quantiles_high")[-1] == np.inf).all()
    assert np.isnan(number(groups["bands/root"], "mean")).all()
    assert np.isfinite(number(groups["bands/T"], "mean")).all()

"""Differences of two runs: the right numbers, narrower with the same draws, and what is said where members failed or names differ."""

from __future__ import annotations

from dataclasses import replace

import numpy as np
import pytest

from tests.analysis_models import number
from tests.sensitivity_coverage import lognormal_pair
from tests.sensitivity_models import Dependent, design_of, linear
from uq.analysis.ask import Quantity, Scale
from uq.analysis.differences import OWN, SHARED, Draws, Run, differences, draws_of
from uq.analysis.estimate import t_quantile
from uq.analysis.finding import Finding
from uq.analysis.histograms import of_kept
from uq.analysis.jackknife import Jackknifed, Passed, paired, paired_shares, ratio_of, unpaired, unpaired_shares
from uq.analysis.kept import Kept
from uq.analysis.policy import TOO_MANY_LOST, WITHHELD
from uq.analysis.quantiles import Levels
from uq.analysis.without import Members, binned_cell, kept_cell
from uq.design.design import Design

RNG = np.random.default_rng(20261201)
LEVELS = Levels((0.05, 0.5, 0.95), 0.95)


def run(model: Dependent, seed: int = 1, rows: int = 64, **changes: object) -> Run:
    design = design_of(model, seed, rows)
    ask = replace(model.complete(design, questions=("bands", "limits", "outcomes")), **changes)
    return Run(ask, model.tallied(design, ask, design.blocks(0, rows, rows)))


def compared(one: Run, other: Run, draws: Draws) -> dict[str, Finding]:
    return {finding.group: finding for finding in differences(one, other, draws)}


def test_differences_hold_the_truth_and_are_narrower_with_the_same_draws() -> None:
    base, higher, truths = lognormal_pair()
    widths = {}
    for draws, seed in ((SHARED, 1), (OWN, 2)):
        found = compared(run(base), run(higher, seed), draws)
        for (group, name), truth in truths.items():
            value, low, high = (number(found[group], f"{name}{end}") for end in ("", "_low", "_high"))
            # 2.5 times the half-width: once in 14 000 times by chance.
            assert (np.abs(value - truth) <= 2.5 * (high - low) / 2).all(), (draws.name, group, name)
            widths[draws.name, group, name] = (high - low).mean()
        for finding in found.values():
            assert finding.attributes["draws"] == draws.name
            assert finding.attributes["intervals"] == draws.words
    assert widths["paired", "bands/y0", "quantiles"] < 0.2 * widths["unpaired", "bands/y0", "quantiles"]
    assert widths["paired", "bands/y0", "mean"] < 0.2 * widths["unpaired", "bands/y0", "mean"]


def test_the_values_are_the_differences_of_what_is_said_of_each() -> None:
    base, higher, _ = lognormal_pair()
    runs = run(base), run(higher)
    each = [{finding.group: finding for finding in one.tallies.findings(one.ask)} for one in runs]
    found = compared(*runs, SHARED)
    for group, names in {
        "bands/y0": ("quantiles", "mean", "sd"),
        "outcomes/o": ("quantiles", "mean", "sd"),
        "limits/hot": ("ever_by", "ever", "now"),
    }.items():
        for name in names:
            plain = number(each[1][group], name) - number(each[0][group], name)
            assert number(found[group], name) == pytest.approx(plain, rel=1e-12, abs=1e-15), (group, name)
            assert found[group].variables[name].dims == each[0][group].variables[name].dims


def test_a_run_less_itself_is_nothing() -> None:
    base, _, _ = lognormal_pair()
    found = compared(run(base), run(base), SHARED)
    for name in ("mean", "sd"):
        for end in ("", "_low", "_high"):
            assert (number(found["bands/y0"], f"{name}{end}") == 0).all()
    assert (number(found["bands/y0"], "quantiles") == 0).all()
    # No difference was seen among 2048 members: it may still be as much as exact binomial ends allow.
    assert number(found["limits/hot"], "ever_by_low")[0] == pytest.approx(-(1 - 0.025 ** (1 / 2048)))


def test_other_names_units_and_times_are_left_out() -> None:
    base, higher, _ = lognormal_pair()
    one = run(base)
    renamed = run(higher, watched=(Quantity("z", "", "K", "K"),), outcomes=(Quantity("o", "", "kJ", "kJ"),))
    assert set(compared(one, renamed, SHARED)) == {"limits/hot"}
    later = replace(higher, times=(1.0, 2.0))
    found = compared(one, run(later), SHARED)
    assert number(found["bands/y0"], "time").tolist() == [1.0]
    assert number(found["bands/y0"], "mean") == pytest.approx(0.1 * 2 * np.exp(0.17), rel=0.01)
    assert number(found["limits/hot"], "by").tolist() == [1.0]
    bands = replace(one.ask, questions=("bands",))
    assert set(
        compared(Run(bands, base.tallied(design_of(base, 1, 64), bands, design_of(base, 1, 64).blocks(0, 64, 64))), run(higher), SHARED)
    ) == {"bands/y0"}


def test_failed_members_count_both_ways() -> None:
    base, higher, _ = lognormal_pair()
    failing = replace(higher, fails=lambda x: np.where(x[:, 0] > 2.0, 0.5, np.inf))
    found = compared(run(base), run(failing), SHARED)["bands/y0"]
    low, value, high = (number(found, f"quantiles{end}") for end in ("_if_low", "", "_if_high"))
    assert (low[:, 1] < value[:, 1]).all()
    assert (value[:, 1] < high[:, 1]).all()
    assert low[:, 0].tolist() == high[:, 0].tolist() == value[:, 0].tolist()
    assert (number(found, "quantiles_low") <= low).all()
    assert np.isnan(number(found, "mean")[1])
    assert found.variables["mean"].attributes["reason"] == TOO_MANY_LOST
    limits = compared(run(base), run(failing), SHARED)["limits/hot"]
    assert number(limits, "ever_by_if_low")[0] < number(limits, "ever_by_if_high")[0]
    refused = compared(run(base, failures="refuse"), run(failing), SHARED)["bands/y0"]
    assert np.isnan(number(refused, "quantiles")[:, 1]).all()
    assert refused.variables["mean"].attributes["reason"] == WITHHELD


def test_draws_are_shared_where_equal_names_stand_at_equal_places() -> None:
    one = Design(("a", "b"), 1, 16)
    assert draws_of(one, Design(("a", "b", "c"), 1, 64)) is SHARED
    assert draws_of(one, Design(("a", "x"), 1, 16)) is SHARED
    assert draws_of(one, Design(("b", "a"), 1, 16)) is OWN
    assert draws_of(one, Design(("a", "b"), 2, 16)) is OWN
    assert draws_of(one, Design(("x", "y"), 1, 16)) is OWN
    assert draws_of(one, Design(("a", "b"), 1, 16, replicates=8)) is OWN


def test_jackknifed_differences_by_hand() -> None:
    one, other = RNG.normal(size=(2, 16, 3)), RNG.normal(size=(2, 16, 3))
    ones, twos = ratio_of(one[0], one[1] ** 2 + 1), ratio_of(other[0], other[1] ** 2 + 1)
    found = paired(ones, twos, 0.95)
    away = twos.without - ones.without
    half = t_quantile(0.95, 16) * np.sqrt(15 / 16 * ((away - away.mean(axis=0)) ** 2).sum(axis=0))
    assert found.high - found.value == pytest.approx(half)
    # Of equal denominators the jackknife is the plain standard error, and Welch's formula the textbook one.
    means = [ratio_of(each[0], np.ones((16, 3))) for each in (one, other)]
    plain = [each[0].var(axis=0, ddof=1) / 16 for each in (one, other)]
    assert means[0].error() ** 2 == pytest.approx(plain[0])
    from scipy.stats import ttest_ind

    ends = ttest_ind(other[0], one[0], equal_var=False).confidence_interval(0.95)
    welch = unpaired(means[0], means[1], 0.95)
    assert welch.low == pytest.approx(ends.low)
    assert welch.high == pytest.approx(ends.high)


def kept_of(values: np.ndarray) -> Kept:
    """One cell of values [replicate, value]."""
    return Kept({(replicate, 0): row[None] for replicate, row in enumerate(values)})


def test_quantiles_without_their_replicates_move_along_the_distribution_function() -> None:
    values = RNG.normal(size=(16, 4000))
    counted, none = np.full(16, 4000), np.zeros(16, dtype=np.int64)
    found = kept_cell(kept_of(values), 0).quantiles(LEVELS, Members(counted, none))
    plain = np.array([np.quantile(np.delete(values, place, axis=0), LEVELS.shares, method="inverted_cdf") for place in range(16)])
    assert found.value == pytest.approx(np.quantile(values, LEVELS.shares, method="inverted_cdf"))
    assert np.corrcoef((found.without - found.value).ravel(), (plain - found.value).ravel())[0, 1] > 0.95
    # Of independent values: the root of p (1 - p) / N over the density.
    known = np.sqrt(np.array([0.05 * 0.95, 0.25, 0.05 * 0.95]) / 64000) / np.array([0.103, 0.399, 0.103])
    assert found.error() == pytest.approx(known, rel=0.6)


def test_values_counted_into_bins_differ_as_those_kept_but_for_half_a_bin() -> None:
    values = RNG.normal(3.0, 1.0, size=(16, 500))
    scale = Scale(np.array([3.0]), np.array([1e-3]))
    cells = kept_cell(kept_of(values), 0), binned_cell(of_kept(kept_of(values), scale), 0)
    members = Members(np.full(16, 500), np.zeros(16, dtype=np.int64))
    kept, binned = (cell.quantiles(LEVELS, members) for cell in cells)
    assert cells[1].error is not None
    assert (np.abs(kept.value - binned.value) <= cells[1].error(binned.value) * (1 + 1e-9)).all()
    assert binned.error() == pytest.approx(kept.error(), rel=0.15)


def test_replicates_that_agree_leave_a_width() -> None:
    # One value in each 64th, in every replicate: at the median all have the same share.
    values = (np.arange(64) + RNG.random((16, 1))) / 64
    members = Members(np.full(16, 64), np.zeros(16, dtype=np.int64))
    found = kept_cell(kept_of(values), 0).quantiles(Levels((0.5,), 0.95), members)
    assert (found.error() > 0).all()
    whole = paired(found, Jackknifed(found.value, found.without, found.least), 0.95)
    assert (whole.high > whole.low).all()


def test_runs_beyond_what_is_kept_are_compared_too() -> None:
    base, higher, truths = lognormal_pair()
    runs = []
    for model in (base, higher):
        design = design_of(model, 1, 64)
        ask = replace(model.complete(design, questions=("bands", "limits", "outcomes")), keep_bytes=0, members=2048)
        runs.append(Run(ask, model.tallied(design, ask, design.blocks(0, 64, 64))))
    kept, binned = compared(run(base), run(higher), SHARED), compared(*runs, SHARED)
    mixed = compared(run(base), runs[1], SHARED)
    for group in ("bands/y0", "outcomes/o"):
        for found in (binned, mixed):
            assert found[group].variables["quantiles"].attributes["bin_error"] > 0
            away = np.abs(number(found[group], "quantiles") - number(kept[group], "quantiles"))
            assert (away <= found[group].variables["quantiles"].attributes["bin_error"] * 1.01).all()
        assert number(binned[group], "mean") == pytest.approx(number(kept[group], "mean"))
    assert (np.abs(number(binned["bands/y0"], "quantiles") - truths["bands/y0", "quantiles"]) < 0.05).all()


@pytest.mark.parametrize("way", [paired_shares, unpaired_shares])
@pytest.mark.parametrize("hits", [0, 1, 5, 500, 1000])
def test_a_difference_of_shares_never_has_zero_width(way, hits: int) -> None:  # type: ignore[no-untyped-def]
    same = Passed(np.full((16, 1), hits), np.full((16, 1), 1000))
    found = way(same, same, 0.95)
    assert found.low[0] < 0 < found.high[0]
    assert found.low[0] >= -1
    assert found.high[0] <= 1


def test_few_gains_have_exact_ends() -> None:
    none = Passed(np.zeros((16, 1), dtype=np.int64), np.full((16, 1), 1000))
    few = Passed((np.arange(16)[:, None] < 3).astype(np.int64), np.full((16, 1), 1000))
    found = paired_shares(none, few, 0.95)
    assert found.value[0] == 3 / 16000
    # 3 of 16 000, exact binomial: 0.62 to 8.77 of 16 000 (tables of the Poisson law, from memory), less up to 3.69 losses unseen.
    assert found.high[0] * 16000 == pytest.approx(8.77, abs=0.02)
    assert found.low[0] * 16000 <= 0.62


def test_a_linear_pair_differs_by_its_shift() -> None:
    one = Dependent(np.zeros(2), np.eye(2), linear([1.0, 1.0]), dependent=False, sets=())
    other = replace(one, values=lambda x, times: linear([1.0, 1.0])(x, times) + 0.5)
    found = compared(run(one), run(other), SHARED)["bands/y0"]
    assert number(found, "mean") == pytest.approx([0.5, 0.5])
    assert number(found, "quantiles") == pytest.approx(np.full((3, 2), 0.5))
    assert (number(found, "quantiles_high") - number(found, "quantiles_low")).max() < 1e-9

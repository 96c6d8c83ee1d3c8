"""From a study file to its result, against forecasts whose distribution is known in closed form."""

from __future__ import annotations

import math
from pathlib import Path
from statistics import NormalDist

import numpy as np
import pytest

import uq
from uq.store.result import Result
from uq.study.study import Study

DECAY = """
schema = 1
title = "Decay"
[time]
stop = 4
at = [0, 1, 2, 4]
[states.x]
start = { lognormal = { median = 2, gsd = 1.2 } }
rate = "-lambda * x"
[parameters]
lambda = { normal = { mean = 0.5, sd = 0.05 } }
[outcomes.last]
take = "final(x)"
[outcomes.whole]
take = "integral(x)"
[limits.low]
when = "x < 0.3"
by = [2, 4]
accept = 0.9
[plan]
seed = 7
members = 16384
"""
# ln x(t) = ln x0 - lambda t is normal: mean ln 2 - 0.5 t, variance ln(1.2)^2 + (0.05 t)^2.
MEAN_LN = math.log(2)
SD_LN_START = math.log(1.2)
# The intervals are of 95 %; an estimate further off than 3 half-widths is an alarm. With Student's t of 15 degrees of freedom (16
# replicates) that is |t| > 3 * 2.13 = 6.4, about 1e-5 for each of the fewer than 60 numbers looked at: one false alarm in 1500 seeds.
FAR = 3.0


def study_of(text: str, folder: Path, name: str = "decay") -> Study:
    path = folder / f"{name}.toml"
    path.write_text(text, encoding="utf-8")
    return uq.read_study(path)


@pytest.fixture(scope="module")
def decay(tmp_path_factory: pytest.TempPathFactory) -> Result:
    folder = tmp_path_factory.mktemp("decay")
    return uq.run(study_of(DECAY, folder), folder / "result")


def near(estimate: object, low: object, high: object, exact: object) -> None:
    """Within FAR half-widths of the truth, and the interval has a width (but for the solver's own error where nothing is uncertain)."""
    estimate, low, high, exact = (np.asarray(each, dtype=float) for each in (estimate, low, high, exact))
    assert np.all(low <= estimate)
    assert np.all(estimate <= high)
    assert np.all(np.abs(estimate - exact) <= FAR * np.maximum(high - estimate, estimate - low) + 1e-5 * np.abs(exact)), (estimate, exact)


def sd_ln(time: float) -> float:
    return math.hypot(SD_LN_START, 0.05 * time)


def test_bands_are_the_lognormal_ones(decay: Result) -> None:
    bands = decay.bands["x"]
    times, levels = bands.quantiles["time"].values, bands.quantiles["quantile"].values
    assert list(times) == [0, 1, 2, 4]
    exact = [[math.exp(MEAN_LN - 0.5 * t + sd_ln(t) * NormalDist().inv_cdf(p)) for t in times] for p in levels]
    near(bands.quantiles, bands.quantiles_low, bands.quantiles_high, exact)
    near(bands.mean, bands.mean_low, bands.mean_high, [math.exp(MEAN_LN - 0.5 * t + sd_ln(t) ** 2 / 2) for t in times])
    np.testing.assert_allclose(bands.nominal.values, 2 * np.exp(-0.5 * times), rtol=1e-5)


def test_limits_are_the_normal_probabilities(decay: Result) -> None:
    low = decay.limits["low"]
    exact = [NormalDist(MEAN_LN - 0.5 * t, sd_ln(t)).cdf(math.log(0.3)) for t in (2, 4)]
    near(low.ever_by, low.ever_by_low, low.ever_by_high, exact)
    assert low.attributes["verdict"] in ("met", "not met", "not settled")
    assert low.attributes["verdict"] == "met"
    assert exact[-1] < 0.9


def test_outcomes_agree_with_the_course(decay: Result) -> None:
    last = decay.outcomes["last"]
    exact = [math.exp(MEAN_LN - 2 + sd_ln(4) * NormalDist().inv_cdf(p)) for p in last.quantiles["quantile"].values]
    near(last.quantiles, last.quantiles_low, last.quantiles_high, exact)


def test_ranking_is_that_of_a_product_of_lognormals(decay: Result) -> None:
    """x(t) = a b, lognormal both; with u = exp(var ln a), v = exp(var ln b): S_a = (u - 1) / (u v - 1), T_a = v (u - 1) / (u v - 1).

    Worked out for this test from E x^2 = u v (E x)^2 and E(x | a) = a E b.
    """
    ranking = decay.ranking["x"]
    assert list(ranking.first["input"].values) == ["lambda", "x_start"]
    for place, time in enumerate((0, 1, 2, 4)):
        u, v = math.exp(SD_LN_START**2), math.exp((0.05 * time) ** 2)
        first = [(v - 1) / (u * v - 1), (u - 1) / (u * v - 1)]
        total = [u * (v - 1) / (u * v - 1), v * (u - 1) / (u * v - 1)]
        near(ranking.first[:, place], ranking.first_low[:, place], ranking.first_high[:, place], first)
        near(ranking.total[:, place], ranking.total_low[:, place], ranking.total_high[:, place], total)


def test_what_comes_back_is_what_the_file_says(decay: Result) -> None:
    again = uq.open_result(decay.folder)
    assert again.attributes == decay.attributes
    assert again.attributes["members"] == 16384
    assert again.attributes["solves"] >= 16384 * 2
    assert again.attributes["members_failed"] == 0
    np.testing.assert_array_equal(again.bands["x"].quantiles.values, decay.bands["x"].quantiles.values)


BLOW_UP = """
schema = 1
title = "Finite escape"
[time]
stop = 1
points = 11
[states.x]
start = 1
rate = "a * x**2"                       # x = 1 / (1 - a t) is at infinity at t = 1 / a
[parameters]
a = { uniform = { low = 0, high = 1.0204081632653061 } }
[outcomes.last]
take = "final(x)"
[limits.high]
when = "x > 2"
[plan]
members = 8192
"""


def test_members_that_blow_up_are_counted_both_ways(tmp_path: Path) -> None:
    """A member with a > 1 escapes before the end: 2 % of them. P(x(1) > 2) = P(a > 1/2) = 0.51, failed ones passed before they failed."""
    result = uq.run(study_of(BLOW_UP, tmp_path, "escape"), tmp_path / "result")
    failed = result.attributes["members_failed"] / result.attributes["members"]
    assert failed == pytest.approx(0.02, abs=0.004)
    bands = result.bands["x"]
    quoted = [bands.quantiles, bands.quantiles_low, bands.quantiles_high, bands.quantiles_if_low, bands.quantiles_if_high]
    assert not any(np.isnan(each.values).any() for each in quoted)
    assert np.all(bands.quantiles_if_low.values <= bands.quantiles_if_high.values)
    assert np.isfinite(bands.quantiles.sel(quantile=0.95).values).all()
    last = {p: 1 / (1 - p * 1.0204081632653061) for p in (0.05, 0.25, 0.5, 0.75, 0.95)}
    for level, exact in last.items():
        low, high = (float(each.sel(quantile=level)[-1]) for each in (bands.quantiles_low, bands.quantiles_high))
        assert low <= exact <= high or abs(exact - low) < 0.01 * exact or abs(exact - high) < 0.01 * exact
    high = result.limits["high"]
    assert float(high.ever_low[-1]) <= 0.51 <= float(high.ever_high[-1])
    assert np.isnan(result.ranking["x"].total.values[:, -1]).all()


def test_under_refuse_the_statements_are_withheld_and_the_file_is_written(tmp_path: Path) -> None:
    result = uq.run(study_of(BLOW_UP + 'failures = "refuse"\n', tmp_path, "escape"), tmp_path / "result")
    assert np.isnan(result.bands["x"].quantiles.values[:, -1]).all()
    assert int(result.failures["count"].sum()) > 0


def test_more_than_keep_is_counted_into_histograms_with_the_error_stated(tmp_path: Path, decay: Result) -> None:
    result = uq.run(study_of(DECAY + 'keep = "0.5 MB"\n', tmp_path), tmp_path / "result")
    exact, binned = decay.bands["x"].quantiles, result.bands["x"].quantiles
    error = float(binned.attrs["bin_error"])
    assert 0 < error < 1e-3 * float(exact.sel(quantile=0.95).max())
    np.testing.assert_allclose(binned.values, exact.values, atol=error)
    np.testing.assert_array_equal(result.bands["x"].mean.values, decay.bands["x"].mean.values)

"""Estimators one by one against closed forms, published numbers and a second implementation."""

from __future__ import annotations

from fractions import Fraction
from math import ceil

import numpy as np
import pytest
from hypothesis import given
from hypothesis import strategies as st
from SALib.analyze import sobol as salib
from scipy.stats import binom

from uq.analysis.estimate import ratio, rounding_sd, t_quantile
from uq.analysis.probabilities import clopper_pearson, probability
from uq.analysis.quantiles import Levels, quantiles, rank, weighted_quantiles
from uq.analysis.sobol import first_numerator, index, over_time, total_numerator, variance

LEVELS = Levels((0.05, 0.25, 0.5, 0.75, 0.95), 0.95)
RNG = np.random.default_rng(20261201)


def test_t_quantiles_are_those_of_the_tables() -> None:
    # Student's t, 97.5 %, 15 and 7 degrees of freedom; 99.5 %, 15: any table, e.g. JCGM 100:2008 table G.2 (from memory).
    assert t_quantile(0.95, 16) == pytest.approx(2.1314, abs=5e-5)
    assert t_quantile(0.95, 8) == pytest.approx(2.3646, abs=5e-5)
    assert t_quantile(0.99, 16) == pytest.approx(2.9467, abs=5e-5)
    assert np.isnan(t_quantile(0.95, 1))


@given(st.integers(1, 999), st.integers(1, 5000))
def test_a_rank_is_share_times_count_rounded_up(thousandths: int, count: int) -> None:
    exact = ceil(Fraction(thousandths, 1000) * count)
    assert rank(np.array(thousandths / 1000), np.array(count)) == exact


def test_quantile_is_the_smallest_value_whose_share_reaches() -> None:
    values = np.array([3.0, 1.0, 2.0, 2.0]).reshape(1, 2, 2)
    found = quantiles(values, Levels((0.25, 0.26, 0.75, 0.76), 0.95)).success.value[0]
    assert found.tolist() == [1.0, 2.0, 2.0, 3.0]


def test_woodruff_by_hand() -> None:
    values = RNG.normal(size=(16, 200))
    level = 0.3
    found = quantiles(values[None], Levels((level,), 0.95)).success
    pooled = np.sort(values.ravel())
    q = pooled[959]
    shares = (values <= q).mean(axis=1)
    half = 2.131449545559323 * shares.std(ddof=1) / 4
    expected = (q, pooled[ceil((level - half) * 3200) - 1], pooled[int((level + half) * 3200)])
    assert tuple(end[0, 0] for end in (found.value, found.low, found.high)) == expected


def test_intervals_of_quantiles_are_ordered_and_hold_the_estimate() -> None:
    for values in (RNG.normal(size=(4, 16, 64)), np.maximum(RNG.normal(size=(4, 16, 64)), 0.0), RNG.integers(0, 3, size=(4, 16, 64)) * 1.0):
        found = quantiles(values, LEVELS).success
        assert (found.low <= found.value).all()
        assert (found.value <= found.high).all()
        assert (np.diff(found.value, axis=1) >= 0).all()


def test_an_atom_of_one_half_and_a_constant() -> None:
    atom = np.maximum(RNG.normal(size=(1, 16, 512)), 0.0)
    found = quantiles(atom, LEVELS).success
    assert found.value[0, :2].tolist() == [0.0, 0.0]
    assert found.low[0, 1] == found.high[0, 1] == 0.0
    assert found.value[0, 4] == pytest.approx(1.645, abs=0.1)
    constant = quantiles(np.full((1, 16, 512), 7.0), Levels((0.0001, 0.5, 0.9999), 0.95)).success
    assert all((end == 7.0).all() for end in (constant.value, constant.low, constant.high))


def test_equal_shares_in_all_replicates_still_leave_a_width() -> None:
    # One value in each 64th, in every replicate: all shares at the median are 1/2 or one value more; rounding remains.
    values = ((np.arange(64) + RNG.random((16, 1))) / 64)[None]
    found = quantiles(values, Levels((0.5,), 0.95)).success
    assert found.low[0, 0] < found.value[0, 0] < found.high[0, 0]


def test_levels_beyond_the_sample_have_no_end() -> None:
    found = quantiles(RNG.normal(size=(1, 16, 16)), Levels((0.001, 0.999), 0.95)).success
    assert found.low[0, 0] == -np.inf
    assert found.high[0, 1] == np.inf
    assert np.isfinite(found.value).all()


def test_quantiles_with_failed_members_count_them_both_ways() -> None:
    values = RNG.normal(size=(2, 16, 64))
    gone = RNG.random((16, 64)) < 0.05
    values[0, gone] = np.nan
    found = quantiles(values, LEVELS)
    kept = np.sort(values[0][~gone])
    assert found.success.value[0].tolist() == kept[[ceil(level * len(kept) - 1e-9) - 1 for level in LEVELS.shares]].tolist()
    for estimate, filler in ((found.if_low, -np.inf), (found.if_high, np.inf)):
        filled = np.sort(np.where(gone, filler, values[0]).ravel())
        assert estimate.value[0].tolist() == filled[[ceil(level * 1024 - 1e-9) - 1 for level in LEVELS.shares]].tolist()
    assert found.lost[0].all()
    assert not found.lost[1].any()
    assert (found.if_low.value[1] == found.success.value[1]).all()


def test_absent_values_are_left_out_and_not_counted_both_ways() -> None:
    values = RNG.normal(size=(1, 16, 64))
    values[0, :, 0] = np.nan
    found = quantiles(values, LEVELS, np.ones((1, 16), dtype=np.int64))
    assert not found.lost.any()
    assert found.success.value[0, 2] == np.sort(values[0, :, 1:].ravel())[ceil(0.5 * 16 * 63) - 1]


def test_nobody_left_is_missing() -> None:
    found = quantiles(np.full((1, 16, 8), np.nan), LEVELS)
    assert np.isnan(found.success.value).all()
    assert (found.if_low.low == -np.inf).all()
    assert (found.if_high.high == np.inf).all()


def test_weighted_quantiles_are_those_of_the_members() -> None:
    places = np.array([0.0, 1.0, 2.5, 4.0])
    drawn = RNG.integers(0, 4, size=(16, 100))
    counts = np.array([np.bincount(row, minlength=4) for row in drawn])
    found = weighted_quantiles(counts, places, LEVELS)
    plain = quantiles(places[drawn][None], LEVELS).success
    assert found.value.tolist() == plain.value[0].tolist()
    assert np.isnan(weighted_quantiles(np.zeros((16, 4), dtype=np.int64), places, LEVELS).value).all()


def test_clopper_pearson() -> None:
    # Tails of the binomial distribution at the ends are (1 - confidence)/2 each: the definition of the interval.
    hits, total = np.array([0, 1, 7, 50, 99, 100]), np.full(6, 100)
    found = clopper_pearson(hits, total, 0.95)
    assert binom.sf(hits[1:] - 1, 100, found.low[1:]) == pytest.approx(0.025)
    assert binom.cdf(hits[:-1], 100, found.high[:-1]) == pytest.approx(0.025)
    assert found.low[0] == 0.0
    assert found.high[-1] == 1.0
    # No passing in 100: 1 - 0.025^(1/100), the exact form of the rule of three.
    assert found.high[0] == pytest.approx(1 - 0.025**0.01)


@pytest.mark.parametrize("hits", [0, 1, 79, 80, 500, 1000 - 80, 1000 - 1, 1000])
def test_a_probability_never_has_zero_width(hits: int) -> None:
    passed = np.full((16, 1), hits)
    found = probability(passed, np.full((16, 1), 1000), 0.95)
    assert found.low[0] <= found.value[0] <= found.high[0]
    assert found.low[0] < found.high[0]
    assert found.low[0] >= 0
    assert found.high[0] <= 1


def test_few_passings_use_the_binomial() -> None:
    passed = np.zeros((16, 2), dtype=np.int64)
    passed[:, 0] = [4] * 15 + [19]  # 79 passings of 16 000, below five per replicate
    passed[:, 1] = [4] * 15 + [20]  # 80
    found = probability(passed, np.full((16, 2), 1000), 0.95)
    exact = clopper_pearson(passed.sum(axis=0), np.array([16000, 16000]), 0.95)
    assert found.high[0] == exact.high[0]
    assert found.high[1] != exact.high[1]


def test_ratio_of_equal_denominators_is_the_mean_with_its_t_interval() -> None:
    numbers = RNG.normal(3.0, 1.0, size=(16, 5))
    found = ratio(numbers, np.ones((16, 5)), 0.95)
    half = t_quantile(0.95, 16) * numbers.std(axis=0, ddof=1) / 4
    assert found.value == pytest.approx(numbers.mean(axis=0))
    assert found.high - found.value == pytest.approx(half)
    assert rounding_sd(np.full((16, 1), 100)) == pytest.approx(0.01 / np.sqrt(12))


def ishigami(x: np.ndarray) -> np.ndarray:
    """Ishigami and Homma 1990, with a = 7, b = 0.1 as in Saltelli et al. 2008 (from memory)."""
    return np.sin(x[:, 0]) + 7 * np.sin(x[:, 1]) ** 2 + 0.1 * x[:, 2] ** 4 * np.sin(x[:, 0])


def test_indices_are_those_of_a_second_implementation_fed_with_the_same_rows() -> None:
    a_rows, b_rows = RNG.uniform(-np.pi, np.pi, size=(2, 500, 3))
    a, b = ishigami(a_rows), ishigami(b_rows)
    mixed = []
    for place in range(3):
        rows = a_rows.copy()
        rows[:, place] = b_rows[:, place]
        mixed.append(ishigami(rows))
    m = np.array(mixed)
    mean = np.concatenate([a, b]).mean()
    expected_first = [salib.first_order(a - mean, each - mean, b - mean) for each in m]
    expected_total = [salib.total_order(a, each, b) for each in m]
    # One replicate, sums about a centre that is not the mean.
    shift = 2.5
    d = m - a
    spread = variance((a + b - 2 * shift).sum(), ((a - shift) ** 2 + (b - shift) ** 2).sum(), np.array(mean - shift), np.array(500))
    first = first_numerator(((b - shift) * d).sum(axis=1), d.sum(axis=1), np.array(mean - shift), np.array(500))
    total = total_numerator((d**2).sum(axis=1), np.array(500))
    assert index(first[None], np.array([spread]), 0.95).value == pytest.approx(np.ravel(expected_first), rel=1e-12)
    assert index(total[None], np.array([spread]), 0.95).value == pytest.approx(np.ravel(expected_total), rel=1e-12)


def test_integral_over_time_is_by_trapezoids() -> None:
    assert over_time(np.array([[1.0, 3.0, 0.0]]), np.array([0.0, 1.0, 3.0])).tolist() == [2.0 + 3.0]
    assert over_time(np.array([[5.0]]), np.array([2.0])).tolist() == [5.0]

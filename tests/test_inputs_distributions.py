"""Distributions against scipy.stats and against themselves: moments, both tails, bits, words."""

import math
import subprocess
import sys

import numpy as np
import pytest
import scipy.stats
from hypothesis import given, settings
from hypothesis import strategies as st
from scipy.special import betainc, gammainc, gammaincc

from uq.inputs.arguments import HIGHEST_U, LOWEST_U
from uq.inputs.distributions import DISTRIBUTIONS, Beta, Data, Gamma, Lognormal, Normal, Pert, Triangular, Uniform
from uq.inputs.inputs import Input, Inputs

S = math.log(1.3)
CV = math.sqrt(math.log1p(0.4**2))
CASES = [
    (Normal(mean=98.0, sd=1.2), scipy.stats.norm(98, 1.2)),
    (Normal(mean=-850, cv=0.05), scipy.stats.norm(-850, 42.5)),
    (Normal(value=20.0, expanded=0.3, coverage=2), scipy.stats.norm(20, 0.15)),
    (Lognormal(median=6.0e12, gsd=1.3), scipy.stats.lognorm(S, scale=6.0e12)),
    (Lognormal(median=2.0, cv=0.4), scipy.stats.lognorm(CV, scale=2.0)),
    (Lognormal(mean=5.0, sd=2.0), scipy.stats.lognorm(CV, scale=5 / math.sqrt(1.16))),
    (Lognormal(mean=5.0, cv=0.4), scipy.stats.lognorm(CV, scale=5 / math.sqrt(1.16))),
    (Uniform(-3, 5.5), scipy.stats.uniform(-3, 8.5)),
    (Triangular(2, 4, 9), scipy.stats.triang(2 / 7, 2, 7)),
    (Triangular(2, 2, 9), scipy.stats.triang(0, 2, 7)),
    (Triangular(2, 9, 9), scipy.stats.triang(1, 2, 7)),
    (Pert(2, 4, 9), scipy.stats.beta(1 + 8 / 7, 1 + 20 / 7, 2, 7)),
    (Pert(2, 9, 9), scipy.stats.beta(5, 1, 2, 7)),
    (Beta(2, 3), scipy.stats.beta(2, 3)),
    (Beta(0.5, 4, -10, 30), scipy.stats.beta(0.5, 4, -10, 40)),
    (Beta(0.05, 0.05), scipy.stats.beta(0.05, 0.05)),
    (Beta(300, 20), scipy.stats.beta(300, 20)),
    (Gamma(shape=2.5, scale=3), scipy.stats.gamma(2.5, scale=3)),
    (Gamma(shape=0.3, scale=1e-6), scipy.stats.gamma(0.3, scale=1e-6)),
    (Gamma(mean=30, sd=3), scipy.stats.gamma(100, scale=0.3)),
]
IDS = [f"{ours.key}-{place}" for place, (ours, _) in enumerate(CASES)]
BOTH_TAILS = np.concatenate([np.geomspace(LOWEST_U, 0.5, 60), 1 - np.geomspace(0.5, 2.0**-53, 60)])


@pytest.mark.parametrize(("ours", "reference"), CASES, ids=IDS)
def test_moments_are_those_of_the_reference(ours, reference):
    moments = ours.moments()
    assert moments.mean == pytest.approx(reference.mean(), rel=1e-12)
    assert moments.sd == pytest.approx(reference.std(), rel=1e-12)


@pytest.mark.parametrize(("ours", "reference"), CASES, ids=IDS)
def test_quantiles_return_to_their_share_in_both_tails(ours, reference):
    # An x is only known to some units in the last place: that much of it is allowed beside 2e-12 of the share. The reference works out the
    # upper tail of a triangular as 1 - cdf, and quantiles below 1e-300 are no normal doubles.
    x = ours.quantile(BOTH_TAILS)
    assert np.isfinite(x).all()
    slack = 4e-16 if ours.key == "triangular" else 0.0
    for side, tail, share in ((BOTH_TAILS < 0.5, reference.cdf, BOTH_TAILS), (BOTH_TAILS >= 0.5, reference.sf, 1 - BOTH_TAILS)):
        checked = side & (np.abs(x) > 1e-300)
        room = np.abs(tail(x + 2 * np.spacing(x)) - tail(x - 2 * np.spacing(x)))
        assert checked.sum() > 50
        assert (np.abs(tail(x) - share) <= 2e-12 * share + room + slack)[checked].all()


def test_triangular_tails_by_their_closed_form():
    u = np.array([2.0**-53, 1e-12, 1e-3])
    assert Triangular(0, 1, 1).quantile(u) == pytest.approx(np.sqrt(u), rel=1e-15)
    assert 1 - Triangular(0, 0, 1).quantile(1 - u) == pytest.approx(np.sqrt(1 - (1 - u)), rel=1e-8)
    assert Triangular(-1, 0, 0).quantile(1 - u) == pytest.approx(np.sqrt(1 - u) - 1, rel=1e-4, abs=2e-16)


@pytest.mark.parametrize(("ours", "reference"), CASES, ids=IDS)
def test_share_below_is_the_distribution_function(ours, reference):
    for x in (*reference.ppf([0.01, 0.3, 0.5, 0.9]), -1e9, 1e15):
        assert ours.share_below(float(x)) == pytest.approx(reference.cdf(x), rel=1e-9, abs=1e-300)


@pytest.mark.parametrize(("ours", "reference"), CASES, ids=IDS)
def test_quantiles_rise_and_each_depends_on_its_own_share_only(ours, reference):
    u = np.sort(np.concatenate([BOTH_TAILS, np.linspace(0.001, 0.999, 999)]))
    x = ours.quantile(u)
    # Where a table changes its panel two values that are equal to 1e-13 may change their order.
    assert (np.diff(x) >= -1e-13 * np.abs(x[1:]) - 1e-300).all()
    one_by_one = np.array([ours.quantile(u[place : place + 1])[0] for place in range(0, len(u), 7)])
    assert (one_by_one == x[::7]).all()
    assert (ours.quantile(u[:1000].reshape(8, 125)) == x[:1000].reshape(8, 125)).all()
    assert ours.quantile(np.array(0.25)).shape == ()


def test_the_median_and_the_ends_are_exact():
    half = np.array([0.5])
    assert Normal(mean=98.0, sd=1.2).quantile(half)[0] == 98.0
    assert Lognormal(median=6.0e12, gsd=1.3).quantile(half)[0] == 6.0e12
    assert Uniform(1, 4).quantile(half)[0] == 2.5
    for bounded in (Uniform(0.1, 0.3), Triangular(0.1, 0.2, 0.3), Pert(0.1, 0.2, 0.3), Beta(0.05, 0.05, 0.1, 0.3)):
        x = bounded.quantile(np.array([LOWEST_U, HIGHEST_U]))
        assert x[0] >= 0.1
        assert x[1] <= 0.3


@settings(max_examples=40, deadline=None)
@given(st.floats(0.02, 2000), st.floats(0.02, 2000))
def test_beta_and_gamma_return_to_their_share_for_any_exponents(a, b):
    u = np.array([2.0**-53, 1e-9, 1e-3, 0.2, 0.4999, 0.5])
    gamma = Gamma(shape=a, scale=1.0)
    tails = [
        (lambda x: betainc(a, b, x), Beta(a, b).quantile(u), u),
        (lambda x: gammainc(a, x), gamma.quantile(u[:-1]), u[:-1]),
        (lambda x: gammaincc(a, x), gamma.quantile(1 - u), 1 - (1 - u)),
    ]
    for tail, x, share in tails:
        room = np.abs(tail(x) - tail(x - 4 * np.spacing(x)))
        assert (np.abs(tail(x) - share) <= 1e-11 * share + room)[x > 1e-300].all()


def test_words_state_the_arguments_as_given():
    assert Normal(mean=98.0, sd=1.2).words() == "normal, mean 98, sd 1.2"
    assert Normal(value=20, expanded=0.3, coverage=2).words() == "normal, value 20, expanded 0.3, coverage 2"
    assert Lognormal(median=6.0e12, gsd=1.3).words() == "lognormal, median 6e12, gsd 1.3"
    assert Uniform(1 / 3, 2).words() == "uniform, low 0.3333333333333333, high 2"
    assert Uniform(1234567.0, 0.5e10).words() == "uniform, low 1234567, high 5e9"
    assert Beta(2, 3).words() == "beta, a 2, b 3, low 0, high 1"
    assert Data("flow.csv", "q", np.array([1.0, 2.0])).words() == "data, column q of flow.csv, 2 values"


def test_data_quantile_is_the_smallest_value_whose_share_reaches_u():
    values = np.array([3.0, 1.0, 2.0, 2.0])
    data = Data("a.csv", "x", values)
    assert data.quantile(np.array([1e-9, 0.25, 0.2500001, 0.75, 0.7500001, 1 - 1e-9])).tolist() == [1, 1, 2, 2, 3, 3]
    assert data.quantile(np.array([0.05, 0.5, 0.95])).tolist() == [1, 2, 3]
    assert data.moments() == (2.0, pytest.approx(math.sqrt(0.5), rel=1e-15))
    assert (data.share_below(1.0), data.share_below(2.0), data.share_below(9.0)) == (0.0, 0.25, 1.0)
    assert values[0] == 3.0


@given(st.lists(st.integers(-5, 5), min_size=2, max_size=30).filter(lambda v: len(set(v)) > 1), st.integers(1, 99))
def test_data_quantile_by_its_definition(values, percent):
    # In whole numbers, so that a level of 5 % and a share of 1 in 20 are equal.
    needed = min(v for v in values if 100 * sum(w <= v for w in values) >= percent * len(values))
    assert Data("a.csv", "x", np.array(values, dtype=float)).quantile(np.array([percent / 100]))[0] == needed


def test_data_moments_keep_their_digits_beside_a_large_offset():
    data = Data("a.csv", "x", 1e9 + np.array([0.0, 1.0, 2.0, 5.0]))
    assert data.moments() == (1e9 + 2, pytest.approx(math.sqrt(3.5), rel=1e-12))


def test_every_kind_is_covered_here_in_the_order_of_the_format():
    assert [kind.key for kind in DISTRIBUTIONS] == ["normal", "lognormal", "uniform", "triangular", "pert", "beta", "gamma", "data"]
    assert {type(ours) for ours, _ in CASES} | {Data} == set(DISTRIBUTIONS)


def test_inputs_map_each_column_with_its_own_distribution():
    inputs = Inputs((Input("a", "A", "K", Normal(mean=300, sd=2), difference_unit="K"), Input("b", "B", "1", Uniform(0, 1))))
    u = np.array([[0.5, 0.25], [0.1, 0.75], [0.9, 0.5]])
    assert inputs.names == ("a", "b")
    assert (inputs.values(u)[:, 0] == Normal(mean=300, sd=2).quantile(u[:, 0].copy())).all()
    assert (inputs.values(u)[:, 1] == u[:, 1]).all()
    assert inputs.medians().tolist() == [300, 0.5]
    assert (inputs.items[0].mean(), inputs.items[0].sd()) == (300, 2)
    assert Inputs(()).values(np.empty((4, 0))).shape == (4, 0)
    assert Inputs(()).medians().shape == (0,)


def test_importing_the_room_does_not_import_scipy():
    text = "import sys, uq.inputs.distributions, uq.inputs.inputs, uq.design.design; sys.exit('scipy' in sys.modules)"
    assert subprocess.run([sys.executable, "-c", text], check=False).returncode == 0

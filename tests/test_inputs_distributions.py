"""Distributions against scipy.stats and against themselves: moments, both tails, bits, words."""

import math
import subprocess
import sys

import mpmath
import numpy as np
import pytest
import scipy.stats
from hypothesis import given, settings
from hypothesis import strategies as st
from scipy.special import betainc, gammainc, gammaincc

from uq.inputs.arguments import HIGHEST_U, LOWEST_U
from uq.inputs.distributions import (
    DISTRIBUTIONS,
    Arcsine,
    Beta,
    Data,
    Discrete,
    Exponential,
    Gamma,
    Lognormal,
    Loguniform,
    Normal,
    Percentiles,
    Pert,
    Student,
    Trapezoid,
    Triangular,
    Uniform,
    Weibull,
)
from uq.inputs.inputs import Input, Inputs

Z80, Z95 = scipy.stats.norm.ppf([0.8, 0.95])
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
    (Loguniform(0.1, 30), scipy.stats.loguniform(0.1, 30)),
    (Loguniform(1e-30, 1e30), scipy.stats.loguniform(1e-30, 1e30)),
    (Weibull(shape=0.5, scale=3), scipy.stats.weibull_min(0.5, scale=3)),
    (Weibull(shape=3.5, scale=1e-4), scipy.stats.weibull_min(3.5, scale=1e-4)),
    (Exponential(mean=20), scipy.stats.expon(scale=20)),
    (Student(mean=5, scale=2, dof=2.5), scipy.stats.t(2.5, 5, 2)),
    (Student(mean=-1, scale=0.1, dof=9), scipy.stats.t(9, -1, 0.1)),
    (Arcsine(-2, 7), scipy.stats.arcsine(-2, 9)),
    (Trapezoid(2, 3, 5, 9), scipy.stats.trapezoid(1 / 7, 3 / 7, 2, 7)),
    (Trapezoid(2, 2, 5, 9), scipy.stats.trapezoid(0, 3 / 7, 2, 7)),
    (Trapezoid(2, 4, 4, 9), scipy.stats.triang(2 / 7, 2, 7)),
    (Percentiles(p05=98 - 1.2 * Z95, p95=98 + 1.2 * Z95, shape="normal"), scipy.stats.norm(98, 1.2)),
    (Percentiles(p50=2, p95=2 * math.exp(0.3 * Z95), shape="lognormal"), scipy.stats.lognorm(0.3, scale=2)),
    (Percentiles(p50=-1, p95=math.exp(0.3 * Z95) - 2, low=-2, shape="lognormal"), scipy.stats.lognorm(0.3, -2, scale=1)),
    (Percentiles(p05=-1.5 * Z95, p50=0, p80=1.5 * Z80, p95=1.5 * Z95), scipy.stats.norm(0, 1.5)),
    (Percentiles(p05=7 / 20, p50=3.5, p80=5.6, low=0, high=7, shape="lognormal"), None),
    (Percentiles(p05=1, p25=2, p50=2.2, p95=9, low=0), None),
    (Percentiles(p05=1, p95=2, high=3), None),
    (Percentiles(p05=1, p50=2.2, p95=9, low=0, high=20, shape="normal"), None),
]
CLOSED = [case for case in CASES if case[1] is not None]
IDS = [f"{ours.key}-{place}" for place, (ours, _) in enumerate(CLOSED)]
ALL_IDS = [f"{ours.key}-{place}" for place, (ours, _) in enumerate(CASES)]
# The reference works out their upper tail as 1 - cdf.
ROUNDED = ("triangular", "trapezoid", "arcsine", "loguniform")
BOTH_TAILS = np.concatenate([np.geomspace(LOWEST_U, 0.5, 60), 1 - np.geomspace(0.5, 2.0**-53, 60)])


@pytest.mark.parametrize(("ours", "reference"), CLOSED, ids=IDS)
def test_moments_are_those_of_the_reference(ours, reference):
    moments = ours.moments()
    assert moments.mean == pytest.approx(reference.mean(), rel=1e-12, abs=1e-12)
    assert moments.sd == pytest.approx(reference.std(), rel=1e-11)


def test_moments_by_closed_forms_where_the_reference_has_no_digits():
    wide = Loguniform(1e-200, 1e150).moments()
    assert wide == pytest.approx((1e150 / (350 * math.log(10)), 1e150 / math.sqrt(700 * math.log(10))), rel=2e-3)
    # (high - low) / 2 about the middle and a uniform's sd, to second order, where both ends are close.
    near = Loguniform(1.0, 1.0 + 1e-6).moments()
    assert near == pytest.approx((1 + 5e-7, 1e-6 / math.sqrt(12)), rel=1e-6)
    # Weibull, large k: the logarithm is a Gumbel variable, sd = scale (pi / sqrt 6) / k to first order (Johnson et al. 1994, chapter 21).
    assert Weibull(shape=1e9, scale=2).moments().sd == pytest.approx(2 * math.pi / math.sqrt(6) / 1e9, rel=1e-8)
    for shape in (9.0, 10.5, 80.0):
        second = mpmath.gamma(1 + 2 / mpmath.mpf(shape)) - mpmath.gamma(1 + 1 / mpmath.mpf(shape)) ** 2
        assert Weibull(shape=shape, scale=1).moments().sd == pytest.approx(float(mpmath.sqrt(second)), rel=1e-10)


def test_moments_of_a_student_are_there_only_where_they_exist():
    assert Student(5, 2, 3).moments() == (5, pytest.approx(2 * math.sqrt(3), rel=1e-15))
    assert Student(5, 2, 2).moments() == (5, math.inf)
    assert all(math.isnan(moment) for moment in Student(5, 2, 1).moments())


@pytest.mark.parametrize(("ours", "reference"), CLOSED, ids=IDS)
def test_quantiles_return_to_their_share_in_both_tails(ours, reference):
    # An x is only known to some units in the last place: that much of it is allowed beside 2e-12 of the share.
    # Quantiles below 1e-300 are no normal doubles.
    x = ours.quantile(BOTH_TAILS)
    assert np.isfinite(x).all()
    slack = 4e-16 if ours.key in ROUNDED else 0.0
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


@pytest.mark.parametrize(("ours", "reference"), CLOSED, ids=IDS)
def test_share_below_is_the_distribution_function(ours, reference):
    for x in (*reference.ppf([0.01, 0.3, 0.5, 0.9]), -1e9, 1e15):
        assert ours.share_below(float(x)) == pytest.approx(reference.cdf(x), rel=1e-9, abs=1e-300)


@pytest.mark.parametrize("ours", [ours for ours, _ in CASES], ids=ALL_IDS)
def test_from_above_is_the_quantile_seen_from_the_other_end(ours):
    u = np.concatenate([np.geomspace(2.0**-52, 0.5, 40), [0.5, 0.6, 0.75, 0.9]])
    # At 1 - p, which is a double for these.
    p = 1 - (1 - u)
    scale = ours.quantile(np.array([0.25, 0.75])) @ [-1, 1]
    exact, seen = ours.quantile(1 - u), ours.from_above(p)
    assert seen == pytest.approx(exact, rel=1e-12, abs=1e-12 * scale)
    # Far out, where 1 - p is no double, it still returns to its share.
    p = np.array([1e-18, 1e-15])
    for each, x in zip(p, ours.from_above(p), strict=True):
        end = ours.from_above(np.array(1e-300)) - x
        if ours.share_above(x) > 0 and end > 1e-9 * scale:
            step = 4 * np.spacing(abs(x))
            room = ours.share_above(x - step) - ours.share_above(x + step)
            assert ours.share_above(x) == pytest.approx(each, rel=1e-9, abs=room)


@pytest.mark.parametrize("ours", [ours for ours, _ in CASES], ids=ALL_IDS)
def test_shares_on_both_sides_of_a_quantile(ours):
    u = np.array([1e-6, 0.01, 0.2, 0.5, 0.7, 0.99, 1 - 1e-6])
    for each, x in zip(u, ours.quantile(u), strict=True):
        step = 4 * np.spacing(abs(x))
        room = ours.share_below(x + step) - ours.share_below(x - step) + 4e-15
        assert ours.share_below(x) == pytest.approx(each, rel=1e-9, abs=room)
        assert ours.share_above(x) == pytest.approx(1 - each, rel=1e-9, abs=room)
    assert ours.at_score(scipy.stats.norm.ppf(u)) == pytest.approx(ours.quantile(u), rel=1e-9)


@pytest.mark.parametrize("ours", [ours for ours, _ in CASES], ids=ALL_IDS)
def test_quantiles_rise_and_each_depends_on_its_own_share_only(ours):
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


def gamma_share_below(k, x):
    """The share below x of the gamma distribution with shape k and scale 1, by integrating its density in standard deviations."""
    root = mpmath.sqrt(k)
    density = lambda t: mpmath.exp(k * mpmath.log1p(t / root) - t * root) / (1 + t / root)  # noqa: E731
    level = mpmath.exp(k * mpmath.log(k) - k - mpmath.loggamma(k)) / root
    end = (x - k) / root
    return level * mpmath.quad(density, [min(end, 0) - 15, min(end, 0) - 5, *([0] if end > 0 else []), end])


@pytest.mark.parametrize("shape", [99_999.0, 1e5, 1e6, 9e8, 1e12])
def test_gamma_with_a_large_shape_against_mpmath(shape):
    gamma = Gamma(shape=shape, scale=1.0)
    p = np.array([2.0**-53, 1e-12, 1e-6, 0.02, 0.5])
    for x, share, above in zip([*gamma.quantile(p), *gamma.from_above(p)], [*p, *p], [False] * 5 + [True] * 5, strict=True):
        with mpmath.workdps(40):
            score = mpmath.sqrt(2) * mpmath.erfinv(2 * mpmath.mpf(share) - 1)
            exact = gamma_share_below(mpmath.mpf(shape), mpmath.mpf(x))
            off = ((1 - exact if above else exact) - mpmath.mpf(share)) / mpmath.npdf(score)
        # in standard deviations; the quantile itself is rounded
        assert abs(off) < 1e-11 + 2.0**-52 * math.sqrt(shape), (shape, share, above)
        said = gamma.share_above(float(x)) if above else gamma.share_below(float(x))
        assert said == pytest.approx(share, rel=1e-9 + 1e-15 * 9 * math.sqrt(shape))
    assert (gamma.share_below(0.0), gamma.share_above(0.0)) == (0.0, 1.0)
    assert gamma.share_below(3 * shape) == 1.0


@pytest.mark.parametrize(("a", "b"), [(0.01, 1), (0.01, 0.1), (0.05, 5), (0.1, 1e5), (1, 0.01), (5, 0.05)])
def test_beta_with_a_small_exponent_keeps_its_digits_at_the_end_where_the_draws_are(a, b):
    with mpmath.workdps(40):
        for u in (0.3, 0.5, 0.500001, 0.7, 0.9):
            # from the end at 0, where doubles are dense: X from `low`, or 1 - X from `high`
            x = Beta(a, b).quantile(np.array(u)) if a < b else -Beta(a, b, low=-1.0, high=0.0).quantile(np.array(u))
            share = mpmath.mpf(u) if a < b else 1 - mpmath.mpf(u)
            small, large = (a, b) if a < b else (b, a)
            assert x > 0
            found = mpmath.betainc(small, large, 0, mpmath.mpf(float(x)), regularized=True)
            assert abs(found / share - 1) < 1e-11, (a, b, u)
            again = Beta(a, b).from_above(np.array(1 - u)) if a < b else -Beta(a, b, low=-1.0, high=0.0).from_above(np.array(1 - u))
            assert again == pytest.approx(float(x), rel=1e-9)


def test_words_state_the_arguments_as_given():
    assert Normal(mean=98.0, sd=1.2).words() == "normal, mean 98, sd 1.2"
    assert Normal(value=20, expanded=0.3, coverage=2).words() == "normal, value 20, expanded 0.3, coverage 2"
    assert Lognormal(median=6.0e12, gsd=1.3).words() == "lognormal, median 6e12, gsd 1.3"
    assert Uniform(1 / 3, 2).words() == "uniform, low 0.3333333333333333, high 2"
    assert Uniform(1234567.0, 0.5e10).words() == "uniform, low 1234567, high 5e9"
    assert Student(5, 2, 2).words() == "student, mean 5, scale 2, dof 2 (no finite standard deviation)"
    assert Student(5, 2, 1).words() == "student, mean 5, scale 2, dof 1 (no mean and no standard deviation)"
    assert Discrete([3, 1, 2], [1, 0, 3]).words() == "discrete, 2 (75 %), 3 (25 %)"
    assert Discrete(list(range(9)), [1] * 9).words() == "discrete, 9 values from 0 to 8"
    assert Percentiles(p05=1, p95=3, shape="normal").words() == "percentiles, p05 1, p95 3, shape normal"
    assert Percentiles(p05=1, p50=2, p95=3).words() == "percentiles, p05 1, p50 2, p95 3, smooth through all with normal tails"
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
    keys = "normal lognormal uniform loguniform triangular pert beta gamma weibull exponential student arcsine trapezoid percentiles"
    assert [kind.key for kind in DISTRIBUTIONS] == [*keys.split(), "discrete", "data"]
    assert {type(ours) for ours, _ in CASES} | {Discrete, Data} == set(DISTRIBUTIONS)


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

"""Cut distributions, distributions given by percentiles, and those of a few values: moments, tails, fits."""

import math
from itertools import pairwise

import mpmath
import numpy as np
import pytest
import scipy.stats
from hypothesis import given, settings
from hypothesis import strategies as st

from uq.inputs.curve import Curve
from uq.inputs.distributions import (
    Arcsine,
    Beta,
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
    Truncated,
    Uniform,
    Weibull,
)
from uq.inputs.quadrature import moments_between

Z95 = float(scipy.stats.norm.ppf(0.95))
U = np.array([2.0**-53, 1e-9, 0.01, 0.3, 0.5, 0.8, 0.999, 1 - 1e-9, 1 - 2.0**-53])

WIDE = Lognormal(median=1, gsd=1e3)
WHOLE = [
    Normal(mean=98.0, sd=1.2), Lognormal(median=2, gsd=1.8), WIDE, Uniform(-3, 5), Loguniform(0.1, 30),
    Triangular(2, 4, 9), Triangular(2, 2, 9), Pert(2, 4, 9), Beta(0.5, 4), Beta(2, 0.9), Gamma(shape=0.3, scale=2), Gamma(mean=30, sd=3),
    Weibull(shape=0.7, scale=3), Weibull(shape=8, scale=3), Exponential(mean=5), Student(1, 2, 5), Student(1, 2, 8), Arcsine(-2, 7),
    Trapezoid(2, 3, 5, 9), Trapezoid(2, 2, 9, 9), Percentiles(p05=1, p95=3, low=0.5, high=9, shape="normal"),
]  # fmt: skip
NAMES = [f"{each.key}-{place}" for place, each in enumerate(WHOLE)]


def integrated(distribution):
    """Moments by quadrature over the whole, which for these are known in closed form."""
    kinks = scipy.stats.norm.ppf([kink for kink in distribution.kinks() if 0 < kink < 1]).tolist()
    return moments_between(-math.inf, math.inf, kinks, distribution.at_score)


@pytest.mark.parametrize("whole", [*WHOLE[:-1], Beta(0.2, 0.2), Beta(0.05, 3), Gamma(shape=0.05, scale=1), Student(0, 1, 3.5)])
def test_quadrature_meets_closed_forms(whole):
    assert integrated(whole) == pytest.approx(whole.moments(), rel=1e-11)


@pytest.mark.parametrize("whole", WHOLE, ids=NAMES)
@pytest.mark.parametrize(("first", "last"), [(0.1, 0.9), (0.0, 0.4), (0.6, 1.0), (1e-5, 0.01), (0.97, 0.9999), (0.49, 0.51)])
def test_a_cut_keeps_the_shape_between_its_ends(whole, first, last):
    low, high = (float(x) for x in whole.quantile(np.clip([first, last], 1e-12, 1 - 1e-12)))
    cut = Truncated(whole, low, high)
    kept = last - first
    assert cut.kept == pytest.approx(kept, rel=1e-9 / kept)
    x = cut.quantile(U)
    assert ((low <= x) & (x <= high)).all()
    assert (np.diff(x) >= 0).all()
    # By the definition: the share of the whole between the low end and x, over the share kept.
    shares = np.array([whole.share_below(float(each)) - whole.share_below(low) for each in x]) / cut.kept
    room = np.array([whole.share_below(e + 4 * np.spacing(abs(e))) - whole.share_below(e - 4 * np.spacing(abs(e))) for e in x]) / kept
    assert (np.abs(shares - U) <= room + 1e-14 / kept).all()
    assert [cut.share_below(float(each)) for each in x[2:7]] == pytest.approx(U[2:7], rel=1e-8, abs=1e-14 / kept)
    assert [cut.share_above(float(each)) for each in x[2:7]] == pytest.approx(1 - U[2:7], rel=1e-8, abs=1e-14 / kept)


@pytest.mark.parametrize("whole", WHOLE, ids=NAMES)
@pytest.mark.parametrize(("first", "last"), [(0.1, 0.9), (0.0, 0.4), (0.6, 1.0), (0.97, 0.9999)])
def test_moments_of_a_cut_by_another_way(whole, first, last):
    # E[X] = high - integral of F over the range, E[(high - X)^2] = 2 integral of (high - x) F(x): Gauss-Legendre panels in x, narrow
    # towards both ends. (Whoever integrates a distribution function needs no quantiles.)
    # Over many decades the subtraction from `high` costs the digits of the mean: there a closed form stands in a test of its own.
    far = 1e-9 if whole != WIDE else 1e-3
    low, high = (float(x) for x in whole.quantile(np.clip([first, last], far, 1 - far)))
    cut = Truncated(whole, low, high)
    kinks = [float(whole.quantile(np.array(kink))) for kink in whole.kinks() if first < kink < last]
    ends = np.array(sorted({low, high, *kinks}))
    nodes, weights = np.polynomial.legendre.leggauss(30)
    mean = second = 0.0
    for start, stop in pairwise(ends):
        shares = np.concatenate([[0], np.geomspace(1e-22, 0.5, 70), 1 - np.geomspace(0.5, 1e-14, 48)[1:], [1]])
        for a, b in pairwise(shares):
            x = start + (stop - start) * (a + (b - a) * (nodes + 1) / 2)
            w = weights * (stop - start) * (b - a) / 2
            below = np.array([cut.share_below(float(each)) for each in x])
            mean += float(w @ below)
            second += float(2 * w @ ((high - x) * below))
    sd = math.sqrt(second - mean**2)
    moments = cut.moments()
    assert moments.mean == pytest.approx(high - mean, abs=2e-9 * sd)
    assert moments.sd == pytest.approx(sd, rel=2e-7 if sd < 0.1 * mean else 2e-9)


@pytest.mark.parametrize(("a", "b"), [(-1.0, 2.0), (2.0, 3.0), (-4.5, -4.0), (4.0, 30.0), (-0.001, 0.001)])
def test_moments_of_a_cut_normal_by_the_closed_form(a, b):
    # Johnson, Kotz, Balakrishnan, Continuous Univariate Distributions 1, 1994, section 13.10.1, in 50 digits.
    with mpmath.workdps(50):
        low, high = mpmath.mpf(a), mpmath.mpf(b)
        kept = mpmath.ncdf(-low) - mpmath.ncdf(-high)
        first = (mpmath.npdf(low) - mpmath.npdf(high)) / kept
        second = 1 + (low * mpmath.npdf(low) - high * mpmath.npdf(high)) / kept
        exact = float(first), float(mpmath.sqrt(second - first**2))
    moments = Truncated(Normal(mean=0, sd=1), a, b).moments()
    assert moments.mean == pytest.approx(exact[0], rel=1e-10, abs=1e-13)
    assert moments.sd == pytest.approx(exact[1], rel=1e-10)
    shifted = Truncated(Normal(mean=1e6, sd=2), 1e6 + 2 * a, 1e6 + 2 * b).moments()
    assert shifted.sd == pytest.approx(2 * exact[1], rel=1e-9 if b - a > 0.1 else 1e-6)


def test_a_cut_lognormal_and_loguniform_by_closed_forms():
    # E[X; X < h] of a lognormal is exp(s^2 / 2) Phi((ln h) / s - s) (Johnson et al. 1994, 14.6); a cut loguniform is a loguniform.
    s, h = math.log(1.8), 3.0
    below = scipy.stats.norm.cdf(math.log(h) / s)
    exact = math.exp(s * s / 2) * scipy.stats.norm.cdf(math.log(h) / s - s) / below
    assert Truncated(Lognormal(median=1, gsd=1.8), 1e-30, h).moments().mean == pytest.approx(exact, rel=1e-12)
    # A geometric standard deviation of 1000, over 18 decades; second moment exp(2 s^2) (...) likewise, in 50 digits.
    low, high = (float(x) for x in WIDE.quantile(np.array([0.6, 1 - 1e-9])))
    with mpmath.workdps(50):
        s = mpmath.log(1000)
        a, b = mpmath.log(low) / s, mpmath.log(high) / s
        first, second = (
            mpmath.exp(n * n * s * s / 2) * (mpmath.ncdf(b - n * s) - mpmath.ncdf(a - n * s)) / (mpmath.ncdf(b) - mpmath.ncdf(a))
            for n in (1, 2)
        )
        exact = float(first), float(mpmath.sqrt(second - first**2))
    assert Truncated(WIDE, low, high).moments() == pytest.approx(exact, rel=1e-10)
    assert Truncated(Loguniform(0.1, 30), 1, 20).moments() == pytest.approx(Loguniform(1, 20).moments(), rel=1e-12)
    assert Truncated(Uniform(0, 10), 2, 3).moments() == pytest.approx(Uniform(2, 3).moments(), rel=1e-12)
    assert Truncated(Exponential(2.0), 5, 1e6).moments() == pytest.approx((7, 2), rel=1e-12)


def test_a_cut_takes_heavy_tails_away():
    # Of a Cauchy variable cut to +-h: mean 0, variance h / atan h - 1.
    moments = Truncated(Student(0, 1, 1), -20, 20).moments()
    assert moments.mean == pytest.approx(0, abs=1e-12)
    assert moments.sd == pytest.approx(math.sqrt(20 / math.atan(20) - 1), rel=1e-11)


def test_a_cut_beyond_every_draw_changes_nothing():
    for whole in WHOLE:
        cut = Truncated(whole, -1e300, 1e300)
        assert cut.moments() == whole.moments()
        assert cut.quantile(U) == pytest.approx(whole.quantile(U), rel=1e-12)


def test_a_cut_says_so():
    cut = Truncated(Student(0, 1, 2), -3, 5)
    assert cut.words() == "student, mean 0, scale 1, dof 2, cut to -3 to 5"
    assert cut.key == "student"
    assert Truncated(Percentiles(p05=1, p50=2, p95=9, shape="normal"), 0, 20).misfit().startswith("the normal shape cannot meet")
    again = Truncated(Truncated(Normal(mean=0, sd=1), -1, 3), 0, 2)
    assert again.moments() == pytest.approx(Truncated(Normal(mean=0, sd=1), 0, 2).moments(), rel=1e-11)


def test_discrete_quantiles_and_moments():
    discrete = Discrete([5.0, 1.0, 2.0, 2.0], [3, 1, 2, 4])
    assert discrete.quantile(np.array([1e-9, 0.1, 0.1000001, 0.7, 0.7000001, 1 - 1e-9])).tolist() == [1, 1, 2, 2, 5, 5]
    assert discrete.moments() == pytest.approx((2.8, math.sqrt(0.1 * 1.8**2 + 0.6 * 0.8**2 + 0.3 * 2.2**2)), rel=1e-14)
    assert (discrete.share_below(2), discrete.share_above(2)) == pytest.approx((0.1, 0.3), rel=1e-15)
    assert discrete.from_above(np.array([0.3, 0.2999999, 0.9, 0.9000001])).tolist() == [2, 5, 1, 1]
    # 0.1 + 0.2 is a little more than 0.3: the third value is not reached by 0.3.
    assert Discrete([1, 2, 3], [0.1, 0.2, 0.7]).quantile(np.array([0.3])).tolist() == [2]
    assert Discrete([1, 2], [1e308, 1e308]).moments() == (1.5, 0.5)
    assert Discrete([1e9, 1e9 + 1], [1, 1]).moments() == (1e9 + 0.5, 0.5)
    cut = Truncated(discrete, 2, 5)
    assert cut.moments() == pytest.approx((3, math.sqrt(2)), rel=1e-14)
    assert cut.kept == pytest.approx(0.9)


@given(st.lists(st.tuples(st.integers(-4, 4), st.integers(0, 5)), min_size=2, max_size=12), st.integers(1, 99))
def test_discrete_quantile_by_its_definition(pairs, percent):
    pairs = [*pairs, (9, 1), (-9, 1)]
    total = sum(weight for _, weight in pairs)
    needed = min(v for v, w in pairs if w and 100 * sum(u for each, u in pairs if each <= v) >= percent * total)
    made = Discrete([v for v, _ in pairs], [w for _, w in pairs])
    assert made.quantile(np.array([percent / 100]))[0] == needed
    # Seen from above: the smallest value with at most that share above it; in whole numbers as well.
    above = min(v for v, w in pairs if w and 100 * sum(u for each, u in pairs if each > v) <= percent * total)
    assert made.from_above(np.array([percent / 100]))[0] == above


def test_two_percentiles_are_met_exactly_by_every_shape():
    for shape in ("normal", "lognormal", None):
        for ends in ({}, {"low": 0.5}, {"high": 7.0}, {"low": 0.5, "high": 7.0}):
            made = Percentiles(p10=1.0, p80=4.0, shape=shape, **ends)
            assert made.quantile(np.array([0.1, 0.8])) == pytest.approx([1, 4], rel=1e-9), (shape, ends)
            assert made.misfit() == ""
            x = made.quantile(U)
            assert (x >= ends.get("low", -math.inf)).all()
            assert (x <= ends.get("high", math.inf)).all()


def test_a_fit_to_many_percentiles_is_the_least_squares_line():
    levels = np.array([0.05, 0.25, 0.5, 0.75, 0.95])
    values = np.array([1.0, 2.5, 3.0, 4.0, 8.0])
    z = scipy.stats.norm.ppf(levels)
    line = scipy.stats.linregress(z, values)
    made = Percentiles(p05=1, p25=2.5, p50=3, p75=4, p95=8, shape="normal")
    assert made.moments() == pytest.approx((line.intercept, line.slope), rel=1e-12)
    off = line.intercept + line.slope * z - values
    worst = int(np.argmax(np.abs(off)))
    assert f"{['p05', 'p25', 'p50', 'p75', 'p95'][worst]} is {values[worst] + off[worst]:.4g} instead of" in made.misfit()
    assert f"{100 * abs(off[worst]) / 7:.2g} % of the distance" in made.misfit()
    logs = scipy.stats.linregress(z, np.log(values - 0.5))
    shifted = Percentiles(p05=1, p25=2.5, p50=3, p75=4, p95=8, low=0.5, shape="lognormal")
    assert shifted.quantile(levels) == pytest.approx(0.5 + np.exp(logs.intercept + logs.slope * z), rel=1e-12)


def test_a_cut_normal_is_found_again_from_its_percentiles():
    for low, high in ((0.0, 3.0), (0.0, 1e9), (-1e9, 2.5)):
        whole = Truncated(Normal(mean=1.0, sd=1.5), low, high)
        points = {f"p{level:02d}": float(whole.quantile(np.array(level / 100))) for level in (5, 50, 95)}
        ends = {name: end for name, end in (("low", low), ("high", high)) if abs(end) < 1e9}
        made = Percentiles(**points, **ends, shape="normal")
        assert made.quantile(U[1:-1]) == pytest.approx(whole.quantile(U[1:-1]), rel=1e-5, abs=1e-6)
        assert made.moments() == pytest.approx(whole.moments(), rel=1e-6)


def test_what_no_cut_normal_can_have_is_told():
    # More than half of the draws in each outer tenth.
    made = Percentiles(p30=0.05, p70=0.95, low=0, high=1, shape="normal")
    assert "cannot meet all percentiles" in made.misfit()


POINTS = st.lists(st.integers(-1000, 1000), min_size=2, max_size=9, unique=True).map(sorted)


@settings(max_examples=60, deadline=None)
@given(POINTS, st.data())
def test_a_smooth_quantile_function_goes_through_all_points_and_rises(values, data):
    levels = sorted(data.draw(st.lists(st.integers(1, 99), min_size=len(values), max_size=len(values), unique=True)))
    given_points = {f"p{level:02d}": float(value) for level, value in zip(levels, values, strict=True)}
    made = Percentiles(**given_points)
    assert made.quantile(np.array(levels) / 100) == pytest.approx(values, rel=1e-12, abs=1e-9)
    z = np.linspace(-8, 8, 4001)
    x = made.at_score(z)
    assert (np.diff(x) > 0).all()
    # Smooth: no jump of the slope at a point beyond what the curvature beside it explains, i.e. one-sided slopes agree.
    curve = made._made
    assert isinstance(curve, Curve)
    for score, slope in zip(curve.scores, curve.slopes, strict=True):
        left, middle, right = curve.height(score + np.array([-1e-6, 0, 1e-6]))
        scale = float(np.max(np.diff(curve.heights) / np.diff(curve.scores))) / float(np.min(np.diff(curve.scores)))
        assert (middle - left) / 1e-6 == pytest.approx(slope, abs=2e-5 * scale + 1e-6 * abs(middle))
        assert (right - middle) / 1e-6 == pytest.approx(slope, abs=2e-5 * scale + 1e-6 * abs(middle))


def test_tails_of_a_smooth_quantile_function_are_those_of_the_outermost_two_points():
    made = Percentiles(p05=1, p25=2, p60=5, p95=6)
    z = scipy.stats.norm.ppf([0.05, 0.25, 0.6, 0.95])
    below = 1 + (2 - 1) / (z[1] - z[0]) * (-4 - z[0])
    above = 6 + (6 - 5) / (z[3] - z[2]) * (5 - z[3])
    assert made.at_score(np.array([-4.0, 5.0])) == pytest.approx([below, above], rel=1e-13)
    bounded = Percentiles(p05=1, p25=2, p60=5, p95=6, low=0, high=7)
    assert bounded.at_score(np.array([-40.0, 40.0])) == pytest.approx([0, 7], abs=1e-6)
    assert bounded.share_below(0.0) == 0.0
    assert bounded.share_above(7.0) == 0.0


def test_moments_of_a_smooth_quantile_function():
    # Trapezoids in the score of a smooth, quickly falling integrand, 2e5 panels of a piecewise cubic: errors fall as the panel squared.
    made = Percentiles(p05=1, p25=2, p60=5, p95=6)
    z = np.linspace(-12, 12, 400_001)
    density = scipy.stats.norm.pdf(z)
    x = made.at_score(z)
    mean = np.trapezoid(x * density, z)
    sd = math.sqrt(np.trapezoid((x - mean) ** 2 * density, z))
    assert made.moments() == pytest.approx((mean, sd), rel=1e-9)
    straight = Percentiles(p05=math.exp(-0.7 * Z95), p50=1, p95=math.exp(0.7 * Z95), low=0)
    assert straight.moments() == pytest.approx(Lognormal(median=1, gsd=math.exp(0.7)).moments(), rel=1e-11)

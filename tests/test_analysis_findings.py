"""Findings against known truths, by each estimate's own interval.

A truth is held to lie within 3 half-widths: 6.4 standard errors as seen over 16 replicates. Student's t with 15 degrees of freedom is
beyond that with probability 1.2e-5; some 150 numbers are checked, with fixed seeds.
"""

from __future__ import annotations

from dataclasses import replace

import numpy as np
import pytest
from scipy.special import ndtr, ndtri
from scipy.stats import multivariate_normal

from tests.analysis_models import Model, complete, folded, forecast, gaussian, number, tallied
from uq.analysis.finding import Finding
from uq.analysis.kept import kept_bytes
from uq.design.design import Design

TIMES = (0.0, 1.0, 2.0, 3.0)
LEVELS = np.array([0.05, 0.25, 0.5, 0.75, 0.95])
LINEAR = Model(
    ("p", "q"),
    TIMES,
    gaussian,
    outcomes=lambda u: np.stack([gaussian(u, np.array([2.0]))[:, 0, 0], np.where(u[:, 0] < 0.25, np.nan, u[:, 0])], axis=1),
    outcome_names=("end", "seldom"),
    threshold=12.0,
    by=(1.0, 3.0),
    accept=0.2,
)
DESIGN = Design(("p", "q"), 7, 512)


@pytest.fixture(scope="module")
def linear() -> dict[str, Finding]:
    return forecast(LINEAR, DESIGN)


def holds(finding: Finding, name: str, truth: np.ndarray | float, widths: float = 3.0, floor: float = 1e-12) -> bool:
    """Whether the truth is within so many half-widths of every estimate."""
    value, low, high = (number(finding, each) for each in (name, f"{name}_low", f"{name}_high"))
    half = np.where(truth < value, value - low, high - value)
    return bool((np.abs(value - truth) <= widths * half + floor).all())


def test_bands_of_a_linear_gaussian(linear: dict[str, Finding]) -> None:
    band = linear["bands/T"]
    spread = np.sqrt(1 + np.array(TIMES) ** 2)
    assert holds(band, "quantiles", 10 + ndtri(LEVELS)[:, None] * spread)
    assert holds(band, "mean", 10.0)
    assert holds(band, "sd", spread)
    assert number(band, "nominal").tolist() == [10.0] * 4
    assert band.variables["quantiles"].dims == ("quantile", "time")
    assert band.variables["sd"].unit == "K"
    for name in ("quantiles", "mean", "sd", "simultaneous"):
        assert (number(band, f"{name}_low") < number(band, name)).all()
        assert (number(band, name) < number(band, f"{name}_high")).all()


def test_whole_courses_keep_to_the_simultaneous_band_at_the_outermost_share(linear: dict[str, Finding]) -> None:
    band = linear["bands/T"]
    z = np.random.default_rng(3).normal(size=(200_000, 2))
    courses = 10 + z[:, :1] + z[:, 1:] * np.array(TIMES)
    assert band.variables["simultaneous"].attributes["share"] == 0.9

    def share(lower: np.ndarray, upper: np.ndarray) -> float:
        return float(((courses >= lower) & (courses <= upper)).all(axis=1).mean())

    # 200 000 courses: the share's own standard error is 0.0007.
    inner = share(number(band, "simultaneous_high")[0], number(band, "simultaneous_low")[1])
    outer = share(number(band, "simultaneous_low")[0], number(band, "simultaneous_high")[1])
    assert inner - 0.004 < 0.9 < outer + 0.004
    assert share(*number(band, "simultaneous")) == pytest.approx(0.9, abs=0.01)
    pointwise = number(band, "quantiles")
    assert share(pointwise[0], pointwise[-1]) < 0.86


def test_outcomes(linear: dict[str, Finding]) -> None:
    end, seldom = linear["outcomes/end"], linear["outcomes/seldom"]
    assert holds(end, "quantiles", 10 + ndtri(LEVELS) * np.sqrt(5.0))
    assert holds(end, "sd", np.sqrt(5.0))
    assert number(end, "missing") == 0.0
    assert 0 < number(end, "missing_high") < 1e-3
    # Among those that have a value: uniform on 0.25 .. 1.
    assert holds(seldom, "quantiles", 0.25 + 0.75 * LEVELS)
    assert holds(seldom, "missing", 0.25)
    assert "quantiles_if_low" not in seldom.variables
    assert np.isnan(number(seldom, "mean"))
    assert "lost" in seldom.variables["mean"].attributes["reason"]
    assert np.isnan(number(linear["ranking/seldom"], "first")).all()


def test_limits(linear: dict[str, Finding]) -> None:
    limit = linear["limits/hot"]
    spread = np.sqrt(1 + np.array(TIMES) ** 2)
    assert holds(limit, "now", 1 - ndtr(2 / spread))
    z = ndtri(np.random.default_rng(5).random((400_000, 2)))
    passed = np.maximum.accumulate(10 + z[:, :1] + z[:, 1:] * np.array(TIMES) > 12, axis=1)
    ever = passed.mean(axis=0)
    # A path quantity, not the maximum of `now`; the truth itself is known to 0.0007 here.
    assert (np.abs(number(limit, "ever") - ever) < 0.004).all()
    assert number(limit, "ever")[2] > number(limit, "now")[2] + 0.002
    assert number(limit, "ever_by").tolist() == number(limit, "ever")[[1, 3]].tolist()
    assert number(limit, "by").tolist() == [1.0, 3.0]
    share_by_time = ever / ever[-1]
    expected = [TIMES[int(np.searchsorted(share_by_time, level))] for level in LEVELS]
    assert number(limit, "first_time").tolist() == expected
    # It came true somewhere in the step that ends there, so the lower ends reach down to the judged time before, where there is one.
    before = [max([time for time in TIMES if time < each], default=TIMES[0]) for each in expected]
    assert (number(limit, "first_time_low") <= before).all()
    assert set(number(limit, "first_time_low")) <= set(TIMES)
    assert (number(limit, "first_time_high") >= expected).all()
    assert limit.attributes["verdict"] == "not met"
    assert limit.attributes["accept"] == 0.2


@pytest.mark.parametrize(("accept", "verdict"), [(0.5, "met"), (0.2, "not met"), (0.2714, "not settled"), (None, None)])
def test_verdicts(accept: float | None, verdict: str | None) -> None:
    found = forecast(replace(LINEAR, accept=accept), Design(("p", "q"), 7, 64), questions=("limits",))
    assert found["limits/hot"].attributes.get("verdict") == verdict


@pytest.mark.parametrize("probability", [0.0, 1e-4, 0.5, 1.0])
def test_probabilities_never_have_zero_width(probability: float) -> None:
    threshold = 1 - probability if 0 < probability < 1 else 2.0 - 3 * probability
    model = Model(("p",), (0.0,), lambda u, times: u[:, :, None], threshold=threshold, by=(0.0,))
    limit = forecast(model, Design(("p",), 1, 512))["limits/hot"]
    assert holds(limit, "ever", probability)
    low, high = (number(limit, f"ever_{end}")[0] for end in ("low", "high"))
    assert 0 <= low < high <= 1
    if probability in (0.0, 1.0):
        # Clopper-Pearson on 16 384 members.
        assert high - low == pytest.approx(1 - 0.025 ** (1 / 16384), rel=1e-6)
        assert number(limit, "first_time").tolist() == [0.0] * 5 if probability else np.isnan(number(limit, "first_time")).all()


def test_indices_over_time_and_overall(linear: dict[str, Finding]) -> None:
    ranking = linear["ranking/T"]
    t = np.array(TIMES)
    truth = np.stack([1 / (1 + t**2), t**2 / (1 + t**2)])
    assert holds(ranking, "first", truth)
    assert holds(ranking, "total", truth)
    weights = np.array([0.5, 1, 1, 0.5])
    overall = np.array([weights.sum(), (weights * t**2).sum()]) / (weights * (1 + t**2)).sum()
    assert holds(ranking, "first_overall", overall)
    assert holds(ranking, "total_overall", overall)
    assert ranking.variables["first"].dims == ("input", "time")
    assert ranking.variables["total_overall"].dims == ("input",)
    assert holds(linear["ranking/end"], "first", np.array([0.2, 0.8]))
    # An input without effect: exactly 0.
    assert number(ranking, "total")[1, 0] == 0.0


def test_indices_of_a_limit_are_those_of_the_indicator() -> None:
    """T(t) = 10 + z0 + t z1 > 12 judged at one time: by bivariate normal probabilities."""
    model = replace(LINEAR, times=(2.0,), by=(2.0,), outcomes=None, outcome_names=())
    ranking = forecast(model, Design(("p", "q"), 3, 1024))["ranking/hot"]
    q, shares = 2 / np.sqrt(5.0), np.array([0.2, 0.8])
    p = ndtr(-q)

    def joint(share: float) -> float:
        return float(multivariate_normal([0, 0], [[1, share], [share, 1]]).cdf([-q, -q]))

    first = np.array([(joint(share) - p**2) / (p - p**2) for share in shares])
    assert holds(ranking, "first_by", first[:, None])
    assert holds(ranking, "total", 1 - first[::-1, None])


def test_ranking_a_limit_needs_500_of_each() -> None:
    model = Model(("p", "q"), (0.0, 1.0), lambda u, times: (u[:, :1] + times * u[:, 1:2])[:, None], threshold=0.97, by=(0.0,))
    ranking = forecast(model, Design(("p", "q"), 3, 256))["ranking/hot"]
    assert np.isnan(number(ranking, "first")[:, 0]).all()
    assert np.isfinite(number(ranking, "first")[:, 1]).all()
    assert "500" in ranking.variables["first_by"].attributes["reason"]


def test_constant_outputs_have_no_index_and_no_width() -> None:
    model = Model(("p",), (0.0, 1.0), lambda u, times: (3e6 + 0 * u[:, :1] + 1e-3 * times * u[:, :1])[:, None])
    found = forecast(model, Design(("p",), 1, 64))
    band, ranking = found["bands/T"], found["ranking/T"]
    assert number(band, "quantiles")[:, 0].tolist() == [3e6] * 5
    assert number(band, "quantiles_high")[:, 0].tolist() == [3e6] * 5
    assert number(band, "sd")[0] == 0.0
    # At the end the spread is 3e-4, and 1e-6 of 3e6 is 3: noise.
    assert np.isnan(number(ranking, "first")).all()
    assert np.isnan(number(ranking, "first_overall")).all()
    assert "noise" in ranking.variables["total"].attributes["reason"]


def test_an_offset_costs_no_digits() -> None:
    design = Design(("p", "q"), 7, 128)
    plain = Model(("p", "q"), TIMES, gaussian)
    offset = Model(("p", "q"), TIMES, lambda u, times: 1e6 + gaussian(u, times))
    near, far = (forecast(model, design) for model in (plain, offset))
    for name in ("first", "first_high", "total", "total_low", "total_overall"):
        # The values themselves carry 1e-10 of rounding at the offset.
        assert number(far["ranking/T"], name)[..., -1:] == pytest.approx(number(near["ranking/T"], name)[..., -1:], abs=1e-8)
    assert number(far["bands/T"], "sd") == pytest.approx(number(near["bands/T"], "sd"), rel=1e-8)


ISHIGAMI = Model(
    ("x1", "x2", "x3"),
    (0.0,),
    lambda u, times: (np.sin(x := np.pi * (2 * u - 1))[:, :1] * (1 + 0.1 * x[:, 2:] ** 4) + 7 * np.sin(x[:, 1:2]) ** 2)[:, None],
)


def g_function(a: np.ndarray) -> Model:
    """Saltelli and Sobol' 1995: product of (|4 u - 2| + a_i)/(1 + a_i)."""
    names = tuple(f"x{place}" for place in range(len(a)))
    return Model(names, (0.0,), lambda u, times: ((np.abs(4 * u - 2) + a) / (1 + a)).prod(axis=1)[:, None, None])


def test_ishigami() -> None:
    """First V1 = (1 + b pi^4/5)^2/2, V2 = a^2/8; total of x1 and x3 with V13 = b^2 pi^8 8/225 (Saltelli et al. 2008; closed form)."""
    v1, v2, v13 = (1 + 0.1 * np.pi**4 / 5) ** 2 / 2, 49 / 8, 0.01 * np.pi**8 * 8 / 225
    total = v1 + v2 + v13
    ranking = forecast(ISHIGAMI, Design(ISHIGAMI.inputs, 11, 512))["ranking/T"]
    assert holds(ranking, "first", np.array([v1, v2, 0.0])[:, None] / total)
    assert holds(ranking, "total", np.array([v1 + v13, v2, v13])[:, None] / total)


def test_g_function() -> None:
    """V_i = 1/(3 (1 + a_i)^2); V = prod(1 + V_i) - 1; total V_i prod of the others (1 + V_j)."""
    a = np.array([0.0, 1.0, 4.5, 9.0, 99.0])
    v = 1 / (3 * (1 + a) ** 2)
    whole = (1 + v).prod() - 1
    model = g_function(a)
    ranking = forecast(model, Design(model.inputs, 5, 512))["ranking/T"]
    assert holds(ranking, "first", (v / whole)[:, None])
    assert holds(ranking, "total", (v * (1 + v).prod() / (1 + v) / whole)[:, None])


def test_members_are_a_fixed_sample(linear: dict[str, Finding]) -> None:
    small = forecast(LINEAR, Design(("p", "q"), 7, 64))
    for group in ("members", "members/watched", "members/inputs", "members/outcomes"):
        for name, variable in linear[group].variables.items():
            assert np.array_equal(variable.data, number(small[group], name), equal_nan=True)
    u = number(linear["members/inputs"], "p"), number(linear["members/inputs"], "q")
    assert number(linear["members/watched"], "T") == pytest.approx(gaussian(np.stack(u, axis=1), np.array(TIMES))[:, 0])
    assert number(linear["members"], "status").tolist() == [0] * 200


def test_only_what_is_asked_is_answered() -> None:
    ask = complete(LINEAR, DESIGN, questions=("limits",))
    part = folded(tallied(LINEAR, DESIGN, ask, DESIGN.blocks(0, 16, 16)))
    assert next(finding.group for finding in part.findings(ask)) == "limits/hot"
    assert {finding.group.split("/")[0] for finding in part.findings(ask)} == {"limits", "members", "failures", "solver"}
    assert set(part.held) == {"passings", "members", "failures"}


def test_times_solved_beside_the_output_times_change_nothing() -> None:
    """A `by` time off the grid, and times that only outcomes need, do not touch what is said at the output times."""
    more = replace(LINEAR, times=(0.0, 0.5, 1.0, 1.5, 2.0, 3.0))
    fine = forecast(more, DESIGN, grid=np.array([0, 2, 4, 5]))
    coarse = forecast(LINEAR, DESIGN)
    for group, finding in coarse.items():
        for name, variable in finding.variables.items():
            assert np.array_equal(variable.data, number(fine[group], name), equal_nan=True), (group, name)
    off = forecast(replace(more, by=(1.5, 3.0)), DESIGN, grid=np.array([0, 2, 4, 5]))
    assert number(off["limits/hot"], "ever_by")[0] > number(fine["limits/hot"], "ever")[1]


def test_one_level_has_no_simultaneous_band() -> None:
    band = forecast(Model(("p", "q"), TIMES, gaussian), Design(("p", "q"), 1, 16), quantiles=(0.5,))["bands/T"]
    assert np.isnan(number(band, "simultaneous")).all()
    assert band.variables["simultaneous"].attributes["reason"]
    assert np.isfinite(number(band, "quantiles_high")).all()


def test_bytes_kept() -> None:
    """One quantity at 4 times and its largest deviation, and two outcomes, of every member, 8 bytes each."""
    ask = LINEAR.ask()
    held = folded(tallied(LINEAR, DESIGN, complete(LINEAR, DESIGN), DESIGN.blocks(0, 512, 64))).held
    kept = (held["courses"].values, held["courses"].deviations, held["values"])
    assert kept_bytes(ask, DESIGN.members) == sum(piece.nbytes for each in kept for piece in each.pieces.values())
    assert kept_bytes(LINEAR.ask(questions=("limits", "ranking")), DESIGN.members) == 0

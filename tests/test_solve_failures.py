"""Failures are values: every way to fail gets its status, its time, and nan from there on; nothing hangs, nothing is raised."""

from __future__ import annotations

import numpy as np
import pytest

from tests.solver_models import Parts, equations, names, one_state, solved
from uq.solve.batch import Status
from uq.solve.statuses import SENTENCES, describe

TIMES = np.linspace(0.0, 3.0, 31)
RNG = np.random.default_rng(3)
STARTS = RNG.uniform(0.4, 5.0, 100)
ROWS = np.column_stack([np.ones(100), STARTS])

# rate, start as a function of x0, time of the pole
POLES = (
    (lambda x, k, t: x**2, lambda x0: x0, 1 / STARTS),
    (lambda x, k, t: 1 + x**2, lambda x0: x0 - 2.5, np.pi / 2 - np.arctan(STARTS - 2.5)),
    (lambda x, k, t: -(x**2), lambda x0: -x0, 1 / STARTS),
    (lambda x, k, t: x**3, lambda x0: x0, 0.5 / STARTS**2),
    (lambda x, k, t: x.exp(), lambda x0: x0, np.exp(-STARTS)),
)


@pytest.mark.parametrize("accuracy", [1e-3, 1e-6, 1e-10])
@pytest.mark.parametrize("case", range(len(POLES)))
def test_blow_up_in_finite_time(case: int, accuracy: float) -> None:
    rate, start, pole = POLES[case]
    batch = solved(one_state(rate, start), ROWS, TIMES, accuracy)
    inside = pole < 3.0
    assert inside.sum() > 90
    assert np.all(batch.status[inside] == Status.blew_up)
    assert np.all(batch.status[~inside] == Status.ok)
    assert np.abs(batch.end_time / pole - 1)[inside].max() < 0.01
    assert np.array_equal(np.isnan(batch.values[inside, 0]), batch.end_time[inside, None] <= TIMES)


def test_a_pole_at_time_zero_reached_from_before() -> None:
    batch = solved(one_state(lambda x, k, t: x**2), [[0.0, 0.5]], [0.5, 1.0], start=-2.0)
    assert batch.status[0] == Status.blew_up
    assert batch.end_time[0] == pytest.approx(0.0, abs=0.01)


def test_a_blow_up_on_whose_way_a_rate_stops_being_a_number() -> None:
    # the sine is only defined up to 2^30: the state is far beyond its scale by then
    x0, x, y = names("x0 x y")
    batch = solved(equations("k x0", "x y", [x0, x0 * 0], [x**2, x.sin() - y]), ROWS, TIMES)
    inside = 1 / STARTS < 3
    assert np.all(batch.status[inside] == Status.blew_up)
    assert np.abs(batch.end_time * STARTS - 1)[inside].max() < 0.01


def test_growth_beyond_the_largest_number_is_a_blow_up() -> None:
    batch = solved(one_state(lambda x, k, t: 1000 * x), ROWS[:5], TIMES, 1e-4)
    assert np.all(batch.status == Status.blew_up)
    assert np.all((batch.end_time > 0.3) & (batch.end_time < 0.71))  # exp(1000 t) passes 1.8e308 at 0.7097


@pytest.mark.parametrize(
    ("rate", "time"),
    [
        (lambda x, k, t: (1 - t).sqrt(), 1.0),
        (lambda x, k, t: (2 - t).ln(), 2.0),
        (lambda x, k, t: (t < 1.25).where(0, t * 0 / (t - t)), 1.25),
    ],
)
def test_rates_that_are_no_numbers_from_some_time_on(rate, time: float) -> None:
    batch = solved(one_state(rate), ROWS[:5], TIMES)
    assert np.all(batch.status == Status.not_finite)
    assert batch.end_time == pytest.approx(np.full(5, time), rel=1e-6)
    assert np.array_equal(np.isnan(batch.values[:, 0]), batch.end_time[:, None] <= TIMES)


def test_a_draining_tank_that_runs_dry() -> None:
    # h' = -sqrt(h) is no number below 0; h reaches 0 at 2 sqrt(h0)
    batch = solved(one_state(lambda x, k, t: -1 * x.sqrt()), ROWS[:20], np.linspace(0, 10, 11), 1e-8)
    assert np.all(batch.status == Status.not_finite)
    assert batch.end_time == pytest.approx(2 * np.sqrt(STARTS[:20]), rel=1e-3)


def test_members_whose_start_or_first_rate_is_not_finite() -> None:
    log_start = one_state(lambda x, k, t: -x, lambda x0: (x0 - 2).ln())
    batch = solved(log_start, ROWS, TIMES)
    bad = STARTS <= 2
    assert 10 < bad.sum() < 90
    assert np.array_equal(batch.status == Status.not_finite, bad)
    assert np.all(batch.end_time[bad] == 0.0)
    assert np.all(np.isnan(batch.values[bad]))
    assert not np.isnan(batch.values[~bad]).any()
    log_rate = solved(one_state(lambda x, k, t: (x - 2).ln() * 0), ROWS, TIMES)
    assert np.array_equal(log_rate.status == Status.not_finite, bad)
    for value in (np.nan, np.inf, -np.inf):
        assert solved(one_state(lambda x, k, t: -k * x), [[1.0, value]], TIMES).status[0] == Status.not_finite


def test_too_many_steps() -> None:
    batch = solved(one_state(lambda x, k, t: -1e6 * (x - t.cos())), ROWS[:5], TIMES, max_steps=1000)
    assert np.all(batch.status == Status.too_many_steps)
    assert np.all(batch.steps + batch.rejections == 1000)
    assert np.all((batch.end_time > 0) & (batch.end_time < 3))


def test_a_rate_with_a_pole_in_time() -> None:
    batch = solved(one_state(lambda x, k, t: (t < 1).where(1, -1) / (t - 1).abs() ** 1.5), ROWS[:5], TIMES, 1e-10)
    assert np.all((batch.status == Status.blew_up) | (batch.status == Status.step_too_small))
    assert batch.end_time == pytest.approx(np.ones(5), rel=0.01)


def test_a_slope_without_bound_at_a_finite_value_is_no_blow_up() -> None:
    # x x' = -1/2 reaches 0 with an infinite slope
    batch = solved(one_state(lambda x, k, t: -0.5 / x), ROWS[:20], np.linspace(0, 30, 4), 1e-10)
    assert np.all(batch.status == Status.step_too_small)
    assert batch.end_time == pytest.approx(STARTS[:20] ** 2, rel=1e-6)


def test_valid_ranges_are_judged_at_the_start_and_at_accepted_steps() -> None:
    k, x0, x, y = names("k x0 x y")
    eq = equations("k x0", "x y", [x0, x0 * 0], [-k * x, k + 0 * y], Parts(observed=[x, y], conditions=[x > 0]))
    batch = solved(eq, ROWS, TIMES, lowest=[0.2, -np.inf], highest=[4.0, np.inf])
    above, reaches = STARTS > 4, (STARTS * np.exp(-3) < 0.2) & (STARTS <= 4)
    assert np.all(batch.status[above | reaches] == Status.out_of_range)
    assert np.all(batch.status[~above & ~reaches] == Status.ok)
    assert np.all(batch.end_time[above] == 0.0)
    crossing = np.log(STARTS / 0.2)
    assert np.all((batch.end_time >= crossing)[reaches])
    assert np.all((batch.end_time < crossing + 1.0)[reaches])
    gone = batch.end_time[:, None] <= TIMES
    failed = batch.status != Status.ok
    assert np.array_equal(np.isnan(batch.values[failed]), np.repeat(gone[failed, None], 2, axis=1))
    assert not batch.conditions[failed, 0][gone[failed]].any()
    assert batch.conditions[failed, 0][~gone[failed]].all()


def test_a_condition_of_what_is_no_number_is_false() -> None:
    k, x0, x = names("k x0 x")
    eq = equations("k x0", "x", [x0], [-k * x], Parts(observed=[(x - 100).ln()], conditions=[(x - 100).ln() > 0, (x - 100).ln() < 0]))
    batch = solved(eq, ROWS[:3], TIMES)
    assert np.all(batch.status == Status.ok)
    assert np.isnan(batch.values).all()
    assert not batch.conditions.any()


def test_nothing_takes_forever() -> None:
    # a rate that switches sign with the state: the solution slides along x = 0, where no short step is good enough
    batch = solved(one_state(lambda x, k, t: (x > 0).where(-1, 1) + 0.3), ROWS[:8], np.linspace(0, 10, 3), 1e-9, max_steps=20_000)
    assert np.all(np.isin(batch.status, (Status.too_many_steps, Status.step_too_small)))


def test_every_status_has_a_sentence() -> None:
    assert tuple(status for status, _ in SENTENCES) == tuple(Status)
    for status in Status:
        assert describe(status).endswith(".")

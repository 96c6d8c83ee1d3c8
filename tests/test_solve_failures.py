"""Failures are values: every way to fail gets its status, its time, and nan from there on; nothing hangs, nothing is raised."""

from __future__ import annotations

from dataclasses import replace

import numpy as np
import pytest

from tests.solver_models import Ex, Parts, equations, names, one_state, settings, solved
from uq.model.build import write
from uq.model.code import Course
from uq.model.columns import Looped
from uq.model.points import Plan
from uq.model.tableau import PAIRS
from uq.solve.batch import Status, Truth
from uq.solve.compile import Processor, compile_for
from uq.solve.solve import solve
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
    assert np.all(batch.conditions[failed, 0][gone[failed]] == Truth.unknown)
    assert np.all(batch.conditions[failed, 0][~gone[failed]] == Truth.true)


def test_a_state_outside_of_its_range_within_a_step_is_seen_at_the_output_times() -> None:
    # x' = 1 - y with y = t: x is highest in the middle of one long step and valid again at its end
    k, x0, x, y = names("k x0 x y")
    eq = equations("k x0", "x y", [x0, x0], [k * (1 - y), 1 + 0 * y], Parts(observed=[x, x * 2], conditions=[x > 0.2]))
    times = np.array([0.0, 0.5, 0.75, 1.0, 2.0])
    for method in ("explicit54", "explicit853"):
        batch = solved(eq, [[1.0, 0.0], [0.5, 0.0]], times, 1e-6, method=method, highest=[0.45, np.inf])
        assert batch.status.tolist() == [Status.out_of_range, Status.ok]
        assert batch.end_time.tolist() == [0.75, 2.0]
        assert batch.values[0, :, 1] == pytest.approx([0.375, 0.75])
        assert np.isnan(batch.values[0]).tolist() == [[False, False, True, True, True]] * 2
        assert batch.conditions.tolist() == [[[0, 1, 2, 2, 2]], [[0, 0, 1, 1, 0]]]


def test_a_range_left_within_one_step_is_seen_whatever_else_happens_in_it() -> None:
    # one step from 0 to 10; the rate is a number, so nothing else makes steps short
    k, x0, x = names("k x0 x")
    eq = equations("k x0", "x y", [x0, x0], [k, -k], Parts(observed=[x]))
    x_rows = np.column_stack([np.linspace(0.5, 2.0, 16), np.zeros(16)])
    batch = solved(eq, x_rows, np.linspace(0.0, 10.0, 11), lowest=[-np.inf, -8.0])
    crossing = np.ceil(8.0 / x_rows[:, 0] + 1e-12)
    assert np.array_equal(batch.status == Status.out_of_range, crossing <= 10)
    assert np.array_equal(batch.end_time, np.minimum(crossing, 10.0))
    assert np.array_equal(np.isnan(batch.values[:, 0]), (np.arange(11) >= crossing[:, None]) & (crossing[:, None] <= 10))


@pytest.mark.parametrize(("method", "accuracy"), [("explicit54", 1e-3), ("explicit54", 1e-6), ("explicit853", 1e-8)])
def test_the_solvers_own_error_does_not_lead_out_of_a_range(method: str, accuracy: float) -> None:
    # both states settle at 0, where the solution swings by its own error, at the ends of steps and between them
    k, x0, x, y = names("k x0 x y")
    eq = equations("k x0", "x y", [x0, x0 * 0], [-50 * k * x, 50 * k * x - k * y])
    times = np.linspace(0.0, 30.0, 301)
    batch = solved(eq, ROWS, times, accuracy, method=method, lowest=[0.0, 0.0], highest=[5.0, 5.0])
    assert np.all(batch.status == Status.ok)
    assert batch.values.min() < 0
    strict = solved(eq, ROWS, times, accuracy, method=method, lowest=[0.05, -5.0], highest=[5.0, 5.0])
    assert np.all(strict.status == Status.out_of_range)


def test_a_condition_of_what_is_no_number_is_unknown_unless_the_rest_decides() -> None:
    k, x0, x = names("k x0 x")
    nothing, yes, no = (x - 100).ln(), x > -1, x < -1
    maybe = nothing > 0
    asked = {
        "unknown": [maybe, nothing < 0, ~maybe, ~(nothing <= 0), maybe & yes, yes & maybe, maybe | no, no | maybe, maybe & ~maybe, nothing],
        "true": [maybe | yes, yes | maybe, ~(maybe & no), yes, x],
        "false": [maybe & no, no & maybe, ~(maybe | yes), no, x - x],
    }
    conditions = [condition for group in asked.values() for condition in group]
    outcome = Ex(x.graph, x.graph.name("course:0"))
    parts = Parts(
        observed=[nothing, maybe.where(1, 2), (maybe & no).where(1, 2), maybe],
        conditions=conditions,
        courses=[Course("highest", 0, 0.0, 3.0)],
        outcomes=[(outcome > 0).where(1, 0), outcome > 0],
    )
    for looped in (False, True):
        eq = equations("k x0", "x", [x0], [-k * x], parts)
        plan = Plan.of(eq, PAIRS[0])
        code = compile_for(write(replace(plan, form=Looped) if looped else plan), Processor.here())
        batch = solve(code, ROWS[:3], TIMES, 0.0, settings(1))
        assert np.all(batch.status == Status.ok)
        assert np.isnan(batch.values[:, [0, 1, 3]]).all()
        assert np.all(batch.values[:, 2] == 2.0)
        assert np.isnan(batch.outcomes).all()
        expected = [Truth[name] for name, group in asked.items() for _ in group]
        assert np.all(batch.conditions == np.array(expected)[:, None])


def test_a_rate_that_asks_what_cannot_be_known_is_not_finite() -> None:
    # from x = 1 on the root is no number: neither branch is right
    batch = solved(one_state(lambda x, k, t: ((1 - x).sqrt() > 0.1).where(k, 0.5 * k)), [[1.0, 0.0]], TIMES)
    assert batch.status[0] == Status.not_finite
    assert batch.end_time[0] == pytest.approx(1.01, abs=0.02)


def test_nothing_takes_forever() -> None:
    # a rate that switches sign with the state: the solution slides along x = 0, where no short step is good enough
    batch = solved(one_state(lambda x, k, t: (x > 0).where(-1, 1) + 0.3), ROWS[:8], np.linspace(0, 10, 3), 1e-9, max_steps=20_000)
    assert np.all(np.isin(batch.status, (Status.too_many_steps, Status.step_too_small)))


def test_every_status_has_a_sentence() -> None:
    assert tuple(status for status, _ in SENTENCES) == tuple(Status)
    for status in Status:
        assert describe(status).endswith(".")

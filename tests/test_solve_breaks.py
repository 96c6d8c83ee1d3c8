"""Given courses over time: their breaks are landed on, never stepped over, and the later piece counts at a break."""

from __future__ import annotations

import numpy as np
import pytest

from tests.solver_models import Parts, equations, names, solved
from uq.errors import ValueMistake
from uq.model.code import Forcing
from uq.solve.batch import Status
from uq.solve.breaks import segments


def driven(*forcings: Forcing, rate=None):
    """x' = f - k x (or another rate of k, x, f, g); x and the forcings are observed."""
    k, x0, x, *leaves = names("k x0 x " + " ".join(f.name for f in forcings))
    f, g = leaves[0], leaves[-1]
    return equations("k x0", "x", [x0], [rate(k, x, f, g) if rate else f - k * x], Parts([x, *leaves], [leaves[0] > 0.5], forcings))


def test_a_pulse_far_shorter_than_a_step_is_seen() -> None:
    pulse = Forcing("f", (0.0, 500.0, 500.001), (0.0, 1000.0, 0.0), "step")
    batch = solved(driven(pulse), [[0.0, 2.0]], [0.0, 499.0, 501.0, 1000.0])
    assert batch.values[0, 0] == pytest.approx([2.0, 2.0, 3.0, 3.0], abs=1e-9)
    assert batch.steps[0] < 60


def test_a_linear_pulse_far_shorter_than_a_step_is_seen() -> None:
    pulse = Forcing("f", (0.0, 500.0, 500.001, 500.002, 1000.0), (0.0, 0.0, 1000.0, 0.0, 0.0))
    batch = solved(driven(pulse), [[0.0, 2.0]], [1000.0])
    assert batch.values[0, 0] == pytest.approx([3.0], abs=1e-9)


def test_at_a_break_the_later_piece_is_observed_except_at_the_last_time() -> None:
    steps = Forcing("f", (0.0, 1.0, 2.0, 3.0), (0.0, 1.0, 0.25, 7.0), "step")
    jump = Forcing("g", (0.0, 1.0, 1.0, 3.0), (0.0, 1.0, 5.0, 7.0))
    times = np.array([0.0, 0.5, 1.0, 1.5, 2.0, 2.5, 3.0])
    batch = solved(driven(steps, jump), [[1.0, 1.0]], times)
    assert batch.values[0, 1].tolist() == [0.0, 0.0, 1.0, 1.0, 0.25, 0.25, 0.25]
    assert batch.values[0, 2] == pytest.approx([0.0, 0.5, 5.0, 5.5, 6.0, 6.5, 7.0], rel=1e-15)
    assert batch.conditions[0, 0].tolist() == [False, False, True, True, False, False, False]


def test_states_are_continuous_and_exact_across_a_jump() -> None:
    # x' = f - x with f = 1 up to 1, then 3
    batch = solved(driven(Forcing("f", (0.0, 1.0), (1.0, 3.0), "step")), [[1.0, 0.0]], [0.5, 1.0, 2.0], 1e-10)
    at_break = 1 - np.exp(-1.0)
    assert batch.values[0, 0] == pytest.approx([1 - np.exp(-0.5), at_break, 3 + (at_break - 3) * np.exp(-1.0)], abs=1e-9)


def test_a_linear_forcing_against_the_closed_form() -> None:
    # x' = t - x on [0, 2], then x' = 2 - x: x = t - 1 + e^-t, then 2 + (x(2) - 2) e^-(t - 2)
    batch = solved(driven(Forcing("f", (0.0, 2.0, 5.0), (0.0, 2.0, 2.0))), [[1.0, 0.0]], [1.0, 2.0, 5.0], 1e-10)
    at_two = 1 + np.exp(-2.0)
    assert batch.values[0, 0] == pytest.approx([np.exp(-1.0), at_two, 2 + (at_two - 2) * np.exp(-3.0)], abs=1e-9)


def test_many_breaks_and_members_that_meet_them_at_different_moments() -> None:
    times = np.arange(366.0)
    daily = Forcing("f", tuple(times), tuple(10 + 5 * np.sin(times)), "step")
    x = np.random.default_rng(4).uniform([0.05, 0.0], [20.0, 100.0], (40, 2))
    values = solved(driven(daily), x, times, 1e-9, scales=[100.0]).values[:, 0]
    exact = np.empty_like(values)
    exact[:, 0] = x[:, 1]
    for day in range(365):
        settled = daily.values[day] / x[:, 0]
        exact[:, day + 1] = settled + (exact[:, day] - settled) * np.exp(-x[:, 0])
    assert np.abs(values - exact).max() < 1e-5


def test_a_rate_that_is_no_number_after_a_break() -> None:
    turns = Forcing("f", (0.0, 1.0), (1.0, -1.0), "step")
    batch = solved(driven(turns, rate=lambda k, x, f, g: f.sqrt()), [[1.0, 0.0]], [0.5, 1.0, 2.0])
    assert batch.status[0] == Status.not_finite
    assert batch.end_time[0] == 1.0
    assert batch.values[0, 0] == pytest.approx([0.5, np.nan, np.nan], nan_ok=True)


def test_the_step_length_survives_a_break() -> None:
    still = Forcing("f", tuple(float(t) for t in range(0, 101, 10)), (1.0,) * 11)
    batch = solved(driven(still, rate=lambda k, x, f, g: k * 0 + 1 + 0 * f), [[1.0, 0.0]], [100.0])
    assert batch.steps[0] < 30


def test_segments_merge_breaks_and_know_their_jumps() -> None:
    f = Forcing("f", (0.0, 2.0, 4.0), (0.0, 4.0, 4.0))
    g = Forcing("g", (-1.0, 1.0, 3.0), (5.0, 6.0, 6.0), "step")
    found = segments((f, g), 0.0, 4.0)
    assert found.bounds.tolist() == [0.0, 1.0, 2.0, 4.0]  # at 3 the step forcing does not change
    assert found.jumps.tolist() == [0, 1, 0]
    assert found.base.tolist() == [[0.0, 5.0], [2.0, 6.0], [4.0, 6.0]]
    assert found.slope.tolist() == [[2.0, 0.0], [2.0, 0.0], [0.0, 0.0]]
    assert segments((f, g), 2.0, 3.5).bounds.tolist() == [2.0, 3.5]


def test_rows_at_one_time_are_a_jump() -> None:
    found = segments((Forcing("f", (0.0, 1.0, 1.0, 2.0), (0.0, 1.0, 3.0, 3.0)),), 0.0, 2.0)
    assert found.bounds.tolist() == [0.0, 1.0, 2.0]
    assert found.jumps.tolist() == [0, 1]
    assert found.base.tolist() == [[0.0], [3.0]]


@pytest.mark.parametrize(("times", "kind"), [((1.0, 5.0), "linear"), ((0.0, 3.0), "linear"), ((0.5, 3.0), "step")])
def test_a_forcing_that_does_not_cover_the_time_is_the_users_mistake(times, kind) -> None:
    with pytest.raises(ValueMistake, match=r"rows from .* to .*, expected rows that cover the time from 0 to 4"):
        segments((Forcing("f", times, (1.0, 2.0), kind),), 0.0, 4.0)


def test_no_forcing_is_one_segment() -> None:
    found = segments((), 1.0, 4.0)
    assert found.bounds.tolist() == [1.0, 4.0]
    assert found.base.shape == (1, 0)

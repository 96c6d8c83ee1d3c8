"""Given courses over time: their breaks are landed on, never stepped over, and the later piece counts at a break."""

from __future__ import annotations

import numpy as np
import pytest
from scipy.interpolate import PchipInterpolator

from tests.solver_models import Ex, Parts, equations, names, solved
from uq.errors import ValueMistake
from uq.model.code import Course, Forcing, Moments
from uq.solve.batch import Status
from uq.solve.breaks import MOST_REPEATED_ROWS, segments


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


def test_at_a_break_the_later_piece_is_observed_at_the_last_time_too() -> None:
    steps = Forcing("f", (0.0, 1.0, 2.0, 3.0), (0.0, 1.0, 0.25, 7.0), "step")
    jump = Forcing("g", (0.0, 1.0, 1.0, 3.0), (0.0, 1.0, 5.0, 7.0))
    times = np.array([0.0, 0.5, 1.0, 1.5, 2.0, 2.5, 3.0])
    batch = solved(driven(steps, jump), [[1.0, 1.0]], times)
    assert batch.values[0, 1].tolist() == [0.0, 0.0, 1.0, 1.0, 0.25, 0.25, 7.0]
    assert batch.values[0, 2] == pytest.approx([0.0, 0.5, 5.0, 5.5, 6.0, 6.5, 7.0], rel=1e-15)
    assert batch.conditions[0, 0].tolist() == [0, 0, 1, 1, 0, 0, 1]


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
    assert found.coefficients.tolist() == [[0.0, 5.0, 2.0, 0.0], [2.0, 6.0, 2.0, 0.0], [4.0, 6.0, 0.0, 0.0]]  # bases, then slopes
    assert segments((f, g), 2.0, 3.5).bounds.tolist() == [2.0, 3.5]


def test_rows_at_one_time_are_a_jump() -> None:
    found = segments((Forcing("f", (0.0, 1.0, 1.0, 2.0), (0.0, 1.0, 3.0, 3.0)),), 0.0, 2.0)
    assert found.bounds.tolist() == [0.0, 1.0, 2.0]
    assert found.jumps.tolist() == [0, 1]
    assert found.coefficients[:, 0].tolist() == [0.0, 3.0]


def course(forcing: Forcing, times: np.ndarray) -> np.ndarray:
    """A forcing as a member sees it."""
    return solved(driven(forcing), [[1.0, 0.0]], times, start=float(times[0])).values[0, 1]


ROWS = (tuple(np.cumsum([0.0, 0.5, 1.0, 0.25, 2.0, 1.25]).tolist()), (1.0, 3.0, 2.5, 2.5, -1.0, 1.0))
FINE = np.linspace(0.0, 5.0, 501)


def test_a_smooth_forcing_is_the_monotone_cubic_of_scipy() -> None:
    found = course(Forcing("f", *ROWS, "smooth"), FINE)
    assert np.abs(found - PchipInterpolator(*ROWS)(FINE)).max() < 1e-13


def test_a_smooth_forcing_beside_another_whose_breaks_cut_it() -> None:
    f, g = Forcing("f", *ROWS, "smooth"), Forcing("g", (0.0, 0.3, 0.7, 3.1, 5.0), (0.0, 1.0, 0.0, 2.0, 0.0), "step")
    smooth = Forcing("h", *ROWS, "smooth", "hold")
    batch = solved(driven(f, g, smooth), [[1.0, 0.0]], FINE)
    assert np.abs(batch.values[0, [1, 3]] - PchipInterpolator(*ROWS)(FINE)).max() < 1e-13
    stairs = np.array([0.0, 1.0, 0.0, 2.0, 0.0])[np.searchsorted([0.3, 0.7, 3.1, 5.0], FINE, "right")]
    assert batch.values[0, 2] == pytest.approx(stairs, abs=1e-12)


def test_rows_at_one_time_cut_a_smooth_forcing_in_two() -> None:
    forcing = Forcing("f", (0.0, 1.0, 2.0, 2.0, 3.0, 5.0), (0.0, 1.0, 1.5, 4.0, 3.0, 3.5), "smooth")
    left, right = PchipInterpolator([0, 1, 2], [0, 1, 1.5]), PchipInterpolator([2, 3, 5], [4, 3, 3.5])
    assert course(forcing, FINE) == pytest.approx(np.where(FINE < 2.0, left(FINE), right(FINE)), abs=1e-13)
    assert segments((forcing,), 0.0, 5.0).jumps.tolist() == [0, 0, 1, 0]


@pytest.mark.parametrize("kind", ["linear", "step", "smooth"])
def test_outside_of_its_rows_a_forcing_is_held(kind) -> None:
    times = np.linspace(-2.0, 7.0, 91)
    forcing = Forcing("f", *ROWS, kind, "hold")
    found, within = course(forcing, times), (times >= 0) & (times < 4.95)
    assert np.all(found[times < 0] == 1.0)
    assert np.all(found[times > 5] == 1.0)
    inside = course(Forcing("f", *ROWS, kind), times[within])
    assert found[within] == pytest.approx(inside, abs=1e-13)


@pytest.mark.parametrize(("first", "last"), [(0.0, 5.0), (-12.3, 13.7), (5.0, 40.0), (101.0, 104.0)])
@pytest.mark.parametrize("kind", ["linear", "step", "smooth"])
def test_a_forcing_repeats_with_the_period_of_its_rows(kind, first: float, last: float) -> None:
    times = np.linspace(first, last, 211)[1:-1] + 1e-6  # not at a row: there the rounding of the period decides which piece counts
    found = course(Forcing("f", *ROWS, kind, "repeat"), np.array([first, *times]))[1:]
    place = np.mod(times, 5.0)
    at, values = (np.array(column) for column in ROWS)
    if kind == "smooth":  # the ends meet: the slope there is that of the rows on both sides of the seam
        around = np.concatenate([at[:-1] - 5.0, at, at[1:] + 5.0])
        expected = PchipInterpolator(around, np.concatenate([values[:-1], values, values[1:]]))(place)
    else:
        expected = np.interp(place, at, values) if kind == "linear" else values[np.searchsorted(at, place, "right") - 1]
    assert found == pytest.approx(expected, abs=1e-12)


def test_at_the_seam_of_a_repeating_forcing_the_first_row_counts() -> None:
    saw = Forcing("f", (0.0, 2.0), (0.0, 4.0), "linear", "repeat")
    found = segments((saw,), 0.0, 5.0)
    assert found.bounds.tolist() == [0.0, 2.0, 4.0, 5.0]
    assert found.jumps.tolist() == [0, 1, 1]
    assert found.coefficients.tolist() == [[0.0, 2.0]] * 3
    assert course(saw, np.array([0.0, 1.0, 2.0, 3.0, 4.0, 5.0])).tolist() == [0.0, 2.0, 0.0, 2.0, 0.0, 2.0]
    ends_alike = segments((Forcing("f", *ROWS, "smooth", "repeat"),), 0.0, 20.0)
    assert not ends_alike.jumps.any()


def test_a_repeating_course_drives_a_member_exactly() -> None:
    # x' = f, f a saw from 0 to 4 in every period of 2: the integral over a period is 4
    saw = Forcing("f", (0.0, 2.0), (0.0, 4.0), "linear", "repeat")
    batch = solved(driven(saw, rate=lambda k, x, f, g: f), [[1.0, 0.0]], [10.0, 11.0, 200.0], 1e-9)
    assert batch.values[0, 0] == pytest.approx([20.0, 21.0, 400.0], rel=1e-9)


def test_too_many_periods_are_the_users_mistake() -> None:
    hourly = Forcing("f", (0.0, 0.5, 1.0), (0.0, 1.0, 0.0), "linear", "repeat")
    assert len(segments((hourly,), 0.0, 20_000.0).jumps) == 40_000
    with pytest.raises(ValueMistake, match=rf"rows when repeated from 0 to 1e\+06, expected at most {MOST_REPEATED_ROWS}") as caught:
        segments((hourly,), 0.0, 1e6)
    assert caught.value.key == "forcings.f"
    with pytest.raises(ValueMistake, match="a period"):
        segments((Forcing("f", (1.0, 1.0), (0.0, 1.0), "step", "repeat"),), 0.0, 1.0)


@pytest.mark.parametrize(("times", "kind"), [((1.0, 5.0), "linear"), ((0.0, 3.0), "linear"), ((0.5, 3.0), "step")])
def test_a_forcing_that_does_not_cover_the_time_is_the_users_mistake(times, kind) -> None:
    with pytest.raises(ValueMistake, match=r"rows from .* to .*, expected rows that cover the time from 0 to 4"):
        segments((Forcing("f", times, (1.0, 2.0), kind),), 0.0, 4.0)


def test_no_forcing_is_one_segment() -> None:
    found = segments((), 1.0, 4.0)
    assert found.bounds.tolist() == [1.0, 4.0]
    assert found.coefficients.shape == (1, 0)


def test_a_row_at_the_last_time_acts_there() -> None:
    # seen, asked for as the final value, and judged, whether or not rates look at it; states do not move
    steps = Forcing("f", (0.0, 5.0, 10.0), (1.0, 3.0, 7.0), "step")
    k, x0, x, f = names("k x0 x f")
    final = Ex(x.graph, x.graph.name("course:0"))
    parts = Parts([x, f], [f > 5], [steps], [Course("value_at", 1, 10.0, 10.0)], [final])
    batch = solved(equations("k x0", "x", [x0], [k * f], parts), [[1.0, 0.0]], [0.0, 5.0, 10.0])
    assert batch.values[0] == pytest.approx(np.array([[0.0, 5.0, 20.0], [1.0, 3.0, 7.0]]))
    assert batch.conditions[0, 0].tolist() == [0, 0, 1]
    assert batch.outcomes[0, 0] == 7.0
    # a rate that is no number from the last row on is never asked for there
    falls = Forcing("f", (0.0, 10.0), (1.0, -1.0), "step")
    last = solved(driven(falls, rate=lambda k, x, f, g: f.sqrt()), [[1.0, 0.0]], [10.0])
    assert last.status[0] == Status.ok
    assert last.values[0, :, 0] == pytest.approx([10.0, -1.0])
    # without a row there, or with one that changes nothing, nothing is added
    assert segments((Forcing("f", (0.0, 5.0, 10.0), (1.0, 3.0, 3.0), "step"),), 0.0, 10.0).bounds.tolist() == [0.0, 5.0, 10.0]
    assert segments((steps,), 0.0, 9.0).bounds.tolist() == [0.0, 5.0, 9.0]


def test_a_row_next_to_a_solved_time_is_at_that_time() -> None:
    times = np.linspace(0.0, 0.7, 8)  # 3 * 0.1 and 6 * 0.1 are not 0.3 and 0.6
    rows = (0.0, 0.1, 0.3, 0.4, 0.6, 0.7)
    assert not set(rows) <= set(times.tolist())
    stairs = Forcing("f", rows, (1.0, 2.0, 3.0, 4.0, 5.0, 6.0), "step")
    batch = solved(driven(stairs, rate=lambda k, x, f, g: f), [[1.0, 0.0]], times)
    assert batch.values[0, 1].tolist() == [1.0, 2.0, 2.0, 3.0, 4.0, 4.0, 5.0, 6.0]
    found = segments((stairs,), 0.0, float(times[-1]), Moments(), times.tobytes())
    assert set(found.bounds.tolist()) <= set(times.tolist())


def test_rows_that_lie_close_together_are_never_lost() -> None:
    # a hit that lasts a ten-thousand-millionth of the time, beside a solved time
    hit = Forcing("f", (0.0, 5.0 - 5e-10, 5.0 + 5e-10), (0.0, 1e9, 0.0), "step")
    batch = solved(driven(hit, rate=lambda k, x, f, g: f), [[1.0, 0.0]], [5.0, 10.0])
    assert batch.values[0, 0] == pytest.approx([0.5, 1.0], rel=1e-5)
    wide = Forcing("f", (0.0, 5.0 + 1e-7, 10.0), (0.0, 1.0, 1.0), "step")  # not next to it
    assert segments((wide,), 0.0, 10.0, Moments(), np.array([5.0, 10.0]).tobytes()).bounds.tolist() == [0.0, 5.0 + 1e-7, 10.0]

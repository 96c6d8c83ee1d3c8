"""Pulses that are written with the time in a rate: their moments are landed on, or steps are kept short."""

from __future__ import annotations

from collections.abc import Callable

import numpy as np
import pytest

from tests.solver_models import Ex, Parts, compiled, equations, names, number, settings, solved, table
from uq.errors import ValueMistake
from uq.model.build import build
from uq.model.code import Equations, Forcing, Table
from uq.model.moments import driven_by_time, not_landed_on
from uq.solve.batch import Status
from uq.solve.breaks import segments
from uq.solve.memory import LONGEST_PART
from uq.solve.moments import MOST_MOMENTS
from uq.solve.scales import pilot_scales

SPAN = 720.0
LINES = Table("line", (0.0, 300.0, 300.5, 301.0, 2000.0), (0.0, 0.0, 1.0, 0.0, 0.0))
CURVE = Table("curve", (0.0, 300.0, 300.5, 301.0, 2000.0), (0.0, 0.0, 1.0, 0.0, 0.0), "smooth")
RAMP = Forcing("f", (0.0, 720.0), (0.0, 1.0))
HILL = Forcing("f", (0.0, 360.0, 720.0), (0.0, 1.0, 0.0), "smooth")
HALF_UP = 360 * (1 - np.sqrt(0.5))  # the hill is 1 - (t / 360 - 1)^2
Pulse = Callable[..., Ex]


def gains(pulse: Pulse, forcings: tuple[Forcing, ...] = (), tables: tuple[Table, ...] = ()) -> Equations:
    """x' = pulse(time, k, forcings): what x gains is what the pulse holds."""
    k, x0, time, *given = names("k x0 time " + " ".join(f.name for f in forcings))
    return equations("k x0", "x", [x0], [pulse(time, k, *given)], Parts(forcings=forcings, tables=tables))


def breaks(eq: Equations, start: float = 0.0, stop: float = SPAN) -> list[float]:
    return segments(eq.forcings, start, stop, build(eq).moments).bounds.tolist()


def gained(eq: Equations, accuracy: float = 1e-6, k: float = 1.0) -> float:
    batch = solved(eq, [[k, 0.0]], [SPAN], accuracy)
    assert batch.status[0] == Status.ok
    return float(batch.values[0, 0, 0])


def between(course: Ex, first: float, last: float) -> Ex:
    return ((course > first) & (course < last)).where(1, 0)


@pytest.mark.parametrize("method", ["explicit54", "explicit853"])
def test_a_state_at_rest_meets_a_pulse_far_shorter_than_its_steps(method: str) -> None:
    # at rest nothing else would keep the steps short
    k, x0, x, time = names("k x0 x time")
    eq = equations("k x0", "x", [x0 * 0 + 1], [-k * (x - 1) + between(time, 300, 310)])
    batch = solved(eq, [[0.011, 0.0]], [300.0, 310.0, 720.0], 1e-8, method=method)
    at_end = 1 + (1 - np.exp(-0.11)) / 0.011
    assert batch.values[0, 0] == pytest.approx([1.0, at_end, 1 + (at_end - 1) * np.exp(-0.011 * 410)], rel=1e-7)
    assert batch.steps[0] + batch.rejections[0] < 70


@pytest.mark.parametrize(
    ("pulse", "found", "content"),
    [
        (lambda t, k: between(t, 300, 310), [300, 310], 10),
        (lambda t, k: ((t >= 300) & ~(t >= 300.25)).where(1, 0), [300, 300.25], 0.25),
        (lambda t, k: (number(t, 300) < t).where((t <= 300.5).where(1, 0), 0), [300, 300.5], 0.5),
        (lambda t, k: between(t / 60, 5, 5.5), [300, 330], 30),
        (lambda t, k: between(t - 100, 200, 200.5), [300, 300.5], 0.5),
        (lambda t, k: between(-2 * t, -601, -600), [300, 300.5], 0.5),
        (lambda t, k: between(t, 300, 300.0001) * k, [300, 300.0001], 0.0001),
        (lambda t, k: (1 - (t - 300).abs()).max(0), [299, 300, 301], 1),
        (lambda t, k: (t - 299).min(301 - t).max(0), [299, 300, 301], 1),
        (lambda t, k: between((t - 300).abs(), -1, 0.25), [299.75, 300, 300.25], 0.5),
        (lambda t, k: between(t.min(400).max(200), 200, 201), [200, 201, 400], 1),
        (lambda t, k: between((t / 100).exp(), np.exp(3), np.exp(3.01)), [300, 301], 1),
        (lambda t, k: table("line", t), [300, 300.5, 301], 0.5),
        (lambda t, k: table("line", 2 * t), [150, 150.25, 150.5], 0.25),
        (lambda t, k: between(table("line", t), 0.5, 2), [300, 300.25, 300.5, 300.75, 301], 0.5),
        (lambda t, k: between(table("curve", t), 0.5, 2), [300, 300.25, 300.5, 300.75, 301], 0.5),
    ],
)
def test_comparisons_with_numbers_are_landed_on(pulse: Pulse, found: list[float], content: float) -> None:
    eq = gains(pulse, tables=(LINES, CURVE))
    assert breaks(eq) == pytest.approx([0, *found, SPAN], rel=1e-14)
    assert gained(eq) == pytest.approx(content, rel=1e-7)


def test_moments_are_found_to_the_last_bit() -> None:
    for moment in (1e-9, 0.1 + 0.2, 1 / 3, 719.9999999):
        assert breaks(gains(lambda t, k, moment=moment: (t > moment).where(1, 0)))[1] == moment
    late = 1.7e9 + 0.3
    assert breaks(gains(lambda t, k: (t > late).where(1, 0)), 1.7e9, 1.7e9 + 1)[1] == late
    assert breaks(gains(lambda t, k: (t > 0).where(1, 0))) == [0, SPAN]
    assert breaks(gains(lambda t, k: (t < SPAN).where(1, 0))) == [0, SPAN]
    assert breaks(gains(lambda t, k: ((t > 300) & (t * 60 > 18000) & (t - 300 > 0)).where(1, 0))) == [0, 300, SPAN]


def test_a_daily_pulse_is_met_every_day() -> None:
    eq = gains(lambda t, k: (t.mod(24) < 0.01).where(100, 0))
    days = np.arange(0.0, SPAN, 24.0)
    assert breaks(eq) == pytest.approx(sorted([*days, *(days + 0.01), SPAN]), rel=1e-13)
    assert gained(eq) == pytest.approx(30, rel=1e-9)
    shifted = gains(lambda t, k: between((t + 7).mod(24), 12, 12.5))
    assert breaks(shifted)[1:5] == pytest.approx([5, 5.5, 17, 29], rel=1e-13)
    assert gained(shifted) == pytest.approx(15, rel=1e-9)


def test_a_sine_of_the_time_is_looked_at_in_many_places() -> None:
    eq = gains(lambda t, k: ((t * (np.pi / 12)).sin() > 0.5).where(1, 0))
    assert len(breaks(eq)) == 2 + 60
    assert gained(eq) == pytest.approx(240, rel=1e-9)


def test_too_many_moments_are_the_users_mistake() -> None:
    for pulse in (lambda t, k: (t.mod(0.01) < 0.005).where(1, 0), lambda t, k: (t.mod(0.02) < 0.005).where(1, 0)):
        with pytest.raises(ValueMistake, match=f"at most {MOST_MOMENTS}") as caught:
            breaks(gains(pulse))
        assert caught.value.key == "states"


@pytest.mark.parametrize(
    ("pulse", "forcing", "found"),
    [
        (lambda t, k, f: between(f, 0.5, 0.501), RAMP, [360, 360.72]),
        (lambda t, k, f: between(f * 10 + t / 720, 5.5, 5.511), RAMP, [360, 360.72]),
        (lambda t, k, f: between(f, 0.5, 2), HILL, [HALF_UP, 360, 720 - HALF_UP]),
    ],
)
def test_comparisons_of_forcings_with_numbers_are_landed_on(pulse: Pulse, forcing: Forcing, found: list[float]) -> None:
    eq = gains(pulse, (forcing,))
    assert breaks(eq) == pytest.approx([0, *found, SPAN], rel=1e-12)
    assert gained(eq) == pytest.approx(found[-1] - found[0], rel=1e-9)


def test_within_a_segment_a_rate_has_the_values_of_that_segment() -> None:
    # a rate that is no number but from 2 to 3 is never asked for there
    k, x0, x, time = names("k x0 x time")
    off = (time <= 2) | (time >= 3)
    rate = off.where(-k * x, (time - 2).sqrt() + (3 - time).sqrt())
    batch = solved(equations("k x0", "x", [x0], [rate]), [[0.5, 1.0]], [2.0, 3.0, 4.0], 1e-9)
    gain = 4 / 3
    expected = [np.exp(-1), np.exp(-1) + gain, (np.exp(-1) + gain) * np.exp(-0.5)]
    assert batch.values[0, 0] == pytest.approx(expected, rel=1e-7)


def test_what_is_observed_at_a_moment_is_what_is_written() -> None:
    k, x0, x, time = names("k x0 x time")
    parts = Parts(observed=[x, (time > 2).where(1, 0)], conditions=[time > 2, time >= 2])
    batch = solved(equations("k x0", "x", [x0], [(time > 2).where(k, 0)], parts), [[1.0, 0.0]], [1.0, 2.0, 3.0])
    assert batch.values[0] == pytest.approx(np.array([[0.0, 0.0, 1.0], [0.0, 0.0, 1.0]]))
    assert batch.conditions[0].tolist() == [[0, 0, 1], [0, 1, 1]]


def test_pulses_that_cannot_be_landed_on_keep_the_steps_short() -> None:
    bell = lambda t, k: (-(((t - 301) / 3) ** 2)).exp()  # noqa: E731
    for pulse, content in ((lambda t, k: between(t - k, 300, 307), 7.0), (bell, 3 * np.sqrt(np.pi))):
        eq = gains(pulse)
        assert driven_by_time(eq)
        assert gained(eq) == pytest.approx(content, rel=0.01)
    batch = solved(gains(lambda t, k: 0 * t + k), [[1.0, 0.0]], [1.0, SPAN])
    assert 1 / LONGEST_PART <= batch.steps[0] < 1.1 / LONGEST_PART


def test_who_is_kept_short() -> None:
    driven = {
        "time": lambda t, k, f: t * k,
        "time against an input": lambda t, k, f: (t > k).where(1, 0),
        "forcing against an input": lambda t, k, f: (f > k).where(1, 0),
        "time in a branch": lambda t, k, f: (t > 300).where(t, 0),
    }
    free = {
        "nothing": lambda t, k, f: k,
        "a forcing": lambda t, k, f: (f - k).max(0),
        "moments": lambda t, k, f: between(t, 300, 310) * k + (f > 0.5).where(k, 0) * (t.mod(24) < 3).where(1, k),
    }
    assert all(driven_by_time(gains(rate, (RAMP,))) for rate in driven.values())
    assert not any(driven_by_time(gains(rate, (RAMP,))) for rate in free.values())


def test_which_inputs_the_moments_of_a_pulse_depend_on() -> None:
    k, x, time, lag = names("k x time lag")
    inputs, states = ("k", "x0", "lag"), ("x",)

    def named(rate: Ex) -> tuple[str, ...]:
        return not_landed_on(rate.graph, rate.node, states, inputs)

    assert named(between(time - lag, 0, 5)) == ("lag",)
    assert named((time.mod(lag) < 5).where(k, 0)) == ("lag",)
    assert named((time > lag).where((1 - time / lag).max(0) * k, 0)) == ()  # once and for all
    assert named(((time > 300) & (time < lag)).where(k, 0)) == ()  # its beginning is landed on
    assert named(((time - lag) / k).abs().min(1)) == ("k", "lag")
    assert named((time > 300).where(k, lag)) == ()
    assert named((x > time - lag).where(k, 0)) == ()
    assert named(-(((time - lag) / k) ** 2)) == ()


def test_the_scale_of_a_state_that_a_pulse_wakes() -> None:
    x0, x, time = names("x0 x time")
    eq = equations("k x0", "x", [x0 * 0], [between(time, 300, 310) - 0.5 * x])
    scales, fell_back = pilot_scales(compiled(eq), np.ones((16, 2)), np.array([SPAN]), 0.0, settings(1))
    assert scales == pytest.approx([2 * (1 - np.exp(-5.0))], rel=1e-3)
    assert fell_back == ()

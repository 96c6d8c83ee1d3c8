"""The size of every state, found by a pilot."""

from __future__ import annotations

import numpy as np
import pytest

from tests.solver_models import compiled, equations, names, one_state, settings
from uq.solve.scales import pilot_scales
from uq.solve.solve import evaluate_starts

TIMES = np.linspace(0.0, 10.0, 11)


def test_a_scale_is_the_median_of_the_largest_size() -> None:
    x = np.column_stack([np.full(101, 0.5), np.linspace(1.0, 3.0, 101)])
    scales, fell_back = pilot_scales(compiled(one_state(lambda x, k, t: -k * x)), x, TIMES, 0.0, settings(1))
    assert scales == pytest.approx([2.0])
    assert fell_back == ()


def test_states_that_start_at_nothing_get_the_size_that_they_reach() -> None:
    # a chain: the second state starts at 0 with a rate, the third with neither; sizes are 12 orders of magnitude apart
    k, x0, x, y, z = names("k x0 x y z")
    eq = equations("k x0", "x y z", [x0, x0 * 0, x0 * 0], [-k * x, k * x * 1e-6 - y, y * 1e-6 - z])
    rows = np.column_stack([np.full(16, 1.0), np.full(16, 2.0)])
    scales, fell_back = pilot_scales(compiled(eq), rows, TIMES, 0.0, settings(3))
    # with k = 1: y = 2e-6 t exp(-t), z = 1e-12 t^2 exp(-t), largest at 1 and 2
    assert scales == pytest.approx([2.0, 2e-6 * np.exp(-1.0), 1e-12 * 4 * np.exp(-2.0)], rel=0.05)
    assert fell_back == ()


def test_a_state_that_stays_at_nothing_falls_back_to_one() -> None:
    k, x0, still, x = names("k x0 still x")
    eq = equations("k x0", "still x", [x0 * 0, x0], [still * k, -k * x])
    scales, fell_back = pilot_scales(compiled(eq), np.ones((16, 2)), TIMES, 0.0, settings(2))
    assert scales.tolist() == [1.0, 1.0]
    assert fell_back == ("still",)


def test_scales_are_found_whatever_is_negligible() -> None:
    x = np.column_stack([np.full(101, 0.5), np.linspace(1.0, 3.0, 101)])
    given = settings(1, negligible=[1e-3])
    scales, _ = pilot_scales(compiled(one_state(lambda x, k, t: -k * x)), x, TIMES, 0.0, given)
    assert scales == pytest.approx([2.0])


def test_nothing_anywhere() -> None:
    scales, fell_back = pilot_scales(compiled(one_state(lambda x, k, t: k * x)), np.zeros((16, 2)), TIMES, 0.0, settings(1))
    assert scales.tolist() == [1.0]
    assert fell_back == ("x",)


def test_members_that_fail_do_not_count() -> None:
    rows = np.column_stack([np.ones(32), np.full(32, 0.01)])
    rows[::4, 1] = 5.0  # these blow up
    scales, _ = pilot_scales(compiled(one_state(lambda x, k, t: x**2)), rows, TIMES, 0.0, settings(1))
    assert scales == pytest.approx([0.01 / (1 - 0.1)], rel=1e-4)


def test_if_all_fail_what_they_were_before_counts() -> None:
    rows = np.column_stack([np.ones(32), np.full(32, 5.0)])
    scales, _ = pilot_scales(compiled(one_state(lambda x, k, t: x**2)), rows, TIMES, 0.0, settings(1))
    assert scales == pytest.approx([5.0 / (1 - 5.0 * 0.1)], rel=1e-4)  # the last horizon before the pole at 0.2


def test_uncontrolled_error_never_becomes_a_scale() -> None:
    # a quick state at the end of a chain starts at 0 with rate 0: its error is not controlled before its size is known
    k, x0, x, y, z = names("k x0 x y z")
    for quick in (10.0, 30.0, 100.0, 1000.0):
        eq = equations("k x0", "x y z", [x0, x0 * 0, x0 * 0], [-k * x, k * x - y * 0.5, y * 0.5 - z * quick])
        scales, fell_back = pilot_scales(compiled(eq), np.ones((16, 2)), TIMES, 0.0, settings(3))
        # y is largest at 2 ln 2, where it is 1/2; z follows y/2 at `quick`
        assert scales[2] == pytest.approx(0.25 / quick, rel=0.1)
        assert fell_back == ()


def test_a_state_that_wakes_late_gets_its_size() -> None:
    k, x0, x, z, time = names("k x0 x z time")
    eq = equations("k x0", "x z", [x0, x0 * 0], [-k * x * 0.1, (time - 5).max(time * 0) * 100 - z * 200])
    scales, _ = pilot_scales(compiled(eq), np.ones((16, 2)), TIMES, 0.0, settings(2))
    assert scales[1] == pytest.approx((5 * 100 - 0.5) / 200, rel=0.02)


def test_members_in_which_a_state_is_nothing_do_not_set_its_scale() -> None:
    x = np.column_stack([np.full(32, 0.5), np.where(np.arange(32) % 3 == 0, 1e-9, 0.0)])
    scales, fell_back = pilot_scales(compiled(one_state(lambda x, k, t: -k * x)), x, TIMES, 0.0, settings(1))
    assert scales == pytest.approx([1e-9])
    assert fell_back == ()


def test_starts_that_are_no_numbers_do_not_hurt() -> None:
    rows = np.column_stack([np.ones(16), np.linspace(-1, 1, 16)])
    scales, _ = pilot_scales(compiled(one_state(lambda x, k, t: -x, lambda x0: x0.ln() + 3)), rows, TIMES, 0.0, settings(1))
    assert 0 < scales[0] < 3


def test_a_pilot_is_reproducible() -> None:
    rows = np.random.default_rng(1).uniform(0.5, 1.5, (256, 2))
    found = [pilot_scales(compiled(one_state(lambda x, k, t: k * x * (1 - x))), rows, TIMES, 0.0, settings(1))[0] for _ in range(2)]
    assert found[0].tobytes() == found[1].tobytes()


def test_starts() -> None:
    k, x0, x, y = names("k x0 x y")
    code = compiled(equations("k x0", "x y", [x0 * 2, k + x0], [k * x, x - y]))
    rows = np.random.default_rng(2).uniform(0, 1, (13, 2))
    assert np.array_equal(evaluate_starts(code, rows), np.column_stack([rows[:, 1] * 2, rows.sum(axis=1)]))

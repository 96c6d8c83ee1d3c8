"""The size of every state, found by a pilot."""

from __future__ import annotations

import numpy as np
import pytest

from tests.solver_models import compiled, equations, names, one_state, settings
from uq.solve.scales import first_rates, pilot_scales
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


def test_nothing_anywhere() -> None:
    scales, fell_back = pilot_scales(compiled(one_state(lambda x, k, t: k * x)), np.zeros((16, 2)), TIMES, 0.0, settings(1))
    assert scales.tolist() == [1.0]
    assert fell_back == ("x",)


def test_members_that_fail_do_not_count() -> None:
    rows = np.column_stack([np.ones(32), np.full(32, 0.01)])
    rows[::4, 1] = 5.0  # these blow up
    scales, _ = pilot_scales(compiled(one_state(lambda x, k, t: x**2)), rows, TIMES, 0.0, settings(1))
    assert scales == pytest.approx([0.01 / (1 - 0.1)], rel=1e-4)


def test_if_all_fail_the_starts_count() -> None:
    rows = np.column_stack([np.ones(32), np.full(32, 5.0)])
    scales, _ = pilot_scales(compiled(one_state(lambda x, k, t: x**2)), rows, TIMES, 0.0, settings(1))
    assert scales.tolist() == [5.0]


def test_starts_that_are_no_numbers_do_not_hurt() -> None:
    rows = np.column_stack([np.ones(16), np.linspace(-1, 1, 16)])
    scales, _ = pilot_scales(compiled(one_state(lambda x, k, t: -x, lambda x0: x0.ln() + 3)), rows, TIMES, 0.0, settings(1))
    assert 0 < scales[0] < 3


def test_a_pilot_is_reproducible() -> None:
    rows = np.random.default_rng(1).uniform(0.5, 1.5, (256, 2))
    found = [pilot_scales(compiled(one_state(lambda x, k, t: k * x * (1 - x))), rows, TIMES, 0.0, settings(1))[0] for _ in range(2)]
    assert found[0].tobytes() == found[1].tobytes()


def test_starts_and_first_rates() -> None:
    k, x0, x, y = names("k x0 x y")
    code = compiled(equations("k x0", "x y", [x0 * 2, k + x0], [k * x, x - y]))
    rows = np.random.default_rng(2).uniform(0, 1, (13, 2))
    starts = evaluate_starts(code, rows)
    assert np.array_equal(starts, np.column_stack([rows[:, 1] * 2, rows.sum(axis=1)]))
    rates = first_rates(code, rows, 0.0, settings(2))
    assert rates == pytest.approx(np.column_stack([rows[:, 0] * starts[:, 0], starts[:, 0] - starts[:, 1]]))

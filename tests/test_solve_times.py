"""The time itself: spans of any length, starts far from zero, first steps that are never nothing."""

from __future__ import annotations

import numpy as np
import pytest

from tests.solver_models import equations, names, one_state, solved
from uq.solve.batch import Status


@pytest.mark.parametrize("span", [1e-300, 1e-200, 1e-15, 1.0, 1e15, 1e290])
def test_the_unit_of_time_does_not_matter(span: float) -> None:
    batch = solved(one_state(lambda x, k, t: -k * x), [[1 / span, 1.0]], np.array([0.5, 1.0]) * span)
    assert batch.status[0] == Status.ok
    assert batch.values[0, 0] == pytest.approx(np.exp([-0.5, -1.0]), rel=1e-5)


def test_a_first_rate_beyond_all_measure_gets_a_first_step() -> None:
    # its square is beyond the largest number, which says nothing of the step
    batch = solved(one_state(lambda x, k, t: 0 * x + k), [[1e200, 0.0]], [1.0])
    assert batch.status[0] == Status.ok
    assert batch.values[0, 0, 0] == pytest.approx(1e200)


@pytest.mark.parametrize("start", [0.0, 1e6, 1e8, 1.7e9])
def test_a_clock_that_began_long_ago(start: float) -> None:
    # x' = 1 counts the time, beside an oscillation that keeps the steps near the rounding of the time
    w, x0, u, v = names("w x0 u v")
    eq = equations("w x0", "x u v", [x0, x0 + 1, x0], [1 + 0 * w, w * v, -w * u])
    batch = solved(eq, [[300.0, 0.0]], [start + 10.0], start=start)
    assert batch.status[0] == Status.ok
    # the sum of the steps is the span; each product is rounded to 10
    assert batch.values[0, 0, 0] == pytest.approx(10.0, abs=1e-12 * batch.steps[0])

"""Numbers taken from courses, and outcomes made of them."""

from __future__ import annotations

import numpy as np
import pytest

from tests.solver_models import Ex, Parts, equations, names, solved
from uq.model.code import Course
from uq.solve.batch import Status
from uq.solve.courses import take

TIMES = np.array([0.0, 1.0, 2.0, 4.0])
VALUES = np.array([[[0.0, 2.0, -1.0, 3.0]], [[1.0, 1.0, 1.0, 1.0]]])


@pytest.mark.parametrize(
    ("kind", "start", "stop", "expected"),
    [
        ("highest", 0.0, 4.0, [3.0, 1.0]),
        ("highest", 0.0, 2.0, [2.0, 1.0]),
        ("lowest", 0.0, 4.0, [-1.0, 1.0]),
        ("lowest", 0.0, 1.0, [0.0, 1.0]),
        ("final", 0.0, 4.0, [3.0, 1.0]),
        ("final", 0.0, 2.0, [-1.0, 1.0]),
        ("value_at", 1.0, 1.0, [2.0, 1.0]),
        ("integral", 0.0, 4.0, [1.0 + 0.5 + 2.0, 4.0]),
        ("integral", 1.0, 2.0, [0.5, 1.0]),
        ("integral", 1.0, 1.0, [0.0, 0.0]),
        ("average", 0.0, 4.0, [3.5 / 4, 1.0]),
        ("average", 1.0, 4.0, [2.5 / 3, 1.0]),
        ("average", 1.0, 1.0, [2.0, 1.0]),
        ("highest", 0.5, 0.9, [np.nan, np.nan]),
        ("integral", 0.5, 2.5, [0.5, 1.0]),
    ],
)
def test_courses(kind, start, stop, expected) -> None:
    assert take(Course(kind, 0, start, stop), VALUES, TIMES) == pytest.approx(expected, nan_ok=True, rel=1e-15)


def test_a_value_at_a_time_that_is_not_solved_is_a_defect() -> None:
    with pytest.raises(ValueError, match="solved time"):
        take(Course("value_at", 0, 1.5, 1.5), VALUES, TIMES)


@pytest.mark.parametrize("kind", ["average", "integral", "highest"])
def test_a_course_has_the_same_bits_in_any_batch(kind) -> None:
    values = np.random.default_rng(8).lognormal(0, 3, (57, 2, 501))
    times = np.sort(np.random.default_rng(9).uniform(0, 10, 501))
    course = Course(kind, 1, times[3], times[-5])
    whole = take(course, values, times)
    for size in (1, 2, 5, 16):
        parts = [take(course, values[first : first + size], times) for first in range(0, 57, size)]
        assert np.concatenate(parts).tobytes() == whole.tobytes()


def test_a_course_of_nan_is_nan() -> None:
    values = np.array([[[0.0, np.nan, 1.0, 1.0]]])
    for kind in ("highest", "lowest", "average", "integral"):
        assert np.isnan(take(Course(kind, 0, 0.0, 4.0), values, TIMES)[0])


def test_outcomes_of_courses_and_inputs() -> None:
    k, x0, x = names("k x0 x")
    course = [Ex(k.graph, k.graph.name(f"course:{i}")) for i in range(3)]
    courses = [Course("highest", 0, 0.0, 2.0), Course("integral", 0, 0.0, 2.0), Course("value_at", 0, 1.0, 1.0)]
    outcomes = [course[0] * 2, course[1] / course[2] + k, (course[0] > 2.5) & (k < 2), k.exp()]
    eq = equations("k x0", "x", [x0], [-k * x], Parts(courses=courses, outcomes=[*outcomes[:2], outcomes[2].where(1, 0), outcomes[3]]))
    rows, times = np.array([[1.0, 2.0], [1.5, 3.0], [0.5, 1.0]]), np.linspace(0, 2, 201)
    batch = solved(eq, rows, times, 1e-9)
    for row, (rate, start) in enumerate(rows):
        area = start * (1 - np.exp(-2 * rate)) / rate
        expected = [2 * start, area / (start * np.exp(-rate)) + rate, float(start > 2.5), np.exp(rate)]
        assert batch.outcomes[row] == pytest.approx(expected, rel=1e-4)


def test_a_failed_member_has_no_outcome() -> None:
    k, x0, x = names("k x0 x")
    outcome = Ex(k.graph, k.graph.name("course:0"))
    parts = Parts(courses=[Course("highest", 0, 0.0, 0.1)], outcomes=[outcome, k])
    batch = solved(equations("k x0", "x", [x0], [k * x**2], parts), [[1.0, 2.0], [1.0, 0.1]], [0.0, 0.1, 1.0])
    assert batch.status.tolist() == [Status.blew_up, Status.ok]
    assert np.isnan(batch.outcomes[0]).all()
    assert batch.outcomes[1] == pytest.approx([0.1 / (1 - 0.01), 1.0], rel=1e-6)


def test_outcomes_of_any_number_of_members() -> None:
    k, x0, x = names("k x0 x")
    eq = equations("k x0", "x", [x0], [-k * x], Parts(outcomes=[k + x0]))
    for members in (1, 7, 8, 9, 20):
        rows = np.random.default_rng(members).uniform(0, 1, (members, 2))
        assert np.array_equal(solved(eq, rows, [1.0]).outcomes[:, 0], rows.sum(axis=1))

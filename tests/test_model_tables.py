"""Tables of points: their values against other implementations, their ends, what a member makes of them."""

from __future__ import annotations

import numpy as np
import pytest
from scipy.interpolate import PchipInterpolator

from tests.solver_models import Ex, Parts, compiled, equations, names, solved, table, table_slope
from uq.errors import ValueMistake
from uq.lang.derivative import derivative
from uq.model.code import LARGEST_TABLE, Table
from uq.model.monotone import cubic, shifted, slopes
from uq.solve.batch import Status
from uq.solve.solve import evaluate_starts

RNG = np.random.default_rng(11)


def made(points: int, interpolation: str, outside: str = "refuse", offset: float = 0.0) -> Table:
    """A table with flat, rising and falling pieces of uneven length."""
    at = np.cumsum(RNG.uniform(0.01, 2.0, points)) - points / 2
    values = np.where(RNG.random(points) < 0.2, 1.0, RNG.normal(size=points)) + offset
    return Table("t", tuple(at.tolist()), tuple(values.tolist()), interpolation, outside)  # type: ignore[arg-type]


def evaluate(given: Table, x: np.ndarray, what=table) -> np.ndarray:
    """Values (or slopes) of a table as machine code."""
    (a,) = names("a")
    eq = equations("a", "x", [what(given.name, a)], [a * 0], Parts(tables=(given,)))
    return evaluate_starts(compiled(eq), x[:, None])[:, 0]


def inside(given: Table, count: int = 400) -> np.ndarray:
    return np.concatenate([given.points, RNG.uniform(given.points[0], given.points[-1], count)])


@pytest.mark.parametrize("points", [2, 3, 4, 17, 100])
@pytest.mark.parametrize("offset", [0.0, 1e6])
def test_a_linear_table_is_that_of_numpy(points: int, offset: float) -> None:
    given = made(points, "linear", offset=offset)
    x = inside(given)
    expected = np.interp(x, given.points, given.values)
    assert np.abs(evaluate(given, x) - expected).max() <= 4e-16 * (offset + 10)


@pytest.mark.parametrize("points", [2, 3, 4, 17, 100])
def test_a_smooth_table_is_the_monotone_cubic_of_scipy(points: int) -> None:
    given = made(points, "smooth")
    x = inside(given)
    other = PchipInterpolator(given.points, given.values)
    assert np.abs(evaluate(given, x) - other(x)).max() < 1e-13
    assert evaluate(given, x, table_slope) == pytest.approx(other.derivative()(x), rel=1e-10, abs=1e-10)


@pytest.mark.parametrize("kind", ["linear", "smooth"])
def test_a_table_has_its_values_at_its_points_bit_by_bit(kind: str) -> None:
    given = made(50, kind)
    assert evaluate(given, np.array(given.points)).tolist() == list(given.values)


@pytest.mark.parametrize("kind", ["linear", "smooth"])
def test_outside_of_its_points(kind: str) -> None:
    x = np.array([-np.inf, -1e300, -1.0, np.nextafter(0.0, -1), np.nextafter(2.0, 3), 1e300, np.inf, np.nan])
    refuse, hold = (Table("t", (0.0, 1.0, 2.0), (3.0, 4.0, 8.0), kind, outside) for outside in ("refuse", "hold"))  # type: ignore[arg-type]
    assert np.isnan(evaluate(refuse, x)).all()
    assert np.isnan(evaluate(refuse, x, table_slope)).all()
    assert evaluate(hold, x) == pytest.approx([3, 3, 3, 3, 8, 8, 8, np.nan], nan_ok=True, abs=0)
    assert evaluate(hold, x, table_slope)[:7].tolist() == [0.0] * 7


def test_the_slope_of_a_linear_table_is_that_of_the_piece_behind_a_point() -> None:
    given = Table("t", (0.0, 1.0, 3.0), (0.0, 5.0, 3.0))
    assert evaluate(given, np.array([0.0, 0.5, 1.0, 2.0, 3.0]), table_slope).tolist() == [5.0, 5.0, -1.0, -1.0, -1.0]


def test_a_smooth_table_never_leaves_the_values_at_the_ends_of_a_piece() -> None:
    given = made(100, "smooth")
    for (a, u), (b, v) in zip(
        list(zip(given.points, given.values, strict=True))[:-1], list(zip(given.points, given.values, strict=True))[1:], strict=True
    ):
        found = evaluate(given, np.linspace(a, b, 33))
        assert np.all(np.diff(found) * (v - u) >= -1e-14)
        assert found.min() >= min(u, v) - 1e-14
        assert found.max() <= max(u, v) + 1e-14


def test_slopes_lie_in_the_region_of_fritsch_and_carlson() -> None:
    # both ends within [0, 3] times the secant are enough for a monotone piece (Fritsch, Carlson 1980, lemma 2)
    given = made(200, "smooth")
    secants = np.diff(given.values) / np.diff(given.points)
    ends = np.array(slopes(given.points, given.values))
    for side in (ends[:-1], ends[1:]):
        assert np.all(side * secants >= 0)
        assert np.all(np.abs(side) <= 3 * np.abs(secants) * (1 + 1e-12))


def test_a_cubic_written_around_another_place_is_the_same() -> None:
    c = cubic(2.0, (1.0, 5.0), (0.5, 3.0))
    assert np.polyval(c[::-1], 2.0) == pytest.approx(5.0)
    assert np.polyval(np.polyder(c[::-1]), 2.0) == pytest.approx(3.0)
    d = np.linspace(-1, 1, 5)
    assert np.polyval(shifted(c, 0.7)[::-1], d) == pytest.approx(np.polyval(c[::-1], d + 0.7))


@pytest.mark.parametrize("method", ["explicit54", "explicit853"])
def test_a_rate_with_a_table(method: str) -> None:
    # x' = t(x) with t(x) = x on [0, 1], 1 beyond: e^t until x = 1, then a straight line
    _, x0, x = names("k x0 x")
    given = Table("t", (0.0, 1.0, 9.0), (0.0, 1.0, 1.0))
    eq = equations("k x0", "x", [x0], [table("t", x)], Parts(tables=[given]))
    batch = solved(eq, [[1.0, 0.5], [1.0, 0.1]], np.linspace(0, 3, 7), 1e-9, method=method)
    t = np.linspace(0, 3, 7)
    for row, start in enumerate((0.5, 0.1)):
        corner = -np.log(start)
        assert batch.values[row, 0] == pytest.approx(np.where(t < corner, start * np.exp(t), 1 + t - corner), abs=1e-7)


def test_a_member_that_leaves_a_table_is_not_finite_unless_it_is_held() -> None:
    _, x0, x = names("k x0 x")
    for outside, status in (("refuse", Status.not_finite), ("hold", Status.ok)):
        given = Table("t", (0.0, 2.0), (1.0, 1.0), "linear", outside)  # type: ignore[arg-type]
        eq = equations("k x0", "x", [x0], [table("t", x)], Parts(tables=[given]))
        batch = solved(eq, [[1.0, 0.5]], [1.0, 3.0])
        assert batch.status[0] == status
        assert batch.values[0, 0, 0] == pytest.approx(1.5)
    assert batch.values[0, 0, 1] == pytest.approx(3.5)


def test_a_table_of_inputs_alone_is_worked_out_once_per_member() -> None:
    k, x0, x = names("k x0 x")
    eq = equations("k x0", "x", [x0], [-table("t", k) * x], Parts(tables=[Table("t", (0.0, 2.0), (1.0, 3.0))]))
    assert compiled(eq).layout.hoisted == 1
    assert solved(eq, [[0.5, 2.0]], [1.0], 1e-9).values[0, 0, 0] == pytest.approx(2 * np.exp(-1.5), rel=1e-7)


def test_the_derivative_of_the_language_is_the_slope() -> None:
    (a,) = names("a")
    given = made(10, "smooth")
    node = Ex(a.graph, derivative(a.graph, table("t", a * 2).node, "a"))
    eq = equations("a", "x", [node], [a * 0], Parts(tables=(given,)))
    x = inside(given) / 2
    found = evaluate_starts(compiled(eq), x[:, None])[:, 0]
    assert found == pytest.approx(2 * evaluate(given, 2 * x, table_slope), rel=1e-14)


@pytest.mark.parametrize(
    ("points", "values", "what"),
    [
        ((0.0,), (1.0,), "at least 2"),
        ((0.0, 1.0), (1.0,), "as many values"),
        ((0.0, 0.0), (1.0, 2.0), "rise"),
        ((1.0, 0.0), (1.0, 2.0), "rise"),
        ((0.0, np.inf), (1.0, 2.0), "finite"),
        ((0.0, 1.0), (1.0, np.nan), "finite"),
        (tuple(np.arange(LARGEST_TABLE + 1.0)), (0.0,) * (LARGEST_TABLE + 1), f"at most {LARGEST_TABLE}"),
    ],
)
def test_a_table_that_cannot_stand_is_the_users_mistake(points, values, what) -> None:
    with pytest.raises(ValueMistake, match=what) as caught:
        Table("head", points, values)
    assert caught.value.key == "tables.head.rows"

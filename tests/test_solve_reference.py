"""Solutions against closed forms and a tight independent solver; how the error follows the tolerance."""

from __future__ import annotations

import numpy as np
import pytest
from scipy.integrate import solve_ivp
from scipy.special import ellipk

from tests.solver_models import Parts, equations, names, one_state, predator_prey, predator_prey_inputs, solved

TIMES = np.linspace(0.0, 5.0, 26)


def tight(rates, start, times, *args):
    """An independent solution, two orders more exact than what it judges."""
    return solve_ivp(rates, (0.0, times[-1]), start, method="DOP853", t_eval=times, rtol=1e-12, atol=1e-13, args=args).y


def test_decay() -> None:
    x = np.random.default_rng(1).uniform([0.1, 0.5], [3.0, 5.0], (50, 2))
    batch = solved(one_state(lambda x, k, t: -k * x), x, TIMES, 1e-9)
    exact = x[:, 1:] * np.exp(-x[:, :1] * TIMES)
    assert np.abs(batch.values[:, 0] - exact).max() < 1e-8
    assert np.all(batch.status == 0)
    assert np.all(batch.end_time == 5.0)
    assert np.array_equal(batch.largest[:, 0], x[:, 1])


def test_logistic_growth() -> None:
    x = np.random.default_rng(2).uniform([0.5, 0.01], [2.0, 0.5], (50, 2))
    batch = solved(one_state(lambda x, k, t: k * x * (1 - x)), x, TIMES, 1e-9)
    k, start = x[:, :1], x[:, 1:]
    assert np.abs(batch.values[:, 0] - 1 / (1 + (1 / start - 1) * np.exp(-k * TIMES))).max() < 5e-8


def test_a_rate_that_depends_on_time_alone() -> None:
    batch = solved(one_state(lambda x, k, t: k * t.cos()), [[2.0, 0.5]], TIMES, 1e-9)
    assert np.abs(batch.values[0, 0] - (0.5 + 2 * np.sin(TIMES))).max() < 5e-8


@pytest.mark.parametrize("degrees", [10.0, 45.0, 90.0, 150.0, 179.0])
def test_pendulum_returns_after_its_period(degrees: float) -> None:
    # T = 4 sqrt(L/g) K(sin^2(theta0/2)), complete elliptic integral (textbook; DLMF 22.19.2)
    g, angle0, angle, speed = names("g angle0 angle speed")
    eq = equations("g angle0", "angle speed", [angle0, 0 * angle0], [speed, -g * angle.sin()])
    theta, g_value = np.radians(degrees), 9.80665
    period = 4 / np.sqrt(g_value) * ellipk(np.sin(theta / 2) ** 2)
    batch = solved(eq, [[g_value, theta]], [period / 2, period], 1e-11)
    assert batch.values[0, 0] == pytest.approx([-theta, theta], abs=1e-6)


def test_predator_prey_keeps_its_invariant() -> None:
    # H = d x - c ln x + b y - a ln y is constant along solutions (Volterra)
    x = predator_prey_inputs(40)
    values = solved(predator_prey(), x, np.linspace(0, 20, 41), 1e-10).values
    a, b, c, d = (x[:, k, None] for k in range(4))
    h = d * values[:, 0] - c * np.log(values[:, 0]) + b * values[:, 1] - a * np.log(values[:, 1])
    assert np.abs(h - h[:, :1]).max() < 1e-7


def test_a_chaotic_model_over_a_short_time() -> None:
    s, r, b, x, y, z = names("s r b x y z")
    eq = equations("s r b", "x y z", [s * 0 + 1, s * 0 + 1, s * 0 + 20], [s * (y - x), x * (r - z) - y, x * y - b * z])
    row, times = np.array([10.0, 28.0, 8.0 / 3.0]), np.linspace(0, 2, 21)

    def rates(t, u, s, r, b):
        return [s * (u[1] - u[0]), u[0] * (r - u[2]) - u[1], u[0] * u[1] - b * u[2]]

    batch = solved(eq, row, times, 1e-11)
    assert np.abs(batch.values[0] - tight(rates, [1.0, 1.0, 20.0], times, *row)).max() < 1e-7


def test_the_error_follows_the_tolerance() -> None:
    x, times = predator_prey_inputs(10), np.linspace(0, 20, 41)

    def rates(t, u, a, b, c, d, *_):
        return [a * u[0] - b * u[0] * u[1], -c * u[1] + d * u[0] * u[1]]

    exact = np.array([tight(rates, row[4:], times, *row) for row in x])
    accuracies = 10.0 ** -np.arange(4, 11)
    errors = np.array([np.abs(solved(predator_prey(), x, times, a, scales=[20, 20]).values - exact).max() for a in accuracies])
    assert np.all(errors < 200 * 20 * accuracies)
    slope = np.polyfit(np.log10(accuracies), np.log10(errors), 1)[0]
    assert slope == pytest.approx(1.0, abs=0.15)


def test_a_finer_accuracy_costs_as_many_steps_as_the_order_says() -> None:
    x = predator_prey_inputs(10)
    steps = [solved(predator_prey(), x, [20.0], a, scales=[20, 20]).steps.mean() for a in (1e-6, 1e-11)]
    assert np.log10(steps[1] / steps[0]) == pytest.approx(5 / 5, abs=0.25)


@pytest.mark.parametrize("method", ["explicit54", "explicit853"])
@pytest.mark.parametrize("accuracy", [1e-6, 1e-8, 1e-10, 1e-12])
def test_a_satellite_comes_back_to_where_it_was(accuracy: float, method: str) -> None:
    # Two bodies, eccentricity 0.5, class D of the test set of Hull, Enright, Fellen, Sedgwick, SIAM J. Numer. Anal. 9 (1972) 603-637;
    # the period is 2 pi, the energy -1/2.
    e, x, y, u, v = names("e x y u v")
    r3 = (x * x + y * y) ** 1.5
    eq = equations("e", "x y u v", [1 - e, 0 * e, 0 * e, ((1 + e) / (1 - e)).sqrt()], [u, v, -x / r3, -y / r3])
    batch = solved(eq, [[0.5]], np.linspace(0, 2 * np.pi, 33), accuracy, method=method)
    found = batch.values[0]
    assert np.abs(found[:, -1] - found[:, 0]).max() < 300 * accuracy
    energy = (found[2] ** 2 + found[3] ** 2) / 2 - 1 / np.hypot(found[0], found[1])
    assert np.abs(energy + 0.5).max() < 100 * accuracy


@pytest.mark.parametrize("accuracy", [1e-6, 1e-8, 1e-10, 1e-12])
def test_the_8_5_3_pair_on_predator_prey(accuracy: float) -> None:
    x, times = predator_prey_inputs(20), np.linspace(0, 20, 101)

    def rates(t, u, a, b, c, d, *_):
        return [a * u[0] - b * u[0] * u[1], -c * u[1] + d * u[0] * u[1]]

    exact = np.array([tight(rates, row[4:], times, *row) for row in x])
    found = solved(predator_prey(), x, times, accuracy, method="explicit853", scales=[20, 20]).values
    # in the middle of the members: at 1e-6 an odd one has ten times as much, as it has with other programs of this pair
    assert np.median(np.abs(found - exact).max(axis=(1, 2))) < 60 * 20 * accuracy


def test_a_finer_accuracy_costs_the_8_5_3_pair_as_many_steps_as_its_order_says() -> None:
    x = predator_prey_inputs(10)
    steps = [solved(predator_prey(), x, [20.0], a, method="explicit853", scales=[20, 20]).steps.mean() for a in (1e-8, 1e-12)]
    assert np.log10(steps[1] / steps[0]) == pytest.approx(4 / 8, abs=0.1)


def test_negligible_replaces_the_absolute_tolerance_of_its_state() -> None:
    k, x0, x, y = names("k x0 x y")
    eq = equations("k x0", "x y", [x0, x0], [-k * x, -3 * k * y])
    usual = solved(eq, [[1.0, 2.0]], TIMES, 1e-6, scales=[2.0, 5.0])
    same = solved(eq, [[1.0, 2.0]], TIMES, 1e-6, scales=[2.0, 7.0], negligible=[np.nan, 5e-6])
    assert same.values.tobytes() == usual.values.tobytes()
    nothing_said = solved(eq, [[1.0, 2.0]], TIMES, 1e-6, scales=[2.0, 5.0], negligible=[np.nan, np.nan])
    assert nothing_said.values.tobytes() == usual.values.tobytes()
    loose = solved(eq, [[1.0, 2.0]], TIMES, 1e-6, scales=[2.0, 5.0], negligible=[10.0, 10.0])
    assert loose.steps[0] < usual.steps[0] / 2


def test_tolerances_are_per_state() -> None:
    # two copies of a decay, one in units a million times as small: with scales in its own units it takes the same steps
    k, x0, x, y = names("k x0 x y")
    eq = equations("k x0", "x y", [x0, x0 * 1e-6], [-k * x, -k * y])
    same = solved(eq, [[1.0, 2.0]], TIMES, scales=[1.0, 1e-6])
    loose = solved(eq, [[1.0, 2.0]], TIMES, scales=[1.0, 1.0])
    assert same.values[0, 1] == pytest.approx(1e-6 * same.values[0, 0], rel=1e-12)
    assert loose.steps[0] <= same.steps[0]


@pytest.mark.parametrize("method", ["explicit54", "explicit853"])
@pytest.mark.parametrize("states", [10, 50])
def test_many_states(states: int, method: str) -> None:
    # a chain of tanks: the amount in the n-th follows the Poisson law exp(-kt) (kt)^n / n!
    leaves = names("k x0 " + " ".join(f"s{i}" for i in range(states)))
    k, x0, x = leaves[0], leaves[1], leaves[2:]
    rates = [k * (x[i - 1] - x[i]) if i else -k * x[0] for i in range(states)]
    eq = equations("k x0", " ".join(f"s{i}" for i in range(states)), [x0, *[x0 * 0] * (states - 1)], rates)
    times = np.array([0.0, 1.0, 4.0])
    batch = solved(eq, [[1.5, 2.0], [0.7, 1.0]], times, 1e-9, method=method)
    for row, (rate, amount) in enumerate(((1.5, 2.0), (0.7, 1.0))):
        law = np.cumprod(np.vstack([np.exp(-rate * times), *[rate * times / n for n in range(1, states)]]), axis=0)
        assert np.abs(batch.values[row] - amount * law).max() < 1e-8


def test_no_inputs_at_all() -> None:
    (x,) = names("x")
    eq = equations("", "x", [x * 0 + 1.0], [-1 * x])
    eq = type(eq)(eq.graph, (), ("x",), (eq.graph.number(1.0),), eq.rates, (), eq.observed)
    batch = solved(eq, np.zeros((3, 0)), [1.0], 1e-9)
    assert batch.values[:, 0, 0] == pytest.approx(np.exp(-1.0), rel=1e-8)


def test_the_start_may_be_an_output_time_and_the_only_one() -> None:
    eq = one_state(lambda x, k, t: -k * x)
    assert solved(eq, [[1.0, 3.0]], [0.0, 1.0]).values[0, 0, 0] == 3.0
    alone = solved(eq, [[1.0, 3.0]], [0.0])
    assert alone.values[0, 0, 0] == 3.0
    assert (alone.status[0], alone.end_time[0], alone.steps[0]) == (0, 0.0, 0)
    later = solved(eq, [[1.0, 3.0]], [-1.0, 1.0], start=-2.0)
    assert later.values[0, 0] == pytest.approx(3 * np.exp([-1.0, -3.0]), rel=1e-5)


def test_output_times_do_not_change_the_steps() -> None:
    x = predator_prey_inputs(20)
    dense, sparse = (solved(predator_prey(), x, t) for t in (np.linspace(0, 20, 2001), np.array([20.0])))
    assert np.array_equal(dense.steps, sparse.steps)
    assert np.array_equal(dense.values[:, :, -1], sparse.values[:, :, -1])


def test_no_members() -> None:
    batch = solved(one_state(lambda x, k, t: -k * x), np.zeros((0, 2)), TIMES)
    assert batch.values.shape == (0, 1, 26)


def test_observed_terms_and_conditions() -> None:
    k, x0, x, time = names("k x0 x time")
    eq = equations("k x0", "x", [x0], [-k * x], Parts(observed=[x, x * k + time, k], conditions=[x > 1, (x > 1) & (time > 0.25)]))
    batch = solved(eq, [[1.0, 2.0], [2.0, 3.0]], np.array([0.0, 0.5, 1.0]), 1e-9)
    x_values = np.array([2.0, 3.0])[:, None] * np.exp(-np.outer([1.0, 2.0], [0.0, 0.5, 1.0]))
    assert np.abs(batch.values[:, 0] - x_values).max() < 1e-8
    assert np.abs(batch.values[:, 1] - (x_values * [[1.0], [2.0]] + [0.0, 0.5, 1.0])).max() < 1e-8
    assert np.array_equal(batch.values[:, 2], np.repeat([[1.0], [2.0]], 3, axis=1))
    assert batch.conditions.dtype == np.int8
    assert batch.conditions[:, 0].tolist() == [[True, True, False], [True, True, False]]
    assert batch.conditions[:, 1].tolist() == [[False, True, False], [False, True, False]]


@pytest.mark.parametrize(("method", "accuracy"), [("explicit54", 1e-6), ("explicit853", 1e-8), ("explicit853", 1e-10)])
def test_between_steps_whose_length_stability_sets_values_are_as_good_as_at_their_ends(method: str, accuracy: float) -> None:
    # x follows cos t more and more closely; exact solution by variation of constants
    x = np.column_stack([10.0 ** np.linspace(0.0, 2.5, 60), np.ones(60)])
    times = np.linspace(0.0, 20.0, 2001)
    batch = solved(one_state(lambda x, k, t: -k * (x - t.cos())), x, times, accuracy, method=method)
    k = x[:, :1]
    follows = (k * k * np.cos(times) + k * np.sin(times)) / (1 + k * k)
    error = np.abs(batch.values[:, 0] - follows - np.exp(-k * times) / (1 + k * k))
    assert np.all(batch.steps[-10:] > 20 * 50 / 8), "stability sets the steps of the last ones"
    assert error.max() < 4 * accuracy

"""The method for stiff members: its orders as measured, published problems, what it shares with explicit steps."""

from __future__ import annotations

import numpy as np
import pytest

from tests.solver_models import Ex, Parts, equations, names, number, settings, table
from tests.stiff_models import E5, E5_EARLY, HIRES, OREGO, PROBLEMS, ROBERTSON, VAN_DER_POL, Problem
from tests.test_solve_order import STARTS, Stepper, exact, growing_and_falling, size, slope
from uq.lang.graph import Graph
from uq.model.build import build
from uq.model.choose import method_for
from uq.model.code import Equations, Forcing, Solver, Table
from uq.model.layout import Head
from uq.model.rosenbrock5 import ROSENBROCK5
from uq.solve.batch import Batch, Status
from uq.solve.compile import compile_code
from uq.solve.memory import call_group
from uq.solve.scales import pilot_scales
from uq.solve.solve import solve


class StiffStepper(Stepper):
    """Takes stiff steps of a given length."""

    def __init__(self, tolerance: float = np.inf) -> None:
        super().__init__(compile_code(build(growing_and_falling(), solver="stiff")), tolerance)
        self.code.addresses.setdefault("uq_step", 0)

    def step(self, h: float, theta: float = 0.0) -> np.ndarray:
        """The new states; what is seen at theta is left in `seen` [lane, state]."""
        now = self.group[Head.time].copy()
        self.group[Head.step], self.group[Head.until] = h, now + h
        self.group[Head.due] = now + theta * h if theta else np.inf
        self.words[Head.clock], self.words[Head.place] = self.times.ctypes.data, self.seen.ctypes.data + 16 * np.arange(8)
        call_group(self.code.addresses["uq_stiff"], self.group, self.settings)
        return self.group[self.layout.first_state : self.layout.first_state + 2].copy()


def test_the_method_is_of_its_order() -> None:
    counts, errors = np.array([20, 28, 40, 56]), []
    for n in counts:
        stepper = StiffStepper()
        for _ in range(n):
            last = stepper.step(2.0 / n)
        assert np.all(stepper.group[Head.steps] == n)
        errors.append(size(last - exact(STARTS + 2.0)))
    assert slope(2.0 / counts, np.array(errors)) == pytest.approx(ROSENBROCK5.order, abs=0.3)


def test_the_continuous_extension_is_of_its_order_within_a_step() -> None:
    # one place alone may be near a zero of the leading term of the error: all together
    lengths, errors = np.array([0.1, 0.07, 0.05, 0.035]), []
    for h in lengths:
        found = []
        for theta in (0.15, 0.3, 0.45, 0.6, 0.75, 0.9):
            stepper = StiffStepper()
            stepper.step(h, theta)
            found.append(size(stepper.seen.T - exact(STARTS + theta * h)))
        errors.append(size(np.array(found)))
    assert slope(lengths, np.array(errors)) == pytest.approx(ROSENBROCK5.extension_order + 1, abs=0.3)


def test_the_error_estimate_is_of_its_order() -> None:
    lengths, errors = np.array([0.1, 0.07, 0.05, 0.035]), []
    for h in lengths:
        tolerance = 0.1 * h**5
        stepper = StiffStepper(tolerance)
        stepper.step(h)
        assert np.all(stepper.group[Head.steps] == 1)
        errors.append(tolerance * size(2.0 ** (stepper.group[Head.log_error] / 2)))
    assert slope(lengths, np.array(errors)) == pytest.approx(ROSENBROCK5.embedded_order + 1, abs=0.3)


def by(problem: Problem, accuracy: float, solver: Solver) -> Batch:
    """One member to the end, with scales that the pilot finds."""
    code = compile_code(build(problem.equations(), method_for(accuracy), solver))
    given, times = settings(problem.states, accuracy), np.array([problem.stop])
    scales, fell_back = pilot_scales(code, problem.row(), times, 0.0, given)
    assert not fell_back
    return solve(code, problem.row(), times, 0.0, settings(problem.states, accuracy, scales=scales))


def error(problem: Problem, batch: Batch) -> float:
    """The largest error at the end, in scales."""
    assert batch.status[0] == Status.ok
    return float(np.max(np.abs(batch.values[0, :, 0] - problem.end) / problem.scales))


# Errors at the end in units of accuracy x scale: OREGO's spikes multiply every error on their way, E5 is the hardest of the book.
FACTORS = {VAN_DER_POL.name: 30.0, ROBERTSON.name: 1.0, HIRES.name: 30.0, OREGO.name: 5000.0, E5.name: 1000.0}


@pytest.mark.parametrize("problem", PROBLEMS, ids=lambda problem: problem.name)
@pytest.mark.parametrize("solver", ["auto", "stiff"])
def test_published_problems_end_where_they_should(problem: Problem, solver: Solver) -> None:
    coarse, fine = (by(problem, accuracy, solver) for accuracy in (1e-6, 1e-8))
    assert error(problem, coarse) < FACTORS[problem.name] * 1e-6
    assert error(problem, fine) < FACTORS[problem.name] * 1e-8
    assert coarse.stiff_steps[0] > 0
    assert coarse.steps[0] < 1500
    assert bool(coarse.switches[0]) == (solver == "auto")


@pytest.mark.parametrize("problem", [VAN_DER_POL, ROBERTSON, HIRES, OREGO, E5_EARLY], ids=lambda problem: problem.name)
@pytest.mark.parametrize("solver", ["auto", "stiff"])
def test_a_hundredth_of_the_accuracy_is_less_than_a_twentieth_of_the_error(problem: Problem, solver: Solver) -> None:
    assert error(problem, by(problem, 1e-8, solver)) < error(problem, by(problem, 1e-6, solver)) / 20


def test_robertson_keeps_its_small_parts_where_they_are_asked_for() -> None:
    code = compile_code(build(ROBERTSON.equations(), "explicit853", "auto"))
    given = settings(3, 1e-9, negligible=[1e-18, 1e-24, 1e-9])
    batch = solve(code, ROBERTSON.row(), np.array([ROBERTSON.stop]), 0.0, given)
    assert batch.values[0, :2, 0] == pytest.approx(ROBERTSON.end[:2], rel=1e-6)


def forced(solver: Solver) -> tuple[Batch, np.ndarray]:
    """A fast relaxation to a forcing with jumps, corners and a smooth part, a table, and a pulse at a time that is compared with."""
    k, x0, x, time, f, g, h = names("k x0 x time f g h")
    target = f + g + h + (time > 1.5).where(0.5, 0.0) + table("line", time)
    parts = Parts(
        forcings=[
            Forcing("f", (0.0, 1.0, 1.0, 4.0), (0.0, 1.0, 3.0, 2.0)),
            Forcing("g", (0.0, 2.0), (1.0, -1.0), "step"),
            Forcing("h", (0.0, 1.0, 2.5, 4.0), (0.0, 1.0, -1.0, 0.5), "smooth"),
        ],
        tables=[Table("line", (0.0, 3.0, 4.0), (0.0, 1.0, 0.0))],
    )
    eq = equations("k x0", "x", [x0], [-k * (x - target)], parts)
    times = np.linspace(0.05, 4.0, 80)
    code = compile_code(build(eq, solver=solver))
    return solve(code, np.array([[20.0, 0.0], [200.0, 1.0]]), times, 0.0, settings(1, 1e-8)), times


def test_jumps_corners_and_moments_are_landed_on() -> None:
    stiff, explicit = (forced(solver)[0] for solver in ("stiff", "explicit"))
    assert np.all(stiff.status == Status.ok)
    assert np.abs(stiff.values - explicit.values).max() < 3e-7
    assert np.all(stiff.stiff_steps == stiff.steps)
    assert np.all(stiff.rejections < 0.1 * stiff.steps)  # a jump that is not landed on costs refusals


def test_failures_have_the_same_names() -> None:
    k, x0, x, time = names("k x0 x time")
    rates = {
        "blew_up": k * x * x,
        "not_finite": -k + 0 * (x - 0.5).sqrt(),
        "out_of_range": k + 0 * x,
    }
    for name, rate in rates.items():
        eq = equations("k x0", "x", [x0], [rate])
        code = compile_code(build(eq, solver="stiff"))
        batch = solve(code, np.array([[1.0, 1.0]]), np.array([5.0]), 0.0, settings(1, highest=[2.5 if name == "out_of_range" else np.inf]))
        assert Status(batch.status[0]).name == name
        assert np.isnan(batch.values[0, 0, 0])
    assert time.node is not x.node


def test_a_slope_without_bound_does_not_end_a_member() -> None:
    # a tank that drains and stays dry: the slope of the root is infinite from then on
    k, x0, x = names("k x0 x")
    code = compile_code(build(equations("k x0", "x", [x0], [-k * x.max(0).sqrt()]), solver="stiff"))
    batch = solve(code, np.array([[1.0, 1.0], [1.0, 0.0]]), np.array([1.0, 4.0]), 0.0, settings(1, 1e-6))
    assert np.all(batch.status == Status.ok)
    assert batch.values[:, 0, :] == pytest.approx(np.array([[0.25, 0.0], [0.0, 0.0]]), abs=1e-5)


def rod(cells: int, conduction: float) -> Equations:
    """A rod warmed at one end that loses heat as the fourth power of its temperature."""
    graph = Graph()
    x, (k, start) = names(" ".join(f"x{i}" for i in range(cells)), graph), names("k start", graph)
    rates: list[Ex] = []
    for i, own in enumerate(x):
        loss = -0.01 * own**4 + number(own, 1.0 if i == 0 else 0.0)
        rates.append(sum((k * conduction * (x[j] - own) for j in (i - 1, i + 1) if 0 <= j < cells), loss))
    return equations("k start", " ".join(f"x{i}" for i in range(cells)), [start] * cells, rates)


@pytest.mark.parametrize("cells", [2, 12, 200])
def test_rods_of_any_size_reach_the_state_of_a_tight_explicit_run(cells: int) -> None:
    eq, row, times = rod(cells, 30.0), np.array([[1.0, 1.0]]), np.array([0.5, 1.0])
    exact_ = solve(compile_code(build(eq, "explicit853")), row, times, 0.0, settings(cells, 1e-12)).values
    batch = solve(compile_code(build(eq, solver="stiff")), row, times, 0.0, settings(cells, 1e-7))
    assert np.abs(batch.values - exact_).max() < 1e-5
    assert batch.steps[0] < 200


def test_two_hundred_states_that_all_depend_on_all() -> None:
    graph, n = Graph(), 200
    y, (k,) = names(" ".join(f"y{i}" for i in range(n)), graph), names("k", graph)
    total = y[0]
    for each in y[1:]:
        total = total + each
    rates = [-(1.0 + 5.0 * i) * each + 0.001 * (i % 7) * total * each + k * 0 for i, each in enumerate(y)]
    eq = equations("k", " ".join(f"y{i}" for i in range(n)), [k] * n, rates)
    row, times = np.array([[1.0]]), np.array([0.2, 1.0])
    exact_ = solve(compile_code(build(eq, "explicit853")), row, times, 0.0, settings(n, 1e-12)).values
    batch = solve(compile_code(build(eq, solver="stiff")), row, times, 0.0, settings(n, 1e-6))
    assert np.abs(batch.values - exact_).max() < 1e-5

"""The linear algebra of stiff steps against numpy: random sparse patterns, entry by entry and row by row, growth and refinement."""

from __future__ import annotations

import ctypes
from dataclasses import replace

import numpy as np
import pytest

from tests.solver_models import equations, names, number, settings
from uq.lang.graph import Graph
from uq.model.build import write
from uq.model.code import Equations
from uq.model.jacobian import Jacobian
from uq.model.layout import Head, StiffColumn
from uq.model.points import Plan
from uq.model.rosenbrock5 import ROSENBROCK5
from uq.model.sparse import Elimination, elimination, envelope
from uq.model.stiff import Stiff
from uq.model.tableau import PAIRS
from uq.solve.compile import Processor, compile_for
from uq.solve.memory import aligned, settings_block

P = ctypes.c_void_p


def linear(matrix: np.ndarray) -> Equations:
    """x' = A x, entry (i, j) times an input that every lane has of its own."""
    n = len(matrix)
    graph = Graph()
    x = names(" ".join(f"x{i}" for i in range(n)), graph)
    (k,) = names("k", graph)
    rates = []
    for row, own in zip(matrix, x, strict=True):
        total = number(own, 0.0)
        for value, other in zip(row, x, strict=True):
            total = total + k * float(value) * other if value else total
        rates.append(total)
    return equations("k", " ".join(f"x{i}" for i in range(n)), [k] * n, rates)


def planned(eq: Equations, rows: bool) -> Plan:
    """The plan of a model with stiff steps only, entry by entry or row by row."""
    jacobian = Jacobian.of(eq)
    assert jacobian is not None
    n = jacobian.size
    work = envelope(n, jacobian.places) if rows else elimination(n, jacobian.places, 10**9)
    assert work is not None
    return Plan.of(eq, PAIRS[0], Stiff(ROSENBROCK5, jacobian, work), only_stiff=True)


class Bare:
    """The functions within a stiff step, called on their own."""

    def __init__(self, plan: Plan, tolerances: np.ndarray, k: np.ndarray) -> None:
        code = write(plan)
        open_text = replace(code, text=code.text.replace("define internal", "define"))
        self.compiled, self.layout = compile_for(open_text, Processor.here()), plan.layout
        self.group = aligned(self.layout.slots)
        n = self.layout.states
        self.settings = settings_block(code, settings(n, 1e-300, negligible=tolerances), 1.0, 1)
        self.group[Head.until], self.group[Head.due] = 1.0, np.inf
        self.group[self.layout.first_input] = k
        self._call("uq_start", ctypes.c_int64, self.group, self.settings)
        self.group[Head.alive] = 1.0

    def _call(self, name: str, result: object, *args: object) -> int:
        address = self.compiled.engine.get_function_address(name)
        kinds = [P if isinstance(arg, np.ndarray) else ctypes.c_int64 for arg in args]
        given = [arg.ctypes.data if isinstance(arg, np.ndarray) else arg for arg in args]
        return ctypes.CFUNCTYPE(result, *kinds)(address)(*given)  # type: ignore[call-overload, no-any-return]

    def step(self, h: float) -> int:
        """One attempt from the start."""
        self.group[Head.step], self.group[Head.until] = h, h
        return self._call("uq_stiff", ctypes.c_int64, self.group, self.settings)

    def lines(self, right: np.ndarray) -> np.ndarray:
        """The solution of W x = right [state, lane] with the factors of the last step."""
        n = self.layout.states
        from_, plus, to = (aligned(n) for _ in range(3))
        from_[:] = right
        self._call("uq_lines", None, self.group, from_, plus, to)
        return to

    def column(self, which: int) -> np.ndarray:
        first = self.layout.stiff(which)
        return self.group[first : first + self.layout.states]


def sparse(rng: np.random.Generator, n: int, share: float) -> np.ndarray:
    matrix = np.where(rng.random((n, n)) < share, rng.normal(size=(n, n)), 0.0)
    return matrix - np.diag(rng.random(n) * 3.0)


@pytest.mark.parametrize("rows", [False, True])
@pytest.mark.parametrize(
    ("n", "share", "seed"), [(1, 0.0, 0), (2, 0.5, 1), (5, 0.3, 2), (12, 0.2, 3), (30, 0.08, 4), (30, 0.5, 5), (9, 1.0, 6)]
)
def test_solutions_of_random_sparse_patterns_are_those_of_numpy(n: int, share: float, seed: int, rows: bool) -> None:
    rng = np.random.default_rng(seed)
    matrix, k, h = sparse(rng, n, share), rng.uniform(0.5, 2.0, 8), 0.7
    bare = Bare(planned(linear(matrix), rows), np.ones(n), k)
    bare.step(h)
    right = rng.normal(size=(n, 8))
    found = bare.lines(right)
    for lane in range(8):
        w = np.eye(n) / (ROSENBROCK5.gamma * h) - k[lane] * matrix
        assert found[:, lane] == pytest.approx(np.linalg.solve(w, right[:, lane]), rel=1e-9, abs=1e-10)


@pytest.mark.parametrize("rows", [False, True])
def test_a_step_of_a_linear_model_is_the_same_both_ways(rows: bool) -> None:
    rng = np.random.default_rng(8)
    matrix = sparse(rng, 14, 0.2) - 3 * np.eye(14)
    bare = Bare(planned(linear(matrix), rows), np.ones(14), np.linspace(0.5, 1.5, 8))
    bare.step(0.02)
    state = bare.group[bare.layout.first_state : bare.layout.first_state + 14]
    for lane, k in enumerate(np.linspace(0.5, 1.5, 8)):
        values, vectors = np.linalg.eig(k * matrix)
        exact = (vectors * np.exp(0.02 * values)) @ np.linalg.solve(vectors, np.full(14, k))
        assert state[:, lane] == pytest.approx(exact.real, rel=1e-7)


def oscillator(omega: float) -> np.ndarray:
    return np.array([[0.0, 1.0], [-omega * omega, 0.0]])


@pytest.mark.parametrize("rows", [False, True])
@pytest.mark.parametrize("omega", [1e2, 1e4, 1e6])
def test_a_stiff_oscillator_is_solved_to_rounding_after_refinement(omega: float, rows: bool) -> None:
    # h = 1. The factors grow like omega h; stages as the step leaves them are compared with those in 60 digits
    import mpmath

    bare = Bare(planned(linear(oscillator(omega)), rows), np.array([1.0, omega]), np.ones(8))
    bare.step(1.0)
    with mpmath.workdps(60):
        w = mpmath.matrix([[1 / mpmath.mpf(ROSENBROCK5.gamma), -1], [mpmath.mpf(omega) ** 2, 1 / mpmath.mpf(ROSENBROCK5.gamma)]])
        first = mpmath.lu_solve(w, mpmath.matrix([1.0, -(mpmath.mpf(omega) ** 2)]))
    found = bare.column(StiffColumn.first_stage)[:, 0]
    size = max(abs(first[0]), abs(first[1]) / omega)
    for got, exact, unit in zip(found, first, (1.0, omega), strict=True):
        assert abs(got - exact) / unit < 2e-15 * size


def small_pivot(part: float) -> np.ndarray:
    """A matrix of which W = I / gamma - A has a first pivot of so small a part of its entries, and is well conditioned."""
    a = 1.0 / ROSENBROCK5.gamma
    return np.array([[a * (1.0 - part), 3.0], [-4.0, 1.0]])


@pytest.mark.parametrize("rows", [False, True])
def test_growth_is_seen_and_refinement_helps(rows: bool) -> None:
    matrix = small_pivot(1e-9)
    bare = Bare(planned(linear(matrix), rows), np.ones(2), np.ones(8))
    bare.step(1.0)
    assert np.any(bare.column(StiffColumn.residual))
    right = matrix @ np.ones(2)
    exact = np.linalg.solve(np.eye(2) / ROSENBROCK5.gamma - matrix, right)
    unrefined = np.abs(bare.lines(np.repeat(right[:, None], 8, axis=1))[:, 0] - exact).max()
    assert unrefined > 1e-10
    assert bare.column(StiffColumn.first_stage)[:, 0] == pytest.approx(exact, rel=1e-14)
    assert not np.any(bare.column(StiffColumn.zero))


def test_what_has_not_grown_is_not_refined() -> None:
    bare = Bare(planned(linear(small_pivot(0.5)), False), np.ones(2), np.ones(8))
    bare.step(1.0)
    assert not np.any(bare.column(StiffColumn.residual))


def lost(part: float) -> np.ndarray:
    """As `small_pivot` in three states: what is left after the first pivot is lost beside one over it."""
    a = 1.0 / ROSENBROCK5.gamma
    w = np.array([[a * part, 1.0, 1.0], [1.0, 1.0, 2.0], [1.0, 3.0, 1.0]])
    return np.eye(3) * a - w


def test_a_step_that_cannot_be_solved_is_refused() -> None:
    # any step of this length would be accepted by its error: tolerances are vast
    for part, refused in ((1e-9, 0), (2.0**-52, 1)):
        bare = Bare(planned(linear(lost(part)), False), np.full(3, 1e9), np.ones(8))
        bare.step(1.0)
        assert np.all(bare.group[Head.rejections] == refused), part
        assert np.all(bare.group[Head.steps] == 1 - refused)


def test_pivots_are_chosen_so_that_an_arrow_is_not_filled() -> None:
    n = 50
    places = {(i, i) for i in range(n)} | {(0, i) for i in range(n)} | {(i, 0) for i in range(n)}
    found = elimination(n, places, 10**9)
    assert isinstance(found, Elimination)
    assert found.entries == 3 * n - 2
    assert set(found.order) == set(range(n))


def test_bands_are_found_again_in_any_order_of_the_states() -> None:
    n, order = 60, np.random.default_rng(3).permutation(60)
    places = [(int(order[i]), int(order[j])) for i in range(n) for j in range(n) if abs(i - j) <= 2]
    found = envelope(n, places)
    assert found.entries <= 8 * n
    assert found.operations <= 9 * n

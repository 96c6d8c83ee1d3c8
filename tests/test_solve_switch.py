"""Members become stiff and come back by what they alone have met; who never does is solved as if there were explicit steps only."""

from __future__ import annotations

from concurrent.futures import ThreadPoolExecutor
from dataclasses import fields, replace

import numpy as np
import pytest

from tests.solver_models import Parts, equations, names, predator_prey, predator_prey_inputs, settings
from tests.test_solve_bits import SETTINGS, awkward, equal
from tests.test_solve_bits import TIMES as AWKWARD_TIMES
from tests.test_solve_bits import inputs as awkward_inputs
from uq.model.build import build
from uq.model.code import Equations, Forcing
from uq.solve.batch import Batch, Status
from uq.solve.compile import Compiled, Processor, compile_code, compile_for
from uq.solve.solve import solve

TIMES = np.linspace(0.0, 20.0, 41)
GIVEN = settings(2, 1e-5, scales=[2.0, 20.0])


def swinging() -> Equations:
    """Van der Pol's oscillator, pushed by a forcing with jumps; its inputs are the stiffness and the start."""
    mu, x0, x, y, f = names("mu x0 x y f")
    rates = [y, mu * ((1 - x * x) * y) - x + 0.1 * f]
    parts = Parts(forcings=[Forcing("f", (0.0, 5.0, 9.0, 12.0), (0.0, 1.0, -1.0, 0.5), "step")])
    return equations("mu x0", "x y", [x0, x0 * 0], rates, parts)


def stiffnesses(members: int) -> np.ndarray:
    """From not stiff at all to very; some start badly."""
    rng = np.random.default_rng(5)
    x = np.column_stack([10.0 ** rng.uniform(0.0, 3.0, members), rng.uniform(1.5, 2.5, members)])
    x[::29, 1] = np.nan
    return x


@pytest.fixture(scope="module", params=["auto", "stiff"])
def code(request: pytest.FixtureRequest) -> Compiled:
    return compile_code(build(swinging(), "explicit54", request.param))


@pytest.fixture(scope="module")
def whole(code: Compiled) -> Batch:
    return solve(code, stiffnesses(150), TIMES, 0.0, GIVEN)


def test_members_of_all_kinds(whole: Batch, code: Compiled) -> None:
    good = whole.status == Status.ok
    assert good.sum() == 150 - 6
    if code.code.solver == "stiff":
        assert np.all(whole.stiff_steps == whole.steps)
        assert not np.any(whole.switches)
    else:
        assert np.any(whole.switches[good] == 0)
        assert np.any(whole.switches >= 2)
        assert np.all((whole.stiff_steps > 0) == (whole.switches > 0))
        assert np.all(whole.stiff_steps <= whole.steps)


@pytest.mark.parametrize("seed", range(3))
def test_any_order(code: Compiled, whole: Batch, seed: int) -> None:
    order = np.random.default_rng(seed).permutation(150)
    assert equal(whole, solve(code, stiffnesses(150)[order], TIMES, 0.0, GIVEN), order)


@pytest.mark.parametrize("count", [1, 7, 9, 64])
def test_any_batch_size(code: Compiled, whole: Batch, count: int) -> None:
    x = stiffnesses(150)
    for first in range(0, 150 if count > 2 else 20, count):
        rows = slice(first, first + count)
        assert equal(whole, solve(code, x[rows], TIMES, 0.0, GIVEN), rows)


def test_threads_and_other_processors(code: Compiled, whole: Batch) -> None:
    x = stiffnesses(150)
    with ThreadPoolExecutor(4) as pool:
        parts = list(pool.map(lambda k: solve(code, x[k : k + 10], TIMES, 0.0, GIVEN), range(0, 150, 10)))
    assert all(equal(whole, part, slice(10 * k, 10 * k + 10)) for k, part in enumerate(parts))
    if "+avx2" in Processor.here().features:
        older = compile_for(build(swinging(), "explicit54", code.code.solver), Processor("x86-64-v3", ""))
        assert equal(whole, solve(older, x, TIMES, 0.0, GIVEN))


@pytest.mark.parametrize("method", ["explicit54", "explicit853"])
def test_who_is_never_stiff_has_the_bits_of_explicit_steps(method: str) -> None:
    given, x = settings(2, 1e-7, scales=[20.0, 15.0]), predator_prey_inputs(100)
    auto, explicit = (solve(compile_code(build(predator_prey(), method, s)), x, TIMES, 0.0, given) for s in ("auto", "explicit"))
    assert equal(auto, explicit)
    assert not np.any(auto.switches)
    x = awkward_inputs(203)
    auto, explicit = (solve(compile_code(build(awkward(), method, s)), x, AWKWARD_TIMES, 0.0, SETTINGS) for s in ("auto", "explicit"))
    never = auto.switches == 0
    assert never.sum() > 150
    assert equal(replace(auto, **{f.name: getattr(auto, f.name)[never] for f in fields(Batch)}), only(explicit, never))


def only(batch: Batch, rows: np.ndarray) -> Batch:
    """Some members."""
    return Batch(**{f.name: np.ascontiguousarray(getattr(batch, f.name)[rows]) for f in fields(Batch)})


def waking() -> Equations:
    """Slow, then fast from t = 4 to t = 8, then slow again: k steers how fast."""
    k, x0, x, y, f = names("k x0 x y f")
    rates = [-(1.0 + k * f) * (x - y.cos()), 1.0 + 0 * x]
    return equations(
        "k x0", "x y", [x0, x0 * 0], rates, Parts(forcings=[Forcing("f", (0.0, 4.0, 8.0, 12.0), (0.0, 1.0, 0.0, 0.0), "step")])
    )


def test_a_member_becomes_stiff_and_comes_back() -> None:
    times = np.array([4.0, 8.0, 40.0])
    given = settings(2, 1e-6)
    auto, explicit = (
        solve(compile_code(build(waking(), "explicit54", s)), np.array([[1e4, 0.0], [1.0, 0.0]]), times, 0.0, given)
        for s in ("auto", "explicit")
    )
    assert auto.switches.tolist() == [2, 0]
    assert 0 < auto.stiff_steps[0] < auto.steps[0]
    assert auto.steps[0] < 0.2 * explicit.steps[0]
    assert np.abs(auto.values - explicit.values).max() < 1e-4


def test_stiff_steps_pay_within_a_mixed_ensemble() -> None:
    # the stiffest member needs a thousand times the explicit steps of the mildest; with the choice the attempts differ little
    x = np.array([[mu, 2.0] for mu in (1.0, 10.0, 100.0, 1000.0)])
    batch = solve(compile_code(build(swinging(), "explicit54", "auto")), x, TIMES, 0.0, GIVEN)
    attempts = batch.steps + batch.rejections
    assert np.all(batch.status == Status.ok)
    assert attempts.max() < 4 * attempts.min() + 200

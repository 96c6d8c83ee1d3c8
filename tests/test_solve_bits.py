"""A member's bits depend on model, settings, scales and inputs, and on nothing else."""

from __future__ import annotations

from collections.abc import Callable
from concurrent.futures import ThreadPoolExecutor
from dataclasses import fields, replace

import numpy as np
import pytest

from tests.solver_models import Ex, Parts, compiled, equations, names, predator_prey, predator_prey_inputs, settings, table
from uq.model.build import write
from uq.model.code import Course, Equations, Forcing, Table
from uq.model.columns import Looped, WrittenOut
from uq.model.pair import Pair
from uq.model.points import Plan
from uq.model.tableau import PAIRS
from uq.solve.batch import Batch, Status
from uq.solve.compile import Compiled, Processor, compile_for
from uq.solve.solve import solve

TIMES = np.linspace(0.0, 4.0, 33)
SETTINGS = settings(2, lowest=[-np.inf, -3.0])


def awkward() -> Equations:
    """Forced, with jumps; some members blow up, some leave the range, some cannot start; every kind of answer."""
    k, x0, x, y, time, f, g, h = names("k x0 x y time f g h")
    rates = [k * x * x - x + f, (x - y).sin() * g + time * 0.1 - y + h * table("line", x) + table("curve", y)]
    rates[0] = rates[0] + ((time > 1.7) & (time.mod(0.9) < 0.01 * k)).where(k, 0) + (time > 2.9).where(0.1, 0)
    course = [Ex(k.graph, k.graph.name(f"course:{i}")) for i in range(3)]
    parts = Parts(
        observed=[x, y, x * y + f],
        conditions=[x > y, (y > 0.2) & (x < 3), ((x - 1).ln() > -1) | (y > 0.3)],
        forcings=[
            Forcing("f", (0.0, 1.1, 1.1, 3.0, 4.0), (0.0, 1.0, 0.2, 0.4, 0.0)),
            Forcing("g", (0.0, 2.3, 2.31), (1.0, 9.0, 0.5), "step"),
            Forcing("h", (0.0, 0.7, 1.3), (1.0, 2.0, 1.0), "smooth", "repeat"),
        ],
        tables=[
            Table("curve", (-3.0, 0.0, 1.0, 30.0), (0.1, 0.0, 0.2, 5.0), "smooth"),
            Table("line", (-1.0, 1.0), (0.0, 0.1), "linear", "hold"),
        ],
        courses=[Course("integral", 0, 0.0, 4.0), Course("highest", 1, 1.0, 3.0), Course("average", 2, 0.0, 2.0)],
        outcomes=[course[0] + k, course[1] * course[2]],
    )
    return equations("k x0", "x y", [x0.ln(), x0 * 0], rates, parts)


def inputs(members: int, seed: int = 7) -> np.ndarray:
    x = np.random.default_rng(seed).uniform([0.1, 0.5], [1.5, 6.0], (members, 2))
    x[::17, 1] = -1.0
    return x


def equal(one: Batch, other: Batch, rows: np.ndarray | slice = slice(None)) -> bool:
    """All tables of `one` in these rows have the bits of `other`."""
    return all(np.ascontiguousarray(getattr(one, f.name)[rows]).tobytes() == getattr(other, f.name).tobytes() for f in fields(Batch))


@pytest.fixture(scope="module", params=[pair.name for pair in PAIRS])
def code(request: pytest.FixtureRequest) -> Compiled:
    return compiled(awkward(), request.param)


@pytest.fixture(scope="module")
def whole(code: Compiled) -> Batch:
    return solve(code, inputs(203), TIMES, 0.0, SETTINGS)


def test_the_members_are_awkward(code: Compiled, whole: Batch) -> None:
    assert code.code.moments.turns
    assert set(np.unique(whole.conditions[whole.status == Status.ok])) == {0, 1, 2}
    counts = {status: int((whole.status == status).sum()) for status in Status}
    assert counts[Status.ok] > 50
    assert counts[Status.not_finite] == 12
    assert counts[Status.blew_up] > 20


@pytest.mark.parametrize("seed", range(5))
def test_any_order(code: Compiled, whole: Batch, seed: int) -> None:
    order = np.random.default_rng(seed).permutation(203)
    assert equal(whole, solve(code, inputs(203)[order], TIMES, 0.0, SETTINGS), order)


@pytest.mark.parametrize("size", [1, 2, 7, 8, 9, 64, 203])
def test_any_batch_size(code: Compiled, whole: Batch, size: int) -> None:
    x = inputs(203)
    for first in range(0, 203 if size > 2 else 30, size):
        rows = slice(first, first + size)
        assert equal(whole, solve(code, x[rows], TIMES, 0.0, SETTINGS), rows)


def test_any_neighbours(code: Compiled, whole: Batch) -> None:
    x = inputs(203)
    for k in (0, 1, 5, 100):
        among = np.repeat(inputs(16, seed=99), 2, axis=0)
        among[13] = x[k]
        found = solve(code, among, TIMES, 0.0, SETTINGS)
        alone = Batch(**{f.name: getattr(found, f.name)[13:14] for f in fields(Batch)})
        assert equal(whole, alone, slice(k, k + 1))


def test_other_failing_members_and_nan_inputs_do_not_matter(code: Compiled, whole: Batch) -> None:
    x = np.repeat(inputs(203), 2, axis=0)
    x[1::2] = [[np.nan, 1.0]]
    x[1::4] = [[1e300, 1e300]]
    found = solve(code, x, TIMES, 0.0, SETTINGS)
    assert equal(found, whole, slice(0, None, 2))


def test_threads(code: Compiled, whole: Batch) -> None:
    x = inputs(203)
    with ThreadPoolExecutor(4) as pool:
        parts = list(pool.map(lambda k: solve(code, x[k : k + 10], TIMES, 0.0, SETTINGS), range(0, 200, 10)))
    assert all(equal(whole, part, slice(10 * k, 10 * k + 10)) for k, part in enumerate(parts))


def variants() -> list[tuple[str, Callable[[Equations, Pair], Compiled]]]:
    here = Processor.here()

    def looped(eq: Equations, pair: Pair) -> Compiled:
        return compile_for(write(replace(Plan.of(eq, pair), form=Looped)), here)

    def for_others(eq: Equations, pair: Pair) -> Compiled:
        return compile_for(write(Plan.of(eq, pair)), Processor("x86-64-v3", ""))

    return [("looped", looped), *([("x86-64-v3", for_others)] if "+avx2" in here.features else [])]


@pytest.mark.parametrize("pair", PAIRS, ids=lambda pair: pair.name)
@pytest.mark.parametrize(("name", "make"), variants())
def test_loops_and_other_processors_give_the_same_bits(name: str, make: Callable[[Equations, Pair], Compiled], pair: Pair) -> None:
    assert Plan.of(awkward(), pair).form is WrittenOut
    whole = solve(compiled(awkward(), pair.name), inputs(203), TIMES, 0.0, SETTINGS)
    assert equal(whole, solve(make(awkward(), pair), inputs(203), TIMES, 0.0, SETTINGS))


def test_settings_do_matter(code: Compiled, whole: Batch) -> None:
    other = solve(code, inputs(203), TIMES, 0.0, replace(SETTINGS, scales=np.array([1.0, 2.0])))
    assert not equal(whole, other)


def test_predator_prey_with_the_8_5_3_pair_on_every_processor() -> None:
    # (Last changed, between the ends of steps only, with the extension of the pair.)
    given = settings(2, 1e-9, scales=np.array([20.0, 15.0]))
    batch = solve(compiled(predator_prey(), "explicit853"), predator_prey_inputs(3), np.array([10.0, 20.0]), 0.0, given)
    found = [float.hex(v) for v in batch.values[1].ravel()]
    assert found == ["0x1.174aadd001e3ap+3", "0x1.000307e19834cp+3", "0x1.ead1601c4a472p+2", "0x1.8204a049cab6bp+3"]


def test_predator_prey_on_every_processor() -> None:
    # fixed bits of one member: they may only change with the emitter, which is then a new version. (Last changed
    # when the first step became the same in every unit of time.)
    given = settings(2, scales=np.array([20.0, 15.0]))
    batch = solve(compiled(predator_prey()), predator_prey_inputs(3), np.array([10.0, 20.0]), 0.0, given)
    found = [float.hex(v) for v in batch.values[1].ravel()]
    assert found == ["0x1.174aed3f7c66bp+3", "0x1.0002ee6ef74c2p+3", "0x1.ead02f5639fb8p+2", "0x1.82029ce1da30ap+3"]

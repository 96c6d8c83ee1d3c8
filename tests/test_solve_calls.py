"""Calling the solver: what it refuses, how it is stopped, what it keeps, when the kernel must be compiled."""

from __future__ import annotations

import gc
import itertools
import os
import platform
import subprocess
import sys
import threading
import time
from dataclasses import replace
from pathlib import Path

import numpy as np
import pytest

from tests.solver_models import compiled, equations, names, one_state, predator_prey, predator_prey_inputs, settings, solved
from uq.errors import Interrupted, UqError
from uq.model.build import build
from uq.model.layout import FAILURES, Head, Layout
from uq.solve import compile as compile_room
from uq.solve.batch import Status
from uq.solve.compile import Processor, compile_for
from uq.solve.solve import prepare, solve

DECAY = one_state(lambda x, k, t: -k * x)


def test_a_stop_flag_ends_solving_soon() -> None:
    stiff = compiled(one_state(lambda x, k, t: -1e6 * (x - t.cos())))
    flag = np.zeros(1, dtype=np.uint8)
    timer = threading.Timer(0.2, lambda: flag.__setitem__(0, 1))
    timer.start()
    began = time.perf_counter()
    with pytest.raises(Interrupted):
        solve(stiff, np.ones((2000, 2)), np.array([1e3]), 0.0, settings(1, max_steps=10**9), flag)
    assert time.perf_counter() - began < 1.0


def test_a_flag_that_is_set_before_the_start() -> None:
    with pytest.raises(Interrupted):
        solve(compiled(DECAY), np.ones((5, 2)), np.array([1.0]), 0.0, settings(1), np.ones(1, dtype=np.uint8))


def test_solving_releases_the_interpreter() -> None:
    code, x, counted = compiled(predator_prey()), predator_prey_inputs(20_000), 0
    worker = threading.Thread(target=lambda: solve(code, x, np.array([20.0]), 0.0, settings(2)))
    worker.start()
    while worker.is_alive():
        counted += 1
        time.sleep(0.001)
    assert counted > 5


@pytest.mark.parametrize(
    ("x", "times", "changes", "what"),
    [
        (np.ones((2, 3)), [1.0], {}, "x has shape"),
        (np.ones((2, 2)), [], {}, "times"),
        (np.ones((2, 2)), [1.0, 1.0], {}, "times"),
        (np.ones((2, 2)), [2.0, 1.0], {}, "times"),
        (np.ones((2, 2)), [-1.0, 1.0], {}, "times"),
        (np.ones((2, 2)), [1.0, np.inf], {}, "times"),
        (np.ones((2, 2)), [1.0], {"scales": [1.0, 1.0]}, "scales"),
        (np.ones((2, 2)), [1.0], {"scales": [0.0]}, "above 0"),
        (np.ones((2, 2)), [1.0], {"lowest": []}, "lowest"),
        (np.ones((2, 2)), [1.0], {"negligible": [1.0, 1.0]}, "negligible"),
        (np.ones((2, 2)), [1.0], {"negligible": [0.0]}, "above 0"),
    ],
)
def test_callers_defects_are_told(x, times, changes, what) -> None:
    with pytest.raises(ValueError, match=what):
        solved(DECAY, x, times, **changes)


def test_what_is_given_is_not_changed_and_may_be_read_only() -> None:
    x, times = predator_prey_inputs(5), np.linspace(0, 1, 3)
    before = x.copy()
    x.setflags(write=False)
    times.setflags(write=False)
    solve(compiled(predator_prey()), x, times, 0.0, settings(2))
    solve(compiled(predator_prey()), np.asfortranarray(x)[::-1], times, 0.0, settings(2))
    assert np.array_equal(x, before)


def test_machine_code_lives_as_long_as_it_is_held() -> None:
    code = compile_for(build(DECAY), Processor.here())
    gc.collect()
    assert solve(code, [[1.0, 1.0]], np.array([1.0]), 0.0, settings(1)).values[0, 0, 0] == pytest.approx(np.exp(-1), rel=1e-5)


def test_a_processor_without_fma_is_refused_in_a_sentence(monkeypatch: pytest.MonkeyPatch) -> None:
    import llvmlite.binding as llvm

    features = llvm.get_host_cpu_features()
    features["fma"] = False
    monkeypatch.setattr(llvm, "get_host_cpu_features", lambda: features)
    monkeypatch.setattr(llvm, "get_process_triple", lambda: "x86_64-unknown-linux-gnu")
    with pytest.raises(UqError, match="fused multiply-add"):
        Processor.here()


def test_a_processor_in_words() -> None:
    assert Processor("some", "+fma,+avx2,-avx512f").words == f"{platform.machine()}, some, avx2"
    assert Processor("some", "").words == f"{platform.machine()}, some"
    assert Processor.here().name in Processor.here().words


@pytest.mark.parametrize("method", ["explicit54", "explicit853"])
def test_ten_states_are_compiled_quickly(method: str) -> None:
    leaves = names("k x0 " + " ".join(f"s{i}" for i in range(10)))
    rates = [leaves[0] * (leaves[1 + i] - leaves[2 + i]) - (leaves[2 + i] * -0.1).exp() for i in range(10)]
    eq = equations("k x0", " ".join(f"s{i}" for i in range(10)), [leaves[1]] * 10, rates)
    began = time.perf_counter()
    compile_for(build(eq, method), Processor.here())
    assert time.perf_counter() - began < 3.0  # a tenth of that on a quiet machine; the benchmark tells


def test_numbers_of_failures_are_those_of_the_statuses() -> None:
    assert (Status.out_of_range, Status.not_finite, Status.blew_up, Status.too_many_steps, Status.step_too_small) == FAILURES


def test_the_kernel_knows_every_slot_that_it_asks_for() -> None:
    from uq.model import layout
    from uq.solve.kernel import LANES, Slots

    assert LANES == layout.LANES
    for name in Slots._fields:
        assert hasattr(Head, name) != hasattr(Layout, name), name


def test_slots_do_not_overlap() -> None:
    sizes = Layout(inputs=3, hoisted=2, states=4, forcings=2, observed=5, conditions=6)
    layout = replace(sizes, smooth=1, curve_parts=8, spare_columns=17)
    firsts = [len(Head), layout.first_hoisted, layout.first_base, layout.first_slope]
    firsts += [layout.first_second, layout.first_third, layout.first_state, layout.first_rate]
    firsts += [layout.first_largest, layout.first_curve, layout.first_spare, layout.first_observed, layout.slots]
    assert [b - a for a, b in itertools.pairwise(firsts)] == [3, 2, 2, 2, 1, 1, 4, 4, 4, 32, 68, 5]
    assert layout.moved == layout.first_curve


def test_compiled_code_is_remembered_by_its_fingerprint() -> None:
    assert compile_room.compile_code(build(DECAY)) is compile_room.compile_code(build(DECAY))


SCRIPT = """
from tests.solver_models import one_state, solved
from uq.solve.solve import prepare
print(prepare())
solved(one_state(lambda x, k, t: -k * x), [[1.0, 1.0]], [1.0])
print(prepare())
"""


def test_whether_the_kernel_must_be_compiled_is_known_before(tmp_path: Path) -> None:
    solved(DECAY, [[1.0, 1.0]], [1.0])
    assert not prepare()
    root = Path(__file__).parent.parent
    environment = {**os.environ, "NUMBA_CACHE_DIR": str(tmp_path), "PYTHONPATH": str(root)}
    answers = []
    for _ in range(2):
        done = subprocess.run([sys.executable, "-c", SCRIPT], env=environment, cwd=tmp_path, capture_output=True, text=True, check=True)
        answers += done.stdout.split()
    assert answers == ["True", "False", "False", "False"]

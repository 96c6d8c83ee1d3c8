"""Step size control: powers by own means, and the controller's behaviour on whole steps."""

from __future__ import annotations

import ctypes
from math import log2

import numpy as np

from uq.model import control
from uq.model.pair import Control
from uq.model.tableau import DORMAND_PRINCE_54, DORMAND_PRINCE_853
from uq.model.writer import V, Writer
from uq.solve.compile import Processor, parsed
from uq.solve.memory import aligned


def through(write, x: np.ndarray) -> np.ndarray:
    """Send numbers through a written function of one vector."""
    import llvmlite.binding as llvm

    w = Writer()
    w.store("%to", 0, write(w, w.load("%from", 0)))
    declare = f"declare {V} @llvm.fma.v8f64({V}, {V}, {V})"
    module, machine = parsed("\n".join(["define void @f(ptr %from, ptr %to) {", *w.lines, "ret void", "}", declare]), Processor.here())
    engine = llvm.create_mcjit_compiler(module, machine)
    engine.finalize_object()
    call = ctypes.CFUNCTYPE(None, ctypes.c_void_p, ctypes.c_void_p)(engine.get_function_address("f"))
    source, target = aligned(1), aligned(1)
    found = np.empty_like(x)
    for first in range(0, len(x), 8):
        source[0, : len(x[first : first + 8])] = x[first : first + 8]
        call(source.ctypes.data, target.ctypes.data)
        found[first : first + 8] = target[0, : len(x[first : first + 8])]
    return found


def test_log2_is_right_to_five_digits() -> None:
    x = np.concatenate([np.exp2(np.linspace(-1000, 1000, 3001)), np.linspace(1, 2, 1000)])
    assert np.max(np.abs(through(control.write_log2, x) - np.log2(x))) < 2e-5


def test_exp2_is_right_to_five_digits() -> None:
    x = np.linspace(-900, 900, 5000)
    assert np.max(np.abs(through(control.write_exp2, x) / np.exp2(x) - 1)) < 5e-6


def test_within_takes_the_upper_end_for_what_is_not_a_number() -> None:
    x = np.array([np.nan, np.inf, -np.inf, 0.5, 3.0])
    assert through(lambda w, v: control.within(w, v, 0.0, 2.0), x).tolist() == [2.0, 2.0, 0.0, 0.5, 2.0]


def test_constants_are_those_of_the_source() -> None:
    # Hairer, Norsett, Wanner: DOPRI5 has beta = 0.04, expo1 = 0.2 - 0.75 beta, safety 0.9, factors 0.2 to 10, facold at least 1e-4.
    # DOP853 has expo1 = 1/8 - 0.2 beta, factors 0.333 to 6, and beta = 0 unless told otherwise.
    assert DORMAND_PRINCE_54.control == Control(0.2 - 0.03, 0.04, 0.2, 10.0)
    assert DORMAND_PRINCE_853.control == Control(0.125 - 0.2 * 0.04, 0.04, 0.333, 6.0)
    assert (0.9, 2 * log2(1e-4)) == (control.SAFETY, control.START_LOG_ERROR)

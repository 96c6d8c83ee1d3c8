"""Orders are measured, not believed: of the pair, and of its continuous extension."""

from __future__ import annotations

from dataclasses import replace

import numpy as np
import pytest

from tests.solver_models import compiled, equations, names, settings
from uq.model.build import write
from uq.model.columns import Looped, WrittenOut
from uq.model.layout import Head
from uq.model.points import Plan
from uq.model.tableau import DORMAND_PRINCE_54
from uq.solve.compile import Compiled, Processor, compile_for
from uq.solve.memory import aligned, call_group, settings_block

START = 0.7  # at 0 the second solution is even, and every other term of its error is 0


def growing_and_falling():
    """x = exp(sin t), y = 1 / (1 + t^2)."""
    x0, y0, x, y, time = names("x0 y0 x y time")
    return equations("x0 y0", "x y", [x0, y0], [x * time.cos(), -2 * time * y**2])


def exact(t: float) -> np.ndarray:
    return np.array([np.exp(np.sin(t)), 1 / (1 + t * t)])


class Stepper:
    """Takes steps of a given length in all lanes, whatever the error; output at one place within the step."""

    def __init__(self, code: Compiled) -> None:
        self.code, self.layout = code, code.layout
        self.group = aligned(self.layout.slots)
        self.words = self.group.view(np.int64)
        self.settings = settings_block(self.layout, settings(2, 1e30), 1.0, 1)
        self.seen, self.times = np.zeros((2, 1)), np.full(2, np.inf)

    def start(self, time: float) -> None:
        self.group[Head.time], self.group[Head.until], self.group[Head.due] = time, time + 1, np.inf
        self.group[self.layout.first_input : self.layout.first_input + 2] = exact(time)[:, None]
        call_group(self.code.addresses["uq_start"], self.group, self.settings)

    def step(self, h: float, theta: float = 0.0) -> np.ndarray:
        """The new states; what is seen at theta is left in `seen`."""
        now = float(self.group[Head.time, 0])
        self.group[Head.step], self.group[Head.until] = h, now + h
        self.group[Head.due] = now + theta * h if theta else np.inf
        self.words[Head.clock], self.words[Head.place] = self.times.ctypes.data, self.seen.ctypes.data
        call_group(self.code.addresses["uq_step"], self.group, self.settings)
        return self.group[self.layout.first_state : self.layout.first_state + 2, 0].copy()


def slope(h: np.ndarray, error: np.ndarray) -> float:
    """The order that errors show."""
    return float(np.polyfit(np.log(h), np.log(error), 1)[0])


@pytest.fixture(params=[WrittenOut, Looped])
def code(request: pytest.FixtureRequest) -> Compiled:
    plan = replace(Plan.of(growing_and_falling(), DORMAND_PRINCE_54), form=request.param)
    return compile_for(write(plan), Processor.here())


def test_the_pair_is_of_order_five(code: Compiled) -> None:
    counts = np.array([40, 60, 90, 135])
    errors = []
    for n in counts:
        stepper = Stepper(code)
        stepper.start(START)
        for _ in range(n):
            last = stepper.step(2.0 / n)
        assert stepper.group[Head.steps, 0] == n
        errors.append(np.abs(last - exact(START + 2.0)).max())
    assert slope(2.0 / counts, np.array(errors)) == pytest.approx(5, abs=0.3)


@pytest.mark.parametrize("theta", [0.2, 0.45, 0.8])
def test_the_continuous_extension_is_of_order_four(code: Compiled, theta: float) -> None:
    # within one step from exact values its error falls with the fifth power of the step, which is what order four means
    lengths, errors = np.array([0.4, 0.2, 0.1, 0.05]), []
    for h in lengths:
        stepper = Stepper(code)
        stepper.start(START)
        stepper.step(h, theta)
        errors.append(np.abs(stepper.seen[:, 0] - exact(START + theta * h)).max())
    assert slope(lengths, np.array(errors)) == pytest.approx(5, abs=0.3)


def test_the_error_estimate_is_of_order_four(code: Compiled) -> None:
    # The difference of a solution of order 5 and one of order 4 falls with the fifth power of the step. The controller keeps log2 of its
    # square, in units of the tolerance.
    lengths, errors = np.array([0.2, 0.14, 0.1, 0.07]), []
    for h in lengths:
        stepper = Stepper(code)
        stepper.settings[0], stepper.settings[stepper.layout.first_tolerance : stepper.layout.first_lowest] = 0.0, 1e-6
        stepper.start(START)
        stepper.step(h)
        assert stepper.group[Head.steps, 0] == 1
        errors.append(2.0 ** (stepper.group[Head.log_error, 0] / 2))
    assert slope(lengths, np.array(errors)) == pytest.approx(5, abs=0.3)


def test_compiled_once_per_process() -> None:
    assert compiled(growing_and_falling()) is compiled(growing_and_falling())

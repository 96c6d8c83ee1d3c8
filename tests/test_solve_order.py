"""Orders are measured, not believed: of the pair, and of its continuous extension."""

from __future__ import annotations

from dataclasses import replace

import numpy as np
import pytest

from tests.solver_models import compiled, equations, names, settings
from uq.model.build import write
from uq.model.columns import Looped, WrittenOut
from uq.model.layout import Head
from uq.model.pair import Pair
from uq.model.points import Plan
from uq.model.tableau import DORMAND_PRINCE_54, DORMAND_PRINCE_853, PAIRS
from uq.solve.compile import Compiled, Processor, compile_for
from uq.solve.memory import aligned, call_group, settings_block

# Every lane starts elsewhere, and errors are root mean squares over the lanes: in a single one an error may be near one of its zeros.
STARTS = np.linspace(0.3, 2.4, 8)


def growing_and_falling():
    """x = exp(sin t), y = 1 / (1 + t^2)."""
    x0, y0, x, y, time = names("x0 y0 x y time")
    return equations("x0 y0", "x y", [x0, y0], [x * time.cos(), -2 * time * y**2])


def exact(t: np.ndarray) -> np.ndarray:
    return np.array([np.exp(np.sin(t)), 1 / (1 + t * t)])


class Stepper:
    """Takes steps of a given length in all lanes, whatever the error; output at one place within the step."""

    def __init__(self, code: Compiled, tolerance: float = np.inf) -> None:
        self.code, self.layout = code, code.layout
        self.group = aligned(self.layout.slots)
        self.words = self.group.view(np.int64)
        self.settings = settings_block(self.code.code, settings(2, 1e-300, negligible=[tolerance] * 2), 1.0, 1)
        self.seen, self.times = np.zeros((8, 2)), np.full(9, np.inf)
        self.group[Head.time], self.group[Head.until], self.group[Head.due] = STARTS, STARTS + 1, np.inf
        self.group[self.layout.first_input : self.layout.first_input + 2] = exact(STARTS)
        call_group(self.code.addresses["uq_start"], self.group, self.settings)

    def step(self, h: float, theta: float = 0.0) -> np.ndarray:
        """The new states; what is seen at theta is left in `seen` [lane, state]."""
        now = self.group[Head.time].copy()
        self.group[Head.step], self.group[Head.until] = h, now + h
        self.group[Head.due] = now + theta * h if theta else np.inf
        self.words[Head.clock], self.words[Head.place] = self.times.ctypes.data, self.seen.ctypes.data + 16 * np.arange(8)
        call_group(self.code.addresses["uq_step"], self.group, self.settings)
        return self.group[self.layout.first_state : self.layout.first_state + 2].copy()


def size(errors: np.ndarray) -> float:
    """Root mean square."""
    return float(np.sqrt(np.mean(errors**2)))


def slope(h: np.ndarray, error: np.ndarray) -> float:
    """The order that errors show."""
    return float(np.polyfit(np.log(h), np.log(error), 1)[0])


@pytest.fixture(params=[(pair, form) for pair in PAIRS for form in (WrittenOut, Looped)], ids=lambda p: f"{p[0].name}-{p[1].__name__}")
def case(request: pytest.FixtureRequest) -> tuple[Pair, Compiled]:
    pair, form = request.param
    return pair, compile_for(write(replace(Plan.of(growing_and_falling(), pair), form=form)), Processor.here())


# Step counts, lengths of one step: where errors follow the order and are well above rounding.
COUNTS = {DORMAND_PRINCE_54.name: (40, 56, 80, 112), DORMAND_PRINCE_853.name: (10, 12, 14, 17, 20)}
LENGTHS = {DORMAND_PRINCE_54.name: (0.14, 0.1, 0.07, 0.05), DORMAND_PRINCE_853.name: (0.2, 0.14, 0.1, 0.07)}
ESTIMATES = {DORMAND_PRINCE_54.name: (0.14, 0.1, 0.07, 0.05), DORMAND_PRINCE_853.name: (0.56, 0.4, 0.28, 0.2)}


def test_the_pair_is_of_its_order(case: tuple[Pair, Compiled]) -> None:
    pair, code = case
    counts, errors = np.array(COUNTS[pair.name]), []
    for n in counts:
        stepper = Stepper(code)
        for _ in range(n):
            last = stepper.step(2.0 / n)
        assert np.all(stepper.group[Head.steps] == n)
        errors.append(size(last - exact(STARTS + 2.0)))
    assert slope(2.0 / counts, np.array(errors)) == pytest.approx(pair.order, abs=0.3)


@pytest.mark.parametrize("theta", [0.2, 0.45, 0.8])
def test_the_continuous_extension_is_of_its_order(case: tuple[Pair, Compiled], theta: float) -> None:
    # within one step from exact values its error falls with the (order + 1)st power of the step, which is what the order means
    pair, code = case
    lengths, errors = np.array(LENGTHS[pair.name]), []
    for h in lengths:
        stepper = Stepper(code)
        stepper.step(h, theta)
        errors.append(size(stepper.seen.T - exact(STARTS + theta * h)))
    assert slope(lengths, np.array(errors)) == pytest.approx(pair.extension_order + 1, abs=0.3)


def test_the_error_estimate_is_of_its_order(case: tuple[Pair, Compiled]) -> None:
    # The difference of solutions of orders 5 and 4 falls with the fifth power of the step; of the 8(5,3) pair the two estimates fall with
    # the sixth and the fourth, what is made of them with the eighth. The controller keeps log2 of its square, in units of the tolerance.
    pair, code = case
    lengths, errors = np.array(ESTIMATES[pair.name]), []
    for h in lengths:
        tolerance = 0.1 * h**pair.order
        stepper = Stepper(code, tolerance)
        stepper.step(h)
        assert np.all(stepper.group[Head.steps] == 1)
        errors.append(tolerance * size(2.0 ** (stepper.group[Head.log_error] / 2)))
    assert slope(lengths, np.array(errors)) == pytest.approx(pair.order, abs=0.3)


def test_compiled_once_per_process() -> None:
    assert compiled(growing_and_falling()) is compiled(growing_and_falling())

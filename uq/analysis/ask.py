"""What the tallies are told about the forecast: names, times, levels, the pilot's centres and floors."""

from __future__ import annotations

from dataclasses import dataclass, field
from functools import cached_property
from typing import Literal

import numpy as np
from numpy.typing import NDArray

Floats = NDArray[np.float64]
Counts = NDArray[np.int64]


@dataclass(frozen=True)
class Quantity:
    """A watched quantity or an outcome: public name, label and unit text; `difference_unit` is what a deviation of it is measured in."""

    name: str
    label: str
    unit: str
    difference_unit: str = ""


@dataclass(frozen=True)
class LimitAsked:
    """A limit: name, label, condition as written, times at which it is quoted, the accepted probability if any."""

    name: str
    label: str
    when: str
    by: tuple[float, ...]
    accept: float | None = None


@dataclass(frozen=True, eq=False)
class Ask:
    """Everything the analysis room needs to know besides the members themselves.

    solved_times [solved]: the times at which a Batch has values; grid [time]: which of them are output times. Times in `time_unit`.
    `by` times of limits are among the solved times. centre, half_width [watched, time] and outcome_centre [outcome]: from the pilot
    (centre = median; half_width of the outermost quantiles, never 0). floor [watched] and outcome_floor [outcome]: accuracy x scale of
    the quantity; a variance at or below its square is noise. `pilot.pilot_ask` fills these five in.
    """

    time_unit: str
    solved_times: Floats
    grid: NDArray[np.intp]
    watched: tuple[Quantity, ...]
    outcomes: tuple[Quantity, ...]
    limits: tuple[LimitAsked, ...]
    inputs: tuple[str, ...]
    questions: tuple[str, ...]
    quantiles: tuple[float, ...]
    confidence: float
    failures: Literal["bound", "exclude", "refuse"]
    centre: Floats = field(default_factory=lambda: np.zeros((0, 0)))
    half_width: Floats = field(default_factory=lambda: np.zeros((0, 0)))
    outcome_centre: Floats = field(default_factory=lambda: np.zeros(0))
    floor: Floats = field(default_factory=lambda: np.zeros(0))
    outcome_floor: Floats = field(default_factory=lambda: np.zeros(0))

    @cached_property
    def times(self) -> Floats:
        """The output times [time]."""
        return self.solved_times[self.grid]

    @cached_property
    def grid_is_all(self) -> bool:
        """Whether every solved time is an output time, so that nothing need be picked out."""
        return len(self.grid) == len(self.solved_times)

    @cached_property
    def judged(self) -> NDArray[np.intp]:
        """Places among the solved times at which limits are judged: the output times and all `by` times."""
        by = [self.place(time) for limit in self.limits for time in limit.by]
        return np.unique(np.concatenate([self.grid, np.asarray(by, dtype=np.intp)]))

    def place(self, time: float) -> int:
        """The place of a time among the solved times: the nearest one (they hold every `by` time, up to rounding)."""
        return int(np.argmin(np.abs(self.solved_times - time)))

    def asks(self, question: str) -> bool:
        """Whether the plan asks this question."""
        return question in self.questions

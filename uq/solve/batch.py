"""What the solve room takes and makes besides `Code`: settings in, a `Batch` of solved members out."""

from __future__ import annotations

from dataclasses import dataclass
from enum import IntEnum

import numpy as np
from numpy.typing import NDArray

Floats = NDArray[np.float64]


class Status(IntEnum):
    """How a member ended. The words are public names in result.nc."""

    ok = 0
    ended_by_event = 1
    out_of_range = 2
    not_finite = 3
    blew_up = 4
    too_many_steps = 5
    too_many_events = 6
    step_too_small = 7
    out_of_time = 8


class Truth(IntEnum):
    """The values of a condition: unknown where a number that it compares is not one, unless `and` or `or` decides all the same."""

    false = 0
    true = 1
    unknown = 2


@dataclass(frozen=True)
class Settings:
    """How members are solved: relative tolerance `accuracy`, `scales` [state] in state units, `lowest` and `highest` [state] valid values
    (-inf, inf where none; a state is outside where it is beyond them by more than the solver's own error), `max_steps` per member,
    `negligible` [state] changes in state units that do not matter (nan, or None for all, where nothing is said)."""

    accuracy: float
    scales: Floats
    lowest: Floats
    highest: Floats
    max_steps: int = 100_000
    negligible: Floats | None = None

    @property
    def absolute(self) -> Floats:
        """Absolute tolerances [state], in state units: `negligible` where it is said, else accuracy x scale."""
        usual = self.accuracy * self.scales
        return usual if self.negligible is None else np.where(np.isnan(self.negligible), usual, self.negligible)


@dataclass(frozen=True)
class Batch:
    """Solved members, in the order of the rows of x.

    values [member, observed, time] (float64, C order; nan from the time of failure on), conditions [member, condition, time] (int8, see
    `Truth`; unknown from failure on), outcomes [member, outcome] (nan where a course has no value or the member failed), status [member]
    (int8), end_time [member] (time of failure, else the last time), steps and rejections [member] (int32), stiff_steps [member] (int32,
    how many of the steps were stiff), switches [member] (int32, from explicit to stiff steps or back), largest [member, state] (largest
    |x| over start and accepted steps).
    """

    values: Floats
    conditions: NDArray[np.int8]
    outcomes: Floats
    status: NDArray[np.int8]
    end_time: Floats
    steps: NDArray[np.int32]
    rejections: NDArray[np.int32]
    stiff_steps: NDArray[np.int32]
    switches: NDArray[np.int32]
    largest: Floats

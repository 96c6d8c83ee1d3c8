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


@dataclass(frozen=True)
class InputGroup:
    """Inputs ranked together, or drawn together from a file: the group's name, and the places of its inputs in ascending order."""

    name: str
    places: tuple[int, ...]


@dataclass(frozen=True)
class Measured:
    """Observations of the watched quantity at place `watched`: times, all of them solved times, values, standard deviations (0: exact)."""

    watched: int
    times: tuple[float, ...]
    values: tuple[float, ...]
    sd: tuple[float, ...]


@dataclass(frozen=True, eq=False)
class Classes:
    """How every input is cut into classes: inner edges [input, class - 1], ascending; centre and scale [input] that shift and divide it."""

    edges: Floats
    centre: Floats
    scale: Floats

    @property
    def many(self) -> int:
        """How many classes an input has."""
        return int(self.edges.shape[1]) + 1


@dataclass(frozen=True, eq=False)
class Scale:
    """About where the values of each cell lie and how far apart, from the pilot: the map of their histograms (`counting`)."""

    centre: Floats
    width: Floats


@dataclass(frozen=True, eq=False)
class Ask:
    """Everything the analysis room needs to know besides the members themselves.

    solved_times [solved]: the times at which a Batch has values; grid [time]: which of them are output times. Times in `time_unit`.
    `by` times of limits are among the solved times. centre, half_width [watched, time] and outcome_centre [outcome]: from the pilot
    (centre = median; half_width of the outermost quantiles, never 0). floor [watched] and outcome_floor [outcome]: accuracy x scale of
    the quantity; a variance at or below its square is noise. `pilot.pilot_ask` fills these five in.

    keep_bytes: so many bytes of values of A and B members are kept, of `members` in the whole run; where they would be more, all are
    counted into histograms instead, on the maps value_scale [watched x time], outcome_scale [outcome] and deviation_scale [watched], which
    the pilot fills in.

    sets: of every mixed row, the places of the inputs that it does not share with A, in the order of the design (None: one row for each
    input). groups: inputs ranked together. dependent: whether any inputs depend on each other; then `units` are what Shapley effects are
    of (each the places of its inputs; None: every input by itself), `orders` the random orders of units where there are too many for all,
    and `classes` what the given-data estimator cuts the inputs into (`given.pilot_classes` fills it in).
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
    sets: tuple[tuple[int, ...], ...] | None = None
    groups: tuple[InputGroup, ...] = ()
    dependent: bool = False
    units: tuple[tuple[int, ...], ...] | None = None
    orders: tuple[tuple[int, ...], ...] = ()
    classes: Classes | None = None
    measured: tuple[Measured, ...] = ()
    keep_bytes: int = 512_000_000
    members: int = 0
    value_scale: Scale = field(default_factory=lambda: Scale(np.zeros(0), np.zeros(0)))
    outcome_scale: Scale = field(default_factory=lambda: Scale(np.zeros(0), np.zeros(0)))
    deviation_scale: Scale = field(default_factory=lambda: Scale(np.zeros(0), np.zeros(0)))

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

    @cached_property
    def mixed(self) -> tuple[tuple[int, ...], ...]:
        """Of every mixed row, the places of the inputs that it does not share with A."""
        return tuple((place,) for place in range(len(self.inputs))) if self.sets is None else self.sets

    @cached_property
    def shared_out(self) -> tuple[tuple[int, ...], ...]:
        """What Shapley effects are of: each the places of its inputs."""
        return tuple((place,) for place in range(len(self.inputs))) if self.units is None else self.units

    @cached_property
    def keeps(self) -> bool:
        """Whether the values of all A and B members are kept; it depends on nothing but the whole run's members."""
        return kept_bytes(self, self.members) <= self.keep_bytes

    def asks(self, question: str) -> bool:
        """Whether the plan asks this question."""
        return question in self.questions


def kept_bytes(ask: Ask, members: int) -> int:
    """Bytes needed to keep the values of so many A and B members."""
    bands = len(ask.watched) * (len(ask.grid) + 1) if ask.asks("bands") else 0
    return 8 * members * (bands + (len(ask.outcomes) if ask.asks("outcomes") else 0))

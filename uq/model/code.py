"""What the model room takes and makes: declared equations in, machine code as text out.

`Equations` is a set of nodes of one expression graph; `Code` is plain data: it can be hashed, cached, sent to a worker and compiled there.
"""

from __future__ import annotations

import hashlib
from dataclasses import dataclass, field
from itertools import pairwise
from math import isfinite
from typing import Literal

from uq.errors import ValueMistake
from uq.lang.graph import Graph, Node
from uq.model.layout import Layout

CourseKind = Literal["highest", "lowest", "average", "integral", "final", "value_at"]
Solver = Literal["auto", "explicit", "stiff"]
Interpolation = Literal["linear", "step", "smooth"]
Outside = Literal["refuse", "hold", "repeat"]
TableInterpolation = Literal["linear", "smooth"]
TableOutside = Literal["refuse", "hold"]
# Every point costs four to six vector operations at every evaluation: 500 of them about 100 ns per member (`uq.model.tables`).
LARGEST_TABLE = 500


@dataclass(frozen=True)
class Forcing:
    """A given course over time: rows in order of time, in the study's time unit and the forcing's own unit.

    `interpolation`: a straight line from row to row, the value of the last row ("step"), or a monotone cubic ("smooth"). `outside` of the
    rows: "refuse" (a "step" holds its last value all the same), "hold" the first and the last value, or "repeat" with the period last
    time - first time (the value at the seam is that of the first row).
    """

    name: str
    times: tuple[float, ...]
    values: tuple[float, ...]
    interpolation: Interpolation = "linear"
    outside: Outside = "refuse"


@dataclass(frozen=True)
class Table:
    """A function given by points, in order of `points` (its argument, in the unit of `of`), `values` in the table's own unit.

    `interpolation`: a straight line from point to point, or a monotone cubic ("smooth"). `outside` of the points: "refuse" (not a number,
    so that the member ends with not_finite) or "hold" the first and the last value. ValueMistake if there are fewer than two points or
    more than LARGEST_TABLE, if they do not rise, or if a number is not finite.
    """

    name: str
    points: tuple[float, ...]
    values: tuple[float, ...]
    interpolation: TableInterpolation = "linear"
    outside: TableOutside = "refuse"

    def __post_init__(self) -> None:
        key = f"tables.{self.name}.rows"
        if not 2 <= len(self.points) == len(self.values) <= LARGEST_TABLE:
            found = f"{len(self.points)} points and {len(self.values)} values"
            raise ValueMistake(found, f"as many values as points, at least 2, at most {LARGEST_TABLE}", key=key)
        if not all(map(isfinite, (*self.points, *self.values))):
            raise ValueMistake("a number that is not finite", "finite numbers", key=key)
        for before, after in pairwise(self.points):
            if not before < after:
                raise ValueMistake(f"{after:g} after {before:g}", "points that rise from row to row", key=key)


@dataclass(frozen=True)
class Operation:
    """One value of time and forcings: an operator of the graph with the places of its arguments, or a leaf.

    `value`: the number ("number"), the place of the forcing ("forcing"), the table ("table", "table_slope"); None for all else.
    """

    op: str
    args: tuple[int, ...]
    value: float | int | Table | None = None


@dataclass(frozen=True)
class Moments:
    """What turns in a model's rates with time and forcings alone: operations, arguments first, and the places of those that turn."""

    operations: tuple[Operation, ...] = ()
    turns: tuple[int, ...] = ()


@dataclass(frozen=True)
class Course:
    """A number taken from the course of an observed quantity, within [start, stop] (`value_at`: start = stop = the time)."""

    kind: CourseKind
    observed: int
    start: float
    stop: float


@dataclass(frozen=True)
class Equations:
    """Everything that must be computed for one member, as nodes of one graph.

    Leaves are `graph.name(...)`: the input names, the state names, the forcing names, "time", and in `outcomes` also "course:0",
    "course:1", ... for the values of `courses`. `starts` are nodes of inputs only. `observed` nodes depend on inputs, states, forcings and
    time; the watched quantities come first, in their order. `conditions` are truth values (comparison or and/or/not nodes).
    A node with op "table" (its value is the name of one of `tables`, its one argument the place) is the table's value there, op
    "table_slope" its derivative.
    """

    graph: Graph
    inputs: tuple[str, ...]
    states: tuple[str, ...]
    starts: tuple[Node, ...]
    rates: tuple[Node, ...]
    forcings: tuple[Forcing, ...] = ()
    observed: tuple[Node, ...] = ()
    conditions: tuple[Node, ...] = ()
    courses: tuple[Course, ...] = ()
    outcomes: tuple[Node, ...] = ()
    tables: tuple[Table, ...] = ()


@dataclass(frozen=True)
class Code:
    """A model as LLVM text with the sizes and slots that a caller needs; the same model gives the same text.

    `outcomes`: their number. `method`: the methods whose steps are in the text, `solver` which of them members take. `moments`: of which
    times the caller must make breaks, as of the rows of forcings. `undershoot`: see `uq.model.pair.Pair`.
    """

    text: str
    inputs: tuple[str, ...]
    states: tuple[str, ...]
    outcomes: int
    forcings: tuple[Forcing, ...]
    courses: tuple[Course, ...]
    layout: Layout
    method: str
    solver: Solver = "explicit"
    moments: Moments = Moments()
    undershoot: float = 0.0
    fingerprint: str = field(init=False)

    def __post_init__(self) -> None:
        plain = repr((self.text, self.inputs, self.states, self.forcings, self.courses, self.layout, self.method, self.moments))
        object.__setattr__(self, "fingerprint", hashlib.sha256(plain.encode()).hexdigest())

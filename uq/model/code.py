"""What the model room takes and makes: declared equations in, machine code as text out.

`Equations` is a set of nodes of one expression graph; `Code` is plain data: it can be hashed, cached, sent to a worker and compiled there.
"""

from __future__ import annotations

import hashlib
from dataclasses import dataclass, field
from typing import Literal

from uq.lang.graph import Graph, Node

CourseKind = Literal["highest", "lowest", "average", "integral", "final", "value_at"]
Interpolation = Literal["linear", "step"]


@dataclass(frozen=True)
class Forcing:
    """A given course over time: rows in order of time, in the study's time unit and the forcing's own unit."""

    name: str
    times: tuple[float, ...]
    values: tuple[float, ...]
    interpolation: Interpolation = "linear"


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


@dataclass(frozen=True)
class Code:
    """A model as LLVM text with the sizes that a caller needs; the same model gives the same text.

    `hoisted`: number of values that depend on inputs alone and are worked out once per member.
    `method`: the pair whose step is written out in the text.
    """

    text: str
    inputs: tuple[str, ...]
    states: tuple[str, ...]
    hoisted: int
    observed: int
    conditions: int
    outcomes: int
    forcings: tuple[Forcing, ...]
    courses: tuple[Course, ...]
    method: str = "explicit54"
    fingerprint: str = field(init=False)

    def __post_init__(self) -> None:
        plain = repr((self.text, self.inputs, self.states, self.forcings, self.courses, self.method))
        object.__setattr__(self, "fingerprint", hashlib.sha256(plain.encode()).hexdigest())

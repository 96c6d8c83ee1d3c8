"""When enough rounds are done: a decision, values in and values out; the clock is read elsewhere."""

from __future__ import annotations

from collections.abc import Sequence
from dataclasses import dataclass
from typing import Literal

from uq.analysis.precision import Asked, Round, settled

# Why no further round is begun: nothing was asked but the members, the precision is reached, that much is spent, or the run was stopped and
# the answer so far is wanted.
Ending = Literal["", "reached", "members", "solves", "minutes", "deadline"]


@dataclass(frozen=True)
class Aims:
    """What is wanted and what may be spent on it: a precision (None: the members alone decide), solves, seconds (None: no bound)."""

    precision: Asked | None = None
    solves: int | None = None
    seconds: float | None = None


@dataclass(frozen=True)
class Spent:
    """What was spent when a round ended, and what the next one would add to it (solves, all branches together)."""

    solves: int
    seconds: float
    more: int


def ending(rounds: Sequence[Round], aims: Aims, spent: Spent) -> Ending:
    """Why the run ends after a round that is not the last one possible; "" where it goes on.

    Solves must be enough for the whole of the next round, and so must the time, judged by what the solves so far have taken: an answer is
    only given at the end of a round, and one that cannot be finished would be for nothing.
    """
    if aims.precision is None:
        return ""
    if settled(rounds[-1].headlines, aims.precision):
        return "reached"
    if aims.solves is not None and spent.solves + spent.more > aims.solves:
        return "solves"
    if aims.seconds is not None and spent.seconds * (1 + spent.more / max(spent.solves, 1)) > aims.seconds:
        return "minutes"
    return ""


def last_ending(rounds: Sequence[Round], aims: Aims) -> Ending:
    """Why the run ends where the design has no further round."""
    if aims.precision is None:
        return ""
    return "reached" if settled(rounds[-1].headlines, aims.precision) else "members"

"""All tallies of a run together: made of one block, merged in any order, asked for findings at the end of a round."""

from __future__ import annotations

from collections.abc import Callable, Mapping
from dataclasses import dataclass
from typing import Any, Protocol, Self

from uq.analysis import bands, limits, outcomes, ranking
from uq.analysis.ask import Ask, Floats
from uq.analysis.bands import Apply, Watched
from uq.analysis.failures import Failures
from uq.analysis.finding import Finding
from uq.analysis.kept import Courses, kept_bytes, kept_outcomes
from uq.analysis.members import Members
from uq.analysis.moments import outcome_moments, watched_moments
from uq.analysis.outcomes import Absent, Taken
from uq.analysis.passings import Passings
from uq.analysis.sample import Sample

__all__ = ["Sample", "Tallies", "kept_bytes"]


class Tally(Protocol):
    """What can be put together in any order."""

    def merge(self, other: Self) -> Self:
        """Both together: the same bits whatever the blocks and the order."""


def _watched(ask: Ask) -> bool:
    return bool(ask.watched) and (ask.asks("bands") or ask.asks("ranking"))


def _bands(ask: Ask) -> bool:
    return bool(ask.watched) and ask.asks("bands")


def _taken(ask: Ask) -> bool:
    return bool(ask.outcomes) and (ask.asks("outcomes") or ask.asks("ranking"))


def _outcomes(ask: Ask) -> bool:
    return bool(ask.outcomes) and ask.asks("outcomes")


def _judged(ask: Ask) -> bool:
    return bool(ask.limits) and (ask.asks("limits") or ask.asks("ranking"))


def _limits(ask: Ask) -> bool:
    return bool(ask.limits) and ask.asks("limits")


def _ranks(ask: Ask) -> bool:
    return bool(ask.inputs) and ask.asks("ranking")


def _always(ask: Ask) -> bool:
    return True


@dataclass(frozen=True)
class Tallied:
    """A tally by name: when it is needed, and how it is made of one block."""

    name: str
    needed: Callable[[Ask], bool]
    of: Callable[[Ask, Sample], Any]


TALLIES = (
    Tallied("watched", _watched, watched_moments),
    Tallied("courses", _bands, Courses.of),
    Tallied("outcomes", _taken, outcome_moments),
    Tallied("values", _outcomes, kept_outcomes),
    Tallied("absent", _outcomes, Absent.of),
    Tallied("passings", _judged, Passings.of),
    Tallied("members", _always, Members.of),
    Tallied("failures", _always, Failures.of),
)


@dataclass(frozen=True, eq=False)
class Told:
    """What findings are made of besides the tallies: the nominal run [watched, solved] if there is one, and `map` or something faster."""

    nominal: Floats | None
    apply: Apply


@dataclass(frozen=True)
class Question:
    """A question of the plan, or what every result says: when it is answered, and how, from the tallies by name."""

    answered: Callable[[Ask], bool]
    findings: Callable[[Ask, Mapping[str, Any], Told], tuple[Finding, ...]]


QUESTIONS = (
    Question(_limits, lambda ask, has, told: limits.findings(ask, has["passings"])),
    Question(_bands, lambda ask, has, told: bands.findings(ask, Watched(has["courses"], has["watched"]), told.nominal, told.apply)),
    Question(_outcomes, lambda ask, has, told: outcomes.findings(ask, Taken(has["values"], has["outcomes"], has["absent"]))),
    Question(lambda ask: _ranks(ask) and _judged(ask), lambda ask, has, told: ranking.limit_findings(ask, has["passings"])),
    Question(lambda ask: _ranks(ask) and _watched(ask), lambda ask, has, told: ranking.watched_findings(ask, has["watched"])),
    Question(lambda ask: _ranks(ask) and _taken(ask), lambda ask, has, told: ranking.outcome_findings(ask, has["outcomes"])),
    Question(_always, lambda ask, has, told: has["members"].findings(ask)),
    Question(_always, lambda ask, has, told: has["failures"].findings(ask)),
)


@dataclass(frozen=True, eq=False)
class Tallies:
    """The tallies that an ask needs, by name."""

    held: Mapping[str, Tally]

    @classmethod
    def of(cls, ask: Ask, sample: Sample) -> Tallies:
        """The tallies of one block. The ask must hold the pilot's centres (`pilot.pilot_ask`)."""
        return cls({tally.name: tally.of(ask, sample) for tally in TALLIES if tally.needed(ask)})

    def merge(self, other: Tallies) -> Tallies:
        """Both together, blocks of one replicate or of several; neither is changed."""
        return Tallies({name: tally.merge(other.held[name]) for name, tally in self.held.items()})

    def findings(self, ask: Ask, nominal: Floats | None = None, apply: Apply = map) -> tuple[Finding, ...]:
        """All answers. Every replicate must have the same rows, from 0, a power of two of them.

        nominal [watched, solved]: values of the run with all inputs at their median. apply: `map`, or the `map` of a thread pool.
        """
        told = Told(nominal, apply)
        return tuple(finding for question in QUESTIONS if question.answered(ask) for finding in question.findings(ask, self.held, told))

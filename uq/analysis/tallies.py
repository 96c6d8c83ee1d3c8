"""All tallies of a run together: made of one block, merged in any order, asked for findings at the end of a round."""

from __future__ import annotations

from collections.abc import Callable, Mapping
from dataclasses import dataclass
from typing import Any, Protocol, Self

from uq.analysis import bands, encoding, limits, measured, outcomes, ranking
from uq.analysis.ask import Ask, Floats
from uq.analysis.bands import Apply, Watched
from uq.analysis.failures import Failures
from uq.analysis.finding import Finding
from uq.analysis.given import ByClass, limits_by_class, outcomes_by_class, watched_by_class
from uq.analysis.histograms import BinnedCourses, Histograms, binned_kept_outcomes, binned_outcomes
from uq.analysis.kept import Courses, Kept, kept_bytes, kept_outcomes
from uq.analysis.measured import Measured
from uq.analysis.members import Members
from uq.analysis.moments import Moments, outcome_moments, watched_moments
from uq.analysis.outcomes import Absent, Taken
from uq.analysis.passings import Passings
from uq.analysis.pieces import Array
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


def _dependent(ask: Ask) -> bool:
    return _ranks(ask) and ask.dependent


def _always(ask: Ask) -> bool:
    return True


@dataclass(frozen=True)
class Earlier:
    """What a smaller run held under the same name, and how the tally is made of it."""

    kind: type[Any]
    of: Callable[[Ask, Any], Any]


@dataclass(frozen=True)
class Tallied:
    """A tally by name: its kind, when it is needed, how it is made of one block, and of what a run of fewer members held in its place."""

    name: str
    kind: type[Any]
    needed: Callable[[Ask], bool]
    of: Callable[[Ask, Sample], Any]
    earlier: Earlier | None = None

    def decoded(self, ask: Ask, arrays: Mapping[str, Array]) -> Any:
        """The tally from its arrays."""
        if self.earlier and not any(path.endswith("centre") for path in arrays):
            return self.earlier.of(ask, encoding.of_arrays(self.earlier.kind, arrays))
        return encoding.of_arrays(self.kind, arrays)


TALLIES = (
    Tallied("watched", Moments, _watched, watched_moments),
    Tallied("courses", Courses, lambda ask: _bands(ask) and ask.keeps, Courses.of),
    Tallied("courses", BinnedCourses, lambda ask: _bands(ask) and not ask.keeps, BinnedCourses.of, Earlier(Courses, BinnedCourses.of_kept)),
    Tallied("outcomes", Moments, _taken, outcome_moments),
    Tallied("values", Kept, lambda ask: _outcomes(ask) and ask.keeps, kept_outcomes),
    Tallied("values", Histograms, lambda ask: _outcomes(ask) and not ask.keeps, binned_outcomes, Earlier(Kept, binned_kept_outcomes)),
    Tallied("absent", Absent, _outcomes, Absent.of),
    Tallied("passings", Passings, _judged, Passings.of),
    Tallied("watched_by_class", ByClass, lambda ask: _dependent(ask) and _watched(ask), watched_by_class),
    Tallied("outcomes_by_class", ByClass, lambda ask: _dependent(ask) and _taken(ask), outcomes_by_class),
    Tallied("limits_by_class", ByClass, lambda ask: _dependent(ask) and _judged(ask), limits_by_class),
    Tallied("measured", Measured, lambda ask: bool(ask.measured), Measured.of),
    Tallied("members", Members, _always, Members.of),
    Tallied("failures", Failures, _always, Failures.of),
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
    Question(
        lambda ask: _ranks(ask) and _judged(ask),
        lambda ask, has, told: ranking.limit_findings(ask, has["passings"], has.get("limits_by_class")),
    ),
    Question(
        lambda ask: _ranks(ask) and _watched(ask),
        lambda ask, has, told: ranking.watched_findings(ask, has["watched"], has.get("watched_by_class")),
    ),
    Question(
        lambda ask: _ranks(ask) and _taken(ask),
        lambda ask, has, told: ranking.outcome_findings(ask, has["outcomes"], has.get("outcomes_by_class")),
    ),
    Question(lambda ask: bool(ask.measured), lambda ask, has, told: measured.findings(ask, has["measured"])),
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

    def arrays(self) -> dict[str, Array]:
        """The tallies as arrays by path: exact, and those of kept values are not copied."""
        return {f"{name}/{path}": array for name, tally in self.held.items() for path, array in encoding.to_arrays(tally).items()}

    @classmethod
    def of_arrays(cls, ask: Ask, arrays: Mapping[str, Array]) -> Tallies:
        """The tallies that `arrays` tells of; they merge and answer as those did.

        Where the ask counts values into histograms and the arrays hold kept ones, they are counted now: a run goes on beyond `keep_bytes`.
        """
        needed = [tally for tally in TALLIES if tally.needed(ask)]
        return cls({tally.name: tally.decoded(ask, encoding.below(arrays, tally.name)) for tally in needed})

    def findings(self, ask: Ask, nominal: Floats | None = None, apply: Apply = map) -> tuple[Finding, ...]:
        """All answers. Every replicate must have the same rows, from 0, a power of two of them.

        nominal [watched, solved]: values of the run with all inputs at their median. apply: `map`, or the `map` of a thread pool.
        """
        told = Told(nominal, apply)
        return tuple(finding for question in QUESTIONS if question.answered(ask) for finding in question.findings(ask, self.held, told))

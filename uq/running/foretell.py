"""What a run would take, from its pilot: a short run of 16 rows of every replicate, and nothing written."""

from __future__ import annotations

import math
from collections.abc import Callable, Iterator, Sequence
from dataclasses import dataclass, replace

import numpy as np

from uq.analysis.precision import Headline, Needed, Round, headline, needed
from uq.design.design import LEAST_MEMBERS
from uq.design.sobol import MOST_ROWS
from uq.running.branch import STUDY, forecasts_of
from uq.running.course import to_the_end
from uq.running.keeping import Forgetful
from uq.running.meter import Meter
from uq.running.observer import Observer
from uq.running.resume import gone_on_with
from uq.running.rounds import Crew, Spread, answered
from uq.running.setup import design_of, most_rows, scenario_designs, solves_of_row
from uq.running.start import Start
from uq.study.study import Study

# 16 A and 16 B rows of every replicate: the least that a design has.
PILOT_MEMBERS = LEAST_MEMBERS
PRECISION_KINDS = ("probabilities", "quantiles", "indices")


@dataclass(frozen=True)
class Expected:
    """The largest half-width that one kind of headline number is expected to have, and of which (its group in the result)."""

    kind: str
    half_width: float
    group: str


@dataclass(frozen=True)
class Foretold:
    """What the pilot says. members, solves, failed, seconds: of the pilot itself, one core; scenarios are not in it.

    asked: solves of the run as it is asked, with a precision as many as it may use. needed: where a precision is asked, the solves it will
    take; expected: the half-widths expected at the solves asked. possible: the most solves that any run of this study can have.
    """

    members: int
    solves: int
    failed: int
    seconds: float
    asked: int
    needed: Needed | None
    expected: tuple[Expected, ...]
    possible: float = math.inf


def foretold(study: Study, spread: Spread, observer: Observer, clock: Callable[[], float]) -> Foretold:
    """Solves the pilot of the study itself and says what its run would take. Raises Interrupted as a run does."""
    short = replace(study, plan=replace(study.plan, members=PILOT_MEMBERS, precision=None, at_most=None), scenarios=())
    crew = Crew(spread, Meter(design_of(short).solves, observer, clock), observer)
    running, standing, begun = gone_on_with(short, forecasts_of(short), crew, Forgetful(), Start())
    standing = to_the_end(running, standing, begun)
    base, part = running.branches[0], standing.parts[STUDY]
    said = headline(answered(base, part, crew), base.forecast.ask, part.members)
    now = Round(part.members, part.count.solves, said)
    asked = _asked(study, part.count.seconds / max(part.count.solves, 1) / spread.workers)
    wanted = study.plan.precision
    return Foretold(
        members=now.members,
        solves=now.solves,
        failed=part.count.failed,
        seconds=part.count.seconds,
        asked=asked,
        needed=None if wanted is None else needed([now], wanted),
        expected=tuple(expected(said, now.solves / asked)),
        possible=float(MOST_ROWS * solves_of_row([base.forecast.design])),
    )


def _asked(study: Study, seconds_per_solve: float) -> int:
    """The solves of the study itself that its plan allows: by members, by solves, and by the time that they take on all threads."""
    own, rows = design_of(study), most_rows(study)
    minutes = study.plan.at_most.minutes if study.plan.at_most else None
    bounds = [] if rows is None else [rows * solves_of_row([own])]
    if minutes is not None:
        share = solves_of_row([own]) / solves_of_row([own, *scenario_designs(study)])
        bounds.append(int(60 * minutes / seconds_per_solve * share) if seconds_per_solve > 0 else own.solves)
    return max(min(bounds), own.rounds()[0][1] * solves_of_row([own]))


def expected(headlines: Sequence[Headline], share: float) -> Iterator[Expected]:
    """The largest half-widths by kind in a run of which the pilot is this share: they fall like the root of the solves.

    Numbers that the pilot could not give are left out.
    """
    for kind in PRECISION_KINDS:
        widths = [(each, each.half_widths[np.isfinite(each.half_widths) & ~each.undefined]) for each in headlines if each.kind == kind]
        known = [(float(half.max()), each.group) for each, half in widths if half.size]
        if known:
            half, group = max(known)
            yield Expected(kind, half * math.sqrt(share), group)

"""What is kept of a run besides its findings."""

from __future__ import annotations

from datetime import UTC, datetime

from uq import __version__
from uq.analysis.precision import needed
from uq.running.branch import STUDY
from uq.running.course import Running, Standing
from uq.running.meter import Count
from uq.running.start import Start
from uq.solve.compile import Processor
from uq.store.facts import Counts, PrecisionReached, RunFacts, versions
from uq.study.study import Study


def facts_of(study: Study, run: Running, standing: Standing, start: Start) -> RunFacts:
    """The facts of a run that has just come to its end."""
    crew, pilot, count = run.crew, run.branches[0].pilot, standing.parts[STUDY].count
    forecast = pilot.forecast
    code, design = forecast.compiled.code, forecast.design
    return RunFacts(
        seed=design.seed,
        members_asked=None if study.plan.members_open else study.plan.members,
        members=2 * design.replicates * standing.rows,
        members_failed=count.failed_members,
        solves=count.solves,
        solves_failed=count.failed,
        replicates=design.replicates,
        wall_time=crew.meter.elapsed,
        finished=datetime.now(UTC),
        method=code.method,
        accuracy=forecast.settings.accuracy,
        threads=crew.cores,
        cluster=crew.hands.words,
        stopped=standing.ended if standing.early else "",
        seconds_per_solve=crew.meter.all_in(crew.cores),
        scales=dict(zip(code.states, forecast.settings.scales.tolist(), strict=True)),
        fell_back=pilot.fell_back,
        versions=versions(__version__),
        processor=Processor.here().words,
        command=start.command,
        earlier=start.earlier,
        scenarios={name: _counts(run, standing, part.count) for name, part in standing.parts.items() if name != STUDY},
        precision=precision_of(run, standing),
    )


def _counts(run: Running, standing: Standing, count: Count) -> Counts:
    return Counts(2 * run.design.replicates * standing.rows, count.failed_members, count.solves, count.failed)


def precision_of(run: Running, standing: Standing) -> PrecisionReached | None:
    """What came of the precision asked; None where none was."""
    asked = run.aims.precision
    if asked is None:
        return None
    reached = standing.ended == "reached"
    expected = needed(standing.rounds, asked)
    return PrecisionReached(reached, "" if reached else standing.ended, expected.solves, expected.unknown, run.aims.solves)


def made_with() -> dict[str, str]:
    """What bits depend on besides the study: versions of everything that touches numbers, and the processor."""
    return {**versions(__version__), "processor": Processor.here().words}

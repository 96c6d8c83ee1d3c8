"""What is kept of a run besides its findings."""

from __future__ import annotations

import platform
from datetime import UTC, datetime

from uq import __version__
from uq.running.meter import Meter
from uq.running.pilot import Pilot
from uq.running.rounds import Spread
from uq.store.facts import RunFacts, versions
from uq.study.study import Study


def facts_of(study: Study, pilot: Pilot, meter: Meter, spread: Spread) -> RunFacts:
    """The facts of a run that has just come to its end."""
    count, design, forecast = meter.sofar, pilot.forecast.design, pilot.forecast
    code = forecast.compiled.code
    return RunFacts(
        seed=design.seed,
        members_asked=study.plan.members,
        members=design.members,
        members_failed=count.failed_members,
        solves=count.solves,
        solves_failed=count.failed,
        replicates=design.replicates,
        wall_time=meter.elapsed,
        finished=datetime.now(UTC),
        method=code.method,
        accuracy=forecast.settings.accuracy,
        threads=spread.workers,
        seconds_per_solve=meter.all_in(spread.workers),
        scales=dict(zip(code.states, forecast.settings.scales.tolist(), strict=True)),
        fell_back=pilot.fell_back,
        versions=versions(__version__),
        processor=platform.processor() or platform.machine(),
    )

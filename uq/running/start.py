"""What a run starts with besides its study."""

from __future__ import annotations

from collections.abc import Callable
from dataclasses import dataclass
from time import perf_counter

from uq.running.keeping import USUAL, Pace
from uq.running.observer import Observer, Silent
from uq.running.rounds import Crew, Spread
from uq.running.setup import meter_of
from uq.store.saved import Saved
from uq.study.study import Study


@dataclass(frozen=True, eq=False)
class Start:
    """before: what a shorter run of the same study has left. command, earlier: for the history of the result, the command as typed and the
    history of the result that is extended. clock: seconds from any beginning. pace: how often progress is kept. so_far: is asked when the
    run was stopped: whether to give the answer of the last completed round (as at a deadline), not none; all progress is kept then."""

    before: Saved | None = None
    command: str = ""
    earlier: str = ""
    clock: Callable[[], float] = perf_counter
    pace: Pace = USUAL
    so_far: Callable[[], bool] = lambda: False


def crew_for(study: Study, spread: Spread, observer: Observer | None, start: Start) -> Crew:
    """Who works on a study; the clock runs from now on."""
    watcher = observer or Silent()
    return Crew(spread, meter_of(study, watcher, start.clock), watcher)

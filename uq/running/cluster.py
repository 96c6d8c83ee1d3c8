"""Blocks solved on a `distributed` cluster: this process hands them out, gathers what they say and alone writes anything down."""

from __future__ import annotations

import uuid
from collections.abc import Callable, Iterator, Mapping, Sequence
from contextlib import contextmanager, suppress
from typing import Any

from uq.analysis.ask import kept_bytes
from uq.design.blocks import Block
from uq.errors import ClusterError, FatalMemberError, Interrupted, NoClusterError
from uq.running.abroad import carrier, strict
from uq.running.answering import ANSWERED_WITHIN, STOPPED, answered
from uq.running.block import Forecast
from uq.running.fleet import KILLS, Fleet, There
from uq.running.flight import LOST, Flight
from uq.running.meter import Count
from uq.running.muster import Muster
from uq.running.observer import Observer
from uq.running.parcel import fingerprint, packed
from uq.running.pilot import PILOT_ROWS, Found, Pilot, completed
from uq.running.rounds import Brought, Crew, Spread
from uq.running.rounds import Task as Named
from uq.running.tasks import Culprit, Handout, PilotHandout, Task, blocks_together, bundled, task_rows, window

Blame = Callable[[Culprit, Forecast], FatalMemberError]
Got = Callable[[Task, Any], None]
CONNECTED_WITHIN = 10
CLOSED_WITHIN = 5


class Cluster:
    """A cluster as those who solve. blame: makes the error that tells of a member which ends every process that solves it."""

    def __init__(self, client: Any, fleet: Fleet, blame: Blame) -> None:
        self._client, self._fleet, self._blame = client, fleet, blame
        self._muster = Muster(client, fleet)

    @property
    def words(self) -> str:
        return self._fleet.words

    def cores(self, spread: Spread) -> int:
        return self._muster.cores or self._fleet.cores

    def rows(self, forecast: Forecast, rows: int, crew: Crew) -> int:
        replicates, cores = forecast.design.replicates, self.cores(crew.spread)
        return task_rows(forecast.shape, kept_by(forecast), crew.meter.seconds_per_solve, rows, replicates, cores)

    def pilot(self, name: str, forecast: Forecast, crew: Crew) -> Pilot:
        """The pilot of a branch, solved by a worker, which it may end. Raises as `solve`."""
        found: list[tuple[Found, Count]] = []

        def got(task: Task, answer: Any) -> None:
            if answer is not None:  # of a row for trial
                found.append(answer)

        self._through(PilotHandout(name, forecast.design.replicates, PILOT_ROWS), {name: forecast}, got, crew.observer)
        (pilot, count) = found[0]
        crew.meter.pace(count)
        return completed(forecast, pilot)

    def solve(self, tasks: Sequence[Named], forecasts: Mapping[str, Forecast], brought: Brought, crew: Crew) -> None:
        """Solves the blocks. Raises Interrupted, ClusterError (nobody is left), FatalMemberError, UseMistake (workers are not fit)."""
        if not tasks:
            return

        def got(task: Task, part: Any) -> None:
            if part is not None:
                crew.meter.add(part.count)
                brought(task.name, part)

        most = {name: self._together([block for of, block in tasks if of == name], forecast, crew) for name, forecast in forecasts.items()}
        handout = Handout(bundled(tasks, most), {name: forecast.design.parts for name, forecast in forecasts.items()})
        self._through(handout, forecasts, got, crew.observer)

    def _together(self, blocks: Sequence[Block], forecast: Forecast, crew: Crew) -> int:
        """How many blocks of a branch go together in a task: one where it was said how large they are."""
        if crew.spread.rows:
            return 1
        rows = max((block.count for block in blocks), default=1)
        seconds = rows * forecast.shape.solves * crew.meter.seconds_per_solve
        return blocks_together(seconds, rows * kept_by(forecast), len(blocks), self.cores(crew.spread))

    def _through(self, handout: Handout, forecasts: Mapping[str, Forecast], got: Got, observer: Observer) -> None:
        """Has everything solved that is handed out; `got` hears what each task gave."""
        try:
            with telling_of_loss(self._client):
                self._muster.wait(observer)
                with self._carried(forecasts, observer) as flight:
                    while handout.left:
                        flight.hand_out(handout.due(window(max(self._muster.cores, self._fleet.cores))))
                        if handout.culprit is not None:
                            raise self._blame(handout.culprit, forecasts[handout.culprit.name])
                        if observer.stop[0]:
                            raise Interrupted("solving was stopped")
                        for task, answer in flight.landed(handout):
                            got(task, answer)
                        self._muster.look(observer)
                        flight.move(handout)
        except (KeyboardInterrupt, Interrupted):
            observer.stop[0] = 1
            raise Interrupted(STOPPED) from None

    @contextmanager
    def _carried(self, forecasts: Mapping[str, Forecast], observer: Observer) -> Iterator[Flight]:
        """While this lasts every fit worker has the parcels; what is still being solved at its end stops within a step."""
        parcels = {name: packed(forecast) for name, forecast in forecasts.items()}
        keys = {name: fingerprint(content) for name, content in parcels.items()}
        plugin = f"uq-{uuid.uuid4()}"
        self._register(carrier({keys[name]: content for name, content in parcels.items()}, self._muster.made), plugin, observer)
        flight = Flight(self._client, plugin, keys, self._muster, observer)
        try:
            yield flight
        finally:
            flight.dropped()
            if self._client.status == "running":
                # A worker that hangs does not answer; what it holds ends with it, and why we end must not be lost over that.
                with suppress(Exception):
                    self._client.sync(self._client.scheduler.unregister_worker_plugin, name=plugin, callback_timeout=CLOSED_WITHIN)
                with suppress(Exception):
                    self._client.sync(self._client.scheduler.unregister_scheduler_plugin, name=plugin, callback_timeout=CLOSED_WITHIN)

    def _register(self, parcels: Any, name: str, observer: Observer) -> None:
        """Gives all workers the parcels. Those that do not say within a time that they have them are asked whether they still live."""
        client, muster = self._client, self._muster
        if isinstance(self._fleet, There):
            # A scheduler of another Python, or one that takes nothing in, keeps to its own number of deaths.
            with suppress(Exception):
                answered(client, lambda: client.register_plugin(strict(name, KILLS), name=name), CLOSED_WITHIN, observer)
        try:
            answered(
                client, lambda: client.register_plugin(parcels, name=name), CLOSED_WITHIN if muster.silent else ANSWERED_WITHIN, observer
            )
        except TimeoutError:
            muster.again(observer)


def kept_by(forecast: Forecast) -> int:
    """Bytes of kept values that a row adds to a result."""
    return kept_bytes(forecast.ask, 2) if forecast.ask.keeps else 0


@contextmanager
def telling_of_loss(client: Any) -> Iterator[None]:
    """Whatever goes wrong because the scheduler is gone is told as that."""
    try:
        yield
    except (ClusterError, KeyboardInterrupt, Interrupted):
        raise
    except Exception as error:
        if client.status == "running" and not isinstance(error, (OSError, TimeoutError)):
            raise
        raise ClusterError(f"{LOST} ({type(error).__name__})") from error


@contextmanager
def connected(address: str, ours: bool = False) -> Iterator[Any]:
    """A client of the scheduler at an address. ours: it is in this process, so whom it reaches we reach as well, and results need not take
    the way through it. Raises NoClusterError where none answers."""
    from distributed import Client

    try:
        client = Client(address, timeout=CONNECTED_WITHIN, set_as_default=False, direct_to_workers=ours, name="uq")
    except (OSError, TimeoutError) as error:
        raise NoClusterError(f"no scheduler answers at {address}; start one there (dask scheduler), or name another cluster") from error
    try:
        yield client
    finally:
        client.close(timeout=CLOSED_WITHIN)

"""Blocks solved on a `distributed` cluster: this process hands them out, gathers what they say and alone writes anything down."""

from __future__ import annotations

import uuid
from collections import Counter
from collections.abc import Callable, Iterator, Mapping, Sequence
from contextlib import contextmanager, suppress
from dataclasses import astuple
from queue import Empty, SimpleQueue
from typing import Any

from uq.analysis.ask import kept_bytes
from uq.errors import ClusterError, FatalMemberError, Interrupted
from uq.running.abroad import REFUSED, carrier, working
from uq.running.block import Forecast
from uq.running.fleet import KILLS, Fleet
from uq.running.muster import Muster
from uq.running.parcel import fingerprint, packed
from uq.running.part import Part
from uq.running.rounds import Brought, Crew, Spread
from uq.running.rounds import Task as Named
from uq.running.tasks import Culprit, Handout, Task, task_rows, window
from uq.running.threads import HEARD_WITHIN

Blame = Callable[[Culprit, Forecast], FatalMemberError]
# Seconds that a result, at most RESULT_BYTES, may take to come before we look at who is still there.
FETCHED_WITHIN = 5
CONNECTED_WITHIN = 10
CLOSED_WITHIN = 5
LOST = "the scheduler of the cluster was lost"


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
        kept = kept_bytes(forecast.ask, 2) if forecast.ask.keeps else 0
        replicates, cores = forecast.design.replicates, self.cores(crew.spread)
        return task_rows(forecast.shape, kept, crew.meter.seconds_per_solve, rows, replicates, cores)

    def solve(self, tasks: Sequence[Named], forecasts: Mapping[str, Forecast], brought: Brought, crew: Crew) -> None:
        """Solves the blocks. Raises Interrupted, ClusterError (nobody is left), FatalMemberError, UseMistake (workers are not fit)."""
        if not tasks:
            return
        self._muster.wait(crew.observer)
        handout = Handout((Task(*task) for task in tasks), {name: forecast.design.parts for name, forecast in forecasts.items()})
        try:
            with telling_of_loss(self._client), self._carried(forecasts) as flight:
                while handout.left:
                    flight.hand_out(handout.due(window(max(self._muster.cores, self._fleet.cores))))
                    if handout.culprit is not None:
                        raise self._blame(handout.culprit, forecasts[handout.culprit.name])
                    if crew.observer.stop[0]:
                        raise Interrupted("solving was stopped")
                    for task, part in flight.landed(handout):
                        if part is not None:
                            crew.meter.add(part.count)
                            brought(task.name, part)
                    self._muster.look(crew.observer)
                    flight.move(handout)
        except (KeyboardInterrupt, Interrupted):
            crew.observer.stop[0] = 1
            raise Interrupted("interrupted; no result was written") from None

    @contextmanager
    def _carried(self, forecasts: Mapping[str, Forecast]) -> Iterator[Flight]:
        """While this lasts every fit worker has the parcels; what is still being solved at its end stops within a step."""
        parcels = {name: packed(forecast) for name, forecast in forecasts.items()}
        keys = {name: fingerprint(content) for name, content in parcels.items()}
        plugin = f"uq-{uuid.uuid4()}"
        content = {keys[name]: content for name, content in parcels.items()}
        self._client.register_plugin(carrier(content, self._muster.made), name=plugin)
        flight = Flight(self._client, plugin, keys, self._muster)
        try:
            yield flight
        finally:
            flight.dropped()
            if self._client.status == "running":
                # A worker that hangs does not answer; what it holds ends with it, and why we end must not be lost over that.
                with suppress(Exception):
                    self._client.sync(self._client.scheduler.unregister_worker_plugin, name=plugin, callback_timeout=CLOSED_WITHIN)


class Flight:
    """The tasks that are with the cluster now."""

    def __init__(self, client: Any, plugin: str, keys: Mapping[str, str], muster: Muster) -> None:
        self._client, self._plugin, self._keys, self._muster = client, plugin, keys, muster
        self._work = working(plugin)
        self._number = 0
        self._out: dict[Any, Task] = {}
        # Tasks that were refused somewhere may only go to these workers; and how often those have all gone.
        self._bound: dict[Any, set[str]] = {}
        self._moved: Counter[Task] = Counter()
        self._finished: SimpleQueue[Any] = SimpleQueue()

    def hand_out(self, tasks: Sequence[Task], bound: bool = False) -> None:
        """Sends tasks to the cluster; bound: only to workers that are known to be fit."""
        for task in tasks:
            self._number += 1
            key, only = f"{self._plugin}-{self._number}", set(self._muster.fit) if bound else set()
            future = self._client.submit(
                self._work, self._keys[task.name], astuple(task), key=key, pure=False, workers=sorted(only) or None
            )
            self._out[future] = task
            if only:
                self._bound[future] = only
            future.add_done_callback(self._finished.put)

    def move(self, handout: Handout) -> None:
        """Tasks that may only go to workers that are all gone are sent anew; one that this happens to again has killed its workers."""
        for future in [each for each, only in self._bound.items() if not only & self._muster.fit]:
            task = self._forget(future)
            self._client.cancel([future], force=True)
            self._moved[task] += 1
            if self._moved[task] < KILLS:
                self.hand_out([task])
            else:
                handout.died(task)

    def _forget(self, future: Any) -> Task:
        self._bound.pop(future, None)
        return self._out.pop(future)

    def landed(self, handout: Handout) -> Iterator[tuple[Task, Part | None]]:
        """What has been solved, after a moment of waiting at most; the handout hears of it, and of tasks that killed their workers."""
        from distributed import KilledWorker

        try:
            future = self._finished.get(timeout=HEARD_WITHIN)
        except Empty:
            return
        if future not in self._out:
            return
        if future.cancelled():
            raise ClusterError(f"{LOST}, or another program has cancelled our blocks")
        try:
            part = future.result(timeout=FETCHED_WITHIN if future.done() else 0)
        except KilledWorker:
            handout.died(self._forget(future))
        except TimeoutError:
            # The worker that had it is gone, and it is solved again; or it is on a slow way.
            future.add_done_callback(self._finished.put)
        else:
            task = self._forget(future)
            if isinstance(part, str) and part == REFUSED:
                self.hand_out([task], bound=True)
            else:
                handout.done(task)
                yield task, part

    def dropped(self) -> None:
        """Nothing of it is wanted any more."""
        if self._out and self._client.status == "running":
            self._client.cancel(list(self._out), force=True)
        self._out.clear()


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
    the way through it. Raises ClusterError where none answers."""
    from distributed import Client

    try:
        client = Client(address, timeout=CONNECTED_WITHIN, set_as_default=False, direct_to_workers=ours, name="uq")
    except (OSError, TimeoutError) as error:
        raise ClusterError(f"no scheduler answers at {address}; start one there (dask scheduler), or name another cluster") from error
    try:
        yield client
    finally:
        client.close(timeout=CLOSED_WITHIN)

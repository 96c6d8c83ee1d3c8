"""The tasks that are with a cluster: sent, fetched when they are solved, sent anew where that is needed."""

from __future__ import annotations

import time
from collections import Counter
from collections.abc import Iterator, Mapping, Sequence
from dataclasses import astuple
from queue import Empty, SimpleQueue
from typing import Any

from uq.errors import ClusterError
from uq.running.abroad import REFUSED, working
from uq.running.answering import answered
from uq.running.fleet import KILLS
from uq.running.muster import Muster
from uq.running.observer import Observer, tell_of
from uq.running.tasks import Handout, Task
from uq.running.threads import HEARD_WITHIN

# Seconds that a result, at most RESULT_BYTES, may take to come before we look at who is still there; twice as long each time it does not
# come, so that it comes over a slow line as well.
FETCHED_WITHIN, FETCHED_AT_LAST = 5.0, 1200.0
# Seconds until a task that was refused is sent again: a worker that goes on refusing must not keep us busy.
REFUSED_FOR = 0.5
LOST = "the scheduler of the cluster was lost"
DIED = "the workers that had it died, or one that shared them killed them; it is solved again in parts, each alone"


class Flight:
    """The tasks that are with the cluster now."""

    def __init__(self, client: Any, plugin: str, keys: Mapping[str, str], muster: Muster, observer: Observer) -> None:
        self._client, self._plugin, self._keys, self._muster, self._observer = client, plugin, keys, muster, observer
        self._work = working(plugin)
        self._number = 0
        self._out: dict[Any, Task] = {}
        # Tasks that were refused somewhere may only go to these workers; how often those have all gone; what is to be sent, and when.
        self._bound: dict[Any, set[str]] = {}
        self._moved: Counter[Task] = Counter()
        self._held: list[tuple[float, Task]] = []
        self._patience: dict[Any, float] = {}
        self._finished: SimpleQueue[Any] = SimpleQueue()

    def hand_out(self, tasks: Sequence[Task], bound: bool = False) -> None:
        """Sends tasks to the cluster; bound: only to workers that are known to be fit, as all are sent where a worker hangs."""
        bound = bound or bool(self._muster.silent)
        only = set(self._muster.fit) if bound else set()
        if bound and not only:
            self._held += [(0.0, task) for task in tasks]
            return
        for task in tasks:
            self._number += 1
            key = f"{self._plugin}-{self._number}"
            future = self._client.submit(
                self._work, self._keys[task.name], astuple(task), key=key, pure=False, workers=sorted(only) or None
            )
            self._out[future] = task
            if only:
                self._bound[future] = only
            future.add_done_callback(self._finished.put)

    def move(self, handout: Handout) -> None:
        """Tasks that may only go to workers that are all gone are sent anew; one that this happens to again has killed its workers.

        Those that were refused go to workers that are fit, if there are any by now.
        """
        for future in [each for each, only in self._bound.items() if not only & self._muster.fit]:
            task = self._forget(future)
            self._client.cancel([future], force=True)
            self._moved[task] += 1
            if self._moved[task] < KILLS:
                self.hand_out([task])
            else:
                self._died(task, handout)
        now = time.monotonic()
        due = [task for at, task in self._held if at <= now]
        if due and self._muster.fit:
            self._held = [(at, task) for at, task in self._held if at > now]
            self.hand_out(due, bound=True)

    def landed(self, handout: Handout) -> Iterator[tuple[Task, Any]]:
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
            part = self._fetched(future)
        except KilledWorker:
            self._died(self._forget(future), handout)
        except TimeoutError:
            # The worker that had it is gone, and it is solved again; or it is on a slow way.
            future.add_done_callback(self._finished.put)
        else:
            task = self._forget(future)
            if isinstance(part, str) and part == REFUSED:
                self._held.append((time.monotonic() + REFUSED_FOR, task))
            else:
                handout.done(task)
                yield task, part

    def dropped(self) -> None:
        """Nothing of it is wanted any more."""
        if self._out and self._client.status == "running":
            self._client.cancel(list(self._out), force=True)
        self._out.clear()

    def _fetched(self, future: Any) -> Any:
        """What a task gave. Raises TimeoutError where it does not come in time; it then has longer."""
        if not future.done():
            raise TimeoutError
        patience = self._patience.get(future, FETCHED_WITHIN)
        self._patience[future] = min(2 * patience, FETCHED_AT_LAST)
        return answered(self._client, future.result, patience, self._observer)

    def _died(self, task: Task, handout: Handout) -> None:
        tell_of(self._observer, DIED, task.words)
        handout.died(task)

    def _forget(self, future: Any) -> Task:
        self._bound.pop(future, None)
        self._patience.pop(future, None)
        return self._out.pop(future)

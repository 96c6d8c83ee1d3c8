"""The heartbeat of a running job: what goes to the queue, and what is heard from it."""

from __future__ import annotations

import threading
from collections.abc import Callable

from uq.errors import UseMistake
from uq.queue.bell import Bell
from uq.queue.claims import Claim
from uq.queue.deciding import News, Order, order
from uq.queue.logs import Log
from uq.queue.watch import Watch

# Seconds between two beats.
BEAT = 1.0


class Heart:
    """Beats while a job runs: tells the queue how far it is, and stops the run when an order comes."""

    def __init__(self, claim: Claim, watch: Watch, bell: Bell, log: Log, clock: Callable[[], float]) -> None:
        self._claim, self._watch, self._bell, self._log, self._clock = claim, watch, bell, log, clock
        window = claim.job.window
        self._closes = None if window is None else window.closing(clock())
        self._wanted = "running"
        self._trouble = ""
        self.over = threading.Event()
        self.exit_code = 0
        self.misuse: UseMistake | None = None

    def go_on(self) -> None:
        """Beats until it is over."""
        while not self.over.wait(BEAT):
            self.beat()

    def beat(self) -> None:
        """One beat. A queue that cannot be told for the moment does not stop a run."""
        told = self._watch.told()
        if self.exit_code:
            told["exit_code"] = self.exit_code
        try:
            self._wanted, self._trouble = str(self._claim.beat(told)), ""
        except Exception as error:  # noqa: BLE001 - a heart that stopped would hear of no pause, deadline or end any more
            if str(error) != self._trouble:
                self._log(f"no heartbeat: {error}")
            self._trouble = str(error)
        if self.order():
            self._watch.stop[0] = 1

    def order(self) -> Order:
        """Why the run shall be stopped, by what is known now."""
        return order(News(self._wanted, self._bell.rung, self._clock(), self._claim.deadline, self._closes))

    def so_far(self) -> bool:
        """Whether a run that was stopped shall give the answer of its last completed round."""
        return self.order() == "deadline"

"""How a runner is told to end: rung from a signal's handler, it wakes who sleeps and stops the run that goes on."""

from __future__ import annotations

import contextlib
import socket
from select import select

from uq.running.observer import Observer


class Bell:
    """Rung once it stays so. A pair of sockets wakes the sleeper: locks and events may not be touched from a signal's handler."""

    def __init__(self) -> None:
        self.rung = False
        self._run: Observer | None = None
        self._here, self._there = socket.socketpair()
        self._there.setblocking(False)

    def ring(self) -> None:
        """The runner shall end, and the run that goes on stops at its next step."""
        self.rung = True
        if self._run is not None:
            self._run.stop[0] = 1
        with contextlib.suppress(OSError):
            self._there.send(b"1")

    def over(self, run: Observer | None) -> None:
        """Whom to stop when it rings: the observer of a run, None where no run goes on."""
        self._run = run
        if run is not None and self.rung:
            run.stop[0] = 1

    def sleep(self, seconds: float) -> None:
        """Waits so long, or until it rings; not at all where it has."""
        if not self.rung:
            select([self._here], [], [], max(seconds, 0.0))

    def close(self) -> None:
        """Gives back what it holds."""
        self._here.close()
        self._there.close()

"""A job in the hands of a runner: whoever holds its lock, whatever the clocks do. What it says counts only for the attempt it began."""

from __future__ import annotations

import json
import os
import sqlite3
from collections.abc import Callable, Iterator, Mapping
from contextlib import contextmanager
from dataclasses import dataclass, field
from pathlib import Path
from types import TracebackType
from typing import Any

from uq.queue.database import Database, Row
from uq.queue.job import Job
from uq.queue.moves import move, row_of, tried
from uq.queue.states import FINISHES, OWNED, Event, State
from uq.queue.times import back_off


@dataclass(eq=False)
class Claim:
    """One attempt at a job, begun by `Queue.claim`; a context manager, which lets go of the lock at its end.

    job: as it stood when it was claimed. folder: of this attempt, with what earlier ones have kept. study: the study file as it was taken
    in, to be read with the changes of the job. deadline: as it was at the last beat. All methods may be called from any thread, and raise
    StorageError where the database cannot be reached: nothing is changed then, and they may be called again.
    """

    job: Job
    attempt: int
    folder: Path
    study: Path
    database: Database
    clock: Callable[[], float]
    handle: int | None
    deadline: float | None = field(init=False)

    def __post_init__(self) -> None:
        self.deadline = self.job.deadline

    def beat(self, progress: Mapping[str, Any] | None = None) -> str:
        """Says that the runner lives and, where given, how far it is: done, total, failed (solves), settled and what else may be shown.

        Returns the state that is wanted now: "running", "pausing", or "cancelled" where the attempt is no longer the job's.
        """
        now = self.clock()
        with self._mine() as (connection, row):
            if row is None:
                return State.CANCELLED
            self.deadline = row["deadline"]
            told = row["progress"] if progress is None else json.dumps(dict(progress))
            before = json.loads(row["progress"]).get("done", 0) if row["progress"] else 0
            moved = now if progress is not None and progress.get("done", 0) > before else row["moved"]
            changes = "UPDATE jobs SET beat = ?, moved = ?, progress = ? WHERE number = ?"
            connection.execute(changes, (now, moved, told, self.job.number))
            return str(row["state"])

    def finish(self, state: State | str, reason: str = "", note: str = "") -> bool:
        """The attempt has come to its end: done, partial (with the reason) or failed (with the reason); note: on the result.

        False, and nothing happens, where the attempt is no longer the job's: it was cancelled, or another has begun.
        """
        event = FINISHES[State(state)]
        with self._mine() as (connection, row):
            if row is None:
                return False
            move(connection, row, event, self.clock(), reason, note=note)
            return True

    def give_back(self, why: str = "", until: float | None = None) -> State:
        """The runner has to go: the job waits for another, not before `until` where given; costs no retry. Returns where the job stands."""
        now = self.clock()
        return self._leave(Event.GIVE_BACK, why, held_from=now if until else None, held_until=until)

    def paused(self, reason: str = "") -> State:
        """The runner has stopped and kept the progress, for a pause or because something needs a user. Returns where the job stands."""
        return self._leave(Event.STOP, reason)

    def stumbled(self, reason: str) -> State:
        """The attempt came to grief for a reason that may pass: held for a while, or failed where that was once more than may be.

        The waits in a row are 1, 2, 4 ... minutes, at most an hour. Returns where the job stands: held, failed, paused where a pause was
        wanted, or what it is where the attempt is no longer the job's.
        """
        now = self.clock()
        with self._mine() as (connection, row):
            if row is None:
                return self._state(connection)
            found = tried(row)
            counted = {"stumbles": found.stumbles, "furthest": found.furthest}
            if found.stumbles > row["retries"] and row["state"] == State.RUNNING:
                return move(connection, row, Event.GIVE_UP, now, reason, **counted)
            until = now + back_off(found.stumbles)
            state = move(connection, row, Event.STUMBLE, now, reason, **counted, held_from=now, held_until=until)
            return State.HELD if state is State.WAITING else state

    def close(self) -> None:
        """Lets go of the lock; the job can be claimed by others, where it is to be worked on."""
        handle, self.handle = self.handle, None
        if handle is not None:
            os.close(handle)

    def __enter__(self) -> Claim:
        return self

    def __exit__(self, kind: type[BaseException] | None, error: BaseException | None, trace: TracebackType | None) -> None:
        self.close()

    def _leave(self, event: Event, reason: str, **columns: object) -> State:
        with self._mine() as (connection, row):
            if row is None:
                return self._state(connection)
            return move(connection, row, event, self.clock(), reason, **columns)

    @contextmanager
    def _mine(self) -> Iterator[tuple[sqlite3.Connection, Row | None]]:
        """A transaction with the row of the job; None where this attempt is no longer the job's."""
        with self.database.writing() as connection:
            row = row_of(connection, self.job.number)
            mine = row is not None and row["attempt"] == self.attempt and State(row["state"]) in OWNED
            yield connection, row if mine else None

    def _state(self, connection: sqlite3.Connection) -> State:
        """Where the job stands; one that was cleaned away is as good as cancelled."""
        row = row_of(connection, self.job.number)
        return State.CANCELLED if row is None else State(row["state"])

"""The queue: what is handed in, what users ask for, and the next job for a runner."""

from __future__ import annotations

import os
import sqlite3
import time
from collections.abc import Callable, Collection, Sequence
from pathlib import Path

from uq.errors import StorageError, UseMistake
from uq.queue.claiming import candidates, claimed, next_due, set_aside
from uq.queue.claims import Claim
from uq.queue.database import PATIENCE, Database, Row, rows_of
from uq.queue.folders import JOBS, Folders, sweep
from uq.queue.job import Happening, Intake, Job, Submitted, job_of
from uq.queue.moves import AFRESH, move, row_of
from uq.queue.states import ENDED, Event, State, after, requests
from uq.queue.submitting import submitted
from uq.store.hold import hold

DATABASE = "queue.sqlite"
# What a request makes of a job, in a word.
ASKED = {Event.PAUSE: "paused", Event.RESUME: "resumed", Event.CANCEL: "cancelled", Event.RETRY: "tried again"}


class NotNowError(UseMistake):
    """Something that was asked of a job cannot be, as it stands."""

    def __init__(self, number: int, state: State, event: Event) -> None:
        possible = ", ".join(requests(state))
        super().__init__(f"job {number}, which is {state}", f"one that can be {ASKED[event]}")
        remedy = f"possible is: {possible}" if possible else f"it has ended, and `uq show {number}` shows what it says"
        self.args = (f"job {number} is {state} and cannot be {ASKED[event]}; {remedy}",)


class Queue:
    """The jobs of one home folder, which any number of processes of one machine may work on at once; threads may share an instance.

    home: a folder on a local disk; clock: epoch seconds. Its methods raise StorageError where the database cannot be read or written;
    nothing is changed then.
    """

    def __init__(self, home: Path, clock: Callable[[], float] = time.time, patience: float = PATIENCE) -> None:
        """Nothing is read or made until the first call. patience: seconds to wait for others who write."""
        self.home, self.clock = home, clock
        self.folders = Folders(home / JOBS)
        self.database = Database(home / DATABASE, patience)

    def close(self) -> None:
        """Closes the database; the next call opens it again."""
        self.database.close()

    def submit(self, intakes: Sequence[Intake], again: bool = False) -> list[Submitted]:
        """Hands in studies, all or none; where an equal one is in the queue that was not cancelled and did not fail, it is that job, with
        the terms that are stated now where it has not ended, and going on where its deadline has cut it short and another is stated.

        again: a new job in any case.
        """
        return submitted(self.database, self.folders, intakes, again, self.clock())

    def jobs(self, batch: str | None = None, states: Collection[str] = ()) -> list[Job]:
        """All jobs, or those of a batch, or in some states, by number; of a batch `changed` is what that batch changes."""
        now = self.clock()
        query = "SELECT * FROM jobs ORDER BY number"
        if batch is not None:
            query = """SELECT jobs.*, batches.batch AS batch, batches.title AS batch_title, batches.changed AS changed
                       FROM batches JOIN jobs ON jobs.number = batches.job WHERE batches.batch = :batch ORDER BY number"""
        with self.database.reading() as connection:
            found = (job_of(row, now, self.folders.root) for row in rows_of(connection, query, {"batch": batch}))
            return [job for job in found if not states or job.state in states]

    def batches(self) -> dict[str, str]:
        """The names of all batches that have jobs, each with its title as last handed in, by their first jobs."""
        # Of several columns SQLite gives, beside one MAX, those of the row that has it.
        query = "SELECT batch, title, MAX(job), MIN(job) AS first FROM batches GROUP BY batch ORDER BY first"
        with self.database.reading() as connection:
            return {row["batch"]: row["title"] for row in connection.execute(query)}

    def job(self, number: int) -> Job:
        """A job; raises UseMistake where there is none of this number."""
        with self.database.reading() as connection:
            return self._job(self._row(connection, number))

    def history(self, number: int) -> list[Happening]:
        """What has happened to a job, in order; raises UseMistake where there is none of this number."""
        with self.database.reading() as connection:
            self._row(connection, number)
            query = "SELECT at, event, state, attempt, reason FROM happenings WHERE job = ? ORDER BY rowid"
            rows = connection.execute(query, (number,)).fetchall()
        return [Happening(row["at"], row["event"], State(row["state"]), row["attempt"], row["reason"]) for row in rows]

    def pause(self, number: int) -> Job:
        """Stops a job for now: at once where it waits; where it runs, when its runner has kept what was done. Raises UseMistake."""
        return self._ask(number, Event.PAUSE)

    def resume(self, number: int) -> Job:
        """Lets a paused job go on. Raises UseMistake."""
        return self._ask(number, Event.RESUME, held_from=None, held_until=None)

    def cancel(self, number: int) -> Job:
        """Ends a job at once; a runner that has it hears of it at its next beat, and whatever it finishes by then does not count."""
        return self._ask(number, Event.CANCEL)

    def retry(self, number: int) -> Job:
        """Lets a job that failed, was cancelled, paused or cut short go on from what is kept; a deadline that is over is taken off."""
        return self._ask(number, Event.RETRY, **AFRESH)

    def claim(self, runner: str) -> Claim | None:
        """The next job that may be worked on, the largest priority first, then the lowest number; None where there is none.

        runner: how the runner is called. A job whose runner died is lost, and can be claimed at once; one whose folder cannot be used is
        paused with the reason. Raises StorageError where no folder could be, as on a full disk.
        """
        with self.database.reading() as connection:
            numbers = candidates(connection, self.clock())
        for number in numbers:
            try:
                handle = hold(self.folders.lock(number))
            except OSError as error:
                self._set_aside(number, error)
                continue
            if handle is None:
                continue
            claim = None
            try:
                claim = claimed(self.database, self.folders, number, handle, runner, self.clock)
            finally:
                if claim is None:
                    os.close(handle)
            if claim is not None:
                return claim
        return None

    def next_time(self) -> float | None:
        """When the next held job comes due; None where none is held."""
        with self.database.reading() as connection:
            return next_due(connection, self.clock())

    def clean(self, older_than_seconds: float, states: Collection[str] = ENDED) -> list[int]:
        """Takes away ended jobs, with their results, that ended so long ago, and what killed processes left; returns their numbers.

        states: of which to take away; UseMistake for one in which a job has not ended. A job that somebody still holds stays.
        """
        for state in states:
            if state not in ENDED:
                raise UseMistake(f'"{state}"', "one of " + ", ".join(ENDED))
        before = self.clock() - older_than_seconds
        old = [job.number for job in self.jobs(states=states) if job.ended is not None and job.ended <= before]
        cleaned = [number for number in old if self._clean(number, states)]
        with self.database.writing() as connection:
            numbers = {row["number"] for row in connection.execute("SELECT number FROM jobs")}
            for stray in self.folders.strays(numbers):
                sweep(stray)
        return cleaned

    def _clean(self, number: int, states: Collection[str]) -> bool:
        """Takes one job away, if it is still as it was; whether it did."""
        try:
            handle = hold(self.folders.lock(number))
            if handle is None:
                return False
            try:
                with self.database.writing() as connection:
                    row = row_of(connection, number)
                    if row is None or row["state"] not in states:
                        return False
                    for table, column in (("jobs", "number"), ("batches", "job"), ("happenings", "job")):
                        connection.execute(f"DELETE FROM {table} WHERE {column} = ?", (number,))
                self.folders.remove(number)
            finally:
                os.close(handle)
        except OSError as error:
            raise StorageError(f"{self.folders.job(number)} cannot be taken away: {error.strerror or error}") from error
        return True

    def _ask(self, number: int, event: Event, **columns: object) -> Job:
        """What a user asks for; raises UseMistake where that cannot be."""
        now = self.clock()
        with self.database.writing() as connection:
            row = self._row(connection, number)
            state = self._job(row).state
            if after(state, event) is None:
                raise NotNowError(number, state, event)
            if event is Event.RETRY and row["deadline"] is not None and row["deadline"] <= now:
                columns["deadline"] = None
            move(connection, row, event, now, "", **columns)
            return self._job(self._row(connection, number))

    def _set_aside(self, number: int, error: OSError) -> None:
        with self.database.writing() as connection:
            row = row_of(connection, number)
            if row is not None:
                set_aside(connection, row, self.folders, error, self.clock())

    def _row(self, connection: sqlite3.Connection, number: int) -> Row:
        row = row_of(connection, number)
        if row is None:
            raise UseMistake(f"job {number}", "the number of a job in the queue", "`uq jobs` lists them")
        return row

    def _job(self, row: Row) -> Job:
        return job_of(row, self.clock(), self.folders.root)

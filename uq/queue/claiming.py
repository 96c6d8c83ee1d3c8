"""Which job is next, and taking it; who takes one holds its lock before it asks the database."""

from __future__ import annotations

import errno
import sqlite3
from collections.abc import Callable

from uq.clock import Window
from uq.errors import StorageError
from uq.queue.claims import Claim
from uq.queue.database import Database, Row
from uq.queue.folders import Folders
from uq.queue.job import job_of, window_of
from uq.queue.moves import lost, move, row_of
from uq.queue.states import Event, State

# Not a matter of one job's folder.
_OF_THE_DISK = (errno.ENOSPC, errno.EDQUOT, errno.EROFS, errno.EIO, errno.EMFILE, errno.ENFILE)

# A wait after a stumble holds, unless the clock was set back to before it began (as in `times.due`).
_WAIT = "CASE WHEN held_until IS NULL OR held_from > :now THEN 0 ELSE held_until END"
_START = f"MAX(COALESCE(not_before, 0), {_WAIT})"
# At its deadline a job answers with what it has, whatever its window.
_LAST = f"MAX(deadline, {_WAIT})"


def candidates(connection: sqlite3.Connection, now: float) -> list[int]:
    """The jobs that may be worked on now, by turn: those whose deadline is over, who only answer; due ones that wait, and those that a
    runner has or had."""
    closed = [text for text, window in _windows(connection) if window is not None and not window.is_open(now)]
    shut = ", ".join(f":shut{index}" for index in range(len(closed)))
    query = f"""SELECT number FROM jobs
                WHERE state IN ('running', 'pausing') OR (state = 'waiting' AND {_START} <= :now AND window NOT IN ({shut}))
                ORDER BY priority DESC, number"""
    named = {"now": now, **{f"shut{index}": text for index, text in enumerate(closed)}}
    late = f"SELECT number FROM jobs WHERE state = 'waiting' AND deadline <= :now AND {_LAST} <= :now ORDER BY deadline, number"
    found = [row["number"] for each in (late, query) for row in connection.execute(each, named)]
    return list(dict.fromkeys(found))


def next_due(connection: sqlite3.Connection, now: float) -> float | None:
    """When the next job comes due that is held now; None where none is."""
    earliest = []
    for text, window in _windows(connection):
        open_now = window is None or window.is_open(now)
        query = f"SELECT MIN({_START}) AS start FROM jobs WHERE state = 'waiting' AND window = :window"
        query += f" AND {_START} > :now" if open_now else ""
        start = connection.execute(query, {"now": now, "window": text}).fetchone()["start"]
        if start is not None:
            start = max(start, now)
            earliest.append(start if window is None else window.opening(start))
    late = connection.execute(f"SELECT MIN({_LAST}) AS start FROM jobs WHERE state = 'waiting' AND deadline IS NOT NULL", {"now": now})
    if (last := late.fetchone()["start"]) is not None and last > now:
        earliest.append(last)
    return min(earliest, default=None)


def _windows(connection: sqlite3.Connection) -> list[tuple[str, Window | None]]:
    """The windows of the jobs that wait, as text and as such."""
    rows = connection.execute("SELECT DISTINCT window FROM jobs WHERE state = 'waiting'")
    return [(row["window"], window_of(row["window"])) for row in rows]


def claimed(database: Database, folders: Folders, number: int, handle: int, runner: str, clock: Callable[[], float]) -> Claim | None:
    """The next attempt at a job whose lock is held by `handle`; None where it is not to be worked on (any more)."""
    now = clock()
    with database.writing() as connection:
        row = row_of(connection, number)
        if row is not None and row["state"] in (State.RUNNING, State.PAUSING):
            lost(connection, row, now)
            row = row_of(connection, number)
        if row is None or job_of(row, now, folders.root).state is not State.WAITING:
            return None
        attempt = row["attempt"] + 1
        try:
            folder = folders.begin(number, attempt)
        except OSError as error:
            set_aside(connection, row, folders, error, now)
            return None
        move(connection, row, Event.CLAIM, now, attempt=attempt, runner=runner, beat=now, moved=now, started=now, note="")
        row = row_of(connection, number)
        if row is None:
            raise RuntimeError(f"job {number} is gone within a transaction")
        job = job_of(row, now, folders.root)
    return Claim(job, attempt, folder, folders.study(number, job.name), database, clock, handle)


def set_aside(connection: sqlite3.Connection, row: Row, folders: Folders, error: OSError, now: float) -> None:
    """Pauses a waiting job whose folder cannot be used, so that the others go on; raises StorageError where no folder could be."""
    said = f"{folders.job(row['number'])} cannot be used: {error.strerror or error}"
    if error.errno in _OF_THE_DISK:
        raise StorageError(f"{said}; no job was begun") from error
    if row["state"] == State.WAITING:
        move(connection, row, Event.PAUSE, now, said)

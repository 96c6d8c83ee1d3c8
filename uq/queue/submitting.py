"""Handing in: the files first, then all jobs in one transaction."""

from __future__ import annotations

import json
import sqlite3
from collections.abc import Mapping, Sequence
from pathlib import Path

from uq.queue.database import Database
from uq.queue.deciding import CUT_SHORT
from uq.queue.folders import Folders, check_names
from uq.queue.job import Intake, Submitted, window_text
from uq.queue.moves import AFRESH, move, remember, row_of
from uq.queue.states import BEGIN, ENDED, REPLACED, Event, State

# The terms of a job, as its columns are called.
_TERMS = ("priority", "not_before", "deadline", "window", "retries")


class _MissingError(Exception):
    """A job that an intake was equal to has gone, and the files of the intake were not taken in."""


def submitted(database: Database, folders: Folders, intakes: Sequence[Intake], again: bool, now: float) -> list[Submitted]:
    """Hands in all of them or none, see `Queue.submit`."""
    for intake in intakes:
        check_names(intake)
    if not intakes:
        return []
    with database.reading() as connection:
        wanted = [place for place, intake in enumerate(intakes) if again or _equal(connection, intake) is None]
    while True:
        with folders.taken_in([intakes[place] for place in wanted]) as taken:
            try:
                return _entered(database, folders, intakes, again, dict(zip(wanted, taken, strict=True)), now)
            except _MissingError:
                wanted = list(range(len(intakes)))


def _entered(
    database: Database, folders: Folders, intakes: Sequence[Intake], again: bool, taken: Mapping[int, Path], now: float
) -> list[Submitted]:
    """The transaction; taken: the folders of intakes by their places."""
    found: list[Submitted] = []
    placed: list[int] = []
    with database.writing() as connection:
        try:
            for place, intake in enumerate(intakes):
                number = None if again else _equal(connection, intake)
                found.append(Submitted(_new(connection, intake, now), True) if number is None else there(connection, intake, number, now))
                if number is None:
                    placed.append(found[-1].job)
                    _place(folders, taken.get(place), found[-1].job)
                _join(connection, intake, found[-1].job)
            folders.flush()
        except BaseException:
            # Their numbers are given to others now. (Where the transaction itself cannot end they stay: nobody knows whether it held.)
            for number in placed:
                folders.discard(number)
            raise
    return found


def _place(folders: Folders, taken: Path | None, number: int) -> None:
    """Gives what was taken in its number."""
    if taken is None:
        raise _MissingError
    folders.place(taken, number)


def _join(connection: sqlite3.Connection, intake: Intake, number: int) -> None:
    """Enters a job in its batch."""
    if intake.batch:
        member = (intake.batch, number, intake.batch_title, _json(intake.changed))
        connection.execute("INSERT OR REPLACE INTO batches VALUES (?, ?, ?, ?)", member)


def _equal(connection: sqlite3.Connection, intake: Intake) -> int | None:
    """The last job of the same study and plan, if it still counts."""
    marks = ", ".join("?" * len(REPLACED))
    query = f"SELECT MAX(number) AS number FROM jobs WHERE fingerprint = ? AND state NOT IN ({marks})"
    number: int | None = connection.execute(query, (intake.fingerprint, *REPLACED)).fetchone()["number"]
    return number


def there(connection: sqlite3.Connection, intake: Intake, number: int, now: float) -> Submitted:
    """An equal job that is there already. One that has not ended takes over what is stated; one that its deadline has cut short goes on
    from what is kept, where another deadline is stated. Whatever else ended a job would end it again."""
    row = row_of(connection, number)
    if row is None:
        raise RuntimeError(f"job {number} is gone within a transaction")
    retried = row["state"] == State.PARTIAL and row["reason"] == CUT_SHORT and "deadline" in intake.stated
    if row["state"] in ENDED and not retried:
        return Submitted(number, False)
    if retried:
        move(connection, row, Event.RETRY, now, "", **AFRESH)
    wanted = {name: getattr(intake, name) for name in _TERMS if name in intake.stated}
    wanted |= {"window": window_text(intake.window)} if "window" in wanted else {}
    changes = {name: value for name, value in wanted.items() if row[name] != value}
    if changes:
        words = ", ".join(f"{name} = :{name}" for name in changes)
        connection.execute(f"UPDATE jobs SET {words} WHERE number = :number", {**changes, "number": number})
    return Submitted(number, False, tuple(changes), retried)


def _new(connection: sqlite3.Connection, intake: Intake, now: float) -> int:
    """The number of a new job."""
    values = {
        "state": BEGIN,
        "name": intake.name,
        "title": intake.title,
        "fingerprint": intake.fingerprint,
        "members": intake.members,
        "batch": intake.batch,
        "batch_title": intake.batch_title,
        "changed": _json(intake.changed),
        "priority": intake.priority,
        "submitted": now,
        "not_before": intake.not_before,
        "deadline": intake.deadline,
        "window": window_text(intake.window),
        "retries": intake.retries,
    }
    columns, marks = ", ".join(values), ", ".join(f":{key}" for key in values)
    number = connection.execute(f"INSERT INTO jobs ({columns}) VALUES ({marks})", values).lastrowid
    if number is None:
        raise RuntimeError("a row without a number")
    remember(connection, number, now, Event.SUBMIT, BEGIN, 0, "")
    return number


def _json(changed: Mapping[str, object]) -> str:
    return json.dumps(dict(changed)) if changed else ""

"""One event of one job: decided by the table, written with what else changes, and remembered, all in the transaction at hand."""

from __future__ import annotations

import json
import sqlite3
from dataclasses import dataclass

from uq.queue.database import Row
from uq.queue.states import ENDED, OWNED, Event, State, after

# Columns of `jobs` that an event may set besides the state.
_SETTABLE = (
    *("attempt", "runner", "beat", "moved", "progress", "started", "note", "deadline"),
    *("stumbles", "furthest", "held_from", "held_until"),
)
# What a job that is tried again by request has behind it.
AFRESH: dict[str, object] = {"stumbles": 0, "furthest": 0, "held_from": None, "held_until": None}


@dataclass(frozen=True)
class Tried:
    """Attempts in a row that came to grief without bringing the job further, and how many solves were done at the last."""

    stumbles: int
    furthest: int

    def once_more(self, done: int) -> Tried:
        """After another one. Where the job came further since the last, counting begins anew: what it meets lies outside of it."""
        return Tried(1 if done > self.furthest else self.stumbles + 1, max(done, self.furthest))


def tried(row: Row) -> Tried:
    """The attempts of a job, with the one that has just come to grief."""
    progress = json.loads(row["progress"]) if row["progress"] else {}
    return Tried(row["stumbles"], row["furthest"]).once_more(int(progress.get("done", 0)))


def row_of(connection: sqlite3.Connection, number: int) -> Row | None:
    """The row of a job; None where there is none."""
    row: Row | None = connection.execute("SELECT * FROM jobs WHERE number = ?", (number,)).fetchone()
    return row


def move(connection: sqlite3.Connection, row: Row, event: Event, now: float, reason: str = "", /, **columns: object) -> State:
    """What the table says; the state that follows. An event that cannot happen is our defect: who calls has asked before.

    columns: what else changes. An end is stamped, and its stamp taken off when the job goes on.
    """
    state = after(State(row["state"]), event)
    if state is None or not set(columns) <= set(_SETTABLE):
        raise RuntimeError(f"job {row['number']}: {event} of a job that is {row['state']}, with {sorted(columns)}")
    changes = {"state": state, "reason": reason, "ended": now if state in ENDED else None, **columns}
    words = ", ".join(f"{column} = :{column}" for column in changes)
    connection.execute(f"UPDATE jobs SET {words} WHERE number = :number", {**changes, "number": row["number"]})
    remember(connection, row["number"], now, event, state, int(str(columns.get("attempt", row["attempt"]))), reason)
    return state


def remember(connection: sqlite3.Connection, number: int, now: float, event: Event, state: State, attempt: int, reason: str) -> None:
    """Adds to what has happened to a job."""
    connection.execute("INSERT INTO happenings VALUES (?, ?, ?, ?, ?, ?)", (number, now, event, state, attempt, reason))


def lost(connection: sqlite3.Connection, row: Row, now: float) -> State:
    """The runner of a job is dead. How many attempts may be lost is `retries`; one that was to be paused is paused."""
    if State(row["state"]) not in OWNED:
        raise RuntimeError(f"job {row['number']} has no runner to lose")
    found = tried(row)
    said = f"its runner ({row['runner']}) died in attempt {row['attempt']}"
    counted = {"stumbles": found.stumbles, "furthest": found.furthest}
    if found.stumbles > row["retries"] and row["state"] == State.RUNNING:
        said += f", as in {found.stumbles - 1} before it without getting further" if found.stumbles > 1 else ""
        return move(connection, row, Event.GIVE_UP, now, said, **counted)
    return move(connection, row, Event.LOSE, now, said, **counted)

"""The queue's database: SQLite with a write-ahead log and full synchronisation; its tables are made by numbered steps."""

from __future__ import annotations

import sqlite3
import threading
import time
from collections.abc import Iterator, Mapping
from contextlib import contextmanager
from pathlib import Path
from typing import Any

from uq.errors import StorageError

# A row of a table by the names of its columns.
Row = dict[str, Any]

# Seconds to wait for others who write.
PATIENCE = 20.0

# A step is never changed once it was given to anybody; what is to be different becomes a further step.
STEPS: tuple[tuple[str, ...], ...] = (
    (
        """
        CREATE TABLE jobs (
            number INTEGER PRIMARY KEY AUTOINCREMENT, -- never given again, also when the job is cleaned away
            state TEXT NOT NULL,
            name TEXT NOT NULL,
            title TEXT NOT NULL,
            fingerprint TEXT NOT NULL,
            members INTEGER NOT NULL,
            batch TEXT NOT NULL,
            batch_title TEXT NOT NULL,
            changed TEXT NOT NULL,           -- JSON, or empty
            priority INTEGER NOT NULL,
            submitted REAL NOT NULL,         -- this and all times: seconds since 1970-01-01 00:00 UTC
            not_before REAL,
            held_from REAL,                  -- the wait after a stumble
            held_until REAL,
            deadline REAL,
            window TEXT NOT NULL,            -- JSON: opens, closes, time zone; or empty
            retries INTEGER NOT NULL,
            attempt INTEGER NOT NULL DEFAULT 0,
            stumbles INTEGER NOT NULL DEFAULT 0,
            furthest INTEGER NOT NULL DEFAULT 0, -- solves done at the last stumble
            runner TEXT NOT NULL DEFAULT '',
            beat REAL,
            moved REAL,
            progress TEXT NOT NULL DEFAULT '',
            reason TEXT NOT NULL DEFAULT '',
            note TEXT NOT NULL DEFAULT '',
            started REAL,
            ended REAL
        )
        """,
        # All that it takes to see what is due, so that an idle runner's look at a long queue costs little.
        "CREATE INDEX jobs_by_time ON jobs (state, window, not_before, held_from, held_until, priority, number)",
        "CREATE INDEX jobs_by_fingerprint ON jobs (fingerprint)",
        # A job may be of several batches: an equal study handed in with another batch is the same job.
        """
        CREATE TABLE batches (
            batch TEXT NOT NULL, job INTEGER NOT NULL, title TEXT NOT NULL, changed TEXT NOT NULL,
            PRIMARY KEY (batch, job)
        ) WITHOUT ROWID
        """,
        "CREATE INDEX batches_by_job ON batches (job)",
        """
        CREATE TABLE happenings (
            job INTEGER NOT NULL, at REAL NOT NULL, event TEXT NOT NULL, state TEXT NOT NULL, attempt INTEGER NOT NULL, reason TEXT NOT NULL
        )
        """,
        "CREATE INDEX happenings_by_job ON happenings (job)",
    ),
    # So that a look at a long queue finds the jobs whose deadline is over without going through all.
    ("CREATE INDEX jobs_by_deadline ON jobs (state, deadline, held_from, held_until, number)",),
)

# What is said of SQLite's own errors, by their names.
_SENTENCES = (
    ("SQLITE_BUSY", "is locked by another program, for longer than {patience:g} s by now; try again when that has ended"),
    ("SQLITE_LOCKED", "is locked by another program, for longer than {patience:g} s by now; try again when that has ended"),
    ("SQLITE_FULL", "cannot be written to, the disk is full; free some room and try again"),
    ("SQLITE_READONLY", "may not be written to; set UQ_HOME to a folder that may"),
    ("SQLITE_CANTOPEN", "cannot be opened or made; set UQ_HOME to a folder that may be written to"),
    ("SQLITE_PERM", "may not be read; set UQ_HOME to a folder that may"),
    ("SQLITE_NOTADB", "is not a database of uq; move it away, or set UQ_HOME to another folder"),
    ("SQLITE_CORRUPT", "is damaged; move it away together with its -wal and -shm, the folders of the jobs beside it are whole"),
    ("SQLITE_IOERR", "cannot be read or written, the disk gives an error or may hold no more"),
)


def _named(cursor: sqlite3.Cursor, row: tuple[Any, ...]) -> Row:
    """A row by the names of its columns; of two of one name the last."""
    return dict(zip([column[0] for column in cursor.description], row, strict=True))


def rows_of(connection: sqlite3.Connection, query: str, named: Mapping[str, object]) -> Iterator[Row]:
    """The rows of a query that may give many: names are looked up once (many times as fast as making a dictionary of a sqlite3.Row)."""
    cursor = connection.cursor()
    cursor.row_factory = None
    cursor.execute(query, dict(named))
    names = [column[0] for column in cursor.description]
    return (dict(zip(names, row, strict=True)) for row in cursor)


class Database:
    """One connection, which threads may share: one transaction at a time."""

    def __init__(self, path: Path, patience: float = PATIENCE) -> None:
        """Opens the database, and makes it or brings it up to date where needed. Raises StorageError."""
        self.path, self.patience = path, patience
        self._turn = threading.RLock()
        self._connection: sqlite3.Connection | None = None

    @contextmanager
    def writing(self) -> Iterator[sqlite3.Connection]:
        """A transaction that may write: all of it holds at its end, or nothing where anything is raised inside. Raises StorageError."""
        with self._transaction("BEGIN IMMEDIATE") as connection:
            yield connection

    @contextmanager
    def reading(self) -> Iterator[sqlite3.Connection]:
        """A transaction that sees one moment. Raises StorageError."""
        with self._transaction("BEGIN") as connection:
            yield connection

    def close(self) -> None:
        """Closes the connection; the next transaction opens another."""
        with self._turn:
            if self._connection is not None:
                self._connection.close()
                self._connection = None

    @contextmanager
    def _transaction(self, begin: str) -> Iterator[sqlite3.Connection]:
        with self._turn, self._telling():
            if self._connection is None:
                self._connection = self._opened()
            connection = self._connection
            connection.execute(begin)
            try:
                yield connection
                connection.execute("COMMIT")
            except BaseException:
                # Some errors, such as a full disk, have ended the transaction already.
                if connection.in_transaction:
                    connection.execute("ROLLBACK")
                raise

    @contextmanager
    def _telling(self) -> Iterator[None]:
        """Turns errors of SQLite into sentences."""
        try:
            yield
        except sqlite3.Error as error:
            name = getattr(error, "sqlite_errorname", "") or ""
            sentence = next((words for start, words in _SENTENCES if name.startswith(start)), None)
            if sentence is None:
                raise
            raise StorageError(f"{self.path} {sentence.format(patience=self.patience)} ({error}); nothing was changed") from error

    def _opened(self) -> sqlite3.Connection:
        try:
            self.path.parent.mkdir(parents=True, exist_ok=True)
        except OSError as error:
            said = "set UQ_HOME to a folder that may be written to"
            raise StorageError(f"{self.path.parent} cannot be made: {error.strerror}; {said}") from error
        # Threads share it under `_turn`; transactions are begun by us (isolation_level None).
        connection = sqlite3.connect(self.path, timeout=self.patience, isolation_level=None, check_same_thread=False)
        try:
            connection.row_factory = _named
            self._log_ahead(connection)
            connection.execute("PRAGMA synchronous = FULL")
            self._step(connection)
        except BaseException:
            connection.close()
            raise
        return connection

    def _log_ahead(self, connection: sqlite3.Connection) -> None:
        """Switches to the write-ahead log; SQLite does not wait by itself while another process does the same."""
        ends = time.monotonic() + self.patience
        while True:
            try:
                connection.execute("PRAGMA journal_mode = WAL")
                return
            except sqlite3.OperationalError as error:
                if error.sqlite_errorcode != sqlite3.SQLITE_BUSY or time.monotonic() > ends:
                    raise
                time.sleep(0.01)

    def _step(self, connection: sqlite3.Connection) -> None:
        """Does the steps that the database has not had yet, all in one transaction."""
        if self._steps_done(connection) == len(STEPS):
            return
        connection.execute("BEGIN IMMEDIATE")
        try:
            connection.execute("CREATE TABLE IF NOT EXISTS steps (number INTEGER PRIMARY KEY)")
            for number, statements in enumerate(STEPS[self._steps_done(connection) :], self._steps_done(connection) + 1):
                for statement in statements:
                    connection.execute(statement)
                connection.execute("INSERT INTO steps VALUES (?)", (number,))
            connection.execute("COMMIT")
        except BaseException:
            if connection.in_transaction:
                connection.execute("ROLLBACK")
            raise

    def _steps_done(self, connection: sqlite3.Connection) -> int:
        """How many steps the database has had. Raises StorageError where a later version has made it."""
        if not connection.execute("SELECT 1 FROM sqlite_master WHERE name = 'steps'").fetchone():
            return 0
        done = int(connection.execute("SELECT COALESCE(MAX(number), 0) AS done FROM steps").fetchone()["done"])
        if done > len(STEPS):
            said = f"{self.path} was made by a later version of uq (its tables are of step {done}, this version knows {len(STEPS)})"
            raise StorageError(f"{said}; use that version, or set UQ_HOME to another folder")
        return done

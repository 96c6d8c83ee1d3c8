"""The folders of the jobs: jobs/NUMBER/ with the study as it was taken in, the lock, the log and one folder per attempt.

What is handed in is written to a folder of its own first, flushed, and given its number within the transaction that enters the job. Every
distinct file of one submission is written and flushed once (equal ones are further names of it, nothing ever writes to them), every folder
of a job once, the folder of all jobs once before the transaction ends: a job that is in the database has its study on the disk.
"""

from __future__ import annotations

import os
import shutil
from collections.abc import Iterator, Sequence
from contextlib import contextmanager, suppress
from dataclasses import dataclass
from pathlib import Path, PurePosixPath

from uq.errors import StorageError, UseMistake
from uq.queue.job import Intake
from uq.store.hold import hold
from uq.store.places import PROGRESS
from uq.store.whole import flush

JOBS, LOCK, STUDY, ATTEMPT = "jobs", "lock", "study", "attempt"
# Folders of submissions that are not entered yet, and of jobs that are no more; the lock in one says whether somebody still works in it.
_INCOMING, _GONE = ".incoming-", ".gone-"
_ENDING = ".toml"
_AT_ONCE = 16


@dataclass(frozen=True)
class Folders:
    """All folders below the one of the jobs."""

    root: Path

    def job(self, number: int) -> Path:
        """The folder of a job."""
        return self.root / str(number)

    def lock(self, number: int) -> Path:
        """The file that whoever works on a job holds."""
        return self.job(number) / LOCK

    def study(self, number: int, name: str) -> Path:
        """The study file as it was taken in, with the files it names beside it."""
        return self.job(number) / STUDY / f"{name}{_ENDING}"

    def attempt(self, number: int, attempt: int) -> Path:
        """The run folder of an attempt."""
        return self.job(number) / f"{ATTEMPT}-{attempt}"

    def begin(self, number: int, attempt: int) -> Path:
        """Makes the run folder of an attempt, which takes over what earlier ones have kept; for who holds the lock. Raises OSError."""
        folder = self.attempt(number, attempt)
        folder.mkdir(parents=True, exist_ok=True)
        kept = (self.attempt(number, earlier) / PROGRESS for earlier in range(attempt - 1, 0, -1))
        found = next((place for place in kept if place.is_dir()), None)
        if found is not None and not (folder / PROGRESS).exists():
            found.rename(folder / PROGRESS)
        return folder

    @contextmanager
    def taken_in(self, intakes: Sequence[Intake]) -> Iterator[Sequence[Path]]:
        """A folder for each intake, whole and on the disk; those that are not placed by the end are taken away. Raises StorageError."""
        if not intakes:
            yield ()
            return
        stage = self.root / f"{_INCOMING}{os.urandom(8).hex()}"
        handle = None
        try:
            try:
                handle = hold(stage / LOCK)
                yield _written(stage, intakes)
            except OSError as error:
                raise StorageError(f"cannot take in a study to {self.root}: {error.strerror or error}; nothing was handed in") from error
        finally:
            shutil.rmtree(stage, ignore_errors=True)
            if handle is not None:
                os.close(handle)

    def place(self, taken: Path, number: int) -> None:
        """Gives what was taken in its number; within a transaction that has just been given this number. Raises OSError."""
        target = self.job(number)
        if target.exists():  # of a submission that was cut off between here and the end of its transaction
            shutil.rmtree(target)
        taken.rename(target)

    def discard(self, number: int) -> None:
        """Takes back what `place` did, as far as that is possible."""
        shutil.rmtree(self.job(number), ignore_errors=True)

    def flush(self) -> None:
        """Has the numbers on the disk."""
        flush(self.root)

    def remove(self, number: int) -> None:
        """Takes the folder of a job away, at once under its name. Raises OSError."""
        if self.job(number).exists():
            gone = self.root / f"{_GONE}{number}-{os.urandom(4).hex()}"
            self.job(number).rename(gone)
            shutil.rmtree(gone)

    def strays(self, numbers: set[int]) -> list[Path]:
        """Folders that a killed process left: of no job in the database, whose numbers are given, and not being worked in."""
        with suppress(FileNotFoundError):
            found = [each for each in self.root.iterdir() if each.name.startswith((_INCOMING, _GONE)) or each.name.isdecimal()]
            return [each for each in found if not (each.name.isdecimal() and int(each.name) in numbers)]
        return []


def sweep(stray: Path) -> None:
    """Takes a stray folder away, unless somebody works in it."""
    with suppress(OSError):
        handle = hold(stray / LOCK)
        if handle is not None:
            shutil.rmtree(stray, ignore_errors=True)
            os.close(handle)


def check_names(intake: Intake) -> None:
    """Raises UseMistake where a file would leave the folder of its job, or two would have one name."""
    for name in (intake.name, *intake.files):
        parts = PurePosixPath(name).parts
        if not parts or PurePosixPath(name).is_absolute() or ".." in parts or "\\" in name or "\0" in name:
            raise UseMistake(f'a file "{name}"', "a name within the folder of the study, with / between its parts")
    if len(PurePosixPath(intake.name).parts) > 1:
        raise UseMistake(f'a study "{intake.name}"', "a name without /")
    own = f"{intake.name}{_ENDING}"
    if intake.files.get(own, intake.text.encode()) != intake.text.encode():
        raise UseMistake(f'a data file "{own}", called as the study itself', "another name")


def _written(stage: Path, intakes: Sequence[Intake]) -> list[Path]:
    """Writes all files of all intakes."""
    from concurrent.futures import ThreadPoolExecutor  # takes a while to load, and most commands hand in nothing

    known: dict[bytes, Path] = {}
    made, folders = [], []
    for index, intake in enumerate(intakes):
        folder = stage / str(index)
        study = folder / STUDY
        contents = {**intake.files, f"{intake.name}{_ENDING}": intake.text.encode()}
        for name, content in contents.items():
            path = study / name
            path.parent.mkdir(parents=True, exist_ok=True)
            folders += [place for place in path.parents if place.is_relative_to(folder)]
            _write_once(path, content, known)
        made.append(folder)
    # Many at a time: a disk has as many of them in one go as are waiting.
    with ThreadPoolExecutor(_AT_ONCE) as pool:
        list(pool.map(flush, dict.fromkeys((*known.values(), *folders))))
    return made


def _write_once(path: Path, content: bytes, known: dict[bytes, Path]) -> None:
    """Writes a file, or gives one with the same content a further name."""
    if content in known:
        with suppress(OSError):  # a disk without such names, or too many of them
            os.link(known[content], path)
            return
    path.write_bytes(content)
    known[content] = path

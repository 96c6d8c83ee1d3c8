"""What an attempt at a job begins with and ends with: its study, a result that is there already, what a result makes of the job."""

from __future__ import annotations

from contextlib import suppress
from pathlib import Path
from secrets import token_hex
from shutil import rmtree
from typing import TYPE_CHECKING

from uq.errors import Mistake, StorageError, StudyError
from uq.queue.claims import Claim
from uq.queue.deciding import Step, after_answer, says_full
from uq.queue.logs import Log
from uq.queue.watch import Watch

if TYPE_CHECKING:
    from uq.store.result import Result
    from uq.study.study import Study

# Bytes written as a trial where something could not be written and nobody says why.
TRIAL = 2**20


def study_of(claim: Claim) -> Study:
    """The study of a job as it was taken in, with the changes of its batch. Raises StudyError, also where this version of uq reads it
    otherwise than the one with which it was handed in."""
    from uq.study.read import read_study

    study = read_study(claim.study, claim.job.changed)
    if study.fingerprint != claim.job.fingerprint:
        found, remedy = "a study that was handed in with another version of uq", "hand it in again with `uq submit`"
        raise StudyError([Mistake(str(claim.study), 0, 0, "study", found, "one of this version", remedy)])
    return study


def finished_before(claim: Claim) -> Result | None:
    """The result of an earlier attempt whose runner had written it but did not come to tell the queue; it becomes that of this attempt.

    Not one that was given at a deadline: from there it can be gone on. Raises StorageError.
    """
    from uq.store.folder import RESULT
    from uq.store.open import open_result

    for attempt in range(claim.attempt - 1, 0, -1):
        place = attempt_folder(claim, attempt)
        if not (place / RESULT).is_file():
            continue
        with suppress(StorageError):
            facts = open_result(place).attributes
            if facts["study_fingerprint"] == claim.job.fingerprint and not facts.get("stopped"):
                break
    else:
        return None
    try:
        # What of its progress was not cleared away is no longer needed.
        rmtree(claim.folder)
        place.rename(claim.folder)
    except OSError as error:
        raise StorageError(f"the result in {place} cannot be taken over to {claim.folder}: {error.strerror or error}") from error
    return open_result(claim.folder)


def attempt_folder(claim: Claim, attempt: int) -> Path:
    """The run folder of an earlier attempt at the same job."""
    return claim.folder.with_name(f"{claim.folder.name.rpartition('-')[0]}-{attempt}")


def holds_no_more(folder: Path) -> bool:
    """Whether a trial shows that a disk is full, or that no file may be as large as a part of a result is."""
    trial = folder / f".{token_hex(4)}.trial"
    try:
        trial.write_bytes(bytes(TRIAL))
    except OSError as error:
        return says_full(error)
    finally:
        with suppress(OSError):
            trial.unlink(missing_ok=True)
    return False


def answered(result: Result, watch: Watch, log: Log) -> Step:
    """What a result makes of its job; its headline numbers are kept with it."""
    from uq.report.ended import ended_by
    from uq.report.headline import headline
    from uq.report.kept import kept_answers
    from uq.report.withheld import withheld

    head = headline(result)
    watch.settled = tuple(answer.as_json() for answer in kept_answers(head))
    facts = result.attributes
    if failed := int(facts["solves_failed"]):
        told = ", ".join(f"{count} {name}" for name, count in head.failed)
        log(f"{failed} of {int(facts['solves'])} solves failed ({told}); inputs of failed members are in result.nc, group failures")
    return after_answer(ended_by(result), withheld(result, head))

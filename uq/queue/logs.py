"""The log of a job: every line with its time, job and attempt, and with block and member where they are known."""

from __future__ import annotations

import contextlib
from collections.abc import Callable
from dataclasses import dataclass
from datetime import UTC, datetime
from pathlib import Path

LOG = "log.txt"
Tell = Callable[[str], None]


@dataclass(frozen=True)
class Log:
    """Writes to the log.txt of a job, and tells the same on standard error. clock: epoch seconds."""

    path: Path
    job: int
    attempt: int
    tell: Tell
    clock: Callable[[], float]

    def __call__(self, text: str, block: str = "", member: str = "") -> None:
        """One more line; a log that cannot be written must not end a run, so only standard error has it then."""
        line = line_of(text, self.clock(), self.job, self.attempt, block, member)
        self.tell(line)
        with contextlib.suppress(OSError), self.path.open("a", encoding="utf-8") as file:
            file.write(line + "\n")


def line_of(text: str, now: float, job: int, attempt: int, block: str = "", member: str = "") -> str:
    """A line as it is logged: 2026-12-01T21:58:03Z job 41 attempt 2 member 7: text; further lines of the text are moved in."""
    moment = datetime.fromtimestamp(now, UTC).strftime("%Y-%m-%dT%H:%M:%SZ")
    place = [f"job {job}", f"attempt {attempt}", *([f"block {block}"] if block else []), *([f"member {member}"] if member else [])]
    first, *more = text.rstrip().splitlines() or [""]
    return "\n".join([f"{moment} {' '.join(place)}: {first}", *(f"    {each}" for each in more)])

"""Jobs to hand in, a clock that is set by hand, and a plain model of the queue that the real one is compared with."""

from __future__ import annotations

from dataclasses import dataclass, field
from pathlib import Path
from typing import Any

from uq.clock import Window
from uq.queue.claims import Claim
from uq.queue.job import Intake
from uq.queue.queue import Queue

NOON = 1_800_014_400.0  # 2027-01-15 12:00 UTC
DAY, HOUR = 86400.0, 3600.0


@dataclass
class Clock:
    """Epoch seconds that only move when they are told to."""

    now: float = NOON

    def __call__(self) -> float:
        return self.now


def intake(fingerprint: str = "f", **more: Any) -> Intake:
    """A small study to hand in; the queue never reads it."""
    given: dict[str, Any] = {"text": f"# {fingerprint}\n", "files": {}, "name": "tank", "title": "A tank", "members": 512}
    return Intake(fingerprint=fingerprint, **{**given, **more})


def queue_in(folder: Path, clock: Clock | None = None, patience: float = 20.0) -> Queue:
    """A queue whose clock is set by hand."""
    return Queue(folder / "home", clock or Clock(), patience)


def claimed(queue: Queue, runner: str = "a") -> Claim:
    """The next job, which there must be."""
    claim = queue.claim(runner)
    assert claim is not None
    return claim


@dataclass
class ModelJob:
    """What should be known of a job, in the plainest form."""

    number: int
    fingerprint: str
    priority: int
    retries: int
    not_before: float
    window: Window | None
    state: str = "waiting"
    attempt: int = 0
    stumbles: int = 0
    furthest: int = 0
    done: int = 0
    wait: tuple[float, float] | None = None
    locked: bool = False


@dataclass
class Model:
    """The queue in words of lists and sums: no table, no database, no lock. Windows are in UTC."""

    jobs: dict[int, ModelJob] = field(default_factory=dict)
    ever: int = 0

    def submit(self, fingerprint: str, again: bool, priority: int, retries: int, not_before: float, window: Window | None) -> int:
        equal = [n for n, job in self.jobs.items() if job.fingerprint == fingerprint and job.state not in ("failed", "cancelled")]
        if equal and not again:
            return max(equal)
        self.ever += 1
        self.jobs[self.ever] = ModelJob(self.ever, fingerprint, priority, retries, not_before, window)
        return self.ever

    def startable(self, job: ModelJob, now: float) -> bool:
        if now < job.not_before:
            return False
        if job.wait is not None and job.wait[0] <= now < job.wait[1]:
            return False
        if job.window is None:
            return True
        opens, closes = (int(text[:2]) * HOUR + int(text[3:]) * 60 for text in (job.window.opens, job.window.closes))
        time = now % DAY
        return opens <= time < closes if opens < closes else time >= opens or time < closes

    def shown(self, job: ModelJob, now: float) -> str:
        return "held" if job.state == "waiting" and not self.startable(job, now) else job.state

    def claim(self, now: float) -> int | None:
        for job in sorted(self.jobs.values(), key=lambda job: (-job.priority, job.number)):
            if job.locked:
                continue
            if job.state == "pausing":
                self.count(job)
                job.state = "paused"
            elif job.state == "running":
                job.state = "failed" if self.count(job) > job.retries else "waiting"
            if job.state == "waiting" and self.startable(job, now):
                job.state, job.attempt, job.locked = "running", job.attempt + 1, True
                return job.number
        return None

    def count(self, job: ModelJob) -> int:
        """One more attempt came to grief; those before the job came further do not count any more."""
        job.stumbles = 1 if job.done > job.furthest else job.stumbles + 1
        job.furthest = max(job.furthest, job.done)
        return job.stumbles

    def tell(self, number: int, attempt: int, what: str, now: float) -> bool:
        """What a runner says of its attempt; whether that counts."""
        job = self.jobs.get(number)
        if job is None or job.attempt != attempt or job.state not in ("running", "pausing"):
            return False
        rest = "paused" if job.state == "pausing" else "waiting"
        if what in ("done", "partial", "failed"):
            job.state = what
        elif what == "give_back":
            job.state, job.wait = rest, None
        elif what == "paused":
            job.state = "paused"
        elif self.count(job) > job.retries and job.state == "running":
            job.state = "failed"
        else:
            job.state, job.wait = rest, (now, now + min(60 * 2 ** (job.stumbles - 1), 3600))
        return True

    def ask(self, number: int, what: str, now: float) -> bool:
        """What a user wants; whether that can be."""
        job = self.jobs[number]
        possible = {
            "pause": ("waiting", "running"),
            "resume": ("paused",),
            "cancel": ("waiting", "running", "pausing", "paused"),
            "retry": ("failed", "cancelled", "partial", "paused"),
        }
        if job.state not in possible[what]:
            return False
        if what == "pause":
            job.state = "pausing" if job.state == "running" else "paused"
        elif what == "cancel":
            job.state = "cancelled"
        else:
            job.state, job.wait = "waiting", None
            if what == "retry":
                job.stumbles = job.furthest = 0
        return True

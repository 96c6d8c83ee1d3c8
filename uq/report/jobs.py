"""What the queue holds, as lines: every job with how it stands, and the same for programs."""

from __future__ import annotations

from collections import Counter
from collections.abc import Iterable, Mapping, Sequence
from dataclasses import dataclass
from datetime import datetime, timedelta, tzinfo
from functools import cache
from typing import Any, Protocol

from uq.clock import Window, zone_of
from uq.report.plain import padded, plain, width, wrapped
from uq.report.spoken import duration

# A running job is flagged when nothing new was solved for so long, and when its runner has not been heard of for so long (seconds).
STALLED, SILENT = 900.0, 60.0
# Columns that are left for how a job stands, however long the names are.
LEFT = 40
# States in the order in which they are counted up.
STATES = ("running", "pausing", "waiting", "held", "paused", "done", "partial", "failed", "cancelled")
OPEN = frozenset(STATES[:5])


class JobFacts(Protocol):
    """What is told of a job; times are epoch seconds, None where there is none."""

    @property
    def number(self) -> int: ...
    @property
    def state(self) -> str: ...
    @property
    def name(self) -> str: ...
    @property
    def title(self) -> str: ...
    @property
    def batch(self) -> str: ...
    @property
    def changed(self) -> Mapping[str, object]: ...
    @property
    def progress(self) -> Mapping[str, Any]: ...
    @property
    def reason(self) -> str: ...
    @property
    def priority(self) -> int: ...
    @property
    def until(self) -> float | None: ...
    @property
    def deadline(self) -> float | None: ...
    @property
    def window(self) -> Window | None: ...
    @property
    def beat(self) -> float | None: ...
    @property
    def moved(self) -> float | None: ...
    @property
    def note(self) -> str: ...
    @property
    def started(self) -> float | None: ...
    @property
    def ended(self) -> float | None: ...


@dataclass(frozen=True)
class Now:
    """The moment at which is told, and the time zone in which."""

    time: float
    zone: tzinfo | None = None

    def at(self, moment: float) -> str:
        """A moment as a reader says it: "22:41" today, "2 Dec 06:00" on another day of the year, with the year in another one."""
        return self._in(self.zone, moment)

    def at_both(self, moment: float, window: Window | None) -> str:
        """The same with the time in the zone of a batch, where that is another one: "22:41 (23:41 Europe/Athens)"."""
        there = zone_of(window.timezone) if window is not None else None
        if window is None or there is None or self._offset(there, moment) == self._offset(self.zone, moment):
            return self.at(moment)
        return f"{self.at(moment)} ({self._in(there, moment)} {window.timezone})"

    def _offset(self, zone: tzinfo | None, moment: float) -> timedelta | None:
        return datetime.fromtimestamp(moment, zone).astimezone(zone).utcoffset()

    def _in(self, zone: tzinfo | None, moment: float) -> str:
        then, now = (datetime.fromtimestamp(each, zone).astimezone(zone) for each in (moment, self.time))
        if then.date() == now.date():
            return f"{then:%H:%M}"
        return f"{then.day} {then:%b} {f'{then.year} ' if then.year != now.year else ''}{then:%H:%M}"


def jobs_text(jobs: Sequence[JobFacts], now: Now, columns: int) -> str:
    """All jobs, a line each where that is enough."""
    if not jobs:
        return "no jobs\nNext: uq submit STUDY"
    names = [called(job) for job in jobs]
    numbers = max(len(str(jobs[-1].number)), len("job"))
    wide = min(max(width(name) for name in (*names, "study")), max(columns - LEFT, len("study") + 3))
    states = max(len(job.state) for job in jobs)
    head = f"{'job':>{numbers}}  {padded('state', states)}  {padded('study', wide)}"
    lines = [counted(jobs), "", head.rstrip()]
    for job, name in zip(jobs, names, strict=True):
        front = f"{job.number:>{numbers}}  {padded(job.state, states)}  {padded(_cut(name, wide), wide)}"
        about = stands(job, now)
        line = f"{front}  {about}".rstrip()
        lines += [line] if width(line) <= columns else wrapped(about, f"{front}  ", " " * (len(head) + 2), columns)
    return "\n".join(lines)


def counted(jobs: Iterable[JobFacts]) -> str:
    """How many jobs there are in which state: "3 jobs: 1 running, 2 done"."""
    count = Counter(job.state for job in jobs)
    every = sum(count.values())
    told = ", ".join(f"{count[state]} {state}" for state in STATES if count[state])
    return f"{'1 job' if every == 1 else f'{every} jobs'}: {told}"


def called(job: JobFacts) -> str:
    """The name of a job's study, with what a batch has changed in it."""
    if not job.changed:
        return plain(job.name)
    told = ", ".join(f"{short} {shown(value)}" for short, value in zip(short_keys(tuple(job.changed)), job.changed.values(), strict=True))
    return plain(f"{job.name} ({told})")


@cache
def short_keys(keys: tuple[str, ...]) -> tuple[str, ...]:
    """Changed keys as columns are called: parameters.UA_off.triangular.mode is "UA_off mode"; whole where two would be called alike."""
    short = []
    for key in keys:
        parts = key.split(".")[1:] or [key]
        short.append(" ".join(parts if len(parts) < 3 else (parts[0], parts[-1])))
    return tuple(short) if len(set(short)) == len(short) else keys


def shown(value: object) -> str:
    """A changed value as it is told."""
    return f"{value:.6g}" if isinstance(value, float) else str(value)


def stands(job: JobFacts, now: Now) -> str:
    """How a job stands, in a few words."""
    if job.state == "waiting" and not (job.reason or job.priority or job.deadline):
        return ""
    told = [_of_state(job, now), *_flags(job, now), plain(job.reason), plain(job.note)]
    if job.state in OPEN and job.deadline is not None:
        told.append(f"deadline {now.at_both(job.deadline, job.window)}")
    if job.state == "waiting" and job.priority:
        told.append(f"priority {job.priority}")
    return "; ".join(each for each in told if each)


def _of_state(job: JobFacts, now: Now) -> str:
    if job.state == "held" and job.until is not None:
        return f"until {now.at_both(job.until, job.window)}"
    if job.state in ("running", "pausing"):
        return far(job.progress)
    if job.ended is not None:
        took = f", took {duration(max(round(job.ended - job.started), 0))}" if job.started is not None and job.state != "cancelled" else ""
        return f"ended {now.at(job.ended)}{took}"
    return kept(job.progress) if job.state == "paused" and job.progress.get("done") else ""


def kept(progress: Mapping[str, Any]) -> str:
    """What is kept of a run that stands still: "32768 of 131072 solves kept, 2 failed"."""
    failed = int(progress.get("failed") or 0)
    return f"{progress['done']} of {progress['total']} solves kept" + (f", {failed} failed" if failed else "")


def far(progress: Mapping[str, Any]) -> str:
    """How far a run is: "32768 of 131072 solves, 6 min 3 s left, 2 failed"; what it is doing where nothing is solved yet."""
    done, total = int(progress.get("done") or 0), int(progress.get("total") or 0)
    if not done:
        return plain(str(progress.get("stage") or "starting"))
    left, failed = progress.get("seconds_left"), int(progress.get("failed") or 0)
    told = [f"{done} of {total} solves"]
    told += [f"{duration(round(left))} left"] if left is not None and done < total else []
    told += [f"{failed} failed"] if failed else []
    told += [plain(str(progress["stage"]))] if done >= total and progress.get("stage") else []
    return ", ".join(told)


def _flags(job: JobFacts, now: Now) -> Iterable[str]:
    """What is worrying of a running job."""
    if job.state not in ("running", "pausing"):
        return
    silent = 0.0 if job.beat is None else now.time - job.beat
    if silent > SILENT:
        yield f"NOT HEARD OF for {duration(silent)}"
    moved = job.started if job.moved is None else job.moved
    if moved is not None and silent <= SILENT and now.time - moved > STALLED:
        yield f"NO PROGRESS for {duration(now.time - moved)}"


def _cut(text: str, columns: int) -> str:
    """A text of at most so many columns, its end replaced by dots where it is longer."""
    if width(text) <= columns:
        return text
    while width(text) > columns - 3:
        text = text[:-1]
    return text + "..."


def jobs_json(jobs: Iterable[JobFacts], now: Now) -> dict[str, Any]:
    """What `uq jobs --json` prints: schema, `now`, and of every job its facts as the queue has them; times are epoch seconds (UTC)."""
    return {"schema": 1, "now": now.time, "jobs": [_facts(job, now) for job in jobs]}


TOLD = (
    "number",
    "state",
    "name",
    "title",
    "batch",
    "changed",
    "members",
    "priority",
    "fingerprint",
    "reason",
    "note",
    "runner",
    "attempt",
    "stumbles",
)
TIMES = ("submitted", "not_before", "until", "deadline", "beat", "moved", "started", "ended")


def _facts(job: JobFacts, now: Now) -> dict[str, Any]:
    facts = {name: getattr(job, name) for name in (*TOLD, *TIMES)}
    folder = getattr(job, "folder", None)
    return {**facts, "folder": None if folder is None else str(folder), "progress": dict(job.progress), "flags": list(_flags(job, now))}

"""What is handed in, and a job as the queue has it."""

from __future__ import annotations

import json
from collections.abc import Mapping
from dataclasses import dataclass, field
from functools import lru_cache
from pathlib import Path
from typing import Any

from uq.clock import Window
from uq.queue.states import State
from uq.queue.times import Hold, due

RETRIES = 3
# Of a long list every microsecond counts; this is what `json.loads` calls.
_read_json = json.JSONDecoder().raw_decode
_STATES = {state.value: state for state in State}


@dataclass(frozen=True, kw_only=True)
class Intake:
    """A study as it is taken in: later edits of its files change nothing.

    text: of the study file; files: the bytes of all files that it names; changed: what is changed by dotted key when it is read again;
    fingerprint: of the study with its plan and these changes. name: of the study, as its file is called without ending; members: asked.
    batch, batch_title: the batch it is of, "" for none. Times in epoch seconds, None for none. stated: which of priority, not_before,
    deadline, window, retries were said, and so take the place of those of an equal job that is there already.
    """

    text: str
    files: Mapping[str, bytes] = field(repr=False)
    fingerprint: str
    name: str
    title: str
    members: int
    batch: str = ""
    batch_title: str = ""
    changed: Mapping[str, object] = field(default_factory=dict)
    priority: int = 0
    not_before: float | None = None
    deadline: float | None = None
    window: Window | None = None
    retries: int = RETRIES
    stated: frozenset[str] = frozenset()


@dataclass(frozen=True)
class Submitted:
    """The number of the job; `new` is false where an equal one was there. taken: which of its terms are now those that were stated;
    retried: whether it had been cut short by its deadline and goes on from there."""

    job: int
    new: bool
    taken: tuple[str, ...] = ()
    retried: bool = False


@dataclass(frozen=True, kw_only=True, slots=True)
class Job:
    """A job as it stands at one moment; times in epoch seconds, None where there is none.

    until: when a held job may start. attempt: how many were begun. stumbles: attempts in a row that came to grief without bringing it
    further. runner: who works on it, or did last; beat: when it was last heard of; moved: when its solves last grew; progress: what it told
    last. note: what is worth saying of the result. root: of the folders of all jobs.
    """

    number: int
    state: State
    name: str
    title: str
    fingerprint: str
    members: int
    batch: str
    batch_title: str
    changed: Mapping[str, object]
    priority: int
    submitted: float
    not_before: float | None
    until: float | None
    deadline: float | None
    window: Window | None
    retries: int
    attempt: int
    stumbles: int
    runner: str
    beat: float | None
    moved: float | None
    progress: Mapping[str, Any]
    reason: str
    note: str
    started: float | None
    ended: float | None
    root: Path = field(repr=False)

    @property
    def folder(self) -> Path | None:
        """The run folder of the last attempt, and so of the result; None before the first."""
        return self.root / str(self.number) / f"attempt-{self.attempt}" if self.attempt else None


@dataclass(frozen=True)
class Happening:
    """Something that happened to a job: the event, the state it led to, and the reason, where there was one."""

    at: float
    event: str
    state: State
    attempt: int
    reason: str


def window_text(window: Window | None) -> str:
    """A window as the database has it, "" for none."""
    return "" if window is None else json.dumps([window.opens, window.closes, window.timezone])


@lru_cache(maxsize=256)
def window_of(text: str) -> Window | None:
    """Back from the text."""
    return Window(*json.loads(text)) if text else None


def job_of(row: Mapping[str, Any], now: float, root: Path) -> Job:
    """A job from its row at a moment. root: of the folders of all jobs."""
    window = window_of(row["window"])
    hold = None if row["held_until"] is None else Hold(row["held_from"], row["held_until"])
    state, until = _STATES[row["state"]], None
    if state is State.WAITING:
        at = due(now, row["not_before"], hold, window, row["deadline"])
        state, until = (State.HELD, at) if at > now else (state, None)
    return Job(
        number=row["number"],
        state=state,
        name=row["name"],
        title=row["title"],
        fingerprint=row["fingerprint"],
        members=row["members"],
        batch=row["batch"],
        batch_title=row["batch_title"],
        changed=_read_json(row["changed"])[0] if row["changed"] else {},
        priority=row["priority"],
        submitted=row["submitted"],
        not_before=row["not_before"],
        until=until,
        deadline=row["deadline"],
        window=window,
        retries=row["retries"],
        attempt=row["attempt"],
        stumbles=row["stumbles"],
        runner=row["runner"],
        beat=row["beat"],
        moved=row["moved"],
        progress=_read_json(row["progress"])[0] if row["progress"] else {},
        reason=row["reason"],
        note=row["note"],
        started=row["started"],
        ended=row["ended"],
        root=root,
    )

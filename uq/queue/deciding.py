"""What a runner does on which news: decisions, values in and values out; the clock and the disk are read elsewhere."""

from __future__ import annotations

import errno
from collections.abc import Callable
from dataclasses import dataclass
from typing import Literal

from uq.errors import EXIT_STUDY, EXIT_USAGE, ClusterError, FatalMemberError, Interrupted, StorageError, UqError

# Why a run is stopped; "" lets it go on.
Order = Literal["", "cancelled", "pausing", "deadline", "told to end", "window closed"]
Kind = Literal["mistake", "fatal", "full", "storage", "use", "cluster", "worker", "defect"]
# Seconds until a job is begun again whose cluster was not there.
CLUSTER_WAIT = 60.0

# What a disk says that holds no more, a quota that is used up, and a file that may grow no longer.
FULL = frozenset((errno.ENOSPC, errno.EDQUOT, errno.EFBIG))


@dataclass(frozen=True)
class News:
    """What a runner knows of a running job at a moment: the state that the queue wants it in, whether the runner itself was told to end,
    the time now, the job's deadline and when its window closes (epoch seconds, None where there is none)."""

    wanted: str
    told_to_end: bool = False
    now: float = 0.0
    deadline: float | None = None
    closes: float | None = None


# From first to last: the first that holds is obeyed. A deadline comes before the runner's own end, since the answer so far takes seconds
# and is what the job was handed in for.
ORDERS: tuple[tuple[Order, Callable[[News], bool]], ...] = (
    ("cancelled", lambda news: news.wanted == "cancelled"),
    ("pausing", lambda news: news.wanted in ("pausing", "paused")),
    ("deadline", lambda news: news.deadline is not None and news.now >= news.deadline),
    ("told to end", lambda news: news.told_to_end),
    ("window closed", lambda news: news.closes is not None and news.now >= news.closes),
)


def order(news: News) -> Order:
    """Whether a run shall be stopped, and why."""
    return next((name for name, holds in ORDERS if holds(news)), "")


@dataclass(frozen=True)
class Finish:
    """The job has ended: done, partial or failed; note: what is worth saying of a job that is done."""

    state: str
    reason: str = ""
    note: str = ""


@dataclass(frozen=True)
class Pause:
    """The job is paused, with its progress."""

    reason: str = ""


@dataclass(frozen=True)
class GiveBack:
    """The job goes back to the queue with its progress, and costs no retry; wait: not before so many seconds from now; away: since the
    cluster was not there, or was lost."""

    why: str
    wait: float = 0.0
    away: bool = False


@dataclass(frozen=True)
class Stumble:
    """The job may be tried again later, as often as it may be."""

    reason: str


@dataclass(frozen=True)
class LetGo:
    """Nothing: the job has ended already."""


Step = Finish | Pause | GiveBack | Stumble | LetGo

# What becomes of a job whose run was stopped before it had an answer.
STOPPED: dict[Order, Step] = {
    "cancelled": LetGo(),
    "pausing": Pause(),
    "deadline": Finish("failed", "the deadline came before the first round was complete"),
    "told to end": GiveBack("the runner was told to end"),
    "window closed": GiveBack("the window closed"),
    "": GiveBack("the run was interrupted"),
}
CUT_SHORT = "the deadline came first; the answer is that of the last completed round"
# What becomes of a job whose run has an answer, by what ended the run.
ENDED: dict[str, Finish] = {
    "": Finish("done"),
    "reached": Finish("done"),
    "deadline": Finish("partial", CUT_SHORT),
    "members": Finish("partial", "the precision asked was not reached with the members that it may use"),
    "solves": Finish("partial", "the precision asked was not reached with the solves that it may use"),
    "minutes": Finish("partial", "the precision asked was not reached in the minutes that it may take"),
}
WITHHELD = "statements were withheld because members failed"


def after_stop(why: Order) -> Step:
    """What becomes of a job whose run was stopped before it had an answer."""
    return STOPPED[why]


def after_answer(ended: str, withheld: bool) -> Step:
    """What becomes of a job that has an answer. ended: "" or what ended the run before it was precise enough; withheld: whether members
    failed that the study does not allow to fail."""
    step = ENDED[ended]
    return Finish(step.state, step.reason, WITHHELD) if withheld else step


@dataclass(frozen=True)
class Trouble:
    """What went wrong with a run, and the sentence that says so."""

    kind: Kind
    text: str


def after_trouble(trouble: Trouble) -> Step:
    """What becomes of a job whose run went wrong: a mistake will be one again, and so will a member that ends
    whoever solves it; a full disk waits for somebody; a cluster that is away, or a runner that was started wrongly, is no fault of the job;
    the rest may pass."""
    if trouble.kind in ("mistake", "fatal"):
        return Finish("failed", trouble.text)
    if trouble.kind == "full":
        return Pause(f"the disk is full: {trouble.text}; free some room, then resume the job")
    if trouble.kind in ("cluster", "use"):
        return GiveBack(trouble.text, CLUSTER_WAIT, trouble.kind == "cluster")
    return Stumble(trouble.text)


KINDS: dict[int, Kind] = {EXIT_STUDY: "mistake", EXIT_USAGE: "use"}


def trouble_of(error: BaseException, disk_full: bool) -> Trouble:
    """What kind of trouble an error of a run is. disk_full: whether a trial showed that nothing more can be written; libraries that write
    for us do not always say so."""
    if isinstance(error, StorageError):
        return Trouble("full" if disk_full or says_full(error) else "storage", str(error))
    if isinstance(error, Interrupted):
        raise TypeError("an interruption is no trouble")
    if isinstance(error, FatalMemberError):
        return Trouble("fatal", str(error))
    if isinstance(error, ClusterError):
        return Trouble("cluster", str(error))
    if isinstance(error, UqError):
        return Trouble(KINDS.get(error.exit_code, "worker"), str(error))
    if says_full(error):
        return Trouble("full", str(error))
    if isinstance(error, MemoryError):
        return Trouble("worker", "the memory was not enough")
    return Trouble("defect", f"a defect of ours, please report: {type(error).__name__}: {error}")


def says_full(error: BaseException) -> bool:
    """Whether an error, or one that it came from, is that of a full disk."""
    seen: BaseException | None = error
    while seen is not None:
        if isinstance(seen, OSError) and seen.errno in FULL:
            return True
        seen = seen.__cause__ or seen.__context__
    return False

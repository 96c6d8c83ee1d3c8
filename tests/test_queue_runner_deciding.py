"""What a runner does on which news, as a table; no clock, disk or process has a part in it."""

from __future__ import annotations

import errno
from itertools import product

import pytest

from uq.errors import ClusterError, FatalMemberError, Interrupted, Mistake, StorageError, StudyError, UseMistake
from uq.queue.deciding import (
    ENDED,
    FULL,
    ORDERS,
    STOPPED,
    Finish,
    GiveBack,
    LetGo,
    News,
    Order,
    Pause,
    Step,
    Stumble,
    Trouble,
    after_answer,
    after_stop,
    after_trouble,
    order,
    trouble_of,
)
from uq.queue.states import FINISHES, State

QUIET = {"wanted": "running", "told_to_end": False, "now": 10.0, "deadline": None, "closes": None}
NEWS = {
    "cancelled": {"wanted": "cancelled"},
    "pausing": {"wanted": "pausing"},
    "deadline": {"deadline": 10.0},
    "told to end": {"told_to_end": True},
    "window closed": {"closes": 9.0},
}


@pytest.mark.parametrize(
    "quiet", [{}, {"deadline": 10.1}, {"closes": 10.1}, {"wanted": "waiting"}], ids=["nothing", "deadline to come", "window open", "other"]
)
def test_a_run_goes_on_while_nothing_speaks_against_it(quiet: dict[str, object]) -> None:
    assert order(News(**{**QUIET, **quiet})) == ""


@pytest.mark.parametrize("name", NEWS)
def test_every_reason_to_stop_is_heard(name: Order) -> None:
    assert order(News(**{**QUIET, **NEWS[name]})) == name


@pytest.mark.parametrize(("one", "other"), list(product(NEWS, NEWS)))
def test_of_two_reasons_the_first_of_the_table_is_obeyed(one: str, other: str) -> None:
    ranks = [name for name, _ in ORDERS]
    # Both cancelled and pausing cannot be wanted at once: the queue wants one thing.
    if {one, other} == {"cancelled", "pausing"}:
        return
    assert order(News(**{**QUIET, **NEWS[one], **NEWS[other]})) == min(one, other, key=ranks.index)


@pytest.mark.parametrize(
    ("why", "step"),
    [
        ("cancelled", LetGo),
        ("pausing", Pause),
        ("deadline", Finish),
        ("told to end", GiveBack),
        ("window closed", GiveBack),
        ("", GiveBack),
    ],
)
def test_a_stopped_run_leaves_its_job_where_the_reason_wants_it(why: Order, step: type[Step]) -> None:
    assert isinstance(after_stop(why), step)
    assert set(STOPPED) == {"", *(name for name, _ in ORDERS)}


def test_only_a_cluster_that_is_away_is_waited_for() -> None:
    assert not [why for why, step in STOPPED.items() if isinstance(step, GiveBack) and (step.away or step.wait)]
    away = after_trouble(Trouble("cluster", "no scheduler answers"))
    assert away == GiveBack("no scheduler answers", wait=60.0, away=True)
    assert after_trouble(Trouble("use", "strange workers")) == GiveBack("strange workers", wait=60.0)


def test_a_deadline_before_any_answer_fails_and_says_so() -> None:
    step = after_stop("deadline")
    assert isinstance(step, Finish)
    assert (step.state, "first round" in step.reason) == ("failed", True)


@pytest.mark.parametrize("ended", ENDED)
def test_an_answer_is_done_or_partial_with_the_reason(ended: str) -> None:
    step = after_answer(ended, withheld=False)
    assert isinstance(step, Finish)
    assert step.state == ("done" if ended in ("", "reached") else "partial")
    assert bool(step.reason) == (step.state == "partial")
    assert State(step.state) in FINISHES
    withheld = after_answer(ended, withheld=True)
    assert isinstance(withheld, Finish)
    assert (withheld.state, withheld.reason, "withheld" in withheld.note) == (step.state, step.reason, True)


def chained(error: Exception, cause: Exception) -> Exception:
    error.__cause__ = cause
    return error


STUDY_MISTAKE = StudyError([Mistake("a.toml", 1, 1, "time", "x", "y")])
CASES = [
    (STUDY_MISTAKE, False, "mistake", Finish),
    (UseMistake("a", "b"), False, "use", GiveBack),
    (FatalMemberError("member 7"), False, "fatal", Finish),
    (ClusterError("lost"), False, "cluster", GiveBack),
    (StorageError("cannot be read"), False, "storage", Stumble),
    (StorageError("cannot be written"), True, "full", Pause),
    *((chained(StorageError("cannot write"), OSError(number, "no")), False, "full", Pause) for number in FULL),
    (chained(StorageError("cannot write"), OSError(errno.EIO, "no")), False, "storage", Stumble),
    (OSError(errno.ENOSPC, "no space"), False, "full", Pause),
    (MemoryError(), False, "worker", Stumble),
    (ZeroDivisionError("by zero"), False, "defect", Stumble),
]


@pytest.mark.parametrize(("error", "disk_full", "kind", "step"), CASES, ids=[f"{type(case[0]).__name__}-{case[2]}" for case in CASES])
def test_what_goes_wrong_is_told_apart(error: Exception, disk_full: bool, kind: str, step: type[Step]) -> None:
    trouble = trouble_of(error, disk_full)
    assert trouble.kind == kind
    done = after_trouble(trouble)
    assert isinstance(done, step)
    if isinstance(done, Finish):
        assert done.state == "failed"
    said = done.why if isinstance(done, GiveBack) else getattr(done, "reason", "")
    assert str(error) in said or isinstance(error, MemoryError)


def test_a_defect_asks_to_be_reported_and_a_full_disk_says_what_to_do() -> None:
    assert "please report: ZeroDivisionError" in trouble_of(ZeroDivisionError("x"), False).text
    paused = after_trouble(Trouble("full", "cannot write to /x"))
    assert isinstance(paused, Pause)
    assert "free some room" in paused.reason


def test_an_interruption_is_no_trouble() -> None:
    with pytest.raises(TypeError):
        trouble_of(Interrupted("stopped"), False)

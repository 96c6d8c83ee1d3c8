"""When a job may start: holds, windows, waits after a stumble, deadlines."""

from __future__ import annotations

from pathlib import Path

import pytest

from tests.queue_models import DAY, HOUR, NOON, Clock, claimed, intake, queue_in
from uq.clock import When, Window
from uq.queue.states import State
from uq.queue.times import Hold, back_off, deadline_of, due

NIGHT = Window("22:00", "06:00", "UTC")


def test_a_job_starts_at_the_latest_of_all_that_holds_it() -> None:
    assert due(NOON, None, None, None) == NOON
    assert due(NOON, NOON - 1, None, None) == NOON
    assert due(NOON, NOON + 5, Hold(NOON - 1, NOON + 9), None) == NOON + 9
    assert due(NOON, NOON + 5, None, NIGHT) == NOON + 10 * HOUR
    assert due(NOON, NOON + 11 * HOUR, None, NIGHT) == NOON + 11 * HOUR
    assert due(NOON, NOON + 20 * HOUR, None, NIGHT) == NOON + 34 * HOUR


def test_waits_double_up_to_an_hour() -> None:
    assert [back_off(n) for n in range(1, 9)] == [60, 120, 240, 480, 960, 1920, 3600, 3600]
    assert back_off(5000) == 3600


def test_a_clock_that_is_set_back_does_not_lengthen_a_wait() -> None:
    hold = Hold(NOON, NOON + 60)
    assert due(NOON + 1, None, hold, None) == NOON + 60
    assert due(NOON - HOUR, None, hold, None) == NOON - HOUR


@pytest.mark.parametrize(
    ("deadline", "not_before", "window", "expected"),
    [
        ("06:00", None, None, NOON + 18 * HOUR),
        ("13:00", None, None, NOON + HOUR),
        # The window opens at 22:00, so that 13:00 of today would be no use.
        ("13:00", None, NIGHT, NOON + 25 * HOUR),
        ("06:00", NOON + 10.5 * HOUR, NIGHT, NOON + 18 * HOUR),
        ("11:00", NOON + DAY, None, NOON + DAY + 23 * HOUR),
        ("2027-01-15 13:00", NOON + DAY, None, NOON + HOUR),
    ],
)
def test_a_deadline_is_the_first_such_time_after_the_job_may_start(
    deadline: str, not_before: float | None, window: Window | None, expected: float
) -> None:
    utc = Window(window.opens, window.closes, "UTC") if window else Window("00:00", "23:59", "UTC")
    assert deadline_of(When(deadline), NOON, not_before, utc) == expected


def test_a_held_job_comes_due_by_time_alone_and_is_held_again_when_its_window_closes(tmp_path: Path) -> None:
    clock = Clock()
    queue = queue_in(tmp_path, clock)
    queue.submit([intake(window=NIGHT)])
    assert (queue.job(1).state, queue.job(1).until) == (State.HELD, NOON + 10 * HOUR)
    assert queue.next_time() == NOON + 10 * HOUR
    assert queue.claim("a") is None
    clock.now += 10 * HOUR
    assert (queue.job(1).state, queue.job(1).until) == (State.WAITING, None)
    clock.now += 8 * HOUR
    assert (queue.job(1).state, queue.job(1).until) == (State.HELD, NOON + 34 * HOUR)
    clock.now += 20 * HOUR
    assert claimed(queue).job.state is State.RUNNING


def test_the_next_time_is_that_of_the_first_held_job_whatever_holds_it(tmp_path: Path) -> None:
    clock = Clock()
    queue = queue_in(tmp_path, clock)
    assert queue.next_time() is None
    queue.submit(
        [intake("night", window=NIGHT), intake("late", not_before=NOON + 9 * HOUR), intake("day", window=Window("06:00", "22:00", "UTC"))]
    )
    assert queue.next_time() == NOON + 9 * HOUR
    with claimed(queue) as claim:
        assert claim.job.fingerprint == "day"
        assert claim.stumbled("no luck") is State.HELD
    assert queue.next_time() == NOON + 60
    clock.now += 30
    assert queue.next_time() == NOON + 60
    clock.now += 30
    assert queue.next_time() == NOON + 9 * HOUR
    queue.cancel(2)
    assert queue.next_time() == NOON + 10 * HOUR
    queue.pause(1)
    assert queue.next_time() is None


def test_a_job_given_back_until_a_time_is_held_until_then_and_no_retry_is_spent(tmp_path: Path) -> None:
    clock = Clock()
    queue = queue_in(tmp_path, clock)
    queue.submit([intake(retries=0)])
    for _ in range(5):
        with claimed(queue) as claim:
            claim.give_back("the runner was told to end", until=clock.now + 10)
        assert (queue.job(1).state, queue.job(1).until, queue.job(1).stumbles) == (State.HELD, clock.now + 10, 0)
        assert queue.claim("b") is None
        clock.now += 10
    with claimed(queue) as claim:
        claim.give_back("the runner was told to end")
    assert queue.job(1).state is State.WAITING


def test_at_its_deadline_a_job_may_start_whatever_its_window_but_not_within_a_wait() -> None:
    assert due(NOON, None, None, NIGHT, NOON + HOUR) == NOON + HOUR
    assert due(NOON, NOON + 2 * HOUR, None, NIGHT, NOON - HOUR) == NOON
    assert due(NOON, None, None, NIGHT, NOON + 11 * HOUR) == NOON + 10 * HOUR
    assert due(NOON, None, Hold(NOON - 1, NOON + 60), NIGHT, NOON - 1) == NOON + 60


def test_a_job_whose_window_is_closed_is_claimed_at_its_deadline_and_before_all_others(tmp_path: Path) -> None:
    clock = Clock()
    queue = queue_in(tmp_path, clock)
    queue.submit([intake("a", priority=9), intake("b", window=NIGHT, deadline=NOON + HOUR), intake("c", window=NIGHT)])
    queue.pause(1)
    assert (queue.claim("a"), queue.next_time()) == (None, NOON + HOUR)
    clock.now += HOUR
    queue.resume(1)
    assert [claimed(queue).job.number for _ in range(2)] == [2, 1]
    assert queue.claim("a") is None
    assert queue.next_time() == NOON + 10 * HOUR

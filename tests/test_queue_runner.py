"""One runner on a queue: every way in which an attempt at a job can end."""

from __future__ import annotations

import threading
import time
from collections.abc import Callable
from pathlib import Path
from typing import Any

import pytest

import uq.pipeline
from tests.test_cli_run import LONG
from uq.clock import Window
from uq.errors import FatalMemberError, NoClusterError, StorageError, UseMistake
from uq.queue.bell import Bell
from uq.queue.intake import Terms, intake_of
from uq.queue.job import Job
from uq.queue.queue import Queue
from uq.queue.runner import Means, Runner
from uq.running.observer import tell_of
from uq.store.open import open_result
from uq.study.read import parse_study

SMALL = """
schema = 1
title = "Decay"
[time]
stop = 4
points = 5
[states.x]
start = { lognormal = { median = 2, gsd = 1.2 } }
rate = "-fall * x"
[parameters]
fall = { normal = { mean = 0.5, sd = 0.05 } }
[outcomes.last]
take = "final(x)"
[limits.low]
when = "x < 0.3"
by = [2, 4]
[plan]
members = 1024
"""
# Some hundred steps for every member, in several rounds: some seconds.
ROUNDS = LONG.replace("stop = 20000", "stop = 1500").replace("points = 11", "points = 3")
# For runners in processes of their own, which beat once a second.
LONGER = ROUNDS.replace("stop = 1500", "stop = 5000")


class Bench:
    """A queue with one job and a runner, and what the runner has told."""

    def __init__(self, home: Path, text: str, now: float | None = None, **wishes: Any) -> None:
        self.now, self.heard, self.bell = now, [], Bell()  # type: tuple[float | None, list[str], Bell]
        self.queue = Queue(home, self.clock)
        window = wishes.pop("window", None)
        self.number = self.queue.submit([intake_of(parse_study(text), self.clock(), Terms(**wishes), window)])[0].job
        means = Means(threads=1, block_rows=16)
        self.runner = Runner(self.queue, "bench", self.bell, self.heard.append, means, self.clock)

    def clock(self) -> float:
        return time.time() if self.now is None else self.now

    @property
    def job(self) -> Job:
        return self.queue.job(self.number)

    def when_solving(self, act: Callable[[], object]) -> threading.Thread:
        """Acts once some of the job is solved."""

        def wait() -> None:
            ends = time.monotonic() + 120
            while not self.job.progress.get("done") and time.monotonic() < ends:
                time.sleep(0.05)
            act()

        thread = threading.Thread(target=wait)
        thread.start()
        return thread

    def work(self, act: Callable[[], object] | None = None) -> bool:
        thread = self.when_solving(act) if act else None
        unfinished = self.runner.work(once=True)
        if thread:
            thread.join()
        return unfinished

    def close(self) -> None:
        self.queue.close()
        self.bell.close()


@pytest.fixture
def bench(tmp_path: Path, monkeypatch: pytest.MonkeyPatch) -> Any:
    # So often that whatever is wanted is heard while a short run goes on.
    monkeypatch.setattr("uq.queue.heart.BEAT", 0.05)
    made: list[Bench] = []

    def make(text: str = SMALL, **wishes: Any) -> Bench:
        made.append(Bench(tmp_path / f"home-{len(made)}", text, **wishes))
        return made[-1]

    yield make
    for each in made:
        each.close()


def test_a_job_that_is_done_keeps_its_headline_answers_and_a_log(bench: Any) -> None:
    made = bench()
    assert made.work() is False
    job = made.job
    assert (job.state, job.attempt, job.reason) == ("done", 1, "")
    result = open_result(job.folder)
    settled = {(each["what"], each["level"]): each["value"] for each in job.progress["settled"]}
    assert settled["low by time 4", None] == float(result.limits["low"].ever_by[-1])
    assert settled["last", 0.95] == float(result.outcomes["last"].quantiles.sel(quantile=0.95))
    log = (job.folder.parent / "log.txt").read_text().splitlines()
    assert log == made.heard
    assert all(" job 1 attempt 1: " in line for line in log)
    assert log[-1].endswith(": done")


def test_a_paused_job_goes_on_with_its_progress_and_ends_with_the_same_bits(bench: Any) -> None:
    calm, made = bench(ROUNDS), bench(ROUNDS)
    calm.work()
    made.work(lambda: made.queue.pause(made.number))
    assert made.job.state == "paused"
    assert list(made.job.folder.glob("progress/*.nc"))
    done = made.job.progress["done"]
    made.queue.resume(made.number)
    made.work()
    assert (made.job.state, made.job.attempt) == ("done", 2)
    assert made.job.progress["lately"] <= made.job.progress["done"] - done + 16 * 32
    results = [open_result(each.job.folder).attributes["content_fingerprint"] for each in (calm, made)]
    assert results[0] == results[1]


def test_a_cancelled_job_is_let_go_and_can_be_retried(bench: Any) -> None:
    made = bench(ROUNDS)
    assert made.work(lambda: made.queue.cancel(made.number)) is False
    assert (made.job.state, made.heard[-1].rpartition(": ")[2]) == ("cancelled", "cancelled")
    made.queue.retry(made.number)
    made.work()
    assert made.job.state == "done"


def test_a_runner_that_is_told_to_end_gives_its_job_back_at_no_cost(bench: Any) -> None:
    made = bench(ROUNDS, retries=0)
    assert made.work(made.bell.ring) is True
    assert (made.job.state, made.job.stumbles) == ("waiting", 0)
    assert made.runner.work(once=True) is False  # the bell has rung: nothing is begun


def test_a_deadline_gives_the_answer_of_the_last_completed_round(bench: Any) -> None:
    from uq.clock import When

    made = bench(ROUNDS, now=1_000_000.0, deadline=When("1970-01-12 14:00Z"))

    def late() -> None:
        made.now = 1_010_000.0

    def after_a_round() -> None:
        while not any(part["what"] for part in made.job.progress["settled"]) and made.job.progress["done"] < 3072:
            time.sleep(0.05)
        late()

    made.work(after_a_round)
    assert made.job.state == "partial"
    assert "deadline" in made.job.reason
    result = open_result(made.job.folder)
    assert result.attributes["stopped"] == "deadline"
    assert 0 < result.attributes["members"] < 16384
    made.queue.retry(made.number)
    made.work()
    assert made.job.state == "done"
    assert open_result(made.job.folder).attributes["members"] == 16384


def test_a_deadline_before_the_first_round_fails_and_keeps_what_is_done(bench: Any) -> None:
    made = bench(now=1_000_000.0)
    made.queue.cancel(made.number)
    from uq.clock import When

    intake = intake_of(parse_study(SMALL), made.now, Terms(deadline=When("1970-01-12 14:00Z")))
    number = made.queue.submit([intake])[0].job
    made.now = 1_010_000.0
    made.work()
    job = made.queue.job(number)
    assert (job.state, "deadline" in job.reason) == ("failed", True)


def test_a_window_that_closes_holds_the_job_until_it_opens(bench: Any) -> None:
    # 13:46:40 UTC.
    made = bench(ROUNDS, now=1_000_000.0, window=Window("13:00", "14:00", "UTC"), retries=0)

    def later() -> None:
        made.now = 1_000_000.0 + 3600

    made.work(later)
    assert (made.job.state, made.job.stumbles) == ("held", 0)
    assert made.job.until == 1_000_000.0 + 24 * 3600 - (46 * 60 + 40)
    made.now = made.job.until
    made.work()
    assert made.job.state == "done"


def test_a_study_that_another_version_reads_otherwise_fails_at_once(bench: Any) -> None:
    made = bench()
    (file,) = (made.queue.home / "jobs" / "1" / "study").iterdir()
    file.write_text(SMALL.replace("0.05", "0.06"))
    made.work()
    assert (made.job.state, made.job.attempt, made.job.progress["exit_code"]) == ("failed", 1, 3)
    assert "hand it in again" in made.job.reason


def test_a_defect_is_logged_with_its_traceback_and_tried_again_later(bench: Any, monkeypatch: pytest.MonkeyPatch) -> None:
    made = bench(now=1_000_000.0, retries=1)

    def broken(*arguments: object, **named: object) -> None:
        raise ZeroDivisionError("of ours")

    monkeypatch.setattr(uq.pipeline, "run", broken)
    made.work()
    assert (made.job.state, made.job.until) == ("held", 1_000_060.0)
    assert "please report: ZeroDivisionError: of ours" in made.job.reason
    assert any("Traceback" in line and "broken" in line for line in made.heard)
    made.now = 1_000_060.0
    made.work()
    assert (made.job.state, made.job.attempt) == ("failed", 2)


def test_storage_in_trouble_is_waited_for_and_a_full_disk_pauses(bench: Any, monkeypatch: pytest.MonkeyPatch) -> None:
    made = bench(now=1_000_000.0)
    run, errors = uq.pipeline.run, [StorageError("cannot write /x"), OSError(28, "No space left on device")]

    def in_trouble(*arguments: Any, **named: Any) -> Any:
        if errors:
            raise errors.pop(0)
        return run(*arguments, **named)

    monkeypatch.setattr(uq.pipeline, "run", in_trouble)
    made.work()
    assert (made.job.state, made.job.reason) == ("held", "cannot write /x")
    made.now = 1_000_060.0
    made.work()
    assert (made.job.state, "disk is full" in made.job.reason) == ("paused", True)
    made.queue.resume(made.number)
    made.work()
    assert made.job.state == "done"


def test_a_runner_that_was_started_wrongly_ends_and_leaves_other_jobs_alone(bench: Any, monkeypatch: pytest.MonkeyPatch) -> None:
    made = bench()
    made.queue.submit([intake_of(parse_study(SMALL), made.clock())], again=True)

    def strange(*arguments: object, **named: object) -> None:
        raise UseMistake("workers of another version", "the same versions")

    monkeypatch.setattr(uq.pipeline, "run", strange)
    with pytest.raises(UseMistake, match="workers of another version"):
        made.work()
    assert (made.job.state, made.queue.job(2).state, made.queue.job(2).attempt) == ("held", "waiting", 0)


def test_a_result_whose_runner_died_before_it_could_say_so_is_not_worked_out_again(bench: Any, monkeypatch: pytest.MonkeyPatch) -> None:
    made = bench()
    with made.queue.claim("dies") as claim:
        from uq.queue.attempt import study_of

        uq.pipeline.run(study_of(claim), claim.folder)

    def never(*arguments: object, **named: object) -> None:
        raise AssertionError("worked out again")

    monkeypatch.setattr(uq.pipeline, "run", never)
    made.work()
    assert (made.job.state, made.job.attempt, made.job.folder.name) == ("done", 2, "attempt-2")
    assert open_result(made.job.folder).attributes["members"] == 1024


def test_progress_is_told_while_a_precision_is_sought(bench: Any) -> None:
    precise = ROUNDS + "members = 16384\n[plan.precision]\nquantiles = 0.0001\n"
    made, seen = bench(precise), []

    def look() -> None:
        ends = time.monotonic() + 60
        while not made.job.progress["settled"] and made.job.state == "running" and time.monotonic() < ends:
            time.sleep(0.05)
        seen.extend(made.job.progress["settled"])
        made.queue.cancel(made.number)

    made.work(look)
    assert {each["what"] for each in seen} == {"x at time 1500", "v at time 1500"}
    assert {each["settled"] for each in seen} == {False}


def test_a_deadline_in_a_closed_window_is_met_without_solving_and_without_a_cluster(bench: Any) -> None:
    from uq.clock import When

    # From 13:46:40 UTC; the window closes at 14:00 and the deadline is at 15:00.
    made = bench(ROUNDS, now=1_000_000.0, window=Window("13:00", "14:00", "UTC"), deadline=When("1970-01-12 15:00Z"))

    def closes() -> None:
        while made.job.progress["done"] < 3072:
            time.sleep(0.05)
        made.now = 1_000_000.0 + 1800

    made.work(closes)
    assert made.job.state == "held"
    made.now = 1_000_000.0 + 5000
    elsewhere = Runner(made.queue, "b", made.bell, made.heard.append, Means(threads=1, cluster="tcp://127.0.0.1:9"), made.clock)
    elsewhere.work(once=True)
    assert (made.job.state, "deadline" in made.job.reason) == ("partial", True)
    assert "done" not in made.job.progress, "nothing was solved"
    assert 0 < open_result(made.job.folder).attributes["members"] < 16384


def test_a_cluster_that_is_away_keeps_the_jobs_waiting_and_is_told_at_the_end(bench: Any, monkeypatch: pytest.MonkeyPatch) -> None:
    made = bench()
    made.queue.submit([intake_of(parse_study(ROUNDS), made.clock())])
    runner = Runner(made.queue, "bench", made.bell, made.heard.append, Means(cluster="tcp://127.0.0.1:9"), made.clock)
    monkeypatch.setattr("uq.running.cluster.CONNECTED_WITHIN", 0.5)
    with pytest.raises(NoClusterError, match=r"^jobs 1, 2 wait for the cluster.*no scheduler answers at tcp://127.0.0.1:9"):
        runner.work(once=True)
    assert {made.queue.job(number).state for number in (1, 2)} == {"held"}
    assert NoClusterError.exit_code == 8


def test_a_result_that_cannot_be_taken_over_is_trouble_with_the_disk(bench: Any, monkeypatch: pytest.MonkeyPatch) -> None:
    made = bench()
    with made.queue.claim("dies") as claim:
        from uq.queue.attempt import study_of

        uq.pipeline.run(study_of(claim), claim.folder)

    def broken(folder: Path) -> None:
        raise OSError(5, "Input/output error")

    monkeypatch.setattr("uq.queue.attempt.rmtree", broken)
    made.work()
    assert (made.job.state, "cannot be taken over" in made.job.reason, "Input/output error" in made.job.reason) == ("held", True, True)


def test_a_member_that_ends_its_workers_is_logged_with_its_place(bench: Any, monkeypatch: pytest.MonkeyPatch) -> None:
    made = bench()

    def fatal(*arguments: object, observer: Any, **named: object) -> None:
        tell_of(observer, "its workers died", "3/16-31")
        raise FatalMemberError("The member in row 21", "3/21", "1")

    monkeypatch.setattr(uq.pipeline, "run", fatal)
    made.work()
    assert made.job.state == "failed"
    assert any(line.endswith("job 1 attempt 1 block 3/16-31: its workers died") for line in made.heard)
    assert any(" job 1 attempt 1 block 3/21 member 1: " in line for line in made.heard)

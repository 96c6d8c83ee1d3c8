"""Who owns a job: one runner at a time, whatever processes and clocks do; what an attempt leaves to the next."""

from __future__ import annotations

import json
import os
import signal
import subprocess
import sys
from collections import Counter
from collections.abc import Iterator
from contextlib import contextmanager
from pathlib import Path

import pytest

from tests.queue_models import DAY, Clock, claimed, intake, queue_in
from uq.errors import StorageError
from uq.queue.folders import Folders
from uq.queue.moves import Tried
from uq.queue.queue import Queue
from uq.queue.states import State

ROOT = Path(__file__).parent.parent
OWNER = """
import sys, time
from pathlib import Path
from uq.queue.queue import Queue
claim = Queue(Path(sys.argv[1])).claim("another")
claim.beat({"done": 7, "total": 9})
(claim.folder / "progress").mkdir(exist_ok=True)
(claim.folder / "progress" / "0001-part.nc").write_text("done by another")
print(claim.job.number, flush=True)
sys.stdin.readline()
print(claim.beat({"done": 8}), claim.finish("done"), flush=True)
time.sleep(60)
"""


@contextmanager
def owner(queue: Queue) -> Iterator[subprocess.Popen[str]]:
    """Another process that has claimed the next job, and tells the queue of its end when a line is written to it."""
    command = [sys.executable, "-c", OWNER, str(queue.home)]
    with subprocess.Popen(command, stdin=subprocess.PIPE, stdout=subprocess.PIPE, text=True, cwd=ROOT) as process:
        assert process.stdout is not None
        try:
            assert process.stdout.readline().strip().isdecimal()
            yield process
        finally:
            process.kill()


def test_jobs_are_claimed_by_priority_then_by_number(tmp_path: Path) -> None:
    queue = queue_in(tmp_path)
    queue.submit([intake("a"), intake("b", priority=5), intake("c", priority=-1), intake("d", priority=5)])
    claims = [claimed(queue) for _ in range(4)]
    assert [claim.job.fingerprint for claim in claims] == ["b", "d", "a", "c"]
    assert queue.claim("a") is None


def test_a_claim_says_all_that_a_runner_needs(tmp_path: Path) -> None:
    clock = Clock()
    queue = queue_in(tmp_path, clock)
    queue.submit([intake(files={"data/a.csv": b"t,x\n"}, changed={"plan.members": 512})])
    with claimed(queue, "host 17") as claim:
        assert (claim.attempt, claim.job.attempt, claim.job.state, claim.job.runner) == (1, 1, State.RUNNING, "host 17")
        assert (claim.job.started, claim.job.beat, claim.job.changed) == (clock.now, clock.now, {"plan.members": 512})
        assert claim.study.read_text() == "# f\n"
        assert (claim.study.parent / "data" / "a.csv").read_bytes() == b"t,x\n"
        assert claim.folder == claim.job.folder
        assert claim.folder.is_dir()


def test_a_job_is_its_owners_until_the_lock_is_free(tmp_path: Path) -> None:
    queue = queue_in(tmp_path)
    queue.submit([intake()])
    with claimed(queue) as claim:
        claim.give_back("the runner was told to end")
        assert queue.job(1).state is State.WAITING
        assert queue.claim("b") is None, "the owner has not let go yet"
    assert claimed(queue).attempt == 2


@pytest.mark.skipif(os.name == "nt", reason="needs SIGKILL")
def test_a_job_whose_owner_is_killed_can_be_claimed_at_once_with_its_progress(tmp_path: Path) -> None:
    queue = queue_in(tmp_path)
    queue.submit([intake()])
    with owner(queue) as other:
        assert queue.claim("b") is None
        other.kill()
        other.wait()
        with claimed(queue, "b") as claim:
            assert (claim.attempt, claim.job.stumbles) == (2, 1)
            assert (claim.folder / "progress" / "0001-part.nc").read_text() == "done by another"
            assert not (queue.folders.attempt(1, 1) / "progress").exists()
            assert claim.finish("done")
    assert [each.event for each in queue.history(1)] == ["submit", "claim", "lose", "claim", "complete"]
    assert "its runner (another) died in attempt 1" in queue.history(1)[2].reason


@pytest.mark.skipif(os.name == "nt", reason="needs SIGSTOP")
def test_an_owner_that_is_stopped_owns_on_however_long_that_takes(tmp_path: Path) -> None:
    clock = Clock()
    queue = queue_in(tmp_path, clock)
    queue.submit([intake()])
    with owner(queue) as other:
        other.send_signal(signal.SIGSTOP)
        clock.now += 365 * DAY
        assert queue.claim("b") is None
        assert queue.job(1).state is State.RUNNING
        other.send_signal(signal.SIGCONT)
        assert told(other) == "running True"
    assert [each.event for each in queue.history(1)] == ["submit", "claim", "complete"]


@pytest.mark.skipif(os.name == "nt", reason="needs SIGSTOP")
def test_a_stopped_owner_of_a_job_that_was_cancelled_and_tried_again_finishes_nothing(tmp_path: Path) -> None:
    queue = queue_in(tmp_path)
    queue.submit([intake()])
    with owner(queue) as other:
        other.send_signal(signal.SIGSTOP)
        queue.cancel(1)
        queue.retry(1)
        assert queue.claim("b") is None, "two must not write to one job, so the next waits for the first to let go"
        other.send_signal(signal.SIGCONT)
        assert told(other) == "cancelled False"
        other.kill()
        other.wait()
        with claimed(queue, "b") as claim:
            assert claim.attempt == 2
            assert claim.finish("done")
    assert [each.event for each in queue.history(1)] == ["submit", "claim", "cancel", "retry", "claim", "complete"]


def told(other: subprocess.Popen[str]) -> str:
    """What the owner says when it goes on."""
    assert other.stdin is not None
    assert other.stdout is not None
    other.stdin.write("go on\n")
    other.stdin.flush()
    return other.stdout.readline().strip()


CLAIMER = """
import os, sys
from pathlib import Path
from uq.queue.queue import Queue
queue, name, inside = Queue(Path(sys.argv[1])), sys.argv[2], Path(sys.argv[3])
print("ready", flush=True)
sys.stdin.readline()
while (claim := queue.claim(name)) is not None:
    with claim:
        mark = inside / str(claim.job.number)
        os.close(os.open(mark, os.O_CREAT | os.O_EXCL))  # fails where another is inside as well
        claim.beat({"done": 1})
        mark.unlink()
        print(claim.job.number, claim.attempt, flush=True)
        # A third of the first attempts goes back, so that jobs change hands.
        if claim.attempt == 1 and claim.job.number % 3 == 0:
            claim.give_back("for the other")
        else:
            assert claim.finish("done")
"""


def test_processes_on_one_queue_never_own_one_job_twice_and_leave_none_out(tmp_path: Path) -> None:
    queue = queue_in(tmp_path)
    queue.submit([intake(str(number)) for number in range(60)])
    (tmp_path / "inside").mkdir()
    command = [sys.executable, "-c", CLAIMER, str(queue.home)]
    names = ("a", "b", "c")
    every = [
        subprocess.Popen([*command, name, str(tmp_path / "inside")], stdin=subprocess.PIPE, stdout=subprocess.PIPE, text=True, cwd=ROOT)
        for name in names
    ]
    for each in every:
        assert each.stdout is not None
        assert each.stdout.readline() == "ready\n"
    for each in every:
        assert each.stdin is not None
        each.stdin.write("go\n")
        each.stdin.flush()
    worked = [[tuple(map(int, line.split())) for line in each.communicate()[0].splitlines()] for each in every]
    assert [each.returncode for each in every] == [0, 0, 0]
    count = Counter(one for each in worked for one in each)
    assert count == Counter({**{(n, 1): 1 for n in range(1, 61)}, **{(n, 2): 1 for n in range(3, 61, 3)}})
    assert {job.state for job in queue.jobs()} == {State.DONE}
    assert sum(bool(each) for each in worked) >= 2, "more than one had a part in it"


def test_the_progress_of_all_attempts_goes_on_to_the_next(tmp_path: Path) -> None:
    queue = queue_in(tmp_path)
    queue.submit([intake()])
    for attempt in (1, 2, 3):
        with claimed(queue) as claim:
            place = claim.folder / "progress"
            place.mkdir(exist_ok=True)
            assert sorted(path.name for path in place.iterdir()) == [f"{n}.nc" for n in range(1, attempt)]
            (place / f"{attempt}.nc").write_text("")
            claim.give_back()
    assert [path.name for path in queue.folders.job(1).glob("*/progress")] == ["progress"]


def test_progress_is_taken_over_also_where_an_attempt_died_while_it_began(tmp_path: Path, monkeypatch: pytest.MonkeyPatch) -> None:
    """Killed after the folder was made or the progress moved, before that held in the database."""
    queue = queue_in(tmp_path)
    queue.submit([intake()])
    with claimed(queue) as claim:
        (claim.folder / "progress").mkdir()
        (claim.folder / "progress" / "1.nc").write_text("")
        claim.give_back()

    class Killed(BaseException):
        pass

    begin = Folders.begin

    def killed(self: Folders, number: int, attempt: int) -> Path:
        begin(self, number, attempt)
        raise Killed

    monkeypatch.setattr(Folders, "begin", killed)
    with pytest.raises(Killed):
        queue.claim("a")
    monkeypatch.undo()
    assert queue.job(1).attempt == 1
    with claimed(queue) as claim:
        assert claim.attempt == 2
        assert (claim.folder / "progress" / "1.nc").exists()


def test_an_attempt_that_ended_leaves_its_result_where_it_is(tmp_path: Path) -> None:
    queue = queue_in(tmp_path)
    queue.submit([intake()])
    with claimed(queue) as claim:
        (claim.folder / "result.nc").write_text("so far")
        (claim.folder / "progress").mkdir()
        assert claim.finish("partial", "the deadline came first", "as far as it got")
    job = queue.job(1)
    assert (job.state, job.reason, job.note, job.folder) == (State.PARTIAL, "the deadline came first", "as far as it got", claim.folder)
    queue.retry(1)
    with claimed(queue) as second:
        assert (second.folder / "progress").is_dir()
        assert (claim.folder / "result.nc").read_text() == "so far"


def test_beats_say_how_far_it_is_and_bring_back_what_is_wanted(tmp_path: Path) -> None:
    clock = Clock()
    queue = queue_in(tmp_path, clock)
    queue.submit([intake()])
    with claimed(queue) as claim:
        clock.now += 5
        assert claim.beat({"done": 3, "total": 9, "failed": 1, "settled": [{"what": "T"}]}) == "running"
        assert queue.job(1).progress == {"done": 3, "total": 9, "failed": 1, "settled": [{"what": "T"}]}
        clock.now += 5
        assert claim.beat({"done": 3, "total": 9}) == "running"
        clock.now += 5
        assert claim.beat() == "running"
        job = queue.job(1)
        assert (job.beat, job.moved, job.progress["done"]) == (clock.now, clock.now - 10, 3)
        queue.pause(1)
        assert claim.beat() == "pausing"
        queue.cancel(1)
        assert claim.beat() == "cancelled"
        assert queue.job(1).beat == clock.now


def test_what_a_cancelled_attempt_says_does_not_count(tmp_path: Path) -> None:
    queue = queue_in(tmp_path)
    queue.submit([intake()])
    with claimed(queue) as claim:
        queue.cancel(1)
        assert not claim.finish("done")
        assert claim.stumbled("x") is State.CANCELLED
        assert claim.paused() is State.CANCELLED
        assert claim.give_back() is State.CANCELLED
    assert queue.claim("a") is None
    queue.clean(0)
    assert claim.beat() == "cancelled"
    assert not claim.finish("done")


@pytest.mark.parametrize("end", ["done", "partial", "failed"])
def test_a_run_that_is_done_before_it_could_be_paused_is_done(tmp_path: Path, end: str) -> None:
    queue = queue_in(tmp_path)
    queue.submit([intake()])
    with claimed(queue) as claim:
        queue.pause(1)
        assert claim.finish(end)
    assert queue.job(1).state == end


@pytest.mark.parametrize("leave", ["give_back", "paused", "stumbled"])
def test_however_an_attempt_stops_a_pause_that_was_wanted_is_kept(tmp_path: Path, leave: str) -> None:
    queue = queue_in(tmp_path)
    queue.submit([intake(retries=0)])
    with claimed(queue) as claim:
        queue.pause(1)
        assert getattr(claim, leave)("because") is State.PAUSED
    assert (queue.job(1).state, queue.job(1).reason) == (State.PAUSED, "because")
    queue.resume(1)
    assert claimed(queue).attempt == 2


def test_an_owner_that_died_while_it_should_pause_leaves_a_paused_job(tmp_path: Path) -> None:
    queue = queue_in(tmp_path)
    queue.submit([intake(retries=0)])
    claim = claimed(queue)
    queue.pause(1)
    claim.close()
    assert queue.claim("b") is None
    assert queue.job(1).state is State.PAUSED


def test_stumbles_are_waited_out_ever_longer_and_end_in_failure(tmp_path: Path) -> None:
    clock = Clock()
    queue = queue_in(tmp_path, clock)
    queue.submit([intake(retries=3)])
    waits = []
    for _ in range(3):
        with claimed(queue) as claim:
            assert claim.stumbled("the storage gave an error") is State.HELD
        job = queue.job(1)
        assert job.until is not None
        waits.append(job.until - clock.now)
        assert queue.claim("b") is None
        clock.now = job.until
    assert waits == [60, 120, 240]
    with claimed(queue) as claim:
        assert claim.stumbled("the storage gave an error") is State.FAILED
    assert (queue.job(1).state, queue.job(1).reason, queue.job(1).stumbles) == (State.FAILED, "the storage gave an error", 4)
    assert queue.retry(1).stumbles == 0


def test_a_job_whose_runners_die_fails_after_its_retries(tmp_path: Path) -> None:
    queue = queue_in(tmp_path)
    queue.submit([intake("a", retries=2), intake("b")])
    for attempt in (1, 2, 3):
        claim = claimed(queue)
        assert (claim.job.number, claim.attempt) == (1, attempt)
        claim.close()
    assert claimed(queue).job.number == 2
    job = queue.job(1)
    assert job.state is State.FAILED
    assert "its runner (a) died in attempt 3, as in 2 before it without getting further" in job.reason


def test_only_attempts_that_do_not_bring_a_job_further_count() -> None:
    tried = Tried(0, 0).once_more(0).once_more(0)
    assert tried == Tried(2, 0)
    assert tried.once_more(10) == Tried(1, 10)
    assert tried.once_more(10).once_more(10).once_more(5) == Tried(3, 10)


def test_a_job_that_gets_further_every_night_is_not_given_up(tmp_path: Path) -> None:
    queue = queue_in(tmp_path)
    queue.submit([intake(retries=1)])
    for night in range(1, 8):
        with claimed(queue) as claim:
            claim.beat({"done": 100 * night, "total": 900})
    assert queue.job(1).state is State.RUNNING
    assert claimed(queue).job.stumbles == 1


def test_a_job_whose_folder_cannot_be_used_is_set_aside_and_the_others_go_on(tmp_path: Path) -> None:
    queue = queue_in(tmp_path)
    queue.submit([intake("a", priority=9), intake("b", priority=8), intake("c")])
    (queue.folders.job(1) / "attempt-1").write_text("in the way")
    queue.folders.lock(2).mkdir()
    assert claimed(queue).job.number == 3
    for number, words in ((1, "File exists"), (2, "Is a directory")):
        assert queue.job(number).state is State.PAUSED
        assert f"{queue.folders.job(number)} cannot be used: {words}" in queue.job(number).reason
    queue.folders.lock(2).rmdir()
    queue.resume(2)
    assert claimed(queue).job.number == 2


def test_a_full_disk_sets_no_job_aside(tmp_path: Path, monkeypatch: pytest.MonkeyPatch) -> None:
    queue = queue_in(tmp_path)
    queue.submit([intake()])

    def full(self: Folders, number: int, attempt: int) -> Path:
        raise OSError(28, "No space left on device")

    monkeypatch.setattr(Folders, "begin", full)
    with pytest.raises(StorageError, match="cannot be used: No space left on device; no job was begun"):
        queue.claim("a")
    monkeypatch.undo()
    assert queue.job(1).state is State.WAITING
    assert claimed(queue).attempt == 1


def test_progress_may_be_anything_that_json_has(tmp_path: Path) -> None:
    queue = queue_in(tmp_path)
    queue.submit([intake()])
    told = {"done": 1, "settled": [{"value": 0.1, "words": "größer"}], "left": None}
    with claimed(queue) as claim:
        claim.beat(told)
    assert json.loads(json.dumps(queue.job(1).progress)) == told

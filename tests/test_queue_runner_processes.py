"""Runners as processes: several on one queue, one that is stopped for long, a full disk, and one with nothing to do."""

from __future__ import annotations

import os
import resource
import shutil
import signal
import subprocess
import sys
import time
from collections.abc import Iterator
from contextlib import ExitStack
from pathlib import Path

import pytest

from tests.test_queue_runner import LONGER, ROUNDS, SMALL
from uq.queue.intake import Terms, intake_of
from uq.queue.queue import Queue
from uq.store.open import open_result
from uq.study.read import parse_study

pytestmark = pytest.mark.skipif(not Path("/proc/self/schedstat").exists(), reason="signals and measures of this kind are those of Linux")


@pytest.fixture
def queue(tmp_path: Path) -> Iterator[Queue]:
    queue = Queue(tmp_path / "home")
    yield queue
    queue.close()


def hand_in(queue: Queue, *texts: str) -> list[int]:
    intakes = [intake_of(parse_study(text), time.time(), Terms(retries=0)) for text in texts]
    return [each.job for each in queue.submit(intakes, again=True)]


def working(queue: Queue, *options: str) -> subprocess.Popen[str]:
    environment = {**os.environ, "UQ_HOME": str(queue.home)}
    command = [sys.executable, "-m", "uq", "work", "--threads", "1", *options]
    return subprocess.Popen(command, env=environment, stdout=subprocess.PIPE, stderr=subprocess.PIPE, text=True)


def until_solving(queue: Queue, number: int) -> None:
    ends = time.monotonic() + 120
    while not queue.job(number).progress.get("done"):
        assert time.monotonic() < ends, queue.job(number)
        time.sleep(0.05)


def fingerprint(queue: Queue, number: int) -> str:
    folder = queue.job(number).folder
    assert folder is not None
    return str(open_result(folder).attributes["content_fingerprint"])


def events(queue: Queue, number: int) -> list[str]:
    return [each.event for each in queue.history(number)]


def test_runners_on_one_queue_share_its_jobs_and_none_is_run_twice(queue: Queue) -> None:
    numbers = hand_in(queue, *[SMALL.replace("members = 1024", f"members = 1024\nseed = {seed}") for seed in range(12)])
    with ExitStack() as running:
        runners = [running.enter_context(working(queue, "--once")) for _ in range(3)]
        for each in runners:
            _, told = each.communicate(timeout=240)
            assert each.returncode == 0, told
    for number in numbers:
        assert events(queue, number) == ["submit", "claim", "complete"]
    assert len({queue.job(number).runner for number in numbers}) > 1


def test_a_runner_that_stood_still_for_long_gives_no_second_result(queue: Queue) -> None:
    (number,) = hand_in(queue, LONGER)
    with working(queue, "--once") as still:
        until_solving(queue, number)
        still.send_signal(signal.SIGSTOP)
        # A day goes by for everybody else: no lease ends, as the lock is held for as long as the process lives.
        late = Queue(queue.home, lambda: time.time() + 86400)
        assert late.claim("another") is None
        with working(queue, "--once") as other:
            _, told = other.communicate(timeout=120)
            assert (other.returncode, told) == (0, "")
        late.close()
        still.send_signal(signal.SIGCONT)
        _, told = still.communicate(timeout=240)
        assert still.returncode == 0, told
    assert events(queue, number) == ["submit", "claim", "complete"]


def test_a_runner_that_stood_still_while_its_job_was_cancelled_and_done_by_another_changes_nothing(queue: Queue) -> None:
    (number,) = hand_in(queue, LONGER)
    with working(queue, "--once") as still:
        until_solving(queue, number)
        still.send_signal(signal.SIGSTOP)
        queue.cancel(number)
        queue.retry(number)
        # The lock is the first one's as long as it lives, whatever the database says.
        with working(queue, "--once") as other:
            other.communicate(timeout=120)
        assert queue.job(number).state == "waiting"
        still.send_signal(signal.SIGCONT)
        _, told = still.communicate(timeout=240)
        assert still.returncode == 0, told
    assert events(queue, number) == ["submit", "claim", "cancel", "retry", "claim", "complete"]


def with_files_of(size: int) -> None:
    resource.setrlimit(resource.RLIMIT_FSIZE, (size, resource.RLIM_INFINITY))


def test_a_disk_that_holds_no_more_pauses_the_job_and_room_ends_it_with_the_same_bits(queue: Queue) -> None:
    calm, number = hand_in(queue, ROUNDS, ROUNDS)
    with working(queue, "--once") as both:
        until_solving(queue, calm)
        queue.pause(number)
        both.communicate(timeout=240)
    queue.resume(number)
    # Large enough for the database, too small for what is kept of a run.
    before = resource.getrlimit(resource.RLIMIT_FSIZE)
    with_files_of(300_000)
    try:
        small = working(queue, "--once")
    finally:
        resource.setrlimit(resource.RLIMIT_FSIZE, before)
    with small:
        _, told = small.communicate(timeout=240)
        assert small.returncode == 0, told
    job = queue.job(number)
    assert (job.state, "disk is full" in job.reason) == ("paused", True), job
    assert "uq resume" in told or "resume the job" in told
    queue.resume(number)
    with working(queue, "--once") as last:
        _, told = last.communicate(timeout=240)
        assert last.returncode == 0, told
    assert fingerprint(queue, number) == fingerprint(queue, calm)


@pytest.mark.skipif(os.geteuid() != 0 or not shutil.which("mount"), reason="only who may mount a disk can fill a small one")
def test_a_small_disk_that_is_full_pauses_the_job(tmp_path: Path) -> None:
    place = tmp_path / "disk"
    place.mkdir()
    mounted = subprocess.run(["mount", "-t", "tmpfs", "-o", "size=1500k", "tmpfs", str(place)], capture_output=True, check=False)
    if mounted.returncode:
        pytest.skip("no disk may be mounted here")
    queue = Queue(place)
    try:
        (number,) = hand_in(queue, ROUNDS)
        (place / "ballast").write_bytes(bytes(700_000))
        with working(queue, "--once") as runner:
            _, told = runner.communicate(timeout=240)
        job = queue.job(number)
        assert (job.state, "disk is full" in job.reason) == ("paused", True), told
        (place / "ballast").unlink()
        subprocess.run(["mount", "-o", "remount,size=200m", str(place)], check=True)
        queue.resume(number)
        with working(queue, "--once") as runner:
            runner.communicate(timeout=240)
        assert queue.job(number).state == "done"
    finally:
        queue.close()
        subprocess.run(["umount", str(place)], check=True)


def test_a_runner_without_work_costs_nothing(queue: Queue) -> None:
    """Under 0.5 % of a core; over 60 s in tests/bench, here over a few."""
    hand_in(queue, SMALL)
    queue.pause(1)
    with working(queue) as idle:
        settled(idle.pid)
        begin, seconds = cpu(idle.pid), 8.0
        time.sleep(seconds)
        share = (cpu(idle.pid) - begin) / seconds
        idle.send_signal(signal.SIGTERM)
        idle.communicate(timeout=60)
        assert idle.returncode == 0
    assert share < 0.005, share


def settled(process: int) -> None:
    """Waits until a process has loaded what it needs: it has begun, and then worked for less than a hundredth of two seconds."""
    before, ends = -1.0, time.monotonic() + 120
    while not (before > 0.05 and cpu(process) - before < 0.02):
        assert time.monotonic() < ends
        before = cpu(process)
        time.sleep(2)


def cpu(process: int) -> float:
    """Seconds of a core that all threads of a process have had."""
    return sum(int((task / "schedstat").read_text().split()[0]) for task in Path(f"/proc/{process}/task").iterdir()) * 1e-9

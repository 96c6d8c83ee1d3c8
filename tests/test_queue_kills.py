"""Whatever is killed, and whenever: every job of the queue ends done, once, with the bits of an undisturbed run."""

from __future__ import annotations

import os
import threading
import time
from collections.abc import Iterator
from contextlib import ExitStack
from pathlib import Path

import pytest

from tests.queue_kills import Server, all_done, handed_in, survived, survived_on_processes, undisturbed
from tests.test_run_cluster import scheduler, there, worker
from uq.errors import EXIT_SERVICE
from uq.queue.queue import Queue

pytestmark = pytest.mark.skipif(os.name == "nt", reason="signals of this kind are POSIX")


@pytest.fixture(scope="module")
def server() -> Iterator[Server]:
    with Server() as server:
        yield server


@pytest.fixture(scope="module")
def wanted(server: Server, tmp_path_factory: pytest.TempPathFactory) -> dict[str, str]:
    return undisturbed(server, tmp_path_factory.mktemp("calm"))


def test_jobs_of_killed_runners_end_once_and_with_the_same_bits(tmp_path: Path, server: Server, wanted: dict[str, str]) -> None:
    assert survived(server, tmp_path, 14, 4, wanted) >= 3


def test_jobs_end_once_where_worker_processes_are_killed_too(tmp_path: Path, server: Server, wanted: dict[str, str]) -> None:
    survived_on_processes(server, tmp_path, 2, 5, wanted)


def test_jobs_whose_scheduler_was_killed_wait_and_go_on(tmp_path: Path, server: Server, wanted: dict[str, str]) -> None:
    queue, asked = Queue(tmp_path), {"home": str(tmp_path), "log": str(tmp_path / "log.txt"), "rows": 16}
    handed_in(queue)
    with ExitStack() as running:
        address, boss = running.enter_context(scheduler(tmp_path))
        for number in range(2):
            running.enter_context(worker(tmp_path, address, f"w{number}"))
        there(address, 2)

        def kill_while_solving() -> None:
            ends = time.monotonic() + 120
            while not queue.job(1).progress.get("done") and time.monotonic() < ends:
                time.sleep(0.02)
            boss.kill()

        killer = threading.Thread(target=kill_while_solving)
        killer.start()
        assert server.run(**asked, cluster=address) == EXIT_SERVICE, (tmp_path / "log.txt").read_text()
        killer.join()
    assert {job.state for job in queue.jobs()} <= {"held", "done"}
    assert queue.jobs(states=["held"])
    assert server.run(**asked, ahead=3600.0) == 0
    assert all_done(queue) == wanted

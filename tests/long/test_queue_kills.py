"""200 kills of runners and workers, as `tests/test_queue_kills.py` has 20: `python -m pytest tests/long/test_queue_kills.py -s`."""

from __future__ import annotations

from collections.abc import Iterator
from pathlib import Path

import pytest

from tests.queue_kills import Server, survived, survived_on_processes, undisturbed


@pytest.fixture(scope="module")
def server() -> Iterator[Server]:
    with Server() as server:
        yield server


def test_jobs_of_killed_runners_end_once_and_with_the_same_bits(tmp_path: Path, server: Server) -> None:
    wanted = undisturbed(server, tmp_path / "calm")
    jobs = survived(server, tmp_path / "killed", 140, 104, wanted)
    print(f"140 kills of runners, seed 104: {jobs} jobs, each done once, with {sorted(each[:6] for each in wanted.values())}")


def test_jobs_end_once_where_worker_processes_are_killed_too(tmp_path: Path, server: Server) -> None:
    wanted = undisturbed(server, tmp_path / "calm")
    survived_on_processes(server, tmp_path / "killed", 20, 105, wanted)
    print("40 kills of workers and 20 of the runner with its scheduler, seed 105: every job done once")

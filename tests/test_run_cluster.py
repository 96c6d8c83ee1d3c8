"""Real clusters on this machine: the same bits as threads, whatever dies, and a sentence where it cannot go on."""

from __future__ import annotations

import os
import signal
import socket
import subprocess
import sys
import time
from collections.abc import Callable, Iterator
from contextlib import ExitStack, contextmanager, suppress
from pathlib import Path
from typing import Any

import numpy as np
import pytest

import uq
from tests.cluster_preloads import FATAL, HERE, inputs_of
from tests.kill_runs import KEPT, PRECISE
from tests.test_run_resume import Stops, fingerprint
from uq.errors import ClusterError, FatalMemberError, Interrupted, UseMistake
from uq.running import cluster, fleet
from uq.running.abroad import strict
from uq.running.branch import forecasts_of
from uq.running.fleet import KILLS, ONE_THREAD
from uq.running.observer import Progress, Silent
from uq.study.read import parse_study, read_study

# Two seconds on idle cores; the tests may run on busy ones.
LONG = 120.0


class Does(Silent):
    """Does something once, after so many blocks; remembers what it was told."""

    def __init__(self, after: int, what: Callable[[], object]) -> None:
        super().__init__()
        self.left, self.what = after, what
        self.stages: list[str] = []

    def stage(self, words: str) -> None:
        self.stages.append(words)

    def progress(self, progress: Progress) -> None:
        self.left -= 1
        if self.left == 0:
            self.what()


def lives(group: int) -> bool:
    """Whether a process of a group still does anything; one that has ended and that nobody has asked after yet does not."""
    for stat in Path("/proc").glob("[0-9]*/stat"):
        with suppress(OSError):
            state, _, its_group = stat.read_text().rpartition(")")[2].split()[:3]
            if int(its_group) == group and state != "Z":
                return True
    return False


@contextmanager
def started(*arguments: str, log: Path, environment: dict[str, str] | None = None) -> Iterator[subprocess.Popen[bytes]]:
    """One of dask's commands as a process, with all that it starts ended in the end."""
    command = [sys.executable, "-m", *arguments]
    with log.open("wb") as told:
        process = subprocess.Popen(
            command, env={**os.environ, **ONE_THREAD, **(environment or {})}, stdout=told, stderr=told, start_new_session=True
        )
    try:
        yield process
    finally:
        with ExitStack() as ended:
            ended.callback(process.wait)
            ended.callback(lambda: process.poll() is None and os.killpg(process.pid, signal.SIGKILL))


@contextmanager
def scheduler(folder: Path) -> Iterator[tuple[str, subprocess.Popen[bytes]]]:
    with socket.socket() as free:
        free.bind(("127.0.0.1", 0))
        port = free.getsockname()[1]
    options = ("--host", "127.0.0.1", "--port", str(port), "--no-dashboard")
    with started("distributed.cli.dask_scheduler", *options, log=folder / "scheduler.log") as process:
        yield f"tcp://127.0.0.1:{port}", process


@contextmanager
def worker(folder: Path, address: str, name: str, environment: dict[str, str] | None = None) -> Iterator[subprocess.Popen[bytes]]:
    """A worker without anybody who would start it again."""
    options = ("--nthreads", "1", "--no-nanny", "--no-dashboard", "--name", name, "--local-directory", str(folder / name))
    with started("distributed.cli.dask_worker", address, *options, log=folder / f"{name}.log", environment=environment) as process:
        yield process


def there(address: str, workers: int) -> None:
    """Waits until there are so many workers."""
    from distributed import Client

    end = time.monotonic() + LONG
    while True:
        try:
            with Client(address, timeout=5, set_as_default=False) as client:
                while len(client.nthreads()) != workers:
                    assert time.monotonic() < end
                    time.sleep(0.1)
                return
        except OSError:
            if time.monotonic() > end:
                raise


@pytest.fixture(scope="module")
def calm(tmp_path_factory: pytest.TempPathFactory) -> str:
    """What threads find."""
    return fingerprint(uq.run(parse_study(KEPT, name="killed"), tmp_path_factory.mktemp("calm") / "result"))


def test_worker_processes_find_the_bits_of_threads_round_by_round_and_end_with_us(tmp_path: Path, monkeypatch: pytest.MonkeyPatch) -> None:
    every: list[subprocess.Popen[bytes]] = []
    begin = fleet._started

    def recorded(*arguments: Any) -> subprocess.Popen[bytes]:
        every.append(begin(*arguments))
        return every[-1]

    monkeypatch.setattr(fleet, "_started", recorded)
    study, observer = parse_study(PRECISE, name="killed"), Stops(0)
    result = uq.run(study, tmp_path / "local", cluster="local:2", observer=observer)
    assert fingerprint(result) == fingerprint(uq.run(study, tmp_path / "threads"))
    assert (result.attributes["cluster"], result.attributes["threads"]) == ("local:2", 2)
    assert observer.seen[-1].done == 2 * result.attributes["solves"]  # with those of the scenario
    assert len(every) == 2
    until = time.monotonic() + 30.0
    while any(lives(process.pid) for process in every):  # it, or what it started
        assert time.monotonic() < until
        time.sleep(0.1)


def test_on_a_cluster_of_somebody_else_workers_and_scheduler_die_strange_ones_come_and_nothing_is_lost(
    tmp_path: Path, calm: str, monkeypatch: pytest.MonkeyPatch
) -> None:
    study, strange = parse_study(KEPT, name="killed"), {"TESTED_WORKER": "version", "DASK_DISTRIBUTED__WORKER__PRELOAD": HERE}
    with ExitStack() as running:
        address, boss = running.enter_context(scheduler(tmp_path))
        every = [running.enter_context(worker(tmp_path, address, f"w{number}")) for number in range(3)]
        there(address, 3)
        # One of three workers dies in the midst of a run, and one of another version comes.
        result = uq.run(study, tmp_path / "one", cluster=address, block_rows=16, observer=Does(30, every[0].kill))
        assert every[0].wait() == -signal.SIGKILL
        assert fingerprint(result) == calm

        def comes() -> None:
            every.append(running.enter_context(worker(tmp_path, address, "strange", strange)))
            there(address, 3)

        observer = Does(30, comes)
        assert fingerprint(uq.run(study, tmp_path / "two", cluster=address, block_rows=16, observer=observer)) == calm
        assert any("left out" in words and "uq 0.0.9" in words for words in observer.stages)
        # Where it is there from the beginning, the run is refused.
        with pytest.raises(UseMistake) as caught:
            uq.run(study, tmp_path / "three", cluster=address)
        assert f"uq 0.0.9 (here {uq.__version__})" in caught.value.found
        assert "same versions" in caught.value.remedy
        every[-1].kill()
        there(address, 2)
        # The run is stopped, then its scheduler dies; what was done is kept both times.
        with pytest.raises(Interrupted, match="the same command goes on from there"):
            uq.run(study, tmp_path / "four", cluster=address, block_rows=16, observer=Stops(40))
        with pytest.raises(ClusterError, match=r"scheduler of the cluster was lost.*the same command goes on from there"):
            uq.run(study, tmp_path / "four", cluster=address, block_rows=16, observer=Does(40, boss.kill))
        monkeypatch.setattr(cluster, "CONNECTED_WITHIN", 1)
        with pytest.raises(ClusterError, match="no scheduler answers at"):
            uq.run(study, tmp_path / "five", cluster=address)
    last = Stops(0)
    assert fingerprint(uq.run(study, tmp_path / "four", observer=last)) == calm
    assert last.seen[0].done > 2 * 40 * 16


def test_a_member_that_ends_its_worker_is_found_and_kept_as_a_study(tmp_path: Path, monkeypatch: pytest.MonkeyPatch) -> None:
    replicate, row, solve = 3, 21, 1
    study, folder = parse_study(FATAL, name="fatal"), tmp_path / "result"
    with monkeypatch.context() as patched:
        patched.setenv("TESTED_WORKER", f"fatal {replicate} {row} {solve}")
        patched.setenv("DASK_DISTRIBUTED__WORKER__PRELOAD", HERE)
        with pytest.raises(FatalMemberError) as caught:
            uq.run(study, folder, cluster="local:2", block_rows=2)
    told, file = str(caught.value), folder / "fatal-member" / "study.toml"
    assert told.startswith(f"The member in row {row} of replicate {replicate}, B ended every process that solved it")
    assert str(file) in told
    alone = read_study(file)
    # The same code to the letter, the same inputs whatever is drawn, the same tolerances: so the same bits.
    assert np.array_equal(alone.inputs.values(np.array([[1e-12, 1e-12], [0.5, 0.9], [1 - 1e-12, 1 - 1e-12]])), [inputs_of(3, 21)[1]] * 3)
    old, new = forecasts_of(study)[""], forecasts_of(alone)[""]
    assert new.compiled.code.fingerprint == old.compiled.code.fingerprint
    result = uq.run(study, folder)
    scales = dict(zip(["x", "y"], result.findings["solver"].variables["scales"].data, strict=True))
    assert list(alone.negligible) == [study.plan.accuracy * scales["x"], 1e-5]
    # What was done before is gone on from.
    assert fingerprint(result) == fingerprint(uq.run(study, tmp_path / "calm"))


def test_a_member_of_the_pilot_that_ends_its_worker_is_found_like_any_other(tmp_path: Path) -> None:
    study, folder = parse_study(FATAL, name="fatal"), tmp_path / "result"
    with pytest.MonkeyPatch.context() as patched:
        patched.setenv("TESTED_WORKER", "fatal 0 3 0")
        patched.setenv("DASK_DISTRIBUTED__WORKER__PRELOAD", HERE)
        with pytest.raises(FatalMemberError) as caught:
            uq.run(study, folder, cluster="local:2")
    assert str(caught.value).startswith("The member in row 3 of replicate 0, A ended every process that solved it")
    assert (caught.value.block, caught.value.member) == ("0/3", "0")
    alone = read_study(folder / "fatal-member" / "study.toml")
    assert np.array_equal(alone.inputs.values(np.full((1, 2), 0.5)), [inputs_of(0, 3)[0]])


def test_a_worker_that_hangs_gets_nothing_to_solve_and_the_run_comes_to_its_end(
    tmp_path: Path, calm: str, monkeypatch: pytest.MonkeyPatch
) -> None:
    monkeypatch.setattr("uq.running.muster.ANSWERED_WITHIN", 10.0)
    monkeypatch.setattr(cluster, "CLOSED_WITHIN", 0.5)
    with ExitStack() as running:
        address, _ = running.enter_context(scheduler(tmp_path))
        hangs, _ = [running.enter_context(worker(tmp_path, address, f"w{number}")) for number in range(2)]
        there(address, 2)
        hangs.send_signal(signal.SIGSTOP)
        observer = Does(0, lambda: None)
        assert fingerprint(uq.run(parse_study(KEPT, name="killed"), tmp_path / "result", cluster=address, observer=observer)) == calm
        (told,) = {words for words in observer.stages if "no answer within 10 s" in words}
        assert told.count("tcp://") == 1


def test_two_deaths_are_enough_on_a_scheduler_of_somebody_else_and_only_for_our_tasks(tmp_path: Path) -> None:
    from distributed import Client, KilledWorker

    with ExitStack() as running:
        address, _ = running.enter_context(scheduler(tmp_path))
        every = [running.enter_context(worker(tmp_path, address, f"w{number}")) for number in range(3)]
        there(address, 3)
        with Client(address, set_as_default=False) as client:
            client.register_plugin(strict("uq-ours", KILLS), name="strict")
            with pytest.raises(KilledWorker):
                client.submit(os.kill, 0, signal.SIGKILL, key="uq-ours-1").result(timeout=LONG)
            assert len(client.nthreads()) == 1
            other = client.submit(os.kill, 0, signal.SIGKILL, key="theirs")
            while client.nthreads():
                time.sleep(0.1)
            assert other.status == "pending"
        assert [process.wait() for process in every] == [-signal.SIGKILL] * 3

"""The log of a job, the bell that ends a runner, and what a runner hears of a run."""

from __future__ import annotations

import os
import signal
import threading
import time
from pathlib import Path

from uq.queue.bell import Bell
from uq.queue.logs import Log, line_of
from uq.queue.watch import LOGGED_EVERY, Watch
from uq.running.observer import Progress, Silent


def test_a_line_names_time_job_attempt_block_and_member() -> None:
    assert line_of("begins", 0.0, 41, 2) == "1970-01-01T00:00:00Z job 41 attempt 2: begins"
    assert line_of("lost", 86399.9, 1, 1, "3:64+64", "17") == "1970-01-01T23:59:59Z job 1 attempt 1 block 3:64+64 member 17: lost"
    assert line_of("a\nb\n", 0.0, 1, 1) == "1970-01-01T00:00:00Z job 1 attempt 1: a\n    b"
    assert line_of("", 0.0, 1, 1).endswith("attempt 1: ")


def test_the_log_goes_to_the_file_and_to_whoever_listens(tmp_path: Path) -> None:
    heard: list[str] = []
    log = Log(tmp_path / "log.txt", 3, 1, heard.append, lambda: 0.0)
    log("one")
    log("two", member="5")
    assert (tmp_path / "log.txt").read_text().splitlines() == heard
    assert len(heard) == 2


def test_a_log_that_cannot_be_written_ends_nothing(tmp_path: Path) -> None:
    heard: list[str] = []
    Log(tmp_path / "no" / "log.txt", 3, 1, heard.append, lambda: 0.0)("one")
    assert len(heard) == 1


def test_a_bell_stops_the_run_at_once_and_wakes_the_sleeper() -> None:
    bell, run = Bell(), Silent()
    bell.over(run)
    begin = time.monotonic()
    threading.Timer(0.1, bell.ring).start()
    bell.sleep(30)
    assert time.monotonic() - begin < 10
    assert (bell.rung, run.stop[0]) == (True, 1)
    bell.sleep(30)
    assert time.monotonic() - begin < 10
    late = Silent()
    bell.over(late)
    assert late.stop[0] == 1
    bell.close()


def test_a_bell_may_be_rung_from_a_handler_while_its_own_process_sleeps() -> None:
    bell = Bell()
    before = signal.signal(signal.SIGTERM, lambda number, frame: bell.ring())
    try:
        threading.Timer(0.1, os.kill, (os.getpid(), signal.SIGTERM)).start()
        begin = time.monotonic()
        bell.sleep(30)
        assert time.monotonic() - begin < 10
        assert bell.rung
    finally:
        signal.signal(signal.SIGTERM, before)
        bell.close()


def test_a_watch_tells_where_the_run_stands_and_logs_it_now_and_then(tmp_path: Path) -> None:
    heard: list[str] = []
    now = [0.0]
    watch = Watch(Log(tmp_path / "log.txt", 1, 1, heard.append, lambda: now[0]), lambda: now[0], [{"what": "kept"}])
    assert watch.told() == {"stage": "starting", "settled": [{"what": "kept"}]}
    watch.stage("solving")
    for done in (10, 20, 30):
        watch.progress(Progress(done, 100, 1, 2.0, done))
    assert (watch.told()["done"], watch.told()["seconds_left"], watch.told()["stage"]) == (30, 2.0 * 70 / 30, "solving")
    assert [line.rpartition(": ")[2] for line in heard] == ["solving"]
    now[0] = LOGGED_EVERY
    watch.progress(Progress(40, 100, 1, 2.0, 40))
    assert heard[-1].endswith("40 of 100 solves, 1 failed")
    now[0] = -3600.0  # the clock was set back
    watch.progress(Progress(50, 100, 1, 2.0, 50))
    assert heard[-1].endswith("50 of 100 solves, 1 failed")

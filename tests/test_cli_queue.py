"""The commands on the queue as a user types them."""

from __future__ import annotations

import json
import os
import signal
import subprocess
import sys
import time
from pathlib import Path

import pytest

from tests.test_cli_run import uq
from tests.test_queue_runner import LONGER, ROUNDS, SMALL
from uq.pipeline import run as run_study
from uq.queue.deciding import CUT_SHORT
from uq.queue.queue import Queue
from uq.study.read import parse_study

BATCH = """
schema = 1
title = "Nightly review"
[[run]]
study = "decay.toml"
priority = 5
[run.change]
"parameters.fall.normal.mean" = [0.4, 0.5]
"plan.seed" = [1, 2]
[[run]]
study = "decay.toml"
"""


@pytest.fixture
def place(tmp_path: Path, monkeypatch: pytest.MonkeyPatch) -> Path:
    monkeypatch.setenv("UQ_HOME", str(tmp_path / "home"))
    monkeypatch.delenv("COLUMNS", raising=False)
    (tmp_path / "decay.toml").write_text(SMALL, encoding="utf-8")
    (tmp_path / "rounds.toml").write_text(ROUNDS, encoding="utf-8")
    (tmp_path / "night.toml").write_text(BATCH, encoding="utf-8")
    return tmp_path


def said(place: Path, *arguments: str, code: int = 0) -> str:
    done = uq(place, *arguments)
    assert done.returncode == code, done.stdout + done.stderr
    return done.stdout if code == 0 else done.stderr


def begun(place: Path, *arguments: str) -> subprocess.Popen[str]:
    command = [sys.executable, "-m", "uq", *arguments]
    return subprocess.Popen(command, cwd=place, stdout=subprocess.PIPE, stderr=subprocess.PIPE, text=True)


def job(place: Path, number: int = 1) -> dict[str, object]:
    found = json.loads(said(place, "jobs", "--json"))["jobs"]
    return next(each for each in found if each["number"] == number)


def until(place: Path, test: str, number: int = 1) -> dict[str, object]:
    """Waits until something holds of a job: `state`, or `done` solves."""
    for _ in range(240):
        facts = job(place, number)
        if facts["state"] == test or (test == "solving" and facts["progress"].get("done")):  # type: ignore[attr-defined]
            return facts
        time.sleep(0.25)
    raise AssertionError(f"never {test}: {facts}")


def test_a_study_is_handed_in_once_worked_off_and_shown_by_its_number(place: Path) -> None:
    assert said(place, "jobs") == "no jobs\nNext: uq submit STUDY\n"
    assert said(place, "submit", "decay.toml").startswith("job 1 (decay) waiting\n")
    assert said(place, "submit", "decay.toml").startswith("job 1 (decay) waiting; handed in before\nNext: uq work ")
    again = said(place, "submit", "decay.toml", "--priority", "3", "--deadline", "2990-01-01 00:00")
    assert again.startswith(
        "job 1 (decay) waiting: deadline 1 Jan 2990 00:00; priority 3; handed in before; its priority and deadline are now"
    )
    (place / "decay.toml").unlink()
    assert "has a result" in said(place, "show", "1", code=2)
    assert said(place, "work", "--once") == ""
    assert "`uq follow 1` says how it stands, `uq show 1` what came out" in said(place, "jobs", "1", code=2)
    shown = said(place, "show", "1")
    assert shown.startswith("Decay\n")
    assert said(place, "follow", "1") == shown
    assert json.loads(said(place, "follow", "1", "--json"))["attributes"]["members"] == 1024
    assert "done" in said(place, "jobs")
    (place / "decay.toml").write_text(SMALL, encoding="utf-8")
    assert said(place, "submit", "decay.toml").splitlines()[1:] == ["Next: uq show 1"]
    said(place, "extend", "1", "--members", "2048")
    (longer,) = (place / "results").iterdir()
    assert "members" in said(place, "compare", "1", str(longer))


def test_a_batch_becomes_a_job_per_combination_and_a_table(place: Path) -> None:
    assert "5 jobs, 5 of them new" in said(place, "submit", "night.toml")
    assert "5 jobs, 0 of them new" in said(place, "submit", "night.toml")
    (place / "late.toml").write_text(BATCH, encoding="utf-8")
    assert said(place, "submit", "late.toml").splitlines()[-1] == "Next: uq work      uq jobs --batch late"
    said(place, "work", "--once")
    table = said(place, "jobs", "night", "--batch")
    assert table.startswith("Nightly review (night): 5 jobs: 5 done\n")
    head = next(line for line in table.splitlines() if line.split()[:1] == ["fall"])
    assert head.split()[:5] == ["fall", "mean", "seed", "job", "state"]
    rows = [line.split()[:4] for line in table.splitlines() if line.split()[:1] in (["0.4"], ["0.5"])]
    assert rows == [["0.4", "1", "1", "done"], ["0.4", "2", "2", "done"], ["0.5", "1", "3", "done"], ["0.5", "2", "4", "done"]]
    assert " to " in table
    assert table in said(place, "jobs", "--batch")
    assert "`nigt`, expected the name of a batch, one of late, night" in said(place, "jobs", "nigt", code=2)
    assert [each["batch"] for each in json.loads(said(place, "jobs", "night", "--json"))["jobs"]] == ["night"] * 5


def test_jobs_are_paused_resumed_cancelled_and_retried(place: Path) -> None:
    said(place, "submit", "decay.toml", "--not-before", "2990-01-01 00:00", "--priority", "3")
    assert job(place)["state"] == "held"
    assert said(place, "pause", "1").startswith("job 1 (decay) paused")
    assert "resume, cancel, retry" in said(place, "pause", "1", code=2)
    assert said(place, "resume", "1").startswith("job 1 (decay) held: until 1 Jan 2990 00:00")
    assert said(place, "cancel", "1").startswith("job 1 (decay) cancelled")
    assert "goes on with it" in said(place, "follow", "1", code=6)
    assert said(place, "retry", "1").startswith("job 1 (decay) held")
    assert "found job 9" in said(place, "cancel", "9", "1", code=2)
    assert job(place)["state"] == "cancelled"


@pytest.mark.parametrize(
    ("wish", "told"),
    [(("--deadline", "25:00"), "a time of day"), (("--not-before", "soon"), "time"), (("--deadline", "2020-01-01 00:00"), "over")],
)
def test_a_time_that_cannot_stand_is_told(place: Path, wish: tuple[str, str], told: str) -> None:
    error = said(place, "submit", "decay.toml", *wish, code=2)
    assert f"uq: {wish[0]}: found " in error
    assert wish[1] in error
    assert told in error


def test_a_study_with_mistakes_is_not_taken_in(place: Path) -> None:
    (place / "decay.toml").write_text(SMALL.replace("fall * x", "fal * x"), encoding="utf-8")
    assert "fal" in said(place, "submit", "decay.toml", code=3)
    assert "fal" in said(place, "submit", "night.toml", code=3)
    assert said(place, "jobs").startswith("no jobs")


def test_cleaning_says_first_what_it_would_take_away(place: Path) -> None:
    said(place, "submit", "decay.toml")
    said(place, "submit", "rounds.toml")
    said(place, "work", "--once")
    said(place, "submit", "rounds.toml", "--again")
    assert said(place, "clean").splitlines()[-1].startswith("0 jobs ended more than 30d ago")
    told = said(place, "clean", "--older-than", "0s").splitlines()
    assert [line.split(",")[0] for line in told[:2]] == ["job 1 (decay) done", "job 2 (rounds) done"]
    assert told[2].endswith("nothing was taken away")
    assert (place / "home" / "jobs" / "1").exists()
    assert said(place, "clean", "--older-than", "0s", "--yes") == "2 of 2 jobs taken away, with their results\n"
    assert {path.name for path in (place / "home" / "jobs").iterdir()} == {"3"}
    assert job(place, 3)["state"] == "waiting"
    assert "30d" in said(place, "clean", "--older-than", "soon", code=2)


@pytest.mark.skipif(os.name == "nt", reason="signals of this kind are POSIX")
@pytest.mark.parametrize("number", [signal.SIGTERM, signal.SIGINT])
def test_a_runner_that_is_told_to_end_gives_back_what_it_has_done(place: Path, number: int) -> None:
    (place / "rounds.toml").write_text(LONGER, encoding="utf-8")
    said(place, "submit", "rounds.toml")
    with begun(place, "work") as runner, begun(place, "follow", "1") as follower:
        until(place, "solving")
        runner.send_signal(number)
        _, told = runner.communicate(timeout=60)
        assert (runner.returncode, "given back" in told) == (6, True)
        assert job(place)["state"] == "waiting"
        with begun(place, "work") as next_one:
            out, err = follower.communicate(timeout=120)
            assert (follower.returncode, out.partition("\n")[0]) == (0, "Long")
            assert "uq: job 1 (rounds) running" in err
            time.sleep(0.5)
            next_one.send_signal(number)
            next_one.communicate(timeout=60)
            assert next_one.returncode == 0
    assert job(place)["attempt"] == 2


@pytest.mark.skipif(os.name == "nt", reason="signals of this kind are POSIX")
def test_leaving_off_to_follow_leaves_the_job_alone(place: Path) -> None:
    said(place, "submit", "decay.toml")
    with begun(place, "follow", "1") as follower:
        assert follower.stderr is not None
        follower.stderr.readline()
        follower.send_signal(signal.SIGINT)
        _, told = follower.communicate(timeout=60)
    assert (follower.returncode, "job 1 goes on" in told) == (6, True)
    assert job(place)["state"] == "waiting"


def test_the_answer_so_far_is_shown_until_there_is_another(place: Path) -> None:
    queue = Queue(place / "home")
    said(place, "submit", "decay.toml")
    with queue.claim("a") as claim:  # type: ignore[union-attr]
        assert claim is not None
        run_study(parse_study(SMALL), claim.folder)
        claim.finish("partial", CUT_SHORT)
    queue.close()
    shown = said(place, "show", "1")
    said(place, "retry", "1")
    done = uq(place, "show", "1")
    assert (done.returncode, done.stdout) == (0, shown)
    assert done.stderr == "uq: job 1 is waiting; this is the answer that it gave before, in attempt 1\n"


def test_a_cluster_that_is_away_is_said_with_a_code_of_its_own_and_the_job_waits(place: Path) -> None:
    said(place, "submit", "decay.toml")
    told = said(place, "work", "--once", "--cluster", "tcp://127.0.0.1:9", code=8)
    assert told.splitlines()[-1].startswith("uq: job 1 waits for the cluster")
    assert job(place)["state"] == "held"

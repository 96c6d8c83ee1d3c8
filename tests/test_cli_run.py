"""The command as a user starts it: exit codes, what goes where, and Ctrl-C."""

from __future__ import annotations

import json
import os
import signal
import subprocess
import sys
import time
from pathlib import Path

import pytest

from tests.test_run_whole import BLOW_UP, DECAY
from uq.store.open import open_result

SMALL = DECAY.replace("16384", "1024")
# Some hundred thousand steps for every member: long enough to be interrupted.
LONG = """
schema = 1
title = "Long"
[time]
stop = 20000
points = 11
[states.x]
start = 1
rate = "v"
[states.v]
start = { normal = { mean = 0, sd = 0.1 } }
rate = "-x"
[plan]
accuracy = 1e-10
"""

# Some seconds long, in blocks of some milliseconds.
GOES_ON = LONG.replace("stop = 20000", "stop = 2000") + "seed = 2\n"


def uq(folder: Path, *arguments: str, **environment: str) -> subprocess.CompletedProcess[str]:
    command = [sys.executable, "-m", "uq", *arguments]
    return subprocess.run(command, cwd=folder, capture_output=True, text=True, check=False, env={**os.environ, **environment})


def write(folder: Path, text: str) -> Path:
    (folder / "a.toml").write_text(text, encoding="utf-8")
    return folder


def test_results_go_out_messages_go_to_the_other_side_and_show_repeats_it(tmp_path: Path) -> None:
    done = uq(write(tmp_path, SMALL), "run", "a.toml")
    assert done.returncode == 0, done.stderr
    (folder,) = (tmp_path / "results").iterdir()
    assert folder.name.startswith("a-")
    assert {path.name for path in folder.iterdir()} == {"study.toml", "result.nc", "tallies.nc"}
    assert (folder / "study.toml").read_text() == SMALL
    assert "Decay" in done.stdout
    assert "\x1b" not in done.stdout + done.stderr
    shown = uq(tmp_path, "show", str(folder.relative_to(tmp_path)))
    assert (shown.returncode, shown.stderr) == (0, "")
    assert shown.stdout == done.stdout
    machine = json.loads(uq(tmp_path, "show", str(folder), "--json").stdout)
    assert machine


def test_check_solves_nothing_and_learns_the_speed(tmp_path: Path) -> None:
    state = {"XDG_STATE_HOME": str(tmp_path / "state")}
    checked = uq(write(tmp_path, SMALL), "check", "a.toml", **state)
    assert checked.returncode == 0, checked.stderr
    assert not (tmp_path / "results").exists()
    assert not (tmp_path / "state").exists()
    for told in ("lambda", "0.5", "0.05"):
        assert told in checked.stdout
    uq(tmp_path, "run", "a.toml", **state)
    speeds = json.loads((tmp_path / "state" / "uq" / "speeds.json").read_text())
    assert all(0 < speed < 1 for speed in speeds.values())
    assert uq(tmp_path, "check", "a.toml", **state).stdout != checked.stdout
    assert json.loads(uq(tmp_path, "check", "a.toml", "--json", **state).stdout)


def test_a_study_with_mistakes_is_told_all_of_them_at_once(tmp_path: Path) -> None:
    wrong = SMALL.replace("rate = ", "rte = ").replace("median = 2", "median = -2")
    for command in ("check", "run"):
        done = uq(write(tmp_path, wrong), command, "a.toml")
        assert (done.returncode, done.stdout) == (3, "")
        assert "did you mean `rate`?" in done.stderr
        assert "a.toml:8:" in done.stderr
        assert "Traceback" not in done.stderr


def test_blown_up_members_end_with_bounds_and_a_sentence(tmp_path: Path) -> None:
    done = uq(write(tmp_path, BLOW_UP), "run", "a.toml")
    assert done.returncode == 0, done.stderr
    assert "Traceback" not in done.stderr
    assert "blew_up" in done.stdout
    assert "nan" not in done.stdout.lower()


def test_withheld_statements_end_with_4(tmp_path: Path) -> None:
    done = uq(write(tmp_path, BLOW_UP + 'failures = "refuse"\n'), "run", "a.toml", "-o", "out")
    assert done.returncode == 4, done.stderr
    assert (tmp_path / "out" / "result.nc").exists()


def test_a_folder_that_cannot_be_written_ends_with_7(tmp_path: Path) -> None:
    (tmp_path / "out").write_text("a file")
    done = uq(write(tmp_path, SMALL), "run", "a.toml", "-o", "out")
    assert done.returncode == 7
    assert "is a file" in done.stderr


def test_another_seed_by_the_command_is_written_down(tmp_path: Path) -> None:
    done = uq(write(tmp_path, SMALL), "run", "a.toml", "--seed", "11", "-o", "out")
    assert done.returncode == 0, done.stderr
    result = open_result(tmp_path / "out")
    assert result.attributes["seed"] == 11
    assert "plan.seed" in str(result.study.changes.values)


@pytest.mark.skipif(os.name == "nt", reason="signals of this kind are POSIX")
@pytest.mark.parametrize("wait", [0.0, 1.5])
def test_ctrl_c_stops_within_a_second_and_leaves_no_result(tmp_path: Path, wait: float) -> None:
    command = [sys.executable, "-m", "uq", "run", "a.toml"]
    with subprocess.Popen(command, cwd=write(tmp_path, LONG), stdout=subprocess.PIPE, stderr=subprocess.PIPE, text=True) as running:
        assert running.stderr is not None
        for line in running.stderr:
            if "solving" in line:
                break
        time.sleep(wait)
        begin = time.monotonic()
        running.send_signal(signal.SIGINT)
        out, told = running.communicate(timeout=30)
        taken = time.monotonic() - begin
    assert running.returncode == 6, told
    assert out == ""
    assert "interrupted" in told
    assert "no result was written" in told
    assert "Traceback" not in told
    assert {path.parent.name for path in (tmp_path / "results").rglob("*.nc")} <= {"progress"}
    # A second is the promise on an idle machine; tests share theirs.
    assert taken < 3


@pytest.mark.skipif(os.name == "nt", reason="signals of this kind are POSIX")
def test_ctrl_c_keeps_what_is_done_and_the_same_command_goes_on(tmp_path: Path) -> None:
    folder = write(tmp_path, GOES_ON)
    command = [sys.executable, "-m", "uq", "run", "a.toml", "-o", "out"]
    with subprocess.Popen(command, cwd=folder, stdout=subprocess.PIPE, stderr=subprocess.PIPE, text=True) as running:
        assert running.stderr is not None
        for line in running.stderr:
            if "solving" in line:
                break
        time.sleep(1.5)
        running.send_signal(signal.SIGINT)
        _, told = running.communicate(timeout=30)
    assert running.returncode == 6, told
    assert "the same command goes on from there" in told
    assert "Traceback" not in told
    assert list((folder / "out" / "progress").glob("*.nc"))
    text = (folder / "a.toml").read_text()
    (folder / "a.toml").write_text(text.replace("seed = 2", "seed = 3"))
    other = uq(folder, "run", "a.toml", "-o", "out")
    assert other.returncode == 7
    assert "another study" in other.stderr


def test_a_precision_that_is_not_reached_ends_with_5_and_a_result(tmp_path: Path) -> None:
    asked = SMALL + "[plan.precision]\nprobabilities = 0.0001\n"
    done = uq(write(tmp_path, asked), "run", "a.toml", "-o", "out")
    assert done.returncode == 5, done.stderr
    assert "not reached within the members it may spend" in done.stderr
    assert "NOT SETTLED" in done.stdout
    assert (tmp_path / "out" / "result.nc").exists()
    done = uq(tmp_path, "extend", "out", "--precision", "probabilities=0.02", "--members", "8192", "-o", "more")
    assert done.returncode == 0, done.stderr
    assert "settled" in done.stdout
    assert "uq extend out" in str(open_result(tmp_path / "more").attributes["history"])


def test_extend_and_compare(tmp_path: Path) -> None:
    assert uq(write(tmp_path, SMALL), "run", "a.toml", "-o", "out").returncode == 0
    done = uq(tmp_path, "extend", "out/result.nc", "--members", "2048", "-o", "more")
    assert done.returncode == 0, done.stderr
    assert "2048 solves are done already" in done.stderr
    compared = uq(tmp_path, "compare", "out", "more")
    assert (compared.returncode, compared.stderr) == (0, "")
    assert "more" in compared.stdout
    machine = json.loads(uq(tmp_path, "compare", "out", "more", "--json").stdout)
    assert machine["schema"] == 1
    wrong = uq(tmp_path, "extend", "out", "--members", "512")
    assert wrong.returncode == 2
    assert "more than the 1024 that are solved already" in wrong.stderr
    assert uq(tmp_path, "compare", "out").returncode == 2
    assert uq(tmp_path, "extend", "out", "--precision", "probabilities=0.01").returncode in (0, 3, 5)


def test_the_pilot_of_check_solves_a_little_and_foretells(tmp_path: Path) -> None:
    checked = uq(write(tmp_path, SMALL + "[plan.precision]\nprobabilities = 0.001\n"), "check", "--pilot", "a.toml")
    assert checked.returncode == 0, checked.stderr
    assert "What the pilot says" in checked.stdout
    assert "The precision asked is expected after about" in checked.stdout
    assert not (tmp_path / "results").exists()
    machine = json.loads(uq(tmp_path, "check", "--pilot", "a.toml", "--json").stdout)
    assert machine["run"]["pilot"]["needed"]["solves"] > machine["run"]["pilot"]["solves"]

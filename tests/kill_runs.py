"""Runs that are killed again and again until one comes to its end: used by the short test and by the long one."""

from __future__ import annotations

import os
import random
import signal
import subprocess
import sys
import time
from pathlib import Path

from tests.killed import PLACES
from uq.store.open import open_result

# Everything that a run may work out, in four rounds, with a scenario, some members failing and values in histograms.
STUDY = """
schema = 1
title = "Killed"
[time]
stop = 4
points = 5
[states.x]
start = { lognormal = { median = 2, gsd = 1.2 } }
rate = "-fall * x"
[states.flame]
start = 1
rate = "escape * flame**2"
[parameters]
fall = { normal = { mean = 0.5, sd = 0.05 } }
escape = { uniform = { low = 0, high = 0.252 } }
[outcomes.last]
take = "final(x)"
[limits.low]
when = "x < 0.3"
by = [2, 4]
[scenarios.slower]
change = { "parameters.fall" = 0.4 }
[plan]
seed = 3
members = 8192
"""
KEPT, BINNED = STUDY, STUDY + 'keep = "100 kB"\n'
PRECISE = STUDY.replace("members = 8192", "members = 16384") + "[plan.precision]\nprobabilities = 0.011\n"


def start(study: Path, folder: Path, place: str, number: int) -> subprocess.Popen[str]:
    command = [sys.executable, "-m", "tests.killed", str(study), str(folder), place, str(number)]
    return subprocess.Popen(command, cwd=Path(__file__).parent.parent, stdout=subprocess.PIPE, stderr=subprocess.PIPE, text=True)


def undisturbed(study: Path, folder: Path) -> str:
    """The content fingerprint of a run that nobody kills."""
    with start(study, folder, "nowhere", 1) as run:
        out, told = run.communicate()
    assert run.returncode == 0, told
    return out.strip()


def killed_once(study: Path, folder: Path, chosen: random.Random) -> bool:
    """One attempt, killed at a place of ours or at any moment; whether it was killed before its end."""
    if chosen.random() < 0.6:
        with start(study, folder, chosen.choice(PLACES), chosen.randint(1, 40)) as run:
            _, told = run.communicate()
    else:
        with start(study, folder, "nowhere", 1) as run:
            time.sleep(chosen.uniform(0.2, 2.5))
            os.kill(run.pid, signal.SIGKILL)
            _, told = run.communicate()
    assert run.returncode in (0, -signal.SIGKILL), told
    return run.returncode != 0


def survived(study: Path, folder: Path, kills: int, seed: int, wanted: str) -> int:
    """Kills runs in one folder so many times, a new folder after each that comes to its end; how many came to it. All end alike."""
    chosen, ends = random.Random(seed), 0
    place = folder / "0"
    done = 0
    while done < kills:
        if killed_once(study, place, chosen):
            done += 1
            continue
        assert open_result(place).attributes["content_fingerprint"] == wanted
        left = sorted(path.name for path in place.iterdir())
        assert left == ["result.nc", "study.toml", "tallies.nc"], left
        ends += 1
        place = folder / str(ends)
    assert undisturbed(study, place) == wanted
    return ends + 1

"""What goes to standard output where that is narrow-minded or full."""

from __future__ import annotations

import os
import subprocess
import sys
from pathlib import Path

import pytest

from uq.errors import EXIT_STORAGE

STUDY = """
schema = 1
title = "Kühlung"
[time]
stop = 1
points = 2
[states.x]
start = 1
rate = "-k * x"
[parameters]
k = { uniform = { low = 1, high = 2 } }
"""


@pytest.fixture
def study(tmp_path: Path) -> Path:
    path = tmp_path / "study.toml"
    path.write_text(STUDY, encoding="utf-8")
    return path


def test_letters_that_the_encoding_does_not_know_become_question_marks(study: Path) -> None:
    done = subprocess.run(
        [sys.executable, "-m", "uq", "check", str(study)], env=os.environ | {"PYTHONIOENCODING": "ascii"}, capture_output=True, text=True
    )
    assert done.returncode == 0, done.stderr
    assert done.stdout.startswith("K?hlung\n")


@pytest.mark.skipif(not Path("/dev/full").exists(), reason="this system has no device that is always full")
def test_a_full_disk_behind_standard_output_is_a_sentence(study: Path) -> None:
    with open("/dev/full", "w") as full:
        done = subprocess.run([sys.executable, "-m", "uq", "check", str(study)], stdout=full, stderr=subprocess.PIPE, text=True)
    assert done.returncode == EXIT_STORAGE
    assert done.stderr.strip() == "uq: cannot write to standard output: No space left on device"

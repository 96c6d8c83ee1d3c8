"""What `uq check` says of memory, against the peak of a run in a process of its own."""

from __future__ import annotations

import subprocess
import sys
from pathlib import Path

import pytest

from tests.test_run_whole import DECAY
from uq.running.setup import memory_of
from uq.study.read import parse_study

ROOT = Path(__file__).parent.parent
# Not the maximum of `getrusage`: that of a process begins with what the one held that started it.
RUN = """
import re, sys
import uq
uq.run(uq.read_study(sys.argv[1]), sys.argv[2], threads=2)
print(1024 * int(re.search(r"VmHWM:\\s+(\\d+) kB", open("/proc/self/status").read())[1]))
"""
MANY_TIMES = DECAY.replace("at = [0, 1, 2, 4]", "points = 201")
STUDIES = {
    "few": DECAY.replace("16384", "512"),
    "kept": MANY_TIMES.replace("16384", "131072"),
    "counted": MANY_TIMES.replace("16384", '131072\nkeep = "1 MB"'),
}


def peak(name: str, folder: Path) -> int:
    """The peak in bytes of a process that runs one of the studies."""
    study = folder / f"{name}.toml"
    study.write_text(STUDIES[name], encoding="utf-8")
    command = [sys.executable, "-c", RUN, str(study), str(folder / name)]
    return int(subprocess.run(command, cwd=ROOT, capture_output=True, text=True, check=True).stdout)


@pytest.fixture(scope="module", autouse=True)
def _solver_is_prepared(tmp_path_factory: pytest.TempPathFactory) -> None:
    """The first run on a machine also holds the compiler; what is told is what every later one takes."""
    if sys.platform == "linux":
        peak("few", tmp_path_factory.mktemp("first"))


@pytest.mark.skipif(sys.platform != "linux", reason="/proc is read")
@pytest.mark.parametrize("name", STUDIES)
def test_memory_is_said_within_a_factor_of_two(name: str, tmp_path: Path) -> None:
    taken, said = peak(name, tmp_path), memory_of(parse_study(STUDIES[name]), 2)
    assert 0.5 < said / taken < 2, f"{said / 1e6:.0f} MB said, {taken / 1e6:.0f} taken"

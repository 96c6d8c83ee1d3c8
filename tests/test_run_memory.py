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
RUN = """
import resource, sys
import uq
uq.run(uq.read_study(sys.argv[1]), sys.argv[2], threads=2)
print(resource.getrusage(resource.RUSAGE_SELF).ru_maxrss * 1024)
"""
MANY_TIMES = DECAY.replace("at = [0, 1, 2, 4]", "points = 201")
STUDIES = {
    "few": DECAY.replace("16384", "512"),
    "kept": MANY_TIMES.replace("16384", "131072"),
    "counted": MANY_TIMES.replace("16384", '131072\nkeep = "1 MB"'),
}


@pytest.mark.skipif(sys.platform != "linux", reason="the peak is in kB there")
@pytest.mark.parametrize("name", STUDIES)
def test_memory_is_said_within_a_factor_of_two(name: str, tmp_path: Path) -> None:
    study = tmp_path / "study.toml"
    study.write_text(STUDIES[name], encoding="utf-8")
    command = [sys.executable, "-c", RUN, str(study), str(tmp_path / "result")]
    peak = int(subprocess.run(command, cwd=ROOT, capture_output=True, text=True, check=True).stdout)
    said = memory_of(parse_study(study.read_text(encoding="utf-8")), 2)
    assert 0.5 < said / peak < 2, f"{said / 1e6:.0f} MB said, {peak / 1e6:.0f} taken"

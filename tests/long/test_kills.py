"""200 kills, as `tests/test_run_kills.py` has 20: `python -m pytest tests/long/test_kills.py -s`."""

from __future__ import annotations

from pathlib import Path

import pytest

from tests.kill_runs import BINNED, KEPT, PRECISE, survived, undisturbed


@pytest.mark.parametrize(("text", "kills", "seed"), [(KEPT, 80, 101), (BINNED, 60, 102), (PRECISE, 60, 103)])
def test_killed_runs_end_with_the_same_bits(tmp_path: Path, text: str, kills: int, seed: int) -> None:
    study = tmp_path / "study.toml"
    study.write_text(text, encoding="utf-8")
    wanted = undisturbed(study, tmp_path / "calm")
    ends = survived(study, tmp_path / "killed", kills, seed, wanted)
    print(f"{kills} kills, seed {seed}: {ends} runs came to their end, all with {wanted[:12]}")

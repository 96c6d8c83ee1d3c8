"""Runs that are killed at places of our own and at any moment end with the bits of a run that nobody disturbed."""

from __future__ import annotations

import os
from pathlib import Path

import pytest

from tests.kill_runs import BINNED, KEPT, PRECISE, survived, undisturbed

pytestmark = pytest.mark.skipif(os.name == "nt", reason="signals of this kind are POSIX")


@pytest.mark.parametrize(("text", "kills", "seed"), [(KEPT, 8, 1), (BINNED, 6, 2), (PRECISE, 6, 3)])
def test_killed_runs_end_with_the_same_bits(tmp_path: Path, text: str, kills: int, seed: int) -> None:
    study = tmp_path / "study.toml"
    study.write_text(text, encoding="utf-8")
    wanted = undisturbed(study, tmp_path / "calm")
    assert survived(study, tmp_path / "killed", kills, seed, wanted) >= 1

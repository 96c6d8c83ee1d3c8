"""16 384 members extended to 65 536 have the bits of a fresh run: `python -m pytest tests/long/test_extension.py -s`."""

from __future__ import annotations

from pathlib import Path

import pytest

import uq

CONFIGS = Path(__file__).parents[2] / "configs"


@pytest.mark.parametrize("name", ["hold-tank", "orchard-mites", "crane-sway"])
@pytest.mark.parametrize("keep", ["512 MB", "40 MB", "1 MB"])
def test_an_extended_demo_has_the_bits_of_a_fresh_one(tmp_path: Path, name: str, keep: str) -> None:
    """Values kept in both, in the shorter one only, in neither."""
    study = uq.read_study(CONFIGS / f"{name}.toml").with_changes({"plan.members": 16384, "plan.keep": keep})
    old = uq.run(study, tmp_path / "old")
    new = uq.extend(old.folder, members=65536)
    fresh = uq.run(study.with_changes({"plan.members": 65536}), tmp_path / "fresh")
    assert new.attributes["content_fingerprint"] == fresh.attributes["content_fingerprint"]

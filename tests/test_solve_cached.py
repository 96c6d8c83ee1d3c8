"""Where compiled kernels are kept."""

from __future__ import annotations

import os
import subprocess
import sys
from pathlib import Path

import pytest
from numba import config

import uq

ASK = "from uq.solve.kernel import run_members_4 as k; print(k.stats.cache_path)"


def place(**environment: str) -> Path:
    """The folder that a new process would keep the stepping kernel in."""
    kept = {name: value for name, value in os.environ.items() if name not in ("NUMBA_CACHE_DIR", "XDG_CACHE_HOME")}
    done = subprocess.run([sys.executable, "-c", ASK], env=kept | environment, capture_output=True, text=True, check=True)
    return Path(done.stdout.strip())


def test_kernels_are_kept_outside_the_package(tmp_path: Path) -> None:
    found = place(XDG_CACHE_HOME=str(tmp_path))
    assert found.is_relative_to(tmp_path / "uq")
    assert not found.is_relative_to(Path(uq.__file__).parent)


def test_a_place_that_the_user_gives_to_numba_is_used(tmp_path: Path) -> None:
    assert place(NUMBA_CACHE_DIR=str(tmp_path / "mine"), XDG_CACHE_HOME=str(tmp_path)).is_relative_to(tmp_path / "mine")


def test_a_relative_cache_home_is_ignored(tmp_path: Path) -> None:
    assert place(XDG_CACHE_HOME="caches", HOME=str(tmp_path)).is_relative_to(tmp_path / ".cache" / "uq")


@pytest.mark.parametrize("before", ["", "/somewhere"])
def test_the_global_setting_is_put_back(before: str, monkeypatch: pytest.MonkeyPatch) -> None:
    from uq.solve.cached import kernel

    monkeypatch.setattr(config, "CACHE_DIR", before)
    kernel(lambda: 0)
    assert before == config.CACHE_DIR

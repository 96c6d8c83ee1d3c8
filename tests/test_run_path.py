"""`uq.run` with a path in place of a study."""

from __future__ import annotations

from pathlib import Path

import numpy as np
import pytest

import uq
from uq.errors import StudyError

STUDY = """schema = 1
title = "A cup of tea"
[time]
unit = "min"
stop = 10
every = 1
[states.T]
unit = "K"
start = { normal = { mean = 360, sd = 2 } }
rate = "-0.1 * (T - 293)"
[plan]
members = 512
"""


def test_a_path_is_read_first(tmp_path: Path) -> None:
    path = tmp_path / "tea.toml"
    path.write_text(STUDY.replace('"-0.1 * (T', "\"-0.1 / '1 min' * (T").replace("- 293)", "- '293 K')"), encoding="utf-8")
    by_path = uq.run(str(path), tmp_path / "one")
    by_study = uq.run(uq.read_study(path), tmp_path / "two")
    np.testing.assert_array_equal(by_path.bands["T"].quantiles.values, by_study.bands["T"].quantiles.values)


def test_a_path_without_a_study_says_so(tmp_path: Path) -> None:
    with pytest.raises(StudyError, match="cannot be read"):
        uq.run(tmp_path / "nothing.toml")

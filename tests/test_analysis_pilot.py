"""What the pilot says of sizes, where a quantity hardly spreads at some time."""

from __future__ import annotations

from pathlib import Path

import numpy as np

import uq
from uq.study.read import parse_study

HARDLY = """
schema = 1
title = "A term that begins below all numbers"
[time]
at = [0.00138, 0.5, 1]
stop = 1
[states.rest]
start = 0
rate = "0"
[parameters]
L = { uniform = { low = 1, high = 1.01 } }
[terms]
y = "exp(-L / time)"
[plan]
members = 512
watch = ["y"]
ask = ["bands"]
"""


def test_a_spread_below_the_least_normal_number_does_not_spoil_the_band_of_whole_curves(tmp_path: Path) -> None:
    # At the first time y is about 1e-315, a denormal number, and so is its spread: its inverse is infinite.
    result = uq.run(parse_study(HARDLY), folder=tmp_path / "result")
    low, high = result.bands["y"].simultaneous.values
    assert np.all(np.isfinite([low, high]))
    assert np.all(high[1:] - low[1:] < 0.005)
    assert low[2] < np.exp(-1.01) + 1e-3
    assert high[2] > np.exp(-1.0) - 1e-3

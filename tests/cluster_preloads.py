"""What tests load into workers before they begin: a worker of another version, and one that a certain member ends.

dask loads the file by its path, with DASK_DISTRIBUTED__WORKER__PRELOAD or --preload; the package itself has no switch for it. TESTED_WORKER
says what shall be wrong: "version", or "fatal REPLICATE ROW SOLVE" of the study FATAL.
"""

from __future__ import annotations

import os
import signal
from pathlib import Path
from typing import Any

import numpy as np

HERE = str(Path(__file__).resolve())
# A single round of 64 rows; two members a row.
FATAL = """
schema = 1
title = "Fatal"
[time]
stop = 4
points = 5
[states.x]
start = { lognormal = { median = 2, gsd = 1.2 }, source = "Nowhere" }
rate = "-fall * x"
[states.y]
start = 0
rate = "fall * x"
negligible = 1e-5
[parameters]
fall = { normal = { mean = 0.5, sd = 0.05 }, truncate = [0.1, 0.9], label = "Rate of \\"falling\\"" }
[limits.low]
when = "x < 0.3"
[[dependence]]
between = ["fall", "x_start"]
rank_correlation = 0.5
[scenarios.slower]
change = { "parameters.fall.normal.mean" = 0.4 }
[plan]
ask = ["bands", "limits"]
members = 2048
"""


def inputs_of(replicate: int, row: int) -> Any:
    """The inputs of the members of one row of FATAL."""
    from uq.design.blocks import Block
    from uq.running.setup import design_of
    from uq.study.read import parse_study

    study = parse_study(FATAL, name="fatal")
    return design_of(study).draw(Block(replicate, row, 1), study.inputs)


def other_version() -> None:
    import uq

    uq.__version__ = "0.0.9"


def fatal(replicate: int, row: int, solve: int) -> None:
    from uq.running.block import Forecast

    deadly, solved = inputs_of(replicate, row)[solve], Forecast.solved

    def called(self: Forecast, x: Any, observer: Any) -> Any:
        if (np.asarray(x) == deadly).all(axis=1).any():
            os.kill(os.getpid(), signal.SIGKILL)
        return solved(self, x, observer)

    Forecast.solved = called  # type: ignore[method-assign]


def dask_setup(worker: Any) -> None:
    what, *numbers = os.environ.get("TESTED_WORKER", "").split() or [""]
    if what == "version":
        other_version()
    elif what == "fatal":
        fatal(*map(int, numbers))

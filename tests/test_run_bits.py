"""The same bits in every array of result.nc for any number of threads and any size of block."""

from __future__ import annotations

from pathlib import Path

import numpy as np
import pytest

import uq
from uq.store.result import Result

# Everything that a run may work out, with some members failing and a forcing to land on.
STUDY = """
schema = 1
title = "Two kinds"
[time]
stop = 6
points = 13
[states.prey]
start = { lognormal = { median = 1.5, gsd = 1.3 } }
rate = "growth * prey - eating * prey * hunters + food"
[states.hunters]
start = 1
rate = "hunters * (0.5 * prey - death)"
[parameters]
growth = { normal = { mean = 1.0, sd = 0.1 } }
eating = { uniform = { low = 0.8, high = 1.2 } }
death = { triangular = { low = 0.5, mode = 0.7, high = 1.0 } }
escape = { uniform = { low = 0, high = 0.17 } }
[states.flame]
start = 1
rate = "escape * flame**2"
[terms]
both = "prey + hunters"
[forcings.food]
rows = [[0, 0], [3, 0.4], [6, 0]]
interpolation = "step"
[outcomes.peak]
take = "highest(both)"
[outcomes.mean]
take = "average(prey)"
[limits.many]
when = "both > 4"
by = [3, 6]
[plan]
members = 4096
watch = ["prey", "hunters", "both", "flame"]
"""


@pytest.fixture(scope="module")
def study(tmp_path_factory: pytest.TempPathFactory) -> Path:
    path = tmp_path_factory.mktemp("bits") / "kinds.toml"
    path.write_text(STUDY, encoding="utf-8")
    return path


@pytest.fixture(scope="module")
def plain(study: Path) -> Result:
    return uq.run(uq.read_study(study), study.parent / "plain", threads=1)


@pytest.mark.parametrize(("threads", "rows"), [(1, 64), (2, 0), (2, 1), (4, 8), (4, 32)])
def test_same_bits(study: Path, plain: Result, threads: int, rows: int) -> None:
    other = uq.run(uq.read_study(study), study.parent / f"{threads}-{rows}", threads=threads, block_rows=rows)
    assert set(other.findings) == set(plain.findings)
    compared = 0
    for group, finding in plain.findings.items():
        for name, variable in finding.variables.items():
            here = other.findings[group].variables[name].data
            assert here.dtype == variable.data.dtype
            assert here.tobytes() == variable.data.tobytes() if here.dtype.kind != "O" else np.array_equal(here, variable.data), (
                f"{group}/{name}"
            )
            compared += 1
    assert compared > 60
    assert other.attributes["content_fingerprint"] == plain.attributes["content_fingerprint"]


def test_another_seed_gives_other_bits(study: Path, plain: Result) -> None:
    other = uq.run(uq.read_study(study).with_changes({"plan.seed": 1}), study.parent / "seed")
    assert other.attributes["content_fingerprint"] != plain.attributes["content_fingerprint"]
    assert other.bands["prey"].quantiles.values.tobytes() != plain.bands["prey"].quantiles.values.tobytes()


def test_a_run_into_the_same_folder_again_replaces_it_by_the_same(study: Path, plain: Result) -> None:
    again = uq.run(uq.read_study(study), plain.folder)
    assert again.attributes["content_fingerprint"] == plain.attributes["content_fingerprint"]

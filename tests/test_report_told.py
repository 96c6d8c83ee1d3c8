"""What the summary tells of a whole run: inputs drawn together, values counted into bins, identical results, times at the start."""

from __future__ import annotations

import os
from pathlib import Path

import numpy as np
import pytest

import uq
from tests.small_studies import PLAIN, mistakes
from uq.errors import StudyError
from uq.report.compare import compare_text
from uq.report.machine import result_json
from uq.report.summary import summary
from uq.store.result import Result
from uq.study.read import parse_study

JOINT = """
schema = 1
[time]
stop = 2
points = 3
[states.y]
start = 0
rate = "h + 3 * p + q"
[parameters]
h = { normal = { mean = 0, sd = 1 } }
p = { evidence = 1 }
q = { evidence = 3 }
[limits.now]
when = "y >= 0"
by = [0, 2]
[[dependence]]
file = "j.csv"
columns = { p = "p", q = "q" }
[plan]
members = 2048
quantiles = [0.05, 0.5, 0.95]
"""
ROWS = "p,q\n" + "".join(f"{a!r},{b!r}\n" for a, b in np.random.default_rng(5).normal(size=(200, 2)).round(6).tolist())
FILES = {"j.csv": ROWS.encode()}


def words(text: str) -> str:
    return " ".join(text.split())


@pytest.fixture(scope="module")
def joint(tmp_path_factory: pytest.TempPathFactory) -> Result:
    return uq.run(parse_study(JOINT, name="j", files=FILES), tmp_path_factory.mktemp("joint") / "r")


def test_inputs_drawn_together_have_one_place_and_one_name(joint: Result) -> None:
    text = words(summary(joint))
    assert "1. joint sample of p and q 0.8" in text
    assert "2. h 0.0" in text or "2. h 0.1" in text
    assert "The joint sample of p and q has the largest share, a Shapley effect of" in text
    assert "h has the largest share" not in text
    assert "their group has one effect" not in text
    assert "Order of the inputs: settled in whole." in text or "whole order in both" in text
    assert "Not settled whether they may" not in text
    assert "May be dropped (share surely below 0.01 in all that is ranked): none." in text
    assert "Weak evidence among the influential inputs: p (evidence 1)." in text
    told = result_json(joint)
    assert [each["input"] for each in told["ranking"]["y"]["shapley"]] == ["h", "p", "q"]
    assert told["ranking"]["y"]["shapley_group"][0]["value"] > 0.8


def test_a_group_that_is_drawn_together_is_called_by_its_name(tmp_path: Path) -> None:
    text = JOINT.replace("{ evidence = 1 }", '{ group = "wind" }').replace("{ evidence = 3 }", '{ group = "wind" }')
    told = words(summary(uq.run(parse_study(text, name="j", files=FILES), tmp_path / "r")))
    assert "1. group wind (drawn together) 0.8" in told
    assert "The group wind (drawn together) has the largest share" in told
    assert told.count("group wind (drawn together) 0.8") == 1


def test_a_file_that_is_read_twice_is_remarked_once() -> None:
    remarks = [text for text in parse_study(JOINT, name="j", files=FILES).remarks if "j.csv" in text]
    assert remarks == ['j.csv: 200 rows of columns "p" and "q", comma separated']


def test_what_is_true_at_the_start_is_said_so(joint: Result) -> None:
    assert "the median of the first time is at the start, time 0" in words(summary(joint))


def test_a_result_does_not_differ_from_itself(joint: Result) -> None:
    told = words(compare_text(*uq.compare([joint.folder, joint.folder])))
    assert told.count("point") == told.count("none")
    assert "0 to 0" not in told


BINNED = PLAIN.replace("start = 1", "start = { lognormal = { median = 1, gsd = 50 } }") + (
    '[plan]\nmembers = 4096\nask = ["bands"]\nquantiles = [0.05, 0.5, 0.95, 0.999]\n'
)


def test_values_counted_into_bins_are_told_with_what_that_blurs(tmp_path: Path) -> None:
    kept = uq.run(parse_study(BINNED, name="b"), tmp_path / "kept")
    assert "Histograms" not in summary(kept)
    binned = uq.run(parse_study(BINNED + 'keep = "64 B"\n', name="b"), tmp_path / "binned")
    text = words(summary(binned))
    assert "Histograms: there were more values than `keep` in [plan] allows, so that they were counted into bins." in text
    shares = np.asarray(binned.bands["x"].quantiles_bin_error_share).max(axis=1)
    assert shares[3] > 1e-3 > shares[0]
    told = text.split("right to 0.001 of the width from 5 to 95 %, but for these, in shares of that width: x, ")[1].split(".  ")[0]
    for level, share in zip(("5 %", "50 %", "95 %", "99.9 %"), shares, strict=True):
        assert (f" {level} point up to" in f" {told}") == (share > 1e-3)
    off = np.abs(np.asarray(binned.bands["x"].quantiles) - np.asarray(kept.bands["x"].quantiles))
    assert (off <= np.asarray(binned.bands["x"].quantiles_bin_error)).all()
    assert (off > 0).any()


@pytest.mark.skipif(os.name == "nt", reason="devices are POSIX")
def test_what_is_no_regular_file_is_refused_before_it_is_read(tmp_path: Path) -> None:
    text = PLAIN.replace("b = 3", 'b = 3\nd = { data = { file = "d.csv", column = "a" } }')
    for made, said in (("device", "which is a device or a pipe, not a file"), ("folder", "which is a folder")):
        place = tmp_path / made
        place.mkdir()
        if made == "device":
            (place / "d.csv").symlink_to("/dev/zero")
        else:
            (place / "d.csv").mkdir()
        with pytest.raises(StudyError, match=f'"d.csv", {said}; expected a file of at most 200 MB'):
            parse_study(text, place, "a")


def test_a_column_that_is_named_twice_is_told_as_that() -> None:
    (mistake,) = mistakes("", PLAIN.replace("b = 3", 'b = 3\nd = { data = { file = "d.csv", column = "a" } }'), {"d.csv": b"a,a\n1,2\n"})
    assert 'the column "a" 2 times in d.csv; expected columns of different names (rename one of them in its header line)' in mistake
    (mistake,) = mistakes(
        "", PLAIN.replace("b = 3", 'b = 3\nd = { data = { file = "d.csv", column = "c" } }'), {"d.csv": b"a,a,b\n1,2,3\n"}
    )
    assert 'no column "c" in d.csv; expected one of a, b' in mistake

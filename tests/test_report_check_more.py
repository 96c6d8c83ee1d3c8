"""What `uq check` says of dependence, tables, files, precision, scenarios, measurements and a pilot."""

from __future__ import annotations

import re
from dataclasses import replace
from pathlib import Path

import pytest

from uq.analysis.precision import Needed
from uq.report.check import CheckFacts, check_text
from uq.report.plain import width
from uq.running.foretell import Expected, Foretold
from uq.study.read import parse_study
from uq.study.study import Study

STUDY = """
schema = 1
title = "Filling a tower"
[time]
unit = "min"
stop = 60
points = 61
[states.level]
unit = "m"
start = { normal = { mean = 2.0, sd = 0.1 }, truncate = [0, 4] }
rate = "(gain * head(level) * inflow - use) / area"
[parameters]
area = { unit = "m2", triangular = { low = 8, mode = 9, high = 12 } }
use = { unit = "m3/min", normal = { mean = 0.4, sd = 0.05 }, label = "Water used" }
full_at = "4 m"
gain = { value = 1, unit = "1" }
[tables.head]
of = { unit = "m" }
unit = "1"
rows = [[0, 1], [2, 0.8], [5, 0.1]]
interpolation = "smooth"
outside = "hold"
[forcings.inflow]
unit = "m3/min"
file = "inflow.csv"
time = { column = "hour", unit = "h" }
value = { column = "flow", unit = "m3/h" }
outside = "hold"
[limits.full]
when = "level > full_at"
by = [60]
[[dependence]]
between = ["area", "use"]
rank_correlation = 0.3
[scenarios.dry]
label = "A dry summer"
change = { "parameters.gain" = 0.6 }
[scenarios.small]
change = { "parameters.full_at" = 5 }
[measured.level]
file = "gauge.csv"
time = { column = "minute", unit = "min" }
value = { column = "level", unit = "cm" }
sd = "2 cm"
[plan]
members = 65536
[plan.precision]
quantiles = 0.02
probabilities = 0.005
[plan.at_most]
minutes = 20
"""
FACTS = CheckFacts(members=65536, replicates=16, solves=655360, threads=2, memory=52_000_000, seconds=4.2, same_model=True)


@pytest.fixture
def study(tmp_path: Path) -> Study:
    (tmp_path / "inflow.csv").write_text("hour,flow\n0,20\n0.5,30\n1,25\n")
    (tmp_path / "gauge.csv").write_text("minute,level\n0,201\n30,220\n")
    return parse_study(STUDY, tmp_path, "tower")


def words(study: Study, facts: CheckFacts = FACTS) -> str:
    text = check_text(study, facts)
    assert all(width(line) <= 100 for line in text.splitlines())
    assert not re.search(r"[\x00-\x09\x0b-\x1f\x7f-\x9f]", text)
    return " ".join(text.split())


def test_what_is_asked_beyond_the_members(study: Study) -> None:
    text = words(study)
    assert "Precision, as half-width of the intervals: quantiles 0.02 of the 5-95 % width, probabilities 0.005." in text
    assert "Spent on it at most: 65536 members, 20 minutes; the answer so far is then given." in text
    assert "Scenario: A dry summer, which changes parameters.gain = 0.6; the same draws otherwise." in text
    assert "Scenario: small, which changes parameters.full_at = 5; the same draws otherwise." in text
    assert "Measured: level, 2 observations from gauge.csv, standard deviation 0.02." in text


def test_tables_and_files_of_the_model(study: Study) -> None:
    text = words(study)
    assert "inflow: given course in m3/min, 3 rows from inflow.csv (hour in h and flow in m3/h), linear, held outside them" in text
    assert "head(): given by 3 points, of an argument in m, smooth, held outside them" in text


def test_inputs_and_their_dependence(study: Study) -> None:
    text = words(study)
    assert "Dependence: area, use: rank correlation 0.3; all others are taken as independent." in text
    assert "All inputs are taken as independent" not in text
    assert study.inputs.items[-1].distribution.words() in text
    assert "Shapley effects" in text


def test_what_a_run_takes_at_most(study: Study) -> None:
    text = words(study)
    assert "At most 65536 members in 16 replicates, at most 655360 solves, 2 scenarios counted." in text
    assert "Time: at most 4.2 s on 2 threads (measured on this model)." in text
    assert "How much of that the precision takes: uq check --pilot." in text


PILOT = Foretold(512, 1280, 3, 0.0128, 163840, Needed(81920.0, ()), (Expected("probabilities", 0.00412, "limits/full"),))


def test_what_the_pilot_says(study: Study) -> None:
    text = words(study, replace(FACTS, pilot=PILOT))
    assert "What the pilot says 512 members, 1280 solves, 3 of them failed; 0.01 ms of one core for each solve." in text
    assert "The precision asked is expected after about 82000 solves, 0.41 s on 2 threads." in text
    assert "Expected at 160000 solves: every probability within 0.0041 (limits/full)." in text
    assert "uq check --pilot" not in text


def test_a_precision_that_is_too_dear_or_cannot_be_foretold(study: Study) -> None:
    dear = replace(PILOT, needed=Needed(1e7, ("ranking/full total_by",)))
    text = words(study, replace(FACTS, pilot=dear))
    assert "about 10000000 solves, 50 s on 2 threads. That is more than the run may use." in text
    assert "Nothing can be foretold of ranking/full total_by." in text
    cheap = replace(PILOT, needed=Needed(1280.0, ()), failed=0)
    assert "The pilot by itself is as precise as asked; the run makes sure of it." in words(study, replace(FACTS, pilot=cheap))


def test_a_pilot_without_a_precision_asked(tmp_path: Path) -> None:
    (tmp_path / "inflow.csv").write_text("hour,flow\n0,20\n0.5,30\n1,25\n")
    (tmp_path / "gauge.csv").write_text("minute,level\n0,201\n30,220\n")
    plain = parse_study(STUDY.split("[plan.precision]")[0], tmp_path, "tower")
    text = words(plain, replace(FACTS, pilot=replace(PILOT, needed=None)))
    assert "The precision asked" not in text
    assert "65536 members in 16 replicates, 655360 solves, 2 scenarios counted." in text
    assert "At most" not in text

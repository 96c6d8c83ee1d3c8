"""What `uq check` says of a study."""

from __future__ import annotations

import re
from dataclasses import replace
from pathlib import Path

import pytest

from uq.report.check import CheckFacts, check_text
from uq.report.plain import width
from uq.study.read import parse_study
from uq.study.study import Study

STUDY = """
schema = 1
title = "Cooling outage at a hold tank"
about = "How likely is the alarm temperature passed?"
caution = "Invented data."
[time]
unit = "min"
stop = 720
points = 241
[states.T]
label = "Tank temperature"
unit = "K"
start = { normal = { mean = 303.0, sd = 1.5 }, source = "Logged, last winter", evidence = 4 }
rate = "heating - loss * (T - ambient)"
[parameters]
heating = { unit = "K/min", lognormal = { median = 0.02, gsd = 1.3 }, label = "Self-heating", kind = "knowledge", group = "kinetics" }
loss = { unit = "1/min", value = 0.01 }
alarm = { value = 348.15, unit = "K" }
[terms]
margin = { value = "alarm - T", label = "Margin to alarm" }
[forcings.ambient]
unit = "K"
rows = [[0, 291], [720, 288]]
[outcomes.peak_T]
label = "Highest temperature"
take = "highest(T)"
[limits.alarm_passed]
label = "Alarm temperature passed"
when = "T > alarm"
by = [120, 720]
accept = 0.01
[plan]
watch = ["T", "margin"]
"""
FACTS = CheckFacts(members=16384, replicates=16, solves=32768, threads=2, memory=52_000_000, seconds=4.2, same_model=True)


@pytest.fixture
def study(tmp_path: Path) -> Study:
    return parse_study(STUDY, tmp_path, "hold-tank")


def words(text: str) -> str:
    return " ".join(text.split())


def test_it_says_what_was_understood(study: Study) -> None:
    text = words(check_text(study, FACTS))
    for part in (
        "Cooling outage at a hold tank Caution: Invented data. How likely is the alarm temperature passed?",
        "From 0 min to 720 min, 241 output times.",
        "Questions: bands, limits, outcomes, ranking; watched: Tank temperature, Margin to alarm.",
        "Outcome: Highest temperature, K.",
        "Limit: Alarm temperature passed, that is T > alarm, by 120, 720 min; accepted: 0.01 by the last of them.",
        "dT/dt = heating - loss * (T - ambient) in K/min; T has an uncertain start",
        "margin = alarm - T",
        "loss = 0.01 1/min",
        "ambient: given course in K, 2 rows, linear, nothing outside them",
    ):
        assert part in text


def test_every_input_is_echoed_with_moments_and_quantiles(study: Study) -> None:
    text = words(check_text(study, FACTS))
    # lognormal: mean = median exp(s^2/2), sd = mean sqrt(exp(s^2) - 1), s = ln gsd; quantiles = median gsd^z, z = 1.6449.
    assert "Self-heating (heating) 0.02070 0.00553 0.01299 0.02000 0.03079 K/min" in text
    assert "source not stated, evidence not stated, knowledge, group kinetics" in text
    assert "303.00 1.50 300.53 303.00 305.47 K normal, mean 303, sd 1.5 source: Logged, last winter, evidence 4" in text


def test_it_says_what_a_run_takes(study: Study) -> None:
    text = words(check_text(study, FACTS))
    assert "16384 members in 16 replicates, 32768 solves." in text
    assert "Time: about 4.2 s on 2 threads (measured on this model)." in text
    assert "Memory: about 52 MB." in text
    other = CheckFacts(512, 16, 512, 1, 900, 3700.0)
    assert "Time: about 1 h 1 min on 1 thread (guessed from another model)" in words(check_text(study, other))
    assert "Memory: about 900 bytes." in check_text(study, other)
    assert "Time: about 12 days on" in words(check_text(study, CheckFacts(512, 16, 512, 1, 900, 1e6)))
    timed = words(check_text(study, CheckFacts(None, 16, None, 1, 900)))
    assert "As many members as fit into the time that it may take, in 16 replicates; one round in any case." in timed
    assert "None" not in timed
    assert "Time: not known yet on this machine" in check_text(study, CheckFacts(512, 16, 512, 1, 900))


def test_it_says_what_is_to_be_noted(study: Study) -> None:
    text = words(check_text(study, FACTS))
    assert "1 of 2 inputs have no stated source." in text
    assert "All inputs are taken as independent." in text


def test_warnings_and_a_study_without_units(tmp_path: Path) -> None:
    text = """
schema = 1
title = "Decay"
[time]
stop = 4
points = 5
[states.x]
start = 1
rate = "-a * x"
[parameters]
a = { uniform = { low = 0, high = 1 } }
spare = 3
"""
    said = words(check_text(parse_study(text, tmp_path, "decay"), FACTS))
    assert "taken as dimensionless" in said
    assert "Warning: " in said
    assert "spare" in said
    assert "From time 0 to time 4, 5 output times." in said
    assert "dx/dt = -a * x; x starts at 1 spare = 3" in said
    assert "independent" not in said


def test_lines_fit_and_nothing_acts(tmp_path: Path, study: Study) -> None:
    long = STUDY.replace('label = "Tank temperature"', 'label = "' + "long " * 30 + '"')
    text = check_text(parse_study(long, tmp_path, "long"), FACTS)
    assert all(width(line) <= 100 for line in text.splitlines())
    evil = replace(study, title="a\x1b[31mb", caution="c\x07d", about="e\x9bf", warnings=("g\x1bh",))
    assert not re.search(r"[\x00-\x09\x0b-\x1f\x7f-\x9f]", check_text(evil, FACTS))

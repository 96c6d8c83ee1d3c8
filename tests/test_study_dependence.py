"""Inputs that depend on each other, and distributions that are cut or fitted."""

from __future__ import annotations

import numpy as np
import pytest

from tests.small_studies import HEAD, mistakes, read
from uq.inputs.dependence import Dependence, JointSample
from uq.inputs.distributions import Data, Truncated, Uniform

THREE = HEAD.replace('room = "293.15 K"', 'room = { unit = "K", normal = { mean = 293.15, sd = 3 } }')
JOINT = b"# invented\nk;start;name\n0.01;60;a\n0.02;61;b\n0.03;58;c\n0.015;59;d\n"


def test_correlations_between_inputs() -> None:
    study = read('[[dependence]]\nbetween = ["cooling", "T_start"]\nrank_correlation = 0.6\n')
    assert study.inputs.dependence == (Dependence(("cooling", "T_start"), 0.6),)
    assert study.inputs.dependent
    assert any("Shapley effects" in text for text in study.remarks)
    several = read('[[dependence]]\nbetween = ["room", "T_start", "cooling"]\nnormal_correlation = [0.1, 0.2, -0.3]\n', THREE)
    (given,) = several.inputs.dependence
    assert isinstance(given, Dependence)
    assert given.pairs() == (("room", "T_start", 0.1), ("room", "cooling", 0.2), ("T_start", "cooling", -0.3))


def test_without_dependence_nothing_is_said_of_it() -> None:
    assert not read().inputs.dependent
    assert read().remarks == ()
    asked = read('[[dependence]]\nbetween = ["cooling", "T_start"]\nrank_correlation = 0.6\n[plan]\nask = ["bands"]\n')
    assert asked.remarks == ()


def test_dependence_counts_in_the_fingerprint() -> None:
    texts = [f'[[dependence]]\nbetween = ["cooling", "T_start"]\nrank_correlation = {number}\n' for number in (0.5, 0.6)]
    assert len({read(text).fingerprint for text in (*texts, "")}) == 3


@pytest.mark.parametrize(
    ("given", "said"),
    [
        ('between = ["cooling", "T"]\nrank_correlation = 0.6', "the start of the state `T` is the input `T_start`"),
        ('between = ["cooling", "room"]\nrank_correlation = 0.6', "found `room`"),
        ('between = ["cooling", "cooling"]\nrank_correlation = 0.6', "twice"),
        ('between = ["cooling", "T_start"]\nrank_correlation = 1', "a number between -1 and 1"),
        ('between = ["cooling", "T_start"]\nrank_correlation = [0.1, 0.2]', "2 numbers for 2 inputs"),
        ('between = ["cooling", "T_start"]\nrank_correlation = 0.1\nnormal_correlation = 0.1', "together"),
        ('between = ["cooling", "T_start"]\ncorrelation = 0.1', "did you mean `rank_correlation`"),
        ('between = ["cooling", "T_start"]', "no correlation"),
        ('between = ["cooling", "T_start"]\nrank_correlation = 0.1\nfile = "a.csv"', "together"),
    ],
)
def test_dependence_that_cannot_stand(given: str, said: str) -> None:
    assert any(said in text for text in mistakes(f"[[dependence]]\n{given}\n"))


def test_correlations_that_cannot_hold_together_are_named() -> None:
    (said,) = mistakes('[[dependence]]\nbetween = ["cooling", "room", "T_start"]\nrank_correlation = [0.9, 0.9, -0.9]\n', THREE)
    assert all(pair in said for pair in ("`cooling` and `room` 0.9", "`cooling` and `T_start` 0.9", "`room` and `T_start` -0.9"))
    assert "dependence[0].rank_correlation" in said


def test_an_input_that_is_wrong_itself_is_not_told_twice() -> None:
    (said,) = mistakes('[[dependence]]\nbetween = ["cooling", "T_start"]\nrank_correlation = 0.6\n', HEAD.replace("low = 0.01", "low = 9"))
    assert "cooling.uniform" in said


def joint(columns: str, text: str) -> str:
    return text + f'[[dependence]]\nfile = "post.csv"\ncolumns = {columns}\n'


def test_a_joint_sample_is_the_distribution_of_its_inputs() -> None:
    text = HEAD.replace(', uniform = { low = 0.01, high = "3 1/h" }', "").replace('{ normal = { mean = "60 degC", sd = "2 degC" } }', "{}")
    study = read(text=joint('{ T_start = "start", cooling = "k" }', text), files={"post.csv": JOINT})
    (sample,) = study.inputs.dependence
    assert isinstance(sample, JointSample)
    assert sample.values.tolist() == [[60, 0.01], [61, 0.02], [58, 0.03], [59, 0.015]]
    assert study.inputs.names == ("cooling", "T_start")
    distributions = [item.distribution for item in study.inputs.items]
    assert all(isinstance(each, Data) for each in distributions)
    assert study.parameters[0].distribution.quantile(np.array([0.5])).tolist() == [0.015]  # type: ignore[union-attr]
    assert 'post.csv: 4 rows of columns "start" and "k", semicolon separated' in study.remarks
    assert list(study.files) == ["post.csv"]


@pytest.mark.parametrize(
    ("columns", "said"),
    [
        ('{ T_start = "start", cooling = "k" }', "`uniform` beside the joint sample"),
        ('{ room = "k", cooling = "k0" }', 'no column "k0" in post.csv'),
        ('{ cooling = "k" }', "two or more inputs"),
        ('{ cooling = "k", T_start = 3 }', "the name of a column"),
        ('{ cooling = "name", T_start = "start" }', '"a" in post.csv, line 3'),
    ],
)
def test_joint_samples_that_cannot_stand(columns: str, said: str) -> None:
    assert any(said in text for text in mistakes(text=joint(columns, HEAD), files={"post.csv": JOINT}))


def test_a_joint_sample_that_is_wrong_gives_one_message() -> None:
    text = HEAD.replace(', uniform = { low = 0.01, high = "3 1/h" }', "")
    found = mistakes(text=joint('{ T_start = "start", cooling = "kk" }', text), files={"post.csv": JOINT})
    assert len(found) == 2
    assert all('"kk"' in text or "joint sample of [[dependence]] that draws `T_start`" in text for text in found)


def test_groups_of_inputs() -> None:
    text = THREE.replace("sd = 3 }", 'sd = 3 }, group = "room"').replace('"3 1/h" }', '"3 1/h" }, group = "room"')
    assert dict(read(text=text).groups) == {"room": (0, 1)}


@pytest.mark.parametrize(
    "key",
    [
        'loguniform = { low = "0.6 1/h", high = 0.03 }',
        "weibull = { shape = 2, scale = 0.02 }",
        "exponential = { mean = 0.02 }",
        'student = { mean = 0.02, scale = "0.06 1/h", dof = 5 }',
        "arcsine = { low = 0.01, high = 0.03 }",
        'trapezoid = { low = 0.01, low_shoulder = "0.9 1/h", high_shoulder = 0.02, high = 0.03 }',
        'percentiles = { p05 = "0.6 1/h", p50 = 0.02, p95 = 0.05, shape = "lognormal" }',
        'percentiles = { p10 = 0.01, p50 = 0.02, p90 = "3 1/h", low = 0 }',
        'discrete = { values = [0.01, "1.2 1/h"], weights = [1, 3] }',
        'normal = { value = 0.02, expanded = "0.3 1/h", coverage = 2 }',
    ],
)
def test_every_distribution_takes_quantities_where_it_has_a_unit(key: str) -> None:
    text = HEAD.replace('uniform = { low = 0.01, high = "3 1/h" }', key)
    study = read(text=text)
    assert 0.003 < float(study.inputs.items[0].distribution.quantile(np.array([0.5]))[0]) < 0.03
    cut = read(text=text.replace(key, key + ', truncate = [0.005, "2.4 1/h"]')).inputs.items[0].distribution
    assert isinstance(cut, Truncated)
    assert (cut.low, cut.high) == (0.005, 0.04)


def test_a_cut_beside_a_distribution_and_a_fixed_number_in_its_place() -> None:
    study = read(text=HEAD.replace('"3 1/h" }', '"3 1/h" }, truncate = [0.02, 0.03]'))
    assert study.parameters[0].distribution == Truncated(Uniform(low=0.01, high=0.05), 0.02, 0.03)
    assert study.with_changes({"parameters.cooling.value": 0.02}).parameters[0].value == 0.02
    assert study.with_changes({"parameters.cooling": 0.02}).parameters[0].value == 0.02


def test_percentiles_that_the_shape_cannot_meet_are_warned_of_with_the_misfit() -> None:
    key = 'percentiles = { p05 = 0.01, p50 = 0.02, p95 = 0.09, shape = "normal" }'
    study = read(text=HEAD.replace('uniform = { low = 0.01, high = "3 1/h" }', key))
    (warning,) = (text for text in study.warnings if "`cooling`:" in text)
    assert study.inputs.items[0].distribution.misfit() in warning
    met = read(text=HEAD.replace('uniform = { low = 0.01, high = "3 1/h" }', key.replace(', p95 = 0.09, shape = "normal"', ", p95 = 0.09")))
    assert not any("`cooling`:" in text for text in met.warnings)


@pytest.mark.parametrize("key", ["weibull = { shape = 2, scale = 20 }", "loguniform = { low = 3, high = 9 }", "exponential = { mean = 4 }"])
def test_what_starts_at_zero_is_refused_on_a_scale_without_one(key: str) -> None:
    (said,) = mistakes(f'[parameters.air]\nunit = "degC"\n{key}\n')
    assert "whose zero is a convention" in said


def test_a_student_of_degrees_is_a_point_and_a_difference() -> None:
    study = read(
        '[parameters.air]\nunit = "degC"\nstudent = { mean = "300 K", scale = "1.8 delta_degF", dof = 4 }\ntruncate = ["280 K", 50]\n'
    )
    cut = study.inputs.items[1].distribution
    assert isinstance(cut, Truncated)
    assert cut.low == pytest.approx(6.85)
    assert cut.distribution.arguments() == {"mean": 26.85, "scale": 1.0, "dof": 4}

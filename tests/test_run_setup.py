"""What a study asks for, in the words of the rooms that do it."""

from __future__ import annotations

import numpy as np
import pytest

from tests.test_run_whole import DECAY
from uq.running.aims import Aims
from uq.running.resume import aims_of
from uq.running.setup import ask_of, design_of, memory_of, most_rows, same_places, scenario_designs, settings_of
from uq.study.read import parse_study

FOUR = DECAY.replace(
    "[outcomes.last]",
    """a = { group = "pair", uniform = { low = 0, high = 1 } }
b = { uniform = { low = 0, high = 1 } }
c = { group = "pair", uniform = { low = 0, high = 1 } }
[outcomes.last]""",
).replace("16384", "1024")
CORRELATED = FOUR + '[[dependence]]\nbetween = ["a", "b"]\nrank_correlation = 0.5\n'


def test_independent_inputs_and_groups_have_a_mixed_row_each() -> None:
    study = parse_study(FOUR)
    ask = ask_of(study)
    assert ask.inputs == ("lambda", "a", "b", "c", "x_start")
    assert ask.mixed == ((0,), (1,), (2,), (3,), (4,), (1, 3))
    assert [(group.name, group.places) for group in ask.groups] == [("pair", (1, 3))]
    assert not ask.dependent
    assert design_of(study).solves == 16 * 32 * (2 + 6)
    assert ask.members == 1024


def test_without_a_ranking_nothing_is_mixed() -> None:
    study = parse_study(FOUR.replace("seed = 7", 'seed = 7\nask = ["bands"]'))
    assert design_of(study).solves == 1024
    assert ask_of(study).mixed == ()


def test_dependent_inputs_have_the_rows_of_their_shapley_effects() -> None:
    ask = ask_of(parse_study(CORRELATED))
    assert ask.dependent
    assert ask.units == ((0,), (1,), (2,), (3,), (4,))
    assert len(ask.mixed) == 2**5 - 2


def test_a_joint_sample_is_one_unit_and_has_a_group() -> None:
    rows = b"a,b\n0.1,0.2\n0.5,0.4\n0.9,0.7\n"
    text = FOUR + '[[dependence]]\nfile = "j.csv"\ncolumns = { a = "a", b = "b" }\n'
    for name in ("a", "b"):
        text = text.replace(f"{name} = {{ uniform = {{ low = 0, high = 1 }} }}\n", f'{name} = {{ unit = "1" }}\n')
    text = text.replace('a = { group = "pair", uniform = { low = 0, high = 1 } }', "a = {}").replace('b = { unit = "1" }', "b = {}")
    ask = ask_of(parse_study(text, files={"j.csv": rows}))
    assert (1, 2) in (ask.units or ())
    assert ("a+b", (1, 2)) in [(group.name, group.places) for group in ask.groups]


def test_observations_without_a_deviation_are_exact() -> None:
    text = DECAY + '[measured.x]\nfile = "m.csv"\ntime = { column = "t", unit = "1" }\nvalue = { column = "x", unit = "1" }\n'
    study = parse_study(text.replace(', unit = "1"', ""), files={"m.csv": b"t,x\n1,1.2\n2,0.7\n"})
    (measured,) = ask_of(study).measured
    assert (measured.watched, measured.times, measured.values, measured.sd) == (0, (1.0, 2.0), (1.2, 0.7), (0.0, 0.0))


def test_what_does_not_matter_goes_to_the_solver() -> None:
    study = parse_study(DECAY.replace('rate = "-lambda * x"', 'rate = "-lambda * x"\nnegligible = 1e-3'))
    assert settings_of(study).absolute.tolist() == [1e-3]
    assert np.isnan(study.with_changes({}).negligible).sum() == 0


def test_a_scenario_keeps_the_places_of_the_study() -> None:
    text = FOUR + '[scenarios.s]\nchange = { "parameters.a" = 0.5, "states.x.start" = 2 }\n'
    study = parse_study(text)
    inputs = same_places(study.inputs, study.scenarios[0].study.inputs)
    assert inputs.names == study.inputs.names
    assert [design.solves for design in scenario_designs(study)] == [design_of(study).solves]


def test_the_plan_says_what_may_be_spent() -> None:
    assert aims_of(parse_study(DECAY)) == Aims()
    study = parse_study(DECAY + "[plan.precision]\nindices = 0.1\n[plan.at_most]\nminutes = 2\n")
    assert aims_of(study) == Aims(study.plan.precision, None, 120.0)


@pytest.mark.parametrize(
    ("more", "rows"),
    [
        # Without a ranking a row is two solves; 16 replicates; the first round has 64 rows, and is solved whatever it takes.
        ("[plan.at_most]\nsolves = 100\n", 64),
        ("[plan.at_most]\nsolves = 8191\n", 128),
        ("[plan.at_most]\nsolves = 8192\n", 256),
        ("[plan.at_most]\nminutes = 2\n", None),
        ("[plan.at_most]\nminutes = 2\nsolves = 4096\n", 128),
    ],
)
def test_rows_that_a_plan_allows_at_most(more: str, rows: int | None) -> None:
    text = DECAY.replace("members = 16384\n", "").replace("seed = 7", 'seed = 7\nask = ["limits"]\n[plan.precision]\nprobabilities = 0.1')
    study = parse_study(text + more)
    assert study.plan.members_open
    assert most_rows(study) == rows
    bounded = study.with_changes({"plan.members": 4096})
    assert not bounded.plan.members_open
    assert most_rows(bounded) == min(rows or 128, 128)


def test_memory_is_bounded_by_what_may_be_kept() -> None:
    small, large = parse_study(DECAY), parse_study(DECAY.replace("16384", "100000000"))
    assert memory_of(small, 2) < memory_of(large, 2) < 900e6

"""Scenarios: the study with something changed, checked in full, told where the change stands."""

from __future__ import annotations

import pickle

import pytest

from tests.small_studies import HEAD, mistakes, read
from uq.study.scenarios import CHANGEABLE, refusal

ASKED = '[outcomes.end]\ntake = "final(T)"\n[limits.hot]\nwhen = "T > \'325 K\'"\nby = 30\n'
COLDER = '[scenarios.colder]\nlabel = "Window open"\nchange = { "parameters.room" = "5 degC" }\n'


def test_a_scenario_is_the_study_with_its_change() -> None:
    study = read(ASKED + COLDER)
    (scenario,) = study.scenarios
    assert (scenario.name, scenario.label) == ("colder", "Window open")
    assert scenario.study.parameters[1].value == 278.15
    assert study.parameters[1].value == 293.15
    assert scenario.study.inputs.names == study.inputs.names
    assert scenario.study.plan == study.plan
    assert scenario.study.scenarios == ()
    assert scenario.study.changes == {"parameters.room": "5 degC"}


def test_fingerprints_of_a_study_and_its_scenarios() -> None:
    plain, study = read(ASKED), read(ASKED + COLDER)
    assert study.fingerprint != plain.fingerprint
    assert study.scenarios[0].study.fingerprint == plain.with_changes({"parameters.room": "5 degC"}).fingerprint


def test_changes_of_a_study_reach_its_scenarios() -> None:
    study = read(ASKED + COLDER).with_changes({"plan.members": 4096, "parameters.cooling.uniform.high": 0.03})
    inner = study.scenarios[0].study
    assert inner.plan.members == 4096
    assert inner.parameters[0].distribution == study.parameters[0].distribution
    assert inner.parameters[1].value == 278.15
    again = inner.with_changes({"plan.members": 512})
    assert (again.plan.members, again.parameters[1].value, again.scenarios) == (512, 278.15, ())


def test_a_study_with_scenarios_can_be_sent_elsewhere() -> None:
    study = read(ASKED + COLDER)
    copy = pickle.loads(pickle.dumps(study))
    assert copy.scenarios[0].study.fingerprint == study.scenarios[0].study.fingerprint


@pytest.mark.parametrize(
    "change",
    [
        '"parameters.room" = 280',
        '"parameters.cooling" = 0.02',
        '"parameters.cooling.uniform.high" = 0.04',
        '"parameters.cooling.normal" = { mean = 0.02, sd = 0.001 }',
        '"states.T.rate" = "-cooling * (T - room) / 2"',
        '"states.T.start" = "330 K"',
        '"terms.loss" = "2 * cooling"',
        '"terms.loss.value" = "2 * cooling"',
        '"forcings.air.rows" = [[0, 290], [60, 300]]',
        '"tables.fan.rows" = [[200, 1], [400, 3]]',
        '"limits.hot.when" = "T > \'320 K\'"',
        '"outcomes.end.take" = "average(T)"',
        '"dependence" = [{ between = ["cooling", "T_start"], rank_correlation = 0.5 }]',
    ],
)
def test_what_may_change(change: str) -> None:
    more = ASKED + '[terms]\nloss = { value = "cooling", unit = "1/min" }\n[forcings.air]\nunit = "K"\nrows = [[0, 280], [60, 280]]\n'
    more += '[tables.fan]\nof = { unit = "K" }\nunit = "1"\nrows = [[200, 1], [400, 2]]\n'
    if '"terms.loss"' in change:
        more = more.replace('{ value = "cooling", unit = "1/min" }', '"cooling"')
    study = read(f"{more}[scenarios.other]\nchange = {{ {change} }}\n")
    assert study.scenarios[0].study.fingerprint != read(more).fingerprint


@pytest.mark.parametrize(
    ("key", "why"),
    [
        ("plan.members", "the same draws"),
        ("time.stop", "the same times"),
        ("units.person", "the same units"),
        ("schema", "how the whole file is read"),
        ("parameters.room.unit", "the same units"),
        ("parameters.room.label", "changes no result"),
        ("states.T.negligible", "a change of `start` or `rate` or `valid`"),
        ("limits.hot.by", "a change of `when`"),
        ("measured.T.sd", "a change within one of"),
        ("parameter.room", "did you mean `parameters`"),
        ("states.T", "states.NAME.start"),
        ("dependence.0", "as a whole"),
    ],
)
def test_what_may_not_change_is_told_with_the_reason(key: str, why: str) -> None:
    assert why in str(refusal(key))
    (said,) = mistakes(ASKED + f'[scenarios.other]\nchange = {{ "{key}" = 3 }}\n')
    assert f'scenarios.other.change."{key}"' in said or f"scenarios.other.change.{key}" in said
    assert why in said


def test_every_table_of_the_model_may_change() -> None:
    assert set(CHANGEABLE) == {"states", "parameters", "terms", "forcings", "tables", "outcomes", "limits", "dependence"}


def test_mistakes_of_a_change_stand_at_the_change() -> None:
    said = mistakes(
        ASKED + '[scenarios.a]\nchange = { "parameters.cooling.uniform.high" = 0 }\n[scenarios.b]\nchange = { "parameters.rom" = 3 }\n'
    )
    assert len(said) == 2
    assert 'study.toml:20:48  scenarios.a.change."parameters.cooling.uniform.high": found 0' in said[0]
    assert "did you mean `room`" in said[1]


def test_mistakes_elsewhere_by_a_change_name_the_place() -> None:
    assert "a quantity in kPa" in mistakes(ASKED + '[scenarios.a]\nchange = { "parameters.room" = "3 kPa" }\n')[0]
    (said,) = mistakes(ASKED + '[scenarios.a]\nchange = { "parameters.room" = { value = 3, unit = "kPa" } }\n')
    assert "scenarios.a.change: found a change by which `states.T.rate` at 10:25 has `room` in kPa" in said


def test_mistakes_of_the_study_are_not_told_again_for_its_scenarios() -> None:
    (said,) = mistakes(ASKED + COLDER, HEAD.replace("T - room", "T - rom"))
    assert "states.T.rate" in said


def test_answers_in_other_units_cannot_be_compared() -> None:
    (said,) = mistakes(ASKED + '[scenarios.a]\nchange = { "outcomes.end.take" = "integral(T)" }\n')
    assert "`end` in K min" in said
    assert "K, as in the study itself" in said
    assert "scenarios.a" in said


def test_a_scenario_without_a_change() -> None:
    assert "nothing changed" in mistakes("[scenarios.a]\nchange = {}\n")[0]
    assert "no `change`" in mistakes("[scenarios.a]\nlabel = 'A'\n".replace("'", '"'))[0]
    assert "a dotted key stands in quotes" in mistakes("[scenarios.a]\nchange = { parameters.room = 3 }\n")[0]
    assert "the name `a-b`" in mistakes('[scenarios.a-b]\nchange = { "parameters.room" = 3 }\n')[0]


def test_warnings_of_a_scenario_name_it() -> None:
    study = read(ASKED + '[scenarios.a]\nchange = { "states.T.rate" = "-cooling * T" }\n')
    assert study.warnings == ("scenario a: nothing uses the parameter `room`",)


def test_files_of_a_scenario_are_files_of_the_study() -> None:
    more = '[forcings.air]\nunit = "K"\nrows = [[0, 290], [60, 300]]\n[scenarios.a]\nchange = { "forcings.air.file" = "air.csv", '
    more += '"forcings.air.time" = { column = "min", unit = "min" }, "forcings.air.value" = { column = "K", unit = "K" } }\n'
    study = read(more, files={"air.csv": b"min,K\n0,280\n60,285\n"})
    assert list(study.files) == ["air.csv"]
    assert study.scenarios[0].study.forcings[0].rows == ((0.0, 280.0), (60.0, 285.0))
    assert study.forcings[0].rows == ((0.0, 290.0), (60.0, 300.0))


def test_measured_values_stay_with_the_study() -> None:
    more = '[measured.T]\nfile = "log.csv"\ntime = { column = "t", unit = "min" }\nvalue = { column = "v", unit = "K" }\n'
    study = read(more + COLDER, files={"log.csv": b"t,v\n5.5,320\n"})
    assert len(study.measured) == 1
    assert study.scenarios[0].study.measured == ()


def test_a_scenario_may_fix_an_input_or_add_one() -> None:
    fixed, added = read(
        '[scenarios.a]\nchange = { "parameters.cooling" = 0.02 }\n'
        '[scenarios.b]\nchange = { "parameters.room" = { unit = "K", normal = { mean = 290, sd = 2 } } }\n'
    ).scenarios
    assert fixed.study.inputs.names == ("T_start",)
    assert added.study.inputs.names == ("cooling", "room", "T_start")

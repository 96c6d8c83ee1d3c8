"""What a study says and what follows from it: forms, units, names, times, defaults, warnings, changes, fingerprint."""

from __future__ import annotations

import pickle
from pathlib import Path

import numpy as np
import pytest

from tests.small_studies import HEAD, PLAIN, mistakes, read
from uq.errors import StudyError
from uq.inputs.distributions import DISTRIBUTIONS, Data, Normal, Uniform
from uq.study.dependence import KEYS
from uq.study.keys import DECLARATIONS, WITHOUT_DECLARATION, key_table
from uq.study.read import parse_study, read_study
from uq.study.sheets import TABLES
from uq.study.uncertain import Uncertain


def test_quantities_are_converted_to_the_unit_of_their_table() -> None:
    study = read()
    assert study.time.stop == 60
    assert study.states[0].start == Uncertain(distribution=Normal(mean=333.15, sd=2.0))
    assert study.parameters[0].distribution == Uniform(low=0.01, high=0.05)
    assert study.parameters[1].value == 293.15
    assert study.parameters[1].unit == "K"


def test_a_deviation_of_a_temperature_is_a_difference() -> None:
    study = read('[parameters.air]\nunit = "degC"\nnormal = { mean = "300 K", sd = "9 delta_degF" }\n')
    assert study.parameters[-1].distribution == Normal(mean=26.85, sd=5.0)
    assert study.inputs.items[1].difference_unit == "K"


def test_inputs_are_parameters_in_file_order_then_starts_in_state_order() -> None:
    study = read(
        '[states.a]\nunit = "1"\nstart = { uniform = { low = 0, high = 1 } }\nrate = 0\n[parameters.z]\nunit="1"\nuniform={low=1,high=2}\n'
    )
    assert study.inputs.names == ("cooling", "z", "T_start", "a_start")
    assert study.equations.inputs == study.inputs.names
    assert study.inputs.items[2].label == "T, start"


def test_fixed_numbers_are_numbers_in_the_graph_and_inputs_are_leaves() -> None:
    study = read()
    equations = study.equations
    assert equations.graph.leaves(equations.rates[0]) == {"cooling", "T"}
    assert equations.graph.leaves(equations.starts[0]) == {"T_start"}


def test_a_start_may_be_an_expression_of_parameters_and_of_terms_of_them() -> None:
    more = '[states.y]\nunit = "K"\nstart = "room + rise"\nrate = "0"\n[terms]\nrise = "cooling * \'100 K min\'"\n'
    study = read(more)
    assert study.equations.graph.leaves(study.equations.starts[1]) == {"cooling"}
    assert any("a start is made of parameters" in m for m in mistakes(more.replace("cooling *", "cooling * T / '1 K' *")))


def test_terms_in_any_order_and_quantities_as_terms() -> None:
    study = read('[terms]\nb = "2 * a"\na = "c / T"\nc = "5 K"\n[plan]\nwatch = ["b", "c", "T"]\n')
    assert [(q.name, q.unit) for q in study.watched] == [("b", "1"), ("c", "K"), ("T", "K")]
    assert study.equations.observed[2] is study.equations.graph.name("T")


def test_python_keywords_are_ordinary_names() -> None:
    study = read('[terms]\nlambda = "cooling"\nif = "lambda + cooling"\n')
    assert [term.name for term in study.terms] == ["lambda", "if"]


def test_output_times_in_three_ways() -> None:
    assert read().time.grid[[0, 1, -1]].tolist() == [0, 1, 60]
    assert read(text=HEAD.replace("points = 61", 'every = "25 min"')).time.grid.tolist() == [0, 25, 50, 60]
    assert read(text=HEAD.replace("points = 61", "every = 0.1")).time.grid[-2:] == pytest.approx([59.9, 60], abs=1e-12)
    assert len(read(text=HEAD.replace("points = 61", "every = 0.1")).time.grid) == 601
    assert read(text=HEAD.replace("points = 61", 'at = [0, "0.5 h", 60]')).time.grid.tolist() == [0, 30, 60]


def test_the_last_of_the_output_times_is_the_stop_where_none_is_stated() -> None:
    time = read(text=HEAD.replace('stop = "1 h"\npoints = 61', 'at = [0, "0.5 h", 90]')).time
    assert (time.stop, time.grid.tolist()) == (90, [0, 30, 90])
    assert any("no `stop`" in text for text in mistakes(text=HEAD.replace('stop = "1 h"\n', "")))


def test_solved_times_hold_output_times_ends_limits_and_windows_each_once() -> None:
    more = """
[outcomes.late]
take = "average(T, '40 min', 50)"
[outcomes.at]
take = "value_at(T, '0.25 h')"
[limits.hot]
when = "T > '320 K'"
by = ["0.55 h", 20]
"""
    assert any("ascending" in m for m in mistakes(more))
    study = read(more.replace('["0.55 h", 20]', '[20, "0.55 h"]'), HEAD.replace("points = 61", "at = [10, 20, 30]"))
    assert study.times.solved.tolist() == [0, 10, 15, 20, 30, 33, 40, 50, 60]
    assert study.times.solved[study.times.grid].tolist() == [10, 20, 30]
    assert study.limits_asked[0].by == (20.0, 33.0)
    assert [(c.kind, c.start, c.stop) for c in study.equations.courses] == [("average", 40, 50), ("value_at", 15, 15)]


def test_a_time_that_differs_by_rounding_only_is_an_output_time() -> None:
    study = read('[limits.hot]\nwhen = "T > room"\nby = 0.6\n', HEAD.replace('"1 h"', "1.0").replace("points = 61", "every = 0.1"))
    assert len(study.times.solved) == 11
    assert study.limits_asked[0].by[0] in study.times.solved


def test_defaults_of_the_plan_are_what_applies() -> None:
    plan = read().plan
    assert (plan.ask, plan.watch, plan.members, plan.seed) == (("bands", "ranking"), ("T",), 16384, 0)
    assert (plan.confidence, plan.quantiles, plan.accuracy) == (0.95, (0.05, 0.25, 0.5, 0.75, 0.95), 1e-6)
    assert (plan.keep, plan.failures) == (512_000_000, "bound")
    full = read('[limits.hot]\nwhen = "T > room"\n[outcomes.end]\ntake = "final(T)"\n[plan]\nkeep = "1.5 GiB"\nmembers = 1e5\n')
    assert full.plan.ask == ("bands", "limits", "outcomes", "ranking")
    assert full.limits_asked[0].by == (60.0,)
    assert (full.plan.keep, full.plan.members) == (1_610_612_736, 100_000)


def test_the_whole_argument_of_outcomes_is_observed_once() -> None:
    study = read('[outcomes.a]\ntake = "highest(T) - lowest(T - room)"\n[outcomes.b]\ntake = "integral(T - room) / \'60 min\'"\n')
    equations = study.equations
    assert [course.kind for course in equations.courses] == ["highest", "lowest", "integral"]
    assert [course.observed for course in equations.courses] == [0, 1, 1]
    assert [equations.graph.leaves(node) for node in equations.outcomes] == [{"course:0", "course:1"}, {"course:2"}]
    assert [q.unit for q in study.outcome_quantities] == ["K", "K"]


def test_valid_values() -> None:
    study = read('[states.y]\nunit = "m"\nstart = 0\nrate = 0\n', HEAD.replace("rate =", 'valid = ["0 degC", 400]\nrate ='))
    assert study.lowest.tolist() == [273.15, -np.inf]
    assert study.highest.tolist() == [400, np.inf]


def test_forcings_become_rows_in_the_study_units() -> None:
    more = '[forcings.air]\nunit = "K"\nrows = [[0, "20 degC"], ["0.5 h", 300], [60, 301]]\ninterpolation = "step"\n'
    study = read(more)
    (forcing,) = study.equations.forcings
    assert forcing.times == (0.0, 30.0, 60.0)
    assert forcing.values == (293.15, 300.0, 301.0)
    assert forcing.interpolation == "step"
    assert study.warnings == ("nothing uses the forcing `air`",)


def test_a_study_without_any_unit_is_dimensionless_and_says_so() -> None:
    study = read(text=PLAIN)
    assert study.unitless
    assert study.warnings == (
        "no unit is stated anywhere: the study is taken as dimensionless",
        "nothing uses the parameter `b`",
        "nothing uses the term `twice`",
    )
    assert study.watched[0].unit == "1"
    assert study.time.grid.tolist() == [0, 6, 12, 18, 20]


@pytest.mark.parametrize(
    "more", ["[limits.c]\nwhen = \"x > '3 m'\"\n", '[parameters.c]\nvalue = "3 m"\n', '[outcomes.c]\nunit = "1"\ntake = "final(x)"\n']
)
def test_one_unit_anywhere_makes_the_others_needed(more: str) -> None:
    assert len([m for m in mistakes(more, PLAIN) if "unit" in m]) >= 4


def test_words_about_units_in_labels_do_not_count() -> None:
    assert read('[parameters.c]\nvalue = 3\nlabel = "75 degC"\nsource = "it\'s 3 m"\n', PLAIN).unitless


def test_warnings() -> None:
    more = '[parameters]\nt = "3 m"\n[parameters.mass]\nunit = "kg"\nnormal = { mean = 2, sd = 1 }\n'
    study = read(more.removeprefix("[parameters]\n"))
    assert "`T` and `t` differ only in case" in study.warnings
    assert "nothing uses the parameter `mass`" in study.warnings
    assert "`mass` is positive but for 2.3 % of its draws, which are below zero" in study.warnings
    assert len(study.warnings) == 4


@pytest.mark.parametrize(("unit", "mean", "warned"), [("kg", 0, False), ("kg", 1, True), ("kg", 20, False), ("degC", 1, False)])
def test_draws_below_zero_are_warned_of_where_other_values_are_positive(unit: str, mean: float, warned: bool) -> None:
    study = read(f'[parameters.m]\nunit = "{unit}"\nnormal = {{ mean = {mean}, sd = 1 }}\n')
    assert any("below zero" in text for text in study.warnings) == warned


def test_what_depends_on_an_unused_term_only_is_unused_too() -> None:
    study = read('[terms]\na = "b * cooling"\nb = "T"\nc = "T"\n[outcomes.o]\ntake = "final(c)"\n')
    assert study.warnings == ("nothing uses the term `a`", "nothing uses the term `b`")


def test_data_from_a_file(tmp_path: Path) -> None:
    text = HEAD + '[parameters.d]\nunit = "m"\ndata = { file = "sub/d.csv", column = "depth" }\n'
    (tmp_path / "sub").mkdir()
    (tmp_path / "sub" / "d.csv").write_text("# invented\nname;depth\na;1.5\n\nb; 0.5\n# end\nc;2\n", encoding="utf-8")
    (tmp_path / "s.toml").write_text(text, encoding="utf-8")
    study = read_study(tmp_path / "s.toml")
    distribution = study.inputs.items[1].distribution
    assert isinstance(distribution, Data)
    assert distribution.values.tolist() == [0.5, 1.5, 2]
    assert study.remarks == ('sub/d.csv: 3 numbers of column "depth", semicolon separated',)
    assert list(study.files) == ["sub/d.csv"]
    assert study.name == "s"
    # from its text and files alone, as from a result
    assert parse_study(text, None, "s", study.files).fingerprint == study.fingerprint
    other = dict(study.files) | {"sub/d.csv": study.files["sub/d.csv"].replace(b"1.5", b"1.6")}
    assert parse_study(text, None, "s", other).fingerprint != study.fingerprint


@pytest.mark.parametrize(
    ("content", "said"),
    [
        (b"depth\n1\nx\n", '"x" in d.csv, line 3'),
        (b"name;depth\na;1,5\n", "numbers have a decimal point"),
        (b"depth,depth\n1,2\n", 'the column "depth" 2 times in d.csv; expected columns of different names'),
        (b"depth\n", "without numbers"),
        (b"", "without a header line"),
        (b"depth\n1\n\xff\n", "not UTF-8"),
        (b"depth\n1\ninf\n", '"inf" in d.csv, line 3'),
        (b"depth\n1\n1\n", "2 equal values"),
    ],
)
def test_data_that_cannot_stand(content: bytes, said: str) -> None:
    text = HEAD + '[parameters.d]\nunit = "m"\ndata = { file = "d.csv", column = "depth" }\n'
    with pytest.raises(StudyError, match=said.replace("(", "\\(")):
        parse_study(text, files={"d.csv": content})


def test_changes_by_dotted_key() -> None:
    study = read()
    changed = study.with_changes({"plan.members": 4096, "parameters.cooling.uniform.high": 0.2, "parameters.room": 290, "time.every": 5})
    assert changed.plan.members == 4096
    assert changed.parameters[0].distribution == Uniform(low=0.01, high=0.2)
    assert (changed.parameters[1].value, changed.parameters[1].unit) == (290.0, "K")
    assert len(changed.time.grid) == 13
    assert changed.text == study.text
    assert dict(changed.changes)["plan.members"] == 4096
    assert changed.fingerprint != study.fingerprint
    again = changed.with_changes({"plan.seed": 3})
    assert (again.plan.members, again.plan.seed) == (4096, 3)
    assert study.plan.members == 16384


def test_a_number_for_an_uncertain_parameter_fixes_it_and_keeps_its_unit() -> None:
    study = read().with_changes({"parameters.cooling": 0.02})
    assert study.inputs.names == ("T_start",)
    assert (study.parameters[0].value, study.parameters[0].unit, study.parameters[0].source) == (0.02, "1/min", "")
    other = read().with_changes({"parameters.cooling.normal": {"mean": 0.02, "sd": 0.001}})
    assert other.parameters[0].distribution == Normal(mean=0.02, sd=0.001)


@pytest.mark.parametrize(
    ("key", "value", "said"),
    [
        ("plan.member", 3, "did you mean `members`"),
        ("plan.members", 0, "1 or more"),
        ("parameters.colling.uniform.low", 1, "did you mean `cooling`"),
        ("parameters.new", 1, "not in the study"),
        ("limits.hot.by", 1, "not in the study"),
        ("title.of", 1, "not in the study"),
        ("schema.of", 1, "a change below 1"),
        ("states.T.rate", "-cooling * T * T", "K2/min"),
        ("plan", 3, "not in the study"),
        ("states", 3, "not in the study"),
        ("parameters.cooling.uniform.low", 7, "as changed"),
    ],
)
def test_changes_are_checked_as_a_file_is(key: str, value: object, said: str) -> None:
    with pytest.raises(StudyError) as caught:
        read().with_changes({key: value})
    assert said in str(caught.value)


def test_the_fingerprint_sees_what_a_study_says_and_nothing_else() -> None:
    study = read('[terms]\na = "T"\nb = "room"\n')
    same = [
        HEAD + '# a comment\n[terms]\nb = "room"\na = "T"\n',
        HEAD.replace('[states.T]\nunit = "K"\n', "[states.T]\n").replace("rate =", "unit   =  'K'\nrate =")
        + '[terms]\na = "T"\nb = "room"\n',
        HEAD.replace("low = 0.01", "low = 1e-2").replace("points = 61", "points = 61.0").replace("\n", "\r\n")
        + '[terms]\na="T"\nb="room"\n',
    ]
    assert {parse_study(text).fingerprint for text in same} == {study.fingerprint}
    assert parse_study(HEAD + '[terms]\na = "T"\nb = "room"\n', changes={"plan.seed": 1}).fingerprint != study.fingerprint
    assert len(study.fingerprint) == 64


def test_the_order_of_parameters_and_states_counts_in_the_fingerprint() -> None:
    more = '[parameters.m]\nunit = "1"\nuniform = { low = 1, high = 2 }\n', '[parameters.n]\nunit = "1"\nuniform = { low = 1, high = 2 }\n'
    assert read(more[0] + more[1]).fingerprint != read(more[1] + more[0]).fingerprint


def test_a_study_can_be_sent_elsewhere() -> None:
    study = read()
    copy = pickle.loads(pickle.dumps(study))
    assert copy.fingerprint == study.fingerprint
    assert copy.with_changes({"plan.seed": 5}).fingerprint == study.with_changes({"plan.seed": 5}).fingerprint


def test_byte_order_mark_and_line_ends_of_other_systems(tmp_path: Path) -> None:
    path = tmp_path / "w.toml"
    path.write_bytes(("\ufeff" + HEAD.replace("T - room", "T - rom")).replace("\n", "\r\n").encode())
    with pytest.raises(StudyError, match=r"w\.toml:10:25 "):
        read_study(path)


def test_files_that_are_no_study(tmp_path: Path) -> None:
    with pytest.raises(StudyError, match="cannot be read"):
        read_study(tmp_path / "none.toml")
    (tmp_path / "latin.toml").write_bytes(b'schema = 1\ntitle = "caf\xe9"\n')
    with pytest.raises(StudyError, match=r"latin\.toml:2:13  study: found the byte 0xe9"):
        read_study(tmp_path / "latin.toml")


def test_names_of_switches_of_a_later_version_are_not_unknown() -> None:
    said = mistakes('[switches]\nU = "room"\n[terms]\na = "U * T"\nc = "a + 1"\n')
    assert len(said) == 1
    assert "not available yet" in said[0]


def test_one_slip_gives_one_message() -> None:
    assert len(mistakes('[terms]\na = "rom"\nb = "a"\n[limits.l]\nwhen = "b > room"\n[outcomes.o]\ntake = "final(b)"\n')) == 1
    assert len(mistakes(text=HEAD.replace('"K"', '"Kk"', 1))) == 1
    assert len(mistakes(text=HEAD.replace('"min"', '"mni"'))) == 1


def test_the_key_tables_hold_every_key_of_the_format() -> None:
    text = key_table()
    assert all(f"`{key}`" in text for key in (*KEYS, *(kind.key for kind in DISTRIBUTIONS)))
    assert all(f"`[{name}" in text or f"`[[{name}" in text for name in TABLES)
    assert text.count("\n\n| key |") == len(DECLARATIONS) + len(WITHOUT_DECLARATION) + 1


def test_a_pulse_at_a_time_that_depends_on_an_input_is_warned_of() -> None:
    rate = '[states.y]\nstart = 0\nrate = "where(time > {0} and time < 1 + {0}, b, 0)"\n'
    said = [text for text in read(rate.format("3 * a"), PLAIN).warnings if "changes at times" in text]
    assert len(said) == 1
    assert said[0].startswith("the rate of `y` changes at times that depend on `a`:")
    assert "make it a forcing" in said[0]
    assert not any("changes at times" in text for text in read(rate.format("3 * b"), PLAIN).warnings)

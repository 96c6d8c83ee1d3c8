"""What repeats over an index in a result: an axis of the index before time, in the file, in Python, in JSON and on the terminal."""

from __future__ import annotations

import json
from pathlib import Path

import numpy as np
import pytest
import xarray

import uq
from tests.test_study_index import EPIDEMIC, INDEXED
from uq.analysis.finding import Finding, Variable
from uq.lang.scope import Index
from uq.report.entries import ENDS, MOST_ENTRIES
from uq.report.machine import result_json
from uq.report.summary import summary
from uq.store.result import Result
from uq.store.stacked import apart, stacked
from uq.study.index import Repeat
from uq.study.read import parse_study

CELL = Index("cell", ("0", "1"), True, "cell")
AGE = Index("age", ("child", "adult"), False, "age")
LIGHT = '[scenarios.light]\nchange = { "parameters.cap" = [0.05, 0.05, 0.05] }\n'


@pytest.fixture(scope="module")
def cells(tmp_path_factory: pytest.TempPathFactory) -> Result:
    return uq.run(
        parse_study(INDEXED.replace("by = [10, 20]", "by = [10, 20]\naccept = 0.9") + LIGHT), tmp_path_factory.mktemp("a") / "out"
    )


@pytest.fixture(scope="module")
def ages(tmp_path_factory: pytest.TempPathFactory) -> Result:
    text = EPIDEMIC.replace('"limits", "outcomes"]', '"limits", "outcomes", "ranking"]')
    text = text.replace("value = [[8, 3, 1], [3, 5, 1.5], [1, 1.5, 2]]", "uniform = { low = 1, high = 4 }")
    return uq.run(parse_study(text), tmp_path_factory.mktemp("b") / "out")


def test_the_axis_of_an_index_stands_before_time_and_last_where_there_is_none(cells: Result) -> None:
    assert cells.bands["T"].quantiles.dims == ("quantile", "cell", "time")
    assert cells.bands["T"].nominal.dims == ("cell", "time")
    assert cells.bands["T"].simultaneous.dims == ("side", "cell", "time")
    assert cells.limits["hot"].ever_by.dims == ("cell", "by")
    assert cells.limits["hot"].first_time.dims == ("quantile", "cell")
    assert cells.outcomes["each"]["quantiles"].dims == ("quantile", "cell")
    assert cells.ranking["T"].total.dims == ("input", "cell", "time")
    assert cells.ranking["T"].total_overall.dims == ("input", "cell")
    assert cells.members["watched"]["T"].dims == ("realization", "cell", "time")
    assert cells.members["inputs"]["T_start"].dims == ("realization", "cell")
    assert cells.scenarios["light"]["bands"]["T"].mean.dims == ("cell", "time")
    assert cells.differences["light"]["bands"]["T"].mean.dims == ("cell", "time")
    assert cells.bands["mean"].quantiles.dims == ("quantile", "time")


def test_entries_are_found_by_number_or_by_label(cells: Result, ages: Result) -> None:
    assert cells["cell"].values.tolist() == [0, 1, 2]
    assert ages["age"].values.tolist() == ["child", "adult", "old"]
    one = ages.bands["I"].quantiles.sel(age="adult", quantile=0.5)
    assert one.dims == ("time",)
    contact = ages.members["inputs"]["contact"]
    assert contact.dims == ("realization", "age", "age_other")
    assert contact.sel(age="old", age_other="child").shape == (200,)
    assert ages["input"].values.tolist()[:2] == ["contact[child,child]", "contact[child,adult]"]


def test_numbers_under_the_labels_are_those_of_the_members(cells: Result) -> None:
    shown = cells.members["watched"]["T"]
    median = cells.bands["T"].quantiles.sel(quantile=0.5)
    assert np.all(np.abs(shown.median("realization") - median) < 1.0)
    assert cells.bands["T"].mean.sel(cell=0).values[-1] > cells.bands["T"].mean.sel(cell=2).values[-1] + 1


def test_an_independent_reader_finds_the_same(cells: Result) -> None:
    tree = xarray.open_datatree(cells.path)
    assert tree["bands/T"]["quantiles"].sel(cell=1).dims == ("quantile", "time")
    assert np.array_equal(tree["bands/T"]["quantiles"].values, cells.bands["T"].quantiles.values)
    assert tree["bands/T"].attrs["over"] == "cell"
    tree.close()


def test_the_verdict_on_the_whole_is_the_worst_on_any_entry(cells: Result) -> None:
    limit = cells.limits["hot"]
    assert set(limit.verdict_of.values.tolist()) <= {"met", "not met", "not settled"}
    worst = [each for each in ("not met", "not settled", "met") if each in limit.verdict_of.values.tolist()]
    assert limit.verdict == worst[0]


def test_the_machine_form_has_every_entry_by_its_name(cells: Result) -> None:
    told = json.loads(json.dumps(result_json(cells), allow_nan=False))
    assert list(told["bands"]) == ["T[0]", "T[1]", "T[2]", "mean"]
    assert list(told["limits"]) == ["hot[0]", "hot[1]", "hot[2]"]
    assert told["bands"]["T[1]"]["label"] == "T [1]"
    assert list(told["scenarios"]["light"]["differences"]["outcomes"]) == ["peak", "each[0]", "each[1]", "each[2]"]
    value = cells.outcomes["each"]["mean"].sel(cell=2).item()
    assert told["outcomes"]["each[2]"]["mean"]["value"] == value


def test_few_entries_are_all_told_and_of_many_only_the_ends(cells: Result, tmp_path: Path) -> None:
    text = summary(cells)
    assert all(f"T [{place}]" in text for place in range(3))
    assert ENDS.split(",")[0] not in " ".join(text.split())
    many = INDEXED.replace("cell = 3", "cell = 12").replace('value = [0.1, "120 J/K", 0.2]', "value = 0.1").replace("303 K", "320 K")
    text = " ".join(summary(uq.run(parse_study(many), tmp_path / "out")).split())
    assert MOST_ENTRIES < 12
    assert "T [0] (highest of 12)" in text
    assert "(lowest of 12)" in text
    assert "hot [0] (likeliest of 12)" in text
    assert text.count("T [5]") == 0
    assert ENDS in text


def findings(missing: bool = False) -> list[Finding]:
    """Two entries of T at three times and their limit; one of them may lack a number."""
    made = []
    for place in range(2):
        data = np.arange(3.0) + 10 * place
        variables = {
            "mean": Variable(("time",), data, f"mean of Tank [{place}]", "K"),
            "sd": Variable((), np.array(place + 0.5), "sd", "K"),
        }
        if missing and place:
            del variables["sd"]
        made.append(
            Finding(f"bands/T[{place}]", variables, {"label": f"Tank [{place}]", "unit": "K", "verdict": ("met", "not met")[place]})
        )
    return made


def test_stacking_and_taking_apart_give_back_every_entry() -> None:
    (whole,) = stacked(findings(), [Repeat("T", "Tank", (CELL,))])
    assert whole.group == "bands/T"
    assert whole.variables["mean"].dims == ("cell", "time")
    assert whole.variables["mean"].long_name == "mean of Tank"
    assert whole.attributes == {"unit": "K", "verdict": "not met", "label": "Tank", "over": "cell"}
    back = apart(whole, {"cell": Variable(("cell",), np.arange(2), "cell")})
    for first in findings():
        again = back[first.group.partition("/")[2]]
        assert again.group == first.group
        assert again.attributes == first.attributes
        assert all(np.array_equal(again.variables[name].data, each.data) for name, each in first.variables.items())


def test_what_one_entry_lacks_is_missing_there() -> None:
    (whole,) = stacked(findings(missing=True), [Repeat("T", "Tank", (CELL,))])
    assert np.array_equal(whole.variables["sd"].data, [0.5, np.nan], equal_nan=True)


def test_a_matrix_over_one_index_has_two_axes_with_names_of_their_own() -> None:
    repeat = Repeat("M", "M", (AGE, AGE))
    assert repeat.dims == ("age", "age_other")
    values = {entry: Variable(("realization",), np.full(2, float(place)), entry) for place, entry in enumerate(repeat.entries)}
    (whole,) = stacked([Finding("members/inputs", values)], [repeat])
    assert whole.variables["M"].dims == ("realization", "age", "age_other")
    assert whole.variables["M"].data[0].tolist() == [[0.0, 1.0], [2.0, 3.0]]

"""result.nc as other programs and `open_result` read it."""

from __future__ import annotations

import subprocess
import sys
from pathlib import Path

import numpy as np
import pytest
import xarray

from tests.made_results import INPUTS, LEVELS, TIMES, made_facts, made_findings, made_result, made_study
from uq.analysis.finding import Finding
from uq.store.encode import encode
from uq.store.layout import contents
from uq.store.result import Result


@pytest.fixture(scope="module")
def result(tmp_path_factory: pytest.TempPathFactory) -> Result:
    return made_result(tmp_path_factory.mktemp("made") / "hold-tank")


def test_names_of_the_file_are_attributes_of_the_result(result: Result) -> None:
    quantiles = result.bands["T"].quantiles
    assert isinstance(quantiles, xarray.DataArray)
    assert quantiles.dims == ("quantile", "time")
    np.testing.assert_array_equal(quantiles["time"].values, TIMES)
    assert tuple(quantiles["quantile"].values) == LEVELS
    assert quantiles.attrs["units"] == "K"
    assert float(quantiles.sel(quantile=0.5, time=720)) == 320.0
    assert result.limits["alarm_passed"].attributes["verdict"] == "not met"
    assert result.limits["alarm_passed"].ever_by.sel(by=720).item() == 0.0148
    assert list(result.ranking["T"].first["input"].values) == list(INPUTS.names)
    assert result.members.watched["T"].dims == ("realization", "time")
    assert result.study.text.item() == made_study().text
    assert list(result) == [
        "time",
        "quantile",
        "input",
        "study",
        "inputs",
        "solver",
        "members",
        "failures",
        "bands",
        "limits",
        "outcomes",
        "ranking",
    ]


def test_everything_agrees_with_xarray_itself(result: Result) -> None:
    compared = 0
    with xarray.open_datatree(result.path) as tree, result.tree() as ours:
        assert tree.identical(ours)
        for group, finding in result.findings.items():
            for name in finding.variables:
                theirs = tree[f"/{group}"][name].load()
                node = result
                for part in group.split("/") if group else []:
                    node = node[part]
                mine = node[name]
                assert mine.dims == theirs.dims
                np.testing.assert_array_equal(mine.values, theirs.values)
                assert set(mine.attrs) == set(theirs.attrs), (group, name)
                for coordinate in mine.coords:
                    np.testing.assert_array_equal(mine[coordinate].values, theirs[coordinate].values)
                compared += 1
    assert compared > 80


def test_every_variable_has_units_and_a_long_name(result: Result) -> None:
    """Units differ from entry to entry where each stands for an input or a state of its own: there a variable or a comment states them."""
    mixed = {"inputs/mean", "inputs/sd", "inputs/quantiles", "solver/scales"}
    with xarray.open_datatree(result.path) as tree:
        for node in tree.subtree:
            for name, variable in node.variables.items():
                where = f"{node.path}/{name}".lstrip("/")
                assert variable.attrs["long_name"], where
                assert ("units" in variable.attrs) != (where in mixed), where
                assert "units" in variable.attrs or "unit" in variable.attrs["comment"]


def test_root_attributes_tell_the_run(result: Result) -> None:
    facts = result.attributes
    expected = {
        "Conventions": "CF-1.11",
        "title": "Cooling outage at a hold tank",
        "study_fingerprint": "7f3a" * 16,
        "seed": 11,
        "members_asked": 16384,
        "members_solved": 16384,
        "members_failed": 0,
        "wall_time": 41.23,
        "method": "explicit54",
        "accuracy": 1e-6,
        "confidence": 0.95,
        "version_numpy": "2.4.0",
        "processor": "avx2 fma",
        "complete": 1,
    }
    assert {name: facts[name] for name in expected} == expected
    assert facts["history"] == "2026-12-01T22:41:03+00:00 uq run hold-tank.toml (uq 0.1.0)"
    assert len(facts["content_fingerprint"]) == 64


def test_a_seed_beyond_the_integers_of_the_file_is_kept(tmp_path: Path) -> None:
    assert made_result(tmp_path, facts=made_facts(seed=2**70)).attributes["seed"] == str(2**70)
    assert made_result(tmp_path, facts=made_facts(seed=0)).attributes["seed"] == 0


def test_the_study_can_be_taken_out_again(result: Result) -> None:
    study = made_study()
    ends = np.cumsum(result.study.file_size.values)
    content = result.study.file_bytes.values.tobytes()
    rows = zip(result.study.file.values, result.study.file_size.values, ends, strict=True)
    files = {str(name): content[end - size : end] for name, size, end in rows}
    assert files == study.files
    assert list(result.study.changes.values) == ["plan.seed = 11"]
    assert int(result.study["members"]) == 16384


def test_inputs_say_what_they_rest_on(result: Result) -> None:
    inputs = result.inputs
    assert inputs.distribution.sel(input="activation").item() == "normal, mean 98, sd 1.2"
    assert inputs.mean.sel(input="T_start").item() == 303.0
    np.testing.assert_allclose(inputs.quantiles.sel(input="activation", quantile=0.95), 98 + 1.2 * 1.6448536269514722)
    assert list(inputs.group_of.values) == ["kinetics", "kinetics", "", ""]
    evidence = inputs.evidence
    assert evidence.values[[0, 1, 3]].tolist() == [3, 1, 4]
    assert np.isnan(evidence.values[2])
    assert evidence.attrs["flag_values"].tolist() == [0, 1, 2, 3, 4]
    assert len(evidence.attrs["flag_meanings"].split()) == 5


def test_statuses_are_flags(result: Result) -> None:
    status = result.members.status
    assert status.attrs["standard_name"] == "status_flag"
    words = dict(zip(status.attrs["flag_values"].tolist(), status.attrs["flag_meanings"].split(), strict=True))
    assert words[int(status[-1])] == "blew_up"
    assert result.members["realization"].attrs["standard_name"] == "realization"


def test_what_was_not_asked_is_empty_and_what_is_unknown_is_told(tmp_path: Path) -> None:
    result = made_result(tmp_path, findings=[])
    assert len(result.bands) == 0
    with pytest.raises(AttributeError, match="bands has no 'T'; it has nothing"):
        result.bands.T  # noqa: B018
    with pytest.raises(KeyError, match=r"^bands has no 'T'; it has nothing$"):
        result.bands["T"]
    with pytest.raises(AttributeError, match="no 'band'"):
        result.band  # noqa: B018


def test_what_the_file_says_of_a_group_are_attributes_too(result: Result) -> None:
    assert result.limits["alarm_passed"].verdict == "not met"
    assert result.limits["alarm_passed"].accept == 0.01
    # Variables and groups come first: the root has an attribute of this name too.
    assert result.failures.attributes == {}
    with pytest.raises(KeyError, match=r"^limits has no 'alarm'; it has alarm_passed$"):
        result.limits["alarm"]
    with pytest.raises(AttributeError, match="first_time, and the attributes label, when, accept, verdict"):
        result.limits["alarm_passed"].verdikt  # noqa: B018


def test_a_group_shows_itself_shortly(result: Result) -> None:
    for group in (result, result.bands["T"], result.limits["alarm_passed"], result.limits, result.members):
        lines = repr(group).splitlines()
        assert len(lines) <= 16
        assert all(len(line) <= 110 for line in lines if "result.nc" not in line)
        assert "quantiles_low" not in repr(group)


def test_a_study_without_inputs_files_or_warnings(tmp_path: Path) -> None:
    study = made_study(inputs=type(INPUTS)(()), files={}, warnings=(), changes={})
    result = made_result(tmp_path, study, made_findings()[:4])
    assert len(result.inputs) == 0
    assert list(result.study) == ["text", "members"]


@pytest.mark.parametrize("name", ["realization", "input", "input_", "quantile", "status", "watched", "side", "mean"])
def test_a_quantity_may_be_called_like_a_coordinate(tmp_path: Path, name: str) -> None:
    findings = []
    for each in made_findings():
        variables = each.variables
        if each.group == "members/watched":
            variables = {name: variables["T"], "input__x": variables["T"]}
        findings.append(Finding(each.group.replace("/T", f"/{name}"), variables))
    result = made_result(tmp_path, findings=findings)
    stored = name + "_" if name in ("realization", "input", "input_", "quantile") else name
    assert result.bands[stored].quantiles.dims == ("quantile", "time")
    with xarray.open_datatree(result.path) as tree:
        np.testing.assert_array_equal(tree[f"members/watched/{stored}"].values, result.members.watched[stored].values)
        np.testing.assert_array_equal(tree[f"bands/{stored}/mean"].values, result.bands[stored]["mean"].values)


def test_a_result_shows_itself(result: Result) -> None:
    text = repr(result)
    assert "hold-tank: Cooling outage at a hold tank" in text
    assert "bands: T, x" in text
    assert "seed 11" in text
    assert "quantiles(quantile 5, time 13)" in repr(result.bands["T"])
    assert "verdict = not met" in repr(result.limits["alarm_passed"])
    assert "quantiles" in dir(result.bands["T"])


def test_the_file_has_the_order_of_the_study(result: Result) -> None:
    assert list(result.bands) == ["T", "x"]
    assert list(result.ranking) == ["T", "x", "peak_T", "alarm_passed"]


def test_a_finding_may_tell_more_of_itself_than_the_study() -> None:
    groups = encode(contents(made_study(), made_findings(), made_facts()))
    attributes = {group.path: group.attributes for group in groups}
    assert attributes["limits/alarm_passed"] == {
        "label": "Alarm temperature passed",
        "when": "T > alarm",
        "accept": 0.01,
        "verdict": "not met",
    }
    assert attributes["bands/T"] == {"label": "Tank temperature", "unit": "K"}


def test_reading_for_a_report_loads_no_xarray(result: Result) -> None:
    program = (
        "import sys; from uq.store.open import open_result\n"
        "from uq.report.summary import summary; from uq.report.machine import result_json\n"
        f"result = open_result({str(result.path)!r}); summary(result); result_json(result); repr(result)\n"
        "assert not {'xarray', 'pandas', 'numba', 'llvmlite', 'dask'} & set(sys.modules), sorted(sys.modules)"
    )
    done = subprocess.run([sys.executable, "-c", program], capture_output=True, text=True, check=False, cwd=Path(__file__).parent.parent)
    assert done.returncode == 0, done.stderr

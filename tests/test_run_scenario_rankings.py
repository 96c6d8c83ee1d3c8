"""Rankings of scenarios: their design is that of the study's inputs, whatever the scenario fixes, and their shares are their own."""

from __future__ import annotations

from collections.abc import Mapping
from pathlib import Path

import numpy as np
import pytest

import uq
from uq.store.result import Result
from uq.study.read import parse_study

STUDY = """
schema = 1
[time]
stop = 2
points = 3
[states.y]
start = 0
rate = "RATE"
[parameters]
d = { normal = { mean = 3, sd = 0.5 } }
a = { normal = { mean = 1, sd = 1 } }
b = { normal = { mean = 2, sd = 2 } }
c = { normal = { mean = 3, sd = 1.5 } }
[plan]
members = 4096
ask = ["ranking"]
[scenarios.s]
change = { "parameters.d" = 3 }
"""
CORRELATED = '[[dependence]]\nbetween = ["a", "b"]\nnormal_correlation = 0.5\n'
# Shares of a + b + c with standard deviations 1, 2 and 1.5.
PLAIN = {"d": 0.0, "a": 1 / 7.25, "b": 4 / 7.25, "c": 2.25 / 7.25}
# With correlation 0.5 of a and b their part is 7 of 9.25; a alone has 0.75 of it given b, b alone 3 given a.
SHARED = {"d": 0.0, "a": (0.75 + 7 - 3) / 2 / 9.25, "b": (3 + 7 - 0.75) / 2 / 9.25, "c": 2.25 / 9.25}


def run(folder: Path, text: str, files: Mapping[str, bytes] | None = None) -> Result:
    return uq.run(parse_study(text, name="s", files=files), folder / "r")


def shares(result: Result, kind: str, of: str = "input") -> dict[str, float]:
    """Of the scenario, by name."""
    found = result.findings["scenarios/s/ranking/y"].variables
    names = found["group"].data if of == "group" else result.findings[""].variables["input"].data
    return dict(zip(map(str, names), map(float, found[f"{kind}_overall"].data), strict=True))


def summed(text: str, *more: str) -> str:
    return text.replace("RATE", " + ".join(("d", "a", "b", "c", *more)))


@pytest.mark.parametrize(("more", "kind", "exact"), [("", "total", PLAIN), (CORRELATED, "shapley", SHARED)])
def test_a_scenario_that_fixes_the_first_input_has_the_shares_of_the_others(
    tmp_path: Path, more: str, kind: str, exact: dict[str, float]
) -> None:
    assert shares(run(tmp_path, summed(STUDY) + more), kind) == pytest.approx(exact, abs=0.03)


@pytest.mark.parametrize("fixed", ["d", "a"])
def test_groups_keep_their_inputs(tmp_path: Path, fixed: str) -> None:
    """The group has a and c; where the scenario fixes one of them, the other is what is left of it."""
    text = summed(STUDY).replace('"parameters.d" = 3', f'"parameters.{fixed}" = 3')
    text = text.replace("a = { normal", 'a = { group = "G", normal').replace("c = { normal", 'c = { group = "G", normal')
    variances = {"d": 0.25, "a": 1.0, "b": 4.0, "c": 2.25, fixed: 0.0}
    exact = (variances["a"] + variances["c"]) / sum(variances.values())
    result = run(tmp_path, text)
    assert shares(result, "total_group", "group") == pytest.approx({"G": exact}, abs=0.03)
    assert shares(result, "first_group", "group") == pytest.approx({"G": exact}, abs=0.06)


def test_a_joint_sample_behind_a_fixed_input_is_one_unit(tmp_path: Path) -> None:
    rng = np.random.default_rng(1)
    rows = rng.normal(size=(500, 2)) @ np.array([[1.0, 0.5], [0.0, 1.0]])
    table = "a,b\n" + "".join(f"{one!r},{other!r}\n" for one, other in rows.tolist())
    text = summed(STUDY) + '[[dependence]]\nfile = "j.csv"\ncolumns = { a = "a", b = "b" }\n'
    for line in ("a = { normal = { mean = 1, sd = 1 } }", "b = { normal = { mean = 2, sd = 2 } }"):
        text = text.replace(line, f"{line[0]} = {{}}")
    result = run(tmp_path, text, {"j.csv": table.encode()})
    pair = float(rows.sum(axis=1).var())
    found = shares(result, "shapley")
    assert np.isnan([found["a"], found["b"]]).all()
    assert [found["d"], found["c"]] == pytest.approx([0.0, 2.25 / (2.25 + pair)], abs=0.03)
    assert shares(result, "shapley_group", "group") == pytest.approx({"a+b": pair / (2.25 + pair)}, abs=0.03)


def test_more_units_than_all_sets_can_be_taken_of(tmp_path: Path) -> None:
    names = [f"e{place}" for place in range(8)]
    text = summed(STUDY, *names).replace("members = 4096", "members = 1024")
    text = text.replace("[plan]", "".join(f"{name} = {{ normal = {{ mean = 0, sd = 1 }} }}\n" for name in names) + "[plan]") + CORRELATED
    found = shares(run(tmp_path, text), "shapley")
    whole = 9.25 + len(names)
    exact = {name: share * 9.25 / whole for name, share in SHARED.items()} | dict.fromkeys(names, 1 / whole)
    assert found == pytest.approx(exact, abs=0.05)
    assert sum(found.values()) == pytest.approx(1.0)


def test_a_scenario_ranks_as_its_own_study_would(tmp_path: Path) -> None:
    """Where the scenario changes a number only, its rankings have the bits of the study so written."""
    text = (summed(STUDY) + CORRELATED).replace('"parameters.d" = 3', '"parameters.d.normal.mean" = 4')
    result = run(tmp_path / "with", text)
    alone = run(tmp_path / "alone", text.split("[scenarios.s]")[0].replace("mean = 3, sd = 0.5", "mean = 4, sd = 0.5") + CORRELATED)
    for name, variable in alone.findings["ranking/y"].variables.items():
        np.testing.assert_array_equal(variable.data, result.findings["scenarios/s/ranking/y"].variables[name].data, err_msg=name)

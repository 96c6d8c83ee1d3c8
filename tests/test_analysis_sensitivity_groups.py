"""Ranking by groups of independent inputs: against closed forms, and against a second implementation fed with the same rows."""

from __future__ import annotations

from dataclasses import replace

import numpy as np
import pytest
from SALib.analyze import sobol as salib

from tests.analysis_models import number
from tests.sensitivity_coverage import expected, group_model
from tests.sensitivity_models import design_of
from uq.analysis.ask import InputGroup

KINDS = ("first", "total")


def test_groups_agree_with_closed_forms() -> None:
    model, _ = group_model()
    found = model.forecast(design_of(model, 1, 256))["ranking/y0"]
    for kind in KINDS:
        value, low, high = (number(found, f"{kind}_group_overall{end}") for end in ("", "_low", "_high"))
        truth = expected("groups", kind)
        assert (np.abs(value - truth) <= 2.5 * (high - low) / 2).all()
        assert value == pytest.approx(truth, abs=0.01)
        assert number(found, f"{kind}_group")[:, 0] == pytest.approx(truth, abs=0.01)
    assert found.variables["first_group"].dims == ("group", "time")
    assert found.variables["total_group_overall"].dims == ("group",)
    assert found.variables["group"].data.tolist() == ["G1", "G2"]


def test_a_group_of_one_input_has_its_indices_to_the_bit() -> None:
    model, _ = group_model()
    found = model.forecast(design_of(model, 1, 16))["ranking/y0"]
    for kind in KINDS:
        assert number(found, f"{kind}_group")[1].tobytes() == number(found, kind)[2].tobytes()


def test_a_group_of_everything_explains_everything() -> None:
    model, _ = group_model()
    sets = ((0,), (1,), (2,), (0, 1, 2))
    whole = replace(model, sets=sets, groups=(InputGroup("all", (0, 1, 2)),))
    found = whole.forecast(design_of(whole, 1, 64))["ranking/y0"]
    for kind in KINDS:
        assert number(found, f"{kind}_group_overall")[0] == pytest.approx(1.0, abs=0.02)


def test_without_groups_nothing_is_said_of_groups() -> None:
    model, _ = group_model()
    found = replace(model, groups=()).forecast(design_of(model, 1, 16))["ranking/y0"]
    assert not [name for name in found.variables if "group" in name]


def test_a_second_implementation_fed_with_our_rows_says_the_same() -> None:
    model, _ = group_model()
    design = design_of(model, 7, 64)
    found = model.forecast(design)["ranking/y0"]
    parts = [model.solve(model.members(design.base(block))).values[:, 0, 0].reshape(6, -1) for block in design.blocks(0, 64, 64)]
    a, b, *mixed = np.concatenate(parts, axis=1)
    mean = np.concatenate([a, b]).mean()
    group = mixed[3]
    assert number(found, "first_group")[0, 0] == pytest.approx(
        float(np.squeeze(salib.first_order(a - mean, group - mean, b - mean))), rel=1e-9
    )
    assert number(found, "total_group")[0, 0] == pytest.approx(float(np.squeeze(salib.total_order(a, group, b))), rel=1e-9)

"""Observations beside the forecast: where in it they lie, and the share of them inside the band."""

from __future__ import annotations

from dataclasses import replace

import numpy as np
import pytest

from tests.analysis_models import number
from tests.sensitivity_coverage import measured_model
from tests.sensitivity_models import Dependent, design_of, linear
from uq.analysis.ask import Measured
from uq.analysis.policy import WITHHELD


def test_shares_at_or_below_the_observations() -> None:
    model, truths = measured_model()
    found = model.forecast(design_of(model, 1, 256))["measured/y0"]
    truth = truths["measured/y0", "below"]
    value, low, high = (number(found, f"below{end}") for end in ("", "_low", "_high"))
    assert (np.abs(value - truth) <= 2.5 * (high - low) / 2).all()
    assert number(found, "value").tolist() == [-2.0, 0.3, 1.2, 0.3]
    assert number(found, "time_measured").tolist() == [0.0, 1.0, 1.0, 1.0]
    # -2 lies below the 5 % quantile, the other three between it and the 95 % quantile.
    assert number(found, "share_inside") == 0.75
    # Exact binomial ends (Clopper and Pearson) for 3 of 4: never of no width, however clear the place of each.
    assert number(found, "share_inside_low") == pytest.approx(0.1941, abs=1e-4)
    assert number(found, "share_inside_high") == pytest.approx(0.9937, abs=1e-4)
    assert found.variables["share_inside"].attributes["share"] == 0.9


def test_without_error_inside_is_between_the_quantiles_of_the_band() -> None:
    rng = np.random.default_rng(3)
    values = tuple(float(each) for each in rng.normal(size=40) * 1.5)
    model = Dependent(
        np.zeros(1), np.eye(1), linear([1.0]), dependent=False, sets=((0,),), measured=(Measured(0, (1.0,) * 40, values, (0.0,) * 40),)
    )
    found = model.forecast(design_of(model, 1, 64))
    quantiles = number(found["bands/y0"], "quantiles")[:, 1]
    inside = (np.array(values) >= quantiles[0]) & (np.array(values) < quantiles[2])
    assert number(found["measured/y0"], "share_inside") == inside.mean()
    low, high = (float(number(found["measured/y0"], f"share_inside_{end}")) for end in ("low", "high"))
    assert low <= inside.mean() <= high


def test_a_large_error_of_measurement_makes_the_band_wider() -> None:
    far = Measured(0, (1.0,), (4.0,), (0.0,))
    model = Dependent(np.zeros(1), np.eye(1), linear([1.0]), dependent=False, sets=((0,),), measured=(far,))
    assert number(model.forecast(design_of(model, 1, 64))["measured/y0"], "share_inside") == 0.0
    rough = replace(model, measured=(replace(far, sd=(5.0,)),))
    assert number(rough.forecast(design_of(model, 1, 64))["measured/y0"], "share_inside") == 1.0


def test_failed_members_count_both_ways() -> None:
    observed = Measured(0, (0.0, 1.0), (0.0, 0.0), (0.0, 0.5))
    model = Dependent(
        np.zeros(1),
        np.eye(1),
        linear([1.0]),
        dependent=False,
        sets=((0,),),
        measured=(observed,),
        fails=lambda x: np.where(x[:, 0] > 1.0, 0.5, np.inf),
    )
    found = model.forecast(design_of(model, 1, 64))["measured/y0"]
    value, low, high = (number(found, f"below{end}") for end in ("", "_if_low", "_if_high"))
    assert low[0] == high[0] == value[0]
    assert high[1] - low[1] == pytest.approx(0.1587, abs=0.01)
    refused = model.forecast(design_of(model, 1, 64), failures="refuse")["measured/y0"]
    assert np.isnan(number(refused, "share_inside"))
    assert refused.variables["share_inside"].attributes["reason"] == WITHHELD


def test_the_same_bits_for_any_blocks() -> None:
    model, _ = measured_model()
    design = design_of(model, 4, 32)
    ask = model.complete(design)
    found = [
        {each.group: each for each in model.tallied(design, ask, design.blocks(0, 32, size)).findings(ask)}["measured/y0"]
        for size in (32, 4, 1)
    ]
    for name, variable in found[0].variables.items():
        assert variable.data.tobytes() == found[1].variables[name].data.tobytes() == found[2].variables[name].data.tobytes()

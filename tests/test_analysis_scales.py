"""Outputs so small or so large that their squares are no doubles: the same answers to the bit, in another unit."""

from __future__ import annotations

from dataclasses import replace

import numpy as np
import pytest

from tests.analysis_models import Model, folded, forecast, gaussian, number, tallied
from tests.sensitivity_models import Dependent, design_of
from uq.analysis.differences import OWN, SHARED, Run, differences
from uq.analysis.finding import Finding
from uq.analysis.tallies import Tallies
from uq.design.design import Design

# Powers of two near 1e-170 and 1e160: an output times that is the same output, exactly.
FACTORS = (2.0**-565, 2.0**532)
DESIGN = Design(("p", "q"), 6, 64)


def model(factor: float) -> Model:
    """10 + z0 + t z1 times the factor, watched and as an outcome at time 2."""

    def values(u: np.ndarray, times: np.ndarray) -> np.ndarray:
        return gaussian(u, times) * factor

    return Model(("p", "q"), (0.0, 1.0, 2.0), values, outcomes=lambda u: values(u, np.array([2.0]))[:, 0], outcome_names=("o",))


def same(one: dict[str, Finding], other: dict[str, Finding], factor: float) -> None:
    """Numbers in the quantity's unit differ by the factor, all others not at all."""
    assert one.keys() == other.keys()
    for group, finding in one.items():
        for name, variable in finding.variables.items():
            if variable.data.dtype.kind != "f":
                continue
            times = factor if variable.unit == "K" else 1.0
            assert np.array_equal(variable.data * times, other[group].variables[name].data, equal_nan=True), (group, name)


@pytest.mark.parametrize("factor", FACTORS)
@pytest.mark.parametrize("keep_bytes", [512_000_000, 0])
def test_bands_outcomes_and_rankings(factor: float, keep_bytes: int) -> None:
    found = [forecast(model(each), DESIGN, keep_bytes=keep_bytes, members=DESIGN.members) for each in (1.0, factor)]
    same(found[0], found[1], factor)
    for group, name in (("bands/T", "sd"), ("bands/T", "mean"), ("outcomes/o", "sd")):
        low, high = (number(found[1][group], f"{name}{end}") for end in ("_low", "_high"))
        assert (low > 0).all()
        assert (low < high).all()
    assert np.isfinite(number(found[1]["ranking/T"], "first")).all()
    assert np.isfinite(number(found[1]["ranking/o"], "total")).all()


@pytest.mark.parametrize("factor", FACTORS)
def test_shapley_effects_and_first_order_of_dependent_inputs(factor: float) -> None:
    def values(times: float) -> Dependent:
        return Dependent(
            np.zeros(2),
            np.array([[1.0, 0.6], [0.6, 1.0]]),
            lambda x, t: ((x[:, 0] + 2 * x[:, 1])[:, None, None] * np.ones(len(t))) * times,
            take=lambda x: (x[:, 0] + 2 * x[:, 1]) * times,
        )

    found = [made.forecast(design_of(made, 3, 64)) for made in (values(1.0), values(factor))]
    same(found[0], found[1], factor)
    assert np.isfinite(number(found[1]["ranking/y0"], "shapley_overall")).all()
    assert np.isfinite(number(found[1]["ranking/o"], "first")).all()


@pytest.mark.parametrize("factor", FACTORS)
@pytest.mark.parametrize("draws", [SHARED, OWN], ids=lambda draws: draws.name)
def test_differences(factor: float, draws) -> None:  # type: ignore[no-untyped-def]
    def run(factor: float, seed: int, shift: float) -> Run:
        made, design = model(factor), replace(DESIGN, seed=seed, ranked=False, sets=())
        moved = replace(made, values=lambda u, times: (gaussian(u, times) * (1 + shift)) * factor)
        ask = replace(complete_ask(moved, design), questions=("bands", "outcomes"))
        return Run(ask, folded(tallied(moved, design, ask, design.blocks(0, 64, 64))))

    found = []
    for each in (1.0, factor):
        pair = run(each, 6, 0.0), run(each, 6 if draws is SHARED else 7, 0.125)
        found.append({finding.group: finding for finding in differences(*pair, draws)})
    same(found[0], found[1], factor)
    assert (number(found[1]["bands/T"], "sd_low") < number(found[1]["bands/T"], "sd_high")).all()


def complete_ask(made: Model, design: Design):  # type: ignore[no-untyped-def]
    from uq.analysis.pilot import pilot_ask

    return pilot_ask(made.ask(questions=("bands", "outcomes")), made.solve(design.pilot()), 1e-6)


def test_units_are_kept_with_the_sums() -> None:
    ask = complete_ask(model(FACTORS[0]), DESIGN)
    parts = tallied(model(FACTORS[0]), DESIGN, ask, DESIGN.blocks(0, 64, 32))
    again = [Tallies.of_arrays(ask, part.arrays()) for part in parts]
    same(*({finding.group: finding for finding in folded(each).findings(ask)} for each in (parts, again)), 1.0)

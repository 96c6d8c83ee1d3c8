"""Whole studies against the outside where inputs depend on one another, and Sobol' indices against polynomial chaos.

Fifteen statistical values at 1e-5 each; the seeds are fixed.
"""

from __future__ import annotations

import warnings
from pathlib import Path

import numpy as np
import pytest

import uq
from tests.reference import Case, agrees, found, load

TIMES = (0.5, 1.0, 2.0, 4.0)
ORDER = 6
DECAY = """
schema = 1
title = "Decay with a source"
[time]
stop = 4
at = [0.5, 1, 2, 4]
[states.x]
start = { uniform = { low = 1, high = 3 } }
rate = "source - k * x"
[parameters]
k = { uniform = { low = 0.4, high = 1.2 } }
source = { normal = { mean = 0.6, sd = 0.15 } }
[plan]
seed = 20261201
members = 16384
accuracy = 1e-8
ask = ["ranking"]
watch = ["x"]
"""


@pytest.mark.parametrize("case", load("propagation_dependent.toml"), ids=lambda case: case.name)
def test_correlated_comparison_loss_agrees_with_exact_answers(case: Case, tmp_path: Path) -> None:
    path = tmp_path / f"{case.name}.toml"
    path.write_text(case.study, encoding="utf-8")
    study = uq.read_study(path)
    result = uq.run(study, folder=tmp_path / "result")
    values = [(expected, found(result, expected)) for expected in case.expect]
    wrong = [(expected, value) for expected, value in values if not agrees(expected, value, study.plan.members, 1e-8)]
    assert len(values) == 5
    assert not wrong, f"{case.source}: {wrong}"


def chaos_indices(order: int) -> tuple[np.ndarray, np.ndarray]:
    """First and total indices [input, time] of x(t; k, source, start), by polynomial chaos on Gauss quadrature of the closed form."""
    with warnings.catch_warnings():
        warnings.simplefilter("ignore")
        import chaospy

        joint = chaospy.J(chaospy.Uniform(0.4, 1.2), chaospy.Normal(0.6, 0.15), chaospy.Uniform(1, 3))
        nodes, weights = chaospy.generate_quadrature(order, joint, rule="gaussian")
        k, source, start = nodes[..., np.newaxis]
        courses = source / k + (start - source / k) * np.exp(-k * np.array(TIMES))
        chaos = chaospy.fit_quadrature(chaospy.generate_expansion(order, joint), nodes, weights, courses)
        return np.asarray(chaospy.Sens_m(chaos, joint)), np.asarray(chaospy.Sens_t(chaos, joint))


def test_sobol_indices_agree_with_polynomial_chaos(tmp_path: Path) -> None:
    first, total = chaos_indices(ORDER)
    # The reference itself has converged: two orders less change nothing that matters here (order 8 takes half a minute).
    for more, less in zip((first, total), chaos_indices(ORDER - 2), strict=True):
        np.testing.assert_allclose(more, less, atol=1e-4)
    path = tmp_path / "decay.toml"
    path.write_text(DECAY, encoding="utf-8")
    ranking = uq.run(path, folder=tmp_path / "result").ranking["x"]
    inputs = ["k", "source", "x_start"]
    for name, reference in (("first", first), ("total", total)):
        ours, low, high = (getattr(ranking, name + side).sel(input=inputs).values for side in ("", "_low", "_high"))
        assert ours.shape == reference.shape == (3, len(TIMES))
        allowed = 2 * (high - low) / 2 + 0.005
        assert np.all(np.abs(ours - reference) <= allowed), (name, ours, reference, allowed)
        # The allowance is no blank cheque.
        assert allowed.max() < 0.05

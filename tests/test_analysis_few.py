"""A mean or a deviation that rests on few members says so, one that does not says nothing."""

from __future__ import annotations

from dataclasses import replace

import numpy as np
import pytest
from scipy.special import ndtri

from tests.analysis_models import Model, forecast, number
from uq.analysis.finding import Finding
from uq.design.design import Design

TIMES = (0.0, 1.0)


def lognormal(sigma: float) -> Model:
    """exp(sigma z) from time 1 on, 1 before, and the same as an outcome; beside it a normal quantity."""

    def course(u: np.ndarray, times: np.ndarray) -> np.ndarray:
        z = ndtri(u)
        return np.stack([np.exp(sigma * z[:, :1] * times), z[:, 1:] + 0 * times], axis=1)

    return Model(("p", "q"), TIMES, course, ("T", "x"), lambda u: np.exp(sigma * ndtri(u[:, :1])), ("worst",))


def found(sigma: float, rows: int = 64, **changes: object) -> dict[str, Finding]:
    return forecast(lognormal(sigma), Design(("p", "q"), 3, rows, ranked=False), **{"questions": ("bands", "outcomes"), **changes})


@pytest.mark.parametrize("keep_bytes", [512_000_000, 0])
def test_a_deviation_that_rests_on_one_member_says_so(keep_bytes: int) -> None:
    groups = found(3.0, keep_bytes=keep_bytes, members=2048)
    u = np.concatenate([Design(("p", "q"), 3, 64, ranked=False).base(block) for block in Design(("p", "q"), 3, 64).blocks(0, 64, 64)])
    values = np.exp(3.0 * ndtri(u[:, 0]))
    share = np.max((values - values.mean()) ** 2) / np.sum((values - values.mean()) ** 2)
    assert share > 0.3
    for group, times in (("bands/T", " at 1 of 2 times"), ("outcomes/worst", "")):
        for name in ("mean", "sd"):
            said = groups[group].variables[name].attributes
            assert said["largest_share"] == pytest.approx(share, rel=5e-3)
            assert said["caution"].startswith(
                f"rests on few members{times}: one member alone makes up to {100 * share:.0f} % of the variance"
            )
    for name in ("mean", "sd"):
        assert "caution" not in groups["bands/x"].variables[name].attributes


def test_a_mean_is_believed_longer_than_a_deviation() -> None:
    # Share of one member between a tenth and a fifth.
    said = {name: found(1.0, 256)["outcomes/worst"].variables[name].attributes for name in ("mean", "sd")}
    assert "caution" not in said["mean"]
    assert 0.1 < said["sd"]["largest_share"] < 0.2


def test_light_tails_and_withheld_numbers_say_nothing() -> None:
    for name in ("mean", "sd"):
        assert "caution" not in found(0.5, 256)["outcomes/worst"].variables[name].attributes
    model = replace(lognormal(3.0), fails=lambda u: np.where(u[:, 0] < 0.1, 0.5, np.inf))
    lost = forecast(model, Design(("p", "q"), 3, 64, ranked=False), questions=("outcomes",))["outcomes/worst"]
    assert np.isnan(number(lost, "sd"))
    assert "caution" not in lost.variables["sd"].attributes

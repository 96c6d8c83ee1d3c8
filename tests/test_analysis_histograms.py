"""Values counted into bins: exact counts, quantiles within their stated error of exact ones, the same bits for any blocks.

Nothing here is left to chance beyond fixed seeds: what is compared are two ways of taking quantiles of the same members.
"""

from __future__ import annotations

from dataclasses import replace

import numpy as np
import pytest
from scipy.special import ndtri

from tests.analysis_models import Model, complete, folded, forecast, gaussian, number, tallied
from tests.test_analysis_tree import FAILING, same
from uq.analysis.ask import Scale
from uq.analysis.counting import SIDE
from uq.analysis.histograms import Bins, Histograms, Places, distances
from uq.analysis.memory import HISTOGRAM_BYTES, held_bytes
from uq.analysis.quantiles import Levels
from uq.design.design import Design

DESIGN = Design(("p", "q"), 7, 512)
SHAPES = {
    "normal": lambda z: z,
    "bimodal": lambda z: np.sign(z) * 5 + 0.3 * z,
    "twelve decades": lambda z: np.exp(12 * np.log(10) / (2 * 3.3) * z),
    "half atom": lambda z: np.maximum(z, 0.0),
    "mostly atom": lambda z: np.maximum(z - 2.5, 0.0),
    "offset": lambda z: 1e6 + 1e-3 * z,
    "both signs, heavy tails": lambda z: np.sinh(4 * z),
    "constant": lambda z: np.full_like(z, 4.0),
    "whole numbers": lambda z: np.round(3 * z),
}


def shaped(kind: str) -> Model:
    """One quantity at two times and one outcome, functions of a standard normal."""

    def values(u: np.ndarray, times: np.ndarray) -> np.ndarray:
        z = ndtri(u)
        return np.stack([SHAPES[kind](z[:, 0]), SHAPES[kind](z[:, 0] * 0.6 + z[:, 1] * 0.8)], axis=1)[:, None]

    return Model(("p", "q"), (0.0, 1.0), values, outcomes=lambda u: SHAPES[kind](ndtri(u[:, 1:2])), outcome_names=("o",))


@pytest.mark.parametrize("kind", SHAPES)
def test_quantiles_are_within_their_stated_error_of_exact_ones(kind: str) -> None:
    exact, binned = (forecast(shaped(kind), DESIGN, keep_bytes=keep, members=DESIGN.members) for keep in (10**9, 1000))
    for group in ("bands/T", "outcomes/o"):
        sure, found = number(exact[group], "quantiles"), number(binned[group], "quantiles")
        told = binned[group].variables["quantiles"].attributes
        assert (np.abs(found - sure) <= 1.01 * told["bin_error"] + 1e-12 * np.abs(sure)).all()
        width = sure[-1] - sure[0]
        # The twelfth decade is said to be coarser where it is.
        assert told["bin_error_share"] <= 1.001e-3
        assert (np.abs(found - sure) <= 1e-3 * width + 1e-12 * np.abs(sure)).all()
        # The ends are those of the exact interval, moved outwards by a bin at most.
        for end, sign in (("low", 1), ("high", -1)):
            gap = sign * (number(exact[group], f"quantiles_{end}") - number(binned[group], f"quantiles_{end}"))
            assert (gap >= -2 * told["bin_error"] - 1e-12 * np.abs(sure)).all()
            assert (gap <= 4e-3 * width + 1e-12 * np.abs(sure)).all()
    for group in ("bands/T", "ranking/T", "limits/hot"):
        if group in exact:
            for name in ("mean", "sd", "first", "total", "ever"):
                if name in exact[group].variables:
                    assert number(exact[group], name).tobytes() == number(binned[group], name).tobytes()
    near, far = (number(groups["bands/T"], "simultaneous") for groups in (exact, binned))
    assert near == pytest.approx(far, rel=1e-9, abs=2 * binned["bands/T"].variables["simultaneous"].attributes["bin_error"] + 1e-12)


def test_a_quantile_far_out_says_what_it_may_be_off() -> None:
    heavy = replace(shaped("twelve decades"), outcomes=None, outcome_names=())
    levels = (0.05, 0.5, 0.95, 0.9999)
    exact, binned = (forecast(heavy, DESIGN, keep_bytes=keep, members=DESIGN.members, quantiles=levels)["bands/T"] for keep in (10**9, 1))
    told = binned.variables["quantiles"].attributes
    assert told["bin_error_share"] > 1e-3
    assert (np.abs(number(exact, "quantiles") - number(binned, "quantiles")) <= told["bin_error"]).all()


@pytest.mark.parametrize("policy", ["bound", "exclude", "refuse"])
def test_failed_members_count_both_ways(policy: str) -> None:
    model = Model(("p", "q"), (0.0, 1.0, 2.0), gaussian, fails=lambda u: np.where(u[:, 0] > 0.95, 1.5, np.inf))
    exact, binned = (forecast(model, DESIGN, failures=policy, keep_bytes=keep, members=DESIGN.members)["bands/T"] for keep in (10**9, 1))
    assert exact.variables.keys() == {name for name in binned.variables if "_bin_error" not in name}
    for name, variable in exact.variables.items():
        found = number(binned, name)
        assert np.array_equal(np.isnan(found), np.isnan(variable.data)), name
        infinite = np.isinf(variable.data)
        assert np.array_equal(found[infinite], variable.data[infinite]), name
        rest = np.isfinite(variable.data)
        assert found[rest] == pytest.approx(variable.data[rest], abs=0.01), name


def test_members_without_a_value_are_left_out() -> None:
    model = Model(
        ("p",),
        (0.0,),
        lambda u, times: u[:, :, None],
        outcomes=lambda u: np.where(u < 0.25, np.nan, u),
        outcome_names=("o",),
    )
    found = forecast(model, Design(("p",), 3, 512), keep_bytes=1, members=10**6)["outcomes/o"]
    assert number(found, "quantiles") == pytest.approx(0.25 + 0.75 * np.array([0.05, 0.25, 0.5, 0.75, 0.95]), abs=2e-3)
    assert "quantiles_if_low" not in found.variables


def test_any_blocks_and_any_order_give_the_same_bits() -> None:
    design = Design(FAILING.inputs, 3, 64, replicates=4)
    ask = replace(complete(FAILING, design), keep_bytes=1, members=design.members)
    expected = folded(tallied(FAILING, design, ask, design.blocks(0, 64, 64))).findings(ask)
    rng = np.random.default_rng(1)
    for rows in (1, 8, 32):
        parts = tallied(FAILING, design, ask, design.blocks(0, 64, rows))
        while len(parts) > 1:
            left, right = (parts.pop(rng.integers(len(parts))) for _ in range(2))
            parts.append(left.merge(right))
        assert same(parts[0].findings(ask), expected)


def test_kept_or_counted_depends_on_the_whole_run_alone() -> None:
    ask = shaped("normal").ask(members=1024, keep_bytes=8 * 1024 * (1 * 3 + 1))
    assert ask.keeps
    assert not replace(ask, members=1025).keeps
    assert replace(ask, members=1025, questions=("limits", "ranking")).keeps


def test_counts_are_exact_and_edges_hold_their_values() -> None:
    rng = np.random.default_rng(5)
    x = np.concatenate([rng.normal(size=2000), np.sinh(40 * rng.normal(size=2000)), [3.0, 3.0, np.inf, -np.inf, np.nan, 1e300, -1e300]])
    scale = Scale(np.array([3.0]), np.array([0.7]))
    left, right = (Bins.of(part[:, None].copy(), part[:0, None].copy(), scale) for part in (x[:1500], x[1500:]))
    both, at_once = left.merge(right), Bins.of(x[:, None].copy(), x[:0, None].copy(), scale)
    for name in ("counts", "begin", "offset", "special", "ends"):
        assert np.array_equal(getattr(both, name), getattr(at_once, name)), name
    # Beyond 31 doublings of 4 + z there is no bin.
    far = np.isfinite(x) & (np.abs(x - 3.0) > 0.7 * 4 * (2.0**31 - 1))
    assert both.special[0].tolist() == [1, (far & (x < 0)).sum(), 2, (far & (x > 0)).sum(), 1, 1]
    assert far.sum() > 100
    places = Places.of([both], 0, scale)
    assert places.counts.sum() + places.missing[0] == len(x)
    reached = places.counts[0].cumsum()
    finite = np.sort(x[~np.isnan(x)])
    for place in np.flatnonzero(places.counts[0]):
        inside = finite[reached[place] - places.counts[0, place] : reached[place]]
        slack = np.where(np.isfinite(inside), 1e-12 * np.abs(inside), 0.0)
        assert (inside >= places.low[place] - slack).all()
        assert (inside <= places.high[place] + slack).all()


def test_bins_are_as_narrow_as_said() -> None:
    edges = distances(3072 + 512)
    widths = np.diff(edges)
    for z, width in ((0.0, 2.0**-8), (3.9, 2.0**-8), (5.0, 2.0**-7), (20.0, 2.0**-6), (40.0, 2.0**-2)):
        assert widths[np.searchsorted(edges, z, side="right") - 1] == width
    # The width from 5 to 95 % is four scales; where that of the pilot was too small, it reaches out to the quantile at least.
    near = edges[:-1] < 28
    assert (widths[near] / 2 <= 1e-3 * np.maximum(edges[:-1][near], 4.0)).all()


def test_nobody_left_is_missing() -> None:
    bins = Bins.of(np.full((8, 1), np.nan), np.full((8, 1), np.nan), Scale(np.zeros(1), np.ones(1)))
    found = Histograms(Scale(np.zeros(1), np.ones(1)), {0: bins, 1: bins}).quantiles(0, 1, Levels((0.05, 0.5), 0.95))
    assert np.isnan(found.success.value).all()
    assert (found.if_low.low == -np.inf).all()
    assert (found.if_high.high == np.inf).all()


@pytest.mark.parametrize("keep", [10**9, 1])
def test_memory_is_as_said(keep: int) -> None:
    assert HISTOGRAM_BYTES >= 4 * 2 * SIDE
    design = Design(FAILING.inputs, 3, 64, replicates=4)
    ask = complete(FAILING, design, keep_bytes=keep, members=design.members)
    held = folded(tallied(FAILING, design, ask, design.blocks(0, 64, 16)))
    counted = {path: array.nbytes for path, array in held.arrays().items() if path.split("/")[0] not in ("members", "failures")}
    taken, said = sum(counted.values()), held_bytes(ask, 4)
    # Of histograms the bound is loose: 256 members do not use all bins.
    assert taken <= said
    assert taken > 0.8 * said or keep == 1

"""Mistakes that a hand-written script makes quietly, one test each: this tool does not make them.

Not here: intervals from independent replicates (test_analysis_coverage, test_analysis_sensitivity_coverage), pulses (test_solve_breaks),
broken writing (test_store_folder, test_run_resume).
"""

from __future__ import annotations

import math
from pathlib import Path

import numpy as np
import pytest

import uq
from uq.errors import StorageError
from uq.store.result import Result

DECAY = """
schema = 1
title = "Decay"
[time]
stop = 4
at = [0, 1, 2, 4]
[states.x]
start = 1
rate = "-a * x"
[parameters]
a = { lognormal = { median = 0.5, gsd = 1.5 } }
b = { normal = { mean = 1, sd = 0.1 } }
c = { normal = { mean = 0, sd = 1 }, truncate = [0, 10] }
[terms]
signal = "x * b"
lifted = "1e6 + x * b"
[outcomes.last]
take = "final(x)"
[outcomes.a]
take = "a"
[outcomes.c]
take = "c"
[plan]
watch = ["x", "signal", "lifted"]
members = 3000
"""


def run(text: str, folder: Path, name: str = "study", threads: int = 0) -> Result:
    path = folder / f"{name}.toml"
    path.write_text(text, encoding="utf-8")
    return uq.run(path, folder / name, threads=threads)


@pytest.fixture(scope="module")
def decay(tmp_path_factory: pytest.TempPathFactory) -> Result:
    return run(DECAY, tmp_path_factory.mktemp("decay"))


def same(one: Result, other: Result) -> bool:
    return all(np.array_equal(one.bands[name].quantiles.values, other.bands[name].quantiles.values) for name in ("x", "signal"))


def test_1_rows_mixed_for_the_ranking_are_no_members_of_the_bands(decay: Result, tmp_path: Path) -> None:
    plain = run(DECAY + 'ask = ["bands", "outcomes"]\n', tmp_path)
    assert same(decay, plain)
    for side in ("quantiles_low", "quantiles_high", "mean_low", "mean_high"):
        np.testing.assert_array_equal(getattr(decay.bands["x"], side).values, getattr(plain.bands["x"], side).values)
    assert decay.attributes["members"] == plain.attributes["members"]
    assert decay.attributes["solves"] > plain.attributes["solves"]


FLAMES = """
schema = 1
title = "Some escape"
[time]
stop = 4
at = [0, 4]
[states.flame]
start = 1
rate = "escape * flame**2"              # at infinity at time 1 / escape
[parameters]
escape = { uniform = { low = 0, high = HIGH } }
a = { normal = { mean = 0, sd = 1 } }
b = { normal = { mean = 0, sd = 1 } }
[terms]
y = "a + 2 * b + escape * 4"
[limits.high]
when = "y > 1e9"
[plan]
seed = 3
watch = ["y"]
members = 16384
"""


def test_2_failed_members_are_never_dropped(tmp_path: Path) -> None:
    """One in ten escapes, those with the largest `escape`. Whether y > 1e9 with them is not known, and the interval says so."""
    result = run(FLAMES.replace("HIGH", repr(0.25 / 0.9)), tmp_path)
    members, failed = result.attributes["members"], result.attributes["members_failed"]
    assert members == 16384
    assert failed == pytest.approx(0.1 * members, rel=0.02)
    # Of every solve the ending is known, those for the ranking counted.
    assert int(result.failures["count"].sum()) == result.attributes["solves"]
    assert float(result.limits["high"].ever_low[-1]) <= 0.001
    assert float(result.limits["high"].ever_high[-1]) >= failed / members
    bands = result.bands["y"]
    assert np.all(bands.quantiles_if_low.values[:, -1] < bands.quantiles_if_high.values[:, -1])
    ranking = result.ranking["y"]
    assert np.isnan(ranking.first.values[:, -1]).all()
    assert np.isfinite(ranking.first.values[:, 0]).all()


def test_2_indices_keep_to_whole_rows_where_few_members_fail(tmp_path: Path) -> None:
    """Had rows slipped against each other behind the first that is lost, indices would be near 0; they are 1/5 and 4/5."""
    result = run(FLAMES.replace("HIGH", repr(0.25 / 0.9998)).replace(" + escape * 4", ""), tmp_path)
    assert 0 < result.attributes["members_failed"] < 16
    ranking = result.ranking["y"]
    for name, exact in (("a", 0.2), ("b", 0.8), ("escape", 0.0)):
        assert float(ranking.first.sel(input=name)[-1]) == pytest.approx(exact, abs=0.02)
        assert float(ranking.total.sel(input=name)[-1]) == pytest.approx(exact, abs=0.02)


def test_4_members_are_a_power_of_two_and_no_draw_is_infinite(decay: Result) -> None:
    assert decay.attributes["members"] == 4096
    assert decay.attributes["members_failed"] == 0
    for name in ("x", "signal"):
        bands = decay.bands[name]
        assert np.isfinite(bands.mean.values).all()
        assert np.isfinite(bands.sd.values).all()
    # A fair half of the draws on each side of the median: nothing is skipped, thinned or drawn at 0.
    assert float(decay.outcomes["a"].quantiles.sel(quantile=0.5)) == pytest.approx(0.5, rel=1e-3)


def test_5_where_nothing_varies_there_is_no_index(decay: Result) -> None:
    ranking = decay.ranking["x"]
    for index in (ranking.first, ranking.total):
        assert np.isnan(index.sel(time=0).values).all()
        assert np.isfinite(index.sel(time=[1, 2, 4]).values).all()
    assert float(decay.bands["x"].sd[0]) == 0.0


def test_5_a_large_offset_changes_no_index_and_below_the_accuracy_there_is_none(decay: Result, tmp_path: Path) -> None:
    """A signal of 0.1 on 1e6: found by a solver of 1e-9; one of 1e-6 may be off by 1 there, and no index of round-off is given."""
    fine = run(DECAY + "accuracy = 1e-9\n", tmp_path)
    plain, lifted = fine.ranking["signal"], fine.ranking["lifted"]
    for name in ("first", "total", "first_low", "first_high", "total_low", "total_high"):
        np.testing.assert_allclose(getattr(lifted, name).values, getattr(plain, name).values, rtol=1e-6, atol=1e-7)
    np.testing.assert_allclose(fine.bands["lifted"].sd.values, fine.bands["signal"].sd.values, rtol=1e-6)
    coarse = decay.ranking["lifted"].first
    assert np.isnan(coarse.values).all()
    assert "noise of the solver" in coarse.attrs["reason"]


def test_6_seed_zero_is_a_seed_like_any_other(decay: Result, tmp_path: Path) -> None:
    zero, one = run(DECAY + "seed = 0\n", tmp_path, "zero", threads=1), run(DECAY + "seed = 1\n", tmp_path, "one")
    assert zero.attributes["seed"] == 0
    # The default is 0, and no thread has a seed of its own.
    assert same(zero, decay)
    assert not same(one, zero)


PULSE = """
schema = 1
title = "Each at a time of its own"
[time]
stop = 10
points = 201
[states.nothing]
start = 0
rate = "0"
[parameters]
moment = { uniform = { low = 1, high = 9 } }
[terms]
pulse = "exp(-((time - moment) / 0.2)**2)"
[limits.on]
when = "pulse > 0.5"
[plan]
ask = ["limits"]
members = 4096
"""


def test_8_ever_is_told_by_paths_and_not_by_the_worst_time(tmp_path: Path) -> None:
    """Every member is on for 0.333 about its own moment: 4 % of them at any time, all of them at some time."""
    on = run(PULSE, tmp_path).limits["on"]
    half = 0.2 * math.sqrt(math.log(2))
    assert float(on.now.max()) < 0.06
    assert float(on.now.sel(time=5, method="nearest")) == pytest.approx(2 * half / 8, abs=0.005)
    assert float(on.ever.sel(time=5, method="nearest")) == pytest.approx((5 + half - 1) / 8, abs=0.005)
    assert float(on.ever[-1]) == 1.0
    assert np.all(np.diff(on.ever.values) >= 0)


WAVES = """
schema = 1
title = "Waves"
[time]
stop = 6.283185307179586
points = 61
[states.nothing]
start = 0
rate = "0"
[parameters]
a = { normal = { mean = 0, sd = 1 } }
b = { normal = { mean = 0, sd = 1 } }
[terms]
wave = "a * sin(time) + b * cos(time)"
[plan]
ask = ["bands"]
watch = ["wave"]
members = 16384
"""


def test_9_a_band_for_whole_curves_is_another_and_a_wider_one(tmp_path: Path) -> None:
    """wave = r sin(t + phase), r^2 / 2 exponential: 90 % at each time within 1.645, 90 % of whole curves within sqrt(2 ln 10) = 2.146."""
    result = run(WAVES, tmp_path)
    bands = result.bands["wave"]
    pointwise = bands.quantiles.sel(quantile=[0.05, 0.95]).transpose("quantile", "time").values
    whole = bands.simultaneous.transpose("side", "time").values
    np.testing.assert_allclose(pointwise, [[-1.645] * 61, [1.645] * 61], rtol=0.03)
    # Its shape over time is that of a pilot of 256 draws, whose half-widths are about 7 % off: wide at each time, narrow on average.
    np.testing.assert_allclose(whole, [[-2.146] * 61, [2.146] * 61], rtol=0.25)
    assert np.mean(whole[1] - whole[0]) / 2 == pytest.approx(2.146, rel=0.05)
    assert np.all(whole[0] < pointwise[0])
    assert np.all(whole[1] > pointwise[1])
    assert "whole" in bands.simultaneous.attrs["long_name"]


def test_10_arguments_of_a_lognormal_and_means_of_cut_inputs_are_meant_as_written(decay: Result) -> None:
    a, c = decay.outcomes["a"], decay.outcomes["c"]
    levels = {0.05: -1.6448536269514722, 0.5: 0.0, 0.95: 1.6448536269514722}
    for level, score in levels.items():
        assert float(a.quantiles.sel(quantile=level)) == pytest.approx(0.5 * 1.5**score, rel=0.01)
    assert float(a["mean"]) == pytest.approx(0.5 * math.exp(math.log(1.5) ** 2 / 2), rel=0.003)
    # Half a normal: its mean is sqrt(2 / pi), not the 0 that was written.
    assert float(c["mean"]) == pytest.approx(math.sqrt(2 / math.pi), abs=0.003)
    assert float(decay.inputs["mean"].sel(input="c")) == pytest.approx(math.sqrt(2 / math.pi), rel=1e-9)


@pytest.mark.parametrize(("key", "of_ranks"), [("rank_correlation", 0.6), ("normal_correlation", 6 / math.pi * math.asin(0.3))])
def test_10_a_correlation_is_got_on_the_scale_on_which_it_was_asked(key: str, of_ranks: float, tmp_path: Path) -> None:
    """Between ranks: 6/pi asin(r/2) where r is that of the normal scores. Seen by a concordance: P(both above) = 1/4 + asin(r)/(2 pi)."""
    text = DECAY + f'ask = ["limits"]\n[limits.both]\nwhen = "a > 0.5 and b > 1"\n[[dependence]]\nbetween = ["a", "b"]\n{key} = 0.6\n'
    result = run(text, tmp_path)
    r = 2 * math.sin(math.pi * of_ranks / 6)
    assert float(result.limits["both"].now[-1]) == pytest.approx(0.25 + math.asin(r) / (2 * math.pi), abs=0.004)


def test_13_two_studies_of_one_name_do_not_overwrite_each_other(tmp_path: Path) -> None:
    text = PULSE.replace("201", "21")
    first = run(text, tmp_path)
    before = (tmp_path / "study" / "result.nc").read_bytes()
    with pytest.raises(StorageError):
        run(text.replace("high = 9", "high = 8"), tmp_path)
    assert (tmp_path / "study" / "result.nc").read_bytes() == before
    assert first.attributes["complete"] == 1


@pytest.mark.parametrize("keep", ["512 MB", "0.1 MB"])
def test_14_one_definition_of_quantiles_everywhere(keep: str, tmp_path: Path) -> None:
    """An outcome final(x) has the quantiles of the band at the last time: all digits where values are kept, else within the stated bins."""
    result = run(DECAY + f'keep = "{keep}"\n', tmp_path)
    band, last = result.bands["x"], result.outcomes["last"]
    binned = float(band.quantiles.attrs.get("bin_error", 0.0)) + float(last.quantiles.attrs.get("bin_error", 0.0))
    assert (binned > 0) == (keep != "512 MB")
    for name in ("quantiles", "quantiles_low", "quantiles_high"):
        np.testing.assert_allclose(getattr(last, name).values, getattr(band, name).values[:, -1], rtol=1e-12, atol=binned)

"""Stiff and sensitive problems with published end values, through study files: how far off, and how the error follows the accuracy.

Judged at the nominal member, by every state at every time of the case. The large swing is compared all along with elliptic functions.
"""

from __future__ import annotations

from functools import cache

import numpy as np
import pytest
from scipy.special import ellipj, ellipk

from tests.reference import Case, load
from tests.reference.nominal import errors, nominal
from uq.solve.batch import Status

CASES = {case.name: case for case in (*load("stiff_ivps.toml"), *load("deterministic_ivps.toml"))}
STIFF = [case.name for case in load("stiff_ivps.toml")]
# A hundred roundings: from there on the error need not fall.
ROUNDINGS = 100 * 2.0**-52
# Their stiff part is at once where it has to be, so the steps are as long as steps may be, a hundredth of the time, at every accuracy: what
# is left, 3e-8, is the extension between two of them, which no error estimate sees there.
LONGEST_STEPS = {"stiff-relaxation-on-its-target", "stiff-relaxation-off-its-target"}

# At 1e-6 its error happens to be 70 times below the accuracy: from there to 1e-8 it falls 18 times, from 1e-5 to 1e-9 3000 times.
HAPPENS_SMALL = {"air-pollution"}


@cache
def of(name: str, accuracy: float) -> np.ndarray:
    """Errors of a case in scales."""
    return errors(CASES[name], accuracy)


def allowed(case: Case, key: str, default: float = 0.0) -> np.ndarray:
    return np.array([expected.get(key, default) for expected in case.expect])


@pytest.mark.parametrize("accuracy", [1e-6, 1e-8])
@pytest.mark.parametrize("name", STIFF)
def test_errors_are_within_the_factor_of_the_case(name: str, accuracy: float) -> None:
    case = CASES[name]
    assert np.all(of(name, accuracy) <= allowed(case, "factor") * accuracy), case.source


@pytest.mark.parametrize("name", sorted(set(CASES) - LONGEST_STEPS - HAPPENS_SMALL))
def test_the_error_falls_twentyfold_with_a_hundredth_of_the_accuracy(name: str) -> None:
    coarse, fine = of(name, 1e-6), of(name, 1e-8)
    floor = np.maximum(allowed(CASES[name], "rounding"), ROUNDINGS)
    assert np.max(np.where(fine > floor, fine, 0.0)) <= np.max(coarse) / 20


@pytest.mark.parametrize("name", sorted(HAPPENS_SMALL))
def test_where_the_error_happens_to_be_small_it_falls_over_four_decades(name: str) -> None:
    assert np.max(of(name, 1e-6)) < 0.05 * 1e-6
    assert np.max(of(name, 1e-9)) <= np.max(of(name, 1e-5)) / 20**2


@pytest.mark.parametrize("name", sorted(LONGEST_STEPS))
def test_where_steps_are_as_long_as_may_be_the_error_is_far_below_what_is_asked(name: str) -> None:
    assert np.max(of(name, 1e-6)) < 0.5e-6


def test_without_negligible_parts_that_are_small_are_solved_by_the_largest_size_of_their_state() -> None:
    """The usual absolute tolerance is accuracy x largest size. Of the oregonator that is 0.1 for a state which is 1 when the next spike is
    made up; E5 asks for values far below it, whose sign is then open: its equations run away from a negative one, and that is said."""
    spikes, e5 = (CASES[name] for name in ("oregonator", "e5"))
    bare = Case(spikes.name, "", "", spikes.study.replace("negligible = 1e-09\n", ""), spikes.expect)
    assert np.max(errors(bare, 1e-6)) > 100 * np.max(of("oregonator", 1e-6))
    _, batch = nominal(Case(e5.name, "", "", e5.study.replace("negligible = 1e-24\n", ""), e5.expect), 1e-4)
    assert batch.status[0] == Status.blew_up
    assert 1e9 < batch.end_time[0] < 1e11
    _, batch = nominal(e5, 1e-4)
    assert batch.status[0] == Status.ok


@pytest.mark.parametrize("name", ["hires", "oregonator", "robertson", "van-der-pol-1000"])
def test_stiff_and_chosen_steps_give_the_same(name: str) -> None:
    assert np.all(errors(CASES[name], 1e-6, "stiff") <= allowed(CASES[name], "factor") * 1e-6)


# From 179 degrees the pendulum leaves its highest point slowly: an error grows with e^(w t), w = 3.1 / s, over the 2 s that this takes.
@pytest.mark.parametrize(("degrees", "factor"), [(90.0, 1e3), (179.0, 1e4)])
def test_a_large_swing_follows_elliptic_functions_all_along(degrees: float, factor: float) -> None:
    # sin(angle / 2) = m sn(K - w t | m^2), m = sin(start / 2), w = sqrt(g / L) (textbook; DLMF 22.19)
    start, gravity = np.radians(degrees), 9.80665
    m = np.sin(start / 2)
    times = np.linspace(0.0, 4 * ellipk(m * m) / np.sqrt(gravity), 41)
    text = f"""
schema = 1
[time]
stop = {float(times[-1])!r}
points = 41
[states.angle]
start = {float(start)!r}
rate = "speed"
[states.speed]
start = 0.0
rate = "-{gravity} * sin(angle)"
[parameters]
inert = {{ uniform = {{ low = 0.0, high = 1.0 }} }}
[plan]
members = 512
accuracy = ACCURACY
ask = ["bands"]
"""
    sn = ellipj(ellipk(m * m) - np.sqrt(gravity) * times, m * m)[0]
    found = [nominal(Case("swing", "", "", text, ()), accuracy)[1].values[0, 0] for accuracy in (1e-6, 1e-8)]
    coarse, fine = (np.max(np.abs(values - 2 * np.arcsin(m * sn))) for values in found)
    assert coarse < factor * start * 1e-6
    assert fine < factor * start * 1e-8
    assert fine < coarse / 20

"""The coefficient table proves itself: order conditions over all rooted trees, exactly."""

from __future__ import annotations

from dataclasses import replace
from fractions import Fraction

import numpy as np
import pytest

from uq.model.pair import Pair
from uq.model.tableau import DORMAND_PRINCE_54, DORMAND_PRINCE_853, PAIRS
from uq.model.trees import density, size, trees


def test_there_are_as_many_rooted_trees_as_published() -> None:
    # 1, 1, 2, 4, 9, 20, 48: number of rooted trees with n nodes (OEIS A000081; Hairer, Norsett, Wanner I, table II.2.1).
    assert [len(trees(n)) for n in range(1, 8)] == [1, 1, 2, 4, 9, 20, 48]
    assert all(size(tree) == 5 for tree in trees(5))


def test_density_of_tall_and_bushy_trees() -> None:
    tall, bushy = ((((),),),), ((), (), ())
    assert density(tall) == 24
    assert density(bushy) == 4


# What a wrong coefficient is off by: in exact fractions anything is seen, in decimals what is above their last printed digits.
OFF = {"explicit54": Fraction(1, 10**40), "explicit853": Fraction(1, 10**20)}


PARTS = [(pair, part) for pair in PAIRS for part in ("a", "c", "e", "d", "extra", "extra_c") if getattr(pair, part)]


@pytest.mark.parametrize(("pair", "part"), PARTS, ids=lambda value: getattr(value, "name", value))
def test_a_wrong_coefficient_is_refused(pair: Pair, part: str) -> None:
    rows = getattr(pair, part)
    off = OFF[pair.name]
    wrong = (*rows[:-1], rows[-1] + off if isinstance(rows[-1], Fraction) else (*rows[-1][:-1], rows[-1][-1] + off))
    with pytest.raises(ValueError, match=pair.name):
        replace(pair, **{part: wrong})


def test_every_coefficient_of_the_8_5_3_pair_but_its_extension_is_that_of_another_print_of_it() -> None:
    from scipy.integrate._ivp import dop853_coefficients as other

    pair = DORMAND_PRINCE_853
    for row, theirs in zip((*pair.a, *pair.extra), other.A, strict=True):
        assert [float(x) for x in row] == theirs[: len(row)].tolist()
        assert not theirs[len(row) :].any()
    assert [float(x) for x in (*pair.c, *pair.extra_c)] == other.C.tolist()
    for row, theirs in zip(pair.e, (other.E5, other.E3), strict=True):
        assert [float(x) for x in row] == pytest.approx(theirs[: len(row)].tolist(), abs=1e-16)


def test_two_wrong_coefficients_that_keep_the_row_sum_are_refused() -> None:
    row = list(DORMAND_PRINCE_54.a[5])
    row[1], row[2] = row[1] + Fraction(1, 997), row[2] - Fraction(1, 997)
    with pytest.raises(ValueError, match="order condition"):
        replace(DORMAND_PRINCE_54, a=(*DORMAND_PRINCE_54.a[:5], tuple(row), DORMAND_PRINCE_54.a[6]))


@pytest.mark.parametrize(
    ("pair", "claims"),
    [
        (DORMAND_PRINCE_54, ({"order": 6}, {"embedded_orders": (5,)}, {"extension_order": 5})),
        (DORMAND_PRINCE_853, ({"order": 9}, {"embedded_orders": (6, 3)}, {"embedded_orders": (5, 4)}, {"extension_order": 7})),
    ],
)
def test_orders_are_not_understated(pair: Pair, claims: tuple[dict[str, object], ...]) -> None:
    for claim in claims:
        with pytest.raises(ValueError, match="order condition"):
            replace(pair, **claim)


@pytest.mark.parametrize("pair", PAIRS, ids=lambda pair: pair.name)
def test_the_extension_meets_the_step_at_both_ends(pair: Pair) -> None:
    assert pair.extension(Fraction(0)) == (0,) * pair.all_stages
    assert pair.extension(Fraction(1)) == pair.padded((*pair.a[-1], Fraction(0)))


@pytest.mark.parametrize("pair", PAIRS, ids=lambda pair: pair.name)
def test_the_extension_has_the_rates_of_both_ends(pair: Pair) -> None:
    little = Fraction(1, 10**12)
    first, last = pair.extension(little), pair.extension(1 - little)
    whole = pair.extension(Fraction(1))
    slopes = [[w / little for w in first], [(v - w) / little for v, w in zip(whole, last, strict=True)]]
    for slope, stage in zip(slopes, (0, pair.stages - 1), strict=True):
        assert [float(w) for w in slope] == pytest.approx([float(k == stage) for k in range(pair.all_stages)], abs=1e-8)


def stages_of_a_linear_problem(pair: Pair, z: complex) -> np.ndarray:
    """All stages of y' = lambda y, y = 1, with z = h lambda, in units of lambda."""
    n = pair.all_stages
    a = np.zeros((n, n))
    for k, row in enumerate((*pair.a, *pair.extra)):
        a[k, : len(row)] = [float(x) for x in row]
    return np.linalg.solve(np.eye(n) - z * a, np.ones(n, complex))


def stability_region(pair: Pair, rays: int = 20, points: int = 60) -> list[complex]:
    """Points of the left half plane from which a step leads to no growth, up to the edge of the region, ray by ray."""
    weights, found = np.array([float(x) for x in pair.extension(Fraction(1))]), []
    for angle in np.linspace(np.pi / 2 + 0.02, np.pi, rays):
        for radius in np.linspace(0.5, 9.0, points):
            z = radius * np.exp(1j * angle)
            if abs(1 + z * (weights @ stages_of_a_linear_problem(pair, z))) > 1:
                break
            found.append(z)
    return found


@pytest.mark.parametrize(
    ("pair", "most"), [(DORMAND_PRINCE_54, 1.2), (DORMAND_PRINCE_853, 1.05)], ids=lambda value: getattr(value, "name", "")
)
def test_between_the_ends_of_a_stable_step_nothing_grows(pair: Pair, most: float) -> None:
    """A fast component is no part of the solution, but of every state of which stability sets the steps; the published extension of order 7
    of the 8(5,3) pair makes up to 31 times as much of it."""
    region = stability_region(pair)
    assert min(z.real for z in region) < (-3 if pair.order == 5 else -6)
    stages = np.array([stages_of_a_linear_problem(pair, z) for z in region])
    for theta in range(1, 20):
        weights = np.array([float(x) for x in pair.extension(Fraction(theta, 20))])
        assert np.max(np.abs(1 + region * (stages @ weights))) < most

"""The coefficient table proves itself: order conditions over all rooted trees, exactly."""

from __future__ import annotations

from dataclasses import replace
from fractions import Fraction

import pytest

from uq.model.tableau import DORMAND_PRINCE_54, density, size, trees


def test_there_are_as_many_rooted_trees_as_published() -> None:
    # 1, 1, 2, 4, 9, 20, 48: number of rooted trees with n nodes (OEIS A000081; Hairer, Norsett, Wanner I, table II.2.1).
    assert [len(trees(n)) for n in range(1, 8)] == [1, 1, 2, 4, 9, 20, 48]
    assert all(size(tree) == 5 for tree in trees(5))


def test_density_of_tall_and_bushy_trees() -> None:
    tall, bushy = ((((),),),), ((), (), ())
    assert density(tall) == 24
    assert density(bushy) == 4


@pytest.mark.parametrize("part", ["a", "c", "e", "d"])
def test_a_wrong_coefficient_is_refused(part: str) -> None:
    row = getattr(DORMAND_PRINCE_54, part)
    wrong = (*row[:-1], (*row[-1][:-1], row[-1][-1] + Fraction(1, 997))) if part == "a" else (*row[:-1], row[-1] + Fraction(1, 997))
    with pytest.raises(ValueError, match="explicit54"):
        replace(DORMAND_PRINCE_54, **{part: wrong})


def test_two_wrong_coefficients_that_keep_the_row_sum_are_refused() -> None:
    row = list(DORMAND_PRINCE_54.a[5])
    row[1], row[2] = row[1] + Fraction(1, 997), row[2] - Fraction(1, 997)
    with pytest.raises(ValueError, match="order condition"):
        replace(DORMAND_PRINCE_54, a=(*DORMAND_PRINCE_54.a[:5], tuple(row), DORMAND_PRINCE_54.a[6]))


def test_orders_are_not_understated() -> None:
    for claim in ({"order": 6}, {"embedded_order": 5}, {"extension_order": 5}):
        with pytest.raises(ValueError, match="order condition"):
            replace(DORMAND_PRINCE_54, **claim)


def test_the_extension_meets_the_step_at_both_ends() -> None:
    pair = DORMAND_PRINCE_54
    assert pair.extension(Fraction(0)) == (0,) * 7
    assert pair.extension(Fraction(1)) == (*pair.a[-1], 0)

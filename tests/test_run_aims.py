"""When enough rounds are done: decisions, values in and values out."""

from __future__ import annotations

from dataclasses import dataclass

import numpy as np
import pytest

from uq.analysis.precision import Headline, Round
from uq.running.aims import Aims, Spent, ending, last_ending
from uq.running.foretell import expected
from uq.running.history import history_arrays, history_of


@dataclass(frozen=True)
class Asked:
    quantiles: float | None = None
    probabilities: float | None = 0.01
    indices: float | None = None


def of_half_width(half: float, members: int = 2048, kind: str = "probabilities") -> Round:
    value = np.array([0.2, 0.3])
    number = Headline(
        "limits/L", "ever_by", kind, ("by",), value, value - half, value + half, np.ones(2), np.zeros(2, bool), "1", "probability"
    )  # type: ignore[arg-type]
    return Round(members, 4 * members, (number,))


WIDE, NARROW = of_half_width(0.02), of_half_width(0.005)
PRECISE = Asked()


@pytest.mark.parametrize(
    ("last", "aims", "spent", "why"),
    [
        (WIDE, Aims(), Spent(8192, 1.0, 8192), ""),
        (WIDE, Aims(PRECISE), Spent(8192, 1.0, 8192), ""),
        (NARROW, Aims(PRECISE), Spent(8192, 1.0, 8192), "reached"),
        (NARROW, Aims(PRECISE, solves=8192, seconds=0.5), Spent(8192, 1.0, 8192), "reached"),
        # The whole of the next round must fit.
        (WIDE, Aims(PRECISE, solves=16384), Spent(8192, 1.0, 8192), ""),
        (WIDE, Aims(PRECISE, solves=16383), Spent(8192, 1.0, 8192), "solves"),
        (WIDE, Aims(PRECISE, seconds=21.0), Spent(8192, 10.0, 8192), ""),
        (WIDE, Aims(PRECISE, seconds=19.0), Spent(8192, 10.0, 8192), "minutes"),
        # A round that is partly done takes less.
        (WIDE, Aims(PRECISE, seconds=16.0), Spent(8192, 10.0, 4096), ""),
    ],
)
def test_a_run_ends_when_it_is_precise_enough_or_another_round_cannot_be_paid(last: Round, aims: Aims, spent: Spent, why: str) -> None:
    assert ending([last], aims, spent) == why


def test_the_last_round_ends_a_run_in_any_case() -> None:
    assert last_ending([], Aims()) == ""
    assert last_ending([WIDE], Aims(PRECISE)) == "members"
    assert last_ending([NARROW], Aims(PRECISE)) == "reached"


def test_an_interval_of_no_width_around_a_constant_is_never_precise() -> None:
    headline = WIDE.headlines[0]
    constant = Headline(**{**vars(headline), "low": headline.value, "high": headline.value, "undefined": np.ones(2, bool)})
    assert ending([Round(2048, 8192, (constant,))], Aims(PRECISE), Spent(1, 1.0, 1)) == ""


def test_the_history_of_rounds_comes_back_as_it_was() -> None:
    rounds = (of_half_width(0.02), of_half_width(0.01, 4096))
    arrays, words = history_arrays(rounds)
    found = history_of(arrays, words)
    assert [each.members for each in found] == [2048, 4096]
    for one, other in zip(rounds, found, strict=True):
        for here, there in zip(one.headlines, other.headlines, strict=True):
            assert (here.group, here.kind, here.dims, here.unit) == (there.group, there.kind, there.dims, there.unit)
            np.testing.assert_array_equal(here.low, there.low)
            np.testing.assert_array_equal(here.undefined, there.undefined)


def test_the_pilot_foretells_half_widths_by_the_root_of_the_solves() -> None:
    (found,) = expected(WIDE.headlines, 1 / 16)
    assert (found.kind, found.group) == ("probabilities", "limits/L")
    assert found.half_width == pytest.approx(0.02 / 4)
    assert list(expected((), 0.1)) == []

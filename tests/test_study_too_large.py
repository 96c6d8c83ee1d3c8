"""A model that is too large for stiff steps: said when the study is read, so in `uq check` and in the report."""

from __future__ import annotations

import pytest

from tests.small_studies import PLAIN, read
from uq.model import stiff
from uq.model.stiff import Stiff


def said(more: str = "") -> list[str]:
    """The warnings of a study that speak of stiff steps."""
    return [text for text in read(more, PLAIN).warnings if "stiff" in text]


def test_nothing_is_said_of_a_model_that_is_small_enough() -> None:
    assert said() == []


@pytest.mark.parametrize(("bound", "value"), [("MOST_VALUES", 0), ("LARGEST_JACOBIAN", 0), ("LARGEST_ROOM", 0)])
def test_a_model_beyond_a_bound_is_told_of(monkeypatch: pytest.MonkeyPatch, bound: str, value: int) -> None:
    monkeypatch.setattr(stiff, bound, value)
    (text,) = said()
    assert text.startswith("1 states with all their derivatives are too large a model for stiff steps")
    assert "too_many_steps" in text
    assert said('[plan]\nsolver = "explicit"') == []


def test_only_a_model_that_may_be_too_large_is_differentiated(monkeypatch: pytest.MonkeyPatch) -> None:
    def never(*args: object) -> None:
        raise AssertionError("differentiated")

    monkeypatch.setattr(Stiff, "of", never)
    assert said() == []

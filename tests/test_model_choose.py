"""The pair is chosen by the accuracy, and by nothing else."""

from __future__ import annotations

import pytest

from uq.model.choose import method_for
from uq.model.tableau import PAIRS


@pytest.mark.parametrize(
    ("accuracy", "method"),
    [(1e-2, "explicit54"), (1e-6, "explicit54"), (1.01e-8, "explicit54"), (1e-8, "explicit853"), (1e-12, "explicit853")],
)
def test_the_8_5_3_pair_is_taken_from_1e_8_on(accuracy: float, method: str) -> None:
    assert method_for(accuracy) == method
    assert method in {pair.name for pair in PAIRS}

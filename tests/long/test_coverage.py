"""Coverage of every interval over 2000 seeds, 95 % asked: run by hand, `pytest tests/long/test_coverage.py -s` prints what is found.

Standard error of a coverage near 95 %: 0.5 points.
"""

from __future__ import annotations

import numpy as np
import pytest

from tests.coverage_runs import covered
from tests.skewed_models import held

REPEATS = 2000
LEAST, MOST = 0.92, 0.99
# Rests on few members, and is said to (test_analysis_few.py): no interval made of these members can know what is rarer than one of them.
FEW_FOR_A_MEAN = {"lognormal 3"}
FEW_FOR_A_DEVIATION = {"lognormal 1.73", "lognormal 2", "lognormal 3", "power law"}
# Well-spread points know these much better than independent ones, and their errors are heavy-tailed: Student's t holds more often.
SMOOTH = {"uniform", "two humps", "waves"}


@pytest.mark.parametrize("rows", [64, 256])
def test_every_interval(rows: int) -> None:
    for key, share in covered(range(10_000, 10_000 + REPEATS), rows, 0.3, ("bands", "limits", "ranking")).items():
        print(rows, *key, np.array2string(np.asarray(share), precision=3).replace("\n", ""), flush=True)
        assert (np.asarray(share) >= LEAST).all(), key


@pytest.mark.parametrize("rows", [16, 64, 256])
def test_means_and_deviations_of_skewed_quantities(rows: int) -> None:
    for name, share in held(range(60_000, 60_000 + REPEATS), rows).items():
        print(rows, name, f"mean {share.mean:.4f} sd {share.deviation:.4f}", flush=True)
        assert name in FEW_FOR_A_MEAN or share.mean >= LEAST, name
        assert name in FEW_FOR_A_DEVIATION or share.deviation >= LEAST, name
        assert name in SMOOTH or max(share) <= MOST, name


@pytest.mark.parametrize("rows", [16, 64, 512])
@pytest.mark.parametrize("probability", [0.5, 0.1, 0.01, 1e-3, 1e-4, 3e-5])
def test_probabilities(rows: int, probability: float) -> None:
    share = covered(range(20_000, 20_000 + REPEATS), rows, probability, ("limits",))["limits/hot", "ever_by"]
    print(rows, probability, share)
    assert (share >= LEAST).all()

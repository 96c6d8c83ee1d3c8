"""The main job against the outside: published problems and closed forms, each run as a user would run it.

With some 550 statistical values at 1e-5 each a run has a false-alarm probability of about half a per cent; the seed is fixed.
"""

from __future__ import annotations

from pathlib import Path

import pytest

import uq
from tests.reference import Case, agrees, found, load

RANDOM = [*load("propagation.toml"), *load("random_ivps.toml"), *load("sensitivity.toml")]
DETERMINISTIC = load("deterministic_ivps.toml")


def answers(case: Case, text: str, folder: Path) -> tuple[list[float], int]:
    """What the tool says to every expectation of a case, and the number of members behind it."""
    path = folder / f"{case.name}.toml"
    path.write_text(text, encoding="utf-8")
    study = uq.read_study(path)
    result = uq.run(study, folder=folder / "result")
    return [found(result, expected) for expected in case.expect], study.plan.members


@pytest.mark.parametrize("case", RANDOM, ids=lambda case: case.name)
def test_forecasts_agree_with_exact_answers(case: Case, tmp_path: Path) -> None:
    values, members = answers(case, case.study, tmp_path)
    wrong = [(e, v) for e, v in zip(case.expect, values, strict=True) if not agrees(e, v, members, 1e-8)]
    assert not wrong, f"{case.source}: {wrong}"


@pytest.mark.parametrize("accuracy", [1e-6, 1e-8])
@pytest.mark.parametrize("case", DETERMINISTIC, ids=lambda case: case.name)
def test_solutions_agree_with_reference_solutions(case: Case, accuracy: float, tmp_path: Path) -> None:
    values, members = answers(case, case.study.replace("ACCURACY", repr(accuracy)), tmp_path)
    wrong = [(e, v) for e, v in zip(case.expect, values, strict=True) if not agrees(e, v, members, accuracy)]
    assert not wrong, f"{case.source}: {wrong}"

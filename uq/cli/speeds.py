"""Measured speeds of earlier runs, kept for the estimate of `uq check`: seconds of one core per solve, by model and in general."""

from __future__ import annotations

import json
from collections.abc import Mapping
from pathlib import Path
from typing import TYPE_CHECKING

if TYPE_CHECKING:
    from uq.study.study import Study

GENERAL = "any"
KEPT = 200


def load(folder: Path) -> dict[str, float]:
    """The stored speeds; empty where there are none, or none that can be read (they are a convenience, nothing depends on them)."""
    try:
        found = json.loads((folder / "speeds.json").read_text(encoding="utf-8"))
    except (OSError, ValueError):
        return {}
    if not isinstance(found, dict):
        return {}
    return {str(key): float(value) for key, value in found.items() if isinstance(value, (int, float)) and value > 0}


def store(folder: Path, speeds: Mapping[str, float]) -> None:
    """Keeps the speeds; where that is not possible the run is none the worse, so nothing is said."""
    try:
        folder.mkdir(parents=True, exist_ok=True)
        draft = folder / "speeds.json.new"
        draft.write_text(json.dumps(dict(speeds), indent=1), encoding="utf-8")
        draft.replace(folder / "speeds.json")
    except OSError:
        return


def with_measured(speeds: Mapping[str, float], model: str, seconds_per_solve: float) -> dict[str, float]:
    """The speeds with a new measurement of one model; the general figure is the last measured one. The oldest models are let go."""
    kept = [(key, value) for key, value in speeds.items() if key not in (model, GENERAL)]
    return {**dict(kept[-(KEPT - 1) :]), model: seconds_per_solve, GENERAL: seconds_per_solve}


def expected(speeds: Mapping[str, float], model: str) -> tuple[float, bool] | None:
    """Seconds of one core per solve, and whether they were measured on this very model; None where nothing was ever measured."""
    if model in speeds:
        return speeds[model], True
    return (speeds[GENERAL], False) if GENERAL in speeds else None


def model_of(study: Study) -> str:
    """What a measured speed belongs to: everything that the study says but for the number of members and the seed."""
    return study.with_changes({"plan.members": 512, "plan.seed": 0}).fingerprint

"""What the pilot adds to an ask: centres, half-widths and floors."""

from __future__ import annotations

from dataclasses import replace

import numpy as np

from uq.analysis.ask import Ask, Floats
from uq.solve.batch import Batch


def pilot_ask(ask: Ask, batch: Batch, accuracy: float) -> Ask:
    """The ask completed from the pilot's members (the first 16 A rows of every replicate).

    centre: median; half_width: half the width between the outermost quantiles of the plan, where that is 0 half the range, then the floor.
    floor: accuracy x scale, the scale being the median over members of the largest |value| over the output times; of an outcome
    the median of |value|. Members without a value are left out; where nobody has one the centre is 0.
    """
    values = batch.values[:, : len(ask.watched)][:, :, ask.grid]
    with np.errstate(invalid="ignore"):
        largest = np.fmax.reduce(np.abs(values), axis=2) if values.size else np.zeros(values.shape[:2])
    floor = accuracy * _quantile(largest, 0.5)
    low, high = (_quantile(values, level) for level in (min(ask.quantiles), max(ask.quantiles)))
    half_width = (high - low) / 2
    widest = (_quantile(values, 1.0) - _quantile(values, 0.0)) / 2
    half_width = np.where(half_width > 0, half_width, widest)
    half_width = np.where(half_width > 0, half_width, floor[:, None])
    return replace(
        ask,
        centre=_quantile(values, 0.5),
        half_width=np.where(half_width > 0, half_width, 1.0),
        outcome_centre=_quantile(batch.outcomes, 0.5),
        floor=floor,
        outcome_floor=accuracy * _quantile(np.abs(batch.outcomes), 0.5),
    )


def _quantile(values: Floats, level: float) -> Floats:
    """Over the members, the first axis, among finite values; 0 where there are none."""
    finite = np.sort(np.where(np.isfinite(values), values, np.inf), axis=0)
    count = np.isfinite(finite).sum(axis=0)
    place = np.clip(np.ceil(level * count).astype(np.intp) - 1, 0, None)
    found = np.take_along_axis(finite, place[None], axis=0)[0]
    return np.where(np.isfinite(found), found, 0.0)

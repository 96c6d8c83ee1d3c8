"""What the pilot adds to an ask: centres, half-widths and floors."""

from __future__ import annotations

from dataclasses import replace

import numpy as np

from uq.analysis.ask import Ask, Floats, Scale
from uq.solve.batch import Batch

_LEAST_WIDTH = 1e-300


def pilot_ask(ask: Ask, batch: Batch, accuracy: float) -> Ask:
    """The ask completed from the pilot's members (the first 16 A rows of every replicate).

    centre: median; half_width: half the width between the outermost quantiles of the plan, where that is 0 half the range, then the floor.
    floor: accuracy x scale, the scale being the median over members of the largest |value| over the output times; of an outcome
    the median of |value|. Members without a value are left out; where nobody has one the centre is 0.
    value_scale, outcome_scale, deviation_scale: the maps of histograms, see `_scale`.
    """
    values = batch.values[:, : len(ask.watched)][:, :, ask.grid]
    with np.errstate(invalid="ignore"):
        largest = np.fmax.reduce(np.abs(values), axis=2) if values.size else np.zeros(values.shape[:2])
    floor = accuracy * _quantile(largest, 0.5)
    low, high = (_quantile(values, level) for level in (min(ask.quantiles), max(ask.quantiles)))
    half_width = (high - low) / 2
    widest = (_quantile(values, 1.0) - _quantile(values, 0.0)) / 2
    half_width = np.where(half_width > 0, half_width, widest)
    # Narrower than the solver's own noise is no width to measure a deviation by, and below the least normal number its inverse is infinite.
    half_width = np.maximum(half_width, floor[:, None])
    half_width = np.where(half_width > _LEAST_WIDTH, half_width, 1.0)
    centre, outcome_floor = _quantile(values, 0.5), accuracy * _quantile(np.abs(batch.outcomes), 0.5)
    with np.errstate(invalid="ignore"):
        deviations = np.abs((values - centre) / half_width).max(axis=2, initial=0.0)
    return replace(
        ask,
        centre=centre,
        half_width=half_width,
        outcome_centre=_quantile(batch.outcomes, 0.5),
        floor=floor,
        outcome_floor=outcome_floor,
        value_scale=_scale(values.reshape(len(values), -1), np.repeat(floor, len(ask.grid))),
        outcome_scale=_scale(batch.outcomes, outcome_floor),
        deviation_scale=_scale(deviations, np.full(len(floor), accuracy)),
    )


def _scale(values: Floats, floor: Floats) -> Scale:
    """The map of histograms of each cell, from the pilot's values [member, cell].

    centre: median; width: the first that is above 0 of a quarter of the width from 5 to 95 %, a quarter of the range, the floor, 1.
    """
    widths = ((_quantile(values, high) - _quantile(values, low)) / 4 for low, high in ((0.05, 0.95), (0.0, 1.0)))
    width = np.zeros(values.shape[1])
    for each in (*widths, floor, np.ones_like(width)):
        # Below the least normal number its inverse is infinite.
        width = np.where(width > 0, width, np.where(each > _LEAST_WIDTH, each, 0.0))
    return Scale(_quantile(values, 0.5), width)


def _quantile(values: Floats, level: float) -> Floats:
    """Over the members, the first axis, among finite values; 0 where there are none."""
    finite = np.sort(np.where(np.isfinite(values), values, np.inf), axis=0)
    count = np.isfinite(finite).sum(axis=0)
    place = np.clip(np.ceil(level * count).astype(np.intp) - 1, 0, None)
    found = np.take_along_axis(finite, place[None], axis=0)[0]
    return np.where(np.isfinite(found), found, 0.0)

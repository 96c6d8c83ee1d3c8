"""Quantiles and their intervals as their definition says, by sorting: slow and plain, what the compiled ones are held against."""

from __future__ import annotations

import numpy as np

from uq.analysis.estimate import ratio, rounding_sd
from uq.analysis.quantiles import Levels, rank


def plain_quantiles(values: np.ndarray, levels: Levels, below: np.ndarray, left_out: np.ndarray) -> np.ndarray:
    """[value, low, high; level] of one cell [replicate, value]: nan are infinite, `below` members [replicate] come first, `left_out` of
    the infinite ones are not counted.
    """
    each = values.shape[1]
    ordered = np.sort(np.where(np.isnan(values), np.inf, values).ravel())
    shares, counted = np.array(levels.shares), each - left_out
    total, shift = int(counted.sum()), int(below.sum())

    def at(ranks: np.ndarray) -> np.ndarray:
        places = ranks - shift
        found = ordered[np.clip(places, 1, len(ordered)) - 1]
        return np.where(ranks > total, np.inf, np.where(places < 1, -np.inf, np.where(places > len(ordered), np.inf, found)))

    value = at(rank(shares, np.array(total)))
    with np.errstate(invalid="ignore"):
        hits = (values[:, :, None] <= np.minimum(value, np.finfo(float).max)).sum(axis=1) + below[:, None]
    columns = np.broadcast_to(counted[:, None], hits.shape)
    spread = ratio(hits, columns, levels.confidence, rounding_sd(columns))
    half = np.nan_to_num((spread.high - spread.low) / 2, nan=1.0)
    low = np.minimum(at(np.ceil((shares - half) * total).astype(np.int64)), value)
    high = np.maximum(at(np.floor((shares + half) * total).astype(np.int64) + 1), value)
    constant = shift == 0 and total == np.isfinite(values).sum() and ordered[0] == ordered[total - 1]
    return np.array([value, value, value]) if constant else np.array([value, low, high])

"""Rank correlation of a sample."""

from __future__ import annotations

import numpy as np
from numpy.typing import NDArray

Floats = NDArray[np.float64]


def rank_correlation(x: Floats) -> Floats:
    """Spearman's rank correlation between the columns of x [row, input], equal values with their average rank; [input, input].

    (Spearman 1904, doi:10.2307/1412159.) 1 on the diagonal; nan beside a column of equal values.
    """
    count = x.shape[1]
    scores = np.empty((count, len(x)))
    for place in range(count):
        ranks = average_ranks(x[:, place])
        ranks -= ranks.mean()
        length = np.sqrt(np.sum(ranks * ranks))
        scores[place] = ranks / length if length > 0 else np.nan
    found: Floats = np.empty((count, count))
    for place in range(count):
        found[place] = np.sum(scores * scores[place], axis=1)
    np.fill_diagonal(found, 1.0)
    return found


def average_ranks(values: Floats) -> Floats:
    """The ranks from 1 on, equal values with the average of theirs."""
    _, place, counts = np.unique(values, return_inverse=True, return_counts=True)
    last = np.cumsum(counts)
    return np.asarray((last - (counts - 1) / 2)[place], dtype=np.float64)

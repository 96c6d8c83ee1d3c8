"""Small symmetric matrices, column by column and without any library's block sizes: the same bits everywhere.

In: correlation matrices. Out: triangles, weights of a conditional distribution. Must not know: which inputs they are of.
"""

from __future__ import annotations

import numpy as np
from numpy.typing import NDArray

Floats = NDArray[np.float64]

# A pivot of the triangle of a correlation matrix is a share of variance left; less than this, and the rest is rounding.
LEAST_PIVOT = 1e-10


def triangle(matrix: Floats) -> Floats | None:
    """The lower triangle L with L L' = matrix (Cholesky); None where it is not positive definite.

    (Golub, Van Loan, Matrix Computations, 2013, 4.2.5.)
    """
    left = np.array(matrix, dtype=np.float64)
    size = len(left)
    for place in range(size):
        if not left[place, place] >= LEAST_PIVOT:
            return None
        left[place:, place] /= np.sqrt(left[place, place])
        below = left[place + 1 :, place]
        left[place + 1 :, place + 1 :] -= np.multiply.outer(below, below)
    return np.tril(left)


def sound_triangle(matrix: Floats) -> Floats:
    """The same of a matrix that was found to be positive definite; ValueError where it is not."""
    lower = triangle(matrix)
    if lower is None:
        raise ValueError("a correlation matrix that is not positive definite")
    return lower


def weights_given(lower: Floats, kept: int) -> Floats:
    """W [redrawn, kept] with E[z_redrawn | z_kept] = W z_kept, where L = `lower` is the triangle with the kept ones first.

    W = L_rk L_kk^-1 by back substitution (Anderson, An Introduction to Multivariate Statistical Analysis, 2003, 2.5.1).
    """
    weights = np.array(lower[kept:, :kept])
    for column in range(kept - 1, -1, -1):
        weights[:, column] /= lower[column, column]
        weights[:, :column] -= np.multiply.outer(weights[:, column], lower[column, :column])
    return weights


def combined(weights: Floats, columns: list[Floats]) -> Floats:
    """The sum of weight times column, in the order of the columns; entries without weight do not count."""
    total: Floats | None = None
    for weight, column in zip(weights.tolist(), columns, strict=True):
        if weight != 0.0:
            total = weight * column if total is None else total + weight * column
    return total if total is not None else np.zeros_like(columns[0])

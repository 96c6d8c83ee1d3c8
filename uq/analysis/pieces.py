"""Sums over rows along one binary tree, so that they have the same bits for any block size and any order of completion.

The tree is over the row index of a replicate: rows 0 and 1 are added first, then their sum to that of rows 2 and 3, and so on. A block is
an aligned power-of-two range of rows, that is, one node of the tree.
"""

from __future__ import annotations

from collections.abc import Mapping
from dataclasses import dataclass
from functools import lru_cache
from typing import Any

import numpy as np
from numpy.typing import NDArray

from uq.design.blocks import Block

Array = NDArray[Any]
Sums = Mapping[str, Array]


@lru_cache(maxsize=32)
def reversed_rows(count: int) -> NDArray[np.intp]:
    """Row numbers 0..count-1 in bit-reversed order; in this order adding the second half to the first is one level of the tree."""
    order = np.zeros(1, dtype=np.intp)
    while len(order) < count:
        order = np.concatenate([2 * order, 2 * order + 1])
    return order


def tree_sum(values: Array) -> Array:
    """Sum over the last but one axis, whose rows are in bit-reversed order, along the tree; destroys `values` [.., row, cell].

    Halves are contiguous, which numpy adds several times faster than rows side by side.
    """
    rows = values.shape[-2]
    while rows > 1:
        rows //= 2
        np.add(values[..., :rows, :], values[..., rows : 2 * rows, :], out=values[..., :rows, :])
    return np.asarray(values[..., 0, :].copy())


def add_along_tree(parts: list[dict[str, Array]]) -> dict[str, Array]:
    """The sum of equally long neighbours (a power of two of them), along the tree."""
    while len(parts) > 1:
        parts = [_added(left, right) for left, right in zip(parts[::2], parts[1::2], strict=True)]
    return parts[0]


@dataclass(frozen=True, eq=False)
class Pieces:
    """Named sums of aligned pieces of rows, by (replicate, first row, rows); siblings are added as soon as both are there."""

    held: Mapping[tuple[int, int, int], Sums]

    @classmethod
    def of(cls, block: Block, sums: Sums) -> Pieces:
        """The sums of one block."""
        return cls({(block.replicate, block.first, block.count): sums})

    def merge(self, other: Pieces) -> Pieces:
        """Both together: the pieces of different replicates stand side by side, siblings become their parent."""
        small, large = sorted((self, other), key=lambda pieces: len(pieces.held))
        held = dict(large.held)
        for key, sums in small.held.items():
            _place(held, key, sums)
        return Pieces(held)

    def arrays(self) -> dict[str, Array]:
        """place [piece, 3]: replicate, first row, rows; and each sum with the piece as leading axis."""
        keys = sorted(self.held)
        names = self.held[keys[0]].keys() if keys else ()
        return {
            "place": np.array(keys, dtype=np.int64),
            **{f"sums/{name}": np.stack([self.held[key][name] for key in keys]) for name in names},
        }

    @classmethod
    def of_arrays(cls, arrays: Mapping[str, Array]) -> Pieces:
        """The pieces that `arrays` tells of."""
        names = [path.removeprefix("sums/") for path in arrays if path.startswith("sums/")]
        places = enumerate(arrays["place"].tolist())
        return cls({(a, b, c): {name: np.array(arrays[f"sums/{name}"][piece]) for name in names} for piece, (a, b, c) in places})

    @property
    def rows(self) -> int:
        """Rows of each replicate."""
        return next(iter(self.held))[2]

    def by_replicate(self) -> dict[str, Array]:
        """Each sum with the replicate as leading axis; every replicate must be one whole piece of the same rows."""
        keys = sorted(self.held)
        replicates = [key[0] for key in keys]
        if len({key[1:] for key in keys}) != 1 or len(set(replicates)) != len(replicates):
            raise ValueError(f"a tally is read before its round is complete: pieces {keys[:6]}")
        names = self.held[keys[0]].keys()
        return {name: np.stack([self.held[key][name] for key in keys]) for name in names}


def _place(held: dict[tuple[int, int, int], Sums], key: tuple[int, int, int], sums: Sums) -> None:
    if key in held:
        raise ValueError(f"rows {key} are tallied twice")
    replicate, first, count = key
    sibling = (replicate, first ^ count, count)
    if sibling not in held:
        held[key] = sums
        return
    other = held.pop(sibling)
    left, right = (sums, other) if first < sibling[1] else (other, sums)
    _place(held, (replicate, min(first, sibling[1]), 2 * count), _added(left, right))


def _added(left: Sums, right: Sums) -> dict[str, Array]:
    with np.errstate(over="ignore", invalid="ignore"):
        return {name: left[name] + right[name] for name in left}

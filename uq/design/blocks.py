"""Blocks of rows, and the results of a block taken apart again."""

from __future__ import annotations

from collections.abc import Sequence
from dataclasses import dataclass
from typing import Any, NamedTuple

import numpy as np
from numpy.typing import NDArray


@dataclass(frozen=True, order=True)
class Block:
    """Rows `first` to `first + count` of one replicate; `count` is a power of two and `first` a multiple of it."""

    replicate: int
    first: int
    count: int

    def __post_init__(self) -> None:
        if not is_power_of_two(self.count) or self.first < 0 or self.first % self.count or self.replicate < 0:
            raise ValueError(f"{self} is not an aligned block of rows")


class Parts(NamedTuple):
    """What belongs to the A rows and to the B rows [row, ...], and to A with the columns of a set from B [set, row, ...]."""

    a: NDArray[Any]
    b: NDArray[Any]
    mixed: NDArray[Any]


def spread(base: NDArray[np.float64], count: int, sets: Sequence[tuple[int, ...]]) -> NDArray[np.float64]:
    """A and B rows [2 count, k] continued by the mixed rows of every set, A with its columns from B: [(2 + sets) count, k]."""
    mixed = np.empty((len(sets), count, base.shape[1]))
    mixed[:] = base[:count]
    for taken, rows in zip(sets, mixed, strict=True):
        rows[:, taken] = base[count:, taken]
    return joined(base, mixed)


def joined(base: NDArray[np.float64], mixed: NDArray[np.float64]) -> NDArray[np.float64]:
    """A and B rows [2 count, k], then mixed rows [set, count, k]: [(2 + sets) count, k]."""
    return np.concatenate([base, mixed.reshape(mixed.shape[0] * mixed.shape[1], base.shape[1])])


def take_apart(y: NDArray[Any], count: int) -> Parts:
    """The parts of y [member, ...], members in the order in which `spread` lays them out (with or without mixed rows); views."""
    mixed = y[2 * count :]
    return Parts(y[:count], y[count : 2 * count], mixed.reshape(len(mixed) // count, count, *y.shape[1:]))


def aligned_blocks(replicates: int, first_row: int, stop_row: int, block_rows: int) -> tuple[Block, ...]:
    """Blocks of `block_rows` rows (fewer where the range has fewer) that cover the rows of every replicate, by replicate, then by row."""
    count = min(block_rows, stop_row - first_row)
    firsts = range(first_row, stop_row, count)
    return tuple(Block(replicate, first, count) for replicate in range(replicates) for first in firsts)


def is_power_of_two(number: int) -> bool:
    """Whether the number is 1, 2, 4, 8, ..."""
    return number > 0 and number & (number - 1) == 0

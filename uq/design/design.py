"""The design: which points a study is solved at, replicate by replicate, row by row."""

from __future__ import annotations

from collections.abc import Sequence
from dataclasses import dataclass, field
from functools import cached_property
from typing import Any, Protocol

import numpy as np
from numpy.typing import NDArray

from uq.design.blocks import Block, Parts, aligned_blocks, is_power_of_two, joined, spread, take_apart
from uq.design.sets import Sets, one_by_one
from uq.design.sobol import MOST_INPUTS, MOST_ROWS, Columns, Words, coordinates, direction_numbers, scrambled
from uq.errors import ValueMistake
from uq.seeds import random_words

Floats = NDArray[np.float64]

REPLICATES = 16
LEAST_MEMBERS = 512
FIRST_ROUND = 64


def rounded_up(members: int) -> int:
    """The members of a design with at least so many: a power of two, at least LEAST_MEMBERS."""
    return 1 << (max(members, LEAST_MEMBERS) - 1).bit_length()


class Draws(Protocol):
    """What turns points into inputs; the design does not know how."""

    def values(self, u: Floats) -> Floats:
        """Inputs x at points u, both [row, input]."""

    def mixed(self, u: Floats, x: Floats, sets: Sets) -> Floats:
        """From A and B rows of u and x: the A rows with the inputs of a set from B, for every set [set, row, input]."""


@dataclass(frozen=True)
class Design:
    """Independently scrambled replicates of Sobol' points in two columns per input: column 2i for A, column 2i + 1 for B.

    A row holds, in this order of parts: the A point, the B point and for every one of `sets` the mixed point, A with the coordinates of
    those places from B. Without `sets` these are, where `ranked`, the inputs one by one (Saltelli et al. 2010,
    doi:10.1016/j.cpc.2009.09.018), else there are none; `uq.design.sets` makes others. The coordinate of an input depends on seed,
    replicate, the input's name and place, A or B, and the row, on nothing else: a design with more rows, more replicates, other sets or
    further inputs behind holds the same points, and blocks of any size give the same bits. Raises `ValueMistake` where there are more
    inputs than columns.

    Pairs of columns: the variance of mean((u - 1/2)(v - 1/2)) is on average over all pairs 1.5 / 0.35 / 0.03 times that of independent
    points at 16 / 64 / 512 rows for 10 inputs (1.5 / 1.3 / 0.2 for 50), the worst pair 10 / 5 / 1 times (11 / 37 / 54), the same for pairs
    within A, within B and between them. Such a pair has a random sign per replicate, so estimates stay unbiased and intervals see it.
    """

    names: tuple[str, ...]
    seed: int
    rows: int
    replicates: int = REPLICATES
    ranked: bool = True
    sets: Sets | None = None
    _replicates: dict[int, Columns] = field(default_factory=dict, init=False, repr=False, compare=False)

    def __post_init__(self) -> None:
        if self.sets is None:
            object.__setattr__(self, "sets", one_by_one(len(self.names)) if self.ranked else ())
        if any(not taken or not set(taken) <= set(range(len(self.names))) for taken in self.mixed_sets):
            raise ValueError("a set of inputs that are not there")
        if len(set(self.names)) < len(self.names):
            raise ValueError("two inputs of one name")
        if not is_power_of_two(self.rows) or self.rows > MOST_ROWS or self.replicates < 1 or self.seed < 0:
            raise ValueError(f"no design of {self.rows} rows, {self.replicates} replicates, seed {self.seed}")
        if len(self.names) > MOST_INPUTS:
            raise ValueMistake(f"{len(self.names)} uncertain inputs", f"at most {MOST_INPUTS}", "Sobol' points have no more columns")

    @classmethod
    def for_members(cls, names: Sequence[str], seed: int, members: int, ranked: bool, sets: Sets | None = None) -> Design:
        """The design with at least so many A and B rows: `members` rounded up to a power of two, at least 512; `sets` as in the class."""
        rows = rounded_up(members) // (2 * REPLICATES)
        if rows > MOST_ROWS:
            raise ValueMistake(f"{members} members", f"at most {2 * REPLICATES * MOST_ROWS}", key="members")
        return cls(tuple(names), seed, rows, REPLICATES, ranked, sets)

    @property
    def members(self) -> int:
        """A and B rows of all replicates: what bands, limits and outcomes rest on."""
        return 2 * self.replicates * self.rows

    @property
    def solves(self) -> int:
        """All members to be solved, mixed rows as well."""
        return self.replicates * self.rows * self.parts

    @property
    def parts(self) -> int:
        """Members per row: A, B and one per set."""
        return 2 + len(self.mixed_sets)

    @property
    def mixed_sets(self) -> Sets:
        """The places that each part of the mixed rows takes from B."""
        return self.sets or ()

    @property
    def mixed_names(self) -> tuple[str, ...]:
        """The names of those: of an input by itself its name, of several theirs with + between."""
        return tuple("+".join(self.names[place] for place in taken) for taken in self.mixed_sets)

    def size_of_block(self, block: Block) -> int:
        """Members in a block."""
        return block.count * self.parts

    def rounds(self) -> tuple[tuple[int, int], ...]:
        """First and stop row of every round: 0 to 64, to 128, to 256, ...; all at once where there are fewer than 64 rows."""
        stops = [min(FIRST_ROUND, self.rows)]
        while stops[-1] < self.rows:
            stops.append(2 * stops[-1])
        return tuple(zip([0, *stops], stops, strict=False))

    def blocks(self, first_row: int, stop_row: int, block_rows: int) -> tuple[Block, ...]:
        """The rows of one round in blocks of `block_rows` (a power of two; fewer where the round has fewer), by replicate, then by row."""
        return aligned_blocks(self.replicates, first_row, stop_row, block_rows)

    def base(self, block: Block) -> Floats:
        """The A rows, then the B rows of a block: u [2 count, input], in the open interval (0, 1)."""
        columns = coordinates(self._columns(block.replicate), block.first, block.count)
        return np.concatenate([columns[0::2].T, columns[1::2].T])

    def draw(self, block: Block, inputs: Draws) -> Floats:
        """The inputs x [member, input] of all members of a block: A rows, B rows, then the mixed rows of every set.

        Each coordinate of A and B is transformed once. Where all inputs are independent this has the bits of
        `inputs.values(points(block))`; where they are not, the mixed rows come from their conditional distribution.
        """
        u = self.base(block)
        x = inputs.values(u)
        return joined(x, inputs.mixed(u, x, self.mixed_sets)) if self.mixed_sets else x

    def spread(self, block: Block, base: Floats) -> Floats:
        """Anything per A and B row and independent input [2 count, input] as it is for all members of the block [member, input]."""
        return spread(base, block.count, self.mixed_sets)

    def points(self, block: Block) -> Floats:
        """All members of a block: u [parts count, input]: A rows, B rows, then for every set its mixed rows."""
        return self.spread(block, self.base(block))

    def split(self, block: Block, y: NDArray[Any]) -> Parts:
        """Results of the members of a block [member, ...] by part: a and b [row, ...], mixed [set, row, ...]; views of y."""
        if len(y) != self.size_of_block(block):
            raise ValueError(f"{len(y)} results for {self.size_of_block(block)} members")
        return take_apart(y, block.count)

    def pilot(self, count: int = 16) -> Floats:
        """The first `count` A rows (a power of two up to 64) of every replicate: u [replicates count, input]; the same for any `rows`."""
        blocks = (Block(replicate, 0, count) for replicate in range(self.replicates))
        return np.concatenate([coordinates(self._columns(block.replicate), 0, count)[0::2].T for block in blocks])

    @cached_property
    def _directions(self) -> Words:
        return direction_numbers(2 * len(self.names), (max(self.rows, FIRST_ROUND) - 1).bit_length())

    def _columns(self, replicate: int) -> Columns:
        """The scrambled columns of a replicate; worked out once. (Two threads may both work them out: they find the same.)"""
        if replicate not in self._replicates:
            directions = self._directions
            count = 1 + directions.shape[1]
            sides = [(name, side) for name in self.names for side in ("A", "B")]
            words = [random_words(count, self.seed, "sobol", replicate, name, side) for name, side in sides]
            self._replicates[replicate] = scrambled(directions, np.array(words, dtype=np.uint64).reshape(len(sides), count))
        return self._replicates[replicate]

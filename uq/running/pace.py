"""How large a block may be, decided from what the first ones cost. Pure: the clock is read elsewhere."""

from __future__ import annotations

from dataclasses import dataclass

# Long enough that handing out a block (about 0.1 ms) does not count, short enough that progress moves and no thread waits long at the end.
BLOCK_SECONDS = 0.15
# Values of one block. Measured: 9 MB and 17 MB cost the same per solve, 35 MB a fifth more (they no longer stay near the processor).
BLOCK_BYTES = 16 * 2**20
BLOCKS_PER_THREAD = 4


@dataclass(frozen=True)
class Shape:
    """What a row stands for: `solves` of it (A, B and the mixed ones), and per solve `values` (observed quantities times solved times) and
    `truths` (conditions times solved times)."""

    solves: int
    values: int
    truths: int = 0

    @property
    def bytes(self) -> int:
        """Memory for the values of one row while its block is worked on."""
        return self.solves * (8 * max(self.values, 1) + self.truths)


def block_rows(shape: Shape, seconds_per_solve: float, rows: int, replicates: int, threads: int) -> int:
    """Rows of a block, a power of two between 1 and `rows` (rows of one replicate in the coming round).

    The largest that costs at most BLOCK_SECONDS, holds at most BLOCK_BYTES of values, and leaves BLOCKS_PER_THREAD blocks for every thread.
    The result of a run does not depend on it (sums combine along the binary tree over rows), only its speed does.
    """
    by_time = BLOCK_SECONDS / max(seconds_per_solve * shape.solves, 1e-12)
    by_memory = BLOCK_BYTES / shape.bytes
    by_threads = rows * replicates / (BLOCKS_PER_THREAD * threads)
    return power_of_two(min(by_time, by_memory, by_threads, rows))


def power_of_two(limit: float) -> int:
    """The largest power of two up to `limit`, at least 1."""
    return 1 << max(int(limit).bit_length() - 1, 0)

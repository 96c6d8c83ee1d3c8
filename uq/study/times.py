"""The times at which members are solved: output times, times at which limits are quoted, times that outcomes ask for."""

from __future__ import annotations

from collections.abc import Iterable
from dataclasses import dataclass

import numpy as np
from numpy.typing import NDArray

from uq.study.plan import Time

# Times closer than this fraction of the span are one: 6 * 0.1 h and 36 min differ in their last digits only.
_SAME = 1e-9


@dataclass(frozen=True, eq=False)
class Times:
    """`solved` [solved]: all times, ascending, start and stop among them; `grid` [time]: which of them are output times."""

    solved: NDArray[np.float64]
    grid: NDArray[np.intp]

    def nearest(self, moment: float) -> float:
        """The solved time that stands for `moment`."""
        place = int(np.argmin(np.abs(self.solved - moment)))
        return float(self.solved[place])


def all_times(time: Time, asked: Iterable[float]) -> Times:
    """Output times, start, stop and the times `asked` for, each once; where two are the same an output time stands for both."""
    grid = time.grid
    close = _SAME * (time.stop - time.start)
    more: list[float] = []
    for moment in sorted({time.start, time.stop, *asked}):
        if np.min(np.abs(grid - moment)) > close and not (more and moment - more[-1] <= close):
            more.append(moment)
    solved = np.sort(np.concatenate([grid, np.array(more)]))
    return Times(solved, np.searchsorted(solved, grid))

"""One solved block taken apart: what every tally is made of."""

from __future__ import annotations

from dataclasses import dataclass

import numpy as np
from numpy.typing import NDArray

from uq.analysis.ask import Ask, Floats
from uq.design.blocks import Block, Parts
from uq.design.design import Design
from uq.solve.batch import Batch, Status


@dataclass(frozen=True, eq=False)
class Sample:
    """The members of one block, taken apart by the design that put them together; every array is a view on the Batch.

    values: a, b [row, watched, solved], mixed [input, row, watched, solved], nan from a failure on. conditions: [.., limit, solved], see
    `Truth`. outcomes: [.., outcome]. status, end_time: [..]. x: [.., input]. steps, rejections, stiff_steps, switches: [member], as solved.
    `replicates`: how many the design has. courses: the watched quantities at the output times, side by side [.., watched x time], C order;
    columns behind those are to be overlooked.
    """

    block: Block
    replicates: int
    values: Parts
    conditions: Parts
    outcomes: Parts
    status: Parts
    end_time: Parts
    steps: NDArray[np.int32]
    rejections: NDArray[np.int32]
    stiff_steps: NDArray[np.int32]
    switches: NDArray[np.int32]
    x: Parts
    courses: Parts

    @classmethod
    def of(cls, design: Design, block: Block, x: Floats, batch: Batch, ask: Ask) -> Sample:
        """The sample of `block` from its solved members, in the order of `design.points(block)`; x [member, input] are their inputs."""

        def apart(array: NDArray[np.generic]) -> Parts:
            return design.split(block, array)

        return cls(
            block=block,
            replicates=design.replicates,
            values=apart(batch.values[:, : len(ask.watched)]),
            conditions=apart(batch.conditions),
            outcomes=apart(batch.outcomes),
            status=apart(batch.status),
            end_time=apart(batch.end_time),
            steps=batch.steps,
            rejections=batch.rejections,
            stiff_steps=batch.stiff_steps,
            switches=batch.switches,
            x=apart(x),
            courses=apart(_side_by_side(batch.values, ask)),
        )

    @property
    def rows(self) -> int:
        """How many base rows the block has."""
        return int(self.block.count)


def _side_by_side(values: Floats, ask: Ask) -> Floats:
    """The values [member, observed, solved] as rows that begin with the watched quantities at the output times; a view where it can be."""
    if not ask.grid_is_all:
        values = np.take(values[:, : len(ask.watched)], ask.grid, axis=2)
    return np.ascontiguousarray(values.reshape(len(values), -1), dtype=np.float64)


def failed(status: NDArray[np.int8]) -> NDArray[np.bool_]:
    """Whether a member has no complete solution, by its status."""
    return np.not_equal(status, Status.ok) & np.not_equal(status, Status.ended_by_event)

"""Failed members: how many by status, and where up to 1000 members failed. And the work that all solves together took."""

from __future__ import annotations

from collections.abc import Mapping
from dataclasses import dataclass

import numpy as np

from uq.analysis.ask import Ask, Floats
from uq.analysis.finding import Finding, Variable
from uq.analysis.pieces import Array, Pieces
from uq.analysis.sample import Sample, failed
from uq.solve.batch import Status

DETAILED = 1000
# Where a member stands: its row, its part of the row (0 A, 1 B), its replicate. Details are given in this order, so that they are spread
# over replicates. Mixed members are left out: their coordinates are those of A and B members.
Place = tuple[int, int, int]
Detail = tuple[Floats, float, int]
_PARTS = ("inputs", "time", "status")


@dataclass(frozen=True, eq=False)
class Failures:
    """Counts by status over all solves, what they took, and the first failed members of every replicate: inputs, time, status."""

    pieces: Pieces
    held: Mapping[Place, Detail]

    @classmethod
    def of(cls, ask: Ask, sample: Sample) -> Failures:
        """Those of one block."""
        status = [np.bincount(part.reshape(-1), minlength=len(Status)) for part in sample.status]
        taken = (sample.steps, sample.rejections, sample.switches, np.minimum(sample.stiff_steps, 1))
        work = np.array([each.sum(dtype=np.int64) for each in taken])
        counts = {"base": status[0] + status[1], "all": status[0] + status[1] + status[2], "work": work}
        held: dict[Place, Detail] = {}
        if counts["base"][Status.ended_by_event + 1 :].any():
            held = _details(sample)
        return cls(Pieces.of(sample.block, counts), held)

    def merge(self, other: Failures) -> Failures:
        """Both together; no more details than are given in the end."""
        both = {**self.held, **other.held}
        if len(both) > DETAILED:
            both = {place: both[place] for place in sorted(both)[:DETAILED]}
        return Failures(self.pieces.merge(other.pieces), both)

    def arrays(self) -> dict[str, Array]:
        """The counts; place [member, 3]: row, part, replicate; inputs [member, input], time, status [member]."""
        keys = sorted(self.held)
        parts = {name: np.array([self.held[key][place] for key in keys]) for place, name in enumerate(_PARTS)} if keys else {}
        counts = {f"counts/{name}": array for name, array in self.pieces.arrays().items()}
        return {**counts, "place": np.array(keys, dtype=np.int64).reshape(len(keys), 3), **parts}

    @classmethod
    def of_arrays(cls, arrays: Mapping[str, Array]) -> Failures:
        """The failures that `arrays` tells of."""
        held: dict[Place, Detail] = {}
        for place, (row, part, replicate) in enumerate(arrays["place"].tolist()):
            x, time, status = (arrays[name][place] for name in _PARTS)
            held[row, part, replicate] = (x, float(time), int(status))
        counts = {path.removeprefix("counts/"): array for path, array in arrays.items() if path.startswith("counts/")}
        return cls(Pieces.of_arrays(counts), held)

    def findings(self, ask: Ask) -> tuple[Finding, ...]:
        """The groups failures and solver."""
        sums = {name: values.sum(axis=0) for name, values in self.pieces.by_replicate().items()}
        places = sorted(self.held)[:DETAILED]
        inputs = np.array([self.held[place][0] for place in places]).reshape(len(places), len(ask.inputs))
        times = np.array([self.held[place][1] for place in places], dtype=np.float64)
        status = np.array([self.held[place][2] for place in places], dtype=np.int8)
        variables = {
            "status": Variable(("status",), np.array([each.value for each in Status], dtype=np.int8), "how members ended"),
            "count": Variable(("status",), sums["all"], "solves that ended so, those for the ranking counted"),
            "count_base": Variable(("status",), sums["base"], "members that ended so, those for the ranking not counted"),
        }
        if places:
            variables |= {
                "inputs": Variable(("failed", "input"), inputs, "inputs of failed members, each in the unit of its input", ""),
                "failure_time": Variable(("failed",), times, "when the member failed", ask.time_unit),
                "failure_status": Variable(("failed",), status, "how the member failed"),
            }
        steps, rejections, switches, stiff = sums["work"]
        work = {
            "steps": Variable((), np.array(steps), "accepted steps, all solves together"),
            "rejections": Variable((), np.array(rejections), "rejected steps, all solves together"),
            "switches": Variable((), np.array(switches), "changes between explicit and stiff steps, all solves together"),
            "stiff_share": Variable((), np.array(stiff / max(sums["all"].sum(), 1)), "share of the solves that took stiff steps"),
        }
        return Finding("failures", variables), Finding("solver", work)


def _details(sample: Sample) -> dict[Place, Detail]:
    held: dict[Place, Detail] = {}
    block = sample.block
    status = np.stack([sample.status.a, sample.status.b])
    times = np.stack([sample.end_time.a, sample.end_time.b])
    for row, part in np.argwhere(failed(status).T)[:DETAILED]:
        x = sample.x.a[row] if part == 0 else sample.x.b[row]
        place = (block.first + int(row), int(part), block.replicate)
        held[place] = (x.copy(), float(times[part, row]), int(status[part, row]))
    return held

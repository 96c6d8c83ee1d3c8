"""A fixed sample of members, so that single curves can be shown beside the bands."""

from __future__ import annotations

from collections.abc import Mapping
from dataclasses import dataclass

import numpy as np

from uq.analysis.ask import Ask
from uq.analysis.finding import Finding, Variable
from uq.analysis.pieces import Array
from uq.analysis.sample import Sample

SHOWN = 200
_PARTS = ("watched", "outcomes", "inputs", "status")


@dataclass(frozen=True, eq=False)
class Members:
    """The first A rows of every replicate: by (replicate, row) the watched values [watched, time], outcomes, inputs and status."""

    replicates: int
    held: Mapping[tuple[int, int], tuple[Array, Array, Array, int]]

    @classmethod
    def of(cls, ask: Ask, sample: Sample) -> Members:
        """Those of the sample that lie in one block."""
        block = sample.block
        last = min(block.count, -(-SHOWN // sample.replicates) - block.first)
        held = {}
        for row in range(max(last, 0)):
            values = sample.values.a[row][:, ask.grid].copy()
            rest = sample.outcomes.a[row].copy(), sample.x.a[row].copy(), int(sample.status.a[row])
            held[block.replicate, block.first + row] = (values, *rest)
        return cls(sample.replicates, held)

    def merge(self, other: Members) -> Members:
        """Both together."""
        return Members(self.replicates, {**self.held, **other.held})

    def arrays(self) -> dict[str, Array]:
        """place [member, 2]: replicate and row; watched, outcomes, inputs, status [member, ..]."""
        keys = sorted(self.held)
        parts = {name: np.array([self.held[key][place] for key in keys]) for place, name in enumerate(_PARTS)} if keys else {}
        return {"replicates": np.array(self.replicates), "place": np.array(keys, dtype=np.int64).reshape(len(keys), 2), **parts}

    @classmethod
    def of_arrays(cls, arrays: Mapping[str, Array]) -> Members:
        """The members that `arrays` tells of."""
        held = {}
        for place, (replicate, row) in enumerate(arrays["place"].tolist()):
            values, outcomes, x, status = (arrays[name][place] for name in _PARTS)
            held[replicate, row] = (values, outcomes, x, int(status))
        return cls(int(arrays["replicates"]), held)

    def findings(self, ask: Ask) -> tuple[Finding, ...]:
        """The first 200, row by row through the replicates: the groups members, members/watched, members/outcomes and members/inputs."""
        keys = sorted(self.held, key=lambda key: key[::-1])[:SHOWN]
        count = len(keys)
        watched = np.array([self.held[key][0] for key in keys]).reshape(count, len(ask.watched), len(ask.grid))
        outcomes = np.array([self.held[key][1] for key in keys]).reshape(count, len(ask.outcomes))
        inputs = np.array([self.held[key][2] for key in keys]).reshape(count, len(ask.inputs))
        status = np.array([self.held[key][3] for key in keys], dtype=np.int8)
        shown = ("realization",)
        numbers = Variable(shown, np.arange(count), "number of the member in the sample")
        findings = [Finding("members", {"realization": numbers, "status": Variable(shown, status, "how the member ended")})]
        courses = {
            quantity.name: Variable(("realization", "time"), watched[:, place], quantity.label or quantity.name, quantity.unit)
            for place, quantity in enumerate(ask.watched)
        }
        findings.append(Finding("members/watched", courses))
        if ask.outcomes:
            numbers_each = {
                quantity.name: Variable(shown, outcomes[:, place], quantity.label or quantity.name, quantity.unit)
                for place, quantity in enumerate(ask.outcomes)
            }
            findings.append(Finding("members/outcomes", numbers_each))
        if ask.inputs:
            of_inputs = {name: Variable(shown, inputs[:, place], name, "") for place, name in enumerate(ask.inputs)}
            findings.append(Finding("members/inputs", of_inputs))
        return tuple(findings)

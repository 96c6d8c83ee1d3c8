"""What is said where members failed: bounds, numbers given success, or nothing (design.md 2.5)."""

from __future__ import annotations

from collections.abc import Callable, Mapping
from dataclasses import dataclass, replace
from typing import Any, Literal

import numpy as np
from numpy.typing import NDArray

from uq.analysis.ask import Floats
from uq.analysis.estimate import Estimate
from uq.analysis.finding import Variable

Policy = Literal["bound", "exclude", "refuse"]

# The largest share of base rows that may be lost before means, deviations and indices are missing.
LARGEST_LOSS = 1e-3
WITHHELD = "withheld because members failed"
TOO_MANY_LOST = "more than 0.1 % of the base rows are lost to failed members or missing values"

NOBODY_LEFT = "no member is left that has a value"


@dataclass(frozen=True, eq=False)
class Counted:
    """An estimate given success, and with the failed members counted both ways; `lost`: where any member failed.

    error, share: what the estimate may be off because values were counted into bins, where they were; and as a share of the width
    from 5 to 95 %.
    """

    success: Estimate
    if_low: Estimate
    if_high: Estimate
    lost: NDArray[np.bool_]
    error: Floats | None = None
    share: Floats | None = None

    @classmethod
    def complete(cls, estimate: Estimate) -> Counted:
        """Nobody failed."""
        return cls(estimate, estimate, estimate, np.zeros(estimate.value.shape, dtype=np.bool_))

    def map(self, change: Callable[[NDArray[Any]], NDArray[Any]]) -> Counted:
        """The same with every array changed in shape."""

        def changed(estimate: Estimate) -> Estimate:
            return Estimate(change(estimate.value), change(estimate.low), change(estimate.high))

        error, share = (None if each is None else change(each) for each in (self.error, self.share))
        return Counted(changed(self.success), changed(self.if_low), changed(self.if_high), change(self.lost), error, share)

    def at(self, place: int) -> Counted:
        """The part at one place of the leading axis."""
        return self.map(lambda array: np.asarray(array[place]))


def stacked(parts: list[Counted]) -> Counted:
    """Estimates of several cells one after another along the first axis."""

    def joined(pick: Callable[[Counted], Estimate]) -> Estimate:
        ends = [pick(part) for part in parts]
        return Estimate(*(np.concatenate([getattr(end, name) for end in ends]) for name in ("value", "low", "high")))

    lost = np.concatenate([part.lost for part in parts])
    ways = joined(lambda part: part.success), joined(lambda part: part.if_low), joined(lambda part: part.if_high)
    errors = [(part.error, part.share) for part in parts if part.error is not None and part.share is not None]
    if not errors:
        return Counted(*ways, lost)
    return Counted(*ways, lost, *(np.concatenate(each) for each in zip(*errors, strict=True)))


@dataclass(frozen=True)
class Named:
    """What a variable is called: public name, dimensions, words, unit, further attributes."""

    name: str
    dims: tuple[str, ...]
    long_name: str
    unit: str = "1"
    attributes: Mapping[str, Any] | None = None

    def variables(self, estimate: Estimate, reason: str = "") -> dict[str, Variable]:
        """The estimate and the ends of its interval; the reason why some of it is missing as attribute."""
        return {
            self.name: self._one(estimate.value, self.long_name, {"reason": reason} if reason else {}),
            f"{self.name}_low": self._one(estimate.low, f"lower end of the interval: {self.long_name}"),
            f"{self.name}_high": self._one(estimate.high, f"upper end of the interval: {self.long_name}"),
        }

    def counted(self, found: Counted, policy: Policy, reason: str = "") -> dict[str, Variable]:
        """The variables that the policy gives; see the module."""
        named = self
        if found.error is not None and found.share is not None:
            binned = {"bin_error": _largest(found.error), "bin_error_share": _largest(found.share)}
            named = replace(self, attributes={**(self.attributes or {}), **binned})
        return {**_POLICIES[policy](named, found, reason), **self._binned(found)}

    def _binned(self, found: Counted) -> dict[str, Variable]:
        """What every number may be off because values were counted into bins; nothing where they were kept."""
        if found.error is None or found.share is None:
            return {}
        off = f"may be off by so much, since values were counted into bins: {self.long_name}"
        share = Variable(self.dims, np.asarray(found.share, dtype=np.float64), f"as a share of the width from 5 to 95 %, {off}", "1")
        return {f"{self.name}_bin_error": self._one(found.error, off), f"{self.name}_bin_error_share": share}

    def _one(self, data: Floats, long_name: str, further: Mapping[str, Any] | None = None) -> Variable:
        return Variable(self.dims, np.asarray(data, dtype=np.float64), long_name, self.unit, {**(self.attributes or {}), **(further or {})})


def _largest(errors: Floats) -> float:
    """The largest, to as many digits as anybody needs."""
    return float(f"{np.max(errors, initial=0.0):.3g}")


def _bound(named: Named, found: Counted, reason: str) -> dict[str, Variable]:
    reason = reason or _nobody(found)
    outer = Estimate(found.success.value, found.if_low.low, found.if_high.high)
    variables = named.variables(outer, reason)
    if found.lost.any():
        variables[f"{named.name}_if_low"] = named._one(found.if_low.value, f"failed members counted low: {named.long_name}")
        variables[f"{named.name}_if_high"] = named._one(found.if_high.value, f"failed members counted high: {named.long_name}")
    return variables


def _exclude(named: Named, found: Counted, reason: str) -> dict[str, Variable]:
    if found.lost.any():
        attributes = {**(named.attributes or {}), "given": "success"}
        named = Named(named.name, named.dims, f"{named.long_name}, given success", named.unit, attributes)
    return named.variables(found.success, reason or _nobody(found))


def _nobody(found: Counted) -> str:
    return NOBODY_LEFT if np.isnan(found.success.value).any() else ""


def _refuse(named: Named, found: Counted, reason: str) -> dict[str, Variable]:
    kept = found.success.where(~found.lost)
    return named.variables(kept, WITHHELD if found.lost.any() else reason)


_POLICIES: Mapping[str, Callable[[Named, Counted, str], dict[str, Variable]]] = {"bound": _bound, "exclude": _exclude, "refuse": _refuse}

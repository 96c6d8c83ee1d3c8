"""What names mean where an expression stands, and what an expression came to.

In: nodes and units. Out: scopes and typed nodes. Must not know: models, files.
"""

from __future__ import annotations

from collections.abc import Mapping
from dataclasses import dataclass, field

from uq.lang.graph import Node
from uq.units import NONE, Unit


@dataclass(frozen=True)
class Scope:
    """What the names of an expression stand for.

    `names`: node and unit of each usable name (`time` too, where it may be used; `pi` is known without).
    `unitless`: the study states no unit, so quantities in quotes are refused.
    `barred`: names that exist but may not stand here, each with the remedy to tell.
    `time_unit`: of courses and their windows.
    `fixed`: leaves that do not change over time: only these may a `take` use outside of its courses.
    """

    names: Mapping[str, tuple[Node, Unit]]
    unitless: bool = False
    barred: Mapping[str, str] = field(default_factory=dict)
    time_unit: Unit = NONE
    fixed: frozenset[str] = frozenset()


@dataclass(frozen=True, slots=True)
class Typed:
    """A node with its unit; `zero` marks a plain 0, which fits any unit."""

    node: Node
    unit: Unit
    zero: bool = False

    @property
    def truth(self) -> bool:
        """Whether it is true or false rather than a number."""
        return self.node.truth

    def fits(self, unit: Unit) -> bool:
        """Whether it may stand where a value in `unit` is needed."""
        return self.zero or self.unit.same(unit)

"""What names mean where an expression stands, and what an expression came to.

In: nodes and units. Out: scopes and typed nodes. Must not know: models, files.
"""

from __future__ import annotations

from collections.abc import Mapping
from dataclasses import dataclass, field

from uq.lang.graph import Node
from uq.units import NONE, Unit, Units


@dataclass(frozen=True, slots=True)
class TableUnits:
    """A table of a study, used as a function: the units of its argument and of its value."""

    argument: Unit
    value: Unit


@dataclass(frozen=True)
class Scope:
    """What the names of an expression stand for.

    `names`: node and unit of each usable name (`time` too, where it may be used; `pi` is known without).
    `unitless`: the study states no unit, so quantities in quotes are refused.
    `barred`: names that exist but may not stand here, each with the remedy to tell.
    `time_unit`: of courses and their windows.
    `fixed`: leaves that do not change over time: only these may a `take` use outside of its courses.
    `own`: the study's counting units; `tables`: its tables, each a function of one argument.
    """

    names: Mapping[str, tuple[Node, Unit]]
    unitless: bool = False
    barred: Mapping[str, str] = field(default_factory=dict)
    time_unit: Unit = NONE
    fixed: frozenset[str] = frozenset()
    own: Units = field(default_factory=Units)
    tables: Mapping[str, TableUnits] = field(default_factory=dict)


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

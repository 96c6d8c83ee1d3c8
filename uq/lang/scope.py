"""What names mean where an expression stands, and what an expression came to.

In: nodes and units. Out: scopes and typed nodes. Must not know: models, files.
"""

from __future__ import annotations

from collections.abc import Mapping
from dataclasses import dataclass, field, replace

from uq.lang.graph import Node
from uq.units import NONE, Unit, Units


@dataclass(frozen=True, slots=True)
class TableUnits:
    """A table of a study, used as a function: the units of its argument and of its value."""

    argument: Unit
    value: Unit


@dataclass(frozen=True)
class Index:
    """An index: its name, the labels of its entries ("0", "1", ... where they are counted), and the index whose entries it has.

    A second name of an index has the same entries: `of` is then the first name, which is that of the index itself otherwise.
    """

    name: str
    labels: tuple[str, ...]
    counted: bool
    of: str

    def __len__(self) -> int:
        return len(self.labels)

    @property
    def told(self) -> str:
        """Its entries in words: "0 to 95", "child, adult, old"."""
        if self.counted:
            return f"0 to {len(self) - 1}" if len(self) > 1 else "0"
        return ", ".join(self.labels) if len(self) <= 8 else f"{', '.join(self.labels[:7])}, ... {self.labels[-1]}"


@dataclass(frozen=True)
class Repeated:
    """What has an entry for every entry of one or two indices: their nodes, the last index running fastest, and the unit of all.

    `edge`: what a neighbour beyond an end is: "mirror" (counted back, the end itself first), "wrap" (counted on from the other end), a
    value, or nothing.
    """

    over: tuple[Index, ...]
    nodes: tuple[Node, ...]
    unit: Unit
    edge: str | Typed | None = None


@dataclass(frozen=True)
class Scope:
    """What the names of an expression stand for.

    `names`: node and unit of each usable name (`time` too, where it may be used; `pi` is known without).
    `unitless`: the study states no unit, so quantities in quotes are refused.
    `barred`: names that exist but may not stand here, each with the remedy to tell.
    `time_unit`: of courses and their windows.
    `fixed`: leaves that do not change over time: only these may a `take` use outside of its courses.
    `own`: the study's counting units; `tables`: its tables, each a function of one argument.
    `indices`: all indices; `repeated`: what goes over them; `at`: the entry at which each index stands, where it stands at one.
    """

    names: Mapping[str, tuple[Node, Unit]]
    unitless: bool = False
    barred: Mapping[str, str] = field(default_factory=dict)
    time_unit: Unit = NONE
    fixed: frozenset[str] = frozenset()
    own: Units = field(default_factory=Units)
    tables: Mapping[str, TableUnits] = field(default_factory=dict)
    indices: Mapping[str, Index] = field(default_factory=dict)
    repeated: Mapping[str, Repeated] = field(default_factory=dict)
    at: Mapping[str, int] = field(default_factory=dict)

    def standing(self, at: Mapping[str, int]) -> Scope:
        """The same with some indices at an entry each."""
        return replace(self, at={**self.at, **at}) if at else self


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

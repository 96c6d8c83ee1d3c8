"""A result in memory: `result.bands["T"].quantiles`, by the names of the file."""

from __future__ import annotations

from collections.abc import Iterator, Mapping
from functools import cached_property
from pathlib import Path
from typing import TYPE_CHECKING, Any

from uq.analysis.finding import Finding
from uq.store.encode import StoredGroup, StoredVariable, decode
from uq.store.folder import SHORT
from uq.store.tallies import TALLIES

if TYPE_CHECKING:
    import xarray

ROOMS = (
    *("bands", "limits", "outcomes", "ranking", "members", "failures", "solver", "inputs", "study"),
    *("precision", "scenarios", "differences", "measured"),
)


# Variables beside an estimate: ends of intervals.
ENDINGS = ("_low", "_high")
# Columns of a line by which a group shows itself.
LONGEST = 100


class UnknownNameError(KeyError):
    """A name that a group does not have; says which it has."""

    def __str__(self) -> str:
        return str(self.args[0])


class Group(Mapping[str, Any]):
    """One group of a result: groups and variables by name, as items or as attributes, and what the file says of it (`verdict`) likewise.

    A variable comes as an xarray.DataArray with its coordinates, a group below as a Group. A group that was not asked for is empty.
    """

    def __init__(self, groups: Mapping[str, StoredGroup], path: str) -> None:
        self._groups, self._path = groups, path

    @property
    def attributes(self) -> dict[str, Any]:
        """The attributes of the group, such as `label`, `verdict`."""
        return dict(self._groups[self._path].attributes) if self._path in self._groups else {}

    def __getitem__(self, name: str) -> Any:
        if name in self._variables:
            from uq.store.labelled import labelled

            return labelled(name, self._variables[name], self._coordinates)
        if name in self._below:
            return Group(self._groups, self._join(name))
        raise UnknownNameError(f"{self._path or 'the result'} has no {name!r}; it has {self._names or 'nothing'}")

    def __getattr__(self, name: str) -> Any:
        if name.startswith("_"):
            raise AttributeError(name)
        try:
            return self[name]
        except KeyError as unknown:
            if name in (told := self.attributes):
                return told[name]
            more = f", and the attributes {', '.join(told)}" if told and self._path else ""
            raise AttributeError(f"{unknown}{more}") from None

    def __dir__(self) -> list[str]:
        return [*super().__dir__(), *self, *self.attributes]

    def __iter__(self) -> Iterator[str]:
        return iter([*self._variables, *self._below])

    def __len__(self) -> int:
        return len(self._variables) + len(self._below)

    def __repr__(self) -> str:
        lines = [f"<{self._path or 'result'}>"]
        lines += [f"  {name} = {_short(value)}" for name, value in self.attributes.items()]
        for name, variable in self._variables.items():
            if name.endswith(ENDINGS):
                continue
            sizes = ", ".join(f"{dim} {size}" for dim, size in zip(variable.dims, variable.data.shape, strict=True))
            unit = variable.attributes.get("unit", variable.attributes.get("units", ""))
            told = variable.attributes.get("long_name", "") + (f", {unit}" if unit not in ("", "1") else "")
            lines.append(_short(f"  {name}({sizes})  {told}" if sizes else f"  {name}  {told}"))
        if any(name.endswith(ENDINGS) for name in self._variables):
            lines.append(f"  and the ends of their intervals, as {', '.join(f'..{ending}' for ending in ENDINGS[:2])}")
        lines += [_short(f"  {name}: {self[name]._names}") for name in self._below]
        return "\n".join(lines)

    @property
    def _names(self) -> str:
        """What there is, without the ends of intervals."""
        return ", ".join(name for name in self if not name.endswith(ENDINGS))

    @property
    def _variables(self) -> Mapping[str, StoredVariable]:
        return self._groups[self._path].variables if self._path in self._groups else {}

    @property
    def _below(self) -> list[str]:
        start = f"{self._path}/" if self._path else ""
        inner = (path[len(start) :].split("/")[0] for path in self._groups if path.startswith(start) and path != self._path)
        return list(dict.fromkeys(name for name in inner if name))

    @property
    def _coordinates(self) -> dict[str, StoredVariable]:
        """The coordinates that this group sees, its own before those of the groups around it."""
        found: dict[str, StoredVariable] = {}
        parts = self._path.split("/")
        for end in range(len(parts) + 1):
            group = self._groups.get("/".join(parts[:end]))
            if group:
                found |= {name: variable for name, variable in group.variables.items() if variable.dims == (name,)}
        return found

    def _join(self, name: str) -> str:
        return f"{self._path}/{name}" if self._path else name


class Result(Group):
    """One result, read whole and checked: nothing stays open.

    bands, limits, outcomes, ranking, members, failures, solver, inputs, study, precision, scenarios, differences, measured: the groups of
    result.nc; `attributes`: the facts of the run.
    `findings` has the same as plain arrays, by group; `tree()` all of it as an xarray.DataTree.
    """

    def __init__(self, path: Path, groups: tuple[StoredGroup, ...]) -> None:
        super().__init__({group.path: group for group in groups}, "")
        self.path = path

    def __getitem__(self, name: str) -> Any:
        if name in ROOMS:
            return Group(self._groups, name)
        return super().__getitem__(name)

    @property
    def folder(self) -> Path:
        """The folder in which result.nc lies."""
        return self.path.parent

    @property
    def extensible(self) -> bool:
        """Whether the tallies lie beside it, so that `uq extend` and `uq compare` can go on from it."""
        return (self.folder / TALLIES).is_file()

    @cached_property
    def findings(self) -> dict[str, Finding]:
        """Every group as a Finding, by its path; the root is ""."""
        return {finding.group: finding for finding in decode(self._groups.values())}

    def tree(self) -> xarray.DataTree:
        """Everything as an xarray.DataTree, which has to be closed after use."""
        import xarray

        return xarray.open_datatree(self.path)

    def __repr__(self) -> str:
        return "\n".join(_overview(self))


def _short(value: object) -> str:
    """On one line that fits a terminal."""
    text = str(value).replace("\n", " ")
    return text if len(text) <= LONGEST else text[: LONGEST - 3] + "..."


def _overview(result: Result) -> list[str]:
    facts = result.attributes
    lines = [f"<result of {facts.get('study')}: {facts.get('title')}>", f"  {result.path}"]
    counts = f"{facts.get('members')} members, {facts.get('members_failed')} failed, seed {facts.get('seed')}"
    lines.append(f"  {counts}, study fingerprint {str(facts.get('study_fingerprint'))[:SHORT]}")
    lines += [_short(f"  {name}: {result[name]._names}") for name in ROOMS if len(result[name])]
    return lines

"""A result in memory: `result.bands["T"].quantiles`, by the names of the file."""

from __future__ import annotations

from collections.abc import Iterator, Mapping
from functools import cached_property
from pathlib import Path
from typing import TYPE_CHECKING, Any

from uq.analysis.finding import Finding
from uq.store.encode import StoredGroup, StoredVariable, decode
from uq.store.folder import SHORT

if TYPE_CHECKING:
    import xarray

ROOMS = ("bands", "limits", "outcomes", "ranking", "members", "failures", "solver", "inputs", "study")


class Group(Mapping[str, Any]):
    """One group of a result: groups and variables by name, as items or as attributes.

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
        raise KeyError(name)

    def __getattr__(self, name: str) -> Any:
        if name.startswith("_"):
            raise AttributeError(name)
        try:
            return self[name]
        except KeyError:
            raise AttributeError(f"{self._path or 'the result'} has no {name!r}; it has {', '.join(self) or 'nothing'}") from None

    def __dir__(self) -> list[str]:
        return [*super().__dir__(), *self]

    def __iter__(self) -> Iterator[str]:
        return iter([*self._variables, *self._below])

    def __len__(self) -> int:
        return len(self._variables) + len(self._below)

    def __repr__(self) -> str:
        lines = [f"<{self._path or 'result'}>"]
        lines += [f"  {name} = {value}" for name, value in self.attributes.items()]
        for name, variable in self._variables.items():
            sizes = ", ".join(f"{dim} {size}" for dim, size in zip(variable.dims, variable.data.shape, strict=True))
            unit = variable.attributes.get("unit", variable.attributes.get("units", ""))
            told = variable.attributes.get("long_name", "") + (f", {unit}" if unit not in ("", "1") else "")
            lines.append(f"  {name}({sizes})  {told}" if sizes else f"  {name}  {told}")
        lines += [f"  {name}: {', '.join(self[name])}" for name in self._below]
        return "\n".join(lines)

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

    bands, limits, outcomes, ranking, members, failures, solver, inputs, study: the groups of result.nc; `attributes`: the facts of the run.
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


def _overview(result: Result) -> list[str]:
    facts = result.attributes
    lines = [f"<result of {facts.get('study')}: {facts.get('title')}>", f"  {result.path}"]
    counts = f"{facts.get('members')} members, {facts.get('members_failed')} failed, seed {facts.get('seed')}"
    lines.append(f"  {counts}, study fingerprint {str(facts.get('study_fingerprint'))[:SHORT]}")
    lines += [f"  {name}: {', '.join(result[name])}" for name in ROOMS if len(result[name])]
    return lines

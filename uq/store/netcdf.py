"""Groups to a NetCDF-4 file and back, nothing else: no meaning, no folder, no name of its own."""

from __future__ import annotations

from collections.abc import Iterable
from pathlib import Path
from typing import TYPE_CHECKING, Any

import numpy as np

from uq.store.encode import StoredGroup, StoredVariable

if TYPE_CHECKING:
    import netCDF4

# Small arrays lie whole and uncompressed: opening them costs less than inflating them.
COMPRESSED_FROM = 16 * 1024
CHUNK = 1024 * 1024


def write_groups(path: Path, groups: Iterable[StoredGroup]) -> None:
    """Writes a new file; parents come before children. Raises OSError or RuntimeError where the disk refuses."""
    import netCDF4

    with netCDF4.Dataset(path, "w", format="NETCDF4") as file:
        file.set_fill_off()
        for group in groups:
            place = file.createGroup(group.path) if group.path else file
            for dim, size in group.sizes.items():
                place.createDimension(dim, size)
            place.setncatts(dict(group.attributes))
            for name, variable in group.variables.items():
                _write(place, name, variable)


def read_groups(path: Path) -> tuple[StoredGroup, ...]:
    """Every group of a file that has variables or attributes, the root first. Raises OSError where it is no NetCDF file."""
    import netCDF4

    with netCDF4.Dataset(path, "r") as file:
        file.set_auto_maskandscale(False)
        return tuple(_read(file, ""))


def read_attributes(path: Path) -> dict[str, Any]:
    """The attributes of the root alone. Raises OSError where it is no NetCDF file."""
    import netCDF4

    with netCDF4.Dataset(path, "r") as file:
        return {name: _plain(file.getncattr(name)) for name in file.ncattrs()}


def _write(place: netCDF4.Dataset, name: str, variable: StoredVariable) -> None:
    data, attributes = variable.data, dict(variable.attributes)
    kind = str if data.dtype.kind == "O" else data.dtype
    stored = place.createVariable(name, kind, variable.dims, fill_value=attributes.pop("_FillValue", None), **_storage(data))
    stored.set_auto_maskandscale(False)
    stored.setncatts(attributes)
    if data.size:
        stored[...] = data if data.ndim or kind is not str else data.item()


def _storage(data: np.ndarray[Any, Any]) -> dict[str, Any]:
    """Compression and chunks: whole rows of the last dimensions, up to CHUNK bytes each."""
    if data.ndim == 0 or data.dtype.kind == "O" or data.nbytes < COMPRESSED_FROM:
        return {}
    sizes, bytes_so_far = [], data.itemsize
    for size in reversed(data.shape):
        sizes.append(max(1, min(size, CHUNK // bytes_so_far)))
        bytes_so_far *= sizes[-1]
    return {"compression": "zlib", "complevel": 1, "shuffle": True, "chunksizes": tuple(reversed(sizes))}


def _read(place: netCDF4.Dataset, path: str) -> list[StoredGroup]:
    variables = {name: _read_variable(variable) for name, variable in place.variables.items()}
    attributes = {name: _plain(place.getncattr(name)) for name in place.ncattrs()}
    sizes = {name: len(dim) for name, dim in place.dimensions.items()}
    groups = [StoredGroup(path, sizes, variables, attributes)] if variables or attributes or not path else []
    for name, child in place.groups.items():
        groups += _read(child, f"{path}/{name}" if path else name)
    return groups


def _read_variable(variable: netCDF4.Variable[Any]) -> StoredVariable:
    attributes = {name: _plain(variable.getncattr(name)) for name in variable.ncattrs()}
    data = variable[...]
    if variable.dtype is str:
        texts = np.empty(np.shape(data), dtype=object)
        texts[...] = data
        data = texts
    return StoredVariable(tuple(variable.dimensions), np.asarray(data), attributes)


def _plain(value: Any) -> Any:
    """An attribute as Python has it; a list of numbers stays an array, so that its type is kept."""
    return value.item() if isinstance(value, np.generic) else value

"""Bytes and texts to a NetCDF-4 file and back: one variable for all bytes, since every further variable would cost half a millisecond."""

from __future__ import annotations

from collections.abc import Iterable, Iterator, Mapping
from dataclasses import dataclass
from pathlib import Path
from typing import Any

import numpy as np
from numpy.typing import NDArray

Bytes = NDArray[np.uint8]

# What is read at once where a file is only looked over.
SLAB = 16 * 1024 * 1024


@dataclass(frozen=True, eq=False)
class Packed:
    """A file: attributes, texts by name, and bytes in pieces that follow each other, so many in all."""

    attributes: Mapping[str, Any]
    texts: Mapping[str, str]
    pieces: Iterable[Bytes]
    size: int


def write_packed(path: Path, packed: Packed) -> None:
    """Writes a new file. Raises OSError or RuntimeError where the disk refuses."""
    import netCDF4

    with netCDF4.Dataset(path, "w", format="NETCDF4") as file:
        file.set_fill_off()
        file.setncatts(dict(packed.attributes))
        for name, text in packed.texts.items():
            file.createVariable(name, str, ())[...] = text
        if packed.size:
            file.createDimension("byte", packed.size)
            stored = file.createVariable("bytes", np.uint8, ("byte",), contiguous=True)
            first = 0
            for piece in packed.pieces:
                stored[first : first + len(piece)] = piece
                first += len(piece)


def read_packed(path: Path, slab: int = 0) -> Packed:
    """Reads a file back: all bytes as one piece, or slab by slab while the pieces are gone through. Raises OSError, RuntimeError."""
    import netCDF4

    with netCDF4.Dataset(path, "r") as file:
        # Every byte is what it is, none of them means "missing".
        file.set_auto_maskandscale(False)
        attributes = {name: _plain(file.getncattr(name)) for name in file.ncattrs()}
        texts = {name: str(variable[...]) for name, variable in file.variables.items() if name != "bytes"}
        size = len(file.dimensions["byte"]) if "bytes" in file.variables else 0
        pieces = () if slab or not size else (np.asarray(file.variables["bytes"][:]),)
    return Packed(attributes, texts, _slabs(path, size, slab) if slab and size else pieces, size)


def _slabs(path: Path, size: int, slab: int) -> Iterator[Bytes]:
    import netCDF4

    with netCDF4.Dataset(path, "r") as file:
        file.set_auto_maskandscale(False)
        for first in range(0, size, slab):
            yield np.asarray(file.variables["bytes"][first : first + slab])


def _plain(value: Any) -> Any:
    return value.item() if isinstance(value, np.generic) else value

"""Arrays and facts in one file that is checked as a whole: what a run goes on from, exactly as it was.

The bytes of all arrays follow each other in one variable; `index` has their names, types and shapes, `facts` the facts, both as JSON. A
checksum over all of it is in the root, and a file is read back against it when it is written.
"""

from __future__ import annotations

import hashlib
import json
from collections.abc import Iterable, Iterator, Mapping
from dataclasses import dataclass, field, replace
from functools import partial
from itertools import accumulate
from pathlib import Path
from typing import Any

import numpy as np

from uq import __version__
from uq.errors import StorageError
from uq.store import packed
from uq.store.packed import Bytes, Packed, read_packed, write_packed
from uq.store.whole import put

FORMAT = 1
SHORT = 6
# Types whose bytes mean the same everywhere.
KINDS = "iufb"
# Every array begins at a multiple of this many bytes, so that its numbers lie as a processor likes them.
ALIGNED = 64
HEAD = ("format", "version_uq", "study_fingerprint")

Array = np.ndarray[Any, Any]


@dataclass(frozen=True, eq=False)
class Saved:
    """Arrays by any name, of any shape and of numbers or truth values; facts: anything JSON can hold."""

    arrays: Mapping[str, Array]
    facts: Mapping[str, Any] = field(default_factory=dict)


class DamagedError(Exception):
    """A file that cannot be read, was cut off, or was changed after it was written."""


def write_saved(target: Path, saved: Saved, fingerprint: str) -> None:
    """Writes the file of the study with this fingerprint, atomically and read back. Raises StorageError."""
    try:
        put(target, partial(_write, _packed(saved, fingerprint)))
    except (OSError, RuntimeError) as error:  # the NetCDF library says RuntimeError when the disk is full
        raise StorageError(f"cannot write {target}: {error}") from error


def read_saved(file: Path, fingerprint: str) -> Saved:
    """Reads a file back, exactly. fingerprint: of the study it must belong to, "" for any.

    Raises StorageError where it is of another version or another study, DamagedError where it is not what was written.
    """
    found = _read(file)
    _check(file, found.attributes, fingerprint)
    if _checksum(found) != found.attributes.get("checksum"):
        raise DamagedError(f"{file} was changed or damaged after it was written")
    content = next(iter(found.pieces), np.zeros(0, dtype=np.uint8))
    index = json.loads(found.texts["index"])
    kinds = [(np.dtype(kind), tuple(shape)) for _, kind, shape in index]
    sizes = [kind.itemsize * int(np.prod(shape, dtype=np.int64)) for kind, shape in kinds]
    starts = accumulate((size + _padding(size) for size in sizes), initial=0)
    arrays = {
        name: content[start : start + size].view(kind).reshape(shape)
        for (name, _, _), (kind, shape), start, size in zip(index, kinds, starts, sizes, strict=False)
    }
    return Saved(arrays, json.loads(found.texts["facts"]))


def check_head(file: Path, fingerprint: str) -> None:
    """Raises StorageError where a file is of another version or another study, DamagedError where not even that can be read."""
    _check(file, _read(file, packed.SLAB).attributes, fingerprint)


def _read(file: Path, slab: int = 0) -> Packed:
    try:
        found = read_packed(file, slab)
    except (OSError, RuntimeError) as error:
        raise DamagedError(f"{file} cannot be read") from error
    if not ({*HEAD, "checksum"} <= set(found.attributes) and {"index", "facts"} <= set(found.texts)):
        raise DamagedError(f"{file} cannot be read as a file of uq")
    return found


def _check(file: Path, head: Mapping[str, Any], fingerprint: str) -> None:
    form, written_by, study = (head[name] for name in HEAD)
    remedy = "only the version that made a run can go on with it; run the study again in another folder (-o)"
    if written_by != __version__:
        raise StorageError(f"{file} was written by uq {written_by}, and this is uq {__version__}: {remedy}")
    if form != FORMAT:
        raise StorageError(f"{file} has format {form}, and this uq reads format {FORMAT}: {remedy}")
    if fingerprint and study != fingerprint:
        other = f"another study ({str(study)[:SHORT]}, not {fingerprint[:SHORT]})"
        raise StorageError(f"{file} belongs to {other}; choose another folder with -o")


def _write(content: Packed, draft: Path) -> None:
    checksum = _checksum(content)
    write_packed(draft, replace(content, attributes={**content.attributes, "checksum": checksum}))
    # Slab by slab, so that memory never holds it all twice.
    if _checksum(read_packed(draft, packed.SLAB)) != checksum:
        raise OSError("what was read back is not what was written")


def _packed(saved: Saved, fingerprint: str) -> Packed:
    arrays = {name: np.asarray(array) for name, array in saved.arrays.items()}
    for name, array in arrays.items():
        if array.dtype.kind not in KINDS or array.dtype.itemsize > 8:
            raise TypeError(f"an array of type {array.dtype} under the name {name}: numbers and truth values can be saved")
    index = [(name, array.dtype.newbyteorder("<").str, array.shape) for name, array in arrays.items()]
    texts = {"index": json.dumps(index), "facts": json.dumps(dict(saved.facts))}
    size = sum(array.nbytes + _padding(array.nbytes) for array in arrays.values())
    return Packed({"format": FORMAT, "version_uq": __version__, "study_fingerprint": fingerprint}, texts, _Pieces(arrays.values()), size)


class _Pieces:
    """The bytes of arrays, little-endian, filled up to a multiple of ALIGNED; can be gone through again."""

    def __init__(self, arrays: Iterable[Array]) -> None:
        self._arrays = tuple(arrays)

    def __iter__(self) -> Iterator[Bytes]:
        for array in self._arrays:
            little = np.ascontiguousarray(array, dtype=array.dtype.newbyteorder("<")).reshape(-1)
            if little.size:
                yield little.view(np.uint8)
                yield np.zeros(_padding(array.nbytes), dtype=np.uint8)


def _padding(size: int) -> int:
    return -size % ALIGNED


def _checksum(content: Packed) -> str:
    """SHA-256, as hex, over format, version and study, the texts, and all bytes."""
    digest = hashlib.sha256()
    for text in (*(str(content.attributes[name]) for name in HEAD), *(content.texts[name] for name in ("index", "facts"))):
        digest.update(len(text.encode()).to_bytes(8, "little") + text.encode())
    for piece in content.pieces:
        digest.update(piece.data)
    return digest.hexdigest()

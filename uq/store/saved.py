"""Arrays and facts in one file that is checked as a whole: what a run goes on from, exactly as it was.

The bytes of all arrays follow each other in one variable; `index` has their names, types and shapes, `facts` the facts, both as JSON. A
checksum over all of it is in the root, and a file that is read is held against it. When a file is written its head and its texts are read
back, its bytes are not: right after writing they would come from memory, at more than the cost of writing them.
"""

from __future__ import annotations

import hashlib
import json
import zlib
from collections.abc import Iterable, Iterator, Mapping
from dataclasses import dataclass, field, replace
from functools import partial
from itertools import accumulate, chain
from pathlib import Path
from typing import Any

import numpy as np

from uq import __version__
from uq.errors import StorageError
from uq.store import packed
from uq.store.packed import Bytes, Packed, read_packed, write_packed
from uq.store.whole import put

# Format 2 has a shorter checksum: CRC-32 at 2 to 3 GB a second instead of SHA-256 at 0.4 to 1.4. It shall find damage, not forgery.
FORMAT = 2
READ = (1, 2)
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


class OtherStudyError(StorageError):
    """A file that belongs to another study."""


def write_saved(target: Path, saved: Saved, fingerprint: str) -> None:
    """Writes the file of the study with this fingerprint, atomically. Raises StorageError."""
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
    if form not in READ:
        raise StorageError(f"{file} has format {form}, and this uq reads formats {' and '.join(map(str, READ))}: {remedy}")
    if fingerprint and study != fingerprint:
        other = f"another study ({str(study)[:SHORT]}, not {fingerprint[:SHORT]})"
        raise OtherStudyError(f"{file} belongs to {other}; choose another folder with -o")


def _write(content: Packed, draft: Path) -> None:
    content = replace(content, attributes={**content.attributes, "checksum": _checksum(content)})
    write_packed(draft, content)
    found = read_packed(draft, packed.SLAB)
    if (found.attributes, found.texts, found.size) != (content.attributes, content.texts, content.size):
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
    """As hex, over format, version and study, the texts, and all bytes: CRC-32; in format 1 SHA-256."""
    texts = (*(str(content.attributes[name]) for name in HEAD), *(content.texts[name] for name in ("index", "facts")))
    begins = [len(text.encode()).to_bytes(8, "little") + text.encode() for text in texts]
    pieces: Iterator[bytes | memoryview] = chain(begins, (piece.data for piece in content.pieces))
    if content.attributes["format"] == 1:
        digest = hashlib.sha256()
        for piece in pieces:
            digest.update(piece)
        return digest.hexdigest()
    found = 0
    for piece in pieces:
        found = zlib.crc32(piece, found)
    return f"{found:08x}"

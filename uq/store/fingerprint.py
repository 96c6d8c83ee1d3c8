"""The content fingerprint: of the arrays of a result, not of its attributes, so not of any clock."""

from __future__ import annotations

import hashlib
from collections.abc import Iterable

from uq.store.encode import StoredGroup, StoredVariable


def content_fingerprint(groups: Iterable[StoredGroup]) -> str:
    """SHA-256, as hex, over every variable's path, dimensions, type, shape and bytes (little-endian), in the order of their paths."""
    digest = hashlib.sha256()
    variables = {f"{group.path}/{name}": variable for group in groups for name, variable in group.variables.items()}
    for path in sorted(variables):
        for part in _parts(path, variables[path]):
            digest.update(len(part).to_bytes(8, "little"))
            digest.update(part)
    return digest.hexdigest()


def _parts(path: str, variable: StoredVariable) -> list[bytes]:
    data = variable.data
    if data.dtype.kind == "O":
        kind, content = "text", [str(text).encode() for text in data.ravel()]
    else:
        little = data.astype(data.dtype.newbyteorder("<"), copy=False)
        kind, content = little.dtype.str, [little.tobytes()]
    head = [path, *variable.dims, kind, *(str(size) for size in data.shape)]
    return [text.encode() for text in head] + content

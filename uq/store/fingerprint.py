"""The content fingerprint: of what was computed, not of attributes, so not of any clock, and not of the text of the study.

The study has a fingerprint of its own, in which changes count as if they had been written; so that a run that was extended and one that was
written so have equal fingerprints, the group of the study has a checksum apart.
"""

from __future__ import annotations

import hashlib
from collections.abc import Iterable

from uq.store.encode import StoredGroup, StoredVariable

# The group with the text of the study, its files and what was changed: given, not computed.
GIVEN = "study"


def content_fingerprint(groups: Iterable[StoredGroup]) -> str:
    """SHA-256, as hex, over every variable but those of GIVEN: path, dimensions, type, shape and bytes (little-endian), in the order of
    their paths."""
    return _digest(group for group in groups if group.path != GIVEN)


def given_fingerprint(groups: Iterable[StoredGroup]) -> str:
    """The same over the variables of GIVEN alone."""
    return _digest(group for group in groups if group.path == GIVEN)


def whole_fingerprint(groups: Iterable[StoredGroup]) -> str:
    """The same over all variables."""
    return _digest(groups)


def _digest(groups: Iterable[StoredGroup]) -> str:
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

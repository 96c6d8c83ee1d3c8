"""A result from its file or folder, or a sentence that says why not."""

from __future__ import annotations

import os
from pathlib import Path

from uq.errors import StorageError
from uq.store.encode import StoredGroup
from uq.store.fingerprint import whole_fingerprint
from uq.store.folder import RESULT, fingerprints
from uq.store.layout import SCHEMA
from uq.store.netcdf import read_groups
from uq.store.result import Result


def open_result(path: str | os.PathLike[str]) -> Result:
    """Reads a run folder, or its result.nc, whole, and checks it against its own content fingerprint. Raises StorageError."""
    file = Path(path)
    if not file.exists():
        raise StorageError(f"{file}: no such file or folder")
    if file.is_dir():
        file = file / RESULT
        if not file.exists():
            raise StorageError(f"{file.parent} holds no {RESULT}: no run has been completed there")
    try:
        groups = read_groups(file)
    except (OSError, RuntimeError) as error:
        raise StorageError(f"{file} cannot be read as NetCDF-4: another kind of file, damaged, or not allowed ({error})") from error
    _check(file, groups)
    return Result(file, groups)


def _check(file: Path, groups: tuple[StoredGroup, ...]) -> None:
    facts = groups[0].attributes
    if "study_fingerprint" not in facts or "schema" not in facts:
        raise StorageError(f"{file} is a NetCDF file, but not a result of uq")
    if facts["schema"] > SCHEMA:
        raise StorageError(f"{file} was written by a later version of uq (layout {facts['schema']}, this version reads up to {SCHEMA})")
    if facts.get("complete") != 1:
        raise StorageError(f"{file} is not whole: its writing was cut off")
    # Earlier files have one fingerprint over all of it.
    wanted = fingerprints(groups) if "given_fingerprint" in facts else {"content_fingerprint": whole_fingerprint(groups)}
    for name, found in wanted.items():
        if found != facts.get(name):
            raise StorageError(f"{file} was changed or damaged after it was written: its arrays do not have its {name.replace('_', ' ')}")

"""The run folder: decided first, then written, each file under another name until it is whole."""

from __future__ import annotations

import os
from collections.abc import Iterable, Mapping
from functools import partial
from pathlib import Path, PurePosixPath
from typing import TYPE_CHECKING, Any

from uq.analysis.finding import Finding
from uq.errors import StorageError
from uq.store.encode import StoredGroup, encode
from uq.store.facts import RunFacts
from uq.store.fingerprint import content_fingerprint, given_fingerprint
from uq.store.layout import contents
from uq.store.netcdf import read_attributes, read_groups, write_groups
from uq.store.places import PROGRESS
from uq.store.tallies import TALLIES
from uq.store.whole import put

if TYPE_CHECKING:
    from uq.study.study import Study

RESULT = "result.nc"
STUDY = "study.toml"
# Data files whose name leads out of the study's folder are kept here.
ELSEWHERE = "files"
# Names in a run folder that are no data file's.
OURS = (RESULT, STUDY, TALLIES, "report.html")
SHORT = 6


def default_folder(study: Study) -> Path:
    """results/NAME-FINGERPRINT, the fingerprint cut to six characters."""
    return Path("results") / f"{study.name}-{study.fingerprint[:SHORT]}"


def check_folder(folder: Path, study: Study) -> None:
    """Raises StorageError where `write_result` would refuse this folder; to be asked before hours are spent."""
    around = next(place for place in (folder, *folder.absolute().parents) if place.exists())
    if not around.is_dir():
        raise StorageError(f"{around} is a file; a result needs a folder (choose another one with -o)")
    if not os.access(around, os.W_OK):
        raise StorageError(f"{around} may not be written to (choose another folder with -o)")
    result = folder / RESULT
    if result.exists():
        refusal = _refusal(result, study.fingerprint)
        if refusal:
            raise StorageError(refusal)
        return
    for name, content in _texts_of(study).items():
        if (folder / name).exists() and _content(folder / name) != content:
            raise StorageError(f"{folder / name} is there already and is another file; nothing was written (choose another folder with -o)")


def write_result(folder: Path, study: Study, findings: Iterable[Finding], facts: RunFacts) -> Path:
    """Writes study.toml, the data files it names and result.nc; returns the path of result.nc.

    A result of the same study fingerprint in the folder is replaced, file by file and each at once; anything else is refused.
    Raises StorageError; what had been there is then still whole.
    """
    check_folder(folder, study)
    groups = with_fingerprint(encode(contents(study, findings, facts), study.own_units))
    try:
        for name, content in _texts_of(study).items():
            put(folder / name, partial(_write_bytes, content))
        put(folder / RESULT, partial(_write_checked, groups))
    except (OSError, RuntimeError) as error:  # the NetCDF library says RuntimeError when the disk is full
        raise StorageError(f"cannot write to {folder}: {error}") from error
    return folder / RESULT


def with_fingerprint(groups: tuple[StoredGroup, ...]) -> tuple[StoredGroup, ...]:
    """The groups, with the content fingerprint, that of what was given, and the mark of a whole file in the root."""
    root, *rest = groups
    attributes = {**root.attributes, **fingerprints(groups), "complete": 1}
    return (StoredGroup(root.path, root.sizes, root.variables, attributes), *rest)


def fingerprints(groups: tuple[StoredGroup, ...]) -> dict[str, str]:
    """What a file is checked against, as attributes of its root."""
    return {"content_fingerprint": content_fingerprint(groups), "given_fingerprint": given_fingerprint(groups)}


def _refusal(result: Path, fingerprint: str) -> str:
    """Why a result that is already there may not be replaced; empty where it may."""
    other = "choose another folder with -o"
    try:
        there: Mapping[str, Any] = read_attributes(result)
    except OSError:
        return f"{result} is there already and cannot be read as a result; {other}, or move it away"
    if there.get("study_fingerprint") == fingerprint:
        return ""
    if "study_fingerprint" not in there:
        return f"{result} is there already and is not a result of uq; {other}"
    return f"{result} holds the result of another study ({there.get('study')}, {str(there['study_fingerprint'])[:SHORT]}); {other}"


def _texts_of(study: Study) -> dict[str, bytes]:
    """Everything beside result.nc, by its name in the folder."""
    texts = {STUDY: study.text.encode()}
    for name, content in study.files.items():
        texts[_inside(name, texts)] = content
    return texts


def _inside(name: str, taken: Iterable[str]) -> str:
    """The name itself where it stays in the folder and is free, else a free one below ELSEWHERE."""
    path = PurePosixPath(name.replace("\\", "/"))
    stays = not path.is_absolute() and ".." not in path.parts and ":" not in path.parts[0] and path.parts[0] != PROGRESS
    if stays and str(path) not in (*taken, *OURS):
        return str(path)
    names = (f"{ELSEWHERE}/{number or ''}{path.name}" for number in range(len(list(taken)) + 1))
    return next(each for each in names if each not in taken)


def _content(path: Path) -> bytes | None:
    try:
        return path.read_bytes()
    except OSError:
        return None


def _write_bytes(content: bytes, draft: Path) -> None:
    draft.write_bytes(content)


def _write_checked(groups: tuple[StoredGroup, ...], draft: Path) -> None:
    """Writes and reads back: what is on the disk has the fingerprint of what was meant."""
    write_groups(draft, groups)
    if not fingerprints(read_groups(draft)).items() <= groups[0].attributes.items():
        raise OSError("what was read back is not what was written")

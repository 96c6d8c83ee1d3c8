"""progress/: what a run that is not finished has done so far, in parts, each of them a file of its own."""

from __future__ import annotations

import re
from pathlib import Path

from uq.errors import StorageError
from uq.store.places import PROGRESS
from uq.store.saved import DamagedError, Saved, check_head, read_saved, write_saved
from uq.store.whole import drafts

ENDING = ".nc"
NAME = re.compile(r"[A-Za-z0-9_][A-Za-z0-9_.-]*")


def write_part(folder: Path, name: str, saved: Saved, fingerprint: str) -> None:
    """Writes a part of the run in this folder, in place of one of the same name. Raises StorageError."""
    write_saved(_file(folder, name), saved, fingerprint)


def part_names(folder: Path) -> tuple[str, ...]:
    """The names of the parts in order; what a killed process left unfinished is not among them."""
    place = folder / PROGRESS
    return tuple(sorted(file.name.removesuffix(ENDING) for file in place.glob(f"*{ENDING}") if not file.name.startswith(".")))


def read_part(folder: Path, name: str, fingerprint: str) -> Saved | None:
    """A part; None where it is damaged or gone, so that its work has to be done again. StorageError where it is of another study."""
    try:
        return read_saved(_file(folder, name), fingerprint)
    except DamagedError:
        return None


def check_progress(folder: Path, fingerprint: str) -> None:
    """Raises StorageError where a part is of another study or another version; to be asked before anything is done."""
    for name in part_names(folder):
        try:
            check_head(_file(folder, name), fingerprint)
        except DamagedError:
            continue


def remove_part(folder: Path, name: str) -> None:
    """Takes a part away, if it is there."""
    _file(folder, name).unlink(missing_ok=True)


def clear_progress(folder: Path) -> None:
    """Takes away all parts and what a killed process left, and the folder if nothing else is in it. Raises StorageError."""
    place = folder / PROGRESS
    if not place.is_dir():
        return
    try:
        for file in (*place.glob(f"*{ENDING}"), *drafts(place)):
            file.unlink(missing_ok=True)
        if not any(place.iterdir()):
            place.rmdir()
    except OSError as error:
        raise StorageError(f"cannot clear {place}: {error}") from error


def _file(folder: Path, name: str) -> Path:
    if not NAME.fullmatch(name):
        raise ValueError(f"{name!r} cannot be the name of a part: letters, digits, points, lines")
    return folder / PROGRESS / f"{name}{ENDING}"

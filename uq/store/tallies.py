"""tallies.nc: the tallies of a finished run, from which `uq extend` and `uq compare` go on."""

from __future__ import annotations

from pathlib import Path

from uq.errors import StorageError
from uq.store.saved import DamagedError, OtherStudyError, Saved, read_saved, write_saved

TALLIES = "tallies.nc"


def write_tallies(folder: Path, saved: Saved, fingerprint: str) -> Path:
    """Writes the tallies of the study with this fingerprint into its run folder; returns the file. Raises StorageError."""
    write_saved(folder / TALLIES, saved, fingerprint)
    return folder / TALLIES


def read_tallies(path: Path, fingerprint: str) -> Saved:
    """The tallies in a run folder (or beside one of its files) of the study with this fingerprint, "" for any. Raises StorageError."""
    folder = path if path.is_dir() else path.parent
    file = folder / TALLIES
    if not file.exists():
        raise StorageError(f"{folder} holds no {TALLIES}, without which a run cannot be gone on with; run the study again")
    try:
        return read_saved(file, fingerprint)
    except OtherStudyError as error:
        raise StorageError(f"{file} does not belong to the result beside it; put back that of its run, or run the study again") from error
    except DamagedError as damage:
        raise StorageError(f"{damage}; run the study again") from damage

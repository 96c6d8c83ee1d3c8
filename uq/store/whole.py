"""Files that are whole or not there: written under another name, flushed to the disk, then given their name."""

from __future__ import annotations

import os
import secrets
from collections.abc import Callable, Iterator
from pathlib import Path

DRAFT = ".part"


def put(target: Path, write: Callable[[Path], object]) -> None:
    """Lets `write` make a file under another name, has it on the disk, and gives it its name. Raises what `write` raises, and OSError."""
    target.parent.mkdir(parents=True, exist_ok=True)
    draft = target.with_name(f".{target.name}.{secrets.token_hex(4)}{DRAFT}")
    try:
        write(draft)
        flush(draft)
        draft.replace(target)
        flush(target.parent)
    finally:
        draft.unlink(missing_ok=True)


def drafts(folder: Path) -> Iterator[Path]:
    """What a killed process may have left behind in a folder."""
    return folder.glob(f".*{DRAFT}")


def flush(path: Path) -> None:
    """Has a file, or the names in a folder, on the disk before anything goes on."""
    if path.is_dir() and os.name == "nt":  # has no such thing for folders
        return
    handle = os.open(path, os.O_RDONLY if path.is_dir() else os.O_RDWR)
    try:
        os.fsync(handle)
    finally:
        os.close(handle)

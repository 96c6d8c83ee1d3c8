"""The progress of one run, kept in its folder part by part."""

from __future__ import annotations

from dataclasses import dataclass
from pathlib import Path

from uq.store.progress import part_names, read_part, write_part
from uq.store.saved import Saved


@dataclass(frozen=True)
class FolderKeeper:
    """Keeps parts in the progress/ of a folder, for the study with this fingerprint. Its methods raise StorageError."""

    folder: Path
    fingerprint: str

    def keep(self, name: str, saved: Saved) -> None:
        """Write a part, atomically."""
        write_part(self.folder, name, saved, self.fingerprint)

    def names(self) -> tuple[str, ...]:
        """The names of all parts, in order."""
        return part_names(self.folder)

    def kept(self, name: str) -> Saved | None:
        """A part; None where it is damaged, so that its work has to be done again."""
        return read_part(self.folder, name, self.fingerprint)

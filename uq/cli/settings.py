"""What the environment says, read at the door and handed in: where state is kept, whether colour is wanted."""

from __future__ import annotations

from collections.abc import Mapping
from pathlib import Path


def state_folder(environment: Mapping[str, str]) -> Path:
    """Where the queue, logs and measured speeds stand: $UQ_HOME, else $XDG_STATE_HOME/uq, by default ~/.local/state/uq.

    A relative $XDG_STATE_HOME is ignored, as the XDG Base Directory Specification 0.8 wants it; $UQ_HOME may be relative.
    """
    if own := environment.get("UQ_HOME", ""):
        return Path(own).absolute()
    named = environment.get("XDG_STATE_HOME", "")
    home = Path(environment.get("HOME", "") or Path.home())
    root = Path(named) if named and Path(named).is_absolute() else home / ".local" / "state"
    return root / "uq"


def animated(environment: Mapping[str, str], terminal: bool) -> bool:
    """Whether a moving progress line may be drawn: only on a terminal that can."""
    return terminal and environment.get("TERM", "") != "dumb"

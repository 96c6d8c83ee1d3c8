"""Names in a run folder that rooms must know which read nothing in it."""

from __future__ import annotations

PROGRESS = "progress"

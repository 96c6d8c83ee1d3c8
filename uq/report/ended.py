"""What ended a run before it was as precise as asked."""

from __future__ import annotations

from collections.abc import Mapping
from typing import Any

from uq.store.result import Result


def unreached(result: Result) -> str:
    """What a run has spent without reaching the precision asked: members, solves or minutes; "" where it reached it, or none was asked."""
    found = result.findings.get("precision")
    facts: Mapping[str, Any] = found.attributes if found else {}
    return "" if facts.get("reached", 1) else str(facts["stopped"])


def ended_by(result: Result) -> str:
    """What ended a run: a deadline, or what it may spend; "" where nothing did before it was as precise as asked."""
    return str(dict(result.attributes).get("stopped", "")) or unreached(result)

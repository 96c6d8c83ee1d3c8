"""How much memory the tallies of a whole run take at most; light, so that `uq check` may say it."""

from __future__ import annotations

from uq.analysis.ask import Ask, kept_bytes

# Bytes of one histogram if all its bins are used: see `counting` (a test holds them together). Most use a fifth.
HISTOGRAM_BYTES = 4 * 13312 + 8 * 10


def held_bytes(ask: Ask, replicates: int) -> int:
    """Bytes of all tallies of so many replicates: values kept or counted, sums for means, deviations and rankings, counts of limits."""
    cells = len(ask.watched) * len(ask.grid) if ask.asks("bands") or ask.asks("ranking") else 0
    cells += len(ask.outcomes) if ask.asks("outcomes") or ask.asks("ranking") else 0
    mixed = len(ask.mixed) if ask.asks("ranking") else 0
    places = len(ask.limits) * (len(ask.judged) + 1) if ask.limits else 0
    each = 1 if ask.dependent else 3
    sums = 8 * replicates * (cells * (3 + each * mixed) + places * (8 + 3 * mixed) + 2 * len(ask.outcomes) + 16)
    if ask.keeps:
        return kept_bytes(ask, ask.members) + sums
    # As many histograms as there are kept values of one member.
    return kept_bytes(ask, 1) // 8 * replicates * HISTOGRAM_BYTES + sums

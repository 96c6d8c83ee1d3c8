"""When members pass limits: counts of first passing times, exact whole numbers.

Limits are judged at the output times and the `by` times. A member's passing is a place among the judged times (their number where it never
passes); its share by any time follows from the counts per place. A member that failed before it passed is unknown from then on, and so
is, for this limit only, one whose condition was unknown before it was true (`solve.batch.Truth`): it may have passed then. An earlier
passing stands.
"""

from __future__ import annotations

from dataclasses import dataclass

import numpy as np
from numpy.typing import NDArray

from uq.analysis.ask import Ask, Counts
from uq.analysis.pieces import Array, Pieces
from uq.analysis.sample import Sample
from uq.design.blocks import Parts

Places = NDArray[np.intp]


@dataclass(frozen=True, eq=False)
class Passings:
    """Counts by replicate, [limit, place]; the last place means never.

    passed: first passings of A and B members; unknown: of those that became unknown before passing, when; now, unsure: how many are true
    and unknown at the time [limit, judged]. For the ranking, over rows known as a whole: lost [limit, place]: when rows are lost;
    a, b [limit, place]; both: the later of A's and B's passing; m, a_and_m, b_and_m [limit, input, place] the same with mixed members.
    """

    pieces: Pieces

    @classmethod
    def of(cls, ask: Ask, sample: Sample) -> Passings:
        """The counts of one block."""
        places = _Places.of(ask, sample)
        never = len(ask.judged)
        first, unknown = places.first, places.unknown
        counts: dict[str, Array] = {
            "passed": _count(first.a, never) + _count(first.b, never),
            "unknown": _count(unknown.a, never) + _count(unknown.b, never),
            "now": places.now,
            "unsure": places.unsure,
        }
        if ask.asks("ranking"):
            counts |= _ranked(places, never)
        return cls(Pieces.of(sample.block, counts))

    def merge(self, other: Passings) -> Passings:
        """Both together."""
        return Passings(self.pieces.merge(other.pieces))


@dataclass(frozen=True, eq=False)
class _Places:
    """Of every member and limit the place of the first passing and of becoming unknown before it [.., limit].

    now, unsure [limit, judged]: how many A and B members have the condition true, and how many unknown.
    """

    first: Parts
    unknown: Parts
    now: Counts
    unsure: Counts

    @classmethod
    def of(cls, ask: Ask, sample: Sample) -> _Places:
        part = sample.conditions
        needed = part if ask.asks("ranking") else Parts(part.a, part.b, part.mixed[:0])
        a, b, mixed = (_judged(ask, conditions) for conditions in needed)
        return cls(Parts(a[0], b[0], mixed[0]), Parts(a[1], b[1], mixed[1]), a[2] + b[2], a[3] + b[3])


def _judged(ask: Ask, conditions: NDArray[np.int8]) -> tuple[Places, Places, Counts, Counts]:
    """The places of being true and of being unknown first [.., limit], from conditions [.., limit, solved]; and how many are true and
    unknown at each time [limit, judged].
    """
    from uq.analysis.compiled import first_true_2

    # Machine code is made for arrays of one kind.
    flat = np.require(conditions, np.int8, ["C", "W"]).reshape(-1, *conditions.shape[-2:]).view(np.uint8)
    first, lost = np.empty((2, *flat.shape[:2]), dtype=np.intp)
    now, unsure = np.zeros((2, flat.shape[1], len(ask.judged)), dtype=np.int64)
    first_true_2(flat, ask.judged, first, lost, now, unsure)
    return first.reshape(conditions.shape[:-1]), lost.reshape(conditions.shape[:-1]), now, unsure


def _count(places: Places, never: int) -> Counts:
    """How many members have each place, limit by limit: from [member, limit] to [limit, place]."""
    limits = places.shape[-1]
    numbered = places + np.arange(limits) * (never + 1)
    return np.bincount(numbered.reshape(-1), minlength=limits * (never + 1)).reshape(limits, never + 1)


def _count_mixed(places: Places, never: int) -> Counts:
    """From [input, row, limit] to [limit, input, place]."""
    inputs, _, limits = places.shape
    numbered = places + (np.arange(limits) * inputs + np.arange(inputs)[:, None, None]) * (never + 1)
    counts = np.bincount(numbered.reshape(-1), minlength=limits * inputs * (never + 1))
    return counts.reshape(limits, inputs, never + 1)


def _ranked(places: _Places, never: int) -> dict[str, Counts]:
    """What indices of the indicator 'true by then' are made of; a row counts until it is lost."""
    a, b, m = places.first
    lost = np.minimum(np.minimum(places.unknown.a, places.unknown.b), places.unknown.mixed.min(axis=0, initial=never))

    def count(first: Places) -> Counts:
        counter = _count if first.ndim == 2 else _count_mixed
        counts = counter(first, never)
        # A row that is lost at place l is taken back there: it was counted at max(first, l) at the latest.
        return counts if (lost == never).all() else counts - counter(np.maximum(first, lost), never)

    return {
        "lost": _count(lost, never),
        "a": count(a),
        "b": count(b),
        "both": count(np.maximum(a, b)),
        "m": count(m),
        "a_and_m": count(np.maximum(a, m)),
        "b_and_m": count(np.maximum(b, m)),
    }

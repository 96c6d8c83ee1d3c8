"""When members pass limits: counts of first passing times, exact whole numbers.

Limits are judged at the output times and the `by` times. A member's passing is a place among the judged times (their number where it never
passes); its share by any time follows from the counts per place. A member that failed before it passed is unknown from then on.
"""

from __future__ import annotations

from dataclasses import dataclass

import numpy as np
from numpy.typing import NDArray

from uq.analysis.ask import Ask, Counts
from uq.analysis.pieces import Array, Pieces
from uq.analysis.sample import Sample, failed
from uq.design.blocks import Parts

Places = NDArray[np.intp]
_CHUNK = 128


@dataclass(frozen=True, eq=False)
class Passings:
    """Counts by replicate, [limit, place]; the last place means never.

    passed: first passings of A and B members; unknown: of those that failed before passing, when; now: how many are true [limit, judged];
    failed: when A and B members failed [place]. For the ranking, over rows known as a whole: lost [limit, place]: when rows are lost;
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
            "now": _now(ask, sample.conditions.a) + _now(ask, sample.conditions.b),
            "failed": _count(places.failed.a[:, None], never)[0] + _count(places.failed.b[:, None], never)[0],
        }
        if ask.asks("ranking"):
            counts |= _ranked(places, never)
        return cls(Pieces.of(sample.block, counts))

    def merge(self, other: Passings) -> Passings:
        """Both together."""
        return Passings(self.pieces.merge(other.pieces))


@dataclass(frozen=True, eq=False)
class _Places:
    """Of every member and limit the place of the first passing and of becoming unknown [.., limit]; of every member that of failing."""

    first: Parts
    unknown: Parts
    failed: Parts

    @classmethod
    def of(cls, ask: Ask, sample: Sample) -> _Places:
        times = ask.solved_times[ask.judged]
        never = len(times)

        def needed(part: Parts) -> Parts:
            return part if ask.asks("ranking") else Parts(part.a, part.b, part.mixed[:0])

        first = Parts(*(_first(_judged(ask, conditions)) for conditions in needed(sample.conditions)))
        ends = zip(needed(sample.status), needed(sample.end_time), strict=True)
        fails = Parts(*(np.where(failed(status), np.searchsorted(times, end, side="left"), never) for status, end in ends))
        pairs = zip(first, fails, strict=True)
        unknown = Parts(*(np.where(passing < never, never, failing[..., None]) for passing, failing in pairs))
        return cls(first, unknown, fails)


def _judged(ask: Ask, conditions: NDArray[np.bool_]) -> NDArray[np.bool_]:
    """Conditions at the judged times only."""
    return conditions if len(ask.judged) == len(ask.solved_times) else conditions[..., ask.judged]


def _first(conditions: NDArray[np.bool_]) -> Places:
    """The first place along the last axis at which a condition is true; their number where there is none."""
    place = conditions.argmax(axis=-1)
    came = np.take_along_axis(conditions, place[..., None], axis=-1)[..., 0]
    return np.asarray(np.where(came, place, conditions.shape[-1]))


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


def _now(ask: Ask, conditions: NDArray[np.bool_]) -> Counts:
    """How many members have the condition true at each judged time [limit, judged], from [member, limit, solved]."""
    judged = _judged(ask, conditions)
    total = np.zeros(judged.shape[1:], dtype=np.int64)
    # Sums of at most 128 truth values fit into a byte, which adds without conversion.
    for start in range(0, len(judged), _CHUNK):
        total += np.add.reduce(judged[start : start + _CHUNK].view(np.uint8), axis=0, dtype=np.uint8)
    return total

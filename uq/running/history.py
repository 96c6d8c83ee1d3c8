"""What every round had to say about its precision, as arrays and words, and back."""

from __future__ import annotations

from collections.abc import Mapping, Sequence
from typing import Any

from uq.analysis.precision import Headline, Round
from uq.running.block import Arrays

_NUMBERS = ("value", "low", "high", "scale", "undefined")
_WORDS = ("group", "name", "kind", "dims", "unit", "long_name")


def history_arrays(rounds: Sequence[Round]) -> tuple[dict[str, Arrays], list[dict[str, Any]]]:
    """Rounds as arrays by name, and what of them JSON can hold."""
    arrays: dict[str, Arrays] = {}
    words = []
    for number, each in enumerate(rounds):
        for place, headline in enumerate(each.headlines):
            arrays |= {f"history/{number}/{place}/{name}": getattr(headline, name) for name in _NUMBERS}
        said = [{name: getattr(headline, name) for name in _WORDS} for headline in each.headlines]
        words.append({"members": each.members, "solves": each.solves, "headlines": said})
    return arrays, words


def history_of(arrays: Mapping[str, Arrays], words: Sequence[Mapping[str, Any]]) -> tuple[Round, ...]:
    """Back from arrays and words."""
    rounds = []
    for number, each in enumerate(words):
        headlines = []
        for place, said in enumerate(each["headlines"]):
            numbers: dict[str, Any] = {name: arrays[f"history/{number}/{place}/{name}"] for name in _NUMBERS}
            headlines.append(Headline(**{**said, "dims": tuple(said["dims"]), **numbers}))
        rounds.append(Round(int(each["members"]), int(each["solves"]), tuple(headlines)))
    return tuple(rounds)

"""Tallies as named arrays and back, exactly: what a checkpoint and `tallies.nc` hold.

A tally is a frozen class of parts; a part says itself which arrays it is made of (`arrays`) and is made of them again (`of_arrays`), or is
a frozen class of parts too. Names are paths, "courses/values/3-64". The law: what is decoded merges and answers as what was encoded.
"""

from __future__ import annotations

from collections.abc import Mapping
from dataclasses import fields
from typing import Any, get_args, get_type_hints

import numpy as np

from uq.analysis.pieces import Array

Arrays = dict[str, Array]


def to_arrays(part: Any) -> Arrays:
    """The arrays of a part by path."""
    if isinstance(part, np.ndarray):
        return {"": part}
    if isinstance(part, int):
        return {"": np.array(part)}
    if hasattr(part, "arrays"):
        found: Arrays = part.arrays()
        return found
    inside = {field.name: to_arrays(getattr(part, field.name)) for field in fields(part)}
    return {_path(name, below): array for name, arrays in inside.items() for below, array in arrays.items()}


def of_arrays(kind: Any, arrays: Mapping[str, Array]) -> Any:
    """The part of that kind which the arrays were made from."""
    if hasattr(kind, "of_arrays"):
        return kind.of_arrays(arrays)
    if kind is int:
        return int(arrays[""])
    if get_args(kind):
        return arrays[""]
    hints = get_type_hints(kind)
    return kind(**{field.name: of_arrays(hints[field.name], below(arrays, field.name)) for field in fields(kind)})


def below(arrays: Mapping[str, Array], name: str) -> Arrays:
    """The arrays under a name."""
    return {path[len(name) :].removeprefix("/"): array for path, array in arrays.items() if path == name or path.startswith(name + "/")}


def _path(name: str, below: str) -> str:
    return f"{name}/{below}" if below else name

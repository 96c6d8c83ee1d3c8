"""What every question is answered with: a `Finding` is one group of result.nc, as labelled arrays."""

from __future__ import annotations

from collections.abc import Mapping
from dataclasses import dataclass, field
from typing import Any

import numpy as np


@dataclass(frozen=True, eq=False)
class Variable:
    """One labelled array: dimension names, data (float64, int or str), what it is in words, and its unit text ("1" for none)."""

    dims: tuple[str, ...]
    data: np.ndarray[Any, Any]
    long_name: str
    unit: str = "1"
    attributes: Mapping[str, Any] = field(default_factory=dict)


@dataclass(frozen=True, eq=False)
class Finding:
    """The answer to one question about one thing: the group's path ("bands/T"), its variables by public name, its attributes.

    An estimate `v` has its interval beside it as `v_low` and `v_high`; where members failed also `v_if_low` and `v_if_high`.
    A missing number is nan.
    """

    group: str
    variables: Mapping[str, Variable]
    attributes: Mapping[str, Any] = field(default_factory=dict)

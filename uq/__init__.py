"""Forecasts of uncertain initial value problems: a study file in, bands, probabilities and what drives them out.

In: the path of a study. Out: a run folder and its result. Must not know: how anything is computed.
Everything is imported where it is used, so that `import uq` costs next to nothing.
"""

from __future__ import annotations

from importlib import import_module
from typing import TYPE_CHECKING, Any

if TYPE_CHECKING:
    from uq.pipeline import compare as compare
    from uq.pipeline import extend as extend
    from uq.pipeline import run as run
    from uq.store.open import open_result as open_result
    from uq.study.read import read_study as read_study

__version__ = "0.2.0"

_DOORS = {
    "read_study": "uq.study.read",
    "run": "uq.pipeline",
    "extend": "uq.pipeline",
    "compare": "uq.pipeline",
    "open_result": "uq.store.open",
}

__all__ = ["__version__", "compare", "extend", "open_result", "read_study", "run"]


def __getattr__(name: str) -> Any:
    if name not in _DOORS:
        raise AttributeError(f"module 'uq' has no attribute {name!r}")
    return getattr(import_module(_DOORS[name]), name)


def __dir__() -> list[str]:
    return __all__

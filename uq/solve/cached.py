"""Compiled kernels are kept on disk, in the user's cache and not in the package.

Inside the package they would outlive an uninstallation, and the folder left behind would hide a later editable installation.
"""

from __future__ import annotations

import os
from collections.abc import Callable
from pathlib import Path
from typing import Any

from numba import config, njit


def kernel(function: Callable[..., Any]) -> Any:
    """`function` compiled on its first call without the GIL; the machine code is kept for later processes.

    It lies in $XDG_CACHE_HOME/uq (or ~/.cache/uq), or where the user has set NUMBA_CACHE_DIR; where that cannot be written, numba finds a
    place of its own. The setting is numba's and global, so it is put back at once.
    """
    return _cached(function, {})


def uncounted(function: Callable[..., Any]) -> Any:
    """As `kernel`, but without counting references to arrays: it must make no new array.

    Counting them is an atomic operation for every array whenever one of the stepping kernel's parts is entered or left, which took up to
    three quarters of the time beside the steps themselves. (The option has an underscore in numba; without it all works, only slower.)
    """
    return _cached(function, UNCOUNTED)


UNCOUNTED = {"_nrt": False}


def _cached(function: Callable[..., Any], options: dict[str, bool]) -> Any:
    before = config.CACHE_DIR
    config.CACHE_DIR = before or str(_cache_home() / "uq")
    try:
        return njit(nogil=True, cache=True, error_model="numpy", **options)(function)
    finally:
        config.CACHE_DIR = before


def _cache_home() -> Path:
    """The XDG base directory for caches; a relative setting is ignored, as the specification asks."""
    given = Path(os.environ.get("XDG_CACHE_HOME", ""))
    return given if given.is_absolute() else Path.home() / ".cache"


def at_hand(kernel: Any) -> bool:
    """Whether a kernel's machine code was made in this process, or lies on disk and is newer than the kernel's file."""
    source = Path(kernel.py_func.__code__.co_filename)
    found = Path(kernel.stats.cache_path).glob(f"{source.stem}.{kernel.__name__}-*.nbi")
    return bool(kernel.signatures) or any(index.stat().st_mtime >= source.stat().st_mtime for index in found)

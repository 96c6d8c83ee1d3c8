"""One root seed and its named children.

In: a root seed and names. Out: child seeds, random words, generators. Must not know: anything else.
Every random number of the program descends from the study's seed through here, so that it depends on names and never on the order of calls.
"""

from __future__ import annotations

import hashlib

import numpy as np
from numpy.typing import NDArray


def seed_of(root: int, *names: str | int) -> int:
    """The child seed of `root` with these names, a whole number of 128 bits.

    root: any whole number >= 0 of any size, 0 is a seed like any other; ValueError for a negative one.
    The first half of SHA-256 (FIPS 180-4) over the root and the names, each with its kind and length before it, so that ("ab", "c") and
    ("a", "bc"), and 1 and "1", are different children. The same on every machine and with every version of numpy.
    """
    return int.from_bytes(hashlib.sha256(_message(root, names)).digest()[:16], "little")


def random_words(count: int, root: int, *names: str | int) -> NDArray[np.uint64]:
    """`count` random 64-bit words of the child of `root` with these names, uint64 [count].

    SHAKE-256 (FIPS 202) read as little-endian words: the same on every machine and with every version of numpy, and the first words do not
    depend on how many are asked.
    """
    data = hashlib.shake_256(_message(root, names)).digest(8 * count)
    return np.frombuffer(data, dtype="<u8").astype(np.uint64)


def generator(seed: int) -> np.random.Generator:
    """A numpy generator (PCG64) of its own for this seed; for draws that need not outlive a version of numpy."""
    return np.random.Generator(np.random.PCG64(seed))


def _message(root: int, names: tuple[str | int, ...]) -> bytes:
    """Root and names as bytes, without ambiguity."""
    if root < 0:
        raise ValueError(f"a seed is a whole number >= 0, not {root}")
    parts = []
    for name in (root, *names):
        kind, text = (b"n", str(int(name)).encode()) if isinstance(name, int) else (b"t", name.encode())
        parts.append(kind + str(len(text)).encode() + b":" + text)
    return b"".join(parts)

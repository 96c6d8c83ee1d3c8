"""Tallies as arrays and back: what is decoded merges and answers with the same bits, also after a journey through bytes."""

from __future__ import annotations

import subprocess
import sys
from dataclasses import replace
from pathlib import Path

import numpy as np
import pytest
from hypothesis import given, settings
from hypothesis import strategies as st

from tests.analysis_models import Model, complete, folded, gaussian, tallied
from tests.test_analysis_tree import FAILING, SOUND, same
from uq.analysis.tallies import Tallies
from uq.design.design import Design

ROOT = Path(__file__).parent.parent
ROWS = 16
PLAIN = Model(("p",), (0.0, 1.0), lambda u, times: gaussian(np.repeat(u, 2, axis=1), times))


def journey(ask: object, tallies: Tallies) -> Tallies:
    """Through bytes, as a file keeps them."""
    kept = {path: (array.tobytes(), array.dtype.str, array.shape) for path, array in tallies.arrays().items()}
    return Tallies.of_arrays(ask, {path: np.frombuffer(told, kind).reshape(shape) for path, (told, kind, shape) in kept.items()})  # type: ignore[arg-type]


@pytest.mark.parametrize("keep", [10**9, 1], ids=["kept", "counted"])
@pytest.mark.parametrize("model", [SOUND, FAILING, PLAIN], ids=["sound", "failing", "plain"])
def test_decoded_tallies_merge_and_answer_with_the_same_bits(model: Model, keep: int) -> None:
    design = Design(model.inputs, 3, ROWS, replicates=4)
    ask = replace(complete(model, design), keep_bytes=keep, members=design.members)
    parts = tallied(model, design, ask, design.blocks(0, ROWS, 4))
    expected = folded(list(parts)).findings(ask)

    @settings(max_examples=15, deadline=None, derandomize=True)
    @given(st.lists(st.booleans(), min_size=len(parts), max_size=len(parts)), st.randoms(use_true_random=False))
    def check(travels: list[bool], random: object) -> None:
        heap = [journey(ask, part) if travel else part for part, travel in zip(parts, travels, strict=True)]
        while len(heap) > 1:
            left = heap.pop(random.randrange(len(heap)))  # type: ignore[attr-defined]
            right = heap.pop(random.randrange(len(heap)))  # type: ignore[attr-defined]
            both = left.merge(right)
            heap.append(journey(ask, both) if random.random() < 0.3 else both)  # type: ignore[attr-defined]
        again = journey(ask, heap[0])
        assert same(again.findings(ask), expected)
        before, after = heap[0].arrays(), again.arrays()
        assert before.keys() == after.keys()
        for path, array in before.items():
            assert array.dtype == after[path].dtype, path
            assert array.tobytes() == after[path].tobytes(), path

    check()


def test_kept_values_are_not_copied() -> None:
    design = Design(SOUND.inputs, 3, ROWS, replicates=2)
    ask = complete(SOUND, design)
    part = tallied(SOUND, design, ask, design.blocks(0, ROWS, ROWS))[0]
    arrays = part.arrays()
    assert arrays["courses/values/0-0"] is part.held["courses"].values.pieces[0, 0]
    assert {path.split("/")[0] for path in arrays} == set(part.held)


def test_a_run_goes_on_beyond_what_is_kept() -> None:
    """Kept values of the smaller run are counted when it is taken up again: the answers are those of a fresh larger run."""
    small, large = Design(FAILING.inputs, 3, 16, replicates=4), Design(FAILING.inputs, 3, 32, replicates=4)
    ask = replace(complete(FAILING, large), members=large.members, keep_bytes=8 * small.members * 9)
    before = replace(ask, members=small.members)
    assert before.keeps
    assert not ask.keeps
    held = folded(tallied(FAILING, small, before, small.blocks(0, 16, 8)))
    more = folded(tallied(FAILING, large, ask, large.blocks(16, 32, 16)))
    fresh = folded(tallied(FAILING, large, ask, large.blocks(0, 32, 32)))
    assert same(journey(ask, held).merge(more).findings(ask), fresh.findings(ask))


def use_what_was_decoded() -> None:
    """Arrays read from a file may not be written to; kernels are not compiled once more for such."""
    from uq.analysis import compiled, counting

    design = Design(FAILING.inputs, 3, ROWS, replicates=2)
    for keep in (10**9, 1):
        ask = complete(FAILING, design, keep_bytes=keep, members=design.members)
        for name in ("centre", "half_width", "outcome_centre"):
            getattr(ask, name).flags.writeable = False
        left, right = (journey(ask, part) for part in tallied(FAILING, design, ask, design.blocks(0, ROWS, ROWS // 2))[:2])
        left.merge(right).findings(ask)
    for kernel in (*compiled.KERNELS, counting.count_2, counting.add_counts_1):
        assert len(kernel.signatures) == 1, kernel


def test_what_was_decoded_needs_no_other_machine_code() -> None:
    # What a process has compiled depends on all that it did before, other tests included: a new one tells.
    program = "from tests.test_analysis_encoding import use_what_was_decoded; use_what_was_decoded()"
    done = subprocess.run([sys.executable, "-c", program], cwd=ROOT, capture_output=True, text=True, check=False)
    assert done.returncode == 0, done.stderr

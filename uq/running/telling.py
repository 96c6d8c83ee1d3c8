"""What is settled so far, told at the ends of rounds to whoever listens."""

from __future__ import annotations

from collections.abc import Callable, Iterator, Sequence
from contextlib import contextmanager

import numpy as np

from uq.analysis.ask import Ask
from uq.analysis.precision import Asked, Headline
from uq.running.observer import HeadlineAnswer, Listener, Observer

# Working out what nobody has asked for may cost this share of a run; what it costs is not known before the first time.
SHARE = 0.02
FIRST_GUESS = 0.05


def answers(headlines: Sequence[Headline], ask: Ask, asked: Asked | None) -> list[HeadlineAnswer]:
    """Headline numbers one by one."""
    found = []
    for each in headlines:
        wanted = asked is not None and getattr(asked, each.kind) is not None
        reached = each.reached(asked).reshape(-1) if asked is not None and wanted else None
        numbers = (np.asarray(array, dtype=np.float64).reshape(-1).tolist() for array in (each.value, each.low, each.high))
        for number, ((value, low, high), place) in enumerate(zip(zip(*numbers, strict=True), _places(each, ask), strict=True)):
            settled = None if reached is None else bool(reached[number])
            found.append(HeadlineAnswer(each.group, each.name, place, each.kind, value, low, high, each.unit, settled))
    return found


def _places(each: Headline, ask: Ask) -> list[str]:
    """What the entries of a variable are called along its axis."""
    known: dict[str, Sequence[object]] = {
        "by": next((limit.by for limit in ask.limits if each.group == f"limits/{limit.name}"), ()),
        "quantile": ask.quantiles,
        "input": ask.inputs,
        "group": [group.name for group in ask.groups],
    }
    names = known.get(each.dims[0], ()) if each.dims else ("",)
    size = int(np.size(each.value))
    return (
        [f"{name:g}" if isinstance(name, float) else str(name) for name in names] if len(names) == size else [str(n) for n in range(size)]
    )


def worth(elapsed: float, spent: float, last: float) -> bool:
    """Whether the next telling, of twice as many members as the last one, stays within its share of a run of so many seconds."""
    return spent + 2 * last <= SHARE * elapsed


class Telling:
    """Tells an observer that listens; elapsed: seconds of the run."""

    def __init__(self, observer: Observer, elapsed: Callable[[], float]) -> None:
        self._listener = observer if isinstance(observer, Listener) else None
        self._elapsed, self._spent, self._last = elapsed, 0.0, FIRST_GUESS

    def worth_it(self) -> bool:
        """Whether somebody listens and the time is there."""
        return self._listener is not None and worth(self._elapsed(), self._spent, self._last)

    @contextmanager
    def measured(self) -> Iterator[None]:
        """What is done meanwhile is counted as the cost of telling."""
        begin = self._elapsed()
        yield
        self._last = self._elapsed() - begin
        self._spent += self._last

    def tell(self, members: int, headlines: Sequence[Headline], ask: Ask, asked: Asked | None) -> None:
        """A round has ended with so many A and B members."""
        if self._listener is not None:
            self._listener.round(members, answers(headlines, ask, asked))

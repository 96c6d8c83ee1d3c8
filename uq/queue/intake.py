"""From a study, or a batch of them, to what is handed in: times of day become moments."""

from __future__ import annotations

from collections.abc import Iterator
from dataclasses import dataclass
from typing import TYPE_CHECKING

from uq.clock import When, Window, zone_of
from uq.queue.job import RETRIES, Intake
from uq.queue.times import deadline_of

if TYPE_CHECKING:
    from uq.study.batch import Batch
    from uq.study.study import Study


@dataclass(frozen=True, kw_only=True)
class Terms:
    """How a job shall run: the larger priority first (None: nothing said, as 0), not before a time, with the answer so far at a deadline,
    so many retries."""

    priority: int | None = None
    not_before: When | None = None
    deadline: When | None = None
    retries: int = RETRIES


def intake_of(study: Study, now: float, terms: Terms = Terms(), window: Window | None = None, batch: tuple[str, str] = ("", "")) -> Intake:
    """What is handed in of a study. now: epoch seconds; batch: name and title of the one it is of.

    Local times are of the window's zone, else of this machine's.
    """
    zone = zone_of(window.timezone if window else "")
    not_before = None if terms.not_before is None else terms.not_before.after(now, zone)
    deadline = None if terms.deadline is None else deadline_of(terms.deadline, now, not_before, window)
    name, title = batch
    return Intake(
        text=study.text,
        files=study.files,
        fingerprint=study.fingerprint,
        name=study.name,
        title=study.title,
        members=study.plan.members,
        batch=name,
        batch_title=title,
        changed=study.changes,
        priority=terms.priority or 0,
        not_before=not_before,
        deadline=deadline,
        window=window,
        retries=terms.retries,
        stated=frozenset(stated(terms, window)),
    )


def stated(terms: Terms, window: Window | None) -> Iterator[str]:
    """The terms that say something: what is as it is by itself does not."""
    said = {"priority": terms.priority, "not_before": terms.not_before, "deadline": terms.deadline, "window": window}
    yield from (name for name, value in said.items() if value is not None)
    if terms.retries != RETRIES:
        yield "retries"


def intakes_of(batch: Batch, now: float) -> list[Intake]:
    """What is handed in of a batch, one for every study in it."""
    return [
        intake_of(
            each.study,
            now,
            Terms(priority=each.priority or None, not_before=each.not_before, deadline=each.deadline, retries=each.retries),
            batch.window,
            (batch.name, batch.title),
        )
        for each in batch.planned
    ]

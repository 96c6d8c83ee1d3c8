"""What is wrong with a study by a change, told where the change stands: in a scenario, or in a batch."""

from __future__ import annotations

from collections.abc import Iterable, Iterator, Mapping

from uq.errors import Mistake
from uq.study.locate import Path
from uq.study.names import tables
from uq.study.notes import Notes, dotted
from uq.study.work import Work


def relay(path: Path, places: Mapping[str, Path], own: Iterable[Mistake], base: Notes) -> None:
    """Mistakes of a changed study to the notes of what changes it, at the change that brought them, but those that are noted already.

    path: where the change stands; places: where the new value of each changed key does.
    """
    told = {(mistake.key, mistake.found, mistake.expected) for mistake in base.mistakes}
    for mistake in own:
        if (mistake.key, mistake.found, mistake.expected) in told:
            continue
        key = next((key for key in places if _within(mistake, key)), None)
        if key is None:
            at = f" at {mistake.line}:{mistake.column}" if mistake.line else ""
            base.at_value(path, f"a change by which `{mistake.key}`{at} has {mistake.found}", mistake.expected, mistake.remedy)
        else:
            below = mistake.key.removeprefix(dotted(tuple(key.split(".")))).lstrip(".")
            found = mistake.found if below in ("", "value") else f"{mistake.found} in {below}"
            base.at_value(places[key], found, mistake.expected, mistake.remedy)


def _within(mistake: Mistake, key: str) -> bool:
    """Whether a mistake is about what was changed, or the change within what it is about."""
    start = dotted(tuple(key.split(".")))
    return mistake.key == start or mistake.key.startswith((f"{start}.", f"{start}[")) or start.startswith(f"{mistake.key}.")


def unlike(base: Work, other: Work) -> Iterator[tuple[Path, str, str]]:
    """What of a scenario cannot be compared with the study: key, found and expected."""
    for mine, theirs in zip((*base.watched, *base.quantities), (*other.watched, *other.quantities), strict=True):
        if mine.unit != theirs.unit:
            name = theirs.name.partition("[")[0]
            table = next(key for key in ("outcomes", "terms", "states") if name in tables(other.document, key))
            yield (table, name), f"`{name}` in {theirs.unit}", f"{mine.unit}, as in the study itself"

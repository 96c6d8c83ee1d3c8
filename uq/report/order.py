"""An order only as fine as the intervals allow."""

from __future__ import annotations

from collections.abc import Sequence

from uq.report.answers import Driver


def ordered(drivers: Sequence[Driver]) -> list[list[Driver]]:
    """Drivers by their total share, largest first, in groups: between two groups every interval above lies clear of every one below.

    Within a group the order is not settled. Drivers without a share come last, as a group of their own.
    """
    known = sorted((each for each in drivers if not each.total.missing), key=lambda each: -each.total.value)
    unknown = [each for each in drivers if each.total.missing]
    groups: list[list[Driver]] = []
    for place, driver in enumerate(known):
        above, below = known[:place], known[place:]
        if place == 0 or _clear(above, below):
            groups.append([])
        groups[-1].append(driver)
    return groups + ([unknown] if unknown else [])


def _clear(above: Sequence[Driver], below: Sequence[Driver]) -> bool:
    """Whether every interval above lies above every interval below; an end that is not known settles nothing."""
    return min(each.total.low for each in above) > max(each.total.high for each in below)

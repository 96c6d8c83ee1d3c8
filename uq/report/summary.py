"""What the terminal says after a run, and whenever a result is shown: plain text from the opened file alone."""

from __future__ import annotations

import shlex

from uq.report.answered import expected_section, limits_section
from uq.report.answers import Headline
from uq.report.drivers import drivers_section
from uq.report.headline import headline
from uq.report.plain import paragraphs, plain, wrapped
from uq.report.spoken import duration, threads
from uq.report.trust import trust_section
from uq.report.words import words_section
from uq.store.folder import SHORT
from uq.store.result import Result

# The order of results-format.md, "What the terminal says after a run".
SECTIONS = (limits_section, expected_section, drivers_section, trust_section, words_section)


def summary(result: Result) -> str:
    """The result in plain words: caution, limits, what to expect, what drives it, how far to trust it, in words, where it lies."""
    head = headline(result)
    sections = [opening(str(head.facts["title"]), str(head.facts["caution"]))]
    sections += [lines for section in SECTIONS if (lines := section(head))]
    sections.append(_closing(head, result))
    return "\n\n".join("\n".join(lines) for lines in sections)


def opening(title: str, caution: str) -> list[str]:
    """The title, and the caution where there is one."""
    lines = wrapped(plain(title))
    for place, text in enumerate(paragraphs(caution)):
        lines += wrapped(text if place else f"Caution: {text}", "  " if place else "", "  ")
    return lines


def _closing(head: Headline, result: Result) -> list[str]:
    facts, folder = head.facts, plain(shlex.quote(str(result.folder)))
    counts = f"{facts['members']} members, {facts['solves']} solves, {duration(facts['wall_time'])} on {threads(facts['threads'])}"
    prints = f"seed {facts['seed']}, study fingerprint {str(facts['study_fingerprint'])[:SHORT]}"
    return [
        *wrapped(f"{counts}, {prints}."),
        f"Folder {folder}: result.nc has every number, study.toml is the study as it was read.",
        f"Next: uq show {folder} --json",
    ]

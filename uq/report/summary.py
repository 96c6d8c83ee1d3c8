"""What the terminal says after a run, and whenever a result is shown: plain text from the opened file alone."""

from __future__ import annotations

import shlex

from uq.report.answered import expected_section, limits_section
from uq.report.answers import Headline
from uq.report.drivers import drivers_section
from uq.report.entries import ENDS, of_ends
from uq.report.failed import NOTHING_LEFT, all_failed, failure_warnings
from uq.report.headline import headline
from uq.report.plain import NARROWEST_PAGE, WIDTH, Part, Text, laid, paragraphs, plain
from uq.report.scenarios import scenarios_section
from uq.report.settling import next_commands, settled_section
from uq.report.spoken import duration, threads
from uq.report.trust import failed_members, trust_section
from uq.report.words import words_section
from uq.store.folder import SHORT
from uq.store.result import Result

# The order of results-format.md, "What the terminal says after a run".
SECTIONS = (limits_section, expected_section, drivers_section, scenarios_section, settled_section, trust_section, words_section)


def summary(result: Result, width: int = WIDTH) -> str:
    """The result in plain words, so many columns wide (at least 60): caution, limits, what to expect, what drives it, how far to trust it,
    in words, where it lies."""
    head, cut = of_ends(headline(result))
    first = [*opening(str(head.facts["title"]), str(head.facts["caution"])), *stopped_early(head), *failure_warnings(head)]
    sections: list[list[Part]]
    if all_failed(head):
        sections = [first, [NOTHING_LEFT], [Text(plain(text), "", "  ") for text in failed_members(head)]]
    else:
        sections = [first, *(parts for section in SECTIONS if (parts := section(head)))]
    sections += [[Text(ENDS)]] if cut else []
    sections.append(_closing(head, result))
    columns = max(width, NARROWEST_PAGE)
    return "\n\n".join("\n".join(laid(parts, columns)) for parts in sections)


def opening(title: str, caution: str) -> list[Part]:
    """The title, and the caution where there is one."""
    parts: list[Part] = [Text(plain(title))]
    for place, text in enumerate(paragraphs(caution)):
        parts.append(Text(text, "  ") if place else Text(f"Caution: {text}", "", "  "))
    return parts


def stopped_early(head: Headline) -> list[Part]:
    """That the run has not come to its end: a deadline came first."""
    if head.facts.get("stopped") != "deadline":
        return []
    members, asked = head.facts["members"], head.facts["members_asked"]
    text = f"The deadline came first: this is the answer of {members} of {asked} members. The same run can go on from here."
    return [Text(text, "", "  ")]


def _closing(head: Headline, result: Result) -> list[Part]:
    facts, folder = head.facts, plain(shlex.quote(str(result.folder)))
    where = f"a cluster ({plain(str(facts['cluster']))})" if "cluster" in facts else threads(facts["threads"])
    counts = f"{facts['members']} members, {facts['solves']} solves, {duration(facts['wall_time'])} on {where}"
    prints = f"seed {facts['seed']}, study fingerprint {str(facts['study_fingerprint'])[:SHORT]}"
    return [
        Text(f"{counts}, {prints}."),
        f"Folder {folder}",
        Text("result.nc has every number in full, study.toml is the study as it was read.", "  "),
        *next_commands(head, str(result.folder), result.extensible),
    ]

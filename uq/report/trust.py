"""The section of the summary that says how far to trust the answers."""

from __future__ import annotations

from collections.abc import Iterable

from uq.report.answers import Headline, RankingAnswer
from uq.report.plain import plain, wrapped
from uq.report.rounding import alone
from uq.solve.batch import Status
from uq.solve.statuses import describe

# "One person's range" and worse.
WEAK = 1
# A total share whose interval reaches above this makes an input influential.
INFLUENTIAL = 0.1
NAMED = 8

POLICIES = {
    "bound": "probabilities and quantiles count them both ways, as below and as above everything",
    "exclude": "they are left out: every number is given success",
    "refuse": "the study withholds statements where members fail",
}


def trust_section(head: Headline) -> list[str]:
    """Members, failures, solver, inputs, dependence, warnings, and what is missing, in this order."""
    lines = ["How far to trust this"]
    for text in (
        *_members(head),
        *_solver(head),
        *_inputs(head),
        "Dependence: all inputs are taken as independent." if len(head.inputs) > 1 else "",
        *(f"Warning: {text}" for text in head.warnings),
    ):
        if text:
            lines += wrapped(plain(text), "  ", "    ")
    return lines


def _members(head: Headline) -> Iterable[str]:
    facts = head.facts
    asked, members, failed = (int(facts[name]) for name in ("members_asked", "members", "members_failed"))
    more = f" ({asked} asked)" if asked != members else ""
    if not failed and not head.failed:
        yield f"Members: {members}{more}, none failed."
        return
    yield f"Members: {members}{more}, of which {failed} failed ({alone(100 * failed / members, 2)} %)."
    yield f"Failed members: {POLICIES.get(str(facts['failures']), '')}."
    for status, count in head.failed:
        solves = "1 solve" if count == 1 else f"{count} solves"
        yield f"{solves} of {facts['solves']} ended with {status}. {describe(Status[status])}"


def _solver(head: Headline) -> Iterable[str]:
    tolerance = alone(head.facts["accuracy"])
    yield f"Solver: {head.facts['method']}, relative tolerance {tolerance}; its error is not compared with the bands yet."
    if head.fell_back:
        yield f"Scale: the pilot gave none for {_listed(head.fell_back)}; the absolute tolerance there is a guess."


def _inputs(head: Headline) -> Iterable[str]:
    silent = [row.label for row in head.inputs if not row.source.strip()]
    if silent:
        yield f"Sources: not stated for {len(silent)} of {len(head.inputs)} inputs: {_listed(silent)}."
    weak = [row for row in head.inputs if row.evidence is not None and row.evidence <= WEAK]
    influential = {name for ranking in head.rankings for name in _influential(ranking)}
    told = [f"{row.label} (evidence {row.evidence})" for row in weak if row.name in influential]
    if told:
        yield f"Weak evidence among the influential inputs: {_listed(told)}."


def _influential(ranking: RankingAnswer) -> Iterable[str]:
    return (driver.input.name for driver in ranking.drivers if driver.total.value >= INFLUENTIAL)


def _listed(texts: Iterable[str]) -> str:
    """Texts one after another; many are cut short, with their number."""
    all_of_them = list(texts)
    if len(all_of_them) > NAMED:
        return ", ".join(all_of_them[:NAMED]) + f" and {len(all_of_them) - NAMED} more"
    return ", ".join(all_of_them)

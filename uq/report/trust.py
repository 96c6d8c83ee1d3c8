"""The section of the summary that says how far to trust the answers."""

from __future__ import annotations

import math
from collections.abc import Iterable

from uq.report.answers import Headline, InputRow, Pair, RankingAnswer
from uq.report.chances import in_per_cent
from uq.report.plain import Part, Text, plain
from uq.report.rounding import alone, at_most
from uq.report.spoken import MOST_LISTED, listed, per_cent, quoted
from uq.solve.batch import Status
from uq.solve.statuses import describe
from uq.store.facts import method_words

# "One person's range" and worse.
WEAK = 1
# An error by counting into bins that is no larger, as a share of the 5-95 % width, is not told for every quantity.
COARSE = 1e-3
# A total share that reaches this makes an input influential.
INFLUENTIAL = 0.1

POLICIES = {
    "bound": "probabilities and quantiles count them both ways, as below and as above everything",
    "exclude": "they are left out: every number is given success",
    "refuse": "the study withholds statements where members fail",
}


def trust_section(head: Headline) -> list[Part]:
    """What intervals mean and where limits are judged, then members, failures, solver, inputs, dependence, and warnings."""
    told = (
        *_intervals(head),
        *_judged(head),
        *failed_members(head),
        *_solver(head),
        *_inputs(head),
        *_dependence(head),
        *_measured(head),
        *_binned(head),
        *_few(head),
        *(f"Warning: {text}" for text in head.warnings),
    )
    return ["How far to trust this", *(Text(plain(text), "  ", "    ") for text in told)]


def _intervals(head: Headline) -> Iterable[str]:
    yield (
        f"Intervals ({per_cent(head.facts['confidence'])}) show the effect of the finite number of members only, not errors of the model, "
        "of the inputs, of the output times or of the solver."
    )


def _few(head: Headline) -> Iterable[str]:
    """Means and deviations that rest on few members."""
    for each in (*head.watched, *head.outcomes):
        for text in each.cautions:
            yield f"Few members: {quoted(each.label)}, {text}."


def _binned(head: Headline) -> Iterable[str]:
    """That values were counted into bins, and of which quantiles that can be seen."""
    if not head.binned:
        return
    coarse = []
    for answer in head.binned:
        levels = [(level, share) for level, share in answer.shares if share > COARSE]
        if levels:
            told = (f"{per_cent(level)} point up to {at_most(share) if math.isfinite(share) else 'all'}" for level, share in levels)
            coarse.append(f"{quoted(answer.label)}, {', '.join(told)}")
    but = f", but for these, in shares of that width: {'; '.join(coarse)}" if coarse else ""
    yield (
        "Histograms: there were more values than `keep` in [plan] allows, so that they were counted into bins. Quantiles are right to "
        f"{alone(COARSE)} of the width from 5 to 95 %{but}."
    )


def _judged(head: Headline) -> Iterable[str]:
    """Where limits and outcomes are looked at."""
    judged = [name for name, asked in (("limits", head.limits), ("outcomes", head.outcomes)) if asked]
    if not judged or len(head.times) < 2:
        return
    what = " and ".join(judged).capitalize()
    yield f"{what} are judged at {len(head.times)} output times, {head.clock.apart(head.times)}; what happens between them is not seen."


def failed_members(head: Headline) -> Iterable[str]:
    """How many members there are and how many failed, how that is counted, and why they did."""
    facts = head.facts
    members, failed, asked = int(facts["members"]), int(facts["members_failed"]), facts.get("members_asked")
    more = "" if asked in (None, members) else f" ({asked} asked)" if head.precision is None else f" (at most {asked} asked)"
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
    method = method_words(str(head.facts["method"]))
    yield f"Solver: {method}, relative tolerance {tolerance}; its error is not compared with the bands yet."
    if head.work is not None:
        work = head.work
        share = f"{alone(100 * work.stiff_share, 2)} % of the solves took stiff ones ({work.switches} changes)"
        yield f"Steps: {work.steps} accepted, {work.rejections} rejected; {share if work.stiff_share else 'none were stiff'}."
    if head.fell_back:
        yield f"Scale: the pilot gave none for {listed(head.fell_back)}; the absolute tolerance there is a guess."


def _inputs(head: Headline) -> Iterable[str]:
    silent = [row.label for row in head.inputs if not row.source.strip()]
    if silent and len(silent) == len(head.inputs):
        yield "Sources: stated for no input."
    elif silent:
        yield f"Sources: not stated for {len(silent)} of {len(head.inputs)} inputs: {listed(silent)}."
    told = [f"{quoted(row.label)} (evidence {row.evidence})" for row in weak_inputs(head)]
    if told:
        yield f"Weak evidence among the influential inputs: {'; '.join(told)}."


def weak_inputs(head: Headline) -> list[InputRow]:
    """Influential inputs that rest on a guess or on one person's range."""
    influential = {name for ranking in head.rankings for name in _influential(ranking)}
    return [row for row in head.inputs if row.evidence is not None and row.evidence <= WEAK and row.name in influential]


def _dependence(head: Headline) -> Iterable[str]:
    """Every pair that goes together with its rank correlation, asked and achieved."""
    if len(head.inputs) < 2:
        return
    first, *others = _as_stated(head)
    alike = "; ".join(f"{names} ({why})" for names, why in _alike(head))
    yield first + (f" Probably not independent: {alike}." if alike else "")
    yield from others


def _as_stated(head: Headline) -> Iterable[str]:
    if not head.pairs and not head.dependence:
        yield "Dependence: all inputs are taken as independent."
        return
    told = [f"{quoted(pair.one.label)} with {quoted(pair.other.label)}, {_correlation(pair)}" for pair in head.pairs]
    names = {row.name for pair in head.pairs for row in (pair.one, pair.other)}
    others = "; all others are taken as independent" if len(names) < len(head.inputs) else ""
    yield f"Dependence (rank correlations): {'; '.join(told) or 'as stated'}{others}."
    yield from (f"Dependence as stated: {text}." for text in head.dependence)


def _alike(head: Headline) -> Iterable[tuple[str, str]]:
    """Inputs of one group or of one source of which some go together with no other of these.

    Entries of one declaration count as one: one text for all says nothing of how they go together.
    """
    told: list[set[str]] = []
    for kind in ("group", "source"):
        by_text: dict[str, list[InputRow]] = {}
        for row in head.inputs:
            by_text.setdefault(" ".join(getattr(row, kind).split()).casefold(), []).append(row)
        for text, rows in by_text.items():
            names = {row.name for row in rows}
            linked = {each.name for pair in head.pairs for each in (pair.one, pair.other) if {pair.one.name, pair.other.name} <= names}
            declared = {declaration(row.name): row for row in reversed(rows)}
            if not text or len(declared) < 2 or names <= linked or any(names <= before for before in told):
                continue
            told.append(names)
            why = f"group {rows[0].group}" if kind == "group" else f'same source, "{rows[0].source.strip()}"'
            yield _and(_of_all_entries(row) for row in reversed(declared.values())), why


def declaration(name: str) -> str:
    """What an input is declared as: all entries of T[0], T[1], ... as T."""
    return name.partition("[")[0]


def _of_all_entries(row: InputRow) -> str:
    """The label of a declaration, without which entry."""
    return row.label.removesuffix(row.name.removeprefix(declaration(row.name))).rstrip()


def _and(labels: Iterable[str]) -> str:
    every = [quoted(label) for label in labels]
    if len(every) > MOST_LISTED:
        return listed(every)
    *first, last = every
    return f"{', '.join(first)} and {last}"


def _correlation(pair: Pair) -> str:
    """To two places; of a correlation nobody states more."""
    asked = f"asked {pair.asked:.2f}"
    return asked if math.isnan(pair.achieved) else f"{asked}, got {pair.achieved:.2f}"


def _measured(head: Headline) -> Iterable[str]:
    """How many of the observations lie between the outermost quantiles."""
    for each in head.measured:
        inside, count = each.share_inside, each.observations
        if inside.missing:
            yield f"Measured: of {each.label} nothing can be said ({each.reason or 'members failed'})."
            continue
        ends = in_per_cent(inside).interval
        share = f" (as a share {ends} %, were each by itself)" if ends else ""
        expected = "" if math.isnan(each.expected) else f"; {alone(100 * each.expected)} % are expected there"
        what = f"{round(inside.value * count)} of {count} observations of {each.label}"
        where = "of what would be measured, the deviation of a measurement counted" if each.widened else "of the forecast"
        # An end of the interval below what is expected is the test whether so few can be chance.
        few = " That is fewer than expected: look at the model, its inputs and the measurements." if inside.high < each.expected else ""
        yield f"Measured: {what} lie between the outermost quantiles {where}{share}{expected}.{few}"


def _influential(ranking: RankingAnswer) -> Iterable[str]:
    return (row.name for driver in ranking.places if driver.shares.share.value >= INFLUENTIAL for row in driver.rows)

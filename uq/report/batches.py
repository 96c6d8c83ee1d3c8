"""A batch as a table: what was changed against what came out."""

from __future__ import annotations

from collections.abc import Iterable, Mapping, Sequence
from string import ascii_uppercase

from uq.report.jobs import JobFacts, Now, counted, short_keys, shown, stands
from uq.report.kept import KeptAnswer, called, of_json
from uq.report.plain import Part, Table, Text, laid, plain

# Answers side by side; with more of them no line can be read.
MOST_ANSWERS = 3
# States of which the table says no more than the word.
PLAIN_STATES = frozenset(("done", "waiting"))


def batches_text(batches: Mapping[tuple[str, str], Sequence[JobFacts]], now: Now, columns: int) -> str:
    """Batches by name and title, a table for each study in them."""
    parts: list[Part] = []
    for (name, title), jobs in batches.items():
        head = f"{plain(title)} ({plain(name)})" if title else plain(name)
        parts += ["", Text(f"{head}: {counted(jobs)}")]
        for together in _alike(jobs):
            parts += ["", *study_table(together, now)]
    return "\n".join(laid(parts[1:], columns)) if parts else "no batches\nNext: uq submit BATCH"


def _alike(jobs: Iterable[JobFacts]) -> list[list[JobFacts]]:
    """The jobs of one study in which the same keys were changed, together."""
    groups: dict[tuple[str, ...], list[JobFacts]] = {}
    for job in jobs:
        groups.setdefault((job.name, *job.changed), []).append(job)
    return list(groups.values())


def study_table(jobs: Sequence[JobFacts], now: Now) -> Iterable[Part]:
    """What was changed, the state of every job, its answers with their intervals; in the order of what was changed."""
    jobs = sorted(jobs, key=lambda job: (*map(place_of, job.changed.values()), job.number))
    asked = asked_of(jobs)
    yield Text(plain(f"{jobs[0].name}: {jobs[0].title}"))
    for letter, what in zip(ascii_uppercase, asked, strict=False):
        yield Text(f"{letter}  {what}", "  ", "     ")
    keys = short_keys(tuple(jobs[0].changed))
    head = [*keys, "job", "state"]
    for letter, _ in zip(ascii_uppercase, asked, strict=False):
        head += [letter, "interval"]
    rows: list[Sequence[str]] = [head]
    for job in jobs:
        rows += _rows(job, asked, now)
    intervals = tuple(range(len(keys) + 3, len(head), 2))
    yield Table(rows, intervals)


def place_of(value: object) -> tuple[bool, float, str]:
    """Where a changed value stands among others: numbers by size, before all that is none."""
    number = isinstance(value, int | float)
    return not number, float(value) if isinstance(value, int | float) else 0.0, "" if number else str(value)


def asked_of(jobs: Sequence[JobFacts]) -> list[str]:
    """The answers that are shown, by what they are called: as many as fit; of a quantity the highest quantile."""
    highest: dict[str, str] = {}
    for job in jobs:
        # The levels of a quantity follow each other from below.
        highest |= {answer.what: called(answer) for answer in answers_in(job)}
    return list(highest.values())[:MOST_ANSWERS]


def answers_in(job: JobFacts) -> list[KeptAnswer]:
    """The headline answers that the queue keeps of a job, so far or in the end."""
    return [of_json(each) for each in job.progress.get("settled", ())]


def _rows(job: JobFacts, asked: Sequence[str], now: Now) -> Iterable[Sequence[str]]:
    known = {called(answer): answer for answer in answers_in(job)}
    cells = [plain(shown(value)) for value in job.changed.values()]
    cells += [str(job.number), job.state]
    for what in asked:
        cells += _short(*known[what].texts) if what in known else ("", "")
    yield cells
    if job.state not in PLAIN_STATES and (told := stands(job, now)):
        yield (f"  job {job.number}: {told}",)


def _short(value: str, interval: str) -> tuple[str, str]:
    """Both as short as several of them side by side must be: a count without its noun, an end without its "1 in N"."""
    return value.removesuffix(" members"), interval.partition(", 1 in")[0]


def settling(answers: Iterable[KeptAnswer]) -> list[Part]:
    """What is settled so far: every answer with its interval, and whether that is as narrow as asked."""
    rows: list[Sequence[str]] = []
    for answer in answers:
        value, interval = answer.texts
        rows.append((called(answer), value, interval, _verdict(answer)))
    return [Table(rows, (2,))] if rows else []


def _verdict(answer: KeptAnswer) -> str:
    return {None: "", True: "settled", False: "not yet"}[answer.settled]

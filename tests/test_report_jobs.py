"""How jobs and batches are told."""

from __future__ import annotations

import math
from dataclasses import dataclass, field
from datetime import UTC
from typing import Any

import pytest

from uq.clock import Window
from uq.report.batches import batches_text, settling
from uq.report.jobs import SILENT, STALLED, Now, counted, jobs_json, jobs_text, short_keys, stands
from uq.report.kept import KeptAnswer, called, of_json
from uq.report.plain import laid

# 1 December 2026, 22:41 UTC.
NOW = Now(1796164860.0, UTC)
ATHENS = Window("20:00", "07:00", "Europe/Athens")


@dataclass
class Told:
    """A job as a report sees it."""

    number: int = 1
    state: str = "waiting"
    name: str = "tank"
    title: str = "A tank"
    batch: str = ""
    changed: dict[str, object] = field(default_factory=dict)
    progress: dict[str, Any] = field(default_factory=dict)
    reason: str = ""
    note: str = ""
    priority: int = 0
    until: float | None = None
    deadline: float | None = None
    window: Window | None = None
    beat: float | None = None
    moved: float | None = None
    started: float | None = None
    ended: float | None = None
    members: int = 512
    fingerprint: str = "f"
    runner: str = ""
    attempt: int = 0
    stumbles: int = 0
    submitted: float = 0.0
    not_before: float | None = None
    folder: str | None = None


RUNNING = {"state": "running", "beat": NOW.time, "moved": NOW.time, "started": NOW.time - 100}
SOLVING = {"done": 32768, "total": 131072, "failed": 2, "seconds_left": 363.2, "stage": "round 5"}


@pytest.mark.parametrize(
    ("job", "words"),
    [
        (Told(), ""),
        (Told(priority=5), "priority 5"),
        (Told(state="held", until=NOW.time + 3600), "until 23:41"),
        (Told(state="held", until=NOW.time + 86400, reason="cannot write"), "until 2 Dec 22:41; cannot write"),
        (Told(deadline=NOW.time + 400 * 86400), "deadline 5 Jan 2028 22:41"),
        (Told(deadline=NOW.time + 3600, window=ATHENS), "deadline 23:41 (01:41 Europe/Athens)"),
        (Told(state="held", until=NOW.time + 600, window=ATHENS), "until 22:51 (00:51 Europe/Athens)"),
        (Told(state="held", until=NOW.time + 600, window=Window("22:00", "06:00", "Europe/London")), "until 22:51"),
        (Told(**RUNNING), "starting"),
        (Told(**RUNNING, progress=SOLVING), "32768 of 131072 solves, 6 min 3 s left, 2 failed"),
        (Told(**RUNNING, progress={**SOLVING, "done": 131072, "failed": 0}), "131072 of 131072 solves, round 5"),
        (Told(state="paused", progress=SOLVING), "32768 of 131072 solves kept, 2 failed"),
        (Told(state="done", started=NOW.time - 7500, ended=NOW.time), "ended 22:41, took 2 h 5 min"),
        (Told(state="cancelled", started=NOW.time - 7500, ended=NOW.time), "ended 22:41"),
        (Told(state="failed", ended=NOW.time, reason="a\x1b[2Jb"), "ended 22:41; a\\x1b[2Jb"),
    ],
)
def test_how_a_job_stands(job: Told, words: str) -> None:
    assert stands(job, NOW) == words


def test_a_job_without_progress_and_one_whose_runner_is_silent_are_flagged() -> None:
    stalled = Told(**{**RUNNING, "moved": NOW.time - STALLED - 60}, progress=SOLVING)
    silent = Told(**{**RUNNING, "beat": NOW.time - SILENT - 60}, progress=SOLVING)
    assert "NO PROGRESS for 16 min 0 s" in stands(stalled, NOW)
    assert "NOT HEARD OF for 2 min 0 s" in stands(silent, NOW)
    assert "NO PROGRESS" not in stands(Told(**{**RUNNING, "moved": NOW.time - STALLED}, progress=SOLVING), NOW)
    flags = [each["flags"] for each in jobs_json([stalled, Told(**RUNNING)], NOW)["jobs"]]
    assert flags == [["NO PROGRESS for 16 min 0 s"], []]


def test_the_list_counts_up_and_keeps_its_columns() -> None:
    jobs = [Told(number=9), Told(number=10, state="cancelled", name="a-very-long-name-" * 4, reason="word " * 30)]
    lines = jobs_text(jobs, NOW, 80).splitlines()
    assert lines[0] == counted(jobs) == "2 jobs: 1 waiting, 1 cancelled"
    assert lines[2] == "job  state      study"
    assert lines[3] == "  9  waiting    tank"
    assert lines[4].startswith(" 10  cancelled  a-very-long-name-")
    assert "..." in lines[4]
    assert max(map(len, lines)) <= 80
    assert jobs_text([], NOW, 80) == "no jobs\nNext: uq submit STUDY"


def test_changed_keys_are_called_short_where_that_is_clear() -> None:
    assert short_keys(("parameters.UA.triangular.mode", "plan.members", "parameters.k")) == ("UA mode", "members", "k")
    alike = ("parameters.k.normal.mean", "parameters.k.uniform.mean")
    assert short_keys(alike) == alike


PROBABILITY = KeptAnswer("Too warm by 6 h", "probabilities", math.nan, "1", 0.0148, 0.0139, 0.0158, 65536, settled=True)
PEAK = KeptAnswer("Peak", "quantiles", 0.95, "K", 351.234, 350.9, 351.6, 65536, 40.0, False)


def test_kept_answers_survive_their_machine_form_and_are_rounded_as_elsewhere() -> None:
    assert [called(each) for each in (PROBABILITY, PEAK)] == ["Too warm by 6 h", "Peak, 95 %, K"]
    for answer in (PROBABILITY, PEAK):
        again = of_json(answer.as_json())
        assert again.texts == answer.texts
        assert again.as_json() == answer.as_json()
    assert PROBABILITY.texts == ("0.01480", "0.01390 to 0.01580")
    assert PEAK.texts[1].startswith("350.")
    assert of_json({}).texts == ("missing", "")


def test_what_is_settled_says_of_each_answer_whether_it_is() -> None:
    lines = laid(settling([PROBABILITY, PEAK]))
    assert [line.split("  ")[-1].strip() for line in lines] == ["settled", "not yet"]
    assert settling([]) == []


def test_a_batch_lays_answers_out_against_what_was_changed() -> None:
    settled = {"settled": [PROBABILITY.as_json(), PEAK.as_json()]}
    none = KeptAnswer("Too warm by 6 h", "probabilities", math.nan, "1", 0.0, 0.0, 0.00012, 65536)
    jobs = [
        Told(number=1, state="done", changed={"parameters.k": 3.0}, progress=settled),
        Told(number=2, state="done", changed={"parameters.k": 4.0}, progress={"settled": [none.as_json()]}),
        Told(number=3, state="failed", changed={"parameters.k": 5.0}, reason="no members"),
        Told(number=4, state="waiting", title="B tank"),
    ]
    lines = batches_text({("night", "Nightly"): jobs, ("other", ""): jobs[:1]}, NOW, 100).splitlines()
    assert lines[0] == "Nightly (night): 4 jobs: 1 waiting, 2 done, 1 failed"
    table = [line.split("  ") for line in lines]
    rows = [[cell.strip() for cell in row if cell.strip()] for row in table]
    assert ["k", "job", "state", "A", "interval", "B", "interval"] in rows
    assert ["3", "1", "done", "0.01480", "0.01390 to 0.01580", *PEAK.texts] in rows
    assert ["4", "2", "done", "0 of 65536", "at most 0.00012"] in rows
    assert ["5", "3", "failed"] in rows
    assert ["job 3: no members"] in rows
    assert "  A Too warm by 6 h" in lines
    assert any(line.startswith("other: 1 job") for line in lines)
    assert batches_text({}, NOW, 100) == "no batches\nNext: uq submit BATCH"


def test_rows_of_a_batch_are_in_the_order_of_what_was_changed_not_of_their_numbers() -> None:
    values = [(10, "b"), (9.5, "b"), (9.5, "a"), ("none", "a")]
    jobs = [Told(number=7 - place, state="waiting", changed={"parameters.k": k, "plan.s": s}) for place, (k, s) in enumerate(values)]
    rows = [line.split()[:3] for line in batches_text({("night", ""): jobs}, NOW, 100).splitlines()]
    assert rows[-4:] == [["9.5", "a", "5"], ["9.5", "b", "6"], ["10", "b", "7"], ["none", "a", "4"]]

"""What was done once: a finished run is shown, not solved again; an extended run has the arrays of a fresh one; spellings of one run."""

from __future__ import annotations

import json
from pathlib import Path

import pytest

from tests.made_results import made_facts, made_result, made_study
from tests.test_cli_run import SMALL, uq, write
from tests.test_run_whole import BLOW_UP
from uq.report.headline import headline
from uq.report.withheld import withheld
from uq.store.netcdf import read_groups, write_groups
from uq.store.open import open_result
from uq.study.read import parse_study

DONE = "this study is done already"


def test_a_finished_run_is_shown_and_not_solved_again(tmp_path: Path) -> None:
    first = uq(write(tmp_path, SMALL), "run", "a.toml", "-o", "out")
    before = (tmp_path / "out" / "result.nc").read_bytes()
    again = uq(tmp_path, "run", "a.toml", "-o", "out")
    assert (again.returncode, again.stdout) == (0, first.stdout)
    assert DONE in again.stderr
    assert "solving" not in again.stderr
    assert (tmp_path / "out" / "result.nc").read_bytes() == before
    anew = uq(tmp_path, "run", "a.toml", "-o", "out", "--again")
    assert DONE not in anew.stderr
    assert "solving" in anew.stderr
    other = uq(tmp_path, "run", "a.toml", "-o", "out", "--seed", "5")
    assert other.returncode == 7
    assert "another study" in other.stderr


def test_a_damaged_result_is_made_again(tmp_path: Path) -> None:
    assert uq(write(tmp_path, SMALL), "run", "a.toml", "-o", "out").returncode == 0
    place = tmp_path / "out" / "result.nc"
    content = open_result(place).attributes["content_fingerprint"]
    groups = read_groups(place)
    next(group for group in groups if group.path == "bands/x").variables["mean"].data[0] += 1
    write_groups(place, groups)
    assert uq(tmp_path, "show", "out").returncode == 7
    made = uq(tmp_path, "run", "a.toml", "-o", "out")
    assert made.returncode == 0, made.stderr
    assert open_result(place).attributes["content_fingerprint"] == content


def test_an_extended_run_has_the_arrays_of_a_fresh_study(tmp_path: Path) -> None:
    """The fresh study is another file that was written with that number of members: text and changes differ, what is computed does not."""
    fresh = SMALL.replace("members = 1024", "members = 4096")
    assert fresh != SMALL
    assert uq(write(tmp_path, SMALL), "run", "a.toml", "-o", "short").returncode == 0
    assert uq(tmp_path, "extend", "short", "--members", "4096", "-o", "long").returncode == 0
    (tmp_path / "b").mkdir()
    assert uq(write(tmp_path / "b", fresh), "run", "a.toml", "-o", "../fresh").returncode == 0
    long, anew = (open_result(tmp_path / name) for name in ("long", "fresh"))
    for name in ("study_fingerprint", "content_fingerprint", "members", "solves"):
        assert long.attributes[name] == anew.attributes[name]
    assert str(long.study.text.values) != str(anew.study.text.values)
    short = open_result(tmp_path / "short")
    assert short.attributes["content_fingerprint"] != long.attributes["content_fingerprint"]


def test_the_text_of_the_study_is_checked_too(tmp_path: Path) -> None:
    assert uq(write(tmp_path, SMALL), "run", "a.toml", "-o", "out").returncode == 0
    place = tmp_path / "out" / "result.nc"
    groups = read_groups(place)
    next(group for group in groups if group.path == "study").variables["text"].data[...] = SMALL.replace("0.5", "0.6")
    write_groups(place, groups)
    shown = uq(tmp_path, "show", "out")
    assert shown.returncode == 7
    assert "changed or damaged" in shown.stderr


@pytest.mark.parametrize(
    ("one", "other", "same"), [("16385", "32768", True), ("4_000_000", "4194304", True), ("512", "1", True), ("512", "513", False)]
)
def test_numbers_of_members_that_are_rounded_to_one_are_one_study(one: str, other: str, same: bool) -> None:
    prints = {parse_study(SMALL.replace("members = 1024", f"members = {each}")).fingerprint for each in (one, other)}
    assert (len(prints) == 1) == same


def test_tallies_of_another_study_are_told_with_a_remedy_that_helps(tmp_path: Path) -> None:
    assert uq(write(tmp_path, SMALL), "run", "a.toml", "-o", "one").returncode == 0
    assert uq(tmp_path, "run", "a.toml", "--seed", "9", "-o", "two").returncode == 0
    (tmp_path / "one" / "tallies.nc").write_bytes((tmp_path / "two" / "tallies.nc").read_bytes())
    done = uq(tmp_path, "extend", "one", "--members", "2048")
    assert done.returncode == 7
    assert "does not belong to the result beside it; put back that of its run" in done.stderr
    assert "-o" not in done.stderr


def test_a_broken_study_is_told_in_the_machine_form(tmp_path: Path) -> None:
    wrong = SMALL.replace("rate = ", "rte = ").replace("median = 2", "median = -2")
    done = uq(write(tmp_path, wrong), "check", "a.toml", "--json")
    assert done.returncode == 3
    told = json.loads(done.stdout)
    assert told["schema"] == 1
    assert {each["file"] for each in told["mistakes"]} == {"a.toml"}
    assert any(each["line"] == 8 for each in told["mistakes"])
    assert any(each["remedy"] == "did you mean `rate`?" for each in told["mistakes"])
    assert all(each["found"] and each["expected"] for each in told["mistakes"])
    assert "did you mean `rate`?" in done.stderr


LATE = BLOW_UP.replace('[outcomes.last]\ntake = "final(x)"\n', "").replace('when = "x > 2"', 'when = "x > 2"\nby = [0.6]\naccept = 0.5')


def test_a_verdict_is_withheld_in_the_file_as_in_the_summary(tmp_path: Path) -> None:
    """Members fail at t = 0.98 and later. Whoever did had passed before, so that the probability is known; but failures are refused."""
    asked = LATE + 'failures = "refuse"\nask = ["limits"]\n'
    assert uq(write(tmp_path, asked), "run", "a.toml", "-o", "early").returncode == 4
    assert open_result(tmp_path / "early").limits["high"].verdict in ("met", "not met", "not settled")
    done = uq(write(tmp_path, asked.replace("by = [0.6]", "by = [0.6, 1]")), "run", "a.toml", "-o", "late")
    assert done.returncode == 4, done.stderr
    assert "verdict" not in open_result(tmp_path / "late").limits["high"].attributes
    assert "no verdict" in done.stdout


def test_only_what_is_withheld_ends_with_4(tmp_path: Path) -> None:
    """Solves that failed for the ranking alone withhold nothing."""
    plan = made_study().plan
    plan.failures = "refuse"  # type: ignore[misc]
    whole = made_result(tmp_path / "a", made_study(plan=plan), facts=made_facts(solves_failed=3))
    lost = made_result(tmp_path / "b", made_study(plan=plan), facts=made_facts(solves_failed=3, members_failed=3))
    assert not withheld(whole, headline(whole))
    assert withheld(lost, headline(lost))


OPEN = (
    SMALL.replace("members = 1024", "").replace("ask", "# ask")
    + """
[plan.precision]
probabilities = 1e-9
[plan.at_most]
"""
)


def test_a_plan_that_only_bounds_the_work_speaks_of_no_number_of_members(tmp_path: Path) -> None:
    checked = uq(write(tmp_path, OPEN + "solves = 100\n"), "check", "a.toml", "--pilot")
    assert checked.returncode == 0, checked.stderr
    assert "137438953472" not in checked.stdout + checked.stderr
    assert "At most 2048 members in 16 replicates" in checked.stdout
    assert "cannot be reached" in checked.stdout
    done = uq(tmp_path, "run", "a.toml", "-o", "out")
    assert done.returncode == 5
    assert "137438953472" not in done.stdout + done.stderr
    assert "asked)" not in done.stdout
    words = " ".join(done.stdout.split())
    solves = open_result(tmp_path / "out").attributes["solves"]
    assert f"the first round alone takes {solves} solves, and it may spend 100." in words
    assert "It cannot be reached: that would take more members than a run can have." in words
    assert "uq extend" not in words
    assert "members_asked" not in json.loads(uq(tmp_path, "show", "out", "--json").stdout)["attributes"]
    timed = uq(write(tmp_path, OPEN + "minutes = 0.2\n"), "check", "a.toml", "--pilot")
    assert "137438953472" not in timed.stdout
    assert "Time: at most 12 s" in timed.stdout

"""Local times as moments, also where the clocks change; expected moments are written in UTC."""

from __future__ import annotations

import os
import time
from collections.abc import Iterator
from datetime import UTC, date, datetime

import pytest
from hypothesis import given, settings
from hypothesis import strategies as st

from uq.clock import When, Window, following, moment, time_of_day, zone_of
from uq.errors import ValueMistake

ATHENS, APIA, ADELAIDE = "Europe/Athens", "Pacific/Apia", "Australia/Lord_Howe"
# In Athens the clocks of 2027 go from 03:00 to 04:00 on 28 March and from 04:00 to 03:00 on 31 October, both at 01:00 UTC.
SPRING, AUTUMN = date(2027, 3, 28), date(2027, 10, 31)
NIGHT = Window("22:00", "06:00", ATHENS)


def utc(text: str) -> float:
    return datetime.fromisoformat(text).replace(tzinfo=UTC).timestamp()


def at(day: date, text: str, zone: str = ATHENS) -> float:
    return moment(day, time_of_day(text), zone_of(zone))


@pytest.fixture
def _in_athens(monkeypatch: pytest.MonkeyPatch) -> Iterator[None]:
    """This machine's own zone."""
    monkeypatch.setenv("TZ", ATHENS)
    time.tzset()
    yield
    monkeypatch.undo()
    time.tzset()


def test_an_ordinary_local_time_is_one_moment() -> None:
    assert at(date(2027, 1, 15), "22:30") == utc("2027-01-15 20:30")
    assert at(date(2027, 7, 15), "22:30") == utc("2027-07-15 19:30")


@pytest.mark.parametrize("text", ["03:00", "03:30", "03:59"])
def test_a_time_that_does_not_exist_is_the_moment_at_which_the_clocks_go_forward(text: str) -> None:
    assert at(SPRING, text) == utc("2027-03-28 01:00")
    assert at(SPRING, "04:00") == utc("2027-03-28 01:00")
    assert at(SPRING, "02:59") == utc("2027-03-28 00:59")


def test_a_time_that_exists_twice_is_the_first_of_the_two() -> None:
    assert at(AUTUMN, "03:30") == utc("2027-10-31 00:30")
    assert at(AUTUMN, "04:00") == utc("2027-10-31 02:00")
    assert at(AUTUMN, "02:59") == utc("2027-10-30 23:59")


def test_a_change_by_half_an_hour_and_a_day_that_was_left_out() -> None:
    assert at(date(2027, 10, 3), "02:15", ADELAIDE) == utc("2027-10-02 15:30")
    assert at(date(2011, 12, 30), "12:00", APIA) == utc("2011-12-30 10:00")


@pytest.mark.usefixtures("_in_athens")
@pytest.mark.skipif(os.name == "nt", reason="the zone of the machine cannot be set there")
def test_without_a_name_it_is_the_zone_of_the_machine() -> None:
    for day in (SPRING, AUTUMN, date(2027, 6, 1)):
        for text in ("00:00", "02:59", "03:00", "03:30", "04:00", "23:59"):
            assert at(day, text, "") == at(day, text)


def test_the_next_such_time_is_today_or_tomorrow_and_never_now() -> None:
    six = time_of_day("06:00")
    zone = zone_of(ATHENS)
    assert following(utc("2027-01-15 03:59"), six, zone) == utc("2027-01-15 04:00")
    assert following(utc("2027-01-15 04:00"), six, zone) == utc("2027-01-16 04:00")
    assert following(utc("2027-03-27 22:00"), six, zone) == utc("2027-03-28 03:00")


@pytest.mark.parametrize(
    ("text", "expected"),
    [
        ("06:00", "2027-01-16 04:00"),
        ("2027-02-01 06:00", "2027-02-01 04:00"),
        ("2027-02-01T06:00:30", "2027-02-01 04:00:30"),
        ("2027-02-01T06:00Z", "2027-02-01 06:00"),
        ("2027-02-01 06:00-05:00", "2027-02-01 11:00"),
        ("2020-02-01 06:00", "2020-02-01 04:00"),
        ("2027-03-28 03:20", "2027-03-28 01:00"),
    ],
)
def test_times_as_users_state_them(text: str, expected: str) -> None:
    assert When(text).after(utc("2027-01-15 12:00"), zone_of(ATHENS)) == utc(expected)


@pytest.mark.parametrize(
    "text", ["6:00", "24:00", "06:60", "0600", "noon", "", "2027-02-30 06:00", "2027-02-01", "2027-2-1 06:00", "06:00 ", "0٦:00", "٠٦:٠٠"]
)
def test_what_is_no_time_is_refused(text: str) -> None:
    with pytest.raises(ValueMistake, match=r"06:00|23:59"):
        When(text)


def test_a_window_over_midnight() -> None:
    assert NIGHT.is_open(utc("2027-01-15 20:00"))
    assert NIGHT.is_open(utc("2027-01-16 03:59"))
    assert not NIGHT.is_open(utc("2027-01-16 04:00"))
    assert not NIGHT.is_open(utc("2027-01-15 19:59"))
    assert NIGHT.opening(utc("2027-01-15 12:00")) == utc("2027-01-15 20:00")
    assert NIGHT.opening(utc("2027-01-15 23:00")) == utc("2027-01-15 23:00")
    assert NIGHT.closing(utc("2027-01-15 23:00")) == NIGHT.closing(utc("2027-01-15 12:00")) == utc("2027-01-16 04:00")


def test_a_window_is_an_hour_shorter_or_longer_when_the_clocks_change() -> None:
    for day, hours in ((27, 7), (26, 8)):
        assert NIGHT.closing(utc(f"2027-03-{day} 21:00")) - NIGHT.opening(utc(f"2027-03-{day} 18:00")) == hours * 3600
    assert NIGHT.closing(utc("2027-10-30 21:00")) - NIGHT.opening(utc("2027-10-30 18:00")) == 9 * 3600


def test_a_window_at_the_change_of_the_clocks() -> None:
    early = Window("03:15", "05:00", ATHENS)
    assert early.opening(utc("2027-03-28 00:00")) == utc("2027-03-28 01:00")
    assert early.closing(utc("2027-03-28 01:30")) == utc("2027-03-28 02:00")
    twice = Window("03:15", "03:45", ATHENS)
    assert (twice.opening(utc("2027-10-31 00:00")), twice.closing(utc("2027-10-31 00:20"))) == (
        utc("2027-10-31 00:15"),
        utc("2027-10-31 00:45"),
    )
    assert not twice.is_open(utc("2027-10-31 01:20"))


def test_a_window_that_the_clocks_jump_over_does_not_open_on_that_day() -> None:
    gone = Window("03:15", "03:45", ATHENS)
    assert gone.opening(utc("2027-03-28 00:00")) == utc("2027-03-29 00:15")


@settings(max_examples=300)
@given(
    st.floats(utc("1990-01-01 00:00"), utc("2037-01-01 00:00")).map(round),
    st.tuples(st.integers(0, 1439), st.integers(0, 1439)).filter(lambda pair: pair[0] != pair[1]),
    st.sampled_from((ATHENS, APIA, ADELAIDE, "America/New_York", "UTC")),
)
def test_a_window_is_open_from_its_opening_until_its_closing(now: int, minutes: tuple[int, int], zone: str) -> None:
    opens, closes = (f"{each // 60:02}:{each % 60:02}" for each in minutes)
    window = Window(opens, closes, zone)
    begin = window.opening(now)
    end = window.closing(begin)
    assert now <= begin < end <= begin + 49 * 3600
    assert window.is_open(now) == (begin == now)
    assert window.is_open(begin)
    assert window.is_open(end - 1)
    assert window.opening(end) >= end
    assert begin <= now + 73 * 3600


@pytest.mark.parametrize(
    ("arguments", "key", "words"),
    [
        (("25:00", "06:00", ""), "opens", "a time of day"),
        (("22:00", "24:00", ""), "closes", 'midnight is "00:00"'),
        (("22:00", "22:00", ""), "closes", "another time"),
        (("22:00", "06:00", "Europe/Athen"), "timezone", "did you mean `Europe/Athens`"),
        (("22:00", "06:00", "../etc/passwd"), "timezone", "the name of a time zone"),
    ],
)
def test_a_window_that_cannot_be_says_why(arguments: tuple[str, str, str], key: str, words: str) -> None:
    with pytest.raises(ValueMistake, match=words) as told:
        Window(*arguments)
    assert told.value.key == key

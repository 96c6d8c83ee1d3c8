"""What is given by points: forcings from rows and files, tables of a state, measured values."""

from __future__ import annotations

from pathlib import Path

import numpy as np
import pytest

from tests.small_studies import HEAD, mistakes, read
from uq.errors import StudyError
from uq.model.code import Forcing, Table
from uq.study.read import parse_study, read_study

AIR = b"# invented\nhour,air,note\n0, 10.0,calm\n0.5,12,\n1,11,windy\n"
OUTSIDE = (
    '[forcings.outside]\nunit = "K"\nfile = "air.csv"\ntime = { column = "hour", unit = "h" }\nvalue = { column = "air", unit = "degC" }\n'
)
FAN = '[tables.fan]\nof = { unit = "K" }\nunit = "1/min"\nrows = [["0 degC", 0], [300, "1.2 1/h"], [400, 0.05]]\n'
LOGGER = b"second;celsius\n0;60\n600;52\n600;53\n1800;41\n7200;20\n"
MEASURED = (
    '[measured.T]\nfile = "log.csv"\ntime = { column = "second", unit = "s" }\nvalue = { column = "celsius", unit = "degC" }\nsd = "1 K"\n'
)


def test_a_forcing_from_a_file_in_the_units_of_the_study() -> None:
    study = read(OUTSIDE, files={"air.csv": AIR})
    (forcing,) = study.equations.forcings
    assert forcing == Forcing("outside", (0.0, 30.0, 60.0), (283.15, 285.15, 284.15))
    assert study.forcings[0].rows == ((0.0, 283.15), (30.0, 285.15), (60.0, 284.15))
    assert study.remarks == ('air.csv: 3 rows of columns "hour" and "air", comma separated',)
    assert study.files == {"air.csv": AIR}


def test_a_forcing_file_lies_in_the_folder_of_the_study(tmp_path: Path) -> None:
    (tmp_path / "air.csv").write_bytes(b"\xef\xbb\xbf" + AIR.replace(b",", b";").replace(b"\n", b"\r\n"))
    (tmp_path / "s.toml").write_text(HEAD + OUTSIDE, encoding="utf-8")
    study = read_study(tmp_path / "s.toml")
    assert study.equations.forcings[0].values == (283.15, 285.15, 284.15)
    assert "semicolon separated" in study.remarks[0]
    # from its text and files alone, as from a result
    again = parse_study(HEAD + OUTSIDE, None, "s", study.files)
    assert again.fingerprint == study.fingerprint
    changed = parse_study(HEAD + OUTSIDE, None, "s", {"air.csv": AIR})
    assert changed.fingerprint != study.fingerprint
    with pytest.raises(StudyError, match="was not read from a folder"):
        parse_study(HEAD + OUTSIDE)


@pytest.mark.parametrize(
    ("content", "said"),
    [
        (AIR.replace(b"0.5,12", b"0.5,"), "a gap in air.csv, line 4"),
        (AIR.replace(b"0.5,12", b",12"), "a gap in air.csv, line 4"),
        (AIR.replace(b"0.5,12", b"1.5,12"), "1 after 1.5 in air.csv, line 5"),
        (AIR.replace(b"0.5,12", b"0,12"), "0 after 0 in air.csv, line 4"),
        (AIR.replace(b"10.0", b"nan"), '"nan" in air.csv, line 3'),
        (AIR.replace(b"10.0", b"1_0"), '"1_0" in air.csv, line 3'),
        (AIR.replace(b"10.0,calm", b"10,0,calm"), "4 cells in air.csv, line 3"),
        (AIR.replace(b"hour", b"hours"), "did you mean `hours`?"),
        (AIR.replace(b"1,11", b"0.9,11"), "last row at 54 in air.csv"),
        (b"hour,air\n", "air.csv without numbers"),
        (b"# nothing\n", "air.csv without a header line"),
        (AIR.replace(b"calm", b"\xff"), "not UTF-8"),
    ],
)
def test_forcing_files_that_cannot_stand(content: bytes, said: str) -> None:
    (found,) = mistakes(OUTSIDE, files={"air.csv": content})
    assert said in found


def test_units_of_columns_are_needed_where_the_study_has_units() -> None:
    found = mistakes(OUTSIDE.replace(', unit = "h"', ""), files={"air.csv": AIR})
    assert [text.split("  ")[1] for text in found] == ["forcings.outside.time.unit: found no unit; expected " + UNIT_NEEDED]
    plain = OUTSIDE.replace('unit = "K"\n', "").replace(', unit = "h"', "").replace(', unit = "degC"', "")
    text = HEAD.split("[states.T]")[0].replace('unit = "min"\nstop = "1 h"', "stop = 1")
    text += "[states.x]\nstart = 1\nrate = '-a * x * outside'\n[parameters]\na = { uniform = { low = 1, high = 2 } }\n"
    text = text.replace("'", '"')
    assert parse_study(text + plain, files={"air.csv": AIR}).equations.forcings[0].values == (10.0, 12.0, 11.0)


UNIT_NEEDED = 'a unit, unit = "..." ("1" for none)'


@pytest.mark.parametrize(("outside", "covered"), [("refuse", False), ("hold", True), ("repeat", True)])
def test_what_holds_outside_of_the_rows(outside: str, covered: bool) -> None:
    more = f'[forcings.air]\nunit = "K"\nrows = [[10, 290], [20, 300]]\noutside = "{outside}"\n'
    if covered:
        assert read(more).equations.forcings[0].outside == outside
    else:
        assert len(mistakes(more)) == 2


def test_a_single_row_holds_for_all_times() -> None:
    more = '[forcings.air]\nunit = "K"\nrows = [[10, 290]]\noutside = "hold"\n'
    assert read(more).equations.forcings[0].values == (290.0,)
    assert any("two rows or more" in text for text in mistakes(more.replace("hold", "repeat")))


def test_smooth_forcings() -> None:
    more = '[forcings.air]\nunit = "K"\nrows = [[0, 290], [60, 300]]\ninterpolation = "smooth"\n'
    assert read(more).equations.forcings[0].interpolation == "smooth"


def test_a_table_of_a_state() -> None:
    study = read(FAN, HEAD.replace("-cooling *", "-fan(T) *"))
    assert study.equations.tables == (Table("fan", (273.15, 300.0, 400.0), (0.0, 0.02, 0.05)),)
    assert study.tables[0].of.unit == "K"
    assert {node.value for node in study.equations.graph.order(study.equations.rates) if node.op == "table"} == {"fan"}
    assert "nothing uses the table `fan`" in read(FAN).warnings
    smooth = read(FAN + 'interpolation = "smooth"\noutside = "hold"\n').equations.tables[0]
    assert (smooth.interpolation, smooth.outside) == ("smooth", "hold")


def test_the_argument_of_a_table_is_converted() -> None:
    degrees = FAN.replace('of = { unit = "K" }', 'of = { unit = "degC" }').replace("300", '"300 K"')
    study = read(degrees, HEAD.replace("-cooling *", "-fan(T) *"))
    assert study.equations.tables[0].points == (0.0, 26.85, 400.0)


@pytest.mark.parametrize(
    ("more", "rate", "said"),
    [
        (FAN, "-fan * (T - room)", "write fan(x)"),
        (FAN, "-fan(time) * (T - room)", "in which the table `fan` is given"),
        (FAN, "-fan(T, T) * (T - room)", "2 arguments"),
        (FAN, "-fam(T) * (T - room)", "did you mean `fan`"),
        (FAN.replace("300, ", "3, "), "-fan(T) * (T - room)", "3 after 273.15"),
        (FAN.replace('of = { unit = "K" }\n', ""), "-fan(T) * (T - room)", "no `of`"),
        (FAN.replace('unit = "1/min"\n', ""), "-fan(T) * (T - room)", "no unit"),
        (FAN.replace("fan", "room"), "-cooling * (T - room)", "for a second thing"),
        (FAN.replace("fan", "exp"), "-cooling * (T - room)", "taken by the language"),
    ],
)
def test_tables_that_cannot_stand(more: str, rate: str, said: str) -> None:
    found = mistakes(more, HEAD.replace("-cooling * (T - room)", rate))
    assert any(said in text for text in found)
    assert len(found) == 1


def test_measured_values_in_the_units_of_the_study_and_their_times_solved() -> None:
    study = read(MEASURED, HEAD.replace("points = 61", "at = [0, 60]"), files={"log.csv": LOGGER})
    (measured,) = study.measured
    assert measured.rows == ((0.0, 333.15), (10.0, 325.15), (10.0, 326.15), (30.0, 314.15))
    assert (measured.name, measured.sd) == ("T", 1.0)
    assert study.times.solved.tolist() == [0, 10, 30, 60]
    assert study.times.solved[study.times.grid].tolist() == [0, 60]
    assert "log.csv: 1 of 5 observations of `T` are outside of the time and left out" in study.remarks
    assert study.warnings == ()


def test_a_measured_term_and_a_deviation_on_a_scale() -> None:
    more = (
        MEASURED.replace("measured.T", "measured.C").replace('"1 K"', "1")
        + '[terms]\nC = { value = "T", unit = "degF" }\n[plan]\nwatch = ["C"]\n'
    )
    (measured,) = read(more, files={"log.csv": LOGGER}).measured
    assert np.allclose([value for _, value in measured.rows], [140, 125.6, 127.4, 105.8])
    assert measured.sd == pytest.approx(1.8)


@pytest.mark.parametrize(
    ("old", "new", "said"),
    [
        ("measured.T", "measured.room", "which is not watched"),
        ("measured.T", "measured.Q", "which is unknown"),
        ('unit = "degC" }\nsd = "1 K"', 'unit = "kPa" }', "values in K, as `T` has"),
        ('unit = "degC"', 'unit = "kPa"', "a quantity in K; expected a number, or a quantity in kPa"),
        ('sd = "1 K"', "sd = 0", "a number above 0"),
        ('sd = "1 K"', 'sd = "1 s"', "a quantity in s"),
        ("celsius", "kelvin", 'no column "kelvin"'),
        ("log.csv", "lag.csv", "lag.csv"),
        ('time = { column = "second", unit = "s" }\n', "", "no `time`"),
    ],
)
def test_measurements_that_cannot_stand(old: str, new: str, said: str) -> None:
    (found,) = mistakes(MEASURED.replace(old, new), files={"log.csv": LOGGER})
    assert said in found

"""The law of the store: decode(encode(v)) == v, in memory and through a file; and what a stored variable says on top."""

from __future__ import annotations

from pathlib import Path
from typing import Any

import numpy as np
import pytest
from hypothesis import HealthCheck, given, settings
from hypothesis import strategies as st
from hypothesis.extra import numpy as arrays

from tests.made_results import made_facts, made_findings, made_study
from uq.analysis.finding import Finding, Variable
from uq.store.encode import BESIDE, decode, encode
from uq.store.fingerprint import content_fingerprint
from uq.store.layout import contents
from uq.store.netcdf import read_groups, write_groups

NAMES = st.from_regex(r"[A-Za-z][A-Za-z0-9_]{0,6}", fullmatch=True)
# A file ends a text at the character 0, and lone surrogates are no text; numpy takes zeros off the end of a text.
TEXTS = st.text(st.characters(exclude_characters="\0", exclude_categories=["Cs"]), max_size=12)
UNITS = st.sampled_from(["1", "K", "m", "kg", "degC", "kJ/kg/K", "1/min", "person", ""])
SIZES = {"time": 3, "quantile": 2, "input": 1, "none": 0}
ATTRIBUTES = st.dictionaries(
    NAMES.map(lambda name: f"own_{name}"), st.one_of(TEXTS, st.integers(-(2**62), 2**62), st.floats(allow_nan=False)), max_size=2
)


@st.composite
def variables(draw: st.DrawFn) -> Variable:
    dims = tuple(draw(st.lists(st.sampled_from(sorted(SIZES)), unique=True, max_size=3)))
    shape = tuple(SIZES[dim] for dim in dims)
    kind = draw(st.sampled_from([np.float64, np.int64, np.int8, str]))
    if kind is str:
        count = int(np.prod(shape))
        data = np.array(draw(st.lists(TEXTS, min_size=count, max_size=count)), dtype=np.str_).reshape(shape)
    else:
        data = draw(arrays.arrays(kind, shape))
    return Variable(dims, data, draw(TEXTS), draw(UNITS), draw(ATTRIBUTES))


@st.composite
def findings(draw: st.DrawFn) -> tuple[Finding, ...]:
    paths = draw(st.lists(st.sampled_from(["", "bands/T", "bands/x", "members", "members/watched"]), unique=True, min_size=1))
    made = []
    for path in dict.fromkeys(["", *paths]):
        named = draw(st.dictionaries(NAMES.filter(lambda name: name not in SIZES), variables(), max_size=3))
        made.append(Finding(path, named, {"own": 1, **draw(ATTRIBUTES)}))
    return tuple(made)


def same(left: Variable, right: Variable) -> bool:
    """Equal to the last bit, nan and -0.0 included."""
    if left.data.dtype.kind == "U":
        equal = left.data.shape == right.data.shape and left.data.tolist() == right.data.tolist()
    else:
        equal = left.data.dtype == right.data.dtype and left.data.shape == right.data.shape and left.data.tobytes() == right.data.tobytes()
    told = (left.dims, left.long_name, left.unit, dict(left.attributes)) == (
        right.dims,
        right.long_name,
        right.unit,
        dict(right.attributes),
    )
    return equal and told


def assert_same(left: tuple[Finding, ...], right: tuple[Finding, ...]) -> None:
    found = {finding.group: finding for finding in right}
    assert {finding.group for finding in left} == set(found)
    for finding in left:
        other = found[finding.group]
        assert dict(finding.attributes) == dict(other.attributes)
        assert set(finding.variables) == set(other.variables)
        for name, variable in finding.variables.items():
            assert same(variable, other.variables[name]), (finding.group, name, variable, other.variables[name])


@given(findings())
@settings(max_examples=150, deadline=None)
def test_decoding_undoes_encoding(made: tuple[Finding, ...]) -> None:
    assert_same(made, decode(encode(made)))


@given(findings())
@settings(max_examples=40, deadline=None, suppress_health_check=[HealthCheck.function_scoped_fixture])
def test_so_it_does_through_a_file(tmp_path: Path, made: tuple[Finding, ...]) -> None:
    groups = encode(made)
    path = tmp_path / "some.nc"
    write_groups(path, groups)
    read = read_groups(path)
    assert_same(made, decode(read))
    assert content_fingerprint(read) == content_fingerprint(groups)


def test_a_whole_result_goes_through_a_file(tmp_path: Path) -> None:
    made = contents(made_study(), made_findings(), made_facts())
    write_groups(tmp_path / "some.nc", encode(made))
    read = {finding.group: finding for finding in decode(read_groups(tmp_path / "some.nc"))}
    for finding in made:
        for name, variable in finding.variables.items():
            data = read[finding.group].variables[name].data
            np.testing.assert_array_equal(data, variable.data)


def test_large_arrays_are_compressed_in_chunks_of_whole_rows(tmp_path: Path) -> None:
    import netCDF4

    values = np.sin(np.arange(600_000.0)).reshape(600, 1000)
    write_groups(tmp_path / "big.nc", encode([Finding("", {"v": Variable(("input", "time"), values, "v")})]))
    with netCDF4.Dataset(tmp_path / "big.nc") as file:
        assert file["v"].filters()["zlib"]
        assert file["v"].chunking() == [131, 1000]
    assert read_groups(tmp_path / "big.nc")[0].variables["v"].data.tobytes() == values.tobytes()


def test_the_character_0_is_made_visible_and_nothing_is_cut() -> None:
    made = Finding("", {"label": Variable(("input",), np.array(["a\0b"]), "x\0y")}, {"title": "t\0u"})
    (group,) = encode([made])
    assert group.variables["label"].data[0] == "a␀b"
    assert group.variables["label"].attributes["long_name"] == "x␀y"
    assert group.attributes["title"] == "t␀u"


def stored(name: str, group: str = "bands/T", **more: Any) -> dict[str, Any]:
    names = [name, *more.pop("beside", [])]
    variable = Variable(("time",), np.zeros(3), "said", more.pop("unit", "K"), more)
    (encoded,) = encode([Finding(group, dict.fromkeys(names, variable))])
    return dict(encoded.variables[name].attributes)


def test_an_estimate_names_its_interval() -> None:
    beside = [f"mean{ending}" for ending in BESIDE[:4]]
    assert stored("mean", beside=beside)["ancillary_variables"] == "mean_low mean_high mean_if_low mean_if_high"
    assert "ancillary_variables" not in stored("mean")


@pytest.mark.parametrize(
    ("unit", "name", "attributes"),
    [
        ("degC", "quantiles", {"units": "degC", "units_metadata": "temperature: on_scale"}),
        ("degC", "sd", {"units": "K", "unit": "degC", "units_metadata": "temperature: difference"}),
        ("delta_degC", "quantiles", {"units": "K", "unit": "delta_degC", "units_metadata": "temperature: difference"}),
        ("K", "quantiles", {"units": "K", "units_metadata": "temperature: unknown"}),
        ("K", "sd", {"units": "K", "units_metadata": "temperature: difference"}),
        ("kJ/kg/K", "mean", {"units": "kJ kg-1 K-1", "unit": "kJ/kg/K", "units_metadata": "temperature: difference"}),
        ("m**3", "mean", {"units": "m3", "unit": "m**3"}),
        ("1/min", "mean", {"units": "min-1", "unit": "1/min"}),
        ("1", "mean", {"units": "1"}),
        ("person", "mean", {"units": "1", "unit": "person"}),
        ("", "mean", {}),
    ],
)
def test_units_are_udunits_with_the_text_of_the_user_beside(unit: str, name: str, attributes: dict[str, str]) -> None:
    told = stored(name, unit=unit)
    assert {key: told[key] for key in ("units", "unit", "units_metadata") if key in told} == attributes


def test_cell_methods_stand_where_cf_has_one() -> None:
    assert stored("mean")["cell_methods"] == "realization: mean"
    assert stored("sd", "outcomes/peak")["cell_methods"] == "realization: standard_deviation"
    assert "cell_methods" not in stored("quantiles")
    assert "cell_methods" not in stored("mean", "inputs")


def test_only_numbers_with_a_point_have_a_fill_value_and_coordinates_have_none() -> None:
    made = Finding("", {"time": Variable(("time",), np.zeros(3), "t"), "n": Variable(("time",), np.arange(3), "n")})
    (group,) = encode([made])
    assert "_FillValue" not in group.variables["time"].attributes
    assert "_FillValue" not in group.variables["n"].attributes
    assert np.isnan(stored("mean")["_FillValue"])


def test_two_lengths_of_one_dimension_are_our_defect() -> None:
    made = [
        Finding("", {"time": Variable(("time",), np.zeros(3), "t")}),
        Finding("bands/T", {"mean": Variable(("time",), np.zeros(4), "m")}),
    ]
    with pytest.raises(ValueError, match="two lengths"):
        encode(made)


def test_the_content_fingerprint_is_of_arrays_not_of_attributes() -> None:
    def fingerprint(data: Any, name: str = "v", dims: tuple[str, ...] = ("time",), **attributes: Any) -> str:
        return content_fingerprint(encode([Finding("", {name: Variable(dims, np.asarray(data), "v", "1", attributes)}, attributes)]))

    plain = fingerprint([1.0, 2.0])
    assert plain == fingerprint([1.0, 2.0], wall_time=3.0)
    changed = [
        fingerprint([1.0, np.nextafter(2.0, 3.0)]),
        fingerprint([2.0, 1.0]),
        fingerprint([1, 2]),
        fingerprint([1.0, 2.0], name="w"),
        fingerprint([1.0, 2.0], dims=("input",)),
        fingerprint([[1.0, 2.0]], dims=("input", "time")),
        fingerprint(["1.0", "2.0"]),
    ]
    assert len({plain, *changed}) == 1 + len(changed)
    assert fingerprint(["ab", "c"]) != fingerprint(["a", "bc"])
    assert fingerprint([-0.0]) != fingerprint([0.0])


def test_the_content_fingerprint_does_not_move() -> None:
    """Files that exist are checked against it: a change of the recipe makes them all look damaged, and needs another layout number."""
    made = Finding("bands/T", {"mean": Variable(("time",), np.array([1.0, np.nan, -0.0]), "mean", "K")})
    told = Finding("", {"input": Variable(("input",), np.array(["k0", "Größe"]), "input")})
    assert content_fingerprint(encode([told, made])) == "9f40b52fd180ca2199e7721492fde6b0541c6bb49130f02b0e52255701c88c84"

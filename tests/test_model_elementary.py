"""The vector functions: at most 2 units in the last place, right at the ends, the same bits everywhere, nothing left to a linker."""

from __future__ import annotations

import itertools
import subprocess
import sys
from fractions import Fraction

import llvmlite.binding as llvm
import mpmath as mp
import numpy as np
import pytest

from tests.vector_functions import ARGUMENTS, HAS_LONG, UNITS, Machine, Samples, dense_errors, exact_error, made_for, undefined_symbols
from uq.model.elementary import exponential, inverse_trigonometric, logarithm, power, trigonometric
from uq.model.elementary.definitions import NAMES, definitions

INF, NAN = np.inf, np.nan
TINY = 5e-324
HALF_PI = np.pi / 2


@pytest.fixture(scope="module")
def machine() -> Machine:
    return Machine()


# --- accuracy


@pytest.mark.skipif(not HAS_LONG, reason="no longdouble with a 64-bit mantissa on this machine")
@pytest.mark.parametrize("name", UNITS)
def test_dense_sample_stays_within_the_measured_error(machine: Machine, name: str) -> None:
    sample = Samples(1).of(name, 120_000)
    errors = dense_errors(machine, name, sample)
    worst = int(np.argmax(errors))
    assert errors[worst] <= UNITS[name], f"{name} at {[float(a[worst]).hex() for a in sample]}"


@pytest.mark.parametrize("name", UNITS)
def test_sample_stays_within_the_measured_error_of_mpmath(machine: Machine, name: str) -> None:
    sample = Samples(2).of(name, 900 if ARGUMENTS[name] == 1 else 500)
    got = machine(name, *sample)
    for value, arguments in zip(got.tolist(), zip(*(a.tolist() for a in sample), strict=True), strict=True):
        if inside(name, arguments):
            assert exact_error(name, value, arguments) <= UNITS[name], f"{name} at {[a.hex() for a in arguments]}"


def inside(name: str, arguments: tuple[float, ...]) -> bool:
    """Whether mpmath's value is wanted: special values have tests of their own."""
    x = arguments[0]
    if not all(np.isfinite(a) for a in arguments):
        return False
    if name in ("ln", "log10", "sqrt"):
        return x > 0
    if name in ("asin", "acos"):
        return abs(x) <= 1
    if name in ("exp", "sinh", "cosh", "tanh", "erf"):
        return abs(x) < 1e4
    if name in ("sin", "cos", "tan"):
        return abs(x) <= 2.0**30
    if name == "pow":
        return x > 0 and abs(arguments[1] * np.log(x)) < 1e4
    return True


def closest_to_quarter_turns() -> list[float]:
    """Doubles from 1 to 2^30 that are unusually near a multiple of pi/2, from the continued fraction of 2^e 2/pi for each exponent."""
    found = []
    with mp.workprec(300):
        for exponent in range(30):
            ratio = mp.mpf(2) ** (exponent - 52) * 2 / mp.pi
            before, now, rest = 0, 1, ratio
            while now < 2**53:
                for times in range(-(-(2**52) // now), (2**53 - 1) // now + 1)[:4]:
                    found.append(float(now * times) * 2.0 ** (exponent - 52))
                rest = 1 / (rest - mp.floor(rest))
                before, now = now, int(mp.floor(rest)) * now + before
    return found


def test_angles_closest_to_quarter_turns(machine: Machine) -> None:
    x = np.array(closest_to_quarter_turns())
    assert len(x) > 300
    with mp.workprec(300):
        nearest = min(abs(mp.mpf(v) * 2 / mp.pi - mp.nint(mp.mpf(v) * 2 / mp.pi)) for v in x.tolist())
    assert nearest < 2.0**-57, "the sample holds the hard cases"
    for name in ("sin", "cos", "tan"):
        got = machine(name, x)
        assert max(exact_error(name, value, (a,)) for value, a in zip(got.tolist(), x.tolist(), strict=True)) <= UNITS[name]


def test_whole_powers_of_ten_and_two_are_exact(machine: Machine) -> None:
    ten = np.array([float(f"1e{k}") for k in range(23)])
    assert machine("log10", ten).tolist() == list(range(23))
    assert machine("pow", np.full(23, 10.0), np.arange(23.0)).tolist() == ten.tolist()
    two = np.arange(-1074.0, 1024.0)
    assert machine("pow", np.full(two.size, 2.0), two).tolist() == [2.0 ** int(k) for k in two]
    assert machine("exp", np.zeros(1)).tolist() == [1.0]


def test_results_that_are_denormal(machine: Machine) -> None:
    x = np.linspace(-745.13, -708.3, 400)
    got = machine("exp", x)
    assert np.all(got > 0.0)
    assert np.sum(got < 2.0**-1022) > 300
    assert max(exact_error("exp", value, (a,)) for value, a in zip(got.tolist(), x.tolist(), strict=True)) <= UNITS["exp"]


# --- special values

# name: (argument, expected); zeros are compared with their sign.
SPECIAL: dict[str, tuple[tuple[float, float], ...]] = {
    "exp": ((0.0, 1.0), (-0.0, 1.0), (INF, INF), (-INF, 0.0), (710.0, INF), (-746.0, 0.0), (TINY, 1.0), (-745.0, TINY), (1e308, INF)),
    "ln": ((0.0, -INF), (-0.0, -INF), (INF, INF), (-INF, NAN), (-1.0, NAN), (-TINY, NAN), (1.0, 0.0), (TINY, -744.4400719213812)),
    "log10": ((0.0, -INF), (-0.0, -INF), (INF, INF), (-INF, NAN), (-1.0, NAN), (1.0, 0.0), (TINY, -323.3062153431158)),
    "sqrt": ((0.0, 0.0), (-0.0, -0.0), (INF, INF), (-INF, NAN), (-TINY, NAN), (4.0, 2.0), (TINY, 2.2227587494850775e-162)),
    "sin": ((0.0, 0.0), (-0.0, -0.0), (INF, NAN), (-INF, NAN), (TINY, TINY), (-TINY, -TINY), (2.0**31, NAN), (-(2.0**31), NAN)),
    "cos": ((0.0, 1.0), (-0.0, 1.0), (INF, NAN), (-INF, NAN), (TINY, 1.0), (np.nextafter(2.0**30, INF), NAN)),
    "tan": ((0.0, 0.0), (-0.0, -0.0), (INF, NAN), (-INF, NAN), (TINY, TINY), (-TINY, -TINY), (1e300, NAN)),
    "asin": ((0.0, 0.0), (-0.0, -0.0), (1.0, HALF_PI), (-1.0, -HALF_PI), (np.nextafter(1, 2), NAN), (INF, NAN), (-INF, NAN), (TINY, TINY)),
    "acos": ((0.0, HALF_PI), (-0.0, HALF_PI), (1.0, 0.0), (-1.0, np.pi), (-1.5, NAN), (INF, NAN), (-INF, NAN), (TINY, HALF_PI)),
    "atan": ((0.0, 0.0), (-0.0, -0.0), (INF, HALF_PI), (-INF, -HALF_PI), (1.0, np.pi / 4), (TINY, TINY), (1e308, HALF_PI)),
    "sinh": ((0.0, 0.0), (-0.0, -0.0), (INF, INF), (-INF, -INF), (TINY, TINY), (-TINY, -TINY), (711.0, INF), (-1e308, -INF)),
    "cosh": ((0.0, 1.0), (-0.0, 1.0), (INF, INF), (-INF, INF), (TINY, 1.0), (-711.0, INF)),
    "tanh": ((0.0, 0.0), (-0.0, -0.0), (INF, 1.0), (-INF, -1.0), (TINY, TINY), (-TINY, -TINY), (23.0, 1.0), (1e308, 1.0)),
    "erf": ((0.0, 0.0), (-0.0, -0.0), (INF, 1.0), (-INF, -1.0), (TINY, TINY), (-TINY, -TINY), (7.0, 1.0), (-1e308, -1.0)),
    "abs": ((0.0, 0.0), (-0.0, 0.0), (INF, INF), (-INF, INF), (-TINY, TINY), (-2.5, 2.5)),
}


@pytest.mark.parametrize("name", SPECIAL)
def test_special_values(machine: Machine, name: str) -> None:
    given, expected = np.array([*SPECIAL[name], (NAN, NAN)]).T
    assert_same(machine(name, given), expected)


def assert_same(got: np.ndarray, expected: np.ndarray) -> None:
    np.testing.assert_array_equal(got, expected)
    number = ~np.isnan(expected)
    np.testing.assert_array_equal(np.signbit(got[number]), np.signbit(expected[number]))


VALUES = (0.0, 1.0, 2.0, 0.5, 3.0, 2.5, INF, 1e308, TINY, 1e-310, 2.0**53 - 1, 2.0**53, 2.0**53 + 2)
PAIRS = np.array(list(itertools.product([*VALUES, *(-v for v in VALUES), NAN], repeat=2))).T


def test_pow_has_the_special_values_of_the_standard(machine: Machine) -> None:
    base, exponent = PAIRS
    with np.errstate(all="ignore"):
        expected = np.power(base, exponent)  # C's pow, annex F of ISO C agrees with IEEE 754
    got = machine("pow", base, exponent)
    special = ~np.isfinite(expected) | (expected == 0.0) | (np.abs(expected) == 1.0)
    assert_same(got[special], expected[special])
    np.testing.assert_array_max_ulp(got[~special], expected[~special], 1)


def test_atan2_has_the_special_values_of_the_standard(machine: Machine) -> None:
    y, x = PAIRS
    got, expected = machine("atan2", y, x), np.arctan2(y, x)
    number = ~np.isnan(expected)
    np.testing.assert_array_equal(np.isnan(got), ~number)
    np.testing.assert_array_equal(np.signbit(got[number]), np.signbit(expected[number]))
    np.testing.assert_array_max_ulp(got[number], expected[number], 1)


def test_least_and_greatest(machine: Machine) -> None:
    a, b = PAIRS
    for name, expected in (("min", np.minimum(a, b)), ("max", np.maximum(a, b))):
        np.testing.assert_array_equal(machine(name, a, b), expected)


# --- mod


def test_mod_is_exact_where_it_can_be(machine: Machine) -> None:
    samples = Samples(3)
    a = np.concatenate([samples.spread(1e-3, 1e12, 1500), samples.denormal(500), samples.spread(1e-12, 1.0, 500)])
    b = np.concatenate([samples.spread(1e-3, 1e3, 1500), samples.denormal(500), samples.spread(1e-3, 1e3, 500)])
    a[:300] = b[:300] * samples.random.integers(-1000, 1000, 300)
    got = machine("mod", a, b)
    for result, x, period in zip(got.tolist(), a.tolist(), b.tolist(), strict=True):
        over = Fraction(x) / Fraction(period)
        if abs(over) >= 2**53:
            assert np.isnan(result)
        else:
            assert result == float(Fraction(x) - Fraction(period) * (over.numerator // over.denominator))
            assert np.signbit(result) == np.signbit(period)


def test_mod_of_special_values(machine: Machine) -> None:
    a = np.array([1.0, 0.0, -0.0, INF, 1.0, -1.0, 1.0, -1.0, NAN, 1.0, -1e-20, 1e-20, 6.0, -6.0, 2.0**60])
    b = np.array([0.0, 0.0, 2.0, 2.0, INF, INF, -INF, -INF, 1.0, NAN, 1.0, -1.0, -3.0, 3.0, 1.0])
    expected = np.array([NAN, NAN, 0.0, NAN, 1.0, INF, -INF, -1.0, NAN, NAN, 1.0, -1.0, -0.0, 0.0, NAN])
    assert_same(machine("mod", a, b), expected)


# --- the same bits everywhere, and nothing from outside


def bits_of(machine: Machine, name: str, order: np.ndarray) -> np.ndarray:
    sample = [a[order] for a in Samples(4).of(name if name not in ("abs", "min", "max", "mod") else "atan2", 12_000)][: ARGUMENTS[name]]
    result = np.empty_like(sample[0])
    result[order] = machine(name, *sample)
    return np.where(np.isnan(result), NAN, result).view(np.uint64)


@pytest.mark.parametrize("name", NAMES)
def test_a_lane_does_not_see_its_neighbours(machine: Machine, name: str) -> None:
    size = len(Samples(4).of(name if name in UNITS else "atan2", 12_000)[0])
    plain = bits_of(machine, name, np.arange(size))
    np.testing.assert_array_equal(plain, bits_of(machine, name, np.random.default_rng(5).permutation(size)))


@pytest.mark.skipif(not llvm.get_process_triple().startswith("x86_64"), reason="narrows the features of an x86-64 processor")
def test_narrower_vectors_give_the_same_bits(machine: Machine) -> None:
    narrow = Machine(cpu="x86-64-v3", features="")
    for name in NAMES:
        order = np.arange(len(Samples(4).of(name if name in UNITS else "atan2", 12_000)[0]))
        np.testing.assert_array_equal(bits_of(machine, name, order), bits_of(narrow, name, order), err_msg=name)


TARGETS = (
    ("x86_64-unknown-linux-gnu", "x86-64-v3"),
    ("x86_64-unknown-linux-gnu", "x86-64-v4"),
    ("x86_64-unknown-linux-gnu", "znver4"),
    ("aarch64-unknown-linux-gnu", "generic"),
    ("aarch64-unknown-linux-gnu", "neoverse-v1"),
)


@pytest.mark.parametrize(("triple", "cpu"), TARGETS)
def test_object_leaves_nothing_to_the_linker(triple: str, cpu: str) -> None:
    module, target = made_for(triple, cpu, "")
    assert undefined_symbols(target.emit_object(module)) == set()


def test_the_search_for_symbols_finds_one() -> None:
    """Without FMA the intrinsic is a call of libm: exactly what must never happen, and what the test above must see."""
    module, target = made_for("x86_64-unknown-linux-gnu", "x86-64", "")
    assert "fma" in undefined_symbols(target.emit_object(module))


# --- the text


def test_text_depends_on_the_set_of_names_only() -> None:
    assert definitions(["ln", "exp"]) == definitions(("exp", "ln", "exp"))
    assert "@uq_ln" not in definitions({"exp"})
    assert definitions(()).strip() == ""
    with pytest.raises(KeyError, match="log"):
        definitions({"log"})


def test_text_has_no_fast_math_and_no_library_call() -> None:
    text = definitions(NAMES)
    called = {word.split("(")[0] for line in text.splitlines() if " call " in line for word in line.split() if word.startswith("@")}
    assert called == {"@llvm.fma.v8f64", "@llvm.fabs.v8f64", "@llvm.copysign.v8f64", "@llvm.floor.v8f64", "@llvm.sqrt.v8f64"}
    for flag in (" fast ", "nnan", "ninf", "nsz", "arcp", "contract", "afn", "reassoc", "frem"):
        assert flag not in text


def test_writing_the_text_loads_no_compiler() -> None:
    check = (
        "import sys, uq.model.elementary.definitions as d; d.definitions(d.NAMES); print('llvmlite' in sys.modules, 'numpy' in sys.modules)"
    )
    done = subprocess.run([sys.executable, "-c", check], capture_output=True, text=True, check=True)
    assert done.stdout.split() == ["False", "False"]


# name in a module: value; parts are added up in 300 bits
PARTS = (
    ((exponential.LN2, exponential.LN2_REST), lambda: mp.ln(2), 109),
    ((logarithm.LN2_SHORT, logarithm.LN2_LONG_REST), lambda: mp.ln(2), 96),
    ((logarithm.LOG10_2_SHORT, logarithm.LOG10_2_LONG_REST), lambda: mp.log10(2), 96),
    ((logarithm.LOG10_E, logarithm.LOG10_E_REST), lambda: 1 / mp.ln(10), 106),
    ((power.THIRD, power.THIRD_REST), lambda: mp.mpf(1) / 3, 106),
    ((trigonometric.HALF_PI, trigonometric.HALF_PI_REST, trigonometric.HALF_PI_LAST), lambda: mp.pi / 2, 160),
    ((inverse_trigonometric.HALF_PI, inverse_trigonometric.HALF_PI_REST), lambda: mp.pi / 2, 106),
    ((inverse_trigonometric.QUARTER_PI, inverse_trigonometric.QUARTER_PI_REST), lambda: mp.pi / 4, 106),
)


@pytest.mark.parametrize(("parts", "value", "bits"), PARTS)
def test_constants_in_parts_add_up(parts: tuple[float, ...], value: object, bits: int) -> None:
    with mp.workprec(300):
        true = value()  # type: ignore[operator]
        assert abs(mp.fsum(mp.mpf(part) for part in parts) / true - 1) < mp.mpf(2) ** -bits
        assert abs(parts[1]) < abs(parts[0]) * 2.0**-41


def test_short_constants_times_an_exponent_are_exact() -> None:
    for short in (logarithm.LN2_SHORT, logarithm.LOG10_2_SHORT):
        assert Fraction(short) * 2**44 % 1 == 0, "42 bits and an 11-bit exponent fit into 53"
    assert Fraction(3 * inverse_trigonometric.QUARTER_PI) == 3 * Fraction(inverse_trigonometric.QUARTER_PI)

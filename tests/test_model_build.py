"""Written code: what stands in the text, what does not, and that the text computes what the expression says, bit by bit."""

from __future__ import annotations

import re
import struct
import sys

import numpy as np
import pytest

from tests.solver_models import Ex, Parts, compiled, equations, names, number, one_state, predator_prey, table, table_slope
from uq.errors import ValueMistake
from uq.lang.graph import ARITY, TRUTHS
from uq.model.build import build
from uq.model.code import Forcing, Table
from uq.model.tableau import PAIRS
from uq.solve.compile import Processor, machine_text, parsed
from uq.solve.solve import evaluate_starts

SPECIAL = [0.0, -0.0, 1.0, -1.0, 0.3, -2.5, 7.0, 1e-310, 1e200, -1e200, np.inf, -np.inf, np.nan]


def evaluate(make, *columns: object) -> np.ndarray:
    """Values of an expression of inputs a, b, c as machine code."""
    leaves = names("a b c")
    result = make(*leaves[: len(columns)])
    zero = number(leaves[0], 0.0)
    eq = equations("a b c"[: 2 * len(columns) - 1], "x", [result], [zero])
    return evaluate_starts(compiled(eq), np.column_stack([np.asarray(c, float) for c in columns]))[:, 0]


def known(a: np.ndarray, b: np.ndarray, values: np.ndarray) -> np.ndarray:
    """The values, not a number where a or b is not."""
    return np.where(np.isnan(a) | np.isnan(b), np.nan, values)


def same(found: np.ndarray, expected: np.ndarray) -> bool:
    """Equal bits, any nan equal to any other."""
    both = np.isnan(found) & np.isnan(expected)
    return bool(np.all(both | (found.view(np.int64) == np.asarray(expected, float).view(np.int64))))


def everything() -> Ex:
    """One expression with every function and operator of the language."""
    a, x, time, f = names("k x time f")
    total = a
    for op, arguments in ARITY.items():
        if op in TRUTHS or op == "where":
            continue
        total = total + x.of(op, *([time, f][: arguments - 1]))
    total = total + table("t", x) + table_slope("t", x) + table("s", time) + table_slope("s", time)
    return ((x < 1) & ~(time >= 2) | (x <= f) & (x > 0)).where(total, x**3 + x**-2 + x**0.5 + x**-0.5 + x**1.5 + x**2.7 + x**time)


def everything_equations():
    forcing = Forcing("f", (0.0, 1.0, 2.0), (0.0, 1.0, 0.5), "smooth")
    rate = everything()
    x = Ex(rate.graph, rate.graph.name("x"))
    tables = (Table("t", (0.0, 1.0), (2.0, 3.0)), Table("s", (0.0, 1.0, 2.0), (2.0, 3.0, 3.5), "smooth", "hold"))
    return equations("k x0", "x", [names("x0", rate.graph)[0]], [rate], Parts(forcings=(forcing,), conditions=(x > 0,), tables=tables))


def test_the_same_model_gives_the_same_text_and_fingerprint() -> None:
    first, second = build(everything_equations()), build(everything_equations())
    assert first.text == second.text
    assert first.fingerprint == second.fingerprint != build(predator_prey()).fingerprint


def test_no_fast_math_flag_is_ever_written() -> None:
    text = build(everything_equations()).text
    flags = ("fast", "nnan", "ninf", "nsz", "arcp", "contract", "afn", "reassoc")
    operations = re.findall(r"= (?:f(?:add|sub|mul|div|neg|cmp)|call|select|phi) ([a-z]+)", text)
    assert len(operations) > 100
    assert not set(operations) & set(flags)


def undefined_symbols(data: bytes) -> set[str]:
    """Names that an ELF object (64 bit, little endian) needs from elsewhere."""
    assert data[:6] == b"\x7fELF\x02\x01"
    place, size, count = struct.unpack_from("<Q", data, 0x28)[0], *struct.unpack_from("<HH", data, 0x3A)
    sections = [struct.unpack_from("<IIQQQQIIQQ", data, place + k * size) for k in range(count)]
    found = set()
    for kind, offset, length, link in ((s[1], s[4], s[5], s[6]) for s in sections):
        if kind == 2:  # the symbol table, whose names lie in section `link`
            for at in range(offset + 24, offset + length, 24):
                name, _, _, section = struct.unpack_from("<IBBH", data, at)
                if section == 0:
                    start = sections[link][4] + name
                    found.add(data[start : data.index(b"\0", start)].decode())
    return found


@pytest.mark.skipif(sys.platform != "linux", reason="reads ELF objects")
@pytest.mark.parametrize("method", [pair.name for pair in PAIRS])
@pytest.mark.parametrize("name", ["here", "x86-64-v3", "x86-64-v4"])
def test_compiled_code_has_no_external_symbol(name: str, method: str) -> None:
    here = Processor.here()
    if name != "here" and "avx2" not in here.features:
        pytest.skip("an x86 processor is needed to write x86 code")
    module, machine = parsed(build(everything_equations(), method).text, here if name == "here" else Processor(name, ""))
    assert undefined_symbols(machine.emit_object(module)) == set()


def test_the_reader_of_objects_sees_an_external_symbol() -> None:
    if sys.platform != "linux":
        pytest.skip("reads ELF objects")
    text = (
        "declare double @llvm.exp.f64(double)\ndefine double @f(double %x) {\n %y = call double @llvm.exp.f64(double %x)\n ret double %y\n}"
    )
    module, machine = parsed(text, Processor.here())
    assert undefined_symbols(machine.emit_object(module)) == {"exp"}


def test_the_code_is_vectorised() -> None:
    if "avx2" not in Processor.here().features:
        pytest.skip("looks for x86 instructions")
    text = machine_text(build(predator_prey()), Processor("x86-64-v3", ""))
    step = text[text.index("uq_step:") :]
    step = step[: step.index(".Lfunc_end")]
    packed, single = len(re.findall(r"vfn?m(?:add|sub)\d+pd", step)), len(re.findall(r"vfn?m(?:add|sub)\d+sd", step))
    assert packed > 150
    assert single == 0


def test_what_depends_on_inputs_alone_is_worked_out_once_per_member() -> None:
    a, b, x0, x, y = names("a b x0 x y")
    held = (a * b).exp()
    code = build(equations("a b x0", "x y", [x0, x0], [held * x + (a * b), held * y * (x / (a - b))]))
    assert code.layout.hoisted == 3  # exp(a*b), a*b, a-b
    assert code.text.count("call <8 x double> @uq_exp") == 1


def test_shared_subexpressions_are_written_once_and_dead_ones_not_at_all() -> None:
    x0, x, y = names("x0 x y")
    shared = (x * y).exp()
    unused = (x - y).sin()
    code = build(equations("x0", "x y", [x0, x0], [shared + x, shared - y], Parts(observed=[x])))
    evaluations = 6 + 2  # six stages after the first, two at the start
    assert code.text.count("call <8 x double> @uq_exp") == evaluations
    assert "uq_sin" not in code.text
    assert unused.node.op == "sin"


def test_order_of_operations_is_the_users() -> None:
    x = np.array([1.0, 3.0, 1e16])
    assert same(evaluate(lambda a: (a + 1e20) - 1e20, x), (x + 1e20) - 1e20)
    assert same(evaluate(lambda a: a / 3 * 3, x), x / 3 * 3)


def test_sums_of_products_are_rounded_once() -> None:
    rng = np.random.default_rng(5)
    a, b, c = rng.normal(size=(3, 100))
    exact = [float(np.longdouble(p) * np.longdouble(q) + np.longdouble(r)) for p, q, r in zip(a, b, c, strict=True)]
    plain = evaluate(lambda p, q, r: p * q + r, a, b, c)
    assert np.max(np.abs(plain - exact) / np.spacing(np.abs(exact))) <= 1.0
    assert not same(plain, a * b + c)  # two roundings would differ somewhere
    assert same(evaluate(lambda p, q, r: r + p * q, a, b, c), plain)
    assert same(evaluate(lambda p, q, r: r - p * q, a, b, c), -evaluate(lambda p, q, r: p * q - r, a, b, c))


def test_a_product_that_is_needed_elsewhere_is_rounded_on_its_own() -> None:
    a, b, c = np.random.default_rng(6).normal(size=(3, 100))
    found = evaluate(lambda p, q, r: (p * q + r) / (p * q), a, b, c)
    assert same(found, (a * b + c) / (a * b))


@pytest.mark.parametrize(
    ("make", "expected"),
    [
        (lambda a, b: a + b, np.add),
        (lambda a, b: a - b, np.subtract),
        (lambda a, b: a * b, np.multiply),
        (lambda a, b: a / b, np.divide),
        (lambda a, b: -a + 0 * b, lambda a, b: -a + 0 * b),
        (lambda a, b: a.abs(), lambda a, b: np.abs(a)),
        (lambda a, b: a.sqrt(), lambda a, b: np.sqrt(a)),
        (lambda a, b: (a < b).where(1, 2), lambda a, b: known(a, b, np.where(a < b, 1.0, 2.0))),
        (lambda a, b: (a <= b).where(1, 2), lambda a, b: known(a, b, np.where(a <= b, 1.0, 2.0))),
        (lambda a, b: (a > b).where(1, 2), lambda a, b: known(a, b, np.where(a > b, 1.0, 2.0))),
        (lambda a, b: (a >= b).where(1, 2), lambda a, b: known(a, b, np.where(a >= b, 1.0, 2.0))),
        (lambda a, b: ((a > 0) & (b > 0)).where(a, b), lambda a, b: np.where((a > 0) & (b > 0) | np.isnan(a) & (b > 0), a, b)),
        (lambda a, b: ((a > 0) | (b > 0)).where(a, b), lambda a, b: np.where((a > 0) | (b > 0) | np.isnan(a), a, b)),
        (lambda a, b: (~(a > b)).where(a, b), lambda a, b: known(a, b, np.where(~(a > b), a, b))),
        (lambda a, b: a**2 + 0 * b, lambda a, b: a * a + 0 * b),
        (lambda a, b: (a**3).max(a**3), lambda a, b: a * a * a),
        (lambda a, b: a**4, lambda a, b: (a * a) * (a * a)),
        (lambda a, b: a**-2, lambda a, b: 1 / (a * a)),
        (lambda a, b: a**1, lambda a, b: a),
        (lambda a, b: a**0, lambda a, b: np.ones_like(a)),
        (lambda a, b: a**0.5, lambda a, b: np.sqrt(a)),
        (lambda a, b: a**-0.5, lambda a, b: 1 / np.sqrt(a)),
        (lambda a, b: a**1.5, lambda a, b: a * np.sqrt(a)),
    ],
)
def test_plain_operations_have_the_bits_of_numpy(make, expected) -> None:
    a, b = (column.ravel() for column in np.meshgrid(SPECIAL, SPECIAL))
    with np.errstate(all="ignore"):
        assert same(evaluate(make, a, b), expected(a, b))


def test_min_and_max_hand_nan_on() -> None:
    a, b = (column.ravel() for column in np.meshgrid(SPECIAL, SPECIAL))
    for make, expected in ((lambda p, q: p.min(q), np.minimum), (lambda p, q: p.max(q), np.maximum)):
        found, wanted = evaluate(make, a, b), expected(a, b)
        assert np.array_equal(found, wanted, equal_nan=True)


def test_general_powers() -> None:
    a, b = np.array([2.0, 3.0, 0.5, 10.0]), np.array([0.1, -2.7, 7.0, 5.5])
    assert np.allclose(evaluate(lambda p, q: p**q, a, b), a**b, rtol=1e-15)
    assert np.allclose(evaluate(lambda p: p**7, a), a**7, rtol=1e-15)
    assert np.allclose(evaluate(lambda p: p**-2.5, a), a**-2.5, rtol=1e-15)


def test_a_number_is_written_bit_by_bit() -> None:
    value = 0.1 + 0.2
    assert f"0x{struct.unpack('>Q', struct.pack('>d', value))[0]:016X}" in build(one_state(lambda x, k, t: value * x)).text
    assert same(evaluate(lambda a: a + number(a, -0.0), [-0.0]), np.array([-0.0]))


def test_a_model_without_states_and_an_unknown_method_are_the_users_mistakes() -> None:
    x0, x = names("x0 x")
    good = equations("x0", "x", [x0], [x])
    with pytest.raises(ValueMistake, match="explicit54"):
        build(good, "implicit")
    with pytest.raises(ValueMistake, match="at most 2000"):
        build(type(good)(good.graph, ("x0",), ("x",) * 2001, good.starts * 2001, good.rates * 2001))
    with pytest.raises(ValueMistake, match="no state"):
        build(type(good)(good.graph, ("x0",), (), (), ()))

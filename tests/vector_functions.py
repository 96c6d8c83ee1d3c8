"""The vector functions compiled and held against the truth: shared by the fast test and the dense one.

`Machine` compiles `definitions` with a loop around each function. Truth comes from arithmetic with a 64-bit mantissa (numpy's longdouble,
where the machine has it) for dense samples, and from mpmath for samples of hundreds; errors are in units in the last place of the true
value.
"""

from __future__ import annotations

import ctypes
import struct
from collections.abc import Callable
from typing import Any

import llvmlite.binding as llvm
import mpmath as mp
import numpy as np
from numpy.typing import NDArray

from uq.model.elementary.definitions import FUNCTIONS, NAMES, definitions

Floats = NDArray[np.float64]
ARGUMENTS = {function.name: function.arguments for function in FUNCTIONS}
LONG = np.longdouble
HAS_LONG = np.finfo(LONG).nmant >= 63
PRECISION = 200  # bits, for mpmath
HALF_PI = LONG("1.57079632679489661923132169163975144")

LOOP = """
define void @batch_{name}(ptr %out, ptr %x, ptr %y, i64 %count) {{
entry:
  br label %loop
loop:
  %k = phi i64 [ 0, %entry ], [ %next, %loop ]
  %px = getelementptr <8 x double>, ptr %x, i64 %k
  %py = getelementptr <8 x double>, ptr %y, i64 %k
  %po = getelementptr <8 x double>, ptr %out, i64 %k
  %vx = load <8 x double>, ptr %px, align 8
  %vy = load <8 x double>, ptr %py, align 8
  %r = call <8 x double> @uq_{name}(<8 x double> %vx{second})
  store <8 x double> %r, ptr %po, align 8
  %next = add i64 %k, 1
  %more = icmp ult i64 %next, %count
  br i1 %more, label %loop, label %done
done:
  ret void
}}
"""


def module_text(names: tuple[str, ...] = NAMES) -> str:
    """The definitions, and for each a loop over arrays of eights."""
    loops = (LOOP.format(name=name, second=", <8 x double> %vy" if ARGUMENTS[name] == 2 else "") for name in names)
    return definitions(names) + "".join(loops)


def made_for(triple: str, cpu: str, features: str) -> tuple[Any, Any]:
    """The optimised module and its target machine."""
    llvm.initialize_all_targets()
    llvm.initialize_all_asmprinters()
    machine = llvm.Target.from_triple(triple).create_target_machine(cpu=cpu, features=features, opt=2)
    module = llvm.parse_assembly(module_text())
    module.triple, module.data_layout = triple, str(machine.target_data)
    module.verify()
    options = llvm.create_pipeline_tuning_options(speed_level=2)
    llvm.create_pass_builder(machine, options).getModulePassManager().run(module, llvm.create_pass_builder(machine, options))
    return module, machine


class Machine:
    """All functions, compiled for this processor or a part of its features."""

    def __init__(self, cpu: str = "", features: str | None = None) -> None:
        host = llvm.get_host_cpu_features().flatten()
        module, machine = made_for(llvm.get_process_triple(), cpu or llvm.get_host_cpu_name(), host if features is None else features)
        self.engine = llvm.create_mcjit_compiler(module, machine)
        self.engine.finalize_object()

    def __call__(self, name: str, x: Floats, y: Floats | None = None) -> Floats:
        """The function of each value (of each pair)."""
        count = -(-len(x) // 8)
        arrays = [np.ones(8 * count) for _ in range(3)]
        arrays[1][: len(x)] = x
        arrays[2][: len(x)] = x if y is None else y
        kind = ctypes.CFUNCTYPE(None, ctypes.c_void_p, ctypes.c_void_p, ctypes.c_void_p, ctypes.c_int64)
        kind(self.engine.get_function_address(f"batch_{name}"))(*(a.ctypes.data for a in arrays), count)
        return arrays[0][: len(x)]


def units(got: Floats, true: NDArray[Any]) -> Floats:
    """Distance in units in the last place of the true value; 0 where both are nan or both the same infinity, inf where only one is."""
    with np.errstate(all="ignore"):
        place = np.ldexp(LONG(1), np.maximum(np.frexp(np.abs(true))[1].astype(int) - 53, -1074))
        distance = np.asarray(np.abs(got.astype(LONG) - true) / place, dtype=float)
        same = (np.isnan(got) & np.isnan(true)) | (np.isinf(got) & (got == true.astype(float)))
    distance[same] = 0.0
    return np.where(np.isnan(distance), np.inf, distance)


def long_erf(x: NDArray[Any]) -> NDArray[Any]:
    """erf by 2/sqrt(pi) exp(-x^2) sum of 2^n x^(2n+1) / (1 3 5 ... (2n+1)), whose terms have one sign (NIST DLMF 7.6.2)."""
    bounded = np.clip(x, -7, 7)
    term = total = bounded * (2 / np.sqrt(2 * HALF_PI))
    for n in range(1, 220):
        term = term * (2 * bounded * bounded / (2 * n + 1))
        total = total + term
    return total * np.exp(-bounded * bounded)


# Truth for dense samples.
LONG_TRUTH: dict[str, Callable[..., NDArray[Any]]] = {
    "exp": np.exp, "ln": np.log, "log10": np.log10, "sqrt": np.sqrt, "sin": np.sin, "cos": np.cos, "tan": np.tan,
    "asin": np.arcsin, "acos": np.arccos, "atan": np.arctan, "atan2": np.arctan2, "sinh": np.sinh, "cosh": np.cosh,
    "tanh": np.tanh, "erf": long_erf, "pow": np.power,
}  # fmt: skip
MP_TRUTH: dict[str, Callable[..., Any]] = {
    "exp": mp.exp, "ln": mp.log, "log10": mp.log10, "sqrt": mp.sqrt, "sin": mp.sin, "cos": mp.cos, "tan": mp.tan,
    "asin": mp.asin, "acos": mp.acos, "atan": mp.atan, "atan2": mp.atan2, "sinh": mp.sinh, "cosh": mp.cosh,
    "tanh": mp.tanh, "erf": mp.erf, "pow": mp.power,
}  # fmt: skip
GREATEST_ANGLE = 2.0**30


def dense_errors(machine: Machine, name: str, sample: tuple[Floats, ...]) -> Floats:
    """Errors in units in the last place against longdouble arithmetic."""
    with np.errstate(all="ignore"):
        true = LONG_TRUTH[name](*(a.astype(LONG) for a in sample))
    if name in ("sin", "cos", "tan"):
        true = np.where(np.abs(sample[0]) <= GREATEST_ANGLE, true, np.nan)
    return units(machine(name, *sample), true)


def exact_error(name: str, got: float, arguments: tuple[float, ...]) -> float:
    """Error in units in the last place against mpmath, for finite arguments inside the domain; an overflow must be inf."""
    with mp.workprec(PRECISION):
        true = MP_TRUTH[name](*(mp.mpf(a) for a in arguments))
        if abs(true) >= mp.mpf(2) ** 1024 - mp.mpf(2) ** 970:
            return 0.0 if got == (np.inf if true > 0 else -np.inf) else float("inf")
        if true == 0:
            return 0.0 if got == 0 else float("inf")
        place = mp.mpf(2) ** max(int(mp.floor(mp.log(abs(true), 2))) - 52, -1074)
        return float(abs(mp.mpf(float(got)) - true) / place) if np.isfinite(got) else float("inf")


def undefined_symbols(elf: bytes) -> set[str]:
    """Names that a 64-bit ELF object file leaves to the linker.

    Layout: System V Application Binary Interface, chapters "Object files" (section header 64 bytes, symbol 24 bytes).
    """
    table, size, count = struct.unpack_from("<Q", elf, 40)[0], *struct.unpack_from("<HH", elf, 58)
    headers = [struct.unpack_from("<IIQQQQIIQQ", elf, table + k * size) for k in range(count)]
    found = set()
    for _, kind, _, _, offset, length, link, *_ in headers:
        if kind != 2:  # not a symbol table
            continue
        names = headers[link][4]
        for place in range(offset + 24, offset + length, 24):
            name, _, _, section, _, _ = struct.unpack_from("<IBBHQQ", elf, place)
            if section == 0:
                start = names + name
                found.add(elf[start : elf.index(b"\0", start)].decode())
    return found


class Samples:
    """Samples of a function's whole domain, seeded: `of(name, count)` gives one or two arrays."""

    def __init__(self, seed: int) -> None:
        self.random = np.random.default_rng(seed)

    def uniform(self, low: float, high: float, count: int) -> Floats:
        return self.random.uniform(low, high, count)

    def spread(self, low: float, high: float, count: int) -> Floats:
        """Both signs, evenly spread in the logarithm."""
        return np.exp(self.random.uniform(np.log(low), np.log(high), count)) * self.random.choice([-1.0, 1.0], count)

    def bits(self, count: int) -> Floats:
        """Random bit patterns: all exponents, denormal numbers, a few nan."""
        return self.random.integers(0, 2**64, count, dtype=np.uint64).view(np.float64)

    def denormal(self, count: int) -> Floats:
        return self.random.integers(0, 2**53, count, dtype=np.uint64).view(np.float64) * self.random.choice([-1.0, 1.0], count)

    def near(self, places: tuple[float, ...], count: int) -> Floats:
        """Neighbours, a few last places and a few thousandths away, of given places and their negatives."""
        centre = self.random.choice(np.array(places), count) * self.random.choice([-1.0, 1.0], count)
        few = np.where(self.random.random(count) < 0.5, self.random.integers(-50, 51, count) * 2.0**-52, self.uniform(-0.01, 0.01, count))
        return centre * (1.0 + few)

    def turns(self, count: int) -> Floats:
        """The doubles nearest to multiples of pi/2, up to 2^30, small multiples and large ones."""
        n = self.random.integers(1, np.exp(self.random.uniform(1, np.log(2**30 / 1.5708), count)).astype(np.int64) + 1)
        return (n * HALF_PI).astype(np.float64)

    def of(self, name: str, count: int) -> tuple[Floats, ...]:
        """About `count` arguments, mixed: uniform where people work, spread over all sizes, random bits, denormal, near hard places."""
        n = count // 6
        if ARGUMENTS[name] == 2:
            return self._pairs(name, n)
        low, high, hard = DOMAIN[name]
        parts = [
            self.uniform(low, high, n),
            self.uniform(max(low, -1.5), min(high, 1.5), n),
            self.spread(5e-324, high, n),
            self.bits(n),
            self.denormal(n // 8),
            self.near(hard, 2 * n),
        ]
        if name in ("sin", "cos", "tan"):
            parts += [self.turns(n), self.uniform(-20.0, 20.0, n)]
        return (np.concatenate(parts),)

    def _pairs(self, name: str, n: int) -> tuple[Floats, Floats]:
        if name == "pow":
            base = [self.bits(n), np.abs(self.bits(n)), np.abs(self.spread(1e-10, 1e10, n)), 1.0 + self.spread(1e-16, 0.3, n)]
            base += [self.uniform(0.7, 1.42, n), np.abs(self.denormal(n // 4)), self.random.integers(-30, 31, n).astype(float)]
            exponent = [self.bits(n), self.uniform(-1, 1, n), self.uniform(-30, 30, n), self.spread(1, 1e16, n)]
            exponent += [self.uniform(-2200, 2200, n), self.uniform(-1, 1, n // 4), self.random.integers(-20, 21, n).astype(float)]
            return np.concatenate(base), np.concatenate(exponent)
        scales = [(5e-324, 1e308), (1e-3, 1e3), (5e-324, 1e-290), (1e290, 1.7e308), (0.1, 10.0)]
        first = np.concatenate([*(self.spread(*s, n) for s in scales), self.bits(n)])
        second = np.concatenate([*(self.spread(*s, n) for s in scales), self.bits(n)])
        return first, second


HALF_LN2 = 0.34657359027997264
# Where each function is not flat, and places where it changes its formula or loses digits.
DOMAIN: dict[str, tuple[float, float, tuple[float, ...]]] = {
    "exp": (-746.0, 710.0, (HALF_LN2, 3 * HALF_LN2, 709.78, 708.39, 745.1)),
    "ln": (0.0, 1e3, (1.0, 2**0.5, 0.5**0.5, 2.2250738585072014e-308)),
    "log10": (0.0, 1e3, (1.0, 10.0, 1e10, 2**0.5, 0.5**0.5, 2.2250738585072014e-308)),
    "sqrt": (0.0, 1e3, (1.0, 4.0)),
    "sin": (-(2.0**30), 2.0**30, (0.7853981633974483, 2.356194490192345, 2.0**30)),
    "cos": (-(2.0**30), 2.0**30, (0.7853981633974483, 2.356194490192345, 2.0**30)),
    "tan": (-(2.0**30), 2.0**30, (0.7853981633974483, 2.356194490192345, 2.0**30)),
    "asin": (-1.0, 1.0, (0.5, 1.0)),
    "acos": (-1.0, 1.0, (0.5, 1.0)),
    "atan": (-1e3, 1e3, (0.41421356237309503, 0.5, 1.0, 2.414213562373095)),
    "sinh": (-711.0, 711.0, (HALF_LN2, 3 * HALF_LN2, 18.5, 22.0, 44.5, 710.47)),
    "cosh": (-711.0, 711.0, (HALF_LN2, 3 * HALF_LN2, 18.5, 22.0, 44.5, 710.47)),
    "tanh": (-25.0, 25.0, (HALF_LN2, 3 * HALF_LN2, 18.5, 22.0)),
    "erf": (-6.5, 6.5, (HALF_LN2, 0.30, 0.83, 5.9, 6.0)),
}
# The greatest errors measured on dense samples, rounded up; the promise to users is 2.
UNITS = {
    "exp": 0.95, "ln": 0.9, "log10": 0.75, "sqrt": 0.501, "sin": 0.85, "cos": 0.85, "tan": 1.1, "asin": 1.2, "acos": 1.2, "atan": 1.0,
    "atan2": 0.9, "sinh": 0.75, "cosh": 0.75, "tanh": 0.75, "erf": 1.25, "pow": 1.0,
}  # fmt: skip

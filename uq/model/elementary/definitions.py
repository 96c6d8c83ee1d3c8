"""The vector functions of the language, as LLVM text.

Only instructions: no call of a mathematical library, no approximate reciprocal, no fast-math flag, so that every processor with FMA gives
the same bits (of a nan its sign and payload aside). Larger functions stay calls. Measured on a seven-stage step with two or four calls
of exp or ln per rate: written in line they take 8 to 13 % less time with AVX-512, up to 11 % more with AVX2, and 2 to 5 times as long to
compile.
"""

from __future__ import annotations

from collections.abc import Callable, Iterable
from dataclasses import dataclass

from uq.model.elementary import error_function, exponential, hyperbolic, inverse_trigonometric, logarithm, power, remainder, trigonometric
from uq.model.elementary.body import DOUBLE, INTRINSICS, Body, Value, is_nan, magnitude, square_root, where


@dataclass(frozen=True)
class Function:
    """A function of the language: `@uq_<name>` takes and gives eight doubles; a small one is always written in line."""

    name: str
    arguments: int
    write: Callable[..., Value]
    small: bool = False


def least(a: Value, b: Value) -> Value:
    """The smaller of two; nan where one is nan; of 0 and -0 the second."""
    return where(is_nan(a), a, where(a < b, a, b))


def greatest(a: Value, b: Value) -> Value:
    """The greater of two; nan where one is nan; of 0 and -0 the second."""
    return where(is_nan(a), a, where(a > b, a, b))


# In the order of the language's list.
FUNCTIONS = (
    Function("exp", 1, exponential.exp),
    Function("ln", 1, logarithm.ln),
    Function("log10", 1, logarithm.log10),
    Function("sqrt", 1, square_root, small=True),
    Function("sin", 1, trigonometric.sin),
    Function("cos", 1, trigonometric.cos),
    Function("tan", 1, trigonometric.tan),
    Function("asin", 1, inverse_trigonometric.asin),
    Function("acos", 1, inverse_trigonometric.acos),
    Function("atan", 1, inverse_trigonometric.atan),
    Function("atan2", 2, inverse_trigonometric.atan2),
    Function("sinh", 1, hyperbolic.sinh),
    Function("cosh", 1, hyperbolic.cosh),
    Function("tanh", 1, hyperbolic.tanh),
    Function("erf", 1, error_function.erf),
    Function("abs", 1, magnitude, small=True),
    Function("min", 2, least, small=True),
    Function("max", 2, greatest, small=True),
    Function("mod", 2, remainder.mod),
    Function("pow", 2, power.power),
)
NAMES = tuple(function.name for function in FUNCTIONS)


def definitions(names: Iterable[str]) -> str:
    """LLVM text that defines `@uq_<name>` for each name, and declares the intrinsics that they use.

    Every function takes one or two `<8 x double>` and gives one: atan2(y, x), mod(a, b), pow(base, exponent). At most 2 units in the last
    place from the truth (measured: tests/long/test_elementary_dense.py). The text depends on the set of names only. Errors: KeyError for
    an unknown name. The intrinsics are declared here: do not declare them again in the same module.
    """
    wanted = set(names)
    if unknown := wanted - set(NAMES):
        raise KeyError(f"no such function: {', '.join(sorted(unknown))}")
    texts, intrinsics = [], set[str]()
    for function in FUNCTIONS:
        if function.name in wanted:
            body = Body()
            texts.append(definition(function, body))
            intrinsics |= body.intrinsics
    return "\n".join([*(declaration(name) for name in sorted(intrinsics)), "", *texts])


def declaration(intrinsic: str) -> str:
    """The line that declares an intrinsic."""
    result, kinds = INTRINSICS[intrinsic]
    return f"declare {result} @{intrinsic}({', '.join(kinds)})"


def definition(function: Function, body: Body) -> str:
    """One function, written through `body`."""
    arguments = [Value(body, DOUBLE, f"%{letter}") for letter in "xy"[: function.arguments]]
    result = function.write(*arguments)
    listed = ", ".join(f"{DOUBLE} {a.name}" for a in arguments)
    how = "alwaysinline" if function.small else "noinline"
    head = f"define internal {DOUBLE} @uq_{function.name}({listed}) {how} nounwind willreturn memory(none) {{"
    return "\n".join([head, *body.lines, f"  ret {DOUBLE} {result.name}", "}", ""])

"""How each general-purpose ODE library is asked for the members of a model: one function that makes a call, all in compiled code.

Every library gets the rates as it wants them (a traced function, symbols, or source text), absolute tolerances by state where it takes
these, else one of their geometric mean, and works on one core.
"""

from __future__ import annotations

from collections.abc import Callable, Sequence
from dataclasses import dataclass
from functools import cache, partial
from typing import Any

import numpy as np

from uq.model.code import Equations

Work = Callable[[], np.ndarray]


class Unsuited(Exception):
    """A library that cannot do this model."""


@dataclass(frozen=True, eq=False)
class Model:
    """Equations without forcings and tables, scales [state], output times from 0 on, inputs by members, the accuracies and the errors at
    which methods are compared, and whether it is stiff."""

    name: str
    equations: Equations
    scales: tuple[float, ...]
    times: np.ndarray
    inputs: Callable[[int], np.ndarray]
    accuracies: tuple[float, ...]
    errors: tuple[float, ...]
    stiff: bool

    def starts(self, row: np.ndarray) -> list[float]:
        """Start values of a member."""
        return self._values(self.equations.starts, dict(zip(self.equations.inputs, row, strict=True)))

    def rates(self, y: Sequence[Any], p: Sequence[Any]) -> list[Any]:
        """The rates of states y and inputs p, whatever these are."""
        names = (*self.equations.states, *self.equations.inputs)
        return self._values(self.equations.rates, dict(zip(names, (*y, *p), strict=True)))

    def source(self, y: str, p: str) -> list[str]:
        """The rates as text, of y[0], y[1], ... and p[0], p[1], ... written with the given patterns."""
        states, inputs = len(self.equations.states), len(self.equations.inputs)
        return [str(each) for each in self.rates([Text(y.format(i)) for i in range(states)], [Text(p.format(i)) for i in range(inputs)])]

    def _values(self, roots: Sequence[Any], leaves: dict[str, Any]) -> list[Any]:
        found: dict[int, Any] = {}
        for node in self.equations.graph.order(roots):
            args = [found[arg.id] for arg in node.args]
            if node.op in ("number", "name"):
                found[node.id] = node.value if node.op == "number" else leaves[str(node.value)]
            else:
                found[node.id] = OPERATIONS[node.op](*args)
        return [found[root.id] for root in roots]


def power(a: Any, b: float) -> Any:
    """A whole power as products, which every library has."""
    if b not in (2.0, 3.0):
        raise ValueError(f"a power of {b}")
    return a * a if b == 2.0 else a * a * a


OPERATIONS: dict[str, Callable[..., Any]] = {
    "+": lambda a, b: a + b,
    "-": lambda a, b: a - b,
    "*": lambda a, b: a * b,
    "/": lambda a, b: a / b,
    "neg": lambda a: -a,
    "**": power,
}


@dataclass(frozen=True)
class Text:
    """An expression as source text."""

    text: str

    def __str__(self) -> str:
        return self.text

    def __neg__(self) -> Text:
        return Text(f"(-{self})")

    def __add__(self, other: object) -> Text:
        return Text(f"({self} + {other})")

    def __radd__(self, other: object) -> Text:
        return Text(f"({other} + {self})")

    def __sub__(self, other: object) -> Text:
        return Text(f"({self} - {other})")

    def __rsub__(self, other: object) -> Text:
        return Text(f"({other} - {self})")

    def __mul__(self, other: object) -> Text:
        return Text(f"({self} * {other})")

    def __rmul__(self, other: object) -> Text:
        return Text(f"({other} * {self})")

    def __truediv__(self, other: object) -> Text:
        return Text(f"({self} / {other})")


def usual(model: Model, tolerance: float) -> float:
    """One absolute tolerance for all states."""
    return float(tolerance * np.exp(np.mean(np.log(model.scales))))


def starts(model: Model, x: np.ndarray) -> np.ndarray:
    """Start values [member, state]."""
    return np.array([model.starts(row) for row in x])


def made_by(text: str, name: str) -> Any:
    """A function from its source."""
    space: dict[str, Any] = {}
    exec(text, space)
    return space[name]


@cache
def _numbalsoda(model: Model) -> Callable[..., None]:
    from numba import cfunc, njit
    from numbalsoda import lsoda, lsoda_sig

    lines = [f"    du[{i}] = {text}" for i, text in enumerate(model.source("u[{}]", "p[{}]"))]
    made = cfunc(lsoda_sig)(made_by("\n".join(["def f(t, u, du, p):", *lines]), "f"))
    rates = made.address

    @njit
    def all_members(begin, given, times, relative, absolute, out):  # type: ignore[no-untyped-def]
        for m in range(len(begin)):
            found, _ = lsoda(rates, begin[m].copy(), times, data=given[m], rtol=relative, atol=absolute)
            out[m] = found.T

    all_members.keep = made
    return all_members


def numbalsoda_lsoda(model: Model, x: np.ndarray, tolerance: float) -> Work:
    """LSODA in C++ with rates in machine code, members in a compiled loop."""
    all_members = _numbalsoda(model)
    begin, given = starts(model, x), np.ascontiguousarray(x)

    def work() -> np.ndarray:
        out = np.empty((len(x), len(model.scales), len(model.times)))
        all_members(begin, given, model.times, tolerance, usual(model, tolerance), out)
        return out

    return work


@cache
def _cyrk(method: int, model: Model) -> Callable[..., None]:
    from CyRK import nbsolve_ivp
    from numba import njit

    lines = [f"    du[{i}] = {text}" for i, text in enumerate(model.source("y[{}]", "p[{}]"))]
    text = ["import numpy as np", "def f(t, y, p):", f"    du = np.empty({len(lines)})", *lines, "    return du"]
    rates = njit(made_by("\n".join(text), "f"))

    @njit
    def all_members(begin, given, times, relatives, absolutes, out):  # type: ignore[no-untyped-def]
        span = (0.0, times[-1])
        for m in range(len(begin)):
            done = nbsolve_ivp(
                rates, span, begin[m], (given[m],), rtols=relatives, atols=absolutes, rk_method=method, t_eval=times, warnings=False
            )
            out[m] = done.y

    return all_members


def cyrk(method: int, model: Model, x: np.ndarray, tolerance: float) -> Work:
    """An explicit pair in numba, members in a compiled loop."""
    if model.stiff:
        raise Unsuited("explicit only")
    all_members = _cyrk(method, model)
    begin, given, relatives = starts(model, x), np.ascontiguousarray(x), np.full(len(model.scales), tolerance)

    def work() -> np.ndarray:
        out = np.empty((len(x), len(model.scales), len(model.times)))
        all_members(begin, given, model.times, relatives, tolerance * np.array(model.scales), out)
        return out

    return work


def casadi_cvodes(model: Model, x: np.ndarray, tolerance: float) -> Work:
    """CVODES with rates and exact Jacobian as C compiled by the system's compiler, members in a mapped function."""
    import casadi

    y, p = casadi.SX.sym("y", len(model.scales)), casadi.SX.sym("p", x.shape[1])
    rates = casadi.vertcat(*model.rates(casadi.vertsplit(y), casadi.vertsplit(p)))
    jit = {"jit": True, "compiler": "shell", "jit_options": {"flags": ["-O3", "-march=native"], "verbose": False}}
    options = {"reltol": tolerance, "abstol": usual(model, tolerance), "max_num_steps": 100_000, **jit}
    one = casadi.integrator("one", "cvodes", {"x": y, "p": p, "ode": rates}, 0.0, list(model.times[1:]), options)
    all_, begin = one.map(len(x)), starts(model, x)

    def work() -> np.ndarray:
        ends = np.array(all_(x0=begin.T, p=x.T)["xf"]).reshape(len(model.scales), len(x), len(model.times) - 1)
        return np.concatenate([begin[:, :, None], ends.transpose(1, 0, 2)], axis=2)

    return work


def sundae_cvode(model: Model, x: np.ndarray, tolerance: float) -> Work:
    """CVODE called with rates in machine code through Python."""
    import sksundae
    from numba import njit

    lines = [f"    du[{i}] = {text}" for i, text in enumerate(model.source("y[{}]", "p[0][{}]"))]
    rates = njit(made_by("\n".join(["def f(t, y, du, p):", *lines]), "f"))
    absolute = tolerance * np.array(model.scales)
    begin = starts(model, x)

    def work() -> np.ndarray:
        out = np.empty((len(x), len(model.scales), len(model.times)))
        for m, row in enumerate(x):
            given = {"rtol": tolerance, "atol": absolute, "userdata": (row,), "max_num_steps": 100_000}
            solver = sksundae.cvode.CVODE(rates, method="BDF" if model.stiff else "Adams", **given)
            out[m] = solver.solve(model.times, begin[m]).y.T
        return out

    return work


def diffsol(method: str, model: Model, x: np.ndarray, tolerance: float) -> Work:
    """A solver in Rust with rates and Jacobian products in machine code."""
    import pydiffsol

    if not model.stiff and method in ("tr_bdf2", "bdf"):
        raise Unsuited("for stiff models")
    if model.stiff and method == "tsit45":
        raise Unsuited("explicit only")
    states, inputs = len(model.scales), x.shape[1]
    leaves = {name: Text(f"p{i}") for i, name in enumerate(model.equations.inputs)}
    begin = ", ".join(f"y{i} = {text}" for i, text in enumerate(model._values(model.equations.starts, leaves)))
    given = ", ".join(f"p{i} = 1" for i in range(inputs))
    code = f"in_i {{ {given} }}\nu_i {{ {begin} }}\nF_i {{ {', '.join(model.source('y{}', 'p{}'))} }}\n"
    solver = pydiffsol.Ode(code, matrix_type=pydiffsol.nalgebra_dense)
    solver.ode_solver, solver.rtol, solver.atol = getattr(pydiffsol, method), tolerance, usual(model, tolerance)

    def work() -> np.ndarray:
        out = np.empty((len(x), states, len(model.times)))
        for m, row in enumerate(x):
            out[m] = solver.solve_dense(row, model.times).ys
        return out

    return work


def heyoka_taylor(model: Model, x: np.ndarray, tolerance: float) -> Work:
    """Taylor series, eight members side by side in machine code."""
    import heyoka

    states, lanes = len(model.scales), 8
    y = heyoka.make_vars(*[f"y{i}" for i in range(states)])
    y = y if isinstance(y, list) else [y]
    used = {name for name in model.equations.inputs if any(name in model.equations.graph.leaves(rate) for rate in model.equations.rates)}
    taken = [i for i, name in enumerate(model.equations.inputs) if name in used]
    rates = model.rates(y, [heyoka.par[taken.index(i)] if i in taken else None for i in range(x.shape[1])])
    begin, grid = starts(model, x), np.repeat(model.times[:, None], lanes, axis=1)
    system = list(zip(y, rates, strict=True))
    first = np.ascontiguousarray(begin[:lanes].T)
    stepper = heyoka.taylor_adaptive_batch(system, first, pars=np.ascontiguousarray(x[:lanes, taken].T), tol=tolerance)

    def work() -> np.ndarray:
        out = np.empty((len(x), states, len(model.times)))
        for m in range(0, len(x), lanes):
            stepper.set_time(0.0)
            stepper.state[:] = begin[m : m + lanes].T
            if taken:
                stepper.pars[:] = x[m : m + lanes, taken].T
            _, values = stepper.propagate_grid(grid)
            out[m : m + lanes] = values.transpose(2, 1, 0)
        return out

    return work


@cache
def _diffrax(method: str, model: Model) -> Callable[..., Any]:
    import diffrax
    import jax
    import jax.numpy as jnp

    jax.config.update("jax_enable_x64", True)
    term = diffrax.ODETerm(lambda t, y, p: jnp.stack(model.rates(list(y), list(p))))
    times, scales = jnp.array(model.times), jnp.array(model.scales)

    def one(begin: Any, p: Any, tolerance: Any) -> Any:
        save, solver = diffrax.SaveAt(ts=times), getattr(diffrax, method)()
        control = diffrax.PIDController(rtol=tolerance, atol=tolerance * scales)
        span = (0.0, float(model.times[-1]))
        return diffrax.diffeqsolve(term, solver, *span, None, begin, p, saveat=save, stepsize_controller=control, max_steps=None).ys

    return jax.jit(jax.vmap(one, in_axes=(0, 0, None)))


def diffrax_batch(method: str, model: Model, x: np.ndarray, tolerance: float) -> Work:
    """All members as one batch of arrays in XLA."""
    if model.stiff != (method == "Kvaerno5"):
        raise Unsuited("not for this kind of model")
    batch, begin = _diffrax(method, model), starts(model, x)
    return lambda: np.asarray(batch(begin, x, tolerance)).transpose(0, 2, 1)


def plain(model: Model) -> Callable[[float, np.ndarray, Sequence[float]], list[float]]:
    """The rates as a plain Python function of floats."""
    text = ", ".join(model.source("y[{}]", "p[{}]"))
    made: Callable[[float, np.ndarray, Sequence[float]], list[float]] = made_by(
        f"def f(t, y, p):\n    y = y.tolist()\n    return [{text}]", "f"
    )
    return made


def scipy_lsoda(model: Model, x: np.ndarray, tolerance: float) -> Work:
    """LSODA of scipy with rates as a plain Python function of floats."""
    from scipy.integrate import solve_ivp

    rates = plain(model)
    begin, span, absolute = starts(model, x), (0.0, float(model.times[-1])), tolerance * np.array(model.scales)

    def work() -> np.ndarray:
        given = {"method": "LSODA", "t_eval": model.times, "rtol": tolerance, "atol": absolute}
        return np.array([solve_ivp(rates, span, begin[m], args=(row,), **given).y for m, row in enumerate(x.tolist())])

    return work


@dataclass(frozen=True)
class Library:
    """How it is called, and at most how many members it is timed with: per member most take as long for few as for many."""

    make: Callable[[Model, np.ndarray, float], Work]
    most: int = 64

    def members(self, wanted: int) -> int:
        """So many."""
        return min(wanted, self.most)


LIBRARIES = {
    "scipy solve_ivp LSODA": Library(scipy_lsoda, 8),
    "numbalsoda LSODA": Library(numbalsoda_lsoda, 128),
    "CasADi CVODES": Library(casadi_cvodes),
    "scikit-sundae CVODE": Library(sundae_cvode, 16),
    "diffsol BDF": Library(partial(diffsol, "bdf")),
    "diffsol TR-BDF2": Library(partial(diffsol, "tr_bdf2")),
    "diffsol ESDIRK34": Library(partial(diffsol, "esdirk34")),
    "diffsol Tsit45": Library(partial(diffsol, "tsit45")),
    "CyRK DOPRI5": Library(partial(cyrk, 1), 128),
    "CyRK DOP853": Library(partial(cyrk, 2), 128),
    "heyoka Taylor, 8 lanes": Library(heyoka_taylor, 512),
    "diffrax Kvaerno5, batch": Library(partial(diffrax_batch, "Kvaerno5"), 64),
    "diffrax Tsit5, batch": Library(partial(diffrax_batch, "Tsit5"), 1024),
    "diffrax Dopri8, batch": Library(partial(diffrax_batch, "Dopri8"), 1024),
}

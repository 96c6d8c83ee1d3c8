"""How often the intervals of shares and of differences hold the truth, over many seeds: used by the short test and by the long one."""

from __future__ import annotations

import tomllib
from collections.abc import Callable, Iterable
from dataclasses import replace
from itertools import permutations
from pathlib import Path
from typing import Any

import numpy as np
from scipy.special import ndtr, ndtri

from tests.analysis_models import number
from tests.sensitivity_models import Dependent, Sets, closed_linear, design_of, linear
from uq.analysis.ask import InputGroup, Measured
from uq.analysis.differences import SHARED, Draws, Run, differences
from uq.analysis.finding import Finding

Truths = dict[tuple[str, str], np.ndarray]
Shares = dict[tuple[str, str], np.ndarray]

HERE = Path(__file__).parent


def cases() -> dict[str, dict[str, Any]]:
    """The published cases by name."""
    with (HERE / "reference" / "dependent.toml").open("rb") as handle:
        return {case["name"]: case for case in tomllib.load(handle)["case"]}


CASES = cases()
WEIGHTS = {"two": [2.0, 1.0], "three": [1.0, 1.0, 1.0], "four": [1.0, 0.0, 2.0, -0.5]}
PRODUCT_MEAN, PRODUCT = (np.array(CASES["product"][key]) for key in ("mean", "covariance"))


def expected(name: str, kind: str) -> np.ndarray:
    """What a case expects of one kind (first, total, shapley), in the order of its inputs."""
    return np.array(list(CASES[name][kind].values()))


def product(x: np.ndarray, times: np.ndarray) -> np.ndarray:
    """x1 x3 + x2 x4 (Kucherenko, Tarantola and Annoni 2012, doi:10.1016/j.cpc.2011.12.020)."""
    return np.asarray((x[:, 0] * x[:, 2] + x[:, 1] * x[:, 3])[:, None, None] * np.ones(len(times)))


def product_costs(outside: tuple[int, ...]) -> float:
    """E[Var(y | inputs outside the set)] of the product: its variance less that of E[x1, x2 | ..] . E[x3, x4 | ..], whose mean is 0."""

    def explained(known: list[int], block: list[int]) -> np.ndarray:
        if not known:
            return np.zeros((2, 2))
        across = PRODUCT[np.ix_(block, known)]
        return np.asarray(across @ np.linalg.solve(PRODUCT[np.ix_(known, known)], across.T))

    def of(known: list[int]) -> float:
        mean = np.outer(PRODUCT_MEAN[2:], PRODUCT_MEAN[2:])
        left = explained([p for p in known if p < 2], [0, 1])
        return float(np.trace(left @ (explained([p for p in known if p > 1], [2, 3]) + mean)))

    return of([0, 1, 2, 3]) - of([p for p in range(4) if p not in outside])


def shared_out(costs: Callable[[tuple[int, ...]], float], many: int) -> np.ndarray:
    """Shapley effects from the costs of sets, over all orders of the inputs (the other way than the tool's)."""
    found, orders = np.zeros(many), list(permutations(range(many)))
    for order in orders:
        for size in range(many):
            found[order[size]] += costs(tuple(sorted(order[: size + 1]))) - costs(tuple(sorted(order[:size])))
    return found / len(orders) / costs(tuple(range(many)))


def held(model: Dependent, truths: Truths, seeds: Iterable[int], rows: int) -> Shares:
    """Share of seeds whose interval holds the truth, by group and name."""
    hits: dict[tuple[str, str], list[np.ndarray]] = {}
    for seed in seeds:
        found = model.forecast(design_of(model, seed, rows), questions=("ranking",))
        _count(hits, found, truths)
    return {key: np.mean(each, axis=0) for key, each in hits.items()}


def _count(hits: dict[tuple[str, str], list[np.ndarray]], found: dict[str, Finding], truths: Truths) -> None:
    for (group, name), truth in truths.items():
        inside = (number(found[group], f"{name}_low") <= truth) & (truth <= number(found[group], f"{name}_high"))
        hits.setdefault((group, name), []).append(inside)


def linear_model(name: str) -> tuple[Dependent, Truths]:
    """A linear case with its closed forms."""
    case = CASES[name]
    model = Dependent(np.array(case["mean"]), np.array(case["covariance"]), linear(WEIGHTS[name]))
    return model, {("ranking/y0", f"{kind}_overall"): expected(name, kind) for kind in ("first", "shapley")}


def product_model() -> tuple[Dependent, Truths]:
    """The product of correlated pairs."""
    truths = {
        ("ranking/y0", "first_overall"): expected("product", "first"),
        ("ranking/y0", "shapley_overall"): shared_out(product_costs, 4),
    }
    return Dependent(PRODUCT_MEAN, PRODUCT, product), truths


def orders_model(many: int, pairs: int) -> tuple[Dependent, Truths]:
    """A sum of equally correlated inputs (0.3), ranked by random orders, each with its reverse."""
    covariance = np.full((many, many), 0.3) + 0.7 * np.eye(many)
    weights = np.linspace(1, 2, many)
    model = Dependent(np.zeros(many), covariance, linear(weights))
    return replace(model, orders=random_orders(many, pairs, 7)), {("ranking/y0", "shapley_overall"): closed_linear(weights, covariance)}


def random_orders(many: int, pairs: int, seed: int) -> Sets:
    """Random orders, each followed by its reverse."""
    rng = np.random.default_rng(seed)
    drawn = [tuple(int(each) for each in rng.permutation(many)) for _ in range(pairs)]
    return tuple(each for order in drawn for each in (order, order[::-1]))


def grouped(x: np.ndarray, times: np.ndarray) -> np.ndarray:
    """(x1 + 2 x2)(1 + x3), x1 and x2 uniform on 0..1, x3 on 0..2."""
    u = ndtr(x)
    return np.asarray(((u[:, 0] + 2 * u[:, 1]) * (1 + 2 * u[:, 2]))[:, None, None] * np.ones(len(times)))


def group_model() -> tuple[Dependent, Truths]:
    """Independent inputs in two groups."""
    groups = (InputGroup("G1", (0, 1)), InputGroup("G2", (2,)))
    model = Dependent(np.zeros(3), np.eye(3), grouped, sets=((0,), (1,), (2,), (0, 1)), groups=groups, dependent=False)
    return model, {
        ("ranking/y0", "first_group_overall"): expected("groups", "first"),
        ("ranking/y0", "total_group_overall"): expected("groups", "total"),
    }


def indicator_model() -> tuple[Dependent, Truths]:
    """Whether x1 + x2 > 1 (correlated 0.5) and never a third input: effects by symmetry; first order from the bivariate normal law."""
    from scipy.stats import multivariate_normal

    covariance = np.array([[1, 0.5, 0], [0.5, 1, 0], [0, 0, 1.0]])
    model = Dependent(np.zeros(3), covariance, linear([1.0, 1.0, 0.0]), threshold=1.0, by=(1.0,))
    p = float(ndtr(-1 / np.sqrt(3)))
    # E[1 | x1] has the law of two members that share x1: the sum correlates with itself by its squared correlation with x1.
    q, r = -1 / np.sqrt(3), 0.75
    both = float(multivariate_normal([0, 0], [[1, r], [r, 1]]).cdf([q, q]))
    first = (both - p**2) / (p * (1 - p))
    truths = {
        ("ranking/hot", "first_by"): np.array([first, first, 0.0])[:, None],
        ("ranking/hot", "shapley_by"): np.array([0.5, 0.5, 0.0])[:, None],
    }
    return model, truths


def lognormal_pair() -> tuple[Dependent, Dependent, Truths]:
    """T = exp(0.5 x1 + 0.3 x2) (1 + t) and the same 10 % higher; judged against the same limit."""

    def values(factor: float) -> Callable[[np.ndarray, np.ndarray], np.ndarray]:
        return lambda x, times: (factor * np.exp(0.5 * x[:, 0] + 0.3 * x[:, 1])[:, None] * (1 + times))[:, None]

    def outcome(factor: float) -> Callable[[np.ndarray], np.ndarray]:
        return lambda x: factor * np.exp(0.5 * x[:, 0] + 0.3 * x[:, 1])

    s = np.sqrt(0.34)
    base = Dependent(np.zeros(2), np.eye(2), values(1.0), dependent=False, sets=(), threshold=3.0, by=(1.0,), take=outcome(1.0))
    higher = replace(base, values=values(1.1), take=outcome(1.1))
    quantiles = 0.1 * np.exp(s * ndtri([0.05, 0.5, 0.95]))
    mean, sd = np.exp(0.17), np.sqrt(np.expm1(0.34) * np.exp(0.34))
    # exp(s z) > 1.5 / factor at the last time
    chances = ndtr(-np.log(1.5 / np.array([1.0, 1.1])) / s)
    return (
        base,
        higher,
        {
            ("bands/y0", "quantiles"): quantiles[:, None] * np.array([1.0, 2.0]),
            ("bands/y0", "mean"): 0.1 * mean * np.array([1.0, 2.0]),
            ("bands/y0", "sd"): 0.1 * sd * np.array([1.0, 2.0]),
            ("outcomes/o", "quantiles"): quantiles,
            ("outcomes/o", "mean"): np.array(0.1 * mean),
            ("limits/hot", "ever_by"): np.array([chances[1] - chances[0]]),
        },
    )


def differing(seeds: Iterable[int], rows: int, draws: Draws) -> tuple[Shares, Shares, Truths]:
    """Share of seeds whose interval of a difference holds the truth, mean half-widths, and the truths."""
    base, higher, truths = lognormal_pair()
    hits: dict[tuple[str, str], list[np.ndarray]] = {}
    widths: dict[tuple[str, str], list[np.ndarray]] = {}
    for seed in seeds:
        runs = []
        for model, own in ((base, seed), (higher, seed if draws is SHARED else seed + 10**6)):
            design = design_of(model, own, rows)
            ask = model.complete(design, questions=("bands", "limits", "outcomes"))
            runs.append(Run(ask, model.tallied(design, ask, design.blocks(0, rows, rows))))
        found = {finding.group: finding for finding in differences(runs[0], runs[1], draws)}
        _count(hits, found, truths)
        for group, name in truths:
            half = (number(found[group], f"{name}_high") - number(found[group], f"{name}_low")) / 2
            widths.setdefault((group, name), []).append(half)
    shares, halves = ({key: np.mean(each, axis=0) for key, each in found.items()} for found in (hits, widths))
    return shares, halves, truths


def measured_model() -> tuple[Dependent, Truths]:
    """y standard normal, measured at -2, 0.3 and 1.2 with no error, and with deviation 1: shares of the normal law of both together."""
    values, sd = (-2.0, 0.3, 1.2, 0.3), (0.0, 0.0, 0.0, 1.0)
    observed = Measured(0, (0.0, 1.0, 1.0, 1.0), values, sd)
    model = Dependent(np.zeros(1), np.eye(1), linear([1.0]), dependent=False, sets=((0,),), measured=(observed,))
    return model, {("measured/y0", "below"): ndtr(np.array(values) / np.sqrt(1 + np.array(sd) ** 2))}

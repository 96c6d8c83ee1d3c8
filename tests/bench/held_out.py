"""Problems on which nothing of the choice between explicit and stiff steps was tuned: `tests.bench.stiff` measures it on them as well.

Textbook models with constants of our own unless said otherwise; published ones from memory.
"""

from __future__ import annotations

from tests.stiff_models import Problem


def brusselator(y):
    """A = 1, B = 3: a limit cycle (Prigogine and Lefever 1968)."""
    meeting = y[0] * y[0] * y[1]
    return [1.0 + meeting - 4.0 * y[0], 3.0 * y[0] - meeting]


def flame(y):
    """A ball of flame that grows slowly, then at once, and stays (O'Malley 1991)."""
    return [y[0] * y[0] * (1.0 - y[0])]


def nerve(pace: float):
    """FitzHugh and Nagumo's nerve, the slow part so many times slower."""

    def rates(y):
        return [y[0] - y[0] * y[0] * y[0] / 3.0 - y[1] + 0.5, (y[0] + 0.7 - 0.8 * y[1]) / pace]

    return rates


def enzyme(y):
    """Substrate, enzyme, complex, product, the binding fast (Michaelis and Menten)."""
    bind, loose, turn = 100.0 * y[0] * y[1], 60.0 * y[2], 4.0 * y[2]
    return [loose - bind, loose + turn - bind, bind - loose - turn, turn]


def reactor(y):
    """A cooled stirred tank with one exothermic reaction; conversion and temperature, both over their own scales."""
    rate = 0.3 * (1.0 - y[0]) * (y[1] / (1.0 + 0.05 * y[1])).exp()
    return [rate - y[0], 8.0 * rate - 3.0 * y[1]]


def spring(damping: float):
    """A mass on a spring with a damper so strong that it creeps, pushed by a swing of its own."""
    return lambda y: [y[1], -10.0 * y[0] - damping * y[1] + y[2], y[3], -y[2]]


def loop(gain: float):
    """A temperature held by a controller with a fast valve and a slow sensor."""
    return lambda y: [0.2 * (y[1] - y[0]), gain * (2.0 * (1.0 - y[2]) + y[3] - y[1]), 2.0 * (y[0] - y[2]), 0.1 * (1.0 - y[2])]


def front(spreading: float):
    """A population that grows and spreads over twenty cells (Fisher 1937)."""

    def rates(y):
        flow = [spreading * ((y[i - 1] if i else y[0]) - 2.0 * y[i] + (y[i + 1] if i < 19 else y[i])) for i in range(20)]
        return [each + own * (1.0 - own) for each, own in zip(flow, y, strict=True)]

    return rates


def weather(y):
    """Lorenz 1963."""
    return [10.0 * (y[1] - y[0]), y[0] * (28.0 - y[2]) - y[1], y[0] * y[1] - 8.0 / 3.0 * y[2]]


def epidemic(y):
    """Those who can catch it, have caught it, are ill for a short time, are well again."""
    caught = 30.0 * y[0] * y[2]
    return [-caught, caught - 0.5 * y[1], 0.5 * y[1] - 20.0 * y[2], 20.0 * y[2]]


HELD_OUT = (
    Problem("Brusselator", 2, (1.0, 1.0), 30.0, brusselator, (), (3.0, 4.0)),
    Problem("flame", 1, (1e-3,), 2000.0, flame, (), (1.0,)),
    *(Problem(f"nerve {pace:g}", 2, (0.0, 0.0), 8.0 * pace, nerve(pace), (), (2.0, 1.0)) for pace in (12.5, 100.0)),
    Problem("enzyme", 4, (1.0, 0.2, 0.0, 0.0), 20.0, enzyme, (), (1.0, 0.2, 0.2, 1.0)),
    Problem("reactor", 2, (0.0, 0.0), 30.0, reactor, (), (1.0, 3.0)),
    *(Problem(f"spring {damping:g}", 4, (1.0, 0.0, 1.0, 0.0), 20.0, spring(damping), (), (1.0,) * 4) for damping in (20.0, 200.0)),
    *(Problem(f"loop {gain:g}", 4, (0.0,) * 4, 60.0, loop(gain), (), (1.0,) * 4) for gain in (5.0, 50.0)),
    *(Problem(f"front {spreading:g}", 20, (1.0, *[0.001] * 19), 20.0, front(spreading), (), (1.0,) * 20) for spreading in (1.0, 20.0)),
    Problem("weather", 3, (1.0, 1.0, 1.0), 10.0, weather, (), (20.0, 25.0, 45.0)),
    Problem("epidemic", 4, (1.0, 1e-4, 0.0, 0.0), 60.0, epidemic, (), (1.0, 0.5, 0.02, 1.0)),
)

"""Which pair solves a study, by the accuracy it asks for: decided from a number, measured beforehand.

(Without the tables themselves, which take a moment to prove themselves: `uq check` may ask.)
"""

from __future__ import annotations

# How many times as long the 5(4) pair takes as the 8(5,3) pair at equal error reached, with 101 output times
# (python -m tests.bench.solver_pairs; AVX-512; with 2 output times the gain is about a fifth larger, and begins at 1e-6):
#
#   accuracy             1e-4  1e-5  1e-6  1e-7  1e-8  1e-9 1e-10 1e-11 1e-12
#   predator-prey        1.05  1.07  1.15  1.18  1.14  1.48  1.72  2.30  2.89
#   the same, with exp   0.89  0.96  0.91  1.03  1.15  1.36  1.66  2.03  2.61
#   pendulum             0.98  1.03  1.07  1.26  1.67  2.10  2.63  3.40  4.13
#   epidemic             0.84  0.96  1.02  1.06  1.18  1.34  1.40  1.78  2.33
#   driven oscillator    1.00  1.19  2.11  1.61  2.26  3.51  4.38  4.55  5.11
#   ten tanks            0.78  0.85  0.86  0.88  0.97  1.10  1.25  1.60  2.37
#   heating tank         0.82  0.70  0.46  0.76  0.74  0.81  0.57  0.77  1.36    (slightly stiff: stability, not accuracy, sets the steps)
#
# (Measured on a machine with other work, so single numbers may be off by a tenth or two; equal error is interpolated.) Down to 1e-7 the
# gain does not pay for the longer compilation (about twice), and the longer steps have a longer tail of errors: at 1e-6 the worst of 800
# predator-prey members is off by 260 times the accuracy (5(4): 130), while the middle one is nearer (19 and 33 times).
LOOSEST_853 = 1e-8


def method_for(accuracy: float) -> str:
    """The method for a relative tolerance: "explicit54", or "explicit853" from 1e-8 on."""
    return "explicit853" if accuracy <= LOOSEST_853 else "explicit54"

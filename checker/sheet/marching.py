"""Where a body is after a time: its energy per mass followed along the path with a step that adapts itself.

Runge-Kutta pair of order 5 and 4, coefficients of J. R. Dormand and P. J. Prince, J. Comput. Appl. Math. 6 (1980) 19.
"""

from __future__ import annotations

import math
from collections.abc import Callable
from typing import Final

from checker.outcomes import NotEvaluable

STAGES: Final = (
    (1 / 5,),
    (3 / 40, 9 / 40),
    (44 / 45, -56 / 15, 32 / 9),
    (19372 / 6561, -25360 / 2187, 64448 / 6561, -212 / 729),
    (9017 / 3168, -355 / 33, 46732 / 5247, 49 / 176, -5103 / 18656),
    (35 / 384, 0.0, 500 / 1113, 125 / 192, -2187 / 6784, 11 / 84),
)
DIFFERENCE: Final = (71 / 57600, 0.0, -71 / 16695, 71 / 1920, -17253 / 339200, 22 / 525, -1 / 40)
"""Order 5 less order 4."""
ACCURACY: Final = 1e-9
"""Largest error of a step, relative to the energy that the whole time could bring (chosen)."""
MOST_STEPS: Final = 2000
SMALLEST: Final = 1e-12
EDGE: Final = 1e-6
"""Part of the duration within which the edge of the model's range is found (chosen)."""
SETTLED: Final = 1e-9
"""Part of the way to its rest at which a body has settled (chosen)."""


def settle(rate: Callable[[float], float], start: float, rest: float, duration: float) -> float:
    """Return the energy per mass [J/kg] after a duration [s] of a body that settles at an energy per mass.

    The logarithm of the way that is left falls nearly evenly, so that even very long times take few steps.

    Parameters
    ----------
    rate : callable
        As for ``march``.
    start, rest : float
        Where the body is, and where it would come to rest. [J/kg]
    duration : float
        [s]
    """
    way = rest - start
    if abs(way) <= SMALLEST * max(abs(rest), abs(start)):
        return start
    whole = math.log(abs(way))
    floor = whole + math.log(SETTLED)

    def left(logarithm: float) -> float:
        return math.copysign(math.exp(max(logarithm, floor)), way)

    last = march(lambda logarithm: -rate(rest - left(logarithm)) / left(logarithm), whole, duration, floor)
    return rest - left(last)


def march(rate: Callable[[float], float], start: float, duration: float, floor: float = -math.inf) -> float:
    """Return the energy per mass [J/kg] after a duration [s], which may be negative.

    Parameters
    ----------
    rate : callable
        Energy per mass and time [W/kg] at an energy per mass; may raise NotEvaluable outside the model's range.
    start : float
        Energy per mass at the start. [J/kg]
    duration : float
        [s]
    floor : float
        Where to stop, if it is reached before.

    Raises
    ------
    NotEvaluable
        The body leaves the range of its model, or the course does not converge.
    """
    first, refused = (
        rate(start),
        NotEvaluable("the course of the temperature does not converge", "ill-conditioned"),
    )
    energy, done, step, growth = start, 0.0, duration / 16.0, 4.0
    scale = max(abs(first * duration), 1e-9)
    for _ in range(MOST_STEPS):
        if abs(step) < SMALLEST * abs(duration):
            break
        step = min(step, duration - done, key=abs)
        try:
            moved, error, last = _trial(rate, energy, first, step)
        except NotEvaluable as outcome:  # a stage beyond the model's range, or the course itself
            refused, step, growth = outcome, 0.25 * step, 1.0
            if abs(step) < EDGE * abs(duration):
                break
            continue
        off = abs(error) / (ACCURACY * scale)
        if off <= 1.0:
            energy, first, done = moved, last, done + step
            growth = min(4.0, 1.2 * growth)
            if abs(duration - done) < SMALLEST * abs(duration) or energy <= floor:
                return energy
        step *= min(growth, max(0.2, 0.9 * (off + 1e-12) ** -0.2))
    raise refused


def _trial(
    rate: Callable[[float], float], energy: float, first: float, step: float
) -> tuple[float, float, float]:
    """Return the energy after a step, its error and the rate there."""
    rates = [first]
    moved = energy
    for weights in STAGES:
        moved = energy + step * sum(w * r for w, r in zip(weights, rates, strict=True))
        rates.append(rate(moved))
    return moved, step * sum(w * r for w, r in zip(DIFFERENCE, rates, strict=True)), rates[-1]

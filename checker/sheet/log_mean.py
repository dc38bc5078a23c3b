"""The temperature that stands for a place whose temperature moves in proportion to the heat."""

from __future__ import annotations

import math

from checker.outcomes import NotEvaluable


def log_mean(first: float, last: float) -> float:
    """Return the logarithmic mean of two temperatures. [K]

    (T₂ − T₁)/ln(T₂/T₁), the temperature T with Q/T = ∫δQ/T where T moves in proportion to the heat; T₁ where both
    are the same. Closed form.

    Raises
    ------
    NotEvaluable
        A temperature that is not above absolute zero.
    """
    if first <= 0.0 or last <= 0.0:
        raise NotEvaluable("a boundary temperature must be above absolute zero")
    rise = (last - first) / first
    return first if rise == 0.0 else first * rise / math.log1p(rise)


def entropy_at(heat: float, first: float, last: float) -> tuple[float]:
    """Return the entropy [J/K] that heat [J] carries over a boundary that moves between two temperatures. [K]"""
    return (heat / log_mean(first, last),)

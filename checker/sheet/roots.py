"""Roots of one function and of a system, by SciPy, with bounded work; every root is verified before it is returned."""

from __future__ import annotations

import math
from collections.abc import Callable, Iterable, Sequence
from itertools import pairwise
from typing import Final

from checker.outcomes import NotEvaluable

VERIFIED: Final = 1e-8
"""Largest residual of a root, relative to the largest term of its equation."""
MOST_TRIALS: Final = 60
"""Most steps of one search of a system, each with one evaluation per unknown for the derivatives."""
SAME: Final = 1e-6
"""Two roots closer than this (in scaled unknowns) are one."""
OUTSIDE: Final = 1e6
"""What a residual counts where there is no state: the search turns back from there."""

Vector = tuple[float, ...]
Residuals = Callable[[Vector], Sequence[float]]
"""Residuals, each relative to its largest term; raises NotEvaluable where there is no state."""


def roots_on(function: Callable[[float], float], grid: Sequence[float]) -> list[float]:
    """Return every root that a sign change on the grid shows, refined and verified.

    Parameters
    ----------
    function : callable
        Relative residual; raises NotEvaluable where it has no value.
    grid : sequence of float
        Ascending.
    """
    from scipy.optimize import brentq

    found: list[float] = []
    for (low, below), (high, above) in pairwise(_edged(function, grid)):
        if below is None or above is None:
            continue
        if below == 0.0:
            found.append(low)
        elif below * above < 0.0:
            try:
                root = float(brentq(function, low, high, xtol=1e-300, rtol=1e-14))
                if abs(function(root)) <= VERIFIED:
                    found.append(root)
            except (NotEvaluable, RuntimeError, ValueError):
                continue
    last = grid[-1]
    if _or_none(function, last) == 0.0:
        found.append(last)
    return found


def _or_none(function: Callable[[float], float], x: float) -> float | None:
    try:
        value = function(x)
    except (NotEvaluable, ArithmeticError, ValueError):
        return None
    return value if math.isfinite(value) else None


def _edged(function: Callable[[float], float], grid: Sequence[float]) -> Iterable[tuple[float, float | None]]:
    """Yield samples, with one more close to every edge of the range in which the function has a value."""
    last: tuple[float, float | None] | None = None
    for x in grid:
        here = (x, _or_none(function, x))
        if last is not None and (last[1] is None) != (here[1] is None):
            inside, outside = (here, last) if last[1] is None else (last, here)
            for _ in range(12):
                middle = 0.5 * (inside[0] + outside[0])
                value = (middle, _or_none(function, middle))
                inside, outside = (inside, value) if value[1] is None else (value, outside)
            yield inside
        yield here
        last = here


def system_roots(
    residuals: Residuals, starts: Iterable[Vector], lower: Vector, upper: Vector, agreeing: int = 2
) -> list[Vector]:
    """Return the distinct verified roots of a system found from several starts.

    The search ends early once ``agreeing`` starts have led to one and the same root.

    Parameters
    ----------
    residuals : callable
        As many relative residuals as there are unknowns.
    starts : iterable of tuple of float
        Scaled unknowns to start from.
    lower, upper : tuple of float
        Bounds of the scaled unknowns.
    """
    found: list[Vector] = []
    seen = 0
    for start in starts:
        root = _from(residuals, start, lower, upper)
        if root is None:
            continue
        if not any(_same(root, other) for other in found):
            found.append(root)
        seen += 1
        if len(found) == 1 and seen >= agreeing:
            break
    return found


def _same(one: Vector, other: Vector) -> bool:
    return all(abs(a - b) <= SAME for a, b in zip(one, other, strict=True))


def _from(residuals: Residuals, start: Vector, lower: Vector, upper: Vector) -> Vector | None:
    """Return the verified root that one start leads to, or None."""
    from scipy.optimize import least_squares

    count = len(start)

    def clipped(x: Sequence[float]) -> list[float]:
        try:
            values = [float(value) for value in residuals(tuple(map(float, x)))]
        except (NotEvaluable, ArithmeticError, ValueError):
            return [OUTSIDE] * count
        return [value if math.isfinite(value) else OUTSIDE for value in values]

    inside = tuple(min(max(x, low), high) for x, low, high in zip(start, lower, upper, strict=True))
    if max(map(abs, clipped(inside))) >= OUTSIDE:
        return None
    result = least_squares(
        clipped, inside, bounds=(lower, upper), xtol=3e-16, ftol=3e-16, gtol=3e-16, max_nfev=MOST_TRIALS
    )
    root = tuple(float(x) for x in result.x)
    return root if max(map(abs, clipped(root))) <= VERIFIED else None

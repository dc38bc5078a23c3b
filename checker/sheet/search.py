"""Finding an end state on a curve: a bounded scan for sign changes, then a bracketed root, then a check."""

from __future__ import annotations

import math
from collections.abc import Callable, Iterable, Iterator, Sequence
from itertools import pairwise

from checker.outcomes import NotEvaluable
from checker.substances.interface import Phase, PropertyState

SCAN_POINTS = 161
"""Points of the scan; odd, so that the known state itself is one of them."""

EDGE_STEPS = 12
"""Halvings with which the edge of the model's range is approached: a root may lie between it and the last point."""
MOST_OUTSIDE = 2
"""So many scanned points in a row without a state, and a path from the known state has left the model's range."""

Residual = Callable[[PropertyState], float]
Curve = Callable[[float], PropertyState]
Sample = tuple[float, float | None]


def around(centre: float, decades: float = 4.0) -> tuple[float, ...]:
    """Return a logarithmic grid around a positive value, the value itself included."""
    half = SCAN_POINTS // 2
    return tuple(centre * 10.0 ** (decades * i / half) for i in range(-half, half + 1))


def between(low: float, high: float) -> tuple[float, ...]:
    """Return an even grid."""
    return tuple(low + (high - low) * i / (SCAN_POINTS - 1) for i in range(SCAN_POINTS))


def find_state(
    curve: Curve,
    residual: Residual,
    grid: Sequence[float],
    scale: float,
    what: str,
    phase: Phase | None = None,
    outward: bool = False,
) -> PropertyState:
    """Return the one state on a curve in which a residual vanishes.

    Parameters
    ----------
    curve : callable
        State for a value of the curve's parameter; may raise NotEvaluable outside the model's range.
    residual : callable
        What must vanish, continuous along the curve.
    grid : sequence of float
        Ascending values of the parameter to scan.
    scale : float
        Size of the residual's largest term; the root is verified to 1e-7 of it.
    what : str
        For the message, such as ``the balance``.
    phase : Phase, optional
        Chooses where there are several states.
    outward : bool
        The path starts from the middle of the grid: scan from there to both sides, as far as there are states, and
        take the first root on each side, since the path leads to no other without passing it.

    Raises
    ------
    NotEvaluable
        No state, or several that the phase does not tell apart.
    """
    samples = _samples(curve, residual, grid, outward)
    found = [
        state
        for low, high in _brackets(samples)
        if (state := _refine(curve, residual, low, high, scale)) is not None
    ]
    found = _distinct(found)
    if phase is not None and len(found) > 1:
        found = [state for state in found if state.phase is phase] or found
    if outward:
        found = _first_reached(found, grid[len(grid) // 2])
    if not found and all(value is None for _, value in samples):
        residual(curve(grid[len(grid) // 2]))  # raises the model's own reason why there is no state at all
    if not found:
        raise NotEvaluable(f"no state on the path satisfies {what}")
    if len(found) > 1:
        roots = tuple(
            f"T = {s.temperature:.6g} K, v = {s.specific_volume or math.nan:.6g} m³/kg" for s in found
        )
        raise NotEvaluable(f"{len(found)} states on the path satisfy {what}", "several-roots", roots)
    return found[0]


def find_parameter(function: Callable[[float], float], grid: Sequence[float], what: str) -> float:
    """Return the one parameter of a curve at which a function that needs no state vanishes. Raises NotEvaluable."""
    from scipy.optimize import brentq

    values = [function(parameter) for parameter in grid]
    found = [parameter for parameter, value in zip(grid, values, strict=True) if value == 0.0]
    for (low, below), (high, above) in pairwise(zip(grid, values, strict=True)):
        if below * above < 0.0:
            found.append(float(brentq(function, low, high, xtol=1e-300, rtol=1e-14)))
    if len(found) != 1:
        number = "no" if not found else "more than one"
        raise NotEvaluable(f"{number} state on the path satisfies {what}")
    return found[0]


def _samples(curve: Curve, residual: Residual, grid: Sequence[float], outward: bool) -> list[Sample]:
    """Return the residual along the curve, None where the model has no state."""

    def value(parameter: float) -> float | None:
        try:
            return residual(curve(parameter))
        except NotEvaluable:
            return None

    if not outward:
        return list(_with_edges(value, grid, len(grid)))
    middle = len(grid) // 2
    lower = list(_with_edges(value, grid[middle::-1], MOST_OUTSIDE))
    return [*lower[:0:-1], *_with_edges(value, grid[middle:], MOST_OUTSIDE)]


def _with_edges(
    value: Callable[[float], float | None], grid: Iterable[float], most_outside: int
) -> Iterator[Sample]:
    """Yield samples in the order of the grid, with one more close to every edge of the model's range."""
    last: Sample | None = None
    outside = entered = 0
    for parameter in grid:
        here = (parameter, value(parameter))
        if last is not None and (here[1] is None) != (last[1] is None):
            yield _edge(value, *((last, here) if here[1] is None else (here, last)))
        yield here
        last = here
        entered += here[1] is not None
        outside = outside + 1 if here[1] is None and entered else 0
        if outside == most_outside:
            return


def _edge(value: Callable[[float], float | None], inside: Sample, outside: Sample) -> Sample:
    """Return the last sample within the model's range, between one inside and one outside."""
    for _ in range(EDGE_STEPS):
        middle = 0.5 * (inside[0] + outside[0])
        found = (middle, value(middle))
        inside, outside = (inside, found) if found[1] is None else (found, outside)
    return inside


def _brackets(samples: Iterable[Sample]) -> Iterator[tuple[float, float]]:
    last: tuple[float, float] | None = None
    for parameter, value in samples:
        if value is None:
            last = None
            continue
        if value == 0.0:
            yield parameter, parameter
            last = None
            continue
        if last is not None and (value < 0.0) != (last[1] < 0.0):
            yield last[0], parameter
        last = (parameter, value)


def _refine(curve: Curve, residual: Residual, low: float, high: float, scale: float) -> PropertyState | None:
    from scipy.optimize import brentq

    try:
        root = (
            low if low == high else brentq(lambda x: residual(curve(x)), low, high, xtol=1e-300, rtol=1e-14)
        )
        state = curve(float(root))
    except (NotEvaluable, ValueError, RuntimeError):
        return None
    return state if abs(residual(state)) <= 1e-7 * scale else None


def _first_reached(states: Sequence[PropertyState], start: float) -> list[PropertyState]:
    """Return the states next to the starting volume, one to each side."""
    volumes = {state.specific_volume or start: state for state in states}
    below = [v for v in volumes if v <= start]
    above = [v for v in volumes if v > start]
    return [volumes[v] for v in (*([max(below)] if below else ()), *([min(above)] if above else ()))]


def _distinct(states: Sequence[PropertyState]) -> list[PropertyState]:
    kept: list[PropertyState] = []
    for state in states:
        volume = state.specific_volume or 1.0
        if not any(
            abs(state.temperature - other.temperature) <= 1e-9 * state.temperature
            and abs(volume - (other.specific_volume or 1.0)) <= 1e-9 * volume
            for other in kept
        ):
            kept.append(state)
    return kept

"""Finding an end state on a curve: a bounded scan for sign changes, then a bracketed root, then a check."""

from __future__ import annotations

import math
from collections.abc import Callable, Iterator, Sequence

from checker.outcomes import NotEvaluable
from checker.substances.interface import Phase, PropertyState

SCAN_POINTS = 161
"""Points of the scan; odd, so that the known state itself is one of them."""

Residual = Callable[[PropertyState], float]
Curve = Callable[[float], PropertyState]


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

    Raises
    ------
    NotEvaluable
        No state, or several that the phase does not tell apart.
    """
    found = [
        state
        for low, high in _brackets(curve, residual, grid)
        if (state := _refine(curve, residual, low, high, scale)) is not None
    ]
    found = _distinct(found)
    if phase is not None and len(found) > 1:
        found = [state for state in found if state.phase is phase] or found
    if not found:
        raise NotEvaluable(f"no state on the path satisfies {what}")
    if len(found) > 1:
        roots = tuple(
            f"T = {s.temperature:.6g} K, v = {s.specific_volume or math.nan:.6g} m³/kg" for s in found
        )
        raise NotEvaluable(f"{len(found)} states on the path satisfy {what}", "several-roots", roots)
    return found[0]


def _brackets(curve: Curve, residual: Residual, grid: Sequence[float]) -> Iterator[tuple[float, float]]:
    last: tuple[float, float] | None = None
    for parameter in grid:
        try:
            value = residual(curve(parameter))
        except NotEvaluable:
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

"""Phase words of a state, and the choice between several states by a stated word."""

from __future__ import annotations

from collections.abc import Sequence
from typing import Final

from checker.outcomes import NotEvaluable
from checker.substances.interface import Phase, PropertyState
from checker.substances.properties import PRESSURE, TEMPERATURE, VOLUME, Point, in_words

SATURATED: Final = 1e-8
"""Quality this close to 0 or 1 is saturated liquid or vapour: what rounding leaves."""
LIQUID_SIDE: Final = (Phase.SATURATED_LIQUID, Phase.SUBCOOLED_LIQUID)
VAPOUR_SIDE: Final = (Phase.SATURATED_VAPOUR, Phase.SUPERHEATED_VAPOUR)
_FAMILIES: Final = {
    **dict.fromkeys(LIQUID_SIDE, LIQUID_SIDE),
    **dict.fromkeys(VAPOUR_SIDE, (*VAPOUR_SIDE, Phase.SUPERCRITICAL)),
    Phase.WET_VAPOUR: (Phase.WET_VAPOUR, Phase.SATURATED_LIQUID, Phase.SATURATED_VAPOUR),
}


def phase_of(point: Point, critical: tuple[float, float, float]) -> Phase:
    """Return the phase word of a state.

    Supercritical is only what is above both critical temperature and pressure; a gas above the critical
    temperature but below the critical pressure is superheated vapour, a liquid above the critical pressure but
    below the critical temperature is subcooled liquid.
    """
    if point.quality is not None:
        if point.quality <= SATURATED:
            return Phase.SATURATED_LIQUID
        return Phase.SATURATED_VAPOUR if point.quality >= 1.0 - SATURATED else Phase.WET_VAPOUR
    temperature, pressure, volume = critical
    if point.temperature > temperature:
        return Phase.SUPERCRITICAL if point.pressure > pressure else Phase.SUPERHEATED_VAPOUR
    liquid = point.pressure > pressure or point.specific_volume <= volume
    return Phase.SUBCOOLED_LIQUID if liquid else Phase.SUPERHEATED_VAPOUR


def state_of(point: Point, critical: tuple[float, float, float]) -> PropertyState:
    """Return a library state with its phase word."""
    return PropertyState(*point, phase_of(point, critical))


def choose(states: Sequence[PropertyState], phase: Phase | None, what: str) -> PropertyState:
    """Return the only state, or the only one that a stated phase allows.

    Raises
    ------
    NotEvaluable
        Several states remain; all are listed.
    """
    if len(states) == 1:
        return states[0]
    if phase is not None:
        for allowed in ((phase,), _FAMILIES.get(phase, (phase,))):
            left = [state for state in states if state.phase in allowed]
            if len(left) == 1:
                return left[0]
    roots = tuple(_words(state) for state in states)
    raise NotEvaluable(f"{what} belong to {len(states)} states: {'; '.join(roots)}", "several-roots", roots)


def _words(state: PropertyState) -> str:
    named = (
        (TEMPERATURE, state.temperature),
        (PRESSURE, state.pressure),
        (VOLUME, state.specific_volume),
    )
    values = ", ".join(in_words(name, value) for name, value in named if value is not None)
    return f"{state.phase} at {values}" if state.phase else values

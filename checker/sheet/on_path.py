"""The state on a path p(v) at which one property has a given value."""

from __future__ import annotations

from collections.abc import Callable

from checker.outcomes import NotEvaluable
from checker.sheet.search import around, find_parameter, find_state
from checker.sheet.states import SYMBOLS
from checker.substances.interface import Phase, PropertyState, Substance


def state_on(
    substance: Substance,
    pressure: Callable[[float], float],
    through: PropertyState,
    name: str,
    value: float,
    phase: Phase | None,
) -> PropertyState:
    """Return the state at which a path has a given property.

    Parameters
    ----------
    substance : Substance
        Its model.
    pressure : callable
        Pressure [Pa] of the path at a specific volume [m³/kg].
    through : PropertyState
        The known state, from which the path is followed to both sides.
    name : str
        The property, such as ``temperature``.
    value : float
        Its value. [SI]
    phase : Phase or None
        Chooses where there are several states.

    Raises
    ------
    NotEvaluable
        No state, or several.
    """

    def on_path(v: float) -> PropertyState:
        return substance.state({"pressure": positive_pressure(pressure(v)), "specific_volume": v})

    if name == "specific_volume":
        return on_path(value)
    if through.specific_volume is None:
        raise NotEvaluable("the model states no density", "missing")
    grid, what = around(through.specific_volume), f"{SYMBOLS[name]} as given"
    if name == "pressure":
        return on_path(find_parameter(lambda v: pressure(v) - value, grid, what))
    if name == "temperature":  # p from T and v is far cheaper than T from p and v
        return find_state(
            lambda v: substance.state({"temperature": value, "specific_volume": v}),
            lambda found: _pressure_ratio(found, pressure) - 1.0,
            grid,
            1.0,
            what,
            phase,
            outward=True,
        )

    def residual(found: PropertyState) -> float:
        own: float | None = getattr(found, name)
        if own is None:
            raise NotEvaluable(f"{name} does not exist here")
        return own - value

    return find_state(on_path, residual, grid, max(abs(value), 1.0), what, phase, outward=True)


def _pressure_ratio(found: PropertyState, pressure: Callable[[float], float]) -> float:
    """Return the pressure of a state over that of the path at its volume."""
    if found.pressure is None or found.specific_volume is None:
        raise NotEvaluable("the model states no density", "missing")
    return found.pressure / positive_pressure(pressure(found.specific_volume))


def positive_pressure(pressure: float) -> float:
    """Return a pressure that is above zero. Raises NotEvaluable."""
    if pressure <= 0.0:
        raise NotEvaluable("the path leads to a pressure below zero")
    return pressure

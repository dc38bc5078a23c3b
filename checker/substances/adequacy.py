"""How far an ideal model is from the real fluid behind its name."""

from __future__ import annotations

from collections.abc import Mapping

from checker.outcomes import NotEvaluable
from checker.substances.interface import PropertyState
from checker.substances.names import fluid_of, knows_fluid
from checker.substances.properties import PRESSURE, TEMPERATURE, VOLUME
from checker.substances.real_fluid import RealFluid


def real_fluid_of(name: str) -> RealFluid | None:
    """Return the real fluid behind a substance's name, None where no fluid is known by it."""
    return RealFluid(fluid_of(name)) if knows_fluid(name) else None


def compressibility_of(state: PropertyState, gas_constant: float) -> float:
    """Return Z = p v/(R T) of a state. [1]

    Parameters
    ----------
    state : PropertyState
        With pressure [Pa] and specific volume [m³/kg].
    gas_constant : float
        Specific gas constant. [J/(kg·K)]

    Raises
    ------
    NotEvaluable
        The state has no pressure or no volume.
    """
    if state.pressure is None or state.specific_volume is None:
        raise NotEvaluable("Z needs a pressure and a specific volume", "missing")
    return state.pressure * state.specific_volume / (gas_constant * state.temperature)


def compressibility(
    name: str, temperature: float, *, pressure: float | None = None, volume: float | None = None
) -> float:
    """Return Z = p v/(R T) of the real fluid of a name at a temperature and a pressure or specific volume. [1]

    Parameters
    ----------
    name : str
        A fluid.
    temperature : float
        [K]
    pressure : float, optional
        [Pa]
    volume : float, optional
        Specific volume. [m³/kg]

    Raises
    ------
    NotEvaluable
        The fluid is not known, or the state is not evaluable (near saturation, outside the range).
    """
    if (pressure is None) == (volume is None):
        raise NotEvaluable(
            "Z is asked for at a temperature and either a pressure or a specific volume", "missing"
        )
    other: Mapping[str, float] = {PRESSURE: pressure} if pressure is not None else {VOLUME: volume or 0.0}
    fluid = RealFluid(fluid_of(name))
    return compressibility_of(fluid.state({TEMPERATURE: temperature, **other}), fluid.gas_constant)

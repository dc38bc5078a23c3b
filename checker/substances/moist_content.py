"""How much water moist air holds, from a state in which its humidity is known."""

from __future__ import annotations

import math
from typing import Final

from checker.outcomes import NotEvaluable
from checker.substances.moist_gas import GASES, Gas
from checker.substances.moist_water import Saturated, saturated, vapour_volume, water
from checker.substances.properties import PRESSURE, TEMPERATURE, VOLUME, checked_value

_ROUNDS: Final = 40
_SETTLED: Final = 1e-13
_NOTHING: Final = 1e-15
"""Below this humidity there is no vapour: its volume would soon be no number."""


def water_content_at_pressure(
    model: str, temperature: float, pressure: float, relative_humidity: float
) -> float:
    """Return the mass of water per mass of dry air without condensate. [1]

    Parameters
    ----------
    model : str
        ``ideal gas`` or ``real fluid``.
    temperature, pressure : float
        [K], [Pa]
    relative_humidity : float
        Pressure of the vapour over that of saturated vapour in the same gas, over ice below 0 °C. [1]

    Raises
    ------
    NotEvaluable
        The humidity is not between 0 and 1, nothing is saturated at the temperature, or vapour alone exceeds the
        pressure.
    """
    pressure = checked_value(PRESSURE, pressure)
    gas, alone = _gas(model), _saturated(temperature, relative_humidity)
    density = 1.0 / gas.air_volume(temperature, pressure)
    for _ in range(_ROUNDS):
        vapour = _vapour_density(gas, temperature, density, alone, relative_humidity)
        rest = pressure - _pressure(temperature, vapour)
        rest -= gas.interaction(temperature, density, vapour).pressure
        if rest <= 0.0:
            raise NotEvaluable(
                f"vapour of this humidity alone exceeds the pressure of {pressure:.6g} Pa at {temperature:.6g} K"
            )
        before, density = density, 1.0 / gas.air_volume(temperature, rest)
        if abs(density - before) <= _SETTLED * density:
            break
    return vapour / density


def water_content_at_volume(model: str, temperature: float, volume: float, relative_humidity: float) -> float:
    """Return the mass of water per mass of dry air without condensate, from the volume of both [m³/kg]. [1]

    Raises
    ------
    NotEvaluable
        As ``water_content_at_pressure``; the vapour alone is denser than the whole.
    """
    whole = 1.0 / checked_value(VOLUME, volume)
    gas, alone = _gas(model), _saturated(temperature, relative_humidity)
    density = whole
    for _ in range(_ROUNDS):
        vapour = _vapour_density(gas, temperature, density, alone, relative_humidity)
        if vapour >= whole:
            raise NotEvaluable(f"vapour of this humidity alone is denser than {whole:.6g} kg/m³")
        before, density = density, whole - vapour
        if abs(density - before) <= _SETTLED * density:
            break
    return vapour / density


def _gas(model: str) -> Gas:
    if model not in GASES:
        raise NotEvaluable(f"moist air has no model {model[:40]!r}", "not-supported")
    return GASES[model]


def _saturated(temperature: float, relative_humidity: float) -> Saturated:
    if not (math.isfinite(relative_humidity) and 0.0 <= relative_humidity <= 1.0):
        raise NotEvaluable(f"a relative humidity of {relative_humidity:.6g} is not between 0 and 1")
    alone = saturated(checked_value(TEMPERATURE, temperature))
    if alone is None:
        raise NotEvaluable(f"no vapour is saturated at {temperature:.6g} K: no relative humidity there")
    return alone


def _vapour_density(
    gas: Gas,
    temperature: float,
    air_density: float,
    alone: Saturated,
    relative_humidity: float,
) -> float:
    """Return the density of vapour of a relative humidity in air of this density. [kg/m³]"""
    if relative_humidity < _NOTHING:
        return 0.0
    density = gas.enhancement(temperature, air_density, alone) / alone.vapour_volume
    return 1.0 / vapour_volume(temperature, relative_humidity * _pressure(temperature, density))


def _pressure(temperature: float, density: float) -> float:
    return 0.0 if density == 0.0 else water().vapour(temperature, 1.0 / density).pressure

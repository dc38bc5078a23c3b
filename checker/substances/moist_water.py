"""The water in moist air: vapour at its partial density, and what is saturated over liquid water or ice."""

from __future__ import annotations

import math
from dataclasses import dataclass
from functools import lru_cache
from typing import Final

from checker.substances.coolprop import HELMHOLTZ, Library, library_of
from checker.substances.properties import QUALITY, TEMPERATURE

ICE_POINT: Final = 273.15
"""[K] From here on the condensate is liquid; below it is ice or frost."""
_TRIPLE: Final = (273.16, 611.657)  # K, Pa
_ICE: Final = ((-21.2144006, 0.00333333333), (27.3203819, 1.20666667), (-6.10598130, 1.70333333))
_TOLERANCE: Final = 1e-12
_ROUNDS: Final = 60


@dataclass(frozen=True, slots=True)
class Saturated:
    """Water saturated at a temperature, alone. SI, per unit mass.

    pressure; vapour_volume; slope (∂p/∂ρ)_T/(R T) of the vapour; volume, energy and entropy of the liquid, None over
    ice.
    """

    pressure: float
    vapour_volume: float
    slope: float
    liquid_volume: float | None
    liquid_energy: float = 0.0
    liquid_entropy: float = 0.0


def water() -> Library:
    """Return this thread's library state of water (IAPWS-95)."""
    return library_of(HELMHOLTZ, "Water")


def sublimation_pressure(temperature: float) -> float:
    """Return the pressure of vapour over ice at a temperature [K], 50 to 273.16 K. [Pa]

    Source: IAPWS R14-08(2011), equation 6 (from memory; held against the release's check value in the tests).
    """
    theta = temperature / _TRIPLE[0]
    return _TRIPLE[1] * math.exp(math.fsum(a * theta**b for a, b in _ICE) / theta)


@lru_cache(maxsize=512)
def saturated(temperature: float) -> Saturated | None:
    """Return saturated water at a temperature [K], over ice below 0 °C; None above the critical temperature."""
    library = water()
    if temperature >= library.constants.critical[0]:
        return None
    if temperature < ICE_POINT:
        pressure = sublimation_pressure(temperature)
        return Saturated(pressure, vapour_volume(temperature, pressure), 1.0, None)
    liquid = library.point((TEMPERATURE, QUALITY), temperature, 0.0)
    vapour = library.point((TEMPERATURE, QUALITY), temperature, 1.0)
    return Saturated(
        vapour.pressure,
        vapour.specific_volume,
        _slope(library, temperature, vapour.specific_volume),
        liquid.specific_volume,
        liquid.specific_internal_energy,
        liquid.specific_entropy,
    )


def _slope(library: Library, temperature: float, volume: float) -> float:
    """Return (∂p/∂ρ)_T/(R T) of vapour, by a difference of one part in a thousand of the density."""
    step = 1e-3
    high = library.vapour(temperature, volume / (1.0 + step)).pressure
    low = library.vapour(temperature, volume * (1.0 + step)).pressure
    densities = (1.0 + step - 1.0 / (1.0 + step)) / volume
    return (high - low) / densities / (library.constants.gas_constant * temperature)


def vapour_volume(temperature: float, pressure: float) -> float:
    """Return the specific volume of water vapour [m³/kg] at a temperature [K] and a partial pressure [Pa].

    From v = R T/p onwards, v is corrected by p(v)/p, which settles fast at the densities of vapour in air.
    """
    library = water()
    volume = library.constants.gas_constant * temperature / pressure
    for _ in range(_ROUNDS):
        ratio = library.vapour(temperature, volume).pressure / pressure
        volume *= ratio
        if abs(ratio - 1.0) < _TOLERANCE:
            break
    return volume

"""The dry air in moist air, and how it acts on the water vapour: two ways to take them."""

from __future__ import annotations

import math
from collections.abc import Mapping
from dataclasses import dataclass
from functools import lru_cache
from typing import Final, NamedTuple, Protocol

from checker.substances.coolprop import HELMHOLTZ, library_of
from checker.substances.moist_water import Saturated
from checker.substances.properties import PRESSURE, TEMPERATURE

MOLAR_GAS_CONSTANT: Final = 8.314462618
_WATER_MOLAR_MASS: Final = 0.018015268
_DATUM: Final = (273.15, 101325.0)  # K, Pa: h = 0 and s = 0 of dry air, as in psychrometric tables
_CROSS: Final = ((66.5687e-6, -0.237), (-238.834e-6, -1.048), (-176.755e-6, -3.183))  # m³/mol, of T/100 K
_LARGEST_EXPONENT: Final = 5.0
"""Far beyond the range of the model, where a search may pass, vapour in air is no more than this dense."""


class AirPart(NamedTuple):
    """Dry air alone in its volume: p [Pa], u [J/kg], s [J/(kg·K)]."""

    pressure: float
    energy: float
    entropy: float


class Interaction(NamedTuple):
    """What air and vapour add to each other per unit volume: p [Pa], u [J/m³], s [J/(m³·K)]."""

    pressure: float
    energy: float
    entropy: float


class Gas(Protocol):
    """How dry air is described."""

    @property
    def gas_constant(self) -> float:
        """Specific gas constant of dry air [J/(kg·K)]."""

    def air(self, temperature: float, volume: float) -> AirPart:
        """Return dry air at a temperature [K] and specific volume [m³/kg]."""

    def air_volume(self, temperature: float, pressure: float) -> float:
        """Return the specific volume of dry air [m³/kg] alone at a temperature [K] and pressure [Pa]."""

    def interaction(self, temperature: float, air_density: float, vapour_density: float) -> Interaction:
        """Return what air and vapour of these densities [kg/m³] add to each other."""

    def enhancement(self, temperature: float, air_density: float, alone: Saturated) -> float:
        """Return the density of saturated vapour in air over that of saturated vapour alone. [1]"""


@dataclass(frozen=True)
class IdealAir:
    """Dry air as an ideal gas with cp(T); vapour as if it were alone (Dalton)."""

    @property
    def gas_constant(self) -> float:
        """Specific gas constant of dry air [J/(kg·K)]."""
        return library_of(HELMHOLTZ, "Air").constants.gas_constant

    def air(self, temperature: float, volume: float) -> AirPart:
        """Return dry air at a temperature [K] and specific volume [m³/kg]."""
        zero = _ideal_zero()
        part = _ideal_air(temperature, volume)
        return AirPart(part.pressure, part.energy - zero[0], part.entropy - zero[1])

    def air_volume(self, temperature: float, pressure: float) -> float:
        """Return the specific volume of dry air [m³/kg] alone at a temperature [K] and pressure [Pa]."""
        return self.gas_constant * temperature / pressure

    def interaction(self, temperature: float, air_density: float, vapour_density: float) -> Interaction:
        """Return nothing: each gas behaves as if it were alone."""
        del temperature, air_density, vapour_density
        return Interaction(0.0, 0.0, 0.0)

    def enhancement(self, temperature: float, air_density: float, alone: Saturated) -> float:
        """Return 1: saturated vapour in air is as dense as alone."""
        del temperature, air_density, alone
        return 1.0


@dataclass(frozen=True)
class RealAir:
    """Dry air by its equation of state, with the second cross virial coefficient of air and water vapour.

    A/V gains 2 R T c_a c_w B_aw(T); saturated vapour follows from equal chemical potentials, the liquid under the
    total pressure (Poynting). Source of B_aw: A. H. Harvey, P. H. Huang, Int. J. Thermophys. 28 (2007) 556 (from
    memory; held against a second implementation in the tests).
    """

    @property
    def gas_constant(self) -> float:
        """Specific gas constant of dry air [J/(kg·K)]."""
        return library_of(HELMHOLTZ, "Air").constants.gas_constant

    def air(self, temperature: float, volume: float) -> AirPart:
        """Return dry air at a temperature [K] and specific volume [m³/kg]."""
        found = library_of(HELMHOLTZ, "Air").vapour(temperature, volume)
        zero = _real_zero()
        return AirPart(
            found.pressure, found.specific_internal_energy - zero[0], found.specific_entropy - zero[1]
        )

    def air_volume(self, temperature: float, pressure: float) -> float:
        """Return the specific volume of dry air [m³/kg] alone at a temperature [K] and pressure [Pa]."""
        library = library_of(HELMHOLTZ, "Air")
        return library.point((TEMPERATURE, PRESSURE), temperature, pressure).specific_volume

    def interaction(self, temperature: float, air_density: float, vapour_density: float) -> Interaction:
        """Return what air and vapour of these densities [kg/m³] add to each other."""
        cross, slope = cross_virial(temperature)
        product = (
            2.0
            * MOLAR_GAS_CONSTANT
            * (air_density / library_of(HELMHOLTZ, "Air").constants.molar_mass)
            * (vapour_density / _WATER_MOLAR_MASS)
        )
        return Interaction(
            product * temperature * cross,
            -product * temperature * temperature * slope,
            -product * (cross + temperature * slope),
        )

    def enhancement(self, temperature: float, air_density: float, alone: Saturated) -> float:
        """Return the density of saturated vapour in air over that of saturated vapour alone. [1]"""
        cross, _ = cross_virial(temperature)
        attraction = 2.0 * cross * air_density / library_of(HELMHOLTZ, "Air").constants.molar_mass
        volume = _ICE_VOLUME if alone.liquid_volume is None else alone.liquid_volume
        gas_constant = MOLAR_GAS_CONSTANT / _WATER_MOLAR_MASS
        # The liquid is under the pressure of saturated vapour and air: what the air adds presses it.
        pressed = volume * self.air(temperature, 1.0 / air_density).pressure / (gas_constant * temperature)
        exponent = (pressed - attraction) / alone.slope
        return math.exp(max(-_LARGEST_EXPONENT, min(_LARGEST_EXPONENT, exponent)))


GASES: Final[Mapping[str, Gas]] = {"ideal gas": IdealAir(), "real fluid": RealAir()}
"""The two ways to take dry air, by the model word of the record format."""
_ICE_VOLUME: Final = 1.0909e-3  # m³/kg at 0 °C, IAPWS R10-06(2009) (from memory)


def cross_virial(temperature: float) -> tuple[float, float]:
    """Return B_aw [m³/mol] of air and water vapour at a temperature [K], and dB_aw/dT [m³/(mol·K)]."""
    reduced = temperature / 100.0
    terms = [(a * reduced**b, b) for a, b in _CROSS]
    return math.fsum(term for term, _ in terms), math.fsum(b * term for term, b in terms) / temperature


def _ideal_air(temperature: float, volume: float) -> AirPart:
    library = library_of(HELMHOLTZ, "Air")
    gas_constant = library.constants.gas_constant
    energy, entropy, _ = library.ideal_part(temperature)
    return AirPart(gas_constant * temperature / volume, energy, entropy + gas_constant * math.log(volume))


@lru_cache(maxsize=1)
def _ideal_zero() -> tuple[float, float]:
    """Return u [J/kg] and s [J/(kg·K)] of ideal air where h = s = 0, on the datum of its equation."""
    temperature, pressure = _DATUM
    product = library_of(HELMHOLTZ, "Air").constants.gas_constant * temperature
    found = _ideal_air(temperature, product / pressure)
    return found.energy + product, found.entropy


@lru_cache(maxsize=1)
def _real_zero() -> tuple[float, float]:
    """Return u [J/kg] and s [J/(kg·K)] of real air where h = s = 0, on the datum of its equation."""
    found = library_of(HELMHOLTZ, "Air").point((TEMPERATURE, PRESSURE), *_DATUM)
    return found.specific_enthalpy, found.specific_entropy

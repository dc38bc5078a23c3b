"""Substances with a constant specific heat: an ideal gas, and a liquid or solid that does not change its volume.

Datum of both: u = 0 at 273.15 K; s = 0 at 273.15 K (the gas: and 100 kPa).
"""

from __future__ import annotations

import math
from collections.abc import Mapping
from dataclasses import dataclass
from typing import ClassVar, Final

from checker.outcomes import NotEvaluable
from checker.substances.condensed import Condensed
from checker.substances.interface import Phase, PropertyState, ValidRange
from checker.substances.properties import (
    ENERGY,
    ENTHALPY,
    ENTROPY,
    PRESSURE,
    TEMPERATURE,
    VOLUME,
    Known,
    read_known,
)
from checker.substances.without_phases import WithoutPhases

DATUM_TEMPERATURE: Final = 273.15
DATUM_PRESSURE: Final = 1e5
_FUNCTIONS_OF_TEMPERATURE: Final = {TEMPERATURE, ENERGY, ENTHALPY}
_LARGEST_EXPONENT: Final = 200.0


def _exponential(exponent: float) -> float:
    if abs(exponent) > _LARGEST_EXPONENT:
        raise NotEvaluable("no temperature or volume has this entropy")
    return math.exp(exponent)


def _positive(temperature: float) -> float:
    if not temperature > 0.0:
        raise NotEvaluable(f"the temperature would be {temperature:.6g} K")
    return temperature


@dataclass(frozen=True)
class ConstantHeatGas(WithoutPhases):
    """An ideal gas with constant cv [J/(kg·K)] and specific gas constant R [J/(kg·K)].

    u = cv (T − 273.15 K), h = u + R T, s = cv ln(T/273.15 K) + R ln(v/v°) with v° = R · 273.15 K / 100 kPa.
    """

    name: str
    heat_capacity: float
    gas_constant: float
    molar_mass: float | None = None

    model: ClassVar[str] = "constant specific heat"
    critical_point: ClassVar[tuple[float, float, float] | None] = None
    valid_range: ClassVar[ValidRange | None] = None
    incompressible: ClassVar[bool] = False

    @property
    def equation(self) -> str:
        """The equation for the report."""
        return f"p v = R T, R = {self.gas_constant:.6g} J/(kg·K), c_v = {self.heat_capacity:.6g} J/(kg·K) constant"

    @property
    def heat_capacity_at_constant_pressure(self) -> float:
        """Cp = cv + R [J/(kg·K)]"""
        return self.heat_capacity + self.gas_constant

    def state(self, known: Mapping[str, float], phase: Phase | None = None) -> PropertyState:
        """Return the state with these two properties. Raises NotEvaluable where they depend on each other."""
        del phase
        self.refuse_quality(known)
        pair = read_known(known)
        if set(pair.pair) <= _FUNCTIONS_OF_TEMPERATURE:
            raise NotEvaluable(
                f"{' and '.join(pair.pair)} of an ideal gas are not independent".replace("_", " "),
                "ill-conditioned",
            )
        temperature = _positive(self._temperature(pair))
        return self._at(temperature, self._volume(pair, temperature))

    def states(self, known: Mapping[str, float]) -> tuple[PropertyState, ...]:
        """Return the one state with these two properties. Raises NotEvaluable."""
        return (self.state(known),)

    @property
    def _datum_volume(self) -> float:
        return self.gas_constant * DATUM_TEMPERATURE / DATUM_PRESSURE

    def _temperature(self, pair: Known) -> float:
        names = set(pair.pair)
        if TEMPERATURE in names:
            return pair.value(TEMPERATURE)
        if ENERGY in names:
            return DATUM_TEMPERATURE + pair.value(ENERGY) / self.heat_capacity
        if ENTHALPY in names:
            zero = self.heat_capacity * DATUM_TEMPERATURE
            return (pair.value(ENTHALPY) + zero) / self.heat_capacity_at_constant_pressure
        if ENTROPY not in names:
            return pair.first * pair.second / self.gas_constant
        return DATUM_TEMPERATURE * _exponential(self._log_ratio(pair))

    def _log_ratio(self, pair: Known) -> float:
        """Return ln(T/273.15 K) at an entropy and a volume or pressure."""
        entropy = pair.value(ENTROPY)
        if VOLUME in pair.pair:
            along = self.gas_constant * math.log(pair.value(VOLUME) / self._datum_volume)
            return (entropy - along) / self.heat_capacity
        along = self.gas_constant * math.log(pair.value(PRESSURE) / DATUM_PRESSURE)
        return (entropy + along) / self.heat_capacity_at_constant_pressure

    def _volume(self, pair: Known, temperature: float) -> float:
        if VOLUME in pair.pair:
            return pair.value(VOLUME)
        if PRESSURE in pair.pair:
            return self.gas_constant * temperature / pair.value(PRESSURE)
        heated = self.heat_capacity * math.log(temperature / DATUM_TEMPERATURE)
        return self._datum_volume * _exponential((pair.value(ENTROPY) - heated) / self.gas_constant)

    def _at(self, temperature: float, volume: float) -> PropertyState:
        product = self.gas_constant * temperature
        energy = self.heat_capacity * (temperature - DATUM_TEMPERATURE)
        entropy = self.heat_capacity * math.log(temperature / DATUM_TEMPERATURE)
        entropy += self.gas_constant * math.log(volume / self._datum_volume)
        return PropertyState(temperature, product / volume, volume, energy, energy + product, entropy)


@dataclass(frozen=True)
class ConstantHeatCondensed(Condensed):
    """A liquid or solid with constant specific heat c [J/(kg·K)] and constant specific volume [m³/kg], if stated.

    u = c (T − 273.15 K), s = c ln(T/273.15 K), h = u + p v where p and v are known. Temperature alone fixes u
    and s; pressure matters to h only and cannot be found.
    """

    name: str
    heat_capacity: float
    specific_volume: float | None = None
    molar_mass: float | None = None

    model: ClassVar[str] = "constant specific heat"

    @property
    def valid_range(self) -> ValidRange | None:
        """None: a stated constant has no range of its own."""
        return None

    @property
    def equation(self) -> str:
        """The equation for the report."""
        volume = "" if self.specific_volume is None else f", v = {self.specific_volume:.6g} m³/kg"
        return f"c = {self.heat_capacity:.6g} J/(kg·K) constant{volume}"

    def _energy(self, temperature: float) -> float:
        return self.heat_capacity * (temperature - DATUM_TEMPERATURE)

    def _entropy(self, temperature: float) -> float:
        return self.heat_capacity * math.log(temperature / DATUM_TEMPERATURE)

    def _volume(self, temperature: float) -> float | None:
        del temperature
        return self.specific_volume

    def _of_energy(self, energy: float) -> float:
        return DATUM_TEMPERATURE + energy / self.heat_capacity

    def _of_entropy(self, entropy: float) -> float:
        return DATUM_TEMPERATURE * _exponential(entropy / self.heat_capacity)

    def _of_enthalpy(self, enthalpy: float, pressure: float | None) -> float:
        return self._of_energy(self._enthalpy_less_flow(enthalpy, pressure, self.specific_volume))

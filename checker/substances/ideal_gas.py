"""An ideal gas with temperature-dependent heat capacity: p v = R T, and u and s° from the fluid's own equation.

u(T) and the temperature part of s come from the ideal part of the fluid's Helmholtz equation of state and R is that
equation's own, so the model is the real fluid at vanishing density, on the same datum. It has no phases.
"""

from __future__ import annotations

import math
from collections.abc import Callable, Mapping
from dataclasses import dataclass
from typing import ClassVar, Final

from checker.outcomes import NotEvaluable
from checker.substances.coolprop import HELMHOLTZ, Constants, library_of
from checker.substances.interface import Phase, PropertyState, ValidRange
from checker.substances.names import Fluid
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
from checker.substances.search import bracketed_root
from checker.substances.without_phases import WithoutPhases

COLDEST: Final = 200.0
"""[K] The ideal part is no equilibrium property and does not end at the triple point: water vapour in cold air."""
_FUNCTIONS_OF_TEMPERATURE: Final = {TEMPERATURE, ENERGY, ENTHALPY}
_ROUNDING: Final = 1e-9


@dataclass(frozen=True)
class IdealGas(WithoutPhases):
    """A fluid of the table as an ideal gas, between the lower of triple point and 200 K and the equation's end."""

    fluid: Fluid

    model: ClassVar[str] = "ideal gas"
    incompressible: ClassVar[bool] = False

    @property
    def name(self) -> str:
        """Name for the report."""
        return self.fluid.name

    @property
    def equation(self) -> str:
        """The equation with its source."""
        return f"p v = R T with u(T) and s°(T) of the ideal part of {self.fluid.equation}"

    @property
    def gas_constant(self) -> float:
        """Specific gas constant of the fluid's equation [J/(kg·K)]."""
        return self._constants.gas_constant

    @property
    def molar_mass(self) -> float:
        """[kg/mol]"""
        return self.fluid.molar_mass

    @property
    def critical_point(self) -> tuple[float, float, float]:
        """Critical (T [K], p [Pa], v [m³/kg]) of the real fluid, for checks of adequacy."""
        return self._constants.critical

    @property
    def valid_range(self) -> ValidRange:
        """Range of the ideal part; any pressure."""
        limits = self._constants.limits
        return ValidRange(min(limits.temperature_min, COLDEST), limits.temperature_max, math.inf)

    @property
    def _constants(self) -> Constants:
        return library_of(HELMHOLTZ, self.fluid.library).constants

    def state(self, known: Mapping[str, float], phase: Phase | None = None) -> PropertyState:
        """Return the state with these two properties; a stated phase is of no use here.

        Raises
        ------
        NotEvaluable
            The two depend on each other (T, u, h), include a quality, or lie outside the range.
        """
        del phase
        self.refuse_quality(known)
        pair = read_known(known)
        if set(pair.pair) <= _FUNCTIONS_OF_TEMPERATURE:
            raise NotEvaluable(
                f"{pair.pair[0]} and {pair.pair[1]} of an ideal gas are not independent: both follow from "
                "temperature alone".replace("_", " "),
                "ill-conditioned",
            )
        temperature = self._temperature(pair)
        self._refuse_outside(temperature)
        return self._at(temperature, self._volume(pair, temperature))

    def states(self, known: Mapping[str, float]) -> tuple[PropertyState, ...]:
        """Return the one state with these two properties. Raises NotEvaluable."""
        return (self.state(known),)

    def _ideal(self, temperature: float) -> tuple[float, float, float]:
        return library_of(HELMHOLTZ, self.fluid.library).ideal_part(temperature)

    def _at(self, temperature: float, volume: float) -> PropertyState:
        energy, entropy, _ = self._ideal(temperature)
        gas_constant = self.gas_constant
        product = gas_constant * temperature
        return PropertyState(
            temperature,
            product / volume,
            volume,
            energy,
            energy + product,
            entropy + gas_constant * math.log(volume),
        )

    def _temperature(self, pair: Known) -> float:
        names = set(pair.pair)
        if TEMPERATURE in names:
            return pair.value(TEMPERATURE)
        if names == {PRESSURE, VOLUME}:
            return pair.first * pair.second / self.gas_constant
        if ENERGY in names:
            return self._inverse(lambda t: self._ideal(t)[0], pair.value(ENERGY), ENERGY)
        if ENTHALPY in names:
            return self._inverse(
                lambda t: self._ideal(t)[0] + self.gas_constant * t, pair.value(ENTHALPY), ENTHALPY
            )
        return self._inverse(self._entropy_along(pair), pair.value(ENTROPY), ENTROPY)

    def _entropy_along(self, pair: Known) -> Callable[[float], float]:
        """Return s(T) [J/(kg·K)] at the known volume or pressure; it rises with T."""
        gas_constant = self.gas_constant
        if VOLUME in pair.pair:
            constant = gas_constant * math.log(pair.value(VOLUME))
            return lambda t: self._ideal(t)[1] + constant
        pressure = pair.value(PRESSURE)
        return lambda t: self._ideal(t)[1] + gas_constant * math.log(gas_constant * t / pressure)

    def _volume(self, pair: Known, temperature: float) -> float:
        if VOLUME in pair.pair:
            return pair.value(VOLUME)
        if PRESSURE in pair.pair:
            return self.gas_constant * temperature / pair.value(PRESSURE)
        exponent = (pair.value(ENTROPY) - self._ideal(temperature)[1]) / self.gas_constant
        if abs(exponent) > 200.0:
            raise NotEvaluable(f"no volume of {self.name} has this entropy at {temperature:.6g} K")
        return math.exp(exponent)

    def _inverse(self, function: Callable[[float], float], value: float, name: str) -> float:
        """Return the temperature [K] at which a property that rises with it takes a value."""
        span = self.valid_range
        scale = max(abs(value), self.gas_constant * (1.0 if name == ENTROPY else span.temperature_min))

        def residual(temperature: float) -> float:
            return (function(temperature) - value) / scale

        low, high = (
            (t, residual(t)) for t in (span.temperature_min, span.temperature_max * (1.0 + _ROUNDING))
        )
        if low[1] > 0.0 or high[1] < 0.0:
            raise NotEvaluable(
                f"{self.name} as an ideal gas has this {name.replace('_', ' ')} nowhere between "
                f"{low[0]:.6g} K and {high[0]:.6g} K",
                "outside-range",
            )
        return low[0] if low[1] == 0.0 else bracketed_root(residual, low, high)

    def _refuse_outside(self, temperature: float) -> None:
        span = self.valid_range
        low, high = span.temperature_min * (1.0 - _ROUNDING), span.temperature_max * (1.0 + _ROUNDING)
        if not low <= temperature <= high:
            raise NotEvaluable(
                f"{temperature:.6g} K is outside {span.temperature_min:.6g} to {span.temperature_max:.6g} K, where "
                f"the ideal gas part of {self.name} holds",
                "outside-range",
            )

"""The law p v = R T with u and s° that depend on temperature alone: what every ideal gas model answers from them.

A model gives u(T) and s(T) at a specific volume of 1 m³/kg; everything else follows. It has no phases.
"""

from __future__ import annotations

import math
from collections.abc import Callable, Mapping
from typing import ClassVar, Final

from checker.outcomes import NotEvaluable
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
from checker.substances.search import bracketed_root
from checker.substances.without_phases import WithoutPhases

_FUNCTIONS_OF_TEMPERATURE: Final = {TEMPERATURE, ENERGY, ENTHALPY}
_ROUNDING: Final = 1e-9


class IdealLaw(WithoutPhases):
    """The states of a gas that obeys p v = R T."""

    model: ClassVar[str] = "ideal gas"
    incompressible: ClassVar[bool] = False

    @property
    def name(self) -> str:
        """Name for the report."""
        raise NotImplementedError

    @property
    def gas_constant(self) -> float:
        """Specific gas constant [J/(kg·K)]."""
        raise NotImplementedError

    @property
    def valid_range(self) -> ValidRange:
        """Range of temperature; any pressure."""
        raise NotImplementedError

    def _ideal(self, temperature: float) -> tuple[float, float, float]:
        """Return u [J/kg], s [J/(kg·K)] at v = 1 m³/kg and cv [J/(kg·K)] at a temperature [K]."""
        raise NotImplementedError

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

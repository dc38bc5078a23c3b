"""What liquids and solids of incompressible models have in common: temperature alone fixes u and s."""

from __future__ import annotations

from collections.abc import Mapping
from typing import ClassVar

from checker.outcomes import NotEvaluable
from checker.substances.interface import Phase, PropertyState
from checker.substances.properties import (
    ENERGY,
    ENTHALPY,
    ENTROPY,
    MELTED,
    PRESSURE,
    TEMPERATURE,
    VOLUME,
    checked_value,
)
from checker.substances.without_phases import WithoutPhases


class Condensed(WithoutPhases):
    """A liquid or solid; pressure matters to h only, h = u + p v where p and v are known, and cannot be found."""

    name: str

    incompressible: ClassVar[bool] = True
    gas_constant: ClassVar[float | None] = None
    critical_point: ClassVar[tuple[float, float, float] | None] = None

    def _energy(self, temperature: float) -> float:
        """Return u [J/kg] at a temperature [K]."""
        raise NotImplementedError

    def _entropy(self, temperature: float) -> float:
        """Return s [J/(kg·K)] at a temperature [K]."""
        raise NotImplementedError

    def _volume(self, temperature: float) -> float | None:
        """Return v [m³/kg] at a temperature [K], or None where it is not known."""
        raise NotImplementedError

    def _of_energy(self, energy: float) -> float:
        """Return the temperature [K] of an internal energy [J/kg]."""
        raise NotImplementedError

    def _of_entropy(self, entropy: float) -> float:
        """Return the temperature [K] of an entropy [J/(kg·K)]."""
        raise NotImplementedError

    def _of_enthalpy(self, enthalpy: float, pressure: float | None) -> float:
        """Return the temperature [K] of an enthalpy [J/kg] at a pressure [Pa]."""
        raise NotImplementedError

    def state(self, known: Mapping[str, float], phase: Phase | None = None) -> PropertyState:
        """Return the state with T, u, s, or h and p; with a pressure beside any of them.

        Raises
        ------
        NotEvaluable
            The properties do not fix a temperature, or would have to fix a pressure.
        """
        del phase
        self.refuse_quality(known)
        values = {name: checked_value(name, value) for name, value in known.items()}
        pressure = values.pop(PRESSURE, None)
        name, value = self._only(values)
        temperature = self._temperature(name, value, pressure)
        if not temperature > 0.0:
            raise NotEvaluable(f"the temperature would be {temperature:.6g} K")
        return self._at(temperature, pressure)

    def states(self, known: Mapping[str, float]) -> tuple[PropertyState, ...]:
        """Return the one state with these properties. Raises NotEvaluable."""
        return (self.state(known),)

    def _only(self, values: Mapping[str, float]) -> tuple[str, float]:
        """Return the only property beside the pressure. Raises NotEvaluable."""
        if VOLUME in values:
            raise NotEvaluable(
                f"{self.name} is modelled as incompressible: its specific volume fixes neither pressure nor "
                "temperature; a temperature alone fixes its energy and entropy",
                "not-supported",
            )
        if MELTED in values:
            raise NotEvaluable(f"{self.name} does not melt in this model", "not-supported")
        if not values:
            raise NotEvaluable(f"{self.name}: no temperature", "missing")
        if len(values) > 1:
            raise NotEvaluable(
                f"one property beside the pressure fixes a state of {self.name}, not {len(values)}", "missing"
            )
        ((name, value),) = values.items()
        return name, value

    def _temperature(self, name: str, value: float, pressure: float | None) -> float:
        if name == TEMPERATURE:
            return value
        if name == ENERGY:
            return self._of_energy(value)
        if name == ENTROPY:
            return self._of_entropy(value)
        assert name == ENTHALPY, "every other property was refused before"
        return self._of_enthalpy(value, pressure)

    def _enthalpy_less_flow(self, enthalpy: float, pressure: float | None, volume: float | None) -> float:
        """Return u = h − p·v [J/kg]. Raises NotEvaluable without a pressure or a volume."""
        if pressure is None or volume is None:
            raise NotEvaluable(f"the enthalpy of {self.name} needs a pressure and a density", "missing")
        return enthalpy - pressure * volume

    def _at(self, temperature: float, pressure: float | None) -> PropertyState:
        energy, volume = self._energy(temperature), self._volume(temperature)
        enthalpy = None if pressure is None or volume is None else energy + pressure * volume
        return PropertyState(temperature, pressure, volume, energy, enthalpy, self._entropy(temperature))

"""An ideal gas with temperature-dependent heat capacity: p v = R T, and u and s° from the fluid's own equation.

u(T) and the temperature part of s come from the ideal part of the fluid's Helmholtz equation of state and R is that
equation's own, so the model is the real fluid at vanishing density, on the same datum. It has no phases.
"""

from __future__ import annotations

import math
from dataclasses import dataclass
from typing import Final

from checker.substances.coolprop import HELMHOLTZ, Constants, library_of
from checker.substances.ideal_law import IdealLaw
from checker.substances.interface import ValidRange
from checker.substances.names import Fluid

COLDEST: Final = 200.0
"""[K] The ideal part is no equilibrium property and does not end at the triple point: water vapour in cold air."""


@dataclass(frozen=True)
class IdealGas(IdealLaw):
    """A fluid of the table as an ideal gas, between the lower of triple point and 200 K and the equation's end."""

    fluid: Fluid

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

    def _ideal(self, temperature: float) -> tuple[float, float, float]:
        return library_of(HELMHOLTZ, self.fluid.library).ideal_part(temperature)

"""A real gas mixture by a multi-fluid Helmholtz model, where no condensate is near."""

from __future__ import annotations

import math
from dataclasses import dataclass
from functools import cached_property
from typing import ClassVar, Final

from checker.outcomes import NotEvaluable
from checker.substances.composition import Composition
from checker.substances.coolprop import HELMHOLTZ, Constants, library_of
from checker.substances.explicit import Explicit
from checker.substances.interface import ModelUncertainty, PropertyState, ValidRange
from checker.substances.library_mixture import GasPoint, component_constants, mixture_library

DEW_MARGIN: Final = 0.9
"""Highest pressure as a share of the lowest dew pressure that is taken. Raoult's law gives that dew pressure; real
gases carry more (the enhancement factor is above 1), so it errs to the safe side except for liquids that attract each
other."""
HIGHEST_PRESSURE: Final = 30e6
"""[Pa] GERG-2008 holds up to 35 MPa in its normal range."""
_HOTTEST: Final = 700.0
"""[K] End of the extended range of GERG-2008; a mixture model says little where nothing was measured."""
_ABOVE_CRITICAL: Final = 1.02
_FAR_BEYOND: Final = 2.0
"""Searches may pass pressures above the range, but not where the equation means nothing."""
_LIQUID_LIKE: Final = 0.25
"""Z below which a state under the dew pressure is on the liquid's side: gas there has more than at its critical point
(about 0.3), liquid less."""
_UNCERTAINTY: Final = ModelUncertainty(
    0.002,
    0.015,
    "Kunz, Wagner, J. Chem. Eng. Data 57, 2012, 3032: 0.1 % in the density and 0.5 to 1 % in the speed of sound and "
    "enthalpy differences of natural gases, less well known mixtures up to 1 % (from memory)",
)


@dataclass(frozen=True)
class RealMixture(Explicit):
    """A gas mixture by the Helmholtz equations of its components and published binary parameters."""

    substance: str
    composition: Composition

    model: ClassVar[str] = "real fluid"
    uncertainty: ClassVar[ModelUncertainty] = _UNCERTAINTY

    def __post_init__(self) -> None:
        mixture_library(self.composition)

    @property
    def name(self) -> str:
        """Name for the report."""
        return self.substance

    @property
    def equation(self) -> str:
        """The mixture model with its sources, and the composition by amount."""
        sources = "; ".join(mixture_library(self.composition).sources) or "one component"
        return f"multi-fluid Helmholtz model as a gas, binary parameters: {sources}; {self.composition}"

    @property
    def gas_constant(self) -> float:
        """Specific gas constant [J/(kg·K)]."""
        return mixture_library(self.composition).gas_constant

    @property
    def molar_mass(self) -> float:
        """[kg/mol]"""
        return mixture_library(self.composition).molar_mass

    @property
    def critical_point(self) -> None:
        """None: the critical point of a mixture is not calculated."""
        return

    @cached_property
    def valid_range(self) -> ValidRange:
        """Where the equations of all components hold, and the mixture model."""
        limits = [constants.limits for constants in self._constants]
        low, high = max(one.temperature_min for one in limits), min(one.temperature_max for one in limits)
        return ValidRange(low, min(high, _HOTTEST), HIGHEST_PRESSURE)

    @cached_property
    def _constants(self) -> tuple[Constants, ...]:
        return component_constants(self.composition)

    def dew_pressure(self, temperature: float) -> float:
        """Return the lowest pressure at which anything may condense at a temperature, by Raoult's law. [Pa]

        1/p = Σ y/p_s(T) over the components below their critical temperature, those just above it counted with their
        critical pressure; infinite where no component is.
        """
        load = 0.0
        for one, constants in zip(self.composition.components, self._constants, strict=True):
            critical, highest, _ = constants.critical
            if temperature >= _ABOVE_CRITICAL * critical:
                continue
            saturation: float | None = highest
            if temperature < critical:
                saturation = library_of(HELMHOLTZ, one.fluid.library).saturation_pressure(temperature, 1.0)
            load += math.inf if not saturation else one.mole_fraction / saturation
        return math.inf if load == 0.0 else 1.0 / load

    def at(self, temperature: float, volume: float) -> PropertyState:
        """Return the gas at a temperature [K] and specific volume [m³/kg].

        Raises
        ------
        NotEvaluable
            A two-phase region is near, or the state is outside the range.
        """
        self.refuse_volume(volume)
        found = mixture_library(self.composition).gas(temperature, volume)
        if found.pressure > _FAR_BEYOND * HIGHEST_PRESSURE:
            raise NotEvaluable(
                f"{found.pressure:.6g} Pa is above {HIGHEST_PRESSURE:.6g} Pa, where the mixture model ends",
                "outside-range",
            )
        self._refuse_condensing(temperature, volume, found)
        product = found.pressure * volume
        return PropertyState(
            temperature, found.pressure, volume, found.energy, found.energy + product, found.entropy
        )

    def _refuse_condensing(self, temperature: float, volume: float, found: GasPoint) -> None:
        """Refuse what is no stable gas, and what may condense. Raises NotEvaluable."""
        if found.pressure <= 0.0 or found.slope <= 0.0:
            raise self._near(temperature, "it has no stable gas of this density")
        dew = self.dew_pressure(temperature)
        if found.pressure > DEW_MARGIN * dew:
            raise self._near(temperature, f"its dew pressure may be as low as {dew:.4g} Pa")
        factor = found.pressure * volume / (self.gas_constant * temperature)
        if math.isfinite(dew) and factor < _LIQUID_LIKE:
            raise self._near(temperature, "this density is that of a liquid")

    def _near(self, temperature: float, why: str) -> NotEvaluable:
        return NotEvaluable(
            f"{self.name} as a real mixture is calculated as a gas only, and a two-phase region is near: {why} at "
            f"{temperature:.6g} K",
            "outside-range",
        )

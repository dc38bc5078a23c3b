"""What the alternate calculation asks of a substance. SI, absolute, per unit mass."""

from __future__ import annotations

from dataclasses import dataclass
from enum import StrEnum
from typing import Protocol


class Phase(StrEnum):
    """The phase words of the record format."""

    SUBCOOLED_LIQUID = "subcooled liquid"
    SATURATED_LIQUID = "saturated liquid"
    WET_VAPOUR = "wet vapour"
    SATURATED_VAPOUR = "saturated vapour"
    SUPERHEATED_VAPOUR = "superheated vapour"
    SUPERCRITICAL = "supercritical"
    SOLID = "solid"


@dataclass(frozen=True, slots=True)
class PropertyState:
    """An equilibrium state of a unit mass.

    temperature [K], pressure [Pa] (None for an incompressible model to which no pressure was given),
    specific_volume [m³/kg] (None where the model states no density), specific_internal_energy [J/kg],
    specific_enthalpy [J/kg] (None without p or v), specific_entropy [J/(kg·K)], quality [1] inside the dome
    and on its edge (None elsewhere), phase (None where the model has no phases), melted_fraction [1] of a body
    that melts, relative_humidity [1] and humidity_ratio [kg of vapour per kg of dry air] of moist air.
    """

    temperature: float
    pressure: float | None
    specific_volume: float | None
    specific_internal_energy: float
    specific_enthalpy: float | None
    specific_entropy: float
    quality: float | None = None
    phase: Phase | None = None
    melted_fraction: float | None = None
    relative_humidity: float | None = None
    humidity_ratio: float | None = None


@dataclass(frozen=True, slots=True)
class ValidRange:
    """Where a model may be used: temperatures [K] and pressures [Pa]."""

    temperature_min: float
    temperature_max: float
    pressure_max: float


@dataclass(frozen=True, slots=True)
class ModelUncertainty:
    """Published expanded uncertainty (k = 2), relative, of density and of energy and entropy differences."""

    density: float
    caloric: float
    source: str


class Substance(Protocol):
    """A substance with a model. Implementations are immutable to their users and never share library states."""

    @property
    def name(self) -> str:
        """Name for the report."""

    @property
    def model(self) -> str:
        """The model word of the record format, such as ``real fluid``."""

    @property
    def equation(self) -> str:
        """The equation of state or data with its source, for the report."""

    @property
    def gas_constant(self) -> float | None:
        """Specific gas constant [J/(kg·K)], where the model has one."""

    @property
    def molar_mass(self) -> float | None:
        """[kg/mol], where known."""

    @property
    def critical_point(self) -> tuple[float, float, float] | None:
        """Critical (T [K], p [Pa], v [m³/kg]), where the model has one."""

    @property
    def valid_range(self) -> ValidRange | None:
        """Range of the model."""

    @property
    def uncertainty(self) -> ModelUncertainty:
        """Published uncertainty of the model."""

    @property
    def incompressible(self) -> bool:
        """Whether temperature alone fixes u and s."""

    def state(self, known: dict[str, float], phase: Phase | None = None) -> PropertyState:
        """Return the one state with these two properties (one, for an incompressible model).

        ``known`` maps exactly two of temperature, pressure, specific_volume, specific_internal_energy,
        specific_enthalpy, specific_entropy, quality to SI values. Raises NotEvaluable: no solution, several
        roots (all listed) unless ``phase`` chooses one, outside the range, near saturation.
        """

    def states(self, known: dict[str, float]) -> tuple[PropertyState, ...]:
        """Return every state with these two properties, ordered by specific volume."""

    def saturation(self, known: dict[str, float]) -> tuple[PropertyState, PropertyState]:
        """Return (saturated liquid, saturated vapour) at a temperature or a pressure. Raises NotEvaluable."""

    def crosses_saturation(
        self, temperature: float, half_temperature: float, pressure: float, half_pressure: float
    ) -> bool:
        """Return whether T ± half a digit [K] and p ± half a digit [Pa] reach both sides of the saturation line.

        False where the model has no phases.
        """

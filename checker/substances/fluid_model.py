"""A fluid with phases, by one formulation: the common half of the real-fluid models."""

from __future__ import annotations

from collections.abc import Mapping
from dataclasses import dataclass
from typing import ClassVar, Final

from checker.outcomes import NotEvaluable
from checker.substances.interface import ModelUncertainty, Phase, PropertyState, ValidRange
from checker.substances.names import Fluid
from checker.substances.phases import LIQUID_SIDE, VAPOUR_SIDE, choose, state_of
from checker.substances.properties import (
    PRESSURE,
    TEMPERATURE,
    Known,
    Point,
    checked_value,
    read_known,
)
from checker.substances.solver import solve
from checker.substances.surface import Surface

UNRESOLVABLE: Final = 2e-6
"""Relative distance of p from the saturation pressure at T within which no library tells liquid from vapour."""
NEAR_SATURATION: Final = 0.02
"""Relative distance of p from the saturation pressure at T within which a stated phase decides (0.6 K for water at
100 °C): wider than the digits that engineers state, narrower than a mistake."""
_SATURATED: Final = (Phase.SATURATED_LIQUID, Phase.SATURATED_VAPOUR)
_CLOSE: Final = 0.02  # of the critical temperature
_DENSITIES: Final = (0.5, 1.5)  # of the critical density
_STEEP: Final = 50.0
_PROBE: Final = 1e-4


@dataclass(frozen=True)
class FluidModel:
    """A fluid of the table; immutable, and free to cross threads: library states belong to the thread that asks."""

    fluid: Fluid

    model: ClassVar[str] = "real fluid"
    incompressible: ClassVar[bool] = False

    def _surface(self) -> Surface:
        raise NotImplementedError

    @property
    def name(self) -> str:
        """Name for the report."""
        return self.fluid.name

    @property
    def equation(self) -> str:
        """The equation of state with its source."""
        return self.fluid.equation

    @property
    def gas_constant(self) -> float:
        """Specific gas constant of the equation [J/(kg·K)]."""
        return self._surface().constants.gas_constant

    @property
    def molar_mass(self) -> float:
        """[kg/mol]"""
        return self.fluid.molar_mass

    @property
    def critical_point(self) -> tuple[float, float, float]:
        """Critical (T [K], p [Pa], v [m³/kg])."""
        return self._surface().constants.critical

    @property
    def valid_range(self) -> ValidRange:
        """Range of the equation."""
        limits = self._surface().constants.limits
        return ValidRange(limits.temperature_min, limits.temperature_max, limits.pressure_max)

    @property
    def uncertainty(self) -> ModelUncertainty:
        """Published uncertainty of the equation."""
        raise NotImplementedError

    def state(self, known: Mapping[str, float], phase: Phase | None = None) -> PropertyState:
        """Return the one state with these two properties.

        A stated phase chooses between several states, and the side of a saturation line that temperature and
        pressure cannot resolve; where it contradicts the only state there is, that state is returned all the same.

        Raises
        ------
        NotEvaluable
            No solution, several roots, outside the range, near saturation, ill-conditioned.
        """
        pair = read_known(known)
        if pair.pair == (TEMPERATURE, PRESSURE):
            return self._of_temperature_and_pressure(pair, phase)
        return choose(self._states(pair), phase, f"{self.name}: {pair}")

    def states(self, known: Mapping[str, float]) -> tuple[PropertyState, ...]:
        """Return every state with these two properties, ordered by specific volume. Raises NotEvaluable."""
        pair = read_known(known)
        if pair.pair == (TEMPERATURE, PRESSURE):
            return (self._of_temperature_and_pressure(pair, None),)
        return self._states(pair)

    def _states(self, pair: Known) -> tuple[PropertyState, ...]:
        surface = self._surface()
        return tuple(state_of(point, surface.constants.critical) for point in solve(surface, pair))

    def _of_temperature_and_pressure(self, pair: Known, phase: Phase | None) -> PropertyState:
        surface = self._surface()
        point = self._on_the_line(surface, pair, phase)
        if point is None:
            (point,) = solve(surface, pair)
            self._refuse_steep(surface, point)
        return state_of(point, surface.constants.critical)

    def _on_the_line(self, surface: Surface, pair: Known, phase: Phase | None) -> Point | None:
        """Return the saturated state that T and p mean, None where they mean a state of one phase."""
        line = surface.saturation_pressures(pair.first)
        if line is None:
            return None
        dew, bubble = line
        distance = max(pair.second / bubble - 1.0, 1.0 - pair.second / dew)
        side = LIQUID_SIDE if pair.second > bubble else VAPOUR_SIDE
        decided = distance <= NEAR_SATURATION and phase is not None
        if distance > UNRESOLVABLE and not (decided and (phase in _SATURATED or phase not in side)):
            return None
        if phase in LIQUID_SIDE or phase in VAPOUR_SIDE:
            return surface.saturated(TEMPERATURE, pair.first)[0 if phase in LIQUID_SIDE else 1]
        raise NotEvaluable(
            f"{self.name}: {pair} lie on the saturation line ({dew:.6g} Pa), which they do not resolve: "
            "quality, specific volume or the phase must be known",
            "near-saturation",
        )

    def _refuse_steep(self, surface: Surface, point: Point) -> None:
        """Refuse a state beside the critical point whose density T and p do not fix."""
        temperature, _, volume = surface.constants.critical
        low, high = _DENSITIES
        if (
            abs(point.temperature / temperature - 1.0) >= _CLOSE
            or not low < volume / point.specific_volume < high
        ):
            return
        beside = Known((TEMPERATURE, PRESSURE), point.temperature, point.pressure * (1.0 + _PROBE))
        try:
            (moved,) = solve(surface, beside)
            steep = abs(moved.specific_volume / point.specific_volume - 1.0) > _STEEP * _PROBE
        except NotEvaluable:
            steep = True
        if steep:
            raise NotEvaluable(
                f"{self.name} is so close to its critical point that temperature and pressure do not fix its "
                f"density: {_PROBE:.0e} of the pressure moves it by more than {_STEEP * _PROBE:.1%}",
                "ill-conditioned",
            )

    def saturation(self, known: Mapping[str, float]) -> tuple[PropertyState, PropertyState]:
        """Return (saturated liquid, saturated vapour) at a temperature or a pressure. Raises NotEvaluable."""
        surface = self._surface()
        if len(known) != 1 or not set(known) <= {TEMPERATURE, PRESSURE}:
            raise NotEvaluable("saturation is asked for at one temperature or one pressure", "missing")
        ((name, value),) = known.items()
        liquid, vapour = surface.saturated(name, checked_value(name, value))
        critical = surface.constants.critical
        return state_of(liquid, critical), state_of(vapour, critical)

    def crosses_saturation(
        self, temperature: float, half_temperature: float, pressure: float, half_pressure: float
    ) -> bool:
        """Return whether T ± half a digit [K] and p ± half a digit [Pa] reach both sides of the saturation line."""
        surface = self._surface()
        _, pressure_c, _ = surface.constants.critical
        cold = max(temperature - abs(half_temperature), surface.constants.limits.lowest(0.0))
        hot = temperature + abs(half_temperature)
        lowest, highest = surface.saturation_pressures(cold), surface.saturation_pressures(hot)
        if lowest is None or hot < cold:
            return False
        top = pressure_c if highest is None else highest[1]
        return lowest[0] <= pressure + abs(half_pressure) and top >= pressure - abs(half_pressure)

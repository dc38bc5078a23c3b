"""Where an equation of state may be used. The property library answers far outside; we do not."""

from __future__ import annotations

from collections.abc import Callable
from dataclasses import dataclass
from typing import Final

from checker.outcomes import NotEvaluable
from checker.substances.properties import Point

COLD_TOLERANCE: Final = 0.02
"""[K] below the triple point or the melting line that is still taken: water at 0 °C stands in every steam table,
though ice melts at 0.01 °C (0.0025 °C at 1 atm)."""
_ROUNDING: Final = 1e-7
_SLACK: Final = 1e-6  # K
_STEPS: Final = 80
_BISECTIONS: Final = 50


@dataclass(frozen=True, slots=True)
class Limits:
    """Limits of an equation of state.

    Attributes
    ----------
    temperature_min, temperature_max : float
        [K]; below ``temperature_min`` only where the melting line falls with pressure.
    pressure_max : float
        [Pa]
    pressure_min : float
        [Pa]; 0 except for formulations that end at the triple point's pressure.
    triple_pressure : float
        [Pa]
    melting : callable or None
        Melting temperature [K] at a pressure [Pa], None where the curve does not reach that pressure.
    ice_floats : bool
        The melting line falls with pressure (water, heavy water).
    hot : tuple of float or None
        (temperature [K], pressure [Pa]): up to that temperature below that pressure only.
    cold_tolerance : float
        [K] by which a temperature may lie below.
    """

    temperature_min: float
    temperature_max: float
    pressure_max: float
    triple_pressure: float
    pressure_min: float = 0.0
    melting: Callable[[float], float | None] | None = None
    ice_floats: bool = False
    hot: tuple[float, float] | None = None
    cold_tolerance: float = COLD_TOLERANCE

    def floor(self, pressure: float) -> float:
        """Return the lowest temperature [K] at a pressure: the melting line or the end of the equation."""
        if self.melting is None or pressure <= self.triple_pressure:
            return self.temperature_min
        melts = self.melting(pressure)
        if melts is None:
            return self.temperature_min
        return melts if self.ice_floats else max(melts, self.temperature_min)

    def lowest(self, pressure: float) -> float:
        """Return the lowest temperature [K] that is taken at a pressure."""
        return self.floor(pressure) - self.cold_tolerance

    def ceiling(self, pressure: float) -> float:
        """Return the highest temperature [K] at a pressure."""
        if self.hot is not None and pressure <= self.hot[1]:
            return self.hot[0]
        return self.temperature_max

    @property
    def hottest(self) -> float:
        """The highest temperature [K] at any pressure."""
        return self.temperature_max if self.hot is None else self.hot[0]

    @property
    def coldest(self) -> float:
        """The lowest temperature [K] that is taken at any pressure."""
        low, high = self.triple_pressure, self.pressure_max
        return min(self.lowest(low * (high / low) ** (step / _STEPS)) for step in range(_STEPS + 1))

    def refuse_outside(self, point: Point, name: str) -> None:
        """Raise NotEvaluable (outside-range) for a state outside the limits."""
        self.refuse_pressure(point.pressure, name)
        self.refuse_temperature(point.temperature, point.pressure, name)

    def refuse_pressure(self, pressure: float, name: str) -> None:
        """Raise NotEvaluable (outside-range) for a pressure outside the limits."""
        if not self.pressure_min <= pressure <= self.pressure_max * (1.0 + _ROUNDING):
            bound = self.pressure_max if pressure > self.pressure_min else self.pressure_min
            raise NotEvaluable(
                f"{pressure:.6g} Pa is outside the range of the equation of state of {name} ({bound:.6g} Pa)",
                "outside-range",
            )

    def refuse_temperature(self, temperature: float, pressure: float, name: str) -> None:
        """Raise NotEvaluable (outside-range) where it is too hot, too cold or solid."""
        ceiling = self.ceiling(pressure)
        if temperature > ceiling * (1.0 + _ROUNDING):
            self._refuse(temperature, f"above {ceiling:.6g} K, where the equation of state of {name} ends")
        if temperature >= self.temperature_min and self.melting is None:
            return
        floor = self.floor(pressure)
        if temperature < floor - self.cold_tolerance - _SLACK:
            word = "the melting line" if floor != self.temperature_min else "the equation's end"
            self._refuse(temperature, f"below {floor:.6g} K, {word} of {name} at {pressure:.6g} Pa")

    @staticmethod
    def _refuse(temperature: float, what: str) -> None:
        raise NotEvaluable(f"{temperature:.6g} K is {what}", "outside-range")

    def liquid_pressures(self, temperature: float) -> tuple[float, float] | None:
        """Return the lowest and highest pressure [Pa] at which a temperature is not below the floor."""
        low, high = max(self.triple_pressure, self.pressure_min), self.pressure_max
        grid = [low * (high / low) ** (step / _STEPS) for step in range(_STEPS + 1)]
        grid[-1] = high
        fluid = [step for step, pressure in enumerate(grid) if temperature >= self.floor(pressure)]
        if not fluid:
            return None
        first, last = fluid[0], fluid[-1]
        if first > 0:
            low = self._edge(temperature, grid[first - 1], grid[first])
        if last < _STEPS:
            high = self._edge(temperature, grid[last + 1], grid[last])
        return low, high

    def _edge(self, temperature: float, solid: float, fluid: float) -> float:
        """Return the pressure on the fluid side of the melting line, by bisection."""
        for _ in range(_BISECTIONS):
            middle = 0.5 * (solid + fluid)
            if temperature >= self.floor(middle):
                fluid = middle
            else:
                solid = middle
        return fluid

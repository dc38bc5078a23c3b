"""What the curves of both formulations have in common: isobars and lines of constant quality."""

from __future__ import annotations

from typing import Final

from checker.outcomes import NotEvaluable
from checker.substances.coolprop import GAS, LIQUID, Constants, Library
from checker.substances.matching import matches, residual_along
from checker.substances.properties import PRESSURE, QUALITY, TEMPERATURE, Pair, Point
from checker.substances.surface import Branch, Curve, crowded, even, increasing

_LIQUID_STEPS: Final = 16
_VAPOUR_STEPS: Final = 32
_DOME_STEPS: Final = 40
_FREEZING_STEPS: Final = 20
_TWO_ROOTS_BELOW: Final = 310.0  # K: well above the density maximum of water (277 K) and heavy water (284 K)
_ON_THE_LINE: Final = 1e-9


class LibrarySurface:
    """Isobars and quality lines over one library state."""

    sides = True
    """Whether the library takes the side of the saturation line as known."""

    def __init__(self, library: Library, name: str, pure: bool) -> None:
        self.library = library
        self._name = name
        self._pure = pure

    @property
    def name(self) -> str:
        """Name of the fluid for sentences."""
        return self._name

    @property
    def constants(self) -> Constants:
        """Constants and limits."""
        return self.library.constants

    @property
    def critical_temperature(self) -> float:
        """[K]"""
        return self.constants.critical[0]

    def at(self, temperature: float, pressure: float, side: str | None = None) -> Point:
        """Return the state of one phase at temperature [K] and pressure [Pa].

        Saying the side of the saturation line helps the library close to it, and here and there stops it elsewhere.
        """
        pair = (TEMPERATURE, PRESSURE)
        if side is not None and self.sides:
            try:
                return self.library.point(pair, temperature, pressure, side)
            except NotEvaluable:
                pass
        return self.library.point(pair, temperature, pressure)

    def saturated(self, name: str, value: float) -> tuple[Point, Point]:
        """Return saturated liquid and vapour at a temperature or pressure.

        Raises
        ------
        NotEvaluable
            Above the critical point or below the triple point.
        """
        critical = self.constants.critical[0 if name == TEMPERATURE else 1]
        if value > critical:
            raise NotEvaluable(f"{self.name} has no saturation above its critical point", "outside-range")
        liquid, vapour = (self.library.point((name, QUALITY), value, x) for x in (0.0, 1.0))
        return liquid, vapour

    def saturation_pressures(self, temperature: float) -> tuple[float, float] | None:
        """Return the pressures [Pa] of dew and bubble point at a temperature, None where there are none."""
        if not self.constants.limits.lowest(0.0) <= temperature < self.critical_temperature:
            return None
        bubble = self.library.saturation_pressure(temperature)
        dew = bubble if self._pure else self.library.saturation_pressure(temperature, 1.0)
        return None if bubble is None or dew is None else (min(dew, bubble), max(dew, bubble))

    def dome(self, name: str, value: float) -> tuple[Point, Point] | None:
        """Return saturated liquid and vapour, None where there is none."""
        try:
            return self.saturated(name, value)
        except NotEvaluable:
            return None

    def between(self, name: str, value: float) -> tuple[Branch, ...]:
        """Return the two-phase branch at a temperature or pressure; none for a mixture taken as one substance."""
        if not self._pure:
            return ()
        return (Branch((0.0, 1.0), lambda x: self.library.point((name, QUALITY), value, x)),)

    def isobar(self, pressure: float) -> Curve:
        """Return the curve of constant pressure [Pa]: liquid, two phases, vapour."""
        limits = self.constants.limits
        limits.refuse_pressure(pressure, self.name)
        floor, ceiling = limits.lowest(pressure), limits.ceiling(pressure)
        dome = self.dome(PRESSURE, pressure)
        if dome is None:
            grid = self._fine_near_freezing(even(floor, ceiling, _VAPOUR_STEPS))
            return (Branch(grid, lambda t: self.at(t, pressure)),)
        liquid, vapour = dome
        cold, warm = liquid.temperature, vapour.temperature
        branches = [*self.between(PRESSURE, pressure)]
        if cold > floor:
            down = self._fine_near_freezing(crowded(floor, cold, _LIQUID_STEPS, 1.5))
            branches.append(
                Branch(down, lambda t: liquid if on_line(t, cold) else self.at(t, pressure, LIQUID))
            )
        up = increasing(crowded(ceiling, warm, _VAPOUR_STEPS))
        branches.append(
            Branch(up, lambda t: vapour if on_line(t, warm) else self.at(t, pressure, self._gas(t)))
        )
        return tuple(branches)

    def _fine_near_freezing(self, temperatures: tuple[float, ...]) -> tuple[float, ...]:
        """Return increasing temperatures with steps that show both states of water of the same density."""
        low, high = temperatures[0], temperatures[-1]
        if not self.constants.limits.ice_floats:
            return increasing(temperatures)
        fine = (t for t in even(low, _TWO_ROOTS_BELOW, _FREEZING_STEPS) if low < t < high)
        return increasing((*temperatures, *fine))

    def _gas(self, temperature: float) -> str | None:
        return GAS if temperature < self.critical_temperature else None

    def quality_line(self, quality: float) -> Curve:
        """Return the curve of constant quality from the triple point to the critical point."""
        cold, hot = self.constants.limits.lowest(0.0), self.critical_temperature
        if not self._pure and 0.0 < quality < 1.0:
            raise NotEvaluable(two_phase_mixture(self.name), "not-supported")
        grid = increasing((*crowded(cold, hot, _DOME_STEPS), *even(cold, hot, _DOME_STEPS)))
        grid = self._fine_near_freezing(grid)
        return (Branch(grid, lambda t: self._of((TEMPERATURE, QUALITY), t, quality)),)

    def saturated_with(self, name: str, value: float) -> list[Point]:
        """Return the saturated states, liquid and vapour, in which a property takes a value."""
        found: list[Point] = []
        for branch in (*self.quality_line(0.0), *self.quality_line(1.0)):
            residual = residual_along(branch, name, value, self.constants)
            found += [point for _, point in matches(branch, residual, 1.0)]
        return found

    def _of(self, pair: Pair, first: float, second: float) -> Point:
        return self.library.point(pair, first, second)


def two_phase_mixture(name: str) -> str:
    """Return why a two-phase state of a mixture that is taken as one substance is refused."""
    return f"{name} is a mixture taken as one substance, which has no trustworthy two-phase states"


def on_line(value: float, line: float) -> bool:
    """Return whether a temperature or pressure is that of the saturation line to rounding."""
    return abs(value - line) <= _ON_THE_LINE * line

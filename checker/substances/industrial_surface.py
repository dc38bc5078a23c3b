"""Curves over the industrial formulation for water, IAPWS-IF97, from temperature and pressure alone.

Its backward equations are consistent only to some 1e-4; searching over the forward ones is exact.
"""

from __future__ import annotations

from collections.abc import Callable
from typing import Final

from checker.outcomes import NotEvaluable
from checker.substances.library_surface import LibrarySurface, on_line
from checker.substances.matching import matches, residual_along
from checker.substances.properties import (
    ENERGY,
    ENTROPY,
    PRESSURE,
    QUALITY,
    TEMPERATURE,
    VOLUME,
    Known,
    Point,
)
from checker.substances.surface import Branch, Curve, crowded, even, geometric, increasing

_TRUSTED: Final = {(TEMPERATURE, PRESSURE), (TEMPERATURE, QUALITY), (PRESSURE, QUALITY)}
_STEPS: Final = 40


class IndustrialSurface(LibrarySurface):
    """The states of water by IAPWS-IF97."""

    sides = False
    reproduces = 1e-4
    """The regions of the formulation meet with small jumps."""

    def direct(self, known: Known) -> Point | None:
        """Return the state of a pair with one root; None for the pairs that must be searched."""
        if known.pair not in _TRUSTED:
            return None
        return self.library.point(known.pair, known.first, known.second)

    def isotherm(self, temperature: float) -> Curve:
        """Return the curve of constant temperature [K] over pressure: vapour, two phases, liquid."""
        limits = self.constants.limits
        limits.refuse_temperature(temperature, limits.pressure_min, self.name)
        low, high = limits.pressure_min, self._highest_pressure(temperature)
        dome = self.dome(TEMPERATURE, temperature)
        if dome is None:
            grid = increasing((*geometric(low, high, _STEPS), *even(low, high, _STEPS)))
            return (Branch(grid, lambda p: self.at(temperature, p), flat=True),)
        liquid, vapour = dome
        line = liquid.pressure

        def beside(saturated: Point) -> Callable[[float], Point]:
            return lambda p: saturated if on_line(p, line) else self.at(temperature, p)

        branches = list(self.between(TEMPERATURE, temperature))
        if low < line:
            branches.append(Branch(geometric(low, line, _STEPS), beside(vapour), flat=True))
        branches.append(Branch(increasing(crowded(high, line, _STEPS)), beside(liquid)))
        return tuple(branches)

    def _highest_pressure(self, temperature: float) -> float:
        limits = self.constants.limits
        return limits.hot[1] if limits.hot and temperature > limits.temperature_max else limits.pressure_max

    def isochore(self, volume: float) -> Curve:
        """Return the curve of constant specific volume [m³/kg] over temperature."""
        limits = self.constants.limits
        grid = crowded(limits.hottest, limits.lowest(0.0), _STEPS, 2.0)
        return (Branch(increasing(grid), lambda t: self._only(self.isotherm(t), VOLUME, volume)),)

    def isentrope(self, entropy: float) -> Curve:
        """Return the curve of constant specific entropy [J/(kg·K)] over pressure."""
        return self._over_pressure(ENTROPY, entropy)

    def isenergetic(self, energy: float) -> Curve:
        """Return the curve of constant specific internal energy [J/kg] over pressure."""
        return self._over_pressure(ENERGY, energy)

    def _over_pressure(self, name: str, value: float) -> Curve:
        limits = self.constants.limits
        kinks = (point.pressure for point in self.saturated_with(name, value))
        grid = increasing((*geometric(limits.pressure_min, limits.pressure_max, _STEPS), *kinks))
        return (Branch(grid, lambda p: self._only(self.isobar(p), name, value), flat=True),)

    def _only(self, curve: Curve, name: str, value: float) -> Point:
        """Return the one state of a curve along which the property only rises or only falls."""
        for branch in curve:
            ends = Branch((branch.parameters[0], branch.parameters[-1]), branch.at)
            residual = residual_along(ends, name, value, self.constants)
            for _, point in matches(ends, residual, self.reproduces):
                return point
        raise NotEvaluable(f"no state of {self.name} on this line")

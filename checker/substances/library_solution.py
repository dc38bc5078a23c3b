"""Liquids of the property library that hardly depend on pressure: solutions and heat transfer liquids.

The library's h and s at a pressure are those of c(T) with a term linear in p. Taken at two pressures and extended to
none they are ∫c dT and ∫c/T dT, so that du = T ds holds exactly for a liquid whose temperature fixes both.
"""

from __future__ import annotations

import math
import threading
from typing import Any, Final, NamedTuple

from checker.outcomes import NotEvaluable
from checker.substances.coolprop import property_library

INCOMPRESSIBLE: Final = "INCOMP"
_FAILURES: Final = (ValueError, RuntimeError, IndexError, ArithmeticError, TypeError)
_PRESSURE: Final = 1e7  # Pa, above the vapour pressure of every liquid of the table
_ABSOLUTE_ZERO: Final = 1.0


class LiquidPoint(NamedTuple):
    """A liquid at a temperature: density [kg/m³], u [J/kg], s [J/(kg·K)]."""

    density: float
    energy: float
    entropy: float


class SolutionLibrary:
    """One library state of one liquid of the table."""

    def __init__(self, code: str) -> None:
        library = property_library()
        self._state: Any = library.AbstractState(INCOMPRESSIBLE, code)
        self._inputs = library.PT_INPUTS
        self._freezing = library.iT_freeze

    def limits(self, fraction: float | None) -> tuple[float, float]:
        """Return the temperatures [K] between which the data hold and the liquid does not freeze."""
        state = self._state
        try:
            self._set(fraction)
            low, high = float(state.Tmin()), float(state.Tmax())
        except _FAILURES:
            raise NotEvaluable("the property library has no such liquid", "not-supported") from None
        freezing = self._freezing_temperature(high)
        return (low if freezing is None else max(low, freezing)), high

    def _freezing_temperature(self, high: float) -> float | None:
        """Return the freezing temperature [K] at the fraction that is set, None where the data tell none."""
        try:
            self._state.update(self._inputs, _PRESSURE, high)
            freezing = float(self._state.keyed_output(self._freezing))
        except _FAILURES:
            return None
        return freezing if math.isfinite(freezing) and _ABSOLUTE_ZERO < freezing < high else None

    def point(self, temperature: float, fraction: float | None) -> LiquidPoint:
        """Return the liquid at a temperature [K] and mass fraction of the solute. Raises NotEvaluable."""
        state = self._state
        try:
            self._set(fraction)
            state.update(self._inputs, _PRESSURE, temperature)
            density, enthalpy, entropy = state.rhomass(), state.hmass(), state.smass()
            state.update(self._inputs, 2.0 * _PRESSURE, temperature)
            found = LiquidPoint(density, 2.0 * enthalpy - state.hmass(), 2.0 * entropy - state.smass())
        except _FAILURES:
            found = LiquidPoint(math.nan, math.nan, math.nan)
        if not (all(map(math.isfinite, found)) and found.density > 0.0):
            raise NotEvaluable(
                f"the data of this liquid give no value at {temperature:.6g} K", "outside-range"
            )
        return found

    def boils(self, temperature: float, pressure: float, fraction: float | None) -> bool:
        """Say whether the library refuses a pressure [Pa] at a temperature [K] at which it answers for a higher one."""
        try:
            self._set(fraction)
            self._state.update(self._inputs, pressure, temperature)
        except _FAILURES:
            return pressure < _PRESSURE
        return False

    def _set(self, fraction: float | None) -> None:
        """Set the fraction before every use: without one, the library answers as if it were another liquid."""
        if fraction is not None:
            self._state.set_mass_fractions([fraction])


class _PerThread(threading.local):
    def __init__(self) -> None:
        self.libraries: dict[str, SolutionLibrary] = {}


_OWN: Final = _PerThread()


def solution_library(code: str) -> SolutionLibrary:
    """Return this thread's library state of a liquid of the table of solutions, by the code that stands there."""
    if code not in _OWN.libraries:
        _OWN.libraries[code] = SolutionLibrary(code)
    return _OWN.libraries[code]

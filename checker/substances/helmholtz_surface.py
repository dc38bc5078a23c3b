"""Curves over a Helmholtz equation of state, whose own variables, temperature and density, are the safest to use."""

from __future__ import annotations

from typing import Final

from checker.outcomes import NotEvaluable
from checker.substances.coolprop import LIQUID, LOWEST_PRESSURE, TRUSTED
from checker.substances.library_surface import LibrarySurface, two_phase_mixture
from checker.substances.properties import (
    ENERGY,
    ENTROPY,
    PRESSURE,
    QUALITY,
    TEMPERATURE,
    VOLUME,
    Known,
    Pair,
    Point,
)
from checker.substances.surface import Branch, Curve, crowded, even, geometric, increasing

_VAPOUR_STEPS: Final = 32
_ISOCHORE_STEPS: Final = 40
_LINE_STEPS: Final = 64
_DENSER: Final = 1.04
_FINELY_DENSER: Final = 1.01  # beside the coldest isotherm a line may pass through all of its liquid in 2 %
_MOST_STEPS: Final = 250
_ABOVE_VACUUM: Final = 1.01
_LITTLE_PRESSURE: Final = 1e4  # Pa
_EXPANDED: Final = 1e-4  # more than any liquid expands when this pressure is taken off
_THIN: Final = 0.05  # of the critical density
_ON_THE_DOME: Final = 1e-6
_CONFIRMED: Final = 1e-3


class HelmholtzSurface(LibrarySurface):
    """The states of a pure or pseudo-pure fluid by its Helmholtz equation of state."""

    reproduces = 1e-6

    def direct(self, known: Known) -> Point | None:
        """Return the state of a pair with one root; None for the pairs that must be searched."""
        if known.pair not in TRUSTED:
            return None
        if not self._pure and QUALITY in known.pair and 0.0 < known.value(QUALITY) < 1.0:
            raise NotEvaluable(two_phase_mixture(self.name), "not-supported")
        if known.pair == (PRESSURE, VOLUME) and self._may_have_two_roots(known.first, known.second):
            return None
        if known.pair == (TEMPERATURE, PRESSURE):
            return self._one_phase(known)
        return self._outside_dome(self.library.point(known.pair, known.first, known.second))

    def _one_phase(self, known: Known) -> Point:
        try:
            point = self.library.point(known.pair, known.first, known.second, self._frozen_side(known))
        except NotEvaluable:
            self.constants.limits.refuse_pressure(known.second, self.name)
            self.constants.limits.refuse_temperature(known.first, known.second, self.name)
            raise
        return self._outside_dome(point)

    def _frozen_side(self, known: Known) -> str | None:
        """Return ``liquid`` just below the melting line of water, where the library would refuse 0 °C."""
        limits = self.constants.limits
        if not limits.ice_floats or known.second <= limits.triple_pressure:
            return None
        near = limits.lowest(known.second) <= known.first < limits.floor(known.second)
        return LIQUID if near else None

    def _may_have_two_roots(self, pressure: float, volume: float) -> bool:
        """Return whether the liquid may expand on cooling here: water and heavy water near freezing."""
        limits = self.constants.limits
        if not limits.ice_floats or pressure <= limits.triple_pressure:
            return False
        limits.refuse_pressure(pressure, self.name)
        coldest = self.at(limits.lowest(pressure), pressure, LIQUID)
        return volume <= coldest.specific_volume * (1.0 + _ON_THE_DOME)

    def _of(self, pair: Pair, first: float, second: float) -> Point:
        return self._outside_dome(self.library.point(pair, first, second))

    def saturated(self, name: str, value: float) -> tuple[Point, Point]:
        """Return saturated liquid and vapour (bubble and dew point) at a temperature or pressure."""
        both = super().saturated(name, value)
        if not self._pure:
            for point in both:
                self._refuse_inconsistent(point)
        return both

    def _outside_dome(self, point: Point) -> Point:
        """Return a point unless it is inside the dome of a mixture taken as one substance."""
        if self._pure or point.temperature > self.critical_temperature:
            return point
        liquid, vapour = self.saturated(TEMPERATURE, point.temperature)
        for saturated in (liquid, vapour):
            if abs(point.specific_volume / saturated.specific_volume - 1.0) < _ON_THE_DOME:
                return saturated
        if liquid.specific_volume < point.specific_volume < vapour.specific_volume:
            raise NotEvaluable(two_phase_mixture(self.name), "not-supported")
        self._refuse_inconsistent(point)
        return point

    def _refuse_inconsistent(self, point: Point) -> None:
        """Refuse a state of a mixture taken as one substance that its own equation does not confirm."""
        again = self.library.point((TEMPERATURE, VOLUME), point.temperature, point.specific_volume)
        if abs(again.pressure / point.pressure - 1.0) > _CONFIRMED:
            raise NotEvaluable(
                f"the equation of state of {self.name} contradicts itself here", "ill-conditioned"
            )

    def isotherm(self, temperature: float) -> Curve:
        """Return the curve of constant temperature [K] over density: vapour, two phases, liquid."""
        limits = self.constants.limits
        if limits.ice_floats and temperature < limits.lowest(0.0):
            return self._below_freezing(temperature)
        limits.refuse_temperature(temperature, limits.triple_pressure, self.name)
        thinnest = self._thinnest(temperature)
        if temperature >= self.critical_temperature:
            knee = _THIN / self.constants.critical[2]
            grid = (*geometric(thinnest, knee, _VAPOUR_STEPS), *self._denser(temperature, knee, _DENSER))
            return (self._over_density(temperature, increasing(grid)),)
        dome = self.dome(TEMPERATURE, temperature)
        if dome is None:
            return (self._over_density(temperature, self._over_vacuum(temperature)),)
        liquid, vapour = (1.0 / point.specific_volume for point in dome)
        branches = [*self.between(TEMPERATURE, temperature)]
        if thinnest < vapour:
            branches.append(self._over_density(temperature, geometric(thinnest, vapour, _VAPOUR_STEPS)))
        branches.append(self._over_density(temperature, self._denser(temperature, liquid, _DENSER)))
        return tuple(branches)

    def _over_vacuum(self, temperature: float) -> tuple[float, ...]:
        """Return the densities [kg/m³] of a liquid whose vapour pressure is next to nothing."""
        density = 1.0 / self.at(temperature, _LITTLE_PRESSURE, LIQUID).specific_volume
        return ((1.0 - _EXPANDED) * density, *self._denser(temperature, density, _DENSER))

    def _below_freezing(self, temperature: float) -> Curve:
        """Return the isotherm of water under pressure below its triple point's temperature."""
        limits = self.constants.limits
        pressures = limits.liquid_pressures(temperature + limits.cold_tolerance)
        if pressures is None:
            limits.refuse_temperature(temperature, limits.triple_pressure, self.name)
            return ()
        thin, dense = (1.0 / self.at(temperature, p, LIQUID).specific_volume for p in pressures)
        return (self._over_density(temperature, even(thin, dense, _VAPOUR_STEPS)),)

    def _over_density(self, temperature: float, densities: tuple[float, ...]) -> Branch:
        pair = (TEMPERATURE, VOLUME)
        return Branch(densities, lambda rho: self._of(pair, temperature, 1.0 / rho), flat=True)

    def _denser(self, temperature: float, density: float, ratio: float) -> tuple[float, ...]:
        """Return densities from this one to just beyond the highest pressure or the melting line.

        At the start there may be next to no pressure: what ends the row is a state that is missing after others.
        """
        found, entered = [density], False
        for _ in range(_MOST_STEPS):
            found.append(found[-1] * ratio)
            try:
                self.library.point((TEMPERATURE, VOLUME), temperature, 1.0 / found[-1])
                entered = True
            except NotEvaluable:
                if entered:
                    break
        return tuple(found)

    def _thinnest(self, temperature: float) -> float:
        return _ABOVE_VACUUM * LOWEST_PRESSURE / (self.constants.gas_constant * temperature)

    def isochore(self, volume: float) -> Curve:
        """Return the curve of constant specific volume [m³/kg] over temperature."""
        limits = self.constants.limits
        cold = limits.coldest if limits.ice_floats else limits.lowest(0.0)
        grid = increasing(crowded(limits.temperature_max, cold, _ISOCHORE_STEPS, 2.0))
        return (Branch(grid, lambda t: self._of((TEMPERATURE, VOLUME), t, volume)),)

    def isentrope(self, entropy: float) -> Curve:
        """Return the curve of constant specific entropy [J/(kg·K)] over density."""
        pair = (VOLUME, ENTROPY)
        grid = self._densities(ENTROPY, entropy)
        return (Branch(grid, lambda rho: self._of(pair, 1.0 / rho, entropy), flat=True),)

    def isenergetic(self, energy: float) -> Curve:
        """Return the curve of constant specific internal energy [J/kg] over density."""
        pair = (VOLUME, ENERGY)
        grid = self._densities(ENERGY, energy)
        return (Branch(grid, lambda rho: self._of(pair, 1.0 / rho, energy), flat=True),)

    def _densities(self, name: str, value: float) -> tuple[float, ...]:
        """Return densities from next to nothing to the densest state, with those where a curve meets the dome."""
        limits = self.constants.limits
        critical = 1.0 / self.constants.critical[2]
        thin = geometric(self._thinnest(limits.temperature_max), critical, _LINE_STEPS)
        dense = self._denser(limits.floor(limits.pressure_max), critical, _FINELY_DENSER)
        kinks = (1.0 / point.specific_volume for point in self.saturated_with(name, value))
        return increasing((*thin, *dense, *kinks))

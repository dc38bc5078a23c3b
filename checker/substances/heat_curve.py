"""Internal energy and entropy as functions of temperature, from a specific heat that is linear in pieces.

Each piece is integrated in closed form, u = ∫c dT and s = ∫c/T dT, so du = T ds holds exactly. Between two pieces u
and s may jump: there the body melts at one temperature.
"""

from __future__ import annotations

import math
from bisect import bisect_right
from dataclasses import dataclass, replace
from functools import cached_property
from typing import Final

from checker.outcomes import NotEvaluable
from checker.substances.search import bracketed_root

_LARGEST_EXPONENT: Final = 200.0
_ROUNDING: Final = 1e-9
"""A temperature this far outside, relative, is still the end of the curve: what rounding leaves."""


@dataclass(frozen=True, slots=True)
class Piece:
    """Temperatures from ``low`` to ``high`` [K] over which the specific heat is c = heat + slope·(T − start).

    ``energy`` [J/kg] and ``entropy`` [J/(kg·K)] are those at ``start`` [K]; heat [J/(kg·K)], slope [J/(kg·K²)].
    The specific heat is positive all over the piece.
    """

    low: float
    high: float
    start: float
    energy: float
    entropy: float
    heat: float
    slope: float = 0.0

    def energy_at(self, temperature: float) -> float:
        """Return u [J/kg]."""
        step = temperature - self.start
        return self.energy + step * (self.heat + 0.5 * self.slope * step)

    def entropy_at(self, temperature: float) -> float:
        """Return s [J/(kg·K)]: ∫(a + slope·T)/T dT with a the specific heat that the line has at 0 K."""
        at_zero = self.heat - self.slope * self.start
        step = temperature - self.start
        return self.entropy + at_zero * math.log(temperature / self.start) + self.slope * step

    def heat_at(self, temperature: float) -> float:
        """Return c [J/(kg·K)]."""
        return self.heat + self.slope * (temperature - self.start)

    def temperature_of_energy(self, energy: float) -> float:
        """Return the temperature [K] of an energy of this piece: the root of a quadratic, without cancellation."""
        gain = energy - self.energy
        square = self.heat * self.heat + 2.0 * self.slope * gain
        if square < 0.0:
            raise NotEvaluable("no temperature has this internal energy", "outside-range")
        return self.start + 2.0 * gain / (self.heat + math.sqrt(square))

    def temperature_of_entropy(self, entropy: float) -> float:
        """Return the temperature [K] of an entropy of this piece. Raises NotEvaluable where it has none."""
        if self.slope == 0.0:
            exponent = (entropy - self.entropy) / self.heat
            if abs(exponent) > _LARGEST_EXPONENT:
                raise NotEvaluable("no temperature has this entropy", "outside-range")
            return self.start * math.exp(exponent)
        scale = max(abs(entropy), self.heat)
        low, high = ((t, (self.entropy_at(t) - entropy) / scale) for t in (self.low, self.high))
        if low[1] > _ROUNDING or high[1] < -_ROUNDING:
            raise NotEvaluable("no temperature has this entropy", "outside-range")
        if low[1] >= 0.0 or high[1] <= 0.0:
            return self.low if low[1] >= 0.0 else self.high

        def residual(temperature: float) -> float:
            return (self.entropy_at(self._within(temperature)) - entropy) / scale

        return self._within(bracketed_root(residual, low, high))

    def _within(self, temperature: float) -> float:
        """Return a temperature of the piece: between ends far apart, rounding alone may leave them."""
        return min(max(temperature, self.low), self.high)

    def with_heat_added(self, heat: float, datum: float) -> Piece:
        """Return the piece with ``heat`` more specific heat, of which u = heat·T and s = heat·ln(T/datum)."""
        return replace(
            self,
            energy=self.energy + heat * self.start,
            entropy=self.entropy + heat * math.log(self.start / datum),
            heat=self.heat + heat,
        )


def _finite(value: float) -> float:
    """Return a value that is a number. Raises NotEvaluable for what grew beyond all numbers."""
    if not math.isfinite(value):
        raise NotEvaluable("the stated constants lead to no finite energy or entropy")
    return value


@dataclass(frozen=True)
class HeatCurve:
    """Pieces in the order of temperature, one beginning where the other ends."""

    pieces: tuple[Piece, ...]

    @property
    def low(self) -> float:
        """Lowest temperature [K]."""
        return self.pieces[0].low

    @property
    def high(self) -> float:
        """Highest temperature [K]."""
        return self.pieces[-1].high

    @cached_property
    def _starts(self) -> list[float]:
        return [piece.low for piece in self.pieces[1:]]

    @cached_property
    def _energies(self) -> list[float]:
        return [piece.energy_at(piece.low) for piece in self.pieces[1:]]

    @cached_property
    def _entropies(self) -> list[float]:
        return [piece.entropy_at(piece.low) for piece in self.pieces[1:]]

    def at(self, temperature: float) -> Piece:
        """Return the piece of a temperature; where two meet, the upper one.

        Raises
        ------
        NotEvaluable
            The temperature is outside the curve.
        """
        if not self.low * (1.0 - _ROUNDING) <= temperature <= self.high * (1.0 + _ROUNDING):
            raise NotEvaluable(
                f"{temperature:.6g} K is outside {self.low:.6g} K to {self.high:.6g} K, where the properties are known",
                "outside-range",
            )
        return self.pieces[bisect_right(self._starts, temperature)]

    def energy(self, temperature: float) -> float:
        """Return u [J/kg]. Raises NotEvaluable outside the curve."""
        return _finite(self.at(temperature).energy_at(temperature))

    def entropy(self, temperature: float) -> float:
        """Return s [J/(kg·K)]. Raises NotEvaluable outside the curve."""
        return _finite(self.at(temperature).entropy_at(temperature))

    def temperature_of_energy(self, energy: float) -> float:
        """Return the temperature [K] of an internal energy; within a jump, that of the jump. Raises NotEvaluable."""
        piece = self.pieces[bisect_right(self._energies, energy)]
        if piece is not self.pieces[-1] and energy >= piece.energy_at(piece.high):
            return piece.high
        return self._inside(piece.temperature_of_energy(energy))

    def temperature_of_entropy(self, entropy: float) -> float:
        """Return the temperature [K] of an entropy; within a jump, that of the jump. Raises NotEvaluable."""
        piece = self.pieces[bisect_right(self._entropies, entropy)]
        if piece is not self.pieces[-1] and entropy >= piece.entropy_at(piece.high):
            return piece.high
        return self._inside(piece.temperature_of_entropy(entropy))

    def _inside(self, temperature: float) -> float:
        self.at(temperature)
        return temperature

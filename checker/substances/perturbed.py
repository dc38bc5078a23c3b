"""A substance whose density, and whose energies and entropies, are off by a factor.

It carries the uncertainty of a property model through a calculation: calculate once with the substance and once
with the factors 1 + U, and see what moves.
"""

from __future__ import annotations

import math
from collections.abc import Mapping
from dataclasses import dataclass, replace
from typing import Final

from checker.outcomes import NotEvaluable
from checker.substances.interface import ModelUncertainty, Phase, PropertyState, Substance, ValidRange
from checker.substances.properties import ENERGY, ENTHALPY, ENTROPY, VOLUME, checked_value

_ROUNDS: Final = 40
_CONVERGED: Final = 1e-9


@dataclass(frozen=True)
class PerturbedSubstance:
    """Another substance with v = v₀/density_factor, u = caloric_factor·u₀, s = caloric_factor·s₀, h = u + p v.

    The factor on u and s is one on their differences, on whatever datum; saturation pressures are not moved.
    """

    base: Substance
    density_factor: float
    caloric_factor: float

    @property
    def name(self) -> str:
        """Name for the report."""
        return self.base.name

    @property
    def model(self) -> str:
        """The model word of the record format."""
        return self.base.model

    @property
    def equation(self) -> str:
        """The equation with its source, and the factors."""
        return (
            f"{self.base.equation}, density × {self.density_factor:.6g}, energy × {self.caloric_factor:.6g}"
        )

    @property
    def gas_constant(self) -> float | None:
        """Specific gas constant [J/(kg·K)]."""
        return self.base.gas_constant

    @property
    def molar_mass(self) -> float | None:
        """[kg/mol]"""
        return self.base.molar_mass

    @property
    def critical_point(self) -> tuple[float, float, float] | None:
        """Critical (T [K], p [Pa], v [m³/kg])."""
        critical = self.base.critical_point
        return None if critical is None else (critical[0], critical[1], critical[2] / self.density_factor)

    @property
    def valid_range(self) -> ValidRange | None:
        """Range of the model."""
        return self.base.valid_range

    @property
    def uncertainty(self) -> ModelUncertainty:
        """Published uncertainty of the model."""
        return self.base.uncertainty

    @property
    def incompressible(self) -> bool:
        """Whether temperature alone fixes u and s."""
        return self.base.incompressible

    def state(self, known: Mapping[str, float], phase: Phase | None = None) -> PropertyState:
        """Return the one state with these two properties. Raises NotEvaluable as the substance itself does."""
        wanted = self._of_base(known)
        found = self.base.state(wanted, phase)
        return self._moved(found) if ENTHALPY not in wanted else self._with_enthalpy(wanted, found)

    def states(self, known: Mapping[str, float]) -> tuple[PropertyState, ...]:
        """Return every state with these two properties, ordered by specific volume. Raises NotEvaluable."""
        wanted = self._of_base(known)
        found = self.base.states(wanted)
        if ENTHALPY not in wanted:
            return tuple(self._moved(state) for state in found)
        return tuple(self._with_enthalpy(wanted, state) for state in found)

    def saturation(self, known: Mapping[str, float]) -> tuple[PropertyState, PropertyState]:
        """Return (saturated liquid, saturated vapour) at a temperature or a pressure. Raises NotEvaluable."""
        liquid, vapour = self.base.saturation(dict(known))
        return self._moved(liquid), self._moved(vapour)

    def crosses_saturation(
        self, temperature: float, half_temperature: float, pressure: float, half_pressure: float
    ) -> bool:
        """Return whether T and p with their digits reach both sides of the saturation line."""
        return self.base.crosses_saturation(temperature, half_temperature, pressure, half_pressure)

    def _of_base(self, known: Mapping[str, float]) -> dict[str, float]:
        """Return known properties as the base has them; for an enthalpy, a first guess."""
        energy = 1.0 / self.caloric_factor
        factors = {VOLUME: self.density_factor, ENERGY: energy, ENTHALPY: energy, ENTROPY: energy}
        return {name: checked_value(name, value) * factors.get(name, 1.0) for name, value in known.items()}

    def _moved(self, state: PropertyState) -> PropertyState:
        volume = None if state.specific_volume is None else state.specific_volume / self.density_factor
        energy = state.specific_internal_energy * self.caloric_factor
        enthalpy = None if state.pressure is None or volume is None else energy + state.pressure * volume
        return replace(
            state,
            specific_volume=volume,
            specific_internal_energy=energy,
            specific_enthalpy=enthalpy,
            specific_entropy=state.specific_entropy * self.caloric_factor,
        )

    def _with_enthalpy(self, wanted: dict[str, float], state: PropertyState) -> PropertyState:
        """Return the moved state with the enthalpy h, from the base's state with h/caloric_factor.

        h = c u₀ + p v₀/d = c h₀ + p v₀ (1/d − c), so h₀ follows from p v₀, which it hardly moves: a fixed point.
        """
        target = wanted[ENTHALPY] * self.caloric_factor
        share = 1.0 / self.density_factor - self.caloric_factor
        best, least = self._moved(state), math.inf
        for _ in range(_ROUNDS):
            moved = self._moved(state)
            if state.pressure is None or state.specific_volume is None or moved.specific_enthalpy is None:
                break
            product = state.pressure * state.specific_volume
            deviation = abs(moved.specific_enthalpy - target) / (abs(target) + product)
            if deviation >= least:
                break
            best, least = moved, deviation
            guess = (target - share * product) / self.caloric_factor
            state = self._nearest({**wanted, ENTHALPY: guess}, state)
        if least > _CONVERGED:
            raise NotEvaluable(f"{self.name}: no state with this enthalpy was found for the moved properties")
        return best

    def _nearest(self, wanted: dict[str, float], like: PropertyState) -> PropertyState:
        """Return the state of the base with these properties that is most like another one."""
        volume = like.specific_volume or 1.0
        found = self.base.states(wanted)
        return min(found, key=lambda state: abs((state.specific_volume or volume) / volume - 1.0))

"""Bodies that melt and freeze: two specific heats and a latent heat, at one temperature or over a span.

Datum: u = 0 and s = 0 of the solid at the melting temperature T_m (with a span: where melting begins). Below it
u = c_s (T − T_m), s = c_s ln(T/T_m). At one melting temperature u rises by L and s by L/T_m. Over a span ΔT_m the
melted fraction f rises in proportion to T, the latent heat is spread evenly and the specific heat passes from that of
the solid to that of the liquid, c = L/ΔT_m + c_s + (c_l − c_s)·f. Above, c = c_l. So du = T ds everywhere.
"""

from __future__ import annotations

import math
from collections.abc import Mapping
from dataclasses import dataclass, replace
from functools import lru_cache
from typing import ClassVar, Final

from checker.outcomes import NotEvaluable
from checker.substances.condensed import Condensed
from checker.substances.heat_curve import HeatCurve, Piece
from checker.substances.interface import ModelUncertainty, Phase, PropertyState, ValidRange
from checker.substances.materials import MeltingMaterial
from checker.substances.properties import (
    ENERGY,
    ENTROPY,
    MELTED,
    PRESSURE,
    TEMPERATURE,
    checked_value,
)
from checker.substances.uncertainty import EXACT

COLDEST: Final = 1.0
HOTTEST: Final = 1e5
"""[K] The curve's ends: far from any use, so that every temperature of a calculation lies on it."""
SAME: Final = 1e-9
"""Relative difference from the melting temperature that rounding leaves."""
SLACK: Final = 0.5
"""[K] A stated temperature so close to melting gives way to a phase or a melted fraction stated beside it: it is what
the last digit of a whole degree leaves open."""


@dataclass(frozen=True)
class Melting(Condensed):
    """A body that melts; ``span`` [K] is 0 where it melts at one temperature. SI.

    Temperature alone does not fix its state at one melting temperature: u, s, the melted fraction or the phase do.
    """

    name: str
    melting_temperature: float
    span: float
    latent_heat: float
    heat_of_solid: float
    heat_of_liquid: float
    specific_volume: float | None = None
    molar_mass: float | None = None
    material: MeltingMaterial | None = None
    own: tuple[str, ...] = ()

    model: ClassVar[str] = "phase change"

    @property
    def sharp(self) -> bool:
        """Whether it melts at one temperature."""
        return self.span == 0.0

    @property
    def melted_at(self) -> float:
        """The temperature at which it is all melted [K]."""
        return self.melting_temperature + self.span

    @property
    def valid_range(self) -> ValidRange | None:
        """Temperatures for which constants of the handbook table hold; None where all constants are stated."""
        if self.material is None:
            return None
        return ValidRange(self.material.temperature_min, self.material.temperature_max, math.inf)

    @property
    def uncertainty(self) -> ModelUncertainty:
        """That of the constants taken from the handbook table: the largest of them; ``moved`` uses each for its own."""
        if self.material is None:
            return EXACT
        largest = max((self._spreads()[name] for name in self.own), default=0.0)
        return ModelUncertainty(0.0, largest, f"handbook table: {self.material.source}")

    @property
    def equation(self) -> str:
        """The constants for the report, with the source of those that are not stated."""
        melts = f"T_m = {self.melting_temperature:.6g} K"
        melts += "" if self.sharp else f" to {self.melted_at:.6g} K"
        text = (
            f"{melts}, L = {self.latent_heat:.6g} J/kg, c = {self.heat_of_solid:.6g} J/(kg·K) solid, "
            f"{self.heat_of_liquid:.6g} J/(kg·K) liquid; u = 0, s = 0: solid at T_m"
        )
        if self.material is None:
            return text
        taken = ", ".join(name.replace("_", " ") for name in self.own)
        return f"{text}; {taken} of {self.material.name} from the handbook table ({self.material.source})"

    def moved(self, caloric_factor: float) -> Melting:
        """Return the body with the constants of the handbook table off by their own uncertainties.

        ``caloric_factor`` [1] is 1 + U with U the largest of them; each constant moves by its own share of it.
        """
        largest = self.uncertainty.caloric
        if self.material is None or largest == 0.0:
            return self
        share = (caloric_factor - 1.0) / largest
        own = {name: 1.0 + share * self._spreads()[name] for name in self.own}
        return replace(
            self,
            latent_heat=self.latent_heat * own.get("latent_heat", 1.0),
            heat_of_solid=self.heat_of_solid * own.get("specific_heat_of_solid", 1.0),
            heat_of_liquid=self.heat_of_liquid * own.get("specific_heat_of_liquid", 1.0),
        )

    def _spreads(self) -> dict[str, float]:
        """Return the relative uncertainties of what the table has; that of a melting temperature does not count."""
        row = self.material
        assert row is not None, "asked of bodies with constants of the table only"
        return {
            "melting_temperature": 0.0,
            "latent_heat": row.latent_spread,
            "specific_heat_of_solid": row.solid_spread,
            "specific_heat_of_liquid": row.liquid_spread,
        }

    def state(self, known: Mapping[str, float], phase: Phase | None = None) -> PropertyState:
        """Return the state with T, u, s, h and p, or the melted fraction alone or with T.

        At one melting temperature T needs a melted fraction or ``phase`` (solid, subcooled liquid) beside it.

        Raises
        ------
        NotEvaluable
            The properties fix no state, or contradict each other.
        """
        self.refuse_quality(known)
        values = {name: checked_value(name, value) for name, value in known.items()}
        pressure = values.pop(PRESSURE, None)
        fraction = values.pop(MELTED, None)
        if fraction is not None:
            return self._with_fraction(fraction, values, pressure)
        name, value = self._only(values)
        if name == TEMPERATURE:
            return self._with_phase(value, phase, pressure)
        return self._at(self._temperature(name, value, pressure), pressure, self._jump(name, value, pressure))

    def crosses_saturation(
        self, temperature: float, half_temperature: float, pressure: float, half_pressure: float
    ) -> bool:
        """Return whether T ± half a digit [K] reaches the one melting temperature, where T tells no state."""
        del pressure, half_pressure
        reach = max(half_temperature, SAME * self.melting_temperature)
        return self.sharp and abs(temperature - self.melting_temperature) <= reach

    def _with_fraction(
        self, fraction: float, values: Mapping[str, float], pressure: float | None
    ) -> PropertyState:
        """Return the state with a melted fraction, at the temperature stated beside it if there is one."""
        melting = self.melting_temperature + fraction * self.span
        if not values:
            return self._at(melting, pressure, fraction)
        name, temperature = self._only(values)
        if name != TEMPERATURE:
            raise NotEvaluable(
                f"the melted fraction and {name.replace('_', ' ')} of {self.name} both fix its state",
                "missing",
            )
        if (fraction == 0.0 and temperature < melting) or (fraction == 1.0 and temperature > melting):
            return self._at(temperature, pressure)
        if abs(temperature - melting) <= SLACK:
            return self._at(melting, pressure, fraction)
        raise NotEvaluable(
            f"{self.name} has the melted fraction {fraction:.4g} at {melting:.6g} K and not at {temperature:.6g} K"
        )

    def _with_phase(self, temperature: float, phase: Phase | None, pressure: float | None) -> PropertyState:
        """Return the state at a temperature; where it tells no side of melting, that of the stated phase."""
        offset = temperature - self.melting_temperature
        if self.sharp and phase is Phase.SOLID and -SAME * temperature <= offset <= SLACK:
            return self._at(self.melting_temperature, pressure, 0.0)
        liquid = phase in (Phase.SUBCOOLED_LIQUID, Phase.SATURATED_LIQUID)
        if self.sharp and liquid and -SLACK <= offset <= SAME * temperature:
            return self._at(self.melting_temperature, pressure, 1.0)
        if self.crosses_saturation(temperature, 0.0, 0.0, 0.0):
            raise NotEvaluable(
                f"{self.name} melts at {self.melting_temperature:.6g} K: the temperature does not tell how much of it "
                "is melted; melted fraction, phase or u would",
                "near-saturation",
            )
        return self._at(temperature, pressure)

    def _jump(self, name: str, value: float, pressure: float | None) -> float | None:
        """Return the melted fraction of an energy or entropy within the jump of melting; None outside it."""
        if not self.sharp:
            return None
        if name == ENTROPY:
            share = value * self.melting_temperature / self.latent_heat
        else:
            energy = value if name == ENERGY else self._less_flow(value, pressure)
            share = energy / self.latent_heat
        return share if 0.0 <= share <= 1.0 else None

    def _at(self, temperature: float, pressure: float | None, fraction: float | None = None) -> PropertyState:
        """Return the state at a temperature; ``fraction`` is needed at one melting temperature only."""
        if fraction is None:
            fraction = self._fraction(temperature)
        if self.sharp and temperature == self.melting_temperature:
            energy = fraction * self.latent_heat
            entropy = energy / temperature
        else:
            energy, entropy = self._energy(temperature), self._entropy(temperature)
        volume = self.specific_volume
        return PropertyState(
            temperature,
            pressure,
            volume,
            energy,
            None if pressure is None or volume is None else energy + pressure * volume,
            entropy,
            phase={0.0: Phase.SOLID, 1.0: Phase.SUBCOOLED_LIQUID}.get(fraction),
            melted_fraction=fraction,
        )

    def _fraction(self, temperature: float) -> float:
        if self.sharp:
            return 0.0 if temperature < self.melting_temperature else 1.0
        return min(1.0, max(0.0, (temperature - self.melting_temperature) / self.span))

    def _energy(self, temperature: float) -> float:
        return self._curve.energy(temperature)

    def _entropy(self, temperature: float) -> float:
        return self._curve.entropy(temperature)

    def _of_energy(self, energy: float) -> float:
        return self._curve.temperature_of_energy(energy)

    def _of_entropy(self, entropy: float) -> float:
        return self._curve.temperature_of_entropy(entropy)

    def _of_enthalpy(self, enthalpy: float, pressure: float | None) -> float:
        return self._of_energy(self._less_flow(enthalpy, pressure))

    def _less_flow(self, enthalpy: float, pressure: float | None) -> float:
        return self._enthalpy_less_flow(enthalpy, pressure, self.specific_volume)

    @property
    def _curve(self) -> HeatCurve:
        return _curve(
            self.melting_temperature, self.span, self.latent_heat, self.heat_of_solid, self.heat_of_liquid
        )


@lru_cache(maxsize=256)
def _curve(melts: float, span: float, latent: float, solid: float, liquid: float) -> HeatCurve:
    """Return u(T) and s(T) of a body that melts."""
    frozen = Piece(COLDEST, melts, melts, 0.0, 0.0, solid)
    if span == 0.0:
        return HeatCurve((frozen, Piece(melts, HOTTEST, melts, latent, latent / melts, liquid)))
    mushy = Piece(melts, melts + span, melts, 0.0, 0.0, latent / span + solid, (liquid - solid) / span)
    end = melts + span
    melted = Piece(end, HOTTEST, end, mushy.energy_at(end), mushy.entropy_at(end), liquid)
    return HeatCurve((frozen, mushy, melted))

"""Brines, glycols and heat transfer liquids: ρ(T), c(T) of published correlations, at a mass fraction of the solute.

Their volume hardly depends on pressure, so temperature fixes u and s as in every incompressible model. Names are
generic: what a maker sells under one of them may differ, and the uncertainty says by how much.
"""

from __future__ import annotations

import math
from collections.abc import Callable, Mapping
from dataclasses import dataclass
from functools import cached_property, lru_cache
from typing import ClassVar, Final, NamedTuple

from checker.outcomes import NotEvaluable
from checker.substances.condensed import Condensed
from checker.substances.interface import ModelUncertainty, PropertyState, Substance, ValidRange
from checker.substances.library_solution import LiquidPoint, SolutionLibrary, solution_library
from checker.substances.names import fold, table_rows
from checker.substances.search import bracketed_root

_SOURCES: Final = {
    "Melinder": "Melinder, Properties of Secondary Working Fluids, IIR 2010",
    "Patek": "Patek, Klomfar, Int. J. Refrig. 29, 2006, 566",
    "Sharqawy": "Sharqawy, Lienhard, Zubair, Desalin. Water Treat. 16, 2010, 354",
    "makers": "data of one maker; another grade of the same name may differ",
    "nitrates": "60 % NaNO3 and 40 % KNO3 by mass, Zavoico, SAND2001-2100",
    "sodium": "Fink, Leibowitz, ANL/RE-95/2",
}
_HOTTEST: Final = {"LiqNa": 1156.0}
"""[K] Where the library's range ends later than the use: sodium boils at 1 atm."""
_SLACK: Final = 1e-6  # K
_NEAREST: Final = 3
_REPRODUCED: Final = 1e-9


class Solution(NamedTuple):
    """A row of the table; ``fractions`` is the range of the mass fraction, None for a liquid that is no solution."""

    code: str
    name: str
    fractions: tuple[float, float] | None
    uncertainty: ModelUncertainty


@lru_cache(maxsize=1)
def _table() -> dict[str, Solution]:
    """Return folded name → row."""
    table: dict[str, Solution] = {}
    for code, name, least, most, density, caloric, source, synonyms in table_rows("solutions.txt"):
        fractions = (float(least), float(most)) if least else None
        words = f"{_SOURCES[source]}; figures are an assumption"
        row = Solution(code, name, fractions, ModelUncertainty(float(density), float(caloric), words))
        for spelling in (name, *synonyms.split(";")):
            table.setdefault(fold(spelling), row)
    return table


def all_solutions() -> tuple[Solution, ...]:
    """Return every row of the table, in its order."""
    return tuple(dict.fromkeys(_table().values()))


def is_solution(substance: str) -> bool:
    """Say whether a substance is a brine, a glycol or a heat transfer liquid of the table."""
    return fold(substance) in _table()


def nearest_solutions(name: str) -> tuple[str, ...]:
    """Return up to three names of the table that a name is a part of, or that look most like it."""
    from difflib import get_close_matches

    folded = fold(name)
    parts = [key for key in _table() if folded and folded in key]
    close = get_close_matches(folded, list(_table()), n=_NEAREST, cutoff=0.7)
    return tuple(dict.fromkeys(_table()[key].name for key in (*parts, *close)))[:_NEAREST]


def make_solution(substance: str, constants: Mapping[str, float]) -> Substance:
    """Return a liquid of the table by its mass fraction.

    Parameters
    ----------
    substance : str
        Its name.
    constants : mapping
        ``mass_fraction``: mass of the solute per mass of the solution, for those that are one. [1]

    Raises
    ------
    NotEvaluable
        The mass fraction is missing, outside the data, or stated for a liquid that is no solution.
    """
    if not is_solution(substance):
        raise NotEvaluable(f"no solution is called {substance[:40]!r}", "not-supported")
    row, fraction = _table()[fold(substance)], constants.get("mass_fraction")
    if row.fractions is None:
        if fraction is not None:
            raise NotEvaluable(f"{row.name} is no solution and has no mass fraction", "not-supported")
        return LiquidByCurve(row, None)
    if fraction is None:
        raise NotEvaluable(f"{row.name} needs its mass fraction (mass of the solute per mass)", "missing")
    least, most = row.fractions
    if not least <= fraction <= most:
        raise NotEvaluable(
            f"a mass fraction of {fraction:.4g} of {row.name} is outside the data, {least:.4g} to {most:.4g}",
            "outside-range",
        )
    return LiquidByCurve(row, float(fraction))


@dataclass(frozen=True)
class LiquidByCurve(Condensed):
    """A liquid by its curves ρ(T) and c(T); u = ∫c dT, s = ∫c/T dT, h = u + p v. Zero of u and s at 20 °C."""

    row: Solution
    fraction: float | None

    model: ClassVar[str] = "real fluid"
    molar_mass: ClassVar[float | None] = None

    @property
    def name(self) -> str:  # type: ignore[override]  # read only, as in every model
        """Name for the report."""
        return self.row.name

    @property
    def equation(self) -> str:
        """The data with their source."""
        part = "" if self.fraction is None else f", mass fraction {self.fraction:.4g}"
        source = self.row.uncertainty.source.partition(";")[0]
        return f"ρ(T) and c(T) of {self.row.name}{part} ({source})"

    @property
    def uncertainty(self) -> ModelUncertainty:
        """How far the data may be from the liquid."""
        return self.row.uncertainty

    @cached_property
    def valid_range(self) -> ValidRange:
        """From where it freezes, or the data begin, to where the data end."""
        low, high = self._library.limits(self.fraction)
        return ValidRange(low, min(high, _HOTTEST.get(self.row.code, high)), math.inf)

    @property
    def _library(self) -> SolutionLibrary:
        return solution_library(self.row.code)

    def _point(self, temperature: float) -> LiquidPoint:
        span = self.valid_range
        low, high = span.temperature_min, span.temperature_max
        if not low - _SLACK <= temperature <= high + _SLACK:
            edge = (
                f"freezes, or its data begin, at {low:.6g} K"
                if temperature < low
                else f"has data to {high:.6g} K"
            )
            raise NotEvaluable(f"{temperature:.6g} K: {self.row.name} {edge}", "outside-range")
        inside = min(max(temperature, low), high)
        return self._library.point(inside, self.fraction)

    def _energy(self, temperature: float) -> float:
        return self._point(temperature).energy

    def _entropy(self, temperature: float) -> float:
        return self._point(temperature).entropy

    def _volume(self, temperature: float) -> float:
        return 1.0 / self._point(temperature).density

    def _of_energy(self, energy: float) -> float:
        return self._inverse(self._energy, energy, "internal energy")

    def _of_entropy(self, entropy: float) -> float:
        return self._inverse(self._entropy, entropy, "entropy")

    def _of_enthalpy(self, enthalpy: float, pressure: float | None) -> float:
        return self._inverse(
            lambda t: self._energy(t) + (pressure or 0.0) * self._volume(t),
            enthalpy if pressure is not None else self._enthalpy_less_flow(enthalpy, pressure, None),
            "enthalpy",
        )

    def _inverse(self, curve: Callable[[float], float], value: float, name: str) -> float:
        """Return the temperature [K] at which a property that rises with it takes a value."""
        span = self.valid_range
        low, high = span.temperature_min, span.temperature_max
        width = curve(high) - curve(low)
        below, above = (curve(low) - value) / width, (curve(high) - value) / width
        if below > _REPRODUCED or above < -_REPRODUCED:
            raise NotEvaluable(
                f"{self.row.name} has this {name} nowhere between {low:.6g} K and {high:.6g} K",
                "outside-range",
            )
        if below >= 0.0:
            return low
        if above <= 0.0:
            return high
        return bracketed_root(lambda t: (curve(t) - value) / width, (low, below), (high, above))

    def _at(self, temperature: float, pressure: float | None) -> PropertyState:
        if pressure is not None and self._library.boils(temperature, pressure, self.fraction):
            raise NotEvaluable(
                f"{self.row.name} boils at {temperature:.6g} K and {pressure:.6g} Pa", "outside-range"
            )
        return super()._at(temperature, pressure)

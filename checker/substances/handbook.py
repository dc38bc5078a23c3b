"""Liquids and solids whose specific heat and density come from the handbook table."""

from __future__ import annotations

import math
from dataclasses import dataclass

from checker.substances.constant_heat import ConstantHeatCondensed
from checker.substances.interface import ModelUncertainty, ValidRange
from checker.substances.materials import Material


@dataclass(frozen=True, kw_only=True)
class HandbookMaterial(ConstantHeatCondensed):
    """A material of the table with the specific heat of the table, and its density unless one is stated."""

    material: Material
    density_stated: bool

    @property
    def valid_range(self) -> ValidRange:
        """Temperatures for which the table's constant holds; outside, it is calculated with all the same."""
        return ValidRange(self.material.temperature_min, self.material.temperature_max, math.inf)

    @property
    def uncertainty(self) -> ModelUncertainty:
        """Uncertainty of the table's values: the spread between grades and sources."""
        density = 0.0 if self.density_stated else self.material.density_spread
        return ModelUncertainty(density, self.material.heat_spread, f"handbook table: {self.material.source}")

    @property
    def equation(self) -> str:
        """The equation for the report, with the source of its constants."""
        row = self.material
        span = f"{row.temperature_min - 273.15:.3g} °C to {row.temperature_max - 273.15:.3g} °C"
        return f"{super().equation}; {row.name} of the handbook table, {span} ({row.source})"


def handbook_material(substance: str, material: Material, density: float | None) -> HandbookMaterial:
    """Return a body of a material of the table; a stated density [kg/m³] counts instead of the table's."""
    value = material.density if density is None else density
    return HandbookMaterial(
        substance,
        material.specific_heat,
        None if value is None else 1.0 / value,
        material=material,
        density_stated=density is not None,
    )

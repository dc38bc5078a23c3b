"""Units that are accepted for each kind of quantity, with an example: for messages and the schema."""

from __future__ import annotations

from typing import Final

from checker.quantity import dimensions as dim
from checker.quantity.dimensions import Dimension
from checker.quantity.types import Scale
from checker.vocabulary import Term

_BY_DIMENSION: Final[dict[Dimension, tuple[str, str]]] = {
    dim.NONE: ("a plain number or %", "0.92"),
    dim.LENGTH: ("m, mm, ft", "0.35 m"),
    dim.AREA: ("m², cm², in²", "0.012 m²"),
    dim.VOLUME: ("m³, L, ft³", "50 L"),
    dim.MASS: ("kg, g, t, lb", "8.63 kg"),
    dim.TIME: ("s, min, h", "75 min"),
    dim.AMOUNT: ("mol, kmol, lbmol", "1.2 kmol"),
    dim.VELOCITY: ("m/s, km/h, ft/s", "3.5 m/s"),
    dim.PRESSURE: ("bar, bar(g), kPa, MPa, psia, psig", "8.0 bar(g)"),
    dim.STIFFNESS: ("kN/m, N/mm", "120 kN/m"),
    dim.ENERGY: ("kJ, MJ, kWh, BTU", "301 kJ"),
    dim.POWER: ("W, kW, BTU/h", "6.0 kW"),
    dim.ENTROPY: ("J/K, kJ/K", "0.969 kJ/K"),
    dim.SPECIFIC_ENERGY: ("kJ/kg, J/kg, BTU/lb", "2437.2 kJ/kg"),
    dim.SPECIFIC_ENTROPY: ("kJ/(kg·K), J/(kg·K), BTU/(lb·°R)", "0.480 kJ/(kg·K)"),
    dim.SPECIFIC_VOLUME: ("m³/kg, L/kg, ft³/lb", "0.00579 m³/kg"),
    dim.DENSITY: ("kg/m³, kg/L, lb/ft³", "865 kg/m³"),
    dim.MOLAR_MASS: ("g/mol, kg/kmol", "28.01 g/mol"),
    dim.HEAT_TRANSFER_COEFFICIENT: ("W/(m²·K)", "25 W/(m²·K)"),
    dim.THERMAL_CONDUCTIVITY: ("W/(m·K)", "45 W/(m·K)"),
}
_DIFFERENCE: Final = ("K as a difference", "12.5 K")
_TEMPERATURE: Final = ("°C, K, °F, °R", "15 °C")


def _entry(term: Term) -> tuple[str, str]:
    """Return units and an example for a term."""
    if term.dimension == dim.TEMPERATURE:
        return _DIFFERENCE if term.scale is Scale.TEMPERATURE_DIFFERENCE else _TEMPERATURE
    return _BY_DIMENSION.get(term.dimension, (term.unit, f"1 {term.unit}"))


def units_of(term: Term) -> str:
    """Return the units that a term is usually stated in, for a message."""
    return _entry(term)[0]


def example_of(term: Term) -> str:
    """Return a text that is accepted for a term."""
    return _entry(term)[1]

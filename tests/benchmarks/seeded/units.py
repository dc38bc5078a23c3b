"""Units as people write them: text, size in SI and zero; numbers as decimal text."""

from __future__ import annotations

import math
from dataclasses import dataclass
from decimal import Decimal
from typing import Final


@dataclass(frozen=True)
class Unit:
    """SI value = number·size + zero."""

    text: str
    size: float
    zero: float = 0.0


ATMOSPHERE: Final = "atmosphere"
CELSIUS: Final = Unit("°C", 1.0, 273.15)
FAHRENHEIT: Final = Unit("°F", 5.0 / 9.0, 459.67 * 5.0 / 9.0)
KELVIN: Final = Unit("K", 1.0)
BAR: Final = Unit("bar", 1e5)
KPA: Final = Unit("kPa", 1e3)
MPA: Final = Unit("MPa", 1e6)
PSIA: Final = Unit("psia", 6894.757293168361)
KG: Final = Unit("kg", 1.0)
LITRE: Final = Unit("L", 1e-3)
M3: Final = Unit("m³", 1.0)
J: Final = Unit("J", 1.0)
KJ: Final = Unit("kJ", 1e3)
MJ: Final = Unit("MJ", 1e6)
J_K: Final = Unit("J/K", 1.0)
KJ_K: Final = Unit("kJ/K", 1e3)
KJ_KG: Final = Unit("kJ/kg", 1e3)
KJ_KGK: Final = Unit("kJ/(kg·K)", 1e3)
M3_KG: Final = Unit("m³/kg", 1.0)
NONE: Final = Unit("", 1.0)
METRE: Final = Unit("m", 1.0)
SPEED: Final = Unit("m/s", 1.0)


def gauge(unit: Unit, atmosphere: float) -> Unit:
    """Return the gauge unit of a pressure unit at an atmospheric pressure. [Pa]"""
    return Unit(f"{unit.text}(g)", unit.size, atmosphere)


def text_of(value: float, unit: Unit, decimals: int) -> str:
    """Return number and unit with a number of decimals (negative: rounded to tens, hundreds …)."""
    return f"{number_text((value - unit.zero) / unit.size, decimals)} {unit.text}".strip()


def number_text(number: float, decimals: int) -> str:
    """Return a number with a number of decimals; no negative zero."""
    text = f"{round(number, decimals) + 0.0:.{max(decimals, 0)}f}"
    return text.removeprefix("-") if not text.strip("-0.") else text


def stated_value(text: str, unit: Unit) -> float:
    """Return what a text means. [SI]"""
    return float(Decimal(text.removesuffix(unit.text).strip())) * unit.size + unit.zero


def half_width(unit: Unit, decimals: int) -> float:
    """Return half a unit of the last place. [SI]"""
    return float(0.5 * 10.0**-decimals * unit.size)


def decimals_of(text: str, unit: Unit) -> int:
    """Return the decimals of a text."""
    return len(text.removesuffix(unit.text).strip().partition(".")[2])


def decimals_for(size: float, unit: Unit, digits: int) -> int:
    """Return the decimals that write something of a size [SI, a difference] with a number of digits."""
    number = abs(size) / unit.size
    return digits - 1 - math.floor(math.log10(number)) if number > 0.0 else digits


def fitting(size: float, units: tuple[Unit, ...]) -> Unit:
    """Return the unit in which a size reads as a number below 10 000, else the largest; units rise in size."""
    return next((unit for unit in units if abs(size) / unit.size < 1e4), units[-1])

"""Terms that several levels of a record share, and how the usual kinds of term are made."""

from __future__ import annotations

from typing import Final

from checker.quantity import dimensions as dim
from checker.quantity.types import Scale
from checker.term import Allowance, Term


def energy(name: str, symbol: str, meaning: str, theme: str = "energy", work_sign: bool = False) -> Term:
    """Return a term for an energy of a process. [J]"""
    return Term(
        name, symbol, dim.ENERGY, "kJ", meaning, allowance=Allowance.ENERGY, theme=theme, work_sign=work_sign
    )


def entropy(name: str, symbol: str, meaning: str) -> Term:
    """Return a term for an entropy of a process. [J/K]"""
    return Term(name, symbol, dim.ENTROPY, "kJ/K", meaning, allowance=Allowance.ENTROPY, theme="entropy")


def heat_capacity(name: str, symbol: str, meaning: str) -> Term:
    """Return a term for a specific heat capacity. [J/(kg·K)]"""
    return Term(name, symbol, dim.SPECIFIC_ENTROPY, "kJ/(kg·K)", meaning, positive=True)


TEMPERATURE: Final = Term(
    "temperature",
    "T",
    dim.TEMPERATURE,
    "°C",
    "absolute temperature",
    Scale.ABSOLUTE_TEMPERATURE,
    Allowance.TEMPERATURE,
)
PRESSURE: Final = Term(
    "pressure",
    "p",
    dim.PRESSURE,
    "bar",
    "pressure; gauge or absolute by its unit",
    Scale.PRESSURE,
    positive=True,
)
MASS: Final = Term("mass", "m", dim.MASS, "kg", "mass", positive=True)
VOLUME: Final = Term("volume", "V", dim.VOLUME, "m³", "volume", positive=True)
DENSITY: Final = Term("density", "ρ", dim.DENSITY, "kg/m³", "mass per volume", positive=True)
DURATION: Final = Term(
    "duration", "t", dim.TIME, "s", "how long the process takes", theme="bookkeeping", positive=True
)
MEAN_POWER: Final = Term(
    "mean_power", "P", dim.POWER, "kW", "energy transferred per duration", theme="energy"
)

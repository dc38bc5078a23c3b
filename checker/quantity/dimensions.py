"""Dimensions as exponents of length, mass, time, temperature and amount of substance."""

from __future__ import annotations

from typing import Final

Dimension = tuple[int, int, int, int, int]
"""Exponents of (length, mass, time, temperature, amount)."""

NONE: Final[Dimension] = (0, 0, 0, 0, 0)
LENGTH: Final[Dimension] = (1, 0, 0, 0, 0)
AREA: Final[Dimension] = (2, 0, 0, 0, 0)
VOLUME: Final[Dimension] = (3, 0, 0, 0, 0)
MASS: Final[Dimension] = (0, 1, 0, 0, 0)
TIME: Final[Dimension] = (0, 0, 1, 0, 0)
TEMPERATURE: Final[Dimension] = (0, 0, 0, 1, 0)
AMOUNT: Final[Dimension] = (0, 0, 0, 0, 1)
VELOCITY: Final[Dimension] = (1, 0, -1, 0, 0)
PRESSURE: Final[Dimension] = (-1, 1, -2, 0, 0)
STIFFNESS: Final[Dimension] = (0, 1, -2, 0, 0)
ENERGY: Final[Dimension] = (2, 1, -2, 0, 0)
POWER: Final[Dimension] = (2, 1, -3, 0, 0)
ENTROPY: Final[Dimension] = (2, 1, -2, -1, 0)
ENTROPY_RATE: Final[Dimension] = (2, 1, -3, -1, 0)
SPECIFIC_ENERGY: Final[Dimension] = (2, 0, -2, 0, 0)
SPECIFIC_ENTROPY: Final[Dimension] = (2, 0, -2, -1, 0)
MOLAR_ENERGY: Final[Dimension] = (2, 1, -2, 0, -1)
MOLAR_ENTROPY: Final[Dimension] = (2, 1, -2, -1, -1)
SPECIFIC_VOLUME: Final[Dimension] = (3, -1, 0, 0, 0)
MOLAR_VOLUME: Final[Dimension] = (3, 0, 0, 0, -1)
DENSITY: Final[Dimension] = (-3, 1, 0, 0, 0)
MOLAR_MASS: Final[Dimension] = (0, 1, 0, 0, -1)
HEAT_TRANSFER_COEFFICIENT: Final[Dimension] = (0, 1, -3, -1, 0)
THERMAL_CONDUCTIVITY: Final[Dimension] = (1, 1, -3, -1, 0)

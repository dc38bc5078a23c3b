"""The seven properties that can fix a state, and the reading of two of them."""

from __future__ import annotations

import math
from collections.abc import Mapping
from typing import Final, NamedTuple

from checker.outcomes import NotEvaluable

MOLAR_GAS_CONSTANT: Final = 8.314462618
"""[J/(mol·K)] CODATA 2018, exact by the SI."""

TEMPERATURE: Final = "temperature"
PRESSURE: Final = "pressure"
VOLUME: Final = "specific_volume"
ENERGY: Final = "specific_internal_energy"
ENTHALPY: Final = "specific_enthalpy"
ENTROPY: Final = "specific_entropy"
QUALITY: Final = "quality"
MELTED: Final = "melted_fraction"
"""Fixes a state of a body that melts, and of no other."""

ORDER: Final = (TEMPERATURE, PRESSURE, VOLUME, ENERGY, ENTHALPY, ENTROPY, QUALITY)
INDEX: Final = {name: index for index, name in enumerate(ORDER)}
UNITS: Final = {
    TEMPERATURE: "K",
    PRESSURE: "Pa",
    VOLUME: "m³/kg",
    ENERGY: "J/kg",
    ENTHALPY: "J/kg",
    ENTROPY: "J/(kg·K)",
    QUALITY: "",
}
Pair = tuple[str, str]


class Point(NamedTuple):
    """A state as a library gives it; the fields stand in the order of ``ORDER``. Quality is None in one phase."""

    temperature: float
    pressure: float
    specific_volume: float
    specific_internal_energy: float
    specific_enthalpy: float
    specific_entropy: float
    quality: float | None


class Known(NamedTuple):
    """Two properties in the order of ``ORDER``."""

    pair: Pair
    first: float
    second: float

    def value(self, name: str) -> float:
        """Return the value of one of the two."""
        return self.first if name == self.pair[0] else self.second

    def other(self, name: str) -> str:
        """Return the name of the other one."""
        return self.pair[1] if name == self.pair[0] else self.pair[0]

    def __str__(self) -> str:
        return f"{in_words(self.pair[0], self.first)} and {in_words(self.pair[1], self.second)}"


def in_words(name: str, value: float) -> str:
    """Return a property for a sentence, such as ``temperature 300 K``."""
    return f"{name.replace('_', ' ')} {value:.6g} {UNITS[name]}".rstrip()


def checked_value(name: object, value: object) -> float:
    """Return a property as a float.

    Raises
    ------
    NotEvaluable
        The name is no property, or the value is no finite number or physically impossible.
    """
    if not isinstance(name, str) or (name not in INDEX and name != MELTED):
        raise NotEvaluable(f"{str(name)[:40]!r} is not a property that fixes a state", "missing")
    if isinstance(value, bool) or not isinstance(value, int | float):
        raise NotEvaluable(f"the {name.replace('_', ' ')} is not a number", "missing")
    try:
        number = float(value)
    except OverflowError:
        number = math.inf
    if not math.isfinite(number):
        raise NotEvaluable(f"the {name.replace('_', ' ')} is not a finite number")
    if name in (TEMPERATURE, PRESSURE, VOLUME) and number <= 0.0:
        raise NotEvaluable(f"{in_words(name, number)}: absolute values are positive")
    if name in (QUALITY, MELTED) and not 0.0 <= number <= 1.0:
        raise NotEvaluable(f"{name.replace('_', ' ')} {number:.6g} is not between 0 and 1")
    return number


def read_known(known: Mapping[str, float]) -> Known:
    """Return the two known properties, checked and in order.

    Raises
    ------
    NotEvaluable
        There are not exactly two, or one of them is no usable number.
    """
    if len(known) != 2:
        raise NotEvaluable(f"two independent properties fix a state, not {len(known)}", "missing")
    if MELTED in known:
        raise NotEvaluable(
            "a melted fraction fixes no state of this model: it does not melt", "not-supported"
        )
    values = {name: checked_value(name, value) for name, value in known.items()}
    first, second = sorted(values, key=INDEX.__getitem__)
    return Known((first, second), values[first], values[second])


def positive_constant(name: str, value: float) -> float:
    """Return a constant of a model. Raises NotEvaluable where it is not a positive number."""
    if not (math.isfinite(value) and value > 0.0):
        raise NotEvaluable(f"the {name.replace('_', ' ')} must be positive, not {value:.6g}", "no-solution")
    return float(value)

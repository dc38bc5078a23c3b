"""What a field makes of a unit: the kind of a temperature, an ambiguous denominator, a missing unit."""

from __future__ import annotations

from typing import Final

from checker.quantity import dimensions as dim
from checker.quantity.allowlist import TemperatureKind
from checker.quantity.dimensions import Dimension
from checker.quantity.reading import MASS_PER_AREA, Reading, as_pressure
from checker.quantity.refused import AMBIGUOUS
from checker.quantity.types import QuantityError, Scale

_TEMPERATURE_KIND: Final = "temperature-kind-wrong"

_EXAMPLES: Final[dict[Dimension, str]] = {
    dim.LENGTH: "m", dim.AREA: "m²", dim.VOLUME: "m³", dim.MASS: "kg", dim.TIME: "s", dim.TEMPERATURE: "°C",
    dim.AMOUNT: "mol", dim.VELOCITY: "m/s", dim.PRESSURE: "bar", dim.STIFFNESS: "kN/m", dim.ENERGY: "kJ",
    dim.POWER: "kW", dim.ENTROPY: "kJ/K", dim.SPECIFIC_ENERGY: "kJ/kg", dim.SPECIFIC_ENTROPY: "kJ/(kg·K)",
    dim.SPECIFIC_VOLUME: "m³/kg", dim.DENSITY: "kg/m³", dim.MOLAR_MASS: "g/mol",
    dim.HEAT_TRANSFER_COEFFICIENT: "W/(m²·K)", dim.THERMAL_CONDUCTIVITY: "W/(m·K)",
}  # fmt: skip


def require_unit(number: str, expected: Dimension | None) -> None:
    """Raise where a number stands without the unit that its field needs.

    Raises
    ------
    QuantityError
        ``quantity-unreadable``, with an example.
    """
    if expected is None or expected == dim.NONE:
        return
    example = f", for example {number} {_EXAMPLES[expected]}" if expected in _EXAMPLES else ""
    raise QuantityError("quantity-unreadable", f"the unit is missing{example}", len(number))


def fit(reading: Reading, expected: Dimension | None, scale: Scale) -> Reading:
    """Return a reading as its field understands it. A wrong dimension is left to the caller.

    Raises
    ------
    QuantityError
        ``unit-ambiguous`` or ``temperature-kind-wrong``; its suggestion is a unit.
    """
    if reading.settled:
        return reading
    unit = reading.unit
    if reading.in_doubt and unit.dimension != expected:
        message = f"{unit.text} could be {reading.in_brackets} or {reading.strictly}: write the brackets"
        raise QuantityError(AMBIGUOUS, message, 0, reading.in_brackets)
    if scale is Scale.ABSOLUTE_TEMPERATURE and reading.temperature is TemperatureKind.DIFFERENCE:
        message = f"{unit.text} is a temperature difference, and a temperature belongs here: K, °C, °F or °R"
        raise QuantityError(_TEMPERATURE_KIND, message, 0, unit.text.lstrip("Δ∆"))
    if scale is Scale.TEMPERATURE_DIFFERENCE and reading.temperature is TemperatureKind.POINT:
        degree = "Δ°C" if unit.factor == 1.0 else "Δ°F"
        message = f"{unit.text} is a temperature, and a difference belongs here: {degree}, K or °R"
        raise QuantityError(_TEMPERATURE_KIND, message, 0, degree)
    if unit.dimension == MASS_PER_AREA and expected == dim.PRESSURE:
        return as_pressure(reading)
    return reading

"""Quantity texts: a number of our grammar, an optional ±, and a unit of the allow-list."""

from __future__ import annotations

from typing import Final

from checker.quantity.dimensions import PRESSURE, TEMPERATURE, Dimension
from checker.quantity.fields import fit, require_unit
from checker.quantity.hints import explain
from checker.quantity.number import read_number
from checker.quantity.plus_minus import Parts, half_width_of, split, unit_between
from checker.quantity.reading import Reading, read_unit
from checker.quantity.refused import UNKNOWN
from checker.quantity.types import Quantity, QuantityError, Scale, Unit

MAX_LENGTH: Final = 128

_UNREADABLE: Final = "quantity-unreadable"
_WITHOUT_ATMOSPHERE: Final = "gauge-without-atmosphere"
_BELOW_ZERO: Final = "below-absolute-zero"
_ROUNDING: Final = 1e-9  # K: −459.67 °F is absolute zero but for the last bit
_LONGEST_CHAIN: Final = 3  # a suggestion may itself need one: 25 C → 25 °C → 25 Δ°C

_IMPLIED: Final[dict[Scale, Dimension | None]] = {
    Scale.PLAIN: None,
    Scale.ABSOLUTE_TEMPERATURE: TEMPERATURE,
    Scale.TEMPERATURE_DIFFERENCE: TEMPERATURE,
    Scale.PRESSURE: PRESSURE,
}


def parse_quantity(
    text: str,
    *,
    expected: Dimension | None = None,
    scale: Scale = Scale.PLAIN,
    atmosphere: float | None = None,
) -> Quantity:
    """Return a quantity text as a quantity.

    Parameters
    ----------
    text : str
        Such as ``312.0 kJ``, ``8 bar(g)``, ``120 ± 2 kJ``.
    expected : Dimension, optional
        The dimension of the field. It decides between two readings of an ambiguous notation and whether a
        number may stand without a unit; a readable quantity of another dimension is returned as it is.
    scale : Scale
        Whether the field is a temperature, a temperature difference or a pressure.
    atmosphere : float, optional
        Absolute pressure of the surroundings [Pa], added to gauge pressures.

    Returns
    -------
    Quantity
        In SI; pressures and temperatures absolute.

    Raises
    ------
    QuantityError
        The text cannot be read, or not in one way only. Its suggestion, if any, can.
    """
    if expected is None:
        expected = _IMPLIED[scale]
    try:
        return _read(text, expected, scale, atmosphere)
    except QuantityError as error:
        shown = (explain(text) or error) if error.kind == UNKNOWN else error
        needed = expected if shown.kind == UNKNOWN else None  # a guess at a name is right in its field only
        suggestion = _vetted(shown.suggestion, expected, scale, atmosphere, needed)
        raise QuantityError(shown.kind, shown.message, shown.offset, suggestion) from None


def _vetted(
    suggestion: str,
    expected: Dimension | None,
    scale: Scale,
    atmosphere: float | None,
    needed: Dimension | None,
) -> str:
    """Return a suggestion that is accepted, and of the dimension ``needed``, or an empty text."""
    for _ in range(_LONGEST_CHAIN):
        if not suggestion:
            break
        try:
            quantity = _read(suggestion, expected, scale, atmosphere)
        except QuantityError as error:
            if error.kind == _WITHOUT_ATMOSPHERE:
                return suggestion
            suggestion = error.suggestion
        else:
            return suggestion if needed in (None, quantity.dimension) else ""
    return ""


def _read(text: str, expected: Dimension | None, scale: Scale, atmosphere: float | None) -> Quantity:
    """Read a text; a suggestion of its errors may not be readable itself."""
    parts = _parts(text)
    number, unit_text = parts.number, parts.unit
    if not unit_text:
        require_unit(number.text, expected)
    try:
        reading = fit(read_unit(unit_text), expected, scale)
    except QuantityError as error:
        raise _moved(error, text, unit_text, parts.unit_at) from None
    unit = reading.unit
    added = _atmosphere(parts, atmosphere) if unit.gauge else 0.0
    value = number.value * unit.factor + unit.offset + added
    if value < 0.0 and _is_temperature(unit, scale):
        value = _above_absolute_zero(value, parts)
    return Quantity(
        text=text,
        number_text=number.text,
        unit=unit,
        value=value,
        half_width=number.half_width * unit.factor,
        open_half_width=number.open_half_width * unit.factor,
        plus_minus=None if parts.half is None else _plus_minus(text, parts, reading),
        atmosphere=added,
        notes=(*reading.notes, *_note_on_percentage(parts)),
    )


def _parts(text: str) -> Parts:
    """Return the parts of a text."""
    if len(text) > MAX_LENGTH:
        raise QuantityError(_UNREADABLE, f"a quantity has at most {MAX_LENGTH} characters")
    start = len(text) - len(text.lstrip(" ")) if text[:1] == " " else 0
    if "±" in text or "+/-" in text:
        parts = split(text, start)
    else:
        number = read_number(text, start)
        parts = None if number is None else Parts(number, *unit_between(text, number.end, len(text)))
    if parts is not None:
        return parts
    raise explain(text) or QuantityError(_UNREADABLE, "a quantity begins with its number: 312.0 kJ")


def _atmosphere(parts: Parts, atmosphere: float | None) -> float:
    """Return the pressure of the surroundings [Pa], which a gauge pressure needs."""
    if atmosphere is not None:
        return atmosphere
    message = (
        f"{parts.unit} is a gauge pressure: state the pressure of the surroundings, or the absolute pressure"
    )
    raise QuantityError(_WITHOUT_ATMOSPHERE, message, parts.unit_at)


def _is_temperature(unit: Unit, scale: Scale) -> bool:
    """Whether a value is a temperature and no difference."""
    return unit.dimension == TEMPERATURE and (unit.offset != 0.0 or scale is Scale.ABSOLUTE_TEMPERATURE)


def _plus_minus(text: str, parts: Parts, reading: Reading) -> float | None:
    """Return the stated ± in SI."""
    of_half = None
    if parts.half_unit:
        try:
            of_half = read_unit(parts.half_unit)
        except QuantityError as error:
            raise _moved(error, text, parts.half_unit, parts.half_unit_at) from None
    return half_width_of(parts, reading, of_half)


def _note_on_percentage(parts: Parts) -> tuple[str, ...]:
    """Return how a fraction with a ± before the percent sign was read: 0.5 ± 5 % could be 0.5, give or take 5 %."""
    if parts.half is None or parts.half_unit or parts.unit != "%" or abs(parts.number.value) > 1.0:
        return ()
    numbers = f"{parts.number.text} ± {parts.half.text}"
    return (f"{numbers} % read as ({numbers}) %; a fraction of one is written without %",)


def _moved(error: QuantityError, text: str, unit: str, at: int) -> QuantityError:
    """Return the error of a unit text as one of the whole text."""
    suggestion = text[:at] + error.suggestion + text[at + len(unit) :] if error.suggestion else ""
    return QuantityError(error.kind, error.message, at + error.offset, suggestion)


def _above_absolute_zero(value: float, parts: Parts) -> float:
    """Return zero where only rounding makes a temperature [K] negative."""
    if value > -_ROUNDING:
        return 0.0
    message = f"{parts.number.text} {parts.unit} is below absolute zero, by {-value:.6g} K"
    raise QuantityError(_BELOW_ZERO, message)

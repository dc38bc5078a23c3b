"""What it means that a quantity has the unit of another kind of quantity."""

from __future__ import annotations

from dataclasses import dataclass, replace
from typing import Final

from checker.package.examples import units_of
from checker.package.nearest import shortened
from checker.quantity import dimensions as dim
from checker.quantity.dimensions import Dimension
from checker.quantity.types import Quantity
from checker.vocabulary import Term

_EXTENSIVE: Final = (dim.ENERGY, dim.ENTROPY, dim.VOLUME)
_SPECIFIC: Final = (dim.SPECIFIC_ENERGY, dim.SPECIFIC_ENTROPY, dim.SPECIFIC_VOLUME)
_MOLAR: Final = (dim.MOLAR_ENERGY, dim.MOLAR_ENTROPY, dim.MOLAR_VOLUME)
_TIMED: Final = (dim.ENERGY, dim.ENTROPY, dim.SPECIFIC_ENERGY, dim.SPECIFIC_ENTROPY)
"""Quantities of which a rate is something that people write in their place."""

_WORDS: Final[dict[str, tuple[str, str]]] = {
    "rate-for-total": (
        "`{text}` is a rate ({unit}), and {name} is a total.",
        "State the total (in {units}), or give the `duration` under `inputs`.",
    ),
    "specific-for-total": (
        "`{text}` is per unit {per} ({unit}), and {name} is that of the whole body.",
        "Multiply by the {per} and state the total (in {units}).",
    ),
    "total-for-specific": (
        "`{text}` is a total ({unit}), and {name} is per unit mass.",
        "Divide by the mass and state it per kilogram (in {units}).",
    ),
    "dimension-wrong": (
        "`{text}` has the unit of another kind of quantity ({unit}); {name} is stated in {units}.",
        "Correct the unit, or move the value to the quantity that it is.",
    ),
}
"""Kind → message and suggestion."""


@dataclass(frozen=True, slots=True)
class WrongUnit:
    """Kind of problem, message and what would be right."""

    kind: str
    message: str
    suggestion: str


def is_rate_of(got: Dimension, expected: Dimension) -> bool:
    """Whether a dimension is that of an energy or entropy per time where the total is expected."""
    return expected in _TIMED and got == _per_time(expected)


def _per_time(dimension: Dimension) -> Dimension:
    """Return the dimension of a rate."""
    length, mass, time, temperature, amount = dimension
    return (length, mass, time - 1, temperature, amount)


def as_total(rate: Quantity, duration: Quantity) -> Quantity:
    """Return a rate over a duration [s] as the total that it makes; its text stays.

    The unit keeps its name and takes the duration into its factor, so that a recomputed total is shown in the
    unit of the originator: as the mean rate. Uncertainties of rate and duration add linearly.
    """
    length, mass, time, temperature, amount = rate.dimension
    seconds = duration.value
    unit = replace(
        rate.unit,
        factor=rate.unit.factor * seconds,
        dimension=(length, mass, time + 1, temperature, amount),
    )
    moved = (rate.plus_minus or 0.0) * seconds + abs(rate.value) * (duration.plus_minus or 0.0)
    return replace(
        rate,
        unit=unit,
        value=rate.value * seconds,
        half_width=rate.half_width * seconds,
        open_half_width=rate.open_half_width * seconds,
        plus_minus=None if rate.plus_minus is None and duration.plus_minus is None else moved,
        notes=(*rate.notes, f"{rate.text} read as a total over the duration of {duration.text}"),
    )


def wrong_unit(quantity: Quantity, term: Term) -> WrongUnit | None:
    """Return what is wrong with the unit of a quantity at a term, or None."""
    got, expected = quantity.dimension, term.dimension
    if got == expected:
        return None
    kind = _kind_of(got, expected)
    message, suggestion = _WORDS[kind]
    words = {
        "text": shortened(quantity.text, 40),
        "unit": quantity.unit.text or "no unit",
        "name": term.name,
        "units": units_of(term),
        "per": "amount" if got in _MOLAR else "mass",
    }
    advice = _instead(got, expected) if kind == "dimension-wrong" else ""
    return WrongUnit(kind, message.format(**words), advice or suggestion.format(**words))


def _kind_of(got: Dimension, expected: Dimension) -> str:
    """Return the kind of problem that one dimension in the place of another is."""
    if is_rate_of(got, expected):
        return "rate-for-total"
    if expected in _EXTENSIVE:
        at = _EXTENSIVE.index(expected)
        return "specific-for-total" if got in (_SPECIFIC[at], _MOLAR[at]) else "dimension-wrong"
    if expected in _SPECIFIC and got == _EXTENSIVE[_SPECIFIC.index(expected)]:
        return "total-for-specific"
    return "dimension-wrong"


def _instead(got: Dimension, expected: Dimension) -> str:
    """Return what to do about a few mix-ups of neighbouring quantities."""
    if got == dim.AMOUNT and expected in (dim.MASS, dim.VOLUME):
        return "Moles, and gas volumes at reference conditions, are an amount of substance: state it as `amount`."
    if expected == dim.AMOUNT and got == dim.MASS:
        return "State it as `mass`."
    if expected in _SPECIFIC and got == _MOLAR[_SPECIFIC.index(expected)]:
        return "Divide by the molar mass."
    if (got, expected) in ((dim.DENSITY, dim.SPECIFIC_VOLUME), (dim.SPECIFIC_VOLUME, dim.DENSITY)):
        return f"State it as `{'density' if got == dim.DENSITY else 'specific_volume'}`."
    return ""

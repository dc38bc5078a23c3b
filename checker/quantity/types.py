"""The quantity: what was written, and what it is in SI."""

from __future__ import annotations

from dataclasses import dataclass
from enum import StrEnum

from checker.quantity.dimensions import Dimension


class Scale(StrEnum):
    """How a number with a unit is to be understood."""

    PLAIN = "plain"
    ABSOLUTE_TEMPERATURE = "absolute temperature"
    TEMPERATURE_DIFFERENCE = "temperature difference"
    PRESSURE = "pressure"


@dataclass(frozen=True, slots=True)
class Unit:
    """A unit as written: value in SI = number × factor + offset (+ atmosphere where ``gauge``)."""

    text: str
    factor: float
    dimension: Dimension
    offset: float = 0.0
    gauge: bool = False


@dataclass(frozen=True, slots=True)
class Quantity:
    """A quantity of a package.

    Attributes
    ----------
    text : str
        As written, such as ``8 bar(g)``.
    number_text : str
        The number alone, such as ``8``.
    unit : Unit
        The unit as written.
    value : float
        In SI; pressures and temperatures absolute.
    half_width : float
        Half a unit of the last stated digit, in SI.
    open_half_width : float
        The same where zeros ending an integer without a point are not significant (never coarser than three
        significant digits); equals ``half_width`` where the question does not arise.
    plus_minus : float or None
        The stated ± in SI, if any.
    atmosphere : float
        What was added to a gauge pressure, in Pa; 0 otherwise.
    notes : tuple of str
        How an ambiguous notation was read, for the report.
    """

    text: str
    number_text: str
    unit: Unit
    value: float
    half_width: float
    open_half_width: float
    plus_minus: float | None = None
    atmosphere: float = 0.0
    notes: tuple[str, ...] = ()

    @property
    def dimension(self) -> Dimension:
        """The dimension of the unit."""
        return self.unit.dimension

    def number_of(self, value: float) -> float:
        """Return an SI value of this kind as a number in the stated unit (gauge for gauge)."""
        return (value - self.unit.offset - self.atmosphere) / self.unit.factor

    def difference_of(self, difference: float) -> float:
        """Return an SI difference as a number in the stated unit."""
        return difference / self.unit.factor


class QuantityError(ValueError):
    """A quantity text that cannot be read.

    Attributes
    ----------
    kind : str
        Slug of the rule that reports it: ``quantity-unreadable``, ``unit-unknown``, ``unit-ambiguous``,
        ``gauge-without-atmosphere``, ``reference-conditions-missing``, ``temperature-kind-wrong``,
        ``below-absolute-zero`` or ``dimension-wrong``.
    message : str
        What is wrong, and what would be right.
    offset : int
        Code points from the start of the text to the part that is meant.
    suggestion : str
        The nearest reading that would be accepted, or an empty text.
    """

    def __init__(self, kind: str, message: str, offset: int = 0, suggestion: str = "") -> None:
        super().__init__(message)
        self.kind = kind
        self.message = message
        self.offset = offset
        self.suggestion = suggestion

    def __reduce__(self) -> tuple[type[QuantityError], tuple[str, str, int, str]]:
        return (type(self), (self.kind, self.message, self.offset, self.suggestion))

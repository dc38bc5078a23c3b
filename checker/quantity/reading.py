"""From a unit text to SI: one reading per distinct text, cached.

Two things go beyond the product of names: a suffix that makes a whole pressure unit gauge or absolute
(``kgf/cm²(g)``, ``bar g``), and a volume at reference conditions, which is an amount of substance.
"""

from __future__ import annotations

import re
from collections.abc import Sequence
from dataclasses import dataclass, field, replace
from functools import lru_cache
from typing import Final

from checker.quantity import reference
from checker.quantity.allowlist import TemperatureKind
from checker.quantity.dimensions import NONE, PRESSURE, TEMPERATURE, Dimension
from checker.quantity.factors import Factor, read_factors
from checker.quantity.fold import fold_unit
from checker.quantity.refused import AMBIGUOUS, UNKNOWN
from checker.quantity.registry import si_factor
from checker.quantity.types import QuantityError, Unit

MAX_UNIT_LENGTH: Final = 64
MASS_PER_AREA: Final[Dimension] = (-2, 1, 0, 0, 0)
STANDARD_GRAVITY: Final = 9.80665  # m/s², exact: 3rd CGPM (1901)

_PERCENTAGES: Final = frozenset({"%", "‰"})
_SUFFIX: Final = r"g|gauge|a|abs|absolute"
_SUFFIXED: Final = re.compile(rf"(.+?)(?: ?\(({_SUFFIX})\)| ({_SUFFIX})|(?<=[²2])([ga]))")


@dataclass(frozen=True, slots=True)
class Reading:
    """A unit text as read.

    Attributes
    ----------
    unit : Unit
        The unit; where the text is in doubt, with everything after the slash in the denominator.
    notes : tuple of str
        How ambiguous notations were read.
    temperature : TemperatureKind
        Whether the unit is one of temperature, of a difference, or of either.
    in_brackets, strictly : str
        Both readings where the text is in doubt, else empty.
    settled : bool
        No field can understand it in another way.
    """

    unit: Unit
    notes: tuple[str, ...] = ()
    temperature: TemperatureKind = TemperatureKind.NONE
    in_brackets: str = ""
    strictly: str = ""
    settled: bool = field(init=False)

    def __post_init__(self) -> None:
        settled = (
            not self.in_brackets
            and self.temperature is TemperatureKind.NONE
            and self.unit.dimension != MASS_PER_AREA
        )
        object.__setattr__(self, "settled", settled)

    @property
    def in_doubt(self) -> bool:
        """Whether the text has two readings."""
        return bool(self.in_brackets)


@lru_cache(maxsize=1024)
def read_unit(text: str) -> Reading:
    """Return the reading of a unit text; an empty text is the unit one.

    Raises
    ------
    QuantityError
        With the offset, and a suggestion, inside the unit text.
    """
    if not text:
        return Reading(Unit("", 1.0, NONE))
    if len(text) > MAX_UNIT_LENGTH:
        raise QuantityError(UNKNOWN, f"a unit has at most {MAX_UNIT_LENGTH} characters")
    folded = fold_unit(text)
    volume = reference.VOLUME.search(folded)
    if volume is not None:
        return _amount(text, folded, volume)
    suffixed = _SUFFIXED.fullmatch(folded)
    if suffixed is not None and (reading := _suffixed(text, suffixed)) is not None:
        return reading
    return _product(text, read_factors(folded))


def _product(text: str, factors: Sequence[Factor]) -> Reading:
    """Return the reading of a product of names."""
    lone = len(factors) == 1 and factors[0].exponent == 1
    name = factors[0].name
    if not lone and any(factor.name.gauge for factor in factors):
        message = "a gauge pressure cannot be part of another unit: write the absolute one, such as bar"
        raise QuantityError(AMBIGUOUS, message)
    if not lone and any(factor.name.text in _PERCENTAGES for factor in factors):
        message = "a percentage stands alone: 95 %, or behind a ±: 5 bar ± 10 %"
        raise QuantityError(AMBIGUOUS, message)
    factor, dimension = si_factor((f.name.definition, f.exponent) for f in factors)
    unit = Unit(text, float(factor), dimension, float(name.zero) if lone else 0.0, lone and name.gauge)
    kind = TemperatureKind.DIFFERENCE if dimension == TEMPERATURE else TemperatureKind.NONE
    notes = tuple(dict.fromkeys(f.name.note for f in factors if f.name.note))
    reading = Reading(unit, notes, name.temperature if lone else kind)
    if not any(f.in_doubt for f in factors):
        return reading
    in_brackets, strictly = _written(factors, strict=False), _written(factors, strict=True)
    return replace(
        reading,
        notes=(*notes, f"{text} read as {in_brackets}"),
        in_brackets=in_brackets,
        strictly=strictly,
    )


def _suffixed(text: str, match: re.Match[str]) -> Reading | None:
    """Return the gauge or absolute form of a pressure unit, or None where the unit is no pressure."""
    base, suffix = match[1], match[2] or match[3] or match[4]
    try:
        reading = _product(text, read_factors(base))
    except QuantityError:
        return None
    if reading.unit.dimension == MASS_PER_AREA:
        reading = as_pressure(reading)
    if reading.unit.dimension != PRESSURE or reading.unit.gauge or reading.in_doubt:
        return None
    return replace(reading, unit=replace(reading.unit, gauge=suffix.startswith("g")))


def as_pressure(reading: Reading) -> Reading:
    """Return a mass per area as the pressure that it exerts: the trade's kg/cm² for kgf/cm²."""
    unit = reading.unit
    note = f"{unit.text} read as a force per area, with standard gravity"
    return replace(
        reading,
        unit=replace(unit, factor=unit.factor * STANDARD_GRAVITY, dimension=PRESSURE),
        notes=(*reading.notes, note),
    )


def _amount(text: str, folded: str, volume: re.Match[str]) -> Reading:
    """Return the reading of a gas volume at reference conditions."""
    factor, dimension = reference.amount_of(folded, volume, read_unit)
    note = f"{text} read as {factor:.6g} mol, an ideal gas at the stated conditions"
    return Reading(Unit(text, factor, dimension), (note,))


_SUPERSCRIPT: Final = {1: "", 2: "²", 3: "³", 4: "⁴"}


def _written(factors: Sequence[Factor], strict: bool) -> str:
    """Return a unit with its numerator and its denominator in brackets."""
    powers = [(f.name.text, f.strict_exponent if strict else f.exponent) for f in factors]
    above = "·".join(name + _SUPERSCRIPT[power] for name, power in powers if power > 0)
    below = [name + _SUPERSCRIPT[-power] for name, power in powers if power < 0]
    denominator = "·".join(below) if len(below) == 1 else f"({'·'.join(below)})"
    return f"{above or '1'}/{denominator}" if below else above

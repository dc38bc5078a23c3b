"""Gas volumes at reference conditions: Nm³, Sm³ and scf are amounts of substance.

``12 Nm³ (0 °C, 1.01325 bar)``: what "normal" and "standard" mean differs between trades and countries
(0, 15, 20, 25 °C, 60 °F; 1 bar, 1 atm, 14.696 psi, 14.73 psi), so the conditions are never guessed.
"""

from __future__ import annotations

import re
from collections.abc import Callable
from typing import TYPE_CHECKING, Final

from checker.quantity.allowlist import TemperatureKind
from checker.quantity.dimensions import AMOUNT, PRESSURE, Dimension
from checker.quantity.number import read_number
from checker.quantity.refused import AMBIGUOUS
from checker.quantity.registry import si_factor
from checker.quantity.types import QuantityError

if TYPE_CHECKING:
    from checker.quantity.reading import Reading

MOLAR_GAS_CONSTANT: Final = (
    8.31446261815324  # J/(mol·K), exact: N_A·k of the SI of 2019 (SI Brochure, 9th ed.)
)

VOLUME: Final = re.compile(r"(?<![A-Za-z])(?:([NS]m)(?:³|(?:\^|\*\*)?3)|scf|SCF|Scf)(?![A-Za-z0-9])")
_CONDITIONS: Final = re.compile(r" ?\(([^,;&]+)(?:[,;&]| and )([^,;&]+)\)")
_EXAMPLE: Final = "12 Nm³ (0 °C, 1.01325 bar)"


def amount_of(
    text: str, volume: re.Match[str], read_unit: Callable[[str], Reading]
) -> tuple[float, Dimension]:
    """Return the amount of ideal gas [mol] in one unit of volume at the conditions in brackets behind it.

    n = p·V/(R·T)

    Raises
    ------
    QuantityError
        ``reference-conditions-missing`` or, where more than the conditions surrounds it, ``unit-ambiguous``.
    """
    conditions = _CONDITIONS.fullmatch(text, volume.end())
    if volume.start() > 0 or (
        conditions is None and text[volume.end() : volume.end() + 1] not in ("", " ", "(")
    ):
        message = f"{volume[0]} stands alone with its reference conditions: {_EXAMPLE}"
        raise QuantityError(AMBIGUOUS, message, volume.start())
    if conditions is None:
        raise _missing(f"{volume[0]} means nothing without its reference conditions", volume.start())
    temperature, pressure = _conditions(conditions, read_unit)
    cubed = "meter" if volume[1] else "foot"
    size = float(si_factor([(cubed, 3)])[0])
    return size * pressure / (MOLAR_GAS_CONSTANT * temperature), AMOUNT


def _missing(message: str, offset: int) -> QuantityError:
    """Return the error for missing conditions, with an example."""
    return QuantityError("reference-conditions-missing", f"{message}; write for example {_EXAMPLE}", offset)


def _conditions(match: re.Match[str], read_unit: Callable[[str], Reading]) -> tuple[float, float]:
    """Return temperature [K] and absolute pressure [Pa], in whichever order they stand."""
    found: dict[str, float] = {}
    for group in (1, 2):
        part = match[group].strip()
        number = read_number(part)
        if number is None:
            raise _missing(f"{part} is no temperature and no pressure", match.start(group))
        reading = read_unit(part[number.end :].strip())
        unit = reading.unit
        value = number.value * unit.factor + unit.offset
        if reading.temperature in (TemperatureKind.POINT, TemperatureKind.EITHER) and value > 0.0:
            found["temperature"] = value
        elif unit.dimension == PRESSURE and not unit.gauge and not reading.in_doubt and value > 0.0:
            found["pressure"] = value
    if len(found) != 2:
        raise _missing(
            "the reference conditions are one temperature and one absolute pressure", match.start()
        )
    return found["temperature"], found["pressure"]

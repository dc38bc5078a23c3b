"""Notations that are understood and refused, each with its readings or with what to write instead."""

from __future__ import annotations

from dataclasses import dataclass
from types import MappingProxyType
from typing import Final

UNKNOWN: Final = "unit-unknown"
AMBIGUOUS: Final = "unit-ambiguous"


@dataclass(frozen=True, slots=True)
class Refusal:
    """Why a name is refused: the kind of error, what is said, and a name to write instead (or none)."""

    kind: str
    message: str
    instead: str = ""


def _unless_mega(text: str, meant: str) -> Refusal:
    """Refuse a milli that would be a mega with a capital letter."""
    return Refusal(
        AMBIGUOUS, f"{text} is a thousandth and {meant} a million: a factor of 10⁹ hangs on one letter", meant
    )


def _letter(text: str, symbol_of: str, meant: str) -> Refusal:
    """Refuse a temperature without its degree sign."""
    return Refusal(UNKNOWN, f"{text} is the symbol of {symbol_of}; the temperature is written {meant}", meant)


def _of_a_turn(text: str) -> Refusal:
    """Refuse an angle or a speed of rotation: rpm has two sizes as 1/s."""
    return Refusal(UNKNOWN, f"{text}: angles and speeds of rotation are not part of a record")


_BY_NAME: Final[dict[str, Refusal]] = {
    "C": _letter("C", "the coulomb", "°C"),
    "F": _letter("F", "the farad", "°F"),
    "R": _letter("R", "the gas constant", "°R"),
    "mPa": _unless_mega("mPa", "MPa"),
    "mJ": _unless_mega("mJ", "MJ"),
    "mW": _unless_mega("mW", "MW"),
    "Mg": Refusal(AMBIGUOUS, "Mg is a million grams, mg a thousandth of one: write t or mg"),
    "ton": Refusal(
        AMBIGUOUS,
        "a ton is 1000 kg (metric), 907.185 kg (short), 1016.05 kg (long) or 3.517 kW (refrigeration): "
        "write t, lb or kW",
    ),
    "hp": Refusal(
        AMBIGUOUS,
        "a horsepower is 745.70 W (550 ft·lbf/s), 735.50 W (metric), 746 W (electric) or 9809.5 W (boiler): "
        "write kW",
    ),
    "PS": Refusal(AMBIGUOUS, "PS is the metric horsepower, 735.50 W, or a petasiemens: write kW"),
    "MBTU": Refusal(
        AMBIGUOUS, "MBTU is 1000 BTU in the trade and 1 000 000 BTU by the SI prefix: write BTU or MMBTU"
    ),
    "gal": Refusal(AMBIGUOUS, "a gallon is 3.785 L (US) or 4.546 L (imperial): write US gal or imp gal"),
    "oz": Refusal(AMBIGUOUS, "an ounce is 28.35 g (avoirdupois), 31.10 g (troy) or a volume: write g or mL"),
    "gr": Refusal(AMBIGUOUS, "gr is the grain, 64.8 mg, or a gram: write g or mg"),
    "bbl": Refusal(AMBIGUOUS, "a barrel is 42 US gal (oil) or 31.5 US gal and others: write m³ or US gal"),
    "Cal": Refusal(AMBIGUOUS, "Cal is a kilocalorie in nutrition, else a calorie: write kcal or cal"),
    "Min": Refusal(UNKNOWN, "Min is no unit; the minute is written min", "min"),
    "per": Refusal(UNKNOWN, "per is written with a slash, such as kJ/kg", ""),
    "vac": Refusal(UNKNOWN, "a vacuum is written as a negative gauge pressure or as an absolute pressure"),
    "°": _of_a_turn("°"),
} | {text: _of_a_turn(text) for text in ("deg", "rad", "rev", "rpm", "rps", "Hz")}

_ALSO: Final = {
    "tons": "ton", "HP": "hp", "CV": "PS", "MBtu": "MBTU", "Mbtu": "MBTU", "MBH": "MBTU", "gallon": "gal",
    "gallons": "gal", "vacuum": "vac",
}  # fmt: skip

REFUSED: Final = MappingProxyType(_BY_NAME | {other: _BY_NAME[text] for other, text in _ALSO.items()})
"""Every refused name."""

"""The allow-list: every unit name that a package may use, with one meaning each.

A name that means two things in the trade (ton, hp, MBtu) stands in ``refused.py`` instead. Where one of the
meanings is usual enough to be read (BTU, kcal, therm), its entry carries a note that every report prints.
"""

from __future__ import annotations

from dataclasses import dataclass, replace
from enum import StrEnum
from fractions import Fraction
from types import MappingProxyType
from typing import Final

from checker.quantity.spellings import SPELLINGS, TYPING_SLIPS


class TemperatureKind(StrEnum):
    """What a unit of temperature can stand for."""

    NONE = "no temperature"
    POINT = "temperature"
    DIFFERENCE = "temperature difference"
    EITHER = "temperature or temperature difference"


@dataclass(frozen=True, slots=True)
class Name:
    """A name of the allow-list.

    Attributes
    ----------
    text : str
        The name as the reports write it.
    definition : str
        Its definition in ``units.txt``, prefix included.
    note : str
        How the name was read, where the trade is not of one mind.
    gauge : bool
        A pressure above atmospheric.
    temperature : TemperatureKind
        Whether it is a temperature, a difference, or either.
    zero : Fraction
        Zero of the scale in K.
    """

    text: str
    definition: str
    note: str = ""
    gauge: bool = False
    temperature: TemperatureKind = TemperatureKind.NONE
    zero: Fraction = Fraction(0)


_PLAIN: Final[dict[str, str]] = {
    # length, area, volume
    "m": "meter", "mm": "millimeter", "cm": "centimeter", "dm": "decimeter", "km": "kilometer",
    "μm": "micrometer", "in": "inch", "ft": "foot", "yd": "yard", "mi": "mile",
    "L": "liter", "l": "liter", "mL": "milliliter", "ml": "milliliter", "hL": "hectoliter",
    "US gal": "gallon", "imp gal": "imperial_gallon", "cc": "cubic_centimeter", "cu ft": "cubic_foot",
    "cu in": "cubic_inch", "sq ft": "square_foot", "sq in": "square_inch",
    # mass, amount, time
    "kg": "kilogram", "g": "gram", "mg": "milligram", "t": "tonne", "lb": "pound", "lbm": "pound",
    "mol": "mole", "mmol": "millimole", "kmol": "kilomole", "lbmol": "pound_mole",
    "s": "second", "ms": "millisecond", "min": "minute", "h": "hour", "d": "day",
    # force
    "N": "newton", "kN": "kilonewton", "MN": "meganewton", "kgf": "force_kilogram", "lbf": "force_pound",
    # energy and power
    "J": "joule", "kJ": "kilojoule", "MJ": "megajoule", "GJ": "gigajoule", "TJ": "terajoule",
    "Wh": "watt_hour", "kWh": "kilowatt_hour", "MWh": "megawatt_hour", "GWh": "gigawatt_hour",
    "Ws": "watt_second", "kWs": "kilowatt_second", "Nm": "newton_meter", "kNm": "kilonewton_meter",
    "W": "watt", "kW": "kilowatt", "MW": "megawatt", "GW": "gigawatt",
    "cal(IT)": "international_calorie", "kcal(IT)": "kilointernational_calorie",
    "cal(th)": "thermochemical_calorie", "kcal(th)": "kilothermochemical_calorie",
    "BTU(IT)": "international_british_thermal_unit", "BTU(th)": "thermochemical_british_thermal_unit",
    "therm(EC)": "EC_therm", "therm(US)": "US_therm",
    # pure numbers
    "%": "percent", "‰": "permille",
}  # fmt: skip

_PRESSURES: Final[dict[str, str]] = {
    "Pa": "pascal", "hPa": "hectopascal", "kPa": "kilopascal", "MPa": "megapascal", "GPa": "gigapascal",
    "bar": "bar", "mbar": "millibar", "psi": "psi", "ksi": "ksi", "psf": "pound_force_per_square_foot",
    "atm": "atmosphere", "at": "technical_atmosphere", "torr": "torr", "mmHg": "millimeter_Hg",
    "inHg": "inch_Hg",
}  # fmt: skip
"""Absolute as they stand: only the unit makes a pressure a gauge pressure."""

_GLUED_SUFFIX: Final = ("Pa", "kPa", "MPa", "bar", "mbar", "psi", "at")
"""Pressures whose g or a may follow without a bracket: barg, psia, ata."""

# Steam tables, heat balances and fuel contracts are in International Table units (fixed in 1956 for the
# tables of steam), so cal follows the BTU; the thermochemical calorie of chemistry is 0.067 % smaller.
_IT_CALORIE: Final = (
    "{} read as the International Table calorie, 4.1868 J (1 kcal/kg = 1.8 BTU/lb); "
    "the thermochemical calorie, 4.184 J, is written cal(th) or kcal(th)"
)
_IT_BTU: Final = (
    "{} read as the International Table BTU, 1055.05585262 J; "
    "the thermochemical one, 1054.350 J, is written BTU(th)"
)
_IT_THERM: Final = (
    "{} read as 100 000 BTU (International Table), 105.505585 MJ; "
    "the others are written therm(US), 105.4804 MJ, and therm(EC), 105.506 MJ"
)
_NOTED: Final[dict[str, tuple[str, str]]] = {
    "cal": ("international_calorie", _IT_CALORIE),
    "kcal": ("kilointernational_calorie", _IT_CALORIE),
    "Mcal": ("megainternational_calorie", _IT_CALORIE),
    "Gcal": ("gigainternational_calorie", _IT_CALORIE),
    "BTU": ("international_british_thermal_unit", _IT_BTU),
    "MMBTU": (
        "megainternational_british_thermal_unit",
        "{} read as 1 000 000 BTU (International Table), 1055.05585262 MJ",
    ),
    "therm": ("international_therm", _IT_THERM),
}

_RANKINE: Final = "degree_Rankine"
_TEMPERATURES: Final = (
    Name("K", "kelvin", temperature=TemperatureKind.EITHER),
    Name("°R", _RANKINE, temperature=TemperatureKind.EITHER),
    Name("°C", "kelvin", temperature=TemperatureKind.POINT, zero=Fraction(27315, 100)),
    Name("°F", _RANKINE, temperature=TemperatureKind.POINT, zero=Fraction(45967, 180)),
    Name("ΔK", "kelvin", temperature=TemperatureKind.DIFFERENCE),
    Name("Δ°C", "kelvin", temperature=TemperatureKind.DIFFERENCE),
    Name("Δ°F", _RANKINE, temperature=TemperatureKind.DIFFERENCE),
    Name("Δ°R", _RANKINE, temperature=TemperatureKind.DIFFERENCE),
)


def _pressure_names() -> dict[str, Name]:
    """Return the pressures, their gauge and absolute forms included."""
    names: dict[str, Name] = {}
    for text, definition in _PRESSURES.items():
        names[text] = Name(text, definition)
        names[f"{text}(g)"] = Name(f"{text}(g)", definition, gauge=True)
        names[f"{text}(a)"] = Name(f"{text}(a)", definition)
    for text in _GLUED_SUFFIX:
        names[f"{text}g"] = names[f"{text}(g)"]
        names[f"{text}a"] = names[f"{text}(a)"]
    return names


STANDARD: Final = MappingProxyType(
    {text: Name(text, definition) for text, definition in _PLAIN.items()}
    | _pressure_names()
    | {text: Name(text, definition, note.format(text)) for text, (definition, note) in _NOTED.items()}
    | {name.text: name for name in _TEMPERATURES}
)
"""The names as the reports and messages write them."""


def _slip(written: str, meant: str) -> Name:
    """Return the name that was meant, with a note that says so."""
    name = STANDARD[meant]
    read = f"{written} read as {meant}"
    return replace(name, note=f"{read}; {name.note}" if name.note else read)


NAMES: Final = MappingProxyType(
    STANDARD
    | {other: STANDARD[text] for other, text in SPELLINGS.items()}
    | {written: _slip(written, meant) for written, meant in TYPING_SLIPS.items()}
)
"""Every name that is read: the standard ones, other spellings, and slips of the shift key (with a note)."""

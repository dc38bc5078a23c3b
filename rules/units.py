"""Units and plausible numbers: what was written, and whether it can be meant."""

from __future__ import annotations

from typing import Final

from checker.case import Case, Raised, Yielded
from checker.facts.stated import is_wrong
from checker.findings import Grade
from checker.quantity.types import Scale
from checker.submission import Statement
from rules.reading import reading_rule
from rules.rule import Rule, Scope

KELVIN_DIGITS: Final = ".15"
KELVIN_FROM: Final = 200.0
COLDEST: Final = 1.0
HOTTEST: Final = 3500.0
AMBIENT: Final = (213.15, 333.15)
ATMOSPHERES: Final = (45e3, 110e3)
ROUNDING: Final = 1e-9
_SI: Final = "SI Brochure, 9th ed. (BIPM, 2019)"


def kelvin_in_celsius(case: Case) -> Yielded:
    """Yield temperatures in °C whose digits are those of a value in kelvin."""
    for s in case.record.statements:
        number = s.quantity.number_text
        kelvin = number.endswith(KELVIN_DIGITS) and s.quantity.number_of(s.quantity.value) >= KELVIN_FROM
        if _is_temperature(s) and s.quantity.unit.text == "°C" and kelvin and not is_wrong(case, s.pointer):
            yield Raised(
                f"{s.quantity.text} has the digits of a temperature in kelvin.",
                statement=s,
                suggestion=f"Write {number} K if that is meant.",
            )


def temperature_implausible(case: Case) -> Yielded:
    """Yield temperatures that no calculation of this kind means."""
    for s in case.record.statements:
        elsewhere = s.pointer == "surroundings/temperature" or is_wrong(case, s.pointer)
        if s.usable and _is_temperature(s) and not COLDEST <= s.value <= HOTTEST and not elsewhere:
            yield Raised(
                f"{s.quantity.text} is outside {COLDEST:g} K to {HOTTEST:g} K, where closed systems are calculated.",
                statement=s,
                suggestion="Check number and unit of the temperature.",
            )


def _is_temperature(s: Statement) -> bool:
    return s.term.scale is Scale.ABSOLUTE_TEMPERATURE


def surroundings_implausible(case: Case) -> Yielded:
    """Yield surroundings that are nowhere on the ground."""
    for name, (low, high), meant in (
        ("temperature", AMBIENT, "the temperature of a place where people work"),
        ("pressure", ATMOSPHERES, "an absolute atmospheric pressure"),
    ):
        for s in case.stated(f"surroundings/{name}"):
            if not low * (1.0 - ROUNDING) <= s.value <= high * (1.0 + ROUNDING):
                yield Raised(
                    f"{s.quantity.text} is not {meant}; every gauge pressure and every exergy of the record uses it.",
                    statement=s,
                    suggestion="State the surroundings as they are, the pressure absolute.",
                )


def not_positive(case: Case) -> Yielded:
    """Yield quantities that only have positive values, stated as zero or less."""
    for s in case.record.statements:
        if s.usable and s.term.positive and s.quantity.value <= 0.0 and not is_wrong(case, s.pointer):
            absolute = " absolute" if s.quantity.unit.gauge else ""
            yield Raised(
                f"{s.term.name.replace('_', ' ')}: {s.quantity.text} is not above zero{absolute}.",
                statement=s,
                suggestion="Check sign, unit and, for a pressure, whether it is gauge or absolute.",
            )


RULES: Final[tuple[Rule, ...]] = (
    reading_rule(
        "quantity-unreadable",
        "units",
        Grade.QUERY,
        "A text is not a number with a unit.",
        "A value that cannot be read for certain is not guessed.",
    ),
    reading_rule(
        "unit-unknown",
        "units",
        Grade.QUERY,
        "A unit is not one that is understood.",
        "A value in an unknown unit has no size.",
        _SI,
    ),
    reading_rule(
        "unit-ambiguous",
        "units",
        Grade.QUERY,
        "A unit has several meanings in the trade.",
        "Calories, tons, horsepower and degrees differ by up to some ten per cent from one meaning to the next.",
    ),
    reading_rule(
        "gauge-without-atmosphere",
        "units",
        Grade.QUERY,
        "A gauge pressure is given, and no atmospheric pressure to add to it.",
        "Properties depend on the absolute pressure; the review assumes no atmosphere of its own.",
    ),
    reading_rule(
        "reference-conditions-missing",
        "units",
        Grade.QUERY,
        "A gas volume is given without its reference conditions.",
        "Between 0 °C and 15 °C as reference the amount of gas differs by 5.5 %.",
        "ISO 13443:1996 (reference conditions)",
    ),
    reading_rule(
        "temperature-kind-wrong",
        "units",
        Grade.DISCREPANCY,
        "A temperature stands for a difference of temperatures, or the reverse.",
        "Between 20 °C and a difference of 20 K lie 273.15 K.",
        _SI,
    ),
    reading_rule(
        "below-absolute-zero",
        "units",
        Grade.DISCREPANCY,
        "A temperature is lower than there is.",
        "A difference was written as a temperature, or a sign or a unit is wrong.",
        _SI,
    ),
    reading_rule(
        "dimension-wrong",
        "units",
        Grade.DISCREPANCY,
        "A quantity has the unit of another kind of quantity.",
        "Either the number or the name at which it stands is not what was calculated.",
    ),
    reading_rule(
        "rate-for-total",
        "units",
        Grade.DISCREPANCY,
        "A rate stands where a total belongs, and no duration makes it one.",
        "A balance between two states is in energy, not in power.",
    ),
    reading_rule(
        "specific-for-total",
        "units",
        Grade.DISCREPANCY,
        "A value per mass or per amount stands where a total belongs.",
        "The factor of the mass is missing, here or in all that follows.",
    ),
    reading_rule(
        "total-for-specific",
        "units",
        Grade.DISCREPANCY,
        "A total stands where a value per mass belongs.",
        "The mass was not divided out, here or in all that follows.",
    ),
    reading_rule(
        "notation-read-as",
        "units",
        Grade.REMARK,
        "A notation with more than one reading was read in the one that fits.",
        "The originator can see how it was understood.",
    ),
    Rule(
        "kelvin-in-celsius",
        kelvin_in_celsius,
        Scope.RECORD,
        "units",
        Grade.QUERY,
        "A temperature in °C has the digits of a value in kelvin.",
        "Nobody measures 293.15 °C; the conversion was done in the number and not in the unit.",
    ),
    Rule(
        "temperature-implausible",
        temperature_implausible,
        Scope.RECORD,
        "units",
        Grade.QUERY,
        f"A temperature is below {COLDEST:g} K or above {HOTTEST:g} K.",
        "No property model of the review reaches there, so a unit or a digit is likely to be wrong.",
    ),
    Rule(
        "surroundings-implausible",
        surroundings_implausible,
        Scope.RECORD,
        "units",
        Grade.QUERY,
        "The stated surroundings are not those of any place of work.",
        "Gauge pressures, entropy with surroundings and exergy all rest on T₀ and p₀.",
        "standard atmosphere, ISO 2533:1975: 1013 hPa at sea level, 540 hPa at 5000 m (from memory)",
    ),
    Rule(
        "value-not-positive",
        not_positive,
        Scope.RECORD,
        "units",
        Grade.DISCREPANCY,
        "A quantity that is always positive is stated as zero or less.",
        "A mass, a volume or an absolute pressure of zero or less is no state of a body.",
    ),
)

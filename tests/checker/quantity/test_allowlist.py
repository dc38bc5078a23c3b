"""Every definition against a second table, and against published values."""

from __future__ import annotations

import ast
from fractions import Fraction
from functools import lru_cache
from pathlib import Path
from typing import Any

import pint
import pytest
from pint.util import UnitsContainer

from checker.quantity import known_units, unit
from checker.quantity.allowlist import NAMES, STANDARD
from checker.quantity.refused import REFUSED
from checker.quantity.registry import si_factor
from checker.quantity.spellings import SPELLINGS, TYPING_SLIPS

ROOT = Path(__file__).parents[3]

# Ours has another name, or is a product, in the library's table.
ELSEWHERE: dict[str, tuple[Fraction | int, dict[str, int]]] = {
    "ksi": (1000, {"psi": 1}),
    "pound_force_per_square_foot": (1, {"force_pound": 1, "foot": -2}),
    "newton_meter": (1, {"newton": 1, "meter": 1}),
    "kilonewton_meter": (1, {"kilonewton": 1, "meter": 1}),
    "watt_second": (1, {"watt": 1, "second": 1}),
    "kilowatt_second": (1, {"kilowatt": 1, "second": 1}),
    "international_therm": (100000, {"international_british_thermal_unit": 1}),
    "pound_mole": (1, {"pound": 1, "gram": -1, "mole": 1}),
    "square_inch": (1, {"inch": 2}),
    "square_foot": (1, {"foot": 2}),
}
COMPARED = 86
NOT_THERE = {"EC_therm"}  # defined there by a BTU of 1055.056 J; ours is the directive's 105.506 MJ


@lru_cache(maxsize=1)
def library() -> Any:
    """Return the library's own full table, with exact arithmetic."""
    return pint.UnitRegistry(non_int_type=Fraction, cache_folder=None)


def of_library(parts: dict[str, int]) -> Fraction:
    """Return the SI factor of a product by the library's full table, where mass is based on the gram."""
    factor, base = library().get_base_units(UnitsContainer(parts))
    grams = dict(base._units.items()).get("gram", 0)
    return Fraction(str(factor)) / Fraction(1000) ** int(grams)


def definitions() -> list[str]:
    """Return the distinct definitions behind the allow-list."""
    return sorted({name.definition for name in NAMES.values()})


@pytest.mark.parametrize("definition", [name for name in definitions() if name not in NOT_THERE])
def test_factor_is_that_of_the_full_table(definition: str):
    """Each definition agrees with the library's full table to 1e-15 relative."""
    times, there = ELSEWHERE.get(definition, (1, {definition: 1}))
    ours = si_factor([(definition, 1)])[0]
    assert float(ours / (times * of_library(there)) - 1) == pytest.approx(0.0, abs=1e-15)


def test_every_definition_but_one_was_compared():
    """One definition has no counterpart in the full table; all others were compared."""
    assert set(definitions()) >= NOT_THERE | set(ELSEWHERE)
    assert len(definitions()) - len(NOT_THERE) == COMPARED


# NIST SP 811 (2008), Appendix B.9, as printed (boldface, here "exact", has no further digits); footnotes 9 and 23
# give the BTU and the pound-force in full. SI Brochure (9th ed., 2019), table 8, for L, t, min, h, d and bar.
PRINTED = [
    ("BTU(IT)", "1.055 05585262", 3, "SP 811 footnote 9, exact"), ("BTU(IT)", "1.055 056", 3, "SP 811"),
    ("BTU(th)", "1.054 350", 3, "SP 811"), ("cal(IT)", "4.1868", 0, "SP 811, exact"),
    ("cal(th)", "4.184", 0, "SP 811, exact"), ("kcal(IT)", "4.1868", 3, "SP 811, exact"),
    ("therm(US)", "1.054 804", 8, "SP 811"), ("therm(EC)", "1.055 06", 8, "SP 811"),
    ("BTU/lb", "2.326", 3, "SP 811, exact"), ("BTU/(lb·°F)", "4.1868", 3, "SP 811, exact"),
    ("BTU/(lb·°R)", "4.1868", 3, "SP 811, exact"), ("cal(IT)/g", "4.1868", 3, "SP 811, exact"),
    ("kWh", "3.6", 6, "SP 811, exact"), ("Wh", "3.6", 3, "SP 811, exact"), ("Ws", "1.0", 0, "SP 811, exact"),
    ("kgf", "9.806 65", 0, "SP 811, exact"), ("lbf", "4.448 2216152605", 0, "SP 811 footnote 23, exact"),
    ("lbf", "4.448 222", 0, "SP 811"), ("ft·lbf", "1.355 818", 0, "SP 811"),
    ("atm", "1.013 25", 5, "SP 811, exact"), ("at", "9.806 65", 4, "SP 811, exact"),
    ("kgf/cm²", "9.806 65", 4, "SP 811, exact"), ("bar", "1.0", 5, "SI Brochure, exact"),
    ("inHg", "3.386 389", 3, "SP 811"), ("mmHg", "1.333 224", 2, "SP 811"), ("torr", "1.333 224", 2, "SP 811"),
    ("psi", "6.894 757", 3, "SP 811"), ("ksi", "6.894 757", 6, "SP 811"), ("psf", "4.788 026", 1, "SP 811"),
    ("in", "2.54", -2, "SP 811, exact"), ("ft", "3.048", -1, "SP 811, exact"), ("yd", "9.144", -1, "SP 811, exact"),
    ("mi", "1.609 344", 3, "SP 811, exact"), ("in²", "6.4516", -4, "SP 811, exact"),
    ("ft²", "9.290 304", -2, "SP 811, exact"), ("ft³", "2.831 685", -2, "SP 811"),
    ("in³", "1.638 706", -5, "SP 811"), ("US gal", "3.785 412", -3, "SP 811"),
    ("imp gal", "4.546 09", -3, "SP 811, exact"), ("lb", "4.535 924", -1, "SP 811"),
    ("L", "1.0", -3, "SI Brochure, exact"), ("t", "1.0", 3, "SI Brochure, exact"),
    ("min", "6.0", 1, "SI Brochure, exact"), ("h", "3.6", 3, "SI Brochure, exact"),
    ("d", "8.64", 4, "SI Brochure, exact"),
]  # fmt: skip


@pytest.mark.published
@pytest.mark.parametrize(("text", "digits", "power", "source"), PRINTED)
def test_factor_is_the_printed_value(text: str, digits: str, power: int, source: str):
    """Within half a unit of the last printed digit; exact values to the last bit of a float."""
    printed = Fraction(digits.replace(" ", "")) * Fraction(10) ** power
    decimals = len(digits.replace(" ", "").partition(".")[2])
    slack = Fraction(10) ** (power - decimals) / 2
    if source.endswith("exact"):
        slack = printed / 10**16 * 2
    assert abs(Fraction(unit(text).factor) - printed) <= slack


@pytest.mark.published
def test_zero_points_are_the_published_ones():
    """T/K = t/°C + 273.15 and T/K = (t/°F + 459.67)/1.8 (NIST SP 811, Appendix B.9)."""
    assert NAMES["°C"].zero == Fraction("273.15")
    assert NAMES["°F"].zero == Fraction("459.67") / Fraction("1.8")
    assert si_factor([(NAMES["°F"].definition, 1)])[0] == 1 / Fraction("1.8")


def test_zero_points_are_those_of_the_full_table():
    """0 °C and 0 °F in kelvin agree with the library's full table."""
    for text, name in (("°C", "degree_Celsius"), ("°F", "degree_Fahrenheit")):
        there = library().Quantity(Fraction(0), name).to("kelvin").magnitude
        assert float(NAMES[text].zero) == pytest.approx(float(there), rel=1e-15)


def test_no_text_is_both_read_and_refused():
    """A text of the allow-list is not among the refused ones, and no spelling shadows a standard name."""
    assert not set(NAMES) & set(REFUSED)
    assert not set(SPELLINGS) & set(STANDARD)
    assert not set(TYPING_SLIPS) & (set(STANDARD) | set(SPELLINGS))


def test_every_spelling_has_the_factor_of_its_standard_name():
    """Another spelling changes nothing but the text."""
    for other, text in (SPELLINGS | TYPING_SLIPS).items():
        assert (unit(other).factor, unit(other).offset) == (unit(text).factor, unit(text).offset), other


def test_suggestions_of_refused_names_are_standard_names():
    """What a refusal offers instead is a name that is read."""
    assert {refusal.instead for refusal in REFUSED.values()} - {""} <= set(STANDARD)


def test_known_units_are_distinct_and_many():
    """The list for messages and schema has every standard name once."""
    assert len(set(known_units())) == len(known_units()) > 120


def test_pint_is_imported_in_one_file_only():
    """Only the registry imports the unit library, and only inside functions."""
    importing = []
    for path in sorted(p for top in ("checker", "rules", "reports") for p in (ROOT / top).rglob("*.py")):
        for node in ast.walk(ast.parse(path.read_text(encoding="utf-8"))):
            modules = [node.module or ""] if isinstance(node, ast.ImportFrom) else []
            modules += [alias.name for alias in node.names] if isinstance(node, ast.Import) else []
            if any(module.partition(".")[0] == "pint" for module in modules):
                importing.append(path.relative_to(ROOT).as_posix())
    assert set(importing) == {"checker/quantity/registry.py"}


def test_undefined_name_is_an_error_of_the_table():
    """A name that units.txt does not define is found out at once."""
    with pytest.raises(pint.UndefinedUnitError):
        si_factor([("nonsense", 1)])

"""Unit texts: what is read, what is refused, and how an ambiguous denominator is settled."""

from __future__ import annotations

import subprocess
import sys
from pathlib import Path

import pytest

from checker.quantity import QuantityError, Scale, known_units, parse_quantity, unit
from checker.quantity import dimensions as dim
from checker.quantity.dimensions import Dimension

LB = 0.45359237
BTU = 1055.05585262


@pytest.mark.parametrize(
    ("text", "factor", "dimension"),
    [
        ("kJ", 1e3, dim.ENERGY),
        ("kWh", 3.6e6, dim.ENERGY),
        ("kW·h", 3.6e6, dim.ENERGY),
        ("kW h", 3.6e6, dim.ENERGY),
        ("W-h", 3600.0, dim.ENERGY),
        ("N·m", 1.0, dim.ENERGY),
        ("Nm", 1.0, dim.ENERGY),
        ("kWs", 1e3, dim.ENERGY),
        ("ft-lbf", 0.3048 * LB * 9.80665, dim.ENERGY),
        ("N/m²", 1.0, dim.PRESSURE),
        ("N/m2", 1.0, dim.PRESSURE),
        ("N/mm^2", 1e6, dim.PRESSURE),
        ("kgf/cm²", 98066.5, dim.PRESSURE),
        ("lbf/in²", LB * 9.80665 / 0.0254**2, dim.PRESSURE),
        ("kJ/(kg·K)", 1e3, dim.SPECIFIC_ENTROPY),
        ("kJ/(kg*K)", 1e3, dim.SPECIFIC_ENTROPY),
        ("kJ/(kg K)", 1e3, dim.SPECIFIC_ENTROPY),
        ("kJ/(kgK)", 1e3, dim.SPECIFIC_ENTROPY),
        ("kJ/(kg·°C)", 1e3, dim.SPECIFIC_ENTROPY),
        ("kJ/kg/K", 1e3, dim.SPECIFIC_ENTROPY),
        ("kJ·kg⁻¹·K⁻¹", 1e3, dim.SPECIFIC_ENTROPY),
        ("kJ kg⁻¹ K⁻¹", 1e3, dim.SPECIFIC_ENTROPY),
        ("kJ·kg-1·K-1", 1e3, dim.SPECIFIC_ENTROPY),
        ("kJ kg^-1 K^-1", 1e3, dim.SPECIFIC_ENTROPY),
        ("kJ kg**-1 K**-1", 1e3, dim.SPECIFIC_ENTROPY),
        ("kJ.kg-1.K-1", 1e3, dim.SPECIFIC_ENTROPY),
        ("BTU/(lb·°R)", 4186.8, dim.SPECIFIC_ENTROPY),
        ("BTU/(lb·°F)", 4186.8, dim.SPECIFIC_ENTROPY),
        ("kcal/(kg·°C)", 4186.8, dim.SPECIFIC_ENTROPY),
        ("BTU/lb", 2326.0, dim.SPECIFIC_ENERGY),
        ("kJ / kg", 1e3, dim.SPECIFIC_ENERGY),
        ("kJ∕kg", 1e3, dim.SPECIFIC_ENERGY),
        ("kJ⁄kg", 1e3, dim.SPECIFIC_ENERGY),
        ("W/(m²·K)", 1.0, dim.HEAT_TRANSFER_COEFFICIENT),
        ("W/(m2K)", 1.0, dim.HEAT_TRANSFER_COEFFICIENT),
        ("BTU/(h·ft²·°F)", BTU / 3600 / 0.3048**2 * 1.8, dim.HEAT_TRANSFER_COEFFICIENT),
        ("W/(m·K)", 1.0, dim.THERMAL_CONDUCTIVITY),
        ("m²K/W", 1.0, (0, -1, 3, 1, 0)),
        ("m³/kg", 1.0, dim.SPECIFIC_VOLUME),
        ("m3/kg", 1.0, dim.SPECIFIC_VOLUME),
        ("ft³/lb", 0.3048**3 / LB, dim.SPECIFIC_VOLUME),
        ("cu ft/lbm", 0.3048**3 / LB, dim.SPECIFIC_VOLUME),
        ("cft", 0.3048**3, dim.VOLUME),
        ("dm³", 1e-3, dim.VOLUME),
        ("cm3", 1e-6, dim.VOLUME),
        ("in³", 0.0254**3, dim.VOLUME),
        ("L", 1e-3, dim.VOLUME),
        ("litre", 1e-3, dim.VOLUME),
        ("US gal", 3.785411784e-3, dim.VOLUME),
        ("gal (US)", 3.785411784e-3, dim.VOLUME),
        ("imp gal", 4.54609e-3, dim.VOLUME),
        ("g/mol", 1e-3, dim.MOLAR_MASS),
        ("lb/lbmol", 1e-3, dim.MOLAR_MASS),
        ("lb/lb-mol", 1e-3, dim.MOLAR_MASS),
        ("kg/kg-mol", 1e-3, dim.MOLAR_MASS),
        ("kJ/kgmol", 1.0, dim.MOLAR_ENERGY),
        ("km/h", 1 / 3.6, dim.VELOCITY),
        ("ft/s", 0.3048, dim.VELOCITY),
        ("kN/m", 1e3, dim.STIFFNESS),
        ("N/mm", 1e3, dim.STIFFNESS),
        ("1/K", 1.0, (0, 0, 0, -1, 0)),
        ("1/°F", 1.8, (0, 0, 0, -1, 0)),
        ("g/kg", 1e-3, dim.NONE),
        ("kg/kg", 1.0, dim.NONE),
        ("%", 0.01, dim.NONE),
        ("J/g", 1e3, dim.SPECIFIC_ENERGY),
        ("MMBtu", BTU * 1e6, dim.ENERGY),
        ("hr", 3600.0, dim.TIME),
        ("t", 1000.0, dim.MASS),
        ("", 1.0, dim.NONE),
    ],
)
def test_unit_is_read(text: str, factor: float, dimension: Dimension):
    """A unit text has the factor and the dimension that the trade gives it, wherever it stands."""
    assert unit(text).factor == pytest.approx(factor, rel=1e-15)
    assert unit(text).dimension == dimension
    assert parse_quantity(f"1.0 {text}").unit == unit(text)
    if not text.startswith("1"):
        assert parse_quantity(f"1.0{text}").value == unit(text).factor


@pytest.mark.parametrize(
    ("texts", "dimension"),
    [
        (("lbm", "Kg", "gm"), dim.MASS),
        (("lbmol", "kgmol"), dim.AMOUNT),
        (
            ("psia", "bara", "kPa(a)", "ata", "psf", "KPa", "Mpa", "Torr", "in Hg", "mm Hg", "N/m2"),
            dim.PRESSURE,
        ),
        (("psig", "barg", "kPa(g)"), dim.PRESSURE),
        (("MMBtu", "MMBTU", "btu", "KJ"), dim.ENERGY),
        (("ft3", "m3", "cm3", "dm3", "in3", "ltr", "cu ft", "cft"), dim.VOLUME),
        (("Celsius", "Rankine", "ºC"), dim.TEMPERATURE),
        (("kg/cm2",), (-2, 1, 0, 0, 0)),
    ],
)
def test_trade_notation_is_read(texts: tuple[str, ...], dimension: Dimension):
    """Notations that the unit library does not know, and that have one meaning, are read."""
    for text in texts:
        assert parse_quantity(f"5 {text}", atmosphere=1e5).dimension == dimension, text


AMBIGUOUS_DENOMINATORS = [
    ("kJ/kg·K", dim.SPECIFIC_ENTROPY, 1e3, "kJ/(kg·K)"),
    ("kJ/kg⋅K", dim.SPECIFIC_ENTROPY, 1e3, "kJ/(kg·K)"),
    ("kJ/kg*K", dim.SPECIFIC_ENTROPY, 1e3, "kJ/(kg·K)"),
    ("kJ/kg.K", dim.SPECIFIC_ENTROPY, 1e3, "kJ/(kg·K)"),
    ("kJ/kg-K", dim.SPECIFIC_ENTROPY, 1e3, "kJ/(kg·K)"),
    ("kJ/kg−K", dim.SPECIFIC_ENTROPY, 1e3, "kJ/(kg·K)"),
    ("kJ/kg–K", dim.SPECIFIC_ENTROPY, 1e3, "kJ/(kg·K)"),
    ("kJ/kgK", dim.SPECIFIC_ENTROPY, 1e3, "kJ/(kg·K)"),
    ("kJ/kg K", dim.SPECIFIC_ENTROPY, 1e3, "kJ/(kg·K)"),
    ("kJ/kg°C", dim.SPECIFIC_ENTROPY, 1e3, "kJ/(kg·°C)"),
    ("BTU/lb·°F", dim.SPECIFIC_ENTROPY, 4186.8, "BTU/(lb·°F)"),
    ("Btu/lb-°R", dim.SPECIFIC_ENTROPY, 4186.8, "BTU/(lb·°R)"),
    ("kJ/kmol K", dim.MOLAR_ENTROPY, 1.0, "kJ/(kmol·K)"),
    ("W/m²K", dim.HEAT_TRANSFER_COEFFICIENT, 1.0, "W/(m²·K)"),
    ("W/m2 K", dim.HEAT_TRANSFER_COEFFICIENT, 1.0, "W/(m²·K)"),
    ("W/m2-K", dim.HEAT_TRANSFER_COEFFICIENT, 1.0, "W/(m²·K)"),
    ("kcal/h m² °C", dim.HEAT_TRANSFER_COEFFICIENT, 4186.8 / 3600, "kcal/(h·m²·°C)"),
    ("W/mK", dim.THERMAL_CONDUCTIVITY, 1.0, "W/(m·K)"),
]


@pytest.mark.parametrize(("text", "dimension", "factor", "meant"), AMBIGUOUS_DENOMINATORS)
def test_ambiguous_denominator_is_settled_by_the_field(
    text: str, dimension: Dimension, factor: float, meant: str
):
    """Where all in the denominator gives the expected dimension it is read so, and a note says it."""
    quantity = parse_quantity(f"2.0 {text}", expected=dimension)
    assert quantity.value == pytest.approx(2.0 * factor, rel=1e-15)
    assert quantity.dimension == dimension
    assert f"{text} read as {meant}" in quantity.notes


@pytest.mark.parametrize(("text", "dimension", "factor", "meant"), AMBIGUOUS_DENOMINATORS)
def test_ambiguous_denominator_is_refused_elsewhere(
    text: str, dimension: Dimension, factor: float, meant: str
):
    """Without that dimension it is refused, both readings are shown and the brackets suggested."""
    for expected in (None, dim.ENERGY):
        with pytest.raises(QuantityError) as caught:
            parse_quantity(f"2.0 {text}", expected=expected)
        assert caught.value.kind == "unit-ambiguous"
        assert f"{meant} or " in caught.value.message
        assert caught.value.suggestion == f"2.0 {meant}"


def test_strict_reading_is_shown():
    """The message shows the strict reading with the last name in the numerator."""
    with pytest.raises(QuantityError, match=r"kJ/\(kg·K\) or kJ·K/kg"):
        parse_quantity("1 kJ/kg·K")


@pytest.mark.parametrize(
    ("text", "kind", "part"),
    [
        ("5 ton", "unit-ambiguous", "907.185 kg (short)"),
        ("5 MBtu", "unit-ambiguous", "1000 BTU in the trade"),
        ("5 hp", "unit-ambiguous", "735.50 W (metric)"),
        ("5 PS", "unit-ambiguous", "petasiemens"),
        ("5 mPa", "unit-ambiguous", "MPa a million"),
        ("5 mJ/kg", "unit-ambiguous", "MJ a million"),
        ("5 gal", "unit-ambiguous", "3.785 L (US) or 4.546 L (imperial)"),
        ("5 oz", "unit-ambiguous", "avoirdupois"),
        ("5 Cal", "unit-ambiguous", "kilocalorie"),
        ("5 kJ/kg⁻¹", "unit-ambiguous", "divides twice"),
        ("5 kJ/kg-1·K-1", "unit-ambiguous", "divides twice"),
        ("25 C", "unit-unknown", "coulomb"),
        ("77 F", "unit-unknown", "farad"),
        ("540 R", "unit-unknown", "gas constant"),
        ("5 BTU/(lb·R)", "unit-unknown", "gas constant"),
        ("5 rpm", "unit-unknown", "rotation"),
        ("5 rad/s", "unit-unknown", "rotation"),
        ("5 Hz", "unit-unknown", "rotation"),
        ("5 °", "unit-unknown", "rotation"),
        ("5 Min", "unit-unknown", "min"),
        ("5 kJ per kg", "unit-unknown", "slash"),
        ("5 inHg vac", "unit-unknown", "negative gauge pressure"),
        ("5 kJ(g)", "unit-unknown", "belongs to a pressure"),
    ],
)
def test_notation_with_a_trap_is_refused_with_its_readings(text: str, kind: str, part: str):
    """What means two things, or something else than meant, is refused and the message says which."""
    with pytest.raises(QuantityError) as caught:
        parse_quantity(text)
    assert caught.value.kind == kind
    assert part in caught.value.message


@pytest.mark.parametrize(
    ("text", "suggestion"),
    [
        ("25 C", "25 °C"), ("77 F", "77 °F"), ("540 R", "540 °R"), ("5 BTU/(lb·R)", "5 BTU/(lb·°R)"),
        ("5 mPa", "5 MPa"), ("5 mJ/kg", "5 MJ/kg"), ("5 KiloJ", ""), ("5 kilojoule", ""), ("5 kJj", "5 kJ"),
        ("5 kjoule", ""), ("5 barr", "5 bar"), ("5 kpascal", ""), ("5 KPA", "5 kPa"), ("5 mmhg", "5 mmHg"),
        ("5 kJ/kgg", "5 kJ/kg"), ("5 kWhr", "5 kWh"), ("5 atm.", ""), ("5 " + "x" * 40, ""),
    ],
)  # fmt: skip
def test_nearest_name_is_suggested(text: str, suggestion: str):
    """A misspelt name brings the nearest name of the allow-list, if one is near, and never a wrong text."""
    with pytest.raises(QuantityError) as caught:
        parse_quantity(text)
    if suggestion or caught.value.suggestion:
        assert caught.value.suggestion == suggestion
        assert parse_quantity(suggestion).value > 0


@pytest.mark.parametrize(
    "text",
    [
        "kJ//kg", "/kg", "kJ/", "kJ·", "kJ/()", "(kJ", "kJ)", "kJ/(kg", "((kJ))/(((kg)))", "kJ÷kg", "kJ^kg",
        "m^5", "m^-5", "m0", "m^0", "m**9**9", "m**9**9**9", "m**(9**9)", "m**1e400", "m^2.5", "m^(2)", "m²²²²",
        "m" + "²" * 50, "kJ|kg", "kJ&kg", "kJ\nkg", "kJ #", "'kJ'", "㎪", "5 kJ", "2kJ", "kJ 3", "kJ=", "\x00",
        "m·" * 8 + "m", "kJ/kg" * 9, "Δ", "Δ/K", "k J", "kJ 5 kg", "1", "1/1", "1/", "kJ/1", "e", "__import__",
        "kJ/kg da", "bar a g", "µ", "m+2", "kJ\u200b", "kJ\u202e", "kJ--kg", "(kJ)2",
    ],
)  # fmt: skip
def test_broken_unit_text_is_refused(text: str):
    """Text outside the unit grammar is a QuantityError and nothing else."""
    with pytest.raises(QuantityError):
        unit(text)
    with pytest.raises(QuantityError):
        parse_quantity(f"5 {text}", expected=dim.ENERGY)


def test_a_number_alone_needs_a_field_without_unit():
    """A pure number is read where the field has no unit or is not known, and refused with an example elsewhere."""
    assert parse_quantity("0.85").dimension == dim.NONE
    assert parse_quantity("0.85", expected=dim.NONE).value == 0.85
    with pytest.raises(QuantityError, match="the unit is missing, for example 301 kJ"):
        parse_quantity("301", expected=dim.ENERGY)
    with pytest.raises(QuantityError, match="the unit is missing"):
        parse_quantity("25", scale=Scale.ABSOLUTE_TEMPERATURE)
    with pytest.raises(QuantityError, match="the unit is missing"):
        parse_quantity("0", scale=Scale.PRESSURE)


def test_another_dimension_is_left_to_the_caller():
    """A readable quantity of another dimension is returned as it is: a rate for a total is a finding of its own."""
    assert parse_quantity("5 kW", expected=dim.ENERGY).dimension == dim.POWER
    assert parse_quantity("5 kg", scale=Scale.ABSOLUTE_TEMPERATURE).dimension == dim.MASS
    assert parse_quantity("5 kJ", scale=Scale.PRESSURE).dimension == dim.ENERGY


@pytest.mark.parametrize(
    ("text", "part"),
    [
        ("1 BTU", "International Table BTU, 1055.05585262 J"),
        ("1 btu/lb", "International Table BTU, 1055.05585262 J"),
        ("1 cal", "International Table calorie, 4.1868 J"),
        ("1 kcal/kg", "International Table calorie, 4.1868 J"),
        ("1 Kcal", "Kcal read as kcal; kcal read as the International Table calorie"),
        ("1 therm", "105.505585 MJ"),
        ("1 KJ", "KJ read as kJ"),
        ("1 Mpa", "Mpa read as MPa"),
        ("1 gm", "gm read as g"),
    ],
)
def test_meaning_used_is_printed(text: str, part: str):
    """Where the trade is not of one mind, a note of the quantity says how the unit was read."""
    assert any(part in note for note in parse_quantity(text).notes)


@pytest.mark.parametrize(
    "text", ["1 BTU(IT)", "1 BTU(th)", "1 Btu_th", "1 kcal(IT)", "1 cal_th", "1 kJ", "1 lbs", "1 psi"]
)
def test_unmistakable_units_need_no_note(text: str):
    """A unit with one meaning carries no note."""
    assert parse_quantity(text).notes == ()


def test_both_families_of_heat_units_are_kept_apart():
    """IT and thermochemical units differ by 0.067 %, the same for calorie and BTU."""
    ratio = 4.1868 / 4.184
    assert unit("BTU(IT)").factor / unit("BTU(th)").factor == pytest.approx(ratio, rel=1e-15)
    assert unit("kcal(IT)").factor / unit("kcal(th)").factor == pytest.approx(ratio, rel=1e-15)


def test_known_units_are_all_readable():
    """Every name that messages offer is read, alone."""
    for name in known_units():
        assert unit(name).text == name


def test_known_units_do_not_load_pint():
    """The list of units, as the schema prints it, costs no import of the unit library."""
    code = "import sys; from checker.quantity import known_units; known_units(); print('pint' in sys.modules)"
    ran = subprocess.run(
        [sys.executable, "-c", code],
        cwd=Path(__file__).parents[3],
        check=True,
        capture_output=True,
        text=True,
    )
    assert ran.stdout == "False\n"

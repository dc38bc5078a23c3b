"""Gauge and absolute pressures."""

from __future__ import annotations

import pytest

from checker.quantity import QuantityError, Scale, parse_quantity
from checker.quantity import dimensions as dim

ATMOSPHERE = 101300.0
PSI = 6894.757293168361
KGF_PER_CM2 = 98066.5


@pytest.mark.parametrize(
    ("text", "gauge"),
    [
        ("8 bar(g)", 8e5), ("8 bar (g)", 8e5), ("8 barg", 8e5), ("8 bar g", 8e5), ("8 bar(gauge)", 8e5),
        ("8 bar gauge", 8e5), ("8 barG", 8e5), ("-0.5 bar(g)", -5e4), ("0 barg", 0.0),
        ("800 kPa(g)", 8e5), ("800 kPag", 8e5), ("800 kPa g", 8e5), ("0.8 MPa(g)", 8e5), ("0.8 MPag", 8e5),
        ("100 psig", 100 * PSI), ("100 psi(g)", 100 * PSI), ("100 PSIG", 100 * PSI),
        ("800 mbar(g)", 8e4), ("5 at(g)", 5 * KGF_PER_CM2), ("5 atü", 5 * KGF_PER_CM2),
        ("5 kgf/cm²(g)", 5 * KGF_PER_CM2), ("5 kgf/cm2g", 5 * KGF_PER_CM2), ("5 kg/cm2(g)", 5 * KGF_PER_CM2),
        ("5 kg/cm² g", 5 * KGF_PER_CM2), ("5 N/mm²(g)", 5e6), ("2 inHg(g)", 2 * 3386.388640341),
    ],
)  # fmt: skip
def test_gauge_pressure_takes_the_atmosphere(text: str, gauge: float):
    """A gauge pressure becomes absolute with the stated atmosphere, which the quantity keeps."""
    quantity = parse_quantity(text, scale=Scale.PRESSURE, atmosphere=ATMOSPHERE)
    assert quantity.value == pytest.approx(gauge + ATMOSPHERE, rel=1e-15)
    assert quantity.dimension == dim.PRESSURE
    assert quantity.atmosphere == ATMOSPHERE
    assert quantity.unit.gauge
    assert quantity.number_of(quantity.value) == pytest.approx(float(quantity.number_text), abs=1e-12)


@pytest.mark.parametrize("text", ["8 bar(g)", "100 psig", "5 kgf/cm²(g)", "8 ± 0.1 barg"])
def test_gauge_pressure_is_refused_without_atmosphere(text: str):
    """Nobody guesses 101.325 kPa: without an atmosphere a gauge pressure is refused."""
    with pytest.raises(QuantityError) as caught:
        parse_quantity(text, scale=Scale.PRESSURE)
    assert caught.value.kind == "gauge-without-atmosphere"
    assert "surroundings" in caught.value.message


@pytest.mark.parametrize(
    ("text", "absolute"),
    [
        ("8 bar", 8e5), ("8 bar(a)", 8e5), ("8 bara", 8e5), ("8 bar a", 8e5), ("8 bar abs", 8e5),
        ("8 bar(abs)", 8e5), ("8 bar absolute", 8e5), ("800 kPa", 8e5), ("800 kPa(a)", 8e5), ("800 kPa a", 8e5),
        ("0.8 MPa(a)", 8e5), ("100 psi", 100 * PSI), ("100 psia", 100 * PSI), ("5 ata", 5 * KGF_PER_CM2),
        ("5 at", 5 * KGF_PER_CM2), ("5 kgf/cm²(a)", 5 * KGF_PER_CM2), ("1 atm", 101325.0),
        ("5 kg/cm²", 5 * KGF_PER_CM2), ("760 torr", 101325.0), ("760 Torr", 101325.0), ("1013.25 mbar", 101325.0),
        ("1013.25 hPa", 101325.0), ("100 mm Hg", 13332.2387415), ("10 in Hg", 33863.88640341),
    ],
)  # fmt: skip
def test_absolute_pressure_never_takes_the_atmosphere(text: str, absolute: float):
    """Only the unit makes a pressure a gauge pressure."""
    quantity = parse_quantity(text, scale=Scale.PRESSURE, atmosphere=ATMOSPHERE)
    assert quantity.value == pytest.approx(absolute, rel=1e-15)
    assert quantity.atmosphere == 0.0
    assert not quantity.unit.gauge


def test_mass_per_area_is_a_pressure_only_where_one_is_expected():
    """kg/cm² is read as kgf/cm² with a note in a pressure field, and as mass per area elsewhere."""
    quantity = parse_quantity("10 kg/cm²", expected=dim.PRESSURE)
    assert quantity.notes == ("kg/cm² read as a force per area, with standard gravity",)
    assert parse_quantity("10 kg/cm²").dimension == (-2, 1, 0, 0, 0)


@pytest.mark.parametrize(
    "text", ["5 bar(g)/K", "5 J/barg", "5 m³·psig", "5 kPa(g)·m³", "5 barg²", "5 1/bar(g)"]
)
def test_gauge_pressure_has_no_place_in_a_compound(text: str):
    """A gauge pressure inside another unit is refused."""
    with pytest.raises(QuantityError) as caught:
        parse_quantity(text, atmosphere=ATMOSPHERE)
    assert caught.value.kind == "unit-ambiguous"
    assert "gauge" in caught.value.message


def test_absolute_pressure_in_a_compound_is_a_plain_one():
    """J/bar(a) is J/bar."""
    assert parse_quantity("5 J/bar(a)").value == 5e-5


def test_half_width_of_a_gauge_pressure_has_no_atmosphere():
    """The half-width of 8.0 bar(g) is 0.05 bar."""
    assert parse_quantity("8.0 bar(g)", atmosphere=ATMOSPHERE).half_width == pytest.approx(5e3, rel=1e-15)

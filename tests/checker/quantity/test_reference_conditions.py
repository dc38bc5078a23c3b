"""Gas volumes at reference conditions are amounts of substance."""

from __future__ import annotations

import pytest

from checker.quantity import QuantityError, parse_quantity
from checker.quantity import dimensions as dim

# CODATA 2018, molar volume of ideal gas: 22.413 969 54… L/mol at 273.15 K and 101.325 kPa, 22.710 954 64… at 100 kPa.
MOLAR_VOLUME_ATM = 22.41396954e-3
MOLAR_VOLUME_BAR = 22.71095464e-3


@pytest.mark.published
@pytest.mark.parametrize(
    ("text", "volume", "molar_volume"),
    [
        ("12 Nm³ (0 °C, 1.01325 bar)", 12.0, MOLAR_VOLUME_ATM),
        ("12 Nm³(0 °C, 1 atm)", 12.0, MOLAR_VOLUME_ATM),
        ("12 Nm3 (0 °C; 101.325 kPa)", 12.0, MOLAR_VOLUME_ATM),
        ("12 Nm^3 (1 bar(a), 273.15 K)", 12.0, MOLAR_VOLUME_BAR),
        ("12 Sm³ (0 °C and 1 bar)", 12.0, MOLAR_VOLUME_BAR),
        ("12 scf (32 °F, 1 atm)", 12.0 * 0.3048**3, MOLAR_VOLUME_ATM),
        ("12 SCF (32 °F, 1 atm)", 12.0 * 0.3048**3, MOLAR_VOLUME_ATM),
    ],
)
def test_volume_at_its_conditions_is_an_amount(text: str, volume: float, molar_volume: float):
    """The amount is volume by molar volume (CODATA 2018, to its printed digits), and a note says so."""
    quantity = parse_quantity(text)
    assert quantity.dimension == dim.AMOUNT
    assert quantity.value == pytest.approx(volume / molar_volume, rel=5e-10)
    assert "ideal gas at the stated conditions" in quantity.notes[0]


def test_standard_cubic_foot_of_the_american_gas_trade():
    """1 lbmol is 379.48 scf at 60 °F and 14.696 psia (gas processors' tables, from memory)."""
    quantity = parse_quantity("379.48 scf (60 °F, 14.696 psia)")
    assert quantity.value == pytest.approx(453.59237, rel=2e-5)


@pytest.mark.parametrize(
    "text",
    [
        "12 Nm³", "12 Nm3", "12 Nm^3", "12 Sm³", "12 scf", "12 SCF", "12 Nm³ (0 °C)", "12 Nm³ (1 bar)",
        "12 Nm³ (0 °C, 15 °C)", "12 Nm³ (0 °C, 1 bar(g))", "12 Nm³ (1 bar, 2 bar)", "12 Nm³ (dry, 1 bar)",
        "12 Nm³ (0 K, 1 bar)", "12 Nm³ (0 °C, 0 bar)", "12 Nm³ ()", "12 Nm³ (0 °C, 1 bar, dry)",
        "12 Nm³ (10 Δ°C, 1 bar)",
    ],
)  # fmt: skip
def test_volume_without_its_conditions_is_refused(text: str):
    """Without one temperature and one absolute pressure the volume says nothing about the amount."""
    with pytest.raises(QuantityError) as caught:
        parse_quantity(text)
    assert caught.value.kind == "reference-conditions-missing"
    assert "12 Nm³ (0 °C, 1.01325 bar)" in caught.value.message


@pytest.mark.parametrize(
    "text", ["12 Nm³/h", "12 kJ/Nm³", "12 Nm³ (0 °C, 1 bar)/h", "12 kJ/Nm³ (0 °C, 1 bar)"]
)
def test_volume_at_conditions_stands_alone(text: str):
    """A volume at reference conditions inside another unit is refused."""
    with pytest.raises(QuantityError):
        parse_quantity(text)


def test_newton_metre_is_not_a_normal_metre():
    """Nm is an energy, Nm³ a volume at reference conditions: never newton metres cubed."""
    assert parse_quantity("12 Nm").dimension == dim.ENERGY

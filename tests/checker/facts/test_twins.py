"""Better models of an idealised body, held against published and closed-form values."""

from __future__ import annotations

import pytest

from checker.facts.twins import (
    IDEAL,
    REAL,
    blocked_in_pressure,
    compressibility,
    energy_difference,
    is_condensed,
    saturation_pressure,
    twin,
)


def test_a_name_without_a_fluid_has_no_twin() -> None:
    """A purge gas is nobody's fluid, so nothing is held against it."""
    assert twin("Purge gas", REAL) is None


@pytest.mark.published
def test_the_compressibility_of_nitrogen_follows_its_second_virial_coefficient() -> None:
    """Z = 1 + B·p/(R·T) with B = −4.5 cm³/mol at 300 K (Dymond and others, 2002; from memory), within 0.2 cm³/mol."""
    real = twin("Nitrogen", REAL)
    assert real is not None
    factor = compressibility(real, 300.0, 1e5)
    assert factor is not None
    volume = (factor - 1.0) * 8.314462618 * 300.0 / 1e5
    assert volume == pytest.approx(-4.5e-6, abs=0.2e-6)


@pytest.mark.published
def test_water_boils_where_the_release_says() -> None:
    """p_sat(373.15 K) = 101 418 Pa by IAPWS R6-95 (from memory), to the last digit."""
    real = twin("Water", REAL)
    assert real is not None
    assert saturation_pressure(real, 373.15) == pytest.approx(101418.0, abs=1.0)
    assert is_condensed(real, 373.15, 102000.0)
    assert not is_condensed(real, 373.15, 101000.0)


def test_nothing_condenses_above_the_critical_temperature() -> None:
    """Nitrogen at 300 K is a gas at any pressure."""
    real = twin("Nitrogen", REAL)
    assert real is not None
    assert not is_condensed(real, 300.0, 1e9)


def test_helium_has_three_halves_of_its_gas_constant() -> None:
    """The internal energy of a monatomic ideal gas rises by 3/2 R for each kelvin."""
    ideal = twin("Helium", IDEAL)
    assert ideal is not None
    assert ideal.gas_constant is not None
    found = energy_difference(ideal, 300.0, 400.0)
    assert found == pytest.approx(150.0 * ideal.gas_constant, rel=1e-9)


def test_liquid_water_needs_its_specific_heat() -> None:
    """From 20 °C to 90 °C liquid water takes up 4.19 kJ/(kg·K) within 0.3 % (handbook value, from memory)."""
    real = twin("Water", REAL)
    assert real is not None
    found = energy_difference(real, 293.15, 363.15)
    assert found == pytest.approx(70.0 * 4190.0, rel=3e-3)


def test_blocked_in_water_builds_up_pressure() -> None:
    """About 140 bar from 20 °C to 40 °C: expansion 3e-4/K, compressibility 4.4e-10/Pa (from memory), within 10 %."""
    real = twin("Water", REAL)
    assert real is not None
    found = blocked_in_pressure(real, 293.15, 313.15)
    assert found == pytest.approx(20.0 * 3.0e-4 / 4.4e-10, rel=0.10)

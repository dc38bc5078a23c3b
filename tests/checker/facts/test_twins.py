"""Better models of an idealised body, held against published and closed-form values."""

from __future__ import annotations

import pytest

from checker.facts.twins import (
    REAL,
    blocked_in_pressure,
    compressibility,
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


def test_blocked_in_water_builds_up_pressure() -> None:
    """About 140 bar from 20 °C to 40 °C: expansion 3e-4/K, compressibility 4.4e-10/Pa (from memory), within 10 %."""
    real = twin("Water", REAL)
    assert real is not None
    found = blocked_in_pressure(real, 293.15, 313.15)
    assert found is not None
    assert found[1] - found[0] == pytest.approx(20.0 * 3.0e-4 / 4.4e-10, rel=0.10)


def test_blocked_in_water_starts_from_the_pressure_that_is_known() -> None:
    """From 30 bar it starts at 30 bar; from a pressure below that of its vapour just above the latter."""
    real = twin("Water", REAL)
    assert real is not None
    found = blocked_in_pressure(real, 293.15, 313.15, 30e5)
    assert found is not None
    assert found[0] == pytest.approx(30e5, rel=1e-9)
    hot = blocked_in_pressure(real, 453.15, 463.15, 1e5)
    assert hot is not None
    assert hot[0] > (saturation_pressure(real, 453.15) or 0.0)

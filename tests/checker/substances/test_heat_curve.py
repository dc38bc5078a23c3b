"""Specific heats that are linear in pieces: exact integrals and their inverses."""

from __future__ import annotations

import math

import pytest
from hypothesis import given
from hypothesis import strategies as st

from checker.outcomes import NotEvaluable
from checker.substances.heat_curve import HeatCurve, Piece

RISING = Piece(300.0, 500.0, 300.0, 0.0, 0.0, 400.0, 1.0)
FLAT = Piece(500.0, 700.0, 500.0, 100e3, 255.0, 600.0)
CURVE = HeatCurve((RISING, FLAT))


def test_a_rising_specific_heat_integrates_in_closed_form() -> None:
    """For c = 400 + (T − 300): Δu = 400·200 + 200²/2 and Δs = 100 ln(500/300) + 200."""
    assert RISING.energy_at(500.0) == pytest.approx(100e3, rel=1e-14)
    assert RISING.entropy_at(500.0) == pytest.approx(100.0 * math.log(5.0 / 3.0) + 200.0, rel=1e-14)
    assert RISING.heat_at(500.0) == 600.0


@given(st.floats(300.0, 700.0))
def test_energy_and_entropy_have_inverses(temperature: float) -> None:
    """The temperature of an energy, and of an entropy, is the temperature it was made from."""
    assert CURVE.temperature_of_energy(CURVE.energy(temperature)) == pytest.approx(temperature, rel=1e-12)
    if abs(temperature - 500.0) > 1e-3:
        assert CURVE.temperature_of_entropy(CURVE.entropy(temperature)) == pytest.approx(
            temperature, rel=1e-11
        )


@pytest.mark.parametrize("value", [-1.0, 1e9])
def test_beyond_the_curve_there_is_no_temperature(value: float) -> None:
    """Energies and entropies beyond the ends are refused, outside range."""
    for inverse in (CURVE.temperature_of_energy, CURVE.temperature_of_entropy):
        with pytest.raises(NotEvaluable) as refusal:
            inverse(value)
        assert refusal.value.kind == "outside-range"


@pytest.mark.parametrize("temperature", [299.9, 700.1, -5.0, math.nan])
def test_beyond_the_curve_there_is_no_energy(temperature: float) -> None:
    """Temperatures beyond the ends are refused, outside range."""
    with pytest.raises(NotEvaluable, match="outside 300 K to 700 K"):
        CURVE.energy(temperature)


def test_a_falling_specific_heat_that_would_vanish() -> None:
    """Beyond its end a falling line has no temperature for an energy that it never reaches."""
    falling = HeatCurve((Piece(300.0, 400.0, 300.0, 0.0, 0.0, 400.0, -3.0),))
    assert falling.temperature_of_energy(25e3) == pytest.approx(400.0)
    with pytest.raises(NotEvaluable, match="no temperature has this internal energy"):
        falling.temperature_of_energy(1e6)


def test_added_heat_is_that_of_a_constant() -> None:
    """With R more, energies have R·T more and entropies R ln(T/T₀)."""
    more = RISING.with_heat_added(287.0, 300.0)
    for temperature in (300.0, 345.0, 500.0):
        gain = more.energy_at(temperature) - RISING.energy_at(temperature)
        assert gain == pytest.approx(287.0 * temperature, rel=1e-12)
        own = more.entropy_at(temperature) - RISING.entropy_at(temperature)
        assert own == pytest.approx(287.0 * math.log(temperature / 300.0), abs=1e-10)


def test_what_grows_beyond_all_numbers_is_no_energy() -> None:
    """A piece of absurd extent is not evaluable rather than infinite."""
    absurd = HeatCurve((Piece(1.0, 1e300, 1.0, 0.0, 0.0, 1e300),))
    with pytest.raises(NotEvaluable, match="no finite energy"):
        absurd.energy(1e200)


def test_ends_far_apart_keep_the_search_between_them() -> None:
    """Over sixteen decades of temperature the search for an entropy does not leave the piece by rounding."""
    wide = HeatCurve((Piece(1.0, 1.801439850948199e16, 1.0, 0.0, 0.0, 1.0, 1e-30),))
    assert wide.temperature_of_entropy(wide.entropy(5.0)) == pytest.approx(5.0, rel=1e-9)
    assert 1.0 <= wide.temperature_of_entropy(9.9e-168) < 1.1

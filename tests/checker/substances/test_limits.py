"""Limits of an equation of state."""

from __future__ import annotations

import pytest

from checker.outcomes import NotEvaluable
from checker.substances.limits import Limits

PLAIN = Limits(200.0, 500.0, 1e7, 1e3)
MELTING = Limits(200.0, 500.0, 1e8, 1e3, melting=lambda p: 200.0 + 1e-6 * p if p < 9e7 else None)
ICE = Limits(200.0, 500.0, 1e8, 1e3, melting=lambda p: 200.0 - 1e-6 * p + 2e-14 * p * p, ice_floats=True)
TWO_PARTS = Limits(200.0, 500.0, 1e8, 1e3, hot=(900.0, 5e7), pressure_min=10.0, cold_tolerance=0.0)


@pytest.mark.parametrize(
    ("limits", "temperature", "pressure"),
    [
        (PLAIN, 200.0, 1e5),
        (PLAIN, 199.981, 1e5),
        (PLAIN, 500.0 * (1 + 1e-8), 1e5),
        (MELTING, 209.99, 1e7),
        (MELTING, 201.0, 9.5e7),
        (ICE, 196.0, 5e6),
        (TWO_PARTS, 880.0, 5e7),
    ],
)
def test_states_inside_pass(limits: Limits, temperature: float, pressure: float) -> None:
    """The edges themselves, and 0.02 K of cold, are inside."""
    limits.refuse_pressure(pressure, "X")
    limits.refuse_temperature(temperature, pressure, "X")


@pytest.mark.parametrize(
    ("limits", "temperature", "words"),
    [
        (PLAIN, 199.97, "below 200 K"),
        (PLAIN, 501.0, "above 500 K"),
        (MELTING, 209.9, "melting line"),
        (ICE, 191.0, "melting line"),
        (TWO_PARTS, 901.0, "above 900 K"),
        (TWO_PARTS, 199.9999, "below 200 K"),
    ],
)
def test_temperatures_outside_are_refused(limits: Limits, temperature: float, words: str) -> None:
    """Too hot, too cold and below the melting line are named as such."""
    with pytest.raises(NotEvaluable, match=words) as refusal:
        limits.refuse_temperature(temperature, 1e7, "X")
    assert refusal.value.kind == "outside-range"


@pytest.mark.parametrize(("limits", "pressure"), [(PLAIN, 1.1e7), (TWO_PARTS, 9.0), (PLAIN, float("nan"))])
def test_pressures_outside_are_refused(limits: Limits, pressure: float) -> None:
    """Too much, too little and no pressure at all are outside-range."""
    with pytest.raises(NotEvaluable) as refusal:
        limits.refuse_pressure(pressure, "X")
    assert refusal.value.kind == "outside-range"


def test_the_ceiling_falls_at_high_pressure() -> None:
    """A formulation may reach higher temperatures at low pressures only."""
    assert TWO_PARTS.ceiling(6e7) == 500.0
    assert TWO_PARTS.ceiling(4e7) == 900.0
    assert TWO_PARTS.hottest == 900.0


def test_liquid_pressures_end_at_the_melting_line() -> None:
    """Where the liquid freezes under pressure its highest pressure is that of the melting line."""
    low, high = MELTING.liquid_pressures(230.0) or (0.0, 0.0)
    assert low == 1e3
    assert high == pytest.approx(1e8)  # the curve ends at 90 MPa
    simon = Limits(200.0, 500.0, 1e8, 1e3, melting=lambda p: 200.0 + 1e-6 * p)
    assert simon.liquid_pressures(230.0) == (1e3, pytest.approx(3e7, rel=1e-9))


def test_ice_that_floats_leaves_a_window_of_pressures() -> None:
    """Below the triple point water is liquid between two pressures, and nowhere below the coldest one."""
    low, high = ICE.liquid_pressures(192.0) or (0.0, 0.0)
    assert low == pytest.approx(1e7, rel=1e-6)
    assert high == pytest.approx(4e7, rel=1e-6)
    assert ICE.coldest == pytest.approx(187.48, abs=0.05)
    assert ICE.liquid_pressures(180.0) is None

"""Numbers and amounts in print."""

from __future__ import annotations

import math

import pytest
from hypothesis import given
from hypothesis import strategies as st

from checker.findings import Amount
from reports.numbers import MISSING, deviation, difference_unit, rounded, shown, signed, tolerance


@pytest.mark.parametrize(
    ("value", "printed"),
    [
        (0.0, "0"),
        (121.4, "121"),
        (-0.3544, "−0.354"),
        (9.996, "10.0"),
        (99.96, "100"),
        (1234567.0, "1.23×10⁶"),
        (123456.0, "123000"),
        (0.00012345, "0.000123"),
        (0.000012345, "1.23×10⁻⁵"),
        (-2e-9, "−2.00×10⁻⁹"),
        (math.nan, MISSING),
        (math.inf, MISSING),
    ],
)
def test_rounds_to_three_digits(value: float, printed: str) -> None:
    """Three significant digits, a real minus sign, powers of ten only where they are needed."""
    assert rounded(value) == printed


@given(st.floats(1e-4, 999499.0))
def test_rounding_stays_near(value: float) -> None:
    """A printed number is within half a unit of its third digit of the value."""
    assert float(rounded(value)) == pytest.approx(value, rel=5.01e-3)


def test_a_difference_has_its_sign() -> None:
    """Positive differences carry a plus; zero carries none."""
    assert [signed(x) for x in (4.0, -4.0, 0.0)] == ["+4.00", "−4.00", "0"]


@pytest.mark.parametrize(
    ("amount", "printed"),
    [
        (Amount(422.0, "kJ", "422 kJ"), "422 kJ"),
        (Amount(422.0, "kJ", "422"), "422 kJ"),
        (Amount(0.4, "", "0.40"), "0.40"),
        (Amount(8e5, "bar(g)", "8 bar(g)"), "8 bar(g)"),
        (Amount(120.0, "kJ", "120 ± 2 kJ"), "120 ± 2 kJ"),
        (Amount(math.nan, "", "superheated vapour"), "superheated vapour"),
        (Amount(3.14159265, "m", ""), "3.1416 m"),
        (Amount(1e-7, "m", "1e-7"), "1e-7 m"),
        (None, MISSING),
    ],
)
def test_an_amount_is_shown_once_with_its_unit(amount: Amount | None, printed: str) -> None:
    """The text as written stands; the unit is added only where the text has none."""
    assert shown(amount) == printed


@pytest.mark.parametrize(
    ("unit", "of_difference"),
    [
        ("°C", "K"),
        ("°F", "°R"),
        ("bar(g)", "bar"),
        ("kPa (a)", "kPa"),
        ("psig", "psi"),
        ("kJ/(kg·K)", "kJ/(kg·K)"),
    ],
)
def test_a_difference_has_the_unit_of_a_difference(unit: str, of_difference: str) -> None:
    """A difference of temperatures in °C is in K; a difference of gauge pressures has no gauge."""
    assert difference_unit(unit) == of_difference


def test_a_difference_that_is_not_there_is_a_dash() -> None:
    """No value and no finite value print alike, as missing."""
    assert deviation(None, 1.0, None) == deviation(math.nan, 1.0, None) == MISSING
    assert tolerance(None, None) == tolerance(math.inf, None) == MISSING


@pytest.mark.parametrize(
    ("value", "tolerated", "printed"),
    [
        (121.4, 2.1, "+121.4"),
        (-0.0002, 0.0055, "−0.0002"),
        (0.00001, 0.0055, "0"),
        (-63.24, 42.0, "−63"),
        (-0.4, None, "−0.400"),
        (0.0123456, 1e-9, "+0.0123"),
        (5e8, 2.0, "+5.00×10⁸"),
        (0.0, 2.0, "0"),
    ],
)
def test_a_deviation_ends_where_its_tolerance_does(
    value: float, tolerated: float | None, printed: str
) -> None:
    """A deviation is rounded to the second digit of its tolerance, to three digits where there is none."""
    assert deviation(value, tolerated, None) == printed


def test_a_deviation_has_the_unit_of_a_difference() -> None:
    """Deviation and tolerance beside a temperature in °C are in K."""
    beside = Amount(60.0, "°C", "60 °C")
    assert (deviation(-0.4, 0.3, beside), tolerance(0.345, beside)) == ("−0.40 K", "0.34 K")

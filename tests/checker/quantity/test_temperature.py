"""A temperature and a difference of temperatures are never taken for each other."""

from __future__ import annotations

import pytest

from checker.quantity import QuantityError, Scale, parse_quantity
from checker.quantity import dimensions as dim

POINT, DIFFERENCE = Scale.ABSOLUTE_TEMPERATURE, Scale.TEMPERATURE_DIFFERENCE


@pytest.mark.parametrize(
    ("text", "kelvin"),
    [
        ("25 °C", 298.15),
        ("25°C", 298.15),
        ("-40 °C", 233.15),
        ("-40 °F", 233.15),
        ("77 °F", 298.15),
        ("212 °F", 373.15),
        ("536.67 °R", 298.15),
        ("298.15 K", 298.15),
        ("0 K", 0.0),
        ("-273.15 °C", 0.0),
        ("-459.67 °F", 0.0),
        ("25 degC", 298.15),
        ("25 deg C", 298.15),
        ("25 Celsius", 298.15),
        ("540 Rankine", 300.0),
        ("25 ºC", 298.15),
        ("25 ˚C", 298.15),
        ("25℃", 298.15),
        ("77 ℉", 298.15),
        ("300 \u212a", 300.0),
        ("300 °K", 300.0),
    ],
)
def test_temperature_is_absolute(text: str, kelvin: float):
    """Every accepted spelling of a temperature gives its absolute value in kelvin."""
    quantity = parse_quantity(text, scale=POINT)
    assert quantity.value == pytest.approx(kelvin, rel=1e-15, abs=1e-12)
    assert quantity.dimension == dim.TEMPERATURE


@pytest.mark.parametrize(
    ("text", "kelvin"),
    [
        ("10 K", 10.0),
        ("10 ΔK", 10.0),
        ("10 Δ°C", 10.0),
        ("10 ∆°C", 10.0),
        ("10 Δ℃", 10.0),
        ("18 Δ°F", 10.0),
        ("18 °R", 10.0),
        ("18 Δ°R", 10.0),
        ("-10 K", -10.0),
        ("-400 Δ°C", -400.0),
    ],
)
def test_difference_has_no_zero_point(text: str, kelvin: float):
    """A difference is multiplied by its factor only, with either sign of the capital delta."""
    quantity = parse_quantity(text, scale=DIFFERENCE)
    assert quantity.value == pytest.approx(kelvin, rel=1e-15)
    assert quantity.unit.offset == 0.0


@pytest.mark.parametrize(
    ("text", "scale", "suggestion"),
    [
        ("10 °C", DIFFERENCE, "10 Δ°C"),
        ("18 °F", DIFFERENCE, "18 Δ°F"),
        ("10℃", DIFFERENCE, "10Δ°C"),
        ("10 degC", DIFFERENCE, "10 Δ°C"),
        ("10 Δ°C", POINT, "10 °C"),
        ("10 ∆°C", POINT, "10 °C"),
        ("10 ΔK", POINT, "10 K"),
        ("18 Δ°F", POINT, "18 °F"),
    ],
)
def test_wrong_kind_is_refused(text: str, scale: Scale, suggestion: str):
    """A temperature in a field for a difference, or the reverse, is refused with the right spelling."""
    with pytest.raises(QuantityError) as caught:
        parse_quantity(text, scale=scale)
    assert caught.value.kind == "temperature-kind-wrong"
    assert caught.value.suggestion == suggestion


@pytest.mark.parametrize(
    ("text", "scale", "suggestion"),
    [
        ("25 C", POINT, "25 °C"), ("77 F", POINT, "77 °F"), ("540 R", POINT, "540 °R"),
        ("25 C", DIFFERENCE, "25 Δ°C"), ("77 F", DIFFERENCE, "77 Δ°F"),
    ],
)  # fmt: skip
def test_letter_without_degree_sign_is_refused(text: str, scale: Scale, suggestion: str):
    """C, F and R are symbols of other things; the suggestion suits the field."""
    with pytest.raises(QuantityError) as caught:
        parse_quantity(text, scale=scale)
    assert caught.value.suggestion == suggestion


@pytest.mark.parametrize("text", ["-300 °C", "-1 K", "-460 °F", "-0.001 °R", "-273.16 °C"])
def test_nothing_is_colder_than_absolute_zero(text: str):
    """A temperature below absolute zero is refused by its own kind."""
    with pytest.raises(QuantityError) as caught:
        parse_quantity(text, scale=POINT)
    assert caught.value.kind == "below-absolute-zero"


def test_degrees_in_a_compound_unit_are_differences():
    """10 kJ/°C is 10 kJ/K: no zero point enters a product or quotient."""
    for text in ("10 kJ/°C", "10 kJ/degC", "10 kJ/Δ°C", "10 kJ/K"):
        quantity = parse_quantity(text)
        assert (quantity.value, quantity.unit.offset) == (10e3, 0.0)
    assert parse_quantity("10 kJ/°F").value == pytest.approx(18e3, rel=1e-15)


def test_half_width_of_a_temperature_is_a_difference():
    """The half-width of 25.0 °C is 0.05 K and that of 77 °F is 5/18 K."""
    assert parse_quantity("25.0 °C", scale=POINT).half_width == 0.05
    assert parse_quantity("77 °F", scale=POINT).half_width == pytest.approx(5 / 18, rel=1e-15)


def test_numbers_return_to_the_stated_scale():
    """number_of goes back through the zero point, difference_of does not."""
    quantity = parse_quantity("25 °C", scale=POINT)
    assert quantity.number_of(373.15) == pytest.approx(100.0, abs=1e-12)
    assert quantity.difference_of(10.0) == 10.0

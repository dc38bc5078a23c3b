"""The stated half-width."""

from __future__ import annotations

import pytest

from checker.quantity import QuantityError, Scale, parse_quantity


@pytest.mark.parametrize(
    ("text", "value", "plus_minus"),
    [
        ("120 ± 2 kJ", 120e3, 2e3),
        ("120±2kJ", 120e3, 2e3),
        ("(120 ± 2) kJ", 120e3, 2e3),
        ("(120±2 ) kJ", 120e3, 2e3),
        ("120 kJ ± 2 kJ", 120e3, 2e3),
        ("120 kJ ± 300 J", 120e3, 300.0),
        ("120 kJ ± 2 %", 120e3, 2.4e3),
        ("-120 kJ ± 2 %", -120e3, 2.4e3),
        ("120 +/- 2 kJ", 120e3, 2e3),
        ("0.85 ± 0.01", 0.85, 0.01),
        ("85 ± 2 %", 0.85, 0.02),
        ("85 % ± 2 %", 0.85, 0.02),
        ("8 ± 0.1 bar(g)", 9e5, 1e4),
        ("8 bar(g) ± 0.1 bar", 9e5, 1e4),
        ("25 ± 0.5 °C", 298.15, 0.5),
        ("25 °C ± 0.5 K", 298.15, 0.5),
        ("1.2×10⁵ ± 2×10³ Pa", 1.2e5, 2e3),
    ],
)
def test_plus_minus_is_read(text: str, value: float, plus_minus: float):
    """The ± may stand before the unit, in brackets, or behind with a unit of its own."""
    quantity = parse_quantity(text, atmosphere=1e5)
    assert quantity.value == pytest.approx(value, rel=1e-15)
    assert quantity.plus_minus == pytest.approx(plus_minus, rel=1e-15)


@pytest.mark.parametrize(
    "text",
    [
        "120 ± kJ", "120 ± -2 kJ", "120 ± +2 kJ", "± 2 kJ", "(120 ± 2 kJ", "(120) kJ", "120 ± 2 ± 3 kJ",
        "120 kJ ± 2 K", "0.85 ± 2 kJ/kJ ± 1", "25 °C ± 2 %", "8 bar(g) ± 2 %", "120 ± 2 xyz", "120 kJ ± 2 xyz",
        "±", "120 ±", "(±)",
    ],
)  # fmt: skip
def test_plus_minus_that_says_nothing_is_refused(text: str):
    """A ± without number, with a sign, of another kind, or relative to an arbitrary zero is refused."""
    with pytest.raises(QuantityError):
        parse_quantity(text, atmosphere=1e5)


def test_a_missing_unit_behind_the_plus_minus_is_suggested():
    """120 kJ ± 2 is refused and 120 ± 2 kJ suggested."""
    with pytest.raises(QuantityError) as caught:
        parse_quantity("120 kJ ± 2")
    assert caught.value.suggestion == "120 ± 2 kJ"


def test_the_digits_still_claim_their_half_width():
    """The stated ± and the half-width of the digits are kept apart."""
    quantity = parse_quantity("120.0 ± 2 °C", scale=Scale.ABSOLUTE_TEMPERATURE)
    assert (quantity.half_width, quantity.plus_minus) == (0.05, 2.0)


@pytest.mark.parametrize("text", ["5 ± 10 % bar", "5 % bar", "5 bar·%", "3 %²", "3 ‰·kJ", "5 kJ/%"])
def test_a_percentage_is_no_part_of_a_unit(text: str):
    """5 ± 10 % bar is not a hundredth of the pressure: a percentage stands alone or behind the ±."""
    with pytest.raises(QuantityError, match="a percentage stands alone"):
        parse_quantity(text)


def test_a_fraction_before_a_percent_sign_is_read_with_a_note():
    """0.5 ± 5 % could be meant as 0.5, give or take 5 %; how it was read is told. 95 ± 2 % is clear."""
    assert parse_quantity("0.5 ± 5 %").value == pytest.approx(0.005)
    assert "read as (0.5 ± 5) %" in parse_quantity("0.5 ± 5 %").notes[0]
    assert parse_quantity("95 ± 2 %").notes == ()
    assert parse_quantity("0.5 % ± 0.1 %").notes == ()

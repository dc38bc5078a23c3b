"""The number grammar and the half-widths that digits claim."""

from __future__ import annotations

import pytest

from checker.quantity import QuantityError, parse_quantity
from checker.quantity.number import read_number

THIN, NO_BREAK, NARROW = "\u2009", "\u00a0", "\u202f"


@pytest.mark.parametrize(
    ("text", "value"),
    [
        ("312.0", 312.0),
        ("+5", 5.0),
        ("-5", -5.0),
        ("−5", -5.0),
        (".5", 0.5),
        ("5.", 5.0),
        ("007", 7.0),
        (f"1{THIN}200", 1200.0),
        (f"1{NO_BREAK}200{NO_BREAK}000", 1200000.0),
        (f"12{NARROW}345.678{NARROW}9", 12345.6789),
        (f"0.500{THIN}25", 0.50025),
        ("1.2e3", 1200.0),
        ("1.2E−3", 0.0012),
        ("1.2×10^3", 1200.0),
        ("1.2 × 10^-3", 0.0012),
        ("1.2×10⁵", 120000.0),
        ("1.2·10⁻⁵", 1.2e-5),
        ("1.2*10^3", 1200.0),
        ("1.2 x 10^+3", 1200.0),
        ("0.1", 0.1),
        ("123456789.123456789", 123456789.123456789),
    ],
)
def test_number_is_read(text: str, value: float):
    """A number of the grammar has the value that its digits say, to the last bit."""
    number = read_number(text)
    assert number is not None
    assert number.end == len(text)
    assert number.value == value


@pytest.mark.parametrize(
    "text",
    [
        "1,5", "1,000", "1.013,25", "1_000", "1'000", "1’000", "5..6", "5.6.7", "１２", "١٢", "nan", "inf", "∞",
        "e5", "--5", "- 5", "~5", "<5", "≈5", "", ".", "+", "½", "10⁵", "1.2×10⁵⁵⁵⁵", "1e9999", "9**9**9",
        f"1{THIN}20", f"1234{THIN}567", f"1{THIN}2345", "1 200",
    ],
)  # fmt: skip
def test_other_texts_are_no_number_in_full(text: str):
    """Nothing outside the grammar is read to its end as a number."""
    number = read_number(text)
    assert number is None or number.end < len(text)
    with pytest.raises(QuantityError):
        parse_quantity(text)


@pytest.mark.parametrize(
    ("text", "half_width", "open_half_width"),
    [
        ("312.0", 0.05, 0.05),
        ("312", 0.5, 0.5),
        ("1200", 0.5, 5.0),
        ("1230", 0.5, 5.0),
        ("300", 0.5, 0.5),
        ("120000", 0.5, 500.0),
        ("1000000", 0.5, 5000.0),
        ("120001", 0.5, 0.5),
        ("100050", 0.5, 5.0),
        ("-1200", 0.5, 5.0),
        ("0001200", 0.5, 5.0),
        (f"1{THIN}200", 0.5, 5.0),
        ("1200.", 0.5, 0.5),
        ("1200.0", 0.05, 0.05),
        ("1.20e3", 5.0, 5.0),
        ("1.2×10³", 50.0, 50.0),
        ("12e2", 50.0, 50.0),
        ("1200e0", 0.5, 0.5),
        ("0", 0.5, 0.5),
        ("0.00", 0.005, 0.005),
        ("000", 0.5, 0.5),
        ("0.001", 0.0005, 0.0005),
        (f"0.123{THIN}4", 0.00005, 0.00005),
    ],
)
def test_half_width_follows_the_digits(text: str, half_width: float, open_half_width: float):
    """Half a unit of the last digit; zeros ending an integer are open beyond three significant digits."""
    number = read_number(text)
    assert number is not None
    assert (number.half_width, number.open_half_width) == (half_width, open_half_width)


@pytest.mark.parametrize("text", ["1e61", "-1e999", "1e-400", "0e400", "9" * 61, "0" * 65, "1.5e-130"])
def test_numbers_beyond_any_quantity_are_refused(text: str):
    """A number that would overflow, vanish or never end is refused as unreadable."""
    with pytest.raises(QuantityError) as caught:
        parse_quantity(f"{text} kJ")
    assert caught.value.kind == "quantity-unreadable"


def test_a_no_break_space_before_a_reciprocal_unit_is_no_digit_group():
    """The 1 of 1/K belongs to the unit, whatever space stands before it."""
    for text in (f"0.500{NO_BREAK}1/K", f"5{NO_BREAK}1/K"):
        assert parse_quantity(text).unit.text == "1/K"

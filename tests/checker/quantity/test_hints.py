"""Numbers that look right to a person or to a lenient parser: refused, with what would be right."""

from __future__ import annotations

import pytest

from checker.quantity import QuantityError, parse_quantity
from checker.quantity import dimensions as dim

# Left: what libraries read without a word, with another value. Right: the suggestion, empty where a person decides.
SILENTLY_WRONG_ELSEWHERE = [
    ("–5 kJ", "-5 kJ"),
    ("— 5 kJ", "-5 kJ"),
    ("5–6 kJ", "5.5 ± 0.5 kJ"),
    ("5-6 kJ", "5.5 ± 0.5 kJ"),
    ("5 - 6 kJ", "5.5 ± 0.5 kJ"),
    ("5..6 kJ", "5.5 ± 0.5 kJ"),
    ("5 to 6 kJ", "5.5 ± 0.5 kJ"),
    ("-5…6 kJ", "0.5 ± 5.5 kJ"),
    ("~5 kJ", "5 kJ"),
    ("≈5 kJ", "5 kJ"),
    ("<5 kJ", "5 kJ"),
    (">= 5 kJ", "5 kJ"),
    ("ca. 5 kJ", "5 kJ"),
    ("approx 5 kJ", "5 kJ"),
    ("1 000 kPa", "1000 kPa"),
    ("12 345 678.5 kPa", "12345678.5 kPa"),
    ("1'000 kPa", "1000 kPa"),
    ("1’000 kPa", "1000 kPa"),
    ("1_000 kPa", "1000 kPa"),
    ("1,5 kPa", "1.5 kPa"),
    ("0,125 kPa", "0.125 kPa"),
    (",5 kPa", "0.5 kPa"),
    ("−1,5 kPa", "−1.5 kPa"),
    ("1.013,25 kPa", "1013.25 kPa"),
    ("1,013.25 kPa", "1013.25 kPa"),
    ("1,000,000 kPa", "1000000 kPa"),
    ("1,000 kPa", ""),
    ("12,34,567 kPa", ""),
    ("1.2,5 kPa", ""),
    ("120(2) kJ", "120 ± 2 kJ"),
    ("120.0(15) kJ", "120.0 ± 1.5 kJ"),
    ("5 kJ\n7", ""),
    ("5 kJ\t", ""),
    ("12\n", ""),
    ("5 kJ # 7", ""),
    ("∞ kJ", ""),
    ("nan kJ", ""),
    ("NaN", ""),
    ("inf kJ", ""),
    ("-Infinity kJ", ""),
    ("1e400 kJ", ""),
    ("1e99999999 kJ", ""),
    ("1e9999999", ""),
    ("9**9**9", ""),
    ("2*3 kJ", ""),
    ("3+4 kJ", ""),
    ("1/2 kJ", ""),
    ("1 1/2 in", ""),
    ("5½ kJ", ""),
    ("½ kJ", ""),
    ("١٢ kJ", "12 kJ"),
    ("１２ kJ", "12 kJ"),
    ("- 5 kJ", "-5 kJ"),
    ("10^5 Pa", "1e5 Pa"),
    ("10⁵ Pa", "1e5 Pa"),
    ("10**5 Pa", "1e5 Pa"),
    ('5 "kJ"', "5 kJ"),
    ('"5 kJ"', "5 kJ"),
    ("kJ", ""),
    ("five kJ", ""),
    ("", ""),
    ("   ", ""),
    ("1.2.3 kJ", ""),
    ("--5 kJ", ""),
    ("0x10 J", ""),
    ("5 kJ 3", ""),
    ("5 kJ; 6 kJ", ""),
    ("True", ""),
    ("5 kJ\u202e", ""),
    ("312 [kJ]", "312 kJ"),
    ("0.95 -", "0.95"),
    ("0.95 [-]", "0.95"),
    ("0.95 []", "0.95"),
    ("2026-03-14", ""),
]


@pytest.mark.parametrize(("text", "suggestion"), SILENTLY_WRONG_ELSEWHERE)
def test_text_is_refused_with_a_hint(text: str, suggestion: str):
    """The text is refused with a message, and with the suggestion that a reader would make."""
    with pytest.raises(QuantityError) as caught:
        parse_quantity(text)
    assert caught.value.kind in {"quantity-unreadable", "unit-unknown"}
    assert caught.value.message
    assert caught.value.suggestion == suggestion


@pytest.mark.parametrize(("text", "suggestion"), [row for row in SILENTLY_WRONG_ELSEWHERE if row[1]])
def test_suggestion_is_readable(text: str, suggestion: str):
    """What is suggested would be accepted."""
    assert parse_quantity(suggestion).text == suggestion


@pytest.mark.parametrize(
    ("text", "part"),
    [
        ("5 to 6 kJ", "a range is no quantity"),
        ("1,000 kPa", "1,000 could be 1000 or 1.000"),
        ("<5 kJ", "a limit belongs to `limits`"),
        ("nan kJ", "is left out"),
        ("2*3 kJ", "nothing is calculated"),
        ("kJ 5", "begins with its number"),
        ("x" * 129, "at most 128 characters"),
    ],
)
def test_message_says_what_would_be_right(text: str, part: str):
    """The message names the mistake in the words of the trade."""
    with pytest.raises(QuantityError) as caught:
        parse_quantity(text)
    assert part in caught.value.message


def test_offset_points_at_the_part_meant():
    """The offset of an error counts code points from the start of the text."""
    for text, offset in (
        ("5 kJ/kgg", 5),
        ("  5 bar(g)", 4),
        ("5 kJ/(kg·Q)", 9),
        ("1１ kJ", 1),
        ("120 ± x kJ", 6),
    ):
        with pytest.raises(QuantityError) as caught:
            parse_quantity(text)
        assert caught.value.offset == offset, text


@pytest.mark.parametrize(("text", "expected"), [("301 k J", dim.ENERGY), ("50 cbm", dim.VOLUME)])
def test_a_suggestion_is_of_the_kind_that_the_field_needs(text: str, expected: dim.Dimension):
    """What would be readable but no energy (kelvin joule) is not suggested where an energy belongs."""
    with pytest.raises(QuantityError) as caught:
        parse_quantity(text, expected=expected)
    assert caught.value.suggestion == ""


def test_a_blank_out_of_place_is_called_so():
    """Two numbers in one text: the message names the blank instead of showing one."""
    with pytest.raises(QuantityError, match="a blank has no place in a unit here"):
        parse_quantity("5 bar 300 mbar")

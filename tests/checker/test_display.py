"""Numbers for people."""

import pytest
from hypothesis import given
from hypothesis import strategies as st

from checker.display import deviation_texts, difference_text, format_number
from checker.findings import Amount
from reports import numbers
from tests.checker.cases import case, gas_bottle


@pytest.mark.parametrize(
    ("value", "text"),
    [
        (0.0, "0"),
        (-0.0, "0"),
        (301.234567, "301.23"),
        (-301.2, "−301.2"),
        (0.00579123, "0.0057912"),
        (123456.7, "123457"),
        (8.6e9, "8.6000e+09"),
        (2.5e-7, "2.5000e−07"),
        (1e-15, "1.0e−15"),
    ],
)
def test_numbers_are_readable(value, text):
    """Five significant digits, a real minus sign, an exponent only where nothing else can be read."""
    assert format_number(value) == text


def test_a_difference_of_degrees_is_in_kelvin():
    """A deviation of a °C value is no temperature."""
    assert difference_text(0.3, "°C") == "0.3 K"
    assert difference_text(0.3, "bar(g)") == "0.3 bar"


@given(st.floats(1e-4, 9e4), st.floats(1.0, 900.0))
def test_a_message_rounds_a_deviation_as_the_report_does(tolerance, times):
    """The same deviation beside the same tolerance is printed once in the message and once in the table."""
    amount = Amount(0.0, "kJ", "0")
    for value in (tolerance * times, -tolerance * times):
        if abs(value) < 1e6:
            deviation, allowed = deviation_texts(value, tolerance, "kJ")
            assert numbers.deviation(value, tolerance, amount).removeprefix("+") == deviation
            assert numbers.tolerance(tolerance, amount) == allowed


def test_a_huge_deviation_has_three_digits():
    """Beyond a million digits beside the tolerance say nothing."""
    assert deviation_texts(2.0e7, 31.7, "kJ") == ("2.00e+07 kJ", "32 kJ")


def test_formulas_use_absolute_temperature_and_pressure():
    """In a product °C becomes K and bar(g) becomes bar; a looked-up state keeps the originator's units."""
    record = gas_bottle({"exergy_change": "1 kJ"})
    record["states"]["cold"]["gas"]["inputs"] = {"temperature": "26.85 °C", "pressure": "3.987 bar(g)"}
    found = case(record)
    assert found.display.absolute("states/cold/gas/temperature", 300.0).unit == "K"
    pressure = found.display.absolute("states/cold/gas/pressure", 5e5)
    assert (pressure.unit, pressure.text) == ("bar", "5")
    assert found.display.amount("states/cold/gas/pressure", 5e5).text == "3.987"


def test_a_quantity_that_is_not_stated_takes_the_unit_of_its_kind():
    """The hot pressure is shown in the unit in which the cold one was stated."""
    found = case(gas_bottle())
    assert found.display.amount("states/hot/gas/pressure", 6e5).unit == "bar"
    assert found.display.amount("processes/warming/heat", 1e3).unit == "kJ"

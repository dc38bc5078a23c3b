"""Properties that hold for every text."""

from __future__ import annotations

import pickle
import subprocess
import sys
from decimal import Decimal
from pathlib import Path

import pytest
from hypothesis import example, given, settings
from hypothesis import strategies as st

from checker.quantity import Quantity, QuantityError, Scale, known_units, parse_quantity, unit
from checker.quantity import dimensions as dim
from checker.quantity.reading import read_unit
from checker.quantity.suggest import nearest_name

ROOT = Path(__file__).parents[3]
ATMOSPHERE = 101300.0

_SIGNS = "0123456789.,eE+-−–± ×·*/^()[]²³⁻¹°ΔK_'\u00a0\u2009\u202f%&;#\"\n"
_FRAGMENTS = st.sampled_from(
    [*known_units(), *_SIGNS, "kJ/(kg·K)", "10^", "Nm³", "(0 °C, 1 bar)", "(g)", "9" * 30]
)
ANY_TEXT = st.one_of(st.text(max_size=160), st.lists(_FRAGMENTS, max_size=24).map("".join))
NUMBERS = st.decimals(min_value=-(10**9), max_value=10**9, allow_nan=False, allow_infinity=False, places=4)


def read_or_refused(text: str, scale: Scale, expected: dim.Dimension | None) -> Quantity | QuantityError:
    """Return the quantity, or the error that refuses it."""
    try:
        return parse_quantity(text, scale=scale, expected=expected, atmosphere=ATMOSPHERE)
    except QuantityError as error:
        return error


@settings(max_examples=1500, deadline=500)
@given(text=ANY_TEXT, scale=st.sampled_from(Scale), expected=st.sampled_from([None, dim.NONE, dim.ENERGY]))
@example(text="m" + "²" * 50, scale=Scale.PLAIN, expected=None)
@example(text="5" + "/kg" * 5000, scale=Scale.PLAIN, expected=None)
@example(text="5 " + "(" * 3000, scale=Scale.PLAIN, expected=None)
@example(text="1" + "0" * 5000 + " kJ", scale=Scale.PLAIN, expected=None)
def test_any_text_is_read_or_refused(text: str, scale: Scale, expected: dim.Dimension | None):
    """Whatever the text, the answer comes at once: a finite quantity, or a QuantityError inside the text."""
    read = read_or_refused(text, scale, expected)
    if isinstance(read, QuantityError):
        assert read.message
        assert 0 <= read.offset <= len(text)
        assert not read.suggestion or isinstance(read_or_refused(read.suggestion, scale, expected), Quantity)
        return
    assert abs(read.value) < float("inf")
    assert 0 < read.half_width <= read.open_half_width < float("inf")
    assert read.text == text


@settings(max_examples=300)
@given(text=ANY_TEXT)
def test_any_unit_text_is_read_or_refused(text: str):
    """A unit text gives a unit with a positive factor, or a QuantityError."""
    try:
        found = unit(text)
    except QuantityError:
        return
    assert 0 < found.factor < float("inf")


@given(number=NUMBERS, name=st.sampled_from([n for n in known_units() if not unit(n).offset]))
def test_number_returns_from_si(number: Decimal, name: str):
    """number_of gives back the stated number, gauge for gauge."""
    quantity = parse_quantity(f"{number} {name}", atmosphere=ATMOSPHERE)
    size = max(abs(float(number)), abs(quantity.value / quantity.unit.factor))
    assert quantity.number_of(quantity.value) == pytest.approx(float(number), abs=4e-16 * size)


@given(number=st.decimals(min_value=-273, max_value=5000, allow_nan=False, places=2))
def test_celsius_and_fahrenheit_agree(number: Decimal):
    """A temperature written in °C and in °F is the same temperature."""
    celsius = parse_quantity(f"{number} °C", scale=Scale.ABSOLUTE_TEMPERATURE)
    fahrenheit = parse_quantity(f"{number * 9 / 5 + 32} °F", scale=Scale.ABSOLUTE_TEMPERATURE)
    assert fahrenheit.value == pytest.approx(celsius.value, abs=1e-9)


@given(number=NUMBERS)
def test_unicode_minus_and_grouping_change_nothing(number: Decimal):
    """The same digits with a typographic minus and thin spaces between groups are the same quantity."""
    plain = parse_quantity(f"{number} kJ")
    pretty = parse_quantity(f"{number:,}".replace(",", "\u2009").replace("-", "−") + " kJ")
    assert (pretty.value, pretty.half_width) == (plain.value, plain.half_width)


@given(digits=st.from_regex(r"-?[0-9]{1,12}(\.[0-9]{1,8})?", fullmatch=True))
def test_half_width_is_half_a_unit_of_the_last_digit(digits: str):
    """The half-width equals that of an exact decimal reading of the same digits."""
    place = Decimal(digits).as_tuple().exponent
    assert parse_quantity(digits).half_width == float(Decimal(5).scaleb(int(place) - 1))


def test_hostile_texts_answer_at_once():
    """Towers of powers, endless exponents and endless products are refused within the time of a start-up."""
    code = (
        "from checker.quantity import parse_quantity, QuantityError\n"
        "for t in ['9**9**9', '5 m**9**9**9', '1e9999999', '5 m' + '²' * 50, '5' + '/kg' * 5000, '5 ' + '(' * 3000,\n"
        "          '5 ' + 'kJ·' * 40, '1,' * 60, '1 ' * 64, '(' * 128, '5±' * 60, '1e1' * 42]:\n"
        "    try:\n        parse_quantity(t)\n    except QuantityError:\n        continue\n    raise SystemExit(t)\n"
    )
    subprocess.run([sys.executable, "-c", code], cwd=ROOT, check=True, timeout=20)


def test_reading_is_deterministic():
    """The same text gives an equal quantity, cached or not."""
    first = parse_quantity("1.2 kJ/kg·K", expected=dim.SPECIFIC_ENTROPY)
    assert parse_quantity("1.2 kJ/kg·K", expected=dim.SPECIFIC_ENTROPY) == first


def test_first_use_from_several_threads():
    """Eight threads that need the unit table at once all get the same answer."""
    code = (
        "from concurrent.futures import ThreadPoolExecutor\n"
        "from checker.quantity import parse_quantity\n"
        "texts = [f'5 {u}' for u in ('kJ', 'bar', 'kJ/kg', 'psi', 'BTU', 'W/(m²·K)', 'lb/ft³', '°F')] * 4\n"
        "with ThreadPoolExecutor(8) as pool:\n    together = list(pool.map(parse_quantity, texts))\n"
        "assert together == [parse_quantity(text) for text in texts]\n"
    )
    subprocess.run([sys.executable, "-c", code], cwd=ROOT, check=True, timeout=60)


def test_caches_are_bounded():
    """However many distinct unit texts a package brings, the caches keep a fixed number."""
    assert read_unit.cache_info().maxsize == 1024
    assert unit.cache_info().maxsize == 256
    assert nearest_name.cache_info().maxsize == 256


def test_quantities_and_errors_travel_between_processes():
    """A pickled quantity is equal to itself, and a pickled error keeps its fields."""
    quantity = parse_quantity("8 ± 0.1 bar(g)", atmosphere=ATMOSPHERE)
    assert pickle.loads(pickle.dumps(quantity)) == quantity
    error = pickle.loads(pickle.dumps(QuantityError("unit-unknown", "no", 3, "5 kJ")))
    assert (error.kind, error.message, error.offset, error.suggestion) == ("unit-unknown", "no", 3, "5 kJ")

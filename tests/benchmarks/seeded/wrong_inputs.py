"""Slips of inputs: the text is right, and another value is used."""

from __future__ import annotations

from collections.abc import Iterator
from decimal import Decimal
from itertools import pairwise

from tests.benchmarks.seeded import units as un
from tests.benchmarks.seeded.chain import Chain, Given, Slip

PRESSURE_SIZES = {
    1e5: (1e3, 1e6, 6894.757293168361, 101325.0, 98066.5),
    1e3: (1e5,),
    1e6: (1e5,),
    6894.757293168361: (1e5,),
}
"""Size of a pressure unit → those of the units that it is taken for. [Pa]"""
VOLUME_SIZES = (1.0, 1e-3, 3.785411784e-3, 0.028316846592)
MASS_SIZES = (1.0, 1e-3, 0.45359237)
DIGITS = {
    "transposed": "input digits transposed",
    "dropped": "input digit dropped",
    "doubled": "input digit doubled",
    "shifted": "input decimal shifted",
}


def input_slips(chain: Chain, walls: frozenset[str] = frozenset()) -> Iterator[Slip]:
    """Yield every way in which an input can be used wrongly; ``walls`` are keys of boundary temperatures."""
    for given in chain.givens:
        if given.kind == "shared":
            continue  # several bodies have it, each by a text of its own
        for kind, value in _of_kind(given, chain, walls):
            if value != given.value:
                yield Slip(kind, given.key, value=value)


def _of_kind(given: Given, chain: Chain, walls: frozenset[str]) -> Iterator[tuple[str, float]]:
    number, unit = _number(given), given.unit
    if given.kind == "pressure":
        yield from _pressures(given, number, chain)
    if given.kind == "volume":
        yield from (("volume in another unit", number * size) for size in VOLUME_SIZES)
    if given.kind == "mass":
        yield from (("mass in another unit", number * size) for size in MASS_SIZES)
    if given.kind == "temperature":
        yield from _temperatures(given, number, walls)
    if given.kind == "gas constant":
        yield "universal for specific gas constant", 8.314 * 1000.0
    for manner, text in altered_digits(given.text.removesuffix(unit.text).strip()):
        if readable(text):
            yield DIGITS[manner], un.stated_value(text, unit)
    if given.key[:1].isdigit() and "." in given.key:
        name = given.key.split(".", 1)[1]
        for other in chain.givens:
            if other is not given and other.key[:1].isdigit() and other.key.endswith(f".{name}"):
                yield "value of another state", other.value


def _number(given: Given) -> float:
    return float(Decimal(given.text.removesuffix(given.unit.text).strip()))


def _pressures(given: Given, number: float, chain: Chain) -> Iterator[tuple[str, float]]:
    atmosphere = next(other.value for other in chain.givens if other.key == "p0")
    if given.unit.zero:
        yield "gauge pressure as absolute", number * given.unit.size
    else:
        yield "absolute pressure as gauge", given.value + atmosphere
    for size in PRESSURE_SIZES[given.unit.size]:
        yield "pressure in another unit", number * size + given.unit.zero


def _temperatures(given: Given, number: float, walls: frozenset[str]) -> Iterator[tuple[str, float]]:
    if given.unit is un.CELSIUS:
        name = "Celsius as kelvin"
        if given.key in walls:
            name = "Celsius boundary temperature"
        if given.key == "t0":
            name = "Celsius surroundings temperature"
        if number > 0.0:
            yield name, number
        yield "kelvin added twice", given.value + 273.15
    if given.unit is un.FAHRENHEIT:
        yield "Fahrenheit as Celsius", number + 273.15


def altered_digits(text: str) -> Iterator[tuple[str, str]]:
    """Yield (manner, text) for each slip of the pen: neighbours transposed, one dropped or doubled, the point moved."""
    places = [i for i, character in enumerate(text) if character.isdigit()]
    for a, b in pairwise(places):
        if text[a] != text[b]:
            swapped = list(text)
            swapped[a], swapped[b] = text[b], text[a]
            yield "transposed", "".join(swapped)
    for a in places:
        if len(places) > 1:
            yield "dropped", text[:a] + text[a + 1 :]
        yield "doubled", text[:a] + text[a] + text[a:]
    for power in (-1, 1):
        yield "shifted", f"{Decimal(text).scaleb(power):f}"


def readable(text: str) -> bool:
    """Say whether an altered text is still a number that is not zero."""
    return any(c in "123456789" for c in text) and text.strip("-")[:1].isdigit()

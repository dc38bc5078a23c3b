"""Slips on an input that is stated rightly and used wrongly: its scale, its unit, its digits, its place."""

from __future__ import annotations

from collections.abc import Callable, Iterator
from typing import Final

from checker.findings import Outcome
from checker.quantity import dimensions as dim
from checker.slips.bench import Bench
from checker.slips.digits import doubled, dropped, shifted, transposed
from checker.slips.slip import Change, Slip
from checker.submission import Role, Statement

CELSIUS_ZERO: Final = 273.15
ATMOSPHERE: Final = 101325.0
PRESSURE_UNITS: Final = (1.0, 1e2, 1e3, 1e5, 1e6, 6894.757293168361, 101325.0, 98066.5, 101325.0 / 760.0)
"""Pa, mbar, kPa, bar, MPa, psi, atm, kgf/cm², torr. [Pa]"""
VOLUME_UNITS: Final = (1.0, 1e-3, 1e-6, 3.785411784e-3, 0.028316846592)
"""m³, litre, cm³, US gallon, cubic foot. [m³]"""
MASS_UNITS: Final = (1.0, 1e-3, 1e3, 0.45359237)
"""kg, gram, tonne, pound. [kg]"""


def _each(
    bench: Bench, dimension: dim.Dimension, wrong: Callable[[Statement], Iterator[float]]
) -> Iterator[Change]:
    """Yield the changes of every input of a dimension among those that lead to the origin."""
    for statement in bench.inputs:
        if statement.term.dimension == dimension:
            for value in wrong(statement):
                yield {bench.input_key(statement): value}


def gauge_as_absolute(bench: Bench) -> Iterator[Change]:
    """Yield gauge pressures taken without the atmosphere."""
    return _each(bench, dim.PRESSURE, lambda s: _some(s.value - s.quantity.atmosphere, s.quantity.atmosphere))


def absolute_as_gauge(bench: Bench) -> Iterator[Change]:
    """Yield absolute pressures with the atmosphere added once more."""
    ambient = bench.case.given("surroundings/pressure") or ATMOSPHERE
    return _each(bench, dim.PRESSURE, lambda s: _some(s.value + ambient, not s.quantity.atmosphere))


def _some(value: float, applies: object) -> Iterator[float]:
    if applies:
        yield value


def _is_celsius(statement: Statement) -> bool:
    return abs(statement.quantity.unit.offset - CELSIUS_ZERO) < 1e-9


def _is_fahrenheit(statement: Statement) -> bool:
    return statement.quantity.unit.offset > 0.0 and not _is_celsius(statement)


def _is_scale(statement: Statement) -> bool:
    return statement.term.dimension == dim.TEMPERATURE and statement.value > 0.0


def celsius_as_kelvin(bench: Bench) -> Iterator[Change]:
    """Yield Celsius numbers used as absolute temperatures; boundaries and surroundings have slips of their own."""
    own = ("boundary_temperature", "surroundings/temperature")
    return _each(
        bench,
        dim.TEMPERATURE,
        lambda s: _some(s.value - CELSIUS_ZERO, _is_celsius(s) and not s.pointer.endswith(own)),
    )


def kelvin_twice(bench: Bench) -> Iterator[Change]:
    """Yield temperatures with 273.15 K added once too often."""
    return _each(bench, dim.TEMPERATURE, lambda s: _some(s.value + CELSIUS_ZERO, not _is_fahrenheit(s)))


def fahrenheit_as_celsius(bench: Bench) -> Iterator[Change]:
    """Yield Fahrenheit numbers taken as Celsius."""

    def wrong(s: Statement) -> Iterator[float]:
        yield from _some(s.quantity.number_of(s.value) + CELSIUS_ZERO, _is_fahrenheit(s))

    return _each(bench, dim.TEMPERATURE, wrong)


def _in_units(sizes: tuple[float, ...]) -> Callable[[Statement], Iterator[float]]:
    """Return what yields the number of an input in each other unit."""

    def wrong(s: Statement) -> Iterator[float]:
        own = s.quantity.unit.factor
        for size in sizes:
            if abs(size - own) > 1e-6 * own:
                yield (s.value - s.quantity.atmosphere) * size / own + s.quantity.atmosphere

    return wrong


def pressure_unit(bench: Bench) -> Iterator[Change]:
    """Yield pressures read in a neighbouring unit."""
    return _each(bench, dim.PRESSURE, _in_units(PRESSURE_UNITS))


def volume_unit(bench: Bench) -> Iterator[Change]:
    """Yield volumes read in a neighbouring unit."""
    return _each(bench, dim.VOLUME, _in_units(VOLUME_UNITS))


def mass_unit(bench: Bench) -> Iterator[Change]:
    """Yield masses read in a neighbouring unit."""
    return _each(bench, dim.MASS, _in_units(MASS_UNITS))


def _written(bench: Bench, numbers: Callable[[str], Iterator[float]]) -> Iterator[Change]:
    for s in bench.inputs:
        for number in numbers(s.quantity.number_text):
            value = number * s.quantity.unit.factor + s.quantity.unit.offset + s.quantity.atmosphere
            yield {bench.input_key(s): s.sign * value}


def input_transposed(bench: Bench) -> Iterator[Change]:
    """Yield inputs with two digits exchanged."""
    return _written(bench, transposed)


def input_dropped(bench: Bench) -> Iterator[Change]:
    """Yield inputs with a digit left out."""
    return _written(bench, dropped)


def input_doubled(bench: Bench) -> Iterator[Change]:
    """Yield inputs with a digit written twice."""
    return _written(bench, doubled)


def input_shifted(bench: Bench) -> Iterator[Change]:
    """Yield inputs with a shifted decimal point."""
    for s in bench.inputs:
        bare = s.quantity.number_of(s.sign * s.value)
        for number in shifted(bare, 2):  # 1000 is a unit, mostly
            value = number * s.quantity.unit.factor + s.quantity.unit.offset + s.quantity.atmosphere
            yield {bench.input_key(s): s.sign * value}


def of_another_state(bench: Bench) -> Iterator[Change]:
    """Yield the property of another state in place of the one of this state."""
    for s in bench.inputs:
        parts = s.pointer.split("/")
        if parts[0] != "states":
            continue
        for other in bench.case.record.statements:
            them = other.pointer.split("/")
            same = len(them) == len(parts) and them[0] == "states" and them[2:] == parts[2:]
            if same and them[1] != parts[1] and other.usable and _is_firm(bench, other):
                yield {bench.input_key(s): other.value}


def _is_firm(bench: Bench, statement: Statement) -> bool:
    """Say whether a value is an input, or a result that is right: a wrong one may itself follow from the slip."""
    right = {c.statement.pointer for c in bench.case.compared if c.outcome is Outcome.AGREES}
    return statement.role is Role.INPUT or statement.pointer in right


def of_another_record(bench: Bench) -> Iterator[Change]:
    """Yield the same quantity of another record, of a state of the same name or of the body alone."""
    for s in bench.inputs:
        for case in bench.case.others.values():
            for other in case.record.stated(s.pointer, Role.INPUT):
                yield {bench.input_key(s): other.value}


CATALOGUE: Final = (
    Slip(
        "gauge pressure as absolute", "a gauge pressure was used as if it were absolute", 1, gauge_as_absolute
    ),
    Slip(
        "absolute pressure as gauge", "the atmosphere was added to an absolute pressure", 1, absolute_as_gauge
    ),
    Slip("Celsius as kelvin", "a Celsius temperature was used as if it were absolute", 1, celsius_as_kelvin),
    Slip("kelvin added twice", "273.15 K was added once too often", 2, kelvin_twice),
    Slip("Fahrenheit as Celsius", "a Fahrenheit temperature was read as Celsius", 2, fahrenheit_as_celsius),
    Slip("pressure in another unit", "a pressure was read in another unit", 2, pressure_unit),
    Slip("volume in another unit", "a volume was read in another unit", 2, volume_unit),
    Slip("mass in another unit", "a mass was read in another unit", 2, mass_unit),
    Slip("value of another state", "the value of another state was used", 3, of_another_state),
    Slip("value of another record", "the value of another record was used", 4, of_another_record),
    Slip("input digits transposed", "two digits of an input were exchanged", 5, input_transposed),
    Slip("input digit dropped", "a digit of an input was left out", 5, input_dropped),
    Slip("input digit doubled", "a digit of an input was written twice", 5, input_doubled),
    Slip("input decimal shifted", "the decimal point of an input was shifted", 4, input_shifted),
)

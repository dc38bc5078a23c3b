"""Slips in writing a result down: its sign, its unit, its basis, its digits; and ratios the wrong way round."""

from __future__ import annotations

from collections.abc import Callable, Iterator
from typing import Final

from checker.quantity import dimensions as dim
from checker.slips.bench import Bench
from checker.slips.digits import doubled, dropped, shifted, transposed
from checker.slips.slip import Change, Slip
from checker.vocabulary import Allowance

ENERGIES: Final = (dim.ENERGY, dim.ENTROPY, dim.SPECIFIC_ENERGY, dim.SPECIFIC_ENTROPY)
EXTENSIVE: Final = (dim.ENERGY, dim.ENTROPY, dim.VOLUME)
SPECIFIC: Final = (dim.SPECIFIC_ENERGY, dim.SPECIFIC_ENTROPY, dim.SPECIFIC_VOLUME)
CELSIUS_ZERO: Final = 273.15
MOST_DIGITS: Final = 6


def _right(bench: Bench) -> float | None:
    """Return the value that should have been written. [SI, program's sign]"""
    value = bench.values.get(bench.key)
    return value if isinstance(value, float) else None


def _times(
    bench: Bench, factors: Iterator[float] | tuple[float, ...], where: tuple[dim.Dimension, ...]
) -> Iterator[Change]:
    value, shift = _right(bench), bench.origin.shift.value
    if value and bench.origin.statement.term.dimension in where:
        for factor in factors:
            yield {bench.key: (value + shift) * factor - shift}


def sign(bench: Bench) -> Iterator[Change]:
    """Yield the result with the other sign."""
    return _times(bench, (-1.0,), ENERGIES)


def kilo(bench: Bench) -> Iterator[Change]:
    """Yield kJ for J and back."""
    return _times(bench, (1000.0, 0.001), ENERGIES)


def kilowatt_hour(bench: Bench) -> Iterator[Change]:
    """Yield kWh for kJ and MJ, and back."""
    return _times(bench, (3600.0, 1 / 3600.0, 3.6, 1 / 3.6), ENERGIES)


def kilocalorie(bench: Bench) -> Iterator[Change]:
    """Yield kcal for kJ and back."""
    return _times(bench, (4.1868, 1 / 4.1868, 4.184, 1 / 4.184), ENERGIES)


def british(bench: Bench) -> Iterator[Change]:
    """Yield BTU for kJ and back."""
    return _times(bench, (1.05505585, 1 / 1.05505585, 2.326, 1 / 2.326), ENERGIES)


def rate(bench: Bench) -> Iterator[Change]:
    """Yield a rate for a total, where a duration is known."""
    base = "/".join(bench.key.split("/")[:2]) + "/"
    durations = {
        s.value
        for s in bench.case.record.statements
        if s.usable and s.pointer.startswith(base) and s.pointer.endswith("/duration")
    }
    for duration in sorted(durations):
        if duration:
            yield from _times(
                bench, (1.0 / duration, duration, 60.0 / duration, 3600.0 / duration), (dim.ENERGY,)
            )


def _masses(bench: Bench) -> Iterator[float]:
    for body in bench.case.record.bodies:
        mass = bench.get(f"bodies/{body}/mass") or bench.case.value(f"bodies/{body}/mass")
        if mass:
            yield mass


def per_mass(bench: Bench) -> Iterator[Change]:
    """Yield a value per unit mass where the total belongs."""
    return _times(bench, (1.0 / mass for mass in _masses(bench)), EXTENSIVE)


def of_the_total(bench: Bench) -> Iterator[Change]:
    """Yield the total where a value per unit mass belongs, or the mass once more."""
    return _times(bench, _masses(bench), (*EXTENSIVE, *SPECIFIC))


def per_mole(bench: Bench) -> Iterator[Change]:
    """Yield a value per mole where one per mass belongs."""
    molar = [s.molar_mass * 1000.0 for s in bench.case.plan.substances.values() if s.molar_mass]
    everything = (*ENERGIES, dim.MASS, dim.SPECIFIC_VOLUME)
    return _times(bench, tuple(f for m in molar for f in (m, 1.0 / m, m / 1000.0, 1000.0 / m)), everything)


def _rewritten(bench: Bench, numbers: Callable[[str], Iterator[float]]) -> Iterator[Change]:
    """Yield the right result, rounded as the originator rounded, with another order of its digits."""
    value, quantity = _right(bench), bench.origin.statement.quantity
    if value is None:
        return
    shift, scale = bench.origin.shift.value, bench.origin.statement.sign
    right = quantity.number_of(scale * (value + shift))
    for text in _texts(right, quantity.number_text):
        for number in numbers(text):
            changed = number * quantity.unit.factor + quantity.unit.offset + quantity.atmosphere
            yield {bench.key: scale * changed - shift}


def _texts(right: float, written: str) -> Iterator[str]:
    """Yield the right number with as many decimals as written, and with as many digits."""
    decimals = len(written.partition(".")[2])
    yield f"{right:.{decimals}f}"
    digits = max(sum(ch.isdigit() for ch in written.lstrip("-−0.")), 1)
    for count in {digits - 1, digits, digits + 1}:
        if 1 < count <= MOST_DIGITS:
            text = f"{right:.{count}g}"
            if "e" not in text:
                yield text


def digits_transposed(bench: Bench) -> Iterator[Change]:
    """Yield the result with two digits exchanged."""
    return _rewritten(bench, transposed)


def digit_dropped(bench: Bench) -> Iterator[Change]:
    """Yield the result with a digit left out."""
    return _rewritten(bench, dropped)


def digit_doubled(bench: Bench) -> Iterator[Change]:
    """Yield the result with a digit written twice."""
    return _rewritten(bench, doubled)


def decimal_shifted(bench: Bench) -> Iterator[Change]:
    """Yield the result with a shifted decimal point."""
    yield from _rewritten(bench, lambda text: shifted(float(text), 2))
    value, quantity = _right(bench), bench.origin.statement.quantity
    if value is not None:
        scale, shift = bench.origin.statement.sign, bench.origin.shift.value
        for number in shifted(quantity.number_of(scale * (value + shift)), 2):  # 1000 is a unit, mostly
            changed = number * quantity.unit.factor + quantity.unit.offset + quantity.atmosphere
            yield {bench.key: scale * changed - shift}


def _atmosphere(bench: Bench, factor: float) -> Iterator[Change]:
    value = _right(bench)
    ambient = bench.case.given("surroundings/pressure") or 101325.0
    if value is not None and bench.origin.statement.term.dimension == dim.PRESSURE:
        yield {bench.key: value + factor * ambient}


def gauge_written(bench: Bench) -> Iterator[Change]:
    """Yield the gauge pressure written as absolute."""
    return _atmosphere(bench, -1.0)


def absolute_written(bench: Bench) -> Iterator[Change]:
    """Yield the absolute pressure written as gauge."""
    return _atmosphere(bench, 1.0)


def kelvin_written(bench: Bench) -> Iterator[Change]:
    """Yield kelvin written as Celsius and back."""
    value = _right(bench)
    if value is not None and bench.origin.statement.term.dimension == dim.TEMPERATURE:
        yield {bench.key: value + CELSIUS_ZERO}
        yield {bench.key: value - CELSIUS_ZERO}


def fahrenheit_written(bench: Bench) -> Iterator[Change]:
    """Yield Fahrenheit written as Celsius and back."""
    value = _right(bench)
    if value is not None and bench.origin.statement.term.dimension == dim.TEMPERATURE:
        celsius = value - CELSIUS_ZERO
        yield {bench.key: celsius * 1.8 + 32.0 + CELSIUS_ZERO}
        yield {bench.key: (celsius - 32.0) / 1.8 + CELSIUS_ZERO}


def complement(bench: Bench) -> Iterator[Change]:
    """Yield 1 − x of a fraction."""
    value = _right(bench)
    if value is not None and bench.origin.statement.term.allowance is Allowance.FRACTION:
        yield {bench.key: 1.0 - value}


def reciprocal(bench: Bench) -> Iterator[Change]:
    """Yield 1/x of a number or a specific volume."""
    value = _right(bench)
    if value and bench.origin.statement.term.dimension in (dim.NONE, dim.SPECIFIC_VOLUME, dim.DENSITY):
        yield {bench.key: 1.0 / value}


def twice(bench: Bench) -> Iterator[Change]:
    """Yield the double."""
    return _times(bench, (2.0,), (bench.origin.statement.term.dimension,))


def half(bench: Bench) -> Iterator[Change]:
    """Yield the half."""
    return _times(bench, (0.5,), (bench.origin.statement.term.dimension,))


def rejected_for_supplied(bench: Bench) -> Iterator[Change]:
    """Yield the heat rejected in place of that supplied, and an efficiency over it."""
    work, out = bench.get("results/net_work"), _rejected(bench)
    if bench.key == "results/heat_supplied" and out:
        yield {bench.key: out}
    if bench.key == "results/thermal_efficiency" and work and out:
        yield {bench.key: work / out}
        supplied = bench.get("results/heat_supplied")
        if supplied:
            yield {bench.key: out / supplied}


def _rejected(bench: Bench) -> float | None:
    """Return the heat rejected of a cycle: as stated, else what its work leaves of the heat supplied."""
    stated = bench.get("results/heat_rejected")
    work, supplied = bench.get("results/net_work"), bench.get("results/heat_supplied")
    if stated is not None or work is None or supplied is None:
        return stated if stated is not None else bench.case.value("results/heat_rejected")
    return supplied - work


def heating_for_cooling(bench: Bench) -> Iterator[Change]:
    """Yield the coefficient of performance for the other purpose."""
    value = _right(bench)
    if value is not None and bench.key == "results/coefficient_of_performance":
        yield {bench.key: value + 1.0}
        yield {bench.key: value - 1.0}


CATALOGUE: Final = (
    Slip("sign reversed", "the sign is reversed", 1, sign),
    Slip("kJ and J mixed up", "kJ and J were mixed up", 1, kilo),
    Slip("kWh and kJ mixed up", "kWh and kJ (or MJ) were mixed up", 1, kilowatt_hour),
    Slip("kcal and kJ mixed up", "kcal and kJ were mixed up", 1, kilocalorie),
    Slip("BTU and kJ mixed up", "BTU and kJ were mixed up", 1, british),
    Slip("rate for total", "a rate was written for a total", 2, rate),
    Slip("per mass for total", "the value per unit mass was written for the total", 1, per_mass),
    Slip("total for per mass", "the total was written for the value per unit mass", 1, of_the_total),
    Slip("per mole for per mass", "a molar value was written for one per unit mass", 2, per_mole),
    Slip("digits transposed", "two digits were exchanged", 3, digits_transposed),
    Slip("digit dropped", "a digit was left out", 4, digit_dropped),
    Slip("digit doubled", "a digit was written twice", 4, digit_doubled),
    Slip("decimal shifted", "the decimal point was shifted", 2, decimal_shifted),
    Slip("gauge for absolute in the result", "a gauge pressure was written as absolute", 1, gauge_written),
    Slip(
        "absolute for gauge in the result", "an absolute pressure was written as gauge", 1, absolute_written
    ),
    Slip(
        "kelvin for Celsius in the result", "kelvin and Celsius were exchanged in writing", 1, kelvin_written
    ),
    Slip(
        "Fahrenheit for Celsius in the result",
        "Fahrenheit and Celsius were exchanged in writing",
        2,
        fahrenheit_written,
    ),
    Slip("complement", "the rest to one was written", 1, complement),
    Slip("reciprocal", "the reciprocal was written", 1, reciprocal),
    Slip("doubled", "the double was written", 3, twice),
    Slip("halved", "the half was written", 3, half),
    Slip(
        "heat rejected for heat supplied",
        "the heat rejected was taken for the heat supplied",
        1,
        rejected_for_supplied,
    ),
    Slip("heating for cooling", "the coefficient for the other purpose was written", 1, heating_for_cooling),
)

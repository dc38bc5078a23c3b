"""Slips in the entropy and exergy balances: the wrong temperature, a term left out, a sign."""

from __future__ import annotations

from collections.abc import Callable, Iterator
from typing import Final

from checker.sheet.step import Step
from checker.slips.bench import Bench, tried
from checker.slips.slip import Change, Slip

CELSIUS_ZERO: Final = 273.15
ENTROPIES: Final = ("item_entropy", "reservoir_entropy")


def _at(bench: Bench, temperatures: Callable[[Bench, Step, float], Iterator[float]]) -> Iterator[Change]:
    """Yield entropies of heat transfers at another temperature than that of the boundary."""
    for step, values in bench.named(*ENTROPIES):
        for temperature in temperatures(bench, step, values[1] if len(values) > 1 else 0.0):
            if temperature:
                yield {step.outputs[0]: values[0] / temperature}


def celsius_boundary(bench: Bench) -> Iterator[Change]:
    """Yield Q/T_b with T_b in Celsius."""
    for step, values in bench.named("item_entropy"):
        if len(values) > 1 and values[1] != CELSIUS_ZERO:
            yield {step.outputs[0]: values[0] / (values[1] - CELSIUS_ZERO)}


def _body_temperatures(bench: Bench, step: Step, _: float) -> Iterator[float]:
    ctx = bench.case.context(step.outputs[0].split("/")[1])
    for body in ctx.bodies if ctx else ():
        for state in (ctx.process.from_state, ctx.process.to_state) if ctx else ():
            value = bench.get(f"states/{state}/{body}/temperature")
            if value:
                yield value


def system_temperature(bench: Bench) -> Iterator[Change]:
    """Yield Q/T with the temperature of the system at one end."""
    return _at(bench, _body_temperatures)


def _means(bench: Bench, step: Step, own: float) -> Iterator[float]:
    found = tuple(_body_temperatures(bench, step, own))
    for i in range(0, len(found) - 1, 2):
        yield 0.5 * (found[i] + found[i + 1])
        yield 0.5 * (own + found[i])
        yield 0.5 * (own + found[i + 1])


def mean_temperature(bench: Bench) -> Iterator[Change]:
    """Yield Q/T with the mean temperature of the system."""
    return _at(bench, _means)


def _ambient(bench: Bench, _: Step, __: float) -> Iterator[float]:
    value = bench.get("given/surroundings/temperature")
    if value:
        yield value


def surroundings_temperature(bench: Bench) -> Iterator[Change]:
    """Yield Q/T₀ where Q/T_b belongs."""
    return _at(bench, _ambient)


def _reservoir(bench: Bench, step: Step, _: float) -> Iterator[float]:
    base = step.outputs[0].rsplit("/", 1)[0]
    for name in ("reservoir_temperature", "boundary_temperature"):
        value = bench.case.given(f"{base}/{name}")
        if value:
            yield value


def reservoir_for_boundary(bench: Bench) -> Iterator[Change]:
    """Yield Q/T_res where Q/T_b belongs, and the other way round."""
    return _at(bench, _reservoir)


def celsius_surroundings(bench: Bench) -> Iterator[Change]:
    """Yield T₀ in Celsius."""
    key = "given/surroundings/temperature"
    value = bench.get(key)
    if value and key in bench.parents:
        yield {key: value - CELSIUS_ZERO}


def _of_ideal_terms(bench: Bench, without: str) -> Iterator[Change]:
    """Yield changes of entropy without one of their terms, at constant p, v or T."""
    for step, values in bench.named("entropy_change"):
        if len(values) != 3 or not step.parents[1].startswith("states/"):
            continue
        body, last, first = (
            step.parents[1].split("/")[2],
            step.parents[1].split("/")[1],
            step.parents[2].split("/")[1],
        )
        one, two, own = (
            bench.state(first, body),
            bench.state(last, body),
            bench.case.plan.substances.get(body),
        )
        if one is None or two is None or own is None or own.incompressible or not one.pressure:
            continue
        known = {
            "pressure": {"temperature": two.temperature, "pressure": one.pressure},
            "specific_volume": {
                "temperature": two.temperature,
                "specific_volume": one.specific_volume or 0.0,
            },
        }
        if without in known and (other := tried(own, known[without])) is not None:
            yield {step.outputs[0]: values[0] * (other.specific_entropy - one.specific_entropy)}
        if without == "temperature":
            for name in ("pressure", "specific_volume"):
                held = {"temperature": one.temperature, name: getattr(two, name) or 0.0}
                if (other := tried(own, held)) is not None:
                    yield {step.outputs[0]: values[0] * (other.specific_entropy - one.specific_entropy)}


def pressure_term_omitted(bench: Bench) -> Iterator[Change]:
    """Yield Δs without R·ln(p₂/p₁)."""
    return _of_ideal_terms(bench, "pressure")


def volume_term_omitted(bench: Bench) -> Iterator[Change]:
    """Yield Δs without R·ln(v₂/v₁)."""
    return _of_ideal_terms(bench, "specific_volume")


def temperature_term_omitted(bench: Bench) -> Iterator[Change]:
    """Yield Δs without its term in the temperatures."""
    return _of_ideal_terms(bench, "temperature")


def _generations(bench: Bench) -> Iterator[tuple[str, float, float]]:
    """Yield the generations among the hidden steps with ΔS and ΣQ/T."""
    for step, values in bench.named("entropy_generation", "entropy_generation_with_surroundings"):
        if len(values) == 2:
            yield step.outputs[0], values[0], values[1]


def transfer_omitted(bench: Bench) -> Iterator[Change]:
    """Yield S_gen = ΔS."""
    yield from ({key: change} for key, change, _ in _generations(bench))


def transfer_added(bench: Bench) -> Iterator[Change]:
    """Yield S_gen = ΔS + ΣQ/T."""
    yield from ({key: change + transfer} for key, change, transfer in _generations(bench))


def generation_reversed(bench: Bench) -> Iterator[Change]:
    """Yield S_gen = ΣQ/T − ΔS."""
    yield from ({key: transfer - change} for key, change, transfer in _generations(bench))


def heat_over_mean(bench: Bench) -> Iterator[Change]:
    """Yield ΔS = Q/T with the mean temperature of the system."""
    for step, _ in bench.named("entropy_change"):
        base = step.outputs[0].rsplit("/", 1)[0]
        heats = [bench.get(f"{base}/{name}") for name in ("heat", "internal_energy_change")]
        found = tuple(_own_temperatures(bench, step))
        if len(found) == 2 and abs(found[0] - found[1]) > 1e-6:  # at one temperature it is no slip
            for heat in heats:
                for temperature in (0.5 * (found[0] + found[1]), found[0], found[1]):
                    if heat and temperature:
                        yield {step.outputs[0]: heat / temperature}


def _own_temperatures(bench: Bench, step: Step) -> Iterator[float]:
    """Yield the temperatures of the body between whose states a change is taken."""
    for key in step.parents:
        if key.startswith("states/"):
            value = bench.get(f"{key.rsplit('/', 1)[0]}/temperature")
            if value is not None:
                yield value


def exergy_with_change(bench: Bench) -> Iterator[Change]:
    """Yield X_d = T₀·ΔS, or with the other generation."""
    for step, values in bench.named("exergy_destruction"):
        base = step.outputs[0].rsplit("/", 1)[0]
        for name in ("entropy_change", "entropy_generation", "entropy_generation_with_surroundings"):
            other = bench.get(f"{base}/{name}")
            if other and len(values) == 2:
                yield {step.outputs[0]: values[0] * other}


CATALOGUE: Final = (
    Slip("Celsius boundary temperature", "the boundary temperature was used in Celsius", 1, celsius_boundary),
    Slip(
        "Celsius surroundings temperature",
        "the temperature of the surroundings was used in Celsius",
        1,
        celsius_surroundings,
    ),
    Slip(
        "mean temperature for the boundary temperature",
        "a mean temperature was used for that of the boundary",
        2,
        mean_temperature,
    ),
    Slip(
        "system temperature for the boundary temperature",
        "the temperature of the system was used for that of the boundary",
        2,
        system_temperature,
    ),
    Slip(
        "surroundings temperature for the boundary temperature",
        "the temperature of the surroundings was used for that of the boundary",
        2,
        surroundings_temperature,
    ),
    Slip(
        "reservoir for the boundary temperature",
        "the temperature of the reservoir was used for that of the boundary",
        2,
        reservoir_for_boundary,
    ),
    Slip(
        "pressure term of the entropy omitted",
        "the pressure term of the entropy was left out",
        1,
        pressure_term_omitted,
    ),
    Slip(
        "volume term of the entropy omitted",
        "the volume term of the entropy was left out",
        1,
        volume_term_omitted,
    ),
    Slip(
        "temperature term of the entropy omitted",
        "the temperature term of the entropy was left out",
        2,
        temperature_term_omitted,
    ),
    Slip("entropy transfer omitted", "the entropy that goes with heat was left out", 1, transfer_omitted),
    Slip(
        "entropy transfer added",
        "the entropy that goes with heat was added, not subtracted",
        1,
        transfer_added,
    ),
    Slip("entropy generation sign reversed", "the entropy balance was turned round", 1, generation_reversed),
    Slip(
        "heat over mean temperature for the entropy change",
        "the heat over a temperature was taken as the change of entropy",
        2,
        heat_over_mean,
    ),
    Slip(
        "exergy with the entropy change",
        "the exergy destroyed was taken from another entropy than that generated",
        2,
        exergy_with_change,
    ),
)

"""Slips in finding a state or a property: the wrong side of the dome, the wrong row, the wrong model."""

from __future__ import annotations

from collections.abc import Iterator
from dataclasses import replace
from functools import partial
from typing import Final

from checker.outcomes import NotEvaluable
from checker.sheet.keys import body_key, given, plain, state_key
from checker.sheet.step import Step
from checker.slips.bench import Bench, state_change, tried
from checker.slips.energy import entropy_by_ratio
from checker.slips.slip import Change, Slip
from checker.substances import make_substance
from checker.substances.interface import PropertyState, Substance
from checker.substances.names import knows_fluid

ROWS: Final = (5.0, 10.0, 20.0, 25.0, 50.0, 100.0, 1.0, 2.0)
"""Steps of temperature between the rows of printed tables. [K]"""
PRESSURE_ROWS: Final = (0.1e5, 0.5e5, 1e5, 2e5, 5e5, 10e5)
"""Steps of pressure between the rows of printed tables. [Pa]"""
OTHERS: Final = (
    "Nitrogen",
    "Oxygen",
    "Air",
    "CarbonDioxide",
    "Argon",
    "Helium",
    "Hydrogen",
    "Methane",
    "Water",
    "R134a",
    "Propane",
    "Ammonia",
)
UNIVERSAL: Final = 8.314462618
CELSIUS_ZERO: Final = 273.15


def _known(bench: Bench, step: Step) -> dict[str, float]:
    """Return the properties from which a state step finds its state."""
    found = {}
    for key in step.parents:
        name = plain(key).rsplit("/", 1)[-1]
        value = bench.get(key)
        if value is not None and name in KNOWN and not key.startswith("model/"):
            found[name] = value
    return found


KNOWN: Final = (
    "temperature",
    "pressure",
    "specific_volume",
    "specific_internal_energy",
    "specific_enthalpy",
    "specific_entropy",
    "quality",
)


def _saturated(substance: Substance, known: dict[str, float], side: int) -> PropertyState | None:
    """Return saturated liquid (0) or vapour (1) at a temperature or a pressure."""
    if substance.critical_point is None:
        return None
    for name in ("temperature", "pressure"):
        if name in known:
            try:
                return substance.saturation({name: known[name]})[side]
            except NotEvaluable:
                return None
    return None


def saturated_liquid(bench: Bench) -> Iterator[Change]:
    """Yield saturated liquid at the temperature in place of compressed liquid."""
    for step, _, _, found, substance in bench.states():
        if (
            found.quality is None
            and substance.critical_point
            and found.temperature < substance.critical_point[0]
        ):
            other = _saturated(substance, {"temperature": found.temperature}, 0)
            if other is not None and (found.specific_volume or 1.0) < substance.critical_point[2]:
                yield state_change(step, other)
                yield state_change(step, replace(other, pressure=found.pressure, quality=None))


def saturated_vapour(bench: Bench) -> Iterator[Change]:
    """Yield saturated vapour, at the pressure or the temperature, in place of superheated vapour."""
    for step, _, _, found, substance in bench.states():
        if found.quality is None and substance.critical_point:
            for known in ({"pressure": found.pressure or 0.0}, {"temperature": found.temperature}):
                other = _saturated(substance, known, 1)
                if other is not None:
                    yield state_change(step, other)
                    kept = replace(other, temperature=found.temperature, pressure=found.pressure)
                    yield state_change(step, replace(kept, quality=None))


def _two_phase(bench: Bench, quality: float | None) -> Iterator[Change]:
    """Yield a wet state with another quality (None: with vapour and liquid exchanged)."""
    for step, _, _, found, substance in bench.states():
        if found.quality is None or not 0.0 < found.quality < 1.0:
            continue
        wrong = 1.0 - found.quality if quality is None else quality
        other = tried(substance, {"temperature": found.temperature, "quality": wrong})
        if other is not None:
            # What the state is known by stays: with its volume given, only what is looked up with x is wrong.
            kept = set(_known(bench, step)) - {"quality"}
            changed = state_change(step, other)
            yield {key: value for key, value in changed.items() if key.rsplit("/", 1)[-1] not in kept}


def quality_ignored(bench: Bench) -> Iterator[Change]:
    """Yield wet vapour taken as saturated vapour."""
    return _two_phase(bench, 1.0)


def quality_as_liquid(bench: Bench) -> Iterator[Change]:
    """Yield wet vapour taken as saturated liquid."""
    return _two_phase(bench, 0.0)


def quality_inverted(bench: Bench) -> Iterator[Change]:
    """Yield the mass fraction of liquid taken as the quality."""
    return _two_phase(bench, None)


def _by_another(bench: Bench, substances: dict[str, tuple[Substance, ...]]) -> Iterator[Change]:
    for step, _, body, _, _ in bench.states():
        known = _known(bench, step)
        for other in substances.get(body, ()):
            found = tried(other, known) if len(known) == 2 else None
            if found is not None:
                yield state_change(step, found)


def _made(names: tuple[str, ...], model: str) -> tuple[Substance, ...]:
    found = []
    for name in names:
        try:
            found.append(make_substance(name, model, {}))
        except NotEvaluable:
            continue
    return tuple(found)


def ideal_gas(bench: Bench) -> Iterator[Change]:
    """Yield states of a real fluid found as for an ideal gas."""
    bodies = bench.case.record.bodies
    real = {
        name: _made((body.substance,), "ideal gas")
        for name, body in bodies.items()
        if body.model == "real fluid" and knows_fluid(body.substance)
    }
    yield from _by_another(bench, real)
    for step, state, body, found, substance in bench.states():
        if body in real and substance.gas_constant and found.specific_volume and found.pressure:
            volume = substance.gas_constant * found.temperature / found.pressure
            yield {state_key(state, body, "specific_volume"): volume}
            pressure = substance.gas_constant * found.temperature / found.specific_volume
            yield {state_key(state, body, "pressure"): pressure}
            if (ratio := _ratio_of(bench, step, state, body, "pressure", "temperature")) is not None:
                yield {state_key(state, body, "pressure"): ratio}


def _neighbours(bench: Bench, state: str, body: str) -> Iterator[str]:
    """Yield the states at the other ends of a state's processes."""
    for ctx in bench.case.plan.contexts:
        ends = (ctx.process.from_state, ctx.process.to_state)
        if state in ends and body in ctx.bodies:
            yield ends[0] if state == ends[1] else ends[1]


def _ratio_of(bench: Bench, step: Step, state: str, body: str, name: str, with_name: str) -> float | None:
    """Return a property raised in the ratio of another from the neighbouring state."""
    del step
    for other in _neighbours(bench, state, body):
        mine, theirs = bench.state(state, body), bench.state(other, body)
        if mine is None or theirs is None:
            continue
        base, top, bottom = getattr(theirs, name), getattr(mine, with_name), getattr(theirs, with_name)
        if base and top and bottom:
            return float(base * top / bottom)
    return None


def another_substance(bench: Bench) -> Iterator[Change]:
    """Yield states from the table of another substance."""
    bodies = bench.case.record.bodies
    for model in ("real fluid", "ideal gas"):
        concerned = {
            n: _made(tuple(o for o in OTHERS if o != b.substance), model)
            for n, b in bodies.items()
            if b.model == model
        }
        if concerned:
            yield from _by_another(bench, concerned)


def neighbouring_row(bench: Bench) -> Iterator[Change]:
    """Yield states one row away in a table of printed properties."""
    for step, _, body, _, substance in bench.states():
        known = _known(bench, step)
        model = bench.case.record.bodies[body].model
        if model not in ("real fluid", "ideal gas") or len(known) != 2:
            continue
        for name, rows in (("temperature", ROWS), ("pressure", PRESSURE_ROWS)):
            if name not in known:
                continue
            for size in _rows(known[name], name, rows):
                for moved in (known[name] + size, known[name] - size):
                    if moved > 0.0 and (found := tried(substance, {**known, name: moved})) is not None:
                        yield {**state_change(step, found), **_kept(bench, step, name)}


def _rows(value: float, name: str, rows: tuple[float, ...]) -> Iterator[float]:
    """Yield the steps of the tables that have a row at a value; 5 K and 10 K also where one would interpolate."""
    zero = CELSIUS_ZERO if name == "temperature" else 0.0
    for size in rows:
        place = (value - zero) / size
        if abs(place - round(place)) < 1e-6 or (zero and size in (5.0, 10.0)):
            yield size


def _kept(bench: Bench, step: Step, name: str) -> Change:
    """Return the property that was looked up rightly, as it stands in the state."""
    key = next((k for k in step.outputs if k.endswith(f"/{name}")), None)
    value = None if key is None else bench.get(key)
    return {} if key is None or value is None else {key: value}


def enthalpy_for_energy(bench: Bench) -> Iterator[Change]:
    """Yield h taken where u belongs, in one state or in all of them."""
    return _other_property(bench, "specific_internal_energy", "specific_enthalpy")


def energy_for_enthalpy(bench: Bench) -> Iterator[Change]:
    """Yield u taken where h belongs."""
    return _other_property(bench, "specific_enthalpy", "specific_internal_energy")


def _other_property(bench: Bench, name: str, wrong: str) -> Iterator[Change]:
    """Yield one property in the place of another: in all states at once, then in each alone."""
    every: dict[str, float] = {}
    for key in sorted({*bench.parents, bench.key}):
        if key.startswith("states/") and key.endswith(f"/{name}") and _has_table(bench, key.split("/")[2]):
            value = bench.get(f"{key.rsplit('/', 1)[0]}/{wrong}")
            if value is not None:
                every[key] = value
    if len(every) > 1:
        yield every
    yield from ({key: value} for key, value in every.items())


def _has_table(bench: Bench, body: str) -> bool:
    """Say whether u and h of a body are read side by side; of a gas they are c_v·T and c_p·T."""
    own = bench.case.plan.substances.get(body)
    return own is not None and own.model not in ("ideal gas", "constant specific heat")


def universal_constant(bench: Bench) -> Iterator[Change]:
    """Yield masses and volumes found with 8.314 in place of the specific gas constant, or the other way round."""
    for body, substance in bench.case.plan.substances.items():
        if not substance.gas_constant:
            continue
        given_constant = given(body_key(body, "gas_constant"))
        if given_constant in bench.parents:
            yield from ({given_constant: value} for value in (8314.0, 8314.462618, 8.314, 8.314462618))
        factor = substance.gas_constant / (UNIVERSAL * 1000.0)
        for name, power in (("mass", 1), ("volume", -1)):
            key = f"bodies/{body}/{name}"
            value = bench.get(key)
            if value is not None and (key in bench.parents or key == bench.key):
                yield {key: value * factor**power}
                yield {key: value * (factor * 1000.0) ** power}
        for step, state, name, found, _ in bench.states():
            if name == body and found.specific_volume and found.pressure:
                yield {state_key(state, body, "specific_volume"): found.specific_volume / factor}
                yield {state_key(state, body, "pressure"): found.pressure / factor}
                del step


def ratio_inverted(bench: Bench) -> Iterator[Change]:
    """Yield a property that was divided by the ratio by which it should have been multiplied."""
    for _, state, body, found, _ in bench.states():
        for other in _neighbours(bench, state, body):
            before = bench.state(other, body)
            for name in ("temperature", "pressure", "specific_volume"):
                mine, theirs = getattr(found, name), getattr(before, name) if before else None
                if mine and theirs and mine != theirs:
                    yield {state_key(state, body, name): theirs * theirs / mine}
    yield from entropy_by_ratio(bench, celsius=False)


def celsius_in_ratio(bench: Bench) -> Iterator[Change]:
    """Yield gas properties found with a ratio of Celsius temperatures."""
    for _, state, body, found, _ in bench.states():
        for other in _neighbours(bench, state, body):
            before = bench.state(other, body)
            if before is None:
                continue
            right = found.temperature / before.temperature
            cold, warm = before.temperature - 273.15, found.temperature - 273.15
            if cold:
                wrong = warm / cold
                for name in ("pressure", "specific_volume"):
                    value = getattr(found, name)
                    if value is not None:
                        yield {state_key(state, body, name): value * wrong / right}
                yield {state_key(state, body, "temperature"): cold * right + 273.15}
    yield from entropy_by_ratio(bench, celsius=True)


def unchanged(name: str, bench: Bench) -> Iterator[Change]:
    """Yield a property taken over unchanged from the state before."""
    for step, state, body, found, substance in bench.states():
        for other in _neighbours(bench, state, body):
            before = bench.state(other, body)
            value = getattr(before, name) if before else None
            if not value:
                continue
            yield {state_key(state, body, name): value}
            if name == "pressure" and found.specific_enthalpy is not None and found.specific_volume:
                enthalpy = found.specific_internal_energy + value * found.specific_volume
                yield {
                    state_key(state, body, name): value,
                    state_key(state, body, "specific_enthalpy"): enthalpy,
                }
            held = {} if substance.incompressible else {"pressure": found.pressure or 0.0}
            if name == "temperature" and (same := tried(substance, {name: value, **held})) is not None:
                yield state_change(step, same)


CATALOGUE: Final = (
    Slip(
        "saturated liquid for compressed liquid",
        "saturated liquid was taken for compressed liquid",
        2,
        saturated_liquid,
    ),
    Slip(
        "saturated vapour for superheated vapour",
        "saturated vapour was taken for superheated vapour",
        2,
        saturated_vapour,
    ),
    Slip("quality ignored", "wet vapour was taken as saturated vapour", 1, quality_ignored),
    Slip("quality as liquid", "wet vapour was taken as saturated liquid", 1, quality_as_liquid),
    Slip("quality inverted", "the mass fraction of liquid was taken as the quality", 1, quality_inverted),
    Slip("ideal gas for the real fluid", "the fluid was taken as an ideal gas", 2, ideal_gas),
    Slip("neighbouring row of the table", "the neighbouring row of a table was read", 4, neighbouring_row),
    Slip("table of another substance", "the table of another substance was read", 4, another_substance),
    Slip(
        "enthalpy for internal energy",
        "the enthalpy was taken where the internal energy belongs",
        1,
        enthalpy_for_energy,
    ),
    Slip(
        "internal energy for enthalpy",
        "the internal energy was taken where the enthalpy belongs",
        1,
        energy_for_enthalpy,
    ),
    Slip(
        "universal for specific gas constant",
        "the universal gas constant was used as the specific one",
        2,
        universal_constant,
    ),
    Slip("Celsius in a ratio", "a ratio was formed of Celsius temperatures", 1, celsius_in_ratio),
    Slip("ratio inverted", "a ratio was inverted", 2, ratio_inverted),
    Slip(
        "temperature taken as unchanged",
        "the temperature of the state before was kept",
        2,
        partial(unchanged, "temperature"),
    ),
    Slip(
        "pressure taken as unchanged",
        "the pressure of the state before was kept",
        2,
        partial(unchanged, "pressure"),
    ),
    Slip(
        "volume taken as unchanged",
        "the volume of the state before was kept",
        2,
        partial(unchanged, "specific_volume"),
    ),
)

"""Steps of a body: its mass, its volume, its extensive properties in each state, its motion, its constants."""

from __future__ import annotations

from collections.abc import Iterator

from checker.outcomes import NotEvaluable
from checker.quantity import dimensions as dim
from checker.sheet.balances import STANDARD_GRAVITY, same_value
from checker.sheet.keys import body_key, clue, given, state_key
from checker.sheet.links import mass_steps
from checker.sheet.models import BodyModel
from checker.sheet.moist import water_content_steps
from checker.sheet.states import EXTENSIVE, SYMBOLS
from checker.sheet.step import Step, Value
from checker.submission import Record


def body_steps(record: Record, body: str, model: BodyModel, first_state: str | None) -> Iterator[Step]:
    """Yield the candidates of one body, the mass first."""
    states = [state for state, name in record.body_states if name == body]
    yield from _mass_steps(record, body, states, first_state)
    yield from water_content_steps(record, record.bodies[body])
    yield from _constant_steps(body, model)
    if first_state is not None:
        yield Step(
            f"Volume of {body}",
            (body_key(body, "volume"),),
            (body_key(body, "mass"), state_key(first_state, body, "specific_volume")),
            _product,
            "V = m·v",
            "{0}·{1}",
        )
    for state in states:
        yield from _state_steps(state, body)


def _product(a: float, b: float) -> tuple[float]:
    return (a * b,)


def _ratio(a: float, b: float) -> tuple[float]:
    if b == 0.0:
        raise NotEvaluable("division by zero")
    return (a / b,)


def _mass_steps(record: Record, body: str, states: list[str], first_state: str | None) -> Iterator[Step]:
    mass = body_key(body, "mass")
    yield same_value(mass, given(mass), f"Mass of {body}", "m given")
    yield from mass_steps(record, body)
    yield Step(
        f"Mass of {body}",
        (mass,),
        (given(body_key(body, "amount")), body_key(body, "molar_mass")),
        _product,
        "m = n·M",
        "{0}·{1}",
    )
    if first_state is not None:
        yield Step(
            f"Mass of {body}",
            (mass,),
            (given(body_key(body, "volume")), state_key(first_state, body, "specific_volume")),
            _ratio,
            "m = V/v",
            "{0}/{1}",
        )
    for state in states:
        for total, specific in EXTENSIVE.items():
            if total == "volume":
                yield Step(
                    f"Mass of {body}",
                    (mass,),
                    (given(state_key(state, body, total)), state_key(state, body, specific)),
                    _ratio,
                    "m = V/v",
                    "{0}/{1}",
                )
    yield Step(
        f"Amount of {body}",
        (body_key(body, "amount"),),
        (mass, body_key(body, "molar_mass")),
        _ratio,
        "n = m/M",
        "{0}/{1}",
    )


def _constant_steps(body: str, model: BodyModel) -> Iterator[Step]:
    """Yield the constants of the model, so that claims about them are compared."""

    def constants(*values: float) -> tuple[Value, ...]:
        substance = model.substance(values)
        return substance.molar_mass, substance.gas_constant

    yield Step(
        f"Constants of {body}",
        (body_key(body, "molar_mass"), body_key(body, "gas_constant")),
        model.parents,
        constants,
        "M, R of the model",
    )
    for name in (
        "specific_heat",
        "specific_heat_at_constant_volume",
        "specific_heat_at_constant_pressure",
        "density",
    ):
        yield same_value(
            body_key(body, name), given(body_key(body, name)), f"Constant of {body}", f"{name} given"
        )


def _state_steps(state: str, body: str) -> Iterator[Step]:
    """Yield V, U, H, S, speed, height and exergy of a body in a state."""
    mass = body_key(body, "mass")
    for total, specific in EXTENSIVE.items():
        symbol = SYMBOLS[specific]
        yield Step(
            f"{total.replace('_', ' ').capitalize()} of {body}, {state}",
            (state_key(state, body, total),),
            (mass, state_key(state, body, specific)),
            _product,
            f"{symbol.upper()} = m·{symbol}",
            "{0}·{1}",
        )
    for name in ("velocity", "elevation"):
        key = state_key(state, body, name)
        yield same_value(key, given(key), f"{name.capitalize()} of {body}, {state}", f"{name} given")
    specific = state_key(state, body, "specific_exergy")
    yield Step(
        f"Specific exergy of {body}, {state}",
        (specific,),
        _exergy_parents(state, body),
        _exergy,
        "(u − u₀) + p₀·(v − v₀) − T₀·(s − s₀) + ½·c² + g·z",
        takes_none=True,
    )
    yield Step(
        f"Exergy of {body}, {state}",
        (state_key(state, body, "exergy"),),
        (mass, specific),
        _product,
        "X = m·x_e",
        "{0}·{1}",
    )


def _exergy_parents(state: str, body: str) -> tuple[str, ...]:
    own = tuple(state_key(state, body, f"specific_{n}") for n in ("internal_energy", "volume", "entropy"))
    dead = tuple(f"dead/{body}/specific_{n}" for n in ("internal_energy", "volume", "entropy"))
    motion = (
        clue(state_key(state, body, "velocity"), "exergy"),
        clue(state_key(state, body, "elevation"), "exergy"),
    )
    return (*own, *dead, *motion, given("surroundings/temperature"), given("surroundings/pressure"))


def _exergy(
    u: float,
    v: float | None,
    s: float,
    u0: float,
    v0: float | None,
    s0: float,
    speed: float,
    height: float,
    t0: float,
    p0: float,
) -> tuple[float]:
    """Return closed-system exergy per mass [J/kg]; an incompressible model without density has no p₀·(v − v₀)."""
    expansion = 0.0 if v is None or v0 is None else p0 * (v - v0)
    return (u - u0 + expansion - t0 * (s - s0) + 0.5 * speed**2 + STANDARD_GRAVITY * height,)


def dead_state_steps(record: Record, body: str, model: BodyModel) -> Iterator[Step]:
    """Yield the body's state at T₀, p₀, and the speed and height that exergy counts (zero where not stated)."""
    names = ("specific_internal_energy", "specific_volume", "specific_entropy")

    def dead(t0: float, p0: float, *constants: float) -> tuple[Value, ...]:
        found = model.substance(constants).state({"temperature": t0, "pressure": p0})
        return found.specific_internal_energy, found.specific_volume, found.specific_entropy

    yield Step(
        f"Dead state of {body}",
        tuple(f"dead/{body}/{name}" for name in names),
        (given("surroundings/temperature"), given("surroundings/pressure"), *model.parents),
        dead,
        "u₀, v₀, s₀ = f(T₀, p₀)",
        "f({0}, {1})",
    )
    for state, name in record.body_states:
        for motion in ("velocity", "elevation"):
            if name != body:
                continue
            key = state_key(state, body, motion)
            if record.stated(key):
                yield same_value(
                    clue(key, "exergy"),
                    key,
                    f"{motion.capitalize()} of {body}, {state}",
                    f"{motion} as found",
                )
            else:
                yield Step(
                    f"{motion.capitalize()} of {body}, {state}",
                    (clue(key, "exergy"),),
                    (),
                    lambda: (0.0,),
                    f"{motion} not stated: 0",
                    "0",
                )


EXTENSIVE_DIMENSIONS = frozenset({dim.MASS, dim.AMOUNT, dim.VOLUME, dim.ENERGY, dim.ENTROPY, dim.POWER})


def is_per_mass(record: Record) -> bool:
    """Say whether a record of one body states nothing that depends on how much there is."""
    return len(record.bodies) == 1 and not any(
        s.term.dimension in EXTENSIVE_DIMENSIONS or s.quantity.dimension in EXTENSIVE_DIMENSIONS
        for s in record.statements
    )


def unit_mass_step(body: str) -> Step:
    """Return a mass of 1 kg for a record in which every quantity is per unit mass. [kg]"""
    return Step(
        f"Mass of {body}",
        (body_key(body, "mass"),),
        (),
        lambda: (1.0,),
        "m = 1 kg",
        assumes=f"{body}: no mass is stated and every quantity is per unit mass, so the balances are for 1 kg",
    )

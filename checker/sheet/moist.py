"""The water content of moist air: stated, or from the first state whose humidity is among the inputs."""

from __future__ import annotations

import math
from collections.abc import Callable, Iterator
from dataclasses import dataclass
from typing import Final

from checker.outcomes import NotEvaluable
from checker.sheet.keys import body_key, given, state_key
from checker.sheet.step import Function, Step
from checker.submission import Body, Record, Role
from checker.substances.moist_air import is_moist_air
from checker.substances.moist_content import water_content_at_pressure, water_content_at_volume
from checker.substances.moist_gas import GASES

WATER_CONTENT: Final = "water_content"
_RELATIVE: Final = "relative_humidity"
_RATIO: Final = "humidity_ratio"
_SIZES: Final = (("pressure", water_content_at_pressure), ("specific_volume", water_content_at_volume))


@dataclass(frozen=True, slots=True)
class WaterSource:
    """Where the water content of a body comes from: the step that gives it, and its value from the inputs."""

    step: Step
    inputs: tuple[float, ...]

    def value(self) -> float:
        """Return the water content with the inputs as stated. Raises NotEvaluable."""
        found = self.step.function(*self.inputs)[0]
        assert isinstance(found, float)
        return found


def needs_water_content(body: Body) -> bool:
    """Say whether a body is moist air by a model that follows its water."""
    return body.composition is None and body.model in GASES and is_moist_air(body.substance)


def water_source(record: Record, body: Body) -> WaterSource | None:
    """Return where the water content of a body of moist air comes from, None where nothing tells it."""
    return next(_sources(record, body), None)


def water_content_steps(record: Record, body: Body) -> Iterator[Step]:
    """Yield the step that gives the water content of a body of moist air, if there is one."""
    source = water_source(record, body) if needs_water_content(body) else None
    if source is not None:
        yield source.step


def _sources(record: Record, body: Body) -> Iterator[WaterSource]:
    own = _input(record, body_key(body.id, WATER_CONTENT))
    if own is not None:
        yield _taken_over(body, given(body_key(body.id, WATER_CONTENT)), own, "w given")
    for state in record.states:
        if (state, body.id) in record.body_states:
            yield from _of_state(record, body, state)


def _of_state(record: Record, body: Body, state: str) -> Iterator[WaterSource]:
    ratio = _input(record, state_key(state, body.id, _RATIO))
    if ratio is not None:
        key = given(state_key(state, body.id, _RATIO))
        yield _taken_over(body, key, ratio, f"w = W, without condensate in state {state}")
    relative, temperature = (
        _input(record, state_key(state, body.id, name)) for name in (_RELATIVE, "temperature")
    )
    if relative is None or temperature is None:
        return
    for name, content in _SIZES:
        size = _input(record, state_key(state, body.id, name))
        if size is None:
            continue
        keys = tuple(given(state_key(state, body.id, part)) for part in ("temperature", name, _RELATIVE))
        symbol = "p − p_w" if name == "pressure" else "v"
        step = Step(
            f"Water content of {body.id}, from state {state}",
            (body_key(body.id, WATER_CONTENT),),
            keys,
            _content_of(content, body.model, relative),
            f"p_w = φ·p_s(T), w = ρ_w(T, p_w)/ρ_a(T, {symbol}), without condensate",
            "T = {0}, " + ("p" if name == "pressure" else "v") + " = {1}, φ = {2}",
        )
        yield WaterSource(step, (temperature, size, relative))


def _content_of(content: Callable[[str, float, float, float], float], model: str, stated: float) -> Function:
    """Return the function of a step from T, p or v, and relative humidity.

    The last digit of a humidity of 100 % reaches above saturation, where no equilibrium is; it ends there.
    """
    most = 1.0 if stated <= 1.0 else math.inf

    def find(temperature: float, size: float, relative: float) -> tuple[float]:
        return (content(model, temperature, size, min(relative, most)),)

    return find


def _taken_over(body: Body, key: str, value: float, formula: str) -> WaterSource:
    step = Step(
        f"Water content of {body.id}",
        (body_key(body.id, WATER_CONTENT),),
        (key,),
        _not_negative,
        formula,
        "{0}",
    )
    return WaterSource(step, (value,))


def _not_negative(content: float) -> tuple[float]:
    if content < 0.0:
        raise NotEvaluable(f"a water content of {content:.6g} is less than none")
    return (content,)


def _input(record: Record, pointer: str) -> float | None:
    found = record.stated(pointer, Role.INPUT)
    return found[0].value if found else None

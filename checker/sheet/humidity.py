"""States of moist air that their relative humidity fixes: the dew point at a known pressure or volume."""

from __future__ import annotations

from collections.abc import Iterator, Sequence

from checker.sheet.keys import body_key, clue, given, state_key
from checker.sheet.moist import WATER_CONTENT
from checker.sheet.states import SYMBOLS, Clue, StatePlan
from checker.sheet.step import Function, Step
from checker.submission import Record, Role
from checker.substances.moist_air import MoistAir

_RELATIVE = "relative_humidity"


def humidity_clues(record: Record, plan: StatePlan, clues: Sequence[Clue]) -> Iterator[tuple[Clue, Step]]:
    """Yield the temperature that a given relative humidity tells, with each pressure or volume that may be known.

    The water content is known by then; where a temperature is given, nothing is to be found.
    """
    pointer = state_key(plan.state, plan.body, _RELATIVE)
    stated = record.stated(pointer, Role.INPUT)
    known = record.stated(state_key(plan.state, plan.body, "temperature"), Role.INPUT)
    if WATER_CONTENT not in plan.model.constants or not stated or known:
        return
    for number, one in enumerate(one for one in clues if one.name in ("pressure", "specific_volume")):
        made = clue(state_key(plan.state, plan.body, "temperature"), f"humidity{number}")
        symbol = SYMBOLS[one.name]
        step = Step(
            f"Temperature of {plan.body}, {plan.state}, from its relative humidity",
            (made,),
            (one.key, given(pointer), body_key(plan.body, WATER_CONTENT)),
            _finder(plan.model.body.model, one.name, stated[0].value),
            f"φ(T, {symbol}, w) as given; at φ = 1 the dew point",
            f"{symbol} = {{0}}, φ = {{1}}, w = {{2}}",
        )
        yield Clue("temperature", made), step


def _finder(model: str, name: str, stated: float) -> Function:
    """Return the function of the step; the last digit of a humidity of 100 % ends at saturation."""
    most = max(stated, 1.0)

    def find(value: float, relative: float, content: float) -> tuple[float]:
        return (MoistAir(model, content).temperature_of_humidity(name, value, min(relative, most)),)

    return find

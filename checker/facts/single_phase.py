"""Claims that follow the value of one phase where the fluid is in two, or goes from one to the other."""

from __future__ import annotations

from collections.abc import Iterator
from dataclasses import dataclass
from typing import Final

from checker.case import Case
from checker.comparison.compare import Compared
from checker.facts.twins import IDEAL, REAL, twin
from checker.findings import Outcome
from checker.outcomes import NotEvaluable
from checker.substances.interface import Phase, Substance

CLOSE: Final = 0.02
"""How near a claim must come to the value of one phase: constants are rounded and differ between tables (chosen)."""
APART: Final = 3.0
"""How many times as far as that the right value must lie, so that nothing else explains the claim (chosen)."""
DEGREE: Final = 1.0
CALORIC: Final = ("heat", "internal_energy_change", "enthalpy_change")
_SIDES: Final = {
    Phase.SUBCOOLED_LIQUID: 0,
    Phase.SATURATED_LIQUID: 0,
    Phase.WET_VAPOUR: 1,
    Phase.SATURATED_VAPOUR: 2,
    Phase.SUPERHEATED_VAPOUR: 2,
}


@dataclass(frozen=True, slots=True)
class OnePhase:
    """A wrong claim with the formula of one phase that gives it, and the value of that formula. [SI]"""

    claim: Compared
    formula: str
    value: float


@dataclass(frozen=True, slots=True)
class _Change:
    """A fluid that changes phase in a process."""

    process: str
    body: str
    last: str
    cold: float
    hot: float
    mass: float
    real: Substance


def as_one_phase(case: Case) -> Iterator[OnePhase]:
    """Yield the wrong claims of a record that a formula for one phase reproduces where the fluid changes phase."""
    wrong = [c for c in case.compared if c.outcome is Outcome.WRONG and isinstance(c.independent, float)]
    for change in _changes(case) if wrong else ():
        for claim in wrong:
            found = next((f for f in _formulas(case, change, claim) if _explains(claim, f, change)), None)
            if found is not None:
                yield OnePhase(claim, *found)


def _changes(case: Case) -> Iterator[_Change]:
    """Yield the real fluids that are wet at an end of a process, or liquid at one and vapour at the other."""
    for ctx in case.plan.contexts:
        ends = (ctx.process.from_state, ctx.process.to_state)
        for body in ctx.bodies:
            own, mass = case.plan.substances.get(body), case.value(f"bodies/{body}/mass")
            sides = [_SIDES.get(Phase(w)) for s in ends if (w := case.word(f"states/{s}/{body}/phase"))]
            warm = [t for s in ends if (t := case.value(f"states/{s}/{body}/temperature")) is not None]
            if own is None or own.model != REAL or mass is None or len(sides) < 2 or len(warm) < 2:
                continue
            if None not in sides and (sides[0] != sides[1]):
                yield _Change(ctx.process.id, body, ends[1], warm[0], warm[1], mass, own)


def _formulas(case: Case, change: _Change, claim: Compared) -> Iterator[tuple[str, float]]:
    """Yield the formulas of one phase for the quantity of a claim, with their values."""
    if claim.key in {_share(case, change, name) for name in CALORIC}:
        end = _claimed_end(case, change)
        for name, heat in _heats(change):
            yield f"m·{name}·ΔT", change.mass * heat * (end - change.cold)
    elif claim.key == f"states/{change.last}/{change.body}/temperature":
        supplied = case.value(_share(case, change, "heat"))
        for name, heat in _heats(change):
            if supplied is not None:
                yield f"T₁ + Q/(m·{name})", change.cold + supplied / (change.mass * heat)
    elif claim.key == f"states/{change.last}/{change.body}/pressure" and _closed(case, change):
        first = case.context(change.process)
        start = case.value(f"states/{first.process.from_state}/{change.body}/pressure") if first else None
        if start is not None:
            yield "p₁·T₂/T₁", start * change.hot / change.cold


def _share(case: Case, change: _Change, name: str) -> str:
    """Return the key of the body's own share: the total, where it is alone."""
    return case.key(f"processes/{change.process}/bodies/{change.body}/{name}")


def _claimed_end(case: Case, change: _Change) -> float:
    stated = case.stated(f"states/{change.last}/{change.body}/temperature")
    return stated[0].value if stated else change.hot


def _closed(case: Case, change: _Change) -> bool:
    ctx = case.context(change.process)
    return ctx is not None and any(path.kind == "constant volume" for path in ctx.paths_of(change.body))


def _heats(change: _Change) -> Iterator[tuple[str, float]]:
    """Yield the specific heats of the liquid and of the vapour that a person would take. [J/(kg·K)]"""
    liquid = _liquid_heat(change.real, change.cold)
    if liquid is not None:
        yield "c of the liquid", liquid
    gas = twin(change.real.name, IDEAL)
    if gas is None or gas.gas_constant is None:
        return
    try:
        low, high = (
            gas.state({"temperature": t, "pressure": 1e5}) for t in (change.cold, change.cold + DEGREE)
        )
    except NotEvaluable:
        return
    cv = (high.specific_internal_energy - low.specific_internal_energy) / DEGREE
    yield "c_v of the vapour", cv
    yield "c_p of the vapour", cv + gas.gas_constant


def _liquid_heat(real: Substance, temperature: float) -> float | None:
    try:
        low, high = (real.saturation({"temperature": t})[0] for t in (temperature, temperature + DEGREE))
    except NotEvaluable:
        return None
    return (high.specific_internal_energy - low.specific_internal_energy) / DEGREE


def _explains(claim: Compared, formula: tuple[str, float], change: _Change) -> bool:
    """Say whether a formula gives the claim, and the right value is far from both."""
    assert isinstance(claim.independent, float)
    zero = change.cold if claim.key.endswith("/temperature") else 0.0
    size = abs(formula[1] - zero)
    near = abs(claim.stated - formula[1]) <= CLOSE * size
    return near and abs(claim.independent - formula[1]) > APART * CLOSE * size

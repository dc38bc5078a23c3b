"""Which phases a state may be said to have, within the allowance of its temperature and quality."""

from __future__ import annotations

from dataclasses import dataclass
from typing import Final

from checker.case import Case
from checker.facts.twins import is_gas, is_incompressible
from checker.outcomes import NotEvaluable
from checker.problems import Place
from checker.submission import Role
from checker.substances.interface import Phase, Substance
from checker.vocabulary import Allowance

DENSE: Final = (Phase.SUBCOOLED_LIQUID, Phase.SUPERCRITICAL)
HOT: Final = (Phase.SUPERHEATED_VAPOUR, Phase.SUPERCRITICAL)
GAS: Final = (Phase.SUPERHEATED_VAPOUR, Phase.SATURATED_VAPOUR, Phase.SUPERCRITICAL)
CONDENSED: Final = (Phase.SUBCOOLED_LIQUID, Phase.SATURATED_LIQUID, Phase.SUPERCRITICAL, Phase.SOLID)
"""What an ideal gas, and what a body of constant volume, may be said to be."""


@dataclass(frozen=True, slots=True)
class PhaseClaim:
    """A phase word as stated, among inputs or results."""

    phase: Phase
    place: Place
    role: Role


def claims_of(case: Case, state: str, body: str) -> tuple[PhaseClaim, ...]:
    """Return the phases stated for a body in a state, input and result."""
    found = case.record.body_states.get((state, body))
    if found is None:
        return ()
    claims = []
    if found.phase is not None and found.phase_role is Role.INPUT:
        claims.append(PhaseClaim(Phase(found.phase), (*found.place, "inputs", "phase"), Role.INPUT))
    if found.claimed_phase is not None:
        place = (*found.place, "results", "phase")
        claims.append(PhaseClaim(Phase(found.claimed_phase), place, Role.RESULT))
    return tuple(claims)


def possible_phases(case: Case, state: str, body: str) -> tuple[Phase, ...] | None:
    """Return the phase of a state first, then others that cannot be told from it; None where no state is known.

    There is none for a body that is melting.

    Above the critical temperature or the critical pressure alone, usage differs: there both words are accepted.
    """
    melted = case.value(f"states/{state}/{body}/melted_fraction")
    if melted is not None:
        return _by_melted_fraction(melted, case.basis.allowances[Allowance.FRACTION])
    word = case.word(f"states/{state}/{body}/phase")
    if word is None:
        return _of_model(case, state, body)
    temperature, pressure = (case.value(f"states/{state}/{body}/{n}") for n in ("temperature", "pressure"))
    substance = case.plan.substances.get(body)
    if substance is None or temperature is None or pressure is None:
        return None
    own = Phase(word)
    quality = case.value(f"states/{state}/{body}/quality")
    slack = case.basis.allowances
    others = (
        *_around_critical(substance, temperature, pressure),
        *_by_quality(quality, slack[Allowance.FRACTION]),
        *(
            _by_temperature(substance, temperature, pressure, slack[Allowance.TEMPERATURE])
            if quality is None
            else ()
        ),
    )
    return tuple(dict.fromkeys((own, *others)))


def phase_found(case: Case, state: str, body: str) -> str:
    """Return the phase of a state in words; of a model without phases, what it stands for."""
    word = case.word(f"states/{state}/{body}/phase")
    if word is None and case.value(f"states/{state}/{body}/melted_fraction") is not None:
        return "partly melted"
    return word or ("liquid or solid" if is_incompressible(case, body) else "gas")


def _of_model(case: Case, state: str, body: str) -> tuple[Phase, ...] | None:
    """Return the phases that a model without saturation stands for: a gas, or a liquid or solid."""
    if case.value(f"states/{state}/{body}/temperature") is None:
        return None
    if is_incompressible(case, body):
        return CONDENSED
    return GAS if is_gas(case, body) else None


def _by_melted_fraction(melted: float, slack: float) -> tuple[Phase, ...]:
    """Return what a body that melts may be said to be: solid, liquid, or none of the words while it melts."""
    if melted <= slack:
        return (Phase.SOLID,)
    return (Phase.SUBCOOLED_LIQUID, Phase.SATURATED_LIQUID) if melted >= 1.0 - slack else ()


def _around_critical(substance: Substance, temperature: float, pressure: float) -> tuple[Phase, ...]:
    point = substance.critical_point
    if point is None:
        return ()
    hot, dense = temperature >= point[0], pressure >= point[1]
    if hot and not dense:
        return HOT
    return DENSE if dense and not hot else ()


def _by_quality(quality: float | None, slack: float) -> tuple[Phase, ...]:
    """Return the saturated phases that a quality close to 0 or 1 cannot be told from."""
    if quality is None:
        return ()
    ends = ((0.0, Phase.SATURATED_LIQUID), (1.0, Phase.SATURATED_VAPOUR))
    near = [phase for end, phase in ends if abs(quality - end) <= slack]
    beyond = {
        Phase.SATURATED_LIQUID: Phase.SUBCOOLED_LIQUID,
        Phase.SATURATED_VAPOUR: Phase.SUPERHEATED_VAPOUR,
    }
    return (*near, *(beyond[phase] for phase in near), Phase.WET_VAPOUR) if near else ()


def _by_temperature(
    substance: Substance, temperature: float, pressure: float, slack: float
) -> tuple[Phase, ...]:
    """Return the phases on both sides of a saturation line that is closer than the allowance."""
    try:
        liquid, vapour = substance.saturation({"pressure": pressure})
    except NotEvaluable:
        return ()
    found: list[Phase] = []
    if abs(temperature - liquid.temperature) <= slack:
        found += [Phase.SATURATED_LIQUID, Phase.SUBCOOLED_LIQUID]
    if abs(temperature - vapour.temperature) <= slack:
        found += [Phase.SATURATED_VAPOUR, Phase.SUPERHEATED_VAPOUR]
    return tuple(found)

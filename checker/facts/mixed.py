"""How far gas mixtures and moist air are from what they are calculated as."""

from __future__ import annotations

from dataclasses import replace

from checker.case import Case
from checker.facts.twins import CONSTANT, IDEAL, REAL, compressibility
from checker.outcomes import NotEvaluable
from checker.substances.interface import Substance
from checker.substances.mixtures import IdealMixture
from checker.substances.moist_air import MoistAir


def is_mixed(case: Case, body: str) -> bool:
    """Say whether a body is a mixture of ideal gases, or moist air of which the dry air is one."""
    own = case.plan.substances.get(body)
    return ideal_mixture(case, body) is not None or (isinstance(own, MoistAir) and own.model != REAL)


def ideal_mixture(case: Case, body: str) -> IdealMixture | None:
    """Return the mixture of ideal gases that a body is, or that its composition tells beside constant heats."""
    own = case.plan.substances.get(body)
    if (
        own is not None
        and own.model == CONSTANT
        and not own.incompressible
        and case.record.bodies[body].composition
    ):
        own = _by_model(case, body, IDEAL)
    return own if isinstance(own, IdealMixture) else None


def condensing_component(case: Case, body: str, temperature: float, pressure: float) -> str:
    """Return the component of a mixture of ideal gases that would condense, or an empty text.

    The condensate of moist air is part of its model.
    """
    mixture = ideal_mixture(case, body)
    found = None if mixture is None else mixture.condensing(temperature, pressure)
    return "" if found is None else found.fluid.name


def mixed_compressibility(case: Case, body: str, temperature: float, pressure: float) -> float | None:
    """Return the volume as a real fluid over the one calculated, at one temperature and pressure. [1]

    For a mixture of ideal gases it is Z. None where the real mixture has no value there.
    """
    own, real = case.plan.substances.get(body), _by_model(case, body, REAL)
    if own is None or real is None:
        return None
    if not isinstance(own, MoistAir):
        return compressibility(real, temperature, pressure)
    known = {"temperature": temperature, "pressure": pressure}
    try:
        volumes = [substance.state(known).specific_volume for substance in (real, own)]
    except NotEvaluable:
        return None
    return volumes[0] / volumes[1] if volumes[0] and volumes[1] else None


def _by_model(case: Case, body: str, word: str) -> Substance | None:
    model = case.plan.models[body]
    return replace(model, body=replace(model.body, model=word)).at_nominal()

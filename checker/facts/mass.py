"""The mass of a body, as every state with a given volume tells it."""

from __future__ import annotations

from collections.abc import Iterator

from checker.case import Case
from checker.facts.deviation import NOISE, Deviation
from checker.submission import Role
from checker.vocabulary import Allowance


def masses_of(case: Case, body: str) -> Iterator[tuple[str, Deviation]]:
    """Yield every state whose volume is given, with V/v less the mass of the body. [kg]"""
    pointer = f"bodies/{body}/mass"
    mass = case.value(pointer)
    if mass is None:
        return
    allowed = (case.basis.allowances[Allowance.VALUE] + NOISE) * mass
    for state, name in case.record.body_states:
        base = f"states/{state}/{body}"
        volume, specific = case.given(f"{base}/volume"), case.value(f"{base}/specific_volume")
        if name != body or volume is None or not specific:
            continue
        relative = case.uncertainty(f"{base}/specific_volume") / specific
        tolerance = allowed + mass * relative + case.uncertainty(pointer)
        moved = case.digit_move(f"{base}/specific_volume") / specific
        own = next(s.quantity.half_width for s in case.stated(f"{base}/volume", Role.INPUT)) / specific
        digits = mass * moved + case.digit_move(pointer) + own
        yield state, Deviation(volume / specific - mass, tolerance, digits)


def contradicts_mass(case: Case, pointer: str) -> bool:
    """Say whether a given volume of a state is reported as a mass that is not conserved."""
    parts = pointer.split("/")
    if len(parts) != 4 or parts[0] != "states" or parts[3] != "volume":
        return False
    return any(state == parts[1] and found.beyond for state, found in masses_of(case, parts[2]))

"""Exergy: destroyed by what generates entropy, and never negative."""

from __future__ import annotations

from typing import Final

from checker.case import Case, Raised, Yielded
from checker.facts import stated
from checker.facts.origins import DESTRUCTIONS, EXERGIES
from checker.facts.spans import surroundings_temperature
from checker.findings import Grade
from checker.vocabulary import Allowance
from rules.below_zero import stated_below_zero
from rules.rule import Rule, Scope
from rules.state import report_costly_gaps

GOUY_STODOLA: Final = "Gouy-Stodola theorem: X_d = T₀·S_gen"


def not_from_generation(case: Case, process: str) -> Yielded:
    """Yield a stated exergy destruction that is not T₀ times the stated entropy generation."""
    base, ambient = f"processes/{process}", surroundings_temperature(case)
    destroyed = stated.one(case, f"{base}/exergy_destruction")
    total = stated.one(case, f"{base}/entropy_generation_with_surroundings")
    made = total or stated.one(case, f"{base}/entropy_generation")
    if destroyed is None or made is None or ambient is None or stated.any_wrong(case, destroyed, made):
        return
    expected = ambient * made.value
    allowed = case.basis.allowances[Allowance.ENERGY] * max(abs(expected), abs(destroyed.value))
    if abs(destroyed.value - expected) > allowed + destroyed.half_width + ambient * made.half_width:
        yield Raised(
            f"{destroyed.parts[0].quantity.text} of exergy destruction is stated, and T₀ times the stated generation "
            f"of {made.parts[0].quantity.text} is {case.show(f'{base}/exergy_destruction', expected)}.",
            statement=destroyed.parts[0],
            suggestion="Multiply by the absolute temperature of the surroundings.",
        )


def not_closed(case: Case, process: str) -> Yielded:
    """Yield stated ΔX, exergy transfer and destruction that do not add up, unless a deviation explains it.

    Not where the destruction includes that outside the boundary.
    """
    base = f"processes/{process}"
    if case.stated(f"{base}/entropy_generation_with_surroundings"):
        return
    names = ("exergy_change", "exergy_transfer", "exergy_destruction")
    change, moved, destroyed = (stated.one(case, f"{base}/{name}") for name in names)
    if change is None or moved is None or destroyed is None:
        return
    left = change.value - moved.value + destroyed.value
    allowed = case.basis.allowances[Allowance.ENERGY] * stated.largest(change, moved, destroyed)
    slack = change.half_width + moved.half_width + destroyed.half_width
    if abs(left) > allowed + slack and not stated.any_wrong(case, change, moved, destroyed):
        pointer = f"{base}/exergy_destruction"
        yield Raised(
            f"Stated ΔX, exergy transfer and exergy destruction leave {case.show_difference(pointer, left)} of "
            f"ΔX − transfer + destruction.",
            statement=destroyed.parts[0],
            suggestion="Find the term that is wrong; all of them are the originator's own.",
        )


def destruction_negative(case: Case, process: str) -> Yielded:
    """Yield an exergy destruction stated below zero, where nothing above it is wrong."""
    for name in DESTRUCTIONS:
        yield from stated_below_zero(
            case,
            f"processes/{process}/{name}",
            "destroyed exergy is never negative",
            "Check the sign of the entropy generation and that of the work.",
        )


def exergy_negative(case: Case, item: str) -> Yielded:
    """Yield a closed-system exergy of a state stated below zero, where nothing above it is wrong."""
    for name in EXERGIES:
        yield from stated_below_zero(
            case,
            f"states/{item}/{name}",
            "a state other than that of the surroundings can always do work",
            "Closed-system exergy has p₀·(v − v₀) in it; flow exergy may be negative.",
        )


RULES: Final[tuple[Rule, ...]] = (
    Rule(
        "surroundings-not-stated",
        report_costly_gaps(
            "surroundings-not-stated", "State `surroundings` with temperature and absolute pressure."
        ),
        Scope.RECORD,
        "exergy",
        Grade.QUERY,
        "A result needs the surroundings, and they are not stated.",
        "Exergy, and entropy with the surroundings, have no value without T₀ and p₀.",
        GOUY_STODOLA,
    ),
    Rule(
        "destruction-not-from-generation",
        not_from_generation,
        Scope.PROCESS,
        "exergy",
        Grade.DISCREPANCY,
        "The stated exergy destruction is not T₀ times the stated entropy generation.",
        "Both describe one loss; mostly T₀ was taken in °C or of another place.",
        GOUY_STODOLA,
    ),
    Rule(
        "exergy-not-closed",
        not_closed,
        Scope.PROCESS,
        "exergy",
        Grade.DISCREPANCY,
        "Stated exergy change, transfer and destruction do not add up.",
        "Whatever the properties are, these three must agree.",
        "exergy balance of a closed system: ΔX = X_Q − X_W − X_d",
    ),
    Rule(
        "destruction-negative",
        destruction_negative,
        Scope.PROCESS,
        "exergy",
        Grade.DISCREPANCY,
        "An exergy destruction is stated below zero.",
        "A process that creates exergy is impossible.",
        GOUY_STODOLA,
    ),
    Rule(
        "exergy-negative",
        exergy_negative,
        Scope.STATE,
        "exergy",
        Grade.DISCREPANCY,
        "A closed-system exergy of a state is stated below zero.",
        "Zero at the state of the surroundings is its minimum; mostly the term p₀·(v − v₀) was left out.",
        "minimum of (u − u₀) + p₀(v − v₀) − T₀(s − s₀) at T₀, p₀",
    ),
)

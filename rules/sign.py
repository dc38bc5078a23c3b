"""Signs: which way heat and work go."""

from __future__ import annotations

from typing import Final

from checker.case import Case, Raised, Yielded
from checker.convention import follows_convention
from checker.facts.stated import is_wrong
from checker.findings import Grade
from rules.reading import reading_rule
from rules.rule import Rule, Scope

MAGNITUDES: Final = ("results/heat_supplied", "results/heat_rejected")


def convention_missing(case: Case) -> Yielded:
    """Yield the first work quantity whose sign nothing explains, with all others."""
    if case.record.work_convention is not None:
        return
    signed = [s for s in case.record.statements if s.value != 0.0 and follows_convention(case.record, s)]
    if signed:
        yield Raised(
            f"{signed[0].quantity.text} is stated, and the package does not say whether work is positive out of the "
            f"system or into it; positive out was used.",
            statement=signed[0],
            spoils=tuple(s.pointer for s in signed[1:]),
            suggestion="State `conventions: {work: positive out}` or `positive in`, or the direction of each item.",
        )


def magnitude_negative(case: Case) -> Yielded:
    """Yield heat supplied or rejected with a sign."""
    for pointer in MAGNITUDES:
        for s in case.stated(pointer):
            if s.value < 0.0 and not is_wrong(case, pointer):
                yield Raised(
                    f"{s.term.name.replace('_', ' ')}: {s.quantity.text} is negative, and is a magnitude.",
                    statement=s,
                    suggestion="State the magnitude; the name tells the direction.",
                )


RULES: Final[tuple[Rule, ...]] = (
    reading_rule(
        "direction-and-sign",
        "sign",
        Grade.DISCREPANCY,
        "A work transfer has both a direction and a negative number.",
        "Either of the two turns the work round; together they can mean both.",
    ),
    Rule(
        "work-convention-not-stated",
        convention_missing,
        Scope.RECORD,
        "sign",
        Grade.QUERY,
        "Work is stated, and nothing says which direction is positive.",
        "Both conventions are in use, and the wrong one turns every work of the record round.",
        "IUPAC Green Book, 3rd ed. (2007), 2.11: positive in; engineering practice: positive out",
    ),
    Rule(
        "magnitude-negative",
        magnitude_negative,
        Scope.RECORD,
        "sign",
        Grade.DISCREPANCY,
        "Heat supplied or heat rejected is stated with a negative sign.",
        "Both are magnitudes; an efficiency formed with the sign is wrong.",
    ),
)

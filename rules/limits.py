"""Limits: what the record promises to stay within."""

from __future__ import annotations

from collections.abc import Callable
from typing import Final

from checker.case import Case, Raised, Yielded
from checker.facts.limits import EXCEEDED, Margin, home_of, limit_of, margins
from checker.findings import Grade
from rules.rule import Rule, Scope

CERTAIN: Final = "JCGM 106:2012 (conformity and measurement uncertainty)"


def exceeded(case: Case, item: str) -> Yielded:
    """Yield limits that are exceeded for certain; how bad it is depends on the claim."""
    limit = limit_of(case, item)
    for margin in margins(case, limit):
        if margin.exceeded:
            claimed = (
                f"and it is claimed as {limit.claim}" if limit.claim else "and nothing is claimed about it"
            )
            yield _raised(
                case,
                item,
                margin,
                lambda value, bound, claimed=claimed: f"{value} {bound}, {claimed}.",  # type: ignore[misc]  # a lambda with defaults
                _grade(limit.claim),
                "Change the case until the limit is met, or say what is done about it.",
            )


def _grade(claim: str | None) -> Grade:
    if claim in EXCEEDED:
        return Grade.REMARK
    return Grade.QUERY if claim is None else Grade.DISCREPANCY


def within_uncertainty(case: Case, item: str) -> Yielded:
    """Yield limits of which it cannot be told whether they are met."""
    for margin in margins(case, limit_of(case, item)):
        if margin.uncertain:
            home, pointer = home_of(case, limit_of(case, item))
            spread = (home or case).show_difference(pointer, margin.uncertainty)
            yield _raised(
                case,
                item,
                margin,
                lambda value, bound, u=spread: f"{value} {bound}, but it is known to within {u} only.",  # type: ignore[misc]  # a lambda with defaults
                None,
                "Reduce the uncertainty, or keep a distance from the limit.",
            )


def claim_wrong(case: Case, item: str) -> Yielded:
    """Yield limits claimed as exceeded that are met for certain."""
    limit = limit_of(case, item)
    found = tuple(margins(case, limit))
    if limit.claim in EXCEEDED and found and not any(m.exceeded or m.uncertain for m in found):
        yield _raised(
            case,
            item,
            found[0],
            lambda value, bound: f"{value} {bound}, and the limit is claimed as {limit.claim}.",
            None,
            "Correct the claim, or the limit that was meant.",
        )


def _raised(
    case: Case,
    item: str,
    margin: Margin,
    words: Callable[[str, str], str],
    grade: Grade | None,
    suggestion: str,
) -> Raised:
    """Return a finding about one bound; ``words`` takes the value, and how it stands to the bound, as text."""
    limit = limit_of(case, item)
    basis = f" ({limit.basis})" if limit.basis else ""
    bound = f"{margin.stands} the limit of {margin.bound.text}{basis}"
    return Raised(
        words(margin.shown, bound),
        quantity=f"limits/{item}",
        place=limit.place,
        grade=grade,
        suggestion=suggestion,
    )


def not_evaluable(case: Case, item: str) -> Yielded:
    """Yield limits on a quantity without an independent value."""
    limit = limit_of(case, item)
    home, pointer = home_of(case, limit)
    if home is None or home.value(pointer) is None:
        reason = "its record was not reviewed before this one" if home is None else home.why_not(pointer)
        yield Raised(
            f"The limit on {limit.quantity} could not be checked: {reason}.",
            quantity=f"limits/{item}",
            place=limit.place,
            suggestion="State what is missing, or put the limit where its quantity is calculated.",
        )


def without_basis(case: Case, item: str) -> Yielded:
    """Yield limits that do not say where they come from."""
    limit = limit_of(case, item)
    if not limit.basis:
        yield Raised(
            f"The limit {item} does not say where it comes from.",
            quantity=f"limits/{item}",
            place=limit.place,
            suggestion="State its `basis`: nameplate, data sheet, code.",
        )


RULES: Final[tuple[Rule, ...]] = (
    Rule(
        "limit-exceeded",
        exceeded,
        Scope.LIMIT,
        "limit",
        Grade.DISCREPANCY,
        "A limit is exceeded. With no claim this is a query, claimed as exceeded a remark.",
        "Equipment is relied on to stay within it.",
        CERTAIN,
    ),
    Rule(
        "limit-within-uncertainty",
        within_uncertainty,
        Scope.LIMIT,
        "limit",
        Grade.QUERY,
        "A limit is met, or missed, by less than the uncertainty of the quantity.",
        "Nobody can tell whether the limit is kept.",
        CERTAIN,
    ),
    Rule(
        "limit-claim-wrong",
        claim_wrong,
        Scope.LIMIT,
        "limit",
        Grade.DISCREPANCY,
        "A limit is claimed as exceeded, and it is met.",
        "Decisions are taken on the claim, not on the number.",
        CERTAIN,
    ),
    Rule(
        "limit-not-evaluable",
        not_evaluable,
        Scope.LIMIT,
        "limit",
        Grade.QUERY,
        "A limit could not be checked.",
        "A limit that nobody checked must not look checked.",
    ),
    Rule(
        "limit-without-basis",
        without_basis,
        Scope.LIMIT,
        "limit",
        Grade.REMARK,
        "A limit does not say where it comes from.",
        "A reviewer cannot tell whether it is the right one.",
    ),
)

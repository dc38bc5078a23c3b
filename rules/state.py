"""States: whether the inputs fix them, and whether the claimed phase is theirs."""

from __future__ import annotations

from collections.abc import Callable
from typing import Final

from checker.case import Case, Raised, Unchecked, Yielded
from checker.facts.gaps import gaps_of
from checker.facts.links import differences, found_otherwise, is_known
from checker.facts.phases import claims_of, possible_phases
from checker.facts.state_gaps import without_datum
from checker.facts.stated import is_wrong
from checker.findings import Grade
from rules.rule import Rule, RuleFunction, Scope

PHASE_RULE: Final = (
    "IAPWS R6-95(2018), IAPWS R7-97(2012): saturation line and regions of water; alike for other fluids"
)


def report_gaps(rule: str, suggestion: str) -> RuleFunction:
    """Return the rule that reports the gaps of its name, each with the results that it costs.

    ``suggestion`` says what the originator can do.
    """

    def gap_found(case: Case) -> Yielded:
        for gap, costs in gaps_of(case, rule):
            yield Raised(
                f"{gap.reason[:1].upper()}{gap.reason[1:]}.",
                quantity=gap.pointer,
                place=gap.place,
                spoils=costs,
                suggestion=suggestion,
            )

    return gap_found


def report_costly_gaps(rule: str, suggestion: str) -> RuleFunction:
    """Return the rule that reports the gaps of its name that cost a stated result."""
    every: Callable[[Case], Yielded] = report_gaps(rule, suggestion)

    def costly_gap_found(case: Case) -> Yielded:
        return (found for found in every(case) if isinstance(found, Unchecked) or found.spoils)

    return costly_gap_found


def datum_missing(case: Case) -> Yielded:
    """Yield, once per body, absolute u, h or s among the inputs whose zero is not known."""
    seen: set[str] = set()
    for s in without_datum(case):
        body = s.pointer.split("/")[2]
        if body not in seen:
            seen.add(body)
            lost = next((costs for g, costs in gaps_of(case, "datum-missing") if f"/{body}" in g.pointer), ())
            yield Raised(
                f"{s.term.name.replace('_', ' ')}: {s.quantity.text} is an input, and where it is zero is not stated.",
                statement=s,
                spoils=lost,
                suggestion="State the `datum` of the body, or start from properties without one (T, p, v, quality).",
            )


def phase_disagrees(case: Case, item: str) -> Yielded:
    """Yield a stated phase that the state does not have, within the allowance of its temperature or quality."""
    state, body = item.split("/")
    for claim in claims_of(case, state, body):
        possible = possible_phases(case, state, body)
        if possible is None:
            yield Unchecked(f"phase of {item}", "the model has no phases, or the state is not known")
        elif claim.phase not in possible:
            yield Raised(
                f"phase: {claim.phase} is stated; recomputed it is {possible[0] if possible else 'partly melted'}.",
                quantity=f"states/{item}/phase",
                place=claim.place,
                suggestion="Take the properties from the region in which the state lies.",
            )


def has_phase_claim(case: Case, item: str) -> bool:
    """Say whether a phase is stated for a body in a state."""
    state, body = item.split("/")
    return bool(claims_of(case, state, body))


def has_links(case: Case, _: str) -> bool:
    """Say whether a record has linked states."""
    return any(found.same_as is not None for found in case.record.body_states.values())


def quality_outside_range(case: Case, item: str) -> Yielded:
    """Yield a quality below 0 or above 1."""
    pointer = f"states/{item}/quality"
    for s in case.stated(pointer):
        if not 0.0 <= s.value <= 1.0 and not is_wrong(case, pointer):
            yield Raised(
                f"quality: {s.quantity.text} is not between 0 and 1.",
                statement=s,
                suggestion="Superheated vapour and subcooled liquid have no quality: state two other properties.",
            )


def link_contradicted(case: Case) -> Yielded:
    """Yield states that are declared the same as another one, and that their own inputs or path put elsewhere."""
    for found, home, target in found_otherwise(case):
        link, pointer = str(found.same_as), f"states/{found.state}/{found.body}"
        if home is None or not is_known(home, target):
            yield Unchecked(f"link of {pointer}", f"{link} has no value to compare with")
            continue
        apart = tuple(differences(case, found, home, target))
        if not apart:
            continue
        first = apart[0]
        own = first.linked + first.deviation.size
        grades = [a.deviation.grade for a in apart]
        yield Raised(
            f"{found.state} is declared the same as {link}, where {first.name.replace('_', ' ')} is "
            f"{case.show(first.pointer, first.linked)}; what is stated beside the link gives "
            f"{case.show(first.pointer, own)}.",
            quantity=pointer,
            place=(*found.place, "same_as"),
            grade=Grade.QUERY if all(grades) else None,
            suggestion="Drop the link or the inputs beside it, whichever does not define the case.",
        )


RULES: Final[tuple[Rule, ...]] = (
    Rule(
        "state-undetermined",
        report_gaps(
            "state-undetermined", "State one more independent property, or the path that leads there."
        ),
        Scope.RECORD,
        "state",
        Grade.QUERY,
        "The inputs do not fix a state.",
        "Two independent properties fix a state of a fixed mass of a pure substance; with fewer, any result "
        "follows from something that is not shown.",
        "state postulate of a simple compressible substance",
    ),
    Rule(
        "state-impossible",
        report_gaps("state-impossible", "Check number and unit of both properties."),
        Scope.RECORD,
        "state",
        Grade.QUERY,
        "No state of the substance has the stated properties.",
        "At least one of the two is not that of this substance.",
    ),
    Rule(
        "several-states-possible",
        report_gaps("several-states-possible", "State the phase, or a property that tells the states apart."),
        Scope.RECORD,
        "state",
        Grade.QUERY,
        "More than one state has the stated properties.",
        "The review lists them all and takes none: only the originator knows which was meant.",
    ),
    Rule(
        "datum-missing",
        datum_missing,
        Scope.RECORD,
        "state",
        Grade.QUERY,
        "An absolute u, h or s is an input, and its zero is not stated.",
        "Tables differ by some hundred kJ/kg in their zero; a value taken from another table means another state.",
        "reference states in use: IIR, ASHRAE, normal boiling point, 25 °C and 1 atm",
    ),
    Rule(
        "near-saturation",
        report_gaps(
            "near-saturation", "State phase, quality or melted fraction, specific volume or internal energy."
        ),
        Scope.RECORD,
        "state",
        Grade.QUERY,
        "Temperature and pressure, with their digits, reach across the saturation line, or melting.",
        "Liquid and vapour (solid and liquid) at one temperature differ by the whole energy of evaporation (melting).",
        PHASE_RULE,
    ),
    Rule(
        "two-phase-from-temperature-and-pressure",
        report_gaps(
            "two-phase-from-temperature-and-pressure",
            "Move the quality (or v or u) to the inputs; temperature and pressure are one property here.",
        ),
        Scope.RECORD,
        "state",
        Grade.QUERY,
        "A wet vapour is claimed from temperature and pressure alone.",
        "In the two-phase region pressure follows from temperature, so the quality comes from somewhere else.",
        "phase rule: a pure substance in two phases has one free intensive property",
    ),
    Rule(
        "phase-disagrees",
        phase_disagrees,
        Scope.STATE,
        "state",
        Grade.DISCREPANCY,
        "The stated phase is not the one that the state has.",
        "Properties were read from the wrong region, or the inputs are not those of the state that was meant.",
        PHASE_RULE,
        when=has_phase_claim,
    ),
    Rule(
        "link-contradicted",
        link_contradicted,
        Scope.RECORD,
        "state",
        Grade.DISCREPANCY,
        "A state is declared the same as another one, and what is stated beside the link puts it elsewhere.",
        "Two descriptions of one state cannot both be right, and the result depends on which was used.",
        when=has_links,
    ),
    Rule(
        "quality-outside-range",
        quality_outside_range,
        Scope.STATE,
        "state",
        Grade.DISCREPANCY,
        "A quality is below 0 or above 1.",
        "A quality computed outside 0 to 1 says that the state is not wet; properties formed with it are wrong.",
    ),
)

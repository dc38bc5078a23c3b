"""Model adequacy: whether the model that the originator chose describes the substance where it is used."""

from __future__ import annotations

from collections.abc import Mapping
from itertools import pairwise
from typing import Final

from checker.case import Case, Raised, Unchecked, Yielded
from checker.facts import adequacy, idealised
from checker.facts.adequacy import GasCheck
from checker.facts.gaps import gaps_of
from checker.facts.redone import Moved, in_words
from checker.facts.twins import is_gas, is_incompressible
from checker.findings import Grade
from checker.submission import Role
from checker.vocabulary import Allowance
from rules.rule import Rule, Scope
from rules.state import report_gaps

FAR: Final = 10.0
"""So many allowances away, a gas is no ideal gas and the model must be changed (chosen)."""
NOTED: Final = 4.0
"""Up to so many allowances what an idealisation costs a result is noted; beyond them it is asked about (chosen)."""
MOST_SHOWN: Final = 3
"""Results that a message lists, the worst first."""
OWN_EQUATION: Final = "equation of state of the named fluid, as printed with the models of the record"


def gas_state(case: Case, item: str) -> bool:
    """Say whether a state belongs to a body that is modelled as an ideal gas."""
    return is_gas(case, item.split("/")[1])


def too_dense(case: Case, body: str) -> Yielded:
    """Yield an ideal gas whose compressibility factor is off 1 and costs the results more than the allowance."""
    checks = adequacy.gas_checks(case, body)
    yield from _without_factor(case, body, checks)
    worst = adequacy.densest(checks)
    off = abs(worst.factor - 1.0) / case.basis.allowances[Allowance.VALUE] if worst else 0.0
    if worst is None or off <= 1.0:
        return
    found = idealised.by_real_gas(case, body) or ()
    if found and found[0].allowances <= 1.0:
        return
    yield Raised(
        f"{case.record.bodies[body].substance} has a compressibility factor of {worst.factor:.4f} "
        f"{'at half the pressure of' if worst.halfway else 'in'} state {worst.state}. "
        + _results(case, found, "as a real fluid", "as an ideal gas", off),
        quantity=f"bodies/{body}",
        place=case.record.bodies[body].place,
        grade=_of_density(off, found[0].allowances if found else off),
        suggestion="Use the model `real fluid`, or show that the results do not need this accuracy.",
    )


def _without_factor(case: Case, body: str, checks: Mapping[str, GasCheck | None]) -> Yielded:
    for state, check in checks.items():
        if check is None:
            yield _no_twin(case, f"{state}/{body}", body)
        elif check.factor is None and not check.condensed:
            yield Unchecked(
                f"ideal-gas-too-dense: states/{state}/{body}", "the real fluid has no value there"
            )


def _of_density(off: float, moved: float) -> Grade:
    """Return the grade by how many allowances Z is off 1, and the results move."""
    if moved <= NOTED:
        return Grade.REMARK
    return Grade.DISCREPANCY if min(off, moved) > FAR else Grade.QUERY


def _results(case: Case, found: tuple[Moved, ...], better: str, own: str, off: float = 0.0) -> str:
    """Return the results that move by more than their allowance, as a sentence."""
    beyond = [m for m in found if m.allowances > 1.0]
    if not beyond:
        share = 100.0 * off * case.basis.allowances[Allowance.VALUE]
        return f"Its pressure, volume or mass is off by {share:.1f} %; no result could be redone with the real fluid."
    words = [
        f"{in_words(m.pointer)} {case.show(m.pointer, m.second)} instead of {case.show(m.pointer, m.first)}"
        for m in beyond[:MOST_SHOWN]
    ]
    more = f"; and {len(beyond) - MOST_SHOWN} more" if len(beyond) > MOST_SHOWN else ""
    return f"Done again {better} and not {own}, the record gives {'; '.join(words)}{more}."


def condenses(case: Case, item: str) -> Yielded:
    """Yield states of an ideal gas in which the real fluid is liquid."""
    state, body = item.split("/")
    check = adequacy.gas_check(case, state, body)
    if check is None:
        yield _no_twin(case, item, body)
    elif check.condensed:
        name = case.record.bodies[body].substance
        what = f"{check.component} of {name} would condense" if check.component else f"{name} is liquid"
        yield Raised(
            f"{what} at the temperature and pressure of state {state}, and is calculated as an ideal gas.",
            quantity=f"states/{item}",
            place=case.record.body_states[state, body].place,
            suggestion="Count the condensate and its latent heat."
            if check.component
            else "Use the model `real fluid`.",
        )


def _no_twin(case: Case, item: str, body: str) -> Unchecked:
    name = case.record.bodies[body].substance
    return Unchecked(
        f"ideal gas: states/{item}", f"no equation of state is known for {name}, or the state is not"
    )


def constant_heat_body(case: Case, body: str) -> bool:
    """Say whether a body is calculated with a constant specific heat and has a better model."""
    return adequacy.has_constant_heat(case, body) and adequacy.better_heat(case, body) is not None


def heat_not_constant(case: Case, body: str) -> Yielded:
    """Yield a body whose results move by more than the allowance when c follows the temperature."""
    if idealised.of_another_substance(case, body) or idealised.changes_phase(case, body):
        return
    found = idealised.by_real_heat(case, body)
    if found is None:
        if idealised.claims_something(case):
            yield Unchecked(f"specific heat of {body}", "its temperatures are not those of one phase")
    elif found[0].allowances > 1.0:
        name = case.record.bodies[body].substance
        yield Raised(
            f"The specific heat of {name} changes over the temperatures of the record. "
            + _results(case, found, f"with that of {name}", "with a constant one"),
            quantity=f"bodies/{body}",
            place=case.record.bodies[body].place,
            grade=Grade.REMARK if found[0].allowances <= NOTED else Grade.QUERY,
            suggestion="Use a mean value for this span, or the model `ideal gas` or `real fluid`.",
        )


def phase_crossed(case: Case, process: str) -> Yielded:
    """Yield condensed bodies of constant specific heat that freeze, melt or boil between the ends."""
    ctx = case.context(process)
    for body in ctx.bodies if ctx is not None else ():
        found = adequacy.regions(case, process, body) if is_incompressible(case, body) else None
        if found is None or found[0].side == found[1].side:
            found = adequacy.melts(case, process, body)
        if found is not None and found[0].side != found[1].side:
            words = [adequacy.REGIONS[end.side] for end in found]
            shown = [case.show(f"states/{end.state}/{body}/temperature", end.temperature) for end in found]
            yield Raised(
                f"{case.record.bodies[body].substance} is {words[0]} at {shown[0]} and {words[1]} at {shown[1]}, and "
                f"{body} is calculated {adequacy.without_latent_heat(case, body)}.",
                quantity=f"processes/{process}",
                place=next(p.place for p in case.record.processes if p.id == process),
                suggestion="Use the model `real fluid` or `phase change`, or put the latent heat into the balance.",
            )


def constants_unlike(case: Case, body: str) -> Yielded:
    """Yield stated constants that are not those of the named fluid."""
    for check in adequacy.constants_of_substance(case, body):
        for s in case.stated(check.pointer, Role.INPUT):
            allowed = case.basis.allowances[Allowance.VALUE] * check.expected + s.quantity.half_width
            if abs(s.value - check.expected) > allowed:
                yield Raised(
                    f"{s.term.name.replace('_', ' ')}: {s.quantity.text} is stated, and that of {check.source} is "
                    f"{case.show(check.pointer, check.expected)}.",
                    statement=s,
                    suggestion="Check that the constant belongs to this substance.",
                )


def constants_contradict(case: Case, body: str) -> Yielded:
    """Yield c_p, c_v, R and M of a gas of which one contradicts the others."""
    for gap, costs in gaps_of(case, "constants-contradict"):
        if gap.pointer == f"bodies/{body}":
            yield _contradiction(case, body, f"{gap.reason[:1].upper()}{gap.reason[1:]}.", costs)
            return
    found = adequacy.gas_constants(case, body)
    for first, other in pairwise(found):
        allowed = case.basis.allowances[Allowance.VALUE] * abs(first.expected)
        if abs(other.expected - first.expected) > allowed + adequacy.digits_of_constants(case, body):
            pointer = f"bodies/{body}/gas_constant"
            values = [case.show(pointer, check.expected) for check in (first, other)]
            yield _contradiction(
                case, body, f"R = {values[0]} by {first.source}, and R = {values[1]} by {other.source}."
            )


def _contradiction(case: Case, body: str, message: str, spoils: tuple[str, ...] = ()) -> Raised:
    return Raised(
        message,
        quantity=f"bodies/{body}",
        place=case.record.bodies[body].place,
        spoils=spoils,
        suggestion="Two of c_p, c_v and R define the gas: keep those and correct or drop the rest.",
    )


def asked_for_pressure(case: Case, item: str) -> Yielded:
    """Yield a pressure claimed of a model that has none."""
    pointer = f"states/{item}/pressure"
    for s in case.stated(pointer, Role.RESULT):
        if case.value(pointer) is None and case.failure(pointer) is None:
            yield Raised(
                f"pressure: {s.quantity.text} is claimed, and a liquid or solid of constant volume has the pressure "
                f"that is put on it: the model cannot give one.",
                statement=s,
                suggestion="State the pressure as an input, or use the model `real fluid`.",
            )


def incompressible_state(case: Case, item: str) -> bool:
    """Say whether a state belongs to a body without a pressure of its own."""
    return is_incompressible(case, item.split("/")[1])


def can_be_critical(case: Case, item: str) -> bool:
    """Say whether a state belongs to a fluid with a critical point."""
    return adequacy.has_critical_point(case, item.split("/")[1])


def near_critical(case: Case, item: str) -> Yielded:
    """Yield states close to the critical point."""
    state, body = item.split("/")
    if adequacy.near_critical(case, state, body):
        yield Raised(
            f"State {state} of {body} is close to the critical point, where density and specific heat react to the "
            f"smallest change of temperature or pressure.",
            quantity=f"states/{item}",
            place=case.record.body_states[state, body].place,
            suggestion="Show how much the result moves with temperature and pressure.",
        )


RULES: Final[tuple[Rule, ...]] = (
    Rule(
        "substance-unknown",
        report_gaps(
            "substance-unknown", "Use a name of the table, or state the constants of a simpler model."
        ),
        Scope.RECORD,
        "model adequacy",
        Grade.QUERY,
        "A substance is not one whose properties are known.",
        "Nothing of the body can be recomputed.",
    ),
    Rule(
        "constants-missing",
        report_gaps("constants-missing", "State these constants among the inputs of the body."),
        Scope.RECORD,
        "model adequacy",
        Grade.QUERY,
        "A model with constant specific heats has no constants to work with.",
        "Nothing of the body can be recomputed; what is neither stated nor in the handbook table is not guessed.",
    ),
    Rule(
        "model-not-recomputed",
        report_gaps(
            "model-not-recomputed", "Have these results checked by hand, or describe the body otherwise."
        ),
        Scope.RECORD,
        "model adequacy",
        Grade.QUERY,
        "A body has a model that this version does not recompute.",
        "Its results are listed as not checked, so that nobody takes them for checked.",
    ),
    Rule(
        "outside-range",
        report_gaps("outside-range", "Use a model that holds there, and show its source."),
        Scope.RECORD,
        "model adequacy",
        Grade.QUERY,
        "A state lies outside the range of its equation of state.",
        "An equation of state extrapolates without a warning, and its published uncertainty ends with its range.",
        OWN_EQUATION,
    ),
    Rule(
        "near-critical",
        near_critical,
        Scope.STATE,
        "model adequacy",
        Grade.REMARK,
        "A state is close to the critical point.",
        "Published uncertainties do not hold there, and the last digits of the inputs move the results.",
        OWN_EQUATION,
        needs=("temperature",),
        when=can_be_critical,
    ),
    Rule(
        "ideal-gas-too-dense",
        too_dense,
        Scope.BODY,
        "model adequacy",
        Grade.QUERY,
        "A gas is calculated as ideal where its compressibility factor is off 1 by more than the allowance, and the "
        "record, done once more as a real fluid, moves a result by more than its allowance (a remark; beyond four of "
        "them a query; beyond ten, with Z as far off, a discrepancy).",
        "The originator's results agree with the model and not with the gas; nothing else in the record shows it.",
        OWN_EQUATION,
        when=is_gas,
    ),
    Rule(
        "ideal-gas-condenses",
        condenses,
        Scope.STATE,
        "model adequacy",
        Grade.DISCREPANCY,
        "A gas is calculated as ideal where the substance is liquid.",
        "The energy of condensation is missing, which is larger than anything else in the balance.",
        OWN_EQUATION,
        needs=("temperature", "pressure"),
        when=gas_state,
    ),
    Rule(
        "constant-specific-heat-over-wide-span",
        heat_not_constant,
        Scope.BODY,
        "model adequacy",
        Grade.QUERY,
        "A result moves by more than the allowance (a remark; beyond four of them a query) when the record is done "
        "once more with a specific heat that follows the temperature.",
        "The record agrees with its own constant and not with the substance.",
        OWN_EQUATION,
        when=constant_heat_body,
    ),
    Rule(
        "latent-heat-left-out",
        phase_crossed,
        Scope.PROCESS,
        "model adequacy",
        Grade.DISCREPANCY,
        "A fluid or material of constant specific heat freezes, melts or boils between the ends of a process.",
        "Melting takes up as much energy as warming by some 80 K, and evaporation far more.",
        "equation of state of the named fluid; melting temperatures of the handbook table with its sources",
    ),
    Rule(
        "constants-unlike-substance",
        constants_unlike,
        Scope.BODY,
        "model adequacy",
        Grade.QUERY,
        "A stated gas constant or molar mass is not that of the named substance.",
        "A constant of another gas goes into the mass and into every energy.",
        OWN_EQUATION,
    ),
    Rule(
        "constants-contradict",
        constants_contradict,
        Scope.BODY,
        "model adequacy",
        Grade.DISCREPANCY,
        "c_p, c_v, gas constant and molar mass of a gas contradict each other.",
        "Results depend on which of them was used where.",
        "c_p − c_v = R of an ideal gas; R from CODATA 2018",
    ),
    Rule(
        "incompressible-asked-for-pressure",
        asked_for_pressure,
        Scope.STATE,
        "model adequacy",
        Grade.DISCREPANCY,
        "A pressure is claimed as a result of a model of constant volume.",
        "Such a model has no pressure of its own; the number comes from somewhere else.",
        when=incompressible_state,
    ),
)

"""Energy: what is stated must balance, and the inputs must not say more than one thing."""

from __future__ import annotations

from typing import Final

from checker.case import Case, Raised, Yielded
from checker.facts import balance, exchange, stated
from checker.facts.cycles import RATIOS, closes
from checker.facts.mass import masses_of
from checker.facts.naming import name_of
from checker.facts.paths import any_follows
from checker.facts.sums import sums
from checker.facts.twins import REAL, is_gas
from checker.findings import Grade
from checker.submission import Role
from checker.vocabulary import Allowance
from rules.rule import Rule, Scope
from rules.state import report_costly_gaps

FIRST_LAW: Final = "first law for a closed system: ΔE = Q − W"


def not_closed(case: Case, process: str) -> Yielded:
    """Yield stated ΔE, Q and W that do not balance, unless a deviation of one of them explains it."""
    change = stated.energy_change(case, process)
    heat, work = stated.heat(case, process), stated.work(case, process)
    residual = balance.energy_residual(case, process)
    if change is None or heat is None or work is None or (residual is not None and residual.beyond):
        return
    if not any(s.role is Role.RESULT for term in (change, heat, work) for s in term.parts):
        return
    left = change.value - heat.value + work.value
    allowed = case.basis.allowances[Allowance.ENERGY] * stated.largest(change, heat, work)
    if abs(left) <= allowed + change.half_width + heat.half_width + work.half_width:
        return
    if not stated.any_wrong(case, change, heat, work):
        open_digits = sum(term.open_half_width for term in (change, heat, work))
        pointer = f"processes/{process}/energy_change"
        parts = (change.value, heat.value, work.value)
        shown = [case.show_difference(pointer, value) for value in parts]
        yield Raised(
            f"Stated ΔE = {shown[0]}, Q = {shown[1]} in and W = {shown[2]} out leave "
            f"{case.show_difference(pointer, left)} of ΔE − Q + W.",
            statement=(change.parts or heat.parts or work.parts)[0],
            quantity=pointer,
            grade=Grade.QUERY if abs(left) <= allowed + open_digits else None,
            suggestion="Find the term that is wrong or missing; all of them are the originator's own.",
        )


def inputs_overdetermined(case: Case, process: str) -> Yielded:
    """Yield inputs that give all terms of the energy balance and do not close it."""
    residual = balance.energy_residual(case, process)
    if residual is not None and residual.beyond and not exchange.rubs_reversibly(case, process):
        pointer = f"processes/{process}/energy_change"
        yield Raised(
            f"The inputs give all terms of the energy balance, and leave "
            f"{case.show_difference(pointer, residual.size)} of ΔE − Q + W.",
            quantity=f"processes/{process}",
            place=_place(case, process),
            grade=residual.grade,
            suggestion="Keep the inputs that define the case; let the balance give the rest as a result.",
        )


def work_not_accounted_for(case: Case, process: str) -> Yielded:
    """Yield work that the balance needs and no work transfer explains."""
    left = balance.unlisted_work(case, process)
    if left is not None and left.beyond:
        listed = case.value(f"processes/{process}/work_residual") is not None
        pointer = f"processes/{process}/work"
        yield Raised(
            f"The energy balance needs work of {case.show(pointer, case.value(pointer) or 0.0)}, and boundary, shaft "
            f"and electrical work as given leave {case.show(pointer, left.size)} of it open.",
            quantity=pointer,
            place=_place(case, process),
            grade=left.grade if listed else Grade.QUERY,
            suggestion="List the work transfer that is missing, or correct the heat or the path.",
        )


def work_from_rigid_vessel(case: Case, process: str) -> Yielded:
    """Yield shaft or electrical work that a fluid of constant volume gives off."""
    for kind in ("shaft_work", "electrical_work"):
        pointer = f"processes/{process}/{kind}"
        value = case.value(pointer)
        if value is not None and value > balance.energy_allowance(case, process):
            yield Raised(
                f"{case.show(pointer, value)} of {kind.replace('_', ' ')} leaves a fluid whose volume is constant.",
                quantity=pointer,
                place=_place(case, process),
                suggestion="Check the sign: stirring and heating by electricity go into the system.",
            )


def out_of_reach(case: Case, process: str) -> Yielded:
    """Yield an end temperature that the given powers and losses never lead to."""
    found = exchange.unreachable(case, next(p for p in case.record.processes if p.id == process))
    if found is None:
        return
    pointer = f"states/{found.state}/{found.body}/temperature"
    powers = f"{case.show(found.power, found.supplied)} and " if found.supplied else ""
    yield Raised(
        f"With {powers}the heat through {', '.join(found.losses)}, {found.body} settles at "
        f"{case.show(pointer, found.settles)}; {case.show(pointer, found.temperature)} is never "
        f"{'held' if found.stays else 'reached'}.",
        statement=next(iter(case.stated(pointer, Role.INPUT)), None),
        quantity=pointer,
        place=None if case.stated(pointer, Role.INPUT) else _place(case, process),
        suggestion="Check the power, the loss coefficient with its unit, and the temperature outside.",
    )


def friction_gives_work(case: Case, process: str) -> Yielded:
    """Yield friction that gives work, stated or found."""
    pointer = f"processes/{process}/friction_work"
    found = exchange.friction(case, process)
    outward = next((s for s in case.stated(pointer) if s.value > s.quantity.half_width), None)
    if outward is not None or (found is not None and found.size > found.tolerance):
        shown = outward.quantity.text if outward else case.show(pointer, case.value(pointer) or 0.0)
        yield Raised(
            f"Friction work of {shown} leaves the system by the work convention; friction only takes work in.",
            statement=outward,
            quantity=pointer,
            place=_place(case, process) if outward is None else None,
            grade=found.grade if outward is None and found is not None else None,
            suggestion="State it as a work transfer `kind: friction, direction: in` with a positive number, or check "
            "what else the balance lacks.",
        )


def rigid_fluid(case: Case, process: str) -> bool:
    """Say whether one fluid follows a constant-volume path."""
    ctx = case.context(process)
    if ctx is None or len(ctx.bodies) != 1 or not any_follows(case, process, "constant volume"):
        return False
    own = case.plan.substances.get(ctx.bodies[0])
    return own is not None and (own.model == REAL or is_gas(case, ctx.bodies[0]))


def cycle_not_closed(case: Case) -> Yielded:
    """Yield an efficiency or a coefficient of performance of processes that are no cycle."""
    for name in RATIOS:
        for s in case.stated(f"results/{name}"):
            if not closes(case):
                yield Raised(
                    f"{name.replace('_', ' ')} {s.quantity.text} is stated, and the processes do not lead back to the "
                    f"state where they began.",
                    statement=s,
                    suggestion="Add the process that closes the cycle, or state the ratio under another name.",
                )


def efficiency_impossible(case: Case) -> Yielded:
    """Yield a thermal efficiency below 0 or above 1 that nothing else reports."""
    pointer = "results/thermal_efficiency"
    for s in case.stated(pointer):
        if not 0.0 <= s.value <= 1.0 and not stated.is_wrong(case, pointer):
            yield Raised(
                f"thermal efficiency: {s.quantity.text} is not between 0 and 1.",
                statement=s,
                suggestion="Net work per heat supplied: check the sign of the work and which heat is supplied.",
            )


def totals_do_not_add_up(case: Case) -> Yielded:
    """Yield stated totals that differ from the sum of their stated parts."""
    for found in sums(case):
        left = found.stated.value - found.parts.value
        allowed = case.basis.allowances[Allowance.ENERGY] * stated.largest(found.stated, found.parts)
        if abs(left) <= allowed + found.stated.half_width + found.parts.half_width:
            continue
        if not stated.any_wrong(case, found.stated, found.parts):
            statement = found.stated.parts[0]
            yield Raised(
                f"{name_of(statement)}: {statement.quantity.text} is stated, and {found.words} add "
                f"up to {case.show(found.pointer, found.parts.value)}.",
                statement=statement,
                suggestion="Correct the total or the part that is wrong.",
            )


def mass_not_conserved(case: Case, body: str) -> Yielded:
    """Yield volumes of states that make the mass of a body differ from one state to the next."""
    for state, deviation in masses_of(case, body):
        if deviation.beyond:
            pointer = f"bodies/{body}/mass"
            mass = case.value(pointer) or 0.0
            yield Raised(
                f"The volume of {body} in state {state} holds {case.show(pointer, mass + deviation.size)}, and its "
                f"mass is {case.show(pointer, mass)}.",
                statement=next(iter(case.stated(f"states/{state}/{body}/volume", Role.INPUT)), None),
                grade=deviation.grade,
                suggestion="A closed system keeps its mass: correct the volume, the state or the mass.",
            )


def _place(case: Case, process: str) -> tuple[str | int, ...]:
    return next(p.place for p in case.record.processes if p.id == process)


RULES: Final[tuple[Rule, ...]] = (
    Rule(
        "mass-not-conserved",
        mass_not_conserved,
        Scope.BODY,
        "energy",
        Grade.DISCREPANCY,
        "Volumes given for several states of a body hold different masses.",
        "A closed system exchanges no mass; a leak or a refill needs another calculation.",
        "conservation of mass",
    ),
    Rule(
        "energy-not-closed",
        not_closed,
        Scope.PROCESS,
        "energy",
        Grade.DISCREPANCY,
        "Stated energy change, heat and work do not balance among themselves.",
        "Whatever the properties are, these three must agree.",
        FIRST_LAW,
    ),
    Rule(
        "inputs-overdetermined",
        inputs_overdetermined,
        Scope.PROCESS,
        "energy",
        Grade.DISCREPANCY,
        "The inputs give every term of the energy balance, and it does not close.",
        "One input contradicts the others, and the results depend on which of them was used.",
        FIRST_LAW,
    ),
    Rule(
        "work-not-accounted-for",
        work_not_accounted_for,
        Scope.PROCESS,
        "energy",
        Grade.DISCREPANCY,
        "The balance needs work that no work transfer accounts for.",
        "A stirrer, a heater or friction was forgotten, or the heat or the path is wrong.",
        FIRST_LAW,
    ),
    Rule(
        "work-from-rigid-vessel",
        work_from_rigid_vessel,
        Scope.PROCESS,
        "energy",
        Grade.QUERY,
        "Shaft or electrical work leaves a fluid in a vessel of constant volume.",
        "A fluid at rest can be stirred but does not turn the stirrer; mostly the sign is wrong.",
        "Kelvin-Planck statement of the second law",
        when=rigid_fluid,
    ),
    Rule(
        "too-many-unknowns",
        report_costly_gaps("too-many-unknowns", "State all but one of the heat transfers as inputs."),
        Scope.RECORD,
        "energy",
        Grade.QUERY,
        "Several heat transfers of one process are unknown.",
        "One balance closes one unknown; how the rest was divided is not shown.",
        FIRST_LAW,
    ),
    Rule(
        "temperature-out-of-reach",
        out_of_reach,
        Scope.PROCESS,
        "energy",
        Grade.DISCREPANCY,
        "Powers and heat losses balance before the end temperature is reached.",
        "The heater is too small, or a loss coefficient is wrong; no duration makes the process possible.",
        "energy balance of a body at uniform temperature: dE/dt = P + UA·(T_out − T)",
    ),
    Rule(
        "friction-gives-work",
        friction_gives_work,
        Scope.PROCESS,
        "energy",
        Grade.DISCREPANCY,
        "Friction work leaves the system.",
        "Its sign is turned round, so that friction counts as a gain of work and as destroyed entropy.",
        "second law: friction turns work into internal energy, never the reverse",
    ),
    Rule(
        "totals-do-not-add-up",
        totals_do_not_add_up,
        Scope.RECORD,
        "energy",
        Grade.DISCREPANCY,
        "A stated total is not the sum of its stated parts.",
        "A transfer was left out of the sum, counted twice, or changed after it was formed.",
    ),
    Rule(
        "cycle-not-closed",
        cycle_not_closed,
        Scope.RECORD,
        "energy",
        Grade.DISCREPANCY,
        "An efficiency or a coefficient of performance is stated for processes that are no cycle.",
        "Part of the work came out of the stored energy of the system, which a cycle cannot use again.",
    ),
    Rule(
        "efficiency-impossible",
        efficiency_impossible,
        Scope.RECORD,
        "energy",
        Grade.DISCREPANCY,
        "A thermal efficiency is below 0 or above 1.",
        "No more work than heat comes out of a cycle, and one that takes in work has no thermal efficiency.",
        FIRST_LAW,
    ),
)

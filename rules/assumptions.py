"""Assumptions: what is declared must be true of the numbers in the record."""

from __future__ import annotations

from collections.abc import Callable, Iterator
from typing import Final

from checker.case import Case, Raised, Unchecked, Yielded
from checker.facts import adequacy, assumptions, balance, boundaries, lumped, pace
from checker.facts.deviation import Deviation
from checker.facts.lumped import Wall
from checker.facts.redone import in_words
from checker.facts.twins import REAL, is_incompressible
from checker.findings import Grade
from checker.submission import Process
from checker.vocabulary import Allowance
from rules.rule import Rule, RuleFunction, Scope

LUMPED: Final = "lumped-capacitance criterion Bi ≤ 0.1; VDI Heat Atlas, part E (from memory)"
THEME: Final = "model adequacy"
OWN: Final = "equation of state of the body's own model"


def declared(*texts: str) -> Callable[[Case, str], bool]:
    """Return whether an assumption is one of these."""

    def is_declared(case: Case, item: str) -> bool:
        found = assumptions.known(case, item)
        return found is not None and found.text in texts

    return is_declared


def _raised(case: Case, item: str, message: str, suggestion: str, grade: Grade | None = None) -> Raised:
    return Raised(
        message,
        quantity=f"assumptions/{item}",
        place=assumptions.assumption(case, item).place,
        grade=grade,
        suggestion=suggestion,
    )


def _per_process(
    fact: Callable[[Case, str], Deviation | None],
    words: Callable[[Case, Process, float], str],
    suggestion: str,
) -> RuleFunction:
    """Return the rule for an assumption that holds for every process, or for none where a fact is missing."""

    def assumption_fails(case: Case, item: str) -> Yielded:
        for process in case.record.processes:
            found = fact(case, process.id)
            if found is None:
                yield Unchecked(f"assumption {item}, {process.id}", "the quantity has no independent value")
            elif found.beyond:
                yield _raised(case, item, words(case, process, found.size), suggestion, found.grade)

    return assumption_fails


def _motion(name: str, quantity: str) -> RuleFunction:
    """Return the rule for kinetic or potential energy that is declared negligible."""
    words = quantity.replace("_", " ").removesuffix(" change")

    def not_negligible(case: Case, item: str) -> Yielded:
        if not assumptions.motion_stated(case, name):
            yield Unchecked(f"assumption {item}", f"no {name} is stated, so the {words} cannot be compared")
            return
        for process in case.record.processes:
            pointer = f"processes/{process.id}/{quantity}"
            value, allowed = case.value(pointer), balance.energy_allowance(case, process.id)
            if value is not None and abs(value) > allowed:
                yield _raised(
                    case,
                    item,
                    f"The {words} changes by {case.show(pointer, value)} in {process.id}, and up to "
                    f"{case.show_difference(pointer, allowed)} would be negligible in its balance.",
                    f"Take the {words} into the balance.",
                )

    return not_negligible


def wall_matters(case: Case, item: str) -> Yielded:
    """Yield a neglected wall that takes up more heat than the allowance of the balance."""
    found = lumped.wall(case, item)
    if found is None:
        yield Unchecked(f"assumption {item}", f"not given: {assumptions.missing_inputs(case, item)}")
    elif found.heat > found.allowed:
        pointer = f"processes/{found.process}/energy_change"
        yield _raised(
            case,
            item,
            f"The wall takes up {case.show_difference(pointer, found.heat)}, and up to "
            f"{case.show_difference(pointer, found.allowed)} would be negligible in the balance of {found.process}."
            + _with_wall(case, found),
            "Make the wall a body of the system, or its heat a heat transfer.",
        )


def _with_wall(case: Case, found: Wall) -> str:
    if not found.pointer:
        return ""
    values = [case.show(found.pointer, value) for value in (found.with_wall, found.without)]
    return f" With the wall the {in_words(found.pointer)} is {values[0]} instead of {values[1]}."


def not_uniform(case: Case, item: str) -> Yielded:
    """Yield a body that one temperature does not describe."""
    number = assumptions.biot_number(case, item)
    if number is None and pace.spreading(case, item) is not None:
        return  # its time scale tells it
    if number is None:
        yield Unchecked(f"assumption {item}", f"not given: {assumptions.missing_inputs(case, item)}")
    elif number > assumptions.LARGEST_BIOT * (1.0 + 1e-9):
        yield _raised(
            case,
            item,
            f"The Biot number is {number:.3g}, and one temperature describes a body up to "
            f"{assumptions.LARGEST_BIOT:g}.",
            "Divide the body, or state a mean temperature and how it was found.",
        )


def _generation(case: Case, process: str) -> Deviation | None:
    found = balance.generation(case, process, "entropy_generation")
    if found is None:
        return None
    return Deviation(found.size, found.tolerance + balance.entropy_allowance(case, process), found.digits)


def reversible_fails(case: Case, item: str) -> Yielded:
    """Yield processes declared reversible that generate entropy; destroyed entropy is another rule's."""
    for process in case.record.processes:
        found = _generation(case, process.id)
        if found is None:
            yield Unchecked(
                f"assumption {item}, {process.id}", "its entropy generation has no independent value"
            )
        elif found.size > found.tolerance:
            pointer = f"processes/{process.id}/entropy_generation"
            yield _raised(
                case,
                item,
                f"Process {process.id} is declared reversible, and its entropy generation is "
                f"{case.show(pointer, found.size)}.",
                "Declare what drives the process, or correct the boundary temperature.",
                found.grade,
            )


def _heat(case: Case, process: str) -> Deviation | None:
    pointer = f"processes/{process}/heat"
    value = case.value(pointer)
    if value is None:
        return None
    tolerance = balance.energy_allowance(case, process) + case.uncertainty(pointer)
    return Deviation(value, tolerance, case.digit_move(pointer))


def _heat_words(case: Case, process: Process, size: float) -> str:
    pointer = f"processes/{process.id}/heat"
    heat = case.show(pointer, size)
    return f"Process {process.id} is declared adiabatic, and {heat} of heat follows from its inputs."


def losses_matter(case: Case, item: str) -> Yielded:
    """Yield heat lost to the surroundings that is declared to be none."""
    for process in case.record.processes:
        allowed = balance.energy_allowance(case, process.id)
        for c in boundaries.losses(case, process):
            if abs(c.heat) > allowed:
                pointer = f"processes/{process.id}/heat_transfers/{c.item}/energy"
                yield _raised(
                    case,
                    item,
                    f"Heat transfer {c.item} of {process.id} carries {case.show(pointer, -c.heat)} to the "
                    f"surroundings.",
                    "Drop the assumption, or name where this heat goes.",
                )


def not_quasi_static(case: Case, item: str) -> Yielded:
    """Yield processes declared quasi-static whose path is not."""
    for process in case.record.processes:
        sudden = assumptions.sudden_path(case, process.id)
        if sudden is not None:
            yield _raised(
                case,
                item,
                f"Process {process.id} is declared quasi-static, and its path is: {sudden}.",
                "A boundary that meets another pressure than that of the system moves suddenly: drop one of the two.",
            )
        elif not assumptions.says_path(case, process.id):
            yield Unchecked(f"assumption {item}, {process.id}", "no path tells what happens between its ends")


def density_changes(case: Case, item: str) -> Yielded:
    """Yield bodies declared incompressible whose density changes from state to state."""
    for body in case.record.bodies:
        values = assumptions.densities(case, body)
        allowed = case.basis.allowances[Allowance.VALUE]
        if is_incompressible(case, body) or len(values) < 2:
            continue
        if max(values) - min(values) > allowed * max(values):
            yield _raised(
                case,
                item,
                f"The density of {body} goes from {min(values):.5g} kg/m³ to {max(values):.5g} kg/m³.",
                "Drop the assumption; the work of the boundary and the mass depend on it.",
            )


def not_ideal(case: Case, item: str) -> Yielded:
    """Yield real fluids declared ideal gases in states in which they are not."""
    for state, body in case.record.body_states:
        own = case.plan.substances.get(body)
        factor = adequacy.own_compressibility(case, state, body) if own and own.model == REAL else None
        if factor is not None and abs(factor - 1.0) > case.basis.allowances[Allowance.VALUE]:
            yield _raised(
                case,
                item,
                f"In state {state} {body} has a compressibility factor of {factor:.4f}.",
                "Drop the assumption; the model of the body is a real fluid in any case.",
            )


def not_checked(case: Case, item: str) -> Iterator[Unchecked]:
    """Yield assumptions that the vocabulary does not know: listed, and not checked."""
    found = assumptions.assumption(case, item)
    if assumptions.known(case, item) is None:
        yield Unchecked(
            f"assumption {item}", f"{found.text!r} is not one of the assumptions that can be checked"
        )


RULES: Final[tuple[Rule, ...]] = (
    Rule(
        "kinetic-energy-not-negligible",
        _motion("velocity", "kinetic_energy_change"),
        Scope.ASSUMPTION,
        THEME,
        Grade.DISCREPANCY,
        "Kinetic energy is declared negligible, and it is not.",
        "The energy balance lacks a term of a size that the reviewer does not tolerate.",
        when=declared("kinetic energy negligible"),
    ),
    Rule(
        "potential-energy-not-negligible",
        _motion("elevation", "potential_energy_change"),
        Scope.ASSUMPTION,
        THEME,
        Grade.DISCREPANCY,
        "Potential energy is declared negligible, and it is not.",
        "The energy balance lacks a term of a size that the reviewer does not tolerate.",
        when=declared("potential energy negligible"),
    ),
    Rule(
        "wall-not-negligible",
        wall_matters,
        Scope.ASSUMPTION,
        THEME,
        Grade.DISCREPANCY,
        "The heat capacity of a wall is declared negligible, and it is not.",
        "The wall warms with its content; a heater sized without it is too small.",
        when=declared("wall heat capacity negligible"),
    ),
    Rule(
        "temperature-not-uniform",
        not_uniform,
        Scope.ASSUMPTION,
        THEME,
        Grade.DISCREPANCY,
        "One temperature is taken for a body whose Biot number is too large.",
        "Its core lags behind its surface, so energy and entropy of one temperature are those of no moment.",
        LUMPED,
        when=declared("uniform temperature"),
    ),
    Rule(
        "reversible-with-generation",
        reversible_fails,
        Scope.ASSUMPTION,
        THEME,
        Grade.DISCREPANCY,
        "A process is declared reversible, and entropy is generated.",
        "A reversible process is the limit that no real one reaches; work formed with it is too good.",
        "second law; |S_gen| ≤ U + allowance (design of the review)",
        when=declared("reversible"),
    ),
    Rule(
        "heat-in-adiabatic-process",
        _per_process(_heat, _heat_words, "Drop the assumption, or correct the work or the end state."),
        Scope.ASSUMPTION,
        THEME,
        Grade.DISCREPANCY,
        "A process is declared adiabatic, and its balance needs heat.",
        "Either heat crosses the boundary or another input is wrong.",
        "first law for a closed system: Q = ΔE + W",
        when=declared("adiabatic"),
    ),
    Rule(
        "heat-loss-not-negligible",
        losses_matter,
        Scope.ASSUMPTION,
        THEME,
        Grade.DISCREPANCY,
        "Heat loss to the surroundings is declared to be none, and a heat transfer goes there.",
        "The record contradicts itself.",
        when=declared("no heat loss to the surroundings"),
    ),
    Rule(
        "not-quasi-static",
        not_quasi_static,
        Scope.ASSUMPTION,
        THEME,
        Grade.DISCREPANCY,
        "A process is declared quasi-static, and its path is a sudden one.",
        "The work of a quasi-static path is ∫p dV of the system; that of a sudden one is not.",
        when=declared("quasi-equilibrium"),
    ),
    Rule(
        "density-not-constant",
        density_changes,
        Scope.ASSUMPTION,
        THEME,
        Grade.DISCREPANCY,
        "A body is declared incompressible, and its density changes.",
        "Volume work and mass are calculated with a density that does not hold in all states.",
        OWN,
        when=declared("incompressible"),
    ),
    Rule(
        "not-an-ideal-gas",
        not_ideal,
        Scope.ASSUMPTION,
        THEME,
        Grade.DISCREPANCY,
        "A real fluid is declared an ideal gas in a state in which it is none.",
        "Whoever uses the assumption in the next calculation would be wrong by as much.",
        OWN,
        when=declared("ideal gas"),
    ),
    Rule(
        "assumption-not-checked",
        not_checked,
        Scope.ASSUMPTION,
        THEME,
        Grade.REMARK,
        "An assumption is not one that the review can check; it is listed as not checked.",
        "A declared assumption that nobody checked must not look checked.",
    ),
)

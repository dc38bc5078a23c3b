"""Several bodies: what they are said to have in common, and the heat that passes between them."""

from __future__ import annotations

from typing import Final

from checker.case import Case, Raised, Unchecked, Yielded
from checker.facts import bodies
from checker.findings import Grade
from rules.below_zero import stated_below_zero
from rules.rule import Rule, Scope


def equilibrium_contradicted(case: Case, process: str) -> Yielded:
    """Yield bodies that are declared in equilibrium in a state and differ in it."""
    for apart in bodies.out_of_equilibrium(case, process):
        shown = [case.show(apart.pointer(i), apart.values[i]) for i in (0, 1)]
        statement = next((s for i in (1, 0) for s in case.stated(apart.pointer(i))), None)
        yield Raised(
            f"In state {apart.state} the bodies are said to have one {apart.name}; {apart.bodies[0]} has {shown[0]} "
            f"and {apart.bodies[1]} {shown[1]}.",
            quantity=statement.pointer if statement else apart.pointer(1),
            statement=statement,
            place=None if statement else _place(case, process),
            grade=apart.deviation.grade,
            suggestion=f"Let the balance find the common {apart.name}, or leave the equilibrium out.",
        )


def shared_volume_contradicted(case: Case, process: str) -> Yielded:
    """Yield the state in which the bodies of a fixed total volume fill more or less than it."""
    pointer, found = bodies.volume_pointer(process), bodies.misfit(case, process)
    if found is not None:
        filled, volume = (case.show(pointer, value) for value in (found.filled, found.volume))
        statement = next(iter(case.stated(pointer)), None)
        yield Raised(
            f"In state {found.state} the bodies fill {filled} of a total volume of {volume}.",
            quantity=pointer,
            statement=statement,
            place=None if statement else _place(case, process),
            grade=found.deviation.grade,
            suggestion="Correct the volume, a mass, or what fixes one of the states.",
        )
    unknown = bodies.unknown_volume(case, process)
    if unknown is not None:
        yield Unchecked(f"shared volume: processes/{process}", f"the volume of {unknown} is not known")


def heat_between_bodies_uphill(case: Case, process: str) -> Yielded:
    """Yield heat between bodies that runs from the colder to the hotter one, or destroys entropy."""
    found = tuple(bodies.uphill_between_bodies(case, process))
    for uphill in found:
        base = f"processes/{process}/heat_transfers/{uphill.item.id}"
        heat = case.show(f"{base}/energy", uphill.heat)
        yield Raised(
            f"Heat of {heat} passes from {uphill.giver} to {uphill.taker}, and {_reason(case, base, uphill)}.",
            quantity=base,
            place=uphill.item.place,
            grade=uphill.generation.grade if uphill.generation else None,
            suggestion="Check `from` and `to`, the sign of the heat, and the temperatures of both bodies.",
        )
    ctx = case.context(process)
    for item in ctx.internal_heats if ctx else ():
        if item not in {uphill.item for uphill in found}:
            yield from stated_below_zero(
                case,
                f"processes/{process}/heat_transfers/{item.id}/entropy_generation",
                "entropy is not destroyed",
                "What the colder body takes up is more than what the hotter one gives off: check both.",
            )


def _reason(case: Case, base: str, uphill: bodies.Uphill) -> str:
    if uphill.generation is None:
        return f"{uphill.giver} is the colder of the two at both ends"
    destroyed = case.show(f"{base}/entropy_generation", uphill.generation.size)
    return f"with the temperatures of both, {destroyed} of entropy would be generated"


def _place(case: Case, process: str) -> tuple[str | int, ...]:
    return next(p.place for p in case.record.processes if p.id == process)


RULES: Final[tuple[Rule, ...]] = (
    Rule(
        "equilibrium-contradicted",
        equilibrium_contradicted,
        Scope.PROCESS,
        "state",
        Grade.DISCREPANCY,
        "Bodies are declared in equilibrium, and their temperatures or pressures differ.",
        "One of two statements is wrong, and what was calculated with the other does not hold.",
        "zeroth law of thermodynamics; balance of forces on a free boundary",
    ),
    Rule(
        "shared-volume-contradicted",
        shared_volume_contradicted,
        Scope.PROCESS,
        "state",
        Grade.DISCREPANCY,
        "Bodies that share a fixed volume fill more or less than it.",
        "A mass or a state is wrong: what one body gains of a fixed volume another one loses.",
        "geometry",
        when=lambda case, process: bool((ctx := case.context(process)) and ctx.process.total_volume),
    ),
    Rule(
        "heat-between-bodies-uphill",
        heat_between_bodies_uphill,
        Scope.PROCESS,
        "entropy",
        Grade.DISCREPANCY,
        "Heat passes from the colder of two bodies to the hotter one.",
        "By itself heat goes from hot to cold; the sum over all bodies can hide that it does not.",
        "Clausius statement of the second law",
    ),
)

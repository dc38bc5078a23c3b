"""Entropy: nothing is destroyed, and heat does not run uphill."""

from __future__ import annotations

from collections.abc import Callable
from typing import Final

from checker.case import Case, Raised, Unchecked, Yielded
from checker.facts import balance, bodies, boundaries, cycles, exchange, stated
from checker.facts.deviation import Deviation
from checker.facts.origins import is_destroyed_inside
from checker.facts.spans import Crossing
from checker.findings import Grade
from checker.problems import Place
from checker.submission import Process
from checker.vocabulary import Allowance
from rules.below_zero import stated_below_zero
from rules.rule import Rule, Scope
from rules.state import report_costly_gaps

SECOND_LAW: Final = (
    "second law for a closed system: S_gen = ΔS − ΣQ/T_b ≥ 0; uncertainty by GUM (JCGM 100:2008)"
)
CLAUSIUS: Final = "Clausius statement of the second law"


def generation_negative(case: Case, process: str) -> Yielded:
    """Yield an entropy generation of the system below zero, recomputed or stated."""
    return _below_zero(case, process, "entropy_generation")


def generation_with_surroundings_negative(case: Case, process: str) -> Yielded:
    """Yield an entropy generation with the surroundings below zero that nothing else explains."""
    if not is_destroyed_inside(case, process):
        yield from _below_zero(case, process, "entropy_generation_with_surroundings")


def _below_zero(case: Case, process: str, name: str) -> Yielded:
    pointer = f"processes/{process}/{name}"
    found = balance.generation(case, process, name)
    if found is None and name == "entropy_generation":
        yield Unchecked(f"second law: processes/{process}", case.why_not(pointer))
    if found is not None and found.below:
        if name == "entropy_generation" and bodies.destroyed_between_bodies(case, process, found):
            return  # said where the heat between the bodies is listed
        yield _impossible(case, process, pointer, found)
        return
    yield from stated_below_zero(
        case,
        pointer,
        "entropy is not destroyed",
        "S_gen = ΔS − ΣQ/T_b: check the order of the difference and the sign of the heat.",
    )


def _impossible(case: Case, process: str, pointer: str, found: Deviation) -> Raised:
    statement = next(iter(case.stated(pointer)), None)
    name = pointer.rsplit("/", 1)[-1].replace("_", " ")
    return Raised(
        f"The inputs give {name} of {case.show(pointer, found.size)}, below zero by more than its uncertainty."
        f"{_hint(case, process)}",
        statement=statement,
        quantity=pointer,
        place=None if statement else _process(case, process).place,
        recomputed=found.size,
        grade=found.grade,
        suggestion="Check the boundary temperatures, the sign of the heat and the states.",
    )


def _hint(case: Case, process: str) -> str:
    wrong = boundaries.against_body(case, _process(case, process))
    items = ", ".join(c.item for c in wrong)
    return f" Heat transfer {items} crosses where the body itself is never that cold or hot." if wrong else ""


def _process(case: Case, process: str) -> Process:
    return next(p for p in case.record.processes if p.id == process)


def _item_place(case: Case, process: str, item: str) -> Place:
    return next(i.place for i in _process(case, process).heat_transfers or () if i.id == item)


def _raise_crossing(
    case: Case, process: str, c: Crossing, message: Callable[[str, str, str], str], suggestion: str
) -> Raised:
    """Return a finding about one heat transfer; ``message`` takes heat, boundary and reservoir as text."""
    base = f"processes/{process}/heat_transfers/{c.item}"
    texts = [case.show(f"{base}/energy", c.heat)]
    for name, value in (("boundary_temperature", c.boundary), ("reservoir_temperature", c.reservoir)):
        texts.append("" if value is None else case.show(f"{base}/{name}", value))
    return Raised(
        message(*texts),
        quantity=base,
        place=_item_place(case, process, c.item),
        suggestion=suggestion,
    )


def surroundings_as_hot_source(case: Case, process: str) -> Yielded:
    """Yield heat that is said to come from the surroundings into a hotter boundary."""
    for c in boundaries.uphill(case, _process(case, process)):
        if boundaries.from_surroundings(case, c) and c.heat > 0.0:
            yield _raise_crossing(
                case,
                process,
                c,
                lambda q, tb, tr: (
                    f"{q} enters at {tb}, and the surroundings at {tr} are named as its source."
                ),
                "Name the hot source; the surroundings do not heat what is hotter than they are.",
            )


def heat_runs_uphill(case: Case, process: str) -> Yielded:
    """Yield heat between a boundary and a reservoir that runs from the colder to the hotter of them."""
    for c in boundaries.uphill(case, _process(case, process)):
        if not (boundaries.from_surroundings(case, c) and c.heat > 0.0):
            yield _raise_crossing(
                case,
                process,
                c,
                lambda q, tb, tr: f"Heat of {q} crosses at {tb} with a reservoir at {tr}: it runs uphill.",
                "Check both temperatures and the sign of the heat.",
            )


def finite_reservoir_impossible(case: Case, process: str) -> Yielded:
    """Yield finite reservoirs that warm while they give heat, or end beyond what they heat or cool."""
    for found in exchange.backwards(case, _process(case, process)):
        base = f"processes/{process}/heat_transfers/{found.item.id}"
        heat = case.show(f"{base}/energy", abs(found.heat))
        ends = [case.show(f"{base}/final_reservoir_temperature", t) for t in (found.first, found.last)]
        gives = "gives" if found.heat > 0.0 else "takes"
        if found.limit is None:
            message = f"The reservoir of {found.item.id} {gives} {heat} and goes from {ends[0]} to {ends[1]}."
        else:
            limit = case.show(f"{base}/final_reservoir_temperature", found.limit)
            message = (
                f"The reservoir of {found.item.id} {gives} {heat} and ends at {ends[1]}, with {found.against} at "
                f"{limit}: the last of this heat runs uphill."
            )
        yield Raised(
            message,
            quantity=base,
            place=found.item.place,
            suggestion="Check its heat capacity and both temperatures; of a stream or a stratified store state how the "
            "boundary temperature moves.",
        )


def boundary_implausible(case: Case, process: str) -> Yielded:
    """Yield heat that crosses where the body is never that cold (entering) or that hot (leaving)."""
    generated = balance.generation(case, process, "entropy_generation")
    if generated is not None and generated.below:
        return
    for c in boundaries.against_body(case, _process(case, process)):
        word = "enters" if c.heat > 0.0 else "leaves"
        than = "colder" if c.heat > 0.0 else "hotter"
        yield _raise_crossing(
            case,
            process,
            c,
            lambda q, tb, _, word=word, than=than: f"{q} {word} at {tb}, {than} than the body ever is.",  # type: ignore[misc]  # defaults
            "The boundary temperature is where this heat crosses, on the side of the system.",
        )


def not_closed(case: Case, process: str) -> Yielded:
    """Yield stated ΔS, transfer and generation that do not add up, unless a deviation explains it."""
    base = f"processes/{process}"
    change = stated.one(case, f"{base}/entropy_change")
    moved = stated.one_or_nothing(case, f"{base}/entropy_transfer")
    made = stated.one(case, f"{base}/entropy_generation")
    if change is None or moved is None or made is None:
        return
    left = change.value - moved.value - made.value
    allowed = case.basis.allowances[Allowance.ENTROPY] * stated.largest(change, moved, made)
    if abs(left) <= allowed + change.half_width + moved.half_width + made.half_width:
        return
    if not stated.any_wrong(case, change, moved, made):
        pointer = f"{base}/entropy_generation"
        shown = [
            case.show_difference(pointer, value) for value in (change.value, moved.value, made.value, left)
        ]
        yield Raised(
            f"Stated ΔS = {shown[0]}, ΣQ/T_b = {shown[1]} and S_gen = {shown[2]} leave {shown[3]}.",
            statement=made.parts[0],
            suggestion="S_gen = ΔS − ΣQ/T_b: find the term that is wrong; all of them are the originator's own.",
        )


def above_carnot(case: Case) -> Yielded:
    """Yield an efficiency or a coefficient of performance that the second law excludes."""
    limits = (
        ("thermal_efficiency", cycles.highest_efficiency(case)),
        ("coefficient_of_performance", cycles.highest_performance(case)),
    )
    for name, limit in limits:
        pointer = f"results/{name}"
        for s in case.stated(pointer):
            slack = s.quantity.half_width
            if limit is not None and s.value > limit + slack and not stated.is_wrong(case, pointer):
                yield Raised(
                    f"{name.replace('_', ' ')} {s.quantity.text} is stated, and between the temperatures at which heat "
                    f"is supplied and rejected no more than {limit:.4g} is possible.",
                    statement=s,
                    suggestion="Check the heats, the work and the temperatures of the places that they meet.",
                )


def rejects_no_heat(case: Case) -> Yielded:
    """Yield a cycle that turns all its heat into work, where no entropy generation of a process says so."""
    work = cycles.work_without_rejection(case)
    processes = [process.id for process in case.record.processes]
    generated = [balance.generation(case, process, "entropy_generation") for process in processes]
    slack = max((balance.energy_allowance(case, process) for process in processes), default=0.0)
    if work is not None and work > slack and not any(g is not None and g.below for g in generated):
        yield Raised(
            f"{case.show('results/net_work', work)} of net work is done by a cycle that rejects no heat.",
            statement=next(iter(case.stated("results/net_work")), None),
            quantity="results/net_work",
            place=None if case.stated("results/net_work") else case.record.place,
            suggestion="Find the process that gives heat off; it was left out, or taken as adiabatic.",
        )


RULES: Final[tuple[Rule, ...]] = (
    Rule(
        "generation-negative",
        generation_negative,
        Scope.PROCESS,
        "entropy",
        Grade.DISCREPANCY,
        "Entropy is destroyed in the system.",
        "The process is impossible as described: a boundary temperature, a sign or a state is wrong.",
        SECOND_LAW,
    ),
    Rule(
        "generation-with-surroundings-negative",
        generation_with_surroundings_negative,
        Scope.PROCESS,
        "entropy",
        Grade.DISCREPANCY,
        "Entropy of system and reservoirs together is destroyed.",
        "The process is impossible with these reservoirs.",
        SECOND_LAW,
    ),
    Rule(
        "surroundings-as-hot-source",
        surroundings_as_hot_source,
        Scope.PROCESS,
        "entropy",
        Grade.DISCREPANCY,
        "The surroundings are named as the source of heat that crosses at a hotter boundary.",
        "Entropy generation and exergy destruction come out too large, and the true source is not shown.",
        CLAUSIUS,
    ),
    Rule(
        "heat-runs-uphill",
        heat_runs_uphill,
        Scope.PROCESS,
        "entropy",
        Grade.DISCREPANCY,
        "Heat runs from a colder reservoir into a hotter boundary, or the reverse.",
        "By itself heat goes from hot to cold; a sum over other terms can hide that it does not.",
        CLAUSIUS,
    ),
    Rule(
        "finite-reservoir-impossible",
        finite_reservoir_impossible,
        Scope.PROCESS,
        "entropy",
        Grade.DISCREPANCY,
        "A finite reservoir ends colder than what it heats, hotter than what it cools, or changes the wrong way.",
        "So much heat does not leave it by itself; a sum over the whole process can hide that its end is impossible.",
        CLAUSIUS,
    ),
    Rule(
        "boundary-temperature-implausible",
        boundary_implausible,
        Scope.PROCESS,
        "entropy",
        Grade.QUERY,
        "Heat enters where it is colder, or leaves where it is hotter, than the body ever is.",
        "It is the temperature of another place, such as that of the surroundings or of the medium beyond a wall.",
        CLAUSIUS,
    ),
    Rule(
        "boundary-temperature-missing",
        report_costly_gaps("boundary-temperature-missing", "State `boundary_temperature`, or `system`."),
        Scope.RECORD,
        "entropy",
        Grade.QUERY,
        "An entropy generation is claimed, and a heat transfer has no boundary temperature.",
        "The entropy that goes with heat depends on where it crosses.",
        SECOND_LAW,
    ),
    Rule(
        "heat-transfers-not-stated",
        report_costly_gaps(
            "heat-transfers-not-stated",
            "List the heat transfers with their boundary temperatures; [] means none.",
        ),
        Scope.RECORD,
        "entropy",
        Grade.QUERY,
        "An entropy generation is claimed, and the heat transfers are not listed.",
        "A balance can give the heat without a list; the entropy that goes with it needs one.",
        SECOND_LAW,
    ),
    Rule(
        "reservoir-not-stated",
        report_costly_gaps("reservoir-not-stated", "State `reservoir_temperature` of this heat transfer."),
        Scope.RECORD,
        "entropy",
        Grade.QUERY,
        "Entropy generation with the surroundings is claimed, and where heat comes from is not stated.",
        "Heat that enters above T₀ comes from somewhere hotter, whose entropy falls less than that of the "
        "surroundings would.",
        SECOND_LAW,
    ),
    Rule(
        "entropy-not-closed",
        not_closed,
        Scope.PROCESS,
        "entropy",
        Grade.DISCREPANCY,
        "Stated entropy change, transfer and generation do not add up.",
        "Whatever the properties are, these three must agree.",
        SECOND_LAW,
    ),
    Rule(
        "efficiency-above-carnot",
        above_carnot,
        Scope.RECORD,
        "entropy",
        Grade.DISCREPANCY,
        "An efficiency or a coefficient of performance is higher than that of a reversible cycle.",
        "No cycle between these temperatures does it.",
        "Carnot's theorem",
    ),
    Rule(
        "cycle-rejects-no-heat",
        rejects_no_heat,
        Scope.RECORD,
        "entropy",
        Grade.DISCREPANCY,
        "A cycle does net work and rejects no heat.",
        "It would turn heat into work without a place for the entropy that came with it.",
        "Kelvin-Planck statement of the second law",
    ),
)

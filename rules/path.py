"""Paths: a declared path held against the end states, the heat and the work of its process."""

from __future__ import annotations

from collections.abc import Callable
from typing import Final

from checker.case import Case, Raised, Yielded
from checker.facts import exchange, paths
from checker.facts.deviation import Deviation
from checker.findings import Grade
from checker.submission import Role
from rules.rule import Rule, RuleFunction, Scope

Change = Callable[[Case, str, str], Deviation | None]


def on(*kinds: str) -> Callable[[Case, str], bool]:
    """Return whether a process has a body on a path of one of these kinds."""
    return lambda case, process: paths.any_follows(case, process, *kinds)


def held_property(kind: str, name: str) -> RuleFunction:
    """Return the rule for a path of which one property is the same at both ends."""

    def property_moved(case: Case, process: str) -> Yielded:
        ctx = case.context(process)
        assert ctx is not None
        for body in paths.followers(case, process, kind):
            deviation = paths.change_of(case, process, body, name)
            if deviation is None or not deviation.beyond:
                continue
            states = (ctx.process.from_state, ctx.process.to_state)
            ends = [
                case.show(p, case.value(p) or 0.0) for s in states for p in (f"states/{s}/{body}/{name}",)
            ]
            yield Raised(
                f"The path of {body} is declared as {kind}, and its {name.replace('_', ' ')} goes from {ends[0]} "
                f"({states[0]}) to {ends[1]} ({states[1]}).",
                quantity=f"states/{states[1]}/{body}/{name}",
                place=_place(case, process, body, kind),
                grade=deviation.grade,
                suggestion="Correct the path, or the property of one of the two states.",
            )

    return property_moved


def _place(case: Case, process: str, body: str, kind: str) -> tuple[str | int, ...]:
    found = next(p for p in case.record.processes if p.id == process)
    return next(spec.place for spec in found.paths[body] if spec.kind == kind)


def isentropic_contradicted(case: Case, process: str) -> Yielded:
    """Yield an isentropic path whose end states differ in entropy, or along which something rubs."""
    for body in paths.followers(case, process, "isentropic"):
        deviation = paths.entropy_change(case, process, body)
        if deviation is not None and deviation.beyond:
            pointer = f"processes/{process}/entropy_change"
            yield Raised(
                f"The path of {body} is declared as isentropic, and its entropy changes by "
                f"{case.show(pointer, deviation.size)}.",
                quantity=pointer,
                place=_place(case, process, body, "isentropic"),
                grade=deviation.grade,
                suggestion="Let the isentropic path find the end state, or declare what the process really is.",
            )
        elif exchange.rubs_reversibly(case, process):
            pointer = f"processes/{process}/friction_work"
            yield Raised(
                f"The path of {body} is declared as isentropic, reversible and adiabatic, and friction work of "
                f"{case.show(pointer, case.value(pointer) or 0.0)} is stated.",
                quantity=pointer,
                place=_place(case, process, body, "isentropic"),
                suggestion="Declare it as adiabatic, or as polytropic with its exponent, or leave out the friction.",
            )


_SUPERFLUOUS: Final = "One of the two is superfluous: let the path find the state, or the states the path."
_SPLIT: Final = "Correct the line, or make the way up to where the line begins a process of its own."


def _begins(case: Case, process: str, state: str) -> bool:
    return any(p.id == process and p.from_state == state for p in case.record.processes)


def pressure_missed(
    kind: str, fact: Callable[[Case, str, str], paths.Missed | None], words: str
) -> RuleFunction:
    """Return the rule for a path on whose curve the states must lie."""

    def end_off_the_path(case: Case, process: str) -> Yielded:
        for body in paths.followers(case, process, kind):
            found = fact(case, process, body)
            if found is None or not found.deviation.beyond:
                continue
            pointer = f"states/{found.state}/{body}/pressure"
            yield Raised(
                f"{words} gives {case.show(pointer, found.on_path)} at the volume of state {found.state}, and the "
                f"state has {case.show(pointer, found.on_path + found.deviation.size)}.",
                quantity=pointer,
                place=_place(case, process, body, kind),
                grade=found.deviation.grade,
                suggestion=_SPLIT if _begins(case, process, found.state) else _SUPERFLUOUS,
            )

    return end_off_the_path


def adiabatic_with_heat(case: Case, process: str) -> Yielded:
    """Yield heat among the inputs of a process, or of one of its bodies, that has none by its own path."""
    yield from _heat_of_adiabatic_body(case, process)
    ctx = case.context(process)
    if ctx is None or not ctx.no_heat:
        return
    for pointer in paths.heat_inputs(case, process):
        if case.given(pointer):
            yield Raised(
                f"The process is {ctx.no_heat}, and {case.show(pointer, case.given(pointer) or 0.0)} of heat is an "
                f"input of it.",
                statement=next(iter(case.stated(pointer, Role.INPUT)), None),
                suggestion="Remove the heat, or declare the path that the body really follows.",
            )
    for item in ctx.process.heat_transfers or ():
        pointer = f"{ctx.item_base('heat', item.id)}/heat_loss_coefficient"
        for s in case.stated(pointer, Role.INPUT):
            yield Raised(
                f"The process is {ctx.no_heat}, and heat transfer {item.id} has a loss coefficient of "
                f"{s.quantity.text}.",
                statement=s,
                suggestion="Remove the loss coefficient, or declare the path that the body really follows.",
            )


def _heat_of_adiabatic_body(case: Case, process: str) -> Yielded:
    for pointer, body, kind in paths.heats_against_paths(case, process):
        yield Raised(
            f"The path of {body} is {kind}, and {case.show(pointer, case.given(pointer) or 0.0)} of heat that meets it "
            f"is an input.",
            statement=next(iter(case.stated(pointer, Role.INPUT)), None),
            suggestion="Name the body that the heat meets, or declare the path that this one really follows.",
        )


def free_expansion_with_work(case: Case, process: str) -> Yielded:
    """Yield boundary work among the inputs of a free expansion."""
    pointer = f"processes/{process}/boundary_work"
    for s in case.stated(pointer, Role.INPUT):
        if s.value != 0.0:
            yield Raised(
                f"Nothing resists a free expansion, and {s.quantity.text} of boundary work is an input of it.",
                statement=s,
                suggestion="Remove the work, or declare the pressure that the boundary works against.",
            )


def expansion_shrinks(case: Case, process: str) -> Yielded:
    """Yield a free expansion into a smaller volume."""
    for body in paths.followers(case, process, "free expansion"):
        change = paths.volume_change(case, process, body)
        if change is not None and change.below:
            yield Raised(
                f"The free expansion of {body} ends in a smaller volume.",
                quantity=f"processes/{process}",
                place=_place(case, process, body, "free expansion"),
                grade=change.grade,
                suggestion="Check the direction of the process.",
            )


def moves_against_pressure(case: Case, process: str) -> Yielded:
    """Yield a boundary that moves towards the higher pressure."""
    kind = "against constant external pressure"
    for body in paths.followers(case, process, kind):
        outside = paths.external_pressure(case, process, body)
        change, ends = paths.volume_change(case, process, body), paths.end_pressures(case, process, body)
        if outside is None or change is None or ends is None or not change.beyond:
            continue
        grows, slack = change.size > 0.0, 1.0 + 1e-6
        if (grows and outside > max(ends) * slack) or (not grows and outside * slack < min(ends)):
            verb, than = ("expands", "above") if grows else ("is compressed", "below")
            pointer = f"processes/{process}/path/external_pressure"
            yield Raised(
                f"The body {body} {verb} against {case.show(pointer, outside)}, which is {than} its own pressure "
                f"throughout.",
                quantity=pointer,
                place=_place(case, process, body, kind),
                suggestion="Check the external pressure, gauge or absolute, and the direction of the process.",
            )


_ENDS: Final = (
    "Work, heat and entropy were calculated for a process that these two states cannot be the ends of."
)

RULES: Final[tuple[Rule, ...]] = (
    Rule(
        "constant-volume-contradicted",
        held_property("constant volume", "specific_volume"),
        Scope.PROCESS,
        "path",
        Grade.DISCREPANCY,
        "A path is declared as constant volume, and the specific volume changes.",
        _ENDS,
        "mass of a closed system is constant, so v changes with V",
        when=on("constant volume"),
    ),
    Rule(
        "constant-pressure-contradicted",
        held_property("constant pressure", "pressure"),
        Scope.PROCESS,
        "path",
        Grade.DISCREPANCY,
        "A path is declared as constant pressure, and the pressure changes.",
        _ENDS,
        when=on("constant pressure"),
    ),
    Rule(
        "isothermal-contradicted",
        held_property("isothermal", "temperature"),
        Scope.PROCESS,
        "path",
        Grade.DISCREPANCY,
        "A path is declared as isothermal, and the temperature changes.",
        _ENDS,
        when=on("isothermal"),
    ),
    Rule(
        "isentropic-contradicted",
        isentropic_contradicted,
        Scope.PROCESS,
        "path",
        Grade.DISCREPANCY,
        "A path is declared as isentropic, and the entropy changes.",
        _ENDS,
        "second law: reversible and adiabatic means ΔS = 0",
        when=on("isentropic"),
    ),
    Rule(
        "exponent-contradicted",
        pressure_missed(
            "polytropic", paths.polytropic_pressure, "The polytropic path with its stated exponent"
        ),
        Scope.PROCESS,
        "path",
        Grade.DISCREPANCY,
        "The end states do not lie on the polytropic path with the stated exponent.",
        "The work formula of the path uses both ends and the exponent; with a third that does not fit it is wrong.",
        "p·vⁿ = constant",
        when=on("polytropic"),
    ),
    Rule(
        "line-missed",
        pressure_missed("pressure linear in volume", paths.line_pressure, "The stated line"),
        Scope.PROCESS,
        "path",
        Grade.DISCREPANCY,
        "The end state does not lie on the stated line of pressure over volume.",
        "The work is the area under the line between the states; beside the line there is no such area.",
        when=on("pressure linear in volume"),
    ),
    Rule(
        "adiabatic-with-heat",
        adiabatic_with_heat,
        Scope.PROCESS,
        "path",
        Grade.DISCREPANCY,
        "Heat is an input of a process that is declared adiabatic, isentropic or insulated.",
        "One of the two was not meant, and the balance closes differently with each.",
    ),
    Rule(
        "free-expansion-with-work",
        free_expansion_with_work,
        Scope.PROCESS,
        "path",
        Grade.DISCREPANCY,
        "Boundary work is an input of a free expansion.",
        "A free expansion pushes nothing away, so its boundary does no work.",
        when=on("free expansion"),
    ),
    Rule(
        "free-expansion-shrinks",
        expansion_shrinks,
        Scope.PROCESS,
        "path",
        Grade.DISCREPANCY,
        "A free expansion ends in a smaller volume.",
        "A gas does not compress itself.",
        "second law",
        when=on("free expansion"),
    ),
    Rule(
        "moves-against-pressure",
        moves_against_pressure,
        Scope.PROCESS,
        "path",
        Grade.DISCREPANCY,
        "A boundary moves towards the side of the higher pressure.",
        "Without other forces a piston moves the other way; often a gauge pressure was taken as absolute.",
        "second law: dS = (δQ + (p − p_ext) dV)/T",
        when=on("against constant external pressure"),
    ),
)

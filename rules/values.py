"""Stated values that the alternate calculation does not confirm: origins, inherited deviations, cancelling errors."""

from __future__ import annotations

from collections import defaultdict
from typing import Final

from checker.case import Case, Raised, Yielded
from checker.comparison.compare import Compared
from checker.facts.gaps import unexplained
from checker.facts.mass import contradicts_mass
from checker.facts.naming import name_of
from checker.facts.origins import is_impossible, origins, spoiled_by
from checker.facts.paths import any_follows
from checker.facts.use import untraceable
from checker.findings import Grade, Outcome, Standing
from checker.submission import Role
from rules.causes import cause_told, causes_of, spoils_of
from rules.rule import Rule, Scope


def disagrees(case: Case) -> Yielded:
    """Yield one finding per origin, with everything that it spoiled."""
    causes = causes_of(case)
    for pointer, firm in causes.firm.items():
        first = firm[0]
        if is_impossible(case, first) or pointer in causes.elsewhere:
            continue
        spoiled = spoils_of(case, causes, first)
        yield Raised(
            " ".join((_message(case, first), *cause_told(case, causes, pointer))),
            compared=first,
            theme=first.statement.term.theme,
            origin=None if first.standing is Standing.ORIGIN_UNKNOWN else True,
            spoils=spoiled,
            causes=causes.of(pointer).causes,
            suggestion=_suggestion(first, spoiled),
        )


def digits_explain(case: Case) -> Yielded:
    """Yield origins that open digits alone would explain."""
    for group in origins(case):
        first = group[0]
        if not all(c.explained_by_digits for c in group) or is_impossible(case, first):
            continue
        yield Raised(
            f"{_message(case, first)} The digits that the inputs or the stated number leave open would explain it.",
            compared=first,
            theme=first.statement.term.theme,
            origin=True,
            spoils=spoiled_by(case, group, first),
            suggestion="State the inputs with the digits that were used, or correct the result.",
        )


def surplus_input(case: Case) -> Yielded:
    """Yield inputs that are not needed and contradict the others."""
    for c in case.compared:
        if c.statement.role is not Role.INPUT or _reported_elsewhere(case, c.statement.pointer):
            continue
        if c.outcome is Outcome.NOT_EVALUABLE and c.deviation is not None:
            yield Raised(
                f"{c.statement.quantity.text} is more than is needed to find this quantity, and the other inputs "
                f"give {_recomputed(case, c)}; {c.reason}.",
                compared=c,
                theme=c.statement.term.theme,
                grade=Grade.QUERY,
                suggestion="State the inputs with the digits that were used, or drop what is not needed.",
            )
        elif c.outcome is Outcome.WRONG:
            yield Raised(
                f"{c.statement.quantity.text} is more than is needed to find this quantity, and the other inputs "
                f"give {_recomputed(case, c)}.",
                compared=c,
                theme=c.statement.term.theme,
                grade=Grade.QUERY if c.explained_by_digits else None,
                suggestion="Keep the inputs that define the case and correct or drop the other.",
            )


def _reported_elsewhere(case: Case, pointer: str) -> bool:
    """Say whether a surplus volume, or work of a free expansion, is what another rule reports in its own words."""
    process = pointer.split("/")[1]
    free = pointer.endswith("/boundary_work") and any_follows(case, process, "free expansion")
    return free or contradicts_mass(case, pointer)


def rounded_early(case: Case) -> Yielded:
    """Yield results that follow from the originator's rounded numbers but not from the inputs."""
    for c in case.compared:
        if c.standing is Standing.EARLY_ROUNDING and not is_impossible(case, c):
            yield Raised(
                f"{_message(case, c)} It follows from the rounded numbers stated before it.",
                compared=c,
                theme=c.statement.term.theme,
                origin=True,
                suggestion="Carry unrounded numbers through the calculation and round at the end.",
            )


def errors_cancel(case: Case) -> Yielded:
    """Yield results that are right although the numbers they are made from are wrong."""
    for c in case.compared:
        if c.standing is Standing.ERRORS_CANCEL:
            yield Raised(
                f"{c.statement.quantity.text} agrees with the alternate calculation, but not with the stated "
                f"numbers that it would be made from.",
                compared=c,
                theme=c.statement.term.theme,
                inherits_from=c.inherits_from,
                suggestion="Say where this number comes from: errors cancel, or it was taken from another source.",
            )


def not_recomputed(case: Case) -> Yielded:
    """Yield results without an independent value, one finding per reason that no other rule reports."""
    by_reason: dict[str, list[Compared]] = defaultdict(list)
    for c in unexplained(case):
        if not untraceable(case, c.statement.pointer):
            by_reason[c.reason].append(c)
    for reason, group in by_reason.items():
        also = tuple(c.statement.pointer for c in group[1:])
        yield Raised(
            f"{group[0].statement.quantity.text} could not be recomputed: {reason}.",
            statement=group[0].statement,
            theme=group[0].statement.term.theme,
            spoils=also,
            suggestion="State what is missing, or show the calculation that leads to it.",
        )


def _recomputed(case: Case, c: Compared) -> str:
    if not isinstance(c.independent, float):
        return c.reason or "no value"
    return case.show(c.statement.pointer, c.independent + c.shift.value)


def _message(case: Case, c: Compared) -> str:
    name = name_of(c.statement)
    if c.deviation is None:
        return f"{name}: {c.statement.quantity.text} is stated, but {c.reason}."
    note = f" ({c.shift.note})" if c.shift.note else ""
    pointer = c.statement.pointer
    deviation, tolerance = case.show_deviation(pointer, c.statement.sign * c.deviation, c.tolerance)
    return (
        f"{name}: {c.statement.quantity.text} is stated, {_recomputed(case, c)} is recomputed; the difference of "
        f"{deviation} is beyond {tolerance}{note}."
    )


def _suggestion(c: Compared, spoiled: tuple[str, ...]) -> str:
    if not spoiled:
        return "Correct this result." if c.deviation is not None else ""
    count = len(spoiled)
    others = "the one that follows" if count == 1 else f"the {count} that follow"
    return f"Correct this result and {others} from it."


RULES: Final[tuple[Rule, ...]] = (
    Rule(
        "value-disagrees",
        disagrees,
        Scope.RECORD,
        "state",
        Grade.DISCREPANCY,
        "A stated result is not what its inputs give.",
        "Whoever uses the number would use a wrong one, and everything made from it is wrong as well.",
        basis="energy and entropy balances of a closed system; tolerance by GUM (JCGM 100:2008)",
    ),
    Rule(
        "digits-explain",
        digits_explain,
        Scope.RECORD,
        "state",
        Grade.QUERY,
        "A stated result is off, but digits that were left open would explain it.",
        "It cannot be told whether the result is wrong or the inputs were written with too few digits.",
    ),
    Rule(
        "surplus-input-disagrees",
        surplus_input,
        Scope.RECORD,
        "state",
        Grade.DISCREPANCY,
        "An input that is not needed contradicts the others.",
        "Two descriptions of one thing cannot both be right, and the result depends on which was used.",
    ),
    Rule(
        "rounded-early",
        rounded_early,
        Scope.RECORD,
        "bookkeeping",
        Grade.QUERY,
        "A result follows from rounded intermediate numbers and misses the right value.",
        "Rounding before a difference is taken can move it by more than the allowance.",
    ),
    Rule(
        "errors-cancel",
        errors_cancel,
        Scope.RECORD,
        "bookkeeping",
        Grade.QUERY,
        "A right result stands on wrong numbers.",
        "It has another source than the calculation shows, or two errors cancel here and not elsewhere.",
    ),
    Rule(
        "result-not-recomputed",
        not_recomputed,
        Scope.RECORD,
        "bookkeeping",
        Grade.QUERY,
        "A stated result could not be recomputed from the inputs.",
        "A result that nobody could check must not look checked.",
    ),
)

"""Bookkeeping: whether a record can be followed, identified and signed."""

from __future__ import annotations

from collections import defaultdict
from itertools import pairwise
from typing import Final

from checker.case import Case, Raised, Yielded
from checker.facts.gaps import unexplained
from checker.facts.naming import name_of
from checker.facts.stated import is_wrong
from checker.facts.use import inputs, untraceable, unused_inputs, without_source
from checker.findings import Grade, Outcome
from checker.submission import PackageHead, Role, Statement, Submission
from checker.vocabulary import Allowance
from rules.rule import Rule, Scope
from rules.state import report_gaps

COARSE: Final = 2.0
"""Stated digits whose half-width is more than this many allowances check nothing (chosen)."""
TABLE_VALUES: Final = (Allowance.PROPERTY_CHANGE,)
"""Allowances of values that are read from tables with the digits of the table; their change is what counts."""
INDEPENDENT: Final = (
    "ISO 9001:2015, 8.3.4 (design verification), read as: by someone else than the originator"
)


def not_identified(submission: Submission) -> Yielded:
    """Yield a package whose header has no number or no revision; without any header reading says so."""
    lacking = [name for name in ("number", "revision") if not getattr(submission.head, name)]
    if lacking and submission.head != PackageHead():
        yield Raised(
            f"The package has no {' and no '.join(lacking)}.",
            quantity="package",
            place=("package",),
            grade=Grade.QUERY if "number" in lacking else Grade.REMARK,
            suggestion="State them in the header, so that a review can be filed with what it reviewed.",
        )


def checks_itself(submission: Submission) -> Yielded:
    """Yield a package whose originator is to check it."""
    head = submission.head
    if head.originator and " ".join(head.originator.casefold().split()) == " ".join(
        head.checker.casefold().split()
    ):
        yield Raised(
            f"Originator and checker are the same: {head.originator}.",
            quantity="package",
            place=("package", "checker"),
            suggestion="Name somebody else as the checker.",
        )


def without_result(case: Case) -> Yielded:
    """Yield records that claim nothing."""
    claims = any(s.role is Role.RESULT for s in case.record.statements)
    words = any(found.claimed_phase for found in case.record.body_states.values())
    if not claims and not words:
        yield Raised(
            "The record claims no result, so there is nothing to check.",
            quantity=f"records/{case.record.id}",
            place=case.record.place,
            suggestion="State the results that the next calculation uses, under `results`.",
        )


def not_traceable(case: Case) -> Yielded:
    """Yield results to which no formula of the review leads."""
    for c in unexplained(case):
        if untraceable(case, c.statement.pointer):
            yield Raised(
                f"{name_of(c.statement)}: {c.statement.quantity.text} is stated as a result, and no "
                f"formula leads to it from the inputs of this record.",
                compared=c,
                suggestion="State it as an input with its source, or show what it follows from.",
            )


def stated_twice(case: Case) -> Yielded:
    """Yield quantities that are stated in two places with different values."""
    by_key: dict[tuple[str, Role], list[Statement]] = defaultdict(list)
    for s in case.record.statements:
        if s.usable:
            by_key[case.key(s.pointer), s.role].append(s)
    for statements in by_key.values():
        first = statements[0]
        for other in statements[1:]:
            apart = abs(other.value - first.value)
            slack = other.quantity.half_width + first.quantity.half_width
            if apart > slack * (1.0 + 1e-9) and not is_wrong(case, first.pointer):
                yield Raised(
                    f"{first.quantity.text} ({first.pointer}) and {other.quantity.text} ({other.pointer}) are stated "
                    f"for one quantity.",
                    statement=other,
                    suggestion="Keep one of the two, or correct the one that is wrong.",
                )


def input_unused(case: Case) -> Yielded:
    """Yield inputs that have no part in any result."""
    for s in unused_inputs(case):
        yield Raised(
            f"{s.term.name.replace('_', ' ')}: {s.quantity.text} is an input, and no result depends on it.",
            statement=s,
            suggestion="Drop it, or correct the model or the name if it was meant to count.",
        )


def source_missing(case: Case) -> Yielded:
    """Yield, once per record, the inputs without a source where others have one."""
    lacking = without_source(case)
    if lacking:
        names = ", ".join(s.pointer for s in lacking[:6]) + (", …" if len(lacking) > 6 else "")
        yield Raised(
            f"The record gives sources for its inputs, and none for {names}.",
            statement=lacking[0],
            suggestion="Add the sources, or say that the value is chosen.",
        )


def too_few_digits(case: Case) -> Yielded:
    """Yield results that agree, written so coarsely that agreement says little."""
    for c in case.compared:
        half_width = c.statement.quantity.half_width
        written_out = c.statement.quantity.value != 0.0 and c.statement.term.allowance not in TABLE_VALUES
        if c.outcome is Outcome.AGREES and written_out and half_width > COARSE * c.allowance * (1.0 + 1e-9):
            digit = case.show_difference(c.statement.pointer, 2.0 * half_width)
            allowed = case.show_difference(c.statement.pointer, c.allowance)
            yield Raised(
                f"{c.statement.quantity.text} is written to the next {digit}, and {allowed} is tolerated: that it "
                f"agrees says little.",
                statement=c.statement,
                suggestion="State one or two more digits.",
            )


def has_inputs(case: Case, _: str) -> bool:
    """Say whether a record starts from anything."""
    return any(True for _ in inputs(case))


def sequence_broken(case: Case) -> Yielded:
    """Yield sequences of which one process does not begin where the one before it ends."""
    processes = {process.id: process for process in case.record.processes}
    for sequence in case.record.sequences:
        known = [processes[name] for name in sequence.processes if name in processes]
        for before, after in pairwise(known):
            if before.to_state != after.from_state:
                yield Raised(
                    f"In the sequence {sequence.id} {before.id} ends in state {before.to_state}, and {after.id} begins "
                    f"in state {after.from_state}.",
                    quantity=f"sequences/{sequence.id}",
                    place=sequence.place,
                    suggestion="List the processes in the order in which they follow one another.",
                )


def link_to_other(case: Case) -> Yielded:
    """Yield states taken over from a body of another substance or model."""
    for (state, body), found in case.record.body_states.items():
        if found.same_as is None:
            continue
        _, record, _, _, name = found.same_as.split("/")
        home = case if record == case.record.id else case.others.get(record)
        other, own = home.record.bodies.get(name) if home else None, case.record.bodies[body]
        if other is not None and (other.substance, other.model) != (own.substance, own.model):
            yield Raised(
                f"State {state} of {body} ({own.substance}, {own.model}) is taken from {name} ({other.substance}, "
                f"{other.model}) of {record}.",
                quantity=f"states/{state}/{body}",
                place=found.place,
                suggestion="Link states of one substance and model only; state T and v where they alone are meant.",
            )


RULES: Final[tuple[Rule, ...]] = (
    Rule(
        "package-not-identified",
        not_identified,
        Scope.PACKAGE,
        "bookkeeping",
        Grade.QUERY,
        "A package has no number (a query) or no revision (a remark).",
        "A review is of one revision of one document; without them nobody can say of which.",
        "ISO 9001:2015, 7.5.2 (identification of documented information)",
    ),
    Rule(
        "checker-is-originator",
        checks_itself,
        Scope.PACKAGE,
        "bookkeeping",
        Grade.QUERY,
        "The originator of a package is named as its checker.",
        "A calculation is checked by somebody who did not make it.",
        INDEPENDENT,
    ),
    Rule(
        "record-without-result",
        without_result,
        Scope.RECORD,
        "bookkeeping",
        Grade.QUERY,
        "A record claims no result.",
        "A record in which nothing can be wrong would be accepted without a check.",
    ),
    Rule(
        "result-not-traceable",
        not_traceable,
        Scope.RECORD,
        "bookkeeping",
        Grade.QUERY,
        "A result follows from nothing in the record.",
        "Nobody can repeat it, now or after the next change.",
    ),
    Rule(
        "stated-twice",
        stated_twice,
        Scope.RECORD,
        "bookkeeping",
        Grade.DISCREPANCY,
        "One quantity is stated in two places with different values.",
        "It depends on the reader which of them goes into the next calculation.",
    ),
    Rule(
        "input-unused",
        input_unused,
        Scope.RECORD,
        "bookkeeping",
        Grade.REMARK,
        "An input has no part in any result.",
        "The originator may think that it counts.",
        when=has_inputs,
    ),
    Rule(
        "source-missing",
        source_missing,
        Scope.RECORD,
        "bookkeeping",
        Grade.REMARK,
        "A record gives sources for some inputs and not for all.",
        "An input without a source cannot be checked against anything.",
        "ISO 9001:2015, 8.3.3 (design inputs)",
        when=has_inputs,
    ),
    Rule(
        "too-few-digits",
        too_few_digits,
        Scope.RECORD,
        "bookkeeping",
        Grade.REMARK,
        "A result is written with so few digits that its agreement says little.",
        "A wrong value would round to the same text.",
        "half-width of the last digit, GUM (JCGM 100:2008), 4.3.7",
    ),
    Rule(
        "sequence-broken",
        sequence_broken,
        Scope.RECORD,
        "bookkeeping",
        Grade.QUERY,
        "A process of a sequence does not begin where the one before it ends.",
        "The totals of a sequence are those of one way from its first state to its last.",
    ),
    Rule(
        "linked-to-other-substance",
        link_to_other,
        Scope.RECORD,
        "bookkeeping",
        Grade.DISCREPANCY,
        "A state is declared the same as that of a body of another substance or model.",
        "Temperature and specific volume of one substance mean another state of another.",
    ),
    Rule(
        "body-missing-in-state",
        report_gaps("body-missing-in-state", "Describe the body in both states, if only as one to be found."),
        Scope.RECORD,
        "bookkeeping",
        Grade.QUERY,
        "A process has no body that is described in both of its states.",
        "Nothing of the process can be recomputed.",
    ),
    Rule(
        "several-bodies-not-closed",
        report_gaps(
            "several-bodies-not-closed",
            "State one of the unknowns, that the bodies are in equilibrium, the volume that they share, a path, or the "
            "heat and work of one body.",
        ),
        Scope.RECORD,
        "bookkeeping",
        Grade.QUERY,
        "What is stated of several bodies holds fewer equations than unknowns.",
        "A system is closed by as many independent equations as it has unknowns; fewer leave its states open.",
    ),
    Rule(
        "sequence-not-recomputed",
        report_gaps(
            "sequence-not-recomputed",
            "State the path of each process, the stop at the end of all but the last, and the total heat or work or "
            "a property of the last state.",
        ),
        Scope.RECORD,
        "bookkeeping",
        Grade.QUERY,
        "A sequence with stops lacks what it needs to be followed from its first state.",
        "Where a path changes depends on when its stop is reached, and how far it goes on the total.",
    ),
)

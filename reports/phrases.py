"""The sentences that terminal and PDF share."""

from __future__ import annotations

from collections.abc import Iterable
from typing import Final

from checker.figures import FlowDiagram
from checker.findings import (
    Cause,
    Checked,
    Finding,
    Grade,
    Location,
    Outcome,
    RecordReview,
    Totals,
    Verdict,
)
from reports import numbers
from reports.numbers import MISSING, rounded, shown, signed

VERDICT_MEANS: Final = {
    Verdict.ACCEPT: "Every stated result was recomputed and agrees.",
    Verdict.ACCEPT_AS_NOTED: "Nothing has to be corrected; what is noted is for information or was answered.",
    Verdict.HOLD: "Answers are needed before this can be accepted.",
    Verdict.REVISE: "At least one stated result or statement is wrong and must be corrected.",
}
PLURALS: Final = {Grade.DISCREPANCY: "discrepancies", Grade.QUERY: "queries", Grade.REMARK: "remarks"}


def counted(number: int, singular: str, plural: str) -> str:
    """Return a count in words, such as ``no queries`` or ``1 query``."""
    return f"no {plural}" if number == 0 else f"{number} {singular if number == 1 else plural}"


def grade_counts(findings: Iterable[Finding]) -> str:
    """Return how many findings there are of each grade, in one phrase."""
    grades = [finding.grade for finding in findings]
    return ", ".join(counted(grades.count(grade), grade.value, PLURALS[grade]) for grade in Grade)


def held(record: RecordReview) -> tuple[Checked, ...]:
    """Return what was checked and agrees."""
    return tuple(checked for checked in record.checked if checked.outcome is Outcome.AGREES)


def not_recomputed(record: RecordReview) -> tuple[Checked, ...]:
    """Return what was stated and could not be recomputed."""
    return tuple(checked for checked in record.checked if checked.outcome is Outcome.NOT_EVALUABLE)


def spoiled(record: RecordReview, findings: Iterable[Finding]) -> tuple[Checked, ...]:
    """Return what is wrong without a finding of its own: it was spoiled by an origin elsewhere."""
    reported = {finding.quantity for finding in findings}
    return tuple(c for c in record.checked if c.outcome is Outcome.WRONG and c.quantity not in reported)


def common_rules(records: Iterable[RecordReview]) -> tuple[str, ...]:
    """Return the rules that found nothing in any readable record, in the order of the first."""
    held_by = [record.rules_held for record in records if record.readable]
    first = held_by[0] if held_by else ()
    return tuple(rule for rule in first if all(rule in others for others in held_by))


def words_of(name: str) -> str:
    """Return a name of the vocabulary in words: ``specific_volume`` as ``specific volume``."""
    return name.replace("_", " ")


def numbers_not_told(finding: Finding) -> str:
    """Return stated and recomputed value in a sentence, unless the message tells them already."""
    if not finding.stated or not finding.recomputed or finding.stated.text in finding.message:
        return ""
    return f"Stated {shown(finding.stated)}, recomputed {shown(finding.recomputed)}."


def place(location: Location | None) -> str:
    """Return ``file:line:column``, which editors follow."""
    return f"{location.file}:{location.line}:{location.column}" if location else ""


def origin(finding: Finding) -> str:
    """Return where a deviation comes from, or an empty text where the question does not arise."""
    if finding.inherits_from:
        return f"inherited from {', '.join(finding.inherits_from)}"
    if finding.origin and finding.carried:
        return f"here: with the originator's own earlier values this step gives {shown(finding.carried)}"
    if finding.origin:
        return "here"
    if finding.origin is None and finding.stated and finding.recomputed:
        return "unknown: the step could not be carried out with the originator's own values"
    return ""


def cause(item: Cause, finding: Finding) -> str:
    """Return a slip that reproduces the stated digits, with the value it gives."""
    unit = finding.stated.unit if finding.stated else ""
    return f"{item.statement} (gives {rounded(item.value, 4)} {unit}".rstrip() + ")"


def deviation(finding: Finding) -> str:
    """Return the deviation with its tolerance, or an empty text."""
    text = numbers.deviation(finding.deviation, finding.tolerance, finding.stated)
    if text == MISSING:
        return ""
    tolerance = numbers.tolerance(finding.tolerance, finding.stated)
    return text if tolerance == MISSING else f"{text}; tolerance {tolerance}"


def bodies_line(diagram: FlowDiagram) -> str:
    """Return the changes of the bodies of a process in one line, such as ``energy, quenching: ring −3382 kJ``."""
    parts = [
        f"{box.label} {signed(box.change, 4)} {diagram.unit}".rstrip()
        for box in diagram.boxes
        if box.kind == "body" and box.change is not None
    ]
    return f"Change of {diagram.kind}, {diagram.process}: {', '.join(parts)}." if parts else ""


def totals_line(table: Totals) -> str:
    """Return the sums and the results of a cycle or a sequence in one line, as recomputed."""
    sums = [
        f"{symbol} {shown(cell.recomputed)}"
        for (symbol, _), cell in zip(table.columns, table.sum.cells, strict=False)
    ]
    facts = [
        f"{fact.label} {shown(fact.pair.recomputed)}"
        + (f" (at most {shown(fact.limit)}, {fact.limit_basis})" if fact.limit else "")
        for fact in table.facts
        if fact.pair.recomputed
    ]
    name = "the cycle" if table.kind == "cycle" else f"sequence {table.name}"
    return f"Sums of {name}, recomputed: {'; '.join((*sums, *facts))}."

"""The engine: a package goes through reading, sheets, comparisons and rules, and a review comes out."""

from __future__ import annotations

from collections.abc import Callable, Container, Iterable, Iterator, Sequence
from dataclasses import dataclass

from checker.basis import Basis
from checker.case import Case, Raised, Unchecked
from checker.cautions import CAUTIONS
from checker.convention import with_convention
from checker.document.nodes import Document
from checker.evaluation import make_case
from checker.findings import (
    Finding,
    Grade,
    NotChecked,
    PackageNote,
    RecordReview,
    Review,
    RuleNote,
    Verdict,
    reading_order,
)
from checker.locate import Locator, finding_of, finding_of_problem
from checker.problems import Place
from checker.recording import record_review
from checker.submission import Record, Submission
from checker.tool import tool_versions
from rules.rule import Rule, Scope

Progress = Callable[[str], None]


@dataclass(frozen=True, slots=True)
class Options:
    """What a review should contain beyond the findings; ``diagrams`` costs property calls."""

    diagrams: bool = False
    sheet: bool = True


def review_submission(
    document: Document,
    submission: Submission,
    rulebook: Sequence[Rule],
    basis: Basis,
    options: Options,
    progress: Progress = lambda _: None,
) -> Review:
    """Return the review of a submission; nothing in a package makes it raise."""
    locator = Locator(document)
    by_name = {rule.name: rule for rule in rulebook}
    findings: list[Finding] = []
    # Problems of the file's form are among these, those inside a record with its name.
    problems = (*submission.problems, *(p for r in submission.records for p in r.problems))
    for problem in dict.fromkeys(problems):
        findings.append(finding_of_problem(problem, by_name, locator))
    findings.extend(_package_findings(submission, rulebook, locator))
    reviews: dict[str, RecordReview] = {}
    cases: dict[str, Case] = {}
    for record in in_link_order(submission.records):
        progress(record.id)
        case = make_case(submission.head, with_convention(record, basis.work_convention), basis, cases)
        cases[record.id] = case
        found, unchecked, held = apply_rules(case, rulebook, locator)
        findings.extend(found)
        reviews[record.id] = record_review(case, locator, unchecked, held, options.diagrams, options.sheet)
    findings = sorted(dict.fromkeys(findings), key=reading_order)
    ordered = tuple(_in_document_order(submission, reviews))
    return Review(
        tool=tool_versions(property_library=bool(cases)),
        package=_package_note(document, submission),
        verdict=verdict_of(findings, ordered),
        records=ordered,
        findings=tuple(findings),
        basis=basis.settings(),
        cautions=CAUTIONS,
        rules=tuple(RuleNote(r.name, r.theme, r.grade, r.says, r.rationale, r.basis) for r in rulebook),
    )


def _package_findings(
    submission: Submission, rulebook: Sequence[Rule], locator: Locator
) -> Iterator[Finding]:
    for rule in rulebook:
        if rule.scope is Scope.PACKAGE and not rule.from_reading:
            for raised in rule.function(submission):
                if isinstance(raised, Raised):
                    yield finding_of(rule, raised, None, locator)


def apply_rules(
    case: Case, rulebook: Sequence[Rule], locator: Locator
) -> tuple[list[Finding], list[NotChecked], list[str]]:
    """Return the findings of a record, what was not checked, and the rules that held."""
    findings: list[Finding] = []
    unchecked: dict[NotChecked, None] = {}
    held: list[str] = []
    for rule in rulebook:
        if rule.scope is Scope.PACKAGE or rule.from_reading:
            continue
        applied, clean = False, True
        for item in items_of(case, rule.scope):
            if rule.when is not None and not rule.when(case, item):
                continue
            lacking = tuple(_lacking(case, rule, item))
            if lacking:
                unchecked.update(dict.fromkeys(lacking))
                continue
            applied = True
            for yielded in _call(rule, case, item):
                clean = False  # what was not checked did not hold either
                if isinstance(yielded, Raised):
                    findings.append(finding_of(rule, yielded, case, locator))
                else:
                    unchecked[NotChecked(yielded.what, yielded.missing)] = None
        if applied and clean:
            held.append(rule.name)
    return findings, list(unchecked), held


def _call(rule: Rule, case: Case, item: str) -> Iterable[Raised | Unchecked]:
    if rule.scope is Scope.RECORD:
        return rule.function(case)
    return rule.function(case, item)


def _lacking(case: Case, rule: Rule, item: str) -> Iterator[NotChecked]:
    base = {Scope.PROCESS: "processes", Scope.STATE: "states", Scope.BODY: "bodies"}.get(rule.scope)
    for need in rule.needs:
        pointer = f"{base}/{item}/{need}" if base else need
        if case.value(pointer) is None:
            yield NotChecked(f"{rule.name}: {base}/{item}" if base else rule.name, case.why_not(pointer))


def items_of(case: Case, scope: Scope) -> tuple[str, ...]:
    """Return the identifiers of what a rule of this scope looks at."""
    record = case.record
    return {
        Scope.RECORD: (record.id,),
        Scope.BODY: tuple(record.bodies),
        Scope.STATE: tuple(f"{state}/{body}" for state, body in record.body_states),
        Scope.PROCESS: tuple(process.id for process in record.processes),
        Scope.LIMIT: tuple(limit.id for limit in record.limits),
        Scope.ASSUMPTION: tuple(assumption.id for assumption in record.assumptions),
        Scope.PACKAGE: (),
    }[scope]


def in_link_order(records: Sequence[Record]) -> list[Record]:
    """Return the records so that those linked to come first; links in a circle keep their place.

    A chain may be as long as the package, so that the records under way stand in a list and not on the call stack.
    """
    by_id = {record.id: record for record in records}
    ordered: dict[str, Record] = {}
    for first in records:
        under_way = {first.id: _linked_to(first, by_id)}
        while under_way:
            name, ahead = next(reversed(under_way.items()))
            linked = next((other for other in ahead if other not in ordered and other not in under_way), None)
            if linked is not None:
                under_way[linked] = _linked_to(by_id[linked], by_id)
            else:
                ordered.setdefault(name, by_id[name])
                del under_way[name]
    return list(ordered.values())


def _linked_to(record: Record, known: Container[str]) -> Iterator[str]:
    """Yield the identifiers of the records that a record takes something from."""
    links = [found.same_as or "" for found in record.body_states.values()]
    for link in (*links, *(limit.quantity for limit in record.limits)):
        parts = link.split("/")
        if parts[0] == "records" and parts[1] in known:
            yield parts[1]


def verdict_of(findings: Iterable[Finding], records: Sequence[RecordReview]) -> Verdict:
    """Return the verdict: the worst grade decides; a package without a reviewed record is held."""
    grades = {finding.grade for finding in findings}
    if Grade.DISCREPANCY in grades:
        return Verdict.REVISE
    if Grade.QUERY in grades or not records or not all(record.readable for record in records):
        return Verdict.HOLD
    return Verdict.ACCEPT_AS_NOTED if Grade.REMARK in grades else Verdict.ACCEPT


def _in_document_order(submission: Submission, reviews: dict[str, RecordReview]) -> Iterator[RecordReview]:
    """Yield the reviews, unreadable records included, in the order of the file."""
    places: dict[str, int] = {record.id: _index(record.place) for record in submission.records}
    for problem in submission.problems:
        if problem.record in submission.unreadable:
            places.setdefault(problem.record, _index(problem.place))
    for name in submission.unreadable:
        reviews.setdefault(name, RecordReview(name, "", readable=False))
    yield from sorted(reviews.values(), key=lambda review: places.get(review.id, len(places)))


def _index(place: Place) -> int:
    """Return the number of the record that a place belongs to."""
    return next((part for part in place[:2] if isinstance(part, int)), 0)


def _package_note(document: Document, submission: Submission) -> PackageNote:
    head = submission.head
    return PackageNote(
        file=document.file,
        sha256=document.sha256,
        number=head.number,
        title=head.title,
        revision=head.revision,
        date=head.date,
        project=head.project,
        originator=head.originator,
        checker=head.checker,
        work_convention=head.work_convention or "not stated",
    )

"""The review as text for a terminal: one finding after the other, each line with its name before its content.

Nothing depends on colour, on columns or on a wide screen, so that the text can be read aloud. The first line
of a finding starts with ``file:line:column``, which editors and terminals can follow.
"""

from __future__ import annotations

from collections.abc import Iterator, Mapping
from dataclasses import dataclass
from textwrap import wrap
from typing import BinaryIO, Final

from checker.findings import Checked, Finding, Grade, RecordReview, Review
from reports.budgets import budget_line
from reports.numbers import shown
from reports.order import Comment, Group, grouped
from reports.phrases import (
    VERDICT_MEANS,
    bodies_line,
    cause,
    counted,
    deviation,
    grade_counts,
    held,
    not_recomputed,
    origin,
    place,
    spoiled,
    totals_line,
)
from reports.plain import capped, neutral

_LABEL_WIDTH: Final = 14
_LONGEST: Final = 2000  # characters of one text; a package may bring any length
_LONGEST_TITLE: Final = 200
_COLOURS: Final = {Grade.DISCREPANCY: "\x1b[1;31m", Grade.QUERY: "\x1b[1;33m", Grade.REMARK: "\x1b[1;36m"}
_BOLD: Final = "\x1b[1m"
_PLAIN: Final = "\x1b[0m"


@dataclass(frozen=True, slots=True)
class TextOptions:
    """How to print: ``colour`` for terminals that have it; ``width`` in characters."""

    colour: bool = False
    width: int = 100


def write_text(review: Review, stream: BinaryIO, options: TextOptions = TextOptions()) -> None:
    """Write the review as UTF-8 text."""
    stream.write(("\n".join(text_lines(review, options)) + "\n").encode())


def text_lines(review: Review, options: TextOptions = TextOptions()) -> Iterator[str]:
    """Yield the lines of the text report."""
    page = _Page(options)
    yield from _head(review, page)
    for group in grouped(review):
        yield from _group(review, group, page)
    yield from _closing(review, page)


class _Page:
    """Breaks text into lines of the page; the only place where text of others enters a line."""

    def __init__(self, options: TextOptions) -> None:
        self._options = options

    def flow(self, text: str, indent: int = 0, hang: int = 0) -> list[str]:
        """Return text as lines, the first indented by ``indent``, the others by ``indent + hang``."""
        first, others = " " * indent, " " * (indent + hang)
        return wrap(
            capped(neutral(text), _LONGEST), max(self._options.width, 40), initial_indent=first,
            subsequent_indent=others, break_on_hyphens=False,
        )  # fmt: skip

    def named(self, label: str, text: str, indent: int = 4) -> list[str]:
        """Return ``label   text``; nothing where there is no text."""
        return self.flow(f"{label.ljust(_LABEL_WIDTH)}{text}", indent, _LABEL_WIDTH) if text else []

    def strong(self, lines: list[str], start: str = _BOLD) -> list[str]:
        """Return lines emphasised, where colour was asked for."""
        return [f"{start}{line}{_PLAIN}" for line in lines] if self._options.colour else lines


def _head(review: Review, page: _Page) -> Iterator[str]:
    package = review.package
    name = " ".join(part for part in (package.number, package.title) if part) or package.file
    revision = f", revision {package.revision}" if package.revision else ""
    yield from page.strong(page.flow(capped(f"Review of {name}{revision}", _LONGEST_TITLE), hang=2))
    yield from page.flow(f"File {package.file}, SHA-256 {package.sha256 or 'unknown'}", hang=2)
    tools = ", ".join(f"{name} {version}" for name, version in review.tool)
    yield from page.flow(f"Reviewed with {tools}" if tools else "", hang=2)


def _group(review: Review, group: Group, page: _Page) -> Iterator[str]:
    record = group.record
    if record is None and not group.comments:
        return
    title = f"Record {record.id}: {record.title}" if record else "The package as a whole"
    yield ""
    yield from page.strong(page.flow(capped(title, _LONGEST_TITLE), hang=2))
    if record:
        yield from page.flow(f"Verdict on this record: {review.verdict_of(record).value}.", 2, 2)
    values = {item.quantity: item for item in record.checked} if record else {}
    for comment in group.comments:
        yield ""
        yield from _comment(comment, values, page)
    if record:
        yield ""
        yield from _consequences(record, group, page)
        yield from _account(record, page)


def _comment(comment: Comment, values: Mapping[str, Checked], page: _Page) -> Iterator[str]:
    finding = comment.finding
    where = f"{place(finding.location)}: " if finding.location else ""
    head = f"{where}{finding.grade.value}, {finding.rule} (comment {comment.number})"
    yield from page.strong(page.flow(head, 2, 2), _COLOURS[finding.grade])
    yield from page.flow(finding.message, 4)
    for label, text in _particulars(finding, values):
        yield from page.named(label, text)


def _particulars(finding: Finding, values: Mapping[str, Checked]) -> Iterator[tuple[str, str]]:
    yield "quantity", _with_role(finding)
    yield "stated", shown(finding.stated) if finding.stated else ""
    yield "recomputed", shown(finding.recomputed) if finding.recomputed else ""
    yield "carried", shown(finding.carried) if finding.carried else ""
    yield "deviation", deviation(finding)
    yield "tolerance", budget_line(finding.budget, finding.deviation, finding.stated)
    yield "formula", finding.formula
    yield "origin", origin(finding)
    for item in finding.causes:
        yield "likely cause" if item.likely else "possible slip", cause(item, finding)
    for quantity in finding.spoils:
        held_back = values.get(quantity)
        if held_back is not None and held_back.recomputed is None:
            yield "leaves open", f"{quantity}: {shown(held_back.stated)}, not recomputed because of this"
        else:
            yield "spoils", _against(quantity, held_back)
    yield "suggestion", finding.suggestion
    yield "basis", finding.basis


def _against(quantity: str, item: Checked | None) -> str:
    values = f": {shown(item.stated)}, recomputed {shown(item.recomputed)}" if item else ""
    return f"{quantity}{values}"


def _consequences(record: RecordReview, group: Group, page: _Page) -> Iterator[str]:
    """Yield what is wrong and was named by no finding of this record: its origin lies in another one."""
    findings = [comment.finding for comment in group.comments]
    named = {quantity for finding in findings for quantity in finding.spoils}
    for item in spoiled(record, findings):
        if item.quantity not in named:
            yield from page.flow(f"Wrong as a consequence: {_against(item.quantity, item)}.", 2, 4)


def _with_role(finding: Finding) -> str:
    role = f" ({finding.role})" if finding.role else ""
    return f"{finding.quantity}{role}" if finding.quantity else ""


def _account(record: RecordReview, page: _Page) -> Iterator[str]:
    """Yield what was checked and held, what was not checked, and what was assumed."""
    if not record.readable:
        yield from page.flow("This record could not be read: nothing in it was checked.", 2, 2)
    good = held(record)
    if good:
        listed = "; ".join(f"{item.quantity} {shown(item.stated)}" for item in good)
        yield from page.flow(f"Checked and held ({len(good)}): {listed}.", 2, 4)
    if record.rules_held:
        rules = counted(len(record.rules_held), "rule", "rules")
        yield from page.flow(f"{rules} found nothing wrong.", 2, 4)
    for item in not_recomputed(record):
        yield from page.flow(f"Not recomputed: {item.quantity} {shown(item.stated)}: {item.reason}.", 2, 4)
    told = {item.quantity for item in not_recomputed(record)}
    for missing in record.not_checked:
        if missing.what in told:
            continue
        yield from page.flow(f"Not checked: {missing.what}; missing: {missing.missing}.", 2, 4)
    for diagram in record.flows:
        yield from page.flow(bodies_line(diagram), 2, 4)
    for table in record.totals:
        yield from page.flow(totals_line(table), 2, 4)
    for noted in record.noted:
        yield from page.flow(f"Noted: {noted}.", 2, 4)
    for assumed in record.assumed:
        yield from page.flow(f"Assumed: {assumed}.", 2, 4)


def _closing(review: Review, page: _Page) -> Iterator[str]:
    yield ""
    for caution in review.cautions:
        yield from page.flow(f"Caution: {caution}", hang=2)
    verdict = f"Verdict: {review.verdict.value}. {VERDICT_MEANS[review.verdict]}"
    yield from page.strong(page.flow(f"{verdict} {_tally(review)}.", hang=2))


def _left_open(record: RecordReview) -> set[str]:
    """Return what of a record was not recomputed or not checked, each once."""
    return {item.quantity for item in not_recomputed(record)} | {item.what for item in record.not_checked}


def _tally(review: Review) -> str:
    good = sum(len(held(record)) for record in review.records)
    open_ends = sum(len(_left_open(record)) for record in review.records)
    records = counted(len(review.records), "record", "records").capitalize()
    unchecked = f"{open_ends} not checked" if open_ends else "nothing left unchecked"
    return (
        f"{records}: {grade_counts(review.findings)}; {counted(good, 'result', 'results')} held, {unchecked}"
    )

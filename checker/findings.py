"""Findings and the review: immutable data that every report writes from (design, section 7)."""

from __future__ import annotations

import hashlib
from dataclasses import dataclass
from enum import StrEnum

from checker.budget import Budget
from checker.figures import Diagram, FlowDiagram


class Grade(StrEnum):
    """How a finding must be treated."""

    DISCREPANCY = "discrepancy"
    QUERY = "query"
    REMARK = "remark"

    @property
    def rank(self) -> int:
        """0 for what blocks release first."""
        return list(Grade).index(self)


class Verdict(StrEnum):
    """The outcome of a review."""

    ACCEPT = "accept"
    ACCEPT_AS_NOTED = "accept as noted"
    HOLD = "hold for answers"
    REVISE = "revise and resubmit"


@dataclass(frozen=True, slots=True)
class Amount:
    """A value in a unit for display; ``text`` is as written for a stated one, else our rounding."""

    value: float
    unit: str
    text: str


@dataclass(frozen=True, slots=True)
class Location:
    """Where in the file; line and column from 1, the pointer a JSON pointer (RFC 6901)."""

    file: str
    line: int
    column: int
    pointer: str


@dataclass(frozen=True, slots=True)
class Cause:
    """A slip that reproduces the stated digits; ``likely`` is false where chance may do so as well."""

    slip: str
    value: float
    statement: str
    likely: bool = True


@dataclass(frozen=True, slots=True)
class Finding:
    """One finding; all numbers in the stated unit and the originator's sign."""

    rule: str
    theme: str
    grade: Grade
    message: str
    record: str | None = None
    quantity: str | None = None
    role: str | None = None
    stated: Amount | None = None
    recomputed: Amount | None = None
    carried: Amount | None = None
    deviation: float | None = None
    half_width: float | None = None
    tolerance: float | None = None
    origin: bool | None = None
    inherits_from: tuple[str, ...] = ()
    spoils: tuple[str, ...] = ()
    causes: tuple[Cause, ...] = ()
    formula: str = ""
    suggestion: str = ""
    basis: str = ""
    location: Location | None = None
    budget: Budget | None = None

    @property
    def fingerprint(self) -> str:
        """Identity from one revision to the next: rule, record and quantity, never a number or a line."""
        identity = "\n".join((self.rule, self.record or "", self.quantity or ""))
        return hashlib.sha256(identity.encode("utf-8", "surrogatepass")).hexdigest()[:16]


def reading_order(finding: Finding) -> tuple[int, str, int, int, str, str]:
    """Sort key of findings."""
    place = finding.location
    return (
        finding.grade.rank,  # what blocks release first
        place.file if place else "",
        place.line if place else 0,  # then the order in which the originator wrote
        place.column if place else 0,
        finding.rule,  # then ties in a fixed order, so that two runs print the same page
        finding.quantity or "",
    )


class Outcome(StrEnum):
    """Outcome of one comparison; never merged into one another."""

    AGREES = "agrees"
    WRONG = "wrong"
    NOT_EVALUABLE = "not evaluable"


class Standing(StrEnum):
    """Where a deviation comes from (design, section 5)."""

    HOLDS = "holds"
    ORIGIN = "origin"
    INHERITED = "inherited"
    EARLY_ROUNDING = "early rounding"
    ERRORS_CANCEL = "errors cancel"
    ORIGIN_UNKNOWN = "origin unknown"
    NOT_EVALUABLE = "not evaluable"


@dataclass(frozen=True, slots=True)
class Checked:
    """One stated quantity held against the alternate calculation."""

    quantity: str
    symbol: str
    role: str
    stated: Amount
    recomputed: Amount | None
    carried: Amount | None
    deviation: float | None
    tolerance: float | None
    outcome: Outcome
    standing: Standing
    reason: str = ""
    location: Location | None = None
    budget: Budget | None = None


@dataclass(frozen=True, slots=True)
class NotChecked:
    """What was not checked, and what is missing for it."""

    what: str
    missing: str


@dataclass(frozen=True, slots=True)
class SheetValue:
    """One output of a step: independent, carried and stated value, ready to print."""

    quantity: str
    symbol: str
    independent: Amount | None
    carried: Amount | None
    stated: Amount | None


@dataclass(frozen=True, slots=True)
class SheetLine:
    """One step of the alternate calculation sheet; ``substituted`` is the formula with numbers."""

    title: str
    formula: str
    substituted: str
    outputs: tuple[SheetValue, ...]
    note: str = ""


@dataclass(frozen=True, slots=True)
class StateCell:
    """One property of one state for the state table."""

    symbol: str
    name: str
    stated: Amount | None
    recomputed: Amount | None
    deviation: float | None
    outcome: Outcome | None


@dataclass(frozen=True, slots=True)
class StateRow:
    """One body in one state."""

    state: str
    body: str
    phase: str
    cells: tuple[StateCell, ...]


@dataclass(frozen=True, slots=True)
class LedgerLine:
    """One term of a ledger: ``side`` is ``change``, ``transfer`` or ``generation``.

    Beside the sums, with sign 0, stand ``share`` (a body's part of a change) and ``internal`` (between bodies).
    ``sign`` is its sign in the sum of its side, for the sign in which its amounts are written: ΔU +1, heat in
    +1, work out −1 (+1 where the originator writes work as positive in).
    """

    label: str
    symbol: str
    side: str
    sign: int
    stated: Amount | None
    recomputed: Amount | None


@dataclass(frozen=True, slots=True)
class Ledger:
    """A balance of one process.

    ``closes`` of each column: change − transfers − generation, None where a term is missing.
    """

    process: str
    kind: str  # "energy" | "entropy"
    unit: str
    lines: tuple[LedgerLine, ...]
    residual_stated: float | None
    residual_recomputed: float | None
    closes_stated: bool | None
    closes_recomputed: bool | None


@dataclass(frozen=True, slots=True)
class Pair:
    """One number as stated and as recomputed."""

    stated: Amount | None
    recomputed: Amount | None


@dataclass(frozen=True, slots=True)
class TotalsRow:
    """One process, or all of them, in a table of totals: one pair for each column."""

    label: str
    cells: tuple[Pair, ...]


@dataclass(frozen=True, slots=True)
class TotalsFact:
    """A result of several processes beside their sums; ``limit`` is what the second law allows at most, if anything."""

    label: str
    symbol: str
    pair: Pair
    limit: Amount | None = None
    limit_basis: str = ""


@dataclass(frozen=True, slots=True)
class Totals:
    """What the processes of a cycle or of a sequence add up to; heat in, work out. ``columns``: (symbol, unit)."""

    name: str
    kind: str  # "cycle" | "sequence"
    columns: tuple[tuple[str, str], ...]
    rows: tuple[TotalsRow, ...]
    sum: TotalsRow
    facts: tuple[TotalsFact, ...]


@dataclass(frozen=True, slots=True)
class Correction:
    """What has to be written in place of a wrong result: ``because`` names the wrong results that it follows from."""

    quantity: str
    stated: str
    corrected: str
    because: tuple[str, ...]
    location: Location


@dataclass(frozen=True, slots=True)
class RecordReview:
    """The review of one record."""

    id: str
    title: str
    readable: bool
    checked: tuple[Checked, ...] = ()
    not_checked: tuple[NotChecked, ...] = ()
    assumed: tuple[str, ...] = ()
    models: tuple[str, ...] = ()
    rules_held: tuple[str, ...] = ()
    states: tuple[StateRow, ...] = ()
    ledgers: tuple[Ledger, ...] = ()
    sheet: tuple[SheetLine, ...] = ()
    diagrams: tuple[Diagram, ...] = ()
    corrections: tuple[Correction, ...] = ()
    totals: tuple[Totals, ...] = ()
    flows: tuple[FlowDiagram, ...] = ()
    noted: tuple[str, ...] = ()


@dataclass(frozen=True, slots=True)
class RuleNote:
    """What a report needs to say about a rule (for SARIF and the appendix)."""

    name: str
    theme: str
    grade: Grade
    says: str
    rationale: str
    basis: str


@dataclass(frozen=True, slots=True)
class PackageNote:
    """The header of the reviewed package, as written."""

    file: str
    sha256: str
    number: str = ""
    title: str = ""
    revision: str = ""
    date: str = ""
    project: str = ""
    originator: str = ""
    checker: str = ""
    work_convention: str = ""


@dataclass(frozen=True, slots=True)
class Review:
    """A whole review.

    ``tool`` maps component to version; ``basis`` the resolved settings to their values; ``cautions`` are the
    safety sentences that every report prints.
    """

    tool: tuple[tuple[str, str], ...]
    package: PackageNote
    verdict: Verdict
    records: tuple[RecordReview, ...]
    findings: tuple[Finding, ...]
    basis: tuple[tuple[str, str], ...]
    cautions: tuple[str, ...]
    rules: tuple[RuleNote, ...] = ()

    def count(self, grade: Grade) -> int:
        """Return the number of findings of a grade."""
        return sum(1 for finding in self.findings if finding.grade is grade)

    def of_record(self, record: str | None) -> tuple[Finding, ...]:
        """Return the findings of a record (None: of the package itself)."""
        return tuple(finding for finding in self.findings if finding.record == record)

    def verdict_of(self, record: RecordReview) -> Verdict:
        """Return the verdict on one record alone: the definition for a package, held to what concerns it."""
        grades = {finding.grade for finding in self.of_record(record.id)}
        outcomes = {checked.outcome for checked in record.checked}
        # What is inherited may have its origin, and so its finding, in another record.
        inherited = (Outcome.WRONG, Standing.INHERITED) in {(c.outcome, c.standing) for c in record.checked}
        if Grade.DISCREPANCY in grades or inherited:
            return Verdict.REVISE
        if not record.readable or Grade.QUERY in grades or Outcome.NOT_EVALUABLE in outcomes:
            return Verdict.HOLD
        return Verdict.ACCEPT_AS_NOTED if Grade.REMARK in grades else Verdict.ACCEPT

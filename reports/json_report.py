"""The review as JSON, for other programs; `review_schema` describes every field.

Diagrams of states are left out: they are drawings of numbers that the state table already holds.
"""

from __future__ import annotations

from dataclasses import fields
from typing import BinaryIO

from checker.budget import Budget, BudgetTerm
from checker.figures import FlowDiagram
from checker.findings import (
    Amount,
    Checked,
    Correction,
    Finding,
    Grade,
    Ledger,
    Location,
    PackageNote,
    Pair,
    RecordReview,
    Review,
    SheetLine,
    StateRow,
    Totals,
    TotalsRow,
)
from reports.jsontext import finite, write_json_text

Tree = dict[str, object]


def write_json(review: Review, stream: BinaryIO) -> None:
    """Write the review as JSON."""
    write_json_text(review_tree(review), stream)


def review_tree(review: Review) -> Tree:
    """Return the review as dicts, lists, text and finite numbers, keys in their fixed order."""
    return {
        "tool": dict(review.tool),
        "package": {field.name: getattr(review.package, field.name) for field in fields(PackageNote)},
        "verdict": review.verdict.value,
        "counts": {grade.value: review.count(grade) for grade in Grade},
        "records": [_record(review, record) for record in review.records],
        "findings": [_finding(finding) for finding in review.findings],
        "basis": dict(review.basis),
        "cautions": list(review.cautions),
    }


def _record(review: Review, record: RecordReview) -> Tree:
    return {
        "id": record.id,
        "title": record.title,
        "readable": record.readable,
        "verdict": review.verdict_of(record).value,
        "models": list(record.models),
        "checked": [_checked(item) for item in record.checked],
        "rules_held": list(record.rules_held),
        "not_checked": [{"what": item.what, "missing": item.missing} for item in record.not_checked],
        "assumed": list(record.assumed),
        "noted": list(record.noted),
        "states": [_state(row) for row in record.states],
        "ledgers": [_ledger(ledger) for ledger in record.ledgers],
        "totals": [_totals(table) for table in record.totals],
        "flows": [_flow_diagram(diagram) for diagram in record.flows],
        "sheet": [_step(line) for line in record.sheet],
        "corrections": [_correction(item) for item in record.corrections],
    }


def _correction(item: Correction) -> Tree:
    return {
        "quantity": item.quantity,
        "stated": item.stated,
        "corrected": item.corrected,
        "because": list(item.because),
        "location": _location_of(item.location),
    }


def _location_of(place: Location) -> Tree:
    return {"file": place.file, "line": place.line, "column": place.column, "pointer": place.pointer}


def _amount(amount: Amount | None) -> Tree | None:
    if amount is None:
        return None
    return {"value": finite(amount.value), "unit": amount.unit, "text": amount.text}


def _finding(finding: Finding) -> Tree:
    place = finding.location
    return {
        "rule": finding.rule,
        "theme": finding.theme,
        "grade": finding.grade.value,
        "record": finding.record,
        "quantity": finding.quantity,
        "role": finding.role,
        "stated": _amount(finding.stated),
        "recomputed": _amount(finding.recomputed),
        "carried": _amount(finding.carried),
        "deviation": finite(finding.deviation),
        "half_width": finite(finding.half_width),
        "tolerance": finite(finding.tolerance),
        "budget": _budget(finding.budget),
        "origin": finding.origin,
        "inherits_from": list(finding.inherits_from),
        "spoils": list(finding.spoils),
        "causes": [
            {"slip": c.slip, "value": finite(c.value), "statement": c.statement, "likely": c.likely}
            for c in finding.causes
        ],
        "message": finding.message,
        "suggestion": finding.suggestion,
        "basis": finding.basis,
        "formula": finding.formula,
        "fingerprint": finding.fingerprint,
        "location": place
        and {"file": place.file, "line": place.line, "column": place.column, "pointer": place.pointer},
    }


def _checked(item: Checked) -> Tree:
    return {
        "quantity": item.quantity,
        "symbol": item.symbol,
        "role": item.role,
        "stated": _amount(item.stated),
        "recomputed": _amount(item.recomputed),
        "carried": _amount(item.carried),
        "deviation": finite(item.deviation),
        "tolerance": finite(item.tolerance),
        "budget": _budget(item.budget),
        "outcome": item.outcome.value,
        "standing": item.standing.value,
        "reason": item.reason,
    }


def _budget(budget: Budget | None) -> Tree | None:
    if budget is None:
        return None
    return {
        "allowance": finite(budget.allowance),
        "share": finite(budget.share),
        "reference": finite(budget.reference),
        "of": budget.of,
        "coverage_factor": finite(budget.coverage),
        "method": budget.method.value,
        "trials": budget.trials,
        "below": finite(budget.below),
        "above": finite(budget.above),
        "terms": [_budget_term(term) for term in budget.terms],
        "last_digits": finite(budget.last_digits),
        "open_inputs": [_budget_term(term) for term in budget.open_inputs],
    }


def _budget_term(term: BudgetTerm) -> Tree:
    return {"kind": term.kind.value, "source": term.source, "size": finite(term.size), "basis": term.basis}


def _state(row: StateRow) -> Tree:
    return {
        "state": row.state,
        "body": row.body,
        "phase": row.phase,
        "properties": [
            {
                "symbol": cell.symbol,
                "name": cell.name,
                "stated": _amount(cell.stated),
                "recomputed": _amount(cell.recomputed),
                "deviation": finite(cell.deviation),
                "outcome": cell.outcome and cell.outcome.value,
            }
            for cell in row.cells
        ],
    }


def _ledger(ledger: Ledger) -> Tree:
    return {
        "process": ledger.process,
        "kind": ledger.kind,
        "unit": ledger.unit,
        "terms": [
            {
                "label": line.label,
                "symbol": line.symbol,
                "side": line.side,
                "sign": line.sign,
                "stated": _amount(line.stated),
                "recomputed": _amount(line.recomputed),
            }
            for line in ledger.lines
        ],
        "residual_stated": finite(ledger.residual_stated),
        "residual_recomputed": finite(ledger.residual_recomputed),
        "closes_stated": ledger.closes_stated,
        "closes_recomputed": ledger.closes_recomputed,
    }


def _totals(table: Totals) -> Tree:
    return {
        "name": table.name,
        "kind": table.kind,
        "columns": [{"symbol": symbol, "unit": unit} for symbol, unit in table.columns],
        "rows": [_totals_row(row) for row in table.rows],
        "sum": _totals_row(table.sum),
        "facts": [
            {
                "label": fact.label,
                "symbol": fact.symbol,
                **_pair(fact.pair),
                "limit": _amount(fact.limit),
                "limit_basis": fact.limit_basis,
            }
            for fact in table.facts
        ],
    }


def _totals_row(row: TotalsRow) -> Tree:
    return {"label": row.label, "values": [_pair(pair) for pair in row.cells]}


def _pair(pair: Pair) -> Tree:
    return {"stated": _amount(pair.stated), "recomputed": _amount(pair.recomputed)}


def _flow_diagram(diagram: FlowDiagram) -> Tree:
    return {
        "process": diagram.process,
        "kind": diagram.kind,
        "unit": diagram.unit,
        "boxes": [
            {"name": box.name, "label": box.label, "kind": box.kind, "change": finite(box.change)}
            for box in diagram.boxes
        ],
        "flows": [
            {
                "source": flow.source,
                "target": flow.target,
                "label": flow.label,
                "kind": flow.kind,
                "leaves": finite(flow.leaves),
                "arrives": finite(flow.arrives),
            }
            for flow in diagram.flows
        ],
    }


def _step(line: SheetLine) -> Tree:
    return {
        "title": line.title,
        "formula": line.formula,
        "substituted": line.substituted,
        "outputs": [
            {
                "quantity": output.quantity,
                "symbol": output.symbol,
                "independent": _amount(output.independent),
                "carried": _amount(output.carried),
                "stated": _amount(output.stated),
            }
            for output in line.outputs
        ],
        "note": line.note,
    }

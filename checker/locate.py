"""From what a rule raised to a finding with its place in the file."""

from __future__ import annotations

from collections.abc import Mapping

from checker.case import Case, Raised
from checker.comparison.budget import as_stated
from checker.comparison.compare import Compared
from checker.display import stated_amount
from checker.document.nodes import Document
from checker.findings import Amount, Finding, Grade, Location
from checker.problems import Place, Problem
from checker.submission import Role
from rules.rule import Rule


class Locator:
    """Finds line, column and JSON pointer of a place in one document."""

    def __init__(self, document: Document) -> None:
        self._document = document

    def at(self, place: Place, at_key: bool = False, offset: int = 0) -> Location:
        """Return the location of a value (or key); of its nearest parent where it is missing."""
        position = self._document.position(place, at_key)
        return Location(self._document.file, position.line, position.column + offset, json_pointer(place))

    def of_problem(self, problem: Problem) -> Location:
        """Return the location of a problem of the reading stage."""
        if problem.line is not None:
            return Location(
                self._document.file, problem.line, problem.column or 1, json_pointer(problem.place)
            )
        return self.at(problem.place, problem.at_key, problem.offset)


def json_pointer(place: Place) -> str:
    """Return a place as a JSON pointer (RFC 6901)."""
    return "".join("/" + str(part).replace("~", "~0").replace("/", "~1") for part in place)


def finding_of_problem(problem: Problem, rules: Mapping[str, Rule], locator: Locator) -> Finding:
    """Return the finding for a problem of the reading stage."""
    rule = rules.get(problem.kind)
    return Finding(
        rule=problem.kind,
        theme=rule.theme if rule else "form",
        grade=rule.grade if rule else Grade.DISCREPANCY,
        message=problem.message,
        record=problem.record,
        quantity=problem.quantity,
        suggestion=problem.suggestion,
        basis=rule.basis if rule else "",
        location=locator.of_problem(problem),
    )


def finding_of(rule: Rule, raised: Raised, case: Case | None, locator: Locator) -> Finding:
    """Return the finding for what a rule raised."""
    compared = raised.compared
    statement = raised.statement or (compared.statement if compared else None)
    place = raised.place or (statement.place if statement else None) or (case.record.place if case else ())
    quantity = raised.quantity or (statement.pointer if statement else None)
    role = None
    if statement is not None:
        role = "stated result" if statement.role is Role.RESULT else "input"
    recomputed = raised.recomputed
    if recomputed is None and compared is not None and isinstance(compared.independent, float):
        recomputed = compared.independent + compared.shift.value
    return Finding(
        rule=rule.name,
        theme=raised.theme or rule.theme,
        grade=raised.grade or rule.grade,
        message=raised.message,
        record=case.record.id if case else None,
        quantity=quantity,
        role=role,
        stated=stated_amount(statement.quantity) if statement else None,
        recomputed=_amount(case, statement, quantity, recomputed),
        carried=_amount(case, statement, quantity, _carried(compared)),
        deviation=_in_unit(compared, compared.deviation if compared else None, signed=True),
        half_width=_in_unit(compared, statement.quantity.half_width if statement else None),
        tolerance=_in_unit(compared, compared.tolerance if compared else None),
        origin=raised.origin,
        inherits_from=raised.inherits_from,
        spoils=raised.spoils,
        causes=raised.causes,
        formula=_formula(case, quantity),
        suggestion=raised.suggestion,
        basis=rule.basis,
        location=locator.at(place, raised.at_key),
        budget=as_stated(compared.budget, compared.statement) if compared else None,
    )


def _carried(compared: Compared | None) -> float | None:
    if compared is None or not isinstance(compared.carried, float):
        return None
    return compared.carried + compared.shift.value


def _amount(case: Case | None, statement: object, quantity: str | None, value: float | None) -> Amount | None:
    from checker.display import format_number
    from checker.submission import Statement

    if value is None or quantity is None or case is None:
        return None
    if isinstance(statement, Statement):
        number = statement.quantity.number_of(statement.sign * value)
        return Amount(number, statement.quantity.unit.text, format_number(number))
    return case.display.amount(case.key(quantity), value)


def _in_unit(compared: Compared | None, value: float | None, signed: bool = False) -> float | None:
    if compared is None or value is None:
        return None
    number = compared.statement.quantity.difference_of(value)
    return number * compared.statement.sign if signed else number


def _formula(case: Case | None, quantity: str | None) -> str:
    if case is None or quantity is None:
        return ""
    step = case.plan.sheet.made_by.get(case.key(quantity))
    return step.formula if step else ""

"""From a record to its case: plan the sheet, evaluate it four ways, compare everything that is stated."""

from __future__ import annotations

from collections.abc import Mapping
from dataclasses import replace

from checker.basis import Basis
from checker.case import Case
from checker.comparison.carried import carry
from checker.comparison.compare import compare_all
from checker.comparison.datums import shifts_of
from checker.comparison.effects import Linked
from checker.comparison.moves import moves_of
from checker.comparison.references import References
from checker.display import display_of
from checker.sheet.build import RecordPlan, build_sheet
from checker.sheet.links import has_own_inputs, target_of
from checker.sheet.step import Values, evaluate
from checker.submission import PackageHead, Record, Statement


def make_case(head: PackageHead, record: Record, basis: Basis, others: Mapping[str, Case]) -> Case:
    """Return the case of a record; ``others`` holds the cases of records that it links to."""
    followed = without_lost_links(record, others)
    plan = build_sheet(followed)
    sheet = plan.sheet
    leaves = {**plan.leaves.values, **_linked(plan, others, carried=False)}
    values = evaluate(sheet.steps, leaves)
    references = References(sheet, values, basis)
    shifts = shifts_of(record, plan, values, references)
    linked_moves = _linked_moves(plan, others)
    moves = moves_of(record, sheet, values, plan.substances, basis, references.allowance, linked_moves)
    carried_leaves = {**plan.leaves.values, **_linked(plan, others, carried=True)}
    carried = carry(followed, plan, carried_leaves, values, shifts)
    compared = compare_all(record, sheet, values, carried, moves, references, shifts, basis)
    display = display_of(record, sheet, values)
    by_key = _by_key(plan, record)
    return Case(
        head, record, plan, values, carried, moves, references, compared, display, basis, by_key, dict(others)
    )


def without_lost_links(record: Record, others: Mapping[str, Case]) -> Record:
    """Return a record without those links to other records that lead to no state, where own inputs stand beside them.

    Inputs that fix the state are then used; that the link was not compared is listed as not checked.
    """
    states = dict(record.body_states)
    for (state, body), found in record.body_states.items():
        target = target_of(record, state, body)
        if target is None or target.record == record.id or not has_own_inputs(record, state, body):
            continue
        other = others.get(target.record)
        if other is None or other.value(target.key("temperature")) is None:
            states[state, body] = replace(found, same_as=None)
    return record if states == record.body_states else replace(record, body_states=states)


def _by_key(plan: RecordPlan, record: Record) -> dict[str, tuple[Statement, ...]]:
    """Return the usable statements of every quantity, under the key that all its pointers share."""
    found: dict[str, tuple[Statement, ...]] = {}
    for statement in record.statements:
        if statement.usable:
            key = plan.sheet.key(statement.pointer)
            found[key] = (*found.get(key, ()), statement)
    return found


def _linked(plan: RecordPlan, others: Mapping[str, Case], carried: bool) -> dict[str, float]:
    """Return the leaves that come from other records: independent values, or their stated and carried ones."""
    found: dict[str, float] = {}
    for link in plan.sheet.links:
        case = others.get(link.record)
        value = None if case is None else _value(case, link.pointer, carried)
        if value is not None:
            found[link.key] = value
    return found


def _linked_moves(plan: RecordPlan, others: Mapping[str, Case]) -> dict[str, Linked]:
    """Return leaf → how the quantity of another record moves from which it comes."""
    return {
        link.key: Linked(case.moves, case.key(link.pointer))
        for link in plan.sheet.links
        if (case := others.get(link.record)) is not None
    }


def _value(case: Case, pointer: str, carried: bool) -> float | None:
    if carried:
        stated = case.stated(pointer)
        if stated:
            return stated[0].value
        value: Values = case.carried.values
        own = value.get(case.key(pointer))
        return own if isinstance(own, float) else None
    return case.value(pointer)

"""Energy and entropy ledgers of a process, as stated and as recomputed, with what is left over."""

from __future__ import annotations

import math
from collections.abc import Iterator, Sequence
from dataclasses import dataclass
from typing import Final

from checker.case import Case
from checker.findings import Ledger, LedgerLine
from checker.ledger_unit import LedgerUnit, decimals_for, ledger_unit
from checker.sheet.context import ProcessContext
from checker.sheet.keys import term_for
from checker.vocabulary import Allowance

CHANGES: Final = (
    ("internal_energy_change", "change of internal energy"),
    ("kinetic_energy_change", "change of kinetic energy"),
    ("potential_energy_change", "change of potential energy"),
)
WORKS: Final = ("boundary_work", "shaft_work", "electrical_work", "friction_work")


@dataclass(frozen=True, slots=True)
class Line:
    """A term before it has values; ``sign`` is its sign in the sum of its side, 0 where it stands beside the sum."""

    pointer: str
    label: str
    side: str
    sign: int

    @property
    def factor(self) -> int:
        """Its sign in change − transfers − generation."""
        return self.sign if self.side == "change" else -self.sign


def ledgers(case: Case) -> Iterator[Ledger]:
    """Yield the energy ledger and the entropy ledger of every process."""
    for ctx in case.plan.contexts:
        base = f"processes/{ctx.process.id}"
        yield _ledger(case, ctx, "energy", list(_energy_lines(case, ctx)), f"{base}/energy_change")
        yield _ledger(case, ctx, "entropy", list(_entropy_lines(case, ctx)), f"{base}/entropy_change")


def _energy_lines(case: Case, ctx: ProcessContext) -> Iterator[Line]:
    base = f"processes/{ctx.process.id}"
    totals = [Line(f"{base}/{name}", label, "change", 1) for name, label in CHANGES]
    shares = [line for body in ctx.bodies for line in _energy_of_body(case, ctx, body)]
    yield from _changes(case, ctx, totals, shares)
    yield from _heats(ctx, "energy", "heat")
    for name in WORKS:
        pointer = f"{base}/{name}"
        if case.value(pointer) or case.stated(pointer):
            yield Line(pointer, name.replace("_", " "), "transfer", -1)
    for item in ctx.internal_heats:
        label = f"heat {item.id}, from {item.from_body} to {item.to_body}"
        yield Line(f"{base}/heat_transfers/{item.id}/energy", label, "internal", 0)
    for body in ctx.process.total_volume:
        pointer = f"{base}/bodies/{body}/boundary_work"
        if case.value(pointer) is not None or case.stated(pointer):
            yield Line(pointer, f"work of {body} on the others", "internal", 0)


def _entropy_lines(case: Case, ctx: ProcessContext) -> Iterator[Line]:
    base = f"processes/{ctx.process.id}"
    total = Line(f"{base}/entropy_change", "change of entropy", "change", 1)
    shares = [
        Line(f"{base}/bodies/{body}/entropy_change", f"{body}: change of entropy", "change", 1)
        for body in ctx.bodies
    ]
    yield from _changes(case, ctx, [total], shares)
    yield from _heats(ctx, "item_entropy", "entropy_transfer")
    yield Line(f"{base}/entropy_generation", "entropy generated", "generation", 1)
    for item in ctx.internal_heats:
        label = f"part of it with heat {item.id}, from {item.from_body} to {item.to_body}"
        yield Line(f"{base}/heat_transfers/{item.id}/entropy_generation", label, "internal", 0)


def _changes(
    case: Case, ctx: ProcessContext, totals: Sequence[Line], shares: Sequence[Line]
) -> Iterator[Line]:
    """Yield the changes: of one body the totals; of several each body's, beside a total that alone is stated."""
    if len(ctx.bodies) < 2:
        yield from totals
        return
    told = [bool(case.stated(line.pointer)) for line in shares]
    if all(told) or not any(case.stated(line.pointer) for line in totals):
        yield from shares
        return
    yield from (t for t in totals if t is totals[0] or case.stated(t.pointer) or _weighs(case, t.pointer))
    yield from (Line(line.pointer, line.label, "share", 0) for line in shares)


def _energy_of_body(case: Case, ctx: ProcessContext, body: str) -> Iterator[Line]:
    """Yield ΔU, ΔKE and ΔPE of a body; a body at rest has but one change."""
    base = f"processes/{ctx.process.id}/bodies/{body}"
    moving = [
        (name, label)
        for name, label in CHANGES[1:]
        if case.stated(f"{base}/{name}") or _weighs(case, f"{base}/{name}")
    ]
    whole, inner = f"{base}/energy_change", f"{base}/{CHANGES[0][0]}"
    if not moving and case.stated(whole) and not case.stated(inner):
        yield Line(whole, f"{body}: change of energy", "change", 1)
        return
    for name, label in (CHANGES[0], *moving):
        yield Line(f"{base}/{name}", f"{body}: {label}", "change", 1)


def _weighs(case: Case, pointer: str) -> bool:
    """Say whether a quantity is more than rounding noise."""
    value = case.value(pointer)
    return value is not None and case.display.amount(case.key(pointer), value).value != 0.0


def _heats(ctx: ProcessContext, of_item: str, of_all: str) -> Iterator[Line]:
    """Yield what crosses the boundary of the whole system with heat, each transfer alone where there are several."""
    base = f"processes/{ctx.process.id}"
    items = ctx.external_heats or ()
    energy = of_all == "heat"
    if len(items) < 2:
        named = f"heat transfer {items[0].id}" if items else "heat"
        yield Line(f"{base}/{of_all}", named if energy else "entropy with heat, Q/T_b", "transfer", 1)
        return
    for item in items:
        label = f"{'heat transfer' if energy else 'with heat transfer'} {item.id}"
        yield Line(f"{base}/heat_transfers/{item.id}/{of_item}", label, "transfer", 1)


def _ledger(case: Case, ctx: ProcessContext, kind: str, lines: Sequence[Line], total: str) -> Ledger:
    unit = ledger_unit(case, [total, *(line.pointer for line in lines)])
    values = [case.value(line.pointer) for line in lines]
    decimals = _decimals(unit, lines, values)
    summed = [(line, value) for line, value in zip(lines, values, strict=True) if line.sign]
    known = [(line.factor, value) for line, value in summed if value is not None]
    reference = max((abs(value) for value in values if value is not None), default=0.0)
    residual = math.fsum(factor * value for factor, value in known)
    complete = len(known) == len(summed)
    stated = _stated_residual(case, summed)
    allowance = Allowance.ENERGY if kind == "energy" else Allowance.ENTROPY
    allowed = case.basis.allowances[allowance] * reference
    return Ledger(
        ctx.process.id,
        kind,
        unit.unit,
        tuple(_row(case, unit, line, value, decimals) for line, value in zip(lines, values, strict=True)),
        None if stated is None else unit.number(stated[0]),
        unit.number(residual) if complete else None,
        None if stated is None else abs(stated[0]) <= stated[1] + allowed,
        abs(residual) <= 1e-6 * reference + max(unit.noise, 1e-9) if complete else None,
    )


def _stated_residual(case: Case, lines: Sequence[tuple[Line, float | None]]) -> tuple[float, float] | None:
    """Return change − transfers − generation as stated, and the half-widths of its digits; None without a term.

    A term that is nothing need not be stated.
    """
    residual = slack = 0.0
    for line, _ in lines:
        statement = next(iter(case.stated(line.pointer)), None)
        if statement is not None:
            residual += line.factor * statement.value
            slack += statement.quantity.half_width
        elif case.value(line.pointer) is None or _weighs(case, line.pointer):
            return None
    return residual, slack


def _decimals(unit: LedgerUnit, lines: Sequence[Line], values: Sequence[float | None]) -> int | None:
    """Return the decimals of the recomputed column: its sides and the whole balance add up as printed."""
    terms = [
        (line, unit.number(value)) for line, value in zip(lines, values, strict=True) if value is not None
    ]
    sides = [
        [line.sign * value for line, value in terms if line.side == side]
        for side in ("change", "transfer", "generation")
    ]
    beside = [[value] for line, value in terms if not line.sign]
    return decimals_for([*sides, [line.factor * value for line, value in terms], *beside])


def _row(case: Case, unit: LedgerUnit, line: Line, value: float | None, decimals: int | None) -> LedgerLine:
    """Return one line; all lines of a ledger are shown in one unit, in the program's sign."""
    statement = next(iter(case.stated(line.pointer)), None)
    term = term_for(line.pointer)
    return LedgerLine(
        line.label,
        term.symbol if term else "",
        line.side,
        line.sign,
        None if statement is None else unit.stated(statement),
        None if value is None else unit.amount(value, decimals),
    )

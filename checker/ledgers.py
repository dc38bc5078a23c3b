"""Energy and entropy ledgers of a process, as stated and as recomputed, with what is left over."""

from __future__ import annotations

from collections.abc import Iterator, Sequence

from checker.case import Case
from checker.findings import Amount, Ledger, LedgerLine
from checker.sheet.keys import term_for
from checker.vocabulary import Allowance

Line = tuple[str, str, str, int]
"""(pointer, label, side, sign in the sum)."""


def ledgers(case: Case) -> Iterator[Ledger]:
    """Yield the energy ledger and the entropy ledger of every process."""
    for process in case.record.processes:
        base = f"processes/{process.id}"
        yield _ledger(case, process.id, "energy", _energy_lines(case, base), f"{base}/energy_change")
        yield _ledger(case, process.id, "entropy", _entropy_lines(case, base), f"{base}/entropy_change")


def _energy_lines(case: Case, base: str) -> list[Line]:
    lines: list[Line] = []
    for name, label in (
        ("internal_energy_change", "change of internal energy"),
        ("kinetic_energy_change", "change of kinetic energy"),
        ("potential_energy_change", "change of potential energy"),
    ):
        lines.append((f"{base}/{name}", label, "change", 1))
    lines.extend(_transfers(case, base))
    for name, label in (
        ("boundary_work", "boundary work"),
        ("shaft_work", "shaft work"),
        ("electrical_work", "electrical work"),
        ("friction_work", "friction work"),
    ):
        pointer = f"{base}/{name}"
        if case.value(pointer) or case.stated(pointer):
            lines.append((pointer, label, "transfer", -1))
    return lines


def _transfers(case: Case, base: str) -> list[Line]:
    process = next(p for p in case.record.processes if base == f"processes/{p.id}")
    items = process.heat_transfers or ()
    if len(items) < 2:
        label = f"heat transfer {items[0].id}" if items else "heat"
        return [(f"{base}/heat", label, "transfer", 1)]
    return [(f"{base}/heat_transfers/{i.id}/energy", f"heat transfer {i.id}", "transfer", 1) for i in items]


def _entropy_lines(case: Case, base: str) -> list[Line]:
    process = next(p for p in case.record.processes if base == f"processes/{p.id}")
    lines: list[Line] = [(f"{base}/entropy_change", "change of entropy", "change", 1)]
    items = process.heat_transfers or ()
    if len(items) > 1:
        lines += [
            (f"{base}/heat_transfers/{i.id}/item_entropy", f"with heat transfer {i.id}", "transfer", 1)
            for i in items
        ]
    else:
        lines.append((f"{base}/entropy_transfer", "entropy with heat, Q/T_b", "transfer", 1))
    lines.append((f"{base}/entropy_generation", "entropy generated", "generation", 1))
    return lines


def _ledger(case: Case, process: str, kind: str, lines: Sequence[Line], total: str) -> Ledger:
    unit = case.display.amount(case.key(total), 0.0).unit
    rows, stated_sum, recomputed_sum = [], 0.0, 0.0
    stated_complete = recomputed_complete = True
    slack = 0.0
    for pointer, label, side, sign in lines:
        factor = sign if side == "change" else -sign
        value, statement = case.value(pointer), next(iter(case.stated(pointer)), None)
        if value is None:
            recomputed_complete = False
        else:
            recomputed_sum += factor * value
        if statement is not None:
            stated_sum += factor * statement.value
            slack += statement.quantity.half_width
        elif value is None or abs(value) > 0.0:
            stated_complete = False
        rows.append(_row(case, pointer, label, side, sign, value, total))
    reference = max((abs(v) for p, *_ in lines if (v := case.value(p)) is not None), default=0.0)
    allowance = Allowance.ENERGY if kind == "energy" else Allowance.ENTROPY
    allowed = case.basis.allowances[allowance] * reference
    return Ledger(
        process,
        kind,
        unit,
        tuple(rows),
        case.display.difference(case.key(total), stated_sum) if stated_complete else None,
        case.display.difference(case.key(total), recomputed_sum) if recomputed_complete else None,
        abs(stated_sum) <= slack + allowed if stated_complete else None,
        abs(recomputed_sum) <= 1e-6 * max(reference, 1e-9) + 1e-9 if recomputed_complete else None,
    )


def _row(
    case: Case, pointer: str, label: str, side: str, sign: int, value: float | None, total: str
) -> LedgerLine:
    """Return one line; all lines of a ledger are shown in the unit of its total, in the program's sign."""
    statement = next(iter(case.stated(pointer)), None)
    term = term_for(pointer)
    return LedgerLine(
        label,
        term.symbol if term else "",
        side,
        sign,
        None if statement is None else _in_unit_of(case, total, statement.value),
        None if value is None else _in_unit_of(case, total, value),
    )


def _in_unit_of(case: Case, total: str, value: float) -> Amount:
    return case.display.amount(case.key(total), value)

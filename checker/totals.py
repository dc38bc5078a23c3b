"""What several processes add up to: a cycle with its efficiency beside the Carnot limit, and every sequence."""

from __future__ import annotations

import math
from collections.abc import Iterator, Sequence
from dataclasses import dataclass
from typing import Final

from checker.case import Case
from checker.display import stated_amount
from checker.facts.cycles import extreme_temperatures, highest_efficiency, highest_performance
from checker.findings import Amount, Pair, Totals, TotalsFact, TotalsRow
from checker.ledger_unit import LedgerUnit, decimals_for, ledger_unit
from checker.sheet.cycles import is_cycle
from checker.sheet.keys import term_for

MOTION: Final = ("kinetic_energy_change", "potential_energy_change")
NET: Final = {"heat": "net_heat", "work": "net_work"}
RESULTS: Final = ("heat_supplied", "heat_rejected", "thermal_efficiency", "coefficient_of_performance")


def totals(case: Case) -> Iterator[Totals]:
    """Yield the table of the record's cycle, if it is one, and of every sequence of at least two processes."""
    every = tuple(process.id for process in case.record.processes)
    if len(every) > 1 and is_cycle(case.record):
        yield _table(case, "cycle", "cycle", every, "results")
    for sequence in case.record.sequences:
        if len(sequence.processes) > 1:
            yield _table(case, sequence.id, "sequence", sequence.processes, f"sequences/{sequence.id}")


def _table(case: Case, name: str, kind: str, processes: Sequence[str], base: str) -> Totals:
    change = "energy_change" if _moves(case, processes) else "internal_energy_change"
    energies, entropies = ("heat", "work", change), ("entropy_change", "entropy_generation")
    columns = [
        *_columns(case, processes, energies, base, balance=True),
        *_columns(case, processes, entropies, base, balance=False),
    ]
    labels = (*processes, "Sum")
    rows = [TotalsRow(label, tuple(column.cells[i] for column in columns)) for i, label in enumerate(labels)]
    shown = frozenset(column.sum_of for column in columns)
    return Totals(
        name,
        kind,
        tuple((column.symbol, column.unit) for column in columns),
        tuple(rows[:-1]),
        rows[-1],
        tuple(_cycle_facts(case) if kind == "cycle" else _sequence_facts(case, base, shown)),
    )


def _moves(case: Case, processes: Sequence[str]) -> bool:
    """Say whether a kinetic or potential energy changes by more than rounding noise."""
    keys = (case.key(f"processes/{process}/{name}") for process in processes for name in MOTION)
    found = ((key, case.value(key)) for key in keys)
    return any(value is not None and case.display.amount(key, value).value != 0.0 for key, value in found)


@dataclass(frozen=True, slots=True)
class _Column:
    """One column: its cells from the first process to the sum, which is stated under ``sum_of``."""

    symbol: str
    unit: str
    sum_of: str
    cells: tuple[Pair, ...]


def _columns(
    case: Case, processes: Sequence[str], names: Sequence[str], base: str, balance: bool
) -> Iterator[_Column]:
    """Yield the columns of one dimension, in one unit and with the same decimals.

    They add up downwards, and where they are a ``balance`` (Q, W, ΔE) across as well, as they are printed.
    """
    pointers = {name: [f"processes/{process}/{name}" for process in processes] for name in names}
    sums = {name: f"{base}/{NET.get(name, name) if base == 'results' else name}" for name in names}
    unit = ledger_unit(case, [pointer for name in names for pointer in (*pointers[name], sums[name])])
    values = {name: [case.value(pointer) for pointer in pointers[name]] for name in names}
    down = [[unit.number(value) for value in values[name] if value is not None] for name in names]
    signs = (1.0, -1.0, -1.0)  # Q − W − ΔE = 0
    across = [[s * n for s, n in zip(signs, row, strict=True)] for row in zip(*down, strict=False) if balance]
    decimals = decimals_for([*down, *across])
    for name in names:
        total = _sum(values[name])
        numbered = zip([*pointers[name], sums[name]], [*values[name], total], strict=True)
        cells = tuple(_pair(case, unit, pointer, value, decimals) for pointer, value in numbered)
        term = term_for(pointers[name][0])
        yield _Column(term.symbol if term else "", unit.unit, sums[name], cells)


def _sum(values: Sequence[float | None]) -> float | None:
    known = [value for value in values if value is not None]
    return math.fsum(known) if len(known) == len(values) else None


def _pair(case: Case, unit: LedgerUnit, pointer: str, value: float | None, decimals: int | None) -> Pair:
    statement = next(iter(case.stated(pointer)), None)
    return Pair(
        None if statement is None else unit.stated(statement),
        None if value is None else unit.amount(value, decimals),
    )


def _cycle_facts(case: Case) -> Iterator[TotalsFact]:
    for name in RESULTS:
        found = _fact(case, f"results/{name}")
        pays = name != "thermal_efficiency" or _positive(case, "results/net_work") or found.pair.stated
        if (found.pair.stated or found.pair.recomputed) and pays:
            limit, basis = _limit(case, name)
            shown = None if limit is None else case.display.amount(f"results/{name}", limit)
            yield TotalsFact(found.label, found.symbol, found.pair, shown, basis)


def _positive(case: Case, pointer: str) -> bool:
    value = case.value(pointer)
    return value is not None and value > 0.0


def _limit(case: Case, name: str) -> tuple[float | None, str]:
    """Return the Carnot limit of a ratio, and between which temperatures."""
    if name == "coefficient_of_performance":
        limit = highest_performance(case)
        return limit, "" if limit is None else "reversible between the same places"
    found = extreme_temperatures(case)
    if name != "thermal_efficiency" or found is None:
        return None, ""
    cold, hot = (case.display.absolute("surroundings/temperature", value).text for value in found)
    return highest_efficiency(case), f"reversible between {cold} K and {hot} K"


def _sequence_facts(case: Case, base: str, shown: frozenset[str]) -> Iterator[TotalsFact]:
    """Yield what else is stated of a sequence, each once."""
    stated = dict.fromkeys(
        s.pointer for s in case.record.statements if s.usable and s.pointer.startswith(f"{base}/")
    )
    yield from (_fact(case, pointer) for pointer in stated if pointer not in shown)


def _fact(case: Case, pointer: str) -> TotalsFact:
    term, value = term_for(pointer), case.value(pointer)
    statement = next(iter(case.stated(pointer)), None)
    return TotalsFact(
        pointer.rsplit("/", 1)[-1].replace("_", " "),
        term.symbol if term else "",
        Pair(
            None if statement is None else stated_amount(statement.quantity),
            None if value is None else _recomputed(case, pointer, value),
        ),
    )


def _recomputed(case: Case, pointer: str, value: float) -> Amount:
    return case.display.amount(case.key(pointer), value)

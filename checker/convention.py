"""The work convention: which statements follow it, and the one that a review basis supplies."""

from __future__ import annotations

from dataclasses import replace
from typing import Final

from checker.submission import Record, Statement

WORK_ITEM: Final = ("energy", "mean_power")
"""Names of a work transfer whose sign follows the convention, unless the item has a direction."""


def follows_convention(record: Record, statement: Statement) -> bool:
    """Say whether the work convention decides the sign of a statement."""
    parts = statement.pointer.split("/")
    if len(parts) != 5 or parts[2] != "work_transfers":
        return statement.term.work_sign
    items = next((p.work_transfers for p in record.processes if p.id == parts[1]), None)
    item = next((i for i in items or () if i.id == parts[3]), None)
    return statement.term.name in WORK_ITEM and (item is None or item.direction is None)


def with_convention(record: Record, convention: str | None) -> Record:
    """Return a record that states no convention with that of the review basis; any other as it is."""
    if record.work_convention is not None or convention is None:
        return record
    found = replace(record, work_convention=convention)
    statements = tuple(
        replace(s, sign=found.work_sign) if follows_convention(record, s) else s for s in record.statements
    )
    return replace(found, statements=statements)

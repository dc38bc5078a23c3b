"""What a stated quantity is called in a sentence."""

from __future__ import annotations

from typing import Final

from checker.submission import Statement

TRANSFERS: Final = {"heat_transfers": "heat transfer", "work_transfers": "work transfer"}


def name_of(statement: Statement) -> str:
    """Return the name of a quantity in words; that of a transfer says which one it belongs to."""
    name = statement.term.name.replace("_", " ")
    parts = statement.pointer.split("/")
    kind = TRANSFERS.get(parts[2]) if len(parts) == len(("processes", "P", "KIND", "ID", "NAME")) else None
    return f"{name} of {kind} {parts[3]}" if kind else name

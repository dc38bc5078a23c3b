"""Which pointers name one quantity."""

from __future__ import annotations

from collections.abc import Mapping
from dataclasses import dataclass, field

from checker.sheet.keys import process_key
from checker.submission import Process, Record
from checker.vocabulary import WORK_KINDS


@dataclass(frozen=True, slots=True)
class SameQuantity:
    """Brings every pointer to the key of its quantity.

    In a record of one body the body's share of a process is the total; a heat transfer (or a work transfer of
    its kind) that stands alone in its process is the total of its kind.
    """

    single_body: str = ""
    items: Mapping[str, str] = field(default_factory=dict)

    def key(self, pointer: str) -> str:
        """Return the key under which a quantity is calculated."""
        if self.single_body and pointer.startswith("processes/"):
            parts = pointer.split("/", 4)
            if len(parts) == 5 and parts[2] == "bodies" and parts[3] == self.single_body:
                pointer = f"processes/{parts[1]}/{parts[4]}"
        return self.items.get(pointer, pointer)


def same_quantities(record: Record) -> SameQuantity:
    """Return which pointers of a record name one quantity."""
    items: dict[str, str] = {}
    for process in record.processes:
        items.update(_lone_items(process))
    single = next(iter(record.bodies)) if len(record.bodies) == 1 else ""
    return SameQuantity(single, items)


def _lone_items(process: Process) -> dict[str, str]:
    base, found = f"processes/{process.id}", {}
    heats = [item for item in process.heat_transfers or () if not item.is_internal]
    if len(heats) == 1:
        found[f"{base}/heat_transfers/{heats[0].id}/energy"] = process_key(process.id, "heat")
    for kind in WORK_KINDS:
        items = [item for item in process.work_transfers or () if item.kind == kind]
        if len(items) == 1:
            found[f"{base}/work_transfers/{items[0].id}/energy"] = process_key(process.id, f"{kind}_work")
    return found

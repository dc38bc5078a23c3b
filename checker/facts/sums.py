"""Stated totals and the stated parts that they are made of."""

from __future__ import annotations

from collections.abc import Iterator
from dataclasses import dataclass
from typing import Final

from checker.case import Case
from checker.facts.stated import Stated, items, one, one_or_nothing, total
from checker.sheet.cycles import SUMS
from checker.submission import Process
from checker.vocabulary import WORK_KINDS

SHARED: Final = (
    "internal_energy_change",
    "entropy_change",
    "energy_change",
    "heat",
    "work",
)
"""Totals of a process that are the sums of its bodies' shares; what heat generates between bodies is in no share."""
CYCLE: Final = {"results/net_work": "work", "results/net_heat": "heat"}


@dataclass(frozen=True, slots=True)
class Sum:
    """A stated total with the sum of its stated parts; ``words`` names the parts."""

    pointer: str
    stated: Stated
    parts: Stated
    words: str


def sums(case: Case) -> Iterator[Sum]:
    """Yield every stated total of which all parts are stated."""
    for process in case.record.processes:
        yield from _of_process(case, process)
    for sequence in case.record.sequences:
        for name in _names_stated(case, f"sequences/{sequence.id}/"):
            members = tuple(f"processes/{process}/{name}" for process in sequence.processes)
            yield from _sum(case, f"sequences/{sequence.id}/{name}", members, "the processes of the sequence")
    for pointer, name in CYCLE.items():
        members = tuple(f"processes/{process.id}/{name}" for process in case.record.processes)
        yield from _sum(case, pointer, members, "the processes of the cycle")


def _of_process(case: Case, process: Process) -> Iterator[Sum]:
    base = f"processes/{process.id}"
    for what, kind in (("heat", ""), *(("work", kind) for kind in WORK_KINDS)):
        pointer = f"{base}/{kind}_work" if kind else f"{base}/heat"
        stated, parts = one(case, pointer), items(case, process.id, what, kind)
        if stated is not None and parts is not None and len(parts.parts) > 1:
            yield Sum(pointer, stated, parts, f"the {what} transfers")
    ctx = case.context(process.id)
    others = ("shaft_work", "electrical_work") if ctx is None else ctx.other_work_kinds
    kinds = tuple(f"{base}/{name}" for name in ("boundary_work", *others))
    yield from _sum(case, f"{base}/work", kinds, "the kinds of work")
    if len(case.record.bodies) > 1:
        for name in SHARED:
            shares = tuple(f"{base}/bodies/{body}/{name}" for body in case.record.bodies)
            yield from _sum(case, f"{base}/{name}", shares, "the shares of the bodies")


def _sum(case: Case, pointer: str, members: tuple[str, ...], words: str) -> Iterator[Sum]:
    stated, parts = one(case, pointer), total(one_or_nothing(case, member) for member in members)
    if stated is not None and parts is not None and parts.parts:
        yield Sum(pointer, stated, parts, words)


def _names_stated(case: Case, prefix: str) -> tuple[str, ...]:
    names = (s.term.name for s in case.record.statements if s.pointer.startswith(prefix))
    return tuple(name for name in dict.fromkeys(names) if name in SUMS)

"""Processes: end states, path, transfers, totals and shares."""

from __future__ import annotations

from collections.abc import Sequence

from checker.package.desk import Desk
from checker.package.flatten.paths import read_paths
from checker.package.flatten.references import refer, unique
from checker.package.parts.process import BESIDE_INPUTS, ONLY_HEAT
from checker.package.parts.process import HeatTransfer as HeatPart
from checker.package.parts.process import Process as ProcessPart
from checker.package.parts.process import WorkTransfer as WorkPart
from checker.package.parts.record import Record as RecordPart
from checker.package.spot import Spot
from checker.package.words import SYSTEM
from checker.problems import Place
from checker.submission import HeatTransfer, Process, Role, WorkTransfer
from checker.vocabulary import TERMS, TRANSFER, Level

_WORK_NAMES = tuple(term.name for term in TRANSFER if term.name not in ONLY_HEAT)


def read_processes(desk: Desk, record: RecordPart) -> tuple[Process, ...]:
    """State the quantities of all processes, and return the processes."""
    found = [_process(desk, record, part, ("processes", n)) for n, part in enumerate(record.processes)]
    places = [(part.id, ("processes", n, "id")) for n, part in enumerate(record.processes)]
    unique(desk.notebook, "process", places)
    return tuple(found)


def _process(desk: Desk, record: RecordPart, part: ProcessPart, place: Place) -> Process:
    """State the quantities of one process."""
    for key, state in (("from", part.from_), ("to", part.to)):
        refer(desk.notebook, "state", state, record.states, (*place, key))
    bodies = tuple(record.bodies)
    spot = Spot(Level.PROCESS, f"processes/{part.id}", place, duration=desk.duration(part.inputs))
    desk.take_both(spot, part.inputs, part.results)
    _shares(desk, part, bodies, spot)
    return Process(
        id=part.id,
        from_state=part.from_,
        to_state=part.to,
        place=(*desk.notebook.root, *place),
        paths=read_paths(desk, part.id, part.path, bodies, (*place, "path")),
        heat_transfers=_heats(desk, part, bodies, place),
        work_transfers=_works(desk, part, bodies, place),
        equilibrium=part.equilibrium,
        total_volume=_total_volume(desk, part, bodies, (*place, "total_volume")),
        insulated=part.insulated,
    )


def _identifiers(items: Sequence[HeatPart | WorkPart], place: Place) -> list[tuple[str, Place]]:
    """Return the identifiers of transfers with their places."""
    return [(item.id, (*place, n, "id")) for n, item in enumerate(items)]


def _heats(
    desk: Desk, part: ProcessPart, bodies: tuple[str, ...], place: Place
) -> tuple[HeatTransfer, ...] | None:
    """Return the heat transfers; None where nothing is stated about them."""
    if part.heat_transfers is None:
        return None
    unique(desk.notebook, "heat transfer", _identifiers(part.heat_transfers, (*place, "heat_transfers")))
    return tuple(_heat(desk, part, n, bodies, place) for n in range(len(part.heat_transfers)))


def _works(
    desk: Desk, part: ProcessPart, bodies: tuple[str, ...], place: Place
) -> tuple[WorkTransfer, ...] | None:
    """Return the work transfers; None where nothing is stated about them."""
    if part.work_transfers is None:
        return None
    unique(desk.notebook, "work transfer", _identifiers(part.work_transfers, (*place, "work_transfers")))
    return tuple(_work(desk, part, n, bodies, place) for n in range(len(part.work_transfers)))


def _heat(
    desk: Desk, process: ProcessPart, index: int, bodies: tuple[str, ...], place: Place
) -> HeatTransfer:
    """State the quantities of a heat transfer."""
    part = (process.heat_transfers or ())[index]
    where: Place = (*place, "heat_transfers", index)
    for key, body in (("body", part.body), ("from", part.from_), ("to", part.to)):
        if body is not None:
            refer(desk.notebook, "body", body, bodies, (*where, key))
    spot = Spot(
        Level.TRANSFER,
        f"processes/{process.id}/heat_transfers/{part.id}",
        where,
        duration=desk.duration(part.inputs, process.inputs),
    )
    at_system = part.boundary_temperature == SYSTEM
    for name in BESIDE_INPUTS:
        text = getattr(part, name)
        if text is None:
            desk.blank(name, (*where, name), f"{spot.prefix}/{name}")
        elif not (at_system and name == "boundary_temperature"):
            desk.state(spot, Role.INPUT, TERMS[Level.TRANSFER][name], text, (*where, name))
    desk.take_both(spot, part.inputs, part.results)
    return HeatTransfer(part.id, (*desk.notebook.root, *where), part.body, part.from_, part.to, at_system)


def _work(
    desk: Desk, process: ProcessPart, index: int, bodies: tuple[str, ...], place: Place
) -> WorkTransfer:
    """State the quantities of a work transfer."""
    part = (process.work_transfers or ())[index]
    where: Place = (*place, "work_transfers", index)
    if part.body is not None:
        refer(desk.notebook, "body", part.body, bodies, (*where, "body"))
    spot = Spot(
        Level.TRANSFER,
        f"processes/{process.id}/work_transfers/{part.id}",
        where,
        names=_WORK_NAMES,
        duration=desk.duration(part.inputs, process.inputs),
        work=True,
        direction=part.direction,
    )
    desk.take_both(spot, part.inputs, part.results)
    return WorkTransfer(part.id, part.kind, (*desk.notebook.root, *where), part.body, part.direction)


def _shares(desk: Desk, part: ProcessPart, bodies: tuple[str, ...], whole: Spot) -> None:
    """State the shares of single bodies."""
    for body, share in part.bodies.items():
        where: Place = (*whole.place, "bodies", body)
        refer(desk.notebook, "body", body, bodies, where, at_key=True)
        spot = Spot(Level.PROCESS, f"{whole.prefix}/bodies/{body}", where, duration=whole.duration)
        desk.take_both(spot, share.inputs, share.results)


def _total_volume(desk: Desk, part: ProcessPart, bodies: tuple[str, ...], place: Place) -> tuple[str, ...]:
    """State a fixed total volume, and return the bodies in it."""
    if part.total_volume is None:
        return ()
    for n, body in enumerate(part.total_volume.bodies):
        refer(desk.notebook, "body", body, bodies, (*place, "bodies", n))
    spot = Spot(Level.BODY, f"processes/{part.id}/total_volume", place, names=("volume",))
    desk.take(spot, Role.INPUT, part.total_volume.inputs, ("inputs",))
    return part.total_volume.bodies

"""Data of the figures of a review: curves and states of a diagram, boxes and arrows of a flow diagram."""

from __future__ import annotations

from dataclasses import dataclass


@dataclass(frozen=True, slots=True)
class Curve:
    """A curve in a diagram: a label and (x, y) points; ``style`` is ``dome``, ``path`` or ``chord``."""

    label: str
    style: str
    points: tuple[tuple[float, float], ...]


@dataclass(frozen=True, slots=True)
class Marker:
    """A state in a diagram; ``style`` is ``recomputed`` or ``stated``."""

    label: str
    style: str
    x: float
    y: float


@dataclass(frozen=True, slots=True)
class Diagram:
    """A p–v or T–s diagram, in the units of its axis labels.

    ``closed``: the curves of style ``path`` follow each other and end where they began.
    """

    kind: str  # "p-v" | "T-s"
    body: str
    x_label: str
    y_label: str
    log_x: bool
    log_y: bool
    curves: tuple[Curve, ...]
    markers: tuple[Marker, ...]
    closed: bool = False


@dataclass(frozen=True, slots=True)
class FlowBox:
    """A box of a flow diagram, named once in it.

    ``kind`` is ``body``; ``outside``, what heat and work come from or go to; ``meeting``, where flows of several
    bodies meet; or ``generation``, where entropy comes from. ``change`` is that of a body, in the diagram's unit.
    """

    name: str
    label: str
    kind: str
    change: float | None = None


@dataclass(frozen=True, slots=True)
class Flow:
    """An arrow between two boxes, named by them, in the diagram's unit and never negative.

    ``kind`` is ``heat``, ``work``, ``energy`` (heat and work together) or ``entropy``. More arrives than leaves where
    entropy is generated on the way.
    """

    source: str
    target: str
    label: str
    kind: str
    leaves: float
    arrives: float


@dataclass(frozen=True, slots=True)
class FlowDiagram:
    """What passes between the bodies of one process, and between them and what is around them; recomputed."""

    process: str
    kind: str  # "energy" | "entropy"
    unit: str
    boxes: tuple[FlowBox, ...]
    flows: tuple[Flow, ...]

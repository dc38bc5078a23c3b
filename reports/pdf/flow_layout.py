"""Where the boxes and arrows of a flow diagram stand, in points of the page; arrows are as wide as what flows."""

from __future__ import annotations

import math
from collections.abc import Sequence
from dataclasses import dataclass
from typing import Final

from checker.figures import Flow, FlowBox, FlowDiagram
from reports.pdf.labels import Box
from reports.pdf.styles import TEXT_WIDTH

WIDTH: Final = TEXT_WIDTH
BOX_WIDTH: Final = 92.0
NARROW_BOX: Final = 76.0
"""Width of a box where there are many columns. [pt]"""
WIDEST: Final = 46.0
"""Width of the largest flow. [pt]"""
ROOM: Final = 40.0
"""Least height beside a box for one arrow with its two lines of text. [pt]"""
_LEAST_BOX: Final = 30.0
_GAP: Final = 14.0
_FARTHEST: Final = 290.0
"""From a column to the next. [pt]"""
_MOST_COLUMNS: Final = 4
_HIGHEST: Final = 560.0
"""A page holds no higher picture with its heading. [pt]"""
_LEAST, _MOST = 1e-15, 1e15
"""Amounts beyond have no scale."""


@dataclass(frozen=True, slots=True)
class PlacedBox:
    """A box with its place."""

    box: FlowBox
    place: Box


@dataclass(frozen=True, slots=True)
class PlacedFlow:
    """An arrow from one side of a box to another; ``start`` and ``end`` are the middles of its ends, with widths."""

    flow: Flow
    start: tuple[float, float]
    end: tuple[float, float]
    start_width: float
    end_width: float


@dataclass(frozen=True, slots=True)
class FlowPlan:
    """A whole diagram; ``scale`` in points for each unit of what flows."""

    boxes: tuple[PlacedBox, ...]
    flows: tuple[PlacedFlow, ...]
    height: float
    scale: float


def flow_plan(diagram: FlowDiagram) -> FlowPlan | None:
    """Return the places, or None where nothing can be drawn: no flow or number, boxes that are not there, no room."""
    boxes = {box.name: box for box in diagram.boxes}
    flows = [flow for flow in diagram.flows if _drawable(flow, boxes)]
    largest = max((max(flow.leaves, flow.arrives) for flow in flows), default=0.0)
    if not flows or len(flows) < len(diagram.flows) or not _LEAST < largest < _MOST:
        return None
    columns = _columns(list(boxes), flows)
    if max(columns.values()) >= _MOST_COLUMNS:
        return None
    scale = WIDEST / largest
    places, height = _places(boxes, columns, flows, scale)
    if height > _HIGHEST:
        return None
    return FlowPlan(
        tuple(PlacedBox(boxes[name], place) for name, place in places.items()),
        tuple(_attached(flows, columns, places, scale)),
        height,
        scale,
    )


def _drawable(flow: Flow, boxes: dict[str, FlowBox]) -> bool:
    known = flow.source in boxes and flow.target in boxes and flow.source != flow.target
    return known and all(math.isfinite(value) and value >= 0.0 for value in (flow.leaves, flow.arrives))


def _columns(names: Sequence[str], flows: Sequence[Flow]) -> dict[str, int]:
    """Return the column of every box: right of all that feed it; what is fed by nothing stands beside what it feeds.

    Where flows run both ways between two boxes, the greater one decides, and in a ring the walk ends after as many
    rounds as there are boxes.
    """
    net: dict[tuple[str, str], float] = {}
    for flow in flows:
        net[flow.source, flow.target] = net.get((flow.source, flow.target), 0.0) + flow.arrives
    ahead = [pair for pair in net if net[pair] >= net.get((pair[1], pair[0]), 0.0)]
    forward = [(a, b) for a, b in ahead if (b, a) not in ahead or a < b]
    columns = dict.fromkeys(names, 0)
    for _ in names:
        for source, target in forward:
            columns[target] = max(columns[target], min(columns[source] + 1, len(names)))
    fed = {target for _, target in forward}
    for source in dict.fromkeys(source for source, _ in forward):
        if source not in fed:
            columns[source] = min(columns[b] for a, b in forward if a == source) - 1
    return columns


def _places(
    boxes: dict[str, FlowBox], columns: dict[str, int], flows: Sequence[Flow], scale: float
) -> tuple[dict[str, Box], float]:
    """Return the boxes, those of a column on top of each other and in the middle of the height."""
    used = sorted(set(columns.values()))
    sizes = {name: max(_LEAST_BOX, *_sides(name, columns, flows, scale)) for name in boxes}
    stacks = [[name for name in boxes if columns[name] == column] for column in used]
    stacks = _untangled(stacks, flows)
    heights = [sum(sizes[name] for name in stack) + _GAP * (len(stack) - 1) for stack in stacks]
    total = max(heights)
    box = BOX_WIDTH if len(used) < _MOST_COLUMNS else NARROW_BOX
    step = min(_FARTHEST, (WIDTH - box) / max(1, len(used) - 1))
    places: dict[str, Box] = {}
    for number, (stack, height) in enumerate(zip(stacks, heights, strict=True)):
        top = total - (total - height) / 2
        for name in stack:
            places[name] = Box(number * step, top - sizes[name], number * step + box, top)
            top -= sizes[name] + _GAP
    return places, total


def _untangled(stacks: list[list[str]], flows: Sequence[Flow]) -> list[list[str]]:
    """Return the columns with their boxes in the order of what they are joined to on the left."""
    order = {name: float(place) for stack in stacks for place, name in enumerate(stack)}
    for stack in stacks[1:]:
        for name in stack:
            near = [order[flow.source] for flow in flows if flow.target == name and flow.source not in stack]
            order[name] = sum(near) / len(near) if near else order[name]
        stack.sort(key=lambda name: order[name])
        order.update({name: float(place) for place, name in enumerate(stack)})
    return stacks


def _on_right(name: str, flow: Flow, columns: dict[str, int]) -> bool:
    other = flow.target if flow.source == name else flow.source
    return columns[other] > columns[name]


def _width(name: str, flow: Flow, scale: float) -> float:
    return scale * (flow.leaves if flow.source == name else flow.arrives)


def _sides(name: str, columns: dict[str, int], flows: Sequence[Flow], scale: float) -> tuple[float, float]:
    """Return the height that the arrows of a box take on its left and on its right."""
    taken = [0.0, 0.0]
    for flow in flows:
        if name in (flow.source, flow.target):
            taken[_on_right(name, flow, columns)] += max(ROOM, _width(name, flow, scale))
    return taken[0], taken[1]


def _attached(
    flows: Sequence[Flow], columns: dict[str, int], places: dict[str, Box], scale: float
) -> list[PlacedFlow]:
    """Return the arrows, on each side of a box in the order of their other ends, so that they do not cross there."""
    ends: dict[tuple[int, str], tuple[float, float]] = {}
    for name, place in places.items():
        for right in (False, True):
            here = [
                (number, flow)
                for number, flow in enumerate(flows)
                if name in (flow.source, flow.target) and _on_right(name, flow, columns) is right
            ]
            here.sort(key=lambda item: -_middle(places[_other(name, item[1])]))
            slots = [max(ROOM, _width(name, flow, scale)) for _, flow in here]
            y = (place.top + place.bottom + sum(slots)) / 2
            for (number, _), slot in zip(here, slots, strict=True):
                ends[number, name] = (place.right if right else place.left, y - slot / 2)
                y -= slot
    return [
        PlacedFlow(
            flow,
            ends[number, flow.source],
            ends[number, flow.target],
            scale * flow.leaves,
            scale * flow.arrives,
        )
        for number, flow in enumerate(flows)
    ]


def _other(name: str, flow: Flow) -> str:
    return flow.target if flow.source == name else flow.source


def _middle(place: Box) -> float:
    return (place.bottom + place.top) / 2

"""Flow diagrams: boxes for bodies and for what is around them, arrows as wide as what flows, and a scale.

Heat is grey, work is white, and what is generated on the way is dark, so that all three differ in black and white.
"""

from __future__ import annotations

import math
from collections.abc import Iterator, Sequence
from typing import Any, Final

from reportlab.lib.colors import white

from checker.figures import FlowBox, FlowDiagram
from reports.numbers import rounded, signed
from reports.pdf.flow_layout import FlowPlan, PlacedBox, PlacedFlow, flow_plan
from reports.pdf.fonts import BOLD, REGULAR
from reports.pdf.picture import LETTERS, Area, Element, Pen, Picture, Stroke, Words, words_width
from reports.pdf.styles import FAINT, MUTED, SHADE, TEXT_WIDTH
from reports.pdf.text import fitting

_TOP: Final = 20.0
_BELOW: Final = 26.0
_HEAD: Final = 9.0
"""Length of the point of an arrow. [pt]"""
_THIN: Final = 7.0
"""An arrow narrower than this has a point that is wider than itself, so that it can be seen."""
_BENDS: Final = 12
_BEND: Final = 10.0
"""A band whose ends differ by more in height bends so much that a text above its middle would lie on it. [pt]"""
_LINE: Final = 8.4
_FILLS: Final = {"work": white, "generation": MUTED}
_EDGES: Final = {"body": Pen(1.0), "outside": Pen(0.6, dash=(2.5, 2)), "meeting": Pen(0.6, dash=(1, 1.5))}
_WORDS: Final = {"energy": "heat and work", "entropy": ""}
_SYMBOLS: Final = {"energy": "ΔE", "entropy": "ΔS"}


def flow_blocks(diagrams: Sequence[FlowDiagram]) -> list[list[Any]]:
    """Return one block for each diagram that can be drawn."""
    return [[picture] for picture in map(draw_flows, diagrams) if picture is not None]


def draw_flows(diagram: FlowDiagram) -> Picture | None:
    """Return a flow diagram as a picture, or None where it has nothing to show."""
    plan = flow_plan(diagram)
    if plan is None:
        return None
    title = fitting(
        f"{diagram.kind.capitalize()} flow of {diagram.process}, recomputed", BOLD, LETTERS, TEXT_WIDTH
    )
    elements: list[Element] = [Words(0, plan.height + _TOP - 9, title, font=BOLD)]
    for placed in plan.flows:
        elements += _arrow(placed)
    for placed_box in plan.boxes:
        elements += _box(placed_box, diagram)
    for placed in plan.flows:
        elements += _label(placed, diagram.unit)
    elements += _scale(plan, diagram)
    return Picture(TEXT_WIDTH, plan.height + _TOP, _BELOW, elements)


def _arrow(placed: PlacedFlow) -> Iterator[Element]:
    """Yield the band of a flow with its point, and dark what is generated on the way."""
    flow = placed.flow
    before, after = placed.start_width, placed.end_width
    fill = _FILLS.get("generation" if flow.source == "generation" else flow.kind, FAINT)
    if after > before > 0.0:
        yield Area(_outline(placed, before, after), _FILLS["generation"], Pen(0.4))
        yield Area(_outline(placed, before, before), fill, Pen(0.4))
    else:
        yield Area(_outline(placed, before, after), fill, Pen(0.5))


def _outline(placed: PlacedFlow, before: float, after: float) -> list[tuple[float, float]]:
    """Return a band whose lower edge is that of the whole, and whose width goes from one value to another."""
    (x1, y1), (x2, y2) = placed.start, placed.end
    ahead = math.copysign(1.0, x2 - x1)
    neck = x2 - ahead * min(_HEAD, abs(x2 - x1) / 3)
    low1, low2 = y1 - placed.start_width / 2, y2 - placed.end_width / 2
    lower, upper = [], []
    for i in range(_BENDS + 1):
        part = i / _BENDS
        smooth = part * part * (3.0 - 2.0 * part)
        x, low = x1 + part * (neck - x1), low1 + smooth * (low2 - low1)
        lower.append((x, low))
        upper.append((x, low + before + smooth * (after - before)))
    middle = low2 + after / 2
    flare = max(0.0, (_THIN - after) / 2) if after <= _THIN else 0.0
    point = [(neck, low2 - flare), (x2, middle), (neck, low2 + after + flare)]
    return [*lower, *point, *reversed(upper)]


def _label(placed: PlacedFlow, unit: str) -> Iterator[Element]:
    """Yield what flows and how much: inside a wide band, else above it, or below one that comes from above."""
    flow = placed.flow
    if flow.arrives > flow.leaves * (1 + 1e-9) > 0.0:
        yield from _growth(placed, unit)
        return
    (x1, y1), (x2, y2) = placed.start, placed.end
    name = _WORDS.get(flow.kind, flow.kind) if flow.label == flow.kind else flow.label
    lines = [line for line in (name, _amount(flow.leaves, unit)) if line]
    tall, wide = _LINE * len(lines), (placed.start_width + placed.end_width) / 2
    inside = wide >= tall + 3
    off = wide / 2 + tall / 2 + 2.5
    middle = (y1 + y2) / 2
    if not inside:  # beside the end of a band that bends, on the side that it does not come from
        middle = y2 - off if y1 - y2 > _BEND else max(y2, middle) + off
    dark = flow.source == "generation"
    yield from _lines((x1 + x2) / 2, middle, lines, abs(x2 - x1) - 6, backed=dark and inside)


def _growth(placed: PlacedFlow, unit: str) -> Iterator[Element]:
    """Yield what leaves at one end, what arrives at the other, and above the band what is generated on the way."""
    flow = placed.flow
    (x1, y1), (x2, y2) = placed.start, placed.end
    generated = f"generated: {_amount(flow.arrives - flow.leaves, unit)}"
    top = (y1 + y2) / 2 + (placed.start_width + placed.end_width) / 4
    room = abs(x2 - x1) / 2 - 8
    yield from _lines((x1 + x2) / 2, top + _LINE / 2 + 3, [generated], abs(x2 - x1) - 6, backed=False)
    for share, height, word, amount in (
        (0.26, y1 + (y2 - y1) * 0.2 + (placed.start_width - placed.end_width) * 0.06, "leaves", flow.leaves),
        (0.72, y1 + (y2 - y1) * 0.8, "arrives", flow.arrives),
    ):
        wide = placed.start_width if word == "leaves" else placed.end_width
        lines = [word, _amount(amount, unit)]
        thin = wide < _LINE * 2 + 3
        middle = height - (wide / 2 + _LINE + 2.5 if thin else 0.0)
        yield from _lines(x1 + share * (x2 - x1), middle, lines, room, backed=word == "arrives" and not thin)


def _amount(value: float, unit: str) -> str:
    return f"{rounded(value, 4)} {unit}".rstrip()


def _lines(x: float, middle: float, lines: Sequence[str], room: float, *, backed: bool) -> Iterator[Element]:
    """Yield lines of text around a middle, on paper where they would lie on something dark."""
    for number, line in enumerate(lines):
        text = fitting(line, REGULAR, LETTERS, room)
        y = middle + _LINE * (len(lines) / 2 - number - 1) + 2.2
        if backed:
            half = words_width(text) / 2 + 1.5
            corners = [(x - half, y - 2), (x + half, y - 2), (x + half, y + 6.2), (x - half, y + 6.2)]
            yield Area(corners, white)
        yield Words(x, y, text, 0.5)


def _box(placed: PlacedBox, diagram: FlowDiagram) -> Iterator[Element]:
    box, place = placed.box, placed.place
    corners = [
        (place.left, place.bottom),
        (place.right, place.bottom),
        (place.right, place.top),
        (place.left, place.top),
    ]
    yield Area(corners, SHADE if box.kind == "body" else white)
    edge = _EDGES.get(box.kind, Pen(1.0, MUTED))
    yield Stroke([*corners, corners[0]], edge)
    lines = list(_box_lines(box, diagram))
    x, y = (place.left + place.right) / 2, (place.bottom + place.top) / 2 + _LINE * len(lines) / 2
    for number, line in enumerate(lines):
        font = BOLD if number == 0 and box.kind == "body" else REGULAR
        text = fitting(line, font, LETTERS, place.right - place.left - 6)
        yield Words(x, y - _LINE * (number + 1) + 2.2, text, 0.5, font)


def _box_lines(box: FlowBox, diagram: FlowDiagram) -> Iterator[str]:
    yield box.label or box.name
    if box.change is not None and math.isfinite(box.change):
        symbol = _SYMBOLS.get(diagram.kind, "")
        yield f"{symbol} = {signed(box.change, 4)} {diagram.unit}".strip()


def _scale(plan: FlowPlan, diagram: FlowDiagram) -> Iterator[Element]:
    """Yield a bar of a round amount, as high as an arrow of it is wide, and what the fills mean."""
    amount = _round_amount(18.0 / plan.scale)
    high = amount * plan.scale
    y = -_BELOW + 4
    yield Stroke([(2, y), (2, y + high)], Pen(1.4))
    for level in (y, y + high):
        yield Stroke([(0, level), (4, level)], Pen(0.6))
    text = f"{rounded(amount, 1)} {diagram.unit} to scale".strip()
    yield Words(9, y + high / 2 - 2.5, text)
    x = 9 + words_width(text) + 18
    for fill, name in _legend(diagram):
        corners = [(x, y + 4), (x + 14, y + 4), (x + 14, y + 11), (x, y + 11)]
        yield Area(corners, fill, Pen(0.5))
        yield Words(x + 18, y + 5, name)
        x += 18 + words_width(name) + 16


def _legend(diagram: FlowDiagram) -> Iterator[tuple[Any, str]]:
    if diagram.kind == "entropy":
        yield FAINT, "entropy that passes"
        yield MUTED, "entropy generated"
        return
    kinds = {flow.kind for flow in diagram.flows}
    for kind, fill, name in (
        ("heat", FAINT, "heat"),
        ("work", white, "work"),
        ("energy", FAINT, "heat and work, not told apart"),
    ):
        if kind in kinds:
            yield fill, name


def _round_amount(about: float) -> float:
    """Return 1, 2 or 5 times a power of ten, at most ``about``."""
    power = 10.0 ** math.floor(math.log10(about))
    return next(factor for factor in (5.0 * power, 2.0 * power, power) if factor <= about * (1 + 1e-9))

"""Flow diagrams: arrows to scale, boxes apart from each other, texts inside the page."""

from __future__ import annotations

import itertools
import math
from dataclasses import replace

import pytest
from hypothesis import given

from checker.figures import Flow, FlowBox, FlowDiagram
from reports.pdf.flow_layout import WIDEST, FlowPlan, flow_plan
from reports.pdf.flows import draw_flows, flow_blocks
from reports.pdf.picture import Area, Picture, Stroke, Words, words_width
from reports.pdf.styles import MUTED, TEXT_WIDTH
from tests.reports.sample_several import GROWTH, HEAT, JACKET, MEETING, OIL, RING
from tests.reports.strategies import NO_SHRINKING, of_type

ALL = pytest.mark.parametrize(
    "diagram", [HEAT, GROWTH, JACKET, MEETING], ids=["heat", "growth", "jacket", "meeting"]
)


def planned(diagram: FlowDiagram) -> FlowPlan:
    """Return the layout of a diagram."""
    plan = flow_plan(diagram)
    assert plan is not None
    return plan


def picture(diagram: FlowDiagram) -> Picture:
    """Return a diagram as it is drawn."""
    drawn = draw_flows(diagram)
    assert drawn is not None
    return drawn


def texts(diagram: FlowDiagram) -> list[str]:
    """Return the texts of a diagram."""
    return [element.text for element in picture(diagram).elements if isinstance(element, Words)]


@ALL
def test_arrows_are_to_scale(diagram: FlowDiagram) -> None:
    """Every width is its amount times one scale, and the greatest has the greatest width."""
    plan = planned(diagram)
    for placed in plan.flows:
        assert placed.start_width == pytest.approx(plan.scale * placed.flow.leaves)
        assert placed.end_width == pytest.approx(plan.scale * placed.flow.arrives)
    assert max(placed.end_width for placed in plan.flows) == pytest.approx(WIDEST)


@ALL
def test_the_scale_bar_is_as_high_as_its_amount_is_wide(diagram: FlowDiagram) -> None:
    """The bar beside ``… to scale`` has the length of that amount."""
    amount = next(float(text.split()[0]) for text in texts(diagram) if text.endswith("to scale"))
    bars = [e for e in picture(diagram).elements if isinstance(e, Stroke) and e.pen.width == 1.4]
    (x1, y1), (x2, y2) = bars[0].points
    assert x1 == x2
    assert y2 - y1 == pytest.approx(amount * planned(diagram).scale)


@ALL
def test_drawn_bands_have_the_width_of_their_flow(diagram: FlowDiagram) -> None:
    """Where a band leaves its box it is as high as what leaves."""
    plan = planned(diagram)
    areas = [element for element in picture(diagram).elements if isinstance(element, Area) and element.edge]
    starts = [abs(area.points[0][1] - area.points[-1][1]) for area in areas]
    for placed in plan.flows:
        assert any(start == pytest.approx(placed.start_width) for start in starts)


@ALL
def test_boxes_do_not_overlap_and_hold_their_arrows(diagram: FlowDiagram) -> None:
    """Boxes stand apart, and every arrow begins and ends at the side of its box, within its height."""
    plan = planned(diagram)
    places = {placed.box.name: placed.place for placed in plan.boxes}
    for a, b in itertools.combinations(places.values(), 2):
        assert a.overlap(b) == 0.0
    for placed in plan.flows:
        for name, (x, y), wide in (
            (placed.flow.source, placed.start, placed.start_width),
            (placed.flow.target, placed.end, placed.end_width),
        ):
            assert x in (places[name].left, places[name].right)
            assert places[name].bottom - 1e-9 <= y - wide / 2
            assert y + wide / 2 <= places[name].top + 1e-9


@ALL
def test_nothing_is_cut(diagram: FlowDiagram) -> None:
    """All texts are whole and lie inside the picture."""
    drawn = picture(diagram)
    for element in drawn.elements:
        if isinstance(element, Words):
            wide = words_width(element.text, element.font)
            left = element.x - element.anchor * wide
            assert "…" not in element.text
            assert left >= -1e-6
            assert left + wide <= TEXT_WIDTH + 1e-6
            assert -30 < element.y < drawn.height - 20


def test_amounts_stand_on_the_arrows_with_their_units() -> None:
    """Boxes tell the change of the body, arrows what flows."""
    shown = texts(JACKET)
    for expected in (
        "drum",
        "ΔE = +2.000 MJ",
        "50.00 MJ",
        "boundary work",
        "0.5000 MJ",
        "jacket",
        "heat",
        "work",
    ):
        assert expected in shown


def test_what_is_generated_on_the_way_is_a_dark_wedge() -> None:
    """The band of 1.0 kJ/K grows by 0.5 kJ/K, which is drawn dark and written above it."""
    shown = texts(GROWTH)
    assert "generated: 0.5000 kJ/K" in shown
    assert [text for text in shown if text in ("1.000 kJ/K", "1.500 kJ/K")] == ["1.000 kJ/K", "1.500 kJ/K"]
    dark = [e for e in picture(GROWTH).elements if isinstance(e, Area) and e.fill == MUTED]
    assert len(dark) == 2  # the wedge and its sample in the legend


def test_sources_stand_left_and_what_takes_stands_right() -> None:
    """Three columns: the jacket, the bodies, what the water works against."""
    places = {placed.box.name: placed.place for placed in planned(JACKET).boxes}
    assert places["heat jacket"].right < places["drum"].left
    assert places["drum"].left == places["water"].left
    assert places["water"].right < places["boundary water"].left


def test_flows_both_ways_face_each_other() -> None:
    """The smaller one runs back through the same gap."""
    both = replace(HEAT, flows=(*HEAT.flows, Flow("oil", "ring", "work", "work", 100.0, 100.0)))
    there, back = planned(both).flows
    assert there.start[0] < there.end[0]
    assert back.start[0] > back.end[0]


@pytest.mark.parametrize(
    "flow",
    [
        Flow("ring", "nowhere", "x", "heat", 1.0, 1.0),
        Flow("ring", "ring", "x", "heat", 1.0, 1.0),
        Flow("ring", "oil", "x", "heat", math.nan, 1.0),
        Flow("ring", "oil", "x", "heat", 0.0, 0.0),
    ],
    ids=["no such box", "to itself", "not a number", "nothing"],
)
def test_what_cannot_be_drawn_is_left_out(flow: Flow) -> None:
    """A diagram is drawn as a whole or not at all."""
    diagram = FlowDiagram("p", "energy", "kJ", (RING, OIL), (flow,))
    assert draw_flows(diagram) is None
    assert flow_blocks([diagram]) == []


def test_a_diagram_that_no_page_holds_is_left_out() -> None:
    """A page must not be lost for a figure: thirty sources of one body are too many, eight are not."""
    for number, drawable in ((8, True), (30, False)):
        boxes = (OIL, *(FlowBox(f"s{i}", f"s{i}", "outside") for i in range(number)))
        flows = tuple(Flow(f"s{i}", "oil", "heat", "heat", 1.0, 1.0) for i in range(number))
        assert (flow_plan(FlowDiagram("p", "energy", "kJ", boxes, flows)) is not None) is drawable


def test_a_ring_of_bodies_ends() -> None:
    """Flows in a circle have no order from left to right; there is a layout or none, but an end."""
    names = ("a", "b", "c")
    boxes = tuple(FlowBox(name, name, "body", 0.0) for name in names)
    flows = tuple(Flow(a, b, "heat", "heat", 1.0, 1.0) for a, b in zip(names, ("b", "c", "a"), strict=True))
    plan = flow_plan(FlowDiagram("p", "energy", "kJ", boxes, flows))
    assert plan is None or len(plan.boxes) == 3


@NO_SHRINKING
@given(of_type(FlowDiagram))
def test_any_flow_diagram_is_drawn_or_left_out(diagram: FlowDiagram) -> None:
    """Whatever it holds, its picture has finite points only."""
    drawn = draw_flows(diagram)
    for element in drawn.elements if drawn else ():
        if isinstance(element, Area | Stroke):
            assert all(math.isfinite(x) and math.isfinite(y) for x, y in element.points)

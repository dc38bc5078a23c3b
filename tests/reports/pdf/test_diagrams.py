"""Diagrams: what they show, and that they never fail."""

from __future__ import annotations

import math
from dataclasses import replace

import pytest
from hypothesis import given

from checker.figures import Curve, Diagram, Marker
from reports.pdf.diagrams import diagram_rows, draw
from reports.pdf.picture import Picture, Sign, Stroke, Words
from reports.pdf.plot import FRAME, plot
from reports.pdf.styles import MUTED
from tests.reports.sample_curves import bottle_diagrams, cylinder_diagrams
from tests.reports.strategies import NO_SHRINKING, of_type

PV, TS = cylinder_diagrams()
BARE = Diagram("T-s", "gas", "s", "T", False, False, (), ())


def texts(picture: Picture | None) -> list[str]:
    """Return the texts of a picture."""
    assert picture is not None
    return [element.text for element in picture.elements if isinstance(element, Words)]


def test_shows_axes_curves_states_and_legend() -> None:
    """The p–v diagram names its axes, its states and its curves, and has powers of ten as ticks."""
    shown = texts(draw(PV))
    for expected in (
        "p–v diagram of steam", "p [bar]", "v [m³/kg]", "wet", "superheated", "state as recomputed", "state as stated",
        "saturation line", "expansion: constant pressure", "0.01", "100",
    ):  # fmt: skip
        assert expected in shown


def test_recomputed_and_stated_states_differ_by_shape() -> None:
    """Two signs are recomputed and one is stated, besides the two of the legend."""
    picture = draw(TS)
    assert picture is not None
    styles = [element.style for element in picture.elements if isinstance(element, Sign)]
    assert sorted(styles) == ["recomputed"] * 3 + ["stated"] * 2


def test_paths_differ_by_their_dash_and_the_dome_by_its_grey() -> None:
    """Two paths have different dashes; the saturation line is thin and grey."""
    second = Curve("second", "path", ((1.0, 2.0), (3.0, 4.0)))
    picture = draw(replace(PV, curves=(*PV.curves, second)))
    assert picture is not None
    pens = {element.pen for element in picture.elements if isinstance(element, Stroke)}
    assert {pen.dash for pen in pens if pen.width == 1.3} == {(), (5, 2.5)}
    assert any(pen.colour == MUTED and pen.width == 0.6 for pen in pens)


def test_a_stated_state_far_from_the_recomputed_one_is_named() -> None:
    """Near together they share a label; apart, the stated one has its own."""
    near = Diagram("T-s", "gas", "s", "T", False, False, (), (
        Marker("a", "recomputed", 0.0, 0.0), Marker("b", "recomputed", 1.0, 1.0), Marker("b", "stated", 1.01, 1.0),
    ))  # fmt: skip
    assert "b (stated)" not in texts(draw(near))
    apart = replace(near, markers=(*near.markers[:2], Marker("b", "stated", 0.5, 1.0)))
    assert "b (stated)" in texts(draw(apart))


def test_states_at_one_point_share_a_label() -> None:
    """The end of a cycle is its start."""
    cycle = replace(
        BARE, markers=(Marker("start", "recomputed", 1.0, 1.0), Marker("end", "recomputed", 1.0, 1.0))
    )
    assert "start, end" in texts(draw(cycle))


def test_everything_lies_inside_the_frame() -> None:
    """Curves are cut to the frame, and states lie in it."""
    for diagram in (*bottle_diagrams(), *cylinder_diagrams()):
        shown = plot(diagram)
        assert shown is not None
        points = [p for _, pieces in shown.curves for piece in pieces for p in piece]
        points += [p for _, p in shown.marks]
        assert len(points) > 10
        for x, y in points:
            assert FRAME.left - 1e-6 <= x <= FRAME.right + 1e-6
            assert FRAME.bottom - 1e-6 <= y <= FRAME.top + 1e-6


def test_states_do_not_shrink_to_a_speck() -> None:
    """The states of the bottle, far above the saturation line, still take a part of the height."""
    shown = plot(bottle_diagrams()[0])
    assert shown is not None
    heights = [y for _, (_, y) in shown.marks]
    assert max(heights) - min(heights) > 10


@pytest.mark.parametrize(
    "diagram",
    [
        BARE,
        replace(PV, markers=(), curves=PV.curves[:1]),
        replace(BARE, log_x=True, markers=(Marker("a", "stated", -1.0, 1.0),)),
        replace(BARE, markers=(Marker("a", "stated", math.nan, 1.0),)),
    ],
    ids=["nothing", "saturation line alone", "negative on a logarithmic axis", "not a number"],
)
def test_what_has_nothing_to_show_is_left_out(diagram: Diagram) -> None:
    """Without a state or a path that can be drawn there is no diagram."""
    assert draw(diagram) is None
    assert diagram_rows([diagram]) == []


@NO_SHRINKING
@given(of_type(Diagram))
def test_any_diagram_is_drawn_or_left_out(diagram: Diagram) -> None:
    """Whatever numbers a diagram holds, it is drawn in finite points or left out."""
    picture = draw(diagram)
    for element in picture.elements if picture else ():
        if isinstance(element, Stroke):
            assert all(math.isfinite(x) and math.isfinite(y) for x, y in element.points)

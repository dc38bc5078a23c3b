"""Arrows on paths and the area inside a cycle."""

from __future__ import annotations

import math
from dataclasses import replace

import pytest

from checker.figures import Curve
from reports.pdf.diagrams import draw
from reports.pdf.directions import arrow_heads, enclosed
from reports.pdf.picture import Area
from reports.pdf.plot import plot
from reports.pdf.styles import INK, SHADE
from tests.reports.sample_several import SQUARE

STRAIGHT = Curve("way", "path", ())


def test_an_arrow_points_along_its_path() -> None:
    """On a way to the right its point lies right of its base, in the middle of the way."""
    ((tip, upper, lower),) = arrow_heads([(STRAIGHT, [((0.0, 5.0), (100.0, 5.0))])])
    assert tip[0] > upper[0] == lower[0]
    assert (tip[0] + upper[0]) / 2 == pytest.approx(50.0)
    assert sorted((upper[1], lower[1])) == pytest.approx([2.6, 7.4])


def test_a_short_path_and_the_saturation_line_have_no_arrow() -> None:
    """An arrow would hide the one; the other has no direction."""
    dome = replace(STRAIGHT, style="dome")
    assert list(arrow_heads([(STRAIGHT, [((0.0, 0.0), (10.0, 0.0))])])) == []
    assert list(arrow_heads([(dome, [((0.0, 0.0), (100.0, 0.0))])])) == []


def test_a_cycle_encloses_its_area() -> None:
    """The four ways of the square join end to end, and the last one ends where the first begins."""
    shown = plot(SQUARE)
    assert shown is not None
    corners = enclosed(shown.curves)
    assert corners[0] == pytest.approx(corners[-1])
    for (_, before), (_, after) in zip(shown.curves, shown.curves[1:], strict=False):
        assert before[0][-1] == pytest.approx(after[0][0])
    xs, ys = [p[0] for p in corners], [p[1] for p in corners]
    twice = sum(xs[i - 1] * ys[i] - xs[i] * ys[i - 1] for i in range(len(corners)))  # the surveyor's formula
    assert abs(twice) / 2 == pytest.approx((max(xs) - min(xs)) * (max(ys) - min(ys)))


def test_a_closed_figure_is_filled_and_has_four_arrows() -> None:
    """An open one has its arrows alone."""
    for closed, fills in ((True, 1), (False, 0)):
        picture = draw(replace(SQUARE, closed=closed))
        assert picture is not None
        areas = [element for element in picture.elements if isinstance(element, Area)]
        assert sum(area.fill == SHADE for area in areas) == fills
        assert sum(area.fill == INK for area in areas) == 4


def test_chords_enclose_nothing() -> None:
    """Where a process is no line of states, the area has no meaning."""
    shown = plot(replace(SQUARE, curves=(replace(SQUARE.curves[0], style="chord"), *SQUARE.curves[1:])))
    assert shown is not None
    assert enclosed(shown.curves) == []


def test_labels_of_states_keep_off_the_arrows() -> None:
    """No letter lies on an arrow of the square."""
    picture = draw(SQUARE)
    assert picture is not None
    tips = [e.points[0] for e in picture.elements if isinstance(e, Area) and e.fill == INK]
    places = [(e.x, e.y) for e in picture.elements if getattr(e, "text", "") in ("a", "b", "c", "d")]
    assert len(places) == 4
    assert min(math.dist(tip, place) for tip in tips for place in places) > 8

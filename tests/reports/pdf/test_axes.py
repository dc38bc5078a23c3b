"""Axes and ticks of diagrams."""

from __future__ import annotations

import math

import pytest
from hypothesis import given
from hypothesis import strategies as st

from reports.pdf.axes import Axis, Extent, axis, extent, usable

VALUES = st.floats(-1e9, 1e9)
POSITIVE = st.floats(1e-9, 1e9)


@pytest.mark.parametrize(
    ("low", "high", "texts"),
    [
        (0.0, 100.0, ["0", "20", "40", "60", "80", "100"]),
        (-21.0, 402.0, ["0", "100", "200", "300", "400"]),
        (5.2, 5.35, ["5.20", "5.25", "5.30", "5.35"]),
        (-0.1, 0.1, ["−0.10", "−0.05", "0.00", "0.05", "0.10"]),
        (0.0, 2.5e7, ["0", "5×10⁶", "10⁷", "1.5×10⁷", "2×10⁷", "2.5×10⁷"]),
    ],
)
def test_linear_ticks_are_round(low: float, high: float, texts: list[str]) -> None:
    """Ticks are multiples of 1, 2 or 5, with the same decimals along an axis."""
    assert [text for _, text in Axis(low, high, log=False).ticks()] == texts


@pytest.mark.parametrize(
    ("low", "high", "texts"),
    [
        (1e-3, 100.0, ["0.001", "0.01", "0.1", "1", "10", "100"]),
        (0.9, 110.0, ["1", "10", "100"]),
        (0.5, 60.0, ["1", "3", "10", "30"]),
        (0.95, 11.0, ["1", "3", "10"]),
        (150.0, 181.0, ["150", "160", "170", "180"]),
        (1e-9, 1e-3, ["10⁻⁹", "10⁻⁸", "10⁻⁷", "10⁻⁶", "10⁻⁵", "0.0001", "0.001"]),
    ],
)
def test_logarithmic_ticks_follow_the_span(low: float, high: float, texts: list[str]) -> None:
    """Decades for wide spans, 1 and 3 or 1, 2 and 5 for narrower ones, round numbers within one decade."""
    # A hair wider than the ends, since their logarithms are rounded.
    shown = Axis(math.log10(low) - 1e-9, math.log10(high) + 1e-9, log=True).ticks()
    assert [text for _, text in shown] == texts


@given(VALUES, VALUES)
def test_an_axis_holds_its_values_and_few_ticks(first: float, second: float) -> None:
    """Whatever the values, they lie inside, ticks rise along the axis, and there are neither none nor many."""
    made = axis(extent([first, second], [], log=False), log=False)
    assert 0 < made.place(first) < 1
    assert 0 < made.place(second) < 1
    places = [place for place, _ in made.ticks()]
    assert 2 <= len(places) <= 11
    assert places == sorted(places)


@given(POSITIVE, POSITIVE)
def test_a_logarithmic_axis_holds_its_values(first: float, second: float) -> None:
    """The same on a logarithmic axis, down to equal values."""
    made = axis(extent([first, second], [], log=True), log=True)
    assert 0 < made.place(first) < 1
    assert 0 < made.place(second) < 1
    assert 1 <= len(made.ticks()) <= 11


@pytest.mark.parametrize(
    ("value", "log", "answer"),
    [(1.0, True, True), (0.0, True, False), (-1.0, True, False), (-1.0, False, True), (math.nan, False, False),
     (math.inf, True, False), (1e300, False, False)],
)  # fmt: skip
def test_only_what_can_be_drawn_is_used(value: float, log: bool, answer: bool) -> None:
    """Values that are not finite, and on logarithmic axes not positive, are left out."""
    assert usable(value, log) is answer


def test_zooming_keeps_the_states_inside() -> None:
    """The zoomed extent holds the states, gives them their share, and does not exceed what there is."""
    zoomed = Extent((9.0, 10.0), (0.0, 100.0)).zoomed(0.1)
    assert zoomed.all == (4.5, 14.5)
    at_the_edge = Extent((0.0, 1.0), (0.0, 100.0)).zoomed(0.1)
    assert at_the_edge.all == (0.0, 10.0)
    at_the_top = Extent((99.0, 100.0), (0.0, 100.0)).zoomed(0.1)
    assert at_the_top.all == (90.0, 100.0)

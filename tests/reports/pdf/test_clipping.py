"""Curves cut to the frame."""

from __future__ import annotations

import pytest
from hypothesis import given
from hypothesis import strategies as st

from reports.pdf.clipping import MOST_POINTS, Point, clipped, thinned

POINTS = st.lists(st.tuples(st.floats(-5, 5), st.floats(-5, 5)), max_size=30)


@pytest.mark.parametrize(
    ("points", "pieces"),
    [
        ([(0.2, 0.2), (0.8, 0.8)], [[(0.2, 0.2), (0.8, 0.8)]]),
        ([(-1.0, 0.5), (2.0, 0.5)], [[(0.0, 0.5), (1.0, 0.5)]]),
        (
            [(0.5, 0.5), (0.5, 3.0), (0.6, 3.0), (0.6, 0.5)],
            [[(0.5, 0.5), (0.5, 1.0)], [(0.6, 1.0), (0.6, 0.5)]],
        ),
        ([(2.0, 2.0), (3.0, 3.0)], []),
        ([(0.1, 0.1), (0.2, 0.2), (0.3, 0.1)], [[(0.1, 0.1), (0.2, 0.2), (0.3, 0.1)]]),
        ([(0.1, 0.1)], []),
        ([], []),
    ],
)
def test_only_the_inside_remains(points: list[Point], pieces: list[list[Point]]) -> None:
    """A curve is cut at the frame; what leaves and returns is two pieces."""
    found = clipped(points)
    assert [len(piece) for piece in found] == [len(piece) for piece in pieces]
    for piece, expected in zip(found, pieces, strict=True):
        for point, (x, y) in zip(piece, expected, strict=True):
            assert point == pytest.approx((x, y))


@given(POINTS)
def test_no_piece_leaves_the_frame(points: list[Point]) -> None:
    """Every point of every piece lies in the unit square, up to rounding."""
    for piece in clipped(points):
        assert len(piece) >= 2
        assert all(-1e-9 <= x <= 1 + 1e-9 and -1e-9 <= y <= 1 + 1e-9 for x, y in piece)


@given(st.integers(0, 5000))
def test_thinning_keeps_the_ends(count: int) -> None:
    """Few points remain, the first and the last among them."""
    points = [(float(i), 0.0) for i in range(count)]
    kept = thinned(points)
    assert len(kept) <= MOST_POINTS
    assert kept[:1] == points[:1]
    assert kept[-1:] == points[-1:]

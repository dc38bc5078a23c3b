"""Places for labels."""

from __future__ import annotations

from reports.pdf.labels import Box, around, place_labels

FRAME = Box(0, 0, 200, 150)
SIZE = (30.0, 7.0)


def places(points: list[tuple[float, float]], taken: list[Box] | None = None) -> list[Box]:
    """Return the boxes of labels of one size at points."""
    wanted = [(x, y, SIZE[0]) for x, y in points]
    boxes = [*(taken or []), *(around(x, y, 4.5) for x, y in points)]
    return [box for box, _ in place_labels(wanted, SIZE[1], points, boxes, FRAME)]


def test_a_free_point_has_its_label_beside_it() -> None:
    """With nothing in the way, the label stands to the upper right."""
    (box,) = places([(50.0, 50.0)])
    assert 50 < box.left < 60
    assert 50 < box.bottom < 60


def test_labels_do_not_cover_each_other() -> None:
    """Six states close together have six separate labels, none on a sign of a state."""
    points = [(60.0 + 9 * i, 60.0 + 5 * i) for i in range(6)]
    boxes = places(points)
    signs = [around(x, y, 4.0) for x, y in points]
    assert all(a.overlap(b) == 0 for i, a in enumerate(boxes) for b in boxes[:i])
    assert all(box.overlap(sign) == 0 for box in boxes for sign in signs)


def test_labels_stay_in_the_frame() -> None:
    """In the corners the label turns inward."""
    for corner in ((1.0, 1.0), (199.0, 1.0), (1.0, 149.0), (199.0, 149.0)):
        (box,) = places([corner])
        assert box.outside(FRAME) == 0


def test_a_label_avoids_what_is_drawn() -> None:
    """A curve through the first choice moves the label elsewhere."""
    curve = [around(50.0 + 2 * i, 50.0 + 2 * i) for i in range(20)]
    (box,) = places([(50.0, 50.0)], curve)
    assert sum(map(box.overlap, curve)) == 0


def test_a_label_is_nearest_to_its_own_point() -> None:
    """Of two states above each other, each label is nearer to its own."""
    points = [(50.0, 60.0), (50.0, 48.0)]
    upper, lower = places(points)
    assert upper.distance(points[0]) < upper.distance(points[1])
    assert lower.distance(points[1]) < lower.distance(points[0])


def test_a_label_that_is_far_off_is_led_to() -> None:
    """Where only a far place is free, the caller is told to draw a line."""
    wall = [Box(30, 30, 70, 66)]
    ((box, far),) = place_labels([(50.0, 50.0, 30.0)], 7.0, [(50.0, 50.0)], wall, FRAME)
    assert far
    assert box.overlap(wall[0]) == 0

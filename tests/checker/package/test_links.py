"""Links between states of one record and of several."""

from __future__ import annotations

from collections.abc import Callable

import pytest

Read = Callable[..., object]


def record(name: str, a: str = "", b: str = "") -> str:
    """Return a record whose states link to what is given."""
    link_a, link_b = (f"{{same_as: {to}}}" if to else "{inputs: {temperature: 300 K}}" for to in (a, b))
    return (
        f"  - id: {name}\n"
        "    bodies: {gas: {substance: Air, model: ideal gas}}\n"
        f"    states: {{a: {{gas: {link_a}}}, b: {{gas: {link_b}}}}}\n"
        "    processes: [{id: p, from: a, to: b}]\n"
    )


def package(*records: str) -> str:
    """Return a package of records."""
    return "package: {number: X}\nrecords:\n" + "".join(records)


@pytest.mark.parametrize("link", ["records/one/states/b/gas", "states/b/gas"])
def test_links_are_written_out(read: Read, link: str) -> None:
    """A link without a record means the same one; the review always writes the record."""
    result = read(of=package(record("one", a=link)))
    assert result.problems == ()
    assert result.record.body_states["a", "gas"].same_as == "records/one/states/b/gas"
    assert result.record.body_states["b", "gas"].same_as is None


def test_links_across_records(read: Read) -> None:
    """A record may continue a state of a later one."""
    result = read(of=package(record("one", a="records/two/states/b/gas"), record("two")))
    assert result.problems == ()
    assert result.submission.records[0].body_states["a", "gas"].same_as == "records/two/states/b/gas"


def test_a_link_to_an_unreadable_record_is_not_wrong(read: Read) -> None:
    """Whether the other record can be read does not make the link a mistake of form."""
    broken = record("two").replace("from: a, ", "")
    result = read(of=package(record("one", a="records/two/states/b/gas"), broken))
    assert [r.id for r in result.submission.records] == ["one"]
    assert {problem.record for problem in result.problems} == {"two"}


@pytest.mark.parametrize(
    ("link", "says"),
    [
        ("records/three/states/b/gas", "record `three`"),
        ("records/two/states/c/gas", "state `c`"),
        ("records/two/states/b/air", "body `air`"),
        ("records/two/bodies/gas", "records/RECORD/states/STATE/BODY"),
        ("states/b", "records/RECORD/states/STATE/BODY"),
        ("b", "records/RECORD/states/STATE/BODY"),
        ("''", "records/RECORD/states/STATE/BODY"),
    ],
)
def test_links_to_nothing(read: Read, link: str, says: str) -> None:
    """A link to what does not exist takes the linking record down, and only that."""
    result = read(of=package(record("one", a=link), record("two")))
    (problem,) = result.problems
    assert (problem.kind, problem.record, problem.fatal) == ("reference-unknown", "one", True)
    assert says in f"{problem.message} {problem.suggestion}"
    assert [r.id for r in result.submission.records] == ["two"]


def test_circles_are_reported_in_every_record_of_the_circle(read: Read) -> None:
    """Records that continue each other in a circle are refused; one that leads into the circle is not."""
    result = read(
        of=package(
            record("one", a="records/two/states/a/gas"),
            record("two", a="records/one/states/a/gas"),
            record("tail", a="records/one/states/a/gas"),
        )
    )
    assert [(p.kind, p.record) for p in result.problems] == [
        ("link-circular", "one"),
        ("link-circular", "two"),
    ]
    assert [r.id for r in result.submission.records] == ["tail"]


def test_a_circle_inside_a_record(read: Read) -> None:
    """Two states of one record that are the same as each other are a circle."""
    result = read(of=package(record("one", a="states/b/gas", b="states/a/gas")))
    assert [p.kind for p in result.problems] == ["link-circular", "link-circular"]


def test_long_chains_are_no_circles(read: Read) -> None:
    """A chain of many records is followed without complaint."""
    names = [f"r{n}" for n in range(60)]
    links = ["", *(f"records/{name}/states/a/gas" for name in names)]
    result = read(of=package(*(record(name, a=link) for name, link in zip(names, links, strict=False))))
    assert result.problems == ()
    assert len(result.submission.records) == 60

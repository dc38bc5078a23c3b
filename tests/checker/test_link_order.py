"""Records are reviewed in the order of their links, however many there are."""

from __future__ import annotations

from typing import Any

from checker.document import read_document
from checker.engine import in_link_order
from checker.package import submit
from tests.checker.cases import gas_bottle, package


def ordered(*records: dict[str, Any]) -> list[str]:
    """Return the identifiers of records in the order of the review."""
    submission = submit(read_document(package(*records), "trial.json"))
    assert len(submission.records) == len(records)
    return [record.id for record in in_link_order(submission.records)]


def bottle(name: str, *before: str) -> dict[str, Any]:
    """Return a record that starts where others end, by a link for the first and by limits for the rest."""
    record = gas_bottle(
        id=name,
        limits=[
            {"id": f"l{n}", "quantity": f"records/{other}/states/hot/gas/pressure", "at_most": "9 bar"}
            for n, other in enumerate(before[1:])
        ],
    )
    if before:
        record["states"]["cold"]["gas"] = {"same_as": f"records/{before[0]}/states/hot/gas"}
    return record


def test_a_record_comes_after_those_it_takes_something_from():
    """Links and limits count alike; what needs no other keeps its place."""
    records = (bottle("a"), bottle("b", "d", "c"), bottle("c", "e"), bottle("d"), bottle("e"))
    assert ordered(*records) == ["a", "d", "e", "c", "b"]


def test_limits_in_a_circle_keep_their_place():
    """Two records with limits on each other are both reviewed."""
    one, other = bottle("one"), bottle("other")
    for record, points_at in ((one, "other"), (other, "one")):
        quantity = f"records/{points_at}/states/hot/gas/pressure"
        record["limits"] = [{"id": "l", "quantity": quantity, "at_most": "9 bar"}]
    assert sorted(ordered(one, other)) == ["one", "other"]


def test_a_chain_may_be_as_long_as_the_package():
    """A thousand records, each linked to the next, are put in order without exhausting the call stack."""
    chain = [bottle(f"r{n}", f"r{n + 1}") for n in range(999)]
    assert ordered(*chain, bottle("r999")) == [f"r{n}" for n in range(999, -1, -1)]

"""A record and a package have a bounded size."""

import pytest

from checker import Verdict, review
from checker.package.head import MAX_RECORDS
from tests.checker.cases import gas_bottle, package


def test_a_record_of_too_many_processes_is_refused_and_the_others_are_reviewed():
    """More than 200 processes in one record are told at the list, and the next record is still held."""
    large = gas_bottle()
    large["id"] = "large"
    large["processes"] = [{**large["processes"][0], "id": f"p{i}"} for i in range(201)]
    found = review(package(large, gas_bottle({"internal_energy_change": "31.16 kJ"})))
    assert found.verdict is Verdict.HOLD
    told = [f for f in found.findings if f.record == "large"]
    assert [f.rule for f in told] == ["type-wrong"]
    assert "more than 200" in told[0].message
    assert [(record.id, record.readable) for record in found.records] == [("large", False), ("bottle", True)]


def test_a_package_of_too_many_records_says_which_were_not_read():
    """The records beyond the limit are told at the first of them, and the package is not accepted."""
    found = review(b"records:\n" + b"- {}\n" * (MAX_RECORDS + 5))
    assert len(found.records) == MAX_RECORDS
    (told,) = [f for f in found.findings if "after the first" in f.message]
    assert f"{MAX_RECORDS + 5} records" in told.message
    assert told.location.line == MAX_RECORDS + 2
    assert found.verdict is Verdict.HOLD


@pytest.mark.parametrize(
    ("part", "item", "readable"),
    [
        ("assumptions", {"text": "kinetic energy negligible"}, True),
        ("limits", {"quantity": "states/hot/gas/pressure", "at_most": "9 bar"}, True),
        ("sequences", {"processes": ["warming"]}, False),
        ("heat_transfers", {}, False),
        ("work_transfers", {"kind": "shaft"}, False),
    ],
)
def test_a_list_of_too_many_items_is_told_once(part, item, readable):
    """More than 200 items are one query at the list; without limits or assumptions the rest is still reviewed."""
    record = gas_bottle({"internal_energy_change": "31.16 kJ"})
    where = record["processes"][0] if part.endswith("transfers") else record
    where[part] = [{"id": f"i{n}", **item} for n in range(201)]
    found = review(package(record))
    told = [f for f in found.findings if f.rule == "type-wrong"]
    assert ["more than 200" in f.message for f in told] == [True]
    assert found.records[0].readable is readable
    assert found.verdict is Verdict.HOLD

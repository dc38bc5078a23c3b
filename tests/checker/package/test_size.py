"""A record and a package have a bounded size."""

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

"""A record has a bounded size."""

from checker import Verdict, review
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

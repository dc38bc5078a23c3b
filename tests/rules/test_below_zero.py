"""What is stated below zero, where nothing can be: one finding, with the number and all that it spoiled."""

from __future__ import annotations

from typing import Any

import pytest

from checker import Grade, Review, review
from tests.checker.cases import gas_bottle, package

SGEN = "processes/warming/entropy_generation"


def reviewed(**results: str) -> Review:
    """Return the review of a bottle warmed from a wall at 450 K; S_gen = 20.4 J/K, of which 5.98 kJ are lost."""
    record: dict[str, Any] = gas_bottle(results)
    return review(package(record))


def at(found: Review, pointer: str) -> list[str]:
    """Return the rules that have a finding at a quantity."""
    return [finding.rule for finding in found.findings if finding.quantity == pointer]


def test_a_generation_below_zero_is_found_once_with_its_number() -> None:
    """The rule that names the law stands alone, and has what the comparison found."""
    found = reviewed(entropy_generation="-0.0204 kJ/K")
    assert at(found, SGEN) == ["generation-negative"]
    (finding,) = found.findings
    assert finding.grade is Grade.DISCREPANCY
    assert finding.origin is True
    assert finding.recomputed is not None
    assert finding.recomputed.value == pytest.approx(0.0204, abs=1e-4)
    assert finding.deviation == pytest.approx(-0.0408, abs=1e-4)
    assert "entropy is not destroyed" in finding.message


def test_what_follows_from_it_is_listed_as_spoiled() -> None:
    """The exergy destruction was made from the wrong generation, and is inherited."""
    found = reviewed(entropy_generation="-0.0204 kJ/K", exergy_destruction="-5.98 kJ")
    assert [finding.rule for finding in found.findings] == ["generation-negative"]
    assert found.findings[0].spoils == ("processes/warming/exergy_destruction",)


@pytest.mark.parametrize(("text", "rules"), [("0.0300 kJ/K", ["value-disagrees"]), ("0.0204 kJ/K", [])])
def test_a_generation_above_zero_is_a_value_like_any_other(text: str, rules: list[str]) -> None:
    """Wrong or right, no law is broken."""
    assert at(reviewed(entropy_generation=text), SGEN) == rules


def test_a_destruction_below_zero_is_found_once() -> None:
    """Nothing above it is wrong, so it is its own origin."""
    found = reviewed(entropy_generation="0.0204 kJ/K", exergy_destruction="-5.98 kJ")
    assert at(found, "processes/warming/exergy_destruction") == ["destruction-negative"]

"""What has no critical point is not said to be unchecked for it."""

from __future__ import annotations

from typing import Any

import pytest

from checker import review
from tests.checker.cases import gas_bottle, package


@pytest.mark.parametrize(("model", "listed"), [("constant specific heat", False), ("real fluid", True)])
def test_only_real_fluids_are_held_against_their_critical_point(model: str, listed: bool) -> None:
    """The hot state is not found; of a real fluid it stays open whether it is near-critical."""
    record: dict[str, Any] = gas_bottle()
    record["states"]["hot"]["gas"]["inputs"] = {}
    record["bodies"]["gas"]["model"] = model
    if model == "real fluid":
        record["bodies"]["gas"]["inputs"] = {"mass": "0.1000 kg"}
    (found,) = review(package(record)).records
    assert ("near-critical: states/hot/gas" in {item.what for item in found.not_checked}) is listed
    assert ("near-critical" in found.rules_held) is listed

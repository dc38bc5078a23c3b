"""The work convention of a package, and the one that a review basis supplies."""

from __future__ import annotations

from typing import Any

import pytest

from checker import review
from checker.basis import Basis
from tests.checker.cases import gas_bottle, package


def _stirred(**stirrer: Any) -> dict[str, Any]:
    record = gas_bottle({"internal_energy_change": "31.16 kJ"})
    record["processes"][0]["heat_transfers"] = []
    record["processes"][0]["work_transfers"] = [{"id": "stirrer", "kind": "shaft", **stirrer}]
    return record


@pytest.mark.parametrize(
    ("convention", "energy"), [("positive in", "31.16 kJ"), ("positive out", "-31.16 kJ")]
)
def test_a_basis_supplies_the_convention_that_a_package_leaves_out(convention: str, energy: str) -> None:
    """With the convention of the basis the work has its right sign, and nobody has to be asked."""
    data = package(_stirred(results={"energy": energy}), conventions={})
    assert review(data, basis=Basis(work_convention=convention)).findings == ()
    assert {f.rule for f in review(data).findings} >= {"work-convention-not-stated"}


def test_the_convention_of_the_package_goes_before_that_of_the_basis() -> None:
    """What the originator states is not overruled."""
    data = package(_stirred(results={"energy": "-31.16 kJ"}), conventions={"work": "positive out"})
    assert review(data, basis=Basis(work_convention="positive in")).findings == ()


def test_a_direction_goes_before_any_convention() -> None:
    """An item with a direction keeps its sign."""
    data = package(_stirred(direction="in", results={"energy": "31.16 kJ"}), conventions={})
    assert review(data, basis=Basis(work_convention="positive out")).findings == ()

"""What a review records of each stated quantity."""

from __future__ import annotations

import json

from checker import review
from tests.checker.cases import gas_bottle, package


def test_every_comparison_has_its_place_in_the_file():
    """Also where a result holds: a reader of the log finds the line of what was checked."""
    lines = json.dumps(
        json.loads(package(gas_bottle({"internal_energy_change": "31.16 kJ"}, {"pressure": "6.667 bar"}))),
        indent=1,
    ).splitlines()
    found = review("\n".join(lines).encode(), name="trial.json")
    checked = {item.quantity: item for item in found.records[0].checked}
    for quantity, text in (
        ("processes/warming/internal_energy_change", "31.16 kJ"),
        ("states/hot/gas/pressure", "6.667 bar"),
    ):
        location = checked[quantity].location
        assert location is not None
        assert lines[location.line - 1][location.column - 1 :].startswith(f'"{text}"')

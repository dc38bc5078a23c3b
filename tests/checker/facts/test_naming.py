"""What quantities are called."""

from __future__ import annotations

import pytest

from checker.facts.naming import name_of
from tests.checker.cases import case, gas_bottle


@pytest.mark.parametrize(
    ("pointer", "name"),
    [
        ("processes/warming/heat_transfers/wall/energy", "energy of heat transfer wall"),
        (
            "processes/warming/heat_transfers/wall/boundary_temperature",
            "boundary temperature of heat transfer wall",
        ),
        ("processes/warming/internal_energy_change", "internal energy change"),
        ("states/cold/gas/temperature", "temperature"),
        ("bodies/gas/specific_heat_at_constant_volume", "specific heat at constant volume"),
    ],
)
def test_a_transfer_is_named_with_what_belongs_to_it(pointer: str, name: str) -> None:
    """A process may have several transfers, and each has an energy."""
    record = gas_bottle({"internal_energy_change": "31.16 kJ"})
    record["processes"][0]["heat_transfers"] = [
        {"id": "wall", "boundary_temperature": "450 K", "results": {"energy": "31.16 kJ"}}
    ]
    (statement,) = (s for s in case(record).record.statements if s.pointer == pointer)
    assert name_of(statement) == name

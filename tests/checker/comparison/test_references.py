"""Reference quantities: what an allowance in per cent is a per cent of."""

from itertools import pairwise
from typing import Any

import pytest

from tests.checker.cases import case


def heated(*temperatures: str) -> dict[str, Any]:
    """Return a block heated in steps from 300 K, with a sequence over all of them; m·c = 1 kJ/K."""
    names = [f"s{i}" for i in range(len(temperatures) + 1)]
    states = dict(zip(names, ["300.00 K", *temperatures], strict=True))
    ends = list(pairwise(names))
    return {
        "id": "block",
        "bodies": {
            "block": {
                "substance": "Ballast",
                "model": "constant specific heat",
                "inputs": {"mass": "2.0000 kg", "specific_heat": "0.50000 kJ/(kg·K)"},
            }
        },
        "states": {name: {"block": {"inputs": {"temperature": t}}} for name, t in states.items()},
        "processes": [
            {"id": f"p{i}", "from": a, "to": b, "heat_transfers": [{"id": "wall"}], "work_transfers": []}
            for i, (a, b) in enumerate(ends)
        ],
        "sequences": [
            {"id": "all", "processes": [f"p{i}" for i in range(len(ends))], "results": {"heat": "100.00 kJ"}}
        ],
    }


@pytest.mark.parametrize(
    "temperatures", [("400.00 K",), ("350.00 K", "400.00 K"), ("310.00 K", "320.00 K", "400.00 K")]
)
def test_a_sequence_is_held_against_its_own_total(temperatures: tuple[str, ...]) -> None:
    """Parting a process does not change the allowance of what is claimed for the whole: 0.5 % of 100 kJ."""
    assert case(heated(*temperatures)).allowance("sequences/all/heat") == pytest.approx(500.0)


def test_a_sequence_that_returns_is_held_against_its_largest_part() -> None:
    """Where the parts cancel, the largest of them remains the reference."""
    assert case(heated("400.00 K", "301.00 K")).allowance("sequences/all/heat") == pytest.approx(500.0)

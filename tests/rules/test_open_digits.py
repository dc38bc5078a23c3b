"""Balances whose terms were rounded to three digits: what the open zeros explain is asked, not accused."""

from __future__ import annotations

from typing import Any

import pytest

from checker import Grade, review
from tests.checker.cases import gas_bottle, package


def warmed(change: str, heat: str) -> dict[str, Any]:
    """Return a gas warmed by 352 K at constant pressure: ΔU = 1056.0 kJ, W = 97.3 kJ, Q = 1153.3 kJ."""
    record = gas_bottle({"internal_energy_change": change, "heat": heat, "boundary_work": "97.3 kJ"})
    record["bodies"]["gas"] = {
        "substance": "Purge gas",
        "model": "constant specific heat",
        "inputs": {"mass": "1.0000 kg", "cv": "3.0000 kJ/(kg·K)", "gas_constant": "0.27642 kJ/(kg·K)"},
    }
    record["states"] = {
        "cold": {"gas": {"inputs": {"temperature": "300.00 K", "pressure": "500.0 kPa"}}},
        "hot": {"gas": {"inputs": {"temperature": "652.00 K"}}},
    }
    process = record["processes"][0]
    process["path"] = "constant pressure"
    process["heat_transfers"][0].update(boundary_temperature="700.0 K", reservoir_temperature="700.0 K")
    return record


@pytest.mark.parametrize(
    ("change", "heat", "grade"),
    [
        ("1056 kJ", "1153 kJ", None),
        ("1060 kJ", "1150 kJ", Grade.QUERY),
        ("1060. kJ", "1150. kJ", Grade.DISCREPANCY),
    ],
)
def test_terms_that_agree_one_by_one_but_not_together(change: str, heat: str, grade: Grade | None) -> None:
    """7.3 kJ that only the zeros at the end explain are a query; with a point behind them they are a discrepancy."""
    found = review(package(warmed(change, heat))).findings
    assert [f.grade for f in found if f.rule == "energy-not-closed"] == ([] if grade is None else [grade])

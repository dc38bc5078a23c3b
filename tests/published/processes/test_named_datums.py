"""Enthalpies and entropies as printed on the named reference states are recognised, and a wrong one on them is found.

Definitions: IIR: h = 200 kJ/kg and s = 1 kJ/(kg·K) of the saturated liquid at 0 °C; ASHRAE: h = s = 0 of the saturated
liquid at −40 °C; NBP: h = s = 0 of the saturated liquid at 1 atm; water: u = s = 0 of the saturated liquid at the
triple point (IAPWS R6-95). The printed values are those of handbook tables on these datums, from memory (ASHRAE
Handbook Fundamentals, refrigerant tables; IAPWS steam tables).
"""

from __future__ import annotations

from typing import Any

import pytest

from checker.findings import Outcome
from tests.checker.cases import case, compared

pytestmark = pytest.mark.published

PRINTED = {
    # datum: fluid, [(°C, quality, h in kJ/kg, s in kJ/(kg·K))]
    "IIR": (
        "R134a",
        [("0.0", "0", "200.0", "1.000"), ("20.0", "1", "409.7", "1.718"), ("40.0", "0", "256.4", "1.190")],
    ),
    "ASHRAE": (
        "R134a",
        [("-40.0", "0", "0.0", "0.000"), ("0.0", "1", "250.5", "0.931"), ("20.0", "0", "79.3", "0.300")],
    ),
    "IIR of ammonia": ("Ammonia", [("0.0", "0", "200.0", "1.000"), ("-10.0", "1", "1450", "5.751")]),
    "IIR of carbon dioxide": (
        "CarbonDioxide",
        [("0.0", "0", "200.0", "1.000"), ("-20.0", "1", "436.9", "1.949")],
    ),
    "water": (
        "Water",
        [
            ("100.0", "0", "419.1", "1.307"),
            ("100.0", "1", "2675.6", "7.354"),
            ("200.0", "1", "2792.0", "6.430"),
        ],
    ),
}


def record(fluid: str, rows: list[tuple[str, str, str, str]]) -> dict[str, Any]:
    """Return a record that claims h and s of saturated states."""
    states = {
        f"s{number}": {
            "fluid": {
                "inputs": {"temperature": f"{t} °C", "quality": x},
                "results": {"specific_enthalpy": f"{h} kJ/kg", "specific_entropy": f"{s} kJ/(kg·K)"},
            }
        }
        for number, (t, x, h, s) in enumerate(rows)
    }
    bodies = {"fluid": {"substance": fluid, "model": "real fluid", "inputs": {"mass": "1.000 kg"}}}
    return {"id": "r", "title": "Saturated states", "bodies": bodies, "states": states, "processes": []}


@pytest.mark.parametrize("name", PRINTED)
def test_printed_values_on_a_named_datum_agree(name: str) -> None:
    """Every printed h and s is recognised on its datum and agrees with the recomputed one."""
    fluid, rows = PRINTED[name]
    found = case(record(fluid, rows))
    outcomes = {c.statement.pointer: (c.outcome, c.deviation, c.shift.note) for c in found.compared}
    assert {o for o, *_ in outcomes.values()} == {Outcome.AGREES}, outcomes


@pytest.mark.parametrize("name", PRINTED)
def test_one_wrong_value_among_them_is_found(name: str) -> None:
    """An enthalpy off by 60 kJ/kg disagrees on the same datum: the datum is not fitted to it."""
    fluid, rows = PRINTED[name]
    t, x, h, s = rows[-1]
    wrong = [*rows[:-1], (t, x, f"{float(h) + 60.0:.1f}", s)]
    last = f"states/s{len(rows) - 1}/fluid/specific_enthalpy"
    found = compared(case(record(fluid, wrong)), last)
    assert found.outcome is Outcome.WRONG
    assert found.deviation == pytest.approx(60e3, abs=1.5e3)

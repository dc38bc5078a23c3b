"""How the search along a path is written in the sheet."""

from __future__ import annotations

import pytest

from tests.checker.cases import case, gas_bottle


@pytest.mark.parametrize(
    ("end", "formula"),
    [
        ({"pressure": "8.000 bar"}, "p = p(v) along the path"),
        ({"temperature": "360.0 K"}, "p = p(v) along the path, with T"),
    ],
)
def test_a_given_pressure_is_not_named_twice(end: dict[str, str], formula: str) -> None:
    """The pressure stands on the left already; any other property is named beside the path."""
    record = gas_bottle()
    record["processes"][0]["path"] = {"kind": "polytropic", "exponent": "1.2"}
    record["states"]["hot"]["gas"]["inputs"] = end
    found = case(record)
    step = found.plan.sheet.made_by["states/hot/gas/temperature"]
    assert step.formula == formula
    assert found.value("states/hot/gas/temperature") is not None

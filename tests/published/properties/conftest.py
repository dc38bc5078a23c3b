"""Published reference values: how they are read and how closely they must be met."""

from __future__ import annotations

from collections.abc import Callable
from decimal import Decimal
from pathlib import Path
from typing import Any

import pytest
import yaml

FOLDER = Path(__file__).parents[3] / "fixtures" / "published"


def half_last_digit(printed: str) -> float:
    """Return half a unit of the last printed digit, and what floating point adds."""
    exponent = Decimal(printed).as_tuple().exponent
    assert isinstance(exponent, int)
    return float(Decimal((0, (5,), exponent - 1))) + 1e-12 * abs(float(printed))


@pytest.fixture
def published() -> Callable[[str], Any]:
    """Read a file of published values by its stem; every number stays text, as printed."""

    def read(stem: str) -> Any:
        return yaml.safe_load((FOLDER / f"{stem}.yaml").read_text(encoding="utf-8"))

    return read


@pytest.fixture
def meets() -> Callable[..., bool]:
    """Compare a number with a printed one to half a unit of its last digit, or to a stated tolerance."""

    def compare(value: float | None, printed: str, tolerance: float = 0.0) -> bool:
        allowed = max(half_last_digit(printed), tolerance)
        assert value is not None
        assert abs(value - float(printed)) <= allowed, f"{value:.10g} is not {printed}"
        return True

    return compare

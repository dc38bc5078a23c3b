"""Sums of a ledger."""

from __future__ import annotations

import pytest

from checker.findings import Amount
from reports.pdf.ledgers import sum_text


def amounts(*texts: str) -> list[Amount | None]:
    """Return amounts in kJ with these texts."""
    return [Amount(0.0, "kJ", text) for text in texts]


@pytest.mark.parametrize(
    ("texts", "total", "expected"),
    [
        (("−3630.5", "0"), -3630.5, "−3630.5"),
        (("12", "301.25 kJ"), 313.25, "313.25"),
        (("-246", "12"), -234.0, "−234"),
        (("0.1", "0.1"), 1e-12, "0"),
        (("1.2e-05", "3"), 3.000012, "3.0000"),
        (("123456789.5", "1"), 123456790.5, "1.2346×10⁸"),
    ],
)
def test_a_sum_has_the_decimals_of_its_finest_term(
    texts: tuple[str, ...], total: float, expected: str
) -> None:
    """It is never written coarser than a term beside it; where a term has a power of ten, five digits are given."""
    assert sum_text(amounts(*texts), total) == expected

"""The corrected package: every wrong result replaced by the recomputed one, to the originator's own digits.

Only the digits of stated results change; everything else of the file stays as it was written.
"""

from __future__ import annotations

from collections import defaultdict
from collections.abc import Iterable

from checker.case import Case
from checker.comparison.compare import Compared
from checker.findings import Correction, Outcome
from checker.locate import Locator
from checker.submission import Role

FEWEST: float = 1e-4
MOST: float = 1e7
"""Between these magnitudes a number is written without an exponent."""
NOISE: float = 1e-6
"""Part of the tolerance below which a recomputed value is zero."""


def corrections_of(case: Case, locator: Locator) -> tuple[Correction, ...]:
    """Return what has to be written in place of every wrong result of a record, in document order."""
    return tuple(
        Correction(
            quantity=c.statement.pointer,
            stated=c.statement.quantity.text,
            corrected=_corrected_text(c, c.independent),
            because=tuple(key for key in c.inherits_from),
            location=locator.at(c.statement.place),
        )
        for c in case.compared
        if c.outcome is Outcome.WRONG and c.statement.role is Role.RESULT and isinstance(c.independent, float)
    )


def _corrected_text(c: Compared, independent: float) -> str:
    """Return the text of a stated quantity with the recomputed number, to as many significant digits."""
    quantity = c.statement.quantity
    if abs(independent) <= NOISE * c.tolerance:
        independent = 0.0  # what arithmetic leaves of nothing
    value = quantity.number_of(c.statement.sign * (independent + c.shift.value))
    return quantity.text.replace(quantity.number_text, number_like(quantity.number_text, value), 1)


def number_like(written: str, value: float) -> str:
    """Return a number with as many significant digits as another, and its decimal point where it has one.

    Examples
    --------
    >>> number_like("422", 301.04)
    '301'
    >>> number_like("0.9104", 0.0896098)
    '0.08961'
    """
    mantissa = written.lower().partition("e")[0]
    digits = max(len("".join(ch for ch in mantissa if ch.isdigit()).lstrip("0")), 1)
    if value == 0.0:
        return "0"
    if not mantissa.strip("-−+0."):  # of a zero the decimals are all that tells its digits
        return f"{value:.{len(mantissa.partition('.')[2])}f}"
    if not FEWEST <= abs(value) < MOST or "e" in written.lower():
        return f"{value:.{digits - 1}e}"
    text = f"{value:.{digits - 1}e}"
    exponent = int(text.partition("e")[2])
    return f"{value:.{max(digits - 1 - exponent, 0)}f}"


def corrected_file(data: bytes, corrections: Iterable[Correction]) -> bytes:
    """Return the content of a package with its corrections written in.

    A correction whose place does not hold the stated text (a text over several lines, an escape) is left out.
    """
    lines = data.decode("utf-8").split("\n")
    by_line: dict[int, list[Correction]] = defaultdict(list)
    for correction in corrections:
        by_line[correction.location.line].append(correction)
    for number, found in by_line.items():
        row = lines[number - 1]
        for correction in sorted(found, key=lambda c: c.location.column, reverse=True):
            row = _replaced(row, correction)
        lines[number - 1] = row
    return "\n".join(lines).encode("utf-8")


def _replaced(row: str, correction: Correction) -> str:
    start = correction.location.column - 1
    quote = 1 if row[start : start + 1] in ("'", '"') else 0
    at = start + quote
    if not row.startswith(correction.stated, at):
        return row
    return row[:at] + correction.corrected + row[at + len(correction.stated) :]

"""All slips, in one literal table."""

from __future__ import annotations

from typing import Final

from checker.slips import energy, entropy, inputs, properties, sums, writing
from checker.slips.slip import Slip

CATALOGUE: Final[tuple[Slip, ...]] = (
    *inputs.CATALOGUE,
    *properties.CATALOGUE,
    *energy.CATALOGUE,
    *sums.CATALOGUE,
    *entropy.CATALOGUE,
    *writing.CATALOGUE,
)
"""Every slip that is searched for; a new one is one function and one line in the table of its theme."""

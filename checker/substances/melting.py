"""Bodies that melt and freeze."""

from __future__ import annotations

from collections.abc import Mapping

from checker.outcomes import NotEvaluable
from checker.substances.interface import Substance


def make_melting(substance: str, constants: Mapping[str, float]) -> Substance:
    """Return a body that melts. Raises NotEvaluable."""
    del substance, constants
    raise NotEvaluable("melting and freezing are not recomputed yet", "not-supported")

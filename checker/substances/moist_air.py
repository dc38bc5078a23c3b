"""Moist air with its condensate in a closed volume."""

from __future__ import annotations

from collections.abc import Mapping

from checker.outcomes import NotEvaluable
from checker.substances.interface import Substance


def is_moist_air(substance: str) -> bool:
    """Say whether a substance is moist air."""
    del substance
    return False


def make_moist_air(model: str, constants: Mapping[str, float]) -> Substance:
    """Return moist air of a water content. Raises NotEvaluable."""
    del model, constants
    raise NotEvaluable("moist air is not recomputed yet", "not-supported")

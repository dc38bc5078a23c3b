"""What every model without phases answers when it is asked about saturation."""

from __future__ import annotations

from collections.abc import Mapping

from checker.outcomes import NotEvaluable
from checker.substances.interface import ModelUncertainty, PropertyState
from checker.substances.properties import QUALITY
from checker.substances.uncertainty import EXACT


class WithoutPhases:
    """The saturation half of the interface for a model that does not condense."""

    @property
    def uncertainty(self) -> ModelUncertainty:
        """Published uncertainty of the model: none, where it is exact by its own definition."""
        return EXACT

    def saturation(self, known: Mapping[str, float]) -> tuple[PropertyState, PropertyState]:
        """Raise NotEvaluable: the model has no phases."""
        del known
        raise NotEvaluable("this model has no phases and so no saturation", "not-supported")

    def crosses_saturation(
        self, temperature: float, half_temperature: float, pressure: float, half_pressure: float
    ) -> bool:
        """Return False: the model has no phases."""
        del temperature, half_temperature, pressure, half_pressure
        return False

    @staticmethod
    def refuse_quality(known: Mapping[str, float]) -> None:
        """Raise NotEvaluable (not-supported) where a quality is among the known properties."""
        if QUALITY in known:
            raise NotEvaluable("this model has no phases and so no quality", "not-supported")

"""A body's model as the sheet uses it: a substance made from constants and model factors that are leaves."""

from __future__ import annotations

from collections.abc import Sequence
from dataclasses import dataclass, replace
from typing import Final

from checker.outcomes import NotEvaluable
from checker.sheet.keys import body_key, given
from checker.sheet.moist import WATER_CONTENT, needs_water_content, water_source
from checker.submission import Body, Record, Role
from checker.substances import make_substance
from checker.substances.interface import PropertyState, Substance

CONSTANTS: Final = (
    "molar_mass",
    "gas_constant",
    "specific_heat",
    "specific_heat_at_constant_volume",
    "specific_heat_at_constant_pressure",
    "density",
    "mass_fraction",
    "melting_temperature",
    "melting_span",
    "latent_heat",
    "specific_heat_of_solid",
    "specific_heat_of_liquid",
)
"""Stated inputs of a body that define a model with constants."""


@dataclass(frozen=True, slots=True)
class BodyModel:
    """The model of a body; ``parents`` are the keys from which the substance is made.

    All are leaves but the water content of moist air, which a step gives; ``refusal`` says why it could not.
    """

    body: Body
    constants: tuple[str, ...]
    nominal: tuple[float, ...]
    refusal: NotEvaluable | None = None

    @property
    def parents(self) -> tuple[str, ...]:
        """Keys of the constants and of the two model factors."""
        return (
            *(self._constant_key(name) for name in self.constants),
            factor_key(self.body.id, "density_factor"),
            factor_key(self.body.id, "caloric_factor"),
        )

    def _constant_key(self, name: str) -> str:
        key = body_key(self.body.id, name)
        return key if name == WATER_CONTENT else given(key)

    def substance(self, values: Sequence[float]) -> Substance:
        """Return the substance for values of the parents. Raises NotEvaluable."""
        if self.refusal is not None:
            raise self.refusal
        *constants, density_factor, caloric_factor = values
        return make_substance(
            self.body.substance,
            self.body.model,
            dict(zip(self.constants, constants, strict=True)),
            property_source=self.body.property_source,
            composition=tuple((self.body.composition or {}).items()),
            composition_basis=self.body.composition_basis,
            table=tuple(tuple((name, q.value) for name, q in row.items()) for row in self.body.table),
            density_factor=density_factor,
            caloric_factor=caloric_factor,
        )

    def at_nominal(self) -> Substance | None:
        """Return the substance with its constants as stated, or None where there is none."""
        try:
            return self.substance((*self.nominal, 1.0, 1.0))
        except NotEvaluable:
            return None


def factor_key(body: str, name: str) -> str:
    """Return the key of a model factor of a body."""
    return f"model/{body}/{name}"


def body_model(record: Record, body: Body) -> BodyModel:
    """Return the model of a body with the constants that its inputs state."""
    stated = [
        (name, found[0].value)
        for name in CONSTANTS
        if (found := record.stated(body_key(body.id, name), Role.INPUT))
    ]
    model = BodyModel(body, tuple(name for name, _ in stated), tuple(value for _, value in stated))
    return _with_water(record, model) if needs_water_content(body) else model


def _with_water(record: Record, model: BodyModel) -> BodyModel:
    """Return the model of moist air with its water content, where the record tells it."""
    source = water_source(record, model.body)
    if source is None:
        return model
    try:
        content = source.value()
    except NotEvaluable as outcome:
        return replace(model, refusal=outcome)
    return replace(model, constants=(*model.constants, WATER_CONTENT), nominal=(*model.nominal, content))


def outputs_of(state: PropertyState) -> tuple[float | str | None, ...]:
    """Return a state in the order of STATE_OUTPUTS."""
    volume = state.specific_volume
    return (
        state.temperature,
        state.pressure,
        volume,
        None if volume is None else 1.0 / volume,
        state.specific_internal_energy,
        state.specific_enthalpy,
        state.specific_entropy,
        state.quality,
        None if state.phase is None else str(state.phase),
        state.melted_fraction,
        state.relative_humidity,
        state.humidity_ratio,
    )

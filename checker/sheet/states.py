"""How a state is found: clues (properties known for it) and the steps that turn two of them into a state."""

from __future__ import annotations

from collections.abc import Iterator
from dataclasses import dataclass
from typing import Final

from checker.outcomes import NotEvaluable
from checker.sheet.keys import STATE_OUTPUTS, clue, given, state_key
from checker.sheet.melting import FRACTION, MeltingState
from checker.sheet.models import BodyModel, outputs_of
from checker.sheet.moist import WATER_CONTENT
from checker.sheet.step import Function, Step, Value
from checker.substances.interface import Phase

SYMBOLS: Final = {
    "temperature": "T",
    "pressure": "p",
    "specific_volume": "v",
    "specific_internal_energy": "u",
    "specific_enthalpy": "h",
    "specific_entropy": "s",
    "quality": "x",
    FRACTION: "f_m",
}

PAIRS: Final[tuple[tuple[str, str], ...]] = (
    ("temperature", "quality"),
    ("pressure", "quality"),
    ("temperature", "pressure"),
    ("temperature", "specific_volume"),
    ("pressure", "specific_volume"),
    ("specific_volume", "specific_internal_energy"),
    ("pressure", "specific_enthalpy"),
    ("pressure", "specific_entropy"),
    ("pressure", "specific_internal_energy"),
    ("specific_volume", "specific_enthalpy"),
    ("specific_volume", "specific_entropy"),
    ("specific_volume", "quality"),
    ("temperature", "specific_entropy"),
    ("temperature", "specific_enthalpy"),
    ("temperature", "specific_internal_energy"),
    ("specific_enthalpy", "specific_entropy"),
    ("specific_internal_energy", "specific_entropy"),
    ("specific_internal_energy", "specific_enthalpy"),
    ("specific_enthalpy", "quality"),
    ("specific_internal_energy", "quality"),
    ("specific_entropy", "quality"),
)
"""Which two clues are used first; the best conditioned pairs stand first."""

CALORIC: Final = ("specific_internal_energy", "specific_enthalpy", "specific_entropy")
EXTENSIVE: Final = {
    "volume": "specific_volume",
    "internal_energy": "specific_internal_energy",
    "enthalpy": "specific_enthalpy",
    "entropy": "specific_entropy",
}


@dataclass(frozen=True, slots=True)
class Clue:
    """A property known for a state, under a key.

    ``stated`` where the originator gave it directly, ``linked`` where the state that this one is the same as has it.
    """

    name: str
    key: str
    stated: bool = False
    linked: bool = False


@dataclass(frozen=True, slots=True)
class StatePlan:
    """Everything structural about one body in one state.

    ``phase`` is the phase word among the inputs; ``barred`` are pairs that the stated digits do not support;
    ``melting`` is what fixes the state of a body that melts.
    """

    state: str
    body: str
    model: BodyModel
    clues: tuple[Clue, ...]
    phase: Phase | None = None
    barred: frozenset[tuple[str, str]] = frozenset()
    incompressible: bool = False
    melting: MeltingState | None = None

    @property
    def key(self) -> str:
        """Key whose presence says that the state is found."""
        return state_key(self.state, self.body, "temperature")

    def awaits_link(self, known: frozenset[str] | set[str]) -> bool:
        """Say whether the state is linked to one that is not found yet."""
        return any(one.linked and one.key not in known for one in self.clues)

    @property
    def outputs(self) -> tuple[str, ...]:
        """Keys of the state's properties."""
        return tuple(state_key(self.state, self.body, name) for name in STATE_OUTPUTS)


def best_pair(plan: StatePlan, known: frozenset[str] | set[str]) -> tuple[Clue, ...] | None:
    """Return the clues to use: two, or one for an incompressible model; None where they do not suffice.

    A link replaces inputs, so what it brings is used together, and never beside an input that may contradict it.
    """
    if not all(key in known for key in plan.model.parents):
        return None
    usable: dict[str, Clue] = {}
    for one in plan.clues:
        if one.key in known:
            usable.setdefault(one.name, one)
    if plan.incompressible:
        return _one_clue(plan.melting, usable)
    linked = tuple(one for one in plan.clues if one.linked and one.key in known)
    if len(linked) > 1:
        return linked
    if (saturated := _saturation_quality(plan, usable)) is not None:
        return saturated
    ranked = [
        (sum(not usable[name].stated for name in pair), rank, pair)
        for rank, pair in enumerate(PAIRS)
        if pair not in plan.barred and pair[0] in usable and pair[1] in usable
    ]
    return tuple(usable[name] for name in min(ranked)[2]) if ranked else None


def _saturation_quality(plan: StatePlan, usable: dict[str, Clue]) -> tuple[Clue, ...] | None:
    """Return one clue where a saturated phase word with T or p fixes the state."""
    if plan.phase not in (Phase.SATURATED_LIQUID, Phase.SATURATED_VAPOUR) or "quality" in usable:
        return None
    alone = next((usable[name] for name in ("pressure", "temperature") if name in usable), None)
    return None if alone is None else (alone,)


def _one_clue(melting: MeltingState | None, usable: dict[str, Clue]) -> tuple[Clue, ...] | None:
    if melting is not None:
        usable = _that_tell(melting, usable)
        if FRACTION in usable:
            return tuple(usable[name] for name in ("temperature", FRACTION, "pressure") if name in usable)
    names = ("temperature", "specific_internal_energy", "specific_entropy", "specific_enthalpy")
    first = next((usable[name] for name in names if name in usable), None)
    if first is None:
        return None
    if "pressure" in usable:
        return (first, usable["pressure"])
    return None if first.name == "specific_enthalpy" else (first,)


def _that_tell(melting: MeltingState, usable: dict[str, Clue]) -> dict[str, Clue]:
    """Return the clues of a body that melts without a temperature that leaves open how much of it is melted."""
    temperature = usable.get("temperature")
    if temperature is None:
        return usable
    tells = melting.stated_tells if temperature.stated else melting.found_tells and FRACTION not in usable
    return usable if tells else {name: one for name, one in usable.items() if name != "temperature"}


def state_step(plan: StatePlan, pair: tuple[Clue, ...]) -> Step:
    """Return the step that evaluates a state from the given clues."""
    names = tuple(one.name for one in pair)
    symbols = ", ".join(SYMBOLS[name] for name in names)
    word = f", {plan.phase}" if plan.phase else ""
    hidden = names if plan.melting is not None else (*names, FRACTION)
    others = [SYMBOLS[name] for name in SYMBOLS if name not in hidden]
    if WATER_CONTENT in plan.model.constants:
        others = [*(symbol for symbol in others if symbol != SYMBOLS["quality"]), "φ", "W"]
    return Step(
        title=f"State {plan.state} of {plan.body}",
        outputs=plan.outputs,
        parents=(*(one.key for one in pair), *plan.model.parents),
        function=_evaluator(plan, names),
        formula=f"{', '.join(others)} = f({symbols}{word})",
        substitution="f(" + ", ".join(f"{{{i}}}" for i in range(len(names))) + f"{word})",
        takes_none=plan.incompressible,
    )


def _evaluator(plan: StatePlan, names: tuple[str, ...]) -> Function:
    count = len(names)
    quality = (
        {Phase.SATURATED_LIQUID: 0.0, Phase.SATURATED_VAPOUR: 1.0}.get(plan.phase) if plan.phase else None
    )

    def evaluate_state(*values: float) -> tuple[Value, ...]:
        substance = plan.model.substance(values[count:])
        # A liquid or solid may have no pressure along a path of constant pressure, and needs none.
        known = {name: value for name, value in zip(names, values, strict=False) if value is not None}
        if count == 1 and quality is not None and not plan.incompressible:
            known["quality"] = quality
        return outputs_of(substance.state(known, plan.phase))

    return evaluate_state


def clue_steps(plan: StatePlan, mass: str) -> Iterator[tuple[Clue, Step]]:
    """Yield the clues that a simple formula makes from stated inputs, with their steps.

    Density gives v; volume, U, H and S give v, u, h and s once the mass is known.
    """
    base = f"states/{plan.state}/{plan.body}"
    density = f"{base}/density"
    target = clue(f"{base}/specific_volume", "density")
    yield (
        Clue("specific_volume", target, stated=True),
        Step(
            f"Specific volume of {plan.body}, {plan.state}",
            (target,),
            (given(density),),
            _reciprocal,
            "v = 1/ρ",
            "1/{0}",
        ),
    )
    for total, specific in EXTENSIVE.items():
        source = f"{base}/{total}"
        made = clue(f"{base}/{specific}", total)
        yield (
            Clue(specific, made, stated=True),
            Step(
                f"{total.replace('_', ' ').capitalize()} per mass of {plan.body}, {plan.state}",
                (made,),
                (given(source), mass),
                _ratio,
                f"{SYMBOLS[specific]} = {SYMBOLS[specific].upper()}/m",
                "{0}/{1}",
            ),
        )


def _reciprocal(value: float) -> tuple[float]:
    if value <= 0.0:
        raise NotEvaluable("a density must be positive")
    return (1.0 / value,)


def _ratio(total: float, mass: float) -> tuple[float]:
    if mass <= 0.0:
        raise NotEvaluable("the mass must be positive")
    return (total / mass,)

"""An originator's calculation: named inputs, steps and what of them is written, evaluated with or without slips."""

from __future__ import annotations

from collections.abc import Callable, Iterable, Iterator, Mapping
from dataclasses import dataclass, replace
from typing import NamedTuple

from tests.benchmarks.seeded.units import Unit, decimals_for, decimals_of, half_width, stated_value, text_of

Values = dict[str, float]
Function = Callable[[Values], tuple[float, ...]]


@dataclass(frozen=True)
class Given:
    """An input: its key, its value as read from ``text`` [SI], and its kind (pressure, temperature, …)."""

    key: str
    text: str
    value: float
    kind: str
    unit: Unit


@dataclass(frozen=True)
class Step:
    """One formula; ``slips`` are the ways in which it can be done wrongly, by name."""

    outputs: tuple[str, ...]
    parents: tuple[str, ...]
    function: Function
    slips: tuple[tuple[str, Function], ...] = ()


@dataclass(frozen=True)
class Claim:
    """What may be written of a key: pointer, unit, decimals; ``reference`` is what half a percent is taken of [SI]."""

    key: str
    pointer: str
    kind: str
    unit: Unit
    decimals: int = 0
    reference: float = 0.0
    sign: float = 1.0

    def text(self, value: float) -> str:
        """Return the value as it is written."""
        return text_of(self.sign * value, self.unit, self._decimals(value))

    def _decimals(self, value: float) -> int:
        """Return the decimals: a value far smaller than the right one keeps three digits, a far larger one has ten."""
        size = abs(value - self.unit.zero)
        if self.kind == "temperature" or size <= 1e-7 * self.reference:
            return self.decimals
        least, most = (decimals_for(size, self.unit, digits) for digits in (3, 10))
        return max(min(self.decimals, most), min(least, self.decimals + 6))

    def value(self, text: str) -> float:
        """Return what a reader takes from the text. [SI]"""
        return self.sign * stated_value(text, self.unit)

    def half_width(self, text: str) -> float:
        """Return half a unit of the last place of a text. [SI]"""
        return half_width(self.unit, decimals_of(text, self.unit))


@dataclass(frozen=True)
class Slip:
    """One mistake: an input used as ``value``, a step done by ``function``, a result written by ``rewrite``.

    A slip of the pen is a ``retext`` of the number's own digits.
    """

    kind: str
    key: str
    value: float | None = None
    function: Function | None = None
    rewrite: Callable[[float, Values], float] | None = None
    retext: Callable[[str], str] | None = None
    carried: bool = True

    @property
    def place(self) -> str:
        """Return input, step or result."""
        return "input" if self.value is not None else "step" if self.function else "result"

    @property
    def told(self) -> Done:
        """Return the slip without its functions."""
        return Done(self.kind, self.place, self.key, self.value, self.carried)


class Done(NamedTuple):
    """A slip as it is told: without its functions."""

    kind: str
    place: str
    key: str
    value: float | None
    carried: bool


@dataclass(frozen=True)
class Chain:
    """The calculation of one record in the order of work."""

    givens: tuple[Given, ...]
    steps: tuple[Step, ...]
    claims: tuple[Claim, ...] = ()
    early: bool = False

    def step_of(self, key: str) -> Step | None:
        """Return the step that makes a key; None for inputs."""
        return next((step for step in self.steps if key in step.outputs), None)

    def with_claims(self, claims: Iterable[Claim], early: bool) -> Chain:
        """Return the chain with what is written of it."""
        return replace(self, claims=tuple(claims), early=early)

    def above(self, key: str) -> frozenset[str]:
        """Return all keys that a key depends on, itself left out."""
        found: dict[str, frozenset[str]] = {}
        for step in self.steps:
            own = frozenset(step.parents).union(*(found.get(parent, frozenset()) for parent in step.parents))
            found.update(dict.fromkeys(step.outputs, own))
        return found.get(key, frozenset())


class OtherDigitsError(ValueError):
    """A text differs from the expected one."""


def values_of(
    chain: Chain,
    slips: Iterable[Slip] = (),
    rounded: bool = True,
    expected: Mapping[str, str] | None = None,
) -> tuple[Values, dict[str, str]]:
    """Return what the originator has in mind for each key, and the texts of the claims by their keys.

    Without ``rounded`` nothing is rounded early, whatever the originator's habit: that is the truth. With
    ``expected`` texts the first one that differs by more than one in the last place raises OtherDigitsError.
    """
    slipped = {(slip.place, slip.key): slip for slip in slips}
    claims = {claim.key: claim for claim in chain.claims}
    values, texts = {given.key: given.value for given in chain.givens}, {}
    for key in values:
        if ("input", key) in slipped:
            values[key] = slipped["input", key].value or 0.0
    for step in chain.steps:
        slip = next((slipped["step", key] for key in step.outputs if ("step", key) in slipped), None)
        outputs = (slip.function if slip and slip.function else step.function)(values)
        values.update(zip(step.outputs, outputs, strict=True))
        for key in step.outputs:
            if key in claims:
                slip = slipped.get(("result", key))
                texts[key] = _written(claims[key], values, slip, chain.early and rounded)
                if expected is not None and not _same(claims[key], texts[key], expected[key]):
                    raise OtherDigitsError(key)
    return values, texts


def _same(claim: Claim, text: str, expected: str) -> bool:
    """Say whether two texts are alike but for one in the last place, which rounding on the way may cost."""
    return abs(claim.value(text) - claim.value(expected)) <= 2.05 * claim.half_width(expected)


def _written(claim: Claim, values: Values, slip: Slip | None, early: bool) -> str:
    """Return the text of a claim; what is carried on from it replaces the value in mind."""
    key = claim.key
    if slip is None or (slip.rewrite is None and slip.retext is None):
        text = claim.text(values[key])
        if early:
            values[key] = claim.value(text)
        return text
    if slip.rewrite is not None:
        wrong = slip.rewrite(values[key], values)
        text = claim.text(wrong)
    else:
        text = slip.retext(claim.text(values[key])) if slip.retext else ""
        wrong = claim.value(text)
    if slip.carried:
        values[key] = claim.value(text) if early else wrong
    return text


def step_slips(chain: Chain) -> Iterator[Slip]:
    """Yield every way in which a step can be done wrongly."""
    for step in chain.steps:
        for kind, function in step.slips:
            yield Slip(kind, step.outputs[0], function=function)

"""One trial: a record, the slips in it, what they move, where they start, and whether their digits tell them apart."""

from __future__ import annotations

import json
import random
from collections.abc import Iterable, Iterator, Sequence
from dataclasses import dataclass
from functools import cache

from tests.benchmarks.seeded.chain import Chain, Done, OtherDigitsError, Slip, Values, step_slips, values_of
from tests.benchmarks.seeded.draft import Draft, package_of
from tests.benchmarks.seeded.equation import NoStateError, equation_of
from tests.benchmarks.seeded.originator import written_chain
from tests.benchmarks.seeded.situations import SITUATIONS
from tests.benchmarks.seeded.wrong_inputs import input_slips
from tests.benchmarks.seeded.wrong_results import result_slips

MOVED_SHARE = 0.005
MOVED_HALF_WIDTHS = 1.2
FAILURES = (NoStateError, ArithmeticError, ValueError, TypeError, KeyError)
"""What a slip may run into that leads to no number; the originator would notice."""


@dataclass(frozen=True)
class Trial:
    """A record as it is submitted, and the truth about it; ``origins`` holds the places where each slip may start."""

    name: str
    situation: str
    hard: bool
    package: bytes
    plain: bytes
    slips: tuple[Done, ...] = ()
    origins: tuple[frozenset[str], ...] = ()
    first: tuple[frozenset[str], ...] = ()
    moved: frozenset[str] = frozenset()
    identifiable: bool = False
    imitators: tuple[str, ...] = ()
    early: bool = False


@dataclass(frozen=True)
class Written:
    """A correct record with everything needed to slip in it."""

    draft: Draft
    chain: Chain
    texts: dict[str, str]
    truth: Values

    def package(self, texts: dict[str, str]) -> bytes:
        """Return the package with the given texts of its claims."""
        return json.dumps(package_of(self.draft, texts, self.chain.claims), ensure_ascii=False).encode()

    def slips(self) -> Iterator[Slip]:
        """Yield all slips that can happen here."""
        notes = self.draft.notes
        fluid = notes.get("fluid")
        walls = frozenset(given.key for given in self.chain.givens if given.key.startswith(("tb", "tl")))
        yield from input_slips(self.chain, walls)
        yield from step_slips(self.chain)
        molar_mass = equation_of(fluid).molar_mass if fluid else None
        yield from result_slips(self.chain, self.texts, molar_mass, notes.get("duration"))


def written(situation: str, rng: random.Random) -> Written:
    """Return a correct record of a situation; draws again where the draw has no state."""
    for _ in range(200):
        try:
            draft = SITUATIONS[situation](rng)
            chain = written_chain(draft)
            _, texts = values_of(chain)
            truth, _ = values_of(chain, rounded=False)
        except FAILURES:
            continue
        return Written(draft, chain, texts, truth)
    raise RuntimeError(f"no record of {situation}")


def correct_trial(seed: int, number: int) -> Trial:
    """Return a correct record."""
    rng = random.Random(f"correct {seed} {number}")
    names = tuple(SITUATIONS)
    found = written(names[number % len(names)], rng)
    package = found.package(found.texts)
    draft = found.draft
    return Trial(f"correct {number}", draft.situation, draft.hard, package, package, early=found.chain.early)


def slipped_trial(seed: int, number: int, count: int = 1) -> Trial:
    """Return a record with one or two slips that count."""
    rng = random.Random(f"slipped {count} {seed} {number}")
    for _ in range(300):
        kind, situation = _aim(rng, number)
        found = written(situation, rng)
        slips = _chosen(found, rng, kind, count)
        if slips:
            return _trial(f"{'pair' if count == 2 else 'slip'} {number}", found, slips, count)
    raise RuntimeError(f"no slip of kind {kind} that counts")


def _aim(rng: random.Random, number: int) -> tuple[str | None, str]:
    """Return the kind to go for and a situation: every other record goes round all kinds, the rest is drawn freely."""
    if number % 2:
        return None, rng.choice(tuple(SITUATIONS))
    places = where_kinds_happen()
    kind = tuple(places)[number // 2 % len(places)]
    return kind, rng.choice(places[kind])


@cache
def where_kinds_happen() -> dict[str, tuple[str, ...]]:
    """Return the situations in which each kind of slip can be made so that it counts."""
    found: dict[str, dict[str, None]] = {}
    for situation in SITUATIONS:
        for draw in range(3):
            record = written(situation, random.Random(f"survey {situation} {draw}"))
            for slip in record.slips():
                if situation not in found.get(slip.kind, {}) and counts(record, (slip,)):
                    found.setdefault(slip.kind, {})[situation] = None
    return {kind: tuple(found[kind]) for kind in sorted(found)}


def _chosen(found: Written, rng: random.Random, kind: str | None, count: int) -> tuple[Slip, ...]:
    """Return slips of different kinds and places that count alone and together; none if there are none."""
    by_kind: dict[str, list[Slip]] = {}
    for slip in found.slips():
        by_kind.setdefault(slip.kind, []).append(slip)
    chosen: tuple[Slip, ...] = ()
    kinds = rng.sample(sorted(by_kind), len(by_kind))
    if kind is not None:
        kinds = [kind, *(name for name in kinds if name != kind)] if count == 2 else [kind]
    for name in kinds:
        for slip in rng.sample(by_kind.get(name, []), len(by_kind.get(name, [])))[:12]:
            if not counts(found, (slip,)) or not _apart(found, chosen, slip):
                continue
            chosen = (*chosen, slip)
            if len(chosen) == count:
                return chosen
            break
        if kind is not None and not chosen:
            return ()
    return ()


def _apart(found: Written, before: tuple[Slip, ...], slip: Slip) -> bool:
    """Say whether a second slip acts in a place of its own, and each still counts on top of the other."""
    if not before:
        return True
    if any(slip.key == other.key for other in before):
        return False
    return bool(moved_by(found, slip, before)) and all(
        moved_by(found, other, tuple(o for o in (*before, slip) if o is not other)) for other in before
    )


def counts(found: Written, slips: Sequence[Slip]) -> bool:
    """Say whether slips move a claim beyond the yardstick."""
    return bool(moved_claims(found, slips))


def moved_claims(found: Written, slips: Sequence[Slip]) -> frozenset[str]:
    """Return the keys of the claims that slips move beyond the yardstick, away from the truth."""
    texts = _texts(found, slips)
    if texts is None:
        return frozenset()
    return frozenset(
        claim.key
        for claim in found.chain.claims
        if abs(claim.value(texts[claim.key]) - found.truth[claim.key])
        > MOVED_SHARE * _reference(claim.kind, claim.reference, found.truth[claim.key])
        + MOVED_HALF_WIDTHS * claim.half_width(texts[claim.key])
    )


def moved_by(found: Written, slip: Slip, others: tuple[Slip, ...]) -> frozenset[str]:
    """Return the keys of the claims that one slip moves on top of others."""
    without, along = _texts(found, others), _texts(found, (*others, slip))
    if without is None or along is None:
        return frozenset()
    return frozenset(
        claim.key
        for claim in found.chain.claims
        if abs(claim.value(along[claim.key]) - claim.value(without[claim.key]))
        > MOVED_SHARE * _reference(claim.kind, claim.reference, found.truth[claim.key])
        + MOVED_HALF_WIDTHS * claim.half_width(along[claim.key])
    )


def _reference(kind: str, reference: float, value: float) -> float:
    return abs(value) if kind == "temperature" else reference


def _texts(found: Written, slips: Iterable[Slip]) -> dict[str, str] | None:
    """Return the texts of the slipped record, None where the slip leads to no number."""
    try:
        return values_of(found.chain, slips)[1]
    except FAILURES:
        return None


def frontier(chain: Chain, moved: frozenset[str]) -> frozenset[str]:
    """Return the moved claims that no other moved claim stands above."""
    return frozenset(key for key in moved if not chain.above(key) & moved)


def first_of(chain: Chain, front: frozenset[str]) -> frozenset[str]:
    """Return those of a frontier that the first step of the calculation makes."""
    for step in chain.steps:
        if front & set(step.outputs):
            return front & set(step.outputs)
    return front


def _trial(name: str, found: Written, slips: tuple[Slip, ...], count: int) -> Trial:
    chain, draft = found.chain, found.draft
    texts = _texts(found, slips) or {}
    pointers = {claim.key: claim.pointer for claim in chain.claims}
    fronts = []
    for slip in slips:
        others = tuple(other for other in slips if other is not slip)
        fronts.append(frontier(chain, moved_by(found, slip, others)))
    imitators = imitators_of(found, slips[0], texts) if count == 1 else ()
    return Trial(
        name,
        draft.situation,
        draft.hard,
        found.package(texts),
        found.package(found.texts),
        tuple(slip.told for slip in slips),
        tuple(frozenset(pointers[key] for key in front) for front in fronts),
        tuple(frozenset(pointers[key] for key in first_of(chain, front)) for front in fronts),
        frozenset(pointers[key] for key in moved_claims(found, slips)),
        count == 1 and not imitators,
        imitators,
        chain.early,
    )


def imitators_of(found: Written, slip: Slip, texts: dict[str, str]) -> tuple[str, ...]:
    """Return the other kinds that write the same digits everywhere."""
    kinds: dict[str, None] = {}
    for other in found.slips():
        if other.kind == slip.kind or other.kind in kinds:
            continue
        try:
            values_of(found.chain, (other,), expected=texts)
        except (OtherDigitsError, *FAILURES):
            continue
        kinds[other.kind] = None
    return tuple(kinds)

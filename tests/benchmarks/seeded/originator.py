"""The originator: which results are written and how they are rounded."""

from __future__ import annotations

import math
import random
from collections.abc import Mapping
from dataclasses import replace

from tests.benchmarks.seeded import units as un
from tests.benchmarks.seeded.chain import Chain, Claim, values_of
from tests.benchmarks.seeded.draft import Draft
from tests.benchmarks.seeded.units import decimals_for, fitting

ENERGIES = (un.J, un.KJ, un.MJ)
ENTROPIES = (un.J_K, un.KJ_K)


def written_chain(draft: Draft) -> Chain:
    """Return the chain with what this originator writes of it, in units and digits of the originator's choice."""
    rng, chain = draft.rng, draft.chain()
    values, _ = values_of(chain)
    digits = rng.choice((3, 4, 4, 5))
    early = digits >= 4 and rng.random() < 0.3
    share = rng.uniform(0.45, 1.0)
    references = references_of(draft, values)
    units: dict[str, un.Unit] = {}
    claims = []
    for claim in draft.claims:
        value = values.get(claim.key, math.nan)
        reference = references.get(claim.key, abs(value))
        if not math.isfinite(value) or reference <= 1e-12:
            continue
        kept = rng.random() < share
        claims.append((kept, rounded(claim, value, reference, digits, early, units, draft.groups, rng)))
    # exergy destroyed in the surroundings too rests on their generation, so that one is written with the other
    total = {claim.key.split(".")[0] for kept, claim in claims if kept and claim.key.endswith(".xd")}
    claims = [(kept or (c.key.endswith(".sgs") and c.key.split(".")[0] in total), c) for kept, c in claims]
    kept_claims = [claim for kept, claim in claims if kept]
    if not any(claim.kind in ("energy", "entropy") for claim in kept_claims):
        kept_claims = [claim for _, claim in claims]
    order = {key: place for place, key in enumerate(key for step in chain.steps for key in step.outputs)}
    return chain.with_claims(sorted(kept_claims, key=lambda claim: order[claim.key]), early)


def references_of(draft: Draft, values: Mapping[str, float]) -> dict[str, float]:
    """Return what half a percent is taken of, for the claims whose own size is not it. [SI]"""
    found = {}
    for group, keys in draft.references.items():
        sizes = [values[key] for key in keys if math.isfinite(values.get(key, math.nan))]
        if not sizes:
            continue
        name = group.split(":")[0]
        size = max(abs(value) for value in sizes)
        if name in ("u", "s"):
            # along an isotherm or an isentropic the other property tells what is small
            energy, entropy = spread_of(values, "u"), spread_of(values, "s")
            size = max(energy, 60.0 * entropy) if name == "u" else max(entropy, energy / 300.0)
        if name == "quality":
            size = 1.0
        if name == "entropy" and size < 1e-9:  # an isentropic change: its energies tell what is small
            energies = draft.references.get(group.replace("entropy", "energy"), [])
            size = max((abs(values[key]) for key in energies if key in values), default=0.0) / 300.0
        found.update(dict.fromkeys(keys, size))
    return found


def spread_of(values: Mapping[str, float], name: str) -> float:
    """Return the change of a property over the states."""
    found = [v for k, v in values.items() if k[:1].isdigit() and k.endswith(f".{name}") and math.isfinite(v)]
    return max(found) - min(found) if found else 0.0


def rounded(
    claim: Claim,
    value: float,
    reference: float,
    digits: int,
    early: bool,
    units: dict[str, un.Unit],
    groups: Mapping[str, str],
    rng: random.Random,
) -> Claim:
    """Return the claim with its unit and its decimals."""
    unit, kind = claim.unit, claim.kind
    if kind in ("energy", "entropy"):
        choice = ENERGIES if kind == "energy" else ENTROPIES
        unit = units.setdefault(groups.get(claim.key, claim.key), fitting(reference, choice))
        coarse = decimals_for(reference, unit, digits)
        decimals = (
            max(coarse, min(decimals_for(value, unit, digits), coarse + 3))
            if abs(value) > 1e-9 * reference
            else coarse
        )
    elif kind == "temperature":
        decimals = 2 if early else rng.choice((1, 1, 1, 2, 0)) if digits < 5 else 2
    elif kind in ("specific energy", "specific entropy"):
        decimals = (
            max(decimals_for(value, unit, digits), decimals_for(reference, unit, digits)) if value else 3
        )
    elif kind in ("quality", "efficiency", "performance"):
        decimals = max(digits, 3)
    else:
        decimals = decimals_for(
            value - (unit.zero if abs(value) > abs(unit.zero) else 0.0), unit, max(digits, 4)
        )
    return replace(claim, unit=unit, decimals=min(decimals, 9), reference=reference)

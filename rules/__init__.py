"""The rulebook: every rule once, read top to bottom.

One module per theme, one function per rule, and at its end the module's rules as a literal table. Rules compare
and never compute: they see a ``Case`` (or a ``Submission``), ask ``checker.facts`` for what must be computed, and
know neither files nor formats.
"""

from __future__ import annotations

from typing import Final

from rules import (
    adequacy,
    assumptions,
    bodies,
    bookkeeping,
    energy,
    entropy,
    exergy,
    form,
    limits,
    materials,
    path,
    practice,
    sign,
    state,
    units,
    values,
)
from rules.rule import Rule

RULEBOOK: Final[tuple[Rule, ...]] = (
    *form.RULES,  # can it be read
    *units.RULES,  # as it was meant
    *sign.RULES,
    *values.RULES,  # do the stated results follow from the inputs
    *state.RULES,  # and is what they follow from possible
    *path.RULES,
    *bodies.RULES,
    *energy.RULES,
    *entropy.RULES,
    *exergy.RULES,
    *adequacy.RULES,  # by a model that holds
    *materials.RULES,
    *assumptions.RULES,
    *practice.RULES,  # in equipment that takes it
    *limits.RULES,  # within what is promised
    *bookkeeping.RULES,  # so that somebody can sign
)

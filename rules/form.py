"""Form: what keeps a package from being read as its originator meant it.

A problem of form shows nothing to be wrong with the calculation: it is a query, and what depends on it is not
reviewed until it is answered.
"""

from __future__ import annotations

from typing import Final

from checker.findings import Grade
from rules.reading import reading_rule
from rules.rule import Rule

_YAML: Final = "YAML 1.2.2 (2021), RFC 8259 (JSON)"

RULES: Final[tuple[Rule, ...]] = (
    reading_rule(
        "file-unreadable",
        "form",
        Grade.QUERY,
        "The file is empty, too large, not UTF-8, or holds no package.",
        "Nothing in it could be reviewed.",
    ),
    reading_rule(
        "syntax-broken",
        "form",
        Grade.QUERY,
        "The file is not YAML or JSON from this place on.",
        "What follows the place may be read otherwise than it was meant.",
        _YAML,
    ),
    reading_rule(
        "key-repeated",
        "form",
        Grade.QUERY,
        "A key stands twice in one mapping.",
        "One of the two values would be dropped in silence, and nobody could say which was used.",
        _YAML,
    ),
    reading_rule(
        "value-missing",
        "form",
        Grade.QUERY,
        "A quantity is named, and no value is written beside it.",
        "A value that was forgotten, or that stands behind a #, is neither used nor checked.",
        _YAML,
    ),
    reading_rule(
        "alias-used",
        "form",
        Grade.QUERY,
        "An anchor, alias, merge key or tag stands where a value should be written out.",
        "A reviewer must see every value where it is used; a change at one place must not move another.",
    ),
    reading_rule(
        "nesting-too-deep",
        "form",
        Grade.QUERY,
        "Mappings and lists are nested deeper than the record format.",
        "No part of a package is that deep, so something stands at the wrong place.",
    ),
    reading_rule(
        "character-forbidden",
        "form",
        Grade.QUERY,
        "A control or direction character makes the text look other than it is.",
        "What is signed must be what is read.",
        "Unicode Standard Annex 9 (bidirectional text)",
    ),
    reading_rule(
        "part-missing",
        "form",
        Grade.QUERY,
        "Something that a record cannot do without is not there.",
        "Without it nobody can tell what was calculated.",
    ),
    reading_rule(
        "type-wrong",
        "form",
        Grade.QUERY,
        "A text, a list or a mapping stands where another of them belongs.",
        "Its content has no meaning at this place.",
    ),
    reading_rule(
        "name-unknown",
        "form",
        Grade.QUERY,
        "A key is not one that may stand at this place.",
        "A misspelt name would drop a value from the review in silence.",
    ),
    reading_rule(
        "name-repeated",
        "form",
        Grade.QUERY,
        "One quantity is given by its name and by its symbol in the same mapping.",
        "Two values for one quantity: only one of them was used.",
    ),
    reading_rule(
        "word-unknown",
        "form",
        Grade.QUERY,
        "A word is not one of the closed list that belongs here.",
        "A model, path or phase that is not understood cannot be recomputed.",
    ),
    reading_rule(
        "identifier-wrong",
        "form",
        Grade.QUERY,
        "An identifier has other characters than a to z, 0 to 9 and hyphens.",
        "Comments of a review point at identifiers, from one revision to the next.",
    ),
    reading_rule(
        "identifier-repeated",
        "form",
        Grade.QUERY,
        "An identifier stands for two things.",
        "A comment on it would concern both and a reference to it either.",
    ),
    reading_rule(
        "reference-unknown",
        "form",
        Grade.QUERY,
        "A state, body, process, record or quantity is named that does not exist.",
        "A limit, source or process that points at nothing checks nothing.",
    ),
    reading_rule(
        "link-circular",
        "form",
        Grade.QUERY,
        "States are declared the same as each other in a circle.",
        "None of them then follows from an input.",
    ),
)

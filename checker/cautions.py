"""The cautions that every report prints."""

from typing import Final

CAUTIONS: Final[tuple[str, ...]] = (
    "Pressure, heat and stored energy can kill. Treat every number here as a check of a calculation, not as "
    "permission to operate.",
    "This review does not replace the applicable codes, the sizing of relief devices, or the judgement of a "
    "licensed engineer. Local codes prevail.",
    "Only what is listed as checked was checked. What is listed as not checked remains the reviewer's task.",
)

"""References by identifier: to what exists, or to what was probably meant."""

from __future__ import annotations

from collections.abc import Collection

from checker.package.nearest import nearest, perhaps, shortened
from checker.package.notebook import Notebook
from checker.problems import Place


def refer(
    notebook: Notebook, what: str, name: str, known: Collection[str], place: Place, at_key: bool = False
) -> None:
    """Note a fatal problem where a state, body or process is named that the record does not have."""
    if name in known:
        return
    listed = ", ".join(f"`{item}`" for item in list(known)[:12]) or "none"
    notebook.say(
        "reference-unknown",
        place,
        f"The {what} `{shortened(name, 40)}` does not exist in this record. It has: {listed}.",
        lambda: perhaps(nearest(name, known)),
        at_key=at_key,
        fatal=True,
    )


def unique(notebook: Notebook, what: str, items: Collection[tuple[str, Place]]) -> None:
    """Note a fatal problem for every identifier that an earlier one of the same kind has."""
    seen: set[str] = set()
    for name, place in items:
        if name in seen:
            notebook.say(
                "identifier-repeated",
                place,
                f"An earlier {what} is `{name}` as well.",
                "Give each its own identifier.",
                fatal=True,
            )
        seen.add(name)

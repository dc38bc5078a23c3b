"""Links between states: what they point at, written out, and circles among them."""

from __future__ import annotations

from collections.abc import Iterator, Mapping
from typing import Final

from checker.package.atlas import Branch
from checker.package.nearest import nearest, perhaps, shortened
from checker.package.notebook import Notebook
from checker.package.parts.record import Record as RecordPart
from checker.problems import Place

Link = tuple[str, str, str]
"""A body in a state of a record: (record, state, body)."""

_FORM: Final = "records/RECORD/states/STATE/BODY"


def links_of(name: str, record: RecordPart) -> Iterator[tuple[Link, str, Place]]:
    """Yield every linked body with what it is the same as, and the place where that is written."""
    for state, part in record.states.items():
        for body, inner in part.bodies.items():
            if inner.same_as is not None:
                yield (name, state, body), inner.same_as, ("states", state, body, "same_as")


def target_of(own_record: str, text: str) -> Link | None:
    """Return what a link points at; ``states/…`` without a record means the same record. None: no such form."""
    parts = text.split("/")
    if parts[0] != "records":
        parts = ["records", own_record, *parts]
    if len(parts) != 5 or parts[2] != "states":
        return None
    return (parts[1], parts[3], parts[4])


def written_out(link: Link) -> str:
    """Return a link as the review writes it."""
    return "records/{}/states/{}/{}".format(*link)


def check_links(
    record: RecordPart,
    name: str,
    notebook: Notebook,
    atlases: Mapping[str, Branch | None],
    known: Mapping[Link, Link],
) -> None:
    """Note the links of a record that point at nothing, or back at themselves."""
    for origin, text, place in links_of(name, record):
        target = target_of(name, text)
        if target is None:
            message = f"`{shortened(text)}` is no link to a state."
            notebook.say("reference-unknown", place, message, f"Write {_FORM}.", fatal=True)
            continue
        _check_target(notebook, target, atlases, place)
        if _returns(origin, known):
            notebook.say(
                "link-circular",
                place,
                f"Following the links from here leads back to {written_out(origin)}.",
                "Let one of the states of the circle have inputs of its own.",
                fatal=True,
            )


def _check_target(
    notebook: Notebook, target: Link, atlases: Mapping[str, Branch | None], place: Place
) -> None:
    """Note a link to a record, state or body that does not exist."""
    record, state, body = target
    levels: list[tuple[str, str, Mapping[str, object] | None]] = [("record", record, atlases)]
    atlas = atlases.get(record)
    if atlas is not None:
        states = atlas["states"]
        levels += [("state", state, states), ("body", body, states.get(state))]
    for what, name, known in levels:
        if known is not None and name not in known:
            notebook.say(
                "reference-unknown",
                place,
                f"The link names the {what} `{shortened(name, 40)}`, which does not exist.",
                perhaps(nearest(name, known)) or f"Write {_FORM}.",
                fatal=True,
            )
            return


def _returns(origin: Link, known: Mapping[Link, Link]) -> bool:
    """Whether following the links from a state leads back to it."""
    seen: set[Link] = set()
    at: Link | None = known.get(origin)
    while at is not None and at not in seen:
        if at == origin:
            return True
        seen.add(at)
        at = known.get(at)
    return False

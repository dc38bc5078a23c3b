"""Paths: which body follows which, with the parameters as statements.

A parameter stands at ``processes/P/path/NAME`` in a record of one body, and at
``processes/P/bodies/B/path/NAME`` in records of several; a point of a line at ``…/path/points/I/pressure`` and
``…/path/points/I/volume``, counted from 0.
"""

from __future__ import annotations

from collections.abc import Iterator, Mapping

from checker.package.desk import Desk
from checker.package.flatten.references import refer
from checker.package.parts.path import PARAMETERS, POINT_NAMES
from checker.package.parts.path import PathSpec as PathPart
from checker.package.spot import Spot
from checker.problems import Place
from checker.submission import PathSpec, Role
from checker.vocabulary import TERMS, Level


def read_paths(
    desk: Desk, process: str, path: object, bodies: tuple[str, ...], place: Place
) -> Mapping[str, tuple[PathSpec, ...]]:
    """Return the paths of a process by body, and state their parameters.

    ``path`` is a word, a part, a tuple of those, or a mapping from bodies to any of them.
    """
    if path is None:
        return {}
    if isinstance(path, Mapping):
        for body in path:
            refer(desk.notebook, "body", body, bodies, (*place, body), at_key=True)
        by_body = {body: (own, (*place, body)) for body, own in path.items()}
    elif len(bodies) == 1:
        by_body = {bodies[0]: (path, place)}
    else:
        listed = ", ".join(f"{body}: …" for body in bodies)
        desk.notebook.say(
            "part-missing",
            place,
            f"The record has {len(bodies)} bodies, and the path does not say which of them follows it.",
            f"Write it by body: {{{listed}}}.",
            fatal=True,
        )
        return {}
    found = {}
    for body, (own, where) in by_body.items():
        prefix = f"processes/{process}" if len(bodies) == 1 else f"processes/{process}/bodies/{body}"
        found[body] = tuple(_specs(desk, own, where, f"{prefix}/path"))
    return found


def _specs(desk: Desk, path: object, place: Place, prefix: str) -> Iterator[PathSpec]:
    """Yield the paths of one body."""
    if isinstance(path, str):
        yield PathSpec(path, (*desk.notebook.root, *place), prefix)
    elif isinstance(path, PathPart):
        _state_parameters(desk, path, place, prefix)
        yield PathSpec(path.kind, (*desk.notebook.root, *place), prefix, len(path.points))
    elif isinstance(path, tuple):
        for index, item in enumerate(path):
            yield from _specs(desk, item, (*place, index), prefix)


def _state_parameters(desk: Desk, path: PathPart, place: Place, prefix: str) -> None:
    """State the parameters of a path; one that is not of its kind is a problem."""
    known = PARAMETERS.get(path.kind, ())
    spot = Spot(Level.PATH, prefix, place, names=tuple(name for name in known if name != "points"))
    for name, term in TERMS[Level.PATH].items():
        text = None if name in POINT_NAMES else getattr(path, name)
        if text is None:
            continue
        if name in known:
            desk.state(spot, Role.INPUT, term, text, (*place, name))
        else:
            _foreign(desk, path.kind, name, (*place, name))
    if path.points and "points" not in known:
        _foreign(desk, path.kind, "points", (*place, "points"))
    elif path.points:
        _state_points(desk, path, place, prefix)
    desk.take(spot, Role.RESULT, path.results, ("results",))


def _state_points(desk: Desk, path: PathPart, place: Place, prefix: str) -> None:
    """State the points of a line."""
    for index, point in enumerate(path.points):
        where: Place = (*place, "points", index)
        spot = Spot(Level.PATH, f"{prefix}/points/{index}", where)
        for name in POINT_NAMES:
            desk.state(spot, Role.INPUT, TERMS[Level.PATH][name], getattr(point, name), (*where, name))


def _foreign(desk: Desk, kind: str, name: str, place: Place) -> None:
    """Note a parameter that its path does not have."""
    having = [other for other, names in PARAMETERS.items() if name in names]
    known = ", ".join(PARAMETERS.get(kind, ())) or "none"
    desk.notebook.say(
        "name-unknown",
        place,
        f"`{name}` is not a parameter of the path `{kind}` (it has: {known}).",
        f"`{name}` belongs to the path `{having[0]}`." if having else "",
        at_key=True,
    )

"""States: the properties of each body, its phase, and what it continues."""

from __future__ import annotations

from checker.package.desk import Desk
from checker.package.flatten.references import refer
from checker.package.nearest import nearest, perhaps, shortened
from checker.package.parts.record import Record as RecordPart
from checker.package.parts.state import BodyState as BodyStatePart
from checker.package.spot import Spot, WordStated
from checker.package.words import PHASE_SYNONYMS, PHASES
from checker.problems import Place
from checker.submission import BodyState, Role
from checker.vocabulary import Level


def read_states(desk: Desk, record: RecordPart) -> dict[tuple[str, str], BodyState]:
    """State the quantities of all states, and return each body in each state."""
    found = {}
    for state, part in record.states.items():
        for body, inner in part.bodies.items():
            place: Place = ("states", state, body)
            refer(desk.notebook, "body", body, record.bodies, place, at_key=True)
            found[state, body] = _body_state(desk, state, body, inner, place)
    return found


def _body_state(desk: Desk, state: str, body: str, part: BodyStatePart, place: Place) -> BodyState:
    """State the properties of a body in a state."""
    spot = Spot(Level.STATE, f"states/{state}/{body}", place)
    inputs = desk.take(spot, Role.INPUT, part.inputs, ("inputs",))
    results = desk.take(spot, Role.RESULT, part.results, ("results",))
    given, claimed = (_phase(desk, words.get("phase"), spot.prefix) for words in (inputs, results))
    role = Role.INPUT if given else Role.RESULT if claimed else None
    return BodyState(
        state=state,
        body=body,
        place=(*desk.notebook.root, *place),
        phase=given or claimed,
        phase_role=role,
        same_as=part.same_as,
        claimed_phase=claimed,
    )


def _phase(desk: Desk, stated: WordStated | None, pointer: str) -> str | None:
    """Return the phase word of the format for a stated one; None where it is none."""
    if stated is None:
        return None
    word = " ".join(stated.text.split())
    word = PHASE_SYNONYMS.get(word, word)
    if word in PHASES:
        return word
    desk.notebook.say(
        "word-unknown",
        stated.place,
        f"`{shortened(stated.text, 40)}` is not a phase: {', '.join(PHASES)}.",
        lambda: perhaps(
            PHASE_SYNONYMS.get(name, name) for name in nearest(word, (*PHASES, *PHASE_SYNONYMS))[:1]
        ),
        quantity=f"{pointer}/phase",
    )
    return None

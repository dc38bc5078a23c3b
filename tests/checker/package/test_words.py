"""Words: closed lists, nearest words, kinds of problems, units in messages."""

from __future__ import annotations

import re

import pytest

from checker.package import KINDS
from checker.package.atlas import Found, Lost, atlas_of, find
from checker.package.examples import example_of, units_of
from checker.package.nearest import nearest, shortened, without_value
from checker.package.parts.record import Record
from checker.package.words import PHASE_SYNONYMS, PHASES
from checker.quantity import parse_quantity
from checker.vocabulary import TERMS, Level

STATE = tuple(TERMS[Level.STATE])


@pytest.mark.parametrize(
    ("word", "known", "found"),
    [
        ("Temperature", STATE, ("temperature",)),
        ("specific volume", STATE, ("specific_volume",)),
        ("internal-energy", STATE, ("internal_energy",)),
        ("temprature", STATE, ("temperature",)),
        ("temp", STATE, ("temperature",)),
        ("rho", STATE, ("density",)),
        ("cv", tuple(TERMS[Level.BODY]), ("specific_heat_at_constant_volume",)),
        ("qqqq", STATE, ()),
        ("", STATE, ()),
        ("x" * 5000, STATE, ()),
        ("rho", ("pressure",), ()),
    ],
)
def test_nearest(word: str, known: tuple[str, ...], found: tuple[str, ...]) -> None:
    """Case, separators, misspellings, shortened words and trade symbols lead to the known word."""
    assert nearest(word, known)[:1] == found


def test_texts_in_messages_are_short() -> None:
    """A long or many-lined text becomes one short line."""
    assert shortened("a\n  b") == "a b"
    assert len(shortened("x" * 1000)) == 60
    assert "colon" in without_value("a:1")
    assert "comma" in without_value("5 bar")


def test_kinds_are_slugs_with_a_meaning() -> None:
    """Every kind is a plain slug and says in one line what it means."""
    for kind, meaning in KINDS.items():
        assert re.fullmatch(r"[a-z]+(-[a-z]+)*", kind)
        assert meaning[0].islower()
        assert not meaning.endswith(".")


def test_kinds_of_quantities_are_listed() -> None:
    """Every kind that the quantity grammar can raise is in the list."""
    from checker.quantity import types

    named = re.findall(r"``([a-z]+(?:-[a-z]+)+)``", types.QuantityError.__doc__ or "")
    assert len(named) >= 7
    assert set(named) <= set(KINDS)


def test_phase_synonyms_mean_phases() -> None:
    """Other words for a phase stand for one, and are none themselves."""
    assert set(PHASE_SYNONYMS.values()) <= set(PHASES)
    assert not set(PHASE_SYNONYMS) & set(PHASES)
    assert PHASE_SYNONYMS["compressed liquid"] == "subcooled liquid"


@pytest.mark.parametrize("level", list(Level))
def test_examples_are_accepted(level: Level) -> None:
    """The example in a message is read as a quantity of its term, and its first unit is named."""
    for term in TERMS[level].values():
        if term.text:
            continue
        quantity = parse_quantity(example_of(term), expected=term.dimension, scale=term.scale, atmosphere=1e5)
        assert quantity.dimension == term.dimension
        assert units_of(term)


RECORD = Record.model_validate(
    {
        "id": "r",
        "bodies": {"gas": {"substance": "Air", "model": "ideal gas"}},
        "states": {"a": {"gas": {}}, "b": {"gas": {}}},
        "processes": [
            {"id": "p", "from": "a", "to": "b", "heat_transfers": [{"id": "wall"}], "work_transfers": [
                {"id": "rod", "kind": "shaft"}]},
        ],
        "sequences": [{"id": "s", "processes": ["p"]}],
        "assumptions": [{"id": "ke", "text": "x"}],
        "limits": [{"id": "top", "quantity": "x"}],
    }
)  # fmt: skip


@pytest.mark.parametrize(
    "pointer",
    [
        "bodies/gas/mass", "states/a/gas/quality", "processes/p/heat", "processes/p/heat_transfers/wall/energy",
        "processes/p/heat_transfers/wall/boundary_temperature", "processes/p/work_transfers/rod/mean_power",
        "processes/p/bodies/gas/heat", "processes/p/path/exponent", "processes/p/path/points/0/volume",
        "processes/p/total_volume/volume", "results/net_work", "sequences/s/stop_volume", "assumptions/ke/mass",
        "surroundings/pressure",
    ],
)  # fmt: skip
def test_pointers_that_exist(pointer: str) -> None:
    """Each kind of pointer of the format leads to its term, and is written as the review writes it."""
    found = find(atlas_of(RECORD), pointer)
    assert isinstance(found, Found)
    assert found.term is not None
    assert found.term.name == pointer.rsplit("/", 1)[-1]
    assert found.pointer == pointer


@pytest.mark.parametrize(
    "pointer", ["bodies/gas", "states/a", "processes/p", "limits/top", "processes/p/path"]
)
def test_pointers_to_parts(pointer: str) -> None:
    """A pointer may end at a part that holds quantities."""
    assert find(atlas_of(RECORD), pointer) == Found(pointer, None)


@pytest.mark.parametrize(
    ("written", "pointer"),
    [
        ("processes/p/path/gas/exponent", "processes/p/path/exponent"),
        ("processes/p/bodies/gas/path/exponent", "processes/p/path/exponent"),
    ],
)
def test_a_path_parameter_has_one_pointer(written: str, pointer: str) -> None:
    """However a path parameter of the only body is written, it is one quantity."""
    found = find(atlas_of(RECORD), written)
    assert isinstance(found, Found)
    assert found.pointer == pointer


@pytest.mark.parametrize(
    ("pointer", "offset", "part"),
    [
        ("", 0, ""),
        ("/bodies/gas/mass", 0, ""),
        ("body/gas/mass", 0, "body"),
        ("bodies/air/mass", 7, "air"),
        ("bodies/gas/heat", 11, "heat"),
        ("bodies/gas/mass/x", 16, "x"),
        ("bodies/gas/", 11, ""),
        ("processes/p/path/points/x/volume", 24, "x"),
        ("processes/p/path/points/²/volume", 24, "²"),
        ("records/r/bodies/gas/mass", 0, "records"),
    ],
)
def test_pointers_that_lead_nowhere(pointer: str, offset: int, part: str) -> None:
    """A wrong pointer is located at the part where it goes astray."""
    lost = find(atlas_of(RECORD), pointer)
    assert isinstance(lost, Lost)
    assert (lost.offset, lost.part) == (offset, part)

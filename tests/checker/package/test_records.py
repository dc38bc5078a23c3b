"""Records stand by themselves: a broken one is reported, and the others are read."""

from __future__ import annotations

from collections.abc import Callable

import pytest

Read = Callable[..., object]

SECOND = """\
  - id: second
    bodies: {air: {substance: Air, model: ideal gas, inputs: {mass: 1 kg}}}
    states: {a: {air: {inputs: {temperature: 20 °C}}}, b: {air: {inputs: {temperature: 30 °C}}}}
    processes: [{id: p, from: a, to: b, heat_transfers: [], results: {heat: 1 kJ}}]
"""


def test_a_broken_record_does_not_take_down_the_others(read: Read, bottle: str) -> None:
    """The record without its end state is unreadable; the second one is read in full."""
    result = read(("        to: hot\n", ""), of=bottle + SECOND)
    assert result.submission.unreadable == ("bottle",)
    assert [record.id for record in result.submission.records] == ["second"]
    (problem,) = result.submission.problems
    assert (problem.kind, problem.record, problem.fatal) == ("part-missing", "bottle", True)


def test_problems_of_a_readable_record_are_with_it(read: Read, bottle: str) -> None:
    """What does not keep a record from being reviewed belongs to the record."""
    result = read(("temperature: 15 °C", "temperature: mild"), of=bottle + SECOND)
    assert result.submission.problems == ()
    assert [len(record.problems) for record in result.submission.records] == [1, 0]


def test_all_problems_of_a_record_are_told_at_once(read: Read) -> None:
    """A wrong reference does not hide an unreadable quantity in the same record."""
    result = read(("from: cold", "from: kold"), ("temperature: 15 °C", "temperature: mild"))
    assert {problem.kind for problem in result.problems} == {"reference-unknown", "quantity-unreadable"}
    assert result.submission.unreadable == ("bottle",)


def test_records_without_an_identifier_go_by_their_number(read: Read, bottle: str) -> None:
    """A missing, malformed or repeated identifier is replaced by the record's number."""
    texts = (
        SECOND.replace("id: second\n    ", ""),
        SECOND.replace("second", "Second!"),
        SECOND.replace("second", "bottle"),
    )
    result = read(of=bottle + "".join(texts))
    assert result.submission.unreadable == ("record 2", "record 3", "record 4")
    assert [record.id for record in result.submission.records] == ["bottle"]
    kinds = [(problem.kind, problem.record) for problem in result.submission.problems]
    assert kinds == [
        ("part-missing", "record 2"),
        ("identifier-wrong", "record 3"),
        ("identifier-repeated", "record 4"),
    ]


@pytest.mark.parametrize("record", ["text", "[a, b]", "", "7", "{}"])
def test_records_that_are_none(read: Read, bottle: str, record: str) -> None:
    """Something else in the list of records is an unreadable record."""
    result = read(of=f"{bottle}  - {record}\n")
    assert result.submission.unreadable == ("record 2",)
    assert len(result.submission.records) == 1
    assert {problem.kind for problem in result.submission.problems} <= {"type-wrong", "part-missing"}


@pytest.mark.parametrize(
    ("text", "kind", "fatal"),
    [
        ("package: {number: X}\n", "part-missing", True),
        ("package: {number: X}\nrecords:\n", "part-missing", True),
        ("package: {number: X}\nrecords: []\n", "part-missing", True),
        ("package: {number: X}\nrecords: {a: b}\n", "type-wrong", True),
        ("package: {number: X}\nrecords: none\n", "type-wrong", True),
    ],
)
def test_packages_without_records(read: Read, text: str, kind: str, fatal: bool) -> None:
    """A package that lists no record cannot be reviewed; its header is still read."""
    result = read(of=text)
    (problem,) = result.submission.problems
    assert (problem.kind, problem.fatal, problem.record) == (kind, fatal, None)
    assert result.submission.head.number == "X"
    assert result.submission.records == ()


def test_a_package_without_a_header_is_reviewed(read: Read) -> None:
    """The records of a package without a header are read; the header is asked for."""
    result = read(of="records:\n" + SECOND)
    (problem,) = result.submission.problems
    assert (problem.kind, problem.fatal) == ("part-missing", False)
    assert [record.id for record in result.submission.records] == ["second"]


@pytest.mark.parametrize(
    ("old", "new", "kind"),
    [
        ("number: TC-1", "number: [TC, 1]", "type-wrong"),
        ("number: TC-1", "numbr: TC-1", "name-unknown"),
        ("conventions: {work: positive out}", "conventions: positive out", "type-wrong"),
        ("surroundings: {temperature: 25 °C, pressure: 1.013 bar}", "surroundings: 25 °C", "type-wrong"),
    ],
)
def test_a_wrong_header_is_reviewed_in_part(read: Read, old: str, new: str, kind: str) -> None:
    """What is wrong in the header is left out of it; the rest and the records are read."""
    result = read((old, new))
    (problem,) = result.submission.problems
    assert (problem.kind, problem.record, problem.fatal) == (kind, None, False)
    assert len(result.submission.records) == 1


def test_a_header_that_is_no_mapping(read: Read) -> None:
    """A header of another shape is refused as a whole; the records are read."""
    result = read(of="package: TC-1\nrecords:\n" + SECOND)
    (problem,) = result.submission.problems
    assert (problem.kind, problem.fatal, problem.place) == ("type-wrong", False, ("package",))
    assert len(result.submission.records) == 1


def test_the_header_is_kept_as_written(read: Read) -> None:
    """No field of the header is taken for a number, a truth value or a date."""
    result = read(("  number: TC-1\n", "  number: 007\n  revision: 01\n  title: NO\n  date: 2026-03-14\n"))
    head = result.submission.head
    assert (head.number, head.revision, head.title, head.date) == ("007", "01", "NO", "2026-03-14")
    assert head.work_convention == "positive out"


def test_transfers_not_stated_and_none_are_different(read: Read) -> None:
    """A missing key means not stated, an empty list means none."""
    not_stated = read(("        work_transfers: [{id: fan, kind: shaft, inputs: {energy: 1 kJ}}]\n", ""))
    none = read(("[{id: fan, kind: shaft, inputs: {energy: 1 kJ}}]", "[]"))
    assert not_stated.record.processes[0].work_transfers is None
    assert none.record.processes[0].work_transfers == ()


def test_lost_content_makes_the_record_unreadable(read: Read, bottle: str) -> None:
    """An alias inside a record loses content: that record is not reviewed, and nothing else is said about it."""
    result = read(("inputs: {temperature: 60 °C}", "inputs: *cold"), of=bottle + SECOND)
    assert result.submission.unreadable == ("bottle",)
    (problem,) = result.submission.problems
    assert (problem.kind, problem.record, problem.quantity) == ("alias-used", "bottle", "states/hot/nitrogen")
    assert [record.id for record in result.submission.records] == ["second"]


def test_problems_of_the_file_go_to_their_record(read: Read) -> None:
    """A repeated key is reported with the record and the quantity, and the record is reviewed."""
    result = read(("{temperature: 15 °C, pressure: 150 bar}", "{temperature: 15 °C, temperature: 16 °C}"))
    (problem,) = result.record.problems
    assert (problem.kind, problem.record) == ("key-repeated", "bottle")
    assert problem.quantity == "states/cold/nitrogen/temperature"


def test_one_fault_is_reported_once(read: Read) -> None:
    """A value about which the file's form was complained is not complained about again."""
    result = read(("pressure: 150 bar", "pressure: 150\u202e bar"))
    assert [problem.kind for problem in result.problems] == ["character-forbidden"]


def test_an_unreadable_file_submits_nothing(read: Read) -> None:
    """Without a tree there are no records, and the file's problem is the submission's."""
    result = read(of="a: [")
    assert result.submission.records == ()
    assert result.submission.problems == result.document.problems


def test_problems_name_the_part_by_identifiers(read: Read) -> None:
    """The pointer of a problem has identifiers, so that it stays the same from one revision to the next."""
    result = read(("id: wall, boundary_temperature: 70 °C", "id: wall, boundary_temprature: 70 °C"))
    (problem,) = result.problems
    assert problem.quantity == "processes/warming/heat_transfers/wall/boundary_temprature"


def test_many_problems_are_counted(read: Read, bottle: str) -> None:
    """After a hundred problems of a record the rest is a number."""
    names = ", ".join(f"zzz{n}: 1 bar" for n in range(250))
    result = read(("{temperature: 60 °C}", "{" + names + "}"), of=bottle)
    assert len(result.record.problems) == 101
    assert "150 more problems" in result.record.problems[-1].message


def test_a_list_of_rubbish_ends_early(read: Read, bottle: str) -> None:
    """After a thousand problems the remaining records are not looked at, which is said."""
    result = read(of=bottle + "  - {}\n" * 900)
    assert len(result.submission.unreadable) == 900
    assert len(result.submission.problems) < 1100
    assert any("were not read" in problem.message for problem in result.submission.problems)


@pytest.mark.parametrize(
    ("quantity", "pointer"),
    [
        ("records/second/states/b/air/temperature", "records/second/states/b/air/temperature"),
        ("records/bottle/processes/warming/heat", "records/bottle/processes/warming/heat"),
        ("processes/warming/path/nitrogen/exponent", "processes/warming/path/exponent"),
    ],
)
def test_limits_across_records(read: Read, bottle: str, quantity: str, pointer: str) -> None:
    """A limit may be on a quantity of another record; its unit is that quantity's."""
    value = {"temperature": "350 K", "heat": "5 MJ", "exponent": "2"}[pointer.rsplit("/", 1)[-1]]
    result = read(
        ("states/hot/nitrogen/pressure, at_most: 200 bar", f"{quantity}, at_most: {value}"),
        of=bottle + SECOND,
    )
    assert result.problems == ()
    (limit,) = result.submission.records[0].limits
    assert (limit.quantity, limit.at_most.text) == (pointer, value)


@pytest.mark.parametrize(
    "pointer", ["records/second/states/z/air/temperature", "records/third/results/net_work", "records/"]
)
def test_limits_on_nothing_in_other_records(read: Read, bottle: str, pointer: str) -> None:
    """A pointer into another record goes astray at the same part as one inside the record."""
    result = read(("states/hot/nitrogen/pressure", pointer), of=bottle + SECOND)
    (problem,) = result.problems
    assert (problem.kind, problem.fatal) == ("reference-unknown", False)
    assert problem.offset == len("records/second/states/" if "second" in pointer else "records/")
    assert result.submission.records[0].limits == ()


def test_a_limit_with_one_readable_side_is_kept(read: Read) -> None:
    """A limit is held against the side that can be read; without one it is left out."""
    both = read(("at_most: 200 bar", "at_most: 200 bar, at_least: low"))
    assert [problem.kind for problem in both.problems] == ["quantity-unreadable"]
    assert both.record.limits[0].at_least is None
    none = read(("at_most: 200 bar", "at_most: 200 K"))
    assert [problem.kind for problem in none.problems] == ["dimension-wrong"]
    assert none.record.limits == ()


def test_problems_of_the_file_outside_the_records(read: Read) -> None:
    """A repeated key in the header is the package's, and does not keep it from being reviewed."""
    result = read(("  number: TC-1\n", "  number: TC-1\n  number: *x\n  title: *y\n"))
    kinds = {(problem.kind, problem.record, problem.fatal) for problem in result.submission.problems}
    assert kinds == {("key-repeated", None, False), ("alias-used", None, False)}
    assert len(result.submission.records) == 1


@pytest.mark.parametrize(
    "state", ["", "{}", "{equilibrium: }", "{nitrogen: }", "{nitrogen: {inputs: , results: }}"]
)
def test_a_state_to_be_found(read: Read, state: str) -> None:
    """A state about which nothing is stated is an end state to be found."""
    result = read(
        ("hot: {nitrogen: {inputs: {temperature: 60 °C}, results: {pressure: 181 bar}}}", f"hot: {state}")
    )
    assert result.problems == ()
    assert result.record.states == ("cold", "hot")
    assert (("hot", "nitrogen") in result.record.body_states) == ("nitrogen" in state)


def test_work_meets_a_body(read: Read) -> None:
    """A work transfer may name the body that it meets, which must exist."""
    right = read(("id: fan, kind: shaft", "id: fan, body: nitrogen, kind: shaft"))
    assert right.record.processes[0].work_transfers[0].body == "nitrogen"
    wrong = read(("id: fan, kind: shaft", "id: fan, body: air, kind: shaft"))
    assert [problem.kind for problem in wrong.problems] == ["reference-unknown"]

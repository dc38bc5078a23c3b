"""The text report."""

from __future__ import annotations

from dataclasses import replace
from io import BytesIO

import pytest
from hypothesis import given

from checker.findings import Review
from reports.terminal import TextOptions, text_lines, write_text
from tests.reports.sample import ACCEPT, EMPTY, FINDINGS, REVISE
from tests.reports.strategies import NO_SHRINKING, reviews

DEFAULT = TextOptions()
COMMENT = """\
  revision-a.yaml:33:43: discrepancy, value-disagrees (comment 2)
    The stated change of internal energy is 40 % above the recomputed one; all inputs of the step
    agree.
    quantity      processes/warming/internal_energy_change (stated result)
    stated        422 kJ
    recomputed    300.6 kJ
    carried       300.6 kJ
    deviation     +121.4 kJ; tolerance 2.1 kJ
    formula       ΔU = m·(u₂ − u₁)
    origin        here: with the originator's own earlier values this step gives 300.6 kJ
    likely cause  cp was used where cv belongs (gives 422.1 kJ)
    spoils        processes/warming/heat_transfers/sunlit-wall/energy: 422 kJ, recomputed 300.6 kJ
    spoils        processes/warming/entropy_generation: -0.261 kJ/K, recomputed 0.0934 kJ/K
    suggestion    Use cv, or take u from the property tables, and revise what follows.
    basis         First law for a closed system at constant volume
"""
ACCOUNT = """\
  Checked and held (3): bodies/nitrogen/mass 8.63 kg; states/hot/nitrogen/pressure 181 bar;
      processes/warming/entropy_change 0.969 kJ/K.
  4 rules found nothing wrong.
  Not checked: generation with surroundings; missing: the reservoir_temperature of the heat transfer
      sunlit-wall.
  Assumed: velocity not stated: taken as zero in both states.
"""


def printed(review: Review, options: TextOptions = DEFAULT) -> str:
    """Return what the writer writes."""
    stream = BytesIO()
    write_text(review, stream, options)
    return stream.getvalue().decode()


@pytest.mark.parametrize("block", [COMMENT, ACCOUNT], ids=["finding", "account of a record"])
def test_prints_exactly(block: str) -> None:
    """A finding and the account of a record read exactly so."""
    assert block in printed(REVISE)


def test_closes_with_the_verdict() -> None:
    """The last sentence tells the verdict and counts everything, what was not checked included."""
    assert printed(REVISE).endswith(
        "Verdict: revise and resubmit. At least one stated result or statement is wrong and must be\n"
        "  corrected. 4 records: 4 discrepancies, 3 queries, 1 remark; 7 results held, 3 not checked.\n"
    )
    assert printed(ACCEPT).endswith(
        "Verdict: accept. Every stated result was recomputed and agrees. 2 records: no discrepancies, no\n"
        "  queries, no remarks; 8 results held, nothing left unchecked.\n"
    )


def test_what_an_origin_elsewhere_spoiled_is_not_left_out() -> None:
    """A wrong result that no finding of its record names is listed with its values."""
    text = printed(replace(REVISE, findings=()))
    expected = (
        "Wrong as a consequence: processes/warming/internal_energy_change: 422 kJ, recomputed 300.6 kJ."
    )
    assert expected in " ".join(text.split())


def test_says_what_could_not_be_read() -> None:
    """An unreadable record is listed and said not to be checked."""
    assert "This record could not be read: nothing in it was checked." in printed(REVISE)


def test_text_of_others_cannot_steer_the_terminal() -> None:
    """Escape sequences and direction marks are shown, not sent."""
    text = printed(REVISE)
    assert "\x1b" not in text
    assert "\u202e" not in text
    assert "\\u{1B}[31mred" in text


def test_colour_only_when_asked_and_never_needed() -> None:
    """Colour adds escape sequences around whole lines and changes no word."""
    coloured = printed(REVISE, TextOptions(colour=True))
    assert "\x1b[1;31m" in coloured
    bare = coloured
    for sequence in ("\x1b[1;31m", "\x1b[1;33m", "\x1b[1;36m", "\x1b[1m", "\x1b[0m"):
        bare = bare.replace(sequence, "")
    assert bare == printed(REVISE)


@pytest.mark.parametrize("width", [60, 100, 140])
def test_lines_fit_the_width(width: int) -> None:
    """No line is longer than the width asked for."""
    assert max(map(len, text_lines(REVISE, TextOptions(width=width)))) <= width


def test_a_record_with_no_finding_prints_what_held() -> None:
    """An accepted record still lists what was checked."""
    assert "Checked and held (6): bodies/nitrogen/mass 8.63 kg;" in printed(ACCEPT)


def test_an_unknown_origin_is_said_to_be_unknown() -> None:
    """Where the carried value is missing, the report does not stay silent about the origin."""
    unknown = replace(FINDINGS[0], origin=None, carried=None)
    text = printed(replace(REVISE, findings=(unknown,)))
    assert "origin        unknown: the step could not be carried out with the originator's own values" in text


def test_an_empty_review_prints() -> None:
    """A package without records has a head and a verdict."""
    assert printed(EMPTY).startswith(
        "Review of empty.yaml\nFile empty.yaml, SHA-256 unknown\n\nVerdict: hold"
    )


@NO_SHRINKING
@given(reviews())
def test_any_review_prints_within_the_width(review: Review) -> None:
    """Whatever a review holds, it is printed in lines of the width, without any control character."""
    lines = printed(review).splitlines()
    assert all(len(line) <= 100 for line in lines)
    assert not any(character < " " for line in lines for character in line)

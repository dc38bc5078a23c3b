"""Sample records of several bodies and of several processes: a quenched ring, a warmed drum, and a cycle."""

from __future__ import annotations

from dataclasses import replace

from checker.figures import Curve, Diagram, Flow, FlowBox, FlowDiagram, Marker
from checker.findings import Ledger, LedgerLine, Pair, RecordReview, Totals, TotalsFact, TotalsRow
from tests.reports.sample import ACCEPT
from tests.reports.sample_records import amount

RING, OIL = FlowBox("ring", "ring", "body", -400.0), FlowBox("oil", "oil", "body", 400.0)
HEAT = FlowDiagram(
    "quenching", "energy", "kJ", (RING, OIL), (Flow("ring", "oil", "into-oil", "heat", 400.0, 400.0),)
)
GROWTH = FlowDiagram(
    "quenching",
    "entropy",
    "kJ/K",
    (replace(RING, change=-1.0), replace(OIL, change=1.5)),
    (Flow("ring", "oil", "entropy", "entropy", 1.0, 1.5),),
)
JACKET = FlowDiagram(
    "warming",
    "energy",
    "MJ",
    (
        FlowBox("drum", "drum", "body", 2.0),
        FlowBox("water", "water", "body", 49.5),
        FlowBox("heat jacket", "jacket", "outside"),
        FlowBox("boundary water", "boundary of water", "outside"),
    ),
    (
        Flow("heat jacket", "drum", "heat", "heat", 2.0, 2.0),
        Flow("heat jacket", "water", "heat", "heat", 50.0, 50.0),
        Flow("water", "boundary water", "boundary work", "work", 0.5, 0.5),
    ),
)
MEETING = FlowDiagram(
    "warming",
    "entropy",
    "kJ/K",
    (
        FlowBox("drum", "drum", "body", 6.0),
        FlowBox("water", "water", "body", 164.0),
        FlowBox("heat jacket", "jacket", "outside"),
        FlowBox("generation", "generated", "generation"),
        FlowBox("meeting entropy", "between the bodies", "meeting"),
    ),
    (
        Flow("heat jacket", "meeting entropy", "entropy", "entropy", 148.0, 148.0),
        Flow("generation", "meeting entropy", "entropy", "entropy", 22.0, 22.0),
        Flow("meeting entropy", "drum", "entropy", "entropy", 6.0, 6.0),
        Flow("meeting entropy", "water", "entropy", "entropy", 164.0, 164.0),
    ),
)


def _line(label: str, symbol: str, side: str, sign: int, stated: str | None, recomputed: str) -> LedgerLine:
    return LedgerLine(label, symbol, side, sign, amount(stated), amount(recomputed))


COMPOSITE = RecordReview(
    id="quench",
    title="Ring quenched in oil",
    readable=True,
    ledgers=(
        Ledger(
            "quenching",
            "energy",
            "kJ",
            (
                _line("ring: change of internal energy", "ΔU", "change", 1, None, "−400.0 kJ"),
                _line("oil: change of internal energy", "ΔU", "change", 1, None, "400.0 kJ"),
                _line("heat", "Q", "transfer", 1, None, "0 kJ"),
                _line("heat into-oil, from ring to oil", "E_k", "internal", 0, "400 kJ", "400.0 kJ"),
            ),
            None,
            0.0,
            None,
            True,
        ),
    ),
    flows=(HEAT, GROWTH, JACKET, MEETING),
    noted=("process rising of sequence heating has no extent: the volume at the stop is not reached",),
)

CORNERS = {"a": (1.0, 1.0), "b": (1.0, 2.0), "c": (3.0, 2.0), "d": (3.0, 1.0)}
_LEGS = (("rise", "a", "b"), ("out", "b", "c"), ("fall", "c", "d"), ("back", "d", "a"))


def _leg(name: str, first: str, last: str) -> Curve:
    (x1, y1), (x2, y2) = CORNERS[first], CORNERS[last]
    return Curve(name, "path", tuple((x1 + (x2 - x1) * i / 4, y1 + (y2 - y1) * i / 4) for i in range(5)))


SQUARE = Diagram(
    "p-v",
    "gas",
    "v in m³/kg",
    "p in bar",
    False,
    False,
    tuple(_leg(*leg) for leg in _LEGS),
    tuple(Marker(name, "recomputed", x, y) for name, (x, y) in CORNERS.items()),
    closed=True,
)


def _row(label: str, *texts: tuple[str | None, str]) -> TotalsRow:
    return TotalsRow(label, tuple(Pair(amount(stated), amount(recomputed)) for stated, recomputed in texts))


CYCLE = RecordReview(
    id="cycle",
    title="A cycle of four processes",
    readable=True,
    totals=(
        Totals(
            "cycle",
            "cycle",
            (("Q", "kJ"), ("W", "kJ"), ("ΔU", "kJ"), ("S_gen", "kJ/K")),
            (
                _row("rise", ("216 kJ", "216.0 kJ"), (None, "0 kJ"), (None, "216.0 kJ"), (None, "0.1 kJ/K")),
                _row("back", (None, "−129.0 kJ"), (None, "87.0 kJ"), (None, "−216.0 kJ"), (None, "0.2 kJ/K")),
            ),
            _row("Sum", (None, "87.0 kJ"), ("86 kJ", "87.0 kJ"), (None, "0 kJ"), (None, "0.3 kJ/K")),
            (
                TotalsFact(
                    "thermal efficiency",
                    "η",
                    Pair(amount("0.403"), amount("0.4028")),
                    amount("0.8067"),
                    "reversible between 290 K and 1500 K",
                ),
            ),
        ),
    ),
    diagrams=(SQUARE,),
)
SEVERAL = replace(ACCEPT, records=(COMPOSITE, CYCLE), findings=())

"""Every slip of the catalogue reproduces its own digits, by closed forms, and is silent where it cannot happen."""

from __future__ import annotations

import math
from collections.abc import Callable
from itertools import product
from typing import Any

import pytest

from checker.case import Case
from checker.slips import diagnose
from checker.slips.catalogue import CATALOGUE
from checker.slips.search import _benches
from checker.substances import make_substance
from checker.substances.interface import PropertyState, Substance
from tests.checker.cases import case, cases
from tests.checker.slips import records_of_slips as rec
from tests.checker.slips.records_of_slips import CP, CV, DH, DU, P0, P1, T0, T1, T2, WORK, M, R, Record, gas

Build = Callable[[], Record]
LN = math.log(T2 / T1)
N = 1.3
T_POLY = T1 * (2.0 / 5.0) ** ((N - 1.0) / N)
V1, V_POLY = M * R * T1 / P1, M * R * T_POLY / 2e5
POLY = {"kind": "polytropic", "exponent": "1.300"}
DS = M * CV * LN
SENT = DU / 450.0
KINETIC = 0.5 * M * (200.0**2 - 10.0**2)


def kj(value: float) -> str:
    """Return joules as text in kJ, with six digits."""
    return f"{value / 1000.0:.6g} kJ"


def j_k(value: float) -> str:
    """Return J/K as text, with six digits."""
    return f"{value:.6g} J/K"


def volume(value: float) -> dict[str, str]:
    """Return a specific volume as results."""
    return {"specific_volume": f"{value:.6g} m³/kg"}


def model(name: str, kind: str = "real fluid") -> Substance:
    """Return a substance by its name."""
    return make_substance(name, kind, {})


def state(name: str, **known: float) -> PropertyState:
    """Return a state of a real fluid."""
    return model(name).state(known)


def side(quality: float) -> PropertyState:
    """Return wet water at 200 °C."""
    return state("Water", temperature=473.15, quality=quality)


def hot_steam() -> PropertyState:
    """Return water at 300 °C and 10 bar."""
    return state("Water", temperature=573.15, pressure=1e6)


WET = {"temperature": "200.0 °C", "quality": "0.3000"}
HOT_STEAM = {"temperature": "300.0 °C", "pressure": "10.00 bar"}


def cold(text: dict[str, str], found: float, **more: Any) -> Build:
    """Return a record whose first state has other inputs and a stated specific volume."""
    return lambda: gas(cold=text, cold_results=volume(found), **more)


def with_(path: Any = "constant volume", **results: str) -> Build:
    """Return the record along a path with results of the process."""
    return lambda: gas(path, results)


def steam(inputs: dict[str, str], found: Callable[[], dict[str, str]], name: str = "Water") -> Build:
    """Return a record of one state of a real fluid."""
    return lambda: rec.fluid(name, inputs, found())


def moving(**results: str) -> Build:
    """Return the record with 10 m/s and 200 m/s, 0 m and 500 m."""
    return lambda: gas(
        results=results,
        cold={"velocity": "10.00 m/s", "elevation": "0.000 m"},
        hot={"temperature": "400.0 K", "velocity": "200.0 m/s", "elevation": "500.0 m"},
    )


def heated(kind: str, **results: str) -> Build:
    """Return the record with 10 kJ of work of a kind put in."""
    work = [{"id": "drive", "kind": kind, "direction": "in", "inputs": {"energy": "10.00 kJ"}}]
    return lambda: gas(results=results, work_transfers=work)


def lossy(found: float) -> Build:
    """Return the record with a given loss of 5 kJ beside the heat that is claimed."""
    loss = {"id": "loss", "boundary_temperature": "300.0 K", "inputs": {"energy": "-5.000 kJ"}}
    wall = {"id": "wall", "boundary_temperature": "450.0 K", "results": {"energy": kj(found)}}
    return lambda: gas(heat_transfers=[wall, loss])


def poly(found: float) -> Build:
    """Return a polytropic expansion to 2 bar with its work."""
    return lambda: gas(POLY, {"boundary_work": kj(found)}, hot={"pressure": "2.000 bar"})


def nitrogen(found: Callable[[Substance], float]) -> Build:
    """Return nitrogen as an ideal gas with varying specific heat, 300 K to 1000 K."""

    def build() -> Record:
        """Return the record."""
        own = model("Nitrogen", "ideal gas")
        record = gas(results={"internal_energy_change": kj(found(own))}, hot={"temperature": "1000 K"})
        record["bodies"]["gas"] = {
            "substance": "Nitrogen",
            "model": "ideal gas",
            "inputs": {"mass": "0.1000 kg"},
        }
        return record

    return build


def _slope(own: Substance) -> float:
    """Return the specific heat at 300 K."""
    one, two = (own.state({"temperature": t, "pressure": P1}) for t in (299.9, 300.1))
    return (two.specific_internal_energy - one.specific_internal_energy) / 0.2


SPEAKS: dict[str, Build] = {
    "gauge pressure as absolute": cold({"pressure": "4.000 bar(g)"}, R * T1 / 4e5),
    "absolute pressure as gauge": cold({}, R * T1 / (P1 + P0)),
    "Celsius as kelvin": cold({"temperature": "150.0 °C"}, R * 150.0 / P1),
    "kelvin added twice": cold({"temperature": "150.0 °C"}, R * (150.0 + 2 * 273.15) / P1),
    "Fahrenheit as Celsius": cold({"temperature": "150.0 °F"}, R * (150.0 + 273.15) / P1),
    "pressure in another unit": cold({"pressure": "70.00 psi(a)"}, R * T1 / 70e5),
    "volume in another unit": lambda: (
        {
            **gas(body={"volume": "50.00 L"}),
            "results": {},
        }
        | _mass_of(50.0 * 3.785411784e-3)
    ),
    "mass in another unit": with_(internal_energy_change=kj(DU * 0.45359237)),
    "value of another state": cold({}, R * T2 / P1),
    "input digits transposed": cold({"temperature": "312.0 K"}, R * 321.0 / P1),
    "input digit dropped": cold({"temperature": "312.0 K"}, R * 32.0 / P1),
    "input digit doubled": cold({"pressure": "5.300 bar"}, R * T1 / 55.3e5),
    "input decimal shifted": cold({"pressure": "5.300 bar"}, R * T1 / 53e5),
    "saturated liquid for compressed liquid": steam(
        {"temperature": "40.00 °C", "pressure": "300.0 bar"},
        lambda: volume(model("Water").saturation({"temperature": 313.15})[0].specific_volume or 0.0),
    ),
    "saturated vapour for superheated vapour": steam(
        HOT_STEAM, lambda: volume(model("Water").saturation({"pressure": 1e6})[1].specific_volume or 0.0)
    ),
    "quality ignored": steam(WET, lambda: volume(side(1.0).specific_volume or 0.0)),
    "quality as liquid": steam(WET, lambda: volume(side(0.0).specific_volume or 0.0)),
    "quality inverted": steam(WET, lambda: volume(side(0.7).specific_volume or 0.0)),
    "ideal gas for the real fluid": steam(
        {"temperature": "200.0 K", "pressure": "100.0 bar"},
        lambda: volume(
            8.31451 / 0.02801348 * 200.0 / 1e7
        ),  # R of the fluid's own equation (Span et al. 2000)
        "Nitrogen",
    ),
    "neighbouring row of the table": steam(
        HOT_STEAM, lambda: volume(state("Water", temperature=583.15, pressure=1e6).specific_volume or 0.0)
    ),
    "table of another substance": steam(
        {"temperature": "250.0 K", "pressure": "80.00 bar"},
        lambda: volume(state("Oxygen", temperature=250.0, pressure=8e6).specific_volume or 0.0),
        "Nitrogen",
    ),
    "enthalpy for internal energy": steam(
        HOT_STEAM,
        lambda: {"specific_internal_energy": f"{hot_steam().specific_enthalpy:.6g} J/kg"},
    ),
    "internal energy for enthalpy": steam(
        HOT_STEAM,
        lambda: {"specific_enthalpy": f"{hot_steam().specific_internal_energy:.6g} J/kg"},
    ),
    "universal for specific gas constant": cold({}, 8314.462618 * T1 / P1),
    "Celsius in a ratio": lambda: gas(
        cold={"temperature": "50.00 °C"},
        hot={"temperature": "120.0 °C"},
        hot_results={"pressure": "12.0000 bar"},
    ),
    "ratio inverted": lambda: gas(hot_results={"pressure": "3.75000 bar"}),
    "temperature taken as unchanged": lambda: gas(
        POLY, hot={"pressure": "2.000 bar"}, hot_results={"temperature": "300.000 K"}
    ),
    "pressure taken as unchanged": lambda: gas(hot_results={"pressure": "5.0000 bar"}),
    "volume taken as unchanged": lambda: gas("constant pressure", hot_results=volume(R * T1 / P1)),
    "cp for cv": with_(internal_energy_change=kj(DH)),
    "cv for cp": with_("constant pressure", entropy_change=j_k(M * CV * LN)),
    "states swapped": with_(internal_energy_change=kj(-DU)),
    "initial pressure for the path": poly(P1 * (V_POLY - V1)),
    "final pressure for the path": poly(2e5 * (V_POLY - V1)),
    "mean pressure for the path": poly(3.5e5 * (V_POLY - V1)),
    "isentropic exponent for the polytropic": poly(M * R * (T_POLY - T1) / (1.0 - CP / CV)),
    "decimal logarithm": lambda: gas(
        "isothermal",
        {"boundary_work": kj(M * R * T1 * math.log10(2.5))},
        hot={"pressure": "2.000 bar"},
    ),
    "mass left out": with_(internal_energy_change=kj(DU / M)),
    "mass applied twice": with_(internal_energy_change=kj(DU * M)),
    "constant specific heat for a varying one": nitrogen(lambda own: M * _slope(own) * 700.0),
    "Fahrenheit difference as kelvin": with_(internal_energy_change=kj(1.8 * DU)),
    "latent heat left out": lambda: rec.store({"internal_energy_change": kj(10.0 * 2000.0 * 60.0)}),
    "boundary work omitted": with_("constant pressure", heat=kj(DU)),
    "boundary work counted twice": with_("constant pressure", heat=kj(DU + 2.0 * WORK)),
    "work sign reversed": with_("constant pressure", heat=kj(DU - WORK)),
    "heat sign reversed": with_("constant pressure", heat=kj(-DH)),
    "electrical work omitted": heated("electrical", heat=kj(DU)),
    "shaft work omitted": heated("shaft", heat=kj(DU)),
    "heat loss omitted": lossy(DU),
    "item counted twice": moving(energy_change=kj(DU + 2.0 * KINETIC + M * 9.80665 * 500.0)),
    "item missing from a sum": moving(energy_change=kj(DU + M * 9.80665 * 500.0)),
    "second body forgotten": lambda: rec.quench({"internal_energy_change": kj(4.0 * 1000.0 * 50.0)}),
    "kinetic energy in J added to kJ": moving(energy_change=kj(DU + 1000.0 * KINETIC + M * 9.80665 * 500.0)),
    "half forgotten in the kinetic energy": moving(kinetic_energy_change=kj(2.0 * KINETIC)),
    "gravity forgotten": moving(potential_energy_change=kj(M * 500.0)),
    "work for heat": with_("constant pressure", heat=kj(WORK)),
    "Celsius boundary temperature": lambda: gas(
        results={"entropy_transfer": j_k(DU / 177.0)}, wall={"boundary_temperature": "177.0 °C"}
    ),
    "Celsius surroundings temperature": with_(exergy_destruction=kj(20.0 * (DS - SENT))),
    "mean temperature for the boundary temperature": with_(entropy_transfer=j_k(DU / 350.0)),
    "system temperature for the boundary temperature": with_(entropy_transfer=j_k(DU / T2)),
    "surroundings temperature for the boundary temperature": with_(entropy_transfer=j_k(DU / T0)),
    "reservoir for the boundary temperature": with_(entropy_transfer=j_k(DU / 500.0)),
    "pressure term of the entropy omitted": with_(entropy_change=j_k(M * CP * LN)),
    "volume term of the entropy omitted": with_("constant pressure", entropy_change=j_k(M * CV * LN)),
    "temperature term of the entropy omitted": with_(entropy_change=j_k(-M * R * LN)),
    "entropy transfer omitted": with_(entropy_generation=j_k(DS)),
    "entropy transfer added": with_(entropy_generation=j_k(DS + SENT)),
    "entropy generation sign reversed": with_(entropy_generation=j_k(SENT - DS)),
    "heat over mean temperature for the entropy change": with_(entropy_change=j_k(DU / 350.0)),
    "exergy with the entropy change": with_(exergy_destruction=kj(T0 * DS)),
    "sign reversed": with_(internal_energy_change=kj(-DU)),
    "kJ and J mixed up": with_(internal_energy_change="31160 kJ"),
    "kWh and kJ mixed up": with_(internal_energy_change=kj(DU / 3600.0)),
    "kcal and kJ mixed up": with_(internal_energy_change=kj(DU / 4.1868)),
    "BTU and kJ mixed up": with_(internal_energy_change=kj(DU / 1.05505585)),
    "rate for total": lambda: gas(results={"heat": kj(DU / 600.0)}, inputs={"duration": "600.0 s"}),
    "per mass for total": with_(internal_energy_change=kj(DU / M)),
    "total for per mass": cold({}, M * R * T1 / P1),
    "per mole for per mass": steam(
        HOT_STEAM,
        lambda: {"specific_internal_energy": f"{18.015268 * hot_steam().specific_internal_energy:.6g} J/kg"},
    ),
    "digits transposed": with_(internal_energy_change="13.160 kJ"),
    "digit dropped": with_(internal_energy_change="3.160 kJ"),
    "digit doubled": with_(internal_energy_change="331.160 kJ"),
    "decimal shifted": with_(internal_energy_change="311.60 kJ"),
    "gauge for absolute in the result": lambda: gas(hot_results={"pressure": "5.65367 bar"}),
    "absolute for gauge in the result": lambda: gas(hot_results={"pressure": "6.66667 bar(g)"}),
    "kelvin for Celsius in the result": lambda: gas(
        hot={"pressure": "8.000 bar"}, hot_results={"temperature": "480.000 °C"}
    ),
    "Fahrenheit for Celsius in the result": lambda: gas(
        hot={"pressure": "8.000 bar"}, hot_results={"temperature": f"{206.85 * 1.8 + 32.0:.3f} °C"}
    ),
    "complement": steam(
        {"temperature": "200.0 °C", "specific_volume": f"{0.0385:.4f} m³/kg"},
        lambda: {
            "quality": f"{1.0 - (state('Water', temperature=473.15, specific_volume=0.0385).quality or 0.0):.5f}"
        },
    ),
    "reciprocal": cold({}, P1 / (R * T1)),
    "doubled": with_(internal_energy_change=kj(2.0 * DU)),
    "halved": with_(internal_energy_change=kj(0.5 * DU)),
    "heat rejected for heat supplied": lambda: rec.cycle(
        {"thermal_efficiency": f"{R * 300.0 / (CV * 600.0 + CP * 300.0):.6f}"}
    ),
    "heating for cooling": lambda: rec.cycle(
        {"coefficient_of_performance": f"{(CV * 300.0 + CP * 600.0) / (R * 300.0):.5f}"},
        reverse=True,
        purpose="cooling",
    ),
}
"""Slip → a record with the one result that the slip gives."""


def _mass_of(size: float) -> Record:
    """Return a record of a vessel of 50 L whose mass is found from another volume."""
    record = gas(body={"volume": "50.00 L"})
    record["bodies"]["gas"]["results"] = {"mass": f"{size * P1 / (R * T1):.6g} kg"}
    return record


def causes(found: Case) -> dict[str, float]:
    """Return the causes that the review names for a record, with the values that they give."""
    return {cause.slip: cause.value for own in diagnose(found).values() for cause in own.causes}


@pytest.mark.parametrize("name", sorted(SPEAKS))
def test_a_slip_reproduces_its_digits(name):
    """The slip is named, and the value it gives has the stated digits."""
    found = case(SPEAKS[name]())
    stated = [s for s in found.record.statements if s.role.value == "result"]
    value = causes(found).get(name)
    assert value is not None
    quantity = stated[0].quantity
    assert abs(value * quantity.unit.factor) == pytest.approx(
        abs(quantity.number_of(quantity.value) * quantity.unit.factor),
        abs=2.0 * quantity.half_width + 1e-12,
    )


def test_a_value_of_another_record_is_recognised():
    """A temperature carried over from another record is named as such."""
    other = gas(cold={"temperature": "333.0 K"}, id="other")
    other["id"] = "other"
    found = cases(other, gas(cold_results=volume(R * 333.0 / P1)))
    assert "value of another record" in causes(found["bottle"])


def test_every_slip_has_its_test():
    """The table of tests holds every slip of the catalogue, and nothing else."""
    assert {slip.name for slip in CATALOGUE} == {*SPEAKS, "value of another record"}


def _first_bench(found: Case) -> Any:
    """Return the bench of the first stated result."""
    return next(_benches(found, found.compared[0]))


NOWHERE = gas(results={"boundary_work": "5.000 kJ"})
"""No work is done at constant volume, and no input and no other number leads to that."""
PLAIN = gas(results={"internal_energy_change": "5.000 kJ"})
SOLID = rec.quench({"entropy_change": "5.000 J/K"})
STEAM = rec.fluid("Water", HOT_STEAM, {"specific_volume": "5.000 m³/kg"})
"""A change of internal energy from an absolute pressure and kelvin, in °C nowhere, without work."""
DRY = ("quality ignored", "quality as liquid", "quality inverted", "complement")
OF_GASES = (
    "cp for cv",
    "pressure term of the entropy omitted",
    "volume term of the entropy omitted",
    "temperature term of the entropy omitted",
    "ideal gas for the real fluid",
    "universal for specific gas constant",
)
ABSOLUTE = (
    "gauge pressure as absolute",
    "Celsius as kelvin",
    "Fahrenheit as Celsius",
    "Celsius boundary temperature",
    "boundary work omitted",
    "second body forgotten",
    "rate for total",
    "latent heat left out",
)
SILENT = [
    *((name, "nowhere", NOWHERE) for name in sorted({*SPEAKS, "value of another record"})),
    *((name, "steam", STEAM) for name in DRY),
    *((name, "solid", SOLID) for name in OF_GASES),
    *((name, "plain", PLAIN) for name in ABSOLUTE if name in SPEAKS),
]


@pytest.mark.parametrize(
    ("name", "where", "record"), SILENT, ids=lambda part: part if isinstance(part, str) else ""
)
def test_a_slip_is_silent_where_it_cannot_happen(name, where, record):
    """Where nothing of its kind leads to a result, a slip changes nothing."""
    del where
    bench = _first_bench(case(record))
    slip = next(slip for slip in CATALOGUE if slip.name == name)
    right = bench.values[bench.key]
    changed = [bench.value_with(change) for change in slip.changes(bench)]
    assert [value for value in changed if value is not None and value != pytest.approx(right)] == []


def test_names_and_sentences_are_said_once():
    """No two slips share a name or a sentence."""
    for one, other in product(CATALOGUE, CATALOGUE):
        assert one is other or (one.name != other.name and one.sentence != other.sentence)

"""The table of situations."""

from __future__ import annotations

from tests.benchmarks.seeded.composites import equalised, melted, quench
from tests.benchmarks.seeded.condensed import heated_store, heated_to, moving_body
from tests.benchmarks.seeded.cycles import cycle, gas_chain, stopped_piston
from tests.benchmarks.seeded.onebody import Maker, gas_process
from tests.benchmarks.seeded.steam import WET, wet_process

SITUATIONS: dict[str, Maker] = (
    {
        name: gas_process(name, path, kind, fluid)
        for name, path, kind, fluid in (
            ("gas of constant heat capacity at constant volume", "constant volume", "constant", None),
            ("gas of constant heat capacity at constant pressure", "constant pressure", "constant", None),
            ("gas by a polynomial at constant volume", "constant volume", "polynomial", None),
            ("gas by a polynomial at constant pressure", "constant pressure", "polynomial", None),
            ("ideal gas at constant volume", "constant volume", "ideal", None),
            ("isothermal ideal gas", "isothermal", "ideal", None),
            ("isothermal gas of constant heat capacity", "isothermal", "constant", None),
            ("isentropic gas of constant heat capacity", "isentropic", "constant", None),
            ("isentropic ideal gas", "isentropic", "ideal", None),
            ("polytropic gas", "polytropic", "constant", None),
            ("polytropic ideal gas", "polytropic", "ideal", None),
            ("free expansion", "free expansion", "constant", None),
            (
                "gas against a constant outside pressure",
                "against constant external pressure",
                "constant",
                None,
            ),
            ("real nitrogen at constant volume", "constant volume", "real", "Nitrogen"),
            ("real carbon dioxide at constant pressure", "constant pressure", "real", "CarbonDioxide"),
            ("real argon at constant volume", "constant volume", "real", "Argon"),
            ("real methane compressed", "isentropic", "real", "Methane"),
        )
    }
    | {name: wet_process(name, wet) for name, wet in WET.items()}
    | {
        "store heated electrically with a loss": heated_store,
        "body heated by a given heat with a loss": heated_to,
        "moving and lifted body": moving_body,
        "reversible isothermal gas": gas_process(
            "reversible isothermal gas", "isothermal", "constant", reversible=True
        ),
        "bodies quenched": quench,
        "two vessels equalised": equalised,
        "store that melts": melted,
        "chain of processes with totals": gas_chain,
        "power cycle": cycle(cooling=False),
        "cooling cycle": cycle(cooling=True),
        "piston with stops": stopped_piston,
    }
)

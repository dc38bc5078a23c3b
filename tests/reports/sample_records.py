"""Sample records for the tests of the reports: a gas bottle, a steam cylinder and a brake disc."""

from __future__ import annotations

import re
from dataclasses import replace

from checker.findings import (
    Amount,
    Checked,
    Ledger,
    LedgerLine,
    NotChecked,
    Outcome,
    RecordReview,
    SheetLine,
    SheetValue,
    Standing,
    StateCell,
    StateRow,
)
from tests.reports.sample_curves import bottle_diagrams, cylinder_diagrams


def amount(text: str | None) -> Amount | None:
    """Return an amount from its text, such as ``301 kJ``; a word has no number to speak of."""
    if text is None:
        return None
    match = re.match(r"[-−+]?[0-9.]+", text)
    if not match:
        return Amount(0.0, "", text)
    return Amount(float(match[0].replace("−", "-")), text[match.end() :].strip(), text)


def cell(
    symbol: str,
    name: str,
    stated: str | None,
    recomputed: str | None,
    deviation: float | None = None,
    outcome: Outcome | None = None,
) -> StateCell:
    """Return a cell of a state table."""
    return StateCell(symbol, name, amount(stated), amount(recomputed), deviation, outcome)


def checked(
    quantity: str, symbol: str, stated: str, recomputed: str | None, carried: str | None,
    deviation: float | None, tolerance: float | None,
    outcome: Outcome = Outcome.AGREES, standing: Standing = Standing.HOLDS, reason: str = "",
) -> Checked:  # fmt: skip
    """Return a comparison."""
    texts = amount(stated), amount(recomputed), amount(carried)
    assert texts[0] is not None
    return Checked(
        quantity, symbol, "stated result", texts[0], texts[1], texts[2], deviation, tolerance, outcome, standing,
        reason,
    )  # fmt: skip


def value(
    quantity: str, symbol: str, independent: str | None, carried: str | None, stated: str | None
) -> SheetValue:
    """Return an output of a step of the sheet."""
    return SheetValue(quantity, symbol, amount(independent), amount(carried), amount(stated))


def term(
    label: str, symbol: str, side: str, sign: int, stated: str | None, recomputed: str | None
) -> LedgerLine:
    """Return a line of a ledger."""
    return LedgerLine(label, symbol, side, sign, amount(stated), amount(recomputed))


P = "processes/warming/"
BOTTLE = RecordReview(
    id="bottle",
    title="Nitrogen bottle warmed by the sun",
    readable=True,
    checked=(
        checked("bodies/nitrogen/mass", "m", "8.63 kg", "8.628 kg", "8.636 kg", 0.002, 0.052),
        checked("states/hot/nitrogen/pressure", "p", "181 bar", "181.4 bar", "181.5 bar", -0.4, 1.4),
        checked(f"{P}internal_energy_change", "ΔU", "422 kJ", "300.6 kJ", "300.6 kJ", 121.4, 2.1,
                Outcome.WRONG, Standing.ORIGIN),
        checked(f"{P}heat_transfers/sunlit-wall/energy", "E_k", "422 kJ", "300.6 kJ", "422.0 kJ", 121.4, 2.1,
                Outcome.WRONG, Standing.INHERITED),
        checked(f"{P}entropy_change", "ΔS", "0.969 kJ/K", "0.9692 kJ/K", "0.9690 kJ/K", -0.0002, 0.0055),
        checked(f"{P}entropy_generation", "S_gen", "-0.261 kJ/K", "0.0934 kJ/K", "−0.2608 kJ/K", -0.3544, 0.0055,
                Outcome.WRONG, Standing.INHERITED),
    ),
    not_checked=(
        NotChecked("generation with surroundings", "the reservoir_temperature of the heat transfer sunlit-wall"),
    ),
    assumed=("velocity not stated: taken as zero in both states", "elevation not stated: taken as unchanged"),
    models=("nitrogen: real fluid, reference equation of state (Span et al. 2000)",),
    rules_held=("mass-not-conserved", "path-contradicts-states", "limit-exceeded", "assumption-not-true"),
    states=(
        StateRow("cold", "nitrogen", "supercritical", (
            cell("T", "temperature", "15 °C", "15.00 °C"),
            cell("p", "pressure", "150 bar", "150.0 bar"),
            cell("v", "specific volume", "0.00579 m³/kg", "0.005795 m³/kg", -5e-06, Outcome.AGREES),
            cell("u", "specific internal energy", None, "182.7 kJ/kg"),
            cell("s", "specific entropy", None, "5.219 kJ/(kg·K)"),
        )),
        StateRow("hot", "nitrogen", "supercritical", (
            cell("T", "temperature", "60 °C", "60.00 °C"),
            cell("p", "pressure", "181 bar", "181.4 bar", -0.4, Outcome.AGREES),
            cell("v", "specific volume", None, "0.005795 m³/kg"),
            cell("u", "specific internal energy", None, "217.5 kJ/kg"),
            cell("s", "specific entropy", None, "5.331 kJ/(kg·K)"),
        )),
    ),
    ledgers=(
        Ledger("warming", "energy", "kJ", (
            term("internal energy of nitrogen", "ΔU", "change", 1, "422 kJ", "300.6 kJ"),
            term("kinetic energy", "ΔKE", "change", 1, None, "0 kJ"),
            term("heat through sunlit-wall", "Q_sunlit-wall", "transfer", 1, "422 kJ", "300.6 kJ"),
            term("boundary work", "W_b", "transfer", -1, None, "0 kJ"),
        ), 0.0, 0.0, True, True),
        Ledger("warming", "entropy", "kJ/K", (
            term("entropy of nitrogen", "ΔS", "change", 1, "0.969 kJ/K", "0.9692 kJ/K"),
            term("with heat through sunlit-wall", "Q/T_b", "transfer", 1, None, "0.8759 kJ/K"),
            term("generated in the system", "S_gen", "generation", 1, "-0.261 kJ/K", "0.0934 kJ/K"),
        ), None, -0.0001, None, True),
    ),
    sheet=(
        SheetLine("State cold of nitrogen", "v, u, s = EOS(T, p)", "EOS(288.15 K, 150.0 bar)", (
            value("states/cold/nitrogen/specific_volume", "v", "0.005795 m³/kg", "0.005795 m³/kg", "0.00579 m³/kg"),
            value("states/cold/nitrogen/specific_internal_energy", "u", "182.7 kJ/kg", "182.7 kJ/kg", None),
            value("states/cold/nitrogen/specific_entropy", "s", "5.219 kJ/(kg·K)", "5.219 kJ/(kg·K)", None),
        )),
        SheetLine("Mass of nitrogen", "m = V / v", "0.05 m³ / 0.005795 m³·kg⁻¹", (
            value("bodies/nitrogen/mass", "m", "8.628 kg", "8.636 kg", "8.63 kg"),
        )),
        SheetLine("State hot of nitrogen", "v₂ = v₁; p, u, s = EOS(T, v)", "EOS(333.15 K, 0.005795 m³·kg⁻¹)", (
            value("states/hot/nitrogen/pressure", "p", "181.4 bar", "181.5 bar", "181 bar"),
            value("states/hot/nitrogen/specific_internal_energy", "u", "217.5 kJ/kg", "217.5 kJ/kg", None),
        ), note="constant volume: the path gives the second property"),
        SheetLine("Boundary work of warming", "W_b = ∫ p dV", "0 (dV = 0)", (
            value(f"{P}boundary_work", "W_b", "0 kJ", "0 kJ", None),
        )),
        SheetLine("Internal energy change", "ΔU = m·(u₂ − u₁)", "8.628 kg × (217.5 − 182.7) kJ/kg", (
            value(f"{P}internal_energy_change", "ΔU", "300.6 kJ", "300.6 kJ", "422 kJ"),
        )),
        SheetLine("Heat through sunlit-wall", "Q = ΔU + ΔKE + ΔPE + W", "300.6 kJ + 0 kJ + 0 kJ + 0 kJ", (
            value(f"{P}heat_transfers/sunlit-wall/energy", "Q", "300.6 kJ", "422.0 kJ", "422 kJ"),
        )),
        SheetLine("Entropy generation", "S_gen = ΔS − Σ Q_k/T_b,k", "0.9692 kJ/K − 300.6 kJ / 343.15 K", (
            value(f"{P}entropy_generation", "S_gen", "0.0934 kJ/K", "−0.2608 kJ/K", "-0.261 kJ/K"),
        )),
    ),
    diagrams=bottle_diagrams(),
)  # fmt: skip

C = "processes/expansion/"
CYLINDER = RecordReview(
    id="steam-cylinder",
    title="Wet steam heated behind a loaded piston",
    readable=True,
    checked=(
        checked(f"{C}internal_energy_change", "ΔU", "607 kJ", "670.2 kJ", "670.2 kJ", -63.2, 4.2, Outcome.WRONG,
                Standing.ORIGIN),
        checked(f"{C}boundary_work", "W_b", "72.6 kJ", "72.56 kJ", "72.56 kJ", 0.04, 3.8),
        checked(f"{C}heat", "Q", "743 kJ", "742.7 kJ", "742.8 kJ", 0.3, 4.2),
        checked("states/superheated/steam/specific_volume", "v", "1.15 m³/kg", "1.0805 m³/kg", "1.0805 m³/kg", 0.0695,
                0.0104, Outcome.WRONG, Standing.ORIGIN),
        checked(f"{C}entropy_transfer", "ΣQ/T_b", "2.65 kJ/K", "1.343 kJ/K", "1.343 kJ/K", 1.307, 0.014,
                Outcome.WRONG, Standing.ORIGIN),
        checked(f"{C}entropy_generation", "S_gen", "-0.78 kJ/K", "0.527 kJ/K", "−0.780 kJ/K", -1.307, 0.014,
                Outcome.WRONG, Standing.INHERITED),
        checked(f"{C}exergy_destruction", "X_d", "157 kJ", None, None, None, None, Outcome.NOT_EVALUABLE,
                Standing.NOT_EVALUABLE, "the pressure of the surroundings is not stated"),
    ),
    not_checked=(NotChecked("exergy-destruction-disagrees", "surroundings/pressure"),),
    assumed=("velocity not stated: taken as zero in both states",),
    models=("steam: real fluid, IAPWS-95",),
    rules_held=("energy-not-closed", "path-contradicts-states"),
    states=(
        StateRow("wet", "steam", "wet vapour", (
            cell("p", "pressure", "2 bar", "2.000 bar"),
            cell("x", "quality", "0.40", "0.4000"),
            cell("T", "temperature", None, "120.2 °C"),
            cell("v", "specific volume", None, "0.3549 m³/kg"),
            cell("s", "specific entropy", None, "3.769 kJ/(kg·K)"),
        )),
        StateRow("superheated", "steam", "superheated vapour", (
            cell("T", "temperature", "200 °C", "200.0 °C"),
            cell("p", "pressure", None, "2.000 bar"),
            cell("v", "specific volume", "1.15 m³/kg", "1.0805 m³/kg", 0.0695, Outcome.WRONG),
            cell("", "phase", "superheated vapour", "superheated vapour", None, Outcome.AGREES),
        )),
    ),
    ledgers=(
        Ledger("expansion", "energy", "kJ", (
            term("internal energy of steam", "ΔU", "change", 1, "607 kJ", "670.2 kJ"),
            term("heat through flame-side", "Q", "transfer", 1, "743 kJ", "742.7 kJ"),
            term("boundary work", "W_b", "transfer", -1, "72.6 kJ", "72.56 kJ"),
        ), -63.4, 0.0, False, True),
        Ledger("expansion", "entropy", "kJ/K", (
            term("entropy of steam", "ΔS", "change", 1, "1.87 kJ/K", "1.8696 kJ/K"),
            term("with heat through flame-side", "Q/T_b", "transfer", 1, "2.65 kJ/K", "1.3427 kJ/K"),
            term("generated in the system", "S_gen", "generation", 1, "-0.78 kJ/K", "0.5269 kJ/K"),
        ), 0.0, 0.0, True, True),
    ),
    sheet=(
        SheetLine("State wet of steam", "v, u, s = EOS(p, x)", "EOS(2.000 bar, 0.40)", (
            value("states/wet/steam/specific_volume", "v", "0.3549 m³/kg", "0.3549 m³/kg", None),
        )),
        SheetLine("Boundary work", "W_b = ∫ p dV = m·p·(v₂ − v₁)", "0.5 kg × 200 kPa × (1.0805 − 0.3549) m³·kg⁻¹", (
            value(f"{C}boundary_work", "W_b", "72.56 kJ", "79.51 kJ", "72.6 kJ"),
        )),
        SheetLine("Entropy transfer", "Σ Q_k/T_b,k", "742.7 kJ / 553.15 K", (
            value(f"{C}entropy_transfer", "ΣQ/T_b", "1.343 kJ/K", "1.343 kJ/K", "2.65 kJ/K"),
        )),
        SheetLine("Exergy destroyed", "X_d = T₀·S_gen", "", (
            value(f"{C}exergy_destruction", "X_d", None, None, "157 kJ"),
        ), note="not evaluable: the pressure of the surroundings is not stated"),
    ),
    diagrams=cylinder_diagrams(),
)  # fmt: skip

DISC = RecordReview(
    id="brake-disc",
    title="Brake disc after one stop",
    readable=True,
    checked=(
        checked("processes/stop/internal_energy_change", "ΔU", "867 kJ", "867.1 kJ", "867.1 kJ", -0.1, 4.8),
        checked("processes/stop/entropy_change", "ΔS", "2.06 kJ/K", "2.056 kJ/K", "2.056 kJ/K", 0.004, 0.015),
    ),
    models=("disc: constant specific heat, as stated",),
    rules_held=("energy-not-closed", "generation-negative"),
    states=(
        StateRow("cold", "disc", "solid", (cell("T", "temperature", "20 °C", "20.00 °C"),)),
        StateRow("hot", "disc", "solid", (cell("T", "temperature", "310 °C", "310.0 °C"),)),
    ),
    ledgers=(
        Ledger("stop", "energy", "kJ", (
            term("internal energy of disc", "ΔU", "change", 1, "867 kJ", "867.1 kJ"),
            term("friction work", "W_sh", "transfer", -1, "-867 kJ", "−867.1 kJ"),
        ), 0.0, 0.0, True, True),
    ),
    sheet=(
        SheetLine("Internal energy change", "ΔU = m·c·(T₂ − T₁)", "6.5 kg × 0.460 kJ/(kg·K) × 290.0 K", (
            value("processes/stop/internal_energy_change", "ΔU", "867.1 kJ", "867.1 kJ", "867 kJ"),
        )),
    ),
)  # fmt: skip

HOSTILE = (
    '<img src="/etc/hostname"/> =1+1 \x1b[31mred\x1b[0m T<Tc and p>pc 熱力学 <b>open \u202egnp.exe </para> '
    "&#x110000; " + "a title that goes on " * 20
)
QUENCH = RecordReview(id="quench-bath", title=HOSTILE, readable=False)


def corrected_bottle() -> RecordReview:
    """Return the bottle as it ought to have been submitted."""
    right = {
        f"{P}internal_energy_change": ("301 kJ", 0.4),
        f"{P}heat_transfers/sunlit-wall/energy": ("301 kJ", 0.4),
        f"{P}entropy_generation": ("0.093 kJ/K", -0.0004),
    }
    fixed = []
    for item in BOTTLE.checked:
        text, deviation = right.get(item.quantity, (item.stated.text, item.deviation))
        stated = amount(text)
        assert stated is not None
        fixed.append(replace(item, stated=stated, deviation=deviation, carried=item.recomputed,
                             outcome=Outcome.AGREES, standing=Standing.HOLDS))  # fmt: skip
    return replace(BOTTLE, checked=tuple(fixed), not_checked=(), ledgers=(), sheet=BOTTLE.sheet[:3])

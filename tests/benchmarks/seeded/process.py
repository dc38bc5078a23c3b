"""The energy balance of one process of one body: change, work along its path, heat, and how each goes wrong."""

from __future__ import annotations

import math
from collections.abc import Callable

from tests.benchmarks.seeded import units as un
from tests.benchmarks.seeded.chain import Function, Values
from tests.benchmarks.seeded.draft import Draft, work_sign
from tests.benchmarks.seeded.equation import NoStateError
from tests.benchmarks.seeded.fluids import RealFluid
from tests.benchmarks.seeded.gases import ConstantGas, IdealPart, PolynomialGas, Solid
from tests.benchmarks.seeded.leg import ADIABATIC, GRAVITY, Leg
from tests.benchmarks.seeded.second_law import entropy_change, exergy, generation
from tests.benchmarks.seeded.states import ModelOf


def add_process(draft: Draft, leg: Leg, model_of: ModelOf) -> None:
    """Add every step of a process."""
    _internal(draft, leg, model_of)
    _motion(draft, leg)
    _work(draft, leg, model_of)
    if leg.wall or leg.heat:
        _heat(draft, leg)
    entropy_change(draft, leg, model_of)
    generation(draft, leg)
    if leg.exergy and (leg.path in ADIABATIC or leg.wall):
        exergy(draft, leg)
    _claims(draft, leg)


def _internal(draft: Draft, leg: Leg, model_of: ModelOf) -> None:
    m, a, b = leg.mass, f"{leg.first}.", f"{leg.last}."

    def change(v: Values) -> float:
        return v[m] * (v[b + "u"] - v[a + "u"])

    def enthalpy(v: Values) -> float:
        if isinstance(model_of(v), Solid):
            raise NoStateError("no enthalpy")
        return v[m] * (v[b + "h"] - v[a + "h"])

    def gas(v: Values) -> float:
        if isinstance(model_of(v), RealFluid):
            raise NoStateError("no c_p")
        return enthalpy(v)

    def real(v: Values) -> float:
        if not isinstance(model_of(v), RealFluid | IdealPart | PolynomialGas):
            raise NoStateError("no table")
        return enthalpy(v)

    def constant(v: Values) -> float:
        model = model_of(v)
        if not isinstance(model, IdealPart | PolynomialGas):
            raise NoStateError("constant already")
        step = 0.01
        cv = (model.energy(300.0 + step) - model.energy(300.0 - step)) / (2.0 * step)
        return v[m] * cv * (v[b + "t"] - v[a + "t"])

    def fahrenheit(v: Values) -> float:
        units = {given.key: given.unit for given in draft.givens}
        if units.get(a + "t") is not un.FAHRENHEIT and units.get(b + "t") is not un.FAHRENHEIT:
            raise NoStateError("no °F")
        if isinstance(model_of(v), RealFluid):
            raise NoStateError("no c")
        return 1.8 * change(v)

    draft.step(
        leg.key("du"),
        (m, a + "u", b + "u"),
        lambda v: (change(v),),
        (
            ("cp for cv", lambda v: (gas(v),)),
            ("enthalpy for internal energy", lambda v: (real(v),)),
            ("states swapped", lambda v: (-change(v),)),
            ("mass left out", lambda v: (change(v) / v[m],)),
            ("mass applied twice", lambda v: (change(v) * v[m],)),
            ("constant specific heat for a varying one", lambda v: (constant(v),)),
            ("Fahrenheit difference as kelvin", lambda v: (fahrenheit(v),)),
        ),
    )


def _motion(draft: Draft, leg: Leg) -> None:
    m, a, b = leg.mass, f"{leg.first}.", f"{leg.last}."
    if not leg.motion:
        draft.step(leg.key("de"), (leg.key("du"),), lambda v: (v[leg.key("du")],))
        return
    ke, pe = leg.key("ke"), leg.key("pe")
    draft.step(
        ke,
        (m, a + "c", b + "c"),
        lambda v: (0.5 * v[m] * (v[b + "c"] ** 2 - v[a + "c"] ** 2),),
        (
            ("half forgotten in the kinetic energy", lambda v: (v[m] * (v[b + "c"] ** 2 - v[a + "c"] ** 2),)),
            ("mass left out", lambda v: (0.5 * (v[b + "c"] ** 2 - v[a + "c"] ** 2),)),
            ("states swapped", lambda v: (0.5 * v[m] * (v[a + "c"] ** 2 - v[b + "c"] ** 2),)),
        ),
    )
    draft.step(
        pe,
        (m, a + "z", b + "z"),
        lambda v: (v[m] * GRAVITY * (v[b + "z"] - v[a + "z"]),),
        (
            ("gravity forgotten", lambda v: (v[m] * (v[b + "z"] - v[a + "z"]),)),
            ("mass left out", lambda v: (GRAVITY * (v[b + "z"] - v[a + "z"]),)),
            ("states swapped", lambda v: (v[m] * GRAVITY * (v[a + "z"] - v[b + "z"]),)),
        ),
    )
    du = leg.key("du")
    draft.step(
        leg.key("de"),
        (du, ke, pe),
        lambda v: (v[du] + v[ke] + v[pe],),
        (
            ("kinetic energy in J added to kJ", lambda v: (v[du] + 1000.0 * v[ke] + v[pe],)),
            ("item missing from a sum", lambda v: (v[du] + v[pe],)),
            ("item missing from a sum", lambda v: (v[du] + v[ke],)),
            ("item counted twice", lambda v: (v[du] + v[ke] + 2.0 * v[pe],)),
            ("item counted twice", lambda v: (v[du] + 2.0 * v[ke] + v[pe],)),
        ),
    )


def _work(draft: Draft, leg: Leg, model_of: ModelOf) -> None:
    m, a, b, wb = leg.mass, f"{leg.first}.", f"{leg.last}.", leg.key("wb")
    swept: Callable[[Values], float] = lambda v: v[m] * (v[b + "v"] - v[a + "v"])  # noqa: E731 - a formula on one line
    pv: Callable[[Values], float] = lambda v: v[m] * (v[b + "p"] * v[b + "v"] - v[a + "p"] * v[a + "v"])  # noqa: E731 - a formula on one line
    slips: list[tuple[str, Function]] = []
    parents: tuple[str, ...] = (m, a + "p", a + "v", b + "p", b + "v")
    function: Function
    if leg.path == "constant pressure":
        function = lambda v: (v[a + "p"] * swept(v),)  # noqa: E731 - a formula on one line
        parents = (m, a + "p", a + "v", b + "v")
    elif leg.path == "isothermal":

        def logarithm(v: Values) -> float:
            return v[m] * model_of(v).gas_constant * v[a + "t"] * math.log(v[b + "v"] / v[a + "v"])

        function, parents = (lambda v: (logarithm(v),)), (m, a + "t", a + "v", b + "v")
        slips = [
            ("decimal logarithm", lambda v: (logarithm(v) / math.log(10.0),)),
            ("ratio inverted", lambda v: (-logarithm(v),)),
        ]
    elif leg.path == "isentropic":
        du = leg.key("du")
        function, parents = (lambda v: (-v[du],)), (du,)
        slips = [("sign", lambda v: (v[du],))]
    elif leg.path == "polytropic":
        n = leg.parameter or ""
        function, parents = (lambda v: (pv(v) / (1.0 - v[n]),)), (*parents, n)

        def other(v: Values) -> float:
            model = model_of(v)
            if not isinstance(model, ConstantGas):
                raise NoStateError("no isentropic exponent")
            return pv(v) / (1.0 - (model.cv + model.constant) / model.cv)

        slips = [("isentropic exponent for the polytropic", lambda v: (other(v),))]
    elif leg.path == "against constant external pressure":
        outside = leg.parameter or ""
        function, parents = (lambda v: (v[outside] * swept(v),)), (m, a + "v", b + "v", outside)
    else:
        function, parents = (lambda v: (0.0,)), ()
    if leg.path in ("isothermal", "polytropic", "against constant external pressure"):
        slips += [
            ("initial pressure for the path", lambda v: (v[a + "p"] * swept(v),)),
            ("final pressure for the path", lambda v: (v[b + "p"] * swept(v),)),
            ("mean pressure for the path", lambda v: (0.5 * (v[a + "p"] + v[b + "p"]) * swept(v),)),
        ]
    if parents:
        slips.append(("mass left out", lambda v: (function(v)[0] / v[m],)))
    slips = [("work sign reversed" if kind == "sign" else kind, wrong) for kind, wrong in slips]
    draft.step(wb, parents, function, slips)
    if leg.electrical is None:
        draft.step(leg.key("w"), (wb,), lambda v: (v[wb],))
        return
    el = leg.electrical
    draft.step(
        leg.key("w"),
        (wb, el),
        lambda v: (v[wb] - v[el],),
        (
            ("electrical work omitted", lambda v: (v[wb],)),
            ("work sign reversed", lambda v: (v[wb] + v[el],)),
            *((("boundary work omitted", lambda v: (-v[el],)),) if parents else ()),
        ),
    )


def _heat(draft: Draft, leg: Leg) -> None:
    de, w, q, wb, el = leg.key("de"), leg.key("w"), leg.key("q"), leg.key("wb"), leg.electrical
    if leg.heat is None:
        slips: list[tuple[str, Function]] = [("heat sign reversed", lambda v: (-v[de] - v[w],))]
        if el is not None or leg.path not in ("constant volume", "free expansion", ""):
            slips.append(("work for heat", lambda v: (v[w],)))
        if leg.path not in ("constant volume", "free expansion", ""):
            slips += [
                ("boundary work omitted", lambda v: (v[de] + v[w] - v[wb],)),
                ("boundary work counted twice", lambda v: (v[de] + v[w] + v[wb],)),
                ("work sign reversed", lambda v: (v[de] - v[w],)),
            ]
        elif el is not None:
            slips += [("work sign reversed", lambda v: (v[de] - v[w],))]
        if el is not None:
            slips.append(("electrical work omitted", lambda v: (v[de] + v[w] + v[el],)))
        if leg.motion:
            du, ke, pe = leg.key("du"), leg.key("ke"), leg.key("pe")
            slips += [
                ("item missing from a sum", lambda v: (v[du] + v[w],)),
                ("kinetic energy in J added to kJ", lambda v: (v[du] + 1000.0 * v[ke] + v[pe] + v[w],)),
            ]
        draft.step(q, (de, w), lambda v: (v[de] + v[w],), slips)
    else:
        _given_heat(draft, q, leg.heat, leg.loss)
    if leg.loss and leg.heat is None:
        loss = leg.loss
        draft.step(
            leg.key("qm"),
            (q, loss),
            lambda v: (v[q] - v[loss],),
            (("heat loss omitted", lambda v: (v[q],)), ("heat sign reversed", lambda v: (v[q] + v[loss],))),
        )
    else:
        main = leg.heat or q
        draft.step(leg.key("qm"), (main,), lambda v: (v[main],))


def _given_heat(draft: Draft, q: str, heat: str, loss: str | None) -> None:
    """Sum the heat that is given and the loss, where there is one."""
    if loss:
        slips = (("heat loss omitted", lambda v: (v[heat],)),)
        draft.step(q, (heat, loss), lambda v: (v[heat] + v[loss],), slips)
    else:
        draft.step(q, (heat,), lambda v: (v[heat],))


def _claims(draft: Draft, leg: Leg) -> None:
    base, sign = f"processes/{leg.id}", work_sign(draft)
    energy, entropy = f"energy:{leg.id}", f"entropy:{leg.id}"
    made = {key for step in draft.steps for key in step.outputs}

    def claim(name: str, word: str, kind: str, group: str, by: float = 1.0) -> None:
        if leg.key(name) in made:
            unit = un.KJ if kind == "energy" else un.KJ_K
            draft.claimable(leg.key(name), f"{base}/{word}", kind, unit, group, by)

    claim("du", "internal_energy_change", "energy", energy)
    if leg.motion:
        claim("ke", "kinetic_energy_change", "energy", energy)
        claim("pe", "potential_energy_change", "energy", energy)
        claim("de", "energy_change", "energy", energy)
    if leg.path not in ("constant volume", "", "insulated", "free expansion"):
        claim("wb", "boundary_work", "energy", energy, sign)
    if leg.electrical:
        claim("w", "work", "energy", energy, sign)
    if leg.loss and leg.heat is None:
        claim("q", "heat", "energy", energy)
    if leg.heat is None:
        claim("qm", f"heat_transfers/{leg.transfer}/energy", "energy", energy)
    claim("ds", "entropy_change", "entropy", entropy)
    claim("st", "entropy_transfer", "entropy", entropy)
    if leg.path != "isentropic":
        claim("sg", "entropy_generation", "entropy", entropy)
        claim("sgs", "entropy_generation_with_surroundings", "entropy", entropy)
        claim("xd", "exergy_destruction", "energy", energy)
    claim("dx", "exergy_change", "energy", energy)

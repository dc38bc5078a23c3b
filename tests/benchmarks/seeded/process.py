"""The balances of one process of one body: work along its path, energy, entropy, exergy, and how each goes wrong."""

from __future__ import annotations

import math
from collections.abc import Callable
from dataclasses import dataclass

from tests.benchmarks.seeded import units as un
from tests.benchmarks.seeded.chain import Function, Values
from tests.benchmarks.seeded.draft import Draft, work_sign
from tests.benchmarks.seeded.equation import NoStateError
from tests.benchmarks.seeded.fluids import RealFluid
from tests.benchmarks.seeded.gases import ConstantGas, IdealPart, PolynomialGas, Solid
from tests.benchmarks.seeded.states import ModelOf

ADIABATIC = ("isentropic", "free expansion", "against constant external pressure", "adiabatic")
GRAVITY = 9.80665


@dataclass(frozen=True)
class Leg:
    """A process ``id`` between two states along a path; ``parameter`` is the key of n or of the outside pressure.

    ``wall`` and ``reservoir`` are keys of temperatures, ``loss`` and ``loss_wall`` of a heat loss that is given,
    ``electrical`` of a heater's energy, ``heat`` of the heat where it is given; ``motion`` says that speeds and
    heights are given. All are keys of inputs, None where there is none.
    """

    id: str
    first: str
    last: str
    path: str
    parameter: str | None = None
    wall: str | None = None
    reservoir: str | None = None
    electrical: str | None = None
    heat: str | None = None
    loss: str | None = None
    loss_wall: str | None = None
    motion: bool = False
    mass: str = "m"
    transfer: str = "wall"
    exergy: bool = True

    def key(self, name: str) -> str:
        """Return the key of a quantity of the process."""
        return f"{self.id}.{name}"


def add_process(draft: Draft, leg: Leg, model_of: ModelOf) -> None:
    """Add every step of a process."""
    _internal(draft, leg, model_of)
    _motion(draft, leg)
    _work(draft, leg, model_of)
    if leg.wall or leg.heat:
        _heat(draft, leg)
    _entropy_change(draft, leg, model_of)
    _generation(draft, leg)
    if leg.exergy and (leg.path in ADIABATIC or leg.wall):
        _exergy(draft, leg)
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
    swept: Callable[[Values], float] = lambda v: v[m] * (v[b + "v"] - v[a + "v"])  # noqa: E731
    pv: Callable[[Values], float] = lambda v: v[m] * (v[b + "p"] * v[b + "v"] - v[a + "p"] * v[a + "v"])  # noqa: E731
    slips: list[tuple[str, Function]] = []
    parents: tuple[str, ...] = (m, a + "p", a + "v", b + "p", b + "v")
    function: Function
    if leg.path == "constant pressure":
        function = lambda v: (v[a + "p"] * swept(v),)  # noqa: E731
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


def _entropy_change(draft: Draft, leg: Leg, model_of: ModelOf) -> None:
    m, a, b, ds = leg.mass, f"{leg.first}.", f"{leg.last}.", leg.key("ds")

    def change(v: Values) -> float:
        return v[m] * (v[b + "s"] - v[a + "s"])

    def gas(v: Values) -> float:
        model = model_of(v)
        if isinstance(model, RealFluid | Solid):
            raise NoStateError("no gas")
        return model.gas_constant

    def constant(v: Values) -> ConstantGas:
        model = model_of(v)
        if not isinstance(model, ConstantGas):
            raise NoStateError("no constant heat capacity")
        return model

    def c_log(v: Values, ratio: float) -> float:
        model = model_of(v)
        if isinstance(model, Solid):
            return v[m] * model.heat * math.log(ratio)
        r, cv = constant(v).constant, constant(v).cv
        if leg.path == "constant volume":
            return v[m] * cv * math.log(ratio)
        return v[m] * ((cv + r) * math.log(ratio) - r * math.log(v[b + "p"] / v[a + "p"]))

    def warm(v: Values) -> float:
        return v[b + "t"] / v[a + "t"]

    def celsius(v: Values) -> float:
        return (v[b + "t"] - 273.15) / (v[a + "t"] - 273.15)

    def decimal(v: Values) -> float:
        if isinstance(model_of(v), Solid):
            return change(v) / math.log(10.0)
        constant(v)
        return change(v) / math.log(10.0)

    def p_term(v: Values) -> float:
        return v[m] * gas(v) * math.log(v[b + "p"] / v[a + "p"])

    def v_term(v: Values) -> float:
        return v[m] * gas(v) * math.log(v[b + "v"] / v[a + "v"])

    slips: list[tuple[str, Function]] = [
        ("pressure term of the entropy omitted", lambda v: (change(v) + p_term(v),)),
        ("volume term of the entropy omitted", lambda v: (change(v) - v_term(v),)),
        ("temperature term of the entropy omitted", lambda v: (-p_term(v),)),
        ("temperature term of the entropy omitted", lambda v: (v_term(v),)),
        ("decimal logarithm", lambda v: (decimal(v),)),
        ("Celsius in a ratio", lambda v: (c_log(v, celsius(v)),)),
        ("ratio inverted", lambda v: (c_log(v, 1.0 / warm(v)),)),
        ("cv for cp", lambda v: (change(v) - v[m] * gas(v) * math.log(warm(v)),)),
        ("cp for cv", lambda v: (change(v) + v[m] * gas(v) * math.log(warm(v)),)),
        ("states swapped", lambda v: (-change(v),)),
        ("mass left out", lambda v: (change(v) / v[m],)),
    ]
    if leg.path == "isentropic":
        slips = []  # zero by its name; nobody works it out
    if leg.wall and leg.path != "isentropic":
        q = leg.key("q")
        mean: Function = lambda v: (v[q] / (0.5 * (v[a + "t"] + v[b + "t"])),)  # noqa: E731
        slips.append(("heat over mean temperature for the entropy change", mean))
    draft.step(ds, (m, a + "s", b + "s"), lambda v: (change(v),), slips)


def _generation(draft: Draft, leg: Leg) -> None:
    ds, st, sg = leg.key("ds"), leg.key("st"), leg.key("sg")
    qm, wall, loss, loss_wall = leg.key("qm"), leg.wall, leg.loss, leg.loss_wall
    if wall is None and leg.path not in ADIABATIC and leg.path != "insulated":
        return
    if wall is None:
        draft.step(
            sg, (ds,), lambda v: (v[ds],), (("entropy generation sign reversed", lambda v: (-v[ds],)),)
        )
        return

    def over(v: Values, t: float) -> float:
        rest = v[loss] / v[loss_wall] if loss and loss_wall else 0.0
        return v[qm] / t + rest

    a, b = f"{leg.first}.t", f"{leg.last}.t"
    slips: list[tuple[str, Function]] = [
        ("mean temperature for the boundary temperature", lambda v: (over(v, 0.5 * (v[a] + v[b])),)),
        ("system temperature for the boundary temperature", lambda v: (over(v, v[b]),)),
        ("system temperature for the boundary temperature", lambda v: (over(v, v[a]),)),
        ("surroundings temperature for the boundary temperature", lambda v: (over(v, v["t0"]),)),
        ("heat sign reversed", lambda v: (-over(v, v[wall]),)),
    ]
    parents: tuple[str, ...] = (qm, wall)
    if leg.reservoir:
        reservoir = leg.reservoir
        slips.append(("reservoir for the boundary temperature", lambda v: (over(v, v[reservoir]),)))
    if loss and loss_wall:
        parents = (*parents, loss, loss_wall)
        slips += [
            ("item missing from a sum", lambda v: (v[qm] / v[wall],)),
            ("item missing from a sum", lambda v: (v[loss] / v[loss_wall],)),
        ]
    draft.step(st, parents, lambda v: (over(v, v[wall]),), slips)
    draft.step(sg, (ds, st), lambda v: (v[ds] - v[st],), _generation_slips(ds, st))
    if leg.reservoir:
        _with_surroundings(draft, leg)


def _generation_slips(ds: str, st: str) -> tuple[tuple[str, Function], ...]:
    return (
        ("entropy transfer omitted", lambda v: (v[ds],)),
        ("entropy transfer added", lambda v: (v[ds] + v[st],)),
        ("entropy generation sign reversed", lambda v: (v[st] - v[ds],)),
    )


def _with_surroundings(draft: Draft, leg: Leg) -> None:
    ds, sgs, qm, reservoir, loss = leg.key("ds"), leg.key("sgs"), leg.key("qm"), leg.reservoir or "", leg.loss

    def outside(v: Values) -> float:
        return v[qm] / v[reservoir] + (v[loss] / v["t0"] if loss else 0.0)

    parents = (ds, qm, reservoir, *((loss, "t0") if loss else ()))
    slips: list[tuple[str, Function]] = [
        ("entropy transfer omitted", lambda v: (v[ds],)),
        ("entropy transfer added", lambda v: (v[ds] + outside(v),)),
        ("entropy generation sign reversed", lambda v: (outside(v) - v[ds],)),
    ]
    draft.step(sgs, parents, lambda v: (v[ds] - outside(v),), slips)


def _exergy(draft: Draft, leg: Leg) -> None:
    m, a, b = leg.mass, f"{leg.first}.", f"{leg.last}."
    ds, de = leg.key("ds"), leg.key("de")
    source = leg.key("sgs") if leg.reservoir else leg.key("sg") if leg.wall is None else None
    if source:
        draft.step(
            leg.key("xd"),
            ("t0", source),
            lambda v: (v["t0"] * v[source],),
            (("exergy with the entropy change", lambda v: (v["t0"] * v[ds],)),) if leg.wall else (),
        )
    if leg.path in ("", "insulated"):
        return
    draft.step(
        leg.key("dx"),
        (de, ds, m, a + "v", b + "v", "t0", "p0"),
        lambda v: (v[de] + v["p0"] * v[m] * (v[b + "v"] - v[a + "v"]) - v["t0"] * v[ds],),
        (
            ("item missing from a sum", lambda v: (v[de] - v["t0"] * v[ds],)),
            ("item missing from a sum", lambda v: (v[de] + v["p0"] * v[m] * (v[b + "v"] - v[a + "v"]),)),
        ),
    )


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

"""The step that finds a state, and the ways in which a state is found wrongly."""

from __future__ import annotations

import math
from collections.abc import Callable, Iterator, Mapping

from tests.benchmarks.seeded import units as un
from tests.benchmarks.seeded.chain import Function, Values
from tests.benchmarks.seeded.draft import Draft
from tests.benchmarks.seeded.equation import NoStateError
from tests.benchmarks.seeded.fluids import RealFluid
from tests.benchmarks.seeded.gases import IdealPart, PolynomialGas, Solid
from tests.benchmarks.seeded.properties import Model, State

ModelOf = Callable[[Values], Model]
PROPERTIES = ("t", "p", "v", "u", "s", "h", "x")
TABLES = {
    "Water": "R134a",
    "R134a": "Propane",
    "Propane": "R134a",
    "Nitrogen": "Oxygen",
    "Oxygen": "Nitrogen",
}
TABLES |= {"Argon": "Nitrogen", "CarbonDioxide": "Nitrogen", "Methane": "Nitrogen"}


def state_step(
    draft: Draft,
    state: str,
    model_of: ModelOf,
    pair: Mapping[str, str],
    before: str | None = None,
    extra: tuple[tuple[str, Function], ...] = (),
    parents: tuple[str, ...] = (),
) -> None:
    """Add the step of a state found from two properties; ``pair`` names their keys, ``before`` the state before."""
    own = {given.key for given in draft.givens}
    outputs = tuple(f"{state}.{name}" for name in PROPERTIES if f"{state}.{name}" not in own)
    names = tuple(key.split(".", 1)[1] for key in outputs)

    def taken(found: State, values: Values) -> tuple[float, ...]:
        return tuple(float(getattr(found, name)) for name in names)

    def found(values: Values) -> State:
        return model_of(values).at(**{name: values[key] for name, key in pair.items()})

    def packed(function: Callable[[Values], State]) -> Function:
        return lambda values: taken(function(values), values)

    slips = [(kind, packed(function)) for kind, function in _wrong(model_of, pair, found, before)]
    slips += [
        (kind, _replaced(packed(found), names, swap)) for kind, swap in _mixed_up(model_of, pair, before)
    ]
    draft.step(outputs, (*pair.values(), *parents), packed(found), (*slips, *extra))


def _replaced(
    function: Function, names: tuple[str, ...], swap: Callable[[dict[str, float], Values], None]
) -> Function:
    """Return a step whose outputs are changed one by one after the state is found."""

    def wrong(values: Values) -> tuple[float, ...]:
        outputs = dict(zip(names, function(values), strict=True))
        swap(outputs, values)
        return tuple(outputs[name] for name in names)

    return wrong


def _wrong(
    model_of: ModelOf, pair: Mapping[str, str], found: Callable[[Values], State], before: str | None
) -> Iterator[tuple[str, Callable[[Values], State]]]:
    """Yield the slips that take another state."""

    def real(values: Values) -> RealFluid:
        model = model_of(values)
        if not isinstance(model, RealFluid):
            raise NoStateError("no real fluid")
        return model

    def wet(x: Callable[[State], float]) -> Callable[[Values], State]:
        def wrong(values: Values) -> State:
            state = found(values)
            if math.isnan(state.x):
                raise NoStateError("one phase")
            return real(values).at(t=state.t, x=x(state))

        return wrong

    def saturated(x: float, by: str) -> Callable[[Values], State]:
        def wrong(values: Values) -> State:
            state, fluid = found(values), real(values)
            if not math.isnan(state.x) or state.t >= fluid.equation.t_c:
                raise NoStateError("not beside saturation")
            _, vapour = fluid.equation.saturation(state.t)
            if (state.p > vapour.p) != (x == 0.0):
                raise NoStateError("the other phase")
            near = fluid.at(t=state.t, x=x) if by == "t" else fluid.at(p=state.p, x=x)
            return State(state.t, state.p, near.v, near.u, near.s)

        return wrong

    def ideal(values: Values) -> State:
        state, fluid = found(values), real(values)
        if not math.isnan(state.x) or state.v < 1.5 / fluid.equation.rho_r:
            raise NoStateError("not a gas")
        u0, s0 = fluid.zeros
        shift = {"u": u0, "h": u0, "s": s0}
        known = {name: values[key] + shift.get(name, 0.0) for name, key in pair.items()}
        near = IdealPart(fluid.name).at(**known)
        return near._replace(u=near.u - u0, s=near.s - s0)

    def neighbour(shift: float) -> Callable[[Values], State]:
        def wrong(values: Values) -> State:
            fluid = real(values)
            if "t" not in pair:
                raise NoStateError("no table by temperature")
            known = {name: values[key] for name, key in pair.items()}
            near = fluid.at(**{**known, "t": known["t"] + shift})
            return near._replace(t=known["t"])

        return wrong

    def elsewhere(values: Values) -> State:
        fluid = real(values)
        return RealFluid(TABLES[fluid.name], fluid.datum).at(
            **{name: values[key] for name, key in pair.items()}
        )

    def universal(values: Values) -> State:
        model, state = model_of(values), found(values)
        if not isinstance(model, IdealPart | PolynomialGas) or "v" in pair:
            raise NoStateError("no gas constant taken here")
        return state._replace(v=8314.0 * state.t / state.p)

    if "x" in pair:
        yield "quality ignored", wet(lambda state: 1.0)
        yield "quality as liquid", wet(lambda state: 0.0)
        yield "quality inverted", wet(lambda state: 1.0 - state.x)
    yield "saturated liquid for compressed liquid", saturated(0.0, "t")
    yield "saturated vapour for superheated vapour", saturated(1.0, "t")
    yield "saturated vapour for superheated vapour", saturated(1.0, "p")
    yield "ideal gas for the real fluid", ideal
    for shift in (-10.0, -5.0, 5.0, 10.0):
        yield "neighbouring row of the table", neighbour(shift)
    yield "table of another substance", elsewhere
    yield "universal for specific gas constant", universal
    if before is not None:
        if pair.keys() == {"t", "v"}:
            yield "pressure taken as unchanged", lambda v: found(v)._replace(p=v[f"{before}.p"])
        if pair.keys() == {"t", "p"} and not pair["p"].startswith(before):
            yield "volume taken as unchanged", lambda v: found(v)._replace(v=v[f"{before}.v"])
        if "t" not in pair and not {"u", "h"} & pair.keys() and pair.keys() != {"p", "v"}:
            other = next(name for name in pair if name not in ("s",) or len(pair) == 1)
            yield (
                "temperature taken as unchanged",
                lambda v: model_of(v).at(t=v[f"{before}.t"], **{other: v[pair[other]]}),
            )


def _mixed_up(
    model_of: ModelOf, pair: Mapping[str, str], before: str | None
) -> Iterator[tuple[str, Callable[[dict[str, float], Values], None]]]:
    """Yield the slips that mix up single properties of a state that is found rightly."""

    def energy(outputs: dict[str, float], values: Values) -> None:
        if not isinstance(model_of(values), RealFluid):
            raise NoStateError("no table of u and h")
        outputs["u"] = outputs["h"]

    yield "enthalpy for internal energy", energy
    if before is None:
        return

    def pressure(ratio: Callable[[float, float], float]) -> Callable[[dict[str, float], Values], None]:
        def swap(outputs: dict[str, float], values: Values) -> None:
            if isinstance(model_of(values), RealFluid | Solid):
                raise NoStateError("no gas law")
            now = outputs["t"] if "t" in outputs else values[pair["t"]]
            factor = ratio(values[f"{before}.t"], now)
            if "p" in outputs and pair.keys() == {"t", "v"} and pair["v"] == f"{before}.v":
                outputs["p"] = values[f"{before}.p"] * factor
            elif "v" in outputs and pair.get("p") == f"{before}.p" and "t" in pair:
                outputs["v"] = values[f"{before}.v"] * factor
            else:
                raise NoStateError("no ratio of temperatures here")

        return swap

    yield "Celsius in a ratio", pressure(lambda a, b: (b - 273.15) / (a - 273.15))
    yield "ratio inverted", pressure(lambda a, b: a / b)


def claim_state(draft: Draft, state: str, pointer: str, names: str = "tpvusx", absolute: bool = True) -> None:
    """Say which properties of a state may be written; u, h and s only where a datum tells what they mean."""
    absolute = absolute and (draft.notes.get("fluid", "Water") == "Water" or "datum" in draft.notes)
    own = {given.key for given in draft.givens}
    words = {
        "t": ("temperature", "temperature", un.CELSIUS, "temperature"),
        "p": ("pressure", "pressure", un.BAR, ""),
        "v": ("specific_volume", "specific volume", un.M3_KG, ""),
        "u": ("specific_internal_energy", "specific energy", un.KJ_KG, "u"),
        "h": ("specific_enthalpy", "specific energy", un.KJ_KG, "u"),
        "s": ("specific_entropy", "specific entropy", un.KJ_KGK, "s"),
        "x": ("quality", "quality", un.NONE, "quality"),
    }
    for name in names:
        key = f"{state}.{name}"
        if key in own or (name in "uhs" and not absolute):
            continue
        word, kind, unit, group = words[name]
        body = pointer.rsplit("/", 1)[1]
        if name == "p" and draft.rng.random() < 0.4:
            unit = draft.rng.choice((un.KPA, un.MPA, un.gauge(un.BAR, draft.givens[1].value)))
        draft.claimable(
            key, f"{pointer}/{word}", kind, unit, f"{group}:{body}" if group in ("u", "s") else group
        )

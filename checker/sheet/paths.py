"""The declared paths: what each one holds constant, what work it does, and which curve it follows.

One entry of ``PATHS`` per path kind of the vocabulary; a new path is one new entry. Work is that of the moving
boundary, positive out of the system, for the whole body.
"""

from __future__ import annotations

import math
from collections.abc import Callable, Mapping
from dataclasses import dataclass
from typing import Final

from checker.outcomes import NotEvaluable
from checker.substances.interface import PropertyState

Parameters = Mapping[str, float]
PressureOfVolume = Callable[[float], float]


@dataclass(frozen=True, slots=True)
class WorkFormula:
    """How the boundary work follows from the end states.

    ``needs`` lists what the function takes: ``mass``, ``p1``, ``v2`` … (properties of the ends, 1 from and 2
    to) and names of path parameters.
    """

    needs: tuple[str, ...]
    function: Callable[..., float]
    formula: str
    substitution: str


@dataclass(frozen=True, slots=True)
class Path:
    """A path kind.

    Attributes
    ----------
    kind : str
        Word of the record format.
    holds : str or None
        Property that is the same at both ends.
    no_heat : bool
        The path itself says Q = 0.
    quasi_static : bool
        Every state between is an equilibrium state, so that the boundary pressure is the system's.
    reversible : bool
        The path itself says that nothing is generated.
    work : WorkFormula or None
        None: the path does not tell the work.
    between : callable or None
        Specific boundary work from one full state to another [J/kg], for finding an end state.
    curve : callable or None
        Pressure [Pa] as a function of specific volume [m³/kg] through a known state.
    parameters : tuple of str
        Path parameters that the curve or the work needs.
    """

    kind: str
    holds: str | None = None
    no_heat: bool = False
    quasi_static: bool = False
    reversible: bool = False
    work: WorkFormula | None = None
    between: Callable[[PropertyState, PropertyState, Parameters], float] | None = None
    curve: Callable[[PropertyState, Parameters], PressureOfVolume] | None = None
    parameters: tuple[str, ...] = ()


def _volume(state: PropertyState) -> float:
    if state.specific_volume is None:
        raise NotEvaluable("the model states no density, so the volume is not known", "missing")
    return state.specific_volume


def _pressure(state: PropertyState) -> float:
    if state.pressure is None:
        raise NotEvaluable("the model states no pressure", "missing")
    return state.pressure


def polytropic_work(mass: float, p1: float, v1: float, p2: float, v2: float, exponent: float) -> float:
    """Work along p·vⁿ = constant. [J]

    W = m (p₂v₂ − p₁v₁)/(1 − n); m p₁v₁ ln(v₂/v₁) for n = 1. Closed form of ∫p dV.
    """
    if abs(exponent - 1.0) < 1e-9:
        return mass * p1 * v1 * math.log(v2 / v1)
    return mass * (p2 * v2 - p1 * v1) / (1.0 - exponent)


def isothermal_work(mass: float, t1: float, s1: float, s2: float, u1: float, u2: float) -> float:
    """Work of a reversible isothermal path. [J]

    ∫p dv at constant T is the decrease of the Helmholtz energy, T (s₂ − s₁) − (u₂ − u₁), for any equation of
    state and through the two-phase region.
    """
    return mass * (t1 * (s2 - s1) - (u2 - u1))


def polytropic_curve(through: PropertyState, parameters: Parameters) -> PressureOfVolume:
    """Return p(v) along p·vⁿ = constant through a state."""
    pressure, volume, exponent = _pressure(through), _volume(through), parameters["exponent"]
    return lambda v: pressure * (volume / v) ** exponent


def linear_curve(through: PropertyState, parameters: Parameters) -> PressureOfVolume:
    """Return p(v), a straight line given by its slope dp/dv (and by one of its points, if stated).

    ``slope`` [Pa·kg/m³]; ``line_pressure`` [Pa] at ``line_volume`` [m³/kg] where the line is given by itself.
    """
    pressure = parameters.get("line_pressure", through.pressure)
    volume = parameters.get("line_volume", through.specific_volume)
    if pressure is None or volume is None:
        raise NotEvaluable("the line needs a pressure and a volume to start from", "missing")
    slope = parameters["slope"]
    return lambda v: pressure + slope * (v - volume)


def _work_under_line(first: PropertyState, last: PropertyState, _: Parameters) -> float:
    return 0.5 * (_pressure(first) + _pressure(last)) * (_volume(last) - _volume(first))


def _polytropic_between(first: PropertyState, last: PropertyState, parameters: Parameters) -> float:
    ends = (_pressure(first), _volume(first), _pressure(last), _volume(last))
    return polytropic_work(1.0, *ends, parameters["exponent"])


def _isothermal_between(first: PropertyState, last: PropertyState, _: Parameters) -> float:
    gain = last.specific_internal_energy - first.specific_internal_energy
    return first.temperature * (last.specific_entropy - first.specific_entropy) - gain


def _none(*_: object) -> float:
    return 0.0


_NO_WORK: Final = WorkFormula((), lambda: 0.0, "W_b = 0", "0")

PATHS: Final[dict[str, Path]] = {
    path.kind: path
    for path in (
        Path("constant volume", holds="specific_volume", quasi_static=True, work=_NO_WORK, between=_none),
        Path(
            "constant pressure",
            holds="pressure",
            quasi_static=True,
            work=WorkFormula(
                ("mass", "p1", "v1", "v2"),
                lambda mass, p1, v1, v2: mass * p1 * (v2 - v1),
                "W_b = ∫p dV = p·m·(v₂ − v₁)",
                "{1}·{0}·({3} − {2})",
            ),
            between=lambda first, last, _: _pressure(first) * (_volume(last) - _volume(first)),
        ),
        Path(
            "isothermal",
            holds="temperature",
            quasi_static=True,
            work=WorkFormula(
                ("mass", "t1", "s1", "s2", "u1", "u2"),
                isothermal_work,
                "W_b = ∫p dV = m·[T·(s₂ − s₁) − (u₂ − u₁)]",
                "{0}·[{1}·({3} − {2}) − ({5} − {4})]",
            ),
            between=_isothermal_between,
        ),
        Path("adiabatic", no_heat=True),
        Path(
            "isentropic",
            holds="specific_entropy",
            no_heat=True,
            quasi_static=True,
            reversible=True,
            work=WorkFormula(
                ("mass", "u1", "u2"),
                lambda mass, u1, u2: -mass * (u2 - u1),
                "W_b = ∫p dV = −m·(u₂ − u₁)",
                "−{0}·({2} − {1})",
            ),
            between=lambda first, last, _: first.specific_internal_energy - last.specific_internal_energy,
        ),
        Path(
            "polytropic",
            quasi_static=True,
            work=WorkFormula(
                ("mass", "p1", "v1", "p2", "v2", "exponent"),
                polytropic_work,
                "W_b = ∫p dV = m·(p₂·v₂ − p₁·v₁)/(1 − n)",
                "{0}·({3}·{4} − {1}·{2})/(1 − {5})",
            ),
            between=_polytropic_between,
            curve=polytropic_curve,
            parameters=("exponent",),
        ),
        Path(
            "pressure linear in volume",
            quasi_static=True,
            work=WorkFormula(
                ("mass", "p1", "p2", "v1", "v2"),
                lambda mass, p1, p2, v1, v2: mass * 0.5 * (p1 + p2) * (v2 - v1),
                "W_b = ∫p dV = ½·(p₁ + p₂)·m·(v₂ − v₁)",
                "½·({1} + {2})·{0}·({4} − {3})",
            ),
            between=_work_under_line,
            curve=linear_curve,
            parameters=("slope",),
        ),
        Path(
            "against constant external pressure",
            work=WorkFormula(
                ("mass", "external_pressure", "v1", "v2"),
                lambda mass, external, v1, v2: mass * external * (v2 - v1),
                "W_b = p_ext·m·(v₂ − v₁)",
                "{1}·{0}·({3} − {2})",
            ),
            between=lambda first, last, parameters: (
                parameters["external_pressure"] * (_volume(last) - _volume(first))
            ),
            parameters=("external_pressure",),
        ),
        Path("free expansion", work=_NO_WORK, between=_none),
        Path("end states only"),
    )
}

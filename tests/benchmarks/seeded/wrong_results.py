"""Slips of results: the value in mind is right, and another one is written."""

from __future__ import annotations

from collections.abc import Callable, Iterator, Mapping

from tests.benchmarks.seeded import units as un
from tests.benchmarks.seeded.chain import Chain, Claim, Slip, Values
from tests.benchmarks.seeded.equation import NoStateError
from tests.benchmarks.seeded.wrong_inputs import altered_digits, readable

Rewrite = Callable[[float, Values], float]
DIGITS = {
    "transposed": "digits transposed",
    "dropped": "digit dropped",
    "doubled": "digit doubled",
    "shifted": "decimal shifted",
}
ENERGY_FACTORS = (
    ("kJ and J mixed up", 1e3),
    ("kWh and kJ mixed up", 3600.0),
    ("kcal and kJ mixed up", 4.1868),
    ("BTU and kJ mixed up", 1.05505585262),
)
RATIOS = ("efficiency", "performance")


def result_slips(
    chain: Chain, texts: Mapping[str, str], molar_mass: float | None, duration: str | None
) -> Iterator[Slip]:
    """Yield every way in which a claim can be written wrongly, each carried on and not."""
    for claim in chain.claims:
        for carried in (True, False):
            for kind, rewrite in _rewrites(claim, molar_mass, duration):
                yield Slip(kind, claim.key, rewrite=rewrite, carried=carried)
            for kind, retext in _pens(claim, texts[claim.key]):
                yield Slip(kind, claim.key, retext=retext, carried=carried)


def _pens(claim: Claim, text: str) -> Iterator[tuple[str, Callable[[str], str]]]:
    """Yield the slips of the pen on the text of a claim, whatever its digits will be."""
    for manner in DIGITS:
        for place in range(len(_altered(claim, text, manner))):
            yield DIGITS[manner], _pen(claim, manner, place)


def _pen(claim: Claim, manner: str, place: int) -> Callable[[str], str]:
    def retext(text: str) -> str:
        found = _altered(claim, text, manner)
        if place >= len(found):
            raise NoStateError("no such digit")
        return f"{found[place]} {claim.unit.text}".strip()

    return retext


def _altered(claim: Claim, text: str, manner: str) -> list[str]:
    number = text.removesuffix(claim.unit.text).strip()
    return [wrong for kind, wrong in altered_digits(number) if kind == manner and readable(wrong)]


def _times(factor: float) -> Rewrite:
    return lambda right, values: right * factor


def _rewrites(claim: Claim, molar_mass: float | None, duration: str | None) -> Iterator[tuple[str, Rewrite]]:
    kind = claim.kind
    if kind in ("energy", "entropy"):
        yield "sign reversed", _times(-1.0)
    if kind not in ("temperature", "pressure"):
        yield "doubled", _times(2.0)
        yield "halved", _times(0.5)
    if kind in ("energy", "specific energy"):
        for name, factor in ENERGY_FACTORS:
            yield name, _times(factor)
            yield name, _times(1.0 / factor)
    if kind in ("entropy", "specific entropy"):
        yield "kJ and J mixed up", _times(1e3)
        yield "kJ and J mixed up", _times(1e-3)
    if kind in ("energy", "entropy"):
        yield "per mass for total", lambda right, values: right / values["m"]
        if duration is not None and kind == "energy":
            yield "rate for total", lambda right, values: right / values[duration]
    if kind.startswith("specific"):
        yield "total for per mass", lambda right, values: right * values["m"]
        if molar_mass is not None and kind != "specific volume":
            yield "per mole for per mass", _times(molar_mass)
    if kind == "pressure":
        if claim.unit.zero:
            yield "absolute for gauge in the result", lambda right, values: right + values["p0"]
        else:
            yield "gauge for absolute in the result", lambda right, values: right - values["p0"]
    if kind == "temperature" and claim.unit is un.CELSIUS:
        yield "kelvin for Celsius in the result", lambda right, values: right + 273.15
        yield (
            "Fahrenheit for Celsius in the result",
            lambda right, values: 1.8 * (right - 273.15) + 32.0 + 273.15,
        )
    if kind in ("quality", "efficiency"):
        yield "complement", lambda right, values: 1.0 - right
    if kind in RATIOS:
        yield "reciprocal", lambda right, values: 1.0 / right
    if kind == "performance":
        yield "heating for cooling", lambda right, values: right + 1.0

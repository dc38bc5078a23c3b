"""Other spellings of the names of the allow-list: the trade's, and slips of the shift key."""

from __future__ import annotations

from typing import Final

SPELLINGS: Final[dict[str, str]] = {
    # whole words and abbreviations
    "litre": "L", "liter": "L", "ltr": "L", "inch": "in", "tonne": "t", "lbs": "lb", "sec": "s", "hr": "h",
    "hrs": "h", "day": "d", "days": "d", "Torr": "torr", "mm Hg": "mmHg", "in Hg": "inHg",
    "gal(US)": "US gal", "gal(UK)": "imp gal", "gal(imp)": "imp gal", "USgal": "US gal",
    "cft": "cu ft", "cuft": "cu ft",
    # amounts
    "lb-mol": "lbmol", "lb mol": "lbmol", "kgmol": "kmol", "kg-mol": "kmol", "kg mol": "kmol", "gmol": "mol",
    "g-mol": "mol", "g mol": "mol",
    # heat units
    "Btu": "BTU", "btu": "BTU", "MMBtu": "MMBTU", "Btu(IT)": "BTU(IT)", "Btu(th)": "BTU(th)",
    "BTU_IT": "BTU(IT)", "Btu_IT": "BTU(IT)", "BTU_th": "BTU(th)", "Btu_th": "BTU(th)", "cal_IT": "cal(IT)",
    "cal_th": "cal(th)", "kcal_IT": "kcal(IT)", "kcal_th": "kcal(th)", "kp": "kgf",
    # pressures
    "atü": "at(g)", "barü": "bar(g)", "ATA": "at(a)",
    # temperatures
    "℃": "°C", "℉": "°F", "degC": "°C", "degF": "°F", "degR": "°R", "deg C": "°C", "deg F": "°F",
    "deg R": "°R", "Celsius": "°C", "Fahrenheit": "°F", "Rankine": "°R", "Kelvin": "K", "kelvin": "K",
    "Δ℃": "Δ°C", "Δ℉": "Δ°F", "ΔdegC": "Δ°C", "ΔdegF": "Δ°F",
}  # fmt: skip
"""Read without a word: nobody could mean anything else."""

TYPING_SLIPS: Final[dict[str, str]] = {
    "KJ": "kJ", "Kj": "kJ", "kj": "kJ", "KW": "kW", "kw": "kW", "Kw": "kW", "KWh": "kWh", "kwh": "kWh",
    "Kwh": "kWh", "KWH": "kWh", "Kg": "kg", "KN": "kN", "Kmol": "kmol", "gm": "g", "Kcal": "kcal",
    "KPa": "kPa", "Kpa": "kPa", "kpa": "kPa", "Mpa": "MPa", "Bar": "bar", "BAR": "bar", "PSI": "psi",
    "Psi": "psi", "PSIG": "psig", "PSIA": "psia", "barG": "barg", "barA": "bara",
    "BARG": "barg", "BARA": "bara",
    "°K": "K",
}  # fmt: skip
"""Read with a note: the letters are right and their case is not."""

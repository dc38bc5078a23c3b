"""Curves of the sample diagrams: saturation lines of water and nitrogen, paths of the sample processes.

The numbers come from the reference equations of the two fluids, rounded to four digits.
"""

from __future__ import annotations

from checker.figures import Curve, Diagram, Marker

# (temperature °C, saturation pressure bar, v' m³/kg, v" m³/kg, s' kJ/(kg·K), s" kJ/(kg·K))
WATER = (
    (20, 0.02339, 0.001002, 57.76, 0.2965, 8.666),
    (50, 0.1235, 0.001012, 12.03, 0.7038, 8.075),
    (80, 0.4741, 0.001029, 3.405, 1.076, 7.611),
    (100, 1.014, 0.001043, 1.672, 1.307, 7.354),
    (120.21, 2.0, 0.001061, 0.8857, 1.53, 7.127),
    (150, 4.762, 0.001091, 0.3925, 1.842, 6.837),
    (180, 10.03, 0.001127, 0.1938, 2.139, 6.584),
    (210, 19.08, 0.001173, 0.1043, 2.425, 6.356),
    (240, 33.47, 0.001229, 0.0597, 2.702, 6.142),
    (270, 55.03, 0.001303, 0.03562, 2.976, 5.93),
    (300, 85.88, 0.001404, 0.02166, 3.255, 5.706),
    (330, 128.6, 0.001561, 0.01298, 3.552, 5.442),
    (350, 165.3, 0.00174, 0.008802, 3.778, 5.211),
    (365, 198.2, 0.002017, 0.006012, 4.001, 4.95),
    (372, 215.5, 0.002368, 0.004408, 4.179, 4.706),
    (373.5, 219.5, 0.002626, 0.003794, 4.27, 4.579),
)
NITROGEN = (
    (-198.15, 0.7604, 0.001224, 0.2825, 2.771, 5.467),
    (-183.15, 3.605, 0.001342, 0.06632, 3.147, 5.153),
    (-173.15, 7.783, 0.001451, 0.03129, 3.376, 4.986),
    (-163.15, 14.66, 0.001609, 0.01598, 3.601, 4.823),
    (-155.15, 22.68, 0.001826, 0.009288, 3.796, 4.668),
    (-150.15, 29.12, 0.0021, 0.006171, 3.948, 4.525),
    (-147.65, 32.85, 0.002464, 0.004473, 4.07, 4.387),
    (-147.15, 33.65, 0.002688, 0.003918, 4.123, 4.322),
)
VOLUME, ENTROPY, PRESSURE, TEMPERATURE = "v [m³/kg]", "s [kJ/(kg·K)]", "p [bar]", "T [°C]"
BOTTLE_PATH = ((15.0, 150.0, 5.219), (30.0, 160.5, 5.258), (45.0, 170.9, 5.296), (60.0, 181.4, 5.331))
CYLINDER_PATH = (
    (0.3549, 3.769, 120.2),
    (0.5041, 4.713, 120.2),
    (0.6534, 5.657, 120.2),
    (0.8857, 7.127, 120.2),
    (0.9485, 7.28, 150.0),
    (1.0805, 7.508, 200.0),
)


def dome(rows: tuple[tuple[float, ...], ...], x: tuple[int, int], y: int) -> Curve:
    """Return the saturation line through the liquid branch upwards and the vapour branch downwards."""
    liquid = tuple((row[x[0]], row[y]) for row in rows)
    vapour = tuple((row[x[1]], row[y]) for row in reversed(rows))
    return Curve("saturation line", "dome", liquid + vapour)


def pair(
    body: str, rows: tuple[tuple[float, ...], ...], paths: tuple[Curve, Curve], marks: tuple[tuple[Marker, ...], ...]
) -> tuple[Diagram, Diagram]:  # fmt: skip
    """Return the p–v and the T–s diagram of a body."""
    return (
        Diagram("p-v", body, VOLUME, PRESSURE, True, True, (dome(rows, (2, 3), 1), paths[0]), marks[0]),
        Diagram("T-s", body, ENTROPY, TEMPERATURE, False, False, (dome(rows, (4, 5), 0), paths[1]), marks[1]),
    )


def bottle_diagrams() -> tuple[Diagram, Diagram]:
    """Return the diagrams of the nitrogen bottle; its stated and recomputed states nearly coincide."""
    pressure = Curve("warming: constant volume", "path", tuple((0.005795, p) for _, p, _ in BOTTLE_PATH))
    entropy = Curve("warming: constant volume", "path", tuple((s, t) for t, _, s in BOTTLE_PATH))
    marks_pv = (
        Marker("cold", "recomputed", 0.005795, 150.0),
        Marker("hot", "recomputed", 0.005795, 181.4),
        Marker("cold", "stated", 0.00579, 150.0),
        Marker("hot", "stated", 0.00579, 181.0),
    )
    marks_ts = (Marker("cold", "recomputed", 5.219, 15.0), Marker("hot", "recomputed", 5.331, 60.0))
    return pair("nitrogen", NITROGEN, (pressure, entropy), (marks_pv, marks_ts))


def cylinder_diagrams() -> tuple[Diagram, Diagram]:
    """Return the diagrams of the steam cylinder; the stated end state lies apart from the recomputed one."""
    pressure = Curve("expansion: constant pressure", "path", tuple((v, 2.0) for v, _, _ in CYLINDER_PATH))
    entropy = Curve("expansion: constant pressure", "path", tuple((s, t) for _, s, t in CYLINDER_PATH))
    marks_pv = (
        Marker("wet", "recomputed", 0.3549, 2.0),
        Marker("superheated", "recomputed", 1.0805, 2.0),
        Marker("superheated", "stated", 1.15, 2.0),
    )
    marks_ts = (
        Marker("wet", "recomputed", 3.769, 120.2),
        Marker("superheated", "recomputed", 7.508, 200.0),
        Marker("superheated", "stated", 7.82, 200.0),
    )
    return pair("steam", WATER, (pressure, entropy), (marks_pv, marks_ts))

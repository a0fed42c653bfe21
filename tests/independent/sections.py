"""Sections as polygons: area and second moments by Green's theorem on the four corners of every plate.

A plate is a rectangle; a reading thins it about its own mid-line and leaves the others where they are.
"""

from __future__ import annotations

import math
from dataclasses import dataclass
from typing import Any

from independent.units import si

JSON = dict[str, Any]


@dataclass(frozen=True)
class Plate:
    """A rectangle by its centre and sides (m); `thin` names the side that is its thickness."""

    x: float
    y: float
    width: float
    height: float
    thin: str

    def thickness(self) -> float:
        """Return the smaller side (m)."""
        return self.width if self.thin == "width" else self.height

    def at(self, thickness: float) -> Plate:
        """Return the same plate with another thickness about the same mid-line."""
        if self.thin == "width":
            return Plate(self.x, self.y, thickness, self.height, self.thin)
        return Plate(self.x, self.y, self.width, thickness, self.thin)

    def corners(self) -> list[tuple[float, float]]:
        """Return the corners, anticlockwise."""
        u, v = self.width / 2, self.height / 2
        return [(self.x + i * u, self.y + j * v) for i, j in ((-1, -1), (1, -1), (1, 1), (-1, 1))]


@dataclass(frozen=True)
class Properties:
    """Area (m^2) and second moments (m^4) about the centroid: horizontal axis, vertical axis, product."""

    area: float
    horizontal: float
    vertical: float
    product: float


def _lying(x: float, y: float, width: float, thickness: float) -> Plate:
    return Plate(x, y, width, thickness, "height")


def _standing(x: float, y: float, thickness: float, height: float) -> Plate:
    return Plate(x, y, thickness, height, "width")


def _tube(s: JSON) -> dict[str, Plate]:
    d, b, t = si(s["depth"]), si(s["width"]), si(s["thickness"])
    return {
        "top wall": _lying(0, (d - t) / 2, b, t),
        "bottom wall": _lying(0, (t - d) / 2, b, t),
        "left wall": _standing((t - b) / 2, 0, t, d - 2 * t),
        "right wall": _standing((b - t) / 2, 0, t, d - 2 * t),
    }


def _i_section(s: JSON) -> dict[str, Plate]:
    d, b, w, f = (si(s[key]) for key in ("depth", "flange width", "web thickness", "flange thickness"))
    return {
        "web": _standing(0, 0, w, d - 2 * f),
        "top flange": _lying(0, (d - f) / 2, b, f),
        "bottom flange": _lying(0, (f - d) / 2, b, f),
    }


def _channel(s: JSON) -> dict[str, Plate]:
    d, b, w, f = (si(s[key]) for key in ("depth", "flange width", "web thickness", "flange thickness"))
    return {
        "web": _standing(w / 2, 0, w, d - 2 * f),
        "top flange": _lying(b / 2, (d - f) / 2, b, f),
        "bottom flange": _lying(b / 2, (f - d) / 2, b, f),
    }


def _tee(s: JSON) -> dict[str, Plate]:
    d, b, w, f = (si(s[key]) for key in ("depth", "flange width", "web thickness", "flange thickness"))
    return {"flange": _lying(0, -f / 2, b, f), "web": _standing(0, -(d + f) / 2, w, d - f)}


def _angle(s: JSON) -> dict[str, Plate]:
    (v, h), t = (si(leg) for leg in s["legs"]), si(s["thickness"])
    return {"vertical leg": _standing(t / 2, v / 2, t, v), "horizontal leg": _lying((h + t) / 2, t / 2, h - t, t)}


def _double_angle(s: JSON) -> dict[str, Plate]:
    gap = si(s["gap"]) / 2
    one = _angle(s)
    two = {}
    for side, sign in (("left", -1), ("right", 1)):
        for name, plate in one.items():
            two[f"{side} {name}"] = Plate(sign * (gap + plate.x), plate.y, plate.width, plate.height, plate.thin)
    return two


def _flat(s: JSON) -> dict[str, Plate]:
    return {"plate": _standing(0, 0, si(s["thickness"]), si(s["width"]))}


def _built_up(s: JSON) -> dict[str, Plate]:
    plates = {}
    for name, p in s["plates"].items():
        w, h = si(p["width"]), si(p["height"])
        plates[name] = Plate(si(p["x"]), si(p["y"]), w, h, "width" if w < h else "height")
    return plates


RECTANGLES = {
    "rectangular tube": _tube,
    "i section": _i_section,
    "channel": _channel,
    "tee": _tee,
    "angle": _angle,
    "double angle": _double_angle,
    "flat bar": _flat,
    "built up": _built_up,
}
ROUND = {"round tube": "wall", "round bar": "bar"}


def rectangles(section: JSON) -> dict[str, Plate]:
    """Return the plates of a section that is made of rectangles."""
    return RECTANGLES[section["shape"]](section)


def nominal(section: JSON) -> dict[str, float]:
    """Return the thickness of each plate as built (m); the diameter of a round bar."""
    if section["shape"] in ROUND:
        key = "diameter" if section["shape"] == "round bar" else "thickness"
        return {ROUND[section["shape"]]: si(section[key])}
    return {name: plate.thickness() for name, plate in rectangles(section).items()}


def depth(section: JSON, turned: int = 0) -> float:
    """Return the nominal depth in the plane of the truss (m)."""
    if section["shape"] in ROUND:
        return si(section["diameter"])
    corners = [corner for plate in rectangles(section).values() for corner in plate.corners()]
    along = [corner[0 if turned == 90 else 1] for corner in corners]
    return max(along) - min(along)


def polygons(shapes: list[list[tuple[float, float]]]) -> Properties:
    """Integrate closed polygons by Green's theorem and move the moments to the common centroid."""
    area = first_x = first_y = xx = yy = xy = 0.0
    for corners in shapes:
        for (x1, y1), (x2, y2) in zip(corners, corners[1:] + corners[:1], strict=True):
            cross = x1 * y2 - x2 * y1
            area += cross / 2
            first_x += cross * (x1 + x2) / 6
            first_y += cross * (y1 + y2) / 6
            xx += cross * (y1 * y1 + y1 * y2 + y2 * y2) / 12
            yy += cross * (x1 * x1 + x1 * x2 + x2 * x2) / 12
            xy += cross * (x1 * y2 + 2 * x1 * y1 + 2 * x2 * y2 + x2 * y1) / 24
    if area == 0:
        return Properties(0.0, 0.0, 0.0, 0.0)
    return Properties(area, xx - first_y * first_y / area, yy - first_x * first_x / area, xy - first_x * first_y / area)


def ring(inner: float, outer: float) -> Properties:
    """Integrate a ring between two radii: pi r^3 dr and 2 pi r dr by Simpson's rule, which is exact for cubics."""
    middle = (inner + outer) / 2
    step = (outer - inner) / 6
    area = 2 * math.pi * step * (inner + 4 * middle + outer)
    moment = math.pi * step * (inner**3 + 4 * middle**3 + outer**3)
    return Properties(area, moment, moment, 0.0)


def from_plates(section: JSON, thickness: dict[str, float]) -> Properties:
    """Return the properties that the plates give, not turned, table values left aside."""
    if section["shape"] == "round bar":
        return ring(0.0, thickness["bar"] / 2)
    if section["shape"] == "round tube":
        mean = (si(section["diameter"]) - si(section["thickness"])) / 2
        return ring(mean - thickness["wall"] / 2, mean + thickness["wall"] / 2)
    return polygons([plate.at(thickness[name]).corners() for name, plate in rectangles(section).items()])


def properties(section: JSON, thickness: dict[str, float], turned: int = 0) -> Properties:
    """Return remaining properties; table values of the section as built are scaled by what the plates give."""
    now = from_plates(section, thickness)
    area, horizontal, vertical = now.area, now.horizontal, now.vertical
    if section.keys() & {"area", "I horizontal", "I vertical"}:
        new = from_plates(section, nominal(section))
        if "area" in section:
            area = si(section["area"]) * now.area / new.area
        if "I horizontal" in section:
            horizontal = si(section["I horizontal"]) * now.horizontal / new.horizontal
        if "I vertical" in section:
            vertical = si(section["I vertical"]) * now.vertical / new.vertical
    if turned == 90:
        return Properties(area, vertical, horizontal, -now.product)
    return Properties(area, horizontal, vertical, now.product)

"""Doubly symmetric sections of usual sizes whose plates stay far from slender until most of them is gone."""

from __future__ import annotations

from typing import Any, Protocol

JSON = dict[str, Any]


class Sizes(Protocol):
    """Writes a size (mm) with its unit."""

    def small(self, mm: float) -> str:
        """Return the text of a size."""


SIZES: dict[str, dict[str, float]] = {
    "box 200": {"depth": 200, "width": 150, "thickness": 10},
    "box 150": {"depth": 150, "width": 150, "thickness": 8},
    "box 100": {"depth": 100, "width": 80, "thickness": 6},
    "pipe 168": {"diameter": 168.3, "thickness": 8},
    "pipe 114": {"diameter": 114.3, "thickness": 6},
    "joist 160": {"depth": 152, "flange width": 160, "web thickness": 8, "flange thickness": 12},
    "joist 120": {"depth": 120, "flange width": 120, "web thickness": 7, "flange thickness": 11},
    "rod 40": {"diameter": 40},
    "flat 120": {"width": 120, "thickness": 25},
}
SHAPES = {"box": "rectangular tube", "pipe": "round tube", "joist": "i section", "rod": "round bar", "flat": "flat bar"}
KINDS: dict[str, JSON] = {
    "box 200": {"formed": "hot"},
    "pipe 168": {"formed": "hot"},
    "joist 160": {"rolled": True, "area": 50.2, "I horizontal": 2080, "I vertical": 815},  # table values: cm^2, cm^4
}
# two flange plates and two webs of a closed box, by their centres
LATTICE = {
    "top": {"width": 180, "height": 12, "x": 0, "y": 94},
    "bottom": {"width": 180, "height": 12, "x": 0, "y": -94},
    "left": {"width": 10, "height": 176, "x": -70, "y": 0},
    "right": {"width": 10, "height": 176, "x": 70, "y": 0},
}
HEAVY = ("box 200", "box 150", "pipe 168", "joist 160", "built 200")
FOR_ROLE: dict[str, tuple[str, ...]] = {
    "top chord": HEAVY,
    "bottom chord": HEAVY,
    "end post": HEAVY,
    "vertical": ("box 100", "pipe 114", "joist 120"),
    "diagonal": ("box 100", "pipe 114", "joist 120", "rod 40", "flat 120"),
}


def written(writer: Sizes) -> JSON:
    """Return the `sections` of a site document."""
    sections: JSON = {}
    for name, sizes in SIZES.items():
        shape = SHAPES[name.split(" ", maxsplit=1)[0]]
        sections[name] = {"shape": shape, **{key: writer.small(mm) for key, mm in sizes.items()}}
        for key, value in KINDS.get(name, {}).items():
            table = isinstance(value, float | int) and not isinstance(value, bool)
            sections[name][key] = f"{value} cm^{2 if key == 'area' else 4}" if table else value
    plates = {name: {key: writer.small(mm) for key, mm in plate.items()} for name, plate in LATTICE.items()}
    sections["built 200"] = {"shape": "built up", "plates": plates}
    return sections


def plates(name: str) -> dict[str, float]:
    """Return the plates of a section by name with their thickness (mm)."""
    kind = name.split(" ", maxsplit=1)[0]
    if kind == "built":
        return {plate: min(sizes["width"], sizes["height"]) for plate, sizes in LATTICE.items()}
    sizes = SIZES[name]
    if kind == "box":
        return {f"{side} wall": sizes["thickness"] for side in ("top", "bottom", "left", "right")}
    if kind == "joist":
        web, flange = sizes["web thickness"], sizes["flange thickness"]
        return {"web": web, "top flange": flange, "bottom flange": flange}
    plate, key = {"pipe": ("wall", "thickness"), "rod": ("bar", "diameter"), "flat": ("plate", "thickness")}[kind]
    return {plate: sizes[key]}

"""Pratt trusses of any number of panels, as site documents: the subject of the benchmarks."""

from __future__ import annotations

from typing import Any


def pratt(panels: int, panel: float = 3.0, height: float = 3.0) -> dict[str, Any]:
    """A single through Pratt truss with an even number of panels, 4 panels - 3 bars; one visit, one reading."""
    middle = panels // 2
    joints = {f"L{i}": [f"{i * panel} m", "0 m"] for i in range(panels + 1)}
    joints |= {f"U{i}": [f"{i * panel} m", f"{height} m"] for i in range(1, panels)}
    pairs = [(f"L{i}", f"L{i + 1}", "bottom chord") for i in range(panels)]
    pairs += [("L0", "U1", "end post"), (f"U{panels - 1}", f"L{panels}", "end post")]
    pairs += [(f"U{i}", f"U{i + 1}", "top chord") for i in range(1, panels - 1)]
    pairs += [(f"L{i}", f"U{i}", "vertical") for i in range(1, panels)]
    pairs += [(f"U{i}", f"L{i + 1}", "diagonal") for i in range(1, middle)]
    pairs += [(f"L{i}", f"U{i + 1}", "diagonal") for i in range(middle, panels - 1)]
    bars = [
        {"id": f"{a}-{b}", "from": a, "to": b, "section": "tube", "material": "steel", "role": role}
        for a, b, role in pairs
    ]
    return {
        "format": "truss-footbridge/1",
        "name": f"Pratt of {panels} panels",
        "materials": {
            "steel": {
                "kind": "structural steel",
                "E": "200 GPa",
                "Fy": "250 MPa",
                "Fu": "400 MPa",
                "density": "7850 kg/m^3",
            }
        },
        "sections": {"tube": {"shape": "rectangular tube", "depth": "200 mm", "width": "200 mm", "thickness": "8 mm"}},
        "trusses": {
            "only": {
                "top chord": "braced overhead",
                "joints": joints,
                "supports": {"L0": "pin", f"L{panels}": "roller"},
                "bars": bars,
                "deck joints": [f"L{i}" for i in range(panels + 1)],
            }
        },
        "deck": {"width": "2 m", "dead": "0.8 kPa", "wearing": "0.2 kPa"},
        "rating": {
            "basis": "lrfr",
            "system": "welded",
            "live": [{"name": "crowd", "kind": "crowd", "pressure": "4 kPa"}],
        },
        "visits": [{"date": "2026-05-14", "observations": [reading("L0-L1", 7.6)]}],
    }


def reading(bar: str, thickness: float) -> dict[str, Any]:
    """One reading on every wall of a bar."""
    walls = ("top wall", "bottom wall", "left wall", "right wall")
    return {
        "truss": "only",
        "bar": bar,
        "seen": "hands on",
        "readings": [
            {"station": 0.5, "plate": wall, "thickness": [f"{thickness} mm"], "extent": "0.5 m"} for wall in walls
        ],
    }

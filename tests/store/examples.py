"""Sites to store: one that uses every key of the format, one that uses as few as it may, and a second tablet's."""

from __future__ import annotations

import copy
import json
from typing import Any

from inspector.exchange import site
from inspector.exchange.site_form import Site

JSON = dict[str, Any]

_STEEL: JSON = {"kind": "structural steel", "E": "200 GPa", "density": "7850 kg/m^3"}

FEWEST: JSON = {
    "format": "truss-footbridge/1",
    "name": "Mill leat footbridge",
    "materials": {"steel": _STEEL},
    "sections": {"rod": {"shape": "round bar", "diameter": "40 mm"}},
    "trusses": {
        "near": {
            "top chord": "at deck",
            "joints": {"B": ["0 m", "0 m"], "A": ["4 m", "0 m"], "T": ["2 m", "-1.5 m"]},
            "supports": {"B": "pin", "A": "roller"},
            "bars": [
                {"id": "2", "from": "B", "to": "A", "section": "rod", "material": "steel", "role": "top chord"},
                {"id": "1", "from": "B", "to": "T", "section": "rod", "material": "steel", "role": "diagonal"},
                {"id": "3", "from": "T", "to": "A", "section": "rod", "material": "steel", "role": "diagonal"},
            ],
            "deck joints": ["B", "A"],
        }
    },
    "deck": {"width": "1.2 m", "dead": "0.5 kPa"},
    "rating": {"basis": "lrfr", "live": [{"name": "crowd", "kind": "crowd", "pressure": "4 kPa"}]},
}

_BAR: JSON = {
    "id": "2",
    "from": "B",
    "to": "A",
    "section": "angle",
    "material": "iron",
    "role": "bottom chord",
    "k": {"in plane": 1, "out of plane": 1.0},
    "unbraced out of plane": "2,5 m",
    "net area": 1,
    "shear lag": 1.0,
    "ends": "bolted",
    "connected": "shorter leg",
    "turned": 90,
    "tension only": False,
    "system": "redundant",
    "system reason": "two paths",
    "stitch spacing": "1 ft 3 1/2 in",
}

_SECTIONS: JSON = {
    "angle": {"shape": "angle", "legs": ["80 mm", "60 mm"], "thickness": "5/16 in"},
    "box": {"shape": "rectangular tube", "depth": "0.1 m", "width": "100 mm", "thickness": "5 mm", "formed": "hot"},
    "beam": {
        "shape": "i section",
        "depth": "200 mm",
        "flange width": "100 mm",
        "web thickness": "6 mm",
        "flange thickness": "9 mm",
        "rolled": True,
        "area": "28 cm^2",
        "I horizontal": "1900 cm^4",
        "I vertical": "140 cm^4",
        "r min": "22 mm",
    },
    "plates": {
        "shape": "built up",
        "plates": {
            "web": {"width": "10 mm", "height": "200 mm", "x": "0 mm", "y": "0 mm"},
            "flange": {"width": "150 mm", "height": "12 mm", "x": "0 mm", "y": "106 mm"},
        },
    },
}

_LIVE: list[JSON] = [
    {"name": "walkers", "kind": "crowd", "rule": "en 1991-2", "with": [{"load": "snow", "factor": 1}]},
    {"name": "cart", "kind": "vehicle", "axles": [["0 m", "8 kN"], ["1.8 m", "14 kN"]], "track": "1.2 m", "with": []},
    {"name": "van", "kind": "vehicle", "vehicle": "H5"},
    {"name": "drum", "kind": "concentrated", "force": "2 kip"},
    {"name": "snow", "kind": "uniform", "pressure": "1.5 kPa"},
]

_READING: JSON = {
    "station": 1,
    "plate": "vertical leg",
    "thickness": ["7.0 mm", "7.10 mm"],
    "extent": "0.4 m",
    "cleaned": True,
    "instrument": "gauge",
    "face": "river",
}

_OBSERVATIONS: list[JSON] = [
    {"truss": "near", "bar": "2", "at": "ten past ten", "seen": "hands on", "state": "fair", "note": "größe ✓"},
    {
        "truss": "near",
        "bar": "2",
        "readings": [_READING, {"station": 1.0, "plate": "horizontal leg", "thickness": ["0 mm"]}],
    },
    {"truss": "far", "bar": "1", "estimated loss": 0, "extent": "0.5 m", "station": 10**25},
    {"truss": "far", "bar": "1", "bow": {"offset": "-9 mm", "over": "2 m", "direction": "in plane"}},
    {"truss": "far", "bar": "1", "crack": {"length": "12 mm", "note": "at the weld"}},
    {"truss": "far", "bar": "1", "crack": None, "id": "the crack was paint"},
    {"truss": "far", "bar": "3", "severed": True, "slack": False, "device": "b", "sequence": 7},
    {"truss": "far", "bar": "3", "replaced": {"section": "box", "material": "steel"}, "device": "b", "sequence": 7},
    {"truss": "far", "bar": "3", "look unchanged": True, "photos": [{"file": "a.jpg", "sha256": "0" * 64}]},
    {"truss": "near", "bar": "1", "seen": "not seen", "reason": "water"},
    {"truss": "near", "bar": "1", "retracts": "the crack was paint"},
    {"truss": "near", "bar": "1", "chooses": "the crack was paint"},
    {"truss": "near", "bar": "3", "estimated loss": 0.1},
    {"truss": "near", "bar": "3", "estimated loss": 0.1},
]


def _every_key() -> JSON:
    document = copy.deepcopy(FEWEST)
    document |= {
        "id": "bridge 9",
        "name": "Every key footbridge",
        "reference": "EK-1",
        "locality": "valley",
        "built": 1899,
        "units": "US",
        "notes": "line one\nline two",
        "owner": {
            "name": "Parks",
            "call": [{"who": "duty engineer", "phone": "555 0100"}, {"who": "x"}],
            "act below": 1,
        },
        "half through": {
            "floor beam": {"section": "beam", "material": "steel", "span": "2.8 m"},
            "end spring": "1 kN/m",
        },
        "instruments": {"gauge": {"error": "0.1 mm"}, "eye": {}},
        "overrides": [
            {
                "truss": "near",
                "bar": "2",
                "what": "k",
                "value": {"in plane": 1},
                "was": [1.0, 1, None],
                "who": "c",
                "why": "d",
            }
        ],
        "recommendations": [
            {"id": "r1", "text": "paint", "priority": "soon", "raised": "2026", "told": "d", "done": "", "proof": "p"}
        ],
    }
    document["materials"] = {
        "iron": {**_STEEL, "kind": "wrought iron", "Fy": "26 ksi", "Fu": "48 ksi"},
        "steel": _STEEL,
    }
    document["sections"] |= _SECTIONS
    near = document["trusses"]["near"]
    near["top chord"] = "half through"
    near["bars"][0] = _BAR
    document["trusses"] = {"far": {"same as": "near"}, "near": near}
    document["deck"] |= {"width": "2.4 m", "dead width": "2.6 m", "truss spacing": "1.5 m", "offset": {"far": "50 mm"}}
    document["deck"] |= {"wearing": "0.2 kPa", "edge": {"near": "0.4 kN/m", "far": "30 plf"}, "rests on": "chord"}
    document["rating"] |= {"system": "redundant", "system reason": "three trusses of rods", "connection allowance": 1}
    document["rating"] |= {"unseen": {"loss": 0.2}, "live": _LIVE}
    document["rating"]["imposed"] = [
        {"kind": "settlement", "truss": "near", "joint": "A", "down": "10 mm"},
        {"kind": "temperature", "change": -20, "expansion": 1.2e-05},
        {"kind": "length", "truss": "near", "bar": "2", "short": "3 mm"},
    ]
    call = {"who": "engineer", "when": "11:00", "said": "closed", "left": "barrier"}
    document["visits"] = [
        {
            "date": "2026-05-14",
            "inspector": "a.b.",
            "weather": "rain",
            "device": "a",
            "calls": [call, {}],
            "observations": _OBSERVATIONS,
        },
        {"date": "2024-05-14", "calls": [], "observations": []},
        {"date": "2025-05-14", "id": "of 2025"},
    ]
    return document


EVERY_KEY = _every_key()


def read(document: JSON) -> Site:
    """Return the site that a document stands for."""
    return site.read(json.dumps(document))

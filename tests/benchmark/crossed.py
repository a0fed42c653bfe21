"""Trusses with crossed rods in every panel, as site documents: the subject of a benchmark."""

from __future__ import annotations

from typing import Any

from benchmark.pratt import pratt


def crossed_rods(panels: int, *, push: bool = False) -> dict[str, Any]:
    """A truss with posts at every joint and crossed rods in every panel, 5 panels + 1 bars; nobody has visited.

    Parameters
    ----------
    push : the same bars, but able to push.
    """
    document = pratt(panels)
    del document["visits"]
    document["name"] = f"{panels} panels of crossed rods"
    document["sections"]["rod"] = {"shape": "round bar", "diameter": "60 mm"}
    pairs = [(f"{row}{i}", f"{row}{i + 1}", f"{where} chord") for i in range(panels) for row, where in _CHORDS]
    pairs += [(f"L{i}", f"U{i}", "vertical") for i in range(panels + 1)]
    rods = [pair for i in range(panels) for pair in ((f"L{i}", f"U{i + 1}"), (f"U{i}", f"L{i + 1}"))]
    bars = [_bar(start, end, role, "tube") for start, end, role in pairs]
    bars += [_bar(start, end, "diagonal", "rod") | ({} if push else {"tension only": True}) for start, end in rods]
    truss = document["trusses"]["only"]
    truss["bars"] = bars
    truss["joints"] = {f"L{i}": [f"{3 * i} m", "0 m"] for i in range(panels + 1)}
    truss["joints"] |= {f"U{i}": [f"{3 * i} m", "3 m"] for i in range(panels + 1)}
    return document


_CHORDS = (("L", "bottom"), ("U", "top"))


def _bar(start: str, end: str, role: str, section: str) -> dict[str, Any]:
    return {"id": f"{start}-{end}", "from": start, "to": end, "section": section, "material": "steel", "role": role}

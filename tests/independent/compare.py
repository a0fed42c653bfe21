"""What differs between a rating of the program and the judge's own."""

from __future__ import annotations

import math
from typing import Any

JSON = dict[str, Any]
FIGURES = (
    ("area",),
    ("nominal area",),
    ("resistance", "tension"),
    ("resistance", "compression"),
    ("condition factor",),
    ("system factor",),
)
HUGE = 1e6  # a rating factor on a live force that is rounding alone


def upper(by_level: JSON) -> Any:
    """Return what stands at the upper level, which comes last."""
    return list(by_level.values())[-1]


def close(one: Any, other: Any, rel: float, floor: float = 0.0) -> bool:
    """Tell whether two figures agree, or neither exists."""
    if not isinstance(one, int | float) or not isinstance(other, int | float):
        return (one is None and other is None) or (isinstance(one, str) and one == other)
    return math.isfinite(one) and abs(one - other) <= max(rel * abs(other), floor)


def left_out(result: JSON) -> set[tuple[str, str]]:
    """Return the bars that carry a finding of level `left out`."""
    return {
        (finding["truss"], finding["bar"])
        for finding in result["findings"]
        if finding["level"] == "left out" and finding.get("bar") is not None
    }


def _at(bar: JSON, path: tuple[str, ...]) -> Any:
    value: Any = bar
    for key in path:
        value = None if value is None else value.get(key)
    return value


def _forces(theirs: JSON, ours: JSON, rel: float) -> list[str]:
    floor = 1e-9 * ours["largest force"]
    paths = [("dead", "components"), ("dead", "wearing")]
    paths += [("live", name, end) for name in ours["live"] for end in ("max", "min")]
    return [
        f"{' '.join(path)}: {_at(theirs, path)} against {_at(ours, path)}"
        for path in paths
        if not close(_at(theirs, path), _at(ours, path), rel, floor)
    ]


def rounding(ours: JSON) -> float:
    """Return what 1e-9 of the largest force of the truss may change in a rating factor, through the governing force."""
    _, check, load = ours["candidates"][0] if ours["candidates"] else (None, None, None)
    if load is None:
        return 0.0
    return 2e-9 * ours["largest force"] / abs(ours["live"][load]["min" if check == "flexural buckling" else "max"])


def _factors(theirs: JSON, ours: JSON, rel: float) -> list[str]:
    found = []
    loose = rounding(ours)
    for level, mine in ours["rating factor"].items():
        figure = _at(theirs, ("rating factor", level))
        if mine is None and isinstance(figure, int | float) and figure > HUGE:
            continue  # the program kept a live force that is rounding alone
        if not close(figure, mine, rel + loose, loose):
            found.append(f"rating factor {level}: {figure} against {mine}")
    least = upper(ours["rating factor"])
    if least is None or found:
        return found
    ties = {(check, load) for factor, check, load in ours["candidates"] if factor <= least * (1 + rel) + 1e-12}
    checks, governing = {check for check, _ in ties}, (theirs["check"], theirs["load"])
    if theirs["check"] not in checks or (theirs["check"] != "dead load" and governing not in ties):
        found.append(f"check and load: {governing} against {sorted(ties, key=str)}")
    return found


def _rest(theirs: JSON, ours: JSON, rel: float) -> list[str]:
    found = [
        f"{' '.join(path)}: {_at(theirs, path)} against {_at(ours, path)}"
        for path in FIGURES
        if not close(_at(theirs, path), _at(ours, path), rel)
    ]
    for level, both in ours["lower resistance"].items():
        for direction, mine in zip(("tension", "compression"), both, strict=True):
            figure = _at(theirs, (f"resistance {level}", direction))
            if not close(figure, mine, rel):
                found.append(f"resistance {level} {direction}: {figure} against {mine}")
    figure, mine = theirs["loss allowance"], ours["loss allowance"]
    # where no clause covers how thin plates buckle, the program may count on less than the judge
    sooner = not ours["allowance covered"] and figure is not None and (mine is None or figure < mine)
    if not sooner and not close(figure, mine, rel, 1e-9):
        found.append(f"loss allowance: {figure} against {mine}")
    if not close(theirs["without it"], ours["without it"], rel, 1e-12):
        found.append(f"without it: {theirs['without it']} against {ours['without it']}")
    return found


def _bar(theirs: JSON, ours: JSON, rel: float) -> list[str]:
    if not ours["severed"]:
        return _rest(theirs, ours, rel) + _forces(theirs, ours, rel) + _factors(theirs, ours, rel)
    found = []
    if theirs["area"] != 0 or theirs["check"] != "severed" or upper(theirs["rating factor"]) != 0:
        found.append(f"severed bar has area {theirs['area']}, check {theirs['check']}, {theirs['rating factor']}")
    if not close(theirs["nominal area"], ours["nominal area"], rel):
        found.append(f"nominal area: {theirs['nominal area']} against {ours['nominal area']}")
    return found


def _structure(result: JSON, solution: JSON, rel: float) -> list[str]:
    theirs, found = result["structure"], []
    for level, mine in solution["structure"].items():
        if not close(theirs["rating factor"][level], mine, rel, 1e-12):
            found.append(f"structure, rating factor {level}: {theirs['rating factor'][level]} against {mine}")
    least = upper(solution["structure"])
    if found or least is None:
        return found
    ties = [
        (bar["truss"], bar["bar"])
        for bar in solution["bars"]
        if not bar["severed"]
        and upper(bar["rating factor"]) is not None
        and upper(bar["rating factor"]) <= least * (1 + rel) + 1e-12
    ]
    if ties and (theirs["truss"], theirs["bar"]) not in ties:
        found.append(f"structure, governing bar: {(theirs['truss'], theirs['bar'])} against {ties}")
    return found


def differences(result_document: JSON, solution: JSON, rel: float = 1e-6) -> list[str]:
    """Compare a result document with the judge's solution, bars with a finding `left out` aside.

    Parameters
    ----------
    result_document : in the form of the result file.
    solution : of `independent.rate.solve`.
    rel : relative tolerance of every figure; forces also to 1e-9 of the largest force in their truss.
    """
    found = [
        f"truss {name}, {key}: {result_document['trusses'][name][key]} against {mine}"
        for name, own in solution["trusses"].items()
        for key, mine in own.items()
        if result_document["trusses"][name][key] != mine
    ]
    rows = {(bar["truss"], bar["bar"]): bar for bar in result_document["bars"]}
    skipped = left_out(result_document)
    for ours in solution["bars"]:
        where = (ours["truss"], ours["bar"])
        if where not in rows:
            found.append(f"{where}: no such row")
        elif where not in skipped:
            found += [f"{where}: {what}" for what in _bar(rows[where], ours, rel)]
    return found + _structure(result_document, solution, rel)

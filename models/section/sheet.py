"""The hand check of one section: the formulas of `models.section`, given numbers that remember.

One line a plate for its area, then the centroid, then a line a plate and axis for the inertias.
"""

from __future__ import annotations

from collections.abc import Sequence
from dataclasses import replace
from typing import Any, Final

import numpy as np

from models.calculation import Array, Kind, Number, Sheet, Traced
from models.section.nominal import Built
from models.section.plate import (
    DISC,
    LEVEL,
    RING,
    UPRIGHT,
    Free,
    Plate,
    Rows,
    centroid,
    coefficients,
    plate_area,
    plate_inertia,
)
from models.section.slenderness import Ring, Strip, WrittenPlates, flange_factor
from models.section.values import Properties, Tables, ruled

_NEGLIGIBLE: Final = 1e-9
"""A product of inertia below this part of the inertias is rounding."""


class _Nothing(Traced):
    """A term that is not there: it leaves no trace in a sum, and a product with it is not there either."""

    def __add__(self, other: Any) -> Any:
        return other

    def __radd__(self, other: Any) -> Any:
        return other

    def __mul__(self, other: Any) -> Traced:
        return self

    def __rmul__(self, other: Any) -> Traced:
        return self

    def __truediv__(self, other: Any) -> Traced:
        return self

    def __pow__(self, other: Any) -> Traced:
        return self


_NOTHING: Final = _Nothing(0.0, "number")
_ONE: Final = Traced(1.0, "number")


_AREA: Final = {
    LEVEL: "width times remaining thickness",
    UPRIGHT: "height times remaining thickness",
    RING: "π times mean diameter times remaining thickness",
    DISC: "π/4 times remaining diameter squared",
}


def write_section(built: Built, thickness: Array, sheet: Sheet) -> Properties:
    """Write out how the remaining properties of one section come about.

    Parameters
    ----------
    thickness : (P,) remaining, m; the remaining diameter of a round bar.

    Returns
    -------
    The properties as numbers of the sheet, the same values as `models.section.properties` gives.
    """
    pieces = built.pieces
    rows, sizes = _symbols(pieces, thickness)
    titles = [f"{plate.name}: {_AREA[plate.form]}" for plate in pieces]
    area, total = _written(sheet, "A", "area", plate_area(rows, sizes), titles, "area of the plates")
    x, right = _centroid(sheet, "xc", "across the bridge", (area, rows.x, total))
    y, up = _centroid(sheet, "yc", "upwards", (area, rows.y, total))
    horizontal = plate_inertia(area, rows.fixed_horizontal, rows.share_horizontal, sizes, up)
    vertical = plate_inertia(area, rows.fixed_vertical, rows.share_vertical, sizes, right)
    plain = Properties(
        total,
        x,
        y,
        _inertia(sheet, "Ih", "horizontal", pieces, horizontal),
        _inertia(sheet, "Iv", "vertical", pieces, vertical),
        _NOTHING,
    )
    product = (area * right * up).sum()
    if abs(product.value) > _NEGLIGIBLE * float(plain.inertia_horizontal + plain.inertia_vertical):
        plain = replace(plain, inertia_product=sheet.note("Ihv", product, "inertia", "product of inertia"))
    return _under_tables(plain, built.tables, sheet)


def write_plates(built: Built, thickness: Array) -> WrittenPlates:
    """The free parts of a section in the symbols of `write_section`; nothing is written until one is slender.

    Parameters
    ----------
    thickness : (P,) remaining, m.
    """
    left = [_symbol("t", number, float(one)) for number, one in enumerate(thickness, 1)]
    breadths = [_symbol("b", number, plate.breadth) for number, plate in enumerate(built.pieces, 1)]
    groups: dict[tuple[Free, float, float], list[int]] = {}
    for place, plate in enumerate(built.pieces):
        for free in plate.free:
            groups.setdefault((free, min(free.breadth, plate.breadth), left[place].value), []).append(place)
    strips = []
    for (free, _, _), places in groups.items():
        first, several = places[0], len(built.pieces[places[0]].free) > 1
        web = built.plates.index(free.web) if free.web else None
        strips.append(
            Strip(
                free=breadths[first] if free.breadth == breadths[first].value else free.breadth,
                breadth=breadths[first] if free.breadth >= breadths[first].value else free.breadth,
                thickness=left[first],
                limit=free.limit,
                c1=free.imperfection.c1,
                c2=free.imperfection.c2,
                held=free.imperfection.held,
                count=free.count * len(places),
                kc=None if web is None else flange_factor(breadths[web], left[web]),
                plates=", ".join(built.plates[place] for place in places),
                number=f"{first + 1}{chr(ord('a') + built.pieces[first].free.index(free)) if several else ''}",
            )
        )
    ring = Ring(_symbol("Dm", 1, built.pieces[0].breadth), left[0], "1") if built.pieces[0].form == RING else None
    factor = built.tables.area
    table = None if factor is None or factor == 1.0 else Traced(factor, "symbol", symbol="fA", kind="ratio")
    return WrittenPlates(tuple(strips), ring, table)


def _centroid(sheet: Sheet, symbol: str, way: str, of: tuple[Any, Any, Number]) -> tuple[Number, Any]:
    """The centroid, and the plates' distances from it; a single plate's centroid is its own."""
    area, position, total = of
    if len(position) == 1:
        return position[0], _objects([[_NOTHING]])[0]
    found = sheet.note(symbol, centroid(area, position, total), "size", f"centroid from the section's origin, {way}")
    return found, position - found


def _inertia(sheet: Sheet, symbol: str, axis: str, pieces: Sequence[Plate], values: Any) -> Number:
    titles = [f"{plate.name}, about the section's {axis} axis through the centroid" for plate in pieces]
    return _written(sheet, symbol, "inertia", values, titles, f"inertia about the {axis} axis")[1]


def _written(
    sheet: Sheet, symbol: str, kind: Kind, values: Any, titles: Sequence[str], whole: str
) -> tuple[Any, Number]:
    """A line a plate and one for their sum; a single plate has one line. Returns the plates' numbers and the sum."""
    if len(titles) == 1:
        total = sheet.note(symbol, values[0], kind, titles[0])
        return _objects([[total]])[0], total
    lines = enumerate(zip(values, titles, strict=True), 1)
    named = _objects([[sheet.note(f"{symbol}{number}", value, kind, title) for number, (value, title) in lines]])[0]
    return named, sheet.note(symbol, named.sum(), kind, whole)


def _symbols(pieces: Sequence[Plate], thickness: Array) -> tuple[Rows, Any]:
    """Coefficients and remaining thickness of the plates as named numbers, in arrays of objects (P,)."""
    table = _objects(
        [
            [
                *coefficients(
                    plate.form,
                    _symbol("Dm" if plate.form == RING else "b", number, plate.breadth),
                    _ONE,
                    _NOTHING,
                ),
                _symbol("x", number, plate.x),
                _symbol("y", number, plate.y),
                _symbol("d" if plate.form == DISC else "t", number, float(left)),
            ]
            for number, (plate, left) in enumerate(zip(pieces, thickness, strict=True), 1)
        ]
    ).T
    return Rows(*table[:8]), table[8]


def _symbol(letter: str, number: int, value: float) -> Traced:
    return Traced(value, "symbol", symbol=f"{letter}{number}", kind="size")


def _objects(rows: Sequence[Sequence[Any]]) -> Any:
    table = np.empty((len(rows), len(rows[0])), object)
    for place, row in enumerate(rows):
        table[place] = row
    return table


def _under_tables(plain: Properties, tables: Tables, sheet: Sheet) -> Properties:
    """The properties after the table values; each factor is a line, and each property that it changes."""
    factors = Tables(
        area=_factor(sheet, "fA", tables.area, "area by the table over area of the plates, as built"),
        horizontal=_factor(
            sheet, "fh", tables.horizontal, "inertia about the horizontal axis, by the table over plates"
        ),
        vertical=_factor(sheet, "fv", tables.vertical, "inertia about the vertical axis, by the table over plates"),
        least=_factor(sheet, "fr", tables.least, "area times r min squared over least inertia of the plates, as built"),
    )
    found = ruled(plain, factors)
    return replace(
        found,
        area=_changed(sheet, "A'", found.area, plain.area, "area", "area"),
        inertia_horizontal=_changed(
            sheet,
            "Ih'",
            found.inertia_horizontal,
            plain.inertia_horizontal,
            "inertia",
            "inertia about the horizontal axis",
        ),
        inertia_vertical=_changed(
            sheet, "Iv'", found.inertia_vertical, plain.inertia_vertical, "inertia", "inertia about the vertical axis"
        ),
        inertia_product=_changed(
            sheet, "Ihv'", found.inertia_product, plain.inertia_product, "inertia", "product of inertia"
        ),
    )


def _factor(sheet: Sheet, symbol: str, value: Number, title: str) -> Number | None:
    if np.isnan(value) or value == 1.0:
        return None
    return sheet.given(symbol, value, "ratio", title, "section table")


def _changed(sheet: Sheet, symbol: str, now: Number, before: Number, kind: Kind, title: str) -> Number:
    return now if now is before else sheet.note(symbol, now, kind, f"{title}, the table's value scaled by the loss")

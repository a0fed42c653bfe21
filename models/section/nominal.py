"""A section as built: its plates, their nominal thickness, and its properties under any table values."""

from __future__ import annotations

from dataclasses import dataclass

import numpy as np

from models.bridge import Section
from models.calculation import Array
from models.errors import InputError, Problem
from models.section.plate import Plate, Rows, coefficients
from models.section.registry import faults, shape_of
from models.section.shape import Curves
from models.section.values import Properties, Tables, from_plates, ruled

SAME = 1e-6
"""Places and sizes of plates that differ by less than this, in m, are the same."""


@dataclass(frozen=True, eq=False)
class Built:
    """A section as built, as it lies in the truss.

    Parameters
    ----------
    section, shape : its name, and its shape's name.
    pieces : its plates with their geometry, turned as the bar is.
    plates : (P,) their names. thickness : (P,) nominal, m; the diameter of a round bar.
    nominal : properties with nominal thickness; table values rule where given.
    depth : nominal depth in the plane of the truss, m.
    doubly_symmetric : whether both axes through the centroid are axes of symmetry, so that no twisting
        goes with buckling about them.
    tables : factors of this section's table values (floats).
    curves : buckling curves in the plane of the truss and out of it, EN 1993-1-1, Table 6.2 (from memory).
    """

    section: str
    shape: str
    pieces: tuple[Plate, ...]
    plates: tuple[str, ...]
    thickness: Array
    nominal: Properties
    depth: float
    doubly_symmetric: bool
    tables: Tables
    curves: Curves


def built(section: Section, turned: int = 0) -> Built:
    """Cut a section into plates.

    Parameters
    ----------
    turned : degrees, 0 or 90. Plates keep their names; a table value goes with its axis.

    Raises
    ------
    InputError
        If the shape is not known, or its dimensions do not fit together.
    """
    wrong = faults(section)
    if wrong:
        raise InputError(wrong, f"section `{section.name}`")
    pieces = _lying(section, turned)
    thickness = np.array([plate.thickness for plate in pieces])
    plain = _single(from_plates(rows_of(pieces), thickness))
    tables = _tables(section, turned, plain)
    about_horizontal, about_vertical = shape_of(section).curves(section)
    return Built(
        section=section.name,
        shape=section.shape,
        pieces=pieces,
        plates=tuple(plate.name for plate in pieces),
        thickness=thickness,
        nominal=_single(ruled(plain, tables)),
        depth=_depth(pieces),
        doubly_symmetric=_mirrored(pieces, plain),
        tables=tables,
        curves=(about_vertical, about_horizontal) if turned else (about_horizontal, about_vertical),
    )


def depth_in_plane(section: Section, turned: int = 0) -> float:
    """Nominal depth in the plane of the truss, or diameter, m."""
    return _depth(_lying(section, turned))


def rows_of(pieces: tuple[Plate, ...]) -> Rows:
    """Coefficients of the plates as arrays (P,)."""
    return Rows(
        *np.array([[*coefficients(plate.form, plate.breadth), plate.x, plate.y] for plate in pieces], float).T,
    )


def _lying(section: Section, turned: int) -> tuple[Plate, ...]:
    pieces = shape_of(section).cut(section)
    if turned not in (0, 90):
        raise InputError([Problem("turned", f"a section cannot be turned by {turned}", "0 or 90")])
    return tuple(plate.turned() for plate in pieces) if turned else pieces


def _depth(pieces: tuple[Plate, ...]) -> float:
    return max(plate.y + plate.height / 2 for plate in pieces) - min(plate.y - plate.height / 2 for plate in pieces)


def _single(found: Properties) -> Properties:
    return Properties(
        float(found.area),
        float(found.centroid_x),
        float(found.centroid_y),
        float(found.inertia_horizontal),
        float(found.inertia_vertical),
        float(found.inertia_product),
    )


def _tables(section: Section, turned: int, plain: Properties) -> Tables:
    horizontal, vertical = section.inertia_horizontal, section.inertia_vertical
    if turned:
        horizontal, vertical = vertical, horizontal
    area = section.area.si if section.area else plain.area
    radius = section.least_radius
    return Tables(
        area=area / plain.area,
        horizontal=horizontal.si / plain.inertia_horizontal if horizontal else 1.0,
        vertical=vertical.si / plain.inertia_vertical if vertical else 1.0,
        least=area * radius.si**2 / plain.least_inertia if radius else np.nan,
    )


def _mirrored(pieces: tuple[Plate, ...], plain: Properties) -> bool:
    """Whether every plate has its mirror image about both axes through the centroid."""
    places = np.array(
        [
            [plate.x - plain.centroid_x, plate.y - plain.centroid_y, plate.width, plate.height, plate.thickness]
            for plate in pieces
        ]
    )
    return all(
        bool((np.abs(places[:, None] - places * mirror).max(axis=2) < SAME).any(axis=1).all())
        for mirror in ([-1, 1, 1, 1, 1], [1, -1, 1, 1, 1])
    )

"""The sections of many bars side by side, so that their remaining properties come out in a few array operations."""

from __future__ import annotations

from collections.abc import Sequence
from dataclasses import dataclass, fields
from typing import Any

import numpy as np
from numpy.typing import NDArray

from models.calculation import Array
from models.section.nominal import Built
from models.section.plate import RING, Rows, centroid, coefficients, plate_area
from models.section.values import Properties, Tables, from_plates, ruled


@dataclass(frozen=True, eq=False)
class FreeParts:
    """The parts of plates that may buckle on their own, Q for each section.

    Parameters
    ----------
    reach : (n, Q) free breadth over the coefficient of its limit, m; 0 for padding.
    sizes : (n, Q, 7) free breadth and how much of it belongs to the plate, m; coefficient of the limit; c1, c2;
        1 where it is held along both edges, else 0; count.
    plate : (n, Q) number of each part's plate, or None where all parts are the plates in their order.
    web : (n, Q) number of the web that lowers the limit, or -1; web_breadth : m. None where there is none.
    ring : (n,) mean diameter of round tubes, m, 0 for other sections, or None where there is none.
    """

    reach: Array
    sizes: Array
    plate: NDArray[np.int64] | None
    web: NDArray[np.int64] | None
    web_breadth: Array | None
    ring: Array | None


@dataclass(frozen=True, eq=False)
class Stack:
    """Sections of n bars, or n pieces of bars, padded with plates of no size to P plates each.

    Parameters
    ----------
    rows : coefficients (n, P). thickness : (n, P) nominal, m; 0 for padding.
    tables : factors (n,) of table values, or None where no section has any.
    centroid_x, centroid_y : (n,) as built, m.
    """

    rows: Rows
    thickness: Array
    tables: Tables
    centroid_x: Array
    centroid_y: Array
    free: FreeParts

    @property
    def shape(self) -> tuple[int, int]:
        """(n, P)."""
        count, plates = self.thickness.shape
        return count, plates

    def take(self, indices: NDArray[np.int64]) -> Stack:
        """The same section once for every index."""
        taken: Stack = _taken(self, indices)
        return taken


def stack(builts: Sequence[Built]) -> Stack:
    """Put sections side by side."""
    most = max((len(one.pieces) for one in builts), default=0)
    columns = np.zeros((9, len(builts), most))
    for place, one in enumerate(builts):
        for number, plate in enumerate(one.pieces):
            columns[:, place, number] = (*coefficients(plate.form, plate.breadth), plate.x, plate.y, plate.thickness)
    places = np.array([[one.nominal.centroid_x, one.nominal.centroid_y] for one in builts]).reshape(-1, 2)
    return Stack(
        rows=Rows(*columns[:8]),
        thickness=columns[8],
        tables=_tables(builts),
        centroid_x=places[:, 0],
        centroid_y=places[:, 1],
        free=_free_parts(builts),
    )


def properties(stack: Stack, thickness: Array) -> Properties:
    """Remaining properties of every section of a stack.

    Parameters
    ----------
    thickness : (n, P) remaining thickness, m; a round bar's remaining diameter; 0 where a plate is gone.

    Returns
    -------
    Arrays (n,). Table values are scaled by the ratio that the plates give. All zero where nothing is left.
    """
    return ruled(from_plates(stack.rows, thickness), stack.tables)


def centroid_shift(stack: Stack, thickness: Array) -> Array:
    """Distance (n,) between the centroids as built and remaining, m; 0 where nothing is left."""
    area = plate_area(stack.rows, thickness)
    total = area.sum(axis=1)
    across = centroid(area, stack.rows.x, total) - stack.centroid_x
    up = centroid(area, stack.rows.y, total) - stack.centroid_y
    return np.where(total > 0, np.hypot(across, up), 0.0)


def _free_parts(builts: Sequence[Built]) -> FreeParts:
    parts = [[(number, free) for number, plate in enumerate(one.pieces) for free in plate.free] for one in builts]
    shape = len(builts), max((len(each) for each in parts), default=0)
    sizes, plate, web, breadth = np.zeros((*shape, 7)), np.zeros(shape, int), np.full(shape, -1), np.ones(shape)
    sizes[..., 2] = 1.0
    for place, (one, each) in enumerate(zip(builts, parts, strict=True)):
        for column, (number, free) in enumerate(each):
            own = min(free.breadth, one.pieces[number].breadth)
            sizes[place, column] = free.breadth, own, free.limit, *free.imperfection, free.count
            plate[place, column] = number
            if free.web:
                web[place, column] = one.plates.index(free.web)
                breadth[place, column] = one.pieces[web[place, column]].breadth
    in_order = all(number == column for each in parts for column, (number, _) in enumerate(each))
    lowered = bool((web >= 0).any())
    ring = np.array([one.pieces[0].breadth if one.pieces[0].form == RING else 0.0 for one in builts])
    return FreeParts(
        reach=sizes[..., 0] / sizes[..., 2],
        sizes=sizes,
        plate=None if in_order else plate,
        web=web if lowered else None,
        web_breadth=breadth if lowered else None,
        ring=ring if ring.any() else None,
    )


def _tables(builts: Sequence[Built]) -> Tables:
    """Factors of all sections; None where they change nothing, which saves the work."""
    area, horizontal, vertical, least = (
        np.array(
            [[one.tables.area, one.tables.horizontal, one.tables.vertical, one.tables.least] for one in builts], float
        )
        .reshape(-1, 4)
        .T
    )
    inertias = (horizontal != 1).any() or (vertical != 1).any()
    return Tables(
        area=area if (area != 1).any() else None,
        horizontal=horizontal if inertias else None,
        vertical=vertical if inertias else None,
        least=least if not np.isnan(least).all() else None,
    )


def _taken(group: Any, indices: NDArray[np.int64]) -> Any:
    """The dataclass with every array in it, however deep, indexed."""
    values = (getattr(group, field.name) for field in fields(group))
    return type(group)(
        *(
            value[indices] if isinstance(value, np.ndarray) else None if value is None else _taken(value, indices)
            for value in values
        )
    )

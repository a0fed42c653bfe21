"""Area, centroid and inertias of what is left of a section, and how table values rule over them."""

from __future__ import annotations

from dataclasses import dataclass

import numpy as np

from models.calculation import Array, Number, Traced, greatest, root
from models.section.plate import Rows, centroid, plate_area, plate_inertia


@dataclass(frozen=True, eq=False)
class Properties:
    """Properties of a section; each an array (n,) for many bars, or one number.

    Parameters
    ----------
    area : m^2.
    centroid_x, centroid_y : m, in the section's own axes (x across the bridge, y in the plane of the truss).
    inertia_horizontal : about the horizontal axis through the centroid, m^4; it resists in-plane buckling.
    inertia_vertical : about the vertical axis, m^4. inertia_product : m^4.
    """

    area: Number
    centroid_x: Number
    centroid_y: Number
    inertia_horizontal: Number
    inertia_vertical: Number
    inertia_product: Number

    @property
    def least_inertia(self) -> Number:
        """The lesser principal inertia, m^4."""
        return least_inertia(self.inertia_horizontal, self.inertia_vertical, self.inertia_product)


@dataclass(frozen=True, eq=False)
class Tables:
    """What table values make of the properties that the plates give; None where no section has any.

    Parameters
    ----------
    area, horizontal, vertical : factors on area and inertias, 1 where no table value is given.
    least : factor on the lesser principal inertia, NaN where ``r min`` is not given.
    """

    area: Number | None = None
    horizontal: Number | None = None
    vertical: Number | None = None
    least: Number | None = None


def least_inertia(horizontal: Number, vertical: Number, product: Number) -> Number:
    """The lesser principal inertia, m^4, from the inertias about two axes at right angles and their product."""
    return (horizontal + vertical) / 2 - root(((horizontal - vertical) / 2) ** 2 + product**2)


def from_plates(rows: Rows, thickness: Array) -> Properties:
    """Properties that the plates alone give.

    Parameters
    ----------
    thickness : (n, plates) remaining thickness, m.
    """
    area = plate_area(rows, thickness)
    total = area.sum(axis=-1)
    x, y = centroid(area, rows.x, total), centroid(area, rows.y, total)
    right, up = rows.x - x[..., None], rows.y - y[..., None]
    horizontal = plate_inertia(area, rows.fixed_horizontal, rows.share_horizontal, thickness, up)
    vertical = plate_inertia(area, rows.fixed_vertical, rows.share_vertical, thickness, right)
    return Properties(total, x, y, horizontal.sum(axis=-1), vertical.sum(axis=-1), (area * right * up).sum(axis=-1))


def ruled(plain: Properties, tables: Tables) -> Properties:
    """Properties under table values: losses scale a table value by the ratio that the plates give.

    The product of inertia follows the two inertias, unless ``r min`` is given; then it is the one whose
    lesser principal inertia is the table's, or 0 where even that does not bring it down to the table's.
    """
    horizontal = _times(plain.inertia_horizontal, tables.horizontal)
    vertical = _times(plain.inertia_vertical, tables.vertical)
    product = plain.inertia_product
    for factor in (tables.horizontal, tables.vertical):
        if factor is not None:
            product = product * root(factor)
    if tables.least is not None:
        least = plain.least_inertia * tables.least
        product = _given(tables.least, product_for(least, horizontal, vertical, product), product)
    return Properties(
        _times(plain.area, tables.area), plain.centroid_x, plain.centroid_y, horizontal, vertical, product
    )


def product_for(least: Number, horizontal: Number, vertical: Number, like: Number) -> Number:
    """The product of inertia, m^4, with the sign of ``like``, that makes ``least`` the lesser principal inertia."""
    found = root(greatest(horizontal * vertical - least * (horizontal + vertical - least), 0.0))
    if isinstance(found, Traced):
        return -found if float(like) < 0 else found
    return np.copysign(found, like)


def _times(number: Number, factor: Number | None) -> Number:
    return number if factor is None else number * factor


def _given(table: Number, with_it: Number, without: Number) -> Number:
    if isinstance(with_it, Traced):
        return with_it
    return np.where(np.isnan(table), without, with_it)

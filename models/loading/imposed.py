"""What a site imposes on its trusses beside loads: settlements, changes of temperature, bars made short."""

from __future__ import annotations

from collections.abc import Iterator
from typing import Final

import numpy as np

from models.bridge import Imposed, RatingRules
from models.calculation import Array
from models.statics.geometry import Geometry
from models.statics.imposed import misfit_of_movement

ASSUMED_EXPANSION: Final = 0.000012
"""Of steel and wrought iron, per kelvin (EN 1991-1-5, annex C, from memory)."""


def imposed_on(rules: RatingRules, truss: str) -> Iterator[Imposed]:
    """What concerns one truss, in the order of the site."""
    return (one for one in rules.imposed or () if one.truss in (None, truss))


def misfits(rules: RatingRules, truss: str, geometry: Geometry) -> Array:
    """How much too long each bar becomes for its place under each imposed change.

    Returns
    -------
    (k, m), m, a row for each change that concerns the truss. A joint that is no support cannot settle by itself:
        its row is zero.
    """
    rows = [_misfit(one, geometry) for one in imposed_on(rules, truss)]
    return np.array(rows).reshape(len(rows), len(geometry.bars))


def _misfit(imposed: Imposed, geometry: Geometry) -> Array:
    misfit = np.zeros(len(geometry.bars))
    if imposed.change is not None:
        expansion = ASSUMED_EXPANSION if imposed.expansion is None else imposed.expansion
        return np.asarray(expansion * imposed.change * geometry.lengths)
    if imposed.down is not None and imposed.joint is not None:
        movement = np.zeros(len(geometry.held))
        movement[2 * geometry.joints.index(imposed.joint) + 1] = -imposed.down.si
        return misfit_of_movement(geometry, np.where(geometry.held, movement, 0.0))
    if imposed.short is not None and imposed.bar is not None:
        misfit[geometry.bars.index(imposed.bar)] = -imposed.short.si
    return misfit

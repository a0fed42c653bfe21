"""A bar's section and metal with every default settled, and all bars of a truss as arrays."""

from __future__ import annotations

from collections.abc import Sequence
from dataclasses import dataclass
from typing import Final

import numpy as np
from numpy.typing import NDArray

from models.bridge import Bar, Footbridge
from models.calculation import Array
from models.material import strengths
from models.section import Built, Stack, built, stack

_OPEN_JOINTS: Final = ("bolted", "riveted", "pinned")
"""Ends that take holes out of a bar."""

NET_AREA_WITH_HOLES: Final = 0.75
"""Net over gross area where the site gives none and holes or threads are likely (common practice, no source)."""

SHEAR_LAG_BOLTED: Final = 0.60
"""AISC 360 Table D3.1, case 8, three fasteners in a line: the least that is tabulated."""

SHEAR_LAG_WELDED_ANGLE: Final = 0.80
"""A single angle welded by one leg (common practice, no source)."""


@dataclass(frozen=True, eq=False)
class Fitted:
    """What a bar is made of.

    Parameters
    ----------
    built : section as built, turned as it lies in the truss.
    E, Fy, Fu : Pa. density : kg/m^3.
    net_area, shear_lag : fractions of the gross area that count in fracture.
    assumptions : a sentence for each default that was used.
    """

    built: Built
    E: float
    Fy: float
    Fu: float
    density: float
    net_area: float
    shear_lag: float
    assumptions: tuple[str, ...]


def fit(bridge: Footbridge, bar: Bar, section: str, material: str) -> Fitted:
    """Settle a bar's section and metal.

    Parameters
    ----------
    section, material : names; the bar's own, or those of its replacement.
    """
    metal = bridge.materials[material]
    strength = strengths(metal, bridge.built)
    shape = bridge.sections[section].shape
    net_area, net_said = _net_area(bar, shape)
    shear_lag, lag_said = _shear_lag(bar, shape)
    return Fitted(
        built=built(bridge.sections[section], bar.turned or 0),
        E=metal.E.si,
        Fy=strength.Fy,
        Fu=strength.Fu,
        density=metal.density.si,
        net_area=net_area,
        shear_lag=shear_lag,
        assumptions=(*strength.assumptions, *net_said, *lag_said),
    )


def _net_area(bar: Bar, shape: str) -> tuple[float, tuple[str, ...]]:
    if bar.net_area is not None:
        return bar.net_area, ()
    if bar.ends in _OPEN_JOINTS or shape == "round bar":
        which = "Round bars" if shape == "round bar" else f"Bars with {bar.ends} ends"
        return NET_AREA_WITH_HOLES, (
            (
                f"{which} for which the site gives no net area: net area taken as {NET_AREA_WITH_HOLES:.2f} of the "
                "gross area (common practice, no source)."
            ),
        )
    return 1.0, ()


def _shear_lag(bar: Bar, shape: str) -> tuple[float, tuple[str, ...]]:
    if bar.shear_lag is not None:
        return bar.shear_lag, ()
    one_leg = shape == "angle" and bar.connected != "both legs"
    if bar.ends in _OPEN_JOINTS:
        if shape in ("round bar", "flat bar") or bar.connected == "both legs":
            return 1.0, ()
        return SHEAR_LAG_BOLTED, (
            (
                f"Bars with {bar.ends} ends for which the site gives no shear lag: factor {SHEAR_LAG_BOLTED:.2f} "
                "(AISC 360 Table D3.1, case 8)."
            ),
        )
    if one_leg:
        return SHEAR_LAG_WELDED_ANGLE, (
            (
                "Single angles welded by one leg for which the site gives no shear lag: factor "
                f"{SHEAR_LAG_WELDED_ANGLE:.2f} (common practice, no source)."
            ),
        )
    return 1.0, ()


@dataclass(frozen=True, eq=False)
class Stock:
    """All bars of a truss as arrays, (m,) each, in the order of the truss.

    Parameters
    ----------
    area : as built, m^2.
    whole_bar_exponent : how the area follows an even change of every thickness: 2 for round bars, else 1.
    curves : (2, m) names of buckling curves, in plane and out of plane.
    """

    fitted: tuple[Fitted, ...]
    stack: Stack
    E: Array
    Fy: Array
    Fu: Array
    density: Array
    net_area: Array
    shear_lag: Array
    area: Array
    whole_bar_exponent: Array
    curves: NDArray[np.str_]


def stock(fitted: Sequence[Fitted]) -> Stock:
    """Put the bars of a truss side by side."""
    columns = np.array(
        [[bar.E, bar.Fy, bar.Fu, bar.density, bar.net_area, bar.shear_lag, bar.built.nominal.area] for bar in fitted],
        float,
    )
    exponent = np.array([2.0 if bar.built.shape == "round bar" else 1.0 for bar in fitted])
    E, Fy, Fu, density, net_area, shear_lag, area = columns.T
    stacked = stack([bar.built for bar in fitted])
    curves = np.array([bar.built.curves for bar in fitted]).T
    return Stock(tuple(fitted), stacked, E, Fy, Fu, density, net_area, shear_lag, area, exponent, curves)

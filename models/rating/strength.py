"""What every bar of a truss can carry as it is: each distinct section along each bar, the least counts."""

from __future__ import annotations

from dataclasses import dataclass

import numpy as np
from numpy.typing import NDArray

from models.calculation import Array, NoSheet
from models.condition import READING, BarCondition
from models.rating.fitted import Stock
from models.resistance.protocol import Basis, Member, Resistance
from models.section import Plates, Properties, Stack, plates_of, properties

_TIE = 1e-9
"""Pieces whose resistance differs by less than this part are one; the least known of them counts."""

CHECKS = ("tension yield", "tension fracture", "flexural buckling")


@dataclass(frozen=True, eq=False)
class Pieces:
    """All pieces of even section of all bars of a truss, (n,) each, bar by bar.

    Parameters
    ----------
    owner : number of the bar. first : (m,) number of each bar's first piece.
    stack, thickness : (n, plates) section rows, and remaining thickness, m.
    measured : every plate rests on an undoubted reading.
    raises : the same, on cleaned steel, not older than the state on record.
    """

    owner: NDArray[np.int64]
    first: NDArray[np.int64]
    stack: Stack
    thickness: Array
    measured: NDArray[np.bool_]
    raises: NDArray[np.bool_]


def pieces_of(stock: Stock, conditions: tuple[BarCondition, ...]) -> Pieces:
    """The pieces that decide resistance."""
    counts = np.array([len(now.strength.thickness) for now in conditions])
    first = np.concatenate([[0], np.cumsum(counts)[:-1]])
    owner = np.repeat(np.arange(len(conditions)), counts)
    stack = stock.stack.take(owner)
    thickness = padded([now.strength.thickness for now in conditions], stack.shape[1])
    measured, raises = np.zeros((2, len(owner)), bool)
    for start, now in zip(first.tolist(), conditions, strict=True):
        if now.has_reading:
            profile = now.strength
            rows, by_reading = len(profile.thickness), profile.rests_on == READING
            measured[start : start + rows] = by_reading.all(axis=1)
            fresh = by_reading & profile.cleaned & (profile.visit >= now.state_visit)
            raises[start : start + rows] = fresh.all(axis=1)
    return Pieces(owner, first, stack, thickness, measured, raises)


def padded(thicknesses: list[Array], plates: int) -> Array:
    """Plates of many bars under each other, (n, plates), with plates of no thickness where a bar has fewer."""
    if all(thickness.shape[1] == plates for thickness in thicknesses):
        return np.concatenate(thicknesses)
    return np.concatenate([np.pad(one, ((0, 0), (0, plates - one.shape[1]))) for one in thicknesses])


def member_of(
    stock: Stock, owner: NDArray[np.int64], found: Properties, effective_lengths: Array, plates: Plates
) -> Member:
    """Everything that decides the resistance of each piece."""
    return Member(
        E=stock.E[owner],
        Fy=stock.Fy[owner],
        Fu=stock.Fu[owner],
        area=found.area,
        inertia_horizontal=found.inertia_horizontal,
        inertia_vertical=found.inertia_vertical,
        inertia_product=found.inertia_product,
        effective_length_in_plane=effective_lengths[0][owner],
        effective_length_out_of_plane=effective_lengths[1][owner],
        net_area=stock.net_area[owner],
        shear_lag=stock.shear_lag[owner],
        curves=stock.curves[:, owner],
        plates=plates,
    )


@dataclass(frozen=True, eq=False)
class Strength:
    """What each bar of a truss can carry.

    Parameters
    ----------
    resistance : (levels, 2, m) factored, in tension and in compression, N.
    check : (2, m) number in `CHECKS` of what limits it at the upper level.
    piece : (2, m) number of the piece that limits it. least : (m,) piece of least area.
    area : (m,) least remaining, m^2.
    member : numbers (n,) of the pieces. upper : what each of them resists at the upper level.
    own_levels : numbers of the levels below the upper one that have resistances of their own.
    """

    pieces: Pieces
    member: Member
    upper: Resistance
    own_levels: tuple[int, ...]
    resistance: Array
    check: NDArray[np.int64]
    piece: NDArray[np.int64]
    least: NDArray[np.int64]
    area: Array


def strength_of(basis: Basis, stock: Stock, conditions: tuple[BarCondition, ...], effective_lengths: Array) -> Strength:
    """Evaluate every section along every bar, and keep the least of each bar."""
    pieces = pieces_of(stock, conditions)
    section = properties(pieces.stack, pieces.thickness)
    plates = plates_of(pieces.stack, pieces.thickness)
    member = member_of(stock, pieces.owner, section, effective_lengths, plates)
    found = basis.resistances(member, NoSheet())
    tension = np.array([np.minimum(level.tension_yield, level.tension_fracture) for level in found])
    compression = np.array([level.flexural_buckling for level in found])
    by_piece = np.stack([tension, compression], axis=1)
    governing = np.array([_least_piece(by_piece[-1, direction], pieces) for direction in (0, 1)])
    resistance = np.stack([by_piece[:, direction, governing[direction]] for direction in (0, 1)], axis=1)
    upper = found[-1]
    fractures = (upper.tension_fracture < upper.tension_yield)[governing[0]].astype(int)
    return Strength(
        pieces=pieces,
        member=member,
        upper=upper,
        own_levels=tuple(number for number, level in enumerate(found) if level is not upper),
        resistance=resistance,
        check=np.array([fractures, np.full_like(fractures, 2)]),
        piece=governing,
        least=(least := _least_piece(section.area, pieces)),
        area=section.area[least],
    )


def _least_piece(value: Array, pieces: Pieces) -> NDArray[np.int64]:
    """(m,) number of the piece of each bar with the least value; among equals one that is less known."""
    if len(pieces.owner) == len(pieces.first):
        return pieces.first
    weighed = value * (1 + _TIE * (pieces.measured + 1.0 * pieces.raises))
    order = np.lexsort((weighed, pieces.owner))
    return order[pieces.first]

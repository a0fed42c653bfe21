"""The parts of plates that may buckle on their own, with what is left of their thickness.

Their limits stand beside the shapes; they are the ones between nonslender and slender elements in axial
compression of AISC 360 Table B4.1a, which AASHTO LRFD 6.9.4.2.1 shares (from memory). What a slender part
still carries is `models.resistance.effective`'s to say.
"""

from __future__ import annotations

from dataclasses import dataclass
from typing import Any, Final

import numpy as np
from numpy.typing import NDArray

from models.calculation import Array, Number, Traced, greatest, least, root
from models.section.stacked import FreeParts, Stack

LEAST_KC: Final = 0.35
GREATEST_KC: Final = 0.76
"""Bounds of kc: AISC 360 Table B4.1a, note a (from memory); AASHTO LRFD 6.9.4.2.1 (from memory)."""


@dataclass(frozen=True, eq=False)
class Strip:
    """A free part of a plate, or many side by side: numbers of a hand check, or arrays (k,).

    Parameters
    ----------
    free : breadth over which it is free, m. breadth : how much of that belongs to the plate, m: a corner that two
        plates share counts in one of them.
    thickness : remaining, m.
    limit : the greatest slenderness at which it reaches yield is limit * sqrt(kc E/Fy).
    kc : lowers the limit of flanges welded to a web; None for 1.
    c1, c2 : imperfections. held : whether along both edges. count : how many alike there are.
    plates, number : what a hand check calls it, and what follows the letter of its symbols.
    """

    free: Number
    breadth: Number
    thickness: Number
    limit: Number
    c1: Number
    c2: Number
    held: Number
    count: Number
    kc: Number | None = None
    plates: str = ""
    number: str = ""


@dataclass(frozen=True, eq=False)
class Ring:
    """The wall of a round tube: mean diameter and remaining thickness, m; numbers of a hand check, or arrays (n,).

    The diameter is 0 for any other section of an array.
    """

    diameter: Number
    thickness: Number
    number: str = ""


@dataclass(frozen=True, eq=False)
class Plates:
    """The free parts of n sections, Q each, padded with parts of no breadth.

    Parameters
    ----------
    parts : sizes. thickness : (n, Q) of each part's plate, remaining, m.
    kc : (n, Q), or None where nothing lowers a limit.
    ring : None where no section is a round tube.
    table : (n,) area by the table over area of the plates, or None where no section has a table.
    """

    parts: FreeParts
    thickness: Array
    kc: Array | None
    ring: Ring | None
    table: Array | None

    def slender(self, E: Array | float, stress: Array | float) -> NDArray[np.bool_]:
        """Which parts (n, Q) buckle on their own before the column bears this stress.

        Parameters
        ----------
        E, stress : (n,) or one value, Pa. With the yield strength as stress: which are slender by the table.

        A part that is gone is not slender.
        """
        ratio = np.sqrt(np.asarray(E, float) / np.asarray(stress, float))
        reach = self.thickness * (ratio[:, None] if ratio.ndim else ratio)
        if self.kc is not None:
            reach = reach * np.sqrt(self.kc)
        # free/t > limit sqrt(kc E/Fy) sqrt(Fy/stress), multiplied out so that most trusses need nothing more
        found: NDArray[np.bool_] = self.parts.reach > reach
        return found & (self.thickness > 0) if found.any() else found

    def strip(self, where: tuple[NDArray[np.int64], ...]) -> Strip:
        """The parts at some places, side by side."""
        free, breadth, limit, c1, c2, held, count = self.parts.sizes[where].T
        kc = None if self.kc is None else self.kc[where]
        return Strip(free, breadth, self.thickness[where], limit, c1, c2, held > 0, count, kc)


@dataclass(frozen=True, eq=False)
class WrittenPlates:
    """The free parts of one section, as numbers of a hand check; alike ones as one, a round tube by its wall."""

    strips: tuple[Strip, ...]
    ring: Ring | None
    table: Traced | None


def plates_of(stack: Stack, thickness: Array) -> Plates:
    """The free parts of every section of a stack.

    Parameters
    ----------
    thickness : (n, P) remaining, m; 0 where a plate is gone.
    """
    parts = stack.free
    left = thickness if parts.plate is None else np.take_along_axis(thickness, parts.plate, axis=1)
    return Plates(
        parts=parts,
        thickness=left[:, : parts.reach.shape[1]],
        kc=_kc_of(parts, thickness),
        ring=None if parts.ring is None else Ring(parts.ring, thickness[:, 0]),
        table=stack.tables.area,
    )


def flange_factor(web_breadth: Number, web_thickness: Number) -> Number:
    """The factor kc = 4/sqrt(h/tw) of flanges that are welded to a web (AISC 360 Table B4.1a, note a)."""
    return least(greatest(4 * root(web_thickness / web_breadth), LEAST_KC), GREATEST_KC)


def _kc_of(parts: FreeParts, thickness: Array) -> Any:
    if parts.web is None:
        return None
    web = np.take_along_axis(thickness, np.maximum(parts.web, 0), axis=1)
    return np.where(parts.web >= 0, flange_factor(parts.web_breadth, web), 1.0)

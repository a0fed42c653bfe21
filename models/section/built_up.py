"""Sections built up of rectangles that the site names itself."""

from __future__ import annotations

from collections import Counter
from collections.abc import Iterator
from itertools import accumulate, combinations
from typing import Final

from models.bridge import Rectangle, Section
from models.errors import Problem
from models.section.plate import HELD, OUTSTAND, Free, Imperfection, Plate, level, upright
from models.section.shape import Key, Shape, curve, rectangles

OUTSTAND_LIMIT: Final = 0.45
"""A part of a plate held along one edge: AISC 360 Table B4.1a case 3, all other unstiffened elements; AASHTO LRFD
6.9.4.2.1 (from memory)."""
HELD_LIMIT: Final = 1.49
"""A part of a plate held along both edges: the same table, case 8, all other stiffened elements."""

_TOUCH: Final = 1e-4
"""Plates closer than this, in m, touch; deeper in each other than this, they overlap. Rounded drawing sizes differ
by less."""


def _cut(section: Section) -> tuple[Plate, ...]:
    given = rectangles(section, "plates")
    return tuple(
        _plate(name, rectangle, [other for key, other in given.items() if key != name])
        for name, rectangle in given.items()
    )


def _plate(name: str, own: Rectangle, others: list[Rectangle]) -> Plate:
    width, height, x, y = own.width.si, own.height.si, own.x.si, own.y.si
    if width > height:
        return level(name, width, height, x, y, *_free(own, others, across=0))
    return upright(name, height, width, x, y, *_free(own, others, across=1))


def _free(own: Rectangle, others: list[Rectangle], across: int) -> tuple[Free, ...]:
    """From where the other plates touch this one along its breadth; none where nothing holds it."""
    start, end = _extent(own)[across]
    touching = [_extent(other)[across] for other in others if _gap(own, other) <= _TOUCH]
    if not touching:
        return ()
    held = sorted((max(low, start), min(high, end)) for low, high in touching)
    reached = list(accumulate((high for _, high in held), max))
    inner = [following[0] - so_far for so_far, following in zip(reached[:-1], held[1:], strict=True)]
    outer = [held[0][0] - start, end - reached[-1]]
    return (*_alike(outer, OUTSTAND_LIMIT, OUTSTAND), *_alike(inner, HELD_LIMIT, HELD))


def _alike(breadths: list[float], limit: float, imperfection: Imperfection) -> Iterator[Free]:
    """Parts of the same breadth as one; places that touch leave none."""
    counts = Counter(round(breadth, 9) for breadth in breadths if breadth > _TOUCH)
    for breadth, count in counts.items():
        yield Free(breadth, limit, imperfection, count)


def _extent(rectangle: Rectangle) -> tuple[tuple[float, float], tuple[float, float]]:
    width, height, x, y = rectangle.width.si, rectangle.height.si, rectangle.x.si, rectangle.y.si
    return (x - width / 2, x + width / 2), (y - height / 2, y + height / 2)


def _gap(one: Rectangle, other: Rectangle) -> float:
    """Clear distance, the larger of the two directions; negative where the rectangles overlap."""
    return max(
        max(low, other_low) - min(high, other_high)
        for (low, high), (other_low, other_high) in zip(_extent(one), _extent(other), strict=True)
    )


def _overlaps(section: Section) -> Iterator[Problem]:
    """Metal drawn twice would be counted twice."""
    for (name, one), (other_name, other) in combinations(rectangles(section, "plates").items(), 2):
        depth = -_gap(one, other)
        if depth > _TOUCH:
            yield Problem(
                f"plates/{other_name}",
                f"plates `{name}` and `{other_name}` overlap by {1000 * depth:.3g} mm; their metal would count twice",
                "rectangles that touch at most",
            )


BUILT_UP: Final = Shape(
    "built up",
    (
        Key(
            "plates",
            "plates",
            "rectangles by their size and the place of their centres; the smaller side is the thickness",
        ),
    ),
    (),
    _cut,
    curve("c"),
    _overlaps,
)

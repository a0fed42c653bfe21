"""Sections for tests, and an independent way to their properties: Green's theorem on outlines."""

from __future__ import annotations

from collections.abc import Iterable, Sequence
from typing import Any

from hypothesis import strategies as st

from models.bridge import Rectangle, Section
from models.quantity import Quantity, parse

MM = 1e-3


def mm(value: float) -> Quantity:
    """A length in millimetres."""
    return Quantity(f"{value} mm", value * MM)


def section(shape: str, *, rolled: bool | None = None, formed: str | None = None, **sizes: Any) -> Section:
    """A section with sizes in mm; underscores stand for blanks in keys, pairs and plates are told by their form."""
    dimensions = {key.replace("_", " "): _size(value) for key, value in sizes.items()}
    return Section(name="s", shape=shape, dimensions=dimensions, rolled=rolled, formed=formed)


def _size(value: Any) -> Any:
    if isinstance(value, tuple):
        return tuple(mm(part) for part in value)
    if isinstance(value, dict):
        return {name: Rectangle(*(mm(number) for number in numbers)) for name, numbers in value.items()}
    return mm(value)


def texts(shape: str, **sizes: Any) -> Section:
    """A section with sizes as texts with a unit."""

    def read(value: Any) -> Any:
        return tuple(parse(part, "length") for part in value) if isinstance(value, tuple) else parse(value, "length")

    return Section(
        name="s", shape=shape, dimensions={key.replace("_", " "): read(value) for key, value in sizes.items()}
    )


ANGLE = section("angle", legs=(120, 80), thickness=10)
DOUBLE_ANGLE = section("double angle", legs=(120, 80), thickness=10, gap=8)
CHANNEL = section("channel", depth=160, flange_width=65, web_thickness=7.5, flange_thickness=10.5)
I_SECTION = section("i section", depth=200, flange_width=100, web_thickness=6, flange_thickness=9)
TEE = section("tee", depth=120, flange_width=100, web_thickness=8, flange_thickness=12)
BOX = section("rectangular tube", depth=120, width=80, thickness=5)
PIPE = section("round tube", diameter=114.3, thickness=5)
ROD = section("round bar", diameter=25)
FLAT = section("flat bar", width=100, thickness=12)
BUILT_UP = section(
    "built up",
    plates={"cover": (200, 10, 0, 105), "left": (8, 200, -80, 0), "right": (8, 200, 80, 0), "lip": (52, 12, -50, -94)},
)
ALL = (ANGLE, DOUBLE_ANGLE, CHANNEL, I_SECTION, TEE, BOX, PIPE, ROD, FLAT, BUILT_UP)

Outline = Sequence[tuple[float, float]]


def rectangle(left: float, bottom: float, right: float, top: float) -> Outline:
    """The outline of a rectangle, counterclockwise."""
    return ((left, bottom), (right, bottom), (right, top), (left, top))


def outlined(outlines: Iterable[Outline]) -> tuple[float, float, float, float, float, float]:
    """Area, centroid (x, y), inertias about its horizontal and vertical axis and their product, by Green's theorem.

    A clockwise outline is a hole. Any unit; here mm.
    """
    area = sx = sy = xx = yy = xy = 0.0
    for outline in outlines:
        for (x0, y0), (x1, y1) in zip(outline, [*outline[1:], outline[0]], strict=True):
            cross = x0 * y1 - x1 * y0
            area += cross / 2
            sx += (x0 + x1) * cross / 6
            sy += (y0 + y1) * cross / 6
            xx += (x0 * x0 + x0 * x1 + x1 * x1) * cross / 12
            yy += (y0 * y0 + y0 * y1 + y1 * y1) * cross / 12
            xy += (x0 * y1 + 2 * x0 * y0 + 2 * x1 * y1 + x1 * y0) * cross / 24
    cx, cy = sx / area, sy / area
    return area, cx, cy, yy - area * cy * cy, xx - area * cx * cx, xy - area * cx * cy


def sections() -> st.SearchStrategy[Section]:
    """Sections of every shape whose dimensions fit together."""
    size = st.floats(60, 300)
    thin = st.floats(3, 25)
    pair = st.tuples(size, size)
    two_flanges = {"depth": size, "flange_width": size, "web_thickness": thin, "flange_thickness": thin}

    def of(shape: str, **sizes: st.SearchStrategy[Any]) -> st.SearchStrategy[Section]:
        return st.fixed_dictionaries(sizes).map(lambda given: section(shape, **given))

    return st.one_of(
        of("angle", legs=pair, thickness=thin),
        of("double angle", legs=pair, thickness=thin, gap=st.floats(0, 20)),
        of("channel", **two_flanges),
        of("i section", **two_flanges),
        of("tee", **two_flanges),
        of("rectangular tube", depth=size, width=size, thickness=thin),
        of("round tube", diameter=size, thickness=thin),
        of("round bar", diameter=st.floats(10, 60)),
        of("flat bar", width=size, thickness=thin),
        st.just(BUILT_UP),
    )

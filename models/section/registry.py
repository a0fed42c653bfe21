"""The shapes that a section can have. A new shape is one more row here and the file that cuts it into plates."""

from __future__ import annotations

from collections.abc import Iterator, Mapping
from types import MappingProxyType
from typing import Final

from models.bridge import Rectangle, Section
from models.errors import InputError, Problem
from models.quantity import Quantity
from models.section.angles import ANGLE, DOUBLE_ANGLE
from models.section.built_up import BUILT_UP
from models.section.flanged import CHANNEL, I_SECTION, TEE
from models.section.shape import Key, Shape, missing
from models.section.solids import FLAT_BAR, ROUND_BAR
from models.section.tubes import RECTANGULAR_TUBE, ROUND_TUBE

SHAPES: Final[Mapping[str, Shape]] = MappingProxyType(
    {
        shape.name: shape
        for shape in (
            ANGLE,
            DOUBLE_ANGLE,
            CHANNEL,
            I_SECTION,
            TEE,
            RECTANGULAR_TUBE,
            ROUND_TUBE,
            ROUND_BAR,
            FLAT_BAR,
            BUILT_UP,
        )
    }
)


def shape_of(section: Section) -> Shape:
    """The registry's row for a section.

    Raises
    ------
    InputError
        If there is no such shape.
    """
    shape = SHAPES.get(section.shape)
    if shape is None:
        raise InputError([Problem("shape", f"`{section.shape}` is not a shape", "one of " + ", ".join(SHAPES))])
    return shape


def plate_names(section: Section) -> tuple[str, ...]:
    """Names of the plates on which readings can be taken, in the order of all arrays of plates."""
    return tuple(plate.name for plate in shape_of(section).cut(section))


def faults(section: Section) -> tuple[Problem, ...]:
    """All that is wrong with a section's dimensions; paths are relative to the section."""
    shape = SHAPES.get(section.shape)
    if shape is None:
        return (Problem("shape", f"`{section.shape}` is not a shape", "one of " + ", ".join(SHAPES)),)
    found = [problem for key in shape.keys for problem in _key_faults(section, key)]
    if not found and shape.too_thick:
        found = list(shape.too_thick(section))
    return (*found, *_table_faults(section))


def _key_faults(section: Section, key: Key) -> Iterator[Problem]:
    value = section.dimensions.get(key.name)
    if key.form == "length" and isinstance(value, Quantity):
        yield from _size_fault(key.name, value, key.may_be_zero)
    elif key.form == "pair of lengths" and isinstance(value, tuple) and len(value) == 2:
        for place, part in enumerate(value):
            yield from _size_fault(f"{key.name}/{place}", part, key.may_be_zero)
    elif key.form == "plates" and isinstance(value, Mapping) and value:
        for name, plate in value.items():
            yield from _plate_faults(f"{key.name}/{name}", plate)
    else:
        yield missing(section, key.name, f"a {key.form}" if key.form != "plates" else "plates by name")


def _plate_faults(path: str, plate: Rectangle) -> Iterator[Problem]:
    yield from _size_fault(f"{path}/width", plate.width)
    yield from _size_fault(f"{path}/height", plate.height)


def _table_faults(section: Section) -> Iterator[Problem]:
    tables = {
        "area": section.area,
        "I horizontal": section.inertia_horizontal,
        "I vertical": section.inertia_vertical,
        "r min": section.least_radius,
    }
    for key, value in tables.items():
        if value is not None:
            yield from _size_fault(key, value)


def _size_fault(path: str, size: Quantity, may_be_zero: bool = False) -> Iterator[Problem]:
    if size.si < 0 or (size.si == 0 and not may_be_zero):
        yield Problem(path, f"`{size.text}` cannot be a size", "zero or more" if may_be_zero else "more than zero")

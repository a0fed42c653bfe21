"""What a shape is: its keys, its options, and how it is cut into plates."""

from __future__ import annotations

from collections.abc import Callable, Iterator, Mapping
from dataclasses import dataclass
from typing import Literal

from models.bridge import Rectangle, Section
from models.errors import InputError, Problem
from models.quantity import Quantity
from models.section.plate import Plate

KeyForm = Literal["length", "pair of lengths", "plates"]
Curves = tuple[str, str]
"""Names of the buckling curves of EN 1993-1-1 about the section's horizontal and its vertical axis."""


@dataclass(frozen=True, slots=True)
class Key:
    """A dimension that a shape needs; every key of a shape is required.

    Parameters
    ----------
    name : as in a site file.
    form : ``length``, ``pair of lengths``, or ``plates`` (rectangles by name: width, height, x, y, all lengths).
    about : what it measures, for a form or a schema.
    may_be_zero : whether zero has a meaning; a dimension is positive otherwise.
    """

    name: str
    form: KeyForm
    about: str
    may_be_zero: bool = False


@dataclass(frozen=True, slots=True)
class Option:
    """A key that a shape may have. Without ``choices`` it is true or false.

    ``default`` holds where the site says nothing.
    """

    name: str
    choices: tuple[str, ...]
    default: str | bool
    about: str


@dataclass(frozen=True, slots=True)
class Shape:
    """One row of the registry of shapes.

    Parameters
    ----------
    plates : names in order; empty where the section itself names them.
    cut : a section as built -> its plates.
    curves : a section as built -> its buckling curves, EN 1993-1-1, Table 6.2 (from memory).
    too_thick : a section with positive dimensions -> what does not fit, paths relative to the section;
        None where any positive dimensions fit.
    """

    name: str
    keys: tuple[Key, ...]
    plates: tuple[str, ...]
    cut: Callable[[Section], tuple[Plate, ...]]
    curves: Callable[[Section], Curves]
    too_thick: Callable[[Section], Iterator[Problem]] | None = None
    options: tuple[Option, ...] = ()


def curve(name: str) -> Callable[[Section], Curves]:
    """The same buckling curve about both axes, for every section of a shape."""
    return lambda _: (name, name)


def length(section: Section, key: str) -> float:
    """A dimension of a section, m."""
    return quantity(section, key).si


def quantity(section: Section, key: str) -> Quantity:
    """A dimension of a section with its text.

    Raises
    ------
    InputError
        If it is missing or is not a single length.
    """
    value = section.dimensions.get(key)
    if not isinstance(value, Quantity):
        raise InputError([missing(section, key, "a length")])
    return value


def pair(section: Section, key: str) -> tuple[Quantity, Quantity]:
    """A pair of dimensions of a section.

    Raises
    ------
    InputError
        If it is missing or is not a pair of lengths.
    """
    value = section.dimensions.get(key)
    if not isinstance(value, tuple) or len(value) != 2:
        raise InputError([missing(section, key, "a pair of lengths")])
    return value[0], value[1]


def rectangles(section: Section, key: str) -> Mapping[str, Rectangle]:
    """The plates that a section names itself.

    Raises
    ------
    InputError
        If there are none.
    """
    value = section.dimensions.get(key)
    if not isinstance(value, Mapping) or not value:
        raise InputError([missing(section, key, "plates by name")])
    return value


def missing(section: Section, key: str, expected: str) -> Problem:
    """A dimension that the section should have."""
    return Problem(key, f"section `{section.name}` ({section.shape}) has no usable `{key}`", expected)

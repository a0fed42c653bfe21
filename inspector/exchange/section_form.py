"""How sections and materials stand in a site file. A shape's keys come from its row in `models.section.registry`."""

from __future__ import annotations

from typing import Any, Final

from inspector.exchange.container import Named, two_of
from inspector.exchange.form import Boolean, Choice, Dimensioned, Form
from inspector.exchange.record import Key, Need, Record, Tagged
from models.bridge import Material, Rectangle, Section
from models.material import KINDS
from models.section.registry import SHAPES
from models.section.shape import Key as Dimension
from models.section.shape import Option, Shape

PLATES: Final[Form[Any]] = Named(
    Record(
        (
            Key("width", Dimensioned("length", "positive"), required=True, about="across the bridge"),
            Key("height", Dimensioned("length", "positive"), required=True, about="in the plane of the truss"),
            Key("x", Dimensioned("length"), required=True, about="of the centre, across the bridge"),
            Key("y", Dimensioned("length"), required=True, about="of the centre, in the plane of the truss"),
        ),
        Rectangle,
    ),
    least=1,
)

_TABLE: Final = (
    Key("area", Dimensioned("area", "positive"), about="table value; rules for the section as built"),
    Key("I horizontal", Dimensioned("inertia", "positive"), "inertia_horizontal", about="table value"),
    Key("I vertical", Dimensioned("inertia", "positive"), "inertia_vertical", about="table value"),
    Key("r min", Dimensioned("length", "positive"), "least_radius", about="table value"),
)


def _dimension_form(dimension: Dimension) -> Form[Any]:
    size = Dimensioned("length", "not negative" if dimension.may_be_zero else "positive")
    forms: dict[str, Form[Any]] = {"length": size, "pair of lengths": two_of(size), "plates": PLATES}
    return forms[dimension.form]


def _option_form(option: Option) -> Form[Any]:
    return Choice(option.choices) if option.choices else Boolean()


def _section_form(shape: Shape) -> Record[Section]:
    dimensions = [Key(key.name, _dimension_form(key), key.name, required=True, about=key.about) for key in shape.keys]
    options = [Key(option.name, _option_form(option), about=option.about) for option in shape.options]
    names = {key.name for key in shape.keys}

    def make(**fields: Any) -> Section:
        sizes = {name: fields.pop(name) for name in list(fields) if name in names}
        return Section(name="", dimensions=sizes, **fields)

    def take(section: Section, field: str) -> Any:
        return section.dimensions[field] if field in names else getattr(section, field)

    keys = (Key("shape", Choice((shape.name,)), required=True), *dimensions, *options, *_TABLE)
    return Record(keys, make, take)


SECTION: Final[Form[Section]] = Tagged(
    "shape", {name: _section_form(shape) for name, shape in SHAPES.items()}, lambda section: section.shape
)

MATERIAL: Final[Form[Material]] = Record(
    (
        Key("kind", Choice(KINDS), required=True),
        Key("E", Dimensioned("stress", "positive"), required=True, about="modulus of elasticity"),
        Key("Fy", Dimensioned("stress", "positive"), about="yield strength; absent: by the year built, assumed"),
        Key("Fu", Dimensioned("stress", "positive"), about="tensile strength; absent: by the year built, assumed"),
        Key("density", Dimensioned("density", "positive"), required=True),
    ),
    lambda **fields: Material(name="", **fields),
    needs=(Need("kind", "stainless steel", ("Fy", "Fu")),),
)

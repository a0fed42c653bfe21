"""Loads, reactions, the model and the steel: what the forces rest on."""

from __future__ import annotations

from collections.abc import Iterator, Mapping

from reportlab.platypus import Flowable

from inspector.report.bars import number
from inspector.report.result_page import with_article
from inspector.report.style import BODY, NOTE, heading, part, table, text
from models.bridge import Bar, Footbridge, Rectangle, Section, SectionDimension, Truss
from models.quantity import Quantity
from models.rating.result import Rating, TrussRating
from models.words import Figures, significant


def loads(rating: Rating, bridge: Footbridge, figures: Figures, width: float) -> list[Flowable]:
    """Loads and factors with their sources, dead load totals and reactions."""
    story = part("Loads and factors")
    rows = [(line.what, line.value, line.source) for line in rating.loads]
    story.append(table(("what", "value", "source"), rows, (4, 4, 6), width))
    for name, truss in rating.trusses.items():
        story += heading(f"Truss {name}: dead load and reactions")
        story += _reactions(truss, figures, width)
        story += _service(truss, figures)
    if len({name for bar in rating.bars for name in bar.live or {}}) > 1:
        story += _live(rating, figures, width)
    if any(bar.imposed is not None for bar in rating.bars):
        story += _imposed(rating, figures, width)
    return story


def _reactions(truss: TrussRating, figures: Figures, width: float) -> list[Flowable]:
    unit = figures.unit("force")
    components, wearing = truss.dead_total
    story: list[Flowable] = [
        text(
            f"Dead load on the truss: components {figures.text(components, 'force', 4)}, wearing "
            f"{figures.text(wearing, 'force', 4)}, together {figures.text(components + wearing, 'force', 4)}.",
            BODY,
        )
    ]
    if not truss.reactions:
        return [*story, text("No reactions: the truss is a mechanism as it stands, or nearly one.", BODY)]
    rows = [
        (one.joint, figures.number(one.dead, "force", 4), figures.number(one.least, "force", 4), one.load or "none")
        for one in truss.reactions
    ]
    head = ("joint", f"dead reaction {unit}, upward", f"least factored reaction {unit}", "load of the least")
    story.append(table(head, rows, (3, 3, 3, 3), width, "lrr"))
    total = sum(one.dead for one in truss.reactions)
    apart = _difference(total - components - wearing, components + wearing, figures)
    story.append(
        text(
            f"Sum of the dead reactions {figures.text(total, 'force', 4)}; difference from the dead load {apart}.", BODY
        )
    )
    return story


def _service(truss: TrussRating, figures: Figures) -> list[Flowable]:
    """Deflection and frequency, where there are any."""
    said = []
    if truss.deflection is not None:
        joint, size, limit, load = truss.deflection
        sizes = f"{figures.text(size, 'size')} (limit {figures.text(limit, 'size')})"
        said.append(f"Deflection under {load}, nearest to its limit at {joint}: {sizes}.")
    if truss.frequency is not None:
        said.append(f"Lowest vertical frequency with the mass of the dead load: {significant(truss.frequency)} Hz.")
    advice = "Both are advisory (AASHTO pedestrian guide 2009, 5 and 6, from memory) and enter no rating factor."
    return [text(" ".join([*said, advice]), BODY)] if said else []


def _difference(value: float, whole: float, figures: Figures) -> str:
    """Rounding of the arithmetic is not shown as a difference."""
    return figures.text(0.0 if abs(value) <= 1e-9 * abs(whole) else value, "force")


def _live(rating: Rating, figures: Figures, width: float) -> list[Flowable]:
    """Forces of every live load in every bar."""
    names = list(dict.fromkeys(name for bar in rating.bars for name in bar.live or {}))
    unit = figures.unit("force")
    story = heading(f"Live forces of each load, {unit}, unfactored (largest tension / largest compression)", 90)
    rows = []
    for bar in rating.bars:
        live = bar.live
        if live is None:
            continue
        pairs = [
            f"{number(live[name].maximum, figures)} / {number(live[name].minimum, figures)}" if name in live else "none"
            for name in names
        ]
        rows.append((bar.truss, bar.bar, *pairs))
    story.append(table(("truss", "bar", *names), rows, (3, 3, *(4,) * len(names)), width, "ll" + "r" * len(names)))
    return story


def _imposed(rating: Rating, figures: Figures, width: float) -> list[Flowable]:
    """What imposed changes pull and push in every bar."""
    story = heading(f"Forces of imposed changes, {figures.unit('force')}, unfactored", 90)
    rows = [
        (bar.truss, bar.bar, number(bar.imposed.maximum, figures), number(bar.imposed.minimum, figures))
        for bar in rating.bars
        if bar.imposed is not None
    ]
    head = ("truss", "bar", "sum of what pulls", "sum of what pushes")
    return [*story, table(head, rows, (3, 3, 4, 4), width, "llrr")]


def model(rating: Rating, bridge: Footbridge, figures: Figures, width: float) -> list[Flowable]:
    """What the model is: counts, verdict, supports, panel points, sections and materials."""
    story = part("The model")
    head = ("truss", "joints", "bars standing", "reaction components", "degree m + r − 2j", "mechanisms", "verdict")
    rows = [
        (name, truss.joints, truss.bars_standing, truss.reaction_components, truss.degree, truss.mechanisms,
         truss.verdict)
        for name, truss in rating.trusses.items()
    ]  # fmt: skip
    story.append(table(head, rows, (4, 2, 3, 3, 3, 3, 4), width, "lrrrrr"))
    for name, rated in rating.trusses.items():
        story += _moving(name, rated)
    for name, truss in bridge.trusses.items():
        story += _panel_points(name, truss, width)
        story += _bars(name, truss, rating.trusses[name], figures, width)
    story += _steel(bridge, width)
    return story


def _moving(name: str, rated: TrussRating) -> list[Flowable]:
    if rated.carries:
        return []
    said = f"Truss {name} is {with_article(rated.verdict)}: no forces and no rating factors exist for it."
    if rated.moving_joints:
        said += f" Joints that move: {', '.join(rated.moving_joints)}."
    if rated.loose_bars:
        said += f" Bars that join moving to still parts: {', '.join(rated.loose_bars)}."
    return [text(said, BODY)]


def _panel_points(name: str, truss: Truss, width: float) -> list[Flowable]:
    story = heading(f"Truss {name}: panel points", 80)
    if truss.same_as:
        return [*story, text(f"The same as truss {truss.same_as}.", BODY)]
    story.append(text(f"Top chord: {truss.top_chord}.", BODY))
    rows = [
        (k, joint, x.text, y.text, truss.supports.get(joint, ""), "deck joint" if joint in truss.deck_joints else "")
        for k, (joint, (x, y)) in enumerate(truss.joints.items(), 1)
    ]
    head = ("no.", "joint", "x along the bridge", "y up", "support", "deck")
    story.append(table(head, rows, (1, 3, 3, 3, 2, 2), width, "rlrr"))
    return story


def _bars(name: str, truss: Truss, rated: TrussRating, figures: Figures, width: float) -> list[Flowable]:
    """Where each bar runs, and what the site says of how it is held and joined."""
    if truss.same_as:
        return []
    lengths = {bar.bar: figures.text(bar.length, "length", 4) for bar in rated.bars}
    rows = [
        (k, bar.id, bar.start, bar.end, bar.role, lengths.get(bar.id, ""), bar.section, bar.material, _held(bar))
        for k, bar in enumerate(truss.bars, 1)
    ]
    head = ("no.", "bar", "from", "to", "role", "length", "section", "material", "as given in the site file")
    shares = (1, 2.6, 2, 2, 3, 2, 2.6, 2.6, 6)
    return [*heading(f"Truss {name}: bars as built", 80), table(head, rows, shares, width, "rllllr")]


def _held(bar: Bar) -> str:
    given: dict[str, object] = {
        "K in plane": bar.k_in_plane, "K out of plane": bar.k_out_of_plane,
        "unbraced out of plane": bar.unbraced_out_of_plane and bar.unbraced_out_of_plane.text, "ends": bar.ends,
        "net area": bar.net_area, "shear lag": bar.shear_lag, "connected": bar.connected, "turned": bar.turned,
        "system": bar.system, "because": bar.system_reason,
        "stitch spacing": bar.stitch_spacing and bar.stitch_spacing.text,
    }  # fmt: skip
    said = [f"{name} {value}" for name, value in given.items() if value is not None]
    return "; ".join([*said, "tension only"] if bar.tension_only else said)


def _steel(bridge: Footbridge, width: float) -> list[Flowable]:
    story = heading("Sections as built")
    rows = [(name, section.shape, "; ".join(_dimensions(section))) for name, section in bridge.sections.items()]
    story.append(table(("section", "shape", "dimensions and table values"), rows, (3, 3, 9), width))
    story += heading("Materials as the site gives them")
    materials = [
        (name, one.kind, one.E.text, one.Fy.text if one.Fy else "not given", one.Fu.text if one.Fu else "not given",
         one.density.text)
        for name, one in bridge.materials.items()
    ]  # fmt: skip
    head = ("material", "kind", "modulus E", "yield strength Fy", "tensile strength Fu", "density")
    story.append(table(head, materials, (3, 3, 2, 3, 3, 3), width))
    story.append(text("Where a strength is not given, the value that was used stands in the assumptions.", NOTE))
    return story


def _dimensions(section: Section) -> Iterator[str]:
    for name, dimension in section.dimensions.items():
        yield f"{name} {_dimension(dimension)}"
    if section.formed:
        yield f"formed {section.formed}"
    if section.rolled is not None:
        yield "rolled" if section.rolled else "not rolled"
    given: dict[str, Quantity | None] = {
        "area": section.area, "I horizontal": section.inertia_horizontal, "I vertical": section.inertia_vertical,
        "r min": section.least_radius,
    }  # fmt: skip
    for name, value in given.items():
        if value:
            yield f"{name} {value.text}"


def _dimension(dimension: SectionDimension) -> str:
    if isinstance(dimension, Quantity):
        return dimension.text
    if isinstance(dimension, Mapping):
        return ", ".join(f"{name} {_plate(plate)}" for name, plate in dimension.items())
    return " × ".join(one.text for one in dimension)


def _plate(plate: Rectangle) -> str:
    return f"{plate.width.text} × {plate.height.text} at ({plate.x.text}, {plate.y.text})"

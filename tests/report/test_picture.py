"""The elevation as a picture: everything is on it, and every label can be read."""

from __future__ import annotations

from dataclasses import replace

import pytest
from report import invented, sample
from reportlab.pdfbase.pdfmetrics import stringWidth

from inspector.report.fonts import BOLD, REGULAR, register
from models.bridge import Truss
from models.picture import PALETTE, Picture, Text, overlaps, text_width
from models.picture.elevation import elevation, in_parts
from models.picture.views import VIEWS
from models.rating.result import TrussRating


def rated(truss: Truss) -> TrussRating:
    """Invented figures for a truss."""
    return invented.truss_rating(truss)


def names(picture: Picture, role: str) -> set[str]:
    """The texts of one role."""
    return {text.text for text in picture.texts if text.role == role}


@pytest.mark.parametrize("view", VIEWS)
@pytest.mark.parametrize(
    "truss",
    [invented.pratt("29 bars"), invented.pratt("77 bars", 20), invented.crossed("crossed", 10),
     invented.crossed("crossed and long", 20), invented.pratt("flat", 14, 2.0, 1.2)],
    ids=lambda truss: truss.name,
)  # fmt: skip
def test_no_label_covers_another_on_a_crowded_truss(truss: Truss, view: str) -> None:
    """In every view the labels of up to 95 bars are clear of each other and of every bar's axis."""
    for picture in in_parts(truss, rated(truss), view):
        assert overlaps(picture) == []


@pytest.mark.parametrize("name", sample.NAMES)
def test_no_label_covers_another_on_the_sample_sites(name: str) -> None:
    """The drawings of all sample sites can be read."""
    found = sample.rated(name)
    for side, truss in found.rating.trusses.items():
        for picture in in_parts(found.bridge.trusses[side], truss):
            assert overlaps(picture) == []


def test_a_covered_label_is_found() -> None:
    """Two texts at one place, and a text on a bar's axis, are both reported."""
    truss = invented.pratt("a")
    picture = elevation(truss, rated(truss))
    first = picture.texts[0]
    axis = next(line for line in picture.lines if line.role == "axis")
    middle = ((axis.points[0][0] + axis.points[1][0]) / 2, (axis.points[0][1] + axis.points[1][1]) / 2)
    spoiled = replace(picture, texts=(*picture.texts, replace(first, text="again"), Text("x", middle, 0.1, "note")))
    assert (first.text, "again") in overlaps(spoiled)
    assert ("x", f"bar {axis.of}") in overlaps(spoiled)


def test_every_joint_and_bar_is_named_with_its_figure() -> None:
    """All panel points, all bars and as many figures as bars stand on the drawing."""
    truss = invented.pratt("a")
    picture = elevation(truss, rated(truss))
    assert names(picture, "joint name") == set(truss.joints)
    assert names(picture, "bar name") == {bar.id for bar in truss.bars}
    assert len([text for text in picture.texts if text.role == "bar figure"]) == len(truss.bars)


def test_the_parts_of_a_long_truss_show_every_bar() -> None:
    """Where a drawing is cut at a panel point, no bar and no joint is lost."""
    truss = invented.pratt("long", 20)
    parts = in_parts(truss, rated(truss))
    assert len(parts) > 1
    assert set().union(*(names(part, "bar name") for part in parts)) == {bar.id for bar in truss.bars}
    assert set().union(*(names(part, "joint name") for part in parts)) == set(truss.joints)


def test_letters_do_not_shrink_where_a_drawing_may_be_cut() -> None:
    """A long truss is cut before its letters become too small for the width."""
    truss = invented.pratt("long", 20)
    for part in in_parts(truss, rated(truss), across=125.0):
        assert part.width / part.height < 175


def test_bands_differ_without_any_colour() -> None:
    """No two bands of a view share both line pattern and outline."""
    for view in VIEWS.values():
        ways = [(band.pattern, band.weight) for band in view.bands]
        assert len(set(ways)) == len(ways)
        assert all(band.shade in PALETTE for band in view.bands)


def test_a_severed_bar_is_a_broken_line_with_a_cross() -> None:
    """A bar that carries nothing has no filled outline, a dashed axis, a cross and the word."""
    truss = invented.pratt("a")
    gone = truss.bars[3].id
    bars = tuple(bar._replace(check="severed") if bar.bar == gone else bar for bar in rated(truss).bars)
    picture = elevation(truss, replace(rated(truss), bars=bars))
    drawn = [line for line in picture.lines if line.of == gone]
    assert [line.pattern for line in drawn if line.role == "axis"] == ["dashed"]
    assert [line for line in drawn if line.role == "bar"] == []
    assert len([line for line in drawn if line.role == "gone"]) == 2
    assert "severed" in names(picture, "bar figure")


def test_a_bar_not_seen_has_strokes_across() -> None:
    """A bar that nobody saw is hatched, and the legend says so."""
    truss = invented.pratt("a")
    bars = tuple(bar._replace(known="not seen") if k == 0 else bar for k, bar in enumerate(rated(truss).bars))
    picture = elevation(truss, replace(rated(truss), bars=bars))
    assert {line.of for line in picture.lines if line.role == "not seen"} == {truss.bars[0].id}
    assert any("not seen" in row.text for row in picture.legend)


def test_a_long_or_foreign_name_is_drawn_by_its_number() -> None:
    """A name that no drawing can hold is replaced by its place in the table."""
    truss = invented.pratt("a")
    bars = (replace(truss.bars[0], id="x" * 300), replace(truss.bars[1], id="جسر"), *truss.bars[2:])
    odd = replace(truss, bars=bars)
    picture = elevation(odd, rated(odd))
    assert {"no. 1", "no. 2"} <= names(picture, "bar name")


def test_two_bars_between_the_same_joints_lie_side_by_side() -> None:
    """A pair of bars is drawn as two, each with its label."""
    truss = invented.pratt("a")
    pair = replace(truss, bars=(*truss.bars, replace(truss.bars[0], id="second")))
    picture = elevation(pair, rated(pair))
    axes = [line.points for line in picture.lines if line.of in (truss.bars[0].id, "second") and line.role == "axis"]
    assert axes[0] != axes[1]
    assert overlaps(picture) == []


def test_one_point_of_a_scale_bar_is_round_in_either_unit() -> None:
    """The scale bar has a round length in the unit that the bridge is shown in."""
    truss = invented.pratt("a")
    assert "2.00 m" in names(elevation(truss, rated(truss)), "note")


@pytest.mark.parametrize("words", ["U10-L10", "MWM@%", "0.123456789", "severed", "ahead: L0 to L8", "ÄÖÜ ß", "no. 12"])
def test_the_estimated_width_is_never_short(words: str) -> None:
    """Labels keep clear in print because their width is never underestimated."""
    register()
    printed = max(stringWidth(words, face, 1.0) for face in (REGULAR, BOLD))
    assert printed <= text_width(words) <= 1.6 * printed

"""Colours can be told from their ground, in sun and rain."""

from __future__ import annotations

import pytest

from inspector.app.theme import FIELD, OUTLINE_ON, SUN, TEXT_ON, THEMES, contrast, fill
from models.picture import PALETTE


@pytest.mark.parametrize(("text", "ground"), [*TEXT_ON, *OUTLINE_ON])
def test_in_the_sun_every_text_outline_and_mark_stands_out_7_to_1(text: str, ground: str) -> None:
    """The sun theme holds 7:1 for every pair that a screen uses."""
    assert contrast(getattr(SUN, text), getattr(SUN, ground)) >= 7


@pytest.mark.parametrize(("text", "ground"), [*TEXT_ON, *OUTLINE_ON])
def test_in_the_field_theme_texts_and_outlines_can_be_read(text: str, ground: str) -> None:
    """The field theme holds more than the 4.5:1 that the accessibility guidelines ask of small text."""
    assert contrast(getattr(FIELD, text), getattr(FIELD, ground)) >= 4.5


@pytest.mark.parametrize("shade", sorted(set(PALETTE) - {"ink"}))
def test_outlines_and_figures_stand_out_from_every_fill_of_a_drawing(shade: str) -> None:
    """Ink around and on a fill can be told from it; only the darkest fill, which carries no text, falls below 7:1."""
    wanted = 4.5 if shade == "vermillion" else 7
    assert contrast(fill("ink"), fill(shade)) >= wanted


def test_contrast_is_that_of_the_guidelines() -> None:
    """Black on white is 21:1, a colour on itself 1:1, and the order does not matter."""
    black, white = (0.0, 0.0, 0.0, 1.0), (1.0, 1.0, 1.0, 1.0)
    assert contrast(black, white) == contrast(white, black) == pytest.approx(21)
    assert contrast(white, white) == 1


def test_both_themes_are_there() -> None:
    """The two themes go by the names that the memory keeps."""
    assert set(THEMES) == {"field", "sun"}

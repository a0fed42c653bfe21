"""How things share the room of a screen."""

from __future__ import annotations

import pytest

from inspector.app.room import columns, fitting, key_columns, mode_for


@pytest.mark.parametrize(
    ("width", "natural", "least", "expected"),
    [
        (400, [90, 90, 90, 90], [60, 60, 60, 60], 4),
        (300, [90, 90, 90, 90], [60, 60, 60, 60], 2),
        (200, [90, 120, 90], [60, 60, 60], 3),
        (100, [90, 200, 90], [60, 60, 60], 1),
        (400, [300, 90], [60, 60], 1),
        (700, [90] * 7, [60] * 7, 7),
    ],
)
def test_buttons_stand_in_even_rows_with_their_texts_in_one_line(
    width: float, natural: list[float], least: list[float], expected: int
) -> None:
    """As many in a row as the longest text allows, and no button alone where two by two will do."""
    assert columns(width, natural, least, 8) == expected


@pytest.mark.parametrize(
    ("width", "height", "expected"), [(600, 500, 3), (600, 260, 4), (600, 100, 7), (240, 900, 2), (50, 900, 1)]
)
def test_keys_stand_as_on_a_telephone_unless_the_room_is_low(width: float, height: float, expected: int) -> None:
    """Every key keeps its size; where four rows do not fit, more stand in a row."""
    assert key_columns(width, height, 12, 76, 8) == expected


@pytest.mark.parametrize(
    ("width", "height", "letter", "expected"),
    [
        (1264, 590, 16, "beside"),
        (1264, 540, 24, "beside"),
        (1264, 500, 32, "cover"),
        (1008, 220, 16, "cover"),
        (784, 1060, 16, "below"),
        (784, 1000, 32, "cover"),
    ],
)
def test_drawing_and_sheet_share_the_room_as_the_text_allows(
    width: float, height: float, letter: float, expected: str
) -> None:
    """Side by side on a tablet, one under the other in portrait, one at a time with large text or little room."""
    assert mode_for(width, height, letter) == expected


def test_what_is_needed_least_goes_first() -> None:
    """Parts are kept in their order of need, as long as what they surround keeps its least height."""
    parts = [("moves", 65.0), ("views", 65.0), ("legend", 30.0)]
    assert fitting(300, 120, parts) == {"moves", "views", "legend"}
    assert fitting(270, 120, parts) == {"moves", "views"}
    assert fitting(190, 120, parts) == {"moves"}
    assert fitting(150, 120, parts) == frozenset()

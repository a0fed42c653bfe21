"""The judge's own fold of a bar's entries, on bars small enough to check by eye."""

from __future__ import annotations

from independent.condition import Condition, fold

BAR = {"id": "a-b", "from": "a", "to": "b", "section": "s", "material": "m"}


def folded(*observations: dict) -> Condition:
    entries = [{"truss": "one", "bar": "a-b", **entry} for entry in observations]
    document = {
        "sections": {"s": {"shape": "flat bar", "width": "100 mm", "thickness": "10 mm"}},
        "materials": {"m": {}},
        "visits": [{"date": f"202{i}-01-01", "observations": [entry]} for i, entry in enumerate(entries)],
    }
    return fold(document, "one", BAR, 2.0)


def read(mm: float, station: float, extent: str | None = None) -> dict:
    reading = {"station": station, "plate": "plate", "thickness": [f"{mm} mm"]}
    return {"readings": [reading | ({"extent": extent} if extent else {})]}


def profile(condition: Condition, mode: str = "strength") -> list[tuple[float, float]]:
    return [(round(p.length, 9), round(p.thickness["plate"] * 1000, 9)) for p in condition.pieces(mode)]


def test_readings_and_estimates_fold_along_the_bar() -> None:
    """A reading holds over its extent, an earlier estimate elsewhere, a later one wherever it is smaller."""
    assert profile(folded(read(8, 0.5, "0.4 m"))) == [(0.8, 10), (0.4, 8), (0.8, 10)]
    assert profile(folded({"estimated loss": 0.3}, read(8, 0.5, "0.4 m"))) == [(0.8, 7), (0.4, 8), (0.8, 7)]
    assert profile(folded(read(8, 0.5, "0.4 m"), {"estimated loss": 0.1})) == [(0.8, 9), (0.4, 8), (0.8, 9)]
    assert profile(folded(read(8, 0.0, "0.4 m"))) == [(0.2, 8), (1.8, 10)]
    assert profile(folded({"estimated loss": 0.3}, {"estimated loss": 0.1})) == [(2.0, 9)]


def test_later_reading_replaces_and_keeps_the_further_reach() -> None:
    """A later reading nearby takes over the extent, and where the earlier one reached further the smaller holds."""
    assert profile(folded(read(8, 0.5, "0.4 m"), read(9, 0.51))) == [(0.8, 10), (0.4, 9), (0.8, 10)]
    shorter = folded(read(8, 0.5, "0.4 m"), read(9, 0.5, "0.2 m"))
    assert profile(shorter) == [(0.8, 10), (0.1, 8), (0.2, 9), (0.1, 8), (0.8, 10)]


def test_reading_without_extent_is_one_depth_for_strength_and_twofold_for_stiffness() -> None:
    """For strength it holds over a depth to each side; for stiffness over nothing, or over the whole bar."""
    condition = folded(read(8, 0.5))
    assert profile(condition) == [(0.9, 10), (0.2, 8), (0.9, 10)]
    assert {t for _, t in profile(condition, "zero")} == {10}
    assert {t for _, t in profile(condition, "whole")} == {8}


def test_replaced_bar_forgets_what_was_recorded() -> None:
    """Nothing recorded before a replacement counts."""
    condition = folded({"estimated loss": 0.3, "severed": True}, {"replaced": {"section": "s", "material": "m"}})
    assert profile(condition) == [(2.0, 10)]
    assert not condition.severed

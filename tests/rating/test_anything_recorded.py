"""Whatever inspectors record, and whatever stands on the deck: a rating comes out, whole and consistent."""

from __future__ import annotations

import copy
from typing import Any

import pytest
from hypothesis import given, settings
from hypothesis import strategies as st
from independent.rate import expanded
from rewriting.rated import rated, solved
from strategies import sections
from strategies.sites import sites

from inspector.exchange import result
from models.rating import hand_check
from models.rating.result import BarRating, Governing, Rating

JSON = dict[str, Any]

GONE = ("severed", "cracked")
WITHOUT_A_LOAD = ("dead load", *GONE, None)

MORE_LOADS = (
    {"name": "snow", "kind": "uniform", "pressure": "1.2 kPa"},
    {"name": "cart", "kind": "concentrated", "force": "9 kN", "with": [{"load": "snow", "factor": 0.5}]},
    {"name": "by rule", "kind": "crowd", "rule": "en 1991-2"},
)


def readings(section: str, left: float, extent: str | None, walls: int) -> list[JSON]:
    """Readings that leave a part of the first walls, at the start of a bar."""
    shared = {"station": 0.0, **({"extent": extent} if extent else {})}
    plates = list(sections.plates(section).items())[:walls]
    return [{"plate": plate, "thickness": [f"{left * mm:.3f} mm"], **shared} for plate, mm in plates]


def damage(section: str) -> st.SearchStrategy[JSON]:
    """Anything that can be said about a bar of this section, sound or strange."""
    lefts = st.sampled_from((0.0, 0.001, 0.4, 0.9, 1.0, 30.0))
    return st.one_of(
        st.sampled_from(({"severed": True}, {"slack": True}, {"crack": {}}, {"severed": False}, {"crack": None})),
        st.sampled_from((0.0, 0.3, 0.999999, 1.0, 25.0)).map(lambda loss: {"estimated loss": loss}),
        st.sampled_from(("0 mm", "40 mm", "-3 m")).map(lambda offset: {"bow": {"offset": offset}}),
        st.builds(
            lambda left, extent, walls: {"readings": readings(section, left, extent, walls)},
            lefts,
            st.sampled_from((None, "0.1 mm", "0.5 m", "90 m")),
            st.integers(1, 4),
        ),
    )


@st.composite
def troubled(draw: st.DrawFn) -> JSON:
    """Draw a site on which a few bars are in trouble, some cannot push, and more stands on the deck."""
    drawn, _ = draw(sites())
    document = copy.deepcopy(drawn)
    document["rating"]["live"] += draw(st.sampled_from(([], list(MORE_LOADS))))
    replaced = {
        (entry["truss"], entry["bar"])
        for visit in document.get("visits", [])
        for entry in visit["observations"]
        if "replaced" in entry
    }
    bars = [
        (name, bar)
        for name, truss in expanded(document).items()
        for bar in truss["bars"]
        if (name, bar["id"]) not in replaced
    ]
    entries = []
    for name, bar in draw(st.lists(st.sampled_from(bars), max_size=4)):
        entries.append({"truss": name, "bar": bar["id"], **draw(damage(bar["section"]))})
        if "bars" in document["trusses"][name] and draw(st.booleans()):
            own = document["trusses"][name]["bars"]
            own[[each["id"] for each in own].index(bar["id"])]["tension only"] = True
    document.setdefault("visits", []).append({"date": "2026-11-30", "observations": entries})
    return document


def least(rating: Rating, level: str) -> float | None:
    """The lowest factor of the bars that carry; 0 where a truss does not stand."""
    if not all(truss.carries for truss in rating.trusses.values()):
        return 0.0
    carrying = [row.rating_factor[level] for row in rating.bars if row.check not in GONE]
    return min((factor for factor in carrying if factor is not None), default=None)


def check_row(row: BarRating, carries: bool) -> None:
    """What holds of any row."""
    factors = set(row.rating_factor.values())
    if row.check in GONE:
        assert factors == {0.0}
        assert (row.live, row.dead_components, row.load, row.loss_allowance) == (None, None, None, 0.0)
        assert (row.area == 0) == (row.check == "severed")
    elif not carries:
        assert (row.live, row.dead_components, row.check, factors) == (None, None, None, {None})
    elif row.check == "dead load":
        assert factors == {0.0}
    else:
        assert (row.check is None) == (None in factors)
        assert (row.load is None) == (row.check in WITHOUT_A_LOAD)
    assert row.area <= row.nominal_area * (1 + 1e-9)
    assert row.tension >= 0
    assert row.compression >= 0
    if row.loss_allowance is not None:
        assert 0.0 <= row.loss_allowance <= 0.95


def check_governing(rating: Rating, structure: Governing) -> None:
    """The structure's figures are those of the row that it names."""
    for level, factor in structure.rating_factor.items():
        assert factor == pytest.approx(least(rating, level), rel=1e-9)
    if structure.bar is not None:
        row = next(row for row in rating.bars if (row.truss, row.bar) == (structure.truss, structure.bar))
        assert (row.check, row.load) == (structure.check, structure.load)


@settings(max_examples=25)
@given(troubled())
def test_a_rating_comes_out_of_anything(document: JSON) -> None:
    """No error and no numerical warning; rows, verdicts, the structure's figures and hand checks agree."""
    rating = rated(document)
    assert result.document(rating)["bars"]
    _, outcomes = solved(document)
    for truss in rating.trusses.values():
        assert truss.bars_standing + sum(row.check in GONE for row in truss.bars) <= len(truss.bars)
        for row in truss.bars:
            check_row(row, truss.carries)
            check = hand_check(outcomes, truss.name, row.bar)
            if row.load is None:
                assert check.remark
            else:
                assert check.steps[-1].value == pytest.approx(row.rating_factor["operating"], rel=1e-9)
    check_governing(rating, rating.structure)
    pulled, now = rating.if_slack_bars_pull, rating.structure.rating_factor["operating"]
    if pulled is not None and pulled.rating_factor["operating"] is not None:
        assert now is not None
        assert now <= pulled.rating_factor["operating"] * (1 + 1e-9)

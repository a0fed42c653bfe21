"""Whole ratings on every basis: the samples, what stands in their documents, and what each basis leaves out."""

from __future__ import annotations

import copy
import json
from functools import cache
from pathlib import Path
from typing import Any

import pytest
from jsonschema import Draft202012Validator
from small.footbridge import bar_of, record, short

from inspector import desk
from inspector.exchange import result, site
from inspector.exchange.schema import result_schema
from models.rating import bar_of as row_of
from models.rating.result import BarRating
from models.resistance import BASES

JSON = dict[str, Any]
SAMPLES = sorted((Path(__file__).parents[2] / "sample_sites").glob("*.json"))
LEVELS = {
    "lrfr": ["inventory", "operating"], "allowable stress": ["inventory", "operating"], "eurocode": ["ultimate"],
}  # fmt: skip
every_basis = pytest.mark.parametrize("basis", LEVELS)
other_basis = pytest.mark.parametrize("basis", ["allowable stress", "eurocode"])


def rated(document: JSON, basis: str) -> desk.Rated:
    """The document rated on a basis."""
    document = copy.deepcopy(document)
    document["rating"]["basis"] = basis
    return desk.rate(site.read_document(document))


@cache
def sample(path: Path, basis: str) -> desk.Rated:
    """A sample rated on a basis."""
    return rated(json.loads(path.read_text(encoding="utf-8")), basis)


def test_every_basis_that_a_site_may_name_is_built() -> None:
    """The three bases of the site format can all be rated by."""
    assert list(BASES) == list(LEVELS)


@every_basis
@pytest.mark.parametrize("path", SAMPLES, ids=lambda path: path.stem)
def test_a_sample_is_rated_on_every_basis(path: Path, basis: str) -> None:
    """Its document holds to the schema, has the levels of the basis, and no factors that the basis does not know."""
    found = sample(path, basis).rating
    document = result.document(found)
    Draft202012Validator(result_schema()).validate(document)
    assert (document["basis"], list(document["structure"]["rating factor"])) == (basis, LEVELS[basis])
    for bar in document["bars"]:
        assert bar["rating factor"] is None or list(bar["rating factor"]) == LEVELS[basis]
        assert (bar["condition factor"] is None) == (bar["system factor"] is None) == (basis != "lrfr")
        assert ("resistance inventory" in bar) == (basis == "allowable stress")
    assert not any("system factor" in sentence or "as fair" in sentence for sentence in found.assumptions) or (
        basis == "lrfr"
    )


@pytest.mark.parametrize("path", SAMPLES, ids=lambda path: path.stem)
def test_forces_are_those_of_every_basis(path: Path) -> None:
    """Dead and live forces, areas and what is known of a bar do not depend on the basis.

    Where bars go slack the live forces are those of the arrangement that governs, and that may.
    """
    plain = [sample(path, basis).rating.bars for basis in LEVELS]
    names = ["area", "dead_components", "dead_wearing", "state"]
    if not any(bar.slack for bars in plain for bar in bars):
        names.append("live")
    for bars in zip(*plain, strict=True):
        for name in names:
            assert len({repr(getattr(bar, name)) for bar in bars}) == 1


def test_the_lower_resistances_stand_beside_the_upper_ones() -> None:
    """By allowable stresses `resistance` is the operating one and `resistance inventory` the lower one of the bar."""
    (bar, *_) = result.document(rated(short(), "allowable stress").rating)["bars"]
    row = row_of(rated(short(), "allowable stress").rating, "only", bar["bar"])
    assert bar["resistance"] == {"tension": row.tension, "compression": row.compression}
    lower = row.lower_levels["inventory"]
    assert bar["resistance inventory"] == {"tension": lower.tension, "compression": lower.compression}
    assert lower.compression == pytest.approx(row.compression * 1.70 / 2.12, rel=1e-9)
    assert row_of(rated(short(), "lrfr").rating, "only", bar["bar"]).lower_levels == {}


def factor(bar: BarRating, level: str) -> float:
    """A rating factor that there is."""
    found = bar.rating_factor[level]
    assert found is not None
    return found


@pytest.mark.parametrize("level", ["inventory", "operating"])
def test_allowable_stress_by_hand(level: str) -> None:
    """RF = (C - D)/L with loads as they are, at either level with its own capacity."""
    for bar in rated(short(), "allowable stress").rating.bars:
        if bar.load is None or bar.live is None or bar.dead_components is None or bar.dead_wearing is None:
            continue
        sign = 1 if bar.direction == "tension" else -1
        both = bar.lower_levels["inventory"] if level == "inventory" else (bar.tension, bar.compression)
        live = max(sign * bar.live[bar.load].maximum, sign * bar.live[bar.load].minimum)
        room = both[sign < 0] - sign * (bar.dead_components + bar.dead_wearing)
        assert factor(bar, level) == pytest.approx(room / live, rel=1e-9)


def test_uniform_loads_have_their_own_factor_by_the_eurocodes() -> None:
    """The same pressure everywhere counts 1.50 as snow and 1.35 as a crowd; combined, all of it takes the greater."""
    snow, crowd = (short() for _ in range(2))
    snow["rating"]["live"] = [{"name": "load", "kind": "uniform", "pressure": "4 kPa"}]
    crowd["rating"]["live"] = [{"name": "load", "kind": "crowd", "pressure": "4 kPa"}]
    for name in ("L0-U1", "L1-L2"):
        under = [row_of(rated(document, "eurocode").rating, "only", name) for document in (snow, crowd)]
        assert factor(under[0], "ultimate") == pytest.approx(factor(under[1], "ultimate") * 1.35 / 1.50, rel=1e-9)
    together = copy.deepcopy(crowd)
    together["rating"]["live"] += [
        {"name": "snow", "kind": "uniform", "pressure": "0 kPa", "with": [{"load": "load", "factor": 1.0}]}
    ]
    low = row_of(rated(together, "eurocode").rating, "only", "L0-U1")
    assert (low.load, low.rating_factor) == (
        "snow",
        row_of(rated(snow, "eurocode").rating, "only", "L0-U1").rating_factor,
    )


def test_the_eurocodes_leave_the_horizontal_force_out() -> None:
    """Every rating by the Eurocodes says that no figure has the horizontal force of EN 1991-2, 5.4; no other does."""
    said = {
        basis: [one.text for one in rated(short(), basis).rating.findings if "EN 1991-2, 5.4" in one.text]
        for basis in LEVELS
    }
    assert [len(texts) for texts in said.values()] == [0, 0, 1]
    (found,) = (one for one in rated(short(), "eurocode").rating.findings if "EN 1991-2, 5.4" in one.text)
    assert (found.level, found.truss, found.bar) == ("left out", None, None)


@other_basis
@pytest.mark.parametrize("bar", ["L0-U1", "L1-L2", "U1-L2"])
def test_the_allowance_brings_the_upper_factor_to_one(basis: str, bar: str) -> None:
    """With the loss that is said to be allowed, the factor at the upper level is 1, slender walls and all."""
    document = short()
    document["rating"]["live"][0]["pressure"] = "20 kPa"
    now = row_of(rated(document, basis).rating, "only", bar)
    assert now.loss_allowance is not None
    worn = record(copy.deepcopy(document), {"bar": bar, "estimated loss": now.loss_allowance})
    assert factor(row_of(rated(worn, basis).rating, "only", bar), LEVELS[basis][-1]) == pytest.approx(1.0, rel=1e-6)


@other_basis
def test_without_a_bar_the_others_are_rated_on_the_same_basis(basis: str) -> None:
    """What is left without a bar is the lowest upper factor of the bridge with that bar severed."""
    document = short(crossed=True)
    before = rated(document, basis).rating
    cut = rated(record(copy.deepcopy(document), {"bar": "U1-L2", "severed": True}), basis).rating
    upper = LEVELS[basis][-1]
    without = row_of(before, "only", "U1-L2").without_it
    if without == "mechanism":
        assert cut.structure.rating_factor[upper] == 0.0
    else:
        assert without == pytest.approx(cut.structure.rating_factor[upper], rel=1e-9)


@other_basis
def test_slender_plates_are_told_by_the_rule_of_the_basis(basis: str) -> None:
    """A 200 x 160 x 3.5 tube: walls 153/3.5 and 193/3.5 are slender by either rule, and by how much differs."""
    document = short()
    tube = {"shape": "rectangular tube", "depth": "200 mm", "width": "160 mm", "thickness": "3.5 mm"}
    document["sections"]["own"] = tube
    bar_of(document, "L0-U1").update(section="own", k={"in plane": 0.5}, **{"unbraced out of plane": "1.5 m"})
    texts = [one.text for one in rated(document, basis).rating.findings if "slender:" in one.text]
    assert len(texts) == 1
    assert texts[0].startswith("The top wall, bottom wall, left wall, right wall are slender: ")


def test_a_tube_of_class_4_is_left_out_by_the_eurocodes() -> None:
    """A round tube beyond 90 epsilon squared carries a finding with the limit; just inside it does not."""
    document = short()
    bar_of(document, "L0-U1").update(section="own")
    document["materials"]["steel"].update(Fy="235 MPa", E="210 GPa")
    for wall, told in (("2.5 mm", 0), ("2.4 mm", 1)):
        document["sections"]["own"] = {"shape": "round tube", "diameter": "219.1 mm", "thickness": wall}
        found = rated(document, "eurocode").rating.findings
        assert sum(one.level == "left out" and "90 ε²" in one.text for one in found) == told


@other_basis
def test_a_report_is_printed_on_every_basis(basis: str) -> None:
    """The PDF comes out, and names its levels."""
    assert desk.report(rated(short(), basis)).startswith(b"%PDF")

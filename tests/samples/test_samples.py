"""The sample footbridges: whole, in the site format, and telling in their notes what the rating says."""

from __future__ import annotations

import json
from dataclasses import replace
from functools import cache
from pathlib import Path

import pytest

from inspector.exchange import site
from inspector.exchange.site import Site
from models.condition import fold_all
from models.rating import Provenance, prepare, rate
from models.rating.result import BarRating, Rating, TrussRating
from models.resistance.lrfr import LRFR
from models.words import significant

FOLDER = Path(__file__).parents[2] / "sample_sites"
NAMES = sorted(path.stem for path in FOLDER.glob("*.json"))
LEAST_BARS = 29

every_sample = pytest.mark.parametrize("name", NAMES)


@cache
def text_of(name: str) -> str:
    """The sample as it lies in the folder."""
    return (FOLDER / f"{name}.json").read_text(encoding="utf-8")


@cache
def sample(name: str) -> Site:
    """The sample as the program reads it."""
    return site.read(text_of(name), name)


@cache
def rating(name: str) -> Rating:
    """The sample as the program rates it."""
    return rated(sample(name))


def rated(found: Site) -> Rating:
    """Rate a site on the basis `lrfr`."""
    condition = fold_all(found.bridge, found.journal)
    return rate(prepare(found.bridge), condition, LRFR, Provenance("0" * 64, "test"))


def lowest(truss: TrussRating) -> BarRating:
    """The governing one of a truss's bars that carry."""
    carrying = [bar for bar in truss.bars if bar.check not in (None, "severed", "cracked")]
    return min(carrying, key=lambda bar: bar.rating_factor["operating"] or 0.0)


def figures(bar: BarRating) -> list[str]:
    """A bar's rating factors as the notes print them."""
    return [significant(value or 0.0) for value in bar.rating_factor.values()]


def test_the_folder_holds_five_samples_and_nothing_but_data() -> None:
    """The folder is installed as data, so that a program file in it would be shipped by mistake."""
    files = sorted(path.name for path in FOLDER.iterdir() if path.is_file())
    assert files == sorted(["__init__.py", *(f"{name}.json" for name in NAMES)])
    assert len(NAMES) == 5


@every_sample
def test_a_sample_is_written_back_as_it_was_read(name: str) -> None:
    """Reading and writing loses nothing and adds nothing to a document that a person wrote."""
    found = sample(name)
    assert site.write(found.bridge, found.journal) == json.loads(text_of(name))


@every_sample
def test_a_sample_is_of_real_size(name: str) -> None:
    """Every truss has as many bars as a real footbridge, so that screens and reports are tried in earnest."""
    for truss in sample(name).bridge.trusses.values():
        assert len(truss.bars) >= LEAST_BARS


@every_sample
def test_a_sample_has_two_visits(name: str) -> None:
    """What was recorded last time can be shown beside what is recorded now."""
    dates = [visit.date for visit in sample(name).journal.visits]
    assert len(dates) == 2
    assert dates == sorted(dates)


@every_sample
def test_a_sample_has_a_doubtful_value_that_is_set_aside(name: str) -> None:
    """Every sample shows how a reading thicker than the drawing is kept, marked and not used."""
    doubtful = [finding.text for finding in rating(name).findings if finding.level == "doubtful"]
    assert any("replaces nothing" in text for text in doubtful)


@every_sample
def test_a_sample_has_bars_not_seen_with_and_without_a_word(name: str) -> None:
    """A bar written down as not seen, and one that nobody wrote about, are both not seen."""
    found = sample(name)
    last = found.journal.visits[-1]
    not_seen = {(bar.truss, bar.bar) for bar in rating(name).bars if bar.known == "not seen"}
    with_reason = {(entry.truss, entry.bar) for entry in last.entries if entry.seen == "not seen" and entry.reason}
    spoken_of = {(entry.truss, entry.bar) for entry in last.entries}
    assert with_reason
    assert with_reason <= not_seen
    assert not_seen - spoken_of


@every_sample
def test_the_notes_name_the_governing_bar_with_its_figures(name: str) -> None:
    """The notes of a sample say which bar governs, by which check and load, at which rating factor."""
    notes = sample(name).bridge.notes or ""
    standing = [truss for truss in rating(name).trusses.values() if truss.carries]
    bar = min((lowest(truss) for truss in standing), key=lambda row: row.rating_factor["operating"] or 0.0)
    inventory, operating = figures(bar)
    assert f"rating factor {inventory} (inventory) and {operating} (operating)" in notes
    assert bar.bar in notes
    assert bar.truss in notes
    assert f"{bar.check} under the {bar.load}" in notes


@every_sample
def test_every_bar_that_the_notes_point_at_is_there(name: str) -> None:
    """A name of a bar in the notes is the name of a bar of that bridge."""
    found = sample(name).bridge
    known = {bar.id for truss in found.trusses.values() for bar in truss.bars}
    words = (found.notes or "").replace("(", " ").replace(")", " ").replace(",", " ").replace(";", " ").split()
    named = {word.strip(".:") for word in words if "-" in word and word[0].isupper() and word[1:2].isdigit()}
    assert named
    assert named <= known


@every_sample
def test_undamaged_bars_rate_as_a_sound_bridge_would(name: str) -> None:
    """Without its visits every sample rates between 1 and 3 at the lower level, as a real bridge would."""
    found = sample(name)
    as_built = rated(replace(found, journal=replace(found.journal, visits=())))
    least = as_built.structure.rating_factor["inventory"]
    assert least is not None
    assert 1.0 <= least <= 3.0


def test_the_pratt_sample_is_governed_by_another_bar_than_as_drawn() -> None:
    """The half-through sample shows that damage, and not the drawing, decides which bar governs."""
    found = sample("pratt-half-through")
    as_drawn = rated(replace(found, journal=replace(found.journal, visits=()))).structure
    now = rating("pratt-half-through").structure
    assert (as_drawn.truss, as_drawn.bar) != (now.truss, now.bar)
    assert as_drawn.bar == "U3-U4"
    assert f"at {significant(as_drawn.rating_factor['inventory'] or 0.0)}" in (found.bridge.notes or "")


def test_the_foot_of_a_vertical_keeps_a_high_rating_factor() -> None:
    """The half-through sample shows a worn post that rates high and matters all the same."""
    rows = {(bar.truss, bar.bar): bar for bar in rating("pratt-half-through").bars}
    post = rows["downstream", "L3-U3"]
    assert post.area < 0.9 * post.nominal_area
    assert (post.rating_factor["operating"] or 0.0) > 10.0


def test_the_warren_sample_depends_on_an_assumed_connection() -> None:
    """With the connection of its chords the governing tie of the US sample would yield first, as the notes say."""
    document = json.loads(text_of("warren-feet-and-kips"))
    bars = {bar["id"]: bar for bar in document["trusses"]["left"]["bars"]}
    chord, tie = bars["L3-L4"], bars["U0-L1"]
    tie.update({key: chord[key] for key in ("net area", "shear lag")})
    settled = rated(site.read(json.dumps(document)))
    bar = next(row for row in settled.trusses["left"].bars if row.bar == "U0-L1")
    assert bar.tension_check == "tension yield"
    assert f"yield would govern, at {figures(bar)[0]} (inventory)" in document["notes"]


def test_the_iron_sample_is_redundant_and_its_rods_go_slack() -> None:
    """The crossed sample keeps carrying without its governing tie, and says which of its rods go slack, and when."""
    found = rating("wrought-iron-crossed")
    notes = sample("wrought-iron-crossed").bridge.notes or ""
    assert {truss.verdict for truss in found.trusses.values()} == {"redundant"}
    rows = {(bar.truss, bar.bar): bar for bar in found.bars}
    for bar in ("U1-L2", "L1-U2"):
        remains = rows["downstream", bar].without_it
        assert isinstance(remains, float)
        assert significant(remains) in notes
    rods = {bar.id for bar in sample("wrought-iron-crossed").bridge.trusses["upstream"].bars if bar.tension_only}
    slack = {finding.bar for finding in found.findings if "can only pull" in finding.text}
    assert slack == rods == {rod for bar in found.bars for rod in bar.slack}
    assert len(rows["downstream", "L4-U4"].slack) == 2
    assert "L4-U4, say, is rated with two of them slack" in notes


def test_the_severed_hanger_makes_one_truss_a_mechanism_and_leaves_the_other_rated() -> None:
    """A severed bar of a determinate truss ends its figures, sets the structure to 0, and says to act now."""
    found = rating("severed-hanger")
    weir, pool = found.trusses["weir side"], found.trusses["pool side"]
    assert (weir.verdict, weir.moving_joints) == ("mechanism", ("L3",))
    assert pool.verdict == "determinate"
    assert found.structure.rating_factor == {"inventory": 0.0, "operating": 0.0}
    assert found.structure.bar is None
    assert found.findings[0].level == "act now"
    assert (lowest(pool).bar, lowest(pool).check) == ("U3-L3", "tension fracture")


def test_the_severed_diagonal_leaves_a_redundant_truss_that_carries() -> None:
    """A severed bar of a redundant panel stands at 0 while its partner takes its share and governs."""
    found = rating("three-supports")
    basin, canal = found.trusses["basin side"], found.trusses["canal side"]
    assert (basin.verdict, canal.verdict) == ("redundant", "redundant")
    assert basin.degree == canal.degree - 1
    rows = {(bar.truss, bar.bar): bar for bar in found.bars}
    assert rows["basin side", "T5-B6"].check == "severed"
    assert found.structure.bar == "B5-T6"
    alone, shared = rows["basin side", "B5-T6"], rows["canal side", "B5-T6"]
    assert (alone.dead_components or 0.0) > 1.5 * (shared.dead_components or 0.0)
    lifted = [finding.text for finding in found.findings if "bearing would lift" in finding.text]
    assert lifted

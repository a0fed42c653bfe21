"""The PDF rating summary, read back as a reviewer gets it."""

from __future__ import annotations

import re
from dataclasses import replace

import pytest
from report import invented
from report.read_back import Pages, read

from inspector.report import lowest_bars, make_report
from models.bridge import Override, Recommendation
from models.finding import Finding
from models.journal import Journal
from models.rating.result import Deflection, Effect, Governing, Rating
from models.words import CAUTION, factor

STATUS = "PRELIMINARY – FOR REVIEW BY A LICENSED ENGINEER – NOT FOR POSTING"
SEVERED = "L2-L3"
FINDINGS = (
    Finding("note", "The deck was wet.", None, None),
    Finding("act now", "L2-L3 is severed; it carries nothing.", "upstream", SEVERED),
    Finding("doubtful", "A reading is thicker than the drawing.", "upstream", "L0-L1"),
    Finding("assumed", "K is taken as 1.0.", "upstream", "U1-U2"),
    Finding("assumed", "K is taken as 1.0.", "upstream", "U2-U3"),
)


def printed(rating: Rating, journal: Journal | None = None, **changes: object) -> Pages:
    """A report on the invented bridge, read back."""
    site = replace(invented.bridge(), **changes)  # type: ignore[arg-type]
    visits = invented.journal(site) if journal is None else journal
    return read(make_report(rating, site, visits, invented.conditions(site), invented.hand_checks(rating)))


def whole_rating() -> Rating:
    """The invented rating with a severed bar and one that was not seen."""
    rating = invented.rating(invented.bridge(), FINDINGS)
    none = dict.fromkeys(("load", "direction", "live", "dead_components", "dead_wearing", "demand", "capacity"))
    zero = {"inventory": 0.0, "operating": 0.0}
    rating = invented.with_bar(rating, "upstream", SEVERED, check="severed", area=0.0, rating_factor=zero, **none)
    return invented.with_bar(rating, "upstream", "U1-U2", known="not seen")


@pytest.fixture(scope="module")
def pages() -> Pages:
    """The report that most tests read."""
    return printed(
        whole_rating(),
        overrides=(
            Override("upstream", "L0-L1", "Fy", "250 MPa", "235 MPa", "A. Surveyor", "coupon test", "2026-05-20"),
        ),
        recommendations=(Recommendation("R1", "Clean the bearings.", "soon", "2024-05-01"),),
    )


def test_every_page_says_that_it_is_preliminary(pages: Pages) -> None:
    """A page that goes astray still carries its status and the whole caution."""
    for text in pages.texts:
        assert STATUS in text
        assert CAUTION in text


def test_every_page_has_its_number_and_the_fingerprint(pages: Pages) -> None:
    """Each page tells which of how many it is, and of which inputs."""
    for number, text in enumerate(pages.texts, 1):
        assert f"Page {number} of {len(pages.texts)}" in text
        assert invented.FINGERPRINT in text


def test_no_page_is_empty(pages: Pages) -> None:
    """Every page holds more than its head and foot."""
    bare = len(STATUS) + len(CAUTION) + len(invented.FINGERPRINT) + 80
    assert all(len(text) > bare + 40 for text in pages.texts)


def test_every_font_is_embedded(pages: Pages) -> None:
    """No page depends on a font that the reader's machine would have to have."""
    assert pages.fonts
    for font in pages.fonts:
        assert "DejaVuSans" in font["/BaseFont"]
        assert "/FontFile2" in font["/FontDescriptor"].get_object()


def test_the_cover_leaves_room_for_names_and_a_seal(pages: Pages) -> None:
    """Four lines to sign, a space for a seal, and nothing that would fill them."""
    for words in (
        "Inspected by",
        "Calculated by",
        "Checked by",
        "Approved by",
        "Space for seal",
        "Parks office",
        "AW-07",
    ):
        assert words in pages.texts[0]
    assert "2026-05-14, A. Surveyor" in pages.texts[0]


def test_the_result_stands_on_one_page(pages: Pages) -> None:
    """Urgent findings, the lowest rating factor with its bar, and what is not rated stand together."""
    result = pages.texts[1]
    lowest = lowest_bars(whole_rating())[0]
    assert result.index("Act now") < result.index("Lowest rating factor")
    assert "L2-L3 is severed; it carries nothing." in result
    assert factor(lowest.rating_factor["operating"]) in result
    assert f"bar {lowest.bar}" in result
    assert "how the bar is known: measured" in result
    assert "connections and gussets not rated" in result
    assert "Truss upstream: 1 bar: U1-U2." in result


def test_the_five_lowest_bars_leave_out_those_that_are_gone() -> None:
    """A severed bar is a finding; the governing bars are those that still carry, lowest first."""
    rating = whole_rating()
    bars = lowest_bars(rating)
    values = [bar.rating_factor["operating"] or 0.0 for bar in bars]
    assert len(bars) == 5
    assert SEVERED not in [bar.bar for bar in bars if bar.truss == "upstream"]
    assert values == sorted(values)


def test_every_bar_stands_in_the_table_with_its_rating_factors(pages: Pages) -> None:
    """Each row holds the bar's name, forces and rating factors at every level."""
    for bar in whole_rating().bars:
        row = [f"{bar.bar} {bar.section} {bar.state or 'none'}"]
        levels = " ".join(factor(bar.rating_factor[level]) for level in ("inventory", "operating"))
        assert any(start in pages.whole for start in row)
        assert levels in pages.whole


def test_every_reading_stands_with_its_circumstances(pages: Pages) -> None:
    """A reading is printed with values, mean, least, extent, instrument and who took it; a retracted one is marked."""
    page = pages.page_with("What was recorded")
    assert "3.9 mm; 4.1 mm 4.00 3.90 0.4 m" in page
    for words in ("ultrasonic gauge", "outer", "yes", "A. Surveyor", "retracted", "doubt F2"):
        assert words in page


def test_looks_are_printed_together(pages: Pages) -> None:
    """Bars that were only looked at share a row; a bar not seen keeps its reason."""
    assert "hands on fair" in pages.whole
    assert "not seen: behind the abutment wall" in pages.whole
    assert "estimated loss 15 % over 0.5 m at station 0.5" in pages.whole


def test_an_equal_finding_is_printed_once_with_all_its_places(pages: Pages) -> None:
    """Eighty equal sentences would hide the one that differs."""
    assert pages.whole.count("K is taken as 1.0.") == 1
    assert "truss upstream, bars U1-U2, U2-U3" in pages.whole


def test_findings_come_in_the_order_of_their_urgency(pages: Pages) -> None:
    """Act now comes first, a note last."""
    page = pages.page_with("Findings and assumptions")
    order = [page.index(words) for words in ("F1 act now", "F2 doubtful", "F3 assumed", "F4 note")]
    assert order == sorted(order)


def test_reactions_are_compared_with_the_dead_load(pages: Pages) -> None:
    """A reviewer sees at once that the reactions equal the loads."""
    assert "Sum of the dead reactions 69.14 kN; difference from the dead load 0 kN." in pages.whole
    assert "together 69.14 kN" in pages.whole


def test_hand_checks_show_formula_numbers_and_clause(pages: Pages) -> None:
    """The governing bars are worked out with formula, numbers, value and clause."""
    for words in ("0.658^(Po/Pe) · Po", "as Pe/Po = 1.8719 ≥ 0.44", "366.07 kN", "AASHTO LRFD 6.9.4.1.1 (from memory)"):
        assert words in pages.whole
    assert pages.whole.count("gyration") == 5


def test_values_changed_by_hand_show_both_values_and_the_reason(pages: Pages) -> None:
    """Overrides and recommendations are printed where there are any."""
    for words in (
        "Values changed by hand",
        "235 MPa 250 MPa A. Surveyor coupon test",
        "Recommendations",
        "Clean the bearings.",
    ):
        assert words in pages.whole


def test_the_reviewers_block_is_blank(pages: Pages) -> None:
    """The last page asks for the reviewer's words and holds none."""
    last = pages.texts[-1]
    asked = ("Bars checked by hand, and their rating factors", "Disagreements and remarks")
    answered = ("Accepted / returned, with conditions", "Name", "Licence number", "Signature", "Date")
    labels = (*asked, *answered, "Space for seal")
    assert " ".join(labels) in last


def test_no_number_pretends_to_more_than_six_digits(pages: Pages) -> None:
    """No printed number has more than six significant digits."""
    text = pages.whole.replace(invented.FINGERPRINT, "")
    for number in re.findall(r"\d+(?:\.\d+)?", text):
        digits = number.replace(".", "").lstrip("0") if "." in number else number.strip("0")
        assert len(digits) <= 6, number


def test_the_word_safe_is_never_printed(pages: Pages) -> None:
    """A rating speaks of factors; it never says safe, pass or OK."""
    assert re.search(r"\b(safe|pass(es|ed)?|OK|certified)\b", pages.whole, re.IGNORECASE) is None


def test_a_count_of_one_is_written_in_the_singular(pages: Pages) -> None:
    """One bar is a bar, several are bars."""
    assert re.search(r"\b1 (bars|entries|mechanisms found)\b", pages.whole) is None


def test_a_mechanism_is_reported_in_words() -> None:
    """A truss without equilibrium has no forces, its moving joints are named, and the other truss stays rated."""
    site = invented.bridge()
    rating = invented.rating(site)
    truss = rating.trusses["upstream"]
    bars = tuple(
        bar._replace(dead_components=None, dead_wearing=None, live=None, check=None, load=None, direction=None,
                     demand=None, capacity=None, loss_allowance=None, without_it=None,
                     rating_factor=dict.fromkeys(invented.LEVELS))
        for bar in truss.bars
    )  # fmt: skip
    moving = replace(truss, verdict="mechanism", mechanisms=1, degree=-1, moving_joints=("U3", "L3"),
                     loose_bars=("U2-U3",), bars=bars, reactions=())  # fmt: skip
    zero = Governing({"inventory": 0.0, "operating": 0.0}, None, None, None, None)
    pages = printed(replace(rating, trusses={**rating.trusses, "upstream": moving}, structure=zero))
    assert "No bar gives this figure: truss upstream is a mechanism and has no forces." in pages.whole
    assert "Joints that move: U3, L3." in pages.whole
    assert "No reactions: the truss is a mechanism as it stands, or nearly one." in pages.whole
    assert "no live force" not in pages.whole
    assert lowest_bars(rating)[0].bar in pages.texts[1]


def test_a_bar_without_a_rating_factor_says_so_in_words() -> None:
    """No live force prints as words, never as a huge number."""
    rating = invented.rating(invented.bridge())
    nothing = dict.fromkeys(invented.LEVELS)
    rating = invented.with_bar(rating, "upstream", "L3-U3", rating_factor=nothing, check=None, load=None, capacity=None)
    pages = printed(rating)
    assert "no live force" in pages.whole
    assert "999" not in pages.whole.replace(invented.FINGERPRINT, "")


def test_a_rating_without_any_factor_is_printed() -> None:
    """Where no bar has a rating factor, the report says so and still comes out."""
    rating = invented.rating(invented.bridge())
    nothing = dict.fromkeys(invented.LEVELS)
    for bar in rating.bars:
        rating = invented.with_bar(rating, bar.truss, bar.bar, rating_factor=nothing, check=None, load=None)
    rating = replace(rating, structure=Governing(nothing, None, None, None, None))
    pages = printed(rating)
    assert "No bar has a rating factor." in pages.whole
    assert "No bar has a rating factor that could be checked by hand." in pages.whole


def test_a_bridge_without_visits_is_rated_as_on_the_drawings() -> None:
    """An empty journal is said in words, on the cover and in its part."""
    pages = printed(invented.rating(invented.bridge()), Journal())
    assert "none: rated as on the drawings" in pages.texts[0]
    assert "No visit is on record: every bar is rated as on the drawings." in pages.whole


def test_a_bridge_in_feet_and_kips_is_printed_in_them() -> None:
    """US units stand in every head, on letter paper."""
    pages = printed(invented.rating(invented.bridge()), units="US")
    assert "margin kip" in pages.whole
    assert "kN" not in pages.whole


def test_the_other_answer_stands_beside_the_headline() -> None:
    """Where cracked or slack bars were asked the other way round, both answers are on the result page."""
    rating = invented.rating(invented.bridge())
    other = Governing({"inventory": 0.9, "operating": 1.23}, "upstream", "L0-L1", "tension yield", "crowd")
    pages = printed(replace(rating, if_cracked_bars_hold=other))
    assert "if cracked bars hold 1.23 upstream L0-L1 tension yield crowd" in pages.texts[1]


def test_deflection_and_frequency_are_printed_as_advice() -> None:
    """Both stand with the truss's loads, with the limit and its source, and say that no rating factor rests on them."""
    rating = invented.rating(invented.bridge())
    sags = Deflection("L1", 0.0123, 0.0167, "crowd")
    trusses = {name: replace(truss, deflection=sags, frequency=4.321) for name, truss in rating.trusses.items()}
    page = printed(replace(rating, trusses=trusses)).page_with("Deflection under crowd")
    assert "nearest to its limit at L1: 12.3 mm (limit 16.7 mm)" in page
    assert "mass of the dead load: 4.32 Hz. Both are advisory (AASHTO pedestrian guide 2009, 5 and 6" in page
    assert "Deflection under" not in printed(rating).whole


def test_forces_of_imposed_changes_have_their_table() -> None:
    """A site that imposes something has a table of what it pulls and pushes in each bar; others have none."""
    rating = invented.rating(invented.bridge())
    changed = invented.with_bar(rating, "upstream", "L0-L1", imposed=Effect(12340.0, -5670.0))
    page = printed(changed).page_with("Forces of imposed changes")
    assert "upstream L0-L1 12.3 -5.67" in page
    assert "Forces of imposed changes" not in printed(rating).whole

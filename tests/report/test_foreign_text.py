"""Names and notes from anywhere: nothing in them is read as markup, nothing gets lost."""

from __future__ import annotations

from dataclasses import replace

from report import invented
from report.read_back import read

from inspector.report import make_report
from inspector.report.fonts import markup, visible
from models.bridge import Owner
from models.journal import Entry, Journal, Photo

ODD = '<b>bold</b> & <para> "q" &amp; جسر \u202e\U0001f6a7\ud800 橋 end'
LONG = "Überlänge" * 34


def test_markup_in_a_name_is_printed_as_it_stands() -> None:
    """Signs that a paragraph would read as markup are shown."""
    assert markup("<b>x</b> & y") == "&lt;b&gt;x&lt;/b&gt; &amp; y"


def test_a_sign_without_a_glyph_is_printed_as_its_code_point() -> None:
    """What the fonts lack, what has no shape and what turns the text around is visible."""
    assert visible("橋") == "[U+6A4B]"
    assert visible("\U0001f6a7") == "[U+1F6A7]"
    assert visible("a\u202eb") == "a[U+202E]b"
    assert visible("\x00") == "[U+0000]"
    assert visible("\ud800") == "[U+D800]"


def test_letters_of_other_scripts_that_the_fonts_have_are_kept() -> None:
    """Greek, Cyrillic, Arabic and accents print as they are."""
    assert visible("Ärgernis Ω мост جسر ½ ≥") == "Ärgernis Ω мост جسر ½ ≥"


def test_a_report_full_of_odd_text_comes_out_whole() -> None:
    """Names of 300 letters break instead of running off, and odd signs are there to be read."""
    truss = invented.pratt("T " + LONG, 4)
    bars = tuple(replace(bar, id=f"{bar.id} {LONG if k % 2 else ODD}", section=ODD) for k, bar in enumerate(truss.bars))
    truss = replace(truss, bars=bars)
    site = invented.bridge(truss, name=f"{ODD} {LONG}")
    site = replace(site, sections={ODD: site.sections["chord"]}, owner=Owner(ODD), locality=LONG, notes=ODD * 20)
    rating = replace(invented.rating(site), not_rated=(ODD, LONG), assumptions=(ODD, LONG))
    visit = invented.journal(site).visits[0]
    note = Entry("odd", truss.name, bars[0].id, "file", 1000, note=ODD * 100, reason=LONG, photos=(Photo(LONG),))
    journal = Journal((replace(visit, inspector=ODD, weather=LONG, entries=(*visit.entries, note)),))
    document = make_report(rating, site, journal, invented.conditions(site), invented.hand_checks(rating))
    solid = read(document).solid
    for words in ("<b>bold</b>&<para>", "&amp;", "[U+202E]", "[U+1F6A7]", "[U+D800]", "[U+6A4B]", LONG):
        assert words in solid

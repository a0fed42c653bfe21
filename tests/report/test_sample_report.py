"""The report of the sample sites, from the file on disk to the printed page."""

from __future__ import annotations

import pytest
from report import sample

from models.words import CAUTION, factor


@pytest.mark.parametrize("name", sample.NAMES)
def test_every_sample_prints_all_its_bars(name: str) -> None:
    """Every bar stands in the report with its rating factor at the upper level, and every page with the caution."""
    rated, pages = sample.rated(name), sample.pages(name)
    for bar in rated.rating.bars:
        assert bar.bar in pages.solid
        value = bar.rating_factor[rated.rating.upper_level]
        assert value is None or factor(value) in pages.whole
    for number, text in enumerate(pages.texts, 1):
        assert CAUTION in text
        assert rated.rating.provenance.inputs_sha256 in text
        assert f"Page {number} of {len(pages.texts)}" in text


def test_a_severed_hanger_comes_first() -> None:
    """The page that everybody reads starts with what to act on."""
    rated, pages = sample.rated("severed-hanger"), sample.pages("severed-hanger")
    result = pages.texts[1]
    urgent = next(finding for finding in rated.rating.findings if finding.level == "act now")
    assert result.index("Act now") < result.index(urgent.text) < result.index("Lowest rating factor")
    assert "is a mechanism and has no forces" in result


def test_every_reading_of_a_sample_is_printed() -> None:
    """No reading of any visit is left out, whatever became of it."""
    rated, pages = sample.rated("wrought-iron-crossed"), sample.pages("wrought-iron-crossed")
    for visit in rated.journal.visits:
        for entry in visit.entries:
            for reading in entry.readings or ():
                assert "; ".join(value.text for value in reading.thickness) in pages.whole
